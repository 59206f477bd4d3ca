"""Arguments that several verbs take, and what they are read as."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from navcore.earth.figure import WGS_84
from navcore.errors import ParseError

if TYPE_CHECKING:
    import argparse
    from collections.abc import Mapping

POSITION_FORMS = "such as 48°23.5'N 004°29.0'W, 4823N00429W, \"48.3917 -4.4833\" or +48.39-004.48/"


def add_figure(parser: argparse.ArgumentParser) -> None:
    """Add --figure, the figure of the Earth that lines run on."""
    parser.add_argument(
        "--figure", default=WGS_84.name, metavar="NAME", help=f"figure of the Earth ({WGS_84.name} unless said)"
    )


def add_json(parser: argparse.ArgumentParser) -> None:
    """Add --json, the answer in full precision for scripts."""
    parser.add_argument("--json", action="store_true", help="write JSON, unrounded")


def add_output(parser: argparse.ArgumentParser, endings: Mapping[str, str], usual: str) -> None:
    """Add --as and -o: how a print is written and where to.

    Args:
        parser: Where they are added.
        endings: The medium that each ending of a file stands for.
        usual: The medium where neither says.
    """
    words = f"how it is written; by the ending of -o FILE, else {usual}, unless said"
    parser.add_argument("--as", dest="medium", choices=tuple(endings.values()), help=words)
    parser.add_argument("-o", dest="file", metavar="FILE", help="write it to FILE, whole or not at all")


def medium_of(arguments: argparse.Namespace, endings: Mapping[str, str], usual: str) -> str:
    """Return how a print is written, as --as or the file's ending says.

    Raises:
        ParseError: The file's ending stands for no medium, and --as was not given.
    """
    if arguments.medium is not None:
        return str(arguments.medium)
    ending = "" if arguments.file is None else Path(arguments.file).suffix
    if not ending:
        return usual
    if ending.lower() not in endings:
        at = len(arguments.file) - len(ending)
        advice = f"end the file with one of {', '.join(endings)}, or say --as"
        raise ParseError(
            arguments.file, (at, len(arguments.file)), f"{ending} stands for no print of this kind", advice
        )
    return endings[ending.lower()]
