"""What a result says, group by group: the findings as they are, and beside them the study, its inputs, the solver and the run."""

from __future__ import annotations

from collections.abc import Iterable, Mapping
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.solve.batch import Status
from uq.store.facts import RunFacts

if TYPE_CHECKING:
    from uq.study.study import Study

CONVENTIONS = "CF-1.11"
# The number of this layout; a reader refuses a higher one.
SCHEMA = 1
QUANTILE_COMMENT = "The quantile at p is the smallest value whose share of members at or below reaches p."
INTERVAL_COMMENT = " Its interval inverts the spread over replicates of the distribution function there (Woodruff 1952)."
EVIDENCE = (
    "a_guess",
    "one_persons_range",
    "handbook_or_a_similar_case",
    "measured_elsewhere_or_once_here",
    "measured_here_repeatedly",
)
NOT_STATED = -1
# Coordinates that groups below inherit.
AXES = ("time", "quantile", "input", "realization")
SIDES = np.array(["low", "high"])


def contents(study: Study, findings: Iterable[Finding], facts: RunFacts) -> tuple[Finding, ...]:
    """Every group of result.nc but for the content fingerprint, which is worked out from them."""
    ours = [root(study, facts), study_group(study, facts), *inputs_group(study), *solver_group(study, facts)]
    labels = _labels(study)
    by_group = {finding.group: finding for finding in ours}
    for finding in findings:
        described = _described(finding, study, labels)
        before = by_group.get(finding.group)
        by_group[finding.group] = _joined(before, described) if before else described
    return tuple(by_group.values())


def root(study: Study, facts: RunFacts) -> Finding:
    """The shared coordinates, and the facts of the run as attributes."""
    time = Variable(("time",), study.times.solved[study.times.grid], "time", study.time.unit)
    levels = Variable(
        ("quantile",),
        np.asarray(study.plan.quantiles, dtype=float),
        "quantile level (non-exceedance probability)",
        attributes={"comment": QUANTILE_COMMENT},
    )
    variables = {"time": time, "quantile": levels}
    if study.inputs.items:
        variables["input"] = _texts("input", study.inputs.names, "uncertain input")
    return Finding("", variables, {**_of_study(study), **_of_run(study, facts)})


def _of_study(study: Study) -> dict[str, Any]:
    return {
        "Conventions": CONVENTIONS,
        "title": study.title,
        "about": study.about,
        "caution": study.caution,
        "schema": SCHEMA,
        "study": study.name,
        "study_fingerprint": study.fingerprint,
        "ask": " ".join(study.plan.ask),
        "failures": study.plan.failures,
        "confidence": float(study.plan.confidence),
    }


def _of_run(study: Study, facts: RunFacts) -> dict[str, Any]:
    uq = f"uq {facts.versions.get('uq', '')}".rstrip()
    stamp = facts.finished.isoformat(timespec="seconds")
    return {
        "source": f"{uq}: randomised quasi-Monte Carlo forecast of the study {study.name}, members solved with {facts.method}",
        "history": f"{stamp} {facts.command or 'run'} ({uq})",
        "date_created": stamp,
        # Any non-negative integer may be a seed; the file's integers end at 64 bits.
        "seed": facts.seed if facts.seed < 2**63 else str(facts.seed),
        "members_asked": facts.members_asked,
        "members": facts.members,
        "members_solved": facts.members - facts.members_failed,
        "members_failed": facts.members_failed,
        "solves": facts.solves,
        "solves_failed": facts.solves_failed,
        "replicates": facts.replicates,
        "wall_time": float(facts.wall_time),
        "seconds_per_solve": float(facts.seconds_per_solve),
        "threads": facts.threads,
        "method": facts.method,
        "accuracy": float(facts.accuracy),
        **{f"version_{name}": text for name, text in facts.versions.items()},
        "processor": facts.processor,
    }


def study_group(study: Study, facts: RunFacts) -> Finding:
    """The study as it was read, the files it names, and what was changed: enough to run it again."""
    variables = {
        "text": Variable((), np.array(study.text), "the study file as it was read"),
        "members": Variable((), np.array(facts.members), "members reached"),
    }
    if study.changes:
        changes = [f"{key} = {value!r}" for key, value in study.changes.items()]
        variables["changes"] = _texts("change", changes, "changes applied to the study, as key = value")
    if study.warnings:
        variables["warnings"] = _texts("warning", study.warnings, "warnings about the study")
    if study.remarks:
        variables["remarks"] = _texts("remark", study.remarks, "how the files of the study were read")
    if study.files:
        content = b"".join(study.files.values())
        sizes = np.array([len(part) for part in study.files.values()], dtype=np.int64)
        variables["file"] = _texts("file", tuple(study.files), "file that the study names")
        variables["file_size"] = Variable(("file",), sizes, "bytes of the file")
        variables["file_bytes"] = Variable(("byte",), np.frombuffer(content, dtype=np.uint8), "bytes of the files, one after another")
    return Finding("study", variables)


