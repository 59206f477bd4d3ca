"""legbook distances on 200,000 pairs beside the csv module alone reading and writing the same rows, in one run."""

from __future__ import annotations

import csv
import subprocess
import sys
import time
from typing import TYPE_CHECKING

import numpy as np

from tests.support import ROOT

if TYPE_CHECKING:
    from pathlib import Path

    import pytest

PAIRS = 200_000
COPY = """
import csv, sys
csv.writer(open(sys.argv[2], "w", newline="")).writerows(csv.reader(open(sys.argv[1], newline="")))
"""


def seconds(command: list[str], out: Path) -> float:
    began_s = time.perf_counter()
    with out.open("wb") as stream:
        subprocess.run(command, cwd=ROOT, stdout=stream, check=True)
    return time.perf_counter() - began_s


def test_distances(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    generator = np.random.default_rng(1)
    columns = [generator.uniform(-limit, limit, PAIRS).round(5) for limit in (90.0, 180.0, 90.0, 180.0)]
    legs, out = tmp_path / "legs.csv", tmp_path / "out.csv"
    with legs.open("w", newline="") as stream:
        writer = csv.writer(stream)
        writer.writerow(["lat1", "lon1", "lat2", "lon2"])
        writer.writerows(zip(*(column.tolist() for column in columns), strict=True))
    nothing_s = seconds([sys.executable, "-c", "pass"], out)
    copied_s = seconds([sys.executable, "-c", COPY, str(legs), str(tmp_path / "copy.csv")], out) - nothing_s
    worked_s = seconds([sys.executable, "-m", "tui", "distances", str(legs)], out)
    with capsys.disabled():
        print(f"\n{PAIRS} pairs: {worked_s:.2f} s, {worked_s / copied_s:.1f} times reading and writing them")
