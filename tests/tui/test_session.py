from __future__ import annotations

import os
import shutil
from typing import TYPE_CHECKING

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.errors import EditError, PlanFileError
from navcore.files.planfile import read_plan, write_plan
from navcore.plan import edit
from navcore.plan.model import Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from tests.edits import EDITS, make_edit
from tests.strategies import plans
from tests.support import DEMOS, ROOT
from tui.session import ChangedOnDiskError, NoFileError, Session, WouldOverwriteError
from tui.state import MOST_RECENT, State

if TYPE_CHECKING:
    import random
    from pathlib import Path

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"
HERE = Waypoint("here", Position(50.0, -10.0))


@pytest.fixture
def plan_file(tmp_path: Path) -> Path:
    path = tmp_path / "plan.toml"
    shutil.copy(DEMO, path)
    return path


@pytest.fixture
def session(tmp_path: Path) -> Session:
    return Session(State(tmp_path / "state"))


def _insert(plan: Plan) -> Plan:
    return edit.insert_waypoint(plan, 0, HERE)


def _hidden(folder: Path) -> list[str]:
    return sorted(path.name for path in folder.iterdir() if path.name.startswith("."))


@given(plans(), st.lists(st.sampled_from(EDITS), max_size=12), st.randoms(use_true_random=False))
@settings(max_examples=20)
def test_undoing_every_change_gives_the_very_plan(
    tmp_path_factory: pytest.TempPathFactory, plan: Plan, names: list[str], chance: random.Random
) -> None:
    session = Session(State(tmp_path_factory.getbasetemp() / "undo"))
    session.new()
    session.change("all of it", lambda _: plan)
    for name in names:
        session.change(name, make_edit(name, chance))
    last = session.plan
    count = 0
    while session.history.undo_name not in {"all of it", ""}:
        session.undo()
        count += 1
    assert session.plan == plan
    for _ in range(count):
        session.redo()
    assert session.plan is last
    assert session.solution.legs == solve(last).legs
    session.close()


def test_a_step_says_its_name_and_brings_the_cursor_back(session: Session) -> None:
    session.new()
    assert session.undo() == session.redo() == ""
    session.row = 0
    session.change("add here", _insert, row=1)
    assert (session.history.undo_name, session.row) == ("add here", 1)
    assert session.undo() == "add here"
    assert (session.history.undo_name, session.history.redo_name, session.row) == ("", "add here", 0)
    assert session.redo() == "add here"
    assert session.row == 1


def test_a_change_that_changes_nothing_is_no_step(session: Session) -> None:
    session.new()
    assert not session.change("nothing", lambda plan: edit.set_plan(plan, title=plan.title))
    assert session.history.undo_name == ""


def test_a_refused_change_leaves_everything_as_it_was(session: Session, plan_file: Path) -> None:
    session.open(plan_file)
    before = session.plan
    with pytest.raises(EditError):
        session.change("no", lambda plan: edit.delete_waypoint(plan, 99), row=7)
    assert session.plan is before
    assert session.row == 0
    assert not session.is_changed


def test_saving_ends_the_change_and_undoing_past_it_is_one(session: Session, plan_file: Path) -> None:
    session.open(plan_file)
    session.change("add", _insert)
    changed = [session.is_changed]
    for step in (session.save, session.undo, session.redo):
        step()
        changed.append(session.is_changed)
    assert changed == [True, False, True, False]
    assert read_plan(plan_file.read_bytes(), "").plan == session.plan


@pytest.mark.parametrize("demo", DEMOS, ids=lambda path: path.stem)
def test_a_plan_that_was_not_edited_is_saved_to_the_byte(session: Session, tmp_path: Path, demo: Path) -> None:
    path = tmp_path / demo.name
    shutil.copy(demo, path)
    session.open(path)
    session.change("add", _insert)
    session.undo()
    session.save()
    assert path.read_bytes() == demo.read_bytes()


def test_a_plan_without_a_file_is_saved_only_under_a_name(session: Session, tmp_path: Path) -> None:
    session.new()
    session.change("add", _insert)
    with pytest.raises(NoFileError):
        session.save()
    with pytest.raises(NoFileError):
        session.revert()
    session.save_as(tmp_path / "new.toml")
    assert session.path == tmp_path / "new.toml"
    assert not session.is_changed
    assert list(session.state.folder.glob("unnamed*")) == []
    session.close()