def inputs_group(study: Study) -> tuple[Finding, ...]:
    """One row for every uncertain input; numbers are in the unit of their input."""
    items = study.inputs.items
    if not items:
        return ()
    levels = np.asarray(study.plan.quantiles, dtype=float)
    each = {"comment": "in the unit that `unit` states for this input"}
    evidence = np.array([NOT_STATED if item.evidence is None else item.evidence for item in items], dtype=np.int8)
    flags = {"_FillValue": np.int8(NOT_STATED), "flag_values": np.arange(len(EVIDENCE), dtype=np.int8), "flag_meanings": " ".join(EVIDENCE)}
    at_levels = np.array([item.distribution.quantile(levels) for item in items])
    variables = {
        "label": _texts("input", [item.label for item in items], "label"),
        "unit": _texts("input", [item.unit for item in items], "unit as written in the study"),
        "distribution": _texts("input", [item.distribution.words() for item in items], "distribution in words"),
        "mean": Variable(("input",), np.array([item.mean() for item in items], dtype=float), "mean", "", each),
        "sd": Variable(("input",), np.array([item.sd() for item in items], dtype=float), "standard deviation", "", each),
        "quantiles": Variable(("input", "quantile"), at_levels, "quantiles", "", each),
        "source": _texts("input", [item.source for item in items], "source; empty: not stated"),
        "kind": _texts("input", [item.kind for item in items], "knowledge (could be reduced) or variability (cannot); empty: not stated"),
        "evidence": Variable(("input",), evidence, "how good the evidence is", attributes=flags),
        "group_of": _texts("input", [item.group for item in items], "group; empty: none"),
    }
    return (Finding("inputs", variables),)


def solver_group(study: Study, facts: RunFacts) -> tuple[Finding, ...]:
    """The scale of every state, on which its absolute tolerance rests; steps and rejections come with the findings."""
    if not facts.scales:
        return ()
    scales = np.array(list(facts.scales.values()), dtype=float)
    each = {"comment": "in the unit that `unit` states for this state; absolute tolerance = accuracy x scale"}
    units = {state.name: state.unit for state in study.states}
    fell_back = np.array([name in facts.fell_back for name in facts.scales], dtype=np.int8)
    flags = {"flag_values": np.array([0, 1], dtype=np.int8), "flag_meanings": "found_in_the_pilot fell_back"}
    variables = {
        "state": _texts("state", facts.scales, "state"),
        "unit": _texts("state", [units[name] for name in facts.scales], "unit as written in the study"),
        "scales": Variable(("state",), scales, "scale of the state", "", each),
        "scales_fell_back": Variable(("state",), fell_back, "whether the pilot gave no scale", attributes=flags),
    }
    return (Finding("solver", variables),)


def _texts(dim: str, texts: Iterable[str], long_name: str) -> Variable:
    return Variable((dim,), np.array(list(texts), dtype=np.str_), long_name)


def _labels(study: Study) -> Mapping[str, dict[str, Any]]:
    """What every group about one thing is called, by path: labels, and what a limit asks."""
    labels: dict[str, dict[str, Any]] = {}
    for room, quantities in (("bands", study.watched), ("outcomes", study.outcome_quantities)):
        for quantity in quantities:
            called = {"label": quantity.label or quantity.name, "unit": quantity.unit}
            labels[f"{room}/{quantity.name}"] = called
            labels[f"ranking/{quantity.name}"] = {**called, "of": room}
    for limit in study.limits_asked:
        called = {"label": limit.label or limit.name, "when": limit.when}
        labels[f"limits/{limit.name}"] = {**called, "accept": limit.accept}
        labels[f"ranking/{limit.name}"] = {**called, "of": "limits"}
    return labels


def _described(finding: Finding, study: Study, labels: Mapping[str, dict[str, Any]]) -> Finding:
    """A finding with its label, and with what CF wants of flags, sides and quantiles."""
    room, _, name = finding.group.partition("/")
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
    return Finding(group, variables, {**labels.get(finding.group, {}), **finding.attributes})


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


def _joined(first: Finding, second: Finding) -> Finding:
    return Finding(first.group, {**first.variables, **second.variables}, {**first.attributes, **second.attributes})
