"""Plotting sheets on paper: true scale measured in the PDF itself, the same in SVG and JSON, nothing over anything."""

from __future__ import annotations

import json
import re
import xml.etree.ElementTree as ET
from io import BytesIO
from typing import TYPE_CHECKING

import numpy as np
import pytest
from pypdf import PdfReader
from pypdf.generic import ContentStream

from navcore.charts.choice import SheetKind
from navcore.charts.lettering import Lettering, boxes_meet
from navcore.charts.paper import paper_named
from navcore.earth.figure import WGS_84
from navcore.lines import rhumb_line
from navcore.plan.model import Leg, Plan, Trade, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.prints.caution import CAUTION
from navcore.prints.plotting_sheet import NO_DANGERS, SheetOptions, lacking, plotting_sheets
from navcore.prints.sheets.drawing import Area, Stroke, Words, words_width_mm
from navcore.prints.sheets.foot import CHECK_BAR_MM
from navcore.prints.sheets.grid_courses import grid_legs
from navcore.prints.sheets.json import write_sheets_json
from navcore.prints.sheets.pages import draw_pages, write_sheet_svg, write_sheets_pdf
from tests.papers import HOSTILE_NAMES, plan_of, solved
from tests.support import DEMOS, ROOT

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.plan.solve import Solution
    from navcore.prints.sheets.drawing import Drawing
    from navcore.trigonometry import FloatArray

NORTH_PACIFIC = ROOT / "routes_demo" / "north_pacific_winter.toml"
POLAR = ROOT / "routes_demo" / "polar_flight.toml"
PT_MM = 25.4 / 72.0


def strokes_of(data: bytes, page: int = 0) -> Iterator[tuple[float, FloatArray]]:
    """Yield thickness and points of every stroked path of a page, in millimetres, from its content stream."""
    reader = PdfReader(BytesIO(data))
    contents = ContentStream(reader.pages[page].get_contents(), reader)
    thick, points = 1.0, []
    for operands, operator in contents.operations:
        if operator == b"w":
            thick = float(operands[0])
        elif operator == b"m":
            points = [[float(value) for value in operands]]
        elif operator == b"l":
            points.append([float(value) for value in operands])
        elif operator == b"S":
            yield thick * PT_MM, np.array(points) * PT_MM
        elif operator == b"cm":
            assert [float(value) for value in operands] == [1, 0, 0, 1, 0, 0]


def along_a_parallel(lat_deg: float) -> Solution:
    names = (Position(lat_deg, -179.0), Position(lat_deg, 178.5), Position(lat_deg, 176.0))
    return solve(Plan(tuple(Waypoint(f"at {number}", place) for number, place in enumerate(names)), (Leg(), Leg())))


@pytest.mark.parametrize("lat_deg", [46.0, -33.0])
def test_distances_along_the_line_of_true_scale_are_true_in_the_pdf_to_a_tenth_of_a_millimetre(lat_deg: float) -> None:
    solution = along_a_parallel(lat_deg)
    sheets = plotting_sheets(solution, SheetOptions(scale=2.5e6, true_scale_deg=(lat_deg,), coast=False))
    legs = [points for thick, points in strokes_of(write_sheets_pdf(solution, sheets)) if thick == pytest.approx(0.4)]
    assert len(legs) == 2
    for points, leg in zip(legs, solution.legs, strict=True):
        measured_mm = float(np.sum(np.hypot(*np.diff(points, axis=0).T)))
        assert leg.distance_m is not None
        assert measured_mm == pytest.approx(leg.distance_m * 1000.0 / 2.5e6, abs=0.1)
        assert measured_mm == pytest.approx(leg.distance_m * 1000.0 / 2.5e6, abs=0.001)


