"""The command line: reads the arguments, runs a verb, and turns every error into words and an exit code."""

from __future__ import annotations

import argparse
import re
import traceback
from pathlib import Path
from typing import TYPE_CHECKING, Any

from navcore.errors import NavError, NoAnswerError, ParseError, PlanFileError, RangeError
from navcore.prints.caution import CAUTION
from tui.cli import compare, distances, leg, reckon, reconcile, sheet, table, worksheet
from tui.cli.exit_codes import ExitCode
from tui.cli.output import CannotWriteError, let_go_of_output, say, write_data

if TYPE_CHECKING:
    from collections.abc import Sequence

    from tui.cli.verb import Verb

VERBS: tuple[Verb, ...] = (
    table.VERB,
    leg.VERB,
    distances.VERB,
    reckon.VERB,
    compare.VERB,
    worksheet.VERB,
    reconcile.VERB,
    sheet.VERB,
)

_LEADING_MINUS = re.compile(r"-\d")
_EPILOG = f"A word that is no verb is taken for a plan, and its leg table is printed. {CAUTION}"


class _Parser(argparse.ArgumentParser):
    """A parser whose help goes out as data does, and to which a minus and a digit begin a value, never an option."""

    def __init__(self, **settings: Any) -> None:
        super().__init__(**settings)
        self._negative_number_matcher = _LEADING_MINUS

    def print_help(self, file: object = None) -> None:
        if file is None:
            write_data(self.format_help())


def run(words: Sequence[str]) -> ExitCode:
    """Run the command line on these words and return how it ended."""
    try:
        return _run(words)
    except KeyboardInterrupt:
        return ExitCode.STOPPED
    except BrokenPipeError:
        let_go_of_output()
        return ExitCode.DONE
    except CannotWriteError as error:
        say(str(error))
        return ExitCode.WRONG_USAGE
    except (NavError, OSError) as error:
        return _said(error)
    except Exception as error:  # noqa: BLE001 the last resort: a fault of ours ends in words, not a trace alone
        say("a fault of our own; please report the lines below. Nothing was written.")
        traceback.print_exception(error)
        return ExitCode.OUR_FAULT


def _run(words: Sequence[str]) -> ExitCode:
    parser, verbs = _parsers()
    if not words:
        parser.print_help()
        return ExitCode.DONE
    if words[0] not in verbs and not words[0].startswith("-"):
        if not Path(words[0]).suffix and not Path(words[0]).exists():
            say(f"{words[0]} is no verb and no file; verbs: {', '.join(verbs)}; or type the name of a plan file")
            return ExitCode.WRONG_USAGE
        words = [table.VERB.name, *words]
    try:
        arguments = parser.parse_args(words)
    except SystemExit as stop:
        return ExitCode.WRONG_USAGE if stop.code else ExitCode.DONE
    return verbs[arguments.verb].run(arguments)


def _said(error: NavError | OSError) -> ExitCode:
    say(_words_of(error))
    if isinstance(error, NoAnswerError):
        return ExitCode.NO_ANSWER
    if isinstance(error, ParseError | RangeError):
        return ExitCode.WRONG_USAGE
    return ExitCode.UNREADABLE


def _words_of(error: NavError | OSError) -> str:
    if isinstance(error, ParseError):
        return f"{error.text!r}: {error}"
    if isinstance(error, PlanFileError):
        return f"{len(error.problems)} problem(s), nothing was opened\n{error}"
    if isinstance(error, OSError) and error.filename:
        return f"{error.filename}: {error.strerror or error}"
    return str(error)


def _parsers() -> tuple[argparse.ArgumentParser, dict[str, Verb]]:
    parser = _Parser(
        prog="legbook",
        description="Passage plans worked leg by leg: rhumb line against great circle, courses, times, a leg table.",
        epilog=_EPILOG,
    )
    parser.add_argument("--version", action=_Version)
    choices = parser.add_subparsers(dest="verb", metavar="VERB", required=True, parser_class=_Parser)
    for verb in VERBS:
        verb_parser = choices.add_parser(verb.name, help=verb.words, description=verb.words, epilog=CAUTION)
        verb.add_arguments(verb_parser)
    return parser, {verb.name: verb for verb in VERBS}


class _Version(argparse.Action):
    """Prints the version of the installed distribution."""

    def __init__(self, option_strings: Sequence[str], dest: str) -> None:
        super().__init__(option_strings, dest, nargs=0, help="print the version and stop")

    def __call__(self, parser: argparse.ArgumentParser, *_: object) -> None:
        from importlib.metadata import PackageNotFoundError, version

        try:
            write_data(f"legbook {version('legbook')}\n")
        except PackageNotFoundError:
            write_data("legbook, run from its source and not installed\n")
        parser.exit()
