"""legbook reconcile: what explains the figures that another system shows for a leg."""

from __future__ import annotations

from typing import TYPE_CHECKING

from tui.cli.arguments import POSITION_FORMS, add_figure, add_json
from tui.cli.exit_codes import ExitCode
from tui.cli.output import say, write_data
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("start", metavar="FROM", help=f"a position as we have it, {POSITION_FORMS}")
    parser.add_argument("end", metavar="TO", help="a position as we have it")
    parser.add_argument(
        "--distance", required=True, metavar="SHOWN", help="with the digits that the other system shows, such as 3755.0"
    )
    parser.add_argument("--course", metavar="SHOWN", help="likewise, such as 204 or 204.1")
    add_figure(parser)
    add_json(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.sailings.reconcile import shown_as_typed
    from navcore.text.position import parse_position

    ends = parse_position(arguments.start), parse_position(arguments.end)
    shown = shown_as_typed(arguments.distance, arguments.course or "")
    from navcore.earth.figure import figure_named
    from navcore.prints.reconciled import NOTHING_FITS, reconciled_json, reconciled_text
    from navcore.sailings.comparison import compare_lines
    from navcore.sailings.reconcile import reconcile

    figure = figure_named(arguments.figure)
    explanations = reconcile(*ends, figure, shown)
    words = " ".join(word for word in (arguments.distance, arguments.course) if word)
    write_data(
        reconciled_json(explanations)
        if arguments.json
        else reconciled_text(compare_lines(*ends, figure), words, explanations)
    )
    if not explanations:
        say(NOTHING_FITS)
        return ExitCode.NO_ANSWER
    return ExitCode.DONE


VERB = Verb("reconcile", "name what explains the figures another system shows for a leg", _add_arguments, _run)