def test_a_file_changed_by_someone_else_is_not_overwritten(session: Session, plan_file: Path) -> None:
    session.open(plan_file)
    session.change("add", _insert)
    theirs = plan_file.read_bytes() + b"# theirs\n"
    plan_file.write_bytes(theirs)
    with pytest.raises(ChangedOnDiskError):
        session.save()
    assert plan_file.read_bytes() == theirs
    session.save(over_others=True)
    assert plan_file.read_bytes() == write_plan(session.plan)
    plan_file.unlink()
    with pytest.raises(ChangedOnDiskError):
        session.save()


def test_save_as_overwrites_only_when_told(session: Session, plan_file: Path, tmp_path: Path) -> None:
    other = tmp_path / "other.toml"
    other.write_text("mine", encoding="utf-8")
    session.open(plan_file)
    with pytest.raises(WouldOverwriteError):
        session.save_as(other)
    assert other.read_text(encoding="utf-8") == "mine"
    assert session.path == plan_file
    session.save_as(other, over_others=True)
    assert session.path == other
    assert _hidden(tmp_path) == [".other.toml.recovery"]


def test_reverting_is_a_step_that_can_be_undone(session: Session, plan_file: Path) -> None:
    session.open(plan_file)
    session.change("add", _insert)
    changed = session.plan
    session.revert()
    assert not session.is_changed
    assert len(session.plan.waypoints) == len(changed.waypoints) - 1
    session.undo()
    assert session.plan is changed
    assert session.is_changed


def test_a_bad_file_opens_nothing_and_leaves_what_was_open(session: Session, plan_file: Path, tmp_path: Path) -> None:
    session.open(plan_file)
    session.change("add", _insert)
    before = session.plan
    bad = tmp_path / "bad.toml"
    bad.write_text('legbook = 1\n[[waypoint]]\nposition = "nowhere"\n', encoding="utf-8")
    with pytest.raises(PlanFileError):
        session.open(bad)
    with pytest.raises(FileNotFoundError):
        session.open(tmp_path / "missing.toml")
    assert session.plan is before
    assert session.path == plan_file
    assert session.history.undo_name == "add"


def test_the_second_copy_of_a_plan_is_told(session: Session, plan_file: Path) -> None:
    session.open(plan_file)
    second = Session(session.state)
    second.open(plan_file)
    assert session.recovery.also_open is None
    assert second.recovery.also_open is not None
    assert second.recovery.also_open.pid > 0
    second.close()
    session.close()
    third = Session(session.state)
    third.open(plan_file)
    assert third.recovery.also_open is None
    third.close()
    assert _hidden(plan_file.parent) == []


def test_recent_plans_stand_newest_first_and_only_while_they_exist(tmp_path: Path) -> None:
    state = State(tmp_path / "state")
    paths = [tmp_path / f"{number}.toml" for number in range(MOST_RECENT + 3)]
    for path in paths:
        path.touch()
        state.remember(path)
    state.remember(paths[-2])
    paths[-3].unlink()
    assert state.recent()[:2] == (paths[-2], paths[-1])
    assert paths[-3] not in state.recent()
    assert len(state.recent()) < MOST_RECENT + 1


def test_without_a_folder_to_write_to_the_plan_still_opens(plan_file: Path, tmp_path: Path) -> None:
    blocked = tmp_path / "blocked"
    blocked.write_text("a file where the folder should be", encoding="utf-8")
    session = Session(State(blocked))
    session.new()
    assert session.recovery.trouble
    assert session.change("add", _insert)
    assert session.state.recent() == ()


@pytest.mark.skipif(not hasattr(os, "mkfifo"), reason="a named pipe is a thing of POSIX")
def test_a_pipe_is_refused_and_not_waited_for(tmp_path: Path) -> None:
    os.mkfifo(tmp_path / "pipe.toml")
    with pytest.raises(OSError, match="no plain file"):
        Session(State(tmp_path / "state")).open(tmp_path / "pipe.toml")
