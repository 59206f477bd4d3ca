"""A plan opened: shown, or its problems listed, and what must be said of it; all of that the first picture needs."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import PlanFileError
from navcore.text.plain import visible
from navcore.text.wrap import wrap
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from pathlib import Path

    from tui.pages.desk import Desk
    from tui.present.tone import Line
    from tui.session import Session

DIALOG_CELLS = 70
"""Cells of a line in a dialog, where the screen has them."""


def said_of(text: str, cells: int = DIALOG_CELLS, tone: Tone = Tone.PLAIN) -> list[Line]:
    """Return a text in lines for a dialog."""
    return [line(Piece(part, tone)) for part in wrap(visible(text), cells)]


def open_path(desk: Desk, path: Path) -> None:
    """Open a plan and show it; a file that can't be read in full lists its problems and opens nothing."""
    failure = try_to_open(desk.session, path)
    if failure is None:
        desk.renew()
        welcome(desk)
    else:
        tell_failure(desk, path, failure)


def try_to_open(session: Session, path: Path) -> PlanFileError | OSError | None:
    """Open a plan, and return why that could not be done."""
    try:
        session.open(path)
    except (PlanFileError, OSError) as error:
        return error
    return None


def tell_failure(desk: Desk, path: Path, failure: PlanFileError | OSError) -> None:
    """Say why a plan could not be opened."""
    if isinstance(failure, PlanFileError):
        _list_problems(desk, path, failure)
    else:
        desk.say(f"{failure.strerror or failure}: {path}", alert=True)


def _list_problems(desk: Desk, path: Path, error: PlanFileError) -> None:
    from tui.widgets.dialogs import Reading

    cells = min(DIALOG_CELLS, desk.size.width - 8)
    problems = [part for problem in error.problems for part in (*said_of(str(problem), cells), line())]
    title = f"{visible(path.name)}: {len(error.problems)} to put right; nothing was opened"
    desk.push_screen(Reading(title, problems))


def welcome(desk: Desk) -> None:
    """Say what must be said of a plan that was just opened."""
    desk.page.take_focus()
    desk.say("Planning aid only: ! shows the caution")
    if desk.session.warnings or desk.session.recovery.also_open is not None:
        _tell(desk)
    if desk.session.recovery.offered is not None:
        _offer(desk)


def _tell(desk: Desk) -> None:
    from tui.widgets.dialogs import Reading

    session = desk.session
    if session.warnings:
        lines = [part for warning in session.warnings for part in (*said_of(str(warning)), line())]
        desk.push_screen(Reading("Opened; look at these", lines))
    if session.recovery.also_open is not None:
        holder = session.recovery.also_open
        words = f"Process {holder.pid} on {holder.host} has this plan open too. Whoever saves second is warned."
        desk.push_screen(Reading("Open in another copy", said_of(words)))


def _offer(desk: Desk) -> None:
    from tui.widgets.dialogs import Answer, Question

    found = desk.session.recovery.offered
    if found is None:
        return
    count = len(found.steps)
    kept = "what was being typed is kept" if not count else f"{count} change{'s' * (count > 1)} kept, the last of them:"
    words = said_of(f"The last run ended before this plan was saved: {kept}")
    words += [line(Piece(f"  {visible(name)}", Tone.QUIET)) for name, _ in found.steps[-5:]]
    answers = (Answer("t", "take them; each can be undone"), Answer("g", "give them up"))

    def answered(key: str | None) -> None:
        if key in {"t", "g"}:
            desk.session.recover(accept=key == "t")
            desk.renew()
            desk.page.take_focus()
        else:
            _offer(desk)

    desk.push_screen(Question("Changes from a run that broke off", words, answers), answered)
