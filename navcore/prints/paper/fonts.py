"""The two faces that paper is set in, bundled so that every machine prints the same: DejaVu Sans Condensed.

They hold Latin, Greek and Cyrillic, ° ′ ″ and arrows. A character that they lack is never left blank: it becomes
MISSING, and whoever prints is told which it was.
"""

from __future__ import annotations

import unicodedata
from functools import cache
from importlib.resources import files
from io import BytesIO

from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont

from navcore.text.plain import visible

SANS = "LegbookSans"
SANS_BOLD = "LegbookSans-Bold"

MISSING = "▯"
"""Stands on paper for a character that the font lacks."""

_FILES = {SANS: "DejaVuSansCondensed.ttf", SANS_BOLD: "DejaVuSansCondensed-Bold.ttf"}
_LINE_END = "␊"
_FIGURES = frozenset("°→·−") | frozenset(chr(code) for code in range(0x20, 0x7F))
_RIGHT_TO_LEFT = frozenset({"R", "AL", "AN"})


def register_fonts() -> None:
    """Make SANS and SANS_BOLD known to reportlab; to call it again costs nothing."""
    for name in _FILES:
        _font(name)


def width_pt(text: str, size_pt: float, *, bold: bool = False) -> float:
    """Return how wide a text is that `printable` has passed, in points."""
    widths = _widths(SANS_BOLD if bold else SANS)
    return sum([widths[character] for character in text]) * size_pt / 1000.0


def printable(text: str) -> tuple[str, frozenset[str]]:
    """Return the text as paper can show it, and the characters that MISSING stands for.

    What can't be seen is shown as `visible` shows it; a line end as ↵. Letters are composed where Unicode has them
    whole. Scripts that run from right to left count as lacking, because set letter by letter they would read backwards;
    so do characters beyond U+FFFF.
    """
    if _FIGURES.issuperset(text):
        return text, frozenset()
    composed = _composed(text)
    lacking = {character for character in composed if not _is_printable(character)}
    shown = "".join(MISSING if character in lacking else character for character in composed)
    return shown, frozenset(lacking)


def _composed(text: str) -> str:
    shown = unicodedata.normalize("NFC", visible(text))
    return "".join(_picture(character) for character in shown)


def _picture(character: str) -> str:
    """Return a control picture or an odd space as the font can show it, every other character as it is."""
    if character == _LINE_END:
        return "↵"
    if "\u2400" <= character <= "\u2421":
        return f"‹U+{ord(character) - 0x2400:04X}›"
    return " " if unicodedata.category(character) == "Zs" else character


def _is_printable(character: str) -> bool:
    # Beyond U+FFFF reportlab writes text that no reader can copy out of the PDF.
    is_backwards = unicodedata.bidirectional(character) in _RIGHT_TO_LEFT or character > "\uffff"
    return not is_backwards and all(character in _widths(name) for name in _FILES)


@cache
def _font(name: str) -> TTFont:
    data = files("navcore.prints").joinpath("data", _FILES[name]).read_bytes()
    font = TTFont(name, BytesIO(data), asciiReadable=True)
    pdfmetrics.registerFont(font)
    return font


@cache
def _widths(name: str) -> dict[str, float]:
    return {chr(code): width for code, width in _font(name).face.charWidths.items()}
