from __future__ import annotations

import json
import os
import random
import shutil
import subprocess
import sys
import time
from typing import TYPE_CHECKING

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.plan import edit
from navcore.plan.model import Plan, Waypoint
from navcore.plan.revision import fingerprint
from navcore.position import Position
from tests.edits import EDITS, make_edit
from tests.strategies import plans
from tests.support import ROOT
from tui.journal import Journal, Typing
from tui.plan_record import apply_changes, record_changes
from tui.session import ChangedOnDiskError, Session
from tui.state import State

if TYPE_CHECKING:
    from pathlib import Path

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"
KILLS = int(os.environ.get("KILLS", "20"))


def _whole(plan: Plan) -> tuple[object, ...]:
    """Everything in a plan, what equality leaves out too."""
    return plan, plan.text, [waypoint.block for waypoint in plan.waypoints]


@given(plans(), plans())
@settings(max_examples=30)
def test_changes_survive_json_whatever_the_two_plans_are(before: Plan, after: Plan) -> None:
    delta = json.loads(json.dumps(record_changes(before, after)))
    assert _whole(apply_changes(before, delta)) == _whole(after)


@given(plans(min_size=2), st.sampled_from(EDITS), st.randoms(use_true_random=False))
@settings(max_examples=30)
def test_an_edit_records_no_more_than_it_touched(plan: Plan, name: str, chance: random.Random) -> None:
    after = make_edit(name, chance)(plan)
    delta = record_changes(plan, after)
    assert _whole(apply_changes(plan, delta)) == _whole(after)
    if name in {"insert", "duplicate", "name"}:
        assert len(delta["waypoints"]["items"]) <= 1
        assert len(delta["legs"]["items"] if "legs" in delta else []) <= 2


def _open(folder: Path) -> Session:
    session = Session(State(folder / "state"))
    session.open(folder / "plan.toml")
    return session


@pytest.fixture
def folder(tmp_path: Path) -> Path:
    shutil.copy(DEMO, tmp_path / "plan.toml")
    return tmp_path


def _crashed(folder: Path) -> Plan:
    """Leave a journal as a crash does, with two changes and an open row; return the plan."""
    session = _open(folder)
    session.change("title", lambda plan: edit.set_plan(plan, title="Changed"))
    session.change("add", lambda plan: edit.insert_waypoint(plan, 1, Waypoint("x", Position(1.0, 2.0))))
    session.typing = Typing(3, "48 30", waiting=((7, 4, "bad line"),))
    session.keep_typing()
    journal = folder / ".plan.toml.recovery"
    kept = journal.read_bytes()
    session.close()
    journal.write_bytes(kept)
    return session.plan


def test_what_a_crash_left_is_offered_and_can_be_undone(folder: Path) -> None:
    lost = _crashed(folder)
    session = _open(folder)
    assert session.recovery.offered is not None
    session.recover(accept=True)
    assert _whole(session.plan) == _whole(lost)
    assert session.typing == Typing(3, "48 30", waiting=((7, 4, "bad line"),))
    assert session.is_changed
    assert [session.undo(), session.undo(), session.undo()] == ["add", "title", ""]
    assert not session.is_changed


def test_a_second_crash_loses_nothing_of_what_was_recovered(folder: Path) -> None:
    _crashed(folder)
    session = _open(folder)
    session.recover(accept=True)
    session.change("reverse", edit.reverse)
    journal = folder / ".plan.toml.recovery"
    kept = journal.read_bytes()
    session.close()
    journal.write_bytes(kept)
    again = _open(folder)
    again.recover(accept=True)
    assert again.plan == session.plan


def test_what_was_offered_and_not_answered_is_offered_again(folder: Path) -> None:
    _crashed(folder)
    _open(folder).close()
    assert _open(folder).recovery.offered is not None


def test_what_was_given_up_is_gone(folder: Path) -> None:
    _crashed(folder)
    session = _open(folder)
    session.recover(accept=False)
    assert not session.is_changed
    session.close()
    assert _open(folder).recovery.offered is None


def test_a_file_that_was_changed_since_the_crash_is_not_overwritten(folder: Path) -> None:
    _crashed(folder)
    (folder / "plan.toml").write_bytes(DEMO.read_bytes() + b"# theirs\n")
    session = _open(folder)
    session.recover(accept=True)
    with pytest.raises(ChangedOnDiskError):
        session.save()


