"""`[units]`: counting units of a study's own, such as person."""

from __future__ import annotations

from collections.abc import Mapping
from typing import Any

from uq.errors import ValueMistake
from uq.study.locate import Path
from uq.study.notes import KeyMistake
from uq.study.values import show
from uq.units import Units

NEW = "new"


def own_units(document: Mapping[str, Any]) -> tuple[Units, tuple[tuple[Path, ValueMistake], ...]]:
    """The units that can stand, and what is wrong with the others."""
    given = document.get("units", {})
    if not isinstance(given, Mapping):
        return Units(), ((("units",), ValueMistake(show(given), f'a table [units] with person = "{NEW}" and the like')),)
    own = Units()
    wrong: list[tuple[Path, ValueMistake]] = []
    for name, meaning in given.items():
        try:
            own = Units((*own.names, name))
        except ValueMistake as mistake:
            wrong.append((("units", name), KeyMistake(mistake.found, mistake.expected, mistake.remedy)))
            continue
        if meaning != NEW:
            remedy = "other units are built in"
            wrong.append((("units", name), ValueMistake(show(meaning), f'"{NEW}", for a unit that counts something', remedy)))
    return own, tuple(wrong)
