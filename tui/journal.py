"""The recovery journal: every committed change of the open plan, a line of JSON each, so that a crash loses none.

The first line holds the whole plan that the changes start from, so that recovery needs no other file. A line reaches
the system before the change is painted, which a killed process can't take back; a thread forces it to the disk soon
after, off the path of the keys. The file is held locked while its plan is open: a second copy sees that, and after a
crash the lock is gone but the file is not. A line that was cut off ends what can be recovered.
"""

from __future__ import annotations

import contextlib
import json
import os
import socket
import threading
from dataclasses import asdict, dataclass
from typing import TYPE_CHECKING, Any

from navcore.plan.model import Plan
from tui.file_lock import lock
from tui.plan_record import apply_changes, record_changes

if TYPE_CHECKING:
    from pathlib import Path

SUFFIX = ".recovery"
VERSION = 1
_SYNC_AFTER_S = 0.2
_MOST_BYTES = 1 << 30


@dataclass(frozen=True, slots=True)
class Holder:
    """Who has a plan open.

    Attributes:
        pid: Its process.
        host: On which computer.
    """

    pid: int
    host: str


@dataclass(frozen=True, slots=True)
class Typing:
    """Text in an open row, not yet taken.

    Attributes:
        index: The index that the waypoint would get, or has.
        text: As typed so far.
        changes: Whether it is the text of the waypoint there, being changed.
        waiting: Pasted lines that are still to be mended: the line's number, its index in the plan, and its text.
    """

    index: int
    text: str
    changes: bool = False
    waiting: tuple[tuple[int, int, str], ...] = ()


@dataclass(frozen=True, slots=True)
class Recovered:
    """What a journal holds.

    Attributes:
        base: The plan that the changes start from.
        base_mark: Mark of the file that it was read from; "" for none.
        steps: Each committed change: its name and the plan after it.
        typing: Text in an open row that was not taken.
    """

    base: Plan
    base_mark: str
    steps: tuple[tuple[str, Plan], ...]
    typing: Typing | None

    @property
    def has_changes(self) -> bool:
        """Whether there is anything that the file does not have."""
        return bool(self.steps) or self.typing is not None


class JournalHeldError(Exception):
    """Another copy has the plan open.

    Attributes:
        holder: Which; None where it can't be told.
    """

    def __init__(self, holder: Holder | None) -> None:
        self.holder = holder
        super().__init__("another copy has this plan open")


class Journal:
    """The journal of one open plan."""

    def __init__(self, path: Path) -> None:
        """Open and hold the file; what a crash has left in it can be read before anything is written.

        Raises:
            JournalHeldError: Another copy holds it.
            OSError: It can't be made there.
        """
        self.path = path
        self._descriptor = _open_held(path)
        self._base, self._mark = Plan(), ""
        self._started = False
        self._syncer = _Syncer(self._descriptor)

    def recovered(self) -> Recovered | None:
        """Return what an earlier run has left here; None for nothing."""
        return _Replay(_read_all(self._descriptor)).recovered()

    def resume(self) -> None:
        """Go on after what was recovered; what comes after it, such as a line that was cut off, goes."""
        os.ftruncate(self._descriptor, _Replay(_read_all(self._descriptor)).end)
        self._started = True

    def start(self, base: Plan, mark: str) -> None:
        """Begin again from a plan: what was in the file goes, and the plan is written with the first change."""
        os.ftruncate(self._descriptor, 0)
        self._base, self._mark = base, mark
        self._started = False
        self._append({"holder": asdict(Holder(os.getpid(), socket.gethostname()))})

    def keep(self, name: str, before: Plan, after: Plan) -> None:
        """Append a committed change.

        Raises:
            OSError: It can't be written: the disk is full, for example.
        """
        self._append_base()
        self._append({"step": name, "changes": record_changes(before, after)})

    def keep_typing(self, typing: Typing | None) -> None:
        """Append the text of the open row; None when it was taken or given up.

        Raises:
            OSError: As keep.
        """
        self._append_base()
        self._append({"typing": typing and asdict(typing)})

    def close(self, *, discard: bool = True) -> None:
        """Let go of the file; what it holds goes too, unless it is to be recovered."""
        self._syncer.stop()
        with contextlib.suppress(OSError):
            if discard:
                self.path.unlink()
            else:
                os.fsync(self._descriptor)
        os.close(self._descriptor)

    def _append_base(self) -> None:
        if not self._started:
            self._append({"version": VERSION, "mark": self._mark, "base": record_changes(Plan(), self._base)})
            self._started = True

    def _append(self, record: dict[str, Any]) -> None:
        data = json.dumps(record, separators=(",", ":")).encode("ascii") + b"\n"
        while data:
            data = data[os.write(self._descriptor, data) :]
        self._syncer.wake()


