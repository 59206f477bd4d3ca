"""What the chart draws, laid off once on a projection's plane, so that moving over it works nothing anew."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from navcore.charts.choice import Coverage, SheetKind, choose_projection, coverage_of
from navcore.charts.coast import load_shore_lines
from navcore.charts.shore import LaidShore, is_apart, lay_off_shore
from navcore.charts.track import Arc, LaidArcs, TrackLeg
from navcore.errors import NoAnswerError
from navcore.plan.arcs import arcs_of

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    import numpy.typing as npt

    from navcore.charts.projection import Projection
    from navcore.plan.solve import Solution
    from navcore.trigonometry import FloatArray
    from tui.present.chart_view import View

_TOLERANCE_DOTS = 0.4
_CUT_M = 200_000.0

_NO_PLAN = Coverage(np.array([-55.0, 60.0]), np.array([-70.0, 70.0]))
"""What is shown while the plan has no waypoint."""


class LaidTrack:
    """Lines of legs, each a rhumb line or a great circle, on a projection's plane."""

    def __init__(self, arcs: Sequence[tuple[int, Arc]], solution: Solution, projection: Projection) -> None:
        """Lay off arcs, each with the leg that it is of."""
        self._laid = LaidArcs([arc for _, arc in arcs], solution.plan.figure, _metres(projection))
        self._leg = np.array([leg for leg, _ in arcs], dtype=np.int64)
        self._is_great_circle = np.array([arc.great_circle for _, arc in arcs], dtype=bool)

    def seen(self, view: View) -> Seen:
        """Return the lines as they are seen, in dots."""
        tolerance_m = _TOLERANCE_DOTS * view.dot_m
        self._laid.look_at(view.window_m, tolerance_m)
        place_m, arc = self._laid.joined(tolerance_m)
        place = _in_dots(place_m, view)
        kept = is_apart(place, 1.0)
        arc = arc[kept]
        return Seen(place[kept], self._leg[arc], self._is_great_circle[arc])


class Seen:
    """Lines in dots, one after the other with a NaN between, and of each point its leg and kind."""

    def __init__(self, place: FloatArray, leg: npt.NDArray[np.int64], is_great_circle: npt.NDArray[np.bool_]) -> None:
        self._place, self._leg, self._is_great_circle = place, leg, is_great_circle

    def of(self, *, great_circle: bool, leg: int | None = None, without: int | None = None) -> FloatArray:
        """Return those of a kind: of one leg, of all legs, or of all but one."""
        wanted = self._is_great_circle == great_circle
        if leg is not None:
            wanted &= self._leg == leg
        if without is not None:
            wanted &= self._leg != without
        place: FloatArray = self._place[wanted]
        return place


class Scene:
    """A plan on a projection, and the shore once that has been laid off too.

    Attributes:
        solution: The plan.
        projection: What it is laid off on.
        track: Every leg that can be worked.
        laid_shore: The shore, which takes longer to lay off than all the rest; None before that was done.
    """

    def __init__(self, solution: Solution, projection: Projection, before: Scene | None = None) -> None:
        """Lay off the legs; the shore is taken over from a scene on the same projection."""
        self.solution = solution
        self.projection = projection
        worked = [index for index, leg in enumerate(solution.legs) if leg.refusal is None]
        arcs = [(index, arc) for index in worked for arc in arcs_of(solution, index)]
        self.track = LaidTrack(arcs, solution, projection)
        self.laid_shore: LaidShore | None = None
        if before is not None and before.projection == projection:
            self.laid_shore = before.laid_shore
        self._other: tuple[int, LaidTrack] | None = None

    def lay_shore(self) -> None:
        """Lay the shore off."""
        lines, to_plane = load_shore_lines(), _metres(self.projection)
        self.laid_shore = LaidShore(lay_off_shore(lines, to_plane, self.projection.central_lon_deg, _CUT_M))

    def other_lines(self, leg: int) -> LaidTrack:
        """Return the lines by which a leg is not sailed; of a composite both."""
        if self._other is None or self._other[0] != leg:
            start, end = (waypoint.position for waypoint in self.solution.plan.waypoints[leg : leg + 2])
            sailed = arcs_of(self.solution, leg)
            both = (Arc(start, end, great_circle=kind) for kind in (False, True))
            others = [(leg, arc) for arc in both if (arc,) != sailed and self.solution.legs[leg].refusal is None]
            self._other = leg, LaidTrack(others, self.solution, self.projection)
        return self._other[1]

    def shore(self, view: View) -> FloatArray:
        """Return the shore as it is seen, in dots; nothing before it is laid off."""
        if self.laid_shore is None:
            return np.empty((0, 2))
        return _in_dots(self.laid_shore.inside(view.window_m, view.dot_m), view)


def projection_of(solution: Solution, kind: SheetKind) -> Projection:
    """Return a projection of a kind that suits a plan.

    Raises:
        NoAnswerError: It can't show the plan.
    """
    return choose_projection(kind, coverage(solution), solution.plan.figure)


def coverage(solution: Solution, leg: int | None = None) -> Coverage:
    """Return what is to be shown of a plan, or of a leg of it; a part of the world where there is no waypoint."""
    points = [waypoint.position for waypoint in solution.plan.waypoints]
    if not points:
        return _NO_PLAN
    legs = range(len(solution.legs)) if leg is None else [leg]
    shown = points if leg is None else points[leg : leg + 2]
    lines = [TrackLeg(arcs_of(solution, index)) for index in legs if solution.legs[index].refusal is None]
    return coverage_of(shown, lines, solution.plan.figure)


def first_kind(solution: Solution) -> SheetKind:
    """Return the first kind of projection that can show a plan."""
    for kind in SheetKind:
        try:
            projection_of(solution, kind)
        except NoAnswerError:
            continue
        return kind
    return SheetKind.STEREOGRAPHIC


def _in_dots(place_m: FloatArray, view: View) -> FloatArray:
    left_m, bottom_m, _, _ = view.window_m
    place: FloatArray = (place_m - np.array([left_m, bottom_m])) / view.dot_m
    return place


def _metres(projection: Projection) -> Callable[[FloatArray, FloatArray], FloatArray]:
    def to_plane(lat_deg: FloatArray, lon_deg: FloatArray) -> FloatArray:
        return np.stack(projection.forward(lat_deg, lon_deg), axis=-1)

    return to_plane