def test_distances_along_the_standard_parallels_of_a_lambert_are_true_in_the_pdf() -> None:
    solution = along_a_parallel(50.0)
    options = SheetOptions(SheetKind.LAMBERT, paper_named("A3"), 2.5e6, true_scale_deg=(50.0, 54.0), coast=False)
    data = write_sheets_pdf(solution, plotting_sheets(solution, options))
    legs = [points for thick, points in strokes_of(data) if thick == pytest.approx(0.4)]
    distance_m = float(rhumb_line.inverse(50.0, -179.0, 50.0, 178.5, WGS_84).distance_m)
    assert np.sum(np.hypot(*np.diff(legs[0], axis=0).T)) == pytest.approx(distance_m * 1000.0 / 2.5e6, abs=0.05)


def test_the_check_bar_is_100_mm_and_the_page_the_paper_in_the_pdf() -> None:
    solution = solved(NORTH_PACIFIC)
    sheets = plotting_sheets(solution, SheetOptions(paper=paper_named("A2"), coast=False))
    data = write_sheets_pdf(solution, sheets)
    page = PdfReader(BytesIO(data)).pages[0]
    sides = sorted((float(page.mediabox.width) * PT_MM, float(page.mediabox.height) * PT_MM))
    assert sides == pytest.approx([420.0, 594.0], abs=1e-3)
    bar = next(
        mark for mark in draw_pages(solution, sheets)[0].marks if isinstance(mark, Words) and "Check bar" in mark.text
    )
    ticks = [
        points for _, points in strokes_of(data) if abs(points[0][1] - (bar.y_mm - 2.95)) < 0.2 and len(points) == 2
    ]
    ends = np.concatenate(ticks)[:, 0]
    assert ends.max() - ends.min() == pytest.approx(CHECK_BAR_MM, abs=0.01)


def test_the_viewer_is_told_not_to_scale_and_the_same_plan_gives_the_same_bytes() -> None:
    solution = solved(NORTH_PACIFIC)
    first, second = (write_sheets_pdf(solution, plotting_sheets(solution, SheetOptions())) for _ in range(2))
    assert first == second
    assert "/None" in str(PdfReader(BytesIO(first)).root_object["/ViewerPreferences"])


def words_of(drawing: Drawing) -> list[FloatArray]:
    boxes = []
    for mark in drawing.marks:
        if isinstance(mark, Words):
            width = words_width_mm(mark.text, mark.size_mm, bold=mark.bold)
            boxes.append(
                Lettering(mark.text, mark.x_mm, mark.y_mm, width, 0.7 * mark.size_mm, mark.turn_deg).corners_mm()
            )
    return boxes


CASES = [
    *((demo, SheetOptions(kind, paper_named(paper), coast=False)) for demo in DEMOS for kind, paper in (
        (SheetKind.MERCATOR, "A4"), (SheetKind.STEREOGRAPHIC, "A2"), (SheetKind.LAMBERT, "A4")
    ) if not ("polar" in demo.name and kind is SheetKind.MERCATOR)),
    (NORTH_PACIFIC, SheetOptions(scale=1e7, coast=False)),
]  # fmt: skip


@pytest.mark.parametrize(("path", "options"), CASES, ids=lambda case: getattr(case, "name", getattr(case, "kind", "")))
def test_no_words_over_others_or_off_the_paper_on_any_page(path: object, options: SheetOptions) -> None:
    solution = solved(path)  # type: ignore[arg-type]
    for drawing in draw_pages(solution, plotting_sheets(solution, options)):
        boxes = words_of(drawing)
        stacked = np.stack(boxes)
        assert stacked.min() >= 4.0
        assert stacked[:, :, 0].max() <= drawing.width_mm - 4.0
        assert stacked[:, :, 1].max() <= drawing.height_mm - 4.0
        low, high = stacked.min(axis=1), stacked.max(axis=1)
        near = np.all((low[:, np.newaxis] <= high) & (low <= high[:, np.newaxis]), axis=2)
        for first, second in np.argwhere(np.triu(near, 1)):
            assert not boxes_meet(stacked[first], stacked[second : second + 1])[0]


