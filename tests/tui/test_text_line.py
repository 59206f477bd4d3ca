from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from tui.widgets.text_line import TextLine

KEYS = (
    "left", "right", "home", "end", "ctrl+left", "ctrl+right", "backspace", "delete",
    "ctrl+a", "ctrl+e", "ctrl+d", "ctrl+w", "ctrl+u", "ctrl+k",
)  # fmt: skip


@pytest.mark.parametrize(
    ("key", "text", "at"),
    [
        ("left", "one two three", 6),
        ("right", "one two three", 8),
        ("home", "one two three", 0),
        ("end", "one two three", 13),
        ("ctrl+left", "one two three", 4),
        ("ctrl+right", "one two three", 13),
        ("backspace", "one tw three", 6),
        ("delete", "one twothree", 7),
        ("ctrl+w", "one  three", 4),
        ("ctrl+u", " three", 0),
        ("ctrl+k", "one two", 7),
    ],
)
def test_a_key_edits_as_it_does_in_a_shell(key: str, text: str, at: int) -> None:
    assert TextLine("one two three", 7).pressed(key) == TextLine(text, at)


def test_any_other_key_is_left_to_others() -> None:
    assert TextLine("x", 1).pressed("f7") is None


@given(st.text(), st.lists(st.one_of(st.sampled_from(KEYS), st.characters())))
def test_the_cursor_never_leaves_the_text(text: str, keys: list[str]) -> None:
    line = TextLine(text, len(text))
    for key in keys:
        line = line.pressed(key) or line.insert(key)
        assert 0 <= line.at <= len(line.text)
