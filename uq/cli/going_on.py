"""`uq extend`: goes on with a finished run, into another folder."""

from __future__ import annotations

from pathlib import Path

from uq.cli.progress import stopping, watching
from uq.cli.running import finished


def extend_result(path: Path, members: int | None, precision: str, output: Path | None, threads: int, json: bool) -> None:
    """Extends the result at `path` and prints what the new one says; exit codes as of `uq run`."""
    from uq.running.again import precision_asked

    wanted = precision_asked(precision)
    with watching() as observer, stopping(observer):
        from uq.cli.say import typed
        from uq.pipeline import extend

        result = extend(path, members, wanted, output, threads=threads, observer=observer, command=typed())
    finished(result, json)
