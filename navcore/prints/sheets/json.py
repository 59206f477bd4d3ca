"""Plotting sheets as JSON: the projection as PROJ writes it, and every point in millimetres, unrounded."""

from __future__ import annotations

import json
import math
from typing import TYPE_CHECKING

from navcore.prints.caution import CAUTION
from navcore.prints.leg_table import method_line
from navcore.prints.plotting_sheet import NO_DANGERS
from navcore.prints.sheets.grid_courses import grid_legs

if TYPE_CHECKING:
    from navcore.charts.sheet import Sheet
    from navcore.charts.sheet_set import SheetSet
    from navcore.plan.solve import Solution

Record = dict[str, object]


def write_sheets_json(solution: Solution, sheets: SheetSet, number: int = 1) -> str:
    """Return one sheet as JSON; where the set has more, they stand whole under `sheets`.

    Millimetres count from the lower left corner of the neat line, and are PROJ's metres × 1000 / scale. A waypoint that
    is not on the sheet is there all the same, with `on_sheet` false; what can't be shown at all is left out.
    """
    document = _record(solution, sheets.sheets[number - 1])
    document |= {"method": method_line(solution.plan), "caution": f"{NO_DANGERS} {CAUTION}"}
    if len(sheets.sheets) > 1:
        document["sheets"] = [_record(solution, sheet) for sheet in sheets.sheets]
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def _record(solution: Solution, sheet: Sheet) -> Record:
    plane, paper = sheet.plane, sheet.paper
    names = [waypoint.name for waypoint in solution.plan.waypoints]
    return {
        "proj": plane.proj_string,
        "scale": plane.scale,
        "paper_mm": [paper.width_mm, paper.height_mm],
        "waypoints": [
            {
                "name": name,
                "lat_deg": point.lat_deg,
                "lon_deg": point.lon_deg,
                "x_mm": point.x_mm,
                "y_mm": point.y_mm,
                "scale_factor": _or_null(point.scale_factor),
                "convergence_deg": _or_null(point.convergence_deg),
                "on_sheet": point.inside,
            }
            for name, point in zip(names, sheet.points, strict=True)
            if math.isfinite(point.x_mm)
        ],
        "graticule": [intersection._asdict() for intersection in sheet.graticule.intersections],
        "sheet": sheet.number,
        "of": sheet.of,
        "projection": plane.projection.name,
        "conformal": plane.projection.conformal,
        "true_scale_lats_deg": list(plane.projection.true_scale_lats_deg),
        "frame_mm": [plane.width_mm, plane.height_mm],
        "frame_origin_mm": list(paper.origin_mm),
        "legs": [
            {"leg": leg.number + 1, "pieces_mm": [piece.tolist() for piece in leg.pieces_mm]} for leg in sheet.legs
        ],
        "ruling": _ruling(sheet),
        "grid_courses": [leg._asdict() for leg in grid_legs(solution, plane.projection)],
    }


def _ruling(sheet: Sheet) -> Record:
    ruling = sheet.ruling
    return {
        "parallels": [line._asdict() for line in ruling.parallels],
        "meridians": [line._asdict() for line in ruling.meridians],
        "minute_of_longitude_mm": ruling.minute_of_longitude_mm,
        "centre_mm": ruling.centre_mm,
    }


def _or_null(value: float) -> float | None:
    return value if math.isfinite(value) else None
