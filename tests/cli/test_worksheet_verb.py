"""legbook worksheet."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

import pytest

from tests.support import ROOT, legbook

if TYPE_CHECKING:
    from pathlib import Path

NORTH_PACIFIC = str(ROOT / "routes_demo" / "north_pacific_winter.toml")


@pytest.mark.parametrize("medium", ["text", "pdf", "json"])
def test_a_plan_has_worksheets_in_every_medium(medium: str) -> None:
    done = legbook("worksheet", NORTH_PACIFIC, "--as", medium)
    assert done.returncode == 0, done.stderr
    assert done.stdout
    assert done.stderr == b""


def test_one_leg_alone() -> None:
    done = legbook("worksheet", NORTH_PACIFIC, "--leg", "2", "--as", "json")
    assert [leg["leg"] for leg in json.loads(done.stdout)["legs"]] == [2]
    text = legbook("worksheet", NORTH_PACIFIC, "--leg", "2").stdout.decode()
    assert text.startswith("Leg 2 → 3")
    assert "\f" not in text


@pytest.mark.parametrize("leg", ["0", "99"])
def test_a_leg_that_is_not_there_is_wrong_usage(leg: str) -> None:
    done = legbook("worksheet", NORTH_PACIFIC, "--leg", leg)
    assert done.returncode == 2
    assert b"the plan has no leg" in done.stderr


def test_a_file_is_written_and_its_ending_names_the_medium(tmp_path: Path) -> None:
    target = tmp_path / "sheet.pdf"
    done = legbook("worksheet", NORTH_PACIFIC, "-o", str(target))
    assert done.returncode == 0
    assert done.stdout == b""
    assert target.read_bytes().startswith(b"%PDF")
