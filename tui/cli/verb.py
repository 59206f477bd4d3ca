"""What the command line knows of a verb."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    import argparse
    from collections.abc import Callable

    from tui.cli.exit_codes import ExitCode


@dataclass(frozen=True, slots=True)
class Verb:
    """A word that the command line begins with.

    Attributes:
        name: The word.
        words: What it does, in one line.
        add_arguments: Describes its arguments to a parser.
        run: Does it. What it works with is imported when it runs, so that help costs nothing.
    """

    name: str
    words: str
    add_arguments: Callable[[argparse.ArgumentParser], None]
    run: Callable[[argparse.Namespace], ExitCode]
