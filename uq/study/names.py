"""Names: what may be one, and that none stands for two things."""

from __future__ import annotations

import re
from collections.abc import Iterable, Mapping
from typing import Any

from uq.lang.words import RESERVED
from uq.study.locate import Path
from uq.study.notes import Notes

NAME = re.compile(r"[A-Za-z][A-Za-z0-9_]*")
QUANTITIES = ("states", "parameters", "terms", "forcings", "tables", "index")
ANSWERS = ("outcomes", "limits")
WORDS = {"states": "state", "parameters": "parameter", "terms": "term", "forcings": "forcing", "tables": "table", "index": "index"}
# Tables of a later version whose names stand in expressions.
NAMED_LATER = ("switches",)
# Axes of the results that stand beside quantities of the study under their names.
AXES = ("quantile", "input", "realization")
# Names that an index may not have, since it becomes an axis of the results itself: other axes there, and what stands beside them.
AXES_BESIDE = (
    *("side", "by", "group", "round", "observation", "time_measured", "input_other", "scenario_input", "state", "status", "failed"),
    *("change", "warning", "remark", "dependence", "file", "byte"),
    *("quantiles", "mean", "sd", "nominal", "simultaneous", "ended", "ever", "now", "first_time", "ever_by", "missing", "members"),
    *("first", "total", "shapley", "verdict_of"),
)


def tables(document: Mapping[str, Any], key: str) -> Mapping[str, Any]:
    """The named entries below a top-level key, as far as it is a table."""
    table = document.get(key)
    return table if isinstance(table, Mapping) else {}


def declared(document: Mapping[str, Any]) -> dict[str, Path]:
    """Every name of the one name space of quantities, with the path of its first declaration."""
    found: dict[str, Path] = {}
    for key in QUANTITIES:
        for name in tables(document, key):
            found.setdefault(name, (key, name))
    return found


def later_names(document: Mapping[str, Any]) -> set[str]:
    """Names that a later version will know."""
    return {name for key in NAMED_LATER for name in tables(document, key)}


def check_names(document: Mapping[str, Any], notes: Notes) -> None:
    """Note names that cannot be one, reserved words, and names used twice."""
    for key in (*QUANTITIES, *ANSWERS, "scenarios"):
        for name in tables(document, key):
            _check_one((key, name), name, notes)
    first: dict[str, Path] = {}
    for key in QUANTITIES:
        for name in tables(document, key):
            if name in first:
                _twice((key, name), first[name], f"a {WORDS[str(first[name][0])]}", notes)
            first.setdefault(name, (key, name))
    for name in tables(document, "outcomes"):
        if name in tables(document, "limits"):
            _twice(("limits", name), ("outcomes", name), "an outcome", notes)
    for key in ANSWERS:
        for name in tables(document, key):
            if name in tables(document, "index"):
                notes.at_key((key, name), f"the name `{name}`, which an index has", "a name of its own; results have an axis of that name")


def _check_one(path: Path, name: str, notes: Notes) -> None:
    if not NAME.fullmatch(name):
        notes.at_key(path, f"the name `{name}`", "a name of letters A-Z, a-z, digits and _, with a letter first")
    elif name in RESERVED:
        notes.at_key(path, f"the name `{name}`, which is taken by the language of expressions", "another name")
    elif name in AXES or (path[0] == "index" and name in AXES_BESIDE):
        notes.at_key(path, f"the name `{name}`, which an axis of the results has", "another name")


def _twice(path: Path, first: Path, what: str, notes: Notes) -> None:
    line = notes.places.of_key(first)[0]
    there = f" (line {line})" if line else ""
    what = what.replace("a index", "an index")
    notes.at_key(path, f"the name `{path[-1]}` for a second thing", f"a name of its own; it is {what} already{there}")


def check_watch(watch: Iterable[str], document: Mapping[str, Any], notes: Notes) -> None:
    """Note watched quantities whose name an outcome or a limit has too: results are found by name."""
    for key in ANSWERS:
        for name in watch:
            if name in tables(document, key):
                notes.at_key((key, name), f"the name `{name}` of a watched quantity", "a name of its own among all that is answered")


def differing_in_case(names: Iterable[str]) -> list[str]:
    """Warnings about names that differ only in case."""
    known: dict[str, list[str]] = {}
    for name in dict.fromkeys(names):
        known.setdefault(name.lower(), []).append(name)
    return [f"{' and '.join(f'`{n}`' for n in same)} differ only in case" for same in known.values() if len(same) > 1]
