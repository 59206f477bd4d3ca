"""Points, crossings and offsets of what is sailed."""

from __future__ import annotations

import numpy as np
import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import SPHERE, WGS_84, Figure
from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.position import Position
from navcore.sailings.composite import composite
from navcore.sailings.track import Piece, Track

HAWAII, NEW_ZEALAND = Position(21.0 + 10.0 / 60.0, -(157.0 + 55.0 / 60.0)), Position(-36.0, 175.0 + 10.0 / 60.0)
SALAL, KUROMATSU = Position(48.5, -(125.0 + 20.0 / 60.0)), Position(41.0 + 20.0 / 60.0, 143.0)


def single(start: Position, end: Position, figure: Figure, *, is_great_circle: bool) -> Track:
    return Track((Piece(start, end, is_great_circle),), figure)


def composite_track(figure: Figure) -> Track:
    track = composite(SALAL, KUROMATSU, 50.0, figure)
    reached, left = track.tangent_points
    pieces = Piece(SALAL, reached, True), Piece(reached, left, False), Piece(left, KUROMATSU, True)
    return Track(pieces, figure)


@pytest.mark.parametrize(
    ("is_great_circle", "equator", "after_nmi", "lat_at_180_deg"),
    [
        # Worked by hand on the sphere: 167°12.3'W after 1381.7 NM, 180° in 27°59.0'S; 167°35.3'W, 1390.8, 26°46.5'S.
        (True, -(167.0 + 12.3 / 60.0), 1381.7, -(27.0 + 59.0 / 60.0)),
        (False, -(167.0 + 35.3 / 60.0), 1390.8, -(26.0 + 46.5 / 60.0)),
    ],
)
def test_where_a_leg_crosses_the_equator_and_180(
    is_great_circle: bool, equator: float, after_nmi: float, lat_at_180_deg: float
) -> None:
    track = single(HAWAII, NEW_ZEALAND, SPHERE, is_great_circle=is_great_circle)
    (at_equator,) = track.crossings_of_parallel(0.0)
    assert at_equator.position.lon_deg == pytest.approx(equator, abs=0.1 / 60.0)
    assert at_equator.distance_m / METRES_PER_NAUTICAL_MILE == pytest.approx(after_nmi, abs=0.1)
    (at_180,) = track.crossings_of_meridian(180.0)
    assert at_180.position.lat_deg == pytest.approx(lat_at_180_deg, abs=0.1 / 60.0)


@pytest.mark.parametrize("figure", [SPHERE, WGS_84], ids=["sphere", "WGS 84"])
def test_a_composite_is_one_line_from_end_to_end(figure: Figure) -> None:
    track = composite_track(figure)
    whole = composite(SALAL, KUROMATSU, 50.0, figure)
    assert track.length_m == pytest.approx(whole.distance_m, abs=1e-5)
    assert track.at(0.0).position == pytest.approx(SALAL, abs=1e-12)
    assert track.at(track.length_m).position == pytest.approx(KUROMATSU, abs=1e-9)
    assert track.at(whole.arcs_m[0] + 0.5 * whole.arcs_m[1]).position.lat_deg == pytest.approx(50.0)
    assert track.at(0.0).course_deg == pytest.approx(whole.initial_course_deg)
    assert track.at(track.length_m).course_deg == pytest.approx(whole.final_course_deg)
    (at_180,) = track.crossings_of_meridian(180.0)
    assert at_180.position.lat_deg < 50.0
    assert [round(point.position.lon_deg) for point in track.at_meridians(10.0)] == [
        -130, -140, -150, -160, -170, -180, 170, 160, 150,
    ]  # fmt: skip


def test_points_at_distances_lie_so_far_along_and_off_by_nothing() -> None:
    track = composite_track(WGS_84)
    for distance_m in np.linspace(0.0, track.length_m, 9).tolist():
        point = track.at(distance_m)
        off = track.offset_of(point.position)
        assert off.distance_m == pytest.approx(0.0, abs=1e-5)
        assert off.along_m == pytest.approx(distance_m, abs=1e-3)


@pytest.mark.parametrize("is_great_circle", [True, False])
def test_a_position_off_the_track_has_its_distance_its_side_and_how_far_along(is_great_circle: bool) -> None:
    track = single(SALAL, KUROMATSU, WGS_84, is_great_circle=is_great_circle)
    foot = track.at(1e6)
    for side in (1, -1):
        place = great_circle.direct(*foot.position, foot.course_deg + side * 90.0, 30_000.0, WGS_84)
        off = track.offset_of(Position(float(place.lat_deg), float(place.lon_deg)))
        assert off.side == side
        assert off.distance_m == pytest.approx(30_000.0, abs=1e-5)
        assert off.along_m == pytest.approx(1e6, abs=0.1)


def test_a_joint_on_a_meridian_is_crossed_once() -> None:
    track = Track(
        (
            Piece(Position(0.0, -10.0), Position(5.0, 0.0), is_great_circle=False),
            Piece(Position(5.0, 0.0), Position(0.0, 10.0), is_great_circle=False),
        ),
        WGS_84,
    )
    assert len(track.crossings_of_meridian(0.0)) == 1
    assert len(track.at_meridians(5.0)) == 5
    assert len(track.crossings_of_parallel(4.0)) == 2


def test_a_track_is_no_longer_than_it_is() -> None:
    track = single(SALAL, KUROMATSU, WGS_84, is_great_circle=False)
    assert track.length_m == float(rhumb_line.inverse(*SALAL, *KUROMATSU, WGS_84).distance_m)
    for distance_m in (-1.0, track.length_m + 1.0):
        with pytest.raises(NoAnswerError, match=r"3924\.2 NM long"):
            track.at(distance_m)


def test_the_latitude_at_a_meridian_is_that_of_the_textbook_formula_on_the_sphere() -> None:
    # tan lat = (tan lat 1 sin(long 2 - long) + tan lat 2 sin(long - long 1)) / sin(long 2 - long 1)
    track = single(HAWAII, NEW_ZEALAND, SPHERE, is_great_circle=True)
    tan1, tan2 = np.tan(np.radians([HAWAII.lat_deg, NEW_ZEALAND.lat_deg]))
    for lon_deg in (-160.0, -170.0, 180.0):
        (point,) = track.crossings_of_meridian(lon_deg)
        from_start, to_end, whole = (
            np.sin(np.radians(turn))
            for turn in (
                lon_deg % 360.0 - HAWAII.lon_deg % 360.0,
                NEW_ZEALAND.lon_deg - lon_deg % 360.0,
                NEW_ZEALAND.lon_deg - HAWAII.lon_deg % 360.0,
            )
        )
        textbook_deg = float(np.degrees(np.arctan((tan1 * to_end + tan2 * from_start) / whole)))
        assert point.position.lat_deg == pytest.approx(textbook_deg, abs=1e-9)