@pytest.mark.parametrize(("cut", "more"), [(1, b""), (5, b""), (40, b""), (200, b""), (0, b'{"step": "x"}\n')])
def test_what_was_cut_off_or_makes_no_sense_ends_what_is_recovered(folder: Path, cut: int, more: bytes) -> None:
    _crashed(folder)
    journal = folder / ".plan.toml.recovery"
    whole = journal.read_bytes()
    journal.write_bytes(whole[: len(whole) - cut] + more)
    session = _open(folder)
    session.recover(accept=True)
    assert session.plan.title == "Changed"
    session.change("reverse", edit.reverse)
    kept = journal.read_bytes()
    session.close()
    journal.write_bytes(kept)
    again = _open(folder)
    again.recover(accept=True)
    assert again.plan == session.plan


@pytest.mark.parametrize(
    "text",
    [
        b"",
        b"\x00\x00\x00\n",
        b"[]\n",
        b'{"step": 1}\n',
        b'{"base": {}, "mark": ""}\n{"step": "x", "changes": 7}\n',
        b"{" * 9999,
    ],
)
def test_a_journal_that_makes_no_sense_offers_nothing(folder: Path, text: bytes) -> None:
    (folder / ".plan.toml.recovery").write_bytes(text)
    session = _open(folder)
    assert session.recovery.offered is None
    assert session.change("reverse", edit.reverse)


def test_an_unnamed_plan_is_offered_at_the_next_start(tmp_path: Path) -> None:
    state = State(tmp_path / "state")
    session = Session(state)
    session.new()
    session.change("title", lambda plan: edit.set_plan(plan, title="Changed"))
    (journal,) = state.folder.glob("unnamed*")
    kept = journal.read_bytes()
    session.close()
    (state.folder / "unnamed-1-1.recovery").write_bytes(b"")
    (state.folder / "unnamed-2-2.recovery").write_bytes(kept)
    again = Session(state)
    again.new()
    again.recover(accept=True)
    assert again.plan == session.plan
    again.close()
    assert list(state.folder.glob("unnamed*")) == []


def test_a_change_to_a_plan_of_a_thousand_waypoints_is_a_short_line(tmp_path: Path) -> None:
    state = State(tmp_path)
    session = Session(state)
    session.new()
    points = tuple(Waypoint(f"{number}", Position(number / 20, number / 10)) for number in range(1000))
    plan = Plan()
    for point in points:
        plan = edit.insert_waypoint(plan, len(plan.waypoints), point)
    session.change("all", lambda _: plan)
    (journal,) = state.folder.glob("unnamed*")
    size = journal.stat().st_size
    session.change("add", lambda plan: edit.insert_waypoint(plan, 500, points[0]))
    assert journal.stat().st_size - size < 400
    session.close()


def test_a_killed_process_loses_no_committed_change(folder: Path) -> None:
    chance = random.Random(1)
    for kill in range(KILLS):
        said = _run_and_kill(folder, kill, chance.uniform(0.0, 0.05))
        journal = Journal(folder / ".plan.toml.recovery")
        found = journal.recovered()
        journal.close()
        if len(said) == 1:
            continue
        # The last change may have been committed before it could be said: one more, and never one less.
        assert found is not None
        recovered = fingerprint(found.steps[-1][1] if found.steps else found.base)
        assert len(found.steps) > 0
        marks = [fingerprint(found.base), *(fingerprint(plan) for _, plan in found.steps)]
        assert said[-1] in marks[-2:], f"kill {kill}: {recovered}"
        assert _in_order(said, marks)


def _in_order(said: list[str], marks: list[str]) -> bool:
    """Say whether every mark that was said stands in the journal, in that order; what changed nothing is said twice."""
    rest = iter(marks)
    current = next(rest)
    for mark in said:
        while mark != current:
            following = next(rest, None)
            if following is None:
                return False
            current = following
    return True


def _run_and_kill(folder: Path, seed: int, after_s: float) -> list[str]:
    """Start the loop of edits, kill it at a random moment, and return the fingerprints that it had said by then."""
    words = [sys.executable, str(ROOT / "tests" / "edits.py"), str(folder), str(seed)]
    with subprocess.Popen(words, stdout=subprocess.PIPE, env={"PYTHONPATH": str(ROOT)}) as process:
        assert process.stdout is not None
        first = process.stdout.readline()
        time.sleep(after_s)
        process.kill()
        rest = process.stdout.read()
    lines = (first + rest).decode().splitlines(keepends=True)
    return [line.split()[1] for line in lines if line.endswith("\n")]
