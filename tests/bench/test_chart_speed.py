"""The Chart page with 1,000 legs and the whole shore at 160 by 48: from a key to the last byte of the new picture."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.files.planfile import write_plan
from tests.bench.terminal import Terminal, long_plan, p95_ms

if TYPE_CHECKING:
    from pathlib import Path

F3, LEFT, RIGHT = b"\x1bOR", b"\x1b[D", b"\x1b[C"
PANS = 40


def test_a_pan_over_a_thousand_legs_and_the_whole_shore(tmp_path: Path) -> None:
    path = tmp_path / "plan.toml"
    path.write_bytes(write_plan(long_plan(1000)))
    terminal = Terminal(["-m", "tui", str(path)], tmp_path)
    try:
        terminal.first_frame_s(b"WPT 3")
        opened = terminal.press(F3)
        terminal.settle()
        for zoom in (b"", b"+++", b"++++++"):
            for key in zoom:
                terminal.press(bytes([key]))
            pans = [terminal.press(key) for key in [LEFT, RIGHT] * (PANS // 2)]
            whole, first = p95_ms([pan.last_s for pan in pans]), p95_ms([pan.first_s for pan in pans])
            print(f"\nzoomed {len(zoom)} times more: a pan painted in {whole:.1f} ms (first byte {first:.1f} ms), p95")
        print(f"turned to in {1000 * opened.first_s:.0f} ms, the shore after it")
        print(f"memory {terminal.memory_mb:.1f} MB")
    finally:
        terminal.close()
