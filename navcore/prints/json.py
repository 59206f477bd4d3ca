"""The leg table as JSON: every quantity in full precision, unrounded; what has no value is null."""

from __future__ import annotations

import json
from datetime import UTC, datetime, timedelta
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.quantities import QUANTITIES, Row, rows_of
from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.leg_table import method_line, refuse_unworked
from navcore.prints.tracks import composite_json, parts_json

if TYPE_CHECKING:
    from navcore.plan.quantities import Value
    from navcore.plan.solve import Solution


def write_json(solution: Solution) -> str:
    """Return the leg table as JSON.

    Raises:
        NoAnswerError: A leg's line can't be worked; every such leg is named.
    """
    refuse_unworked(solution)
    plan = solution.plan
    total_m = solution.total_m
    times = solution.schedule.time_so_far
    document = {
        "title": plan.title,
        "voyage": plan.voyage,
        "trade": plan.trade.value,
        "craft": {"name": plan.craft.name, "draught_m": plan.craft.draught_m},
        "figure": plan.figure.name,
        "datum": plan.datum,
        "revision": plan.revision,
        "fingerprint": fingerprint(plan),
        "departure": plain(plan.departure),
        "method": method_line(plan),
        "waypoints": [_record(Row.WAYPOINT, solution, index) for index in rows_of(Row.WAYPOINT, solution)],
        "legs": [
            {
                **_record(Row.LEG, solution, index),
                "composite": None if leg.composite is None else composite_json(leg.composite),
                "parts": None if leg.parts is None else parts_json(leg.parts),
                "notes": dict(plan.legs[index].notes),
            }
            for index, leg in enumerate(solution.legs)
        ],
        "total_nmi": None if total_m is None else total_m / METRES_PER_NAUTICAL_MILE,
        "total_time_s": plain(times[-1]) if times else None,
        "prepared": plan.prepared,
        "checked": plan.checked,
        "approved": plan.approved,
        "caution": CAUTION,
    }
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def plain(value: Value) -> str | float | None:
    """Return a value as JSON has it: an instant in ISO 8601 with Z, a duration in seconds."""
    if isinstance(value, datetime):
        return value.astimezone(UTC).isoformat().replace("+00:00", "Z")
    return value.total_seconds() if isinstance(value, timedelta) else value


def _record(row: Row, solution: Solution, index: int) -> dict[str, str | float | None]:
    return {
        quantity.key: plain(quantity.value(solution, index)) for quantity in QUANTITIES.values() if quantity.row is row
    }
