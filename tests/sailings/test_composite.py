"""Composite sailing: by tangency and by being the shortest, against lines worked another way; and what it refuses."""

from __future__ import annotations

import math
import random

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.errors import NoAnswerError, RangeError
from navcore.lines import great_circle, rhumb_line
from navcore.position import Position
from navcore.sailings.composite import Composite, composite, limits_table
from navcore.sailings.composite_working import solve_composite

NORTH_PACIFIC = Position(48.5, -(125.0 + 20.0 / 60.0)), Position(41.0 + 20.0 / 60.0, 143.0)
SOUTHERN_OCEAN = Position(-34.5, 18.0), Position(-(43.0 + 50.0 / 60.0), 146.5)


def turn_deg(one_deg: float, other_deg: float) -> float:
    return abs((one_deg - other_deg + 180.0) % 360.0 - 180.0)


def check_by_its_lines(track: Composite) -> None:
    """Each arc is worked again by the line it is, and touches the limit."""
    reached, left = track.tangent_points
    up = great_circle.inverse(*track.start, *reached, track.figure)
    along = rhumb_line.inverse(*reached, *left, track.figure)
    down = great_circle.inverse(*left, *track.end, track.figure)
    # The lengths and courses of short arcs hang on the last digit of the tangent point's longitude.
    for arc_m, line_m in zip(track.arcs_m, (up.distance_m, along.distance_m, down.distance_m), strict=True):
        assert arc_m == pytest.approx(float(line_m), abs=1e-6)
    assert turn_deg(track.initial_course_deg, float(up.initial_course_deg)) * track.arcs_m[0] < 1.0
    assert turn_deg(track.final_course_deg, float(down.final_course_deg)) * track.arcs_m[2] < 1.0
    if track.arcs_m[0] > 1e4 and track.arcs_m[1] > 1.0:
        assert turn_deg(float(up.final_course_deg), float(along.course_deg)) < 1e-6
    if track.arcs_m[2] > 1e4 and track.arcs_m[1] > 1.0:
        assert turn_deg(float(down.initial_course_deg), float(along.course_deg)) < 1e-6


@pytest.mark.parametrize("name", FIGURES)
@pytest.mark.parametrize(("ends", "limit_deg"), [(NORTH_PACIFIC, 50.0), (SOUTHERN_OCEAN, -46.0)])
def test_arcs_are_great_circle_parallel_great_circle_touching_the_limit(
    name: str, ends: tuple[Position, Position], limit_deg: float
) -> None:
    there, back = composite(*ends, limit_deg, FIGURES[name]), composite(ends[1], ends[0], limit_deg, FIGURES[name])
    check_by_its_lines(there)
    check_by_its_lines(back)
    assert back.distance_m == pytest.approx(there.distance_m, abs=1e-7)
    assert back.initial_course_deg == pytest.approx((there.final_course_deg + 180.0) % 360.0)


@settings(max_examples=60, deadline=None)
@given(
    st.floats(-60.0, 80.0), st.floats(-60.0, 80.0), st.floats(1.0, 179.0), st.floats(5.0, 85.0),
    st.sampled_from([1.0, -1.0]), st.sampled_from([1.0, -1.0]),
)  # fmt: skip
def test_any_composite_touches_its_limit_and_is_longer_than_the_great_circle(
    lat1_deg: float, lat2_deg: float, d_long_deg: float, limit_deg: float, side: float, way: float
) -> None:
    assume(max(lat1_deg, lat2_deg) <= limit_deg)
    assume(max(lat1_deg, lat2_deg) >= 0.0)
    start, end = Position(side * lat1_deg, 170.0), Position(side * lat2_deg, 170.0 + way * d_long_deg)
    track = composite(start, end, side * limit_deg, WGS_84)
    assert track.extra_m >= -1e-6
    assert len(track.arcs_m) == (1 if track.is_great_circle else 3)
    if track.is_great_circle:
        assert track.extra_m == 0.0
        assert side * track.highest_lat_deg <= limit_deg
    else:
        assert track.note is None
        check_by_its_lines(track)


