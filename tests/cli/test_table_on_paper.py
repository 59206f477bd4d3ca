from __future__ import annotations

from typing import TYPE_CHECKING

import pytest

from tests.papers import text_of
from tests.support import ROOT, legbook

if TYPE_CHECKING:
    from pathlib import Path

NORTH_PACIFIC = str(ROOT / "routes_demo" / "north_pacific_winter.toml")


def test_the_ending_of_the_file_makes_it_a_pdf(tmp_path: Path) -> None:
    out = tmp_path / "bridge.PDF"
    done = legbook("table", NORTH_PACIFIC, "-o", str(out))
    assert done.returncode == 0
    assert out.read_bytes().startswith(b"%PDF-")
    assert done.stdout == b""
    assert done.stderr.decode() == f"legbook: leg table written to {out}\n"


@pytest.mark.parametrize("paper", [[], ["--landscape"], ["--portrait"], ["--paper", "Letter"]])
def test_the_sheet_has_the_size_that_was_asked_for(paper: list[str]) -> None:
    data = legbook("table", NORTH_PACIFIC, "--as", "pdf", *paper).stdout
    width_pt, height_pt = {"--portrait": (595.2756, 841.8898), "--paper": (792, 612)}.get(
        paper[0] if paper else "", (841.8898, 595.2756)
    )
    assert f"/MediaBox [ 0 0 {width_pt} {height_pt} ]".encode() in data


def test_columns_are_added_in_every_medium() -> None:
    pdf = legbook("table", NORTH_PACIFIC, "--as", "pdf", "--columns", "great_circle_nmi").stdout
    assert "Greatcircle" in text_of(pdf)[0]
    for medium in ("csv", "markdown"):
        words = legbook("table", NORTH_PACIFIC, "--as", medium, "--columns", "only:fixing").stdout.decode()
        assert "fixing" in words
        assert "Distance NM" not in words


def test_an_unknown_column_is_wrong_usage() -> None:
    done = legbook("table", NORTH_PACIFIC, "--columns", "depth")
    assert done.returncode == 2
    assert "no column is called “depth”" in done.stderr.decode()
    assert "charts, fixing" in done.stderr.decode()


def test_the_read_back_sheet_is_a_pdf_and_nothing_else() -> None:
    done = legbook("table", NORTH_PACIFIC, "--read-back")
    assert "Read-backsheet" in text_of(done.stdout)[0]
    for more in (["--as", "csv"], ["--as", "pdf", "--columns", "eta"], ["-o", "nowhere/sheet.csv", "--as", "text"]):
        done = legbook("table", NORTH_PACIFIC, "--read-back", *more)
        assert done.returncode == 2
        assert done.stdout == b""


def test_what_the_font_lacks_is_said_on_standard_error(tmp_path: Path) -> None:
    plan = tmp_path / "plan.toml"
    ends = ('name = "木更津"\nposition = "10N 20W"', 'name = "B"\nposition = "11N 20W"')
    plan.write_text("legbook = 1\n" + "".join(f"[[waypoint]]\n{end}\n" for end in ends), encoding="utf-8")
    done = legbook("table", str(plan), "--as", "pdf")
    assert done.returncode == 0
    assert "lacks U+66F4, U+6728, U+6D25" in done.stderr.decode()
    assert done.stdout.startswith(b"%PDF-")
