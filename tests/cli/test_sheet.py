"""legbook sheet: its options and what it says."""

from __future__ import annotations

import argparse
import json
from typing import TYPE_CHECKING

import pytest

from navcore.errors import NoAnswerError, ParseError
from tests.support import ROOT, legbook
from tui.cli.exit_codes import ExitCode
from tui.cli.sheet import VERB

if TYPE_CHECKING:
    from pathlib import Path

NORTH_PACIFIC = str(ROOT / "routes_demo" / "north_pacific_winter.toml")
POLAR = str(ROOT / "routes_demo" / "polar_flight.toml")


def run(*words: str) -> ExitCode:
    parser = argparse.ArgumentParser()
    VERB.add_arguments(parser)
    return VERB.run(parser.parse_args([*words, "--no-coast"]))


def test_a_pdf_goes_to_standard_output_as_bytes(capfdbinary: pytest.CaptureFixture[bytes]) -> None:
    assert run(NORTH_PACIFIC) is ExitCode.DONE
    out, err = capfdbinary.readouterr()
    assert out.startswith(b"%PDF-")
    assert err == b""


@pytest.mark.parametrize(("ending", "begins"), [("pdf", b"%PDF-"), ("svg", b"<?xml"), ("json", b"{")])
def test_the_ending_of_the_file_says_what_it_becomes(
    tmp_path: Path, ending: str, begins: bytes, capsys: pytest.CaptureFixture[str]
) -> None:
    out = tmp_path / f"sheet.{ending}"
    assert run(NORTH_PACIFIC, "-o", str(out)) is ExitCode.DONE
    assert out.read_bytes().startswith(begins)
    assert "Mercator, 1:30000000, 1 sheet of A4" in capsys.readouterr().err


def document(capfdbinary: pytest.CaptureFixture[bytes], *words: str) -> dict[str, object]:
    assert run(*words, "--as", "json") is ExitCode.DONE
    read: dict[str, object] = json.loads(capfdbinary.readouterr().out)
    return read


@pytest.mark.parametrize("scale", ["12500000", "1:12500000", "12,500,000", "1:12 500 000"])
def test_a_scale_is_read_as_people_write_it(scale: str, capfdbinary: pytest.CaptureFixture[bytes]) -> None:
    assert document(capfdbinary, NORTH_PACIFIC, "--scale", scale)["scale"] == 12.5e6


def test_every_option_reaches_the_sheet(capfdbinary: pytest.CaptureFixture[bytes]) -> None:
    words = ("--projection", "lambert", "--true-scale", "44N,50N", "--meridian", "175W", "--paper", "A1", "--portrait")
    found = document(capfdbinary, NORTH_PACIFIC, *words, "--margin", "12")
    assert "+proj=lcc +lat_1=44.0 +lat_2=50.0" in str(found["proj"])
    assert "+lon_0=-175.0" in str(found["proj"])
    assert found["paper_mm"] == [594.0, 841.0]
    assert found["frame_mm"] == [594.0 - 2 * 20.0, pytest.approx(841.0 - 2 * 20.0 - 34.0 - 7.0)]


def test_corners_show_another_area(capfdbinary: pytest.CaptureFixture[bytes]) -> None:
    found = document(capfdbinary, NORTH_PACIFIC, "--corners", "48N 130W", "52N 120W")
    assert isinstance(found["scale"], float)
    assert found["scale"] < 1e7


def test_one_sheet_of_a_set_is_chosen_for_svg_and_json(
    capfdbinary: pytest.CaptureFixture[bytes],
) -> None:
    assert document(capfdbinary, NORTH_PACIFIC, "--scale", "10000000", "--sheet", "2")["sheet"] == 2
    assert run(NORTH_PACIFIC, "--scale", "10000000", "--as", "svg") is ExitCode.WRONG_USAGE
    assert b"give --sheet 1 to 3, or 0 for the index" in capfdbinary.readouterr().err
    assert run(NORTH_PACIFIC, "--scale", "10000000", "--as", "svg", "--sheet", "0") is ExitCode.DONE
    assert b"index of sheets" in capfdbinary.readouterr().out
    assert run(NORTH_PACIFIC, "--as", "json", "--sheet", "2") is ExitCode.WRONG_USAGE
    assert run(NORTH_PACIFIC, "--sheet", "1") is ExitCode.WRONG_USAGE


def test_what_can_not_be_drawn_or_read_is_said() -> None:
    with pytest.raises(NoAnswerError, match="stereographic"):
        run(POLAR)
    for scale in ("big", "0", "-5", "1:"):
        with pytest.raises(ParseError, match="2500000"):
            run(NORTH_PACIFIC, f"--scale={scale}")


@pytest.mark.parametrize(
    ("words", "said"),
    [
        (("--true-scale", "40N,50N"), "a mercator sheet takes one latitude of true scale; type --true-scale 40N"),
        (("--projection", "lambert", "--true-scale", "40N,45N,50N"), "takes two latitudes of true scale"),
        (
            ("--projection", "gnomonic", "--true-scale", "40N"),
            "takes no latitude of true scale; leave --true-scale out",
        ),
        (("--true-scale", "90N"), "a mercator sheet has no scale at a pole"),
        (("--margin", "-5"), "this is no margin; type 0 to 40 for --margin"),
    ],
)
def test_what_a_projection_does_not_take_is_refused_not_ignored(words: tuple[str, ...], said: str) -> None:
    done = legbook("sheet", NORTH_PACIFIC, *words, "--as", "json")
    assert done.returncode == 2
    assert said in done.stderr.decode()
    assert not done.stdout


def test_parallels_without_a_cone_are_refused_in_words() -> None:
    done = legbook("sheet", NORTH_PACIFIC, "--projection", "lambert", "--true-scale", "40N,40S", "--as", "json")
    assert done.returncode == 1
    assert b"no Lambert cone fits these parallels" in done.stderr
