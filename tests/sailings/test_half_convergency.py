"""Half-convergency by the rule and exactly, and where the rule is left."""

from __future__ import annotations

import math

import pytest

from navcore.earth.figure import SPHERE
from navcore.position import Position
from navcore.sailings.comparison import compare_lines


def test_on_an_ocean_leg_the_rule_is_out_and_said_so() -> None:
    half = compare_lines(Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0), SPHERE).half_convergency
    assert (half.rule_deg, half.at_start_deg, half.at_end_deg) == pytest.approx((32.4, 37.5, 34.7), abs=0.06)
    assert half.note is not None
    assert "out by 5.1°" in half.note


@pytest.mark.parametrize("lat_deg", [-60.0, -20.0, 35.0, 50.0])
def test_on_one_parallel_the_exact_angle_is_that_of_the_textbook(lat_deg: float) -> None:
    # On the sphere between equal latitudes: tan CA = sin lat tan (d.long / 2); IHO S-32 defines the rule.
    half = compare_lines(Position(lat_deg, 10.0), Position(lat_deg, 60.0), SPHERE).half_convergency
    textbook_deg = math.degrees(math.atan(abs(math.sin(math.radians(lat_deg))) * math.tan(math.radians(25.0))))
    assert half.at_start_deg == pytest.approx(textbook_deg, abs=1e-9)
    assert half.at_end_deg == pytest.approx(textbook_deg, abs=1e-9)


@pytest.mark.parametrize("d_long_deg", [0.0, 1.0, 4.0])
def test_on_a_short_leg_the_rule_holds(d_long_deg: float) -> None:
    half = compare_lines(Position(50.0, 0.0), Position(51.0, d_long_deg), SPHERE).half_convergency
    assert half.note is None
    assert half.at_start_deg == pytest.approx(half.rule_deg, abs=0.05)


def test_across_the_equator_the_rule_may_say_nothing_where_the_angles_are_large() -> None:
    half = compare_lines(Position(-30.0, 0.0), Position(30.0, 60.0), SPHERE).half_convergency
    assert half.rule_deg == 0.0
    assert half.at_start_deg > 1.0
    assert half.note is not None
