"""The fewest rhumb-line parts that keep within a distance of a great circle, and where they join.

On one side of the equator a piece of a part lies nearer to the great circle than the part does, so that going each
time as far as the distance allows takes the fewest parts. Across the equator the great circle bends the other way and
that no longer holds: a longer part can lie nearer. There the best part is the one that reaches as far to one side of
the equator as to the other, and it replaces the last part before the equator and the first after it.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.errors import NoAnswerError
from navcore.sailings.separation import QUICK_M, quick_separations_m, separations_m

if TYPE_CHECKING:
    from navcore.lines.great_circle_path import GreatCirclePath
    from navcore.trigonometry import FloatArray

MOST_PARTS = 1000

_NEAR_ENOUGH = 1e-4
"""A part this near to the distance allowed is as long as it can be."""
_AIM = 1.0 - 0.5 * _NEAR_ENOUGH
_NOTHING_RAD = 1e-12


@dataclass(frozen=True, slots=True)
class _Search:
    """A great circle, and how far parts may lie from it."""

    path: GreatCirclePath
    limit_m: float

    def separation_m(self, begin_rad: float, end_rad: float) -> float:
        measure = separations_m if self.limit_m > 0.9 * QUICK_M else quick_separations_m
        return float(measure(self.path, np.array(sorted((begin_rad, end_rad))))[0])

    def reach_rad(self, begin_rad: float, end_rad: float, guess_rad: float) -> float:
        """Return how far a part can go towards an end on the same side of the equator."""
        whole = end_rad - begin_rad
        low, high = 0.0, math.inf
        length, power, before = min(abs(whole), guess_rad), 2.0, (0.0, 0.0)
        while True:
            apart_m = self.separation_m(begin_rad, begin_rad + math.copysign(length, whole))
            if apart_m <= self.limit_m:
                low = length
                if length == abs(whole):
                    return end_rad
            else:
                high = length
            if self.limit_m * (1.0 - _NEAR_ENOUGH) <= apart_m <= self.limit_m or high - low <= _NOTHING_RAD:
                return begin_rad + math.copysign(low, whole)
            power = _power(before, (length, apart_m), power)
            before = length, apart_m
            aim = length * (_AIM * self.limit_m / max(apart_m, 1e-9)) ** (1.0 / power)
            if not low < aim < high:
                aim = 0.5 * (low + high) if math.isfinite(high) else 2.0 * length
            length = min(abs(whole), aim, 4.0 * length)

    def joints_rad(self, begin_rad: float, end_rad: float) -> list[float]:
        """Return the joints from one end towards another on the same side of the equator, both ends included."""
        joints = [begin_rad]
        guess, made_before = 0.05, 0.0
        while joints[-1] != end_rad:
            joints.append(self.reach_rad(joints[-1], end_rad, guess))
            made = abs(joints[-1] - joints[-2])
            if joints[-1] != end_rad and (len(joints) > MOST_PARTS or made <= _NOTHING_RAD):
                raise NoAnswerError(f"the leg would be more than {MOST_PARTS} parts; let them lie farther apart")
            # Parts grow or shrink steadily along a great circle.
            guess = made * min(max(made / made_before, 0.5), 2.0) if made_before else made
            made_before = made
        return joints


def _power(before: tuple[float, float], now: tuple[float, float], known: float) -> float:
    """Return with which power of the length the separation grows, about 2; known where two parts can't tell."""
    if not 0.0 < before[1] != now[1] > 0.0 or before[0] == now[0]:
        return known
    return min(max(math.log(now[1] / before[1]) / math.log(now[0] / before[0]), 1.0), 4.0)


def fewest_joints_rad(path: GreatCirclePath, start_rad: float, end_rad: float, limit_m: float) -> FloatArray:
    """Return the arcs where the fewest parts join that keep within a distance of the great circle, both ends included.

    Raises:
        NoAnswerError: More than MOST_PARTS would be needed.
    """
    if path.sin_node == 0.0 or path.cos_node == 0.0 or end_rad - start_rad <= _NOTHING_RAD:
        return np.array([start_rad, end_rad])
    search = _Search(path, limit_m)
    equator_rad = math.pi * math.ceil(start_rad / math.pi)
    if start_rad + _NOTHING_RAD < equator_rad < end_rad - _NOTHING_RAD:
        return np.array(_across_equator(search, start_rad, equator_rad, end_rad))
    return _evened(search, search.joints_rad(start_rad, end_rad))


def _across_equator(search: _Search, start_rad: float, equator_rad: float, end_rad: float) -> list[float]:
    before, after = search.joints_rad(start_rad, equator_rad), search.joints_rad(end_rad, equator_rad)
    reach = max(equator_rad - before[-2], after[-2] - equator_rad)
    begin, end = max(start_rad, equator_rad - reach), min(end_rad, equator_rad + reach)
    if search.separation_m(begin, end) <= search.limit_m:
        kept_before = [joint for joint in before if joint < begin - _NOTHING_RAD]
        kept_after = [joint for joint in after if joint > end + _NOTHING_RAD]
        return [*kept_before, begin, end, *reversed(kept_after)]
    return [*before, *reversed(after[:-1])]


def _evened(search: _Search, joints_rad: list[float]) -> FloatArray:
    """Return as many parts, of nearly the same separation, rather than a short last one."""
    last_m = search.separation_m(*joints_rad[-2:])
    counted = np.arange(len(joints_rad), dtype=np.float64)
    counted[-1] = counted[-2] + math.sqrt(min(1.0, last_m / search.limit_m))
    even = np.interp(np.linspace(0.0, counted[-1], len(joints_rad)), counted, joints_rad)
    even[0], even[-1] = joints_rad[0], joints_rad[-1]
    widest_m = float(separations_m(search.path, even).max())
    return even if widest_m <= search.limit_m else np.array(joints_rad)
