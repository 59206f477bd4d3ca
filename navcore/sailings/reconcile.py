"""What explains the figures that another system shows for a leg: another Earth, line, method or unit, or one slip.

Every cause is worked out and held against the figures as they are printed: it fits where it rounds to the very digits.
Causes that fit are ordered by how simple they are and then by how near they come; a cause that fits only if digits
were cut off rather than rounded comes after those that round.
"""

from __future__ import annotations

import math
import re
from dataclasses import dataclass
from enum import StrEnum
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import wrap_180, wrap_360
from navcore.constants import METRES_PER_NAUTICAL_MILE, METRES_PER_STATUTE_MILE
from navcore.earth.figure import FIGURES, SPHERE, Figure
from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.position import Position
from navcore.sailings import mercator, middle_latitude
from navcore.sailings.composite import composite
from navcore.sailings.parts import Parts, PartsRule
from navcore.sailings.slips import slips_of
from navcore.sailings.split import split_great_circle
from navcore.text.direction import parse_direction
from navcore.text.distance import parse_distance

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence


ALIKE = 0.5
"""Causes whose costs differ by less than this explain the figures alike."""

_CUT_OFF_COST = 2.2
_FARTHEST_FETCHED = 5.0
"""A cause beyond this cost is named only where no simpler one fits."""


class Kind(StrEnum):
    """What sort of cause it is."""

    EARTH = "earth"
    LINE = "line"
    METHOD = "method"
    UNIT = "unit"
    SLIP = "slip"


_FIGURES = re.compile(r"(\d+)(?:\.(\d+))?", re.ASCII)


@dataclass(frozen=True, slots=True)
class Shown:
    """The figures another system shows, with half of their last printed digit.

    Attributes:
        distance_nmi: The distance, in whatever unit it was in truth.
        distance_half_nmi: Half of its last digit.
        course_deg: None where none is shown.
        course_half_deg: Half of its last digit.
    """

    distance_nmi: float
    distance_half_nmi: float
    course_deg: float | None = None
    course_half_deg: float = 0.5


def shown_as_typed(distance: str, course: str) -> Shown:
    """Return figures as another system shows them, each with half of the last digit that was typed.

    Args:
        distance: Such as 3755, 3755.0 or 6954 km.
        course: Such as 204 or 204.1; "" where none is shown.

    Raises:
        ParseError: One can't be read.
    """
    distance_nmi = parse_distance(distance)
    course_deg = parse_direction(course) if course.strip() else None
    return Shown(
        distance_nmi,
        _half_a_digit(distance, distance_nmi),
        course_deg,
        _half_a_digit(course, course_deg) if course_deg is not None else 0.5,
    )


_MOST_DECIMALS = 12
"""Digits beyond these say nothing of what another system works with."""


def _half_a_digit(text: str, value: float) -> float:
    """Return half of the last digit as typed, in the unit that the value was read into."""
    figures = _FIGURES.search(text)
    if figures is None:
        return 0.5
    half = 0.5 * 10.0 ** -min(len(figures[2] or ""), _MOST_DECIMALS)
    typed = float(figures[0])
    return half * value / typed if typed and value else half


@dataclass(frozen=True, slots=True)
class Explanation:
    """One cause that would show such figures.

    Attributes:
        kind: What sort of cause.
        words: The cause.
        distance_nmi: What it gives, in the unit it stands for.
        course_deg: What it gives; None where it gives no course.
        misfit: How far that is from the figures shown, in halves of their last digits; up to 1 it rounds to them.
        cost: How far-fetched it is.
    """

    kind: Kind
    words: str
    distance_nmi: float
    course_deg: float | None
    misfit: float
    cost: float


@dataclass(frozen=True, slots=True)
class _Cause:
    kind: Kind
    words: str
    cost: float
    distance_nmi: float
    course_deg: float | None


def reconcile(start: Position, end: Position, figure: Figure, shown: Shown) -> tuple[Explanation, ...]:
    """Return the causes that reproduce the figures shown, best first; none where nothing does.

    Args:
        start: Where the leg starts.
        end: Where it ends.
        figure: The figure of the Earth that our own figures are on.
        shown: What the other system shows.
    """
    simple = _fitting(list(_causes(start, end, figure)), shown)
    slips = _fitting(_slip_causes(start, end, figure), shown)
    best = _distinct(sorted([*simple, *slips], key=lambda cause: (cause.cost, cause.misfit)), shown)
    near = [explanation for explanation in best if explanation.cost < _FARTHEST_FETCHED]
    return tuple(near or best)


