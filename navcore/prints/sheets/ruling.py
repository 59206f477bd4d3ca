"""The spacing table of a sheet on pages of its own: what it takes to rule the graticule by hand."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.charts.paper import SIZES_MM
from navcore.prints.caution import CAUTION
from navcore.prints.paper.typeset import SMALLEST_PT, fold
from navcore.prints.plotting_sheet import NO_DANGERS
from navcore.prints.sheets.drawing import MILLIMETRES_PER_POINT, Drawing, Stroke, Words, words_width_mm
from navcore.prints.sheets.table import Table
from navcore.text.number import format_number
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.charts.sheet import Sheet


Block = list[tuple[str, ...]]

_MARGIN_MM = 15.0
_SIZE_MM = SMALLEST_PT * MILLIMETRES_PER_POINT
_ROW_MM = 4.2
_HEAD_MM = 6.0
_GAP_MM = 8.0


def ruling_tables(sheet: Sheet) -> tuple[Table, ...]:
    """Return the spacing tables of a sheet: parallels, meridians, and every intersection where lines are curved."""
    ruling = sheet.ruling
    parallels = tuple(
        tuple(
            figure
            for figure in (
                format_latitude(line.value_deg),
                _figure(line.meridional_parts_min, 2),
                _figure(line.distance_mm, 2),
            )
            if figure
        )
        for line in ruling.parallels
    )
    meridians = tuple(
        tuple(
            figure
            for figure in (_longitude(line.value_deg), _figure(line.distance_mm, 2), _figure(line.angle_deg, 4))
            if figure
        )
        for line in ruling.meridians
    )
    crossings = tuple(
        (format_latitude(at.lat_deg), _longitude(at.lon_deg), _figure(at.x_mm, 2), _figure(at.y_mm, 2))
        for at in sheet.graticule.intersections
    )
    every = Table("Every intersection", ("latitude", "longitude", "mm from left", "mm from foot"), crossings)
    if ruling.minute_of_longitude_mm is not None:
        above = Table("Parallels", ("latitude", "meridional parts", "mm from foot"), parallels)
        return above, Table("Meridians", ("longitude", "mm from left"), meridians)
    if ruling.centre_mm is not None:
        arcs = Table("Parallels, arcs about the centre", ("latitude", "radius mm"), parallels)
        return arcs, Table("Meridians, from the centre", ("longitude", "degrees clockwise of up"), meridians), every
    return (every,)


def _longitude(lon_deg: float) -> str:
    return "180°00.0'" if abs(lon_deg) == 180.0 else format_longitude(lon_deg)


def _figure(value: float | None, decimals: int) -> str:
    return "" if value is None else format_number(value, decimals)


def ruling_words(sheet: Sheet) -> str:
    """Return how the tables are used, in a sentence or two."""
    frame = (
        f"Neat line {format_number(sheet.plane.width_mm, 1)} by {format_number(sheet.plane.height_mm, 1)} mm; all "
        "distances are from its left side and its foot."
    )
    ruling = sheet.ruling
    if ruling.minute_of_longitude_mm is not None:
        return (
            f"{frame} One minute of longitude is {format_number(ruling.minute_of_longitude_mm, 5)} mm everywhere; a "
            "parallel stands as many of them above another as their meridional parts differ."
        )
    if ruling.centre_mm is not None:
        x_mm, y_mm = ruling.centre_mm
        return (
            f"{frame} Parallels are arcs about the centre, {format_number(x_mm, 2)} mm from the left and "
            f"{format_number(y_mm, 2)} mm from the foot, which may be off the paper; meridians are straight through it."
        )
    return f"{frame} Lay off the intersections and join them."


@dataclass(frozen=True, slots=True)
class PageWords:
    """What is said on every page of the tables, printable.

    Attributes:
        title: What the passage is called.
        revision: Which plan it is.
        before: How many pages come before these.
        of_total: What follows the number of a page.
    """

    title: str
    revision: str
    before: int = 0
    of_total: str = ""


def draw_ruling(sheet: Sheet, words: PageWords, more: Sequence[Table] = ()) -> list[Drawing]:
    """Return the spacing tables of a sheet on A4 pages, and more tables after them."""
    width, height = SIZES_MM["A4"]
    pages: list[list[Block]] = [[]]
    used = 0.0
    for block in _blocks((*ruling_tables(sheet), *more), height - 76.0):
        block_mm = _block_width_mm(block)
        if pages[-1] and used + block_mm > width - 2.0 * _MARGIN_MM:
            pages.append([])
            used = 0.0
        pages[-1].append(block)
        used += block_mm + _GAP_MM
    return [
        Drawing(width, height, tuple(_page_marks(sheet, words, blocks, f"page {words.before + count}{words.of_total}")))
        for count, blocks in enumerate(pages, 1)
    ]


def _blocks(tables: Sequence[Table], room_mm: float) -> list[Block]:
    """Return blocks that fit one under another: a title row, a row of headings, rows."""
    most = int((room_mm - _HEAD_MM) / _ROW_MM) - 2
    return [
        [(table.title,), table.headings, *table.rows[start : start + most]]
        for table in tables
        for start in range(0, max(1, len(table.rows)), most)
    ]


def _column_widths_mm(block: Block) -> list[float]:
    _, *rows = block
    return [max(words_width_mm(row[column], _SIZE_MM) for row in rows) + 3.0 for column in range(len(rows[0]))]


def _block_width_mm(block: Block) -> float:
    return max(sum(_column_widths_mm(block)), words_width_mm(block[0][0], _SIZE_MM, bold=True))


def _page_marks(sheet: Sheet, words: PageWords, blocks: list[Block], page: str) -> list[Stroke | Words]:
    width, height = SIZES_MM["A4"]
    top = height - _MARGIN_MM
    number = f"Spacing table of sheet {sheet.number} of {sheet.of}"
    marks: list[Stroke | Words] = [
        Words(f"{number}: {words.title}", _MARGIN_MM, top - 4.0, 4.2, 0.0, bold=True),
        Words(page, width - _MARGIN_MM - words_width_mm(page, _SIZE_MM), _MARGIN_MM - 4.0, _SIZE_MM),
    ]
    room_pt = (width - 2.0 * _MARGIN_MM) / MILLIMETRES_PER_POINT
    said = fold(ruling_words(sheet), room_pt, SMALLEST_PT)
    marks += [Words(line, _MARGIN_MM, top - 10.0 - 3.5 * count, _SIZE_MM) for count, line in enumerate(said)]
    foot = fold(f"{words.revision} {NO_DANGERS} {CAUTION}", room_pt, SMALLEST_PT)
    marks += [
        Words(line, _MARGIN_MM, _MARGIN_MM + 3.5 * (len(foot) - count), _SIZE_MM) for count, line in enumerate(foot)
    ]
    left = _MARGIN_MM
    for block in blocks:
        marks += _block_marks(block, left, top - 14.0 - 3.5 * len(said))
        left += _block_width_mm(block) + _GAP_MM
    return marks


def _block_marks(block: Block, left: float, top: float) -> list[Stroke | Words]:
    (title,), *rows = block
    widths = _column_widths_mm(block)
    marks: list[Stroke | Words] = [Words(title, left, top, _SIZE_MM, 0.0, bold=True)]
    for count, row in enumerate(rows):
        base = top - _HEAD_MM - _ROW_MM * count
        for column, figure in enumerate(row):
            end = left + sum(widths[: column + 1]) - 3.0
            marks.append(Words(figure, end - words_width_mm(figure, _SIZE_MM), base, _SIZE_MM))
        marks.append(
            Stroke(np.array([[left, base - 1.1], [left + sum(widths) - 3.0, base - 1.1]]), 0.2 if not count else 0.08)
        )
    return marks
