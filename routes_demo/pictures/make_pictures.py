"""Makes the pictures of the README from the real screen; needs rsvg-convert.

Each is the workbook itself, driven by keys on a demo passage, drawn as SVG by Textual and turned into PNG.
"""

from __future__ import annotations

import asyncio
import html
import os
import re
import shutil
import subprocess
import sys
import tempfile
from dataclasses import dataclass
from pathlib import Path

HERE = Path(__file__).parent
sys.path.insert(0, str(HERE.parent.parent))
os.environ["TEXTUAL_ANIMATIONS"] = "none"

from tui.app import Workbook  # noqa: E402 the two lines above must come first
from tui.session import Session  # noqa: E402
from tui.state import State  # noqa: E402


@dataclass(frozen=True)
class Picture:
    """One picture.

    Attributes:
        name: Its file, without the ending.
        light: By day, at dusk or by night.
        size: Cells across and down.
        keys: What is pressed before it is taken.
    """

    name: str
    light: str
    size: tuple[int, int]
    keys: tuple[str, ...]


PICTURES = (
    Picture("workbook", "dusk", (138, 36), ("down", "down", "down", "a", *tuple("265/400"))),
    Picture("chart", "dusk", (138, 36), ("down", "down", "down", "f3", "p", "p")),
    Picture("workbook_night", "night", (138, 36), ("down", "down", "down")),
    Picture("workbook_day", "day", (138, 36), ("down", "down", "down")),
)


_CELL_WIDTH, _CELL_HEIGHT, _RISE = 12.2, 24.4, 18.5
"""Of Textual's SVG; the rise is from the base line to the top of the cell."""

_DOTS = ((0, 0), (0, 1), (0, 2), (1, 0), (1, 1), (1, 2), (0, 3), (1, 3))
"""Column and row of each bit of a Braille character."""


async def take(picture: Picture, folder: Path) -> str:
    """Return the screen as SVG."""
    plan = folder / "north_pacific_winter.toml"
    shutil.copy(HERE.parent / plan.name, plan)
    app = Workbook(Session(State(folder / "state")), plan)
    async with app.run_test(size=picture.size) as pilot:
        app.theme = picture.light
        await pilot.press(*picture.keys)
        await pilot.pause(0.8)
        return app.export_screenshot(title="legbook")


def with_dots(svg: str) -> str:
    """Return the picture with every Braille character as dots of its own: few fonts have them as wide as letters."""
    return re.sub(r'<text [^>]*class="([^"]*)" x="([^"]*)" y="([^"]*)"[^>]*>([^<]*)</text>', _dotted, svg)


def _dotted(text: re.Match[str]) -> str:
    style, words = text[1], html.unescape(text[4])
    left, base = float(text[2]), float(text[3])
    if not any(0x2800 < ord(letter) <= 0x28FF for letter in words):
        return text[0]
    drawn = []
    for number, letter in enumerate(words):
        x, bits = left + _CELL_WIDTH * number, ord(letter) - 0x2800
        if not 0 < bits <= 0xFF:
            drawn.append(f'<text class="{style}" x="{x:g}" y="{base:g}">{html.escape(letter)}</text>')
            continue
        for bit, (column, row) in enumerate(_DOTS):
            if bits >> bit & 1:
                cx, cy = x + _CELL_WIDTH * (0.25 + 0.5 * column), base - _RISE + _CELL_HEIGHT * (0.125 + 0.25 * row)
                drawn.append(f'<circle class="{style}" cx="{cx:.2f}" cy="{cy:.2f}" r="1.6"/>')
    return "".join(drawn)


def main() -> None:
    """Make every picture."""
    for picture in PICTURES:
        with tempfile.TemporaryDirectory() as folder:
            svg = asyncio.run(take(picture, Path(folder)))
        # A font by its address would be fetched by whoever looks at the picture.
        svg = re.sub(r"@font-face\s*{.*?}", "", svg, flags=re.DOTALL).replace("Fira Code", "DejaVu Sans Mono")
        svg = svg.replace("<text ", '<text xml:space="preserve" ')
        svg = re.sub(r"<circle [^>]*/>", "", svg)
        svg = with_dots(svg)
        target = HERE / f"{picture.name}.svg"
        target.write_text(svg, encoding="utf-8")
        subprocess.run(["rsvg-convert", str(target), "-o", str(target.with_suffix(".png"))], check=True)  # noqa: S603, S607 our own file
        target.unlink()


if __name__ == "__main__":
    main()
