"""The section of the summary that says what scenarios change."""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator, Mapping
from typing import Any

from uq.report.answers import Answers, Estimate, Headline, LimitAnswer, QuantityAnswer, ScenarioAnswer
from uq.report.chances import RARE, chance
from uq.report.failed import behind
from uq.report.plain import Part, Table, Text, plain
from uq.report.rounding import Rounded, finest_of, rounded
from uq.report.spoken import Clock, per_cent, unit_after

Row = tuple[str, ...]

# Lines for one scenario; the rest is in the file.
MOST_ROWS = 16
MOST_LEVELS = 3
FAILED = "Numbers and differences are those of the members that did not fail; the intervals hold whichever way the failed ones are counted."
# Scenarios of which a sentence is said.
MOST_SENTENCES = 2


def scenarios_section(head: Headline) -> list[Part]:
    """Every scenario with its probabilities and quantiles, and how far they differ from the study's."""
    if not head.scenarios:
        return []
    level = f"{per_cent(head.facts['confidence'])} interval"
    rows: list[Row] = [("", "scenario", level, "difference", level)]
    for scenario in head.scenarios:
        rows.append((f"{plain(scenario.label)}, which changes {', '.join(plain(each) for each in scenario.change)}",))
        rows += _failed(scenario)
        mine = list(compared(head.clock, scenario.answers, scenario.differences, {**head.facts, **scenario.facts}))
        rows += mine[:MOST_ROWS]
        if len(mine) > MOST_ROWS:
            rows.append(("  more in the file",))
    words = dict.fromkeys(scenario.intervals for scenario in head.scenarios if scenario.intervals)
    notes = [f"Differences are the scenario less the study; {each}." for each in words]
    notes += [FAILED] if any(counts_failed(scenario.answers, scenario.differences) for scenario in head.scenarios) else []
    return ["Scenarios", Table(rows, (2, 4)), *(Text(note, "  ") for note in notes)]


def counts_failed(*several: Answers) -> bool:
    """Whether it makes a difference anywhere how failed members are counted."""
    every = [estimate for each in several for limit in each.limits for _, estimate in limit.by]
    every += [estimate for each in several for quantity in _quantities(each) for _, estimate in quantity.quantiles]
    return any(estimate.both_ways for estimate in every)


def _failed(scenario: ScenarioAnswer) -> list[Row]:
    failed = int(scenario.facts.get("members_failed", 0))
    return [(f"  {failed} of its {scenario.facts['members']} members failed",)] if failed else []


def compared(clock: Clock, answers: Answers, differences: Answers, facts: Mapping[str, Any]) -> Iterator[Row]:
    """Rows: what, the number with its interval, the difference with its interval; of limits at their last time, of quantiles."""
    limits = {each.name: each for each in answers.limits}
    for change in differences.limits:
        if change.name in limits and change.by and limits[change.name].by:
            time, by_then = change.by[-1][0], dict(limits[change.name].by)
            estimate = by_then.get(time, Estimate())
            about = behind(facts, estimate, limits[change.name].given)
            texts = chance(estimate, about.members, about.unknown)
            yield (f'  "{plain(limits[change.name].label)}"',)
            yield f"    by {clock.at(time)}", texts.value, texts.interval, *_difference(change.by[-1][1])
    for kind in ("outcomes", "watched"):
        own = {each.name: each for each in getattr(answers, kind)}
        for quantity in getattr(differences, kind):
            if quantity.name in own:
                yield from _quantiles(clock, own[quantity.name], quantity)


def _quantiles(clock: Clock, own: QuantityAnswer, change: QuantityAnswer) -> Iterator[Row]:
    at = "" if math.isnan(own.time) else f" at {clock.at(own.time)}"
    yield (f"  {plain(own.label)}{at}{unit_after(own.unit, ', ')}",)
    known, levels = dict(own.quantiles), [level for level, _ in change.quantiles]
    # A level that the other was not asked for has a difference all the same, since its members are at hand.
    silent = Rounded("not asked")
    if len(levels) > MOST_LEVELS:
        levels = [levels[0], min(levels[1:-1], key=lambda level: abs(level - 0.5)), levels[-1]]
    for level, difference in change.quantiles:
        if level in levels:
            each = known.get(level, Estimate())
            texts = rounded(each.value, each.low, each.high, finest_of(each.value, own.spread)) if level in known else silent
            yield f"    {per_cent(level)} point", texts.value, texts.interval, *_difference(difference, own.spread)


def _difference(estimate: Estimate, spread: float = math.nan) -> tuple[str, str]:
    if estimate.value == estimate.low == estimate.high == 0:
        return "none", ""
    texts = rounded(estimate.value, estimate.low, estimate.high, finest_of(estimate.value, spread))
    sign = "+" if estimate.value > 0 else ""
    return sign + texts.value, texts.interval


def changed(head: Headline, limit: LimitAnswer | None, quantity: QuantityAnswer | None) -> Iterable[str]:
    """A sentence for each of the first scenarios on what it does to the answer, as far as the interval of the difference carries it."""
    for scenario in head.scenarios[:MOST_SENTENCES]:
        said = _on_limit(scenario, limit) if limit else _on_quantity(scenario, quantity) if quantity else ""
        if said:
            yield f'In the scenario "{plain(scenario.label)}" {said}.'


def _on_limit(scenario: ScenarioAnswer, limit: LimitAnswer) -> str:
    answer = next((each for each in scenario.differences.limits if each.name == limit.name), None)
    if not answer or not answer.by or answer.by[-1][1].missing:
        return ""
    difference = answer.by[-1][1]
    if limit.by[-1][1].high < RARE:
        return _moved(difference, "that probability", "") + _verdict(scenario, limit)
    points = Estimate(100 * difference.value, 100 * difference.low, 100 * difference.high)
    return _moved(points, "that share", " percentage points") + _verdict(scenario, limit)


def _on_quantity(scenario: ScenarioAnswer, quantity: QuantityAnswer) -> str:
    answer = next((each for each in _quantities(scenario.differences) if each.name == quantity.name), None)
    if not answer or not answer.quantiles or answer.quantiles[-1][1].missing:
        return ""
    level, difference = answer.quantiles[-1]
    return _moved(difference, f"the {per_cent(level)} point of {plain(quantity.label)}", unit_after(answer.unit))


def _quantities(answers: Answers) -> Iterable[QuantityAnswer]:
    return (*answers.outcomes, *answers.watched)


def _verdict(scenario: ScenarioAnswer, limit: LimitAnswer) -> str:
    """The verdict on the scenario itself."""
    own = next((each for each in scenario.answers.limits if each.name == limit.name), None)
    if own is None or own.accept is None:
        return ""
    return {"met": "; there it is within what is accepted", "not met": "; there it is more than what is accepted"}.get(own.verdict, "")


def _moved(difference: Estimate, what: str, unit: str) -> str:
    if not (difference.low > 0 or difference.high < 0):
        return f"{what} is not clearly another"
    low, high = sorted((abs(difference.low), abs(difference.high)))
    texts = rounded(abs(difference.value), low, high)
    interval = f" ({texts.interval})" if texts.interval else ""
    return f"{what} is {texts.value}{interval}{unit} {'higher' if difference.value > 0 else 'lower'}"
