from __future__ import annotations

import json
import os
import subprocess
import sys
from datetime import datetime, timedelta
from typing import TYPE_CHECKING

import pytest

from navcore.plan.leg_words import SPLIT_FIRST
from navcore.plan.model import Line, Plan, Trade
from navcore.plan.quantities import QUANTITIES, SIDES, Row
from navcore.plan.revision import fingerprint
from navcore.plan.solve import Solution, solve
from navcore.prints.caution import CAUTION
from navcore.prints.column_choice import paper_columns
from navcore.prints.json import write_json
from navcore.prints.leg_table import ROWS_ROUNDED
from navcore.prints.paper.fonts import MISSING, printable
from navcore.prints.paper.page_layout import Frame, Paper, PaperName, Text
from navcore.prints.pdf import lay_out, write_pdf
from navcore.text.kind import FORMATTERS, Kind
from tests.papers import HOSTILE_NAMES, PAPERS, faults, hostile_plan, plan_of, rows_of_text, solved, text_of
from tests.support import DEMOS, ROOT

if TYPE_CHECKING:
    from pathlib import Path

GOLDEN = ROOT / "tests" / "golden"
PLANS = {
    "one leg": plan_of(("A", "B")),
    "120 legs": plan_of([f"Waypoint {number}" for number in range(1, 122)], Trade.AVIATION),
    "30 legs": plan_of([f"Waypoint {number}" for number in range(1, 32)], Trade.AVIATION),
    "hostile": hostile_plan(),
    "hostile flight": hostile_plan(Trade.AVIATION),
}
BOTH = [Paper(PaperName.A4, landscape=True), Paper(PaperName.A4, landscape=False)]


def ids(paper: Paper) -> str:
    return f"{paper.name} {'landscape' if paper.landscape else 'portrait'}"


def spaceless(text: str) -> str:
    return "".join(text.split())


@pytest.mark.parametrize("paper", PAPERS, ids=ids)
@pytest.mark.parametrize("name", PLANS)
def test_nothing_overprints_leaves_the_margins_or_is_too_small(name: str, paper: Paper) -> None:
    pages, _, _ = lay_out(solve(PLANS[name]), paper)
    assert [fault for page in pages for fault in faults(page, paper)] == []


@pytest.mark.parametrize("paper", BOTH, ids=ids)
@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
def test_every_demo_stands_clear_on_its_pages(path: Path, paper: Paper) -> None:
    pages, _, _ = lay_out(solved(path), paper)
    assert [fault for page in pages for fault in faults(page, paper)] == []


@pytest.mark.parametrize("paper", PAPERS, ids=ids)
@pytest.mark.parametrize("name", ["one leg", "hostile"])
def test_the_pdf_says_what_was_laid_out(name: str, paper: Paper) -> None:
    solution = solve(PLANS[name])
    pages, _, _ = lay_out(solution, paper)
    read = text_of(write_pdf(solution, paper).data)
    assert len(read) == len(pages)
    for text, marks in zip(read, pages, strict=True):
        laid_out = [spaceless(mark.text) for mark in marks if isinstance(mark, Text)]
        assert sorted(text) == sorted("".join(laid_out))
        assert all(part in text for part in laid_out)


def test_no_name_is_cut() -> None:
    for paper in PAPERS:
        pages, _, _ = lay_out(solve(PLANS["hostile"]), paper)
        texts = "".join(spaceless(mark.text) for page in pages for mark in page if isinstance(mark, Text))
        plan = PLANS["hostile"]
        for name in (plan.title, plan.craft.name, plan.datum, plan.prepared, plan.approved, *plan.columns):
            assert spaceless(printable(name)[0]) in texts
        for name in HOSTILE_NAMES:
            shown = printable(name)[0]
            assert all(word in texts for word in shown.split() if len(word) < 30), name
            assert texts.count("x") >= 3 * 300  # a name, a remark and a note


def test_a_name_is_shown_and_never_obeyed() -> None:
    printed = "".join(text_of(write_pdf(solve(PLANS["hostile"])).data))
    for shown in ("[/b]", "‹U+001B›", "=HYPERLINK(1)", "‹U+202E›", "<b>&amp;</b>", "new↵line", "Владивосток", "Ωμέγα"):
        assert shown in printed


def test_what_the_font_lacks_is_marked_and_named() -> None:
    printed = write_pdf(solve(PLANS["hostile"]))
    assert {"木", "🚢", "😀", "湾", "ש", "م"} <= printed.lacking
    assert "é" not in printed.lacking
    text = "".join(text_of(printed.data))
    assert MISSING * 4 in text
    assert "U+6728" in text
    assert write_pdf(solve(PLANS["one leg"])).lacking == frozenset()


@pytest.mark.parametrize("paper", PAPERS, ids=ids)
def test_every_page_says_whose_it_is_and_holds_the_caution(paper: Paper) -> None:
    plan = PLANS["30 legs"]
    pages = text_of(write_pdf(solve(plan), paper).data)
    assert len(pages) > 3
    for number, text in enumerate(pages, 1):
        for said in (f"page {number} of {len(pages)}", CAUTION, fingerprint(plan), "2027-01-01 00:00 UTC", "WGS 84"):
            assert spaceless(said) in text
        for said in (
            "Prepared",
            "Checked",
            "Approved",
            "signed",
            "Trial",
            "Waypoint 31",
            "Navigation log",
            "ETO",
            "kt",
        ):
            assert spaceless(said) in text


