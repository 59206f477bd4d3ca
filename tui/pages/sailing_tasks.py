"""What the Passage page shows of a leg beyond its working: the hand-check worksheet, the comparison, other figures."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import NavError
from navcore.files.planfile import MAX_BYTES, read_plan
from navcore.files.store import read_bytes_capped
from navcore.plan.solve import solve
from navcore.text.plain import visible
from tui.pages.file_tasks import choose_file
from tui.pages.writing import write_asking
from tui.present.rows import leg_of
from tui.widgets.form import Field, Form, FormSheet
from tui.widgets.text_view import TextView

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence
    from pathlib import Path

    from navcore.plan.solve import Solution
    from tui.pages.passage import PassagePage

_NO_LEG = "there is no leg yet: a second waypoint makes one"
_WRITE_PDF = {"f": "write PDF"}
_OTHER_PLAN = {"o": "another plan beside it"}


def _leg(page: PassagePage) -> int | None:
    index = leg_of(page.session.plan, page.session.row)
    if index is None:
        page.desk.say(_NO_LEG, alert=True)
    return index


def _worksheet(page: PassagePage) -> None:
    # Imported here because most runs never ask for it.
    from navcore.prints.worksheet import make_worksheet
    from navcore.prints.worksheet_media import worksheet_text

    index = _leg(page)
    if index is None:
        return
    sheets = make_worksheet(page.session.solution, (index,))

    def answered(key: str | None) -> None:
        if key:
            from navcore.prints.worksheet_pdf import worksheet_pdf

            write_asking(page.desk, "worksheet", f"-leg-{index + 1}.pdf", worksheet_pdf(sheets).data)

    page.app.push_screen(TextView("Hand check", worksheet_text(sheets), _WRITE_PDF), answered)


def _compare(page: PassagePage) -> None:
    if _leg(page) is not None:
        session = page.session
        name = session.path.name if session.path else "this plan"
        _show_compared(page, [(visible(name), session.solution)])


def _show_compared(page: PassagePage, solutions: list[tuple[str, Solution]]) -> None:
    from navcore.plan.compared import compare_plan
    from navcore.prints.plans_compared import plans_text

    text = plans_text([(name, compare_plan(solution)) for name, solution in solutions])

    def picked(path: Path | None) -> None:
        if path is None:
            return
        try:
            plan = read_plan(read_bytes_capped(path, MAX_BYTES), str(path)).plan
        except (NavError, OSError) as error:
            page.desk.say(str(error), alert=True)
            return
        _show_compared(page, [*solutions, (visible(path.name), solve(plan))])

    def answered(key: str | None) -> None:
        if key:
            choose_file(page.desk, picked)

    page.app.push_screen(TextView("Rhumb line, great circle, and what is sailed", text, _OTHER_PLAN), answered)


def _reconcile(page: PassagePage) -> None:
    from navcore.sailings.reconcile import shown_as_typed

    index = _leg(page)
    if index is None:
        return

    def check(texts: Sequence[str]) -> object:
        return shown_as_typed(texts[0], texts[1])

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            _show_explained(page, index, texts)

    fields = (
        Field("distance", "", lambda text: shown_as_typed(text, ""), "as the other system shows it: 3755 or 3755.0"),
        Field("course", "", lambda text: shown_as_typed("1", text), "likewise, such as 204; empty where it shows none"),
    )
    page.app.push_screen(Form(FormSheet(f"Another system shows for leg {index + 1}", fields, check)), filled)


def _show_explained(page: PassagePage, index: int, texts: Sequence[str]) -> None:
    from navcore.prints.reconciled import NOTHING_FITS, reconciled_text
    from navcore.sailings.comparison import compare_lines
    from navcore.sailings.reconcile import reconcile, shown_as_typed

    plan = page.session.plan
    ends = plan.waypoints[index].position, plan.waypoints[index + 1].position
    explanations = reconcile(*ends, plan.figure, shown_as_typed(texts[0], texts[1]))
    words = " ".join(text for text in texts if text)
    text = reconciled_text(compare_lines(*ends, plan.figure), words, explanations)
    page.app.push_screen(TextView("What explains it", text if explanations else f"{text}\n{NOTHING_FITS}"))


TASKS: Mapping[str, Callable[[PassagePage], None]] = {
    "worksheet": _worksheet,
    "compare": _compare,
    "reconcile": _reconcile,
}
