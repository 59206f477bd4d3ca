"""Where words go on a sheet, so that none stands over another.

A piece of lettering is a box, level or turned. A place is refused where its box would touch one already set or leave
the neat line; of those left the one that covers the fewest drawn lines wins, nearest first.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from navcore.trigonometry import FloatArray

_GAP_MM = 0.4
_EDGE_MM = 0.5
_COST_OF_RANK = 0.4
_RINGS_MM = (2.0, 4.0, 7.0, 11.0, 16.0, 23.0, 32.0)
_LEADER_FROM_MM = 5.0
_BEARINGS = ((1, 0), (1, 1), (1, -1), (-1, 0), (-1, 1), (-1, -1), (0, 1), (0, -1))
_ALONG = (0.5, 0.4, 0.6, 0.3, 0.7, 0.2, 0.8, 0.12, 0.88)


@dataclass(frozen=True, slots=True)
class Lettering:
    """Words on paper.

    Attributes:
        words: The words.
        x_mm: Where they begin, on the base of their box.
        y_mm: Likewise.
        width_mm: Of the box.
        height_mm: Of the box, which is also the size of the letters.
        turn_deg: How far the base is turned from level, anticlockwise.
        leader_mm: Ends of a thin line to what they name; none where they stand beside it.
    """

    words: str
    x_mm: float
    y_mm: float
    width_mm: float
    height_mm: float
    turn_deg: float = 0.0
    leader_mm: tuple[float, float, float, float] | None = None

    def corners_mm(self, gap_mm: float = 0.0) -> FloatArray:
        """Return the box's corners in order, shape (4, 2), grown by a gap."""
        cosine, sine = math.cos(math.radians(self.turn_deg)), math.sin(math.radians(self.turn_deg))
        across = np.array([-gap_mm, self.width_mm + gap_mm, self.width_mm + gap_mm, -gap_mm])
        up = np.array([-gap_mm, -gap_mm, self.height_mm + gap_mm, self.height_mm + gap_mm])
        return np.column_stack((self.x_mm + across * cosine - up * sine, self.y_mm + across * sine + up * cosine))


def boxes_meet(first: FloatArray, others: FloatArray) -> np.ndarray[tuple[int], np.dtype[np.bool_]]:
    """Return which of other boxes, corners of shape (n, 4, 2), touch one of shape (4, 2): by separating axes."""
    sides = np.concatenate(
        (np.broadcast_to(first[:2] - first[1:3], (len(others), 2, 2)), others[:, :2] - others[:, 1:3]), 1
    )
    of_first = np.einsum("cj,nsj->nsc", first, sides)
    of_others = np.einsum("ncj,nsj->nsc", others, sides)
    apart = (of_first.max(2) < of_others.min(2)) | (of_others.max(2) < of_first.min(2))
    return np.asarray(~np.any(apart, axis=1))


