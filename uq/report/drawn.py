"""Answers drawn out of the groups of a result, wherever these stand: below the root, below a scenario, or fresh from the analysis."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from uq.analysis.finding import Finding, Variable
from uq.analysis.places import ranked_in
from uq.report.answers import (
    Answers,
    BinnedAnswer,
    Driver,
    Estimate,
    InputRow,
    LimitAnswer,
    MeasuredAnswer,
    QuantityAnswer,
    RankingAnswer,
    Shares,
)
from uq.report.spoken import MOST_LISTED, listed

Findings = Mapping[str, Finding]
Variables = Mapping[str, Variable]
# A spread that is larger than another by this factor is worth showing beside it.
WIDER = 1.2
# A place in an array: one index, or one for every dimension.
At = int | tuple[int, ...]


@dataclass(frozen=True)
class Axes:
    """The shared coordinates: output times with their unit, levels of the quantiles."""

    times: tuple[float, ...]
    time_unit: str
    levels: tuple[float, ...]


def room(found: Findings, path: str) -> Iterator[tuple[str, Finding]]:
    """The groups of a room by their own name, in the order of the file."""
    start = path + "/"
    return ((group[len(start) :], finding) for group, finding in found.items() if group.startswith(start))


def data(finding: Finding | None, name: str) -> np.ndarray[Any, Any]:
    """A variable's data; nothing where it is not there."""
    return finding.variables[name].data if finding and name in finding.variables else np.array([])


def estimate(variables: Variables, name: str, at: At = ()) -> Estimate:
    """A number with its interval; nan where the file does not have it."""
    names = [name + ending for ending in ("", "_low", "_high", "_if_low", "_if_high")]
    return Estimate(*(float(variables[each].data[at]) if each in variables else math.nan for each in names))


def answers(found: Findings, axes: Axes, prefix: str = "", place: int = -1) -> Answers:
    """What is answered in the groups limits, bands and outcomes below a prefix such as "scenarios/early/"; place: the time of the bands."""
    return Answers(
        limits=tuple(_limit(name, finding, axes) for name, finding in room(found, f"{prefix}limits")),
        watched=tuple(_quantity(name, finding, axes, (place,)) for name, finding in room(found, f"{prefix}bands")),
        outcomes=tuple(_quantity(name, finding, axes, ()) for name, finding in room(found, f"{prefix}outcomes")),
    )


def widest(found: Findings, axes: Axes) -> tuple[QuantityAnswer, ...]:
    """Watched quantities at the time where their members spread most, where that is clearly more than at the last time."""
    answered = []
    for name, finding in room(found, "bands"):
        quantiles = data(finding, "quantiles")
        if quantiles.ndim != 2 or len(quantiles) < 2:
            continue
        spread = quantiles[-1] - quantiles[0]
        place = int(np.argmax(np.where(np.isfinite(spread), spread, -np.inf)))
        if spread[place] > WIDER * spread[-1] and len(spread) == len(axes.times):
            answered.append(_quantity(name, finding, axes, (place,)))
    return tuple(answered)


def _limit(name: str, finding: Finding, axes: Axes) -> LimitAnswer:
    variables, said = finding.variables, finding.attributes
    return LimitAnswer(
        name=name,
        label=said.get("label", name),
        when=said.get("when", ""),
        accept=said.get("accept"),
        verdict=said.get("verdict", ""),
        by=tuple((float(time), estimate(variables, "ever_by", place)) for place, time in enumerate(data(finding, "by"))),
        first_time=_at_levels(variables, "first_time", axes, ()),
        reason=_reason(finding, "ever_by"),
        given="ever_by" in variables and variables["ever_by"].attributes.get("given") == "success",
        ever=tuple(zip(axes.times, data(finding, "ever_high").tolist(), strict=False)),
    )


def _quantity(name: str, finding: Finding, axes: Axes, at: tuple[int, ...]) -> QuantityAnswer:
    """A watched quantity at the place of a time, or an outcome, which has no place."""
    variables, said = finding.variables, finding.attributes
    times = data(finding, "time") if "time" in variables else np.array(axes.times)
    return QuantityAnswer(
        name=name,
        label=said.get("label", name),
        unit=said.get("unit", variables["quantiles"].unit if "quantiles" in variables else ""),
        time=float(times[at[0]]) if at and len(times) else math.nan,
        quantiles=_at_levels(variables, "quantiles", axes, at),
        mean=estimate(variables, "mean", at),
        sd=estimate(variables, "sd", at),
        nominal=estimate(variables, "nominal", at).value,
        missing=estimate(variables, "missing"),
        reason=_reason(finding, "quantiles"),
        cautions=tuple(_cautions(variables)),
    )


