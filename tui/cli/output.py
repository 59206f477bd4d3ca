"""The only writer to standard output. Data goes there, in UTF-8 whatever the locale; words go to standard error."""

from __future__ import annotations

import contextlib
import io
import os
import sys
from pathlib import Path
from typing import TYPE_CHECKING

from navcore.text.plain import visible

if TYPE_CHECKING:
    from collections.abc import Iterator
    from typing import TextIO

_PROGRAM = "legbook"


class CannotWriteError(Exception):
    """Data can't go where it should; the message says where and why."""


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
        CannotWriteError: Standard output is closed.
    """
    if sys.stdout is None:
        raise CannotWriteError("standard output is closed: there is nowhere to write; give it a file, or use -o")
    if isinstance(sys.stdout, io.TextIOWrapper):
        sys.stdout.reconfigure(encoding="utf-8", errors=errors, newline="")
    return sys.stdout


@contextlib.contextmanager
def writing_to_output() -> Iterator[None]:
    """Turn what keeps standard output from taking data into words.

    Raises:
        CannotWriteError: It takes no more; a reader that has gone is no such case.
    """
    try:
        yield
    except BrokenPipeError:
        raise
    except OSError as error:
        let_go_of_output()
        message = f"standard output: {error.strerror or error}; what was written there is not whole"
        raise CannotWriteError(message) from error


def write_data(text: str) -> None:
    """Write text to standard output."""
    stream = data_stream()
    with writing_to_output():
        stream.write(text)
        stream.flush()


def write_bytes(data: bytes) -> None:
    """Write bytes to standard output."""
    stream = data_stream()
    with writing_to_output():
        stream.flush()
        stream.buffer.write(data)
        stream.buffer.flush()


def put(what: str, data: bytes, file: str | None, plan: str) -> None:
    """Write a print where it was asked for: to a file, whole or not at all, or to standard output.

    Args:
        what: Such as "leg table", said with the file's name.
        data: The print.
        file: Its name; None for standard output.
        plan: The file that the print was made from, which it must not replace.

    Raises:
        CannotWriteError: It can't be written there.
    """
    if file is None:
        write_bytes(data)
        return
    from navcore.files.store import write_whole

    if Path(file).exists() and Path(file).samefile(plan):
        raise CannotWriteError(f"{file} is the plan itself; nothing was written; give -o another file")
    try:
        write_whole(Path(file), data)
    except OSError as error:
        raise CannotWriteError(f"{file}: {error.strerror or error}; nothing was written") from error
    say(f"{what} written to {file}")


def is_terminal() -> bool:
    """Say whether standard output is a terminal."""
    return sys.stdout is not None and sys.stdout.isatty()


def let_go_of_output() -> None:
    """Point standard output at nothing, so that closing it at exit says no more of a reader that has gone."""
    nothing = os.open(os.devnull, os.O_WRONLY)
    os.dup2(nothing, 1)
