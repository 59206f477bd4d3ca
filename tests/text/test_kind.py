"""Each kind of figure has one formatter."""

from __future__ import annotations

from datetime import UTC, datetime, timedelta

import pytest

from navcore.text.direction import AVIATION_SIDES
from navcore.text.kind import FORMATTERS, UNITS, Kind

CELLS = [
    (Kind.TEXT, "Salal\x1b", "Salal␛"),
    (Kind.COUNT, 12, "12"),
    (Kind.LATITUDE, 48.5, "48°30.0'N"),
    (Kind.LONGITUDE, -4.5, "004°30.0'W"),
    (Kind.DIRECTION, 359.96, "000.0°T"),
    (Kind.ALTERATION, -43.1, "43.1° port"),
    (Kind.DISTANCE, 3924.24, "3924.2"),
    (Kind.SPEED, 13.5, "13.5"),
    (Kind.DURATION, timedelta(hours=6), "6 h 00 min"),
    (Kind.INSTANT, datetime(2027, 3, 4, 14, tzinfo=UTC), "2027-03-04 14:00"),
    (Kind.PERCENT, 5.95, "6.0"),
    (Kind.MINUTES_OF_ARC, -430.0, "-430.0'"),
    (Kind.ANGLE, -2.25, "-2.3°"),
    (Kind.METRES, 9.85, "9.9"),
]


@pytest.mark.parametrize(("kind", "value", "cell"), CELLS)
def test_a_cell_shows_the_figure_without_the_unit_of_its_heading(kind: Kind, value: object, cell: str) -> None:
    assert FORMATTERS[kind](value) == cell


def test_every_kind_is_in_the_table() -> None:
    assert set(FORMATTERS) == set(Kind) == {kind for kind, *_ in CELLS}
    assert set(UNITS) < set(Kind)


@pytest.mark.parametrize("kind", Kind)
def test_what_has_no_value_is_empty(kind: Kind) -> None:
    assert FORMATTERS[kind](None) == ""


def test_a_formatter_takes_what_its_kind_takes_besides() -> None:
    assert FORMATTERS[Kind.DIRECTION](45.0, "M", 0) == "045°M"
    assert FORMATTERS[Kind.ALTERATION](45.0, AVIATION_SIDES) == "45.0° right"
    assert FORMATTERS[Kind.DISTANCE](45.25, decimals=2) == "45.25"
