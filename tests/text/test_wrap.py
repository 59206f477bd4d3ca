from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.text.plain import cell_width, visible
from navcore.text.wrap import wrap


@given(st.text(max_size=80).map(visible), st.integers(2, 40))
def test_no_line_is_wider_than_asked_and_no_character_is_lost(text: str, cells: int) -> None:
    lines = wrap(text, cells)
    assert all(cell_width(line) <= cells for line in lines)
    assert "".join("".join(lines).split()) == "".join(text.split())


@pytest.mark.parametrize(
    ("text", "lines"),
    [
        ("", []),
        ("Salal Roads", ["Salal Roads"]),
        ("Salal Roads north", ["Salal Roads", "north"]),
        ("x" * 25, ["x" * 12, "x" * 12, "x"]),
        ("木更津港北防波堤", ["木更津港北防", "波堤"]),
    ],
)
def test_lines_of_twelve_cells(text: str, lines: list[str]) -> None:
    assert wrap(text, 12) == lines
