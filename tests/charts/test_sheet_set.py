"""Whole sheets: against PROJ to a thousandth of a millimetre, scale fitted, sets numbered, over ±180 and the poles."""

from __future__ import annotations

from dataclasses import replace
from functools import lru_cache
from itertools import pairwise

import numpy as np
import pytest

from navcore.charts.choice import SheetKind
from navcore.charts.lambert import Lambert
from navcore.charts.lettering import boxes_meet
from navcore.charts.mercator import Mercator
from navcore.charts.paper import SCALES, paper_named
from navcore.charts.sheet import ChartPoint, Sheet
from navcore.charts.sheet_set import SheetRequest, make_sheets
from navcore.charts.stereographic import Stereographic
from navcore.charts.track import Arc, TrackLeg
from navcore.earth.figure import FIGURES, SPHERE, WGS_84, Figure
from navcore.errors import NoAnswerError, ParseError, RangeError
from navcore.position import Position

NORTH_PACIFIC = [(48.5, -125.3), (50.0, -143.8), (50.0, -174.5), (49.9, 179.9), (42.75, 147.5), (41.3, 143.0)]
OVER_THE_ICE = [(61.2, -150.0), (72.0, -140.0), (86.0, -90.0), (88.0, -10.0), (82.0, 12.0), (60.2, 11.1)]
SOUTHERN_OCEAN = [(-34.5, 18.0), (-44.2, 41.1), (-50.0, 72.8), (-50.0, 110.2), (-43.8, 146.5)]
COASTAL = [(54.17, 2.5), (54.22, 2.6), (54.22, 2.74), (54.15, 2.82), (54.14, 2.96), (54.31, 3.03)]
FIJI = [(-16.0, 179.2), (-18.5, -178.6), (-20.0, 178.9)]

INTERNATIONAL = FIGURES["International 1924"]


def request(
    places: list[tuple[float, float]],
    kind: SheetKind = SheetKind.MERCATOR,
    paper: str = "A4",
    figure: Figure = WGS_84,
    *,
    great_circle: bool = True,
) -> SheetRequest:
    positions = [Position(*place) for place in places]
    points = tuple(ChartPoint(f"{number} point", position) for number, position in enumerate(positions, 1))
    legs = tuple(
        TrackLeg((Arc(start, end, great_circle and number % 2 == 0),), f"leg {number}", (start,))
        for number, (start, end) in enumerate(pairwise(positions))
    )
    return SheetRequest(
        points, legs, figure, kind, paper_named(paper), lambda text, size: 0.55 * size * len(text), coast=False
    )


drawn = lru_cache(make_sheets)

REQUESTS = [
    request(NORTH_PACIFIC),
    request(NORTH_PACIFIC, paper="A2", figure=INTERNATIONAL),
    request(NORTH_PACIFIC, SheetKind.LAMBERT),
    request(NORTH_PACIFIC, SheetKind.STEREOGRAPHIC, figure=SPHERE),
    request(NORTH_PACIFIC, SheetKind.GNOMONIC),
    request(OVER_THE_ICE, SheetKind.STEREOGRAPHIC, "A2"),
    request(SOUTHERN_OCEAN, SheetKind.LAMBERT),
    request(SOUTHERN_OCEAN, SheetKind.STEREOGRAPHIC, figure=INTERNATIONAL),
    request([(-lat, lon) for lat, lon in OVER_THE_ICE], SheetKind.STEREOGRAPHIC),
    request(COASTAL),
    request(COASTAL, SheetKind.LAMBERT, "A3"),
    request(FIJI),
    replace(request(NORTH_PACIFIC), scale=1e7),
    replace(request(OVER_THE_ICE, SheetKind.STEREOGRAPHIC), central_lon_deg=0.0, true_scale_deg=(70.0,), scale=1.2e7),
]


@pytest.mark.parametrize("wanted", REQUESTS, ids=lambda wanted: f"{wanted.kind}-{wanted.points[0].position[0]}")
def test_every_point_is_where_proj_puts_it_to_a_thousandth_of_a_millimetre(wanted: SheetRequest) -> None:
    pyproj = pytest.importorskip("pyproj")
    for sheet in drawn(wanted).sheets:
        proj = pyproj.Proj(sheet.plane.proj_string)
        points = np.array([point[1:7] for point in sheet.points])
        crossings = np.array(sheet.graticule.intersections)
        for lat_deg, lon_deg, x_mm, y_mm in (points[:, :4].T, crossings.T):
            proj_x_m, proj_y_m = proj(lon_deg, lat_deg)
            np.testing.assert_allclose(np.array(proj_x_m) * 1000.0 / sheet.plane.scale, x_mm, rtol=0, atol=0.001)
            np.testing.assert_allclose(np.array(proj_y_m) * 1000.0 / sheet.plane.scale, y_mm, rtol=0, atol=0.001)
        factors = proj.get_factors(points[:, 1], points[:, 0])
        np.testing.assert_allclose(points[:, 4], factors.meridional_scale, rtol=1e-7)
        np.testing.assert_allclose(points[:, 5], factors.meridian_convergence, rtol=0, atol=1e-5)


