"""The worksheet: worked again from the printed page alone, with a calculator's functions, it gives its own figures."""

from __future__ import annotations

import json
import math
import re
from dataclasses import replace
from typing import TYPE_CHECKING, Any

import pytest
from geographiclib.geodesic import Geodesic

from navcore.earth.figure import FIGURES
from navcore.errors import NoAnswerError
from navcore.files.planfile import read_plan
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import Solution, solve
from navcore.position import Position
from navcore.prints.worksheet import BY_TANGENT, LegSheet, make_worksheet
from navcore.prints.worksheet_media import WIDTH, worksheet_json, worksheet_text
from navcore.prints.worksheet_pdf import worksheet_pdf
from navcore.sailings import checked
from navcore.sailings.parts import parse_parts
from navcore.sailings.working import Working
from navcore.text.plain import cell_width
from tests.support import DEMOS

if TYPE_CHECKING:
    from collections.abc import Callable
    from pathlib import Path

LEGS = {
    "ocean": (Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0)),
    "southern": (Position(-34.5, 18.0), Position(-(43 + 50 / 60), 146.5)),
    "nearly east": (Position(50.0, -144.0), Position(50.5, -120.0)),
    "across the equator": (Position(21 + 10 / 60, -(157 + 55 / 60)), Position(-36.0, 175 + 10 / 60)),
    "coastal": (Position(54 + 10 / 60, 2.5), Position(54 + 13.4 / 60, 2 + 36.2 / 60)),
    "one parallel": (Position(-40.0, 100.0), Position(-40.0, 145.0)),
    "from a computed place": (Position(47.123456, -30.987654), Position(12.34567, -61.1)),
}
LEG = pytest.mark.parametrize("name", LEGS)


def solved(*names: str, figure: str = "WGS 84", leg: Leg | None = None) -> Solution:
    waypoints = tuple(Waypoint("", place) for name in names for place in LEGS[name])
    return solve(Plan(waypoints, (leg or Leg(),) * (len(waypoints) - 1), figure=FIGURES[figure], speed_kn=12.0))


def sheet_of(name: str, figure: str = "WGS 84", leg: Leg | None = None) -> LegSheet:
    return make_worksheet(solved(name, figure=figure, leg=leg))[0]


def value(figure: str) -> float:
    """Return what a printed figure says, as a calculator takes it: degrees, minutes or NM, south and west negative."""
    sign = -1.0 if figure[-1] in "SW" else 1.0
    if match := re.fullmatch(r"(\d+)°(\d+\.\d+)'[NSEW]", figure):
        return sign * (int(match[1]) + float(match[2]) / 60.0)
    return sign * float(re.sub(r"[^0-9.\-]", "", figure.replace("−", "-")))


def lines_of(sheet: LegSheet, title: str) -> tuple[dict[str, float], dict[str, float]]:
    """Return the printed lines of a section with what is given, and its printed results."""
    (section,) = (section for section in sheet.sections if section.title.startswith(title))
    given = sheet.sections[0].lines
    lines = {line.symbol: value(line.figure) for line in (*given, *section.lines) if line.symbol and line.figure != "—"}
    results = {line.words.removesuffix(", rounded"): value(line.figure) for line in section.lines if not line.symbol}
    return lines, results


def has(sheet: LegSheet, title: str) -> bool:
    return any(section.title.startswith(title) for section in sheet.sections)


sin: Callable[[float], float] = lambda degrees: math.sin(math.radians(degrees))  # noqa: E731 as on a calculator
cos: Callable[[float], float] = lambda degrees: math.cos(math.radians(degrees))  # noqa: E731
tan: Callable[[float], float] = lambda degrees: math.tan(math.radians(degrees))  # noqa: E731


def course_from(tangent: float, north: float, east: float) -> float:
    angle = math.degrees(math.atan(abs(tangent)))
    quarter = angle if north > 0.0 else 180.0 - angle
    return quarter if east > 0.0 else 360.0 - quarter


def printed_eccentricity(sheet: LegSheet) -> float:
    found = re.search(r"e = (0\.\d+)", " ".join(sheet.notes))
    return float(found[1]) if found else 0.0


