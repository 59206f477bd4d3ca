from __future__ import annotations

from dataclasses import replace

import pytest

from navcore.errors import ParseError
from navcore.plan.model import Trade
from navcore.plan.solve import solve
from navcore.prints.column_choice import paper_columns, screen_columns
from navcore.prints.columns import LEG_TABLE, Column
from tests.papers import plan_of

PLAN = plan_of(("A", "B", "C"))


def keys(columns: tuple[Column, ...]) -> list[str]:
    return [f"write {column.to_write.heading}" if column.to_write else column.keys[0] for column in columns]


def test_the_officers_own_columns_print_like_ours() -> None:
    assert "notes.charts" in keys(paper_columns(solve(PLAN), landscape=True))
    assert "notes.charts" in keys(paper_columns(solve(PLAN), landscape=False))


def test_an_own_column_takes_the_place_of_one_to_write_in() -> None:
    own = keys(paper_columns(solve(replace(PLAN, columns=("charts", "fixing"))), landscape=True))
    assert "write Fixing" not in own
    assert "write Fixing" in keys(paper_columns(solve(PLAN), landscape=True))


def test_a_plan_may_name_a_quantity_among_its_columns() -> None:
    chosen = keys(paper_columns(solve(replace(PLAN, columns=("charts", "saving_nmi"))), landscape=True))
    assert "saving_nmi" in chosen
    assert "notes.saving_nmi" not in chosen


def test_portrait_is_narrower() -> None:
    for trade in Trade:
        solution = solve(replace(PLAN, trade=trade))
        wide, narrow = (paper_columns(solution, landscape=landscape) for landscape in (True, False))
        assert len(narrow) < len(wide)
        assert set(narrow) <= set(wide)


def test_columns_are_asked_for_by_key_or_by_heading() -> None:
    solution = solve(PLAN)
    usual = keys(paper_columns(solution, landscape=True))
    assert keys(paper_columns(solution, landscape=True, names="great_circle_nmi")) == [*usual, "great_circle_nmi"]
    assert keys(paper_columns(solution, landscape=True, names="saving")) == [*usual, "saving_nmi", "saving_percent"]
    assert keys(paper_columns(solution, landscape=True, names="eta, Charts")) == usual
    assert screen_columns(solution) == LEG_TABLE
    assert keys(screen_columns(solution, "CHARTS"))[-1] == "notes.charts"


def test_only_leaves_number_name_and_position() -> None:
    chosen = keys(paper_columns(solve(PLAN), landscape=True, names="only:course_deg,Distance"))
    assert chosen == ["number", "name", "lat_deg", "lon_deg", "course_deg", "distance_nmi"]


def test_an_unknown_name_is_refused_with_what_there_is() -> None:
    with pytest.raises(ParseError, match="no column is called “depth”") as caught:
        paper_columns(solve(PLAN), landscape=True, names="eta,depth")
    assert "eta,depth"[caught.value.start : caught.value.end] == "depth"
    assert "great_circle_nmi" in caught.value.advice
    assert "charts" in caught.value.advice
