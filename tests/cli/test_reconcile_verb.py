"""legbook reconcile."""

from __future__ import annotations

import json

from tests.support import legbook

ENDS = ("21 10N 157 55W", "36 00S 175 10E")


def test_the_best_explanation_is_first_in_json_and_text() -> None:
    done = legbook("reconcile", *ENDS, "--distance", "3755", "--course", "204", "--json")
    assert done.returncode == 0, done.stderr
    first = json.loads(done.stdout)["explanations"][0]
    assert set(first) == {"kind", "words", "distance_nmi", "course_deg", "misfit"}
    assert first["kind"] == "earth"
    assert first["words"].startswith("great circle on the sphere")
    text = legbook("reconcile", *ENDS, "--distance", "3755", "--course", "204").stdout.decode()
    assert text.index("great circle on the sphere") < text.index("sphere of radius 6366 km")
    assert "great circle on WGS 84" in text


def test_nothing_that_fits_is_said_plainly_and_ends_in_1() -> None:
    done = legbook("reconcile", *ENDS, "--distance", "1234.567", "--course", "12.345", "--json")
    assert done.returncode == 1
    assert json.loads(done.stdout) == {"explanations": []}
    assert b"nothing known explains these figures" in done.stderr


def test_two_that_fit_alike_are_said_to() -> None:
    done = legbook("reconcile", "50N 0E", "50 06N 0 06E", "--distance", "7.1")
    assert "explain the figures alike" in done.stdout.decode()


def test_the_digits_typed_say_how_finely_to_fit() -> None:
    coarse = json.loads(legbook("reconcile", *ENDS, "--distance", "3744", "--json").stdout)["explanations"]
    fine = json.loads(legbook("reconcile", *ENDS, "--distance", "3743.80", "--json").stdout)["explanations"]
    assert len(fine) < len(coarse)
    assert fine[0]["words"] == coarse[0]["words"] == "great circle on WGS 84"


def test_a_distance_that_is_none_is_wrong_usage() -> None:
    assert legbook("reconcile", *ENDS, "--distance", "far").returncode == 2
