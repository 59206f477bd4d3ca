"""A plan named on the command line."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from navcore.files.planfile import MAX_BYTES, read_plan
from navcore.files.store import read_bytes_capped
from tui.cli.output import say

if TYPE_CHECKING:
    from navcore.plan.model import Plan


def open_plan(path: str) -> Plan:
    """Return the plan in a file; what is doubtful in it is said on standard error.

    Raises:
        PlanFileError: It can't be read in full; every problem is named.
        OSError: It can't be opened.
    """
    read = read_plan(read_bytes_capped(Path(path), MAX_BYTES), path)
    for warning in read.warnings:
        say(f"{path}:{warning}")
    return read.plan
