from __future__ import annotations

import shutil
from typing import TYPE_CHECKING

import pytest

from tests.support import ROOT
from tests.workbook import LARGE, MIDDLE, Desk, use

if TYPE_CHECKING:
    from pathlib import Path

DEMO = ROOT / "routes_demo" / "north_pacific_winter.toml"


@pytest.fixture
def plan(tmp_path: Path) -> Path:
    path = tmp_path / "plan.toml"
    shutil.copy(DEMO, path)
    return path


@pytest.mark.parametrize("size", [LARGE, MIDDLE], ids=["120x40", "80x24"])
def test_the_worksheet_of_a_leg_is_read_and_written(tmp_path: Path, plan: Path, size: tuple[int, int]) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("down", "h")
        await desk.sees("Hand check")
        await desk.sees("Leg 1 → 2: Salal Roads to Join the parallel")
        await desk.press("pagedown", "f")
        await desk.sees("Write the worksheet")
        await desk.press("enter")
        await desk.sees("worksheet written to")

    use(journey, tmp_path / "state", plan, size=size)
    assert (tmp_path / "plan-leg-1.pdf").read_bytes().startswith(b"%PDF")


def test_the_legs_are_compared_and_another_plan_beside_them(tmp_path: Path, plan: Path) -> None:
    other = tmp_path / "other.toml"
    shutil.copy(ROOT / "routes_demo" / "southern_ocean_survey.toml", other)

    async def journey(desk: Desk) -> None:
        await desk.press("v")
        await desk.sees("all by great circle")
        await desk.press("o")
        await desk.sees("Open a plan")
        await desk.type(str(other), "enter")
        await desk.sees("other.toml")
        await desk.sees("5520.3 NM")
        await desk.press("escape")

    session = use(journey, tmp_path / "state", plan, size=LARGE)
    assert session.plan.title == "Salal Roads to Kuromatsu Bay"


def test_another_systems_figures_are_explained(tmp_path: Path, plan: Path) -> None:
    async def journey(desk: Desk) -> None:
        await desk.press("down", "k")
        await desk.sees("Another system shows for leg 1")
        await desk.type("727.5")
        await desk.press("down")
        await desk.type("284.1", "enter")
        await desk.sees("great circle on the sphere, 1' of arc = 1 NM")
        await desk.press("escape")

    use(journey, tmp_path / "state", plan, size=LARGE)


def test_without_a_leg_it_is_said(tmp_path: Path) -> None:
    async def journey(desk: Desk) -> None:
        for key in ("h", "v", "k"):
            await desk.press(key)
            await desk.sees("there is no leg yet")

    use(journey, tmp_path / "state", size=MIDDLE)
