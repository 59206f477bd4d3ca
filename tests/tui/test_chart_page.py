"""The Chart page by keys: moved, zoomed, fitted, read, and a waypoint set from it."""

from __future__ import annotations

import shutil
from typing import TYPE_CHECKING

import pytest

from navcore.plan.model import Line
from navcore.text.position import format_position
from tests.support import ROOT
from tests.workbook import LARGE, MIDDLE, SMALL, Desk, use
from tui.pages.chart import ChartPage
from tui.present.chart_words import NOT_FOR_NAVIGATION
from tui.widgets.chart_canvas import ChartCanvas

if TYPE_CHECKING:
    from pathlib import Path

    from tui.present.chart_view import View

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"


@pytest.fixture
def plan(tmp_path: Path) -> Path:
    path = tmp_path / "plan.toml"
    shutil.copy(DEMO, path)
    return path


def page(desk: Desk) -> ChartPage:
    return desk.app.query_one(ChartPage)


def view(desk: Desk) -> View:
    """Return what is seen."""
    seen = page(desk).view
    assert seen is not None
    return seen


@pytest.mark.parametrize("size", [LARGE, MIDDLE, SMALL], ids=["120x40", "80x24", "40x12"])
def test_the_whole_plan_is_seen_first_with_what_lies_under_the_cross(
    tmp_path: Path, plan: Path, size: tuple[int, int]
) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.settled()
        assert all(view(desk).holds(waypoint.position) for waypoint in desk.session.plan.waypoints)
        position = view(desk).position
        assert position is not None
        assert format_position(position) in desk.screen()
        assert "┼" in desk.screen()

    use(journey, tmp_path / "state", plan, size)


