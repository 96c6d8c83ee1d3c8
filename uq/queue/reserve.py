"""Room on the disk that is held while a job runs, so that the queue can still be told when the rest is full."""

from __future__ import annotations

from contextlib import suppress
from pathlib import Path

RESERVE = "reserve"
# A transaction of the queue writes some pages of 4 kB.
BYTES = 2**18


class Reserve:
    """A file of a job that has no meaning but its size; a context manager, which takes it away at its end."""

    def __init__(self, folder: Path) -> None:
        self._file = folder / RESERVE

    def free(self) -> None:
        """Gives the room back to whoever needs it."""
        with suppress(OSError):
            self._file.unlink(missing_ok=True)

    def __enter__(self) -> Reserve:
        # Where even that cannot be written, the job comes to grief soon enough.
        with suppress(OSError):
            self._file.write_bytes(bytes(BYTES))
        return self

    def __exit__(self, *_: object) -> None:
        self.free()
