"""The section of the summary that says what drives the answers."""

from __future__ import annotations

import math
from collections.abc import Sequence
from dataclasses import dataclass

from uq.analysis.order import ordered
from uq.report.answers import Driver, Estimate, Headline, RankingAnswer
from uq.report.failed import behind
from uq.report.plain import Part, Table, Text, plain
from uq.report.rounding import MISSING, at_most, rounded
from uq.report.spoken import MOST_LISTED, listed, quoted
from uq.report.telling import telling_limit, telling_quantity
from uq.report.trust import weak_inputs
from uq.study.plan import MOST_MEMBERS

# Rows for one thing; an order that is not settled is shown whole where it takes no more than so many rows in all, else in one line.
MOST_ROWS, MOST_TIED = 4, 6
# Things of which the order is told in a line below the table.
MOST_LINES = 8
# First places told in such a line.
MOST_PLACES = 3
COUNTED = ("none", "one", "two", "three")
# Decimal places of a share: one per mille is as fine as anybody reads a ranking.
FINEST = -3
# Inputs whose share is surely below this are not shown by name.
NEGLIGIBLE = 0.02
EXPLAINED = "Shares of the variance: `first` is that of an input by itself, `total` includes what it does together with others."
SHAPLEY = (
    "Shares of the variance: `Shapley` shares it out among the inputs so that they add up to 1, since inputs that depend on each other "
    "have no total share; `first` is what knowing that input would take away, with all that it tells of the others."
)
# Groups of inputs shown for one thing.
MOST_GROUPS = 4
Row = tuple[str, ...]


def drivers_section(head: Headline) -> list[Part]:
    """The ranking of what the answer in words is about, by share of variance, and the order of the inputs for everything else."""
    if not head.rankings:
        return []
    if len(head.inputs) == 1:
        return ["What drives it", Text(f"{plain(head.inputs[0].label)} is the only uncertain input: there is nothing to rank.", "  ")]
    level = f"{100 * head.facts['confidence']:g} % interval"
    shapley = any(ranking.shapley for ranking in head.rankings)
    first, *others = in_order(head)
    if not _has_shares(first):
        return ["What drives it", *_lines(head, (first, *others), first)]
    named = "Shapley" if shapley else "total"
    rows: list[Row] = [("", named, level, "first", level, "evidence"), (target(head, first),), *_ranked(head, first)]
    explained = Text(SHAPLEY if shapley else EXPLAINED, "  ")
    return ["What drives it", explained, Table(rows, (2, 4)), *_lines(head, others, first)]


def _lines(head: Headline, rankings: Sequence[RankingAnswer], full: RankingAnswer) -> list[Part]:
    """The order of the inputs for things that have no table, a line for each; those without shares for the same reason in one."""
    lines, missing = [], dict[str, list[str]]()
    for ranking in rankings[:MOST_LINES]:
        if _has_shares(ranking):
            lines.append(f"{target(head, ranking)}: {_briefly(ranking, full)}")
        else:
            missing.setdefault(_missing(head, ranking), []).append(target(head, ranking))
    lines += [f"{', '.join(targets)}: {reason}" for reason, targets in missing.items()]
    if more := [target(head, each) for each in rankings[MOST_LINES:]]:
        lines.append(f"Not shown here, but in the file: {listed(more)}")
    return [Text(line, "  ", "    ") for line in lines]


def target(head: Headline, ranking: RankingAnswer) -> str:
    """What is ranked, in words."""
    label = plain(ranking.label)
    if ranking.of == "limits":
        return f'"{label}"' + ("" if math.isnan(ranking.time) else f" by {head.clock.at(ranking.time)}")
    return f"{label}, over all times" if ranking.of == "bands" else label


def in_order(head: Headline) -> list[RankingAnswer]:
    """Rankings with shares before those without; in front that of what the answer in words is about, then limits, outcomes, courses."""
    order = {"limits": 0, "outcomes": 1, "bands": 2}
    telling, quantity = telling_limit(head), telling_quantity(head)
    first = telling.name if telling else quantity.name if quantity else ""
    return sorted(head.rankings, key=lambda ranking: (not _has_shares(ranking), ranking.name != first, order.get(ranking.of, 3)))


