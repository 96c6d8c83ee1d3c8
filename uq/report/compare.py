"""What `uq compare` says: how far other results differ from the first, each difference with an interval of its own."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass
from typing import Any

from uq.analysis.differences import Draws
from uq.analysis.finding import Finding
from uq.report.answers import Answers
from uq.report.drawn import answers
from uq.report.headline import axes_of
from uq.report.machine import answers_json
from uq.report.plain import WIDTH, Part, Table, Text, laid, plain
from uq.report.scenarios import FAILED, compared, counts_failed
from uq.report.spoken import Clock, per_cent
from uq.store.folder import SHORT
from uq.store.result import Result

# The number of the machine form; names are added under the same number, but never taken away or changed in meaning.
SCHEMA = 1


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
    own = answers(other.result.findings, axes_of(other.result))
    level = f"{per_cent(first.attributes['confidence'])} interval"
    differences = _differences(first, other)
    mine = list(compared(Clock(axes_of(first).time_unit), own, differences, facts))
    called = Text(_called(other.result), "", "    ")
    if not mine:
        return [called, Text("Nothing can be compared: no limit, outcome or watched quantity has the same name and unit in both.", "  ")]
    head = ("", "here", f"{per_cent(facts['confidence'])} interval", "difference", level)
    notes = [f"Difference: this one less the first; {other.draws.words}."]
    notes += [FAILED] if counts_failed(own, differences) else []
    return [called, Table([head, *mine], (2, 4)), *(Text(note, "  ") for note in notes)]


def _differences(first: Result, other: Comparison) -> Answers:
    return answers({finding.group: finding for finding in other.findings}, axes_of(first))


def compare_json(first: Result, others: Sequence[Comparison]) -> dict[str, Any]:
    """What `uq compare --json` prints; strict JSON as of `result_json`.

    schema, path: the first result. others: one entry for each, with path, draws ("paired" or "unpaired"), intervals (how they are worked
    out), differences: limits, bands, outcomes by name, the other less the first, in the form of `result_json`.
    """
    told = [
        {
            "path": str(each.result.path),
            "draws": each.draws.name,
            "intervals": each.draws.words,
            "differences": answers_json(_differences(first, each)),
        }
        for each in others
    ]
    return {"schema": SCHEMA, "path": str(first.path), "others": told}
