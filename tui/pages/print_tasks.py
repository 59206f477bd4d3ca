"""What is done on the Print page, each by one command."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import NavError
from navcore.prints.column_choice import ONLY, screen_columns
from navcore.prints.csv import write_csv
from navcore.prints.leg_table import make_leg_table
from tui.pages.writing import write_asking
from tui.present.papers import PAPERS, paper_words, sheet_cells
from tui.widgets.form import Field, Form, FormSheet

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from tui.pages.prints import PrintPage


def _paper(page: PrintPage) -> None:
    page.paper = PAPERS[(PAPERS.index(page.paper) + 1) % len(PAPERS)]
    page.show()
    page.desk.say(paper_words(page.paper))


def _columns(page: PrintPage) -> None:
    hint = f"names with commas between them; {ONLY} before them leaves the usual ones out"

    def check(text: str) -> object:
        return screen_columns(page.session.solution, text)

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            page.columns = texts[0].strip()
            page.show()

    field = Field("columns", page.columns, check, hint)
    page.app.push_screen(Form(FormSheet("Columns besides the usual ones", (field,), lambda _: None)), filled)


def _pdf(page: PrintPage) -> bytes:
    # Imported here because it costs as much as the rest of the workbook, and most runs print nothing.
    from navcore.prints.pdf import write_pdf

    printed = write_pdf(page.session.solution, page.paper, page.columns)
    if printed.lacking:
        marks = ", ".join(f"U+{ord(character):04X}" for character in sorted(printed.lacking))
        page.app.call_later(
            page.desk.say, f"on paper a mark stands for characters that its font lacks: {marks}", alert=True
        )
    return printed.data


def _csv(page: PrintPage) -> bytes:
    solution = page.session.solution
    return write_csv(make_leg_table(solution, screen_columns(solution, page.columns))).encode("utf-8")


def _write(page: PrintPage, suffix: str, make: Callable[[PrintPage], bytes]) -> None:
    """Ask where to, and write it there."""
    try:
        data = make(page)
    except NavError as error:
        page.desk.say(str(error), alert=True)
        return
    write_asking(page.desk, "leg table", suffix, data)


TASKS: Mapping[str, Callable[..., None]] = {
    "sheet.next": lambda page: page.turn(1),
    "sheet.back": lambda page: page.turn(-1),
    "sheet.right": lambda page: page.look(1),
    "sheet.left": lambda page: page.look(-1),
    "paper": _paper,
    "print.columns": _columns,
    "write.pdf": lambda page: _write(page, ".pdf", _pdf),
    "write.text": lambda page: _write(page, ".txt", lambda page: page.text(sheet_cells(page.paper)).encode("utf-8")),
    "write.csv": lambda page: _write(page, ".csv", _csv),
}
