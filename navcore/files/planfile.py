"""A plan file: bytes to a plan, and back.

What no edit touched is written back to the byte: the plan carries the text of its head, and each waypoint its block's.
"""

from __future__ import annotations

from navcore.files.planfile_read import MAX_BYTES, ReadPlan, read_plan
from navcore.files.planfile_write import write_plan

__all__ = ["MAX_BYTES", "ReadPlan", "read_plan", "write_plan"]
