"""What repeats over an index, stacked: the groups bands/T[0], bands/T[1], ... as one group bands/T whose arrays have an axis for the index.

In: findings entry by entry. Out: findings with a group for the whole. Must not know: how a number was made.

The axis of an index stands before `time` and `by`, else last. A number that one entry has and another has not is missing (nan) there.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.study.index import Repeat, keys_of_entries

if TYPE_CHECKING:
    from uq.study.study import Study

# The attribute of a stacked group that names its axes, as the key of the study does.
OVER = "over"
# Before which axes that of an index stands.
BEFORE = ("time", "by")
# Variables that are the same for all entries.
SAME = ("members",)
# How verdicts on all entries make one: the first of these that any has.
WORST = ("not met", "not settled", "met")
# Attributes of which all that entries say is kept.
GATHERED = ("reason",)


def index_coordinates(study: Study) -> dict[str, Variable]:
    """The coordinates of all axes that indices give to results: numbers from 0, or labels."""
    found: dict[str, Variable] = {}
    for repeat in study.repeats:
        for dim, index in zip(repeat.dims, repeat.over, strict=True):
            labels = np.arange(len(index)) if index.counted else np.array(index.labels, dtype=np.str_)
            found[dim] = Variable((dim,), labels, f"entry of the index {index.of}")
    return found


def stacked(findings: Iterable[Finding], repeats: Iterable[Repeat]) -> tuple[Finding, ...]:
    """Findings in which what repeats has one group, or one variable where entries are variables; in the order of the first entries."""
    owners = {entry: repeat for repeat in repeats for entry in repeat.entries}
    groups: dict[str, Finding | tuple[Repeat, dict[str, Finding]]] = {}
    for finding in findings:
        above, _, name = finding.group.rpartition("/")
        repeat = owners.get(name)
        if repeat is None:
            groups[finding.group] = _with_variables_stacked(finding, owners)
        else:
            known = groups.setdefault(f"{above}/{repeat.name}", (repeat, {}))
            if isinstance(known, tuple):
                known[1][name] = finding
    return tuple(each if isinstance(each, Finding) else _group(path, *each) for path, each in groups.items())


def _with_variables_stacked(finding: Finding, owners: Mapping[str, Repeat]) -> Finding:
    """A finding whose variables are named like entries, as those of /members are."""
    if not any(name in owners for name in finding.variables):
        return finding
    variables: dict[str, Variable] = {}
    for name, variable in finding.variables.items():
        repeat = owners.get(name)
        if repeat is None:
            variables[name] = variable
        elif repeat.name not in variables:
            every = [finding.variables.get(entry) for entry in repeat.entries]
            variables[repeat.name] = _along(every, repeat, repeat.label)
    return Finding(finding.group, variables, finding.attributes)


def _group(path: str, repeat: Repeat, entries: Mapping[str, Finding]) -> Finding:
    """The group of the whole."""
    found = [entries.get(entry) for entry in repeat.entries]
    there = [finding for finding in found if finding is not None]
    variables: dict[str, Variable] = {}
    for name in dict.fromkeys(name for finding in there for name in finding.variables):
        every = [finding.variables.get(name) if finding is not None else None for finding in found]
        first = next(variable for variable in every if variable is not None)
        axis = first.dims == (name,) or name in SAME
        long_name = first.long_name.replace(f"{repeat.label} [{keys_of_entries(repeat.over)[0]}]", repeat.label)
        variables[name] = first if axis else _along(every, repeat, long_name)
    attributes = _attributes([finding.attributes for finding in there])
    verdicts = [str(finding.attributes.get("verdict", "")) if finding is not None else "" for finding in found]
    if any(verdicts):
        told = np.array(verdicts, dtype=np.str_).reshape([len(index) for index in repeat.over])
        variables["verdict_of"] = Variable(repeat.dims, told, "verdict on every entry")
        attributes["verdict"] = next((each for each in WORST if each in verdicts), "")
    label = {"label": repeat.label} if any("label" in finding.attributes for finding in there) else {}
    return Finding(path, variables, {**attributes, **label, OVER: " ".join(repeat.dims)})


def _along(every: list[Variable | None], repeat: Repeat, long_name: str) -> Variable:
    """One variable of all entries with the axes of the index where they belong."""
    first = next(variable for variable in every if variable is not None)
    place = next((first.dims.index(dim) for dim in BEFORE if dim in first.dims), len(first.dims))
    data = np.stack([_missing(first) if variable is None else variable.data for variable in every], axis=place)
    data = data.reshape(*data.shape[:place], *(len(index) for index in repeat.over), *data.shape[place + 1 :])
    dims = (*first.dims[:place], *repeat.dims, *first.dims[place:])
    return Variable(dims, data, long_name, first.unit, _attributes([each.attributes for each in every if each is not None]))


def _missing(like: Variable) -> np.ndarray[Any, Any]:
    return np.full(like.data.shape, np.nan if like.data.dtype.kind == "f" else np.zeros((), like.data.dtype)[()])


def _attributes(every: list[Mapping[str, Any]]) -> dict[str, Any]:
    """What all entries say alike, and all that any says of a reason."""
    found: dict[str, Any] = {}
    for key in dict.fromkeys(key for each in every for key in each):
        values = [each.get(key) for each in every]
        if key in GATHERED:
            found[key] = "; ".join(dict.fromkeys(str(value) for value in values if value))
        elif all(_alike(value, values[0]) for value in values):
            found[key] = values[0]
    return found


def _alike(one: Any, other: Any) -> bool:
    return bool(np.array_equal(np.asarray(one), np.asarray(other)))


def apart(finding: Finding, coordinates: Mapping[str, Variable]) -> dict[str, Finding]:
    """A stacked group entry by entry, by the names of the entries; what `stacked` gathered stays with each of them."""
    dims = str(finding.attributes[OVER]).split()
    labels = [[str(label) for label in coordinates[dim].data.tolist()] for dim in dims]
    above, _, name = finding.group.rpartition("/")
    found: dict[str, Finding] = {}
    for places in np.ndindex(*(len(each) for each in labels)):
        key = ",".join(each[place] for each, place in zip(labels, places, strict=True))
        at = dict(zip(dims, places, strict=True))
        variables = {each: _entry(variable, at) for each, variable in finding.variables.items() if each != "verdict_of"}
        attributes = {each: value for each, value in finding.attributes.items() if each != OVER}
        if "label" in attributes:
            attributes["label"] = f"{attributes['label']} [{key}]"
        if "verdict_of" in finding.variables:
            attributes["verdict"] = str(finding.variables["verdict_of"].data[places])
        found[f"{name}[{key}]"] = Finding(f"{above}/{name}[{key}]", variables, attributes)
    return found


def _entry(variable: Variable, at: Mapping[str, int]) -> Variable:
    chosen = tuple(at.get(dim, slice(None)) for dim in variable.dims)
    dims = tuple(dim for dim in variable.dims if dim not in at)
    return Variable(dims, np.asarray(variable.data[chosen]), variable.long_name, variable.unit, variable.attributes)
