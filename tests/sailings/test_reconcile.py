"""Disagreements made on purpose, of every kind: the true cause comes first."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import FIGURES, SPHERE, WGS_84, Figure
from navcore.lines import great_circle, rhumb_line
from navcore.position import Position
from navcore.sailings import mercator, middle_latitude
from navcore.sailings.composite import composite
from navcore.sailings.reconcile import Kind, Shown, are_alike, reconcile
from navcore.sailings.slips import slips_of

if TYPE_CHECKING:
    from collections.abc import Callable

PACIFIC = Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0)
HAWAII = Position(21 + 10 / 60, -(157 + 55 / 60)), Position(-36.0, 175 + 10 / 60)
SOUTHERN = Position(-34.5, 18.0), Position(-(43 + 50 / 60), 146.5)
ATLANTIC = Position(50 + 3.4 / 60, -(5 + 42.6 / 60)), Position(40 + 28.7 / 60, -(73 + 49.2 / 60))
COASTAL = Position(54 + 10 / 60, 2.5), Position(54 + 13.4 / 60, 8 + 36.2 / 60)

Figures = tuple[float, float]


def circle(start: Position, end: Position, figure: Figure = WGS_84) -> Figures:
    line = great_circle.inverse(*start, *end, figure)
    return float(line.distance_m) / METRES_PER_NAUTICAL_MILE, float(line.initial_course_deg)


def rhumb(start: Position, end: Position, figure: Figure = WGS_84) -> Figures:
    line = rhumb_line.inverse(*start, *end, figure)
    return float(line.distance_m) / METRES_PER_NAUTICAL_MILE, float(line.course_deg)


def shown(figures: Figures, decimals: int = 1, course_decimals: int | None = 1) -> Shown:
    distance_nmi = round(figures[0], decimals)
    if course_decimals is None:
        return Shown(distance_nmi, 0.5 * 10.0**-decimals)
    course_deg = round(figures[1], course_decimals) % 360.0
    return Shown(distance_nmi, 0.5 * 10.0**-decimals, course_deg, 0.5 * 10.0**-course_decimals)


def by_mercator(ends: tuple[Position, Position]) -> Figures:
    working = mercator.solve_inverse(*ends, WGS_84)
    return working.number("distance"), working.number("course")


def by_middle_latitude(ends: tuple[Position, Position]) -> Figures:
    working = middle_latitude.solve_inverse(*ends)
    return working.number("distance"), working.number("course")


def in_unit(figures: Figures, metres: float) -> Figures:
    return figures[0] * METRES_PER_NAUTICAL_MILE / metres, figures[1]


def under_50_north() -> Figures:
    track = composite(*PACIFIC, 50.0, WGS_84)
    return track.distance_m / METRES_PER_NAUTICAL_MILE, track.initial_course_deg


EARTHS_LINES_METHODS_UNITS: list[tuple[tuple[Position, Position], Figures, Kind, str]] = [
    (PACIFIC, circle(*PACIFIC), Kind.LINE, "great circle on WGS 84"),
    (PACIFIC, rhumb(*PACIFIC), Kind.LINE, "rhumb line on WGS 84"),
    (HAWAII, circle(*HAWAII, SPHERE), Kind.EARTH, "great circle on the sphere"),
    (HAWAII, rhumb(*HAWAII, SPHERE), Kind.EARTH, "rhumb line on the sphere"),
    (SOUTHERN, circle(*SOUTHERN, SPHERE), Kind.EARTH, "great circle on the sphere"),
    (SOUTHERN, circle(*SOUTHERN, FIGURES["Clarke 1880"]), Kind.EARTH, "great circle on Clarke 1880"),
    (PACIFIC, circle(*PACIFIC, FIGURES["Bessel 1841"]), Kind.EARTH, "great circle on Bessel 1841"),
    (ATLANTIC, circle(*ATLANTIC, Figure("", 6371000.0, math.inf)), Kind.EARTH, "great circle on a sphere of radius"),
    (HAWAII, by_mercator(HAWAII), Kind.METHOD, "Mercator sailing, meridional parts of WGS 84"),
    (ATLANTIC, by_middle_latitude(ATLANTIC), Kind.METHOD, "Middle-latitude sailing"),
    (PACIFIC, (circle(*PACIFIC)[0], rhumb(*PACIFIC)[1]), Kind.LINE, "great circle's distance with the rhumb line's"),
    (PACIFIC, under_50_north(), Kind.LINE, "composite under 50°N"),
    (ATLANTIC, in_unit(circle(*ATLANTIC), 1000.0), Kind.UNIT, "kilometres"),
    (SOUTHERN, in_unit(rhumb(*SOUTHERN), 1609.344), Kind.UNIT, "statute miles"),
    (ATLANTIC, in_unit(rhumb(*ATLANTIC), 1853.184), Kind.UNIT, "UK nautical miles"),
]  # fmt: skip


@pytest.mark.parametrize(("ends", "figures", "kind", "words"), EARTHS_LINES_METHODS_UNITS)
def test_another_earth_line_method_or_unit_comes_first(
    ends: tuple[Position, Position], figures: Figures, kind: Kind, words: str
) -> None:
    first, *_ = reconcile(*ends, WGS_84, shown(figures))
    assert (first.kind, first.words[: len(words)]) == (kind, words)
    assert first.misfit <= 1.0


def moved(start: Position, end: Position, **changes: float) -> tuple[Position, Position]:
    return (
        Position(changes.get("lat1", start.lat_deg), changes.get("lon1", start.lon_deg)),
        Position(changes.get("lat2", end.lat_deg), changes.get("lon2", end.lon_deg)),
    )


SLIPS: list[tuple[tuple[Position, Position], tuple[Position, Position], str]] = [
    (PACIFIC, moved(*PACIFIC, lon2=-143.0), "wrong hemisphere of longitude 2"),
    (HAWAII, moved(*HAWAII, lat2=36.0), "wrong hemisphere of latitude 2"),
    (HAWAII, moved(*HAWAII, lon2=-(175 + 10 / 60)), "wrong hemisphere of longitude 2"),
    (ATLANTIC, moved(*ATLANTIC, lon1=5 + 42.6 / 60), "wrong hemisphere of longitude 1"),
    (ATLANTIC, moved(*ATLANTIC, lon2=-(37 + 49.2 / 60)), "digits exchanged in longitude 2"),
    (SOUTHERN, moved(*SOUTHERN, lat2=-(34 + 50 / 60)), "digits exchanged in latitude 2"),
    (ATLANTIC, moved(*ATLANTIC, lat2=40 + 27.8 / 60), "digits exchanged in latitude 2"),
    (ATLANTIC, moved(*ATLANTIC, lat1=51 + 3.4 / 60), "one degree in latitude 1"),
    (COASTAL, moved(*COASTAL, lat2=55 + 13.4 / 60), "one degree in latitude 2"),
    (HAWAII, moved(*HAWAII, lon1=-(17 + 55 / 60)), "a digit dropped in longitude 1"),
    (ATLANTIC, moved(*ATLANTIC, lat2=40.287), "minutes taken for decimals in latitude 2"),
    (ATLANTIC, moved(*ATLANTIC, lat2=40.287, lon2=-73.492), "minutes taken for decimals in position 2"),
    (ATLANTIC, (Position(50.034, -5.426), Position(40.287, -73.492)), "minutes taken for decimals in both positions"),
    (COASTAL, (Position(2.5, 54 + 10 / 60), COASTAL[1]), "latitude and longitude 1 exchanged"),
    (SOUTHERN, (Position(-18.0, 34.5), SOUTHERN[1]), "latitude and longitude 1 exchanged, each under"),
    (SOUTHERN, SOUTHERN[::-1], "great circle with the course back"),
]  # fmt: skip


@pytest.mark.parametrize("line", [circle, rhumb], ids=["great circle", "rhumb line"])
@pytest.mark.parametrize(("ends", "slipped", "words"), SLIPS)
def test_a_single_slip_comes_first(
    line: Callable[..., Figures], ends: tuple[Position, Position], slipped: tuple[Position, Position], words: str
) -> None:
    first, *_ = reconcile(*ends, WGS_84, shown(line(*slipped)))
    if "course back" in words:
        assert "course back" in first.words
        return
    assert first.kind is Kind.SLIP
    assert first.words.startswith(words)
    assert first.words.endswith(f"{'great circle' if line is circle else 'rhumb line'} on WGS 84")


def test_whole_digits_and_no_course_are_enough_where_nothing_else_comes_near() -> None:
    first, *_ = reconcile(*HAWAII, WGS_84, shown(circle(*HAWAII, SPHERE), 0, None))
    assert first.words == "great circle on the sphere, 1' of arc = 1 NM"
    first, *_ = reconcile(*HAWAII, WGS_84, shown(rhumb(*moved(*HAWAII, lat2=36.0)), 0, 0))
    assert first.words.startswith("wrong hemisphere of latitude 2")


def test_digits_cut_off_are_told_from_digits_rounded() -> None:
    distance_nmi, course_deg = circle(*PACIFIC)
    cut = Shown(math.floor(distance_nmi * 10.0) / 10.0 - 0.0, 0.05, math.floor(course_deg * 10.0) / 10.0, 0.05)
    first, *_ = reconcile(*PACIFIC, WGS_84, cut)
    assert first.words.startswith("great circle on WGS 84")
    assert ("cut off" in first.words) == (first.misfit > 1.0)


def test_nothing_fits_where_nothing_does() -> None:
    assert reconcile(*PACIFIC, WGS_84, Shown(1234.5678, 0.00005, 12.3456, 0.00005)) == ()


def test_two_causes_alike_are_said_to_be() -> None:
    near_equator = Position(0.0, 10.0), Position(0.0, 20.0)
    explanations = reconcile(*near_equator, WGS_84, shown(circle(*near_equator)))
    assert not are_alike(explanations[:1])
    short = Position(50.0, 0.0), Position(50.1, 0.1)
    both = reconcile(*short, WGS_84, Shown(7.1, 0.05))
    assert are_alike(both)
    assert {both[0].words, both[1].words} == {"great circle on WGS 84", "rhumb line on WGS 84"}


def test_a_degree_of_either_longitude_is_alike_by_rhumb_line_and_both_are_named() -> None:
    first, second, *_ = explanations = reconcile(*COASTAL, WGS_84, shown(rhumb(*moved(*COASTAL, lon2=7 + 36.2 / 60))))
    assert are_alike(explanations)
    assert {words.partition(":")[0] for words in (first.words, second.words)} == {
        "one degree in longitude 1",
        "one degree in longitude 2",
    }


def test_a_course_a_hair_west_of_north_is_near_000() -> None:
    north = Position(10.0, 0.0), Position(20.0, -0.001)
    first, *_ = reconcile(*north, WGS_84, shown(rhumb(*north)))
    assert first.misfit <= 1.0


def test_every_slip_is_a_position_and_differs_from_the_leg() -> None:
    for ends in (PACIFIC, HAWAII, SOUTHERN, ATLANTIC, COASTAL, (Position(0.0, 0.0), Position(90.0, 180.0))):
        for slip in slips_of(*ends):
            assert slip.ends != ends
            for place in slip.ends:
                assert abs(place.lat_deg) <= 90.0
                assert abs(place.lon_deg) <= 180.0


def test_explanations_come_simplest_first_and_each_cause_once() -> None:
    explanations = reconcile(*HAWAII, WGS_84, shown(circle(*HAWAII, SPHERE), 0, 0))
    costs = [explanation.cost for explanation in explanations]
    assert costs == sorted(costs)
    assert len({explanation.words for explanation in explanations}) == len(explanations)
