"""The entry point: python -m tui, and the legbook command; the one module that sees both verbs and workbook."""

from __future__ import annotations

import os
import sys
from pathlib import Path

from tui.cli.main import VERBS, run


def main() -> int:
    """Run the words of the command line, or open the workbook where they ask for it; return the exit code."""
    words = sys.argv[1:]
    if _asks_for_workbook(words):
        return _open_workbook(Path(words[0]) if words else None)
    return run(words)


def _asks_for_workbook(words: list[str]) -> bool:
    """Say whether these words are no verb but at most a plan, typed at a terminal."""
    if len(words) > 1 or (words and (words[0].startswith("-") or words[0] in {verb.name for verb in VERBS})):
        return False
    return all(stream is not None and stream.isatty() for stream in (sys.stdin, sys.stdout))


def _open_workbook(path: Path | None) -> int:
    # Threads of the linear algebra that nothing here uses would only hold up the first picture.
    os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")
    # Imported here, so that a verb costs no interface.
    from tui.app import Workbook
    from tui.session import Session
    from tui.state import State

    workbook = Workbook(Session(State()), path)
    workbook.run()
    return workbook.return_code or 0


if __name__ == "__main__":
    sys.exit(main())
