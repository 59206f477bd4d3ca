"""Rounding on paper, and numbers written out."""

from __future__ import annotations

import math
from decimal import ROUND_HALF_UP, Decimal

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.errors import RangeError
from navcore.text.number import exact, format_number, rounded, write_number


@pytest.mark.parametrize(
    ("value", "decimals", "text"),
    [(0.25, 1, "0.3"), (-0.25, 1, "-0.3"), (2.675, 2, "2.68"), (1.005, 2, "1.01"), (0.5, 0, "1"), (-0.0, 1, "0.0")],
)
def test_a_half_goes_away_from_zero_as_on_paper(value: float, decimals: int, text: str) -> None:
    assert format_number(value, decimals) == text


@given(st.integers(0, 10**7), st.integers(0, 3))
def test_a_typed_decimal_is_rounded_as_that_decimal(thousandths: int, decimals: int) -> None:
    typed = Decimal(thousandths) / 1000
    meant = typed.quantize(Decimal(1).scaleb(-decimals), ROUND_HALF_UP)
    assert format_number(float(typed), decimals) == f"{meant:f}"


@given(st.floats(allow_nan=False, allow_infinity=False))
def test_a_number_is_written_without_exponent_and_read_as_the_very_same_float(value: float) -> None:
    text = write_number(value)
    assert "e" not in text
    assert float(text) == value


@pytest.mark.parametrize(
    ("value", "text"),
    [(10.0, "10"), (7.5, "7.5"), (1e-7, "0.0000001"), (1.5e17, "150000000000000000"), (-2.5e-5, "-0.000025")],
)
def test_written_numbers_are_short(value: float, text: str) -> None:
    assert write_number(value) == text


@pytest.mark.parametrize("value", [math.nan, math.inf, -math.inf])
def test_what_is_not_finite_is_refused(value: float) -> None:
    with pytest.raises(RangeError, match="finite"):
        rounded(value, 10)
    with pytest.raises(RangeError, match="finite"):
        write_number(value)


def test_typed_figures_are_exact() -> None:
    assert exact("12.50") == (1250, 100)
    assert exact("007") == (7, 1)
