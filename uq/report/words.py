"""The answer in a few sentences. A sentence claims only what a number with its interval shows, of all members or of those it names."""

from __future__ import annotations

import math
from decimal import ROUND_CEILING, ROUND_FLOOR

from uq.analysis.order import ordered
from uq.report.answered import shown
from uq.report.answers import Driver, Estimate, Headline, LimitAnswer, QuantityAnswer, RankingAnswer
from uq.report.chances import RARE, chance, in_per_cent, one_in
from uq.report.drivers import in_order, known_drivers, share_of
from uq.report.failed import behind, left_out, told_of
from uq.report.plain import Part, Text, plain
from uq.report.rounding import alone, finest_of, place_by, power_of, rounded, written
from uq.report.scenarios import changed
from uq.report.spoken import counted_members, per_cent, quoted, unit_after
from uq.report.telling import telling_limit, telling_quantity

# More names than this are not listed.
MOST_NAMED = 4
# Shares in per cent are not said finer than this power of ten.
FINEST_PER_CENT = -1


def words_section(head: Headline) -> list[Part]:
    """One sentence on the answer, one on what it rests on, one on what scenarios change; fewer where the numbers do not carry them."""
    limit, quantity = telling_limit(head), telling_quantity(head)
    first = _of_limit(head, limit) if limit else _of_quantity(head, quantity) if quantity else ""
    ranking = next((each for each in in_order(head) if known_drivers(each)), None)
    second = _of_driver(head, ranking) if ranking else ""
    failed = f"{text}." if (text := told_of(head.facts)) else ""
    told = " ".join(each for each in (failed, first, second, *changed(head, limit, quantity)) if each)
    return [Text(f"In words: {told}")] if told else []


def _of_limit(head: Headline, limit: LimitAnswer) -> str:
    time, estimate = limit.by[-1]
    name, by = plain(limit.label), head.clock.at(time)
    return f'By {by}, "{name}" comes true for {_how_many(head, limit, estimate)}{_judged(limit, estimate.high < RARE)}.'


def _how_many(head: Headline, limit: LimitAnswer, estimate: Estimate) -> str:
    """The share of members with its interval: of all of them, or of those of whom it is known where the study leaves out the others."""
    members = behind(head.facts, estimate, limit.given).members
    solved = "members of whom it is known" if limit.given else "members"
    if estimate.both_ways:
        return _either_way(head, estimate)
    if estimate.value in (0, 1):
        share = chance(estimate, members)
        count = f"none of {members}" if estimate.value == 0 else f"all {members}"
        return f"{count} {solved}" + (f", a probability of {share.interval}" if share.interval else "")
    if estimate.low > 0 and estimate.high < RARE:
        many, ends = one_in(estimate)
        of = f"1 member in {many}" if solved == "members" else f"1 in {many} of the {solved}"
        return f"about {of} ({ends})"
    texts = in_per_cent(estimate)
    return f"{texts.value} % of the {solved}" + (f" ({texts.interval} %)" if texts.interval else "")


def _either_way(head: Headline, estimate: Estimate) -> str:
    """What holds of all members whichever way the failed ones are counted."""
    counting = f"the {counted_members(head.facts['members_failed'], 'failed one')}"
    ends = rounded(100 * estimate.if_high, 100 * estimate.if_low, 100 * estimate.if_high)
    outer = in_per_cent(estimate)
    interval = f" ({per_cent(head.facts['confidence'])} interval {outer.interval} %, either way)" if outer.interval else ""
    return f"{ends.low} to {ends.high} % of the members, as {counting} would not or would have passed{interval}"


def _judged(limit: LimitAnswer, rare: bool) -> str:
    if limit.accept is None:
        return ""
    count = 1 / limit.accept
    as_count = rare and abs(count - round(count)) < 1e-9 * count
    accepted = f"the accepted {f'1 in {count:.0f}' if as_count else per_cent(limit.accept)}"
    return {
        "met": f", which is within {accepted}",
        "not met": f", which is more than {accepted}",
        "not settled": f"; whether that is within {accepted} is not settled",
    }.get(limit.verdict, "")


def _of_quantity(head: Headline, answer: QuantityAnswer) -> str:
    (low_level, low), (high_level, high) = answer.quantiles[0], answer.quantiles[-1]
    at = "" if math.isnan(answer.time) else f" at {head.clock.at(answer.time)}"
    name, share = f"{quoted(plain(answer.label))}{at}", per_cent(high_level - low_level)
    if low.both_ways or high.both_ways:
        return _range_either_way(head, answer, name)
    of = "the members that did not fail" if left_out(head) else "the members"
    if answer.missing.value > 0:
        of += " that have a value" if of == "the members" else " and have a value"
    ends = f"{shown(low, answer.spread).value} and {shown(high, answer.spread).value}{unit_after(answer.unit)}"
    return f"For {share} of {of} {name} is between {ends}."


