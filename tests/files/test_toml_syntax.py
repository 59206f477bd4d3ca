"""Broken lines in words."""

from __future__ import annotations

import tomllib

import pytest

from navcore.files.toml_syntax import describe, place, shorten


def message(statement: str) -> str:
    with pytest.raises(tomllib.TOMLDecodeError) as caught:
        tomllib.loads(statement)
    return str(caught.value)


@pytest.mark.parametrize(
    ("statement", "what", "advice"),
    [
        ('name = "Salal\n', "closing quote", "closing quote"),
        ("name = 'Salal\n", "closing quote", "closing '"),
        ("name = “Salal”\n", "curly", 'plain "'),
        ("name = Salal Roads\n", "Salal Roads, which is neither a number nor text", "double quotes|check"),
        ("speed_kn = 12,5\n", "comma", "point"),
        ("name =\n", "no value", "type the value"),
        ("name\n", "no =", "type ="),
        ('name = "a" "b"\n', "more after the value", "double quotes"),
        ('name = "C:\\q"\n', "single", r"\\"),
        ("[craft\n", "not closed", "]"),
        ("[[waypoint]\n", "not closed", "]]"),
        ("x = { a = 1, a = 2 }\n", "twice", "one of them"),
        ('x = "\\ud800"\n', "no character", "itself"),
    ],
)
def test_a_broken_line_is_named_in_plain_words(statement: str, what: str, advice: str) -> None:
    fault = describe(statement, message(statement))
    assert what in fault.what
    assert any(part in fault.advice for part in advice.split("|"))


def test_a_known_key_says_what_it_takes() -> None:
    statement = "position = 48°30'N\n"
    fault = describe(statement, message(statement), ("latitude and longitude", 'position = "1°N 1°E"'))
    assert fault.allowed == "latitude and longitude"
    assert fault.advice == 'type it like position = "1°N 1°E"'


def test_the_place_is_the_one_that_tomllib_names() -> None:
    statement = 'x = [\n  "a",\n  b\n]\n'
    assert statement[place(statement, message(statement))] == "b"
    assert place("x = [1\n", "Unclosed array (at end of document)") == 6


def test_a_long_or_hostile_text_is_shown_short_and_harmless() -> None:
    assert shorten("a\x1b[31m") == "a␛[31m"
    assert shorten("x" * 99) == "x" * 40 + "…"
