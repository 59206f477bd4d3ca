"""The open plan: its figures, undo and redo, its file, and its recovery journal. It knows nothing of a screen."""

from __future__ import annotations

import errno
import hashlib
from typing import TYPE_CHECKING

from navcore.files.planfile import MAX_BYTES, read_plan, write_plan
from navcore.files.store import read_bytes_capped, write_whole
from navcore.plan.model import Plan
from navcore.plan.solve import Solution, solve
from tui.history import History, Step
from tui.recovery import Recovery

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

    from navcore.errors import Problem
    from tui.journal import Typing
    from tui.state import State


class NoFileError(Exception):
    """The plan was never saved, so that it has no file."""


class ChangedOnDiskError(Exception):
    """The file is no longer the one that was read: someone else has written or removed it."""


class WouldOverwriteError(Exception):
    """A file of that name is there already."""


class Session:
    """One open plan. Every change goes through `change`, and is in the journal when that returns.

    Attributes:
        state: The user's own folder.
        recovery: The journal, and what a crash has left.
        history: The steps that can be taken back.
        solution: The plan with all its figures.
        path: Its file; None for a plan that was never saved.
        row: The row of the cursor, shared by all pages.
        typing: Text in an open row, not yet taken.
        warnings: What was doubtful in the file.
    """

    def __init__(self, state: State) -> None:
        self.state = state
        self.recovery = Recovery(state)
        self.history = History()
        self.solution: Solution = solve(Plan())
        self.path: Path | None = None
        self.row = 0
        self.typing: Typing | None = None
        self.warnings: tuple[Problem, ...] = ()
        self._saved = self.solution.plan
        self._mark = ""

    @property
    def plan(self) -> Plan:
        """The plan as it stands."""
        return self.solution.plan

    @property
    def is_changed(self) -> bool:
        """Whether the plan holds what its file does not."""
        return self.plan is not self._saved and self.plan != self._saved

    def new(self) -> None:
        """Open an empty plan without a file, offering what an unnamed plan has lost in a crash."""
        self._take_up(None, Plan(), "")

    def open(self, path: Path) -> None:
        """Open a plan's file, offering what a crash has left of it; where that fails, what was open stays.

        Raises:
            PlanFileError: It can't be read in full; every problem is named.
            OSError: It can't be read, or is no plain file.
        """
        if path.exists() and not path.is_file():
            # A pipe would be waited for without end.
            raise OSError(errno.EINVAL, "this is no plain file", str(path))
        data = read_bytes_capped(path, MAX_BYTES)
        read = read_plan(data, str(path))
        self._take_up(path, read.plan, _mark_of(data))
        self.warnings = read.warnings
        self.state.remember(path)

    def recover(self, *, accept: bool) -> None:
        """Take what was offered, its steps to be undone one by one, or give it up."""
        found = self.recovery.offered
        if found is None:
            return
        if not accept:
            self.recovery.start(self._saved, self._mark)
            return
        self._saved, self._mark = found.base, found.base_mark
        before = found.base
        for name, after in found.steps:
            self.history.add(Step(name, before, after, 0, 0))
            before = after
        self.typing = found.typing
        self.solution = solve(before, self.solution)
        self.recovery.resume()

    def change(self, name: str, edit: Callable[[Plan], Plan], row: int | None = None) -> bool:
        """Make a change; return whether it made a difference.

        Args:
            name: What it is, in words, for undo.
            edit: From the plan to the new one.
            row: Where the cursor goes; None leaves it.

        Raises:
            EditError: The plan does not allow it; nothing has changed.
        """
        before = self.plan
        after = edit(before)
        row_before = self.row
        if row is not None:
            self.row = row
        if after is before or after == before:
            return False
        self._set(name, after)
        self.history.add(Step(name, before, after, row_before, self.row))
        return True

    def undo(self) -> str:
        """Take the last change back and return its name; "" where there is none."""
        step = self.history.undo()
        if step is None:
            return ""
        self._set(f"undo {step.name}", step.before)
        self.row = step.row_before
        return step.name

    def redo(self) -> str:
        """Make the change again that was taken back last and return its name; "" where there is none."""
        step = self.history.redo()
        if step is None:
            return ""
        self._set(f"redo {step.name}", step.after)
        self.row = step.row_after
        return step.name

    def save(self, *, over_others: bool = False) -> None:
        """Write the plan to its file, whole or not at all.

        Raises:
            NoFileError: It has none; save_as gives it one.
            ChangedOnDiskError: Someone else has changed the file; nothing is written unless over_others is said.
            OSError: It can't be written.
        """
        path = self._file()
        if not over_others and _mark_on_disk(path) != self._mark:
            raise ChangedOnDiskError
        self._write(path)
        self.recovery.start(self._saved, self._mark)

    def save_as(self, path: Path, *, over_others: bool = False) -> None:
        """Write the plan to another file, which is its file from then on.

        Raises:
            WouldOverwriteError: The file is there already; nothing is written unless over_others is said.
            OSError: It can't be written.
        """
        if path.exists() and not over_others:
            raise WouldOverwriteError
        self._write(path)
        self.path = path
        self.recovery.hold(path, self._saved, self._mark)
        self.recovery.start(self._saved, self._mark)

    def revert(self) -> None:
        """Read the file again; that is a change which can be undone.

        Raises:
            NoFileError: It has none.
            PlanFileError: As open; nothing has changed.
            OSError: As open; nothing has changed.
        """
        path = self._file()
        data = read_bytes_capped(path, MAX_BYTES)
        read = read_plan(data, str(path))
        self.change("go back to the file", lambda _: read.plan)
        self._saved, self._mark = read.plan, _mark_of(data)

    def keep_typing(self) -> None:
        """Put the text of the open row into the journal, where it differs from what is there."""
        self.recovery.keep_typing(self.typing)

    def close(self) -> None:
        """Let go of the plan; changes that were not saved are given up."""
        self.recovery.let_go()

    def _set(self, name: str, after: Plan) -> None:
        before = self.plan
        self.recovery.keep(name, before, after)
        self.solution = solve(after, self.solution)

    def _file(self) -> Path:
        if self.path is None:
            raise NoFileError
        return self.path

    def _write(self, path: Path) -> None:
        data = write_plan(self.plan)
        write_whole(path, data)
        self._saved, self._mark = self.plan, _mark_of(data)
        self.state.remember(path)

    def _take_up(self, path: Path | None, plan: Plan, mark: str) -> None:
        self.path, self._saved, self._mark = path, plan, mark
        self.solution = solve(plan)
        self.history = History()
        self.row = 0
        self.typing = None
        self.warnings = ()
        self.recovery.hold(path, plan, mark)


def _mark_of(data: bytes) -> str:
    return hashlib.sha256(data).hexdigest()


def _mark_on_disk(path: Path) -> str:
    """Return the mark of a file as it is now; "" where it is gone."""
    try:
        return _mark_of(read_bytes_capped(path, MAX_BYTES))
    except FileNotFoundError:
        return ""
