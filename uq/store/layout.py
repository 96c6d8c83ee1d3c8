"""What a result says, group by group: the findings as they are, and beside them the study, its inputs, the solver and the run."""

from __future__ import annotations

from collections.abc import Iterable
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.store.described import QUANTILE_COMMENT, described, labels, within
from uq.store.facts import RunFacts, method_words
from uq.store.inputs_group import inputs_group, texts
from uq.store.stacked import index_coordinates, stacked
from uq.study.index import entries_of, sound

if TYPE_CHECKING:
    from uq.study.study import Study

CONVENTIONS = "CF-1.11"
# The number of this layout; a reader refuses a higher one.
SCHEMA = 1


def contents(study: Study, findings: Iterable[Finding], facts: RunFacts) -> tuple[Finding, ...]:
    """Every group of result.nc but for the content fingerprint, which is worked out from them."""
    ours = [root(study, facts), study_group(study, facts), *inputs_group(study), *solver_group(study, facts)]
    ours += [*scenario_groups(study, facts), *precision_group(study, facts)]
    called = labels(study)
    by_group = {finding.group: finding for finding in ours}
    for finding in findings:
        told = described(finding, study, called)
        before = by_group.get(told.group)
        by_group[told.group] = joined(before, told) if before else told
    repeats = (*study.repeats, *(each for scenario in study.scenarios for each in scenario.study.repeats))
    return stacked(by_group.values(), repeats) if repeats else tuple(by_group.values())


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
    variables |= index_coordinates(study)
    if study.inputs.items:
        variables["input"] = texts("input", study.inputs.names, "uncertain input")
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
    solved = f"members solved with the {method_words(facts.method)}"
    # The oldest line first, as CF has it.
    history = (facts.earlier, f"{stamp} {facts.command or 'uq.run, from Python'} ({uq})")
    return {
        "source": f"{uq}: randomised quasi-Monte Carlo forecast of the study {study.name}, {solved}",
        "history": "\n".join(line for line in history if line),
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
        **{name: text for name, text in (("cluster", facts.cluster), ("stopped", facts.stopped)) if text},
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
        variables["changes"] = texts("change", changes, "changes applied to the study, as key = value")
    if study.warnings:
        variables["warnings"] = texts("warning", study.warnings, "warnings about the study")
    if study.remarks:
        variables["remarks"] = texts("remark", study.remarks, "how the files of the study were read")
    if study.files:
        content = b"".join(study.files.values())
        sizes = np.array([len(part) for part in study.files.values()], dtype=np.int64)
        variables["file"] = texts("file", tuple(study.files), "file that the study names")
        variables["file_size"] = Variable(("file",), sizes, "bytes of the file")
        variables["file_bytes"] = Variable(("byte",), np.frombuffer(content, dtype=np.uint8), "bytes of the files, one after another")
    return Finding("study", variables)


def solver_group(study: Study, facts: RunFacts) -> tuple[Finding, ...]:
    """The scale of every state, on which its absolute tolerance rests; steps and rejections come with the findings."""
    if not facts.scales:
        return ()
    scales = np.array(list(facts.scales.values()), dtype=float)
    each = {"comment": "in the unit that `unit` states for this state; absolute tolerance = accuracy x scale"}
    units = {name: state.unit for state in study.states for name in entries_of(state.name, sound(state.over) or ())}
    fell_back = np.array([name in facts.fell_back for name in facts.scales], dtype=np.int8)
    flags = {"flag_values": np.array([0, 1], dtype=np.int8), "flag_meanings": "found_in_the_pilot fell_back"}
    variables = {
        "state": texts("state", facts.scales, "state"),
        "unit": texts("state", [units[name] for name in facts.scales], "unit as written in the study"),
        "scales": Variable(("state",), scales, "scale of the state", "", each),
        "scales_fell_back": Variable(("state",), fell_back, "whether the pilot gave no scale", attributes=flags),
    }
    return (Finding("solver", variables),)


def scenario_groups(study: Study, facts: RunFacts) -> tuple[Finding, ...]:
    """Of every scenario what it is called, what it changes, and how many of its members failed."""
    groups: list[Finding] = []
    for scenario in study.scenarios:
        own = {key: value for key, value in scenario.study.changes.items() if key not in study.changes or study.changes[key] != value}
        said: dict[str, Any] = {
            "label": scenario.label or scenario.name,
            "change": "\n".join(f"{key} = {value!r}" for key, value in own.items()),
        }
        if count := facts.scenarios.get(scenario.name):
            said |= {
                "members": count.members,
                "members_solved": count.members - count.members_failed,
                "members_failed": count.members_failed,
                "solves": count.solves,
                "solves_failed": count.solves_failed,
            }
        groups += within(f"scenarios/{scenario.name}", [Finding("", {}, said)])
    return tuple(groups)


def precision_group(study: Study, facts: RunFacts) -> tuple[Finding, ...]:
    """The precision asked and what came of it; the numbers of every round come with the findings."""
    asked, reached = study.plan.precision, facts.precision
    if asked is None or reached is None:
        return ()
    wanted = {kind: getattr(asked, kind) for kind in ("quantiles", "probabilities", "indices")}
    said = {
        **{kind: float(value) for kind, value in wanted.items() if value is not None},
        "reached": int(reached.reached),
        "stopped": reached.stopped,
        "solves_needed": float(reached.solves_needed),
        "unknown": ", ".join(reached.unknown),
        "solves_allowed": reached.solves_allowed,
    }
    return (Finding("precision", {}, said),)


def joined(first: Finding, second: Finding) -> Finding:
    """Two findings of one group as one."""
    return Finding(first.group, {**first.variables, **second.variables}, {**first.attributes, **second.attributes})