@pytest.mark.parametrize("name", ["sphere", "WGS 84"])
def test_no_other_points_on_the_limit_make_a_shorter_track(name: str) -> None:
    track = composite(*NORTH_PACIFIC, 50.0, FIGURES[name])

    def length_m(shift1_deg: float, shift2_deg: float) -> float:
        reached, left = track.tangent_points
        one = Position(50.0, reached.lon_deg + shift1_deg)
        other = Position(50.0, left.lon_deg + shift2_deg)
        lines = (
            great_circle.inverse(*track.start, *one, track.figure).distance_m,
            rhumb_line.inverse(*one, *other, track.figure).distance_m,
            great_circle.inverse(*other, *track.end, track.figure).distance_m,
        )
        return float(sum(lines))

    for shift_deg in (1.0, 0.1):
        # A great circle to a point beyond the tangent point would leave the limit, so only earlier turns are allowed.
        assert length_m(shift_deg, 0.0) > track.distance_m
        assert length_m(0.0, -shift_deg) > track.distance_m


def test_an_end_on_the_limit_is_its_own_tangent_point() -> None:
    start, end = Position(50.0, -130.0), Position(50.0, 160.0)
    track = composite(start, end, 50.0, WGS_84)
    assert track.arcs_m[0] == track.arcs_m[2] == 0.0
    assert track.tangent_points == (start, end)
    assert track.distance_m == pytest.approx(float(rhumb_line.inverse(*start, *end, WGS_84).distance_m), abs=1e-6)
    assert (track.initial_course_deg, track.final_course_deg) == (270.0, 270.0)


def test_the_way_round_for_exactly_half_a_turn_is_as_typed() -> None:
    east = composite(Position(40.0, 0.0), Position(40.0, 180.0), 60.0, SPHERE)
    west = composite(Position(40.0, 0.0), Position(40.0, -180.0), 60.0, SPHERE)
    assert east.initial_course_deg == pytest.approx(360.0 - west.initial_course_deg)
    assert east.initial_course_deg < 180.0
    assert east.distance_m == pytest.approx(west.distance_m)


def test_across_the_equator_the_limit_acts_on_its_own_side() -> None:
    track = composite(Position(45.0, 0.0), Position(-20.0, 160.0), 50.0, WGS_84)
    assert not track.is_great_circle
    check_by_its_lines(track)


def test_a_great_circle_within_the_limit_is_taken_and_said() -> None:
    track = composite(*NORTH_PACIFIC, 60.0, WGS_84)
    whole = great_circle.inverse(*NORTH_PACIFIC[0], *NORTH_PACIFIC[1], WGS_84)
    assert track.is_great_circle
    assert track.distance_m == float(whole.distance_m)
    assert track.initial_course_deg == float(whole.initial_course_deg)
    assert track.final_course_deg == float(whole.final_course_deg)
    assert "the great circle keeps within 60°00.0'N" in (track.note or "")
    assert "55°29.3'N" in (track.note or "")


@pytest.mark.parametrize(
    ("limit_deg", "said"),
    [
        (48.0, "the limit 48°00.0'N is equatorward of an end of the leg, which lies in 48°30.0'N.*give a limit of"),
        (-50.0, "on the other side of the equator.*did you mean 50°00.0'N"),
        (0.0, "the equator is no limiting latitude"),
    ],
)
def test_a_limit_that_cannot_be_asked_is_refused_with_what_would_do(limit_deg: float, said: str) -> None:
    with pytest.raises(NoAnswerError, match=said):
        composite(*NORTH_PACIFIC, limit_deg, WGS_84)


@pytest.mark.parametrize("limit_deg", [91.0, math.nan])
def test_a_limit_that_is_no_latitude_is_out_of_range(limit_deg: float) -> None:
    with pytest.raises(RangeError):
        composite(*NORTH_PACIFIC, limit_deg, WGS_84)


