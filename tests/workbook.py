"""The workbook driven by keys. The one place that looks at what Textual keeps to itself."""

from __future__ import annotations

import asyncio
import re
import time
from typing import TYPE_CHECKING

from textual import events

from tui.app import Workbook
from tui.session import Session
from tui.state import State

if TYPE_CHECKING:
    from collections.abc import Awaitable, Callable
    from pathlib import Path

    from textual.pilot import Pilot

_KEYS = {" ": "space", ";": "semicolon", "/": "slash", "\r": "enter", "\n": "enter"}
_PATIENCE_S = 5.0
_STILL_WORKED = re.compile("farthest apart +…")

LARGE, MIDDLE, SMALL = (120, 40), (80, 24), (40, 12)


class Desk:
    """A workbook under test.

    Attributes:
        app: The workbook.
        session: Its session.
    """

    def __init__(self, app: Workbook, pilot: Pilot[None]) -> None:
        self.app = app
        self.session = app.session
        self._pilot = pilot

    async def press(self, *keys: str) -> None:
        """Press keys, one after the other."""
        await self._pilot.press(*keys)

    async def type(self, text: str, *then: str) -> None:
        """Type a text as fast as a terminal sends it, then press keys."""
        for character in text:
            self.app.post_message(events.Key(_KEYS.get(character, character), character))
        await self._pilot.pause()
        await self._pilot.press(*then)

    async def resize(self, width: int, height: int) -> None:
        """Give the terminal another size."""
        await self._pilot.resize_terminal(width, height)

    async def until(self, condition: Callable[[], bool]) -> None:
        """Wait until something holds."""
        deadline = time.monotonic() + _PATIENCE_S
        while not condition():
            assert time.monotonic() < deadline, f"waited in vain; the screen:\n{self.screen()}"
            await self._pilot.pause(0.01)

    async def sees(self, text: str) -> None:
        """Wait until a text stands on the screen."""
        await self.until(lambda: text in self.screen())

    async def settled(self) -> None:
        """Wait until the screen stays as it is."""
        before = ""
        while before != self.screen() or _STILL_WORKED.search(before):
            before = self.screen()
            await self._pilot.pause(0.06)

    def colours(self) -> set[tuple[int, int, int]]:
        """Return every colour on the screen, of letters and of grounds, as it is sent to the terminal."""
        found = set()
        for strip in self.app.screen._compositor.render_strips():
            for segment in strip:
                style = segment.style
                both = (style.color, style.bgcolor) if style else ()
                found |= {tuple(colour.get_truecolor()) for colour in both if colour and not colour.is_default}
        return {(red, green, blue) for red, green, blue in found}

    def lines(self) -> list[str]:
        """Return the lines of the screen as plain text."""
        return [strip.text for strip in self.app.screen._compositor.render_strips()]

    def screen(self) -> str:
        """Return the screen as plain text, as it stands in the golden files."""
        return "".join(f"{line.rstrip()}\n" for line in self.lines())


def use(
    journey: Callable[[Desk], Awaitable[None]], state: Path, plan: Path | None = None, size: tuple[int, int] = MIDDLE
) -> Session:
    """Open the workbook, go through a journey, and return the session as it was left."""

    async def run() -> Session:
        app = Workbook(Session(State(state)), plan)
        async with app.run_test(size=size) as pilot:
            await pilot.pause()
            await journey(Desk(app, pilot))
        return app.session

    return asyncio.run(run())
