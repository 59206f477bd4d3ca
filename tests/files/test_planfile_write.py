"""Plan files written: what no edit touched to the byte, and what was edited where it belongs."""

from __future__ import annotations

from dataclasses import replace
from datetime import UTC, datetime, timedelta
from itertools import pairwise

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.earth.figure import FIGURES
from navcore.files.planfile import read_plan, write_plan
from navcore.plan import edit
from navcore.plan.model import Craft, Leg, Line, Plan, Trade, Waypoint
from navcore.position import Position
from navcore.sailings.parts import Parts, PartsRule
from tests.strategies import legs, plans, waypoints

ANNOTATED = """\
# The passage of the spring; see the owner's letter.
legbook = 1
title = "Salal Roads to Kuromatsu Bay"   # as in the log
trade = 'marine'
departure = 2027-03-04T16:00:00+02:00    # local
columns = [
  "charts",   # numbers
  "fixing",
]
my_key = [1, 2]

[craft]      # ours
draught_m = 9.80
name = "Quernmoor"
beam_m = 32

# Anchorage: ask for the berth.
[[waypoint]]
name = "A"
position = "48-30N 125-20W"

# Keep off the bank.

# This is about B.
[[waypoint]]   # B
\tname = 'B'
position = "49 N 130 W"
line = "great circle"   # agreed with the master
notes.charts = "4801"
notes."fixing" = "radar"
tide = { height_m = 2.1 }
# end of B

[[waypoint]]
name = "C"
position = "50.5N 140.25W"
limit = "51N"
line = "composite"
[waypoint.notes]
# in a table of its own
charts = "4802"

[weather]
source = "none yet"

# This is about D.
[[waypoint]]
position = "45N 150W"
name = \"\"\"
D\"\"\"
remarks = '''Two
lines'''
stay = "90 min"
# last words
"""

VARIANTS = {
    "as it stands": ANNOTATED,
    "no final newline": ANNOTATED.rstrip("\n"),
    "empty lines at the end": ANNOTATED + "\n \n\n",
    "windows newlines": ANNOTATED.replace("\n", "\r\n"),
    "byte order mark": "\ufeff" + ANNOTATED,
    "mark, windows, no final newline": "\ufeff" + ANNOTATED.replace("\n", "\r\n").rstrip(),
    "no empty lines": ANNOTATED.replace("\n\n", "\n"),
    "tabs": ANNOTATED.replace(" = ", "\t=\t"),
    "craft last": ANNOTATED.replace("[craft]      # ours\n", "[x]\n") + '\n[craft]\nname = "Quernmoor"\n',
    "head alone": ANNOTATED.partition("\n# Anchorage")[0],
    "head alone, no newline": "legbook = 1",
    "one waypoint, no newline": 'legbook = 1\n[[waypoint]]\nposition = "1°N 1°E"',
    "explicit defaults": 'legbook = 1\ntitle = ""\n[[waypoint]]\nposition = "1°N 1°E"\nstay = "0h"\nnotes = {}\n',
}


def plan_of(text: str | bytes) -> Plan:
    return read_plan(text if isinstance(text, bytes) else text.encode(), "p.toml").plan


def written(plan: Plan) -> str:
    data = write_plan(plan)
    assert plan_of(data) == plan
    return data.decode()


ANNOTATED_PLAN = plan_of(ANNOTATED)
STARTS = [
    0,
    ANNOTATED.index("# Anchorage"),
    ANNOTATED.index("# This is about B"),
    ANNOTATED.index('[[waypoint]]\nname = "C"'),
    ANNOTATED.index("[weather]"),
    ANNOTATED.index("# This is about D"),
    len(ANNOTATED),
]
HEAD, A, B, C, WEATHER, D = (ANNOTATED[start:end] for start, end in pairwise(STARTS))


@pytest.mark.parametrize("name", VARIANTS)
def test_an_unedited_plan_is_written_back_to_the_byte(name: str) -> None:
    data = VARIANTS[name].encode()
    assert write_plan(plan_of(data)) == data


@pytest.mark.parametrize("name", VARIANTS)
def test_an_edit_undone_by_its_opposite_is_written_back_to_the_byte(name: str) -> None:
    data = VARIANTS[name].encode()
    plan = plan_of(data)
    new = Waypoint("New", Position(1.0, 2.0))
    for index in range(len(plan.waypoints) + 1):
        assert write_plan(edit.delete_waypoint(edit.insert_waypoint(plan, index, new), index)) == data
    for index in range(len(plan.waypoints)):
        assert write_plan(edit.move_waypoint(edit.move_waypoint(plan, index, 0), 0, index)) == data
    assert write_plan(edit.reverse(edit.reverse(plan))) == data
    assert write_plan(edit.set_plan(edit.set_plan(plan, title="X"), title=plan.title)) == data


@given(plans())
@settings(max_examples=100, deadline=None)
def test_a_plan_from_no_file_reads_back_as_it_was(plan: Plan) -> None:
    written(plan)


