"""Plans side by side, and each of their legs by every line, as text and as JSON."""

from __future__ import annotations

import json
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.json import plain as plain_value
from navcore.prints.leg_table import leg_name
from navcore.prints.tracks import NO_VALUE
from navcore.text.clock import format_duration, format_instant
from navcore.text.distance import format_distance, format_distance_figure, format_percent_figure
from navcore.text.number import format_number
from navcore.text.plain import ELLIPSIS, cell_width, fit, pad, visible
from navcore.text.position import format_latitude
from navcore.text.wrap import wrap

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

    from navcore.plan.compared import ByLine, LegCompared, PlanCompared
    from navcore.prints.tracks import Json

_LABEL_CELLS = 24
_PLAN_CELLS = 26
_WIDTH = 100
_LEG_CELLS = (4, 15, 11, 11, 11, 9, 7, 9, 12, 10)
_LEG_HEADINGS = (
    "leg", "line", "sailed NM", "rhumb NM", "circle NM", "saves NM", "%", "hours", "highest", "apart NM",
)  # fmt: skip


def plans_json(plans: Sequence[tuple[str, PlanCompared]]) -> str:
    """Return plans side by side as JSON in full precision; what has no value is null.

    Args:
        plans: Each file's name as it was given, and the plan compared.
    """
    document = {"plans": [_plan_json(path, compared) for path, compared in plans]}
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def _plan_json(path: str, compared: PlanCompared) -> dict[str, Json]:
    plan = compared.plan
    rhumb_m, saving_m = compared.rhumb_line.distance_m, compared.saving_m
    return {
        "file": path,
        "title": plan.title,
        "fingerprint": fingerprint(plan),
        "figure": plan.figure.name,
        "sailed": _by_line_json(compared.sailed),
        "rhumb_line": _by_line_json(compared.rhumb_line),
        "great_circle": _by_line_json(compared.great_circle),
        "saving_nmi": _nmi(saving_m),
        "saving_percent": _percent(saving_m, rhumb_m),
        "saving_hours": compared.saving_hours,
        "greatest_separation_nmi": _nmi(compared.greatest_separation_m),
        "sphere_less_wgs_84_nmi": _nmi(compared.sphere_less_wgs_84_m),
        "total_time_s": plain_value(compared.time),
        "eta": plain_value(compared.arrival),
        "legs": [_leg_json(leg) for leg in compared.legs],
    }


def _leg_json(leg: LegCompared) -> dict[str, Json]:
    return {
        "line": leg.line.value,
        "sailed": _by_line_json(leg.sailed),
        "rhumb_line": _by_line_json(leg.rhumb_line),
        "great_circle": _by_line_json(leg.great_circle),
        "composite": None if leg.composite is None else _by_line_json(leg.composite),
        "saving_nmi": _nmi(leg.saving_m),
        "saving_percent": _percent(leg.saving_m, leg.rhumb_line.distance_m),
        "saving_hours": leg.saving_hours,
        "greatest_separation_nmi": _nmi(leg.greatest_separation_m),
        "sphere_less_wgs_84_nmi": _nmi(leg.sphere_less_wgs_84_m),
    }


def _by_line_json(line: ByLine) -> dict[str, Json]:
    return {"distance_nmi": _nmi(line.distance_m), "highest_lat_deg": line.highest_lat_deg}


