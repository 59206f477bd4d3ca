"""Meridional parts in arrays against printed tables and series."""

from __future__ import annotations

import numpy as np
import pytest

from navcore.earth.figure import FIGURES
from navcore.earth.latitudes import meridional_parts_min


@pytest.mark.parametrize(
    ("figure_name", "c0", "c1", "c3", "c5"),
    [
        # Bowditch to 1984, the series for the Clarke spheroid of 1866.
        ("Clarke 1866", 7915.704468, 23.268932, 0.0525, 0.000213),
        # Bowditch (1995) p. 552, explanation of Table 6. c1 is printed 23.0133633, a digit slip of 23.0133693.
        ("WGS 72", 7915.704468, 23.0133633, 0.051353, 0.000206),
    ],
)
def test_the_printed_series(figure_name: str, c0: float, c1: float, c3: float, c5: float) -> None:
    """M = c0 log tan(45° + L/2) - c1 sin L - c3 sin³ L - c5 sin⁵ L; the terms left out are below 2e-6 minutes."""
    lat_deg = np.arange(-85.0, 86.0, 2.5)
    sine = np.sin(np.radians(lat_deg))
    series = c0 * np.log10(np.tan(np.radians(45.0 + lat_deg / 2.0))) - c1 * sine - c3 * sine**3 - c5 * sine**5
    assert meridional_parts_min(lat_deg, FIGURES[figure_name]) == pytest.approx(series, abs=2e-5)


def test_table_6_of_bowditch() -> None:
    """Deck cadets' notes, Mercator sailing, example 1, print 2938.2 for 44°06'N; the table's own figure is 2938.1."""
    assert meridional_parts_min(44.1, FIGURES["WGS 72"]) == pytest.approx(2938.2, abs=0.1)


def test_parts_printed_in_worked_solutions() -> None:
    """A merchant-navy text's exercise 3; Clarke 1880 inferred by fit, since the source names no figure."""
    printed = {
        24.0: 1474.54,
        46.0: 3098.70,
        38.0: 2453.85,
        6.0 + 10.0 / 60.0: 368.20,
        59.0 + 55.0 / 60.0: 4497.11,
        38.3: 2476.64,
    }
    found = meridional_parts_min(np.array(list(printed)), FIGURES["Clarke 1880"])
    assert found == pytest.approx(np.array(list(printed.values())), abs=0.02)


def test_a_part_printed_wrong_is_explained_not_followed() -> None:
    """The same exercise prints 5712.16 for 68°38.7'N, a slip between two lines of the table: it is 1.61 too little."""
    assert meridional_parts_min(68.645, FIGURES["Clarke 1880"]) == pytest.approx(5713.769673, abs=1e-6)
