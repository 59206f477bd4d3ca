from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st

from navcore.prints.paper.fonts import MISSING, printable, width_pt
from navcore.prints.paper.typeset import fold, fold_at_most
from tests.strategies import odd_texts


@given(odd_texts | st.text(max_size=200), st.floats(8.0, 400.0))
def test_a_folded_text_fits_and_loses_nothing(text: str, room_pt: float) -> None:
    shown, _ = printable(text)
    lines = fold(shown, room_pt, 10.0)
    assert "".join("".join(lines).split()) == "".join(shown.split())
    letters = len(max(lines, key=len, default=""))
    assert all(width_pt(line, 10.0) <= room_pt or letters == 1 or len(line) <= 8 for line in lines)


@given(st.text(max_size=200))
def test_every_text_becomes_printable_and_says_what_is_lacking(text: str) -> None:
    shown, lacking = printable(text)
    assert printable(shown)[0] == shown
    assert width_pt(shown, 10.0) >= 0.0
    assert (MISSING in shown) == bool(lacking) or MISSING in text


def test_a_long_word_breaks_and_a_cut_text_says_so() -> None:
    assert fold("x" * 30, 60.0, 10.0) == ["x" * 10] * 3 or len(fold("x" * 30, 60.0, 10.0)) > 1
    lines, cut = fold_at_most("word " * 30, 60.0, 10.0, 2)
    assert cut
    assert len(lines) == 2
    assert lines[-1].endswith("…")
    assert fold_at_most("word", 60.0, 10.0, 2) == (["word"], False)


def test_an_accent_stays_with_its_letter() -> None:
    assert all(not line.startswith("\u0332") for line in fold("x\u0332" * 40, 30.0, 10.0))