def plans_text(plans: Sequence[tuple[str, PlanCompared]]) -> str:
    """Return plans side by side as text, and beneath them the legs of each by every line."""
    lines = [*_side_by_side(plans)]
    for path, compared in plans:
        lines += ["", *wrap(visible(f"{compared.plan.title or 'Passage plan'} ({path})"), _WIDTH), *_legs(compared)]
    lines += ["", *wrap(CAUTION, _WIDTH)]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _side_by_side(plans: Sequence[tuple[str, PlanCompared]]) -> Iterator[str]:
    compared = [plan for _, plan in plans]
    yield _row("plan", [_end_of(visible(path)) for path, _ in plans])
    yield _row("title", [visible(plan.plan.title) for plan in compared])
    yield _row("figure of the Earth", [plan.plan.figure.name for plan in compared])
    yield _row("distance sailed", [_distance(plan.sailed.distance_m) for plan in compared])
    first_m = compared[0].sailed.distance_m
    yield _row("more than the first", [_less_words(plan.sailed.distance_m, first_m) for plan in compared])
    yield _row("time", [NO_VALUE if plan.time is None else format_duration(plan.time) for plan in compared])
    yield _row("ETA", [NO_VALUE if plan.arrival is None else format_instant(plan.arrival) for plan in compared])
    yield _row("highest latitude", [_latitude(plan.sailed) for plan in compared])
    yield _row("all by rhumb line", [_distance(plan.rhumb_line.distance_m) for plan in compared])
    yield _row("all by great circle", [_distance(plan.great_circle.distance_m) for plan in compared])
    yield _row("saved over rhumb lines", [_distance(plan.saving_m) for plan in compared])
    yield _row("  in per cent", [_percent_words(plan.saving_m, plan.rhumb_line.distance_m) for plan in compared])
    yield _row("  in hours", [_hours(plan.saving_hours) for plan in compared])
    yield _row("lines farthest apart", [_distance(plan.greatest_separation_m) for plan in compared])
    yield _row("sphere less WGS 84", [_distance(plan.sphere_less_wgs_84_m) for plan in compared])


def _end_of(path: str) -> str:
    """Return the end of a path, which tells files apart, as much as has room."""
    shown = path
    while cell_width(shown) > _PLAN_CELLS - 2:
        shown = ELLIPSIS + shown.removeprefix(ELLIPSIS)[1:]
    return shown


def _legs(compared: PlanCompared) -> Iterator[str]:
    yield "".join(map(pad, _LEG_HEADINGS, _LEG_CELLS))
    for index, leg in enumerate(compared.legs):
        cells = (
            str(index + 1),
            leg.line.value,
            _figure(leg.sailed.distance_m),
            _figure(leg.rhumb_line.distance_m),
            _figure(leg.great_circle.distance_m),
            _figure(leg.saving_m),
            _percent_words(leg.saving_m, leg.rhumb_line.distance_m),
            _hours(leg.saving_hours),
            _latitude(leg.sailed),
            _figure(leg.greatest_separation_m),
        )
        yield "".join(map(pad, cells, _LEG_CELLS)) + visible(leg_name(compared.plan, index))


def _row(label: str, cells: Sequence[str]) -> str:
    return pad(label, _LABEL_CELLS) + "  ".join(pad(fit(cell, _PLAN_CELLS), _PLAN_CELLS) for cell in cells)


def _nmi(distance_m: float | None) -> float | None:
    return None if distance_m is None else distance_m / METRES_PER_NAUTICAL_MILE


def _percent(part_m: float | None, whole_m: float | None) -> float | None:
    return None if part_m is None or not whole_m else 100.0 * part_m / whole_m


def _distance(distance_m: float | None) -> str:
    return NO_VALUE if distance_m is None else format_distance(distance_m / METRES_PER_NAUTICAL_MILE)


def _less_words(distance_m: float | None, first_m: float | None) -> str:
    return NO_VALUE if distance_m is None or first_m is None else _distance(distance_m - first_m)


def _figure(distance_m: float | None) -> str:
    return NO_VALUE if distance_m is None else format_distance_figure(distance_m / METRES_PER_NAUTICAL_MILE)


def _percent_words(part_m: float | None, whole_m: float | None) -> str:
    percent = _percent(part_m, whole_m)
    return NO_VALUE if percent is None else format_percent_figure(percent)


def _hours(hours: float | None) -> str:
    return NO_VALUE if hours is None else format_number(hours, 1)


def _latitude(line: ByLine) -> str:
    return NO_VALUE if line.highest_lat_deg is None else format_latitude(line.highest_lat_deg)
