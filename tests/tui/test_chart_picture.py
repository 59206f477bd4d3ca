"""The chart in cells: dots where lines are, words clear of each other, and the same Earth under cross and chart."""

from __future__ import annotations

import math
from dataclasses import replace

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.charts.choice import SheetKind
from navcore.errors import NoAnswerError
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.sailings.parts import Parts, PartsRule
from navcore.text.plain import cell_width
from navcore.text.position import format_position
from tui.present.cells import Cells, spelled
from tui.present.chart_letters import MARK, MARK_HERE
from tui.present.chart_picture import Shown, picture
from tui.present.chart_scene import Scene, coverage, first_kind, projection_of
from tui.present.chart_view import COARSEST_M, FINEST_M, View, fitted
from tui.present.chart_words import NOT_FOR_NAVIGATION, readout
from tui.present.dots import BROKEN, DOTTED, Dots
from tui.present.tone import Tone

PACIFIC = Plan(
    (
        Waypoint("Salal Roads", Position(48.5, -125.0)),
        Waypoint("Turn", Position(40.0, 170.0)),
        Waypoint("Kuromatsu", Position(41.0, 144.0)),
    ),
    (Leg(Line.GREAT_CIRCLE), Leg()),
)


def chart(
    plan: Plan, row: int = 0, kind: SheetKind = SheetKind.MERCATOR, size: tuple[int, int] = (100, 30)
) -> list[str]:
    """Return the lines of a plan's chart without the shore."""
    solution = solve(plan)
    projection = projection_of(solution, kind)
    view = fitted(projection, coverage(solution), *size)
    cells = picture(Scene(solution, projection), view, row, Shown(shore=False))
    return ["".join(piece.text for piece in line) for line in cells.lines()]


def lit(dots: Dots) -> set[tuple[int, int]]:
    """Return the column and row, from the lower left, of each cell with a dot."""
    patterns = dots.patterns()
    return {(int(column), int(len(patterns) - 1 - row)) for row, column in np.argwhere(patterns)}


def test_a_braille_character_has_a_dot_where_the_line_is() -> None:
    dots = Dots(1, 1)
    dots.draw(np.array([[0.5, 0.5], [0.5, 3.5]]))
    assert dots.patterns().tolist() == [[0b01000111]]
    dots.thicken()
    assert dots.patterns().tolist() == [[0b11111111]]


def test_a_line_is_cut_at_the_edges_and_broken_at_gaps() -> None:
    dots = Dots(10, 5)
    gap = [np.nan, np.nan]
    dots.draw(
        np.array([[-50.0, 10.0], [3.0, 10.0], gap, [15.0, 10.0], [80.0, 10.0], gap, [9.0, 2.0], gap, [99.0, 99.0]])
    )
    assert lit(dots) == {(0, 2), (1, 2), (7, 2), (8, 2), (9, 2), (4, 0)}
    nothing = Dots(10, 5)
    nothing.draw(np.empty((0, 2)))
    assert not nothing.patterns().any()


def test_broken_and_dotted_lines_have_fewer_dots_and_their_dashes_stay_where_they_are() -> None:
    line = np.array([[0.0, 2.0], [100.0, 2.0]])
    counts = []
    for dash in (BROKEN, DOTTED):
        whole, halved = Dots(50, 1), Dots(50, 1)
        whole.draw(line, dash)
        halved.draw(np.array([[0.0, 2.0], [37.0, 2.0], [100.0, 2.0]]), dash)
        np.testing.assert_array_equal(whole.patterns(), halved.patterns())
        counts.append(int(np.unpackbits(whole.patterns()).sum()))
    assert counts == [60, 25]


@given(st.lists(st.tuples(st.floats(-300, 300), st.floats(-300, 300)), min_size=1, max_size=8))
def test_any_line_can_be_drawn(points: list[tuple[float, float]]) -> None:
    dots = Dots(13, 7)
    dots.draw(np.array(points), BROKEN)
    dots.draw(np.array(points))
    inside = [point for point in points if 0.0 <= point[0] < 26.0 and 0.0 <= point[1] < 28.0]
    assert {(int(x / 2), int(y / 4)) for x, y in inside} <= lit(dots)


