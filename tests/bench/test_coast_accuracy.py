"""The bundled shoreline against the full-resolution one; needs Debian's gmt and gmt-gshhg-full, takes half a minute."""

from __future__ import annotations

import shutil
import subprocess
from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.charts.coast import load_coast

if TYPE_CHECKING:
    from pathlib import Path


def test_the_accuracy_that_is_printed_beside_the_shoreline(tmp_path: Path) -> None:
    if shutil.which("gmt") is None:
        pytest.skip("gmt is not installed")
    command = ["gmt", "coast", "-R0/360/-90/90", "-Df", "-W1", "-M"]
    dump = subprocess.run(command, capture_output=True, text=True, check=True, cwd=tmp_path).stdout
    points = [line.split() for block in dump.split(">") if "Level 1\n" in block for line in block.splitlines()[1:]]
    lon_deg, lat_deg = np.array(points[::37], dtype=np.float64).T
    off_nmi = load_coast().distance_m(lat_deg, lon_deg, 60000.0) / 1852.0
    half, nine_in_ten, ninety_nine = np.percentile(np.minimum(off_nmi, 100.0), [50, 90, 99])
    assert 0.11 < half <= 0.13
    assert 0.40 < nine_in_ten <= 0.45
    assert ninety_nine > 2.5
