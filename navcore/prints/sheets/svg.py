"""A plotting sheet as SVG in millimetres of paper, at true scale."""

from __future__ import annotations

from typing import TYPE_CHECKING
from xml.sax.saxutils import escape

from navcore.prints.sheets.drawing import Area, Stroke, Words, words_width_mm

if TYPE_CHECKING:
    from navcore.prints.sheets.drawing import Drawing
    from navcore.trigonometry import FloatArray

_FACE = "'DejaVu Sans Condensed', 'DejaVu Sans', sans-serif"


def write_svg(drawing: Drawing, title: str) -> str:
    """Return a drawing as SVG; a unit is a millimetre, y counts down from the paper's top."""
    width, height = f"{drawing.width_mm:g}", f"{drawing.height_mm:g}"
    size = f'width="{width}mm" height="{height}mm"'
    marks = (_mark(mark, drawing.height_mm) for mark in drawing.marks)
    return "\n".join(
        (
            '<?xml version="1.0" encoding="UTF-8"?>',
            f'<svg xmlns="http://www.w3.org/2000/svg" {size} viewBox="0 0 {width} {height}" font-family="{_FACE}">',
            f"<title>{escape(title)}</title>",
            f'<rect width="{width}" height="{height}" fill="#fff"/>',
            *marks,
            "</svg>\n",
        )
    )


def _mark(mark: Stroke | Area | Words, height_mm: float) -> str:
    if isinstance(mark, Words):
        return _words(mark, height_mm)
    points = _points(mark.points_mm, height_mm)
    if isinstance(mark, Area):
        return f'<polygon points="{points}" fill="{_grey(mark.grey)}"/>'
    dash = f' stroke-dasharray="{" ".join(f"{part:g}" for part in mark.dash_mm)}"' if mark.dash_mm else ""
    return (
        f'<polyline points="{points}" fill="none" stroke="{_grey(mark.grey)}" stroke-width="{mark.thick_mm:g}"'
        f'{dash} stroke-linejoin="round"/>'
    )


def _points(points_mm: FloatArray, height_mm: float) -> str:
    return " ".join(f"{x_mm:.3f},{height_mm - y_mm:.3f}" for x_mm, y_mm in points_mm.tolist())


def _words(words: Words, height_mm: float) -> str:
    x_mm, y_mm = f"{words.x_mm:.4f}", f"{height_mm - words.y_mm:.4f}"
    turn = f' transform="rotate({-words.turn_deg:.4f} {x_mm} {y_mm})"' if words.turn_deg else ""
    weight = ' font-weight="bold"' if words.bold else ""
    # The length is given, so that another face takes the very room that was kept for the words.
    length = words_width_mm(words.text, words.size_mm, bold=words.bold)
    return (
        f'<text x="{x_mm}" y="{y_mm}" font-size="{words.size_mm:g}"{weight}{turn} textLength="{length:.3f}" '
        f'lengthAdjust="spacingAndGlyphs">{escape(words.text)}</text>'
    )


def _grey(grey: float) -> str:
    level = round(255.0 * grey)
    return f"#{level:02x}{level:02x}{level:02x}"