def on_the_sheet(sheet: Sheet) -> None:
    size = [sheet.plane.width_mm, sheet.plane.height_mm]
    for leg in sheet.legs:
        for piece in leg.pieces_mm:
            assert np.all(piece >= -1e-9)
            assert np.all(piece <= np.array(size) + 1e-9)
    boxes = [lettering.corners_mm() for lettering in sheet.lettering]
    for index, box in enumerate(boxes[:-1]):
        assert not np.any(boxes_meet(box, np.stack(boxes[index + 1 :])))


@pytest.mark.parametrize("wanted", REQUESTS, ids=lambda wanted: f"{wanted.kind}-{wanted.points[0].position[0]}")
def test_everything_is_inside_the_neat_line_and_no_words_over_others(wanted: SheetRequest) -> None:
    for sheet in drawn(wanted).sheets:
        on_the_sheet(sheet)
        for point in sheet.points:
            inside = 0.0 <= point.x_mm <= sheet.plane.width_mm and 0.0 <= point.y_mm <= sheet.plane.height_mm
            assert point.inside is inside


@pytest.mark.parametrize("wanted", REQUESTS[:12], ids=lambda wanted: f"{wanted.kind}-{wanted.points[0].position[0]}")
def test_a_fitted_sheet_shows_every_leg_whole_at_a_scale_of_the_list(wanted: SheetRequest) -> None:
    made = drawn(wanted)
    (sheet,) = made.sheets
    assert made.index is None
    assert sheet.plane.scale in SCALES
    assert all(point.inside for point in sheet.points)
    assert [leg.number for leg in sheet.legs] == list(range(len(wanted.legs)))
    for leg in sheet.legs:
        (piece,) = leg.pieces_mm
        start, end = sheet.points[leg.number], sheet.points[leg.number + 1]
        np.testing.assert_allclose(piece[0], (start.x_mm, start.y_mm), atol=1e-6)
        np.testing.assert_allclose(piece[-1], (end.x_mm, end.y_mm), atol=1e-6)
        assert len(leg.marks_mm) == 1


def test_the_next_larger_scale_would_not_have_fitted() -> None:
    wanted = request(NORTH_PACIFIC)
    scale = make_sheets(wanted).sheets[0].plane.scale
    larger = SCALES[SCALES.index(scale) - 1]
    assert len(make_sheets(replace(wanted, scale=larger)).sheets) > 1


def test_a_passage_too_big_for_one_sheet_is_a_numbered_set_with_an_index() -> None:
    wanted = replace(request(NORTH_PACIFIC), scale=5e6)
    made = make_sheets(wanted)
    assert made.index is not None
    assert [sheet.number for sheet in made.sheets] == list(range(1, len(made.sheets) + 1))
    assert {sheet.of for sheet in made.sheets} == {len(made.sheets)}
    assert len(made.index.outlines) == len(made.sheets) > 3
    # Numbered along the track: the first sheet holds the first waypoint, the last the last.
    assert made.sheets[0].points[0].inside
    assert any(sheet.points[-1].inside for sheet in made.sheets)
    first_legs = [sheet.legs[0].number for sheet in made.sheets]
    assert first_legs == sorted(first_legs)
    assert all(point.inside for point in made.index.points)


def test_every_waypoint_and_the_whole_track_are_on_some_sheet_of_a_set() -> None:
    made = make_sheets(replace(request(NORTH_PACIFIC), scale=5e6))
    for number in range(len(NORTH_PACIFIC)):
        assert any(sheet.points[number].inside for sheet in made.sheets)
    scale = made.sheets[0].plane.scale
    for number in range(len(NORTH_PACIFIC) - 1):
        whole = sum(
            float(np.sum(np.hypot(*np.diff(piece, axis=0).T)))
            for sheet in made.sheets
            for leg in sheet.legs
            if leg.number == number
            for piece in leg.pieces_mm
        )
        (fitted,) = make_sheets(request(NORTH_PACIFIC)).sheets
        (leg,) = [leg for leg in fitted.legs if leg.number == number]
        once = sum(float(np.sum(np.hypot(*np.diff(piece, axis=0).T))) for piece in leg.pieces_mm)
        assert whole >= once * fitted.plane.scale / scale - 0.1


def test_the_track_over_180_is_in_one_piece_and_its_meridian_is_in_the_middle() -> None:
    (sheet,) = make_sheets(request(FIJI)).sheets
    assert abs(sheet.plane.projection.central_lon_deg) > 179.0
    assert all(len(leg.pieces_mm) == 1 for leg in sheet.legs)