def known_drivers(ranking: RankingAnswer) -> list[Driver]:
    """The inputs that have a share; those that are drawn together have one together."""
    return [driver for driver in ranking.places if not driver.shares.share.missing]


def _has_shares(ranking: RankingAnswer) -> bool:
    return bool(known_drivers(ranking)) or any(not shares.share.missing for _, shares in ranking.groups)


def share_of(driver: Driver) -> Estimate:
    """What an input is ranked by."""
    return driver.shares.share


@dataclass(frozen=True)
class _Tie:
    """Inputs of which the order is not settled (or a single one), with their places."""

    first: int
    drivers: list[Driver]

    @property
    def last(self) -> int:
        return self.first + len(self.drivers) - 1

    @property
    def places(self) -> str:
        return f"{self.first}." if len(self.drivers) == 1 else f"{self.first}-{self.last}."


def _ties(ranking: RankingAnswer) -> list[_Tie]:
    ties: list[_Tie] = []
    for group in ordered(known_drivers(ranking), share_of):
        ties.append(_Tie(ties[-1].last + 1 if ties else 1, group))
    return ties


def _ranked(head: Headline, ranking: RankingAnswer) -> list[Row]:
    """The rows of a table: as many places as fit, whole ties, and the rest summed up."""
    rows: list[Row] = []
    rest: list[Driver] = []
    shown = 0
    for tie in _ties(ranking):
        negligible = shown > 0 and all(share_of(driver).high < NEGLIGIBLE for driver in tie.drivers)
        if shown >= MOST_ROWS or negligible:
            rest += tie.drivers
        elif shown + len(tie.drivers) <= max(MOST_TIED, MOST_ROWS):
            rows += [_row(driver, tie.places) for driver in tie.drivers]
            if len(tie.drivers) > 1:
                rows.append((f"       order of places {tie.first} {'and' if len(tie.drivers) == 2 else 'to'} {tie.last} not settled",))
            shown += len(tie.drivers)
        else:
            rows.append((f"  {tie.places:<5}{_together(tie, ranking)}",))
            shown = MOST_ROWS
    if len(rest) == 1 and not share_of(rest[0]).high < NEGLIGIBLE:
        return [*rows, _row(rest[0], f"{len(ranking.places)}."), *_groups(ranking)]
    if rest:
        rows.append((f"  {_others(head, rest, ranking)}",))
    return rows + _groups(ranking)


def _together(tie: _Tie, ranking: RankingAnswer) -> str:
    """A long tie in one line."""
    low, high = min(share_of(each).value for each in tie.drivers), max(share_of(each).value for each in tie.drivers)
    ends = rounded(_clipped(low), _clipped(low), _clipped(high), -2)
    kind = "Shapley effect" if ranking.shapley else "total"
    names = listed((plain(each.input.label) for each in tie.drivers), max(MOST_LISTED, MOST_TIED))
    return f"{len(tie.drivers)} inputs, order not settled, {kind} {ends.low} to {ends.high}: {names}"


def _groups(ranking: RankingAnswer) -> list[Row]:
    """Shares of inputs taken together that have no place of their own, largest first."""
    placed = {driver.input.name for driver in ranking.places if driver.members}
    groups = [each for each in ranking.groups if each[0] not in placed and not each[1].share.missing]
    known = sorted(groups, key=lambda each: -each[1].share.value)
    rows: list[Row] = [(f"  group {plain(name)}", *_share(shares.share), *_share(shares.first), "") for name, shares in known[:MOST_GROUPS]]
    return rows + ([(f"  {len(known) - MOST_GROUPS} more groups in the file",)] if len(known) > MOST_GROUPS else [])


