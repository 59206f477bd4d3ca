"""Plotting sheets as a PDF at true scale: vectors, fonts embedded, viewers told not to scale, always the same bytes."""

from __future__ import annotations

import math
from io import BytesIO
from typing import TYPE_CHECKING

from reportlab.pdfgen.canvas import Canvas

from navcore.prints.paper.fonts import SANS, SANS_BOLD, register_fonts
from navcore.prints.sheets.drawing import MILLIMETRES_PER_POINT, Area, Stroke, Words

if TYPE_CHECKING:
    from collections.abc import Iterable

    from navcore.prints.sheets.drawing import Drawing

_MM = 1.0 / MILLIMETRES_PER_POINT


def write_drawings(pages: Iterable[Drawing], title: str) -> bytes:
    """Return drawings as a PDF, each on a page of its own size."""
    register_fonts()
    out = BytesIO()
    canvas = Canvas(out, pageCompression=1, invariant=1)
    canvas.setTitle(title)
    canvas.setCreator("legbook")
    canvas.setProducer("legbook")
    canvas.setViewerPreference("PrintScaling", "None")
    for page in pages:
        canvas.setPageSize((page.width_mm * _MM, page.height_mm * _MM))
        # Butt caps: a line is no longer than its ends say.
        canvas.setLineCap(0)
        canvas.setLineJoin(1)
        for mark in page.marks:
            _draw(canvas, mark)
        canvas.showPage()
    canvas.save()
    return out.getvalue()


def _draw(canvas: Canvas, mark: Stroke | Area | Words) -> None:
    if isinstance(mark, Words):
        _draw_words(canvas, mark)
        return
    path = canvas.beginPath()
    points = (mark.points_mm * _MM).tolist()
    path.moveTo(*points[0])
    for point in points[1:]:
        path.lineTo(*point)
    if isinstance(mark, Area):
        canvas.setFillGray(mark.grey)
        path.close()
        canvas.drawPath(path, stroke=0, fill=1)
        return
    canvas.setStrokeGray(mark.grey)
    canvas.setLineWidth(mark.thick_mm * _MM)
    canvas.setDash([part * _MM for part in mark.dash_mm], 0)
    canvas.drawPath(path, stroke=1, fill=0)


def _draw_words(canvas: Canvas, words: Words) -> None:
    written = canvas.beginText()
    canvas.setFillGray(0.0)
    written.setFont(SANS_BOLD if words.bold else SANS, words.size_mm * _MM)
    x_pt, y_pt = words.x_mm * _MM, words.y_mm * _MM
    if words.turn_deg:
        cosine, sine = math.cos(math.radians(words.turn_deg)), math.sin(math.radians(words.turn_deg))
        written.setTextTransform(cosine, sine, -sine, cosine, x_pt, y_pt)
    else:
        written.setTextOrigin(x_pt, y_pt)
    written.textOut(words.text)
    canvas.drawText(written)
