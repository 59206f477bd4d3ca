"""Where the journal of a plan is kept, and what an earlier run has left there.

Beside the plan, so that whoever opens it next is offered what was lost; in the user's own folder where that can't be,
or for a plan that has no file. No failure here stops the work: it is told, and the plan goes on without a journal.
"""

from __future__ import annotations

import os
from typing import TYPE_CHECKING

from tui.journal import SUFFIX, Journal, JournalHeldError

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator
    from pathlib import Path

    from navcore.plan.model import Plan
    from tui.journal import Holder, Recovered, Typing
    from tui.state import State


class Recovery:
    """The journal of the open plan, wherever it could be made.

    Attributes:
        also_open: Another copy that has this plan open; None where there is none.
        offered: What an earlier run has left; None once it is taken or given up.
        trouble: Why changes can't be kept against a crash; "" while they are.
    """

    def __init__(self, state: State) -> None:
        self.also_open: Holder | None = None
        self.offered: Recovered | None = None
        self.trouble = ""
        self._state = state
        self._journal: Journal | None = None
        self._typing: Typing | None = None

    def hold(self, path: Path | None, plan: Plan, mark: str) -> None:
        """Hold the journal of a plan that was just opened; one that has something to offer is left as it is."""
        self.let_go()
        self.also_open, self.offered, self.trouble = None, None, ""
        self._state.make_folder()
        own = self._state.folder / f"unnamed-{os.getpid()}-{id(self):x}{SUFFIX}"
        for place in (*self._places(path), own):
            try:
                self._journal = Journal(place)
            except JournalHeldError as error:
                self.also_open = error.holder if path is not None else None
                continue
            except OSError as error:
                self.trouble = f"{place}: {error.strerror or error}"
                continue
            found = self._journal.recovered()
            self.offered = found if found is not None and found.has_changes else None
            self.trouble = ""
            if path is not None or self.offered is not None or place == own:
                break
            self.let_go()
        if self.offered is None:
            self.start(plan, mark)

    def start(self, plan: Plan, mark: str) -> None:
        """Begin the journal again from a plan that its file holds."""
        self.offered = self._typing = None
        self._try(lambda journal: journal.start(plan, mark))

    def resume(self) -> None:
        """Go on with the journal that was offered."""
        self._typing = self.offered.typing if self.offered else None
        self.offered = None
        self._try(Journal.resume)

    def keep(self, name: str, before: Plan, after: Plan) -> None:
        """Keep a committed change."""
        self._try(lambda journal: journal.keep(name, before, after))

    def keep_typing(self, typing: Typing | None) -> None:
        """Keep the text of the open row, where it differs from what was kept last."""
        if typing != self._typing:
            self._typing = typing
            self._try(lambda journal: journal.keep_typing(typing))

    def let_go(self) -> None:
        """Let go of the plan and of what was kept; what was offered and not answered stays."""
        if self._journal is not None:
            self._journal.close(discard=self.offered is None)
            self._journal = None

    def _places(self, path: Path | None) -> Iterator[Path]:
        """Yield where the journal may be before this process makes one of its own."""
        if path is not None:
            yield path.with_name(f".{path.name}{SUFFIX}")
            yield self._state.own_file(path, SUFFIX)
        else:
            yield from sorted(self._state.folder.glob(f"unnamed-*{SUFFIX}"))

    def _try(self, write: Callable[[Journal], None]) -> None:
        if self._journal is None:
            return
        try:
            write(self._journal)
        except OSError as error:
            self.trouble = f"{self._journal.path}: {error.strerror or error}"
