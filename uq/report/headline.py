"""The headline numbers of a result, drawn out of its groups."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping
from typing import Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.report.answers import Driver, Estimate, Headline, InputRow, LimitAnswer, QuantityAnswer, RankingAnswer
from uq.solve.batch import Status
from uq.store.result import Result

Findings = Mapping[str, Finding]
Variables = Mapping[str, Variable]
# A place in an array: one index, or one for every dimension.
At = int | tuple[int, ...]
COMPLETE = (Status.ok, Status.ended_by_event)


def headline(result: Result) -> Headline:
    """The headline numbers of results-format: probabilities at `by`, quantiles at the last time and of outcomes, indices overall."""
    found = result.findings
    root = found[""].variables
    inputs = _inputs(found)
    return Headline(
        facts=result.attributes,
        time_unit=root["time"].unit,
        last_time=float(root["time"].data[-1]),
        limits=tuple(_limit(name, finding, root) for name, finding in _room(found, "limits")),
        watched=tuple(_quantity(name, finding, root, at_end=True) for name, finding in _room(found, "bands")),
        outcomes=tuple(_quantity(name, finding, root, at_end=False) for name, finding in _room(found, "outcomes")),
        rankings=tuple(_ranking(name, finding, found, inputs) for name, finding in _room(found, "ranking")),
        inputs=inputs,
        failed=_failed(found.get("failures")),
        warnings=tuple(str(text) for text in _data(found.get("study"), "warnings")),
        fell_back=_fell_back(found.get("solver")),
    )


def _room(found: Findings, room: str) -> Iterator[tuple[str, Finding]]:
    """The groups of a room by their own name, in the order of the file."""
    start = room + "/"
    return ((path[len(start) :], finding) for path, finding in found.items() if path.startswith(start))


def _data(finding: Finding | None, name: str) -> np.ndarray[Any, Any]:
    """A variable's data; nothing where it is not there."""
    return finding.variables[name].data if finding and name in finding.variables else np.array([])


def _estimate(variables: Variables, name: str, at: At = ()) -> Estimate:
    """A number with its interval; nan where the file does not have it."""
    names = [name + ending for ending in ("", "_low", "_high", "_if_low", "_if_high")]
    return Estimate(*(float(variables[each].data[at]) if each in variables else math.nan for each in names))


def _inputs(found: Findings) -> tuple[InputRow, ...]:
    finding = found.get("inputs")
    texts = {name: _data(finding, name) for name in ("label", "unit", "distribution", "source", "kind")}
    rows = []
    for place, name in enumerate(_data(found[""], "input")):
        evidence = int(_data(finding, "evidence")[place])
        told = {key: str(data[place]) for key, data in texts.items()}
        rows.append(InputRow(name=str(name), evidence=evidence if evidence >= 0 else None, **told))
    return tuple(rows)


def _limit(name: str, finding: Finding, root: Variables) -> LimitAnswer:
    variables, said = finding.variables, finding.attributes
    return LimitAnswer(
        name=name,
        label=said.get("label", name),
        when=said.get("when", ""),
        accept=said.get("accept"),
        verdict=said.get("verdict", ""),
        by=tuple((float(time), _estimate(variables, "ever_by", place)) for place, time in enumerate(_data(finding, "by"))),
        first_time=_at_levels(variables, "first_time", root, ()),
        reason=_reason(finding, "ever_by"),
    )


def _quantity(name: str, finding: Finding, root: Variables, at_end: bool) -> QuantityAnswer:
    variables, said = finding.variables, finding.attributes
    last = (-1,) if at_end else ()
    return QuantityAnswer(
        name=name,
        label=said.get("label", name),
        unit=said.get("unit", variables["quantiles"].unit if "quantiles" in variables else ""),
        time=float(root["time"].data[-1]) if at_end else math.nan,
        quantiles=_at_levels(variables, "quantiles", root, last),
        mean=_estimate(variables, "mean", last),
        sd=_estimate(variables, "sd", last),
        nominal=_estimate(variables, "nominal", last).value,
        missing=_estimate(variables, "missing"),
        reason=_reason(finding, "quantiles"),
    )


def _at_levels(variables: Variables, name: str, root: Variables, last: tuple[int, ...]) -> tuple[tuple[float, Estimate], ...]:
    if name not in variables:
        return ()
    levels = root["quantile"].data
    return tuple((float(level), _estimate(variables, name, (place, *last))) for place, level in enumerate(levels))


def _ranking(name: str, finding: Finding, found: Findings, inputs: tuple[InputRow, ...]) -> RankingAnswer:
    variables, said = finding.variables, finding.attributes
    of = said.get("of") or next((room for room in ("bands", "outcomes", "limits") if f"{room}/{name}" in found), "")
    ending = next((each for each in ("_overall", "_by") if f"total{each}" in variables), "")
    last = (-1,) if ending == "_by" else ()
    time = float(_data(finding, "by")[-1]) if last else math.nan
    drivers = []
    if f"total{ending}" in variables:
        for place, each in enumerate(inputs):
            estimates = (_estimate(variables, kind + ending, (place, *last)) for kind in ("first", "total"))
            drivers.append(Driver(each, *estimates))
    return RankingAnswer(name, said.get("label", name), of, time, tuple(drivers), _reason(finding, f"total{ending}"))


def _reason(finding: Finding, name: str) -> str:
    """Why a number is missing, as the finding says it."""
    variable = finding.variables.get(name)
    return str((variable.attributes.get("reason") if variable else "") or finding.attributes.get("reason", ""))


def _failed(finding: Finding | None) -> tuple[tuple[str, int], ...]:
    """The statuses that stand for a failure, with the number of solves that ended so."""
    pairs = zip(_data(finding, "status"), _data(finding, "count"), strict=True)
    return tuple((Status(int(status)).name, int(count)) for status, count in pairs if count and status not in COMPLETE)


def _fell_back(finding: Finding | None) -> tuple[str, ...]:
    names, fell = _data(finding, "state"), _data(finding, "scales_fell_back")
    return tuple(str(name) for name, back in zip(names, fell, strict=True) if back)
