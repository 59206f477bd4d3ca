"""One leg by every line and method, as text and as JSON."""

from __future__ import annotations

import json
from dataclasses import asdict
from datetime import timedelta
from typing import TYPE_CHECKING

from navcore.constants import SECONDS_PER_HOUR
from navcore.plan.leg_words import SPLIT_FIRST
from navcore.prints.track_points import PointsAsked, track_points_json, track_points_text
from navcore.prints.tracks import (
    NO_VALUE,
    composite_json,
    composite_text,
    limits_json,
    limits_text,
    parts_json,
    parts_text,
    position_json,
)
from navcore.sailings.ties import tie_words
from navcore.sailings.track import Piece, Track
from navcore.text.clock import format_duration
from navcore.text.direction import format_angle, format_direction, format_minutes_of_arc
from navcore.text.distance import format_distance, format_percent, format_speed
from navcore.text.plain import pad
from navcore.text.position import format_latitude, format_position

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.prints.tracks import Json
    from navcore.sailings.comparison import ChosenTracks, LegComparison

NOTHING_ASKED = PointsAsked()

_LABEL_CELLS = 20
_LINE_CELLS = 20

_NORTH_SOUTH = ("N", "S")
_EAST_WEST = ("E", "W")


def one_leg_json(
    leg: LegComparison,
    chosen: ChosenTracks,
    speed_kn: float | None = None,
    asked: PointsAsked = NOTHING_ASKED,
) -> str:
    """Return one leg as JSON in full precision; what has no value is null."""
    circle, moves = leg.great_circle, leg.great_circle.distance_nmi > 0.0
    vertex = None if circle.vertex is None else {**position_json(circle.vertex), "on_leg": circle.vertex_on_leg}
    track = chosen.composite
    document: dict[str, Json] = {
        "figure": leg.figure.name,
        "from": position_json(leg.start),
        "to": position_json(leg.end),
        "rhumb_line": {
            "course_deg": leg.rhumb_line.course_deg if moves else None,
            "distance_nmi": leg.rhumb_line.distance_nmi,
        },
        "great_circle": {
            "distance_nmi": circle.distance_nmi,
            "initial_course_deg": circle.initial_course_deg if moves else None,
            "final_course_deg": circle.final_course_deg if moves else None,
            "vertex": vertex,
        },
        "composite": None if track is None else composite_json(track),
        "composite_refused": chosen.refusal,
        "comparison": {
            "saving_nmi": leg.saving_nmi,
            "saving_percent": leg.saving_percent,
            "greatest_separation_nmi": leg.greatest_separation_nmi,
        },
        "tables": asdict(leg.tables),
        "half_convergency": {**asdict(leg.half_convergency), "note": leg.half_convergency.note},
    }
    if chosen.parts is not None:
        document["parts"] = parts_json(chosen.parts)
    if len(chosen.limits) > 1:
        document["limits"] = limits_json(chosen.limits, speed_kn)
    if asked.is_anything:
        document["tracks"] = track_points_json(_tracks(leg, chosen), asked)
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def one_leg_text(
    leg: LegComparison,
    chosen: ChosenTracks,
    speed_kn: float | None = None,
    asked: PointsAsked = NOTHING_ASKED,
) -> str:
    """Return one leg as a navigator would set it down: the two lines side by side, the tables, what was asked for."""
    lines = [
        f"{format_position(leg.start)}  to  {format_position(leg.end)}",
        "",
        _row(f"on {leg.figure.name}", "rhumb line", "great circle"),
        *_by_lines(leg, speed_kn),
        "",
        *_by_tables(leg),
        *_by_choice(chosen, speed_kn),
        *(("", *track_points_text(_tracks(leg, chosen), asked)) if asked.is_anything else ()),
    ]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _tracks(leg: LegComparison, chosen: ChosenTracks) -> dict[str, Track]:
    """Return the lines of a leg by name: rhumb line, great circle, and the composite where one was asked for."""
    tracks = {
        "rhumb line": Track((Piece(leg.start, leg.end, is_great_circle=False),), leg.figure),
        "great circle": Track((Piece(leg.start, leg.end, is_great_circle=True),), leg.figure),
    }
    composite = chosen.composite
    if composite is not None and composite.tangent_points:
        points = (leg.start, *composite.tangent_points, leg.end)
        pieces = zip(points, points[1:], (True, False, True), strict=False)
        tracks["composite"] = Track(tuple(Piece(*piece) for piece in pieces), leg.figure)
    return tracks


