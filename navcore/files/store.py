"""Whole files: read no further than allowed, and written so that on the disk is always the old file or the new one.

The new bytes go to a temporary file in the same folder, are forced to the disk, and take the old file's place in one
step that the system does whole or not at all.
"""

from __future__ import annotations

import contextlib
import errno
import os
import secrets
import stat
from pathlib import Path

_NEW_FILE_MODE = 0o666


def read_bytes_capped(path: Path | str, most_bytes: int) -> bytes:
    """Return a file's bytes; of a file longer than `most_bytes` one byte more than that, so that its reader can tell.

    Raises:
        OSError: The file can't be read.
    """
    with Path(path).open("rb") as file:
        return file.read(most_bytes + 1)


def write_whole(path: Path | str, data: bytes) -> None:
    """Write a file whole. Where that fails, the old file is as it was and nothing new lies beside it.

    A symbolic link stays one: the file that it leads to is written. The old file's permissions are kept.

    Raises:
        OSError: It can't be written.
    """
    target = _resolved(Path(path))
    mode = target.stat().st_mode if target.exists() else None
    if mode is not None and not stat.S_ISREG(mode):
        target.write_bytes(data)  # a pipe or a device: nothing to keep, and never to be replaced by a file
        return
    if mode is not None and not os.access(target, os.W_OK):
        raise PermissionError(errno.EACCES, "the file is read-only", str(target))
    temporary = target.with_name(f".legbook-{secrets.token_hex(8)}.new")
    try:
        _write_new(temporary, data, mode)
        temporary.replace(target)
    except BaseException as error:
        # Whatever stops it, an interrupt too: nothing half-written stays behind.
        with contextlib.suppress(OSError):
            temporary.unlink()
        if isinstance(error, OSError):
            raise OSError(error.errno, error.strerror, str(path)) from error
        raise
    _sync_folder(target.parent)


def _resolved(path: Path) -> Path:
    try:
        return path.resolve()
    except RuntimeError as error:
        raise OSError(errno.ELOOP, "the links to the file lead round in a circle", str(path)) from error


def _write_new(path: Path, data: bytes, mode: int | None) -> None:
    flags = os.O_WRONLY | os.O_CREAT | os.O_EXCL | getattr(os, "O_BINARY", 0)
    descriptor = os.open(path, flags, _NEW_FILE_MODE if mode is None else mode & 0o777 | 0o200)
    with os.fdopen(descriptor, "wb") as file:
        file.write(data)
        if mode is not None:
            path.chmod(stat.S_IMODE(mode))
        file.flush()
        os.fsync(file.fileno())


def _sync_folder(folder: Path) -> None:
    """Force the folder's entry to the disk, where the system can; the new file is in its place by now."""
    if os.name != "posix":
        return
    with contextlib.suppress(OSError):
        descriptor = os.open(folder, os.O_RDONLY)
        try:
            os.fsync(descriptor)
        finally:
            os.close(descriptor)
