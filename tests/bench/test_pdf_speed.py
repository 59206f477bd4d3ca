from __future__ import annotations

import sys
from subprocess import run
from typing import TYPE_CHECKING

from navcore.files.planfile import write_plan
from tests.papers import plan_of
from tests.support import best_of, legbook

if TYPE_CHECKING:
    from pathlib import Path


def test_a_leg_table_of_100_legs_on_paper(tmp_path: Path) -> None:
    plan = tmp_path / "plan.toml"
    plan.write_bytes(write_plan(plan_of([f"Waypoint {number}" for number in range(1, 102)])))
    printed_s = best_of(lambda: legbook("table", str(plan), "--as", "pdf"))
    bare_s = best_of(lambda: run([sys.executable, "-c", "import numpy"], check=True))
    print(f"100 legs to PDF, whole process: {printed_s:.3f} s, {printed_s / bare_s:.1f} times python -c 'import numpy'")
