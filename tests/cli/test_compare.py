"""legbook compare."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

from tests.support import ROOT, legbook

if TYPE_CHECKING:
    from pathlib import Path

NORTH_PACIFIC = str(ROOT / "routes_demo" / "north_pacific_winter.toml")
SOUTHERN_OCEAN = str(ROOT / "routes_demo" / "southern_ocean_survey.toml")


def test_plans_stand_side_by_side_in_text_and_json() -> None:
    done = legbook("compare", NORTH_PACIFIC, SOUTHERN_OCEAN, "--json")
    assert done.returncode == 0, done.stderr
    plans = json.loads(done.stdout)["plans"]
    assert [plan["file"] for plan in plans] == [NORTH_PACIFIC, SOUTHERN_OCEAN]
    text = legbook("compare", NORTH_PACIFIC, SOUTHERN_OCEAN).stdout.decode()
    for plan in plans:
        assert (
            plan["sailed"]["distance_nmi"]
            == json.loads(legbook("table", plan["file"], "--as", "json").stdout)["total_nmi"]
        )
        assert f"{plan['sailed']['distance_nmi']:.1f} NM" in text
        assert set(plan["legs"][0]) == {
            "line", "sailed", "rhumb_line", "great_circle", "composite", "saving_nmi", "saving_percent", "saving_hours",
            "greatest_separation_nmi", "sphere_less_wgs_84_nmi",
        }  # fmt: skip
    assert "Planning aid only" in text


def test_a_refused_leg_is_named_and_ends_in_1(tmp_path: Path) -> None:
    plan = tmp_path / "refused.toml"
    plan.write_text(
        'legbook = 1\n\n[[waypoint]]\nposition = "50°N 000°E"\n\n'
        '[[waypoint]]\nposition = "50°N 040°E"\nline = "composite"\nlimit = "40°N"\n',
        encoding="utf-8",
    )
    done = legbook("compare", str(plan), "--json")
    assert done.returncode == 1
    assert b"leg 1: the limit" in done.stderr
    assert json.loads(done.stdout)["plans"][0]["sailed"]["distance_nmi"] is None
