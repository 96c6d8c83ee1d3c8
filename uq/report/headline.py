"""The headline numbers of a result, drawn out of its groups."""

from __future__ import annotations

import math
from collections.abc import Iterable

import numpy as np

from uq.analysis.finding import Finding
from uq.report.answers import Headline, InputRow, Pair, ScenarioAnswer, Work
from uq.report.drawn import Axes, Findings, answers, binned, data, measured, ranking, room, widest
from uq.report.entries import by_entry
from uq.report.precise import precision, settled
from uq.report.spoken import clock_of
from uq.report.withheld import kept_back, ranking_kept_back, refused_from
from uq.solve.batch import Status
from uq.store.result import Result

COMPLETE = (Status.ok, Status.ended_by_event)
# Correlations nearer to 0 than this are not asked for: a normal correlation is told as a rank correlation, which rounds.
NO_CORRELATION = 1e-12


def headline(result: Result) -> Headline:
    """The headline numbers of results-format: probabilities at `by`, quantiles at the last time and of outcomes, indices overall."""
    found, axes = by_entry(result.findings), axes_of(result)
    inputs = _inputs(found)
    since = refused_from(found, axes.times, result.attributes)
    mine = kept_back(answers(found, axes), since)
    return Headline(
        facts=result.attributes,
        clock=clock_of(axes.time_unit, str(data(found.get("study"), "text"))),
        times=axes.times,
        limits=mine.limits,
        watched=mine.watched,
        outcomes=mine.outcomes,
        rankings=tuple(ranking_kept_back(ranking(name, finding, found, inputs), since) for name, finding in room(found, "ranking")),
        inputs=inputs,
        failed=_failed(found.get("failures")),
        warnings=tuple(str(text) for text in data(found.get("study"), "warnings")),
        fell_back=_fell_back(found.get("solver")),
        work=_work(found.get("solver")),
        pairs=tuple(_pairs(found, inputs)),
        dependence=tuple(str(text) for text in data(found.get("inputs"), "dependence")),
        scenarios=tuple(_scenario(name, found, axes) for name, _ in room(found, "scenarios") if "/" not in name),
        measured=tuple(measured(name, finding) for name, finding in room(found, "measured")),
        precision=precision(found, inputs, axes, result.attributes),
        settled=settled(found, inputs, axes, result.attributes) if since == math.inf else None,
        widest=widest(found, axes),
        binned=tuple(binned(found, axes)),
    )


def axes_of(result: Result) -> Axes:
    """The shared coordinates of a result."""
    root = result.findings[""].variables
    return Axes(tuple(root["time"].data.tolist()), root["time"].unit, tuple(root["quantile"].data.tolist()))


def _inputs(found: Findings) -> tuple[InputRow, ...]:
    finding = found.get("inputs")
    texts = {name: data(finding, name) for name in ("label", "unit", "distribution", "source", "kind")}
    rows = []
    for place, name in enumerate(data(found[""], "input")):
        evidence = int(data(finding, "evidence")[place])
        told = {key: str(each[place]) for key, each in texts.items()}
        group = str(data(finding, "group_of")[place])
        rows.append(InputRow(name=str(name), evidence=evidence if evidence >= 0 else None, group=group, **told))
    return tuple(rows)


def _pairs(found: Findings, inputs: tuple[InputRow, ...]) -> Iterable[Pair]:
    """The inputs that go together; results of earlier versions say nothing of it."""
    asked, achieved = (data(found.get("inputs"), name) for name in ("correlation", "correlation_achieved"))
    if not asked.size:
        return
    for one, other in zip(*np.nonzero(np.triu(np.abs(asked) > NO_CORRELATION, 1)), strict=True):
        came = float(achieved[one, other]) if achieved.size else math.nan
        yield Pair(inputs[one], inputs[other], float(asked[one, other]), came)


def _scenario(name: str, found: Findings, axes: Axes) -> ScenarioAnswer:
    said = found[f"scenarios/{name}"].attributes
    differences = {path: each for path, each in found.items() if path.startswith(f"differences/{name}/")}
    return ScenarioAnswer(
        name=name,
        label=said.get("label", name),
        change=tuple(str(said.get("change", "")).splitlines()),
        facts=said,
        answers=answers(found, axes, f"scenarios/{name}/"),
        differences=answers(differences, axes, f"differences/{name}/"),
        intervals=next((str(each.attributes.get("intervals", "")) for each in differences.values()), ""),
    )


def _failed(finding: Finding | None) -> tuple[tuple[str, int], ...]:
    """The statuses that stand for a failure, with the number of solves that ended so."""
    pairs = zip(data(finding, "status"), data(finding, "count"), strict=True)
    return tuple((Status(int(status)).name, int(count)) for status, count in pairs if count and status not in COMPLETE)


def _work(finding: Finding | None) -> Work | None:
    """The work of all solves; results of earlier versions know nothing of stiff steps."""
    told = [data(finding, name) for name in ("steps", "rejections", "switches", "stiff_share")]
    if not all(each.size for each in told):
        return None
    steps, rejections, switches = (int(each) for each in told[:3])
    return Work(steps, rejections, switches, float(told[3]))


def _fell_back(finding: Finding | None) -> tuple[str, ...]:
    names, fell = data(finding, "state"), data(finding, "scales_fell_back")
    return tuple(str(name) for name, back in zip(names, fell, strict=True) if back)
