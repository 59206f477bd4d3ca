"""Single slips that people make in writing or typing a position, each applied to a leg's ends."""

from __future__ import annotations

import math
from dataclasses import dataclass
from itertools import pairwise
from typing import TYPE_CHECKING

from navcore.position import Position
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Iterator

Ends = tuple[Position, Position]

COST_HEMISPHERE = 2.0
COST_EXCHANGED_COORDINATES = 2.4
COST_MINUTES = 2.6
COST_ONE_DEGREE = 2.8
COST_EXCHANGED_DIGITS = 3.0
COST_DROPPED_DIGIT = 3.2
COST_SECONDS = 3.4
COST_TEN_DEGREES = 4.0
COST_WRONG_DIGIT = 5.5


@dataclass(frozen=True, slots=True)
class Slip:
    """One slip and the ends that come of it.

    Attributes:
        words: What was slipped, with what it became.
        cost: How far-fetched it is; the listed costs only order causes.
        ends: The leg's ends with the slip in them.
    """

    words: str
    cost: float
    ends: Ends


@dataclass(frozen=True, slots=True)
class _Written:
    """A coordinate in degrees and minutes as people write it.

    Attributes:
        negative: Whether it is south or west.
        degrees: Two figures of a latitude, three of a longitude.
        minutes: Two figures.
        decimals: Of the minutes.
    """

    negative: bool
    degrees: str
    minutes: str
    decimals: str

    @property
    def digits(self) -> str:
        """All its figures."""
        return self.degrees + self.minutes + self.decimals

    def with_digits(self, digits: str) -> float | None:
        """Return the value of other figures with the point in the same place; None where it is no coordinate."""
        point = len(digits) - len(self.decimals)
        degrees, minutes = digits[: max(point - 2, 0)] or "0", digits[max(point - 2, 0) : point]
        if not minutes or int(minutes) >= 60 or int(degrees) > self.most_deg:
            return None
        value_deg = int(degrees) + float(f"{minutes}.{digits[point:] or 0}") / 60.0
        return None if value_deg > self.most_deg else self.signed(value_deg)

    @property
    def most_deg(self) -> float:
        """The largest that it can be."""
        return 90.0 if len(self.degrees) == 2 else 180.0

    def signed(self, value_deg: float) -> float:
        """Return a value with the name of this coordinate."""
        return -value_deg if self.negative else value_deg


def slips_of(start: Position, end: Position) -> Iterator[Slip]:
    """Yield every single slip, the likeliest first among those of one kind."""
    yield from _hemispheres(start, end)
    yield Slip("the two positions are exchanged", COST_HEMISPHERE, (end, start))
    yield from _coordinates_exchanged(start, end)
    yield from _all_minutes(start, end)
    for is_end, place in enumerate((start, end)):
        for is_lon, value_deg in enumerate(place):
            named = ("latitude", "longitude")[is_lon] + (" 2" if is_end else " 1")
            for words, cost, slipped_deg in _slipped(value_deg, is_lon=bool(is_lon)):
                if slipped_deg != value_deg:
                    shown = format_longitude(slipped_deg) if is_lon else format_latitude(slipped_deg)
                    yield Slip(
                        f"{words} in {named}: {shown}", cost, _replaced((start, end), is_end, is_lon, slipped_deg)
                    )


def _replaced(ends: Ends, is_end: int, is_lon: int, value_deg: float) -> Ends:
    places = list(ends)
    lat_deg, lon_deg = places[is_end]
    places[is_end] = Position(lat_deg, value_deg) if is_lon else Position(value_deg, lon_deg)
    return places[0], places[1]


def _hemispheres(start: Position, end: Position) -> Iterator[Slip]:
    for is_end, place in enumerate((start, end)):
        for is_lon, value_deg in enumerate(place):
            if value_deg:
                shown = format_longitude(-value_deg) if is_lon else format_latitude(-value_deg)
                words = f"wrong hemisphere of {('latitude', 'longitude')[is_lon]} {is_end + 1}: {shown}"
                yield Slip(words, COST_HEMISPHERE, _replaced((start, end), is_end, is_lon, -value_deg))
    east = Position(start.lat_deg, -start.lon_deg), Position(end.lat_deg, -end.lon_deg)
    yield Slip("wrong hemisphere of both longitudes", COST_HEMISPHERE + 0.3, east)
    north = Position(-start.lat_deg, start.lon_deg), Position(-end.lat_deg, end.lon_deg)
    yield Slip("wrong hemisphere of both latitudes", COST_HEMISPHERE + 0.3, north)


