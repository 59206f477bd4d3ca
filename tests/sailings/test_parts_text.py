"""The rule for the parts of a leg, as it is written in a plan."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.errors import ParseError
from navcore.sailings.parts import Parts, PartsRule, format_parts, parse_parts


@pytest.mark.parametrize(
    ("text", "parts", "written"),
    [
        ("10° longitude", Parts(PartsRule.LONGITUDE, 10.0), "10° longitude"),
        ("7.5 DEG  Longitude ", Parts(PartsRule.LONGITUDE, 7.5), "7.5° longitude"),
        ("5º of longitude", Parts(PartsRule.LONGITUDE, 5.0), "5° longitude"),
        ("90longitude", Parts(PartsRule.LONGITUDE, 90.0), "90° longitude"),
        ("300 NM", Parts(PartsRule.DISTANCE, 300.0), "300 NM"),
        ("12.5nm", Parts(PartsRule.DISTANCE, 12.5), "12.5 NM"),
        ("12 parts", Parts(PartsRule.NUMBER, 12.0), "12 parts"),
        ("2.0 Parts", Parts(PartsRule.NUMBER, 2.0), "2 parts"),
        ("1 NM apart", Parts(PartsRule.SEPARATION, 1.0), "1 NM apart"),
        (" 0.5nm apart", Parts(PartsRule.SEPARATION, 0.5), "0.5 NM apart"),
    ],
)
def test_the_four_rules_are_read_and_written(text: str, parts: Parts, written: str) -> None:
    assert parse_parts(text) == parts
    assert format_parts(parts) == written


@pytest.mark.parametrize(
    ("text", "span", "reason"),
    [
        ("0 NM", (0, 1), "not above 0"),
        ("0.0 NM apart", (0, 3), "not above 0"),
        ("90.5° longitude", (0, 4), "over 90"),
        ("1 parts", (0, 1), "whole number from 2 to 1000"),
        ("2.5 parts", (0, 3), "whole number from 2 to 1000"),
        ("1001 parts", (0, 4), "over 1000"),
        ("10", (2, 2), "no unit"),
        ("10°", (2, 3), "“°” is no rule"),
        ("10 km", (3, 5), "“km” is no rule"),
        ("10 \x1b", (3, 4), "“␛” is no rule"),
        ("parts", (0, 5), "no amount"),
        ("-1 NM", (0, 5), "no amount"),
        ("9" * 900 + " NM", (0, 903), "no amount"),
        ("", (0, 0), "missing"),
    ],
)
def test_a_refused_rule_names_the_four_forms(text: str, span: tuple[int, int], reason: str) -> None:
    with pytest.raises(ParseError) as caught:
        parse_parts(text)
    assert (caught.value.start, caught.value.end) == span
    assert reason in caught.value.reason
    for form in ("10° longitude", "300 NM", "12 parts", "1 NM apart"):
        assert form in caught.value.advice


@given(st.sampled_from([PartsRule.LONGITUDE, PartsRule.DISTANCE, PartsRule.SEPARATION]), st.floats(1e-300, 90.0))
def test_a_written_rule_is_read_as_the_very_same(rule: PartsRule, amount: float) -> None:
    assert parse_parts(format_parts(Parts(rule, amount))) == Parts(rule, amount)


@given(st.integers(2, 1000))
def test_a_written_number_of_parts_is_read_as_the_very_same(number: int) -> None:
    parts = Parts(PartsRule.NUMBER, float(number))
    assert parse_parts(format_parts(parts)) == parts
