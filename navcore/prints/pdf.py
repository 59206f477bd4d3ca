"""The leg table on paper, as a PDF: the one thing that leaves the room."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

from navcore.plan.model import Trade
from navcore.prints.column_choice import paper_columns
from navcore.prints.grid import make_grid
from navcore.prints.ladder import HAIR_PT, HEAVY_PT, headings, ladder
from navcore.prints.leg_table import make_leg_table
from navcore.prints.paper.fonts import MISSING, printable
from navcore.prints.paper.head import make_head, set_head
from navcore.prints.paper.page_layout import MARGIN_PT, Block, Paper, Rule, Strip, Text, paginate
from navcore.prints.paper.pdf_canvas import write_pages
from navcore.prints.paper.typeset import SMALLEST_PT, fold

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from navcore.plan.solve import Solution
    from navcore.prints.leg_table import LegTable
    from navcore.prints.paper.page_layout import Group, Mark

KINDS = {Trade.MARINE: "Leg table", Trade.AVIATION: "Navigation log"}

LEGEND = (
    "Boxes, in turn: entered in the equipment; circled when a second person has checked it there; ticked when course "
    "and distance to the next agree; crossed out when passed."
)

_SIZE_PT = 10.0
_LEADING_PT = 12.5
_NOTES_LINE_PT = 22.0
_NOTES_TOP_PT = 16.0


@dataclass(frozen=True, slots=True)
class PrintedPdf:
    """A PDF, and what of it the reader must be told.

    Attributes:
        data: The bytes of the file.
        lacking: The characters that the font lacks; on paper a mark stands for each.
    """

    data: bytes
    lacking: frozenset[str]


def write_pdf(solution: Solution, paper: Paper | None = None, names: str = "") -> PrintedPdf:
    """Return the leg table of a solved plan as a PDF; the same plan gives the same bytes.

    Args:
        solution: The plan, solved.
        paper: The sheet; A4 landscape unless given.
        names: Columns to print besides the trade's own, by key or heading, with commas between them.

    Raises:
        NoAnswerError: A leg's line can't be worked; every such leg is named.
        ParseError: A name that no column has.
    """
    paper = paper or Paper()
    pages, title, lacking = lay_out(solution, paper, names)
    return PrintedPdf(write_pages(pages, paper, title), lacking)


def lay_out(solution: Solution, paper: Paper, names: str = "") -> tuple[list[list[Mark]], str, frozenset[str]]:
    """Return the pages of the leg table, its title, and the characters that the font lacks."""
    plan = solution.plan
    columns = paper_columns(solution, landscape=paper.landscape, names=names)
    typed = make_leg_table(solution, columns)
    text = PrintableText()
    table = printable_table(typed, text)
    head = make_head(plan, table, KINDS[plan.trade], LEGEND)
    head = replace(head, particulars=text.pairs(head.particulars))
    grid = make_grid(table, MARGIN_PT, MARGIN_PT + paper.room_pt)
    set_up = set_head(head, paper, headings(table, grid))
    end = [*_end(table, paper), *lacking_notice(text.lacking, paper), *in_full(set_up.in_full, paper)]
    pages = paginate([*ladder(table, grid), *end], set_up.furniture, paper, lambda left_pt: notes(left_pt, paper))
    return pages, table.title, frozenset(text.lacking)


class PrintableText:
    """Makes texts printable and remembers the characters that the font lacks."""

    def __init__(self) -> None:
        self.lacking: set[str] = set()

    def __call__(self, text: str) -> str:
        """Return the text as paper can show it."""
        shown, lacking = printable(text)
        self.lacking |= lacking
        return shown

    def pairs(self, pairs: Iterable[tuple[str, str]]) -> tuple[tuple[str, str], ...]:
        """Return labels and values as paper can show them."""
        return tuple((self(label), self(value)) for label, value in pairs)


def printable_table(table: LegTable, text: PrintableText) -> LegTable:
    """Return the leg table with every word of it printable."""
    return replace(
        table,
        title=text(table.title),
        method=text(table.method),
        columns=tuple(replace(column, heading=text(column.heading)) for column in table.columns),
        rows=tuple(
            replace(row, cells=tuple(map(text, row.cells)), under=tuple(map(text, row.under))) for row in table.rows
        ),
        signatures=text.pairs(table.signatures),
    )


def _end(table: LegTable, paper: Paper) -> Iterator[Group]:
    """Yield the totals and what must be said of the whole, below a heavy rule."""
    line = "     ".join(f"{label} {value}" for label, value in table.totals)
    strips = [Strip(6.0, (Rule(MARGIN_PT, 0.0, MARGIN_PT + paper.room_pt, 0.0, HEAVY_PT),))]
    for text in (line, *table.said):
        strips += _lines(text, paper, bold=True)
    yield (Block(tuple(strips)),)


def lacking_notice(lacking: Iterable[str], paper: Paper) -> Iterator[Group]:
    """Yield what MISSING stands for, where it stands anywhere."""
    if characters := sorted(lacking):
        codes = ", ".join(f"U+{ord(character):04X}" for character in characters)
        text = f"{MISSING} stands for a character that this print's font lacks: {codes}. The plan itself holds it."
        yield (Block(tuple(_lines(text, paper))),)


def in_full(pairs: Iterable[tuple[str, str]], paper: Paper) -> Iterator[Group]:
    """Yield in full what had to be cut at the head or foot of the pages."""
    for label, value in pairs:
        yield (Block((Strip(4.0), *_lines(f"{label} in full: {value}", paper))),)


def notes(left_pt: float, paper: Paper) -> list[Strip]:
    """Return ruled space to write in, as much as there is room for."""
    lines = int((left_pt - _NOTES_TOP_PT) // _NOTES_LINE_PT)
    if lines < 1:
        return []
    rule = Rule(MARGIN_PT, _NOTES_LINE_PT, MARGIN_PT + paper.room_pt, _NOTES_LINE_PT, HAIR_PT)
    return [
        Strip(_NOTES_TOP_PT, (Text(MARGIN_PT, _NOTES_TOP_PT - 3.0, "Notes", SMALLEST_PT),)),
        *[Strip(_NOTES_LINE_PT, (rule,))] * lines,
    ]


def _lines(text: str, paper: Paper, *, bold: bool = False) -> list[Strip]:
    lines = fold(text, paper.room_pt, _SIZE_PT, bold=bold)
    return [Strip(_LEADING_PT, (Text(MARGIN_PT, 9.5, line, _SIZE_PT, bold),)) for line in lines]
