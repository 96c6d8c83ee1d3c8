"""A run that is killed at a place of our own choosing: `python -m tests.killed STUDY FOLDER PLACE NUMBER`.

The process ends by SIGKILL, as at a power cut, when it comes to a place for the NUMBER-th time; with another place than those below it runs
to its end. Progress is kept after every block, so that there is much to be cut off.
"""

from __future__ import annotations

import os
import signal
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any

import uq
from uq.running.keeping import Pace
from uq.running.part import Gathering
from uq.running.start import Start
from uq.store import whole

# After a block was gathered; in the middle of writing a file; before and after it is flushed; before and after it gets its name.
PLACES = ("block", "draft", "flush", "flushed", "name", "named")


class Fault:
    """Kills the process when it comes to a place for the last time it may."""

    def __init__(self, place: str, number: int) -> None:
        self.place, self.left = place, number

    def __call__(self, place: str) -> None:
        if place == self.place:
            self.left -= 1
            if self.left <= 0:
                os.kill(os.getpid(), signal.SIGKILL)


def around(fault: Fault, before: str, after: str, call: Callable[..., Any]) -> Callable[..., Any]:
    def called(*arguments: Any, **named: Any) -> Any:
        fault(before)
        try:
            return call(*arguments, **named)
        finally:
            fault(after)

    return called


def cut_off(fault: Fault, put: Callable[..., None]) -> Callable[..., None]:
    """Writes half of what a draft should hold before the process may end."""

    def called(target: Path, write: Callable[[Path], object]) -> None:
        def half(draft: Path) -> object:
            written = write(draft)
            if fault.place == "draft" and fault.left == 1:
                os.truncate(draft, draft.stat().st_size // 2)
            fault("draft")
            return written

        put(target, half)

    return called


def main(study: str, folder: str, place: str, number: int) -> None:
    fault = Fault(place, number)
    for module in [each for name, each in sys.modules.items() if name.startswith("uq.store")]:
        if getattr(module, "put", None) is whole.put and module is not whole:
            module.put = cut_off(fault, whole.put)  # type: ignore[attr-defined]
    whole.flush = around(fault, "flush", "flushed", whole.flush)
    Path.replace = around(fault, "name", "named", Path.replace)  # type: ignore[method-assign]
    Gathering.add = around(fault, "gather", "block", Gathering.add)  # type: ignore[method-assign]
    result = uq.run(uq.read_study(study), folder, start=Start(pace=Pace(0.0, 0.0)), block_rows=16)
    sys.stdout.write(f"{result.attributes['content_fingerprint']}\n")


if __name__ == "__main__":
    import uq.store.folder
    import uq.store.keeper
    import uq.store.saved
    import uq.store.tallies

    main(*sys.argv[1:4], int(sys.argv[4]))
