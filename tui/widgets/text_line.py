"""A line of text that is being typed: what it says, where the cursor stands, and what each key makes of it."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class TextLine:
    """A line and the cursor in it.

    Attributes:
        text: What was typed.
        at: How many characters stand before the cursor.
    """

    text: str = ""
    at: int = 0

    def insert(self, more: str) -> TextLine:
        """Return the line with more text before the cursor."""
        return TextLine(self.text[: self.at] + more + self.text[self.at :], self.at + len(more))

    def pressed(self, key: str) -> TextLine | None:
        """Return the line after a key that edits or moves; None for any other key."""
        to = _moved_to(self, key)
        if to is not None:
            return TextLine(self.text, to)
        cut = _cut(self, key)
        if cut is None:
            return None
        start, end = cut
        return TextLine(self.text[:start] + self.text[end:], start)


def _moved_to(line: TextLine, key: str) -> int | None:
    """Return where a key puts the cursor."""
    return {
        "left": max(line.at - 1, 0),
        "right": min(line.at + 1, len(line.text)),
        "home": 0,
        "ctrl+a": 0,
        "end": len(line.text),
        "ctrl+e": len(line.text),
        "ctrl+left": _word_start(line),
        "ctrl+right": _word_end(line),
    }.get(key)


def _cut(line: TextLine, key: str) -> tuple[int, int] | None:
    """Return from where to where a key takes text out."""
    before, end = (max(line.at - 1, 0), line.at), len(line.text)
    return {
        "backspace": before,
        "ctrl+h": before,
        "delete": (line.at, min(line.at + 1, end)),
        "ctrl+d": (line.at, min(line.at + 1, end)),
        "ctrl+w": (_word_start(line), line.at),
        "ctrl+u": (0, line.at),
        "ctrl+k": (line.at, end),
    }.get(key)


def _word_start(line: TextLine) -> int:
    before = line.text[: line.at].rstrip(" ")
    return before.rfind(" ") + 1


def _word_end(line: TextLine) -> int:
    after = line.text[line.at :]
    blanks = len(after) - len(after.lstrip(" "))
    word = after.find(" ", blanks)
    return len(line.text) if word < 0 else line.at + word