def test_the_headings_are_the_trades_own_words() -> None:
    marine, flight = (text_of(write_pdf(solve(plan_of(("A", "B"), trade))).data)[0] for trade in Trade)
    for heading in ("Legtable", "Course", "DistanceNM", "SpeedA", "Speedkn", "ETAUTC", "ATAUTC", "LimitsP/SNM", "Ship"):
        assert (heading in marine) == (heading != "SpeedA")
    for heading in (
        "Navigationlog",
        "Track",
        "ETOUTC",
        "ATOUTC",
        "Wind°T/kt",
        "Level",
        "Fuelplan",
        "Aircraft",
        "Speedkt",
    ):
        assert heading in flight


def test_every_printed_figure_is_the_jsons_rounded_by_the_same_formatter() -> None:
    for solution in (*map(solved, DEMOS), solve(PLANS["30 legs"])):
        for paper in BOTH:
            text = "".join(text_of(write_pdf(solution, paper).data))
            at = 0
            for figure in figures_of(solution, paper):
                at = text.find(spaceless(figure), at)
                assert at >= 0, figure
                at += len(spaceless(figure))


def figures_of(solution: Solution, paper: Paper) -> list[str]:
    """Every figure of the JSON that the sheet prints, in the order of the sheet, rounded."""
    document = json.loads(write_json(solution))
    keys = [column.first.key for column in paper_columns(solution, landscape=paper.landscape) if column.keys]
    figures: list[str] = []
    for index in range(len(document["waypoints"])):
        for row, records in ((Row.WAYPOINT, document["waypoints"]), (Row.LEG, document["legs"])):
            for key in keys if index < len(records) else ():
                quantity = QUANTITIES.get(key)
                if quantity is not None and quantity.row is row and quantity.kind is not Kind.TEXT:
                    figures.append(_rounded(key, records[index][key], solution.plan.trade))
    return figures


def _rounded(key: str, value: str | float | None, trade: Trade) -> str:
    kind = QUANTITIES[key].kind
    if kind is Kind.INSTANT and isinstance(value, str):
        return FORMATTERS[kind](datetime.fromisoformat(value))
    if kind is Kind.DURATION and isinstance(value, float):
        return FORMATTERS[kind](timedelta(seconds=value))
    return FORMATTERS[kind](value, *([SIDES[trade]] if kind is Kind.ALTERATION else []))


def test_the_same_plan_is_the_same_bytes_anywhere(tmp_path: Path) -> None:
    path = ROOT / "routes_demo" / "north_pacific_winter.toml"
    here = write_pdf(solved(path)).data
    assert write_pdf(solved(path)).data == here
    odd = {
        "LC_ALL": "de_DE.UTF-8",
        "LANG": "tr_TR.UTF-8",
        "TZ": "Pacific/Auckland",
        "PYTHONHASHSEED": "7",
        "RL_useA85": "1",
    }
    environment = {**os.environ, **odd, "PYTHONPATH": str(ROOT)}
    words = [sys.executable, "-m", "tui", "table", str(path), "--as", "pdf"]
    done = subprocess.run(words, capture_output=True, check=True, env=environment, cwd=tmp_path, timeout=60)
    assert done.stdout == here


@pytest.mark.parametrize("paper", BOTH, ids=ids)
@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
def test_page_text_is_the_golden_one(path: Path, paper: Paper) -> None:
    pages, _, _ = lay_out(solved(path), paper)
    text = "\f\n".join("".join(f"{line}\n" for line in rows_of_text(page)) for page in pages)
    golden = GOLDEN / f"{path.stem}-{'landscape' if paper.landscape else 'portrait'}.txt"
    if os.environ.get("LEGBOOK_GOLDENS") == "write":
        golden.write_bytes(text.encode())
    assert text.encode() == golden.read_bytes()


def test_a_great_circle_not_in_parts_and_a_crossing_are_said_in_bold() -> None:
    pages, _, _ = lay_out(solve(plan_of(["A"] * 12)), BOTH[0])
    bold = [mark.text for page in pages for mark in page if isinstance(mark, Text) and mark.bold]
    assert SPLIT_FIRST in bold
    assert any(text.startswith("crosses 180°") for text in bold)


def test_rows_rounded_is_said() -> None:
    pages, _, _ = lay_out(solve(PLANS["120 legs"]), BOTH[0])
    assert any(isinstance(mark, Text) and mark.text == ROWS_ROUNDED and mark.bold for mark in pages[-1])


def test_each_waypoint_and_each_steering_part_has_four_boxes_to_tick() -> None:
    plan = PLANS["120 legs"]
    solution = solve(plan)
    pages, _, _ = lay_out(solution, BOTH[1])
    parts = sum(len(leg.parts.distances_m) for leg in solution.legs if leg.parts)
    assert parts
    assert sum(isinstance(mark, Frame) for page in pages for mark in page) == 4 * (len(plan.waypoints) + parts)


def test_a_row_stays_with_what_is_said_beneath_it() -> None:
    plan = plan_of([f"Waypoint {number}" for number in range(1, 60)])
    for paper in PAPERS:
        pages, _, _ = lay_out(solve(plan), paper)
        for page in pages:
            lines = list(rows_of_text(page))
            for number, line in enumerate(lines):
                if line == SPLIT_FIRST:
                    assert Line.GREAT_CIRCLE.value in lines[number - 1]


def test_an_empty_plan_is_printed_too() -> None:
    pages, _, _ = lay_out(solve(Plan()), BOTH[0])
    assert faults(pages[0], BOTH[0]) == []
