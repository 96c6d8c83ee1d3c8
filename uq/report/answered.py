"""The sections of the summary that answer: is a limit passed, and what is to be expected."""

from __future__ import annotations

import math

from uq.report.answers import Estimate, Headline, LimitAnswer, QuantityAnswer
from uq.report.chances import chance, in_per_cent
from uq.report.plain import plain, table
from uq.report.rounding import Rounded, alone, place_of, power_of, rounded, written
from uq.report.spoken import moment, per_cent, unit_after

VERDICTS = {"met": "met", "not met": "NOT MET", "not settled": "not settled"}
MOST_LEVELS = 3


def limits_section(head: Headline) -> list[str]:
    """Every limit with its probabilities, intervals and verdict."""
    if not head.limits:
        return []
    level = per_cent(head.facts["confidence"])
    rows: list[tuple[str, ...]] = [("", "probability", f"{level} interval", "accepted")]
    for limit in head.limits:
        rows.append((f"{plain(limit.label)}, that is {plain(limit.when)}" if limit.when else plain(limit.label),))
        rows += [_by(head, limit, place) for place in range(len(limit.by))]
        if limit.reason and any(estimate.missing for _, estimate in limit.by):
            rows.append((f"  missing: {plain(limit.reason)}",))
        if both := _both_ways(limit):
            rows.append((f"  {both}",))
        if first := _first(head, limit):
            rows.append((f"  {first}",))
    return [f"Is a limit passed?{_given(head)}", *table(rows)]


def _given(head: Headline) -> str:
    """What every number is said under, where failed members are left out."""
    left_out = head.facts["failures"] == "exclude" and head.facts["members_failed"]
    return "  (given success: failed members are left out)" if left_out else ""


def _by(head: Headline, limit: LimitAnswer, place: int) -> tuple[str, str, str, str]:
    time, estimate = limit.by[place]
    texts = chance(estimate, int(head.facts["members_solved"]))
    verdict = ""
    if place == len(limit.by) - 1 and limit.accept is not None:
        verdict = f"{alone(limit.accept)}: {VERDICTS.get(limit.verdict, 'no verdict')}"
    return f"  by {moment(time, head.time_unit)}", texts.value, texts.interval, verdict


def _both_ways(limit: LimitAnswer) -> str:
    """What the failed members could make of the probability by the last time."""
    estimate = limit.by[-1][1] if limit.by else Estimate()
    if math.isnan(estimate.if_low) or estimate.if_low == estimate.if_high:
        return ""
    ends = rounded(estimate.if_high, estimate.if_low, estimate.if_high)
    return f"with the failed members counted both ways: {ends.interval}"


def _first(head: Headline, limit: LimitAnswer) -> str:
    """When a limit is passed first, among the members that pass it."""
    known = [(level, estimate) for level, estimate in limit.first_time if not estimate.missing]
    if not known:
        return ""
    low, middle, high = known[0], min(known, key=lambda each: abs(each[0] - 0.5)), known[-1]
    unit = unit_after(head.time_unit)
    name = "median" if middle[0] == 0.5 else f"{per_cent(middle[0])} point"
    texts = rounded(middle[1].value, middle[1].low, middle[1].high)
    text = f"where it is passed, the {name} of the first time is {texts.value}{unit}"
    text += f" ({texts.interval}{unit})" if middle[1].low < middle[1].high else ""
    if low[0] < middle[0] < high[0]:
        ends = (alone(each.value, 3) for each in (low[1], high[1]))
        text += f"; {per_cent(high[0] - low[0])} of first times lie between {' and '.join(ends)}{unit}"
    return text


def expected_section(head: Headline) -> list[str]:
    """Quantiles of the watched quantities at the last time, and of the outcomes."""
    answers = [*head.watched, *head.outcomes]
    if not answers:
        return []
    levels = _levels(answers)
    rows: list[tuple[str, ...]] = [("", *(per_cent(level) for level in levels))]
    for name, part in ((f"At {moment(head.last_time, head.time_unit)}", head.watched), ("Outcomes", head.outcomes)):
        rows += [(name,)] if part else []
        for answer in part:
            rows += _expected(head, answer, levels)
    return [f"What to expect{_given(head)}", *table(rows)]


def _levels(answers: list[QuantityAnswer]) -> list[float]:
    """The levels shown: all where they are few, else the outermost and the one nearest to the middle."""
    levels = sorted({level for answer in answers for level, _ in answer.quantiles})
    if len(levels) <= MOST_LEVELS:
        return levels
    middle = min(levels[1:-1], key=lambda level: abs(level - 0.5))
    return [levels[0], middle, levels[-1]]


def _expected(head: Headline, answer: QuantityAnswer, levels: list[float]) -> list[tuple[str, ...]]:
    name = f"  {plain(answer.label)}{unit_after(answer.unit, ', ')}"
    at = dict(answer.quantiles)
    texts = [rounded(each.value, each.low, each.high) for level in levels for each in (at.get(level, Estimate()),)]
    rows: list[tuple[str, ...]] = [(name, *(each.value for each in texts))]
    if any(each.interval for each in texts):
        rows.append((f"    {per_cent(head.facts['confidence'])} interval", *(each.interval for each in texts)))
    rows += [(f"    {line}",) for line in _beside(answer, texts)]
    return rows


def _beside(answer: QuantityAnswer, texts: list[Rounded]) -> list[str]:
    """What is said below the quantiles of a quantity: the nominal run, members without a value, why a number is missing."""
    lines = []
    if not math.isnan(answer.nominal):
        lines.append(f"with every input at its median: {like(answer.nominal, answer)}")
    if answer.missing.value > 0:
        share = in_per_cent(answer.missing)
        interval = f" ({share.interval} %)" if share.interval else ""
        lines.append(f"no value in {share.value} %{interval} of the members; quantiles among the rest")
    if answer.reason and any(estimate.missing for _, estimate in answer.quantiles):
        lines.append(f"missing: {plain(answer.reason)}")
    return lines


def like(value: float, answer: QuantityAnswer) -> str:
    """A number to the decimal place of the quantity's quantile nearest to the middle."""
    known = [(level, each) for level, each in answer.quantiles if each.high > each.low and math.isfinite(each.high - each.low)]
    if not known or not math.isfinite(value):
        return alone(value)
    _, each = min(known, key=lambda pair: abs(pair[0] - 0.5))
    largest = max(abs(value), abs(each.value))
    return written(value, place_of(each.high / 2 - each.low / 2, largest), power_of(largest))
