from __future__ import annotations

import shutil
from typing import TYPE_CHECKING

import pytest
from textual import events

from navcore.files.planfile import read_plan
from navcore.plan.model import Line
from navcore.text.position import format_position
from tests.support import ROOT
from tests.workbook import LARGE, MIDDLE, SMALL, Desk, use
from tui.journal import Typing

if TYPE_CHECKING:
    from pathlib import Path

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"


@pytest.fixture
def plan(tmp_path: Path) -> Path:
    path = tmp_path / "plan.toml"
    shutil.copy(DEMO, path)
    return path


@pytest.mark.parametrize("size", [LARGE, MIDDLE, SMALL], ids=["120x40", "80x24", "40x12"])
def test_a_passage_is_built_from_nothing_by_keys_and_saved(tmp_path: Path, size: tuple[int, int]) -> None:
    file = tmp_path / "made.toml"

    async def journey(desk: Desk) -> None:
        await desk.type("48-30N 125-20W;Salal Roads", "enter")
        await desk.type("270/600", "enter")
        await desk.type("4120N14300E;Kuromatsu Bay", "enter", "escape")
        await desk.press("up", "l")
        assert desk.session.solution.legs[1].line is Line.GREAT_CIRCLE
        await desk.press("z", "z", "y", "y")
        await desk.press("s")
        await desk.sees("Save the plan")
        await desk.press("ctrl+u")
        await desk.type(str(file), "enter")
        await desk.until(file.exists)

    session = use(journey, tmp_path / "state", size=size)
    saved = read_plan(file.read_bytes(), "").plan
    assert saved == session.plan
    assert [waypoint.name for waypoint in saved.waypoints] == ["Salal Roads", "", "Kuromatsu Bay"]
    assert format_position(saved.waypoints[1].position) == "48°30.0'N 140°22.2'W"
    assert saved.legs[1].line is Line.GREAT_CIRCLE


