"""Which answer the study is about: what is said in words, and what is ranked first."""

from __future__ import annotations

import math

from uq.report.answers import Headline, LimitAnswer, QuantityAnswer


def telling_limit(head: Headline) -> LimitAnswer | None:
    """The limit to speak of: the first that is not met, else one with a verdict, else any with a number."""
    known = [limit for limit in head.limits if limit.by and not limit.by[-1][1].missing]
    rank = {"not met": 0, "not settled": 1, "met": 2}
    return min(known, key=lambda limit: rank.get(limit.verdict, 3), default=None)


def telling_quantity(head: Headline) -> QuantityAnswer | None:
    """The first outcome, else the first watched quantity, that has a range."""
    return next((answer for answer in (*head.outcomes, *head.watched) if has_range(answer)), None)


def has_range(answer: QuantityAnswer) -> bool:
    """Whether the outermost two levels of a quantity have a number."""
    if len(answer.quantiles) < 2:
        return False
    return all(math.isfinite(answer.quantiles[place][1].value) for place in (0, -1))
