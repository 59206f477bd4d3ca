from __future__ import annotations

import pytest

from navcore.earth.figure import WGS_84
from navcore.lines import great_circle
from navcore.position import Position
from navcore.sailings.ties import tie_words


@pytest.mark.parametrize(
    ("start", "end", "said"),
    [
        (Position(45.0, 0.0), Position(40.0, 180.0), ["the rhumb line goes east"]),
        (Position(45.0, 0.0), Position(40.0, -180.0), ["the rhumb line goes west"]),
        (Position(30.0, 0.0), Position(-30.0, 179.9), ["the northern one is taken"]),
        (Position(30.0, 0.0), Position(-30.0, 180.0), ["the rhumb line goes east", "the northern one is taken"]),
        (Position(30.0, 10.0), Position(-30.0, -60.0), []),
        (Position(0.0, 0.0), Position(0.0, 60.0), []),
        (Position(30.0, 10.0), Position(-30.0, 10.0), []),
        (Position(90.0, 0.0), Position(-90.0, 180.0), []),
        (Position(30.0, 10.0), Position(30.0, 10.0), []),
    ],
)
def test_the_way_taken_is_said_where_two_are_equal(start: Position, end: Position, said: list[str]) -> None:
    circle = great_circle.inverse(*start, *end, WGS_84)
    words = tie_words(start, end, float(circle.initial_course_deg), float(circle.final_course_deg))
    assert [piece in words for piece in said] == [True] * len(said)
    assert bool(words) == bool(said)
