"""Which of two equal ways a leg takes, in words, so that nobody has to guess."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.angles import difference_of_longitude, wrap_180

if TYPE_CHECKING:
    from navcore.position import Position

_SAME_COURSE_DEG = 1e-6


def tie_words(start: Position, end: Position, initial_course_deg: float, final_course_deg: float) -> str:
    """Return what is to be said where d.long is exactly 180°, or where two great circles are equally short; else "".

    Args:
        start: Where the leg starts.
        end: Where it ends.
        initial_course_deg: The great circle's where it starts.
        final_course_deg: The great circle's where it ends.
    """
    if start == end or 90.0 in {abs(start.lat_deg), abs(end.lat_deg)}:
        return ""
    said = []
    d_long_deg = difference_of_longitude(start.lon_deg, end.lon_deg)
    if abs(d_long_deg) == 180.0:
        way = "east" if d_long_deg > 0.0 else "west"
        said.append(f"exactly 180° of longitude: the rhumb line goes {way}, as the letters say")
    # Between two places mirrored in the equator a single great circle ends on the course that it began on.
    turned_deg = abs(wrap_180(final_course_deg - initial_course_deg))
    if start.lat_deg == -end.lat_deg and turned_deg > _SAME_COURSE_DEG:
        said.append("two great circles are equally short: the northern one is taken")
    return "; ".join(said)
