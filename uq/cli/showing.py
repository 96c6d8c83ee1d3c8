"""`uq show`: a result again, from its file alone."""

from __future__ import annotations

from pathlib import Path
from shutil import get_terminal_size
from typing import TYPE_CHECKING

from uq.cli.numbers import result_of
from uq.cli.say import out

if TYPE_CHECKING:
    from uq.store.result import Result


def show_result(path: Path, json: bool) -> None:
    """Prints the text that the run printed, or its machine form."""
    from uq.store.open import open_result

    out(told(open_result(result_of(path)), json))


def told(result: Result, json: bool) -> str:
    """What a result says: text, or its machine form."""
    if json:
        from json import dumps

        from uq.report.machine import result_json

        return dumps(result_json(result), indent=1, allow_nan=False)
    from uq.report.summary import summary

    return summary(result, columns())


def columns() -> int:
    """How wide a text may be: as the terminal, though lines that are too long are hard to read; of a pipe or a file as many as these."""
    from uq.report.plain import NARROWEST_PAGE, WIDTH

    return min(max(get_terminal_size((WIDTH, 0)).columns, NARROWEST_PAGE), WIDTH)