@pytest.mark.parametrize(
    ("path", "options"), CASES[:4], ids=lambda case: getattr(case, "name", getattr(case, "kind", ""))
)
def test_every_sheet_says_what_must_be_said(path: object, options: SheetOptions) -> None:
    solution = solved(path)  # type: ignore[arg-type]
    pages = draw_pages(solution, plotting_sheets(solution, options))
    for number, drawing in enumerate(pages, 1):
        said = " ".join(mark.text for mark in drawing.marks if isinstance(mark, Words))
        assert NO_DANGERS in said
        assert CAUTION[:60] in said
        assert CAUTION[-40:] in said
        assert f"page {number} of {len(pages)}" in said
        assert "revision 1, plan" in said
    first = " ".join(mark.text for mark in pages[0].marks if isinstance(mark, Words))
    for words in ("1:", "figure", "datum", "Prepared", "Approved"):
        assert words in first


def test_a_gnomonic_sheet_says_that_it_is_not_conformal() -> None:
    solution = solved(NORTH_PACIFIC)
    sheets = plotting_sheets(solution, SheetOptions(SheetKind.GNOMONIC, coast=False))
    said = " ".join(mark.text for mark in draw_pages(solution, sheets)[0].marks if isinstance(mark, Words))
    assert "NOT CONFORMAL" in said
    assert "sphere" in said


def test_a_sheet_with_the_shore_says_how_good_it_is() -> None:
    solution = solved(NORTH_PACIFIC)
    said = " ".join(
        mark.text
        for mark in draw_pages(solution, plotting_sheets(solution, SheetOptions()))[0].marks
        if isinstance(mark, Words)
    )
    assert "GSHHG" in said
    assert "Not for navigation" in said


def test_the_json_has_the_shape_that_scripts_rely_on_and_proj_gives_its_millimetres() -> None:
    solution = solved(NORTH_PACIFIC)
    document = json.loads(write_sheets_json(solution, plotting_sheets(solution, SheetOptions(coast=False))))
    assert document["paper_mm"] == [297.0, 210.0]
    assert {"proj", "scale", "paper_mm", "waypoints", "graticule"} <= document.keys()
    keys = {"name", "lat_deg", "lon_deg", "x_mm", "y_mm", "scale_factor", "convergence_deg"}
    assert all(keys <= waypoint.keys() for waypoint in document["waypoints"])
    assert [waypoint["name"] for waypoint in document["waypoints"]] == [point.name for point in solution.plan.waypoints]
    pyproj = pytest.importorskip("pyproj")
    proj = pyproj.Proj(document["proj"])
    for point in document["waypoints"] + document["graticule"]:
        x_m, y_m = proj(point["lon_deg"], point["lat_deg"])
        assert point["x_mm"] == pytest.approx(x_m * 1000.0 / document["scale"], abs=0.001)
        assert point["y_mm"] == pytest.approx(y_m * 1000.0 / document["scale"], abs=0.001)


def test_the_json_of_a_set_has_every_sheet_and_all_of_the_plan_on_each() -> None:
    solution = solved(NORTH_PACIFIC)
    sheets = plotting_sheets(solution, SheetOptions(scale=1e7, coast=False))
    document = json.loads(write_sheets_json(solution, sheets, 2))
    assert document["sheet"] == 2
    assert document["of"] == len(document["sheets"]) == len(sheets.sheets)
    assert len(document["waypoints"]) == len(solution.plan.waypoints)
    assert {waypoint["on_sheet"] for waypoint in document["waypoints"]} == {True, False}


