"""Undo and redo: the plans before and after each step, and what the step was called."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from navcore.plan.model import Plan

MOST_STEPS = 2000
"""How many steps can be taken back; plans share what a step did not touch, so each keeps little more than that."""


@dataclass(frozen=True, slots=True)
class Step:
    """One change that can be taken back.

    Attributes:
        name: What it was, in words.
        before: The plan before it.
        after: The plan after it.
        row_before: The row of the cursor before it.
        row_after: The row after it.
    """

    name: str
    before: Plan
    after: Plan
    row_before: int
    row_after: int


class History:
    """The steps that can be taken back, and those that were."""

    def __init__(self) -> None:
        self._done: list[Step] = []
        self._undone: list[Step] = []

    @property
    def undo_name(self) -> str:
        """The step that undo takes back; "" for none."""
        return self._done[-1].name if self._done else ""

    @property
    def redo_name(self) -> str:
        """The step that redo makes again; "" for none."""
        return self._undone[-1].name if self._undone else ""

    def add(self, step: Step) -> None:
        """Add a step; what was taken back can't be made again from here."""
        self._done.append(step)
        del self._done[:-MOST_STEPS]
        self._undone.clear()

    def undo(self) -> Step | None:
        """Return the last step, to be taken back; None where there is none."""
        if not self._done:
            return None
        self._undone.append(self._done.pop())
        return self._undone[-1]

    def redo(self) -> Step | None:
        """Return the step taken back last, to be made again; None where there is none."""
        if not self._undone:
            return None
        self._done.append(self._undone.pop())
        return self._done[-1]
