from __future__ import annotations

from typing import TYPE_CHECKING

import pytest

from navcore.plan.model import Plan, Trade
from navcore.plan.quantities import QUANTITIES
from navcore.plan.solve import solve
from navcore.prints.paper.page_layout import Frame, Paper, Text
from navcore.prints.read_back import grouped, lay_out_read_back, write_read_back
from tests.papers import PAPERS, faults, hostile_plan, plan_of, solved, text_of
from tests.support import DEMOS

if TYPE_CHECKING:
    from pathlib import Path


def ids(paper: Paper) -> str:
    return f"{paper.name} {'landscape' if paper.landscape else 'portrait'}"


@pytest.mark.parametrize("paper", PAPERS, ids=ids)
@pytest.mark.parametrize("plan", [plan_of(("A", "B")), hostile_plan(Trade.AVIATION), hostile_plan()])
def test_nothing_overprints_or_leaves_the_margins(plan: Plan, paper: Paper) -> None:
    pages, _, _ = lay_out_read_back(solve(plan), paper)
    assert [fault for page in pages for fault in faults(page, paper)] == []


@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
def test_positions_are_large_and_each_leg_stands_by_both_lines(path: Path) -> None:
    solution = solved(path)
    pages, _, _ = lay_out_read_back(solution, Paper())
    large = [mark.text for page in pages for mark in page if isinstance(mark, Text) and mark.size_pt >= 14.0]
    texts = [mark.text for page in pages for mark in page if isinstance(mark, Text)]
    for index in range(len(solution.plan.waypoints)):
        assert grouped(QUANTITIES["lat_deg"].shown(solution, index)) in large
        assert grouped(QUANTITIES["lon_deg"].shown(solution, index)) in large
    for index in range(len(solution.legs)):
        for key in ("rhumb_line_course_deg", "rhumb_line_nmi", "great_circle_nmi"):
            assert QUANTITIES[key].shown(solution, index) in texts


def test_every_position_and_every_line_has_a_box_to_agree_in() -> None:
    solution = solve(plan_of(["A"] * 20))
    pages, _, _ = lay_out_read_back(solution, Paper())
    parts = sum(2 * len(leg.parts.distances_m) - 1 for leg in solution.legs if leg.parts)
    assert parts
    boxes = sum(isinstance(mark, Frame) for page in pages for mark in page)
    assert boxes == 20 + 2 * 19 + parts


def test_the_same_plan_is_the_same_bytes() -> None:
    solution = solve(plan_of(("A", "B", "C")))
    data = write_read_back(solution).data
    assert write_read_back(solution).data == data
    assert "within2°anddistancewithin2NM" in text_of(data)[0]
