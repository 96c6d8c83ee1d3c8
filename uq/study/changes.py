"""Changes to a study by dotted key, and the fingerprint of what a study says."""

from __future__ import annotations

import copy
import hashlib
import json
from collections.abc import Iterator, Mapping
from typing import Any

from uq.design.design import rounded_up
from uq.errors import ValueMistake, suggest
from uq.study.counting import own_units
from uq.study.locate import Path
from uq.study.notes import KeyMistake, Notes
from uq.study.uncertain import DISTRIBUTION_KEYS
from uq.study.values import show
from uq.units import Units, parse_quantity

NAMED = ("units", "index", "states", "parameters", "terms", "forcings", "tables", "outcomes", "limits", "scenarios", "measured")
# Tables that a change makes where they are not there.
_MADE = (("plan",), ("time",), ("plan", "precision"), ("plan", "at_most"))
# The order of these is the order of the output, or the place of an input in the design; the order of all others says nothing.
_ORDERED = ("states", "parameters", "outcomes", "limits")
# Keys of which only one may stand: setting one takes the place of the others.
_EITHER = (("points", "every", "at"), ("value", *DISTRIBUTION_KEYS))
_KEPT = ("unit", "label", "group", "over", "edge")


def changed(document: Mapping[str, Any], changes: Mapping[str, object], notes: Notes) -> dict[str, Any]:
    """The document with `changes` made; what cannot be changed is noted."""
    own, _ = own_units(document)
    made = copy.deepcopy(dict(document))
    for key, value in changes.items():
        path = tuple(key.split("."))
        try:
            _change(made, path, copy.deepcopy(value), own)
        except ValueMistake as mistake:
            notes.refused(path, mistake)
    return made


def _change(document: dict[str, Any], path: tuple[str, ...], value: Any, own: Units) -> None:
    table: Any = document
    for depth, part in enumerate(path[:-1]):
        inner = table.get(part)
        if inner is None and path[: depth + 1] in _MADE:
            inner = table[part] = {}
        if inner is None:
            raise KeyMistake(f"a change of `{part}`, which is not in the study", "a key of the study", suggest(part, table))
        if not isinstance(inner, dict):
            raise KeyMistake(f"a change below {show(inner)}", f"a change of {'.'.join(path[: depth + 1])} itself")
        table = inner
    last = path[-1]
    whole = len(path) == 1 and last != "dependence" and (last not in table or isinstance(table[last], dict))
    if whole or (path[0] in NAMED and len(path) == 2 and last not in table):
        raise KeyMistake(f"a change of `{last}`, which is not in the study", "a key within a table", suggest(last, table))
    if len(path) == 2 and path[0] == "parameters":
        table[last] = _other_number(table[last], value, own)
        return
    for other in _gives_way(last):
        table.pop(other, None)
    table[last] = value


def _gives_way(key: str) -> Iterator[str]:
    """The keys whose place another one takes."""
    for group in _EITHER:
        if key in group:
            yield from group
    yield from {"rows": ("file", "time", "value"), "file": ("rows",), "value": ("truncate",)}.get(key, ())


def _other_number(old: Any, new: Any, own: Units) -> Any:
    """A parameter with another number: its unit and label remain, its source and evidence, which belong to the old one, do not."""
    if isinstance(new, dict):
        return new
    if isinstance(old, dict):
        return {**{key: old[key] for key in _KEPT if key in old}, "value": new}
    quantity = parse_quantity(old, own) if isinstance(old, str) else None
    return new if quantity is None else {"unit": quantity[1].text, "value": new}


def paths_of(changes: Mapping[str, object]) -> tuple[Path, ...]:
    """The key paths of changes."""
    return tuple(tuple(key.split(".")) for key in changes)


def fingerprint(document: Mapping[str, Any], files: Mapping[str, bytes], version: str) -> str:
    """A sha256 over what a study says: comments, blanks and the order of keys that says nothing do not count.

    Numbers of members that are rounded up to the same are the same.
    """
    content = {
        "study": _canonical(document),
        "files": {name: hashlib.sha256(content).hexdigest() for name, content in files.items()},
        "version": version,
    }
    text = json.dumps(content, sort_keys=True, ensure_ascii=True, separators=(",", ":"))
    return hashlib.sha256(text.encode()).hexdigest()


def _canonical(document: Mapping[str, Any]) -> dict[str, Any]:
    plan = document.get("plan", {})
    if "members" in plan:
        document = {**document, "plan": {**plan, "members": rounded_up(int(plan["members"]))}}
    return {
        key: [[name, _plain(inner)] for name, inner in value.items()] if key in _ORDERED and isinstance(value, Mapping) else _plain(value)
        for key, value in document.items()
    }


def _plain(value: Any) -> Any:
    """A value in one form: 3 and 3.0 are the same number."""
    if isinstance(value, Mapping):
        return {key: _plain(inner) for key, inner in value.items()}
    if isinstance(value, list | tuple):
        return [_plain(inner) for inner in value]
    if isinstance(value, float) and value.is_integer():
        return int(value)
    return value
