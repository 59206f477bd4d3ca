from __future__ import annotations

import re
from dataclasses import replace
from datetime import timedelta

import pytest
from hypothesis import given, settings

from navcore.files.planfile import read_plan
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.quantities import QUANTITIES, Row, rows_of
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.text.plain import cell_width
from tests.strategies import plans
from tests.support import DEMOS, ROOT
from tui.journal import Typing
from tui.present.echo import echo
from tui.present.grid import NO_ROOM, SAID_IN_MARGIN, cells, headings, make_grid
from tui.present.open_row import open_row_lines
from tui.present.page_lines import heading_lines, row_line
from tui.present.rows import end_row, kind_of, leg_of, place_above, place_below, row_count
from tui.present.tone import content
from tui.present.working import NARROWEST, working
from tui.widgets.gap import Gap

DEMO = read_plan((ROOT / "routes_demo" / "north_pacific_winter.toml").read_bytes(), "").plan
CONTROL = re.compile(r"[\x00-\x1f\x7f-\x9f\u202a-\u202e\u2066-\u2069]")


def _text(pieces: tuple[object, ...]) -> str:
    return "".join(getattr(piece, "text", "") for piece in pieces)


@pytest.mark.parametrize("width", [36, 39, 60, 78, 100, 159, 220])
@pytest.mark.parametrize("demo", DEMOS, ids=lambda path: path.stem)
def test_every_quantity_is_reached_and_no_figure_is_cut(demo: object, width: int) -> None:
    plan = read_plan(demo.read_bytes(), "").plan  # type: ignore[attr-defined]  # a path
    solution = solve(plan)
    shown: set[str] = set(SAID_IN_MARGIN) | {"number"}
    for leaf in range(make_grid(solution, width).leaves):
        grid = make_grid(solution, width, leaf)
        assert all(cell_width(text) <= width for text in headings(grid, solution))
        shown |= {key for column in grid.columns for key in (*column.slot.waypoint, *column.slot.leg)}
        for row in Row:
            for index in rows_of(row, solution):
                texts = cells(grid, solution, row, index)
                assert [cell_width(text) for text in texts] == [column.cells for column in grid.columns]
                assert NO_ROOM not in [text.strip() for text in texts[1:]]
    assert shown >= {key for key in QUANTITIES if key not in {"remarks", "eta", "time_on_leg_s"}}


@given(plans(max_size=4))
@settings(max_examples=40)
def test_any_plan_is_shown_in_lines_that_fit_and_obey_nothing(plan: Plan) -> None:
    solution = solve(plan)
    for width in (39, 100):
        grid = make_grid(solution, width)
        lines = [*heading_lines(grid, solution)]
        lines += [row_line(grid, solution, row, is_cursor=True) for row in range(row_count(plan))]
        lines += open_row_lines(Typing(0, plan.title), len(plan.title), plan, width, (2, 5))
        for pieces in lines:
            assert not CONTROL.search(_text(pieces))
        assert all(cell_width(_text(pieces)) <= width for pieces in lines[:2])
        content(lines)


@pytest.mark.parametrize("demo", DEMOS, ids=lambda path: path.stem)
def test_the_working_of_every_leg_fits_the_margin(demo: object) -> None:
    solution = solve(read_plan(demo.read_bytes(), "").plan)  # type: ignore[attr-defined]  # a path
    for index in rows_of(Row.LEG, solution):
        for pieces in working(solution, index, NARROWEST):
            assert cell_width(_text(pieces)) <= NARROWEST


def test_the_working_sets_both_lines_and_both_figures_side_by_side() -> None:
    ends = (Waypoint("", Position(48.5, -125.0 - 20 / 60)), Waypoint("", Position(41 + 20 / 60, 143.0)))
    solution = solve(Plan(ends, (Leg(Line.GREAT_CIRCLE),), speed_kn=13.5))
    lines = [_text(pieces) for pieces in working(solution, 0, NARROWEST)]
    for wanted in (
        "distance                3924.2 NM       3690.7 NM",
        "distance                3910.9 NM       3678.2 NM",
        "course                    263.7°T         301.2°T",
        "saving                   233.5 NM           6.0 %",
        "  in time            17 h 18 min      at 13.5 kn",
        "d.lat, d.long            430.0' S       5500.0' W",
        "convergency                 64.7°      half 32.4°",
    ):
        assert wanted in [re.sub(" +", " ", line) if wanted.startswith("  ") else line for line in lines] or any(
            wanted.split() == line.split() for line in lines
        ), wanted


def test_the_echo_is_never_wider_than_its_room() -> None:
    typed = ("", "48 30 N 170 20 W; name", "263.7/300", "48 30", "Nowhere 090/10", "\x1b[31m", "湾" * 50, "9" * 2000)
    for text in typed:
        for width in (30, 34, 76):
            for pieces in echo(text, DEMO, 2, width):
                assert cell_width(_text(pieces)) <= width
                assert not CONTROL.search(_text(pieces))


def test_rows_and_places_agree() -> None:
    for count in range(4):
        point = Waypoint("", Position(0.0, 0.0))
        plan = replace(Plan(), waypoints=(point,) * count, legs=(Leg(),) * max(count - 1, 0))
        assert end_row(plan) == row_count(plan) - 1
        for row in range(row_count(plan)):
            kind_of(plan, row)
            leg = leg_of(plan, row)
            assert (leg is None) == (count < 2)
            assert 0 <= place_above(plan, row) <= place_below(plan, row) <= count
        assert place_below(plan, end_row(plan)) == count


@pytest.mark.parametrize("gap", [Gap(), Gap(3, 4), Gap(0, 2), Gap(3, 4, covers=True), Gap(0, 1, covers=True)])
def test_lines_and_rows_of_a_gap_are_each_other_s_inverse(gap: Gap) -> None:
    for row in range(10):
        if not (gap.covers and gap.lines and row == gap.row):
            assert gap.row_at(gap.line_of(row)) == row
    assert [gap.row_at(line) for line in range(gap.row, gap.row + gap.lines)] == [None] * gap.lines


def test_a_stay_of_years_still_has_its_column() -> None:
    plan = replace(DEMO, waypoints=tuple(replace(point, stay=timedelta(days=9999)) for point in DEMO.waypoints))
    solution = solve(plan)
    for leaf in range(make_grid(solution, 78).leaves):
        grid = make_grid(solution, 78, leaf)
        for index in rows_of(Row.WAYPOINT, solution):
            assert NO_ROOM not in [text.strip() for text in cells(grid, solution, Row.WAYPOINT, index)[1:]]
