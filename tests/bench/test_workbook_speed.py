"""The workbook on a terminal, against a bare table app of the same rows, in one run: ratios, printed and held."""

from __future__ import annotations

import json
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

import pytest

from navcore.files.planfile import write_plan
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.quantities import Row
from navcore.plan.solve import solve
from navcore.position import Position
from tests.support import ROOT
from tui.present.grid import cells, make_grid

ROWS, COLUMNS = 40, 160
KEYS = 40
DOWN = b"\x1b[B"
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


def _plan(legs: int) -> Plan:
    points = tuple(
        Waypoint(f"WPT {n}", Position(50.0 - n * 90 / legs, -170.0 + n * 340 / legs)) for n in range(legs + 1)
    )
    choices = tuple(Leg(Line.GREAT_CIRCLE if n % 3 == 0 else None) for n in range(legs))
    return Plan(points, choices, title="bench", speed_kn=12.0)


def _files(legs: int, folder: Path) -> tuple[Path, Path]:
    """Write the plan, and the same rows as the bare app reads them."""
    plan = _plan(legs)
    path = folder / f"plan_{legs}.toml"
    path.write_bytes(write_plan(plan))
    solution = solve(plan)
    grid = make_grid(solution, COLUMNS)
    table: list[list[str]] = [[str(number) for number in range(len(grid.columns))]]
    for index in range(legs):
        table += [cells(grid, solution, Row.WAYPOINT, index), cells(grid, solution, Row.LEG, index)]
    rows = folder / f"rows_{legs}.json"
    rows.write_text(json.dumps(table), encoding="utf-8")
    return path, rows


def _words(path: Path) -> list[str]:
    return (
        ["-m", "tui", str(path)]
        if path.suffix == ".toml"
        else [str(Path(__file__).with_name("bare_app.py")), str(path)]
    )


def _p95_ms(values_s: list[float]) -> float:
    return 1000 * statistics.quantiles(values_s, n=20)[-1]


@pytest.mark.skipif(not Path("/proc/self/status").exists(), reason="memory is read where Linux says it")
def test_a_thousand_legs_move_edit_and_settle_in_time(tmp_path: Path) -> None:
    plan, rows = _files(1000, tmp_path)
    bare, ours = Terminal(_words(rows), tmp_path), Terminal(_words(plan), tmp_path)
    try:
        bare.first_frame_s(b"WPT 3")
        ours.first_frame_s(b"WPT 3")
        cursor_bare = [bare.press(DOWN).first_s for _ in range(KEYS)]
        answers = [ours.press(DOWN) for _ in range(KEYS)]
        edits = [ours.press(b"l").first_s for _ in range(KEYS)]
        memory = (ours.memory_mb, bare.memory_mb)
    finally:
        bare.close()
        ours.close()
    cursor, margin, edit = (
        _p95_ms([answer.first_s for answer in answers]), _p95_ms([answer.last_s for answer in answers]), _p95_ms(edits)
    )  # fmt: skip
    print(f"\ncursor {cursor:.1f} ms, bare {_p95_ms(cursor_bare):.1f} ms; margin {margin:.1f} ms; edit {edit:.1f} ms")
    print(f"memory {memory[0]:.1f} MB, bare {memory[1]:.1f} MB, ratio {memory[0] / memory[1]:.2f} (1,000 legs)")


def test_the_first_frame_and_the_memory_of_two_hundred_legs(tmp_path: Path) -> None:
    plan, rows = _files(200, tmp_path)
    times: dict[str, list[float]] = {"ours": [], "bare": []}
    memory: dict[str, float] = {}
    for _ in range(7):
        for name, path in (("bare", rows), ("ours", plan)):
            terminal = Terminal(_words(path), tmp_path)
            times[name].append(terminal.first_frame_s(b"WPT 3"))
            memory[name] = terminal.memory_mb
            terminal.close()
            for left in tmp_path.glob(".*.recovery"):
                left.unlink()
    ours_ms, bare_ms = (1000 * statistics.median(times[name]) for name in ("ours", "bare"))
    ratio = memory["ours"] / memory["bare"]
    print(f"\nfirst frame {ours_ms:.0f} ms, bare {bare_ms:.0f} ms, ratio {ours_ms / bare_ms:.2f}")
    print(f"memory {memory['ours']:.1f} MB, bare {memory['bare']:.1f} MB, ratio {ratio:.2f} (200 legs)")
