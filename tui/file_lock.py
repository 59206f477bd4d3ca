"""A lock on an open file that ends with its process, however that ends."""

from __future__ import annotations

import sys

if sys.platform == "win32":
    import msvcrt
    import os

    _FAR = 1 << 40
    """Past any journal: a locked byte can't be read by others."""

    def lock(descriptor: int) -> bool:
        """Lock the file for this process; return whether that could be done at once."""
        os.lseek(descriptor, _FAR, os.SEEK_SET)
        try:
            msvcrt.locking(descriptor, msvcrt.LK_NBLCK, 1)
        except OSError:
            return False
        return True

else:
    import fcntl

    def lock(descriptor: int) -> bool:
        """Lock the file for this process; return whether that could be done at once."""
        try:
            fcntl.flock(descriptor, fcntl.LOCK_EX | fcntl.LOCK_NB)
        except BlockingIOError:
            return False
        return True
