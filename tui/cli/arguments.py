"""Arguments that several verbs take, and what they are read as."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.earth.figure import WGS_84

if TYPE_CHECKING:
    import argparse

POSITION_FORMS = "such as 48°23.5'N 004°29.0'W, 4823N00429W, \"48.3917 -4.4833\" or +48.39-004.48/"


def add_figure(parser: argparse.ArgumentParser) -> None:
    """Add --figure, the figure of the Earth that lines run on."""
    parser.add_argument(
        "--figure", default=WGS_84.name, metavar="NAME", help=f"figure of the Earth ({WGS_84.name} unless said)"
    )


def add_json(parser: argparse.ArgumentParser) -> None:
    """Add --json, the answer in full precision for scripts."""
    parser.add_argument("--json", action="store_true", help="write JSON, unrounded")
