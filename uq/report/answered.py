"""The sections of the summary that answer: is a limit passed, and what is to be expected."""

from __future__ import annotations

import math
from itertools import takewhile

from uq.report.answers import Estimate, Headline, LimitAnswer, QuantityAnswer
from uq.report.chances import chance, in_per_cent
from uq.report.failed import behind, left_out
from uq.report.plain import Part, Table, plain
from uq.report.rounding import DIGITS_UNBOUNDED, UNBOUNDED, Rounded, alone, finest_of, place_by, power_of, rounded, written
from uq.report.spoken import per_cent, unit_after

VERDICTS = {"met": "met", "not met": "NOT MET", "not settled": "not settled"}
# What numbers are said under where failed members are left out of them.
GIVEN = "  (given success: failed members are left out)"
UNKNOWN = "  (given success: members that failed before it was known are left out)"
MOST_LEVELS = 3
# An interval that is longer than this is given in two lines, so that three of them fit side by side.
LONGEST_INTERVAL = 20


def limits_section(head: Headline) -> list[Part]:
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
        rows += [(f"  {text}",) for text in (_both_ways(limit), _until(head, limit), _first(head, limit)) if text]
    given = UNKNOWN if any(limit.given for limit in head.limits) else ""
    return [f"Is a limit passed?{given}", Table(rows, (2,))]


def _by(head: Headline, limit: LimitAnswer, place: int) -> tuple[str, str, str, str]:
    time, estimate = limit.by[place]
    about = behind(head.facts, estimate, limit.given)
    texts = chance(estimate, about.members, about.unknown)
    verdict = ""
    if place == len(limit.by) - 1 and limit.accept is not None:
        verdict = f"{alone(limit.accept)}: {VERDICTS.get(limit.verdict, 'no verdict')}"
    return f"  by {head.clock.at(time)}", texts.value, texts.interval, verdict


def _both_ways(limit: LimitAnswer) -> str:
    """What the failed members could make of the probability by the last time."""
    estimate = limit.by[-1][1] if limit.by else Estimate()
    if not estimate.both_ways or estimate.value in (0, 1):
        return ""
    ends = rounded(estimate.if_high, estimate.if_low, estimate.if_high)
    return f"of the members of whom it is known; with the failed ones counted as not passing {ends.low}, as passing {ends.high}"


def _until(head: Headline, limit: LimitAnswer) -> str:
    """Until when the accepted probability is kept, by the upper end of the interval; nothing where it is kept to the end or not known."""
    accept, ever = limit.accept, limit.ever
    if accept is None or not ever:
        return ""
    kept = list(takewhile(lambda each: each[1] <= accept, ever))
    if len(kept) == len(ever) or math.isnan(ever[len(kept)][1]):
        return ""
    if len(kept) < 2:
        return f"no output time after the start is known to keep the accepted {alone(accept)}"
    return f"accepted until {head.clock.at(kept[-1][0])}: up to then the upper end of the interval is at most {alone(accept)}"


def _first(head: Headline, limit: LimitAnswer) -> str:
    """When a limit is passed first, among the members that pass it: in the output step that ends at the time in the file."""
    known = [(level, estimate) for level, estimate in limit.first_time if not estimate.missing]
    if not known:
        return ""
    low, middle, high = known[0], min(known, key=lambda each: abs(each[0] - 0.5)), known[-1]
    judged = sorted({*head.times, *(time for each in head.limits for time, _ in each.by)})

    def before(estimate: Estimate) -> float:
        below = [time for time in judged if time < estimate.value]
        return min([estimate.low, *below[-1:]])

    name = "median" if middle[0] == 0.5 else f"{per_cent(middle[0])} point"
    text = f"where it is passed, the {name} of the first time is {_span(head, before(middle[1]), middle[1].high)}"
    if low[0] < middle[0] < high[0]:
        ends = _span(head, before(Estimate(low[1].value, low[1].value)), high[1].value)
        text += f", and {per_cent(high[0] - low[0])} of first times are {ends}"
    apart = head.clock.apart(head.times)
    return text + (f" (output times being {apart})" if apart else "")