def _distinct(ordered: Sequence[Explanation], shown: Shown) -> list[Explanation]:
    """Return the first of those that are one cause, and of those that give the same figures the simplest."""
    kept: list[Explanation] = []
    causes: set[str] = set()
    costs: dict[tuple[float, float | None], float] = {}
    for explanation in ordered:
        cause = explanation.words.partition(";")[0]
        compared = explanation.course_deg if shown.course_deg is not None else None
        given = round(explanation.distance_nmi, 6), None if compared is None else round(compared, 6)
        # A cause that gives what a simpler one gives explains nothing more; one as simple is alike, and is said.
        if cause not in causes and costs.setdefault(given, explanation.cost) >= explanation.cost:
            kept.append(explanation)
        causes.add(cause)
    return kept


def are_alike(explanations: Sequence[Explanation]) -> bool:
    """Whether the first two explain the figures alike."""
    return len(explanations) > 1 and explanations[1].cost - explanations[0].cost < ALIKE


def _fitting(causes: Sequence[_Cause], shown: Shown) -> Iterator[Explanation]:
    for cause in causes:
        rounds, cut = _misfits(cause, shown)
        if rounds <= 1.0:
            yield Explanation(cause.kind, cause.words, cause.distance_nmi, cause.course_deg, rounds, cause.cost)
        elif cut:
            words = f"{cause.words}; digits cut off, not rounded"
            cost = cause.cost + _CUT_OFF_COST
            yield Explanation(cause.kind, words, cause.distance_nmi, cause.course_deg, rounds, cost)


def _misfits(cause: _Cause, shown: Shown) -> tuple[float, bool]:
    """Return how far a cause is off in halves of the last digits, and whether cutting digits off would show it."""
    pairs = [(cause.distance_nmi - shown.distance_nmi, shown.distance_half_nmi)]
    if shown.course_deg is not None:
        if cause.course_deg is None:
            return math.inf, False
        pairs.append((float(wrap_180(cause.course_deg - shown.course_deg)), shown.course_half_deg))
    # Half a digit as typed is itself a decimal that no float holds.
    ratios = [difference / half * (1.0 - 1e-9) for difference, half in pairs]
    return max(map(abs, ratios)), all(0.0 <= ratio < 2.0 for ratio in ratios)


