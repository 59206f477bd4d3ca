"""What the screen shows: golden text of it, hostile names, and the lights."""

from __future__ import annotations

import itertools
import os
import pty
import re
import select
import shutil
import struct
import subprocess
import sys
import termios
import time
from dataclasses import replace
from fcntl import ioctl
from typing import TYPE_CHECKING

import pytest

from navcore.files.planfile import read_plan, write_plan
from navcore.plan.model import Craft
from tests.support import ROOT
from tests.workbook import LARGE, MIDDLE, SMALL, Desk, use
from tui.present.lights import LIGHTS, NIGHT_MOST_RED

if TYPE_CHECKING:
    from pathlib import Path

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"
GOLDEN = ROOT / "tests" / "golden" / "screens"
NAMES = ("[/b]", "[RED]x[/RED]", "\x1b[31mred\x07", "a\u202eb", "湾 🚢 é", "two\nlines\ttab")
CONTROL = re.compile(r"[\x00-\x1f\x7f-\x9f\u202a-\u202e]")


@pytest.fixture
def plan(tmp_path: Path) -> Path:
    path = tmp_path / "north_pacific_winter.toml"
    shutil.copy(DEMO, path)
    return path


@pytest.mark.parametrize(
    ("name", "size", "keys"),
    [
        ("passage_80x24", MIDDLE, ()),
        ("passage_120x40", LARGE, ("down",)),
        ("passage_40x12", SMALL, ("down", "down")),
        ("row_80x24", MIDDLE, ("down", "down", "a", *"265/400")),
        ("working_80x24", MIDDLE, ("down", "m")),
        ("leg_80x24", MIDDLE, ("down", "enter")),
        ("chart_80x24", MIDDLE, ("down", "f3")),
        ("chart_120x40", LARGE, ("f3", "p", "p", "plus")),
        ("chart_40x12", SMALL, ("f3",)),
        ("print_80x24", MIDDLE, ("f7",)),
        ("keys_80x24", MIDDLE, ("question_mark",)),
    ],
)
def test_the_screen_is_as_it_was(
    tmp_path: Path, plan: Path, name: str, size: tuple[int, int], keys: tuple[str, ...]
) -> None:
    seen: list[str] = []

    async def journey(desk: Desk) -> None:
        await desk.press(*({"/": "slash"}.get(key, key) for key in keys))
        await desk.settled()
        seen.append(desk.screen())

    use(journey, tmp_path / "state", plan, size)
    _compare(name, seen[0])


def _compare(name: str, seen: str) -> None:
    """Compare a screen with the golden one; MAKE_GOLDENS=1 makes it anew."""
    golden = GOLDEN / f"{name}.txt"
    if os.environ.get("MAKE_GOLDENS"):
        golden.write_text(seen, encoding="utf-8", newline="\n")
    assert seen == golden.read_text(encoding="utf-8")


