"""`uq compare`: how the answers of results differ."""

from __future__ import annotations

from collections.abc import Sequence
from pathlib import Path

from uq.cli.numbers import result_of
from uq.cli.say import out
from uq.errors import UseMistake


def compare_results(paths: Sequence[Path], threads: int, json: bool) -> None:
    """Prints the differences of all others from the first, or their machine form."""
    if len(paths) < 2:
        raise UseMistake("one result", "two or more to compare")
    from uq.pipeline import compare

    first, others = compare([result_of(path) for path in paths], threads=threads)
    if json:
        from json import dumps

        from uq.report.compare import compare_json

        out(dumps(compare_json(first, others), indent=1, allow_nan=False))
    else:
        from uq.report.compare import compare_text

        out(compare_text(first, others))
