"""The head and foot of a plotting sheet: title and scale, bars, lines to sign, and what must be said."""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from typing import TYPE_CHECKING

import numpy as np

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.prints.paper.typeset import SMALLEST_PT, fold, fold_at_most
from navcore.prints.sheets.drawing import MILLIMETRES_PER_POINT, Area, Stroke, Words, words_width_mm

if TYPE_CHECKING:
    from navcore.charts.sheet import Sheet

Mark = Stroke | Area | Words

CHECK_BAR_MM = 100.0

_SMALL_MM = SMALLEST_PT * MILLIMETRES_PER_POINT
_LEADING_MM = 3.5
_TITLE_MM = 4.5
_BARS_MM = 112.0
_LONGEST_BAR_MM = 100.0


@dataclass(frozen=True, slots=True)
class SheetWords:
    """What is said on a sheet, printable.

    Attributes:
        title: What the passage is called.
        scale: The natural scale and where it holds.
        page: Which page of how many.
        notes: Paragraphs.
        signatures: Role and name.
    """

    title: str
    scale: str
    page: str
    notes: tuple[str, ...]
    signatures: tuple[tuple[str, str], ...]


def foot_marks(sheet: Sheet, words: SheetWords) -> list[Mark]:
    """Return head and foot on the paper's millimetres."""
    paper = sheet.paper
    left, right = paper.margin_mm, paper.width_mm - paper.margin_mm
    top = paper.margin_mm + paper.foot_mm
    marks = _head(sheet, words, left, right)
    marks += _check_bar(left, top - 7.0)
    if sheet.plane.projection.conformal:
        marks += _scale_bar(sheet, left, top - 17.0)
    narrow = paper.foot_mm > 60.0
    marks += _signatures(
        words, left, top - 28.0 if narrow else paper.margin_mm + 1.5, right - left if narrow else _BARS_MM
    )
    text_left, text_top = (left, top - 31.0) if narrow else (left + _BARS_MM + 5.0, top)
    return marks + _paragraphs(words.notes, text_left, text_top, right - text_left, text_top - paper.margin_mm + 1.0)


def _head(sheet: Sheet, words: SheetWords, left: float, right: float) -> list[Mark]:
    base = sheet.paper.height_mm - sheet.paper.margin_mm - _TITLE_MM
    number = f"sheet {sheet.number} of {sheet.of}" if sheet.number else "index of sheets"
    end = f"{number} · {words.scale} · {words.page}"
    end_mm = words_width_mm(end, _SMALL_MM)
    room_pt = (right - left - end_mm - 6.0) / MILLIMETRES_PER_POINT
    title, _ = fold_at_most(words.title, room_pt, _TITLE_MM / MILLIMETRES_PER_POINT, 1, bold=True)
    return [
        *[Words(line, left, base, _TITLE_MM, 0.0, bold=True) for line in title],
        Words(end, right - end_mm, base, _SMALL_MM),
    ]


def _bar(left: float, base: float, lengths_mm: list[float]) -> list[Mark]:
    """Return a bar of parts, black and white in turn; its outer edges are its measure."""
    ends = [left + sum(lengths_mm[:count]) for count in range(len(lengths_mm) + 1)]
    marks: list[Mark] = []
    for count, (start, end) in enumerate(pairwise(ends)):
        box = np.array([[start, base], [end, base], [end, base + 1.6], [start, base + 1.6]])
        if count % 2 == 0:
            marks.append(Area(box))
        # Lines inside the outer edges, so that the bar is no longer than it says.
        marks.append(Stroke(np.array([[start, base + 0.05], [end, base + 0.05]]), 0.1))
        marks.append(Stroke(np.array([[start, base + 1.55], [end, base + 1.55]]), 0.1))
    marks.append(Stroke(np.array([[ends[-1] - 0.05, base], [ends[-1] - 0.05, base + 1.6]]), 0.1))
    return marks


def _check_bar(left: float, base: float) -> list[Mark]:
    said = "Check bar, 100 mm: measure it; print at 100 %, without fitting to the page"
    return [*_bar(left, base, [CHECK_BAR_MM / 10.0] * 10), Words(said, left, base + 3.0, _SMALL_MM)]


def _scale_bar(sheet: Sheet, left: float, base: float) -> list[Mark]:
    """Return a bar of nautical miles at the natural scale."""
    mile_mm = METRES_PER_NAUTICAL_MILE * 1000.0 / sheet.plane.scale
    most = _LONGEST_BAR_MM / mile_mm
    steps = [step * 10.0**power for power in range(-3, 5) for step in (1.0, 2.0, 5.0)]
    length_nmi = max((step for step in steps if step <= most), default=steps[0])
    end = f"{length_nmi:g} NM"
    where = "where the natural scale holds"
    return [
        *_bar(left, base, [length_nmi * mile_mm / 5.0] * 5),
        Words("0", left, base + 2.4, _SMALL_MM),
        Words(end, left + length_nmi * mile_mm - words_width_mm(end, _SMALL_MM) / 2.0, base + 2.4, _SMALL_MM),
        Words(where, left, base - 3.6, _SMALL_MM),
    ]


def _signatures(words: SheetWords, left: float, base: float, width: float) -> list[Mark]:
    marks: list[Mark] = []
    each = width / len(words.signatures)
    for count, (role, name) in enumerate(words.signatures):
        start = left + count * each
        role_mm = words_width_mm(role, _SMALL_MM) + 1.5
        marks.append(Words(role, start, base, _SMALL_MM))
        marks.append(Stroke(np.array([[start + role_mm, base - 0.8], [start + each - 3.0, base - 0.8]]), 0.13))
        room_pt = (each - role_mm - 3.0) / MILLIMETRES_PER_POINT
        shown, _ = fold_at_most(name, room_pt, SMALLEST_PT, 1)
        marks += [Words(line, start + role_mm, base, _SMALL_MM) for line in shown]
    return marks


def _paragraphs(notes: tuple[str, ...], left: float, top: float, width: float, height: float) -> list[Mark]:
    """Return paragraphs, run on into one another where they would not fit; the most important are first."""
    room_pt = width / MILLIMETRES_PER_POINT
    lines = [line for note in notes for line in fold(note, room_pt, SMALLEST_PT)]
    most = int(height / _LEADING_MM)
    if len(lines) > most:
        lines, _ = fold_at_most(" ".join(notes), room_pt, SMALLEST_PT, most)
    return [Words(line, left, top - (count + 1) * _LEADING_MM + 0.6, _SMALL_MM) for count, line in enumerate(lines)]
