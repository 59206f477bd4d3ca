"""What the tests of paper need: hostile plans, and the faults of a laid-out page."""

from __future__ import annotations

from datetime import UTC, datetime, timedelta
from io import BytesIO
from itertools import combinations
from typing import TYPE_CHECKING

from pypdf import PdfReader

from navcore.files.planfile import read_plan
from navcore.plan.model import Craft, Leg, Line, Plan, Trade, Waypoint
from navcore.plan.solve import Solution, solve
from navcore.position import Position
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.page_layout import MARGIN_PT, Arrowhead, Frame, Paper, PaperName, Rule, Text
from navcore.prints.paper.typeset import SMALLEST_PT
from navcore.sailings.parts import Parts, PartsRule

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence
    from pathlib import Path

    from navcore.prints.paper.page_layout import Mark

PAPERS = [Paper(name, landscape) for name in PaperName for landscape in (True, False)]

HOSTILE_NAMES = (
    "[/b]",
    "\x1b[31mred\x1b[0m",
    "木更津港 北防波堤",
    "=HYPERLINK(1)",
    "שלום\u202e עולם",
    "x" * 300,
    "",
    "مرحبا",
    "tab\tnew\nline",
    "🚢👩\u200d🚀 😀",
    "cafe\u0301 e\u0301",
    "Ñandú Łódź Ωμέγα Владивосток",
    "  padded\u3000wide\u00a0space ",
    "word " * 200,
    r"<b>&amp;</b> \(paren\)",
)


def solved(path: Path) -> Solution:
    return solve(read_plan(path.read_bytes(), str(path)).plan)


def plan_of(names: Sequence[str], trade: Trade = Trade.MARINE) -> Plan:
    """A plan through those names, every third leg a great circle, every sixth one in parts; it crosses 180°."""
    waypoints = tuple(
        Waypoint(name, Position(-20.0 + 0.3 * index, (170.0 + 1.7 * index + 180.0) % 360.0 - 180.0), timedelta(), name)
        for index, name in enumerate(names)
    )
    legs = tuple(
        Leg(
            Line.GREAT_CIRCLE if index % 3 == 0 else None,
            parts=Parts(PartsRule.NUMBER, 3.0) if index % 6 == 0 else None,
            notes=(("charts", name),),
        )
        for index, name in enumerate(names[1:])
    )
    return Plan(
        waypoints,
        legs,
        title="Trial",
        voyage="1",
        trade=trade,
        departure=datetime(2027, 1, 1, tzinfo=UTC),
        speed_kn=10.0,
        columns=("charts",),
        craft=Craft("Trial", 7.5),
    )


def hostile_plan(trade: Trade = Trade.MARINE) -> Plan:
    """A plan every text of which is long, or foreign, or means to be obeyed."""
    long = "a datum with a very long name " * 20
    plan = plan_of(HOSTILE_NAMES, trade)
    columns = ("charts", "[/b]", "C" * 80, "a column whose heading goes on and on and on", "fixing", "湾")
    return Plan(
        plan.waypoints,
        plan.legs,
        title="T" * 300,
        voyage="湾 🚢",
        trade=trade,
        datum=long,
        departure=plan.departure,
        speed_kn=10.0,
        columns=columns,
        prepared="P" * 200,
        checked="Ελένη",
        approved="word " * 80,
        craft=Craft("very long ship name " * 20),
    )


def text_of(data: bytes) -> list[str]:
    """The text of each page of a PDF, without any space."""
    return ["".join(page.extract_text().split()) for page in PdfReader(BytesIO(data)).pages]


def rows_of_text(marks: Sequence[Mark]) -> Iterator[str]:
    """The texts of a page line by line, as they stand."""
    texts = [mark for mark in marks if isinstance(mark, Text) and mark.upright]
    for y_pt in sorted({text.y_pt for text in texts}):
        line = sorted((text for text in texts if text.y_pt == y_pt), key=lambda text: text.x_pt)
        yield "  ".join(text.text for text in line)


def faults(marks: Sequence[Mark], paper: Paper) -> list[str]:
    """What is wrong with a page: beyond the margins, too small, or printed over something else."""
    texts = [mark for mark in marks if isinstance(mark, Text)]
    boxes = [(_box(text), text.text) for text in texts if text.text]
    found = [f"too small: {text}" for text in texts if text.size_pt < SMALLEST_PT]
    found += [f"outside: {mark}" for mark in marks if not _inside(_box(mark), paper)]
    found += [f"over each other: {one!r} {other!r}" for (a, one), (b, other) in combinations(boxes, 2) if _meet(a, b)]
    lines = [_box(mark) for mark in marks if isinstance(mark, Rule | Frame | Arrowhead)]
    found += [f"a line through {text!r}" for box, text in boxes for line in lines if _meet(box, line)]
    return found


Box = tuple[float, float, float, float]


def _box(mark: Mark) -> Box:
    """Left, top, right and bottom of what is black; letters from their capitals' height to just below the base line."""
    if isinstance(mark, Text):
        long_pt = width_pt(mark.text, mark.size_pt, bold=mark.bold)
        if not mark.upright:
            return mark.x_pt - 0.7 * mark.size_pt, mark.y_pt - long_pt, mark.x_pt, mark.y_pt
        return mark.x_pt, mark.y_pt - 0.73 * mark.size_pt, mark.x_pt + long_pt, mark.y_pt + 0.15 * mark.size_pt
    if isinstance(mark, Rule):
        return mark.x1_pt, mark.y1_pt, mark.x2_pt, mark.y2_pt
    if isinstance(mark, Frame):
        return mark.x_pt, mark.y_pt, mark.x_pt + mark.width_pt, mark.y_pt + mark.height_pt
    return mark.x_pt - mark.width_pt / 2.0, mark.y_pt - mark.height_pt, mark.x_pt + mark.width_pt / 2.0, mark.y_pt


def _inside(box: Box, paper: Paper) -> bool:
    left, top, right, bottom = box
    slack = 0.01
    return (
        left >= MARGIN_PT - slack
        and top >= MARGIN_PT - slack
        and right <= paper.width_pt - MARGIN_PT + slack
        and bottom <= paper.height_pt - MARGIN_PT + slack
    )


def _meet(a: Box, b: Box) -> bool:
    slack = 0.01
    return a[0] < b[2] - slack and b[0] < a[2] - slack and a[1] < b[3] - slack and b[1] < a[3] - slack
