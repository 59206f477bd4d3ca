"""legbook leg with a limit and with parts."""

from __future__ import annotations

import json
from typing import Any

import pytest

from tests.support import legbook

ENDS = ("48 30N 125 20W", "41 20N 143 00E")


def leg_json(*words: str, code: int = 0) -> dict[str, Any]:
    done = legbook("leg", *ENDS, *words, "--json")
    assert done.returncode == code, done.stderr
    document: dict[str, Any] = json.loads(done.stdout)
    return document


def test_a_composite_has_its_tangent_points_arcs_and_courses() -> None:
    track = leg_json("--limit", "50N", "--figure", "sphere")["composite"]
    assert set(track) == {
        "limit_deg", "distance_nmi", "tangent_points", "arcs_nmi", "initial_course_deg", "final_course_deg",
    }  # fmt: skip
    assert track["limit_deg"] == 50.0
    assert track["distance_nmi"] == pytest.approx(3740.0, abs=0.06)
    assert track["arcs_nmi"] == pytest.approx([727.5, 1185.9, 1826.5], abs=0.06)
    assert [point["lat_deg"] for point in track["tangent_points"]] == [50.0, 50.0]
    assert (track["initial_course_deg"], track["final_course_deg"]) == pytest.approx((284.1, 238.9), abs=0.06)


def test_a_leg_without_a_limit_has_no_composite() -> None:
    document = leg_json()
    assert document["composite"] is None
    assert document["composite_refused"] is None
    assert "parts" not in document


def test_a_refused_limit_says_why_and_ends_in_1() -> None:
    document = leg_json("--limit", "45N", code=1)
    assert document["composite"] is None
    assert "equatorward of an end" in document["composite_refused"]
    assert document["great_circle"]["distance_nmi"] > 0.0
    assert b"equatorward of an end" in legbook("leg", *ENDS, "--limit", "45N").stderr


def test_a_limit_that_the_great_circle_keeps_gives_it_and_says_so() -> None:
    document = leg_json("--limit", "60N")
    assert document["composite"]["distance_nmi"] == document["great_circle"]["distance_nmi"]
    assert document["composite"]["tangent_points"] == []
    assert "the great circle keeps within" in document["composite"]["note"]
    assert document["composite_refused"] is None


def test_several_limits_stand_side_by_side() -> None:
    words = ("--limit", "49N", "--limit", "50N", "--limit", "45N", "--speed", "13.5kn")
    rows = leg_json(*words)["limits"]
    assert [row["limit_deg"] for row in rows] == [49.0, 50.0, 45.0]
    assert rows[1]["extra_hours"] == pytest.approx(rows[1]["extra_nmi"] / 13.5)
    assert rows[2]["distance_nmi"] is None
    assert "equatorward" in rows[2]["refused"]
    text = legbook("leg", *ENDS, *words).stdout.decode()
    assert "50°00.0'N     3753.0 NM     62.3 NM       4 h 37 min" in text
    assert "45°00.0'N     refused" in text


def test_parts_are_points_legs_and_what_they_change() -> None:
    parts = leg_json("--parts", "1 NM apart")["parts"]
    assert set(parts) == {"points", "legs", "added_nmi", "greatest_separation_nmi"}
    assert len(parts["points"]) == len(parts["legs"]) + 1
    assert parts["points"][0] == {"lat_deg": 48.5, "lon_deg": pytest.approx(-125.0 - 20.0 / 60.0)}
    assert set(parts["legs"][0]) == {"course_deg", "distance_nmi"}
    assert 0.9 < parts["greatest_separation_nmi"] <= 1.0
    total_nmi = sum(leg["distance_nmi"] for leg in parts["legs"])
    assert total_nmi == pytest.approx(leg_json()["great_circle"]["distance_nmi"] + parts["added_nmi"])


def test_parts_under_a_limit_are_of_the_composite() -> None:
    document = leg_json("--limit", "50N", "--parts", "1 NM apart")
    assert document["composite"]["tangent_points"][0] in document["parts"]["points"]
    text = legbook("leg", *ENDS, "--limit", "50N", "--parts", "1 NM apart").stdout.decode()
    assert "18 parts, 3753.3 NM: 0.2 NM added, at most 0.89 NM from the true line" in text


def test_a_wrong_rule_or_limit_is_wrong_usage() -> None:
    for words in (("--parts", "lots"), ("--limit", "50")):
        done = legbook("leg", *ENDS, *words)
        assert done.returncode == 2
        assert done.stdout == b""
