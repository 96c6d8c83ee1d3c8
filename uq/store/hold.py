"""Holding a file: an operating-system lock, released by the kernel when the process that has it dies, whatever the clocks do."""

from __future__ import annotations

import contextlib
import os
from pathlib import Path

# Attempts to lock a file which another process takes away just then.
_ATTEMPTS = 100


def hold(file: Path) -> int | None:
    """A handle of the file, made with its folder where it is not there, and locked until it is closed; None where another holds it.

    A process begun with a program of its own does not share the lock; a plain fork does, until both have closed it or are dead.
    Raises OSError.
    """
    for _ in range(_ATTEMPTS):
        file.parent.mkdir(parents=True, exist_ok=True)
        try:
            handle = os.open(file, os.O_RDWR | os.O_CREAT, 0o644)
        except FileNotFoundError:  # the folder was taken away just now
            continue
        if not _lock(handle):
            os.close(handle)
            return None
        with contextlib.suppress(OSError):
            # The lock is on the file that was opened, which may have been taken away since.
            if os.path.samestat(os.fstat(handle), os.stat(file)):
                return handle
        os.close(handle)
    return None


def _lock(handle: int) -> bool:
    """Whether this process could get the lock, without waiting."""
    try:
        if os.name == "nt":
            import msvcrt

            msvcrt.locking(handle, msvcrt.LK_NBLCK, 1)  # type: ignore[attr-defined]
        else:
            import fcntl

            fcntl.flock(handle, fcntl.LOCK_EX | fcntl.LOCK_NB)
    except (BlockingIOError, PermissionError):
        return False
    return True
