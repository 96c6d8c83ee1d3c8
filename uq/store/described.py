"""Findings as a reader of the file meets them: with labels, flags, comments and names that can stand beside shared axes."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.solve.batch import Status

if TYPE_CHECKING:
    from uq.study.study import Study

QUANTILE_COMMENT = "The quantile at p is the smallest value whose share of members at or below reaches p."
INTERVAL_COMMENT = " Its interval inverts the spread over replicates of the distribution function there (Woodruff 1952)."
# Coordinates that groups below inherit.
AXES = ("time", "quantile", "input", "realization")
SIDES = np.array(["low", "high"])
# Rooms that repeat the groups of others below the name of a scenario, and a room that repeats them below its own.
OF_SCENARIOS = ("scenarios", "differences")
PRECISION = "precision"
# The dimension of what is given by input in a scenario that has inputs which the study has not.
OTHER_INPUTS = "scenario_input"


def within(prefix: str, findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Findings below a group of their own, as in within("scenarios/early", findings)."""
    return tuple(Finding(f"{prefix}/{each.group}" if each.group else prefix, each.variables, each.attributes) for each in findings)


def labels(study: Study) -> Mapping[str, dict[str, Any]]:
    """What every group about one thing is called, by path: labels, and what a limit asks."""
    found: dict[str, dict[str, Any]] = {}
    for room, quantities in (("bands", study.watched), ("outcomes", study.outcome_quantities)):
        for quantity in quantities:
            called = {"label": quantity.label or quantity.name, "unit": quantity.unit}
            found[f"{room}/{quantity.name}"] = found[f"measured/{quantity.name}"] = called
            found[f"ranking/{quantity.name}"] = {**called, "of": room}
    for limit in study.limits_asked:
        called = {"label": limit.label or limit.name, "when": limit.when}
        found[f"limits/{limit.name}"] = {**called, "accept": limit.accept}
        found[f"ranking/{limit.name}"] = {**called, "of": "limits"}
    return found


def described(finding: Finding, study: Study, called: Mapping[str, dict[str, Any]]) -> Finding:
    """A finding with its label, and with what CF wants of flags, sides and quantiles; those of scenarios and of precision likewise."""
    room, _, name = finding.group.partition("/")
    if room in OF_SCENARIOS and name:
        return _of_scenario(finding, study, called)
    if room == PRECISION and name:
        inner = described(Finding(name, finding.variables, finding.attributes), study, called)
        return Finding(f"{room}/{inner.group}", inner.variables, inner.attributes)
    members = room == "members" and name
    inputs = {item.name: item for item in study.inputs.items} if finding.group == "members/inputs" else {}
    variables = {}
    for key, variable in finding.variables.items():
        if item := inputs.get(key):
            variable = Variable(variable.dims, variable.data, item.label or item.name, item.unit, variable.attributes)
        variables[free_name(key) if members else key] = _told(key, variable)
    if "side" not in variables and any("side" in variable.dims for variable in variables.values()):
        variables["side"] = Variable(("side",), SIDES, "end of a range")
    group = f"{room}/{free_name(name)}" if name else room
    return Finding(group, variables, {**called.get(finding.group, {}), **finding.attributes})


def _of_scenario(finding: Finding, study: Study, called: Mapping[str, dict[str, Any]]) -> Finding:
    """A finding below scenarios/S or differences/S: inside as everywhere.

    What is given by input is so along those of the study, then along those that only the scenario has (a dimension of its own then).
    """
    room, scenario, path = finding.group.split("/", 2)
    inner = Finding(path, finding.variables, finding.attributes)
    if room == "differences":
        said = {group: {"label": each["label"]} for group, each in called.items()}
        told = described(inner, study, said)
        variables = {name: _as_difference(each) for name, each in told.variables.items()}
        return Finding(f"{room}/{free_name(scenario)}/{told.group}", variables, told.attributes)
    own = next(each.study for each in study.scenarios if each.name == scenario)
    told = described(inner, own, labels(own))
    names = (*study.inputs.names, *(name for name in own.inputs.names if name not in study.inputs.names))
    if len(names) == len(study.inputs.names):
        return Finding(f"{room}/{free_name(scenario)}/{told.group}", told.variables, told.attributes)
    variables = {name: _along_others(each) for name, each in told.variables.items()}
    if any(OTHER_INPUTS in each.dims for each in variables.values()):
        variables[OTHER_INPUTS] = Variable((OTHER_INPUTS,), np.array(names, dtype=np.str_), "uncertain input, those of the scenario last")
    return Finding(f"{room}/{free_name(scenario)}/{told.group}", variables, told.attributes)


def _along_others(variable: Variable) -> Variable:
    dims = tuple(OTHER_INPUTS if dim == "input" else dim for dim in variable.dims)
    return Variable(dims, variable.data, variable.long_name, variable.unit, variable.attributes)


def _as_difference(variable: Variable) -> Variable:
    attributes = {name: value for name, value in variable.attributes.items() if name != "comment"}
    return Variable(variable.dims, variable.data, variable.long_name, variable.unit, attributes)


def free_name(name: str) -> str:
    """The name under which a quantity stands in the file: a sign follows the name of a shared axis, which xarray would take it for.

    No two names become one: `input` becomes `input_`, and `input_` becomes `input__`.
    """
    return name + "_" if name.rstrip("_") in AXES else name


def _told(name: str, variable: Variable) -> Variable:
    attributes: dict[str, Any] = {} if variable.unit else {"comment": "each in the unit of its input, see /inputs/unit"}
    if name in ("status", "failure_status") and variable.data.dtype.kind in "iu":
        kind = variable.data.dtype.type
        attributes["flag_values"] = np.array([status.value for status in Status], dtype=kind)
        attributes["flag_meanings"] = " ".join(status.name for status in Status)
        attributes["standard_name"] = "status_flag"
    if name == "realization":
        attributes["standard_name"] = "realization"
    if name in ("quantiles", "first_time") and "quantile" in variable.dims:
        attributes["comment"] = QUANTILE_COMMENT + INTERVAL_COMMENT
    return Variable(variable.dims, variable.data, variable.long_name, variable.unit, {**attributes, **variable.attributes})