def test_arrows_move_the_cross_and_shift_by_one_cell(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        before = view(desk)
        await desk.press("right", "up")
        after = view(desk)
        assert after.x_m - before.x_m == pytest.approx(12.0 * before.dot_m)
        assert after.y_m - before.y_m == pytest.approx(12.0 * before.dot_m)
        await desk.press("shift+left")
        assert after.x_m - view(desk).x_m == pytest.approx(2.0 * before.dot_m)
        await desk.press("down", "left", "shift+right")
        assert view(desk).position == pytest.approx(before.position)
        await desk.press("minus", "minus", *["up"] * 4)
        await desk.sees("the chart ends there")

    use(journey, tmp_path / "state", plan)


def test_plus_and_minus_zoom_about_the_cross_and_f_and_g_fit_the_plan_and_the_leg(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        whole = view(desk)
        await desk.press("plus", "plus", "minus")
        assert view(desk).dot_m == pytest.approx(whole.dot_m / 2.0)
        assert view(desk).position == pytest.approx(whole.position)
        await desk.press("pagedown", "g")
        assert desk.session.row == 1
        leg = view(desk)
        assert leg.dot_m < whole.dot_m
        assert all(leg.holds(waypoint.position) for waypoint in desk.session.plan.waypoints[:2])
        await desk.press("f")
        assert view(desk) == whole

    use(journey, tmp_path / "state", plan)


def test_a_waypoint_is_set_at_the_cross_as_it_is_read_there_and_undone_by_name(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("pagedown", "home", "down", "f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.press("plus", "right", "up")
        there = view(desk)
        assert there.position is not None
        shown = format_position(there.position)
        await desk.press("a")
        await desk.sees("add waypoint 2 at the cross · z takes it back")
        before, added = len(desk.session.plan.waypoints), desk.session.plan.waypoints[1]
        assert format_position(added.position) == shown
        assert view(desk).position == pytest.approx(added.position)
        assert view(desk).dot_m == there.dot_m
        await desk.sees("on waypoint 2")
        await desk.press("z")
        await desk.sees("add waypoint 2 at the cross")
        assert len(desk.session.plan.waypoints) == before - 1 == 6
        assert view(desk).position == pytest.approx(added.position)

    use(journey, tmp_path / "state", plan)


def test_a_passage_is_begun_on_an_empty_chart(tmp_path: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees("a adds the first waypoint at the cross")
        await desk.press("g")
        await desk.sees("there is no leg yet")
        await desk.press("a", "a")
        await desk.sees("waypoint 1 is there already")
        await desk.press("right", "up", "a", "home")
        await desk.sees("on waypoint 2")
        assert len(desk.session.plan.legs) == 1
        await desk.press("p", "p", "p", "p")
        await desk.sees("Mercator")

    use(journey, tmp_path / "state")


def test_the_row_is_shared_with_the_other_pages_and_the_chart_comes_to_its_waypoint(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.press("home", *["plus"] * 4)
        assert not view(desk).holds(desk.session.plan.waypoints[1].position)
        await desk.press("pagedown", "pagedown")
        assert desk.session.row == 2
        assert view(desk).position == pytest.approx(desk.session.plan.waypoints[1].position)
        await desk.press("f2")
        await desk.until(lambda: any(line.startswith("►") and "Join" in line for line in desk.lines()))
        await desk.press("down", "f3")
        await desk.until(lambda: desk.session.row == 3)
        await desk.press(*["pageup"] * 4)
        assert desk.session.row == 0

    use(journey, tmp_path / "state", plan)


def test_p_takes_the_next_projection_that_can_show_the_plan_and_keeps_the_place(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees("Mercator, true at")
        await desk.press("plus", "plus", "right")
        place = view(desk).position
        for name in ("Oblique stereographic", "Lambert conformal conic", "Gnomonic", "Mercator"):
            await desk.press("p")
            await desk.sees(f"{name}")
            assert view(desk).position == pytest.approx(place)
        await desk.press("f", "p")
        await desk.sees("Oblique stereographic")
        assert page(desk).is_fitted

    use(journey, tmp_path / "state", plan)


def test_the_line_of_the_leg_is_changed_and_a_waypoint_taken_out_on_the_chart(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.press("pagedown", "l")
        before = desk.session.solution.legs[0].line
        await desk.press("l")
        assert {before, desk.session.solution.legs[0].line} == {Line.RHUMB, Line.GREAT_CIRCLE}
        await desk.press("d")
        await desk.sees("put the cursor on one")
        await desk.press("pagedown", "d")
        await desk.sees("delete waypoint 2")
        assert len(desk.session.plan.waypoints) == 5

    use(journey, tmp_path / "state", plan)


def test_shore_and_the_other_line_are_left_out_and_shown_again(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.settled()
        whole = desk.screen()
        await desk.press("c")
        await desk.settled()
        bare = desk.screen()
        await desk.press("b")
        await desk.settled()
        alone = desk.screen()
        dots = [sum(0x2800 < ord(letter) < 0x2900 for letter in text) for text in (whole, bare, alone)]
        assert dots[0] > dots[1] > dots[2]
        await desk.press("b", "c")
        await desk.settled()
        assert desk.screen().splitlines()[:20] == whole.splitlines()[:20]

    use(journey, tmp_path / "state", plan)


def test_a_click_puts_the_cross_there_and_the_wheel_zooms(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        before = view(desk)
        column, row = before.cross
        page(desk).post_message(ChartCanvas.Pointed(column + 9, row - 3))
        await desk.until(lambda: view(desk) is not before)
        moved = before.moved(9, 3)
        assert view(desk) == moved
        page(desk).post_message(ChartCanvas.Rolled(up=True))
        await desk.until(lambda: view(desk) is not moved and view(desk).dot_m < before.dot_m)

    use(journey, tmp_path / "state", plan)


def test_another_plan_is_shown_whole(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.press("plus", "plus")
        desk.session.open(ROOT / "routes_demo" / "polar_flight.toml")
        desk.app.renew()
        await desk.sees("Polar stereographic")
        assert all(view(desk).holds(waypoint.position) for waypoint in desk.session.plan.waypoints)

    use(journey, tmp_path / "state", plan)


def test_the_cross_stays_where_it_is_when_the_window_changes_its_size(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f3")
        await desk.sees(NOT_FOR_NAVIGATION)
        await desk.press("plus", "right")
        place = view(desk).position
        await desk.resize(60, 18)
        await desk.until(lambda: view(desk).columns == 60)
        assert view(desk).position == pytest.approx(place)

    use(journey, tmp_path / "state", plan)