def test_the_svg_is_in_millimetres_of_the_paper_and_its_legs_are_the_sheets() -> None:
    solution = solved(NORTH_PACIFIC)
    sheets = plotting_sheets(solution, SheetOptions(coast=False))
    root = ET.fromstring(write_sheet_svg(solution, sheets))
    assert (root.get("width"), root.get("height"), root.get("viewBox")) == ("297mm", "210mm", "0 0 297 210")
    lines = [line for line in root.iter("{http://www.w3.org/2000/svg}polyline") if line.get("stroke-width") == "0.4"]
    sheet = sheets.sheets[0]
    for line, leg in zip(lines, sheet.legs, strict=True):
        points = np.array([pair.split(",") for pair in (line.get("points") or "").split()], dtype=np.float64)
        expected = leg.pieces_mm[0] + np.array(sheet.paper.origin_mm)
        np.testing.assert_allclose(points[:, 0], expected[:, 0], atol=0.0006)
        np.testing.assert_allclose(points[:, 1], 210.0 - expected[:, 1], atol=0.0006)


def test_great_circles_are_told_from_rhumb_lines_without_colour() -> None:
    solution = solved(NORTH_PACIFIC)
    drawing = draw_pages(solution, plotting_sheets(solution, SheetOptions(coast=False)))[0]
    legs = [mark for mark in drawing.marks if isinstance(mark, Stroke) and mark.thick_mm == 0.4]
    assert [bool(leg.dash_mm) for leg in legs] == [True, False, False, True, False]


def test_nothing_is_drawn_over_words_but_by_the_words_themselves() -> None:
    solution = solved(NORTH_PACIFIC)
    marks = draw_pages(solution, plotting_sheets(solution, SheetOptions(coast=False)))[0].marks
    whites = [
        index
        for index, mark in enumerate(marks)
        if isinstance(mark, Area) and mark.grey == 1.0 and len(mark.points_mm) == 4
    ]
    graticule = [
        index
        for index, mark in enumerate(marks)
        if isinstance(mark, Stroke) and mark.thick_mm == 0.13 and mark.grey > 0.5
    ]
    assert max(graticule) < min(whites)


def test_names_of_any_kind_are_drawn_and_what_the_font_lacks_is_said() -> None:
    solution = solve(plan_of(HOSTILE_NAMES))
    sheets = plotting_sheets(solution, SheetOptions(paper=paper_named("A3"), coast=False))
    assert lacking(solution.plan)
    root = ET.fromstring(write_sheet_svg(solution, sheets))
    texts = ["".join(text.itertext()) for text in root.iter("{http://www.w3.org/2000/svg}text")]
    assert any("[/b]" in text for text in texts)
    assert any("font lacks" in text for text in texts)
    assert not any(re.search(r"[\x00-\x1f\u202e]", text) for text in texts)
    assert write_sheets_pdf(solution, sheets).startswith(b"%PDF-")


def test_an_aviation_plan_on_a_polar_sheet_has_the_grid_of_greenwich_and_its_grid_courses() -> None:
    solution = solved(POLAR)
    assert solution.plan.trade is Trade.AVIATION
    sheets = plotting_sheets(solution, SheetOptions(SheetKind.STEREOGRAPHIC, coast=False))
    projection = sheets.sheets[0].plane.projection
    assert projection.central_lon_deg == 0.0
    grid = grid_legs(solution, projection)
    for leg, course in zip(grid, (165.6, 157.2, 143.9, 118.4, 161.1, 164.4, 173.1), strict=True):
        assert leg.start_grid_course_deg == pytest.approx(course, abs=0.1)
    said = " ".join(
        mark.text for drawing in draw_pages(solution, sheets) for mark in drawing.marks if isinstance(mark, Words)
    )
    assert "Grid course = true course + longitude west of 0°E" in said
    assert "Grid courses of the legs" in said
    assert "165.6°G" in said


def test_a_plan_without_waypoints_is_drawn_by_its_corners() -> None:
    solution = solve(Plan())
    options = SheetOptions(corners=(Position(40.0, -20.0), Position(50.0, -5.0)), coast=False)
    (sheet,) = plotting_sheets(solution, options).sheets
    assert sheet.points == ()
    assert write_sheets_pdf(solution, plotting_sheets(solution, options)).startswith(b"%PDF-")
