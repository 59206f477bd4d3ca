"""Makes the pictures of the README from the real screen; needs rsvg-convert.

Each is the workbook itself, driven by keys on a demo passage, drawn as SVG by Textual and turned into PNG.
"""

from __future__ import annotations

import asyncio
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
    Picture("workbook_night", "night", (138, 36), ("down", "down", "down")),
    Picture("workbook_day", "day", (138, 36), ("down", "down", "down")),
)


async def take(picture: Picture, folder: Path) -> str:
    """Return the screen as SVG."""
    plan = folder / "north_pacific_winter.toml"
    shutil.copy(HERE.parent / plan.name, plan)
    app = Workbook(Session(State(folder / "state")), plan)
    async with app.run_test(size=picture.size) as pilot:
        app.theme = picture.light
        await pilot.press(*picture.keys)
        await pilot.pause(0.2)
        return app.export_screenshot(title="legbook")


def main() -> None:
    """Make every picture."""
    for picture in PICTURES:
        with tempfile.TemporaryDirectory() as folder:
            svg = asyncio.run(take(picture, Path(folder)))
        # A font by its address would be fetched by whoever looks at the picture.
        svg = re.sub(r"@font-face\s*{.*?}", "", svg, flags=re.DOTALL).replace("Fira Code", "DejaVu Sans Mono")
        svg = svg.replace("<text ", '<text xml:space="preserve" ')
        svg = re.sub(r"<circle [^>]*/>", "", svg)
        target = HERE / f"{picture.name}.svg"
        target.write_text(svg, encoding="utf-8")
        subprocess.run(["rsvg-convert", str(target), "-o", str(target.with_suffix(".png"))], check=True)  # noqa: S603, S607 our own file
        target.unlink()


if __name__ == "__main__":
    main()
