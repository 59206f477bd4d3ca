"""A whole process from cold: legbook leg beside an interpreter that only imports NumPy, in turn in one run."""

from __future__ import annotations

import statistics
import subprocess
import sys
import time
from typing import TYPE_CHECKING

from tests.support import ROOT

if TYPE_CHECKING:
    import pytest

ROUNDS = 15
LEG = [sys.executable, "-m", "tui", "leg", "50N030W", "40N070W", "--json"]
HELP = [sys.executable, "-m", "tui", "--help"]
NUMPY = [sys.executable, "-c", "import numpy"]


def seconds(command: list[str]) -> float:
    began_s = time.perf_counter()
    subprocess.run(command, cwd=ROOT, stdout=subprocess.DEVNULL, check=True)
    return time.perf_counter() - began_s


def test_cold_start(capsys: pytest.CaptureFixture[str]) -> None:
    for command in (LEG, HELP, NUMPY):
        seconds(command)
    rounds = [(seconds(LEG), seconds(HELP), seconds(NUMPY)) for _ in range(ROUNDS)]
    leg = statistics.median(leg_s / numpy_s for leg_s, _, numpy_s in rounds)
    help_ = statistics.median(help_s / numpy_s for _, help_s, numpy_s in rounds)
    with capsys.disabled():
        print(f"\nlegbook leg: {leg:.2f} times import numpy; legbook --help: {help_:.2f} times")
