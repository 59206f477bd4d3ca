"""What explains another system's figures, as text and as JSON."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

from navcore.prints.tracks import NO_VALUE
from navcore.sailings.reconcile import are_alike
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.plain import pad
from navcore.text.position import format_position
from navcore.text.wrap import wrap

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from navcore.position import Position
    from navcore.sailings.comparison import LegComparison
    from navcore.sailings.reconcile import Explanation

NOTHING_FITS = (
    "nothing known explains these figures: no figure of the Earth, line, method or unit, and no single slip in a "
    "position; check both positions and the other system's settings one by one"
)
ALIKE = "the first two explain the figures alike: decide by what the other system says of itself, or by more digits"
_WIDTH = 100
_KIND_CELLS = 8
_WORDS_CELLS = 62


def reconciled_json(explanations: Sequence[Explanation]) -> str:
    """Return the explanations as JSON in full precision, best first."""
    rows = [
        {
            "kind": explanation.kind.value,
            "words": explanation.words,
            "distance_nmi": explanation.distance_nmi,
            "course_deg": explanation.course_deg,
            "misfit": explanation.misfit,
        }
        for explanation in explanations
    ]
    return json.dumps({"explanations": rows}, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def reconciled_text(leg: LegComparison, shown_words: str, explanations: Sequence[Explanation]) -> str:
    """Return our own figures, the figures shown, and what explains them, best first."""
    lines = [*_head(leg.start, leg.end), *_ours(leg), pad("shown", _KIND_CELLS) + shown_words, ""]
    if not explanations:
        lines += wrap(NOTHING_FITS, _WIDTH)
    for explanation in explanations:
        lines += _explanation(explanation)
    if are_alike(explanations):
        lines += ["", *wrap(ALIKE, _WIDTH)]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _head(start: Position, end: Position) -> Iterator[str]:
    yield f"{format_position(start)}  to  {format_position(end)}"
    yield ""


def _ours(leg: LegComparison) -> Iterator[str]:
    rhumb, circle = leg.rhumb_line, leg.great_circle
    figures = (
        ("rhumb line", rhumb.distance_nmi, format_direction(rhumb.course_deg)),
        (
            "great circle",
            circle.distance_nmi,
            f"{format_direction(circle.initial_course_deg)} → {format_direction(circle.final_course_deg)}",
        ),
    )
    for name, distance_nmi, course in figures:
        words = f"{name} on {leg.figure.name}"
        yield pad("ours", _KIND_CELLS) + pad(words, _WORDS_CELLS) + f"{format_distance(distance_nmi)}  {course}"


def _explanation(explanation: Explanation) -> Iterator[str]:
    course = NO_VALUE if explanation.course_deg is None else format_direction(explanation.course_deg)
    figures = f"{format_distance(explanation.distance_nmi)}  {course}"
    for number, words in enumerate(wrap(explanation.words, _WORDS_CELLS - 2)):
        kind = explanation.kind.value if number == 0 else ""
        yield pad(kind, _KIND_CELLS) + pad(words, _WORDS_CELLS) + (figures if number == 0 else "")
