"""Lines laid off on paper: close to the true curve, over ±180 and the poles, cut at the frame."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.charts.gnomonic import Gnomonic
from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.plane import PaperPlane
from navcore.charts.stereographic import Stereographic
from navcore.charts.track import TOLERANCE_MM, Arc, LaidArcs, cut_at, points_on
from navcore.earth.figure import WGS_84
from navcore.position import Position

if TYPE_CHECKING:
    from navcore.charts.projection import Projection
    from navcore.charts.track import Window
    from navcore.trigonometry import FloatArray

FAR = (-1e6, -1e6, 1e6, 1e6)


def plane(projection: Projection, scale: float = 1e7) -> PaperPlane:
    return PaperPlane(projection, scale, 0.0, 0.0, 1000.0, 1000.0)


def laid_off(arc: Arc, paper: PaperPlane, window_mm: Window) -> list[FloatArray]:
    """Return an arc's polylines, as a sheet has them."""
    laid = LaidArcs([arc], WGS_84, paper.to_mm)
    laid.look_at(window_mm, TOLERANCE_MM)
    return laid.polylines(TOLERANCE_MM)[0]


def off_line_mm(points: FloatArray, lines: list[FloatArray]) -> FloatArray:
    """Return how far points are from the nearest of the polylines."""
    start = np.concatenate([line[:-1] for line in lines])
    step = np.concatenate([np.diff(line, axis=0) for line in lines])
    squared = np.maximum(np.einsum("ij,ij->i", step, step), 1e-18)
    off = points[:, np.newaxis] - start
    part = np.clip(np.einsum("nij,ij->ni", off, step) / squared, 0.0, 1.0)
    return np.asarray(np.linalg.norm(off - part[:, :, np.newaxis] * step, axis=2).min(axis=1))


ARCS = [
    Arc(Position(48.5, -125.3), Position(41.3, 143.0), great_circle=True),
    Arc(Position(48.5, -125.3), Position(41.3, 143.0), great_circle=False),
    Arc(Position(61.2, -150.0), Position(60.2, 11.1), great_circle=True),
    Arc(Position(61.2, -150.0), Position(60.2, 11.1), great_circle=False),
    Arc(Position(-34.5, 18.0), Position(-43.8, 146.5), great_circle=True),
    Arc(Position(70.0, 20.0), Position(80.0, 20.0), great_circle=True),
]


@pytest.mark.parametrize("arc", ARCS)
@pytest.mark.parametrize(
    "projection",
    [
        Mercator(WGS_84, 180.0, 45.0),
        Stereographic.polar(WGS_84, 75.0, -150.0),
        Stereographic(WGS_84, 50.0, -170.0),
        Lambert(WGS_84, -170.0, (35.0, 55.0), 45.0),
    ],
    ids=lambda p: p.name,
)
@pytest.mark.parametrize("scale", [5e7, 4e6])
def test_a_polyline_is_within_a_twentieth_of_a_millimetre_of_its_curve(
    projection: Projection, arc: Arc, scale: float
) -> None:
    paper = plane(projection, scale)
    lines = laid_off(arc, paper, FAR)
    rng = np.random.default_rng(3)
    true_mm = paper.to_mm(*points_on([arc], rng.uniform(0.0, 1.0, 120), WGS_84))[0]
    assert off_line_mm(true_mm, lines).max() < 0.05


def test_the_ends_of_a_leg_are_the_waypoints_themselves() -> None:
    paper = plane(Lambert(WGS_84, -170.0, (35.0, 55.0), 45.0))
    arc = ARCS[0]
    (line,) = laid_off(arc, paper, FAR)
    np.testing.assert_array_equal(line[0], paper.to_mm(*arc.start))
    np.testing.assert_array_equal(line[-1], paper.to_mm(*arc.end))


def test_a_rhumb_line_is_straight_on_a_mercator_sheet_over_180() -> None:
    paper = plane(Mercator(WGS_84, 180.0, 45.0))
    (line,) = laid_off(ARCS[1], paper, FAR)
    assert off_line_mm(line, [line[[0, -1]]]).max() < 1e-6
    assert line[-1][0] < line[0][0]


def test_a_leg_over_the_edge_of_the_map_is_broken_there_and_nowhere_else() -> None:
    paper = plane(Mercator(WGS_84, 0.0, 45.0))
    lines = laid_off(ARCS[0], paper, FAR)
    assert len(lines) == 2
    half_world_mm = paper.to_mm(0.0, 180.0)[0]
    assert lines[0][-1][0] == pytest.approx(-half_world_mm, abs=0.01)
    assert lines[1][0][0] == pytest.approx(half_world_mm, abs=0.01)
    assert lines[0][-1][1] == pytest.approx(lines[1][0][1], abs=0.01)


