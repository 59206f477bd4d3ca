"""A composite, a table of limits and steering parts, as text and as JSON."""

from __future__ import annotations

from datetime import timedelta
from typing import TYPE_CHECKING, TypeAlias

from navcore.angles import wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE, SECONDS_PER_HOUR
from navcore.sailings.parts import format_parts
from navcore.text.clock import format_duration
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.plain import pad
from navcore.text.position import format_latitude, format_position

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping, Sequence

    from navcore.position import Position
    from navcore.sailings.composite import Composite, LimitRow
    from navcore.sailings.split import SteeringParts

Json: TypeAlias = "Mapping[str, Json] | Sequence[Json] | str | float | bool | None"

NO_VALUE = "—"
"""What stands where a method has no answer."""

_LABEL_CELLS = 20
_CELLS = 14


def position_json(position: Position) -> dict[str, float]:
    """Return a position as JSON has it, longitude in [-180, 180)."""
    return {"lat_deg": position.lat_deg, "lon_deg": wrap_180(position.lon_deg)}


def composite_json(track: Composite) -> dict[str, Json]:
    """Return a composite as JSON has it; the great circle in its place has one arc, no tangent points, and a note."""
    document: dict[str, Json] = {
        "limit_deg": track.limit_deg,
        "distance_nmi": track.distance_m / METRES_PER_NAUTICAL_MILE,
        "tangent_points": [position_json(point) for point in track.tangent_points],
        "arcs_nmi": [arc_m / METRES_PER_NAUTICAL_MILE for arc_m in track.arcs_m],
        "initial_course_deg": track.initial_course_deg,
        "final_course_deg": track.final_course_deg,
    }
    if track.note is not None:
        document["note"] = track.note
    return document


def limits_json(rows: Sequence[LimitRow], speed_kn: float | None) -> list[Json]:
    """Return a table of limits as JSON has it; what a refused limit or a missing speed leaves open is null."""
    return [_limit_json(row, speed_kn) for row in rows]


def _limit_json(row: LimitRow, speed_kn: float | None) -> dict[str, Json]:
    track = row.track
    return {
        "limit_deg": row.limit_deg,
        "distance_nmi": None if track is None else track.distance_m / METRES_PER_NAUTICAL_MILE,
        "extra_nmi": None if track is None else track.extra_m / METRES_PER_NAUTICAL_MILE,
        "extra_hours": None if speed_kn is None else row.extra_hours(speed_kn),
        "highest_lat_deg": None if track is None else track.highest_lat_deg,
        "refused": row.refusal,
    }


def parts_json(parts: SteeringParts) -> dict[str, Json]:
    """Return steering parts as JSON has them."""
    return {
        "points": [position_json(point) for point in parts.points],
        "legs": [
            {"course_deg": course_deg, "distance_nmi": distance_m / METRES_PER_NAUTICAL_MILE}
            for course_deg, distance_m in zip(parts.courses_deg, parts.distances_m, strict=True)
        ],
        "added_nmi": parts.added_m / METRES_PER_NAUTICAL_MILE,
        "greatest_separation_nmi": parts.greatest_separation_m / METRES_PER_NAUTICAL_MILE,
    }


def composite_text(track: Composite, speed_kn: float | None) -> Iterator[str]:
    """Yield the lines of a composite."""
    yield f"composite under {format_latitude(track.limit_deg)}"
    if track.note is not None:
        yield track.note
        return
    more = f"{_nmi(track.extra_m)} more than the great circle"
    if speed_kn is not None:
        more = f"{more}, {hours_text(track.extra_m, speed_kn)}"
    yield pad("distance", _LABEL_CELLS) + pad(_nmi(track.distance_m), _CELLS) + more
    courses = f"{format_direction(track.initial_course_deg)} → {format_direction(track.final_course_deg)}"
    yield pad("course", _LABEL_CELLS) + courses
    points = (format_position(point) for point in track.tangent_points)
    yield pad("tangent points", _LABEL_CELLS) + ", ".join(points)
    kinds = ("great circle", "parallel", "great circle")
    arcs = (f"{kind} {_nmi(arc_m)}" for kind, arc_m in zip(kinds, track.arcs_m, strict=True))
    yield pad("arcs", _LABEL_CELLS) + ", ".join(arcs)


def limits_text(rows: Sequence[LimitRow], speed_kn: float | None) -> Iterator[str]:
    """Yield the lines of a table of limits side by side."""
    yield _cells("limit", "distance", "more", "time more", "highest latitude").rstrip()
    for row in rows:
        limit, track = format_latitude(row.limit_deg), row.track
        if track is None:
            yield f"{pad(limit, _CELLS)}refused: {row.refusal}"
            continue
        hours = NO_VALUE if speed_kn is None else hours_text(track.extra_m, speed_kn)
        highest = format_latitude(track.highest_lat_deg)
        whole = "  the great circle" if track.is_great_circle else ""
        yield _cells(limit, _nmi(track.distance_m), _nmi(track.extra_m), hours, highest).rstrip() + whole


def parts_text(parts: SteeringParts) -> Iterator[str]:
    """Yield the lines of steering parts."""
    yield f"parts: {format_parts(parts.rule)}"
    for number, (point, course_deg, distance_m) in enumerate(
        zip(parts.points, parts.courses_deg, parts.distances_m, strict=False), 1
    ):
        course = format_direction(course_deg)
        yield f"{number:>4}  {pad(format_position(point), 24)}{pad(course, 10)}{pad(_nmi(distance_m), 12, 'right')}"
    yield f"{'to':>4}  {format_position(parts.points[-1])}"
    yield parts_words(parts)


def parts_words(parts: SteeringParts) -> str:
    """Return what must be known of parts, in one line."""
    count = len(parts.distances_m)
    number = "1 part" if count == 1 else f"{count} parts"
    # To 0.01 NM, because a separation is asked for in NM and shown to hold it.
    apart = format_distance(parts.greatest_separation_m / METRES_PER_NAUTICAL_MILE, 2)
    return f"{number}, {_nmi(parts.distance_m)}: {_nmi(parts.added_m)} added, at most {apart} from the true line"


def hours_text(distance_m: float, speed_kn: float) -> str:
    """Return the time that a distance takes at a speed."""
    try:
        duration = timedelta(seconds=distance_m / METRES_PER_NAUTICAL_MILE / speed_kn * SECONDS_PER_HOUR)
    except (OverflowError, ZeroDivisionError):
        return NO_VALUE
    return format_duration(duration)


def _cells(*cells: str) -> str:
    return "".join(pad(cell, _CELLS) for cell in cells)


def _nmi(distance_m: float) -> str:
    return format_distance(distance_m / METRES_PER_NAUTICAL_MILE)