def test_words_of_any_script_take_their_cells_and_no_more() -> None:
    cells = Cells(10, 1)
    cells.write(1, 0, spelled("湾e\u0301🚢"), Tone.STRONG)
    (line,) = cells.lines()
    assert "".join(piece.text for piece in line) == " 湾é🚢    "
    assert not cells.is_free(2, 0, 1)
    assert cells.is_free(6, 0, 4)
    assert not cells.is_free(7, 0, 4)


def test_waypoints_are_marked_where_they_are_and_lettered_close_by() -> None:
    lines = chart(PACIFIC, row=2)
    text = "\n".join(lines)
    assert text.count(MARK) == 2
    assert text.count(MARK_HERE) == 1
    for words in ("1 Salal Roads", "2 Turn", "3 Kuromatsu"):
        assert words in text
    rows = [next(row for row, line in enumerate(lines) if words in line) for words in (MARK_HERE, "2 Turn")]
    assert abs(rows[0] - rows[1]) <= 2


def test_waypoints_that_lie_together_are_marked_once_and_the_one_of_the_cursor_first() -> None:
    near = [Waypoint(f"P{n}", Position(10.0 + n / 1000.0, 20.0)) for n in range(40)]
    plan = Plan((*near, Waypoint("Far", Position(30.0, 60.0))), tuple(Leg() for _ in near))
    text = "\n".join(chart(plan, row=20))
    assert "11 P10" in text
    assert text.count(MARK) + text.count(MARK_HERE) == 2


def test_a_rhumb_line_and_a_great_circle_are_told_apart_without_colour() -> None:
    east_west = (Waypoint("", Position(0.0, -170.0)), Waypoint("", Position(0.0, 120.0)))
    counts = []
    for line in (Line.RHUMB, Line.GREAT_CIRCLE):
        solution = solve(Plan(east_west, (Leg(line),)))
        projection = projection_of(solution, SheetKind.MERCATOR)
        view = fitted(projection, coverage(solution), 100, 30)
        seen = Scene(solution, projection).track.seen(view)
        dots = Dots(100, 30)
        dots.draw(seen.of(great_circle=line is Line.GREAT_CIRCLE), BROKEN if line is Line.GREAT_CIRCLE else DOTTED)
        counts.append(len(seen.of(great_circle=True)))
    assert counts[0] == 0
    assert counts[1] > 10
    rows = ["".join(chart(Plan(east_west, (Leg(line),)))) for line in (Line.RHUMB, Line.GREAT_CIRCLE)]
    dots_of = [
        sum((ord(letter) - 0x2800).bit_count() for letter in row if 0x2800 < ord(letter) < 0x2900) for row in rows
    ]
    assert dots_of[1] < dots_of[0]


def test_what_is_drawn_is_the_leg_itself() -> None:
    """Every cell of a leg holds a point of the true line, and every point of it is in a cell of the leg."""
    solution = solve(PACIFIC)
    for kind in SheetKind:
        projection = projection_of(solution, kind)
        view = fitted(projection, coverage(solution), 100, 30)
        seen = Scene(solution, projection).track.seen(view)
        dots = Dots(100, 30)
        dots.draw(seen.of(great_circle=True))
        where = coverage(solution, 0)
        place = view.plane.to_mm(where.lat_deg, where.lon_deg)
        true = {(int(x / 2), int(y / 4)) for x, y in place.tolist()}
        drawn = lit(dots)
        around = {(x + dx, y + dy) for x, y in drawn for dx in (-1, 0, 1) for dy in (-1, 0, 1)}
        assert true <= around, kind


def test_a_leg_that_can_not_be_worked_is_not_drawn_and_does_not_keep_the_rest_from_being() -> None:
    limit = Leg(Line.COMPOSITE, limit_deg=10.0)
    solution = solve(replace(PACIFIC, legs=(limit, Leg())))
    assert solution.legs[0].refusal is not None
    text = "\n".join(chart(replace(PACIFIC, legs=(limit, Leg())), row=1))
    assert "3 Kuromatsu" in text


def test_parts_are_marked_where_they_meet() -> None:
    split = Leg(Line.GREAT_CIRCLE, parts=Parts(PartsRule.NUMBER, 4.0))
    text = "\n".join(chart(replace(PACIFIC, legs=(split, Leg()))))
    assert text.count("+") == 3


