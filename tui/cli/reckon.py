"""legbook reckon: the position that one or more courses and distances lead to."""

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
    parser.add_argument(
        "runs",
        metavar="COURSE/DISTANCE",
        nargs="+",
        help="such as 263.7/300, degrees true and NM; several make a traverse",
    )
    add_figure(parser)
    add_json(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.earth.figure import figure_named
    from navcore.prints.reckoning import reckon, reckoning_json, reckoning_text
    from navcore.text.distance import parse_run
    from navcore.text.position import parse_position

    runs = tuple(parse_run(run) for run in arguments.runs)
    reckoning = reckon(parse_position(arguments.start), runs, figure_named(arguments.figure))
    write_data(reckoning_json(reckoning) if arguments.json else reckoning_text(reckoning))
    if reckoning.refusal:
        say(reckoning.refusal)
    return ExitCode.NO_ANSWER if reckoning.refusal else ExitCode.DONE


VERB = Verb("reckon", "find the position reached on one or more courses and distances", _add_arguments, _run)