def test_the_opening_screen_says_what_to_type_and_the_caution(tmp_path: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.settled()
        _compare("opening_80x24", desk.screen())

    use(journey, tmp_path / "state")


def _hostile(path: Path) -> None:
    plan = read_plan(DEMO.read_bytes(), "").plan
    points = [replace(point, name=name, remarks=name) for point, name in zip(plan.waypoints, NAMES, strict=True)]
    legs = [replace(leg, notes=(("[/b]\x1b", "[x]\x07"),)) for leg in plan.legs]
    changed = replace(plan, waypoints=tuple(points), legs=tuple(legs), title="[/b]\x1b[2J", columns=("[/b]\x1b",))
    path.write_bytes(write_plan(replace(changed, craft=Craft("[/red]\x1b"), voyage="[v={'a[0]'}]")))


@pytest.mark.parametrize("size", [MIDDLE, SMALL], ids=["80x24", "40x12"])
def test_names_of_any_kind_are_shown_and_never_obeyed(tmp_path: Path, size: tuple[int, int]) -> None:
    path = tmp_path / "[b]\x1bplan.toml"
    _hostile(path)

    async def journey(desk: Desk) -> None:
        await desk.sees("[/b]")
        walks = (
            ("down", "m", "m", "enter", "escape"),
            ("up", "e", "escape", "enter", "escape"),
            ("end", "up", "up", "up", "up", "up", "enter", "escape", "c", "z"),
            ("i", "escape", "o", "escape", "right", "right"),
            ("f3", "plus", "home", "plus", "pagedown", "minus", "p", "a", "z"),
            ("f7", "t", "escape", "c", "escape", "f2"),
            ("ctrl+p", "escape", "d", "d"),
        )
        for keys in walks if size is MIDDLE else walks[:3]:
            for key in keys:
                await desk.press(key)
                assert not any(CONTROL.search(line) for line in desk.lines()), key

    use(journey, tmp_path / "state", path, size)


def test_by_night_nothing_is_bright_and_nothing_but_red(tmp_path: Path, plan: Path) -> None:
    walks = ((), ("m",), ("enter", "escape"), ("i", "escape"), ("ctrl+p", "escape"), ("d", "q", "escape"))
    more = (("question_mark", "escape"), ("o", "d", "escape"), ("f3", "p"), ("f7", "c", "escape"))

    async def journey(desk: Desk) -> None:
        desk.app.theme = LIGHTS[-1].name
        for key in itertools.chain(*walks, *more):
            await desk.press(key)
            await desk.settled()
            colours = desk.colours()
            assert len(colours) > 2
            for red, green, blue in colours:
                assert red <= NIGHT_MOST_RED, key
                assert max(green, blue) <= max(red // 10, 1), key

    use(journey, tmp_path / "state", plan)


def test_without_colour_the_cursor_is_still_seen(tmp_path: Path, plan: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setenv("NO_COLOR", "1")

    async def journey(desk: Desk) -> None:
        for light in LIGHTS:
            desk.app.theme = light.name
            await desk.settled()
            assert all(red == green == blue for red, green, blue in desk.colours())
            assert sum(line.startswith("►") for line in desk.lines()) == 1
            await desk.press("f3")
            await desk.settled()
            assert all(red == green == blue for red, green, blue in desk.colours())
            await desk.press("f2")

    use(journey, tmp_path / "state", plan)


def test_a_burst_of_keys_is_taken_in_the_order_in_which_it_came(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("end")
        # Every letter of it is a command where no row is open.
        await desk.type("aShelf edge 090/30;dqrlz\r41N 144E;\ni", "escape")
        names = [waypoint.name for waypoint in desk.session.plan.waypoints]
        assert names[6:] == ["dqrlz", ""]

    use(journey, tmp_path / "state", plan)


@pytest.mark.skipif(sys.platform == "win32", reason="a pseudo-terminal is a thing of POSIX")
def test_the_command_opens_the_workbook_on_a_terminal_and_leaves_it_clean(tmp_path: Path, plan: Path) -> None:
    outer, inner = pty.openpty()
    ioctl(inner, termios.TIOCSWINSZ, struct.pack("HHHH", 24, 80, 0, 0))
    environment = {**os.environ, "XDG_STATE_HOME": str(tmp_path), "TERM": "xterm", "PYTHONPATH": str(ROOT)}
    words = [sys.executable, "-m", "tui", str(plan)]
    with subprocess.Popen(words, stdin=inner, stdout=inner, stderr=inner, env=environment, cwd=tmp_path) as process:
        os.close(inner)
        shown = _read_until(outer, b"Kuromatsu")
        os.write(outer, b"q")
        rest = _read_until(outer, None)
        assert process.wait(10) == 0
    assert b"Salal Roads" in shown
    assert b"\x1b[?1049l" in rest
    assert list(tmp_path.glob(".*")) == []


def _read_until(terminal: int, wanted: bytes | None) -> bytes:
    """Read what a terminal is sent until something is in it, or to its end."""
    seen = b""
    deadline = time.monotonic() + 20
    while wanted is None or wanted not in seen:
        ready, _, _ = select.select([terminal], [], [], max(deadline - time.monotonic(), 0))
        assert ready, seen[-2000:]
        try:
            more = os.read(terminal, 65536)
        except OSError:
            return seen
        if not more:
            return seen
        seen += more
    return seen
