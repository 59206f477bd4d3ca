"""Pages of marks as the bytes of a PDF: fonts embedded, no time of printing, the same marks always the same bytes."""

from __future__ import annotations

from io import BytesIO
from itertools import groupby
from typing import TYPE_CHECKING

from reportlab import rl_config
from reportlab.pdfgen.canvas import Canvas

from navcore.prints.paper.fonts import SANS, SANS_BOLD, register_fonts
from navcore.prints.paper.page_layout import Arrowhead, Frame, Rule, Text

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from navcore.prints.paper.page_layout import Mark, Paper


def write_pages(pages: Iterable[Sequence[Mark]], paper: Paper, title: str) -> bytes:
    """Return the pages as a PDF.

    Args:
        pages: Each page's marks, in the order in which they are read.
        paper: The sheet; its true size is written into the file.
        title: Of the document; printable text.
    """
    register_fonts()
    # Set here, because reportlab takes both from the environment: streams as bytes, and no comments between objects.
    rl_config.useA85, rl_config.pdfComments = 0, 0
    out = BytesIO()
    size_pt = (paper.width_pt, paper.height_pt)
    canvas = Canvas(out, pagesize=size_pt, pageCompression=1, invariant=1, initialFontName=SANS)
    canvas.setTitle(title)
    canvas.setCreator("legbook")
    canvas.setProducer("legbook")
    canvas.setViewerPreference("PrintScaling", "None")
    for marks in pages:
        _draw(canvas, marks, paper.height_pt)
        canvas.showPage()
    canvas.save()
    return out.getvalue()


def _draw(canvas: Canvas, marks: Sequence[Mark], height_pt: float) -> None:
    _draw_rules(canvas, [mark for mark in marks if isinstance(mark, Rule)], height_pt)
    for mark in marks:
        if isinstance(mark, Frame):
            canvas.setLineWidth(mark.thick_pt)
            canvas.rect(mark.x_pt, height_pt - mark.y_pt - mark.height_pt, mark.width_pt, mark.height_pt)
        elif isinstance(mark, Arrowhead):
            _draw_arrowhead(canvas, mark, height_pt)
    # Texts last, so that nothing is ever drawn over one.
    _draw_texts(canvas, [mark for mark in marks if isinstance(mark, Text)], height_pt)


def _draw_rules(canvas: Canvas, rules: Sequence[Rule], height_pt: float) -> None:
    for thick_pt, group in groupby(sorted(rules, key=lambda rule: rule.thick_pt), key=lambda rule: rule.thick_pt):
        canvas.setLineWidth(thick_pt)
        # Written out, because reportlab takes ten times as long over a number; a hundredth of a point is 4 µm.
        lines = (
            f"{rule.x1_pt:.2f} {height_pt - rule.y1_pt:.2f} m {rule.x2_pt:.2f} {height_pt - rule.y2_pt:.2f} l"
            for rule in group
        )
        canvas.addLiteral("\n".join((*lines, "S")))


def _draw_arrowhead(canvas: Canvas, mark: Arrowhead, height_pt: float) -> None:
    path = canvas.beginPath()
    path.moveTo(mark.x_pt, height_pt - mark.y_pt)
    path.lineTo(mark.x_pt - mark.width_pt / 2.0, height_pt - mark.y_pt + mark.height_pt)
    path.lineTo(mark.x_pt + mark.width_pt / 2.0, height_pt - mark.y_pt + mark.height_pt)
    path.close()
    canvas.drawPath(path, stroke=0, fill=1)


def _draw_texts(canvas: Canvas, texts: Sequence[Text], height_pt: float) -> None:
    written = canvas.beginText()
    before = None
    for text in texts:
        font = (SANS_BOLD if text.bold else SANS, text.size_pt)
        if font != before:
            written.setFont(*font)
            before = font
        if text.upright:
            written.setTextOrigin(text.x_pt, height_pt - text.y_pt)
        else:
            written.setTextTransform(0, 1, -1, 0, text.x_pt, height_pt - text.y_pt)
        written.textLine(text.text)
    canvas.drawText(written)
