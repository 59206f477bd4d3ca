"""legbook compare: plans side by side, and their legs by every line."""

from __future__ import annotations

from typing import TYPE_CHECKING

from tui.cli.arguments import add_json
from tui.cli.exit_codes import ExitCode
from tui.cli.output import say, write_data
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("plans", metavar="PLAN", nargs="+", help="plan files; one alone is shown by every line")
    add_json(parser)


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.plan.compared import compare_plan
    from navcore.plan.solve import solve
    from navcore.prints.plans_compared import plans_json, plans_text
    from tui.cli.plan_argument import open_plan

    solutions = [(path, solve(open_plan(path))) for path in arguments.plans]
    plans = [(path, compare_plan(solution)) for path, solution in solutions]
    write_data(plans_json(plans) if arguments.json else plans_text(plans))
    refused = False
    for path, solution in solutions:
        for number, leg in enumerate(solution.legs, 1):
            if leg.refusal is not None:
                say(f"{path}: leg {number}: {leg.refusal}")
                refused = True
    return ExitCode.NO_ANSWER if refused else ExitCode.DONE


VERB = Verb("compare", "set plans side by side, and their legs by every line", _add_arguments, _run)