def _range_either_way(head: Headline, answer: QuantityAnswer, name: str) -> str:
    """The range that holds whichever way the failed members are counted, as far as there is one; then the one given success."""
    (low_level, low), (high_level, high) = answer.quantiles[0], answer.quantiles[-1]
    failed, unit = int(head.facts["members_failed"]), unit_after(answer.unit)
    below, above = _outward(answer, 0, ROUND_FLOOR), _outward(answer, -1, ROUND_CEILING)
    counting = f"whatever the {counted_members(failed, 'failed one')} would have come to"
    if below and above:
        return f"For at least {per_cent(high_level - low_level)} of the members, {counting}, {name} is between {below} and {above}{unit}."
    given = f"among those that did not fail, {per_cent(high_level - low_level)} lie between"
    given += f" {shown(low, answer.spread).value} and {shown(high, answer.spread).value}{unit}"
    if below or above:
        level, said = (1 - low_level, f"at least {below}") if below else (high_level, f"at most {above}")
        return f"For at least {per_cent(level)} of the members, {counting}, {name} is {said}{unit}; {given}."
    share = failed / int(head.facts["members"])
    return f"Too many members failed ({alone(100 * share, 2)} %) for a range of {name} that holds for all of them; {given}."


def _outward(answer: QuantityAnswer, end: int, direction: str) -> str:
    """The first or last quantile with the failed counted to that side, rounded to the safe side; empty where there is none."""
    _, estimate = answer.quantiles[end]
    failed = estimate.if_high if end else estimate.if_low
    value = failed if estimate.both_ways else estimate.value
    place = place_by(estimate.value, estimate.low, estimate.high, finest_of(estimate.value, answer.spread))
    if not math.isfinite(value):
        return ""
    return rounded(value).value if place is None else written(value, place[0], max(place[1], power_of(value)), direction)


def _of_driver(head: Headline, ranking: RankingAnswer) -> str:
    groups = ordered(known_drivers(ranking), share_of)
    if not groups or len(ranking.places) == 1:
        return ""
    of = _uncertain(head, ranking)
    if len(groups[0]) == 1:
        return _capital(_of_first(of, groups[0][0], ranking), groups[0][0])
    if len(groups) == 1 or len(groups[0]) > MOST_NAMED:
        return f"Which input has the largest share in {of} is not settled."
    *names, last = (_called(driver) for driver in groups[0])
    return _capital(f"{', '.join(names)} and {last} have the largest shares in {of}; their order is not settled.", groups[0][0])


def _called(driver: Driver) -> str:
    """An input as it is called within a sentence; inputs that are drawn together have an article."""
    name = quoted(plain(driver.input.label))
    return f"the {name}" if driver.members else name


def _capital(sentence: str, first: Driver) -> str:
    """A sentence that begins with a driver; names stay as the study writes them."""
    return sentence[:1].upper() + sentence[1:] if first.members else sentence


def _uncertain(head: Headline, ranking: RankingAnswer) -> str:
    """What the inputs have shares in."""
    label = plain(ranking.label)
    if ranking.of == "limits":
        return f'the uncertainty (variance) about whether "{label}" comes true by {head.clock.at(ranking.time)}'
    return f"the variance of {quoted(label)}{', over all times' if ranking.of == 'bands' else ''}"


def _of_first(of: str, driver: Driver, ranking: RankingAnswer) -> str:
    """What the largest share means: the first-order index is the part of the variance that knowing the input would take away on average."""
    name, first = _called(driver), driver.shares.first
    largest = "has the largest share"
    if ranking.shapley:
        largest += f", a Shapley effect of {_per_cent(driver.shares.shapley)},"
    largest += f" in {of}"
    if first.missing or not first.low > 0:
        return f"{name} {largest}."
    if driver.input.kind == "variability":
        itself = f", {_per_cent(first)} by itself" if not ranking.shapley else ""
        return f"{name} varies, which no better knowledge takes away; it {largest}{itself}."
    return f"{name} {largest}; if it were known exactly, {_per_cent(first)} of that would be gone on average."


def _per_cent(share: Estimate) -> str:
    texts = in_per_cent(share, FINEST_PER_CENT)
    return f"{texts.value} %" + (f" ({texts.interval} %)" if texts.interval else "")