def test_a_great_circle_over_the_pole_runs_straight_through_it_on_a_polar_sheet() -> None:
    paper = plane(Stereographic.polar(WGS_84, 90.0))
    arc = Arc(Position(70.0, 40.0), Position(75.0, -140.0), great_circle=True)
    (line,) = laid_off(arc, paper, FAR)
    assert off_line_mm(paper.to_mm([90.0], [0.0]), [line]).max() < 1e-6
    assert off_line_mm(line, [line[[0, -1]]]).max() < 1e-6


def test_a_great_circle_over_the_pole_is_seen_as_far_as_a_mercator_sheet_goes() -> None:
    paper = plane(Mercator(WGS_84, 40.0, 70.0))
    arc = Arc(Position(70.0, 40.0), Position(75.0, -140.0), great_circle=True)
    lines = laid_off(arc, paper, (-2000.0, -2000.0, 2000.0, 2000.0))
    np.testing.assert_allclose(lines[0][0], paper.to_mm(70.0, 40.0))
    assert all(np.all(np.isfinite(line)) for line in lines)


def test_a_great_circle_is_straight_on_a_gnomonic_sheet_but_for_the_ellipsoid() -> None:
    paper = plane(Gnomonic(45.0, 180.0), 3e7)
    (line,) = laid_off(ARCS[0], paper, FAR)
    assert off_line_mm(line, [line[[0, -1]]]).max() < 1.0


def test_what_is_far_outside_the_window_is_left_coarse() -> None:
    paper = plane(Mercator(WGS_84, 180.0, 45.0), 1e5)
    fine = laid_off(ARCS[0], paper, FAR)
    start_mm = paper.to_mm(*ARCS[0].start)
    window = (start_mm[0] - 100.0, start_mm[1] - 100.0, start_mm[0] + 100.0, start_mm[1] + 100.0)
    assert len(laid_off(ARCS[0], paper, window)[0]) < 0.5 * len(fine[0])


WINDOW = (0.0, 0.0, 10.0, 5.0)


@pytest.mark.parametrize(
    ("line", "expected"),
    [
        ([[-5, 2], [15, 2]], [[[0, 2], [10, 2]]]),
        ([[2, 2], [4, 4]], [[[2, 2], [4, 4]]]),
        ([[-1, -1], [-2, 3]], []),
        ([[2, 2], [2, 8], [8, 8], [8, 2]], [[[2, 2], [2, 5]], [[8, 5], [8, 2]]]),
        ([[-5, 6], [15, 6]], []),
        ([[0, 0], [10, 0]], [[[0, 0], [10, 0]]]),
        ([[-5, -5], [5, 5]], [[[0, 0], [5, 5]]]),
    ],
)
def test_a_line_is_cut_at_the_frame(line: list[list[float]], expected: list[list[list[float]]]) -> None:
    pieces = cut_at(np.array(line, dtype=np.float64), WINDOW)
    assert [piece.tolist() for piece in pieces] == expected


def test_a_gap_in_a_line_stays_a_gap() -> None:
    line = np.array([[1.0, 1.0], [2.0, 1.0], [np.nan, np.nan], [3.0, 1.0], [4.0, 1.0]])
    assert [piece.tolist() for piece in cut_at(line, WINDOW)] == [[[1.0, 1.0], [2.0, 1.0]], [[3.0, 1.0], [4.0, 1.0]]]


def test_arcs_laid_off_together_are_those_laid_off_alone() -> None:
    paper = plane(Lambert(WGS_84, -170.0, (35.0, 55.0), 45.0), 4e6)
    still = Arc(Position(10.0, 20.0), Position(10.0, 20.0), great_circle=True)
    arcs = [*ARCS, still]
    laid = LaidArcs(arcs, WGS_84, paper.to_mm)
    laid.look_at(FAR, TOLERANCE_MM)
    together = laid.polylines(TOLERANCE_MM)
    assert together[-1] == []
    for arc, lines in zip(ARCS, together, strict=False):
        for line, alone in zip(lines, laid_off(arc, paper, FAR), strict=True):
            np.testing.assert_allclose(line, alone, rtol=0.0, atol=1e-6)


def test_looking_closer_elsewhere_moves_nothing_that_was_laid_off() -> None:
    paper = plane(Mercator(WGS_84, 180.0, 45.0))
    laid = LaidArcs(ARCS[:1], WGS_84, paper.to_mm)
    before = laid.joined(1.0)[0]
    start_mm = paper.to_mm(*ARCS[0].start)
    laid.look_at((start_mm[0] - 5.0, start_mm[1] - 5.0, start_mm[0] + 5.0, start_mm[1] + 5.0), 1e-4)
    after, arc = laid.joined(1e-4)
    assert len(after) > len(before) + 8
    assert np.all(arc == 0)
    assert {tuple(point) for point in before[:-1].tolist()} <= {tuple(point) for point in after.tolist()}


def test_no_arc_is_nothing_laid_off() -> None:
    laid = LaidArcs([], WGS_84, plane(Mercator(WGS_84)).to_mm)
    laid.look_at(FAR, 1.0)
    assert laid.polylines(1.0) == []
