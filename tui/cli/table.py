"""legbook table: the leg table of a plan."""

from __future__ import annotations

import shutil
from typing import TYPE_CHECKING

from tui.cli.arguments import add_output, medium_of
from tui.cli.exit_codes import ExitCode
from tui.cli.output import is_terminal, put, say
from tui.cli.verb import Verb

if TYPE_CHECKING:
    import argparse

    from navcore.plan.solve import Solution

_ENDINGS = {".txt": "text", ".pdf": "pdf", ".csv": "csv", ".json": "json", ".md": "markdown"}
_PAPERS = ("A4", "Letter")


def _add_arguments(parser: argparse.ArgumentParser) -> None:
    parser.add_argument("plan", metavar="PLAN", help="a plan file")
    add_output(parser, _ENDINGS, "text")
    parser.add_argument(
        "--columns",
        default="",
        metavar="NAMES",
        help="columns to print besides the usual ones, by heading or by key of the JSON, with commas between them; "
        "after only: they stand alone with number, name and position, such as only:course_deg,distance_nmi",
    )
    parser.add_argument(
        "--width", type=int, metavar="CELLS", help="width of the text, at least 80; the terminal's unless said"
    )
    paper = parser.add_argument_group("on paper (--as pdf)")
    paper.add_argument("--paper", choices=_PAPERS, default=_PAPERS[0], help="A4 unless said")
    held = paper.add_mutually_exclusive_group()
    held.add_argument(
        "--landscape",
        action="store_false",
        dest="portrait",
        default=False,
        help="the longer side level; so unless said",
    )
    held.add_argument("--portrait", action="store_true", help="upright, with fewer columns")
    paper.add_argument(
        "--read-back",
        action="store_true",
        help="in place of the leg table, the sheet for the second person who enters the plan into other equipment: "
        "positions large, each leg by both lines, and boxes for what that equipment shows",
    )


def _run(arguments: argparse.Namespace) -> ExitCode:
    from navcore.plan.solve import solve
    from tui.cli.plan_argument import open_plan

    medium = medium_of(arguments, _ENDINGS, "pdf" if arguments.read_back else "text")
    if wrong := _wrong_usage(arguments, medium):
        say(wrong)
        return ExitCode.WRONG_USAGE
    solution = solve(open_plan(arguments.plan))
    data = (
        _pdf(solution, arguments)
        if medium == "pdf"
        else _text(solution, arguments, medium).encode("utf-8", "backslashreplace")
    )
    put("read-back sheet" if arguments.read_back else "leg table", data, arguments.file, arguments.plan)
    return ExitCode.DONE


def _wrong_usage(arguments: argparse.Namespace, medium: str) -> str:
    """Return what is wrong with arguments that don't go together; "" where nothing is."""
    if arguments.read_back and medium != "pdf":
        return f"--read-back is printed on paper only, not as {medium}; use --as pdf"
    if arguments.read_back and arguments.columns:
        return "--read-back has columns of its own; leave --columns out"
    if medium == "pdf" and arguments.file is None and is_terminal():
        return "a PDF is nothing for a terminal to show; use -o FILE"
    return ""


def _terminal_width() -> int:
    return shutil.get_terminal_size().columns if is_terminal() else 80


def _text(solution: Solution, arguments: argparse.Namespace, medium: str) -> str:
    from navcore.prints import csv, json, markdown, text
    from navcore.prints.column_choice import screen_columns
    from navcore.prints.leg_table import make_leg_table

    if medium == "json":
        return json.write_json(solution)
    table = make_leg_table(solution, screen_columns(solution, arguments.columns))
    if medium == "text":
        return text.write_text(table, arguments.width or _terminal_width())
    return csv.write_csv(table) if medium == "csv" else markdown.write_markdown(table)


def _pdf(solution: Solution, arguments: argparse.Namespace) -> bytes:
    """Return the sheet asked for; characters that its font lacks are named on standard error."""
    from navcore.prints.paper.page_layout import Paper, PaperName
    from navcore.prints.pdf import write_pdf
    from navcore.prints.read_back import write_read_back

    paper = Paper(PaperName(arguments.paper), not arguments.portrait)
    printed = write_read_back(solution, paper) if arguments.read_back else write_pdf(solution, paper, arguments.columns)
    if printed.lacking:
        codes = ", ".join(f"U+{ord(character):04X}" for character in sorted(printed.lacking))
        say(f"the print's font lacks {codes}; on paper a mark stands for each, and the sheet says so")
    return printed.data


VERB = Verb("table", "print the leg table of a plan", _add_arguments, _run)
