"""The workbook on a terminal, against a bare table app of the same rows, in one run: ratios, printed."""

from __future__ import annotations

import json
import statistics
from pathlib import Path

import pytest

from navcore.files.planfile import write_plan
from navcore.plan.quantities import Row
from navcore.plan.solve import solve
from tests.bench.terminal import COLUMNS, Terminal, long_plan, p95_ms
from tui.present.grid import cells, make_grid

KEYS = 40
DOWN = b"\x1b[B"


def _files(legs: int, folder: Path) -> tuple[Path, Path]:
    """Write the plan, and the same rows as the bare app reads them."""
    plan = long_plan(legs)
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
        p95_ms([answer.first_s for answer in answers]), p95_ms([answer.last_s for answer in answers]), p95_ms(edits)
    )  # fmt: skip
    print(f"\ncursor {cursor:.1f} ms, bare {p95_ms(cursor_bare):.1f} ms; margin {margin:.1f} ms; edit {edit:.1f} ms")
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