def meridional_parts(sheet: LegSheet, lat_deg: float) -> float:
    e = printed_eccentricity(sheet)
    x = e * sin(lat_deg)
    artanh = 0.5 * math.log((1.0 + x) / (1.0 - x))
    return 7915.70446790 * math.log10(tan(45.0 + lat_deg / 2.0)) - 3437.74677078 * e * artanh


@LEG
@pytest.mark.parametrize("figure", ["WGS 84", "sphere", "Clarke 1866"])
def test_mercator_sailing_by_hand(name: str, figure: str) -> None:
    sheet = sheet_of(name, figure)
    if not has(sheet, "Mercator"):
        assert name == "one parallel"
        return
    line, result = lines_of(sheet, "Mercator")
    d_lat, d_long = (line["lat 2"] - line["lat 1"]) * 60.0, (line["long 2"] - line["long 1"]) * 60.0
    d_long = (d_long + 10800.0) % 21600.0 - 10800.0
    assert line["d.lat"] == pytest.approx(d_lat, abs=2e-4)
    assert line["d.long"] == pytest.approx(d_long, abs=2e-4)
    for end in ("1", "2"):
        assert line[f"MP {end}"] == pytest.approx(meridional_parts(sheet, line[f"lat {end}"]), abs=2e-4)
    assert line["DMP"] == pytest.approx(line["MP 2"] - line["MP 1"], abs=2e-5)
    assert line["tan C"] == pytest.approx(line["d.long"] / line["DMP"], rel=1e-4)
    assert line["course"] == pytest.approx(course_from(line["tan C"], line["DMP"], line["d.long"]), abs=1e-4)
    assert result["distance"] == pytest.approx(abs(line["d.lat"]) * math.sqrt(1.0 + line["tan C"] ** 2), abs=0.0501)
    if abs(cos(line["course"])) > 0.1:
        assert result["distance"] == pytest.approx(abs(line["d.lat"] / cos(line["course"])), abs=0.0501)
    assert result["course"] == pytest.approx(line["course"], abs=0.0501)


@pytest.mark.parametrize("name", [name for name in LEGS if name not in {"across the equator", "one parallel"}])
def test_middle_latitude_sailing_by_hand(name: str) -> None:
    line, result = lines_of(sheet_of(name), "Middle-latitude")
    assert line["mean lat"] == pytest.approx(0.5 * (line["lat 1"] + line["lat 2"]), abs=1e-5)
    assert line["cos mean lat"] == pytest.approx(cos(line["mean lat"]), abs=2e-8)
    assert line["departure"] == pytest.approx(line["d.long"] * line["cos mean lat"], abs=1e-3)
    assert line["tan C"] == pytest.approx(line["departure"] / line["d.lat"], rel=1e-4)
    assert result["distance"] == pytest.approx(math.hypot(line["d.lat"], line["departure"]), abs=0.0501)
    assert result["course"] == pytest.approx(course_from(line["tan C"], line["d.lat"], line["departure"]), abs=0.0501)


def test_parallel_sailing_by_hand() -> None:
    sheet = sheet_of("one parallel")
    line, result = lines_of(sheet, "Parallel")
    assert line["cos lat"] == pytest.approx(cos(line["lat 1"]), abs=2e-8)
    assert result["distance"] == pytest.approx(abs(line["d.long"] * line["cos lat"]), abs=0.0501)
    assert result["course"] == 90.0


@LEG
def test_great_circle_sailing_by_cosines_by_hand(name: str) -> None:
    line, result = lines_of(sheet_of(name), "Great-circle sailing by cosines")
    cos_d = sin(line["lat 1"]) * sin(line["lat 2"]) + cos(line["lat 1"]) * cos(line["lat 2"]) * cos(line["d.long"] / 60)
    assert line["cos D"] == pytest.approx(cos_d, abs=2e-8)
    assert result["distance"] == pytest.approx(60.0 * math.degrees(math.acos(line["cos D"])), abs=0.0501)
    sin_d = math.sqrt(1.0 - line["cos D"] ** 2)
    a = (sin(line["lat 2"]) - sin(line["lat 1"]) * line["cos D"]) / (cos(line["lat 1"]) * sin_d)
    slack = 0.0501 if sin_d > 0.01 else 0.3
    assert cos(line["A"]) == pytest.approx(a, abs=1e-5 if sin_d > 0.01 else 0.01)
    named = line["A"] if line["d.long"] > 0.0 else 360.0 - line["A"]
    assert result["initial course"] == pytest.approx(named, abs=slack)
    named = 180.0 - line["B"] if line["d.long"] > 0.0 else 180.0 + line["B"]
    assert result["final course"] == pytest.approx(named, abs=slack)


