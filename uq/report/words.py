"""The answer in one or two sentences. A sentence claims only what a number with its interval shows."""

from __future__ import annotations

import math

from uq.report.answered import like
from uq.report.answers import Driver, Headline, LimitAnswer, QuantityAnswer, RankingAnswer
from uq.report.chances import chance, down, in_per_cent, two_digits, up
from uq.report.drivers import target
from uq.report.order import ordered
from uq.report.plain import plain, wrapped
from uq.report.spoken import moment, per_cent, unit_after

# Below this a probability is said as "1 in 70"; above, two digits of such a count are too coarse.
RARE = 0.05
# More names than this are not listed.
MOST_NAMED = 4


def words_section(head: Headline) -> list[str]:
    """One sentence on the answer, one on what it rests on; fewer where the numbers do not carry them."""
    limit = _telling(head)
    quantity = next((answer for answer in (*head.outcomes, *head.watched) if _range(answer)), None)
    first = _of_limit(head, limit) if limit else _of_quantity(head, quantity) if quantity else ""
    ranking = next((each for each in head.rankings if limit and each.name == limit.name), head.rankings[0] if head.rankings else None)
    second = _of_driver(head, ranking) if ranking else ""
    text = " ".join(each for each in (first, second) if each)
    return wrapped(f"In words: {text}") if text else []


def _telling(head: Headline) -> LimitAnswer | None:
    """The limit to speak of: the first that is not met, else one with a verdict, else any with a number."""
    known = [limit for limit in head.limits if limit.by and not limit.by[-1][1].missing]
    rank = {"not met": 0, "not settled": 1, "met": 2}
    return min(known, key=lambda limit: rank.get(limit.verdict, 3), default=None)


def _of_limit(head: Headline, limit: LimitAnswer) -> str:
    time, estimate = limit.by[-1]
    name, by = plain(limit.label), moment(time, head.time_unit)
    members = int(head.facts["members_solved"])
    solved = "solved members" if head.facts["members_failed"] else "members"
    share = chance(estimate, members)
    if estimate.value in (0, 1):
        count = f"none of {members}" if estimate.value == 0 else f"all {members}"
        sentence = f'by {by}, "{name}" comes true for {count} {solved}'
        sentence += f", a probability of {share.interval}" if share.interval else ""
    elif estimate.low > 0 and estimate.high < RARE:
        ends = f"1 in {up(1 / estimate.low)} and 1 in {down(1 / estimate.high)}"
        sentence = f'by {by}, "{name}" comes true for about 1 member in {two_digits(1 / estimate.value)} (between {ends})'
    else:
        texts = in_per_cent(estimate)
        interval = f" ({texts.interval} %)" if texts.interval else ""
        sentence = f'by {by}, "{name}" comes true for {texts.value} % of the {solved}{interval}'
    return _sentence(sentence + _judged(limit, estimate.high < RARE))


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


def _range(answer: QuantityAnswer) -> tuple[float, float] | None:
    """The outermost levels of a quantity if both have a number."""
    if len(answer.quantiles) < 2 or any(not math.isfinite(answer.quantiles[place][1].value) for place in (0, -1)):
        return None
    return answer.quantiles[0][0], answer.quantiles[-1][0]


def _of_quantity(head: Headline, answer: QuantityAnswer) -> str:
    (low_level, low), (high_level, high) = answer.quantiles[0], answer.quantiles[-1]
    at = "" if math.isnan(answer.time) else f" at {moment(answer.time, head.time_unit)}"
    ends = f"{like(low.value, answer)} and {like(high.value, answer)}{unit_after(answer.unit)}"
    return _sentence(f"{plain(answer.label)}{at} is between {ends} for {per_cent(high_level - low_level)} of the members")


def _of_driver(head: Headline, ranking: RankingAnswer) -> str:
    groups = ordered([driver for driver in ranking.drivers if not driver.total.missing])
    if not groups:
        return ""
    of = target(head, ranking)
    if len(groups[0]) == 1:
        return _of_first(of, groups[0][0], len(ranking.drivers))
    if len(groups) == 1 or len(groups[0]) > MOST_NAMED:
        return f"Which input drives {of} most is not settled."
    *names, last = (plain(driver.input.label) for driver in groups[0])
    return f"{', '.join(names)} and {last} have the largest shares in the variance of {of}; their order is not settled."


def _of_first(of: str, driver: Driver, count: int) -> str:
    """What the largest share means: the first-order index is the part of the variance that knowing the input would take away on average."""
    name, first = plain(driver.input.label), driver.first
    if count == 1:
        return ""
    if first.missing or not first.low > 0:
        return f"{name} has the largest share in the variance of {of}."
    texts = in_per_cent(first)
    share = f"{texts.value} % ({texts.interval} %)"
    if driver.input.kind == "variability":
        return f"{name} varies, which no better knowledge takes away; it has the largest share in the variance of {of}, {share} by itself."
    largest = f"{name} has the largest share in the variance of {of}"
    return f"{largest}; if it were known exactly, that variance would be {share} smaller on average."


def _sentence(text: str) -> str:
    return text[:1].upper() + text[1:] + "."
