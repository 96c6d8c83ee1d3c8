"""Who works in a run folder: whoever holds a file in it."""

from __future__ import annotations

import contextlib
import os
import re
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

from uq.errors import StorageError
from uq.store.folder import ELSEWHERE
from uq.store.hold import hold
from uq.store.places import PROGRESS
from uq.store.whole import DRAFT, drafts

LOCK = "lock"
# The name of a draft, see `whole.put`.
OURS = re.compile(rf"\..+\.[0-9a-f]{{8}}{re.escape(DRAFT)}")


@contextmanager
def owned(folder: Path) -> Iterator[None]:
    """The run folder is this process's own while this lasts. Raises StorageError where another process works in it.

    What a killed process left half written is taken away, and so are folders that are still empty afterwards.
    """
    place = folder / PROGRESS
    made = [each for each in (folder, *folder.parents) if not each.exists()]
    try:
        handle = hold(place / LOCK)
    except OSError as error:
        raise StorageError(f"{folder} cannot be locked: {error}") from error
    if handle is None:
        raise StorageError(f"another process is working in {folder} at this moment; wait for it, or choose another folder with -o")
    _sweep(folder)
    try:
        yield
    finally:
        # The file goes first, then the lock on it: nobody can get a lock on a file that stays.
        with contextlib.suppress(OSError):
            (place / LOCK).unlink()
        os.close(handle)
        for each in (place, *made):
            with contextlib.suppress(OSError):
                each.rmdir()


def _sweep(folder: Path) -> None:
    """Takes away drafts that a killed process left: nobody else writes here now."""
    for place in (folder, folder / PROGRESS, folder / ELSEWHERE):
        for draft in [each for each in drafts(place) if OURS.fullmatch(each.name)]:
            with contextlib.suppress(OSError):
                draft.unlink()