def _row(driver: Driver, places: str) -> Row:
    evidence = "not stated" if driver.input.evidence is None else str(driver.input.evidence)
    return (f"  {places:<5}{plain(driver.input.label)}", *_share(share_of(driver)), *_share(driver.shares.first), evidence)


def _share(estimate: Estimate) -> tuple[str, str]:
    """A share within 0 and 1, of which an estimate can come out a little beyond."""
    if estimate.missing:
        return "", ""
    texts = rounded(_clipped(estimate.value), _clipped(estimate.low), _clipped(estimate.high), FINEST)
    return texts.value, texts.interval


def _clipped(share: float) -> float:
    return min(max(share, 0.0), 1.0)


def _others(head: Headline, rest: list[Driver], ranking: RankingAnswer) -> str:
    """What is left, with a bound; by name where it is not negligible, or the trust section warns of it."""
    warned = {row.name for row in weak_inputs(head)}
    highest = max(share_of(driver).high for driver in rest)
    count = "1 other input" if len(rest) == 1 else f"{len(rest)} other inputs"
    bound = f"at most {at_most(min(highest, 1.0))}" if highest > 0 else "0"
    kind = "Shapley effect" if ranking.shapley else "total"
    named = [driver for driver in rest if warned & {row.name for row in driver.rows}]
    named += [driver for driver in rest if driver not in named and not share_of(driver).high < NEGLIGIBLE]
    names = listed((plain(driver.input.label) for driver in named), max(MOST_LISTED, len(warned)))
    told = f": {names}" if len(named) == len(rest) else f", among them {names}" if named else ""
    return f"{count}, {kind} {'' if len(rest) == 1 else 'of each '}{bound}{told}"


def _briefly(ranking: RankingAnswer, full: RankingAnswer) -> str:
    """The order of the inputs in a line, as far as it is settled."""
    mine, whole = _names(ranking), _names(full)
    if mine == whole and len(mine) > 1:
        return "the same order"
    settled = _settled(mine)
    if not settled:
        return "the first place is not settled"
    if settled == _settled(whole)[: len(settled)] and len(settled) > 1:
        return f"the same first {COUNTED[len(settled)]}"
    labels = {driver.input.name: plain(driver.input.label) for driver in ranking.places}
    told = "first " + ", then ".join(quoted(labels[name]) for name in settled)
    return told + ("; the order of the others is not settled" if len(settled) < min(MOST_PLACES, len(mine)) else "")


def _names(ranking: RankingAnswer) -> list[frozenset[str]]:
    return [frozenset(driver.input.name for driver in tie.drivers) for tie in _ties(ranking)]


def _settled(order: list[frozenset[str]]) -> list[str]:
    """The first few that have a place of their own."""
    names: list[str] = []
    for group in order[:MOST_PLACES]:
        if len(group) > 1:
            break
        names += group
    return names


def _missing(head: Headline, ranking: RankingAnswer) -> str:
    """Why there are no shares; for a limit that too few members passed, how many did and what would help."""
    reason = plain(ranking.reason) or "no share could be worked out"
    limit = next((each for each in head.limits if ranking.of == "limits" and each.name == ranking.name and each.by), None)
    if limit is None or limit.by[-1][1].missing or "needs" not in reason:
        return f"{MISSING}: {reason}"
    estimate = limit.by[-1][1]
    members = behind(head.facts, estimate, limit.given).members
    passed = round(estimate.value * members)
    told = f"{MISSING}: {reason}; {passed} of {members} passed"
    fewer = min(passed, members - passed)
    wanted = next((int(word) for word in reason.split() if word.isdigit()), 0)
    if not fewer or not wanted > fewer:
        return f"{told}. Rank an outcome instead, such as the highest value of what the limit is about"
    more = int(head.facts["members"]) * 2 ** math.ceil(math.log2(1.2 * wanted / fewer))
    remedy = f"Take about {more} members, or rank" if more <= MOST_MEMBERS else "Rank"
    return f"{told}. {remedy} an outcome instead, such as the highest value of what the limit is about"
