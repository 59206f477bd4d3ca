from __future__ import annotations

import csv
import io

from hypothesis import given
from hypothesis import strategies as st

from navcore.files.csv_rows import CsvRow, csv_rows


def rows_of(text: str) -> list[CsvRow]:
    return list(csv_rows(io.StringIO(text, newline="")))


def test_a_quote_that_is_never_closed_costs_only_its_own_line() -> None:
    broken, *rest = rows_of('1,2,"abc\n3,4,5\n6,7,8\n')
    assert broken.fault is not None
    assert broken.cells[:2] == ["1", "2"]
    assert [(row.line, row.cells, row.fault) for row in rest] == [
        (2, ["3", "4", "5"], None),
        (3, ["6", "7", "8"], None),
    ]


def test_a_cell_past_the_size_limit_costs_only_its_own_line() -> None:
    broken, sound = rows_of(f'"{"x" * 200_000}"\n1,2\n')
    assert broken.fault is not None
    assert sound == CsvRow(2, ["1", "2"])


def test_a_quoted_cell_may_hold_line_ends_and_blank_lines_are_no_rows() -> None:
    assert rows_of('a,"b\r\nc"\r\n\r\nd,e\r\n') == [CsvRow(1, ["a", "b\r\nc"]), CsvRow(4, ["d", "e"])]


@given(st.lists(st.lists(st.text(max_size=8), min_size=1, max_size=4), max_size=6))
def test_what_the_csv_writer_wrote_is_read_back(rows: list[list[str]]) -> None:
    out = io.StringIO(newline="")
    csv.writer(out, quoting=csv.QUOTE_ALL).writerows(rows)
    assert [row.cells for row in rows_of(out.getvalue())] == rows
