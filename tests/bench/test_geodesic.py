"""Great circles in bulk as a ratio to one-by-one geographiclib in one run; 20 is to be held from 10,000 pairs."""

from __future__ import annotations

from functools import partial
from typing import TYPE_CHECKING

import numpy as np
from geographiclib.geodesic import Geodesic

from navcore.earth.figure import WGS_84
from navcore.lines.geodesic_inverse import inverse
from tests.support import best_of

if TYPE_CHECKING:
    import pytest

PAIRS = (1, 100, 10_000, 1_000_000)
SCALARS = 1000


def test_geodesic(capsys: pytest.CaptureFixture[str]) -> None:
    generator = np.random.default_rng(2013)
    lat1_deg, lat2_deg = np.degrees(np.arcsin(generator.uniform(-1.0, 1.0, (2, max(PAIRS)))))
    lon1_deg, lon2_deg = generator.uniform(-180.0, 180.0, (2, max(PAIRS)))
    scalars = np.column_stack((lat1_deg, lon1_deg, lat2_deg, lon2_deg))[:SCALARS].tolist()

    def bulk(count: int) -> None:
        inverse(lat1_deg[:count], lon1_deg[:count], lat2_deg[:count], lon2_deg[:count], WGS_84)

    def singly() -> None:
        for lat1, lon1, lat2, lon2 in scalars:
            inverse(lat1, lon1, lat2, lon2, WGS_84)

    def one_by_one() -> None:
        for pair in scalars:
            Geodesic.WGS84.Inverse(*pair)

    lines = []
    for count in PAIRS:
        reference_s = best_of(one_by_one) / SCALARS
        ours_s = best_of(singly) / SCALARS if count == 1 else best_of(partial(bulk, count)) / count
        ratio = reference_s / ours_s
        lines.append(f"{count:9} pairs: {ours_s * 1e6:8.3f} µs a pair, {ratio:6.2f} times as fast as one by one")
    with capsys.disabled():
        print("\n" + "\n".join(lines))
