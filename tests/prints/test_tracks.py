"""Composites and parts as they are printed: the same figures in every medium."""

from __future__ import annotations

import csv
import io
import json

import pytest

from navcore.errors import NoAnswerError
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import Solution, solve
from navcore.position import Position
from navcore.prints.csv import write_csv
from navcore.prints.json import write_json
from navcore.prints.leg_table import make_leg_table
from navcore.prints.markdown import write_markdown
from navcore.prints.text import write_text
from navcore.sailings.parts import parse_parts

WAYPOINTS = (
    Waypoint("Salal Roads", Position(48.5, -125.0 - 20.0 / 60.0)),
    Waypoint("Kuromatsu Bay", Position(41.0 + 20.0 / 60.0, 143.0)),
)


def solved(limit_deg: float = 50.0) -> Solution:
    return solve(Plan(WAYPOINTS, (Leg(Line.COMPOSITE, limit_deg, parse_parts("3 NM apart")),), speed_kn=13.5))


def test_parts_stand_as_rows_beneath_the_leg_in_every_medium() -> None:
    solution = solved()
    table = make_leg_table(solution)
    parts = solution.legs[0].parts
    assert parts is not None
    count = len(parts.distances_m)
    rows = [row for row in csv.reader(io.StringIO(write_csv(table), newline="")) if row[0] == "part"]
    assert len(rows) == count
    text = write_text(table).splitlines()
    markdown = write_markdown(table).splitlines()
    for number, row in enumerate(rows, 1):
        figures = [cell for cell in row[1:] if cell]
        label, latitude, longitude, course, distance = figures
        assert label == f"1.{number}"
        (line,) = (line for line in text if line.split()[:1] == [label])
        assert line.split() == [label, course, distance, "NM", "to", latitude, longitude]
        (record,) = (line for line in markdown if line.startswith(f"| {label} |"))
        assert distance in record
    assert rows[-1][3:5] == ["41°20.0'N", "143°00.0'E"]


def test_json_has_the_parts_and_the_composite_unrounded() -> None:
    solution = solved()
    (leg,) = json.loads(write_json(solution))["legs"]
    parts = solution.legs[0].parts
    assert parts is not None
    assert [part["distance_nmi"] * 1852.0 for part in leg["parts"]["legs"]] == pytest.approx(parts.distances_m)
    assert len(leg["parts"]["points"]) == len(leg["parts"]["legs"]) + 1
    assert leg["parts"]["greatest_separation_nmi"] <= 3.0
    assert sum(part["distance_nmi"] for part in leg["parts"]["legs"]) == pytest.approx(leg["distance_nmi"])
    assert len(leg["composite"]["tangent_points"]) == 2
    assert len(leg["composite"]["arcs_nmi"]) == 3


def test_a_leg_that_is_neither_has_neither() -> None:
    (leg,) = json.loads(write_json(solve(Plan(WAYPOINTS, (Leg(),)))))["legs"]
    assert leg["parts"] is None
    assert leg["composite"] is None


def test_a_refused_composite_refuses_the_table_by_its_leg() -> None:
    with pytest.raises(NoAnswerError, match=r"leg 1, Salal Roads to Kuromatsu Bay: the limit .* is equatorward"):
        make_leg_table(solved(45.0))


def test_a_great_circle_within_the_limit_is_said_on_the_table() -> None:
    assert "the great circle keeps within 60°00.0'N" in " ".join(write_text(make_leg_table(solved(60.0))).split())
