"""The section of the summary that says what is settled: the values, the order of the inputs, and which of them may be dropped."""

from __future__ import annotations

import math
import shlex
from collections.abc import Iterable

from uq.analysis.places import NEGLIGIBLE
from uq.report.answers import Headline, KindReached, PrecisionAnswer, SettledAnswer
from uq.report.plain import Part, Table, Text, plain
from uq.report.rounding import alone
from uq.report.spoken import listed
from uq.study.plan import MOST_MEMBERS

NAMES = {
    "probabilities": "probabilities",
    "quantiles": "quantiles, of the 5-95 % width",
    "indices": "shares of the variance",
}


def settled_section(head: Headline) -> list[Part]:
    """What is precise enough; of a study that asks no precision the order of the inputs, and which may be dropped."""
    lines: list[Part] = []
    if head.precision:
        rows: list[tuple[str, ...]] = [("Half-width of intervals", "wanted", "widest", "precise enough", "")]
        rows += [_row(kind) for kind in head.precision.kinds]
        lines.append(Table(rows))
    for text in (*_beside(head.precision), *_order(head.settled), *_dropped(head.settled), *_not_reached(head, head.precision)):
        lines.append(Text(text, "  ", "    "))
    return ["What is settled", *lines] if lines else []


def _row(kind: KindReached) -> tuple[str, ...]:
    settled = kind.precise > 0 and kind.precise + kind.undefined == kind.numbers
    widest = "no number yet" if math.isinf(kind.widest) else "none" if math.isnan(kind.widest) else alone(kind.widest, 2)
    many = f"{kind.precise} of {kind.numbers - kind.undefined}"
    if kind.precise == kind.numbers - kind.undefined and kind.precise:
        many = f"all {kind.precise}"
    return f"  {NAMES[kind.kind]}", alone(kind.wanted), widest, many, "settled" if settled else "NOT SETTLED"


def _beside(precision: PrecisionAnswer | None) -> Iterable[str]:
    """Where the widest intervals are, and numbers of which no precision can be had."""
    for kind in precision.kinds if precision else ():
        if kind.precise + kind.undefined < kind.numbers and kind.where:
            yield f"Widest of the {NAMES[kind.kind].partition(',')[0]}: {plain(kind.where)}."
        if kind.undefined:
            yield f"Of {kind.undefined} {NAMES[kind.kind].partition(',')[0]} there is no number that more members would give."


def _order(settled: SettledAnswer | None) -> Iterable[str]:
    if settled is None:
        return
    if settled.rankings == 1:
        first = "the first place is settled" if settled.first else "the first place is not settled"
        yield f"Order of the inputs: {'settled in whole' if settled.whole else first}."
        return
    first, whole = (_of_all(count, settled.rankings) for count in (settled.first, settled.whole))
    yield f"Order of the inputs: first place settled in {first} rankings, whole order in {whole}."


def _of_all(count: int, every: int) -> str:
    """How many of all: "none of 7", "5 of 7", "all 7", "both"."""
    if count == every == 2:
        return "both"
    return f"all {every}" if count == every else f"{count or 'none'} of {every}"


def _dropped(settled: SettledAnswer | None) -> Iterable[str]:
    if settled is None:
        return
    bound = f"share surely below {alone(NEGLIGIBLE)} in all that is ranked"
    may = listed(plain(driver.input.label) for driver in settled.may)
    yield f"May be dropped ({bound}): {may}." if may else f"May be dropped ({bound}): none."
    if settled.open:
        yield f"Not settled whether they may: {listed(plain(driver.input.label) for driver in settled.open)}."


def _not_reached(head: Headline, precision: PrecisionAnswer | None) -> Iterable[str]:
    if precision is None or precision.reached:
        return
    yield f"The precision asked was not reached: {stopped(head, precision)}."
    solves, spent = precision.solves_needed, int(head.facts["solves"])
    if math.isfinite(solves) and solves > spent:
        members = more_members(head)
        expected = f"It is expected after about {alone(solves, 2)} solves ({spent} so far), which is about {members} members."
        yield expected if members else "It cannot be reached: that would take more members than a run can have."
    if precision.unknown:
        yield f"Nothing can be foretold yet of {plain(precision.unknown)}."


def stopped(head: Headline, precision: PrecisionAnswer) -> str:
    """Why no further round was begun: what the last one has left is not enough for another, which doubles the members."""
    spent = int(head.facts["solves"]) + sum(int(each.facts.get("solves", 0)) for each in head.scenarios)
    if precision.stopped == "members":
        return "it has all the members that it may use"
    if precision.stopped == "deadline":
        return "the deadline came first"
    if precision.stopped == "minutes":
        return "another round would have taken longer than the time that is left"
    allowed = precision.solves_allowed
    if precision.stopped != "solves" or allowed is None:
        return "the run was ended before"
    if spent > allowed:
        return f"the first round alone takes {spent} solves, and it may spend {allowed}"
    return f"another round would take it beyond the {allowed} solves that it may spend ({spent} spent)"


def more_members(head: Headline) -> int:
    """Members with which to go on, a power of two times those so far: those that the precision asked is expected to take, else twice as
    many; 0 where that is more than a run can have."""
    members, solves = int(head.facts["members"]), int(head.facts["solves"])
    needed = head.precision.solves_needed if head.precision and not head.precision.reached else math.nan
    times = needed / solves if math.isfinite(needed) and needed > solves else 2.0
    more = members * 2 ** max(1, math.ceil(math.log2(times)))
    return int(more) if more <= MOST_MEMBERS else 0


def next_commands(head: Headline, folder: str, extensible: bool) -> list[str]:
    """What to do next, ready to be copied into a shell."""
    place = plain(shlex.quote(folder))
    lines = [f"uq show {place} --json"]
    if extensible:
        # With a bound on the solves more members alone would change nothing.
        members = 0 if head.precision and head.precision.stopped == "solves" else more_members(head)
        lines += [f"uq extend {place} --members {members}"] if members else []
        lines.append(f"uq compare {place} OTHER")
    return [f"{'Next: ' if number == 0 else '      '}{line}" for number, line in enumerate(lines)]