class _Syncer:
    """Forces what was appended to the disk, in a thread that starts with the first change."""

    def __init__(self, descriptor: int) -> None:
        self._descriptor = descriptor
        self._due = threading.Event()
        self._stopped = threading.Event()
        self._thread: threading.Thread | None = None

    def wake(self) -> None:
        self._due.set()
        if self._thread is None:
            self._thread = threading.Thread(target=self._run, name="journal", daemon=True)
            self._thread.start()

    def stop(self) -> None:
        self._stopped.set()
        self._due.set()
        if self._thread is not None:
            self._thread.join()

    def _run(self) -> None:
        while not self._stopped.wait(_SYNC_AFTER_S):
            self._due.wait()
            self._due.clear()
            with contextlib.suppress(OSError):
                os.fsync(self._descriptor)


def _open_held(path: Path) -> int:
    """Return a descriptor of the file, locked, that is the file which the path names."""
    while True:
        descriptor = os.open(path, os.O_RDWR | os.O_CREAT | os.O_APPEND | getattr(os, "O_BINARY", 0), 0o600)
        if not lock(descriptor):
            holder = _holder(_read_all(descriptor))
            os.close(descriptor)
            raise JournalHeldError(holder)
        with contextlib.suppress(OSError):
            if os.path.samestat(os.fstat(descriptor), path.stat()):
                return descriptor
        # Whoever held it took it away between the two calls: what we hold now has no name.
        os.close(descriptor)


def _read_all(descriptor: int) -> list[tuple[dict[str, Any], int]]:
    """Return the records up to the first that is no whole line of JSON, each with where its line ends."""
    os.lseek(descriptor, 0, os.SEEK_SET)
    with os.fdopen(os.dup(descriptor), "rb") as file:
        lines = file.read(_MOST_BYTES).split(b"\n")[:-1]
    records: list[tuple[dict[str, Any], int]] = []
    end = 0
    for line in lines:
        end += len(line) + 1
        try:
            record = json.loads(line)
        except (ValueError, RecursionError):
            break
        if not isinstance(record, dict):
            break
        records.append((record, end))
    return records


def _holder(records: list[tuple[dict[str, Any], int]]) -> Holder | None:
    try:
        return Holder(**records[0][0]["holder"])
    except (LookupError, TypeError):
        return None


class _Replay:
    """Records made into plans, as far as they make sense."""

    def __init__(self, records: list[tuple[dict[str, Any], int]]) -> None:
        self.base: Plan | None = None
        self.mark = ""
        self.typing: Typing | None = None
        self.steps: list[tuple[str, Plan]] = []
        self.end = 0
        for record, end in records:
            try:
                self._take(record)
            except (LookupError, TypeError, ValueError, AttributeError):
                break
            self.end = end

    def _take(self, record: dict[str, Any]) -> None:
        if "base" in record:
            self.base, self.mark = apply_changes(Plan(), record["base"]), str(record["mark"])
        elif "step" in record and self.base is not None:
            before = self.steps[-1][1] if self.steps else self.base
            self.steps.append((str(record["step"]), apply_changes(before, record["changes"])))
        elif "typing" in record:
            self.typing = _read_typing(record["typing"])

    def recovered(self) -> Recovered | None:
        return None if self.base is None else Recovered(self.base, self.mark, tuple(self.steps), self.typing)


def _read_typing(values: dict[str, Any] | None) -> Typing | None:
    if values is None:
        return None
    waiting = tuple((number, index, text) for number, index, text in values.pop("waiting"))
    return Typing(**values, waiting=waiting)
