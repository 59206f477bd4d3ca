"""How far a long read has come, on standard error when that is a terminal."""

from __future__ import annotations

import os
import stat
import sys
from typing import TYPE_CHECKING, Self

if TYPE_CHECKING:
    from types import TracebackType
    from typing import BinaryIO

_BAR_CELLS = 30


class Progress:
    """A bar for a file whose size is known, else the megabytes read; silent where standard error is no terminal."""

    def __init__(self, stream: BinaryIO) -> None:
        self._stream = stream
        self._size = _size_of(stream)
        self._shown = sys.stderr is not None and sys.stderr.isatty()
        self._read = 0

    def __enter__(self) -> Self:
        return self

    def __exit__(
        self, _kind: type[BaseException] | None, _error: BaseException | None, _t: TracebackType | None
    ) -> None:
        if self._shown:
            sys.stderr.write("\r\x1b[K")
            sys.stderr.flush()

    def show(self, rows: int) -> None:
        """Say that so many rows have been done."""
        if not self._shown:
            return
        bar = ""
        if self._size:
            part = min(1.0, self._stream.tell() / self._size)
            bar = f"{'#' * round(part * _BAR_CELLS):<{_BAR_CELLS}} {part:4.0%}  "
        sys.stderr.write(f"\r{bar}{rows} rows")
        sys.stderr.flush()


def _size_of(stream: BinaryIO) -> int:
    """Return the size of a regular file; 0 for a pipe or a terminal, whose end is not known."""
    try:
        found = os.fstat(stream.fileno())
    except OSError:
        return 0
    return found.st_size if stat.S_ISREG(found.st_mode) else 0