@given(st.sampled_from(list(VARIANTS)), st.data())
@settings(max_examples=150, deadline=None)
def test_any_edits_of_an_annotated_plan_read_back(name: str, data: st.DataObject) -> None:
    plan = plan_of(VARIANTS[name])
    for _ in range(data.draw(st.integers(1, 4))):
        plan = data.draw(st.sampled_from(EDITS))(plan, data)
    text = written(plan)
    assert write_plan(plan_of(text)).decode() == text


def insert(plan: Plan, data: st.DataObject) -> Plan:
    return edit.insert_waypoint(plan, data.draw(st.integers(0, len(plan.waypoints))), data.draw(waypoints))


def index_of(plan: Plan, data: st.DataObject) -> int:
    return data.draw(st.integers(0, len(plan.waypoints) - 1))


def delete(plan: Plan, data: st.DataObject) -> Plan:
    return edit.delete_waypoint(plan, index_of(plan, data)) if plan.waypoints else plan


def move(plan: Plan, data: st.DataObject) -> Plan:
    return edit.move_waypoint(plan, index_of(plan, data), index_of(plan, data)) if plan.waypoints else plan


def duplicate(plan: Plan, data: st.DataObject) -> Plan:
    return edit.duplicate_waypoint(plan, index_of(plan, data)) if plan.waypoints else plan


def turn(plan: Plan, data: st.DataObject) -> Plan:
    return edit.reverse(plan)


def set_waypoint(plan: Plan, data: st.DataObject) -> Plan:
    if not plan.waypoints:
        return plan
    index = index_of(plan, data)
    other, old = data.draw(waypoints), plan.waypoints[index]
    change = data.draw(
        st.sampled_from(
            [
                other,
                replace(old, name=other.name),
                replace(old, position=other.position),
                replace(old, stay=other.stay),
                replace(old, remarks=other.remarks),
            ]
        )
    )
    return edit.set_waypoint(plan, index, change)


def set_leg(plan: Plan, data: st.DataObject) -> Plan:
    if not plan.legs:
        return plan
    return edit.set_leg(plan, data.draw(st.integers(0, len(plan.legs) - 1)), data.draw(legs()))


def set_plan(plan: Plan, data: st.DataObject) -> Plan:
    other = data.draw(plans(max_size=0))
    kept = data.draw(st.booleans())
    return replace(
        other, waypoints=plan.waypoints, legs=plan.legs, text=plan.text, craft=plan.craft if kept else other.craft
    )


EDITS = [insert, delete, move, duplicate, turn, set_waypoint, set_leg, set_plan]


def test_a_deleted_waypoint_takes_its_comments_along_and_no_others() -> None:
    assert written(edit.delete_waypoint(ANNOTATED_PLAN, 1)) == HEAD + A + C + WEATHER + D
    assert written(edit.delete_waypoint(ANNOTATED_PLAN, 2)) == HEAD + A + B + WEATHER + D
    without_last = written(edit.delete_waypoint(ANNOTATED_PLAN, 3))
    assert without_last == HEAD + A + B + C + WEATHER.rstrip("\n") + "\n"


def test_a_moved_waypoint_takes_its_comments_along() -> None:
    assert written(edit.move_waypoint(ANNOTATED_PLAN, 1, 2)) == HEAD + A + C + B + WEATHER + D
    last_to_second = written(edit.move_waypoint(ANNOTATED_PLAN, 3, 1))
    assert last_to_second == HEAD + A + D + "\n" + B + WEATHER + C.rstrip("\n") + "\n"


def test_an_inserted_waypoint_stands_between_blocks_that_are_the_very_bytes() -> None:
    new = Waypoint("New", Position(48.5, -126.0), timedelta(hours=30, minutes=30), "r")
    plan = edit.insert_waypoint(ANNOTATED_PLAN, 1, new)
    block = (
        '[[waypoint]]\nname = "New"\nposition = "48°30.0\'N 126°00.0\'W"\nline = "great circle"\n'
        'stay = "1d 6h 30min"\nremarks = "r"\nnotes = { charts = "4801", fixing = "radar" }\n\n'
    )
    assert written(plan) == HEAD + A + block + B + C + WEATHER + D


def test_an_inserted_last_waypoint_follows_after_one_empty_line() -> None:
    plan = edit.insert_waypoint(ANNOTATED_PLAN, 4, Waypoint("", Position(1.0, 2.0)))
    assert written(plan) == ANNOTATED + "\n[[waypoint]]\nposition = \"01°00.0'N 002°00.0'E\"\n"


def test_leg_keys_move_between_the_blocks_when_the_first_place_changes_hands() -> None:
    text = written(edit.move_waypoint(ANNOTATED_PLAN, 1, 0))
    first = B.replace('line = "great circle"   # agreed', "# agreed").replace(
        'notes.charts = "4801"\nnotes."fixing" = "radar"\n', ""
    )
    second = A.replace('125-20W"\n', '125-20W"\nline = "great circle"\nnotes = { charts = "4801", fixing = "radar" }\n')
    assert text == HEAD + first + second + C + WEATHER + D


