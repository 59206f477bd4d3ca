"""What the process says to the shell when it ends."""

from __future__ import annotations

from enum import IntEnum


class ExitCode(IntEnum):
    """Exit codes; scripts rely on them."""

    DONE = 0
    NO_ANSWER = 1
    """A finding that must be answered, or an answer that does not exist; the reason is on standard error."""
    WRONG_USAGE = 2
    """Also where nothing can be written."""
    UNREADABLE = 3
    OUR_FAULT = 4
    STOPPED = 130
