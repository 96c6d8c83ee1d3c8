"""What `uq compare` says: how far other results differ from the first, each difference with an interval of its own."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace
from typing import Any

import numpy as np

from uq.analysis.clocks import in_unit
from uq.analysis.differences import Draws
from uq.analysis.finding import Finding
from uq.report.answers import Answers
from uq.report.drawn import answers, data
from uq.report.headline import axes_of
from uq.report.machine import answers_json
from uq.report.plain import WIDTH, Part, Table, Text, laid, plain
from uq.report.scenarios import FAILED, compared, counts_failed
from uq.report.spoken import Clock, listed, per_cent
from uq.store.folder import SHORT
from uq.store.result import Result

# The number of the machine form; names are added under the same number, but never taken away or changed in meaning.
SCHEMA = 1
# What differences are worked out of.
ROOMS = ("limits", "bands", "outcomes")


@dataclass(frozen=True, eq=False)
class Comparison:
    """Another result, its differences from the first (the other less the first) as findings, and whether draws are shared."""

    result: Result
    findings: tuple[Finding, ...]
    draws: Draws


def compare_text(first: Result, others: Sequence[Comparison], columns: int = WIDTH) -> str:
    """Which results, then for each of the others its numbers at their last times, the differences, and what is paired; `columns` wide."""
    sections: list[list[Part]] = [["Compared with", Text(_called(first), "  ", "    ")]]
    sections += [_section(first, each) for each in others]
    return "\n\n".join("\n".join(laid(parts, columns)) for parts in sections)


def _called(result: Result) -> str:
    facts = result.attributes
    failed = f", {facts['members_failed']} failed" if facts["members_failed"] else ""
    counts = f"{facts['members']} members{failed}, seed {facts['seed']}, study {str(facts['study_fingerprint'])[:SHORT]}"
    return f"{plain(str(result.folder))}: {plain(str(facts['title']))} ({counts})"


def _section(first: Result, other: Comparison) -> list[Part]:
    facts = other.result.attributes
    own = _own(first, other)
    level = f"{per_cent(first.attributes['confidence'])} interval"
    differences = _differences(first, other)
    mine = list(compared(Clock(axes_of(first).time_unit), own, differences, facts))
    called = Text(_called(other.result), "", "    ")
    apart = [Text(f"Not compared: {plain(name)}, {why}.", "  ", "    ") for name, why in not_compared(first, other).values()]
    if not mine:
        nothing = "Nothing can be compared: no limit, outcome or watched quantity has the same name and unit in both."
        return [called, Text(nothing, "  "), *apart]
    head = ("", "here", f"{per_cent(facts['confidence'])} interval", "difference", level)
    notes = [f"Difference: this one less the first; {other.draws.words}."]
    notes += [FAILED] if counts_failed(own, differences) else []
    return [called, Table([head, *mine], (2, 4)), *(Text(note, "  ") for note in notes), *apart]


def _own(first: Result, other: Comparison) -> Answers:
    """What the other says of itself, at the times of the comparison and in the unit of time of the first."""
    here, there = axes_of(first), axes_of(other.result)
    known = np.array(here.times)
    times = in_unit(np.array(there.times), there.time_unit, here.time_unit, known)
    if times is None:
        return replace(answers(other.result.findings, there), limits=(), watched=())
    # Output times that only one has are no place for a difference.
    common = np.flatnonzero(np.isin(times, known))
    place = int(common[-1]) if len(common) else -1
    own = answers(other.result.findings, replace(there, times=tuple(times.tolist()), time_unit=here.time_unit), place=place)
    quoted = {time for answer in _differences(first, other).limits for time, _ in answer.by}
    limits = []
    for limit in own.limits:
        by = in_unit(np.array([time for time, _ in limit.by]), there.time_unit, here.time_unit, np.array(sorted(quoted)))
        told = [] if by is None else by.tolist()
        limits.append(replace(limit, by=tuple(zip(told, (estimate for _, estimate in limit.by), strict=True))))
    return replace(own, limits=tuple(limits))


def not_compared(first: Result, other: Comparison) -> dict[str, tuple[str, str]]:
    """What has a group in one of the two and no difference, or not all of it: by group its label and why."""
    here, there, compared_ = first.findings, other.result.findings, {finding.group: finding for finding in other.findings}
    found: dict[str, tuple[str, str]] = {}
    for group in dict.fromkeys([*here, *there]):
        room, _, name = group.partition("/")
        if room not in ROOMS or not name:
            continue
        label = str((here.get(group) or there[group]).attributes.get("label", name))
        if group not in compared_:
            found[group] = label, _why(first, other.result, group)
        elif room == "limits" and (only := _quoted_alone(first, other.result, group, compared_[group])):
            found[group] = label, only
    return found


def _why(first: Result, other: Result, group: str) -> str:
    here, there = first.findings.get(group), other.findings.get(group)
    if here is None or there is None:
        return "which only the first has" if there is None else "which the first has not"
    units = [str(each.attributes.get("unit", "")) for each in (here, there)]
    if units[0] != units[1]:
        return f"which is in {_unit(units[1])} here and in {_unit(units[0])} in the first: state one unit in both studies"
    clocks = [axes_of(each).time_unit for each in (first, other)]
    if group.partition("/")[0] != "outcomes" and in_unit(np.zeros(0), clocks[1], clocks[0], np.zeros(0)) is None:
        return f"since times are in {_unit(clocks[1])} here and in {_unit(clocks[0])} in the first"
    return "which has no time in common, or was not asked of both"


def _unit(text: str) -> str:
    return plain(text) if text not in ("", "1") else "no unit"


def _quoted_alone(first: Result, other: Result, group: str, difference: Finding) -> str:
    """The times by which a limit is quoted in one of the two only, each in its own unit."""
    common = data(difference, "by")
    told = []
    for result, whose in ((other, "here"), (first, "in the first")):
        axes, quoted = axes_of(result), data(result.findings[group], "by")
        same = in_unit(quoted, axes.time_unit, axes_of(first).time_unit, common)
        pairs = zip(quoted.tolist(), same.tolist() if same is not None else quoted.tolist(), strict=True)
        alone = [Clock(axes.time_unit).at(time) for time, its in pairs if its not in common]
        told += [f"by {listed(alone)}, which is quoted only {whose}"] if alone else []
    return " and ".join(told)


def _differences(first: Result, other: Comparison) -> Answers:
    return answers({finding.group: finding for finding in other.findings}, axes_of(first))


def compare_json(first: Result, others: Sequence[Comparison]) -> dict[str, Any]:
    """What `uq compare --json` prints; strict JSON as of `result_json`.

    schema, path: the first result. others: one entry for each, with path, draws ("paired" or "unpaired"), intervals (how they are worked
    out), differences: limits, bands, outcomes by name, the other less the first, in the form of `result_json`, at the last time that both
    have, in the first's unit of time. not_compared: by group of result.nc why it has no difference, or none at some time.
    """
    told = [
        {
            "path": str(each.result.path),
            "draws": each.draws.name,
            "intervals": each.draws.words,
            "differences": answers_json(_differences(first, each)),
            "not_compared": {group: why for group, (_, why) in not_compared(first, each).items()},
        }
        for each in others
    ]
    return {"schema": SCHEMA, "path": str(first.path), "others": told}
