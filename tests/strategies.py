"""A Hypothesis strategy for each value of a plan."""

from __future__ import annotations

from dataclasses import replace
from datetime import UTC, datetime, timedelta

from hypothesis import strategies as st

from navcore.earth.figure import FIGURES
from navcore.plan.model import Craft, Leg, Line, Plan, Trade, Waypoint
from navcore.position import Position
from navcore.sailings.parts import Parts, PartsRule

odd_texts = st.one_of(
    st.sampled_from(
        [
            "",
            "Salal Roads",
            'Capt\'s "best"',
            "back\\slash \\n \\u0041",
            "two\nlines\r\nand\rmore\n",
            "\ttab\x00nul\x1b[31mred\x7f\x85",
            "[/b] # [[waypoint]] = {",
            '"""',
            "'''",
            "\ufeffmark \u202eleft\u2028line",
            "湾 🚢 é",
            " padded ",
        ]
    ),
    st.text(max_size=30),
)
"""Any text that a file can hold: quotes, control characters, newlines, markup, other scripts."""

_round_degrees = st.integers(-90 * 600, 90 * 600).map(lambda tenths: tenths / 600)
latitudes_deg = st.one_of(_round_degrees, st.floats(-90.0, 90.0))
longitudes_deg = st.one_of(_round_degrees.map(lambda value: 2 * value), st.floats(-180.0, 180.0))
positions = st.builds(Position, latitudes_deg, longitudes_deg)
speeds_kn = st.one_of(
    st.integers(1, 500).map(lambda tenths: tenths / 10), st.floats(0.0, 1e9, exclude_min=True, allow_subnormal=False)
)
stays = st.one_of(
    st.integers(0, 60 * 24 * 20).map(lambda minutes: timedelta(minutes=minutes)),
    st.timedeltas(timedelta(), timedelta(days=9999)),
)
parts = st.one_of(
    st.builds(Parts, st.just(PartsRule.NUMBER), st.integers(2, 1000).map(float)),
    st.builds(Parts, st.just(PartsRule.LONGITUDE), st.floats(0.001, 90.0)),
    st.builds(Parts, st.sampled_from([PartsRule.DISTANCE, PartsRule.SEPARATION]), st.floats(0.001, 20000.0)),
)
departures = st.timedeltas(timedelta(), timedelta(days=80000)).map(
    lambda since: datetime(1900, 1, 1, tzinfo=UTC) + since
)
notes = st.dictionaries(odd_texts, odd_texts, max_size=4).map(lambda columns: tuple(columns.items()))
waypoints = st.builds(Waypoint, odd_texts, positions, stays, odd_texts)


@st.composite
def legs(draw: st.DrawFn) -> Leg:
    """A leg as an edit allows it: a composite has a limit."""
    line = draw(st.none() | st.sampled_from(Line))
    limit_deg = draw(latitudes_deg if line is Line.COMPOSITE else st.none() | latitudes_deg)
    return Leg(line, limit_deg, draw(st.none() | parts), draw(st.none() | speeds_kn), draw(notes))


@st.composite
def plans(draw: st.DrawFn, min_size: int = 0, max_size: int = 6) -> Plan:
    """A plan that came from no file."""
    points = tuple(draw(st.lists(waypoints, min_size=min_size, max_size=max_size)))
    between = tuple(draw(legs()) for _ in points[1:])
    whole = draw(
        st.builds(
            Plan,
            title=odd_texts,
            voyage=odd_texts,
            trade=st.sampled_from(Trade),
            figure=st.sampled_from(list(FIGURES.values())),
            datum=odd_texts,
            revision=st.integers(1, 10**6),
            departure=st.none() | departures,
            speed_kn=st.none() | speeds_kn,
            columns=st.lists(odd_texts, max_size=3, unique=True).map(tuple),
            prepared=odd_texts,
            checked=odd_texts,
            approved=odd_texts,
            craft=st.builds(Craft, odd_texts, st.none() | st.floats(0.0, 99.0)),
        )
    )
    return replace(whole, waypoints=points, legs=between)