@LEG
def test_great_circle_sailing_by_haversines_by_hand(name: str) -> None:
    line, result = lines_of(sheet_of(name), "Great-circle sailing by haversines")
    hav: Callable[[float], float] = lambda degrees: sin(degrees / 2.0) ** 2  # noqa: E731
    hav_d = hav(line["d.long"] / 60.0) * cos(line["lat 1"]) * cos(line["lat 2"]) + hav(line["lat 2"] - line["lat 1"])
    assert line["hav D"] == pytest.approx(hav_d, rel=1e-5)
    assert result["distance"] == pytest.approx(120.0 * math.degrees(math.asin(math.sqrt(line["hav D"]))), abs=0.0501)


def test_composite_sailing_by_hand() -> None:
    sheet = sheet_of("ocean", leg=Leg(Line.COMPOSITE, 50.0))
    line, result = lines_of(sheet, "Composite")
    limit = line["limit"]
    p1, p2 = (math.degrees(math.acos(tan(line[f"lat {end}"]) / tan(limit))) for end in (1, 2))
    d1, d2 = (60.0 * math.degrees(math.acos(sin(line[f"lat {end}"]) / sin(limit))) for end in (1, 2))
    assert (line["P1"], line["P2"]) == pytest.approx((p1, p2), abs=2e-6)
    along = (abs(line["d.long"]) / 60.0 - line["P1"] - line["P2"]) * 60.0 * cos(limit)
    assert result["distance"] == pytest.approx(d1 + d2 + along, abs=0.0501)
    assert (result["long t1"], result["long t2"]) == pytest.approx(
        (line["long 1"] - line["P1"], line["long 2"] + line["P2"] - 360.0), abs=0.0501 / 60
    )
    assert "the parallel is longer" in worksheet_text([sheet])


def test_near_east_and_west_the_page_says_how_to_take_the_secant() -> None:
    assert BY_TANGENT in [remark for section in sheet_of("nearly east").sections for remark in section.remarks]
    assert BY_TANGENT not in [remark for section in sheet_of("coastal").sections for remark in section.remarks]


@LEG
@pytest.mark.parametrize("figure", ["WGS 84", "sphere"])
def test_every_difference_from_the_plan_is_accounted_for(name: str, figure: str) -> None:
    for line in sheet_of(name, figure).checked:
        for row in line.rows:
            assert row.difference_nmi is not None
            named = [
                float(cause.rpartition(": ")[2].removesuffix(" NM").replace("−", "-"))
                for cause in row.causes
                if ": " in cause
            ]
            assert sum(named) == pytest.approx(row.difference_nmi, abs=0.11)


def test_the_sphere_s_part_is_found_from_the_line_on_the_sphere_and_on_the_figure() -> None:
    """By geographiclib on WGS 84, and the haversine on the sphere."""
    (lat1, lon1), (lat2, lon2) = LEGS["ocean"]
    true_nmi = Geodesic.WGS84.Inverse(lat1, lon1, lat2, lon2)["s12"] / 1852.0
    squared = sin((lat2 - lat1) / 2.0) ** 2 + cos(lat1) * cos(lat2) * sin((lon2 - lon1) / 2.0) ** 2
    part_nmi = 120.0 * math.degrees(math.asin(math.sqrt(squared))) - true_nmi
    causes = [row.causes for row in sheet_of("ocean").checked[1].rows]
    assert causes == [(f"the sphere in place of WGS 84: {part_nmi:+.1f} NM",)] * 2


