"""Day, dusk and night: the colours of the screen. By night all is dim red on black, whatever a widget asks for."""

from __future__ import annotations

from functools import lru_cache
from typing import TYPE_CHECKING

from rich.color import Color
from rich.segment import Segment
from rich.style import Style
from textual.filter import LineFilter
from textual.theme import Theme

if TYPE_CHECKING:
    from textual.color import Color as ScreenColor

NIGHT = "night"
NIGHT_MOST_RED = 150
"""The brightest red by night, of 255; green and blue stay below a tenth of it."""

_GREEN_PART = 0.06

LIGHTS: tuple[Theme, ...] = (
    Theme(
        name="day",
        primary="#1f5673",
        secondary="#1f5673",
        accent="#8a4b08",
        warning="#8a4b08",
        error="#a11d1d",
        success="#2c6e49",
        foreground="#1b1d1f",
        background="#f7f5ef",
        surface="#efece3",
        panel="#e5e1d5",
        dark=False,
        variables={"foreground-muted": "#5a5f63"},
    ),
    Theme(
        name="dusk",
        primary="#6f93a8",
        secondary="#8fb0c2",
        accent="#c9a26b",
        warning="#d0a35c",
        error="#e08a7a",
        success="#8fb58f",
        foreground="#c9ccc8",
        background="#14181b",
        surface="#1a1f23",
        panel="#20272c",
        dark=True,
        variables={"foreground-muted": "#858d91"},
    ),
    Theme(
        name=NIGHT,
        primary="#5a1010",
        secondary="#8c1c1c",
        accent="#8c1c1c",
        warning="#961e1e",
        error="#961e1e",
        success="#8c1c1c",
        foreground="#8c1c1c",
        background="#000000",
        surface="#080000",
        panel="#100000",
        dark=True,
        variables={"foreground-muted": "#641414"},
    ),
)
"""In the order in which the command steps through them."""


class NightFilter(LineFilter):
    """Turns every colour into a dim red of the same order of brightness."""

    def apply(self, segments: list[Segment], background: ScreenColor) -> list[Segment]:  # noqa: ARG002 the filter's own signature
        """Return the segments in dim reds."""
        return [
            Segment(text, None if style is None else _reddened(style), control) for text, style, control in segments
        ]


@lru_cache(2048)
def _reddened(style: Style) -> Style:
    colour = None if style.color is None or style.color.is_default else _red(style.color)
    ground = None if style.bgcolor is None or style.bgcolor.is_default else _red(style.bgcolor)
    return style + Style(color=colour, bgcolor=ground)


def _red(colour: Color) -> Color:
    red, green, blue = colour.get_truecolor()
    light = min(max(red, green, blue), NIGHT_MOST_RED)
    return Color.from_rgb(light, round(light * _GREEN_PART), round(light * _GREEN_PART))
