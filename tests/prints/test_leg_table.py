from __future__ import annotations

import csv
import io
import json
from datetime import UTC, datetime, timedelta

import pytest

from navcore.errors import NoAnswerError
from navcore.plan.leg_words import SPLIT_FIRST
from navcore.plan.model import Craft, Leg, Line, Plan, Trade, Waypoint
from navcore.plan.quantities import QUANTITIES, Row
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.prints.caution import CAUTION
from navcore.prints.csv import write_csv
from navcore.prints.json import write_json
from navcore.prints.leg_table import ROWS_ROUNDED, make_leg_table
from navcore.prints.markdown import write_markdown
from navcore.prints.text import write_text
from navcore.text.plain import cell_width

HOSTILE = ("[/b]", "\x1b[31mred\x1b[0m", "木更津港 北防波堤", "=HYPERLINK(1)", "a|b", "שלום\u202e", "x" * 300, "")


def plan_of(names: tuple[str, ...], line: Line | None = None, trade: Trade = Trade.MARINE) -> Plan:
    waypoints = tuple(
        Waypoint(name, Position(10.0 + index, -20.0 + 3.0 * index), timedelta(), f"remark {index}")
        for index, name in enumerate(names)
    )
    return Plan(
        waypoints,
        tuple(Leg(line, notes=(("charts", f"{index}"),)) for index, _ in enumerate(names[1:])),
        title="Trial",
        trade=trade,
        departure=datetime(2027, 1, 1, tzinfo=UTC),
        speed_kn=10.0,
        columns=("charts",),
        craft=Craft("Trial", 7.5),
    )


def test_text_lines_keep_to_the_width_and_align_whatever_script_a_name_is_in() -> None:
    for width in (80, 100, 132, 200):
        lines = write_text(make_leg_table(solve(plan_of(HOSTILE))), width).splitlines()
        assert max(map(cell_width, lines)) <= width
        latitudes = [line for line in lines if "'N" in line]
        assert len(latitudes) == len(HOSTILE)
        assert len({cell_width(line.partition("'N")[0]) for line in latitudes}) == 1


def test_nothing_that_a_name_holds_is_obeyed() -> None:
    table = make_leg_table(solve(plan_of(HOSTILE)))
    for written in (write_text(table), write_csv(table), write_markdown(table)):
        assert "\x1b" not in written
        assert "\u202e" not in written
    assert "[/b]" in write_text(table)
    assert r"\[/b\]" in write_markdown(table)
    assert r"a\|b" in write_markdown(table)


def test_a_name_is_printed_whole_however_long() -> None:
    text = write_text(make_leg_table(solve(plan_of(("short", "x" * 300)))))
    assert text.count("x") == 300 + CAUTION.count("x") + "Trial".count("x")


def test_no_csv_cell_becomes_a_formula() -> None:
    names = ("=1+1", "+1", "-1", "@x", "\t=1")
    rows = list(csv.reader(io.StringIO(write_csv(make_leg_table(solve(plan_of(names)))), newline="")))
    assert {len(row) for row in rows} == {len(rows[0])}
    for row in rows[1:]:
        assert all(cell[:1] not in {"=", "+", "-", "@", "\t", "\r"} for cell in row)
    assert [row[2] for row in rows[1::2]] == ["'=1+1", "'+1", "'-1", "'@x", "␉=1"]


def test_csv_is_a_ladder_with_crlf() -> None:
    written = write_csv(make_leg_table(solve(plan_of(("A", "B", "C")))))
    rows = list(csv.reader(io.StringIO(written, newline="")))
    assert [row[0] for row in rows] == ["row", "waypoint", "leg", "waypoint", "leg", "waypoint"]
    assert written.count("\r\n") == written.count("\n") == 6


def test_text_and_csv_say_the_same_figures() -> None:
    table = make_leg_table(solve(plan_of(("A", "B", "C"), Line.GREAT_CIRCLE)))
    text = write_text(table, 220)
    _, *rows = csv.reader(io.StringIO(write_csv(table)))
    cells = {cell for row in rows for cell in row[1:-1]}
    assert all(cell in text for cell in cells)


