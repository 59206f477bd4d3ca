"""legbook leg: one leg by every line and method."""

from __future__ import annotations

from typing import TYPE_CHECKING, NoReturn

from tui.cli.arguments import POSITION_FORMS, add_figure, add_json
from tui.cli.exit_codes import ExitCode
from tui.cli.output import say, write_data
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse

    from navcore.errors import ParseError
    from navcore.sailings.comparison import ChosenTracks, LegComparison


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("start", metavar="FROM", help=f"a position, {POSITION_FORMS}")
    parser.add_argument("end", metavar="TO", help="a position")
    add_figure(parser)
    parser.add_argument(
        "--limit",
        action="append",
        default=[],
        metavar="LATITUDE",
        help="limiting latitude of a composite, such as 50N; given several times, they stand side by side",
    )
    parser.add_argument(
        "--parts",
        metavar="RULE",
        help='split the composite, else the great circle: "10° longitude", "300 NM", "12 parts" or "1 NM apart"',
    )
    parser.add_argument(
        "--at",
        action="append",
        default=[],
        metavar="DISTANCE",
        help="the point there on each line: 300NM, or 12h with --speed",
    )
    parser.add_argument(
        "--meridian", action="append", default=[], metavar="LONGITUDE", help="where each line crosses it"
    )
    parser.add_argument(
        "--parallel", action="append", default=[], metavar="LATITUDE", help="where each line crosses it"
    )
    parser.add_argument(
        "--meridians", type=float, metavar="DEGREES", help="latitudes at whole multiples, ready to lay off on a chart"
    )
    parser.add_argument(
        "--beside",
        action="append",
        default=[],
        metavar="POSITION",
        help="how far off each line it lies, where, which side",
    )
    parser.add_argument("--speed", metavar="SPEED", help="to give times, such as 13.5kn")
    add_json(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.errors import ParseError
    from navcore.sailings.parts import parse_parts
    from navcore.text.distance import parse_speed
    from navcore.text.position import parse_latitude, parse_longitude, parse_position

    ends = parse_position(arguments.start), parse_position(arguments.end)
    limits_deg = tuple(parse_latitude(limit) for limit in arguments.limit)
    rule = None if arguments.parts is None else parse_parts(arguments.parts)
    speed_kn = None if arguments.speed is None else parse_speed(arguments.speed)
    if speed_kn == 0.0:
        raise ParseError(arguments.speed, (0, len(arguments.speed)), "no speed gets nowhere", "type one above 0")
    distances_m = tuple(_distance_m(at, speed_kn) for at in arguments.at)
    meridians_deg = tuple(parse_longitude(meridian) for meridian in arguments.meridian)
    parallels_deg = tuple(parse_latitude(parallel) for parallel in arguments.parallel)
    beside = tuple(parse_position(position) for position in arguments.beside)
    every_deg = arguments.meridians
    if every_deg is not None and not 0.0 < every_deg <= 90.0:
        raise ParseError(f"{every_deg:g}", (0, 1), "meridians are 0 to 90 degrees apart", "type such as --meridians 10")
    # Imported once the words are known to be right, so that a wrong one is answered without NumPy.
    from navcore.earth.figure import figure_named
    from navcore.prints.one_leg import one_leg_json, one_leg_text
    from navcore.prints.track_points import PointsAsked
    from navcore.sailings.comparison import choose_tracks, compare_lines

    figure = figure_named(arguments.figure)
    chosen = choose_tracks(*ends, figure, limits_deg, rule)
    comparison = compare_lines(*ends, figure)
    write = one_leg_json if arguments.json else one_leg_text
    asked = PointsAsked(distances_m, meridians_deg, parallels_deg, every_deg, beside)
    write_data(write(comparison, chosen, speed_kn, asked))
    unanswered = _unanswered(comparison, chosen, distances_m)
    if unanswered:
        say(unanswered)
        return ExitCode.NO_ANSWER
    return ExitCode.DONE


def _unanswered(comparison: LegComparison, chosen: ChosenTracks, distances_m: tuple[float, ...]) -> str:
    """Return what was asked and does not exist; "" where all does."""
    from navcore.constants import METRES_PER_NAUTICAL_MILE

    lengths_nmi = [comparison.rhumb_line.distance_nmi, comparison.great_circle.distance_nmi]
    if chosen.composite is not None:
        lengths_nmi.append(chosen.composite.distance_m / METRES_PER_NAUTICAL_MILE)
    if any(distance_m > max(lengths_nmi) * METRES_PER_NAUTICAL_MILE for distance_m in distances_m):
        return "a point that was asked for lies beyond the end of every line"
    return chosen.refusal or ""


def _distance_m(text: str, speed_kn: float | None) -> float:
    """Return a distance along: typed as one, or as a time at the speed."""
    from navcore.constants import METRES_PER_NAUTICAL_MILE, SECONDS_PER_HOUR
    from navcore.errors import ParseError
    from navcore.text.clock import parse_duration
    from navcore.text.distance import parse_distance

    try:
        return parse_distance(text) * METRES_PER_NAUTICAL_MILE
    except ParseError as error:
        if speed_kn is None:
            _refuse_time_without_speed(text, error)
        return parse_duration(text).total_seconds() / SECONDS_PER_HOUR * speed_kn * METRES_PER_NAUTICAL_MILE


def _refuse_time_without_speed(text: str, error: ParseError) -> NoReturn:
    from navcore.errors import ParseError
    from navcore.text.clock import parse_duration

    try:
        parse_duration(text)
    except ParseError:
        raise error from None
    advice = "give --speed too, such as --speed 13.5kn, or a distance, such as 300NM"
    raise ParseError(text, (0, len(text)), "a time along the leg needs a speed", advice) from None


VERB = Verb("leg", "work one leg by every line and method", _add_arguments, _run)
