"""Projections in bulk as a ratio to PROJ in the same run; the figure to hold is 3."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import WGS_84
from tests.support import best_of

if TYPE_CHECKING:
    from navcore.charts.projection import Projection

POINTS = 200_000


@pytest.mark.parametrize(
    "projection",
    [
        Mercator(WGS_84, -30.0, 40.0),
        Stereographic.polar(WGS_84, 70.0),
        Stereographic(WGS_84, 45.0),
        Lambert(WGS_84, 0.0, (30.0, 50.0), 40.0),
    ],
    ids=lambda p: p.name,
)
def test_forward_and_inverse_in_bulk_as_a_ratio_to_proj(
    projection: Projection, capsys: pytest.CaptureFixture[str]
) -> None:
    pyproj = pytest.importorskip("pyproj")
    reference = pyproj.Proj(projection.proj_string(0.0, 0.0))
    rng = np.random.default_rng(7)
    lat_deg, lon_deg = rng.uniform(-80.0, 80.0, POINTS), rng.uniform(-170.0, 170.0, POINTS)
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    forward = best_of(lambda: projection.forward(lat_deg, lon_deg)) / best_of(lambda: reference(lon_deg, lat_deg))
    inverse = best_of(lambda: projection.inverse(x_m, y_m)) / best_of(lambda: reference(x_m, y_m, inverse=True))
    with capsys.disabled():
        print(f"\n{projection.name}: forward {forward:.2f}, inverse {inverse:.2f} times PROJ")
