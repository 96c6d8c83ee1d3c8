"""A study of one member: every input at its value there, and the tolerances that it was solved with."""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any

from uq.study.changes import changed, paths_of
from uq.study.study import Study
from uq.study.toml import read_toml
from uq.study.uncertain import DISTRIBUTION_FIELD
from uq.study.written import toml_text

# What a single member has no use for.
_LEFT_OUT = ("scenarios", "measured", "dependence")
_PLAN_LEFT_OUT = ("precision", "at_most", "keep")
START = "_start"


def fixed_study(study: Study, values: Mapping[str, float], tolerances: Mapping[str, float], comment: str) -> str:
    """The text of a study whose members are all the one with these `values` by input, in the inputs' units.

    tolerances: absolute tolerance by state, in its unit; written as `negligible`. An input stays an input, so that the code that is solved
    is the same to the letter: a fixed number may be calculated with before it is solved. Its distribution has no other value than the one
    (a second one, which a distribution needs, has a weight that vanishes beside 1).
    """
    document, notes = read_toml(study.text, study.name)
    notes.changed = paths_of(study.changes)
    document = changed(document, study.changes, notes)
    made: dict[str, Any] = {key: table for key, table in document.items() if key not in _LEFT_OUT}
    parameters, states = made.get("parameters", {}), made["states"]
    for name, value in values.items():
        if name in parameters:
            parameters[name] = _fixed(parameters[name], value)
        else:
            state = states[name.removesuffix(START)]
            state["start"] = _fixed(state["start"], value)
    for name, tolerance in tolerances.items():
        states[name]["negligible"] = tolerance
    plan = {key: value for key, value in made.get("plan", {}).items() if key not in _PLAN_LEFT_OUT}
    made["plan"] = {**plan, "ask": ["bands"], "members": 1}
    return "".join(f"# {line}\n" for line in comment.splitlines()) + toml_text(made)


def _fixed(table: Mapping[str, Any], value: float) -> dict[str, Any]:
    kept = {key: each for key, each in table.items() if key not in DISTRIBUTION_FIELD}
    return {**kept, "discrete": {"values": [value, math.nextafter(value, math.inf)], "weights": [1, 1e-300]}}
