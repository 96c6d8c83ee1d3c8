"""What repeats over an index: entry by entry for the machine form, and only the ends of it for the terminal."""

from __future__ import annotations

import math
from collections.abc import Callable, Iterable, Sequence
from dataclasses import replace
from typing import TypeVar

from uq.analysis.finding import Finding
from uq.report.answers import Headline, LimitAnswer, QuantityAnswer, ScenarioAnswer
from uq.report.drawn import Findings
from uq.store.stacked import OVER, apart

T = TypeVar("T", LimitAnswer, QuantityAnswer)

# So many entries are told one by one; of more only the ends.
MOST_ENTRIES = 4
ENDS = "Of what repeats only the ends are told here, in brackets which; result.nc and --json have every entry."


def by_entry(found: Findings) -> Findings:
    """All groups, those of what repeats taken apart: bands/T[0], bands/T[1], ..."""
    coordinates = found[""].variables
    every: dict[str, Finding] = {}
    for group, finding in found.items():
        if OVER in finding.attributes:
            every |= {each.group: each for each in apart(finding, coordinates).values()}
        else:
            every[group] = finding
    return every


def of_ends(head: Headline) -> tuple[Headline, bool]:
    """The headline with only the lowest and the highest of what repeats often, and whether anything was left out."""
    limits, watched, outcomes = _ends(head.limits, _of_limits), _ends(head.watched, _of_values), _ends(head.outcomes, _of_values)
    names = {answer.name for answers in (limits, watched, outcomes) for answer in answers}
    asked = {answer.name for answers in (head.limits, head.watched, head.outcomes) for answer in answers}
    told = replace(
        head,
        limits=limits,
        watched=watched,
        outcomes=outcomes,
        widest=_ends(head.widest, lambda family: _of_spreads(family, head)),
        rankings=tuple(each for each in head.rankings if each.name in names or each.name not in asked),
        scenarios=tuple(_scenario(each, names) for each in head.scenarios),
    )
    return told, len(names) < len(asked)


def _scenario(answer: ScenarioAnswer, names: set[str]) -> ScenarioAnswer:
    """A scenario with the same entries as the study itself."""

    def kept(answers: Sequence[T]) -> tuple[T, ...]:
        return tuple(each for each in answers if each.name in names)

    own, less = (
        replace(each, limits=kept(each.limits), watched=kept(each.watched), outcomes=kept(each.outcomes))
        for each in (answer.answers, answer.differences)
    )
    return replace(answer, answers=own, differences=less)


def _ends(answers: Sequence[T], told: Callable[[Sequence[T]], Iterable[T]]) -> tuple[T, ...]:
    """All answers but those of entries between the ends, in the order given."""
    families: dict[str, list[T]] = {}
    for answer in answers:
        families.setdefault(answer.name.partition("[")[0], []).append(answer)
    return tuple(each for family in families.values() for each in (family if len(family) <= MOST_ENTRIES else told(family)))


def _of_values(family: Sequence[QuantityAnswer]) -> Iterable[QuantityAnswer]:
    """The entries with the lowest and with the highest median, or level next to it; the first one where there are no numbers."""
    known = [each for each in family if each.quantiles and not math.isnan(_middle(each))]
    if not known:
        return (replace(family[0], label=f"{family[0].label} (first of {len(family)})"),)
    low, high = min(known, key=_middle), max(known, key=_middle)
    if low is high or _middle(low) == _middle(high):
        return (replace(low, label=f"{low.label} (all {len(family)} alike in the middle)"),)
    count = f"of {len(family)}"
    return replace(low, label=f"{low.label} (lowest {count})"), replace(high, label=f"{high.label} (highest {count})")


def _of_spreads(family: Sequence[QuantityAnswer], head: Headline) -> Iterable[QuantityAnswer]:
    """The entry whose members spread most."""
    widest = max(family, key=lambda each: each.spread)
    base = widest.name.partition("[")[0]
    count = sum(each.name.partition("[")[0] == base for each in head.watched)
    return (replace(widest, label=f"{widest.label} (widest of {count})"),)


def _middle(answer: QuantityAnswer) -> float:
    return min(answer.quantiles, key=lambda each: abs(each[0] - 0.5))[1].value


def _of_limits(family: Sequence[LimitAnswer]) -> Iterable[LimitAnswer]:
    """The entry where a limit is most likely passed by the last time, and the one where it is least likely; and all verdicts counted."""
    known = [each for each in family if each.by and not math.isnan(each.by[-1][1].value)]
    if not known:
        return (replace(family[0], label=f"{family[0].label} (first of {len(family)})"),)
    low, high = min(known, key=_last), max(known, key=_last)
    counts = {verdict: sum(each.verdict == verdict for each in family) for verdict in ("met", "not met", "not settled")}
    verdicts = ", ".join(f"{verdict} {count}" for verdict, count in counts.items() if count)
    count = f"of {len(family)}" + (f"; {verdicts}" if verdicts else "")
    if _last(low) == _last(high):
        return (replace(high, label=f"{high.label} (as likely as any {count})"),)
    return replace(high, label=f"{high.label} (likeliest {count})"), replace(low, label=f"{low.label} (least likely of {len(family)})")


def _last(answer: LimitAnswer) -> float:
    return answer.by[-1][1].value
