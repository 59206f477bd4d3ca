"""The app that the workbook is measured against: the same rows in a plain table, with a header and a footer."""

from __future__ import annotations

import json
import sys
from pathlib import Path
from typing import TYPE_CHECKING, ClassVar

from textual.app import App, ComposeResult
from textual.widgets import DataTable, Footer, Header

if TYPE_CHECKING:
    from textual.binding import BindingType


class Bare(App[None]):
    """Rows of text, read from a file, under the usual header and footer."""

    BINDINGS: ClassVar[list[BindingType]] = [("q", "quit", "Quit")]

    def compose(self) -> ComposeResult:
        yield Header()
        yield DataTable(cursor_type="row")
        yield Footer()

    def on_mount(self) -> None:
        headings, *rows = json.loads(Path(sys.argv[1]).read_text(encoding="utf-8"))
        table = self.query_one(DataTable)
        table.add_columns(*headings)
        table.add_rows(rows)


if __name__ == "__main__":
    Bare().run()