def test_a_wrong_working_is_not_explained_away(monkeypatch: pytest.MonkeyPatch) -> None:
    for name in ("_sphere_row", "_rhumb_row"):
        row = getattr(checked, name)

        def wrong(*words: Any, row: Any = row) -> Any:
            words = tuple(_longer(word) if isinstance(word, Working) else word for word in words)
            return row(*words)

        monkeypatch.setattr(checked, name, wrong)
    for line in sheet_of("ocean").checked:
        assert any("not accounted for" in cause and "+7.0 NM" in cause for cause in line.rows[0].causes)


def _longer(working: Working) -> Working:
    """Return a working with 7 NM too much."""
    steps = tuple(
        replace(step, value=(step.value or 0.0) + 7.0) if step.symbol == "distance" else step for step in working.steps
    )
    return replace(working, steps=steps)


@pytest.mark.parametrize(("limit_deg", "words"), [(55.0 + 29.0 / 60.0, "On the sphere"), (60.0, "is taken whole")])
def test_a_composite_without_a_working_says_why(limit_deg: float, words: str) -> None:
    text = worksheet_text([sheet_of("ocean", leg=Leg(Line.COMPOSITE, limit_deg))])
    assert "Composite: no working" in text
    assert words in text


def test_text_keeps_to_the_width_and_every_leg_has_a_page() -> None:
    text = worksheet_text(make_worksheet(solved("ocean", "southern")))
    assert text.count("\f") == 2
    assert max(map(cell_width, text.replace("\f", "").splitlines())) <= WIDTH


def test_one_leg_alone_is_the_page_of_that_leg() -> None:
    solution = solved("ocean", "southern")
    assert make_worksheet(solution, (0,)) == make_worksheet(solution)[:1]
    assert make_worksheet(solution, (2,)) == make_worksheet(solution)[2:]


def test_json_has_every_step_unrounded() -> None:
    solution = solved("ocean", leg=Leg(Line.COMPOSITE, 50.0, parse_parts("10° longitude")))
    (leg,) = json.loads(worksheet_json(solution, make_worksheet(solution)))["legs"]
    assert [line["line"] for line in leg["checked"]] == ["rhumb line", "great circle", "composite"]
    steps = {step["symbol"]: step["value"] for step in leg["checked"][0]["workings"][0]["steps"]}
    assert steps["tan C"] == pytest.approx(steps["d.long"] / steps["DMP"], rel=1e-12)
    assert leg["parts"]["legs"]


def test_the_pdf_is_the_same_bytes_each_time_and_names_what_its_font_lacks() -> None:
    sheets = make_worksheet(solved("ocean"))
    assert worksheet_pdf(sheets) == worksheet_pdf(sheets)
    assert worksheet_pdf(sheets).data.startswith(b"%PDF")
    assert worksheet_pdf(sheets).lacking == frozenset()
    plan = Plan((Waypoint("木更津", LEGS["ocean"][0]), Waypoint("B", LEGS["ocean"][1])), (Leg(),))
    assert worksheet_pdf(make_worksheet(solve(plan))).lacking == frozenset("木更津")


def test_a_leg_of_no_length_and_one_at_a_pole_have_a_page_too() -> None:
    for places in ((Position(10.0, 20.0),) * 2, (Position(60.0, 20.0), Position(90.0, 0.0))):
        plan = Plan(tuple(Waypoint("", place) for place in places), (Leg(Line.GREAT_CIRCLE),))
        assert "Results" in worksheet_text(make_worksheet(solve(plan)))


@pytest.mark.parametrize("path", DEMOS, ids=lambda path: path.stem)
def test_every_demo_has_a_worksheet_for_each_leg(path: Path) -> None:
    solution = solve(read_plan(path.read_bytes(), str(path)).plan)
    sheets = make_worksheet(solution)
    assert len(sheets) == len(solution.legs)
    assert worksheet_pdf(sheets).lacking == frozenset()
    assert json.loads(worksheet_json(solution, sheets))["legs"]


def test_a_refused_leg_has_no_worksheet() -> None:
    with pytest.raises(NoAnswerError, match="leg 1"):
        make_worksheet(solved("ocean", leg=Leg(Line.COMPOSITE, 45.0)))