def test_the_row_shows_position_and_leg_by_both_lines_before_enter(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("end")
        await desk.type("33 00 N 140 00 E")
        await desk.sees("33°00.0'N 140°00.0'E")
        await desk.sees("rhumb line ")
        shown = desk.screen()
        assert "great circle" in shown
        assert "saves" in shown
        assert len(desk.session.plan.waypoints) == 6

    use(journey, tmp_path / "state", plan)


def test_what_can_not_be_read_says_why_and_stays_in_the_row(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("end")
        await desk.type("95 00 N 140 00 E", "enter")
        await desk.sees("^^")
        assert desk.session.typing == Typing(6, "95 00 N 140 00 E")
        await desk.press("escape")
        assert desk.session.typing is None

    session = use(journey, tmp_path / "state", plan)
    assert not session.is_changed


def test_rows_are_changed_moved_copied_deleted_and_all_of_it_undone(tmp_path: Path, plan: Path) -> None:
    names: list[str] = []

    async def journey(desk: Desk) -> None:
        before = desk.session.plan
        await desk.press("down", "down", "c", "greater_than_sign", "less_than_sign", "d", "d")
        await desk.press("r", "l", "enter", "ctrl+e")
        await desk.type(" X", "enter")
        names.append(desk.session.history.undo_name)
        while desk.session.history.undo_name:
            await desk.press("ctrl+z")
        assert desk.session.plan is before

    session = use(journey, tmp_path / "state", plan)
    assert names[0].startswith("change waypoint")
    assert not session.is_changed


def test_a_row_opens_anywhere_and_escape_leaves_no_trace(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("down", "a")
        assert desk.session.typing == Typing(1, "")
        await desk.press("escape", "A")
        assert desk.session.typing == Typing(1, "")
        await desk.press("escape", "up")
        await desk.type("1")
        assert desk.session.typing == Typing(1, "1")
        await desk.press("escape")

    session = use(journey, tmp_path / "state", plan)
    assert not session.is_changed


def test_many_pasted_lines_are_one_step_and_bad_ones_wait_to_be_mended(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("end")
        text = "10N 150E; a\r\nnonsense\r\n12N 150E\tc\r\n\r\n99N 1E\r\n13N 150E"
        desk.app.query_one("Ladder").post_message(events.Paste(text))
        await desk.sees("line 2 of what was pasted")
        assert [waypoint.name for waypoint in desk.session.plan.waypoints[6:]] == ["a", "c", ""]
        await desk.press("ctrl+u")
        await desk.type("11N 150E;b", "enter")
        await desk.sees("line 5 of what was pasted")
        await desk.press("ctrl+u")
        await desk.type("12-30N 150E;d", "enter")
        await desk.until(lambda: desk.session.typing is None)
        assert [waypoint.name for waypoint in desk.session.plan.waypoints[6:]] == ["a", "b", "c", "d", ""]
        await desk.press("z", "z", "z")
        assert not desk.session.is_changed

    use(journey, tmp_path / "state", plan)


def test_five_thousand_lines_are_pasted_in_one_step(tmp_path: Path) -> None:
    text = "\n".join(f"{number % 80}-30.5N {number % 170}-10.1W ; P{number}" for number in range(5000))

    async def journey(desk: Desk) -> None:
        desk.app.query_one("Ladder").post_message(events.Paste(text))
        await desk.until(lambda: len(desk.session.plan.waypoints) == 5000)
        await desk.press("escape", "z")
        assert not desk.session.plan.waypoints

    use(journey, tmp_path / "state")


def test_a_leg_is_changed_in_its_form_and_a_wrong_field_is_named(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("down", "enter")
        await desk.sees("Leg 1 → 2")
        await desk.press("ctrl+u")
        await desk.type("comp", "enter")
        await desk.sees("a composite needs a limiting latitude")
        await desk.press("down")
        await desk.type("49n", "down")
        await desk.type("wrong", "enter")
        await desk.sees("begins with no amount")
        await desk.press("ctrl+u")
        await desk.type("12 parts", "enter")
        await desk.until(lambda: desk.session.plan.legs[0].line is Line.COMPOSITE)

    session = use(journey, tmp_path / "state", plan)
    assert session.plan.legs[0].limit_deg == 49.0
    assert session.plan.legs[0].notes[0] == ("charts", "4801, 4803")


def test_particulars_not_touched_keep_their_very_values(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        before = desk.session.plan
        await desk.press("i")
        await desk.sees("Particulars")
        await desk.press("enter")
        assert desk.session.plan is before
        await desk.press("i", "ctrl+u")
        await desk.type("Renamed", "enter")
        await desk.until(lambda: desk.session.plan.title == "Renamed")
        await desk.sees("Renamed")
        await desk.sees("not saved")

    use(journey, tmp_path / "state", plan)


def test_leaving_with_changes_asks_and_can_be_stepped_back_from(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("r", "q")
        await desk.sees("changes that are not saved")
        await desk.press("escape", "ctrl+q")
        await desk.sees("changes that are not saved")
        await desk.press("d")

    use(journey, tmp_path / "state", plan)
    assert plan.read_bytes() == DEMO.read_bytes()


def test_a_file_changed_by_someone_else_asks_before_it_is_overwritten(tmp_path: Path, plan: Path) -> None:
    theirs = DEMO.read_bytes() + b"# theirs\n"

    async def journey(desk: Desk) -> None:
        await desk.press("r")
        plan.write_bytes(theirs)
        await desk.press("s")
        await desk.sees("not the one that was read")
        await desk.press("k")
        assert plan.read_bytes() == theirs
        await desk.press("s", "o")
        await desk.until(lambda: plan.read_bytes() != theirs)

    session = use(journey, tmp_path / "state", plan)
    assert not session.is_changed


def test_a_bad_file_lists_every_problem_and_opens_nothing(tmp_path: Path, plan: Path) -> None:
    bad = tmp_path / "bad.toml"
    bad.write_text('legbook = 1\nspeed_kn = "x"\n[[waypoint]]\nposition = "nowhere"\n', encoding="utf-8")

    async def journey(desk: Desk) -> None:
        await desk.press("o", "ctrl+u")
        await desk.type(str(bad), "enter")
        await desk.sees("nothing was opened")
        assert "2:" in desk.screen()
        assert "4:" in desk.screen()
        await desk.press("escape")
        assert desk.session.path == plan

    use(journey, tmp_path / "state", plan)


def test_what_a_crash_left_is_offered_with_the_row_that_was_open(tmp_path: Path, plan: Path) -> None:
    journal = plan.with_name(".plan.toml.recovery")
    kept: list[bytes] = []

    async def crash(desk: Desk) -> None:
        await desk.press("r", "end")
        await desk.type("10N 15")
        await desk.until(lambda: b"10N 15" in journal.read_bytes())
        kept.append(journal.read_bytes())

    lost = use(crash, tmp_path / "state", plan)
    journal.write_bytes(kept[0])

    async def again(desk: Desk) -> None:
        await desk.sees("broke off")
        await desk.press("t")
        await desk.sees("10N 15")
        assert desk.session.plan == lost.plan
        await desk.type("0E", "enter", "escape", "z", "z")
        assert not desk.session.is_changed

    use(again, tmp_path / "state", plan)


def test_the_margin_follows_the_cursor_and_folds(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("down", "down", "down")
        await desk.sees("Leg 2 → 3")
        await desk.press("m")
        await desk.until(lambda: "Leg 2 → 3" not in desk.screen())

    use(journey, tmp_path / "state", plan, LARGE)


def test_the_print_page_shows_the_sheets_and_says_where_the_file_went(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("f7")
        await desk.sees("sheet 1 of")
        await desk.press("p")
        await desk.sees("A4 upright")
        for key, suffix in (("t", "txt"), ("v", "csv"), ("f", "pdf")):
            await desk.press(key)
            await desk.sees("Write the leg table")
            await desk.press("enter")
            await desk.until(plan.with_suffix(f".{suffix}").exists)
        await desk.sees("leg table written to")
        await desk.press("t", "enter")
        await desk.sees("is there already")
        await desk.press("k", "f2")
        await desk.sees("Waypoint")

    use(journey, tmp_path / "state", plan)
    assert plan.with_suffix(".pdf").read_bytes().startswith(b"%PDF")


def test_while_a_row_is_open_no_other_command_touches_the_plan(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("r", "a", "ctrl+z")
        await desk.sees("a row is open")
        assert desk.session.history.undo_name == "reverse the passage"

    use(journey, tmp_path / "state", plan)


def test_columns_that_have_no_room_come_with_the_next_leaf(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        seen = ""
        first = desk.lines()[1]
        for _ in range(20):
            seen += desk.screen()
            await desk.press("right")
            if desk.lines()[1] == first:
                break
        for heading in ("Latitude", "To go NM", "ETA UTC", "Alteration", "Run NM", "Saving NM", "Stay", "Remarks"):
            assert heading in seen

    use(journey, tmp_path / "state", plan, SMALL)


def test_the_caution_is_on_the_opening_screen_and_one_key_away(tmp_path: Path, plan: Path) -> None:
    async def opening(desk: Desk) -> None:
        assert "Planning aid only. It holds no official chart" in desk.screen()

    async def one_key(desk: Desk) -> None:
        for page in ("f2", "f7"):
            await desk.press(page, "exclamation_mark")
            await desk.sees("It holds no official chart")
            await desk.press("escape")

    use(opening, tmp_path / "state")
    use(one_key, tmp_path / "state", plan)


def test_the_palette_finds_a_command_by_its_words(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        before = desk.session.plan
        await desk.press("ctrl+p")
        await desk.type("revers")
        await desk.sees("Reverse")
        await desk.press("enter")
        await desk.until(lambda: desk.session.plan is not before)

    use(journey, tmp_path / "state", plan)


def test_a_plan_that_is_not_there_is_said_and_an_empty_one_is_opened(tmp_path: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.sees("No such file")
        await desk.type("10N 10E", "enter", "escape")
        assert len(desk.session.plan.waypoints) == 1

    use(journey, tmp_path / "state", tmp_path / "missing.toml")


def test_a_waypoint_is_changed_in_full_in_its_form(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("end", "up", "e")
        await desk.sees("Waypoint 6")
        await desk.press("down", "down")
        await desk.type("1d 6h", "down")
        await desk.type("anchor", "enter")
        await desk.until(lambda: desk.session.is_changed)
        assert desk.session.history.undo_name == "change waypoint 6"

    session = use(journey, tmp_path / "state", plan)
    last = session.plan.waypoints[-1]
    assert (last.stay.total_seconds(), last.remarks) == (30 * 3600, "anchor")


def test_another_plan_is_opened_from_the_list(tmp_path: Path, plan: Path) -> None:
    other = tmp_path / "other.toml"
    shutil.copy(ROOT / "routes_demo" / "coastal_run.toml", other)

    async def journey(desk: Desk) -> None:
        await desk.press("o")
        await desk.type("other")
        await desk.sees("other.toml")
        await desk.press("enter")
        await desk.until(lambda: desk.session.path == other)
        await desk.press("n")
        await desk.until(lambda: desk.session.path is None)

    use(journey, tmp_path / "state", plan)


def test_escape_steps_back_to_the_passage_from_every_page(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        for page in ("f3", "f7"):
            await desk.press("down", page)
            await desk.until(lambda: not any(line.startswith("►") for line in desk.lines()))
            await desk.press("escape")
            await desk.until(lambda: any(line.startswith("►") for line in desk.lines()))
        await desk.press("escape")
        assert not desk.session.is_changed

    use(journey, tmp_path / "state", plan)