def _span(head: Headline, low: float, high: float) -> str:
    """Between two moments; a single one is the start, before which nothing is judged."""
    return f"between {head.clock.between(low, high)}" if low < high else f"at the start, {head.clock.at(high)}"


def expected_section(head: Headline) -> list[Part]:
    """Quantiles of the watched quantities at the last time and where they spread most, and of the outcomes."""
    answers = [*head.watched, *head.outcomes]
    if not answers:
        return []
    levels = _levels(answers)
    rows: list[tuple[str, ...]] = [("", *(per_cent(level) for level in levels))]
    parts = ((f"At {head.clock.at(head.times[-1])}", head.watched), ("When they spread most", head.widest), ("Outcomes", head.outcomes))
    for name, part in parts:
        rows += [(name,)] if part else []
        for answer in part:
            rows += _expected(head, answer, levels, f" at {head.clock.at(answer.time)}" if part is head.widest else "")
    return [f"What to expect{GIVEN if left_out(head) else ''}", Table(rows)]


def _levels(answers: list[QuantityAnswer]) -> list[float]:
    """The levels shown: all where they are few, else the outermost and the one nearest to the middle."""
    levels = sorted({level for answer in answers for level, _ in answer.quantiles})
    if len(levels) <= MOST_LEVELS:
        return levels
    middle = min(levels[1:-1], key=lambda level: abs(level - 0.5))
    return [levels[0], middle, levels[-1]]


def _expected(head: Headline, answer: QuantityAnswer, levels: list[float], when: str = "") -> list[tuple[str, ...]]:
    name = f"  {plain(answer.label)}{when}{unit_after(answer.unit, ', ')}"
    at = dict(answer.quantiles)
    each = [at.get(level, Estimate()) for level in levels]
    texts = [shown(one, answer.spread) for one in each]
    values = tuple(text.value for text in texts)
    interval = f"    {per_cent(head.facts['confidence'])} interval"
    rows: list[tuple[str, ...]] = [(name, *values)]
    if any(one.both_ways for one in each):
        rows = [(name, *("" for _ in texts)), ("    members that did not fail", *values)]
        rows += [(f"    failed counted {end}", *(counted(one, f"if_{end}", answer.spread) for one in each)) for end in ("low", "high")]
        interval += ", either way"
    if any(text.interval for text in texts):
        rows += _intervals(interval, texts)
    return rows + [(f"    {line}",) for line in _beside(answer, texts)]


def _intervals(name: str, texts: list[Rounded]) -> list[tuple[str, ...]]:
    """The intervals in one row; in two where they are long."""
    if all(len(text.interval) <= LONGEST_INTERVAL or not (text.low and text.high) for text in texts):
        return [(name, *(text.interval for text in texts))]
    lows = (f"from {text.low}" if text.low and text.high else text.interval for text in texts)
    return [(name, *lows), ("", *(f"to {text.high}" if text.low and text.high else "" for text in texts))]


def shown(estimate: Estimate, spread: float) -> Rounded:
    """A number of a quantity whose members spread so far, with its interval."""
    return rounded(estimate.value, estimate.low, estimate.high, finest_of(estimate.value, spread))


def counted(estimate: Estimate, end: str, spread: float) -> str:
    """A quantile with the failed members counted low ("if_low") or high, to the place of the quantile itself."""
    value = getattr(estimate, end)
    if math.isnan(value):
        value = estimate.value
    if math.isinf(value):
        return UNBOUNDED
    place = place_by(estimate.value, estimate.low, estimate.high, finest_of(estimate.value, spread))
    return alone(value) if place is None else written(value, place[0], max(place[1], power_of(value)))


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
    if not math.isfinite(value):
        return alone(value)
    if not known:
        open_ends = any(math.isinf(each.low) or math.isinf(each.high) for _, each in answer.quantiles)
        return alone(value, DIGITS_UNBOUNDED) if open_ends else alone(value)
    _, each = min(known, key=lambda pair: abs(pair[0] - 0.5))
    half = each.high / 2 - each.low / 2
    return rounded(value, value - half, value + half, finest_of(value, answer.spread)).value
