"""Headline answers as the queue keeps them with a job: so short that a list of many jobs needs no result file."""

from __future__ import annotations

import math
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass, fields
from itertools import groupby
from typing import TYPE_CHECKING, Any

from uq.report.answers import Estimate, Headline, LimitAnswer, QuantityAnswer
from uq.report.chances import chance
from uq.report.plain import plain
from uq.report.rounding import finest_of, rounded
from uq.report.spoken import clock_of, per_cent, unit_after

if TYPE_CHECKING:
    from uq.running.observer import HeadlineAnswer
    from uq.study.study import Study

NUMBERS = ("level", "value", "low", "high", "spread")
PROBABILITIES, QUANTILES = "probabilities", "quantiles"


@dataclass(frozen=True)
class KeptAnswer:
    """One headline number: what it is of, in words with the time it holds at; its interval, in `unit`; how many members are behind it.

    kind: probabilities or quantiles; level: of a quantile, nan of a probability, and so is spread, from the lowest quantile to the highest.
    settled: whether it is as precise as asked; None where nothing was asked.
    """

    what: str
    kind: str
    level: float
    unit: str
    value: float
    low: float
    high: float
    members: int
    spread: float = math.nan
    settled: bool | None = None

    @property
    def texts(self) -> tuple[str, str]:
        """The number and its interval as texts."""
        estimate = Estimate(self.value, self.low, self.high)
        if self.kind == PROBABILITIES:
            said = chance(estimate, self.members)
            return said.value, said.interval
        said_of = rounded(self.value, self.low, self.high, finest_of(self.value, self.spread))
        return said_of.value, said_of.interval

    def as_json(self) -> dict[str, Any]:
        """Plain values; a number that is missing or without end is null."""
        return {each.name: _finite(getattr(self, each.name)) for each in fields(self)}


def of_json(told: Mapping[str, Any]) -> KeptAnswer:
    """The answer that `as_json` has told."""
    level, value, low, high, spread = (math.nan if told.get(name) is None else float(told[name]) for name in NUMBERS)
    what, kind, unit = (str(told.get(name, "")) for name in ("what", "kind", "unit"))
    return KeptAnswer(what, kind, level, unit, value, low, high, int(told.get("members", 0)), spread, told.get("settled"))


def called(answer: KeptAnswer) -> str:
    """What an answer is, with its level and unit: "Highest temperature, 95 %, K"."""
    level = "" if math.isnan(answer.level) else f", {per_cent(answer.level)}"
    return f"{answer.what}{level}{unit_after(answer.unit, ', ')}"


def kept_answers(head: Headline) -> tuple[KeptAnswer, ...]:
    """Of every limit the probability by its last time, of every outcome, and of every watched quantity at the last time, the quantile in
    the middle and the highest."""
    found = [_of_limit(limit, head) for limit in head.limits if limit.by]
    for answer in (*head.outcomes, *head.watched):
        found += _of_quantity(answer, head)
    return tuple(found)


def _of_limit(limit: LimitAnswer, head: Headline) -> KeptAnswer:
    time, estimate = limit.by[-1]
    what, members = f"{plain(limit.label)} by {head.clock.at(time)}", int(head.facts["members"])
    settled = _settled(head, PROBABILITIES, estimate, 1.0)
    return KeptAnswer(what, PROBABILITIES, math.nan, "1", estimate.value, estimate.low, estimate.high, members, settled=settled)


def _of_quantity(answer: QuantityAnswer, head: Headline) -> Iterable[KeptAnswer]:
    at = "" if math.isnan(answer.time) else f" at {head.clock.at(answer.time)}"
    what, members = f"{plain(answer.label)}{at}", int(head.facts["members"])
    shown = _shown([level for level, _ in answer.quantiles])
    for level, each in answer.quantiles:
        if level in shown:
            settled = _settled(head, QUANTILES, each, answer.spread)
            yield KeptAnswer(what, QUANTILES, level, answer.unit, each.value, each.low, each.high, members, answer.spread, settled)


def _settled(head: Headline, kind: str, estimate: Estimate, scale: float) -> bool | None:
    wanted = next((each.wanted for each in head.precision.kinds if each.kind == kind), None) if head.precision else None
    return None if wanted is None else (estimate.high - estimate.low) / 2 <= wanted * scale


def _shown(levels: Sequence[float]) -> tuple[float, ...]:
    """The level in the middle and the highest."""
    return (min(levels, key=lambda level: abs(level - 0.5)), levels[-1]) if levels else ()


def kept_so_far(study: Study, answers: Sequence[HeadlineAnswer], members: int) -> tuple[KeptAnswer, ...]:
    """The same from what a run tells at the end of a round with so many members."""
    from uq.store.described import labels

    clock, known = clock_of(study.time.unit, study.text), labels(study)
    end, by = float(study.times.solved[study.times.grid[-1]]), {f"limits/{limit.name}": limit.by for limit in study.limits_asked}
    found: list[KeptAnswer] = []
    for group, each in groupby(answers, key=lambda answer: answer.group):
        together, room = list(each), group.partition("/")[0]
        label = plain(str(known.get(group, {}).get("label", group)))
        if room == "limits":
            last = together[-1]
            what = f"{label} by {clock.at(by[group][-1])}"
            found.append(KeptAnswer(what, PROBABILITIES, math.nan, "1", last.value, last.low, last.high, members, settled=last.settled))
        elif room in ("bands", "outcomes"):
            what = f"{label} at {clock.at(end)}" if room == "bands" else label
            spread, shown = together[-1].value - together[0].value, _shown([float(one.place) for one in together])
            found += [
                KeptAnswer(what, QUANTILES, float(one.place), one.unit, one.value, one.low, one.high, members, spread, one.settled)
                for one in together
                if float(one.place) in shown
            ]
    return tuple(sorted(found, key=lambda answer: answer.kind != PROBABILITIES))


def _finite(value: Any) -> Any:
    return None if isinstance(value, float) and not math.isfinite(value) else value
