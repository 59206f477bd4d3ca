"""The papers that a print can be laid out for, in words, and how much text a sheet of each takes."""

from __future__ import annotations

from navcore.prints.paper.page_layout import Paper, PaperName

PAPERS = tuple(Paper(name, landscape) for name in PaperName for landscape in (True, False))
"""In the order in which the command steps through them."""

_CELLS = {True: 124, False: 84}
_LINES = {True: 46, False: 66}


def paper_words(paper: Paper) -> str:
    """Return a paper in words, such as A4 across."""
    return f"{paper.name} {'across' if paper.landscape else 'upright'}"


def sheet_cells(paper: Paper) -> int:
    """Return the cells of a line on a sheet, in type of about twelve to the inch."""
    return _CELLS[paper.landscape]


def sheet_lines(paper: Paper) -> int:
    """Return the lines of a sheet."""
    return _LINES[paper.landscape]
