"""One plotting sheet: everything that is drawn on it, in millimetres from the lower left corner of the neat line."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.charts.coast import load_shore_lines
from navcore.charts.graticule import make_graticule
from navcore.charts.lettering import Board, points_along
from navcore.charts.ruling import make_ruling
from navcore.charts.shore import lay_off_shore, thinned
from navcore.charts.track import cut_at

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from navcore.charts.graticule import Graticule
    from navcore.charts.lettering import Lettering
    from navcore.charts.paper import Paper
    from navcore.charts.plane import PaperPlane
    from navcore.charts.ruling import Ruling
    from navcore.charts.track import TrackLeg
    from navcore.position import Position
    from navcore.trigonometry import FloatArray

LETTER_MM = 3.0
"""Size of the letters on a sheet."""

ISLET_MM = 0.3
"""The smallest that an islet is drawn, whatever the scale."""

_MARK_MM = np.array([[-1.5, -1.5], [1.5, -1.5], [1.5, 1.5], [-1.5, 1.5]])
_COAST_DETAIL_MM = 0.15
_CUT_MM = 20.0
_LARGEST_ROSE_MM = 32.0
_SMALLEST_ROSE_MM = 9.0


class ChartPoint(NamedTuple):
    """A waypoint to be drawn.

    Attributes:
        words: What stands beside it.
        position: Where it is.
    """

    words: str
    position: Position


class LaidPoint(NamedTuple):
    """A waypoint on a sheet, or off it: `inside` tells."""

    words: str
    lat_deg: float
    lon_deg: float
    x_mm: float
    y_mm: float
    scale_factor: float
    convergence_deg: float
    inside: bool


@dataclass(frozen=True, slots=True, eq=False)
class LaidLeg:
    """What of a leg is on a sheet.

    Attributes:
        number: From 0, as in the passage.
        great_circle: Whether it is drawn as a great circle.
        pieces_mm: What is inside the neat line, each of shape (n, 2), in the order sailed.
        marks_mm: Where its parts meet, inside the neat line, shape (n, 2).
    """

    number: int
    great_circle: bool
    pieces_mm: tuple[FloatArray, ...]
    marks_mm: FloatArray


class Rose(NamedTuple):
    """A compass rose, its north turned to true north at its own middle.

    Attributes:
        x_mm: Its middle.
        y_mm: Likewise.
        radius_mm: Of its outer circle.
        turn_deg: Convergence there: how far true north lies anticlockwise of the sheet's up.
    """

    x_mm: float
    y_mm: float
    radius_mm: float
    turn_deg: float


class Outline(NamedTuple):
    """The neat line of another sheet, on the index."""

    number: int
    left_mm: float
    bottom_mm: float
    right_mm: float
    top_mm: float


@dataclass(frozen=True, slots=True, eq=False)
class Sheet:
    """A plotting sheet.

    Attributes:
        number: From 1; 0 is the index of a set.
        of: How many the set has, the index not counted.
        plane: Projection, scale and neat line.
        paper: What it is drawn on.
        graticule: Its meridians and parallels.
        ruling: The spacing table.
        legs: Those that come on it.
        points: Every waypoint of the passage.
        lettering: Words beside waypoints and along legs.
        left_out: Words for which there was no room.
        rose: None where there is no room, or angles are not kept.
        coast_mm: Lines of the shore, each of shape (n, 2).
        outlines: Neat lines of the set's sheets, on the index only.
    """

    number: int
    of: int
    plane: PaperPlane
    paper: Paper
    graticule: Graticule
    ruling: Ruling
    legs: tuple[LaidLeg, ...]
    points: tuple[LaidPoint, ...]
    lettering: tuple[Lettering, ...]
    left_out: tuple[str, ...]
    rose: Rose | None
    coast_mm: tuple[FloatArray, ...]
    outlines: tuple[Outline, ...] = ()


@dataclass(frozen=True, slots=True)
class Contents:
    """What the sheets of a set are drawn from.

    Attributes:
        points: The waypoints.
        legs: The legs between them.
        polylines_mm: For each leg its polylines on the plane of the set.
        text_width_mm: The width of words in letters of a size.
        coast: Whether the shore is drawn.
    """

    points: tuple[ChartPoint, ...]
    legs: tuple[TrackLeg, ...]
    polylines_mm: tuple[tuple[FloatArray, ...], ...]
    text_width_mm: Callable[[str, float], float]
    coast: bool


def make_sheet(
    contents: Contents, plane: PaperPlane, origin_mm: FloatArray, numbers: tuple[int, int], paper: Paper
) -> Sheet:
    """Return a sheet of a set.

    Args:
        contents: What is drawn.
        plane: The sheet's own plane.
        origin_mm: Where its lower left corner is on the plane that the polylines are on.
        numbers: Its number and how many there are.
        paper: What it is drawn on.
    """
    graticule = make_graticule(plane)
    legs = _laid_legs(contents, plane, origin_mm)
    points = _laid_points(contents.points, plane)
    board = Board(plane.width_mm, plane.height_mm, points_along([piece for leg in legs for piece in leg.pieces_mm]))
    lettering, left_out = _letter(board, contents, points, legs)
    return Sheet(
        *numbers,
        plane,
        paper,
        graticule,
        make_ruling(plane, graticule),
        legs,
        points,
        lettering,
        left_out,
        _rose(plane, board),
        _coast(plane) if contents.coast else (),
    )


def _laid_legs(contents: Contents, plane: PaperPlane, origin_mm: FloatArray) -> tuple[LaidLeg, ...]:
    laid = []
    for number, (leg, polylines) in enumerate(zip(contents.legs, contents.polylines_mm, strict=True)):
        pieces = [piece for line in polylines for piece in cut_at(line - origin_mm, plane.window_mm)]
        if pieces:
            marks = plane.to_mm(*np.array(leg.marks).T) if leg.marks else np.empty((0, 2))
            laid.append(LaidLeg(number, leg.great_circle, tuple(pieces), marks[plane.holds(marks)]))
    return tuple(laid)


def _laid_points(points: Sequence[ChartPoint], plane: PaperPlane) -> tuple[LaidPoint, ...]:
    if not points:
        return ()
    lat_deg, lon_deg = np.array([point.position for point in points]).T
    place = plane.to_mm(lat_deg, lon_deg)
    columns = (
        lat_deg,
        lon_deg,
        *place.T,
        plane.projection.scale_factor(lat_deg, lon_deg),
        plane.projection.convergence_deg(lat_deg, lon_deg),
    )
    rows = zip(points, *(column.tolist() for column in columns), plane.holds(place).tolist(), strict=True)
    return tuple(LaidPoint(point.words, *figures) for point, *figures in rows)


def _letter(
    board: Board, contents: Contents, points: Sequence[LaidPoint], legs: Sequence[LaidLeg]
) -> tuple[tuple[Lettering, ...], tuple[str, ...]]:
    """Set the waypoints' words, then the legs' where they have room; a leg's are in the leg table as well."""
    for point in points:
        if point.inside:
            board.block(_MARK_MM + np.array([point.x_mm, point.y_mm]))
    lettering, left_out = [], []
    for point in points:
        if point.inside and point.words:
            size = (contents.text_width_mm(point.words, LETTER_MM), LETTER_MM)
            placed = board.set_beside(point.words, size, (point.x_mm, point.y_mm))
            if placed is None:
                left_out.append(point.words)
            else:
                lettering.append(placed)
    for leg in legs:
        words = contents.legs[leg.number].words
        if words:
            size = (contents.text_width_mm(words, LETTER_MM), LETTER_MM)
            placed = board.set_along(words, size, max(leg.pieces_mm, key=_length_mm))
            if placed is not None:
                lettering.append(placed)
    return tuple(lettering), tuple(left_out)