class Board:
    """A sheet's area while words are being set on it."""

    def __init__(self, width_mm: float, height_mm: float, drawn_mm: FloatArray) -> None:
        """Begin with nothing set.

        Args:
            width_mm: Inside the neat line.
            height_mm: Inside the neat line.
            drawn_mm: Points close together along what is drawn, shape (n, 2).
        """
        self.width_mm, self.height_mm = width_mm, height_mm
        self.drawn_mm = drawn_mm[np.argsort(drawn_mm[:, 0], kind="stable")]
        self._corners, self._ranges = np.empty((64, 4, 2)), np.empty((64, 4))
        self._count = 0

    @property
    def set_mm(self) -> FloatArray:
        """Corners of what is set, shape (n, 4, 2)."""
        return self._corners[: self._count]

    def set_beside(self, words: str, size_mm: tuple[float, float], place_mm: tuple[float, float]) -> Lettering | None:
        """Set words beside a point, with a leader where they stand off; None where there is no room."""
        return self._set_best(self._beside(words, size_mm, place_mm))

    def set_along(self, words: str, size_mm: tuple[float, float], line_mm: FloatArray) -> Lettering | None:
        """Set words along a polyline, to be read from below; None where there is no room."""
        return self._set_best(self._along(words, size_mm, line_mm))

    def block(self, corners_mm: FloatArray) -> None:
        """Keep words out of a box."""
        if self._count == len(self._corners):
            self._corners = np.concatenate((self._corners, np.empty_like(self._corners)))
            self._ranges = np.concatenate((self._ranges, np.empty_like(self._ranges)))
        self._corners[self._count] = corners_mm
        # Lowest x and y, and the highest turned round, so that one comparison tells whether two ranges meet.
        self._ranges[self._count] = (*corners_mm.min(axis=0), *-corners_mm.max(axis=0))
        self._count += 1

    def _set_best(self, choices: Iterable[Lettering]) -> Lettering | None:
        best, best_cost = None, math.inf
        for rank, choice in enumerate(choices):
            # A place that covers nothing costs what its rank does, so nothing later can be better than that.
            if best_cost <= _COST_OF_RANK * rank:
                break
            if self._free(choice.corners_mm(_GAP_MM)):
                cost = self._covered(choice) + _COST_OF_RANK * rank
                if cost < best_cost:
                    best, best_cost = choice, cost
        if best is not None:
            self.block(best.corners_mm(_GAP_MM))
        return best

    def _free(self, corners: FloatArray) -> bool:
        low, high = corners.min(axis=0), corners.max(axis=0)
        if low.min() < _EDGE_MM or high[0] > self.width_mm - _EDGE_MM or high[1] > self.height_mm - _EDGE_MM:
            return False
        near = np.flatnonzero((self._ranges[: self._count] <= (*high, *-low)).all(axis=1))
        return not (near.size and boxes_meet(corners, self._corners[near]).any())

    def _covered(self, choice: Lettering) -> int:
        """Return how many of the drawn points the words stand on."""
        corners = choice.corners_mm(_GAP_MM)
        first, last = np.searchsorted(self.drawn_mm[:, 0], [corners[:, 0].min(), corners[:, 0].max()])
        cosine, sine = math.cos(math.radians(choice.turn_deg)), math.sin(math.radians(choice.turn_deg))
        off = self.drawn_mm[first:last] - [choice.x_mm, choice.y_mm]
        across, up = off[:, 0] * cosine + off[:, 1] * sine, off[:, 1] * cosine - off[:, 0] * sine
        inside = (across > -_GAP_MM) & (across < choice.width_mm + _GAP_MM)
        return int(np.count_nonzero(inside & (up > -_GAP_MM) & (up < choice.height_mm + _GAP_MM)))

    @staticmethod
    def _beside(words: str, size_mm: tuple[float, float], place_mm: tuple[float, float]) -> Iterable[Lettering]:
        (width, height), (x_mm, y_mm) = size_mm, place_mm
        for ring in _RINGS_MM:
            for right, up in _BEARINGS:
                left = x_mm + right * ring - (0.0 if right > 0 else width if right < 0 else width / 2.0)
                base = y_mm + up * ring - (0.0 if up > 0 else height if up < 0 else height / 2.0)
                touch = (min(max(x_mm, left), left + width), min(max(y_mm, base), base + height))
                leader = (x_mm, y_mm, *touch) if ring > _LEADER_FROM_MM else None
                yield Lettering(words, left, base, width, height, 0.0, leader)

    @staticmethod
    def _along(words: str, size_mm: tuple[float, float], line_mm: FloatArray) -> Iterable[Lettering]:
        width, height = size_mm
        step = np.diff(line_mm, axis=0)
        run = np.concatenate(([0.0], np.cumsum(np.hypot(step[:, 0], step[:, 1]))))
        if run[-1] < width + 6.0:
            return
        for part in _ALONG:
            middle = part * run[-1]
            if middle < width / 2.0 + 3.0 or middle > run[-1] - width / 2.0 - 3.0:
                continue
            ends = [
                np.array([np.interp(at, run, line_mm[:, axis]) for axis in (0, 1)])
                for at in (middle - width / 2.0, middle + width / 2.0)
            ]
            if ends[1][0] < ends[0][0]:
                ends.reverse()
            direction = (ends[1] - ends[0]) / max(float(np.hypot(*(ends[1] - ends[0]))), 1e-9)
            turn_deg = math.degrees(math.atan2(direction[1], direction[0]))
            normal = np.array([-direction[1], direction[0]])
            inner = line_mm[(run >= middle - width / 2.0) & (run <= middle + width / 2.0)]
            bulge = (inner - ends[0]) @ normal if len(inner) else np.zeros(1)
            start = 0.5 * (ends[0] + ends[1]) - direction * width / 2.0
            for off in (max(float(bulge.max()), 0.0) + 1.0, min(float(bulge.min()), 0.0) - 1.0 - height):
                x_mm, y_mm = (start + normal * off).tolist()
                yield Lettering(words, x_mm, y_mm, width, height, turn_deg)


def points_along(polylines_mm: Sequence[FloatArray], apart_mm: float = 0.8) -> FloatArray:
    """Return points close together on polylines, shape (n, 2), for a board to see what is drawn."""
    found = [np.empty((0, 2))]
    for line in polylines_mm:
        step = np.diff(line, axis=0)
        run = np.concatenate(([0.0], np.cumsum(np.hypot(step[:, 0], step[:, 1]))))
        at = np.linspace(0.0, run[-1], int(run[-1] / apart_mm) + 2)
        found.append(np.column_stack([np.interp(at, run, line[:, axis]) for axis in (0, 1)]))
    return np.concatenate(found)
