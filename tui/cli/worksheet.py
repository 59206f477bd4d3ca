"""legbook worksheet: legs worked step by step, for a second person to check by hand."""

from __future__ import annotations

from typing import TYPE_CHECKING

from tui.cli.arguments import add_output, medium_of
from tui.cli.exit_codes import ExitCode
from tui.cli.output import is_terminal, put, say
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse

    from navcore.plan.solve import Solution
    from navcore.prints.worksheet import LegSheet

_ENDINGS = {".txt": "text", ".pdf": "pdf", ".json": "json"}


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("plan", metavar="PLAN", help="a plan file")
    parser.add_argument("--leg", type=int, metavar="N", help="this leg alone, counted from 1; all of them unless said")
    add_output(parser, _ENDINGS, "text")


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.plan.solve import solve
    from navcore.prints.worksheet import make_worksheet
    from tui.cli.plan_argument import open_plan

    medium = medium_of(arguments, _ENDINGS, "text")
    if medium == "pdf" and arguments.file is None and is_terminal():
        say("a PDF is nothing for a terminal to show; use -o FILE")
        return ExitCode.WRONG_USAGE
    solution = solve(open_plan(arguments.plan))
    if arguments.leg is not None and not 1 <= arguments.leg <= len(solution.legs):
        say(f"the plan has no leg {arguments.leg}; allowed: 1 to {len(solution.legs)}")
        return ExitCode.WRONG_USAGE
    sheets = make_worksheet(solution, None if arguments.leg is None else (arguments.leg - 1,))
    data = _written(solution, sheets, medium)
    put("worksheet", data, arguments.file, arguments.plan)
    return ExitCode.DONE


def _written(solution: Solution, sheets: tuple[LegSheet, ...], medium: str) -> bytes:
    from navcore.prints.worksheet_media import worksheet_json, worksheet_text

    if medium == "json":
        return worksheet_json(solution, sheets).encode("utf-8")
    if medium == "text":
        return worksheet_text(sheets).encode("utf-8", "backslashreplace")
    from navcore.prints.worksheet_pdf import worksheet_pdf

    printed = worksheet_pdf(sheets)
    if printed.lacking:
        codes = ", ".join(f"U+{ord(character):04X}" for character in sorted(printed.lacking))
        say(f"the print's font lacks {codes}; on paper a mark stands for each")
    return printed.data


VERB = Verb("worksheet", "work legs step by step, for a second person to check by hand", _add_arguments, _run)