def _by_lines(leg: LegComparison, speed_kn: float | None) -> Iterator[str]:
    rhumb, circle, sphere = leg.rhumb_line, leg.great_circle, leg.on_sphere()
    saves = f"saves {format_distance(leg.saving_nmi)}, {format_percent(leg.saving_percent)}"
    yield _row("distance", format_distance(rhumb.distance_nmi), format_distance(circle.distance_nmi), saves)
    if speed_kn is not None:
        times = (_time(distance_nmi, speed_kn) for distance_nmi in (rhumb.distance_nmi, circle.distance_nmi))
        yield _row(f"time at {format_speed(speed_kn)}", *times, f"saves {_time(leg.saving_nmi, speed_kn)}")
    yield _row("course", *_courses(leg))
    if said := tie_words(leg.start, leg.end, circle.initial_course_deg, circle.final_course_deg):
        yield _row("", said)
    yield _row("vertex", "", _vertex(leg))
    yield _row("farthest apart", format_distance(leg.greatest_separation_nmi))
    by_sphere = (format_distance(line.distance_nmi) for line in (sphere.rhumb_line, sphere.great_circle))
    yield _row("by the sphere", *by_sphere, "1' of arc = 1 NM")


def _by_tables(leg: LegComparison) -> Iterator[str]:
    tables = leg.tables
    yield f"by tables: 1' of latitude = 1 NM, meridional parts of {leg.figure.name}"
    yield _row("d.lat", format_minutes_of_arc(tables.d_lat_min, _NORTH_SOUTH))
    yield _row("d.long", format_minutes_of_arc(tables.d_long_min, _EAST_WEST))
    yield _row("mean latitude", format_latitude(tables.mean_lat_deg))
    yield _row("departure", _departure(tables.departure_nmi))
    yield _row("DMP", NO_VALUE if tables.dmp_min is None else format_minutes_of_arc(tables.dmp_min, _NORTH_SOUTH))
    yield _row("Mercator", *_course_and_distance(tables.mercator_course_deg, tables.mercator_distance_nmi))
    middle = _course_and_distance(tables.middle_latitude_course_deg, tables.middle_latitude_distance_nmi)
    yield _row("middle latitude", *middle)
    yield _row("convergency", format_angle(tables.convergency_deg))
    half = leg.half_convergency
    exact = f"exact {format_angle(half.at_start_deg)} at the start, {format_angle(half.at_end_deg)} at the end"
    yield _row("conversion angle", format_angle(tables.conversion_angle_deg), exact)
    if half.note is not None:
        yield _row("", half.note)


def _by_choice(chosen: ChosenTracks, speed_kn: float | None) -> Iterator[str]:
    if chosen.composite is not None:
        yield ""
        yield from composite_text(chosen.composite, speed_kn)
    if len(chosen.limits) > 1:
        yield ""
        yield from limits_text(chosen.limits, speed_kn)
    if chosen.parts is not None:
        yield ""
        yield from parts_text(chosen.parts)


def _row(label: str, *cells: str) -> str:
    return pad(label, _LABEL_CELLS - 1) + " " + "".join(pad(cell, _LINE_CELLS) + " " for cell in cells)


def _courses(leg: LegComparison) -> tuple[str, ...]:
    rhumb, circle = leg.rhumb_line, leg.great_circle
    if not circle.distance_nmi:
        return NO_VALUE, NO_VALUE
    printed = [format_direction(deg) for deg in (rhumb.course_deg, circle.initial_course_deg, circle.final_course_deg)]
    said = "" if len(set(printed)) == 1 else SPLIT_FIRST
    return printed[0], f"{printed[1]} → {printed[2]}", said


def _time(distance_nmi: float, speed_kn: float) -> str:
    try:
        return format_duration(timedelta(seconds=distance_nmi / speed_kn * SECONDS_PER_HOUR))
    except OverflowError:
        return NO_VALUE


def _vertex(leg: LegComparison) -> str:
    circle = leg.great_circle
    if circle.vertex is None:
        return NO_VALUE
    where = "on the leg" if circle.vertex_on_leg else "not on the leg"
    return f"{format_position(circle.vertex)}, {where}"


def _departure(departure_nmi: float | None) -> str:
    if departure_nmi is None:
        return f"{NO_VALUE} across the equator"
    side = _EAST_WEST[departure_nmi < 0.0] if departure_nmi else ""
    return f"{format_distance(abs(departure_nmi))} {side}".rstrip()


def _course_and_distance(course_deg: float | None, distance_nmi: float | None) -> tuple[str, str]:
    course = NO_VALUE if course_deg is None else format_direction(course_deg)
    return course, NO_VALUE if distance_nmi is None else format_distance(distance_nmi)