@pytest.mark.parametrize("kind", list(SheetKind))
def test_the_place_under_the_cross_is_the_place_that_is_drawn_there(kind: SheetKind) -> None:
    solution = solve(PACIFIC)
    view = fitted(projection_of(solution, kind), coverage(solution), 81, 23)
    for step in ((0, 0), (7, 3), (-12, -4)):
        moved = view.moved(*step)
        assert moved is not None
        assert moved.position is not None
        column, row = moved.cross
        x_dots, y_dots = moved.plane.to_mm(*moved.position)
        assert (x_dots, y_dots) == (pytest.approx(2 * column + 1.0), pytest.approx(4 * (22 - row) + 2.0))
        for other in (moved.zoomed(2.0), moved.resized(40, 12)):
            assert other.position == pytest.approx(moved.position)
    there_and_back = view.moved(5, 5)
    assert there_and_back is not None
    back = there_and_back.moved(-5, -5)
    assert back is not None
    assert back.position == pytest.approx(view.position)


def test_the_whole_plan_is_seen_when_fitted_whatever_the_projection() -> None:
    solution = solve(PACIFIC)
    for kind in SheetKind:
        view = fitted(projection_of(solution, kind), coverage(solution), 80, 18)
        assert all(view.holds(waypoint.position) for waypoint in PACIFIC.waypoints)


def test_the_chart_is_turned_when_the_cross_goes_round_the_earth() -> None:
    solution = solve(PACIFIC)
    view = fitted(projection_of(solution, SheetKind.MERCATOR), coverage(solution), 80, 18)
    seen = set()
    for _ in range(60):
        moved = view.moved(8, 0)
        assert moved is not None
        assert moved.position is not None
        view = moved
        assert abs(math.remainder(view.projection.central_lon_deg - moved.position.lon_deg, 360.0)) <= 100.0
        seen.add(round(moved.position.lon_deg / 30.0))
    assert len(seen) == 13


def test_the_chart_ends_where_the_projection_does_and_zooming_where_it_is_no_use() -> None:
    solution = solve(PACIFIC)
    view: View | None = fitted(projection_of(solution, SheetKind.MERCATOR), coverage(solution), 80, 18)
    for _ in range(200):
        assert view is not None
        if (further := view.moved(0, 4)) is None:
            break
        view = further
    assert view is not None
    assert view.position is not None
    assert 75.0 < view.position.lat_deg <= 85.0
    for _ in range(40):
        view = view.zoomed(2.0)
    assert view.dot_m == FINEST_M
    for _ in range(60):
        view = view.zoomed(0.5)
    assert view.dot_m == COARSEST_M


def test_another_projection_keeps_the_place_and_its_size() -> None:
    solution = solve(PACIFIC)
    view = fitted(projection_of(solution, SheetKind.MERCATOR), coverage(solution), 80, 18).zoomed(8.0)
    moved = view.moved(11, -3)
    assert moved is not None
    assert moved.position is not None
    for kind in SheetKind:
        other = moved.on(projection_of(solution, kind))
        assert other.position == pytest.approx(moved.position)
        north = [each.plane.to_mm(moved.position.lat_deg + 0.01, moved.position.lon_deg) for each in (moved, other)]
        here = [each.plane.to_mm(*moved.position) for each in (moved, other)]
        lengths = [float(np.hypot(*(tip - foot))) for tip, foot in zip(north, here, strict=True)]
        if other.projection.conformal:
            assert lengths[1] == pytest.approx(lengths[0], rel=1e-3)


def test_every_projection_shows_an_empty_plan_or_says_that_it_can_not() -> None:
    solution = solve(Plan())
    assert first_kind(solution) is SheetKind.MERCATOR
    assert chart(Plan())
    polar = solve(Plan((Waypoint("", Position(89.0, 0.0)),)))
    assert first_kind(polar) is SheetKind.STEREOGRAPHIC


@pytest.mark.parametrize("cells", [158, 78, 58, 38])
def test_what_is_read_has_room_and_always_says_that_the_shore_is_not_for_navigation(cells: int) -> None:
    solution = solve(PACIFIC)
    for kind in SheetKind:
        view = fitted(projection_of(solution, kind), coverage(solution), cells + 2, 18)
        lines = ["".join(piece.text for piece in line) for line in readout(solution, view, 1, cells)]
        assert len(lines) == 3
        assert all(len(line) <= cells for line in lines)
        assert view.position is not None
        assert lines[0].startswith(format_position(view.position))
        assert "°T" in lines[1]
        assert "NM" in lines[1]
        assert lines[2].endswith(NOT_FOR_NAVIGATION)


