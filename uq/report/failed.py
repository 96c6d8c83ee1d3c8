"""What failed members do to the answers: whom a number is about, and what is said before all numbers."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Any

from uq.report.answers import Estimate, Headline
from uq.report.plain import Part, Text, plain
from uq.report.rounding import alone

# A share of failed members above this is told before everything else.
WORTH_A_WARNING = 1e-3
NOTHING_LEFT = "All members failed, so that nothing can be said of what was asked."


def left_out(head: Headline) -> bool:
    """Whether there are failed members that the study leaves out of all numbers."""
    return head.facts["failures"] == "exclude" and bool(head.facts["members_failed"])


def all_failed(head: Headline) -> bool:
    """Whether nobody is left of whom anything could be said."""
    return int(head.facts["members_failed"]) == int(head.facts["members"])


@dataclass(frozen=True)
class Behind:
    """The members behind a probability, and of how many of them it is not known."""

    members: int
    unknown: int = 0


def behind(facts: Mapping[str, Any], estimate: Estimate, given: bool = False) -> Behind:
    """The members that a probability and its interval are about: all of them, those that failed counted both ways.

    given: whether those of whom it is not known are left out. Then the interval of a probability of 0 or 1 tells how many it rests on,
    since it is Clopper and Pearson's (1934, doi:10.1093/biomet/26.4.404): (1 - high) ** n is half of what the confidence leaves over.
    """
    members = int(facts["members"])
    if estimate.both_ways:
        return Behind(members, round(members * (estimate.if_high - estimate.if_low)))
    open_end = {0.0: 1 - estimate.high, 1.0: estimate.low}.get(estimate.value, math.nan)
    if not given or not 0 < open_end < 1:
        return Behind(members)
    return Behind(round(math.log((1 - float(facts["confidence"])) / 2) / math.log(open_end)))


def failure_warnings(head: Headline) -> list[Part]:
    """That members failed, of the study and of its scenarios; nothing where they are too few to matter."""
    told = [told_of(head.facts)]
    told += [f'in the scenario "{plain(each.label)}" {text}' for each in head.scenarios if (text := told_of(each.facts))]
    return [Text(f"WARNING: {text}.", "", "  ") for text in told if text]


def told_of(facts: Mapping[str, Any]) -> str:
    """How many members of a study or a scenario failed, where that is more than a few: "320 of 16384 members (2 %) failed"."""
    failed, members = int(facts.get("members_failed", 0)), int(facts.get("members", 0))
    if not failed > WORTH_A_WARNING * members:
        return ""
    return f"{failed} of {members} members ({alone(100 * failed / members, 2)} %) failed"
