from __future__ import annotations

import pytest
from hypothesis import given

from navcore.errors import ParseError
from navcore.plan.entry import read_entries, read_entry, write_entry
from navcore.plan.model import Leg, Line, Plan, Trade, Waypoint
from navcore.position import Position
from navcore.text.position import format_position
from tests.strategies import positions

HOME = Waypoint("Salal Roads", Position(48.5, -125.0 - 20 / 60))
AWAY = Waypoint("Kuromatsu / Bay", Position(41.0 + 20 / 60, 143.0))
PLAN = Plan((HOME, AWAY), (Leg(),))


@pytest.mark.parametrize(
    ("text", "position", "name"),
    [
        ("48°30.0'N 125°20.0'W", "48°30.0'N 125°20.0'W", None),
        ("4830N12520W;Roads", "48°30.0'N 125°20.0'W", "Roads"),
        ("48 30 N 125 20 W ; Roads; outer", "48°30.0'N 125°20.0'W", "Roads; outer"),
        ("+48.5-125.5/", "48°30.0'N 125°30.0'W", None),
        ("+48.5-125.5/ ; x", "48°30.0'N 125°30.0'W", "x"),
        ("48-30N 125-20W\tRoads", "48°30.0'N 125°20.0'W", "Roads"),
        ("48-30N 125-20W;", "48°30.0'N 125°20.0'W", ""),
    ],
)
def test_a_position_is_read_in_every_form_with_its_name(text: str, position: str, name: str | None) -> None:
    entry = read_entry(text, PLAN, 2)
    assert (format_position(entry.position), entry.name, entry.start) == (position, name, None)


def test_a_course_and_distance_runs_from_the_waypoint_above() -> None:
    entry = read_entry("180/30; south", PLAN, 1)
    assert entry.start is HOME
    assert entry.line is Line.RHUMB
    assert format_position(entry.position) == "48°00.0'N 125°20.0'W"
    assert read_entry("180/30", PLAN, 2).start is AWAY


@pytest.mark.parametrize("text", ["salal  roads 180/30 NM", "Salal Roads 180°T / 30", "Salal Roads 180/30 NM ; x"])
def test_a_bearing_and_distance_runs_from_a_named_waypoint(text: str) -> None:
    entry = read_entry(text, PLAN, 0)
    assert entry.start is HOME
    assert format_position(entry.position) == "48°00.0'N 125°20.0'W"


def test_a_name_may_hold_a_slash() -> None:
    assert read_entry("Kuromatsu / Bay 090/10", PLAN, 0).start is AWAY


def test_in_an_aviation_plan_a_course_and_distance_is_a_great_circle() -> None:
    plan = Plan((HOME,), (), trade=Trade.AVIATION)
    entry = read_entry("270/1000", plan, 1)
    assert entry.line is Line.GREAT_CIRCLE
    assert entry.position.lat_deg < HOME.position.lat_deg - 1.0


@pytest.mark.parametrize(
    ("text", "index", "words"),
    [
        ("180/30", 0, "no waypoint stands above"),
        ("Nowhere 180/30", 1, "no waypoint is named “Nowhere”; type one of: Salal Roads, Kuromatsu / Bay"),
        ("480/30", 1, "over 360"),
        ("000/9000", 1, "pole"),
        ("48 30", 1, "letter"),
        ("", 1, "missing"),
        ("; name", 1, "missing"),
        ("5050N", 1, ""),
    ],
)
def test_what_can_not_be_read_says_why(text: str, index: int, words: str) -> None:
    with pytest.raises(ParseError) as refused:
        read_entry(text, PLAN, index)
    assert words in str(refused.value)


def test_a_name_of_two_places_is_not_guessed() -> None:
    plan = Plan((HOME, Waypoint("Salal Roads", Position(0.0, 0.0))), (Leg(),))
    with pytest.raises(ParseError, match="2 waypoints"):
        read_entry("Salal Roads 180/30", plan, 1)


@given(positions)
def test_a_row_that_was_written_reads_as_the_very_position(position: Position) -> None:
    entry = read_entry(write_entry(Waypoint("a; b", position)), PLAN, 1)
    assert (entry.position, entry.name) == (position, "a; b")


def test_a_changed_row_keeps_the_name_unless_one_is_typed() -> None:
    assert read_entry("00N 000E", PLAN, 0).on(HOME).name == "Salal Roads"
    assert read_entry("00N 000E;", PLAN, 0).on(HOME).name == ""


def test_many_lines_become_waypoints_in_order_and_bad_ones_are_named() -> None:
    text = "10N 010W; a\n\nnonsense\n090/60\n20N 020W\tb\n180/60; c\n95N 000W"
    plan, added, unread = read_entries(text, PLAN, 1)
    assert added == 3
    assert [point.name for point in plan.waypoints] == ["Salal Roads", "a", "b", "c", "Kuromatsu / Bay"]
    assert [(line.number, line.index) for line in unread] == [(3, 2), (4, 2), (7, 4)]
    assert "the line above could not be read" in str(unread[1].error)


@pytest.mark.parametrize("trade", list(Trade))
def test_a_run_that_goes_the_longer_way_round_is_refused_and_never_turned_about(trade: Trade) -> None:
    plan = Plan((Waypoint("", Position(0.0, 0.0)),), trade=trade)
    with pytest.raises(ParseError, match="longer way round"):
        read_entry("090/12000", plan, 1)
    assert abs(read_entry("090/10000", plan, 1).position.lon_deg) < 170.0
