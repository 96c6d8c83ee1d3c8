"""`[scenarios.NAME]`: the same draws with something changed, so that differences are not blurred by the draws."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from uq.errors import ValueMistake, suggest
from uq.study import values as read
from uq.study.fields import entry
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Refused
from uq.study.values import Frame

# What a scenario may change: tables of the study, and keys within each of their entries (none: the entry itself and all that is not prose).
CHANGEABLE: Mapping[str, tuple[str, ...]] = {
    "states": ("start", "rate", "valid"),
    "parameters": (),
    "terms": ("value",),
    "forcings": ("rows", "file", "time", "value", "interpolation", "outside"),
    "tables": ("rows", "interpolation", "outside"),
    "outcomes": ("take",),
    "limits": ("when",),
    "dependence": (),
}
_SHORT = ("parameters", "terms")
_PROSE = ("label", "source", "kind", "evidence", "group")
# Why other keys may not change.
WHY = {
    "plan": "a difference needs the same draws, members and questions on both sides",
    "time": "a difference needs the same times on both sides",
    "units": "a difference needs the same units on both sides",
    "schema": "it says how the whole file is read",
}


def changes(value: object, frame: Frame) -> Mapping[str, Any]:
    """A table of dotted keys with their new values."""
    if not isinstance(value, Mapping):
        raise ValueMistake(read.show(value), 'a table { "parameters.a" = 3 }')
    if not value:
        raise ValueMistake("nothing changed", 'a table { "parameters.a" = 3 }', "the study itself is always there to compare with")
    wrong: list[tuple[Path, ValueMistake]] = []
    for key in value:
        mistake = refusal(key)
        if mistake is not None:
            wrong.append(((key,), mistake))
    if wrong:
        raise Refused(wrong)
    return dict(value)


def refusal(key: str) -> KeyMistake | None:
    """Why a scenario may not change this key; None where it may."""
    table, *rest = key.split(".")
    found = f"a change of `{key}`"
    said = "a change within one of " + ", ".join(CHANGEABLE)
    if table in WHY:
        return KeyMistake(found, said, WHY[table])
    if table not in CHANGEABLE:
        return KeyMistake(found, said, suggest(table, CHANGEABLE))
    if table == "dependence":
        return KeyMistake(found, "a change of `dependence` as a whole") if rest else None
    if not rest or (len(rest) == 1 and table not in _SHORT):
        within = ".".join((table, "NAME", *CHANGEABLE[table][:1]))
        return KeyMistake(found, f"a change of one thing, as in {within}", f'a dotted key stands in quotes: "{within}" = ...')
    if len(rest) == 1:
        return None
    part = rest[1]
    if part == "unit":
        return KeyMistake(found, "a change of a number or an expression", WHY["units"])
    if part in _PROSE:
        return KeyMistake(found, "a change of a number or an expression", "it changes no result")
    if CHANGEABLE[table] and part not in CHANGEABLE[table]:
        return KeyMistake(found, "a change of " + " or ".join(f"`{key}`" for key in CHANGEABLE[table]), suggest(part, CHANGEABLE[table]))
    return None


@dataclass(frozen=True, kw_only=True)
class ScenarioTable:
    """`[scenarios.NAME]`: the study with something changed; differences from the study itself are given."""

    name: str
    label: str = entry("how it is called in reports", read.text, "", "the name")
    change: Mapping[str, Any] = entry('{ "parameters.a" = 3, ... }: dotted keys in quotes with their new values', changes)
