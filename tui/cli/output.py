"""The only writer to standard output. Data goes there, in UTF-8 whatever the locale; words go to standard error."""

from __future__ import annotations

import io
import os
import sys
from typing import TYPE_CHECKING

from navcore.text.plain import visible

if TYPE_CHECKING:
    from typing import TextIO

_PROGRAM = "legbook"


class ClosedOutputError(Exception):
    """Standard output was closed before the program started, so there is nowhere to write data."""


def say(words: str) -> None:
    """Write a line to standard error."""
    if sys.stderr is not None:
        encoding = sys.stderr.encoding or "utf-8"
        shown = "\n".join(visible(line) for line in words.split("\n"))
        sys.stderr.write(f"{_PROGRAM}: {shown}\n".encode(encoding, "backslashreplace").decode(encoding))


def data_stream(errors: str = "backslashreplace") -> TextIO:
    """Return standard output as UTF-8 text with line ends as given.

    Args:
        errors: What becomes of a character that UTF-8 does not have.

    Raises:
        ClosedOutputError: Standard output is closed.
    """
    if sys.stdout is None:
        raise ClosedOutputError
    if isinstance(sys.stdout, io.TextIOWrapper):
        sys.stdout.reconfigure(encoding="utf-8", errors=errors, newline="")
    return sys.stdout


def write_data(text: str) -> None:
    """Write text to standard output."""
    stream = data_stream()
    stream.write(text)
    stream.flush()


def write_bytes(data: bytes) -> None:
    """Write bytes to standard output."""
    stream = data_stream()
    stream.flush()
    stream.buffer.write(data)
    stream.buffer.flush()


def is_terminal() -> bool:
    """Say whether standard output is a terminal."""
    return sys.stdout is not None and sys.stdout.isatty()


def let_go_of_output() -> None:
    """Point standard output at nothing, so that closing it at exit says no more of a reader that has gone."""
    nothing = os.open(os.devnull, os.O_WRONLY)
    os.dup2(nothing, 1)
