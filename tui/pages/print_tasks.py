"""What is done on the Print page, each by one command."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from navcore.errors import NavError
from navcore.files.store import write_whole
from navcore.prints.column_choice import ONLY, screen_columns
from navcore.prints.csv import write_csv
from navcore.prints.leg_table import make_leg_table
from navcore.text.plain import visible
from tui.pages.file_tasks import path_typed
from tui.present.papers import PAPERS, paper_words, sheet_cells
from tui.widgets.dialogs import Answer, Question
from tui.widgets.form import Field, Form, FormSheet

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from tui.pages.prints import PrintPage

_UNNAMED = "passage"


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
    plan_path = page.session.path
    usual = plan_path.with_suffix(suffix) if plan_path else Path.cwd() / f"{_UNNAMED}{suffix}"

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            _put(page, path_typed(field, texts[0], usual), data)

    field = Field("file", visible(str(usual)), str, "Enter writes it there; its folder must exist")
    page.app.push_screen(Form(FormSheet("Write the leg table", (field,), lambda _: None)), filled)


def _put(page: PrintPage, path: Path, data: bytes) -> None:
    if not path.exists():
        _put_now(page, path, data)
        return

    def answered(key: str | None) -> None:
        if key == "o":
            _put_now(page, path, data)

    answers = (Answer("o", "overwrite it"), Answer("k", "keep it"))
    page.app.push_screen(Question(f"{visible(path.name)} is there already", [], answers), answered)


def _put_now(page: PrintPage, path: Path, data: bytes) -> None:
    try:
        write_whole(path, data)
    except OSError as error:
        page.desk.say(f"{path}: {error.strerror or error}; nothing was written", alert=True)
    else:
        page.desk.say(f"leg table written to {path.absolute()}")


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
