"""What several tests need: the command line as a process, and the demo plans."""

from __future__ import annotations

import os
import subprocess
import sys
import time
from pathlib import Path
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable

ROOT = Path(__file__).parent.parent
DEMOS = sorted((ROOT / "routes_demo").glob("*.toml"))


def legbook(*words: str, stdin: bytes = b"", env: dict[str, str] | None = None) -> subprocess.CompletedProcess[bytes]:
    """Run the command line in a process of its own."""
    environment = {**os.environ, "PYTHONPATH": str(ROOT), **(env or {})}
    return subprocess.run(
        [sys.executable, "-m", "tui", *words],
        input=stdin,
        capture_output=True,
        check=False,
        env=environment,
        timeout=60,
    )


def best_of(work: Callable[[], object], rounds: int = 5) -> float:
    """Return the shortest of several times that a piece of work takes, in seconds."""
    times_s = []
    for _ in range(rounds):
        began_s = time.perf_counter()
        work()
        times_s.append(time.perf_counter() - began_s)
    return min(times_s)
