"""What ties a print to the plan it was made from."""

from __future__ import annotations

import hashlib
import json
from dataclasses import fields, is_dataclass
from datetime import datetime, timedelta
from typing import TYPE_CHECKING

from navcore.position import Position

if TYPE_CHECKING:
    from navcore.plan.model import Plan

FINGERPRINT_LENGTH = 8


def fingerprint(plan: Plan) -> str:
    """Return eight hexadecimal figures that change when a value of the plan does; comments in its file don't count."""
    canonical = json.dumps(_plain(plan), sort_keys=True, ensure_ascii=True)
    return hashlib.sha256(canonical.encode("ascii")).hexdigest()[:FINGERPRINT_LENGTH]


def _plain(value: object) -> object:
    """Return a value as JSON can write it, without the text of the file it came from."""
    if isinstance(value, Position):
        return [value.lat_deg, value.lon_deg]
    if is_dataclass(value):
        return {item.name: _plain(getattr(value, item.name)) for item in fields(value) if item.compare}
    if isinstance(value, tuple):
        return [_plain(item) for item in value]
    if isinstance(value, datetime):
        return value.isoformat()
    if isinstance(value, timedelta):
        return value.total_seconds()
    return "Infinity" if value == float("inf") else value
