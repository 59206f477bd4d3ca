"""Points and crossings of a leg by the command line."""

from __future__ import annotations

import json

import pytest

from tests.support import legbook

LEG = ("leg", "21°10.0'N 157°55.0'W", "36°00.0'S 175°10.0'E", "--figure", "sphere")


def tracks_of(*words: str) -> dict[str, dict[str, list[dict[str, float | str]]]]:
    done = legbook(*LEG, *words, "--json")
    assert done.returncode == 0, done.stderr
    return {track["line"]: track for track in json.loads(done.stdout)["tracks"]}


def test_crossings_of_the_equator_and_of_180_are_those_worked_by_hand() -> None:
    """Computed once more by textbook formulas on the sphere, outside the project."""
    tracks = tracks_of("--parallel", "00N", "--meridian", "180W")
    for line, lon_deg, equator_nmi, lat_deg in (
        ("great circle", -(167 + 12.3 / 60), 1381.75, -(27 + 58.95 / 60)),
        ("rhumb line", -(167 + 35.3 / 60), 1390.8, -(26 + 46.5 / 60)),
    ):
        equator, date_line = sorted(tracks[line]["points"], key=lambda point: point["distance_nmi"])
        assert equator["lon_deg"] == pytest.approx(lon_deg, abs=0.1 / 60)
        assert equator["distance_nmi"] == pytest.approx(equator_nmi, abs=0.1)
        assert date_line["lat_deg"] == pytest.approx(lat_deg, abs=0.1 / 60)


def test_a_point_at_a_time_is_the_one_at_its_distance() -> None:
    by_time, by_distance = tracks_of("--at", "10h", "--speed", "18"), tracks_of("--at", "180 NM")
    assert by_time == by_distance
    assert by_time["rhumb line"]["points"][0]["distance_nmi"] == pytest.approx(180.0)


def test_a_position_beside_the_line_has_its_side() -> None:
    tracks = tracks_of("--beside", "00N 160W", "--beside", "00N 175W")
    for track in tracks.values():
        assert [off["side"] for off in track["beside"]] == ["port", "starboard"]


def test_every_meridian_is_listed_with_its_latitude() -> None:
    points = tracks_of("--meridians", "10")["great circle"]["points"]
    assert [round(float(point["lon_deg"])) % 360 for point in points] == [200, 190, 180]


@pytest.mark.parametrize("words", [["--at", "12h"], ["--meridians", "0"], ["--meridian", "50N"]])
def test_what_cannot_be_asked_is_wrong_usage(words: list[str]) -> None:
    done = legbook(*LEG, *words)
    assert done.returncode == 2
    assert b"Traceback" not in done.stderr


def test_a_point_beyond_the_leg_does_not_exist() -> None:
    done = legbook(*LEG, "--at", "9999 NM")
    assert done.returncode == 1
    assert b"beyond the end of every line" in done.stderr
    assert done.stdout.count(b"9999.0 NM is not on the line, which is") == 2


def test_a_point_that_only_one_line_has_is_given_and_the_other_says_its_length() -> None:
    done = legbook("leg", "50N030W", "46N040W", "--at", "468.7NM")
    words = done.stdout.decode()
    assert done.returncode == 0
    assert "468.7 NM is not on the line, which is 468.5 NM long" in words
    assert "after 468.7 NM" in words


def test_a_line_that_runs_along_what_was_asked_says_so_and_none_is_told_from_that() -> None:
    words = legbook("leg", "50N030W", "40N030W", "--meridian", "30W", "--meridian", "10W").stdout.decode()
    assert words.count("meridian 030°00.0'W: the line runs along it") == 2
    assert words.count("meridian 010°00.0'W: the line does not cross it") == 2
    asked = json.loads(legbook("leg", "50N030W", "50N010W", "--parallel", "50N", "--json").stdout)["tracks"]
    assert asked[0]["none"] == [{"asked": "parallel 50°00.0'N", "why": "the line runs along it"}]
    assert len(asked[1]["points"]) == 2
    equator = json.loads(legbook("leg", "0N030W", "0N010W", "--parallel", "0N", "--json").stdout)["tracks"]
    assert [line["none"][0]["why"] for line in equator] == ["the line runs along it"] * 2


def test_a_time_along_the_leg_asks_for_a_speed() -> None:
    done = legbook(*LEG, "--at", "12h")
    assert done.returncode == 2
    assert b"give --speed too" in done.stderr


@pytest.mark.parametrize("step", ["0.0001", "1e-9", "1e-320"])
def test_meridians_too_close_to_lay_off_are_refused_at_once(step: str) -> None:
    done = legbook(*LEG, "--meridians", step)
    assert done.returncode == 1
    assert b"farther apart" in done.stderr
