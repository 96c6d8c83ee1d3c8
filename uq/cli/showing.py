"""`uq show`: a result again, from its file alone."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING

from uq.cli.say import out

if TYPE_CHECKING:
    from uq.store.result import Result


def show_result(path: Path, json: bool) -> None:
    """Prints the text that the run printed, or its machine form."""
    from uq.store.open import open_result

    out(told(open_result(path), json))


def told(result: Result, json: bool) -> str:
    """What a result says: text, or its machine form."""
    if json:
        from json import dumps

        from uq.report.machine import result_json

        return dumps(result_json(result), indent=1, allow_nan=False)
    from uq.report.summary import summary

    return summary(result)
