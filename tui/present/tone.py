"""Text in tones: what a piece of text is, not what colour it has. A widget gives each tone its style."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from textual.content import Content

from navcore.text.plain import visible


class Tone(StrEnum):
    """What a piece of text is; the class that the styles give it."""

    PLAIN = "plain"
    QUIET = "quiet"
    HEAD = "head"
    STRONG = "strong"
    ALERT = "alert"
    CURSOR = "cursor"


@dataclass(frozen=True, slots=True)
class Piece:
    """A piece of text in one tone.

    Attributes:
        text: Already safe to print.
        tone: What it is.
    """

    text: str
    tone: Tone = Tone.PLAIN


Line = tuple[Piece, ...]

_STYLES = {
    Tone.PLAIN: "",
    Tone.QUIET: "$foreground-muted",
    Tone.HEAD: "$secondary",
    Tone.STRONG: "bold",
    Tone.ALERT: "bold $error",
    Tone.CURSOR: "reverse",
}


def line(*pieces: Piece | str) -> Line:
    """Return a line of pieces; a bare text is plain."""
    return tuple(Piece(piece) if isinstance(piece, str) else piece for piece in pieces)


def content(lines: list[Line]) -> Content:
    """Return lines as content that no widget reads as markup."""
    joined: list[Content] = []
    for number, pieces in enumerate(lines):
        if number:
            joined.append(Content("\n"))
        joined += [Content.styled(piece.text, _STYLES[piece.tone]) for piece in pieces]
    return Content("").join(joined)


def safe(text: str) -> str:
    """Return a text from outside with everything that a terminal would obey as a visible mark."""
    return visible(text)
