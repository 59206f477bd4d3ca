"""Rhumb lines in bulk beside geographiclib's scalar great circle, in one run: python -m pytest tests/bench -s.

It prints; it judges nothing, for a busy machine proves nothing. The figure to hold is 100 times.
"""

from __future__ import annotations

import time
from typing import TYPE_CHECKING

import numpy as np
from geographiclib.geodesic import Geodesic

from navcore.earth.figure import WGS_84
from navcore.lines import offset, rhumb_line

if TYPE_CHECKING:
    from collections.abc import Callable

    import pytest

BULK, ONE_BY_ONE, LEGS = 100_000, 2_000, 100


def quickest_s(work: Callable[[], object], rounds: int = 5) -> float:
    """Return the best of a few rounds, the one that was disturbed least."""
    best = float("inf")
    for _ in range(rounds):
        before = time.perf_counter()
        work()
        best = min(best, time.perf_counter() - before)
    return best


def test_rhumb_lines_in_bulk(capsys: pytest.CaptureFixture[str]) -> None:
    random = np.random.default_rng(1)
    lat1, lat2 = random.uniform(-89.0, 89.0, (2, BULK))
    lon1, lon2 = random.uniform(-180.0, 180.0, (2, BULK))
    pairs = [tuple(pair) for pair in np.stack((lat1, lon1, lat2, lon2), axis=-1)[:ONE_BY_ONE].tolist()]
    solve = Geodesic.WGS84.Inverse
    bulk_s = quickest_s(lambda: rhumb_line.inverse(lat1, lon1, lat2, lon2, WGS_84)) / BULK
    scalar_s = quickest_s(lambda: [solve(*pair) for pair in pairs], rounds=3) / ONE_BY_ONE
    legs = lat1[:LEGS], lon1[:LEGS], lat2[:LEGS], lon2[:LEGS]
    separation_s = quickest_s(lambda: offset.greatest_separation_m(*legs, WGS_84), rounds=1)
    with capsys.disabled():
        report = f"rhumb line {bulk_s * 1e6:.2f} µs, geographiclib's great circle {scalar_s * 1e6:.0f} µs a pair"
        print(f"\n{report}: {scalar_s / bulk_s:.0f} times (to hold: 100)")
        print(f"greatest separation of {LEGS} legs: {separation_s:.2f} s")
    shortest_m = np.array([solve(*pair)["s12"] for pair in pairs])
    assert np.all(rhumb_line.inverse(lat1, lon1, lat2, lon2, WGS_84).distance_m[:ONE_BY_ONE] >= shortest_m - 1e-6)
