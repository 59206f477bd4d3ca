"""What can't be seen becomes a mark, and cells are counted as terminals do."""

from __future__ import annotations

import unicodedata

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.text.plain import cell_width, fit, pad, visible


@pytest.mark.parametrize(
    ("text", "shown"),
    [
        ("Salal Roads [/b]", "Salal Roads [/b]"),
        ("\x1b[31mred", "␛[31mred"),
        ("a\tb\nc\rd\x00e\x7ff", "a␉b␊c␍d␀e␡f"),
        ("\x85\x9b", "‹U+0085›‹U+009B›"),
        ("a\u2028b\u2029c", "a‹U+2028›b‹U+2029›c"),
        ("12\u202e34", "12‹U+202E›34"),
        ("\u2066x\u2069\u200f", "‹U+2066›x‹U+2069›‹U+200F›"),
        ("Br\u200best\u2060\ufeff", "Br‹U+200B›est‹U+2060›‹U+FEFF›"),
        ("so\u00adft", "so‹U+00AD›ft"),
        ("\u3164\u115f\u2800\u034f", "‹U+3164›‹U+115F›‹U+2800›‹U+034F›"),
        ("\U000e0041\uffff\ufdd0", "‹U+E0041›‹U+FFFF›‹U+FDD0›"),
        ("\ud800", "‹U+D800›"),
        ("a\u200db", "a‹U+200D›b"),
        ("\ufe0f\ufe0f", "‹U+FE0F›‹U+FE0F›"),
        ("\u0301a", "◌\u0301a"),
        ("Ærøskøbing 日本 Ω é e\u0301", "Ærøskøbing 日本 Ω é e\u0301"),
        ("می\u200cخواهم", "می\u200cخواهم"),
        ("क्\u200dष", "क्\u200dष"),
        ("葛\U000e0100城 ⚓\ufe0f", "葛\U000e0100城 ⚓\ufe0f"),
        ("", ""),
    ],
)
def test_what_cannot_be_seen_is_marked_and_spelling_is_left(text: str, shown: str) -> None:
    assert visible(text) == shown


@given(st.text(st.characters()))
def test_nothing_visible_controls_a_terminal_and_marking_twice_changes_nothing(text: str) -> None:
    shown = visible(text)
    assert not {unicodedata.category(character) for character in shown} & {"Cc", "Cs", "Zl", "Zp"}
    assert not set(shown) & set("\u202a\u202b\u202c\u202d\u202e\u2066\u2067\u2068\u2069\u200b\u200e\u200f\ufeff")
    assert visible(shown) == shown
    shown.encode("utf-8")


@pytest.mark.parametrize(
    ("text", "cells"),
    [("abc", 3), ("日本", 4), ("e\u0301", 1), ("é", 1), ("\x1b", 1), ("\u202e", 0), ("a\x85", 9), ("🇫🇷", 2), ("", 0)],
)
def test_widths_are_in_terminal_cells(text: str, cells: int) -> None:
    assert cell_width(text) == cells


def test_text_is_padded_to_cells_on_the_side_asked_for() -> None:
    assert pad("日本", 6) == "日本  "
    assert pad("12.5", 6, "right") == "  12.5"
    assert pad("toolong", 3) == "toolong"


@pytest.mark.parametrize(
    ("text", "cells", "shortened"),
    [
        ("Salal", 5, "Salal"),
        ("Salal", 4, "Sal…"),
        ("日本語", 6, "日本語"),
        ("日本語", 5, "日本…"),
        ("日本語", 4, "日…"),
        ("e\u0301e\u0301e\u0301", 2, "e\u0301…"),
        ("🇫🇷🇫🇷", 3, "🇫🇷…"),
        ("Salal", 1, "…"),
        ("Salal", 0, ""),
        ("", 0, ""),
    ],
)
def test_text_is_shortened_between_the_characters_a_reader_sees(text: str, cells: int, shortened: str) -> None:
    assert fit(text, cells) == shortened


@given(st.text(max_size=20), st.integers(1, 20))
def test_fitted_and_padded_text_takes_the_very_cells(text: str, cells: int) -> None:
    shown = visible(text)
    fitted = fit(shown, cells)
    assert cell_width(fitted) <= cells
    assert cell_width(pad(fitted, cells)) == cells
    assert cell_width(pad(fitted, cells, "right")) == cells