def _coordinates_exchanged(start: Position, end: Position) -> Iterator[Slip]:
    for is_end, place in enumerate((start, end)):
        for lettered in (False, True):
            lat_deg, lon_deg = place.lon_deg, place.lat_deg
            if lettered:
                lat_deg, lon_deg = math.copysign(lat_deg, place.lat_deg), math.copysign(lon_deg, place.lon_deg)
            if abs(lat_deg) <= 90.0 and (lat_deg, lon_deg) != tuple(place):
                kept = ", each under the other's letter" if lettered else ""
                ends = (Position(lat_deg, lon_deg), end) if not is_end else (start, Position(lat_deg, lon_deg))
                yield Slip(f"latitude and longitude {is_end + 1} exchanged{kept}", COST_EXCHANGED_COORDINATES, ends)


def _all_minutes(start: Position, end: Position) -> Iterator[Slip]:
    """Yield minutes taken for decimals, and decimals for minutes, in whole positions."""
    for words, change in (("minutes taken for decimals", _as_decimals), ("decimals taken for minutes", _as_minutes)):
        changed = [[change(value) for value in place] for place in (start, end)]
        for which, name in (((0,), "position 1"), ((1,), "position 2"), ((0, 1), "both positions")):
            values = [changed[index] if index in which else list(place) for index, place in enumerate((start, end))]
            one, other = (Position(*[value if value is not None else math.nan for value in place]) for place in values)
            if all(map(math.isfinite, (*one, *other))) and (one, other) != (start, end):
                yield Slip(f"{words} in {name}", COST_MINUTES, (one, other))


def _slipped(value_deg: float, *, is_lon: bool) -> Iterator[tuple[str, float, float]]:
    most_deg = 180.0 if is_lon else 90.0
    for words, cost, step_deg in (("one degree", COST_ONE_DEGREE, 1.0), ("ten degrees", COST_TEN_DEGREES, 10.0)):
        for moved_deg in (value_deg + step_deg, value_deg - step_deg):
            if abs(moved_deg) <= most_deg:
                yield words, cost, moved_deg
    for words, changed_deg in (
        ("minutes taken for decimals", _as_decimals(value_deg)),
        ("decimals taken for minutes", _as_minutes(value_deg)),
    ):
        if changed_deg is not None:
            yield words, COST_MINUTES + 0.1, changed_deg
    for written in _writings(value_deg, is_lon=is_lon):
        yield from _digit_slips(written)


def _as_decimals(value_deg: float) -> float | None:
    """Return 48°23.5' read as 48.235°."""
    degrees, minutes = divmod(round(abs(value_deg) * 60.0, 6), 60.0)
    return math.copysign(degrees + minutes / 100.0, value_deg)


def _as_minutes(value_deg: float) -> float | None:
    """Return 48.235° read as 48°23.5'; None where that is no number of minutes."""
    degrees, part = divmod(round(abs(value_deg), 8), 1.0)
    return math.copysign(degrees + part * 100.0 / 60.0, value_deg) if part < 0.6 else None


def _writings(value_deg: float, *, is_lon: bool) -> Iterator[_Written]:
    """Yield the coordinate to tenths of a minute, or as finely as it is given."""
    width = 3 if is_lon else 2
    for decimals in (1, 2, 3):
        steps = abs(value_deg) * 60.0 * 10**decimals
        if abs(steps - round(steps)) < 1e-3 or decimals == 3:
            whole, fraction = divmod(round(steps), 10**decimals)
            degrees, minutes = divmod(whole, 60)
            yield _Written(value_deg < 0.0, f"{degrees:0{width}d}", f"{minutes:02d}", f"{fraction:0{decimals}d}")
            return


def _digit_slips(written: _Written) -> Iterator[tuple[str, float, float]]:
    digits = written.digits
    for words, cost, changed in (
        *(("digits exchanged", COST_EXCHANGED_DIGITS, other) for other in _exchanged(digits)),
        *(("a digit dropped", COST_DROPPED_DIGIT, other) for other in _dropped(digits)),
        *(("a wrong digit", COST_WRONG_DIGIT, other) for other in _misread(digits)),
    ):
        value_deg = written.with_digits(changed)
        if value_deg is not None:
            yield words, cost, value_deg
    for minutes in dict.fromkeys(written.minutes):
        value_deg = int(written.degrees) + float(f"{minutes}.{written.decimals}") / 60.0
        yield "a digit dropped", COST_DROPPED_DIGIT, written.signed(value_deg)
    seconds = int(written.decimals.ljust(2, "0")[:2])
    if 0 < seconds < 60:
        value_deg = int(written.degrees) + int(written.minutes) / 60.0 + seconds / 3600.0
        yield "decimals of a minute taken for seconds", COST_SECONDS, written.signed(value_deg)


def _exchanged(digits: str) -> Iterator[str]:
    for at, (one, other) in enumerate(pairwise(digits)):
        if one != other:
            yield digits[:at] + other + one + digits[at + 2 :]


def _dropped(digits: str) -> Iterator[str]:
    for at in range(len(digits)):
        yield digits[:at] + digits[at + 1 :]


def _misread(digits: str) -> Iterator[str]:
    for at, digit in enumerate(digits):
        for other in "0123456789":
            if other != digit:
                yield digits[:at] + other + digits[at + 1 :]
