"""Decimal figures: the one place that rounds, and the exact value of what was typed.

A half goes away from zero, as it is done on paper. A half as typed counts as one even where the float nearest to it
lies a hair below, so that 59.95' prints as the next degree.
"""

from __future__ import annotations

import math
import re

from navcore.errors import RangeError

FIGURES = re.compile(r"\d+(?:\.\d+)?", re.ASCII)
"""A number as people write it: figures, and a point only between figures."""

_HAIR_ULP = 4.0


def rounded(value: float, parts_per_unit: int) -> int:
    """Return a value as the nearest whole number of 1/parts_per_unit; halves away from zero.

    Args:
        value: Any finite number.
        parts_per_unit: How many of the smallest printed step make 1: 10 for one decimal, 60 for minutes of a degree.

    Raises:
        RangeError: The value is not finite.
    """
    if not math.isfinite(value):
        raise RangeError("value", value, "a finite number")
    steps = abs(value) * parts_per_unit
    if not math.isfinite(steps):
        return int(value) * parts_per_unit
    nearest = math.floor(steps + 0.5 + _HAIR_ULP * math.ulp(steps))
    return -nearest if value < 0.0 else nearest


def format_number(value: float, decimals: int = 1, width: int = 1) -> str:
    """Return a value with that many decimals; what rounds to zero has no sign.

    Args:
        value: Any finite number.
        decimals: 0 or more.
        width: Least number of figures before the point, filled with zeros.

    Raises:
        RangeError: The value is not finite.
    """
    return decimal_text(rounded(value, 10**decimals), decimals, width)


def decimal_text(steps: int, decimals: int, width: int = 1) -> str:
    """Return a whole number of 10**-decimals in decimal writing: 450 with 1 and 3 is "045.0"."""
    whole, fraction = divmod(abs(steps), 10**decimals)
    sign = "-" if steps < 0 else ""
    point = f".{fraction:0{decimals}d}" if decimals else ""
    return f"{sign}{whole:0{width}d}{point}"


def write_number(value: float) -> str:
    """Return the shortest decimal writing that reads back as the very same float, without an exponent.

    Raises:
        RangeError: The value is not finite.
    """
    if not math.isfinite(value):
        raise RangeError("value", value, "a finite number")
    mantissa, _, exponent = repr(value).partition("e")
    sign, mantissa = ("-", mantissa[1:]) if mantissa.startswith("-") else ("", mantissa)
    whole, _, fraction = mantissa.partition(".")
    shift = int(exponent or "0")
    if shift < 0:
        whole, fraction = "0", "0" * (-shift - 1) + whole + fraction
    else:
        fraction = fraction.ljust(shift, "0")
        whole, fraction = whole + fraction[:shift], fraction[shift:]
    fraction = fraction.rstrip("0")
    return f"{sign}{whole}.{fraction}" if fraction else f"{sign}{whole}"


def exact(figures: str) -> tuple[int, int]:
    """Return what was typed as a fraction: "12.50" is (1250, 100).

    Dividing the two rounds once, so that a value worked from them is the float nearest to what was meant.
    """
    whole, _, fraction = figures.partition(".")
    return int(whole + fraction), 10 ** len(fraction)
