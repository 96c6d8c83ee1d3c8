"""`uq extend`: goes on with a finished run, into another folder."""

from __future__ import annotations

from collections.abc import Mapping
from pathlib import Path

from uq.cli.numbers import is_number, result_of
from uq.cli.progress import stopping, watching
from uq.cli.running import finished


def extend_result(path: Path, members: int | None, precision: str, output: Path | None, threads: int, json: bool) -> None:
    """Extends the result at `path` and prints what the new one says; exit codes as of `uq run`.

    The new result of a job stands where that of `uq run` would: the folder of the job belongs to the queue.
    """
    from uq.running.again import precision_asked

    wanted = precision_asked(precision)
    if is_number(path):
        path = result_of(path)
        output = output or beside_no_job(path, members, wanted)
    with watching() as observer, stopping(observer):
        from uq.cli.say import typed
        from uq.pipeline import extend

        result = extend(path, members, wanted, output, threads=threads, observer=observer, command=typed())
    finished(result, json)


def beside_no_job(path: Path, members: int | None, precision: Mapping[str, float]) -> Path:
    """The folder that a run of the extended study would have by itself."""
    from uq.running.again import extended, study_of
    from uq.store.folder import default_folder
    from uq.store.open import open_result

    result = open_result(path)
    return default_folder(extended(study_of(result), result.attributes["members"], members, precision))
