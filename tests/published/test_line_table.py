"""Both lines against GeodSolve and RhumbSolve 2.1.2 (GeographicLib), on the legs stored by make_line_table.py."""

from __future__ import annotations

import csv
from pathlib import Path

import numpy as np
import pytest

from navcore.angles import wrap_180
from navcore.earth.figure import FIGURES
from navcore.lines import great_circle, rhumb_line
from navcore.trigonometry import FloatArray

Columns = dict[str, FloatArray]

with Path(__file__).with_name("line_table.csv").open(encoding="utf-8", newline="") as file:
    ROWS = list(csv.DictReader(file))
NUMBERS = [name for name in ROWS[0] if name not in {"kind", "figure"}]


def columns(figure_name: str) -> Columns:
    rows = [row for row in ROWS if row["figure"] == figure_name]
    return {name: np.array([float(row[name] or "nan") for row in rows]) for name in NUMBERS}


def ends(table: Columns) -> tuple[FloatArray, FloatArray, FloatArray, FloatArray]:
    return table["lat1_deg"], table["lon1_deg"], table["lat2_deg"], table["lon2_deg"]


def assert_courses_agree(found_deg: FloatArray, table: Columns, course: str, distance: str) -> None:
    """1e-7 degrees or 10 nm sideways, whichever is larger."""
    told = ~np.isnan(table[course])
    off_deg = np.abs(wrap_180(found_deg[told] - table[course][told]))
    allowed_deg = np.maximum(1e-7, np.degrees(10e-9 / table[distance][told]))
    assert np.all(off_deg <= allowed_deg), off_deg.max()


def test_the_table_is_whole() -> None:
    assert len(ROWS) >= 600
    assert {row["figure"] for row in ROWS} == set(FIGURES)
    assert sum(row["rl_distance_m"] == "" for row in ROWS) <= 40


@pytest.mark.parametrize("figure_name", FIGURES)
def test_rhumb_lines_agree_within_a_micrometre(figure_name: str) -> None:
    table = columns(figure_name)
    found = rhumb_line.inverse(*ends(table), FIGURES[figure_name])
    told = ~np.isnan(table["rl_distance_m"])
    assert found.distance_m[told] == pytest.approx(table["rl_distance_m"][told], rel=0.0, abs=1e-6)
    assert_courses_agree(found.course_deg, table, "rl_course_deg", "rl_distance_m")


@pytest.mark.parametrize("figure_name", FIGURES)
def test_great_circles_agree_within_15_nanometres(figure_name: str) -> None:
    table = columns(figure_name)
    found = great_circle.inverse(*ends(table), FIGURES[figure_name])
    assert found.distance_m == pytest.approx(table["gc_distance_m"], rel=0.0, abs=15e-9)
    assert_courses_agree(found.initial_course_deg, table, "gc_initial_course_deg", "gc_distance_m")
    assert_courses_agree(found.final_course_deg, table, "gc_final_course_deg", "gc_distance_m")


@pytest.mark.parametrize("figure_name", FIGURES)
def test_the_same_distances_lead_back_to_the_ends(figure_name: str) -> None:
    table = columns(figure_name)
    told = ~np.isnan(table["rl_distance_m"]) & ~np.isnan(table["gc_initial_course_deg"])
    lat1, lon1, lat2, lon2 = (end[told] for end in ends(table))
    figure = FIGURES[figure_name]
    by_rhumb = rhumb_line.direct(lat1, lon1, table["rl_course_deg"][told], table["rl_distance_m"][told], figure)
    circle = table["gc_initial_course_deg"][told], table["gc_distance_m"][told]
    by_circle = great_circle.direct(lat1, lon1, *circle, figure)
    for reached_lat, reached_lon in (by_rhumb, by_circle[:2]):
        off_m = great_circle.inverse(reached_lat, reached_lon, lat2, lon2, figure).distance_m
        assert np.all(off_m <= 1e-6), off_m.max()