def _length_mm(line_mm: FloatArray) -> float:
    step = np.diff(line_mm, axis=0)
    return float(np.sum(np.hypot(step[:, 0], step[:, 1])))


def _rose(plane: PaperPlane, board: Board) -> Rose | None:
    """Return a rose where there is most room."""
    if not plane.projection.conformal:
        return None
    largest = min(_LARGEST_ROSE_MM, 0.16 * min(plane.width_mm, plane.height_mm))
    x_mm = np.linspace(largest + 4.0, plane.width_mm - largest - 4.0, 15)
    y_mm = np.linspace(largest + 4.0, plane.height_mm - largest - 4.0, 15)
    middles = np.stack(np.meshgrid(x_mm, y_mm), axis=-1).reshape(-1, 2)
    lat_deg, lon_deg = plane.to_earth(middles[:, 0], middles[:, 1])
    outlines = [np.vstack((corners, corners[:1])) for corners in board.set_mm]
    obstacles = np.concatenate((board.drawn_mm, points_along(outlines)))
    clear = np.full(len(middles), np.inf)
    for start in range(0, len(obstacles), 5000):
        off = middles[:, np.newaxis] - obstacles[start : start + 5000]
        clear = np.minimum(clear, np.hypot(off[:, :, 0], off[:, :, 1]).min(axis=1))
    clear[~np.isfinite(lat_deg) | (np.abs(lat_deg) > 89.0)] = 0.0
    best = int(np.argmax(clear))
    radius = min(largest, float(clear[best]) - 3.0)
    if radius < _SMALLEST_ROSE_MM:
        return None
    turn_deg = float(plane.projection.convergence_deg(lat_deg[best], lon_deg[best]))
    return Rose(float(middles[best, 0]), float(middles[best, 1]), radius, turn_deg)


def _coast(plane: PaperPlane) -> tuple[FloatArray, ...]:
    """Return the shore inside the neat line, without what is too fine to be seen."""
    x_mm = np.concatenate([edge[:, 0] for edge in plane.edges_mm().values()])
    y_mm = np.concatenate([edge[:, 1] for edge in plane.edges_mm().values()])
    lat_deg, _ = plane.to_earth(x_mm, y_mm)
    poles = [pole for pole in (-90.0, 90.0) if plane.holds(plane.to_mm(pole, plane.projection.central_lon_deg))]
    inside_deg = np.concatenate((lat_deg[np.isfinite(lat_deg)], poles, [_middle_lat_deg(plane)]))
    lines = load_shore_lines().inside(float(inside_deg.min()) - 0.5, -180.0, float(inside_deg.max()) + 0.5, 180.0)
    # All lines in one array with gaps between them, so that they are cut at the neat line in one go.
    place_mm = lay_off_shore(lines, plane.to_mm, plane.projection.central_lon_deg, _CUT_MM)
    if not len(place_mm):
        return ()
    return tuple(_visible(piece) for piece in cut_at(thinned(place_mm, _COAST_DETAIL_MM), plane.window_mm))


def _middle_lat_deg(plane: PaperPlane) -> float:
    return float(plane.to_earth(plane.width_mm / 2.0, plane.height_mm / 2.0)[0])


def _visible(piece_mm: FloatArray) -> FloatArray:
    """Return a line of the shore, an islet too small to be seen as a dash of ISLET_MM."""
    if np.all(np.ptp(piece_mm, axis=0) < ISLET_MM):
        middle = piece_mm.mean(axis=0)
        half = np.array([ISLET_MM / 2.0, 0.0])
        return np.stack((middle - half, middle + half))
    return piece_mm
