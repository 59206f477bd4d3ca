"""legbook leg: one leg by every line and method."""

from __future__ import annotations

from typing import TYPE_CHECKING

from tui.cli.arguments import POSITION_FORMS, add_figure, add_json
from tui.cli.exit_codes import ExitCode
from tui.cli.output import say, write_data
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse


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
    parser.add_argument("--speed", metavar="SPEED", help="to give times, such as 13.5kn")
    add_json(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.errors import ParseError
    from navcore.sailings.parts import parse_parts
    from navcore.text.distance import parse_speed
    from navcore.text.position import parse_latitude, parse_position

    ends = parse_position(arguments.start), parse_position(arguments.end)
    limits_deg = tuple(parse_latitude(limit) for limit in arguments.limit)
    rule = None if arguments.parts is None else parse_parts(arguments.parts)
    speed_kn = None if arguments.speed is None else parse_speed(arguments.speed)
    if speed_kn == 0.0:
        raise ParseError(arguments.speed, (0, len(arguments.speed)), "no speed gets nowhere", "type one above 0")
    # Imported once the words are known to be right, so that a wrong one is answered without NumPy.
    from navcore.earth.figure import figure_named
    from navcore.prints.one_leg import one_leg_json, one_leg_text
    from navcore.sailings.comparison import choose_tracks, compare_lines

    figure = figure_named(arguments.figure)
    chosen = choose_tracks(*ends, figure, limits_deg, rule)
    comparison = compare_lines(*ends, figure)
    write = one_leg_json if arguments.json else one_leg_text
    write_data(write(comparison, chosen, speed_kn))
    if chosen.refusal is not None:
        say(chosen.refusal)
        return ExitCode.NO_ANSWER
    return ExitCode.DONE


VERB = Verb("leg", "work one leg by every line and method", _add_arguments, _run)
