"""Findings as they lie in a NetCDF file, and back. Pure: `decode(encode(findings)) == findings`.

What an encoded variable says on top of a Finding's is worked out from names and units, and is taken off again by `decode`: `units`
(UDUNITS text; the text as the user wrote it stays in `unit` where it differs), `units_metadata` of temperatures, `ancillary_variables` from
an estimate to its interval, `cell_methods` of means and deviations over members, and the fill value nan.
"""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.store.unit_text import NO_OWN, units_attributes
from uq.units import Units

Array = np.ndarray[Any, Any]

# What hangs on an estimate `v`, by the ending of its name.
BESIDE = ("_low", "_high", "_if_low", "_if_high", "_achieved", "_bin_error", "_bin_error_share")
# CF-1.11 appendix E has these methods, and none for quantiles or probabilities: those carry a comment instead. The name `realization` is
# a standard name here, as section 7.3.4 allows where the dimension itself is gone.
METHODS = {"mean": "realization: mean", "sd": "realization: standard_deviation"}
OVER_MEMBERS = ("bands/", "outcomes/")
# Variables that are a width, not a place on a scale.
DEVIATIONS = ("sd", "sd_low", "sd_high")
# Groups of nothing but differences.
DIFFERENCES = "differences/"
DERIVED = ("long_name", "units", "unit", "units_metadata", "ancillary_variables", "cell_methods", "_FillValue")


@dataclass(frozen=True, eq=False)
class StoredVariable:
    """One variable of a file: dimension names, data (numbers, or str objects), attributes."""

    dims: tuple[str, ...]
    data: Array
    attributes: Mapping[str, Any]


@dataclass(frozen=True, eq=False)
class StoredGroup:
    """One group of a file: its path ("" is the root), the sizes of the dimensions that it defines itself, variables, attributes."""

    path: str
    sizes: Mapping[str, int]
    variables: Mapping[str, StoredVariable]
    attributes: Mapping[str, Any]


def encode(findings: Iterable[Finding], own: Units = NO_OWN) -> tuple[StoredGroup, ...]:
    """The groups of a file, parents before children, else in the order given; a dimension stands in the outermost group that has it.

    own: counting units of the study.
    """
    ordered = sorted(findings, key=lambda finding: _depth(finding.group))
    known: dict[str, dict[str, int]] = {}
    groups = []
    for finding in ordered:
        sizes = _own_sizes(finding, known)
        known[finding.group] = sizes
        variables = {name: _encoded(finding, name, own) for name in finding.variables}
        attributes = {name: _attribute(value) for name, value in finding.attributes.items() if value is not None}
        groups.append(StoredGroup(finding.group, sizes, variables, attributes))
    return tuple(groups)


def decode(groups: Iterable[StoredGroup]) -> tuple[Finding, ...]:
    """The findings of which these are the groups."""
    return tuple(
        Finding(group.path, {name: _decoded(variable) for name, variable in group.variables.items()}, dict(group.attributes))
        for group in groups
    )


def _depth(path: str) -> int:
    return path.count("/") + 1 if path else 0


def _above(path: str) -> list[str]:
    """The groups around a group, innermost first, the root last."""
    parts = path.split("/")
    return ["/".join(parts[:end]) for end in range(len(parts) - 1, 0, -1)] + ([""] if path else [])


def _own_sizes(finding: Finding, known: Mapping[str, Mapping[str, int]]) -> dict[str, int]:
    outer: dict[str, int] = {}
    for path in reversed(_above(finding.group)):
        outer.update(known.get(path, {}))
    own: dict[str, int] = {}
    for name, variable in finding.variables.items():
        for dim, size in zip(variable.dims, variable.data.shape, strict=True):
            if size != outer.get(dim, own.get(dim, size)):
                raise ValueError(f"{finding.group}/{name}: dimension {dim} has two lengths, {size} and {outer.get(dim, own.get(dim))}")
            if dim not in outer:
                own[dim] = size
    return own


def _encoded(finding: Finding, name: str, own: Units) -> StoredVariable:
    variable = finding.variables[name]
    data = variable.data
    deviation = name in DEVIATIONS or (finding.group.startswith(DIFFERENCES) and name not in variable.dims)
    attributes: dict[str, Any] = {"long_name": _text(variable.long_name), **units_attributes(_text(variable.unit), deviation, own)}
    beside = [name + ending for ending in BESIDE if name + ending in finding.variables]
    if beside:
        attributes["ancillary_variables"] = " ".join(beside)
    if name in METHODS and _over_members(finding.group):
        attributes["cell_methods"] = METHODS[name]
    if data.dtype.kind == "f" and name not in variable.dims:
        attributes["_FillValue"] = np.nan
    attributes |= {key: _attribute(value) for key, value in variable.attributes.items() if value is not None}
    return StoredVariable(variable.dims, _stored(data), attributes)


def _over_members(group: str) -> bool:
    """Whether a mean in this group is one over members: that of a band or an outcome, of the study or of a scenario."""
    room, _, inner = group.partition("/")
    return (inner.partition("/")[2] if room == "scenarios" else group).startswith(OVER_MEMBERS)


def _decoded(variable: StoredVariable) -> Variable:
    attributes = variable.attributes
    unit = attributes.get("unit", attributes.get("units", ""))
    kept = {name: value for name, value in attributes.items() if name not in DERIVED}
    if variable.data.dtype.kind in "iu" and "_FillValue" in attributes:
        kept["_FillValue"] = attributes["_FillValue"]
    data = variable.data
    if data.dtype.kind == "O":
        data = np.array(data.tolist(), dtype=np.str_).reshape(data.shape)
    return Variable(variable.dims, data, attributes.get("long_name", ""), unit, kept)


def _stored(data: Array) -> Array:
    if data.dtype.kind in "UO":
        texts = np.empty(data.shape, dtype=object)
        texts[...] = np.array([_text(str(text)) for text in data.ravel()], dtype=object).reshape(data.shape)
        return texts
    if data.dtype.kind == "b":
        return np.asarray(data, dtype=np.int8)
    return np.asarray(data, order="C")


def _attribute(value: Any) -> Any:
    return _text(value) if isinstance(value, str) else value


def _text(text: str) -> str:
    """A text without the character 0, at which the file format would end it; its visible sign takes its place."""
    return text.replace("\0", "\u2400")
