"""The keys of a plan file: what each one takes and a line to type, in the order in which they are written."""

from __future__ import annotations

from typing import NamedTuple

from navcore.earth.figure import FIGURES

VERSION = 1
"""Of the plan file's form, under the key `legbook`."""


class Key(NamedTuple):
    """What a key takes, in words, and an example of it as typed."""

    allowed: str
    example: str


_NAME = "text in double quotes"

HEAD_KEYS: dict[str, Key] = {
    "legbook": Key(f"{VERSION}, the version of the plan file", f"legbook = {VERSION}"),
    "title": Key(_NAME, 'title = "Salal Roads to Kuromatsu Bay"'),
    "voyage": Key(_NAME, 'voyage = "014W"'),
    "trade": Key('"marine" or "aviation"', 'trade = "marine"'),
    "figure": Key(", ".join(f'"{name}"' for name in FIGURES), 'figure = "WGS 84"'),
    "datum": Key(_NAME, 'datum = "WGS 84"'),
    "revision": Key("a whole number, 1 or more", "revision = 1"),
    "departure": Key("a date and time with its zone", "departure = 2027-03-04T14:00:00Z"),
    "speed_kn": Key("a number above 0, in knots", "speed_kn = 13.5"),
    "columns": Key("a list of texts in double quotes, each once", 'columns = ["charts", "fixing"]'),
    "prepared": Key(_NAME, 'prepared = "A. Name"'),
    "checked": Key(_NAME, 'checked = "A. Name"'),
    "approved": Key(_NAME, 'approved = "A. Name"'),
}

CRAFT_KEYS: dict[str, Key] = {
    "name": Key(_NAME, 'name = "Quernmoor"'),
    "draught_m": Key("a number, 0 or more, in metres", "draught_m = 9.8"),
}

LEG_KEYS: dict[str, Key] = {
    "line": Key('"rhumb line", "great circle" or "composite"', 'line = "great circle"'),
    "limit": Key("a latitude with its letter, in double quotes", 'limit = "50°N"'),
    "parts": Key(
        "how the leg is split, in double quotes: degrees of longitude, NM, a number of parts, or NM apart",
        'parts = "10° longitude"',
    ),
    "speed_kn": HEAD_KEYS["speed_kn"],
    "notes": Key("a text in double quotes for each column", 'notes = { charts = "4801, 4803" }'),
}
"""Of the leg that ends at the waypoint; the first waypoint has none."""

WAYPOINT_KEYS: dict[str, Key] = {
    "name": Key(_NAME, 'name = "Salal Roads"'),
    "position": Key("latitude and longitude with their letters, in quotes", "position = \"48°30.0'N 125°20.0'W\""),
    "line": LEG_KEYS["line"],
    "limit": LEG_KEYS["limit"],
    "parts": LEG_KEYS["parts"],
    "speed_kn": LEG_KEYS["speed_kn"],
    "stay": Key("a time, in double quotes", 'stay = "6h"'),
    "remarks": Key(_NAME, 'remarks = "Pilot boards here"'),
    "notes": LEG_KEYS["notes"],
}

CRAFT = Key("a table of its own", "[craft]")
WAYPOINT = Key("a block for each waypoint", "[[waypoint]]")
