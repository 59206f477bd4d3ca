"""Worksheets on paper: each leg begins a page; three columns, ruled, with lines to sign."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.prints.caution import CAUTION
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.page_layout import MARGIN_PT, Block, Furniture, Paper, Rule, Strip, Text, paginate
from navcore.prints.paper.pdf_canvas import write_pages
from navcore.prints.paper.typeset import SMALLEST_PT, fold
from navcore.prints.pdf import PrintableText, PrintedPdf

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from navcore.prints.paper.page_layout import Mark
    from navcore.prints.worksheet import LegSheet, Result, Section

_PAPER = Paper(landscape=False)
_RIGHT_PT = _PAPER.width_pt - MARGIN_PT
_WORDS_PT = MARGIN_PT + 82.0
_FIGURE_PT = 128.0
_SIZE_PT = 9.0
_LEADING_PT = 11.5
_HAIR_PT = 0.4
_SIGNED = ("Worked", "Checked", "Date")


def worksheet_pdf(sheets: Sequence[LegSheet]) -> PrintedPdf:
    """Return worksheets as a PDF on upright A4; the same plan gives the same bytes."""
    text = PrintableText()
    pages: list[list[Mark]] = []
    for sheet in sheets:
        blocks = [(block,) for block in _blocks(sheet, text)]
        pages += paginate(blocks, _furniture(text(sheet.heading)), _PAPER)
    return PrintedPdf(write_pages(pages, _PAPER, "Worksheet"), frozenset(text.lacking))


def _furniture(heading: str) -> Furniture:
    foot = (
        Strip(6.0, (Rule(MARGIN_PT, 0.0, _RIGHT_PT, 0.0, _HAIR_PT),)),
        *_folded(CAUTION, MARGIN_PT, SMALLEST_PT),
        Strip(24.0, tuple(_to_sign())),
    )

    def head(number: int, count: int) -> tuple[Strip, ...]:
        page = f"Worksheet, page {number} of {count}"
        at_pt = _RIGHT_PT - width_pt(page, _SIZE_PT)
        first, *more = fold(heading, at_pt - MARGIN_PT - 12.0, 11.0, bold=True) or [""]
        strips = [Strip(16.0, (Text(MARGIN_PT, 11.0, first, 11.0, bold=True), Text(at_pt, 11.0, page, _SIZE_PT)))]
        strips += [Strip(14.0, (Text(MARGIN_PT, 11.0, line, 11.0, bold=True),)) for line in more]
        return (*strips, Strip(4.0, (Rule(MARGIN_PT, 0.0, _RIGHT_PT, 0.0, 1.0),)))

    return Furniture(head, foot)


def _to_sign() -> Iterator[Mark]:
    room_pt = (_RIGHT_PT - MARGIN_PT) / len(_SIGNED)
    for index, label in enumerate(_SIGNED):
        left_pt = MARGIN_PT + index * room_pt
        yield Text(left_pt, 20.0, label, SMALLEST_PT)
        yield Rule(left_pt + 42.0, 21.0, left_pt + room_pt - 12.0, 21.0, _HAIR_PT)


def _blocks(sheet: LegSheet, text: PrintableText) -> Iterator[Block]:
    yield Block(tuple(strip for line in sheet.sailed for strip in _folded(text(line), MARGIN_PT, _SIZE_PT)))
    for section in sheet.sections:
        yield from _section(section, text)
    yield Block(tuple(_title("Results")))
    for result in sheet.results:
        yield Block(tuple(_result(result, text)))
    for note in sheet.notes[:-1]:
        yield Block((Strip(4.0), *_folded(text(note), MARGIN_PT, SMALLEST_PT)))


def _section(section: Section, text: PrintableText) -> Iterator[Block]:
    rows = [tuple(_row(text(line.symbol), text(line.words), text(line.figure))) for line in section.lines]
    # A title never stands alone at the foot of a page.
    title = tuple(_title(text(section.title)))
    yield Block((*title, *(rows[0] if rows else ())))
    for row in rows[1:]:
        yield Block(row)
    for remark in section.remarks:
        yield Block(tuple(_folded(text(remark), _WORDS_PT, _SIZE_PT)))


def _title(words: str) -> Iterator[Strip]:
    yield Strip(5.0)
    yield from _folded(words, MARGIN_PT, _SIZE_PT, bold=True)


def _row(symbol: str, words: str, figure: str) -> Iterator[Strip]:
    lines = fold(words, _RIGHT_PT - _FIGURE_PT - _WORDS_PT, _SIZE_PT) or [""]
    for number, line in enumerate(lines):
        marks: list[Mark] = [Text(_WORDS_PT, 9.0, line, _SIZE_PT)] if line else []
        if number == 0:
            marks.append(Text(_RIGHT_PT - width_pt(figure, _SIZE_PT), 9.0, figure, _SIZE_PT))
            if symbol:
                marks.append(Text(MARGIN_PT, 9.0, symbol, _SIZE_PT))
        if number == len(lines) - 1:
            marks.append(Rule(MARGIN_PT, _LEADING_PT, _RIGHT_PT, _LEADING_PT, _HAIR_PT))
        yield Strip(_LEADING_PT, tuple(marks))


def _result(result: Result, text: PrintableText) -> Iterator[Strip]:
    yield from _row("", text(result.method), text(f"{result.distance}   {result.course}"))
    difference = f"{result.difference}: " if result.difference else ""
    yield from _folded(text(f"{difference}{result.because}"), _WORDS_PT + 12.0, SMALLEST_PT)


def _folded(words: str, left_pt: float, size_pt: float, *, bold: bool = False) -> list[Strip]:
    return [
        Strip(_LEADING_PT, (Text(left_pt, 9.0, line, size_pt, bold=bold),))
        for line in fold(words, _RIGHT_PT - left_pt, size_pt, bold=bold)
    ]