def test_json_holds_every_quantity_unrounded() -> None:
    solution = solve(plan_of(("A", "B", "C"), Line.GREAT_CIRCLE))
    document = json.loads(write_json(solution))
    for row, records in ((Row.WAYPOINT, document["waypoints"]), (Row.LEG, document["legs"])):
        keys = {quantity.key for quantity in QUANTITIES.values() if quantity.row is row}
        assert all(keys <= set(record) for record in records)
    distance_m = solution.legs[1].distance_m
    assert distance_m is not None
    assert document["legs"][1]["distance_nmi"] == distance_m / 1852.0
    assert document["waypoints"][0]["eta"] == "2027-01-01T00:00:00Z"


def test_a_great_circle_says_that_it_is_not_to_be_steered_whole() -> None:
    assert write_text(make_leg_table(solve(plan_of(("A", "B"), Line.GREAT_CIRCLE)))).count(SPLIT_FIRST) == 1
    assert SPLIT_FIRST not in write_text(make_leg_table(solve(plan_of(("A", "B"), Line.RHUMB))))


def test_rows_that_do_not_add_to_the_total_are_said_to_be_rounded() -> None:
    def table_of(*minutes: float) -> str:
        points = [Position(0.0, minute / 60.0) for minute in minutes]
        waypoints = tuple(Waypoint("", point) for point in points)
        return write_text(make_leg_table(solve(Plan(waypoints, tuple(Leg() for _ in points[1:])))))

    # On the equator of WGS 84 a minute of longitude is 1855.3 m: 1.0018 NM.
    assert ROWS_ROUNDED not in table_of(0.0, 1.0, 2.0)
    assert ROWS_ROUNDED in table_of(0.0, 0.44, 0.88, 1.32)


def test_each_trade_has_its_words() -> None:
    marine = write_text(make_leg_table(solve(plan_of(("A", "B")))), 200)
    aviation = write_text(make_leg_table(solve(plan_of(("A", "B", "C"), trade=Trade.AVIATION))), 200)
    assert all(word in marine for word in ("Course", "Speed kn", "ETA UTC", "Ship: Trial", "rhumb line"))
    assert all(word in aviation for word in ("Track", "Speed kt", "ETO UTC", "Aircraft: Trial", "great circle"))


def test_every_print_has_caution_method_datum_revision_and_lines_to_sign() -> None:
    table = make_leg_table(solve(plan_of(("A", "B"))))
    for written in (write_text(table, 400), write_markdown(table)):
        for words in ("Planning aid only", "WGS 84", "Revision", "Prepared", "Checked", "Approved", "datum"):
            assert words in written


@pytest.mark.parametrize("count", [0, 1])
def test_a_plan_without_a_leg_still_prints(count: int) -> None:
    solution = solve(plan_of(("A",) * count))
    for written in (write_text(make_leg_table(solution)), write_csv(make_leg_table(solution)), write_json(solution)):
        assert written


def test_a_line_that_cannot_be_worked_refuses_the_table_by_the_legs_name() -> None:
    waypoints = (Waypoint("A", Position(50.0, 0.0)), Waypoint("B", Position(50.0, 30.0)))
    plan = Plan(waypoints, (Leg(Line.COMPOSITE, limit_deg=40.0),))
    for write in (make_leg_table, write_json):
        with pytest.raises(NoAnswerError, match="leg 1, A to B"):
            write(solve(plan))


def test_a_stay_is_said_so_that_the_rows_explain_the_times() -> None:
    waypoints = (
        Waypoint("A", Position(0.0, 0.0)),
        Waypoint("B", Position(1.0, 0.0), stay=timedelta(hours=54)),
        Waypoint("C", Position(2.0, 0.0)),
    )
    plan = Plan(waypoints, (Leg(), Leg()), departure=datetime(2027, 1, 1, tzinfo=UTC), speed_kn=10.0)
    assert "stay 2 d 06 h 00 min" in write_text(make_leg_table(solve(plan)))


def test_times_that_do_not_add_up_are_said_to_be_rounded() -> None:
    points = [Position(index / 300.0, 0.0) for index in range(9)]
    waypoints = tuple(Waypoint("", point) for point in points)
    plan = Plan(waypoints, tuple(Leg() for _ in points[1:]), speed_kn=30.0)
    assert ROWS_ROUNDED in write_text(make_leg_table(solve(plan)))


def test_a_leg_along_a_meridian_may_be_steered_whole() -> None:
    waypoints = (Waypoint("A", Position(10.0, 5.0)), Waypoint("B", Position(60.0, 5.0)))
    assert SPLIT_FIRST not in write_text(make_leg_table(solve(Plan(waypoints, (Leg(Line.GREAT_CIRCLE),)))))