def test_bearing_and_distance_are_those_of_both_lines_from_the_waypoint() -> None:
    solution = solve(PACIFIC)
    view = fitted(projection_of(solution, SheetKind.MERCATOR), coverage(solution), 160, 40)
    on_turn = view.centred(Position(40.0, 170.0))
    words = "".join(piece.text for piece in readout(solution, on_turn, 0, 158)[1])
    worked = solution.legs[0].worked
    assert f"{worked.rhumb_course_deg:05.1f}°T {worked.rhumb_distance_m / 1852.0:.1f} NM" in words
    assert f"{worked.initial_course_deg:05.1f}°T {worked.great_circle_distance_m / 1852.0:.1f} NM" in words
    assert "".join(piece.text for piece in readout(solution, on_turn, 2, 158)[1]) == "on waypoint 2 Turn"


ANYWHERE = st.builds(
    Position,
    st.one_of(st.floats(-90.0, 90.0), st.sampled_from((90.0, -90.0, 0.0))),
    st.one_of(st.floats(-180.0, 180.0), st.sampled_from((180.0, -180.0))),
)
STEPS = st.lists(
    st.tuples(st.integers(-40, 40), st.integers(-20, 20), st.sampled_from((0.01, 0.5, 2.0, 16.0))), max_size=4
)


@settings(max_examples=25)
@given(
    st.lists(ANYWHERE, max_size=5), st.sampled_from(list(SheetKind)), STEPS, st.integers(0, 9), st.integers(1, 90),
    st.integers(1, 30),
)  # fmt: skip
def test_any_plan_from_anywhere_at_any_size_fills_its_cells_and_no_more(
    places: list[Position],
    kind: SheetKind,
    steps: list[tuple[int, int, float]],
    row: int,
    columns: int,
    rows: int,
) -> None:
    plan = Plan(tuple(Waypoint("湾 é🚢", place) for place in places), tuple(Leg(Line.GREAT_CIRCLE) for _ in places[1:]))
    solution = solve(plan)
    try:
        projection = projection_of(solution, kind)
    except NoAnswerError:
        return
    view = fitted(projection, coverage(solution), columns, rows)
    row = min(row, max(2 * len(places) - 1, 0))
    for right, up, factor in ((0, 0, 1.0), *steps):
        view = (view.moved(right, up) or view).zoomed(factor)
        lines = picture(Scene(solution, view.projection), view, row, Shown(shore=False)).lines()
        assert len(lines) == rows
        for line in lines:
            assert sum(cell_width(letter) for piece in line for letter in piece.text) == columns
        assert len(readout(solution, view, row, max(columns - 2, 1))) == 3


def test_over_the_apex_of_a_cone_there_is_no_scale_to_read() -> None:
    solution = solve(Plan((Waypoint("", Position(80.0, 10.0)), Waypoint("", Position(60.0, 40.0))), (Leg(),)))
    view = fitted(projection_of(solution, SheetKind.LAMBERT), coverage(solution), 80, 20).centred(Position(90.0, 25.0))
    assert "the chart has no scale here" in "".join(piece.text for piece in readout(solution, view, 0, 78)[0])
    assert not any(
        "NM at the cross" in piece.text
        for line in picture(Scene(solution, view.projection), view, 0, Shown(shore=False)).lines()
        for piece in line
    )


def test_the_leg_under_the_cursor_is_drawn_once_so_that_its_gaps_stay_open() -> None:
    plan = Plan(PACIFIC.waypoints[:2], (Leg(Line.GREAT_CIRCLE),))
    solution = solve(plan)
    projection = projection_of(solution, SheetKind.MERCATOR)
    view = fitted(projection, coverage(solution), 120, 21)
    lines = picture(Scene(solution, projection), view, 1, Shown(shore=False, other_lines=False)).lines()
    tones = {piece.tone for line in lines for piece in line if any(letter > "\u2800" for letter in piece.text)}
    assert Tone.STRONG in tones
    assert Tone.HEAD not in tones
