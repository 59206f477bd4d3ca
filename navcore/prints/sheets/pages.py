"""The pages of a plan's plotting sheets: the index of a set, the sheets, and the spacing table of each."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from navcore.prints.leg_table import make_leg_table
from navcore.prints.paper.fonts import printable
from navcore.prints.plotting_sheet import notes_of, revision_words, scale_words, title_of
from navcore.prints.sheets.foot import SheetWords
from navcore.prints.sheets.grid_courses import grid_table
from navcore.prints.sheets.pdf import write_drawings
from navcore.prints.sheets.picture import draw_sheet
from navcore.prints.sheets.ruling import PageWords, draw_ruling
from navcore.prints.sheets.svg import write_svg

if TYPE_CHECKING:
    from navcore.charts.sheet import Sheet
    from navcore.charts.sheet_set import SheetSet
    from navcore.plan.solve import Solution
    from navcore.prints.sheets.drawing import Drawing


def write_sheets_pdf(solution: Solution, sheets: SheetSet) -> bytes:
    """Return all the pages as a PDF; the same plan gives the same bytes."""
    return write_drawings(draw_pages(solution, sheets), title_of(solution))


def write_sheet_svg(solution: Solution, sheets: SheetSet, number: int = 1) -> str:
    """Return one sheet as SVG; number 0 is the index of a set."""
    chosen = sheets.sheets[number - 1] if number else sheets.index or sheets.sheets[0]
    return write_svg(_draw(solution, chosen, "page 1 of 1"), title_of(solution))


def draw_pages(solution: Solution, sheets: SheetSet) -> list[Drawing]:
    """Return the index where there is one, the sheets, and then their spacing tables, numbered through."""
    drawn = [*([sheets.index] if sheets.index else []), *sheets.sheets]
    words = PageWords(title_of(solution), printable(revision_words(solution.plan))[0])
    grid = grid_table(solution, sheets.sheets[0].plane.projection)
    # The legs' grid courses are the same on every sheet of a set, and stand with the last one's table.
    more = [() for _ in sheets.sheets[1:]] + [(grid,) if grid else ()]
    tables = list(zip(sheets.sheets, more, strict=True))
    total = len(drawn) + sum(len(draw_ruling(sheet, words, extra)) for sheet, extra in tables)
    pages = [_draw(solution, sheet, f"page {page} of {total}") for page, sheet in enumerate(drawn, 1)]
    for sheet, extra in tables:
        pages += draw_ruling(sheet, replace(words, before=len(pages), of_total=f" of {total}"), extra)
    return pages


def _draw(solution: Solution, sheet: Sheet, page: str) -> Drawing:
    table = make_leg_table(solution)
    signatures = tuple((role, printable(name)[0]) for role, name in table.signatures)
    words = SheetWords(title_of(solution), scale_words(sheet), page, notes_of(solution, sheet), signatures)
    return draw_sheet(sheet, words)
