"""Edits at random: a strategy of named edits that fit any plan, and the loop that is killed."""

from __future__ import annotations

import os
import random
import sys
from pathlib import Path
from typing import TYPE_CHECKING

from navcore.plan import edit
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.revision import fingerprint
from navcore.position import Position
from tui.session import Session
from tui.state import State

if TYPE_CHECKING:
    from collections.abc import Callable

EDITS = ("insert", "delete", "move", "reverse", "duplicate", "name", "line", "speed", "title")


def make_edit(name: str, chance: random.Random) -> Callable[[Plan], Plan]:
    """Return an edit of that name at a place that the plan has."""
    makers: dict[str, Callable[[Plan, int], Plan]] = {
        "title": lambda plan, _: edit.set_plan(plan, title=f"Passage {chance.random()}"),
        "reverse": lambda plan, _: edit.reverse(plan),
        "delete": edit.delete_waypoint,
        "move": lambda plan, at: edit.move_waypoint(plan, at, chance.randrange(len(plan.waypoints))),
        "duplicate": edit.duplicate_waypoint,
        "name": lambda plan, at: edit.set_waypoint(plan, at, Waypoint("renamed\n", plan.waypoints[at].position)),
        "line": lambda plan, at: _leg_edited(plan, at, Leg(chance.choice([Line.RHUMB, Line.GREAT_CIRCLE, None]))),
        "speed": lambda plan, at: _leg_edited(plan, at, Leg(speed_kn=chance.uniform(1, 30), notes=(("charts", "1"),))),
    }

    def edited(plan: Plan) -> Plan:
        count = len(plan.waypoints)
        if name == "insert" or not count:
            position = Position(chance.uniform(-80, 80), chance.uniform(-180, 180))
            return edit.insert_waypoint(plan, chance.randint(0, count), Waypoint("[/b] ␛\u202e", position))
        return makers[name](plan, chance.randrange(count))

    return edited


def _leg_edited(plan: Plan, end: int, leg: Leg) -> Plan:
    return edit.set_leg(plan, end - 1, leg) if end else plan


def edit_for_ever(folder: Path, seed: int) -> None:
    """Change a plan again and again, and say after each change, once it is committed, what the plan has become."""
    session = Session(State(folder / "state"))
    session.open(folder / "plan.toml")
    chance = random.Random(seed)
    os.write(1, f"open {fingerprint(session.plan)}\n".encode())
    while True:
        way = chance.choice([*EDITS, "undo", "redo"])
        if way == "undo":
            session.undo()
        elif way == "redo":
            session.redo()
        else:
            session.change(way, make_edit(way, chance))
        os.write(1, f"{way} {fingerprint(session.plan)}\n".encode())


if __name__ == "__main__":
    edit_for_ever(Path(sys.argv[1]), int(sys.argv[2]))