def _cautions(variables: Variables) -> Iterator[str]:
    """What the file says of a mean and a deviation that rest on few members (a mean never without its deviation)."""
    said = {name: variables[name].attributes.get("caution") for name in ("mean", "sd") if name in variables}
    if said.get("sd"):
        others = "its mean and all shares of its variance" if said["mean"] else "all shares of its variance"
        yield f"its standard deviation, like {others}, {said['sd']}"


def _at_levels(variables: Variables, name: str, axes: Axes, last: tuple[int, ...]) -> tuple[tuple[float, Estimate], ...]:
    if name not in variables:
        return ()
    return tuple((level, estimate(variables, name, (place, *last))) for place, level in enumerate(axes.levels))


def ranking(name: str, finding: Finding, found: Findings, inputs: tuple[InputRow, ...]) -> RankingAnswer:
    """The shares in one thing: overall for a watched quantity, at the last `by` for a limit."""
    variables, said = finding.variables, finding.attributes
    of = said.get("of") or next((each for each in ("bands", "outcomes", "limits") if f"{each}/{name}" in found), "")
    ending = next((each for each in ("_overall", "_by") if f"total{each}" in variables), "")
    last = (-1,) if ending == "_by" else ()
    time = float(data(finding, "by")[-1]) if last else math.nan

    def shares(place: int, whose: str = "") -> Shares:
        return Shares(*(estimate(variables, kind + whose + ending, (place, *last)) for kind in ("first", "total", "shapley")))

    shapley = f"shapley{ending}" in variables
    drivers = tuple(Driver(each, shares(place)) for place, each in enumerate(inputs)) if f"total{ending}" in variables else ()
    groups = tuple((str(group), shares(place, "_group")) for place, group in enumerate(data(finding, "group")))
    places = placed(finding, drivers, groups)
    reason = _reason(finding, f"{'first' if shapley else 'total'}{ending}")
    no_total = _reason(finding, f"total{ending}") if shapley else ""
    return RankingAnswer(name, said.get("label", name), of, time, drivers, reason, groups, shapley, no_total, places)


def placed(finding: Finding, drivers: Sequence[Driver], groups: Sequence[tuple[str, Shares]]) -> tuple[Driver, ...]:
    """What has a place in the order of a ranking: every input, or all that are drawn together as one."""
    every = {driver.input.name: driver for driver in drivers}
    found = []
    for one in ranked_in(finding, list(every)):
        members = tuple(every[name].input for name in one.inputs)
        found.append(every[one.name] if one.of == "input" else Driver(_together(one.name, members), groups[one.place][1], members))
    return tuple(found)


def _together(name: str, members: Sequence[InputRow]) -> InputRow:
    """Inputs that are drawn together, as they are called: by the group that the study makes of them, if it does."""
    *others, last = (row.label for row in members)
    labels = f"{listed(others)} and {last}" if len(members) <= MOST_LISTED else listed([*others, last])
    label = f"group {name} (drawn together)" if all(row.group == name for row in members) else f"joint sample of {labels}"
    known = [row.evidence for row in members]
    evidence = None if None in known else min((each for each in known if each is not None), default=None)
    return InputRow(name, label, "", "", "", members[0].kind if len({row.kind for row in members}) == 1 else "", evidence)


def measured(name: str, finding: Finding) -> MeasuredAnswer:
    """How observations lie in the forecast."""
    inside = finding.variables.get("share_inside")
    expected = float(inside.attributes.get("share", math.nan)) if inside else math.nan
    return MeasuredAnswer(
        name=name,
        label=finding.attributes.get("label", name),
        unit=finding.variables["value"].unit,
        observations=len(data(finding, "value")),
        share_inside=estimate(finding.variables, "share_inside"),
        expected=expected,
        reason=_reason(finding, "share_inside"),
        widened=bool(np.any(data(finding, "sd") > 0)),
    )


def binned(found: Findings, axes: Axes) -> Iterator[BinnedAnswer]:
    """Quantities whose values were counted into bins."""
    for path in ("bands", "outcomes"):
        for name, finding in room(found, path):
            shares = data(finding, "quantiles_bin_error_share")
            if shares.size:
                largest = [float(np.max(each[~np.isnan(each)], initial=0.0)) for each in shares.reshape(len(axes.levels), -1)]
                yield BinnedAnswer(finding.attributes.get("label", name), tuple(zip(axes.levels, largest, strict=True)))


def _reason(finding: Finding, name: str) -> str:
    """Why a number is missing, as the finding says it."""
    variable = finding.variables.get(name)
    return str((variable.attributes.get("reason") if variable else "") or finding.attributes.get("reason", ""))