def _causes(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    yield from _own_lines(start, end, figure)
    for other, cost in _other_figures(figure):
        name = "the sphere, 1' of arc = 1 NM" if other == SPHERE else other.name
        for line, distance_nmi, course_deg in _lines(start, end, other):
            yield _Cause(Kind.EARTH, f"{line} on {name}", cost, distance_nmi, course_deg)
    yield from _methods(start, end, figure)
    yield from _composites(start, end, figure)
    yield from _units(start, end, figure)


def _lines(start: Position, end: Position, figure: Figure) -> tuple[tuple[str, float, float], ...]:
    rhumb = rhumb_line.inverse(*start, *end, figure)
    circle = great_circle.inverse(*start, *end, figure)
    return (
        ("great circle", float(circle.distance_m) / METRES_PER_NAUTICAL_MILE, float(circle.initial_course_deg)),
        ("rhumb line", float(rhumb.distance_m) / METRES_PER_NAUTICAL_MILE, float(rhumb.course_deg)),
    )


def _own_lines(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    for of, cost in ((figure, 0.0), (SPHERE, 0.9)):
        if cost and of == figure:
            continue
        (_, circle_nmi, initial_deg), (_, rhumb_nmi, rhumb_deg) = _lines(start, end, of)
        final_deg = float(great_circle.inverse(*start, *end, of).final_course_deg)
        kind = Kind.EARTH if cost else Kind.LINE
        if not cost:
            yield _Cause(kind, f"great circle on {of.name}", 0.0, circle_nmi, initial_deg)
            yield _Cause(kind, f"rhumb line on {of.name}", 0.0, rhumb_nmi, rhumb_deg)
        mixed = (
            ("great circle's distance with the rhumb line's course", circle_nmi, rhumb_deg),
            ("rhumb line's distance with the great circle's initial course", rhumb_nmi, initial_deg),
            ("great circle with its final course", circle_nmi, final_deg),
            ("great circle with the course back from its end", circle_nmi, wrap_360(final_deg + 180.0)),
            ("rhumb line with the course back", rhumb_nmi, wrap_360(rhumb_deg + 180.0)),
        )
        for words, distance_nmi, course_deg in mixed:
            yield _Cause(Kind.LINE, f"{words}, on {of.name}", 1.2 + cost, distance_nmi, course_deg)


def _other_figures(figure: Figure) -> Iterator[tuple[Figure, float]]:
    for other in FIGURES.values():
        if other != figure:
            yield other, 0.6 if other == SPHERE else 2.0
    for radius_km, cost in ((6371.0, 1.0), (6378.137, 1.6), (6366.0, 2.2)):
        yield Figure(f"a sphere of radius {radius_km:g} km", radius_km * 1000.0, math.inf), cost


def _methods(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    for of in FIGURES.values():
        if of == SPHERE:
            continue  # there Mercator sailing is the rhumb line itself
        working = mercator.solve_inverse(start, end, of)
        cost = 0.8 if of == figure else 2.2
        distance_nmi, course_deg = working.value("distance"), working.value("course")
        if distance_nmi is not None:
            words = f"Mercator sailing, meridional parts of {of.name} beside a 1' mile of latitude"
            yield _Cause(Kind.METHOD, words, cost, distance_nmi, course_deg)
    try:
        middle = middle_latitude.solve_inverse(start, end)
        words = f"{middle.method}, 1' of latitude = 1 NM"
        yield _Cause(Kind.METHOD, words, 1.0, middle.number("distance"), middle.value("course"))
    except NoAnswerError:
        pass
    for step_deg in (10.0, 5.0):
        parts = split_great_circle(start, end, figure, Parts(PartsRule.LONGITUDE, step_deg))
        if len(parts.courses_deg) > 1:
            words = f"great circle in rhumb-line parts at each {step_deg:g}° of longitude, on {figure.name}"
            yield _Cause(Kind.METHOD, words, 2.4, parts.distance_m / METRES_PER_NAUTICAL_MILE, parts.courses_deg[0])
    yield from _rounded_positions(start, end, figure)


def _rounded_positions(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    for words, parts, cost in (("whole minutes", 60.0, 2.3), ("whole degrees", 1.0, 2.5)):
        one, other = (Position(*(round(value * parts) / parts for value in place)) for place in (start, end))
        if (one, other) != (start, end):
            for line, distance_nmi, course_deg in _lines(one, other, figure):
                cause = f"positions rounded to {words}; {line} on {figure.name}"
                yield _Cause(Kind.METHOD, cause, cost, distance_nmi, course_deg)


def _composites(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    """Yield composites under whole degrees between the higher end and the vertex."""
    vertex = great_circle.vertex(*start, *end, figure)
    if not bool(vertex.on_leg):
        return
    vertex_deg = float(vertex.lat_deg)
    side = math.copysign(1.0, vertex_deg)
    lowest = math.ceil(max(side * start.lat_deg, side * end.lat_deg, 1.0))
    for limit in range(lowest, math.floor(abs(vertex_deg)) + 1):
        try:
            track = composite(start, end, side * limit, figure)
        except NoAnswerError:
            continue
        words = f"composite under {limit}°{'N' if side > 0.0 else 'S'} on {figure.name}"
        distance_nmi = track.distance_m / METRES_PER_NAUTICAL_MILE
        yield _Cause(Kind.LINE, words, 2.6, distance_nmi, track.initial_course_deg)


def _units(start: Position, end: Position, figure: Figure) -> Iterator[_Cause]:
    units = (
        ("kilometres", 1000.0, 1.1),
        ("statute miles", METRES_PER_STATUTE_MILE, 1.1),
        ("UK nautical miles of 6080 ft", 1853.184, 2.4),
        ("minutes of arc at the equator", figure.equatorial_radius_m * math.pi / 10800.0, 2.6),
    )
    earths = ((figure, 0.0), (SPHERE, 0.5), (Figure("a sphere of radius 6371 km", 6371000.0, math.inf), 0.4))
    for of, more in earths:
        for line, distance_nmi, course_deg in _lines(start, end, of):
            for unit, metres, cost in units:
                if of != figure and cost > 2.0:
                    continue
                words = f"{unit} in place of nautical miles; {line} on {of.name}"
                yield _Cause(
                    Kind.UNIT, words, cost + more, distance_nmi * METRES_PER_NAUTICAL_MILE / metres, course_deg
                )


def _slip_causes(start: Position, end: Position, figure: Figure) -> list[_Cause]:
    """Return every slip by both lines on our figure and on the sphere, all worked at once."""
    slips = list(slips_of(start, end))
    causes: list[_Cause] = []
    for of, more in dict.fromkeys(((figure, 0.0), (SPHERE, 1.0))):
        if more and of == figure:
            continue
        columns = np.array([(*one, *other) for one, other in (slip.ends for slip in slips)]).T
        rhumb = rhumb_line.inverse(columns[0], columns[1], columns[2], columns[3], of)
        circle = great_circle.inverse(columns[0], columns[1], columns[2], columns[3], of)
        for line, distances_m, courses_deg in (
            ("great circle", circle.distance_m, circle.initial_course_deg),
            ("rhumb line", rhumb.distance_m, rhumb.course_deg),
        ):
            causes += [
                _Cause(
                    Kind.SLIP,
                    f"{slip.words}; {line} on {of.name}",
                    slip.cost + more,
                    distance_m / METRES_PER_NAUTICAL_MILE,
                    course_deg,
                )
                for slip, distance_m, course_deg in zip(slips, distances_m.tolist(), courses_deg.tolist(), strict=True)
            ]
    return causes
