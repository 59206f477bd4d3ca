"""What the workbook keeps for its user between two runs: a folder of his own, and the plans opened last."""

from __future__ import annotations

import contextlib
import hashlib
from pathlib import Path
from typing import TYPE_CHECKING

from platformdirs import user_state_path

from navcore.files.store import read_bytes_capped

if TYPE_CHECKING:
    from collections.abc import Iterable

MOST_RECENT = 12
_MOST_BYTES = 64 * 1024


class State:
    """The user's state folder; made when first written to."""

    def __init__(self, folder: Path | None = None) -> None:
        self.folder = folder or user_state_path("legbook", appauthor=False)

    def recent(self) -> tuple[Path, ...]:
        """Return the plans opened or saved last, the newest first; those that are gone are left out."""
        try:
            text = read_bytes_capped(self._recent_file, _MOST_BYTES).decode("utf-8", "surrogateescape")
        except OSError:
            return ()
        paths = (Path(line) for line in text.splitlines() if line)
        return tuple(path for path in paths if path.is_file())[:MOST_RECENT]

    def remember(self, path: Path) -> None:
        """Put a plan at the head of the recent ones. Where the folder can't be written, nothing is remembered."""
        newest = path.absolute()
        self._write([newest, *(other for other in self.recent() if other != newest)])

    def own_file(self, path: Path, suffix: str) -> Path:
        """Return a file of this folder that stands for a plan somewhere else."""
        mark = hashlib.sha256(str(path.absolute()).encode("utf-8", "surrogateescape")).hexdigest()[:12]
        return self.folder / f"{path.name[:80]}-{mark}{suffix}"

    def make_folder(self) -> None:
        """Make the folder; where that can't be done, whoever writes there finds out."""
        with contextlib.suppress(OSError):
            self.folder.mkdir(parents=True, exist_ok=True)

    @property
    def _recent_file(self) -> Path:
        return self.folder / "recent"

    def _write(self, paths: Iterable[Path]) -> None:
        lines = [str(path) for path in paths if "\n" not in str(path)][:MOST_RECENT]
        self.make_folder()
        with contextlib.suppress(OSError):
            # Not forced to the disk, unlike a plan: that would hold up the first picture, and little is lost with it.
            new = self._recent_file.with_suffix(".new")
            new.write_bytes("".join(f"{line}\n" for line in lines).encode("utf-8", "surrogateescape"))
            new.replace(self._recent_file)