def test_a_leg_over_the_pole_runs_through_it() -> None:
    (sheet,) = make_sheets(request([(80.0, 30.0), (75.0, -150.0)], SheetKind.STEREOGRAPHIC)).sheets
    (piece,) = sheet.legs[0].pieces_mm
    pole = sheet.plane.to_mm(90.0, 0.0)
    step = np.diff(piece, axis=0)[0] / np.hypot(*np.diff(piece, axis=0)[0])
    assert abs(float(np.cross(np.append(pole - piece[0], 0.0), np.append(step, 0.0))[2])) < 1e-6
    assert bool(sheet.plane.holds(pole))


def test_paper_is_turned_to_what_gives_the_larger_scale_unless_said() -> None:
    wide, high = request(NORTH_PACIFIC), request([(60.0, 0.0), (-30.0, 2.0)])
    assert make_sheets(wide).sheets[0].paper.width_mm == 297.0
    assert make_sheets(high).sheets[0].paper.width_mm == 210.0
    assert make_sheets(replace(wide, turn=False)).sheets[0].paper.width_mm == 210.0


def test_the_projection_and_its_parameters_are_chosen_for_the_passage() -> None:
    mercator = make_sheets(request(NORTH_PACIFIC)).sheets[0].plane.projection
    assert isinstance(mercator, Mercator)
    assert mercator.true_scale_lats_deg == (46.0,)
    lambert = make_sheets(request(NORTH_PACIFIC, SheetKind.LAMBERT)).sheets[0].plane.projection
    assert isinstance(lambert, Lambert)
    assert lambert.true_scale_lats_deg == (43.0, 49.0)
    polar = make_sheets(request(OVER_THE_ICE, SheetKind.STEREOGRAPHIC)).sheets[0].plane.projection
    assert isinstance(polar, Stereographic)
    assert polar.is_polar
    oblique = make_sheets(request(COASTAL, SheetKind.STEREOGRAPHIC)).sheets[0].plane.projection
    assert isinstance(oblique, Stereographic)
    assert not oblique.is_polar


def test_corners_are_shown_instead_of_the_passage() -> None:
    wanted = replace(request(FIJI), corners=(Position(-20.0, 175.0), Position(-10.0, -175.0)))
    (sheet,) = make_sheets(wanted).sheets
    for corner in ((-20.0, 175.0), (-10.0, 175.0), (-10.0, -175.0), (-20.0, -175.0)):
        assert bool(sheet.plane.holds(sheet.plane.to_mm(*corner)))
    empty = replace(wanted, points=(), legs=())
    assert make_sheets(empty).sheets[0].points == ()


def test_one_waypoint_alone_makes_a_sheet() -> None:
    (sheet,) = make_sheets(request(COASTAL[:1])).sheets
    assert sheet.points[0].inside
    assert sheet.graticule.intersections


def test_a_rose_points_to_true_north_where_it_stands_and_there_is_none_without_angles() -> None:
    for kind in (SheetKind.MERCATOR, SheetKind.LAMBERT, SheetKind.STEREOGRAPHIC):
        (sheet,) = make_sheets(request(NORTH_PACIFIC, kind)).sheets
        assert sheet.rose is not None
        lat_deg, lon_deg = sheet.plane.to_earth(sheet.rose.x_mm, sheet.rose.y_mm)
        turn_deg = sheet.plane.projection.convergence_deg(lat_deg, lon_deg)
        assert sheet.rose.turn_deg == pytest.approx(float(turn_deg))
    assert make_sheets(request(NORTH_PACIFIC, SheetKind.GNOMONIC)).sheets[0].rose is None


def test_the_shore_is_drawn_inside_the_neat_line() -> None:
    (sheet,) = make_sheets(replace(request(FIJI), coast=True)).sheets
    assert len(sheet.coast_mm) > 10
    for line in sheet.coast_mm:
        assert np.all(line[:, 0] >= -0.2)
        assert np.all(line[:, 0] <= sheet.plane.width_mm + 0.2)
    # Vanua Levu's shore on the 180th meridian is no line across the sheet.
    assert max(float(np.max(np.hypot(*np.diff(line, axis=0).T))) for line in sheet.coast_mm) < 20.0


@pytest.mark.parametrize(
    ("wanted", "says"),
    [
        (request(OVER_THE_ICE), "stereographic"),
        (request([(20.0, 0.0), (-20.0, 30.0)], SheetKind.LAMBERT), "mercator"),
        (request([(0.0, -80.0), (0.0, 80.0)], SheetKind.GNOMONIC), "stereographic"),
        (request([]), "waypoint"),
        (replace(request(NORTH_PACIFIC), scale=1e4), "smaller scale"),
    ],
)
def test_what_can_not_be_drawn_is_refused_with_what_to_do(wanted: SheetRequest, says: str) -> None:
    with pytest.raises(NoAnswerError, match=says):
        make_sheets(wanted)


def test_a_scale_or_paper_that_is_none_is_refused() -> None:
    with pytest.raises(RangeError):
        make_sheets(replace(request(COASTAL), scale=10.0))
    with pytest.raises(ParseError, match="A4"):
        paper_named("foolscap")
