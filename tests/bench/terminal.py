"""A program on a pseudo-terminal, timed by what it sends; and the plan that it is timed with."""

from __future__ import annotations

import os
import pty
import select
import signal
import statistics
import struct
import subprocess
import sys
import termios
import time
from fcntl import ioctl
from pathlib import Path
from typing import NamedTuple

from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.position import Position
from tests.support import ROOT

ROWS, COLUMNS = 48, 160
QUIET_S = 0.4
SETTLED_S = 0.15
"""What comes later than this is the figure of the margin that waits for the cursor to rest."""


class Answer(NamedTuple):
    """How long after a key the first bytes came, and the last before the screen was at rest."""

    first_s: float
    last_s: float


class Terminal:
    """A program on a pseudo-terminal."""

    def __init__(self, words: list[str], folder: Path) -> None:
        self._outer, inner = pty.openpty()
        ioctl(inner, termios.TIOCSWINSZ, struct.pack("HHHH", ROWS, COLUMNS, 0, 0))
        environment = {**os.environ, "XDG_STATE_HOME": str(folder), "TERM": "xterm-256color", "PYTHONPATH": str(ROOT)}
        # An installed program has its bytecode at hand; what is measured is not its compiling.
        environment.pop("PYTHONDONTWRITEBYTECODE", None)
        self._started = time.perf_counter()
        self._process = subprocess.Popen(
            [sys.executable, *words], stdin=inner, stdout=inner, stderr=inner, env=environment
        )
        os.close(inner)

    def first_frame_s(self, wanted: bytes) -> float:
        """Return how long it took until something stood on the screen."""
        seen = b""
        while wanted not in seen:
            select.select([self._outer], [], [], 20)
            seen += os.read(self._outer, 1 << 20)
        taken_s = time.perf_counter() - self._started
        self.settle()
        return taken_s

    def settle(self) -> None:
        """Read on until nothing comes."""
        while select.select([self._outer], [], [], 0.6)[0]:
            os.read(self._outer, 1 << 20)

    def press(self, keys: bytes) -> Answer:
        """Send keys and time what comes of it."""
        started = time.perf_counter()
        os.write(self._outer, keys)
        first_s = last_s = 0.0
        while select.select([self._outer], [], [], QUIET_S if first_s else 5.0)[0]:
            os.read(self._outer, 1 << 20)
            now_s = time.perf_counter() - started
            first_s = first_s or now_s
            last_s = now_s if now_s < SETTLED_S or not last_s else last_s
        return Answer(first_s, last_s)

    @property
    def memory_mb(self) -> float:
        """Resident memory now."""
        status = Path(f"/proc/{self._process.pid}/status").read_text(encoding="ascii")
        return int(status.split("VmRSS:")[1].split()[0]) / 1024

    def close(self) -> None:
        """End it."""
        self._process.send_signal(signal.SIGKILL)
        self._process.wait()
        os.close(self._outer)


def long_plan(legs: int) -> Plan:
    """Return a plan of short legs right across a hemisphere, every third a great circle."""
    points = tuple(
        Waypoint(f"WPT {n}", Position(50.0 - n * 90 / legs, -170.0 + n * 340 / legs)) for n in range(legs + 1)
    )
    choices = tuple(Leg(Line.GREAT_CIRCLE if n % 3 == 0 else None) for n in range(legs))
    return Plan(points, choices, title="bench", speed_kn=12.0)


def p95_ms(values_s: list[float]) -> float:
    """Return the 95th percentile, milliseconds."""
    return 1000 * statistics.quantiles(values_s, n=20)[-1]