def test_every_comment_survives_reversing() -> None:
    text = written(edit.reverse(ANNOTATED_PLAN))
    comments = [line.partition("#")[2] for line in ANNOTATED.split("\n") if "#" in line]
    assert sorted(line.partition("#")[2] for line in text.split("\n") if "#" in line) == sorted(comments)
    assert "beam_m = 32" in text
    assert "tide = { height_m = 2.1 }" in text


def test_only_the_lines_that_changed_are_patched() -> None:
    plan = edit.set_waypoint(ANNOTATED_PLAN, 1, replace(ANNOTATED_PLAN.waypoints[1], name="B2"))
    plan = edit.set_leg(plan, 0, replace(plan.legs[0], line=Line.RHUMB, notes=(("charts", "4801"), ("fixing", "GNSS"))))
    plan = edit.set_plan(plan, speed_kn=12.0, craft=Craft("Quernmoor", 9.5), columns=("charts",))
    expected = (
        ANNOTATED.replace("name = 'B'", 'name = "B2"')
        .replace('"great circle"   #', '"rhumb line"   #')
        .replace('"fixing" = "radar"', '"fixing" = "GNSS"')
        .replace("draught_m = 9.80", "draught_m = 9.5")
        .replace("+02:00    # local\n", "+02:00    # local\nspeed_kn = 12.0\n")
        .replace('columns = [\n  "charts",   # numbers\n  "fixing",\n]', 'columns = ["charts"]')
    )
    assert written(plan) == expected


def test_new_lines_have_the_newlines_of_the_file() -> None:
    plan = plan_of(ANNOTATED.replace("\n", "\r\n"))
    plan = edit.insert_waypoint(plan, 1, Waypoint("New", Position(1.0, 2.0)))
    plan = edit.set_leg(edit.set_plan(plan, voyage="1"), 2, Leg(speed_kn=3.0))
    assert "\n" not in written(plan).replace("\r\n", "")


def test_a_craft_below_the_waypoints_is_changed_where_it_stands() -> None:
    text = 'legbook = 1\n[[waypoint]]\nposition = "1°N 1°E"\n[craft]\nname = "Q" # ours\n'
    plan = edit.set_plan(plan_of(text), craft=Craft("R"))
    assert written(plan) == text.replace('"Q"', '"R"')


def test_a_plan_from_no_file_is_written_in_the_canonical_order() -> None:
    plan = Plan(
        waypoints=(
            Waypoint("Salal Roads", Position(48.5, -125.0 - 20.0 / 60.0)),
            Waypoint('Kuro"matsu\n', Position(41.123456789, 143.0), timedelta(hours=6), "..."),
        ),
        legs=(Leg(Line.COMPOSITE, 50.0, Parts(PartsRule.LONGITUDE, 10.0), 12.0, (("charts", "4801"), ("a b", ""))),),
        title="T",
        voyage="014W",
        trade=Trade.AVIATION,
        figure=FIGURES["sphere"],
        datum="WGS 72",
        revision=2,
        departure=datetime(2027, 3, 4, 14, tzinfo=UTC),
        speed_kn=13.5,
        columns=("charts",),
        prepared="P",
        craft=Craft("Q", 9.8),
    )
    assert (
        written(plan)
        == """\
legbook = 1
title = "T"
voyage = "014W"
trade = "aviation"
figure = "sphere"
datum = "WGS 72"
revision = 2
departure = 2027-03-04T14:00:00Z
speed_kn = 13.5
columns = ["charts"]
prepared = "P"

[craft]
name = "Q"
draught_m = 9.8

[[waypoint]]
name = "Salal Roads"
position = "48°30.0'N 125°20.0'W"

[[waypoint]]
name = "Kuro\\"matsu\\n"
position = "41.123456789N 143°00.0'E"
line = "composite"
limit = "50°N"
parts = "10° longitude"
speed_kn = 12.0
stay = "6h"
remarks = "..."
notes = { charts = "4801", "a b" = "" }
"""
    )


def test_an_empty_plan_is_a_file() -> None:
    assert written(Plan()) == 'legbook = 1\ntrade = "marine"\nfigure = "WGS 84"\nrevision = 1\n'


def test_a_block_from_elsewhere_comes_along_and_one_that_is_no_block_is_written_anew() -> None:
    other = plan_of('legbook = 1\n# mine\n[[waypoint]]\nposition = "1°N 1°E"\n').waypoints[0]
    assert "# mine\n" in written(edit.insert_waypoint(ANNOTATED_PLAN, 2, other))
    broken = replace(other, block="[[waypoint]]\nposition = 5\n")
    assert "position = 5" not in written(edit.insert_waypoint(Plan(), 0, broken))


def test_half_a_surrogate_pair_is_written_as_the_sign_for_no_character() -> None:
    plan = Plan((Waypoint("a\ud800b", Position(1.0, 2.0)),))
    assert plan_of(write_plan(plan)).waypoints[0].name == "a\ufffdb"


def test_a_plan_of_ten_thousand_waypoints_is_read_and_written() -> None:
    points = tuple(Waypoint(f"W{number}", Position(number / 200.0, number / 100.0)) for number in range(10_000))
    plan = Plan(points, (Leg(),) * 9_999)
    data = write_plan(plan)
    again = plan_of(data)
    assert again == plan
    assert write_plan(again) == data