def test_a_table_of_limits_keeps_its_order_and_names_what_is_refused() -> None:
    rows = limits_table(*NORTH_PACIFIC, (48.0, 50.0, 60.0), SPHERE)
    assert [row.limit_deg for row in rows] == [48.0, 50.0, 60.0]
    assert rows[0].track is None
    assert "equatorward" in (rows[0].refusal or "")
    assert rows[0].extra_hours(13.5) is None
    assert rows[1].extra_hours(13.5) == pytest.approx(61.74 / 13.5, abs=0.001)
    assert rows[2].extra_hours(13.5) == 0.0


@pytest.mark.parametrize(
    ("ends", "lengths_nmi"),
    [
        (NORTH_PACIFIC, {49: 3768.1, 50: 3740.0, 51: 3718.2, 52: 3701.7, 53: 3689.9}),
        (
            SOUTHERN_OCEAN,
            {-44: 5743.0, -45: 5691.0, -46: 5644.9, -48: 5565.3, -50: 5499.2, -52: 5444.9, -55: 5383.3, -60: 5329.4},
        ),
    ],
)
def test_tables_of_limits_worked_by_the_textbook_formulas_on_the_sphere(
    ends: tuple[Position, Position], lengths_nmi: dict[int, float]
) -> None:
    # cos d.long = tan lat cot limit, cos distance = sin lat / sin limit, parallel = d.long cos limit.
    for row in limits_table(*ends, tuple(map(float, lengths_nmi)), SPHERE):
        assert row.track is not None
        limit = math.radians(abs(row.limit_deg))
        lats = [math.radians(abs(end.lat_deg)) for end in ends]
        turned = [math.acos(math.tan(lat) / math.tan(limit)) for lat in lats]
        run = [math.acos(math.sin(lat) / math.sin(limit)) for lat in lats]
        d_long = math.radians(abs((ends[1].lon_deg - ends[0].lon_deg + 180.0) % 360.0 - 180.0))
        textbook_nmi = math.degrees(sum(run) + (d_long - sum(turned)) * math.cos(limit)) * 60.0
        assert row.track.distance_m / METRES_PER_NAUTICAL_MILE == pytest.approx(textbook_nmi, abs=1e-6)
        assert textbook_nmi == pytest.approx(lengths_nmi[int(row.limit_deg)], abs=0.06)


def test_the_north_pacific_composite_in_detail() -> None:
    track = composite(*NORTH_PACIFIC, 50.0, SPHERE)
    assert [arc_m / METRES_PER_NAUTICAL_MILE for arc_m in track.arcs_m] == pytest.approx(
        [727.5, 1185.9, 1826.5], abs=0.06
    )
    assert [point.lon_deg for point in track.tangent_points] == pytest.approx(
        [-(143 + 48.9 / 60), -(174 + 33.8 / 60)], abs=0.05 / 60
    )
    assert (track.initial_course_deg, track.final_course_deg) == pytest.approx((284.1, 238.9), abs=0.06)


def test_the_books_formulas_and_the_search_on_the_sphere_agree() -> None:
    chance = random.Random(1)
    worked = 0
    while worked < 60:
        side = chance.choice((1.0, -1.0))
        start, end = (Position(side * chance.uniform(-30.0, 60.0), chance.uniform(-180.0, 180.0)) for _ in range(2))
        limit_deg = side * chance.uniform(max(side * start.lat_deg, side * end.lat_deg), 80.0)
        try:
            working = solve_composite(start, end, limit_deg)
        except NoAnswerError:
            continue
        worked += 1
        track = composite(start, end, limit_deg, SPHERE)
        assert working.value("distance") == pytest.approx(track.distance_m / METRES_PER_NAUTICAL_MILE, abs=1e-6)
        courses = {"initial course": track.initial_course_deg, "final course": track.final_course_deg}
        for symbol, course_deg in courses.items():
            assert math.remainder(working.number(symbol) - course_deg, 360.0) == pytest.approx(0.0, abs=1e-6)
