"""The section of the summary that says what drives the answers."""

from __future__ import annotations

import math

from uq.report.answers import Driver, Estimate, Headline, RankingAnswer
from uq.report.order import ordered
from uq.report.plain import plain, table, wrapped
from uq.report.rounding import at_most, rounded
from uq.report.spoken import moment

# Rows for one thing; the rest are summed up in a line.
MOST_ROWS = 4
MOST_RANKINGS = 6
# Decimal places of a share: one per mille is as fine as anybody reads a ranking.
FINEST = -3
# Inputs whose share is surely below this are not shown by name.
NEGLIGIBLE = 0.02
EXPLAINED = "Shares of the variance: `first` is that of an input by itself, `total` includes what it does together with others."


def drivers_section(head: Headline) -> list[str]:
    """A ranking for every limit, outcome and watched quantity, by total share of variance."""
    if not head.rankings:
        return []
    level = f"{100 * head.facts['confidence']:g} % interval"
    rows: list[tuple[str, ...]] = [("", "total", level, "first", level, "evidence")]
    rankings = _in_order(head)
    for ranking in rankings[:MOST_RANKINGS]:
        rows += _ranked(head, ranking)
    if more := [target(head, ranking) for ranking in rankings[MOST_RANKINGS:]]:
        rows.append((f"Not shown here, but in the file: {', '.join(more)}",))
    return ["What drives it", *wrapped(EXPLAINED, "  "), *table(rows)]


def target(head: Headline, ranking: RankingAnswer) -> str:
    """What is ranked, in words."""
    label = plain(ranking.label)
    if ranking.of == "limits":
        return f'"{label}"' + ("" if math.isnan(ranking.time) else f" by {moment(ranking.time, head.time_unit)}")
    return f"{label}, over all times" if ranking.of == "bands" else label


def _in_order(head: Headline) -> list[RankingAnswer]:
    order = {"limits": 0, "outcomes": 1, "bands": 2}
    return sorted(head.rankings, key=lambda ranking: order.get(ranking.of, 3))


def _ranked(head: Headline, ranking: RankingAnswer) -> list[tuple[str, ...]]:
    rows: list[tuple[str, ...]] = [(target(head, ranking),)]
    known = [driver for driver in ranking.drivers if not driver.total.missing]
    if not known:
        return [*rows, (f"  missing: {plain(ranking.reason) or 'no share could be worked out'}",)]
    # A single one left over is shown rather than summed up.
    most = MOST_ROWS + 1 if len(known) == MOST_ROWS + 1 else MOST_ROWS
    place, shown = 1, 0
    rest: list[Driver] = []
    for group in ordered(known):
        named = [driver for driver in group if shown == 0 or not driver.total.high < NEGLIGIBLE][: most - shown]
        rest += [driver for driver in group if driver not in named]
        rows += [_row(driver, place, place + len(group) - 1) for driver in named]
        if len(group) > 1 and named:
            rows.append((f"       order of places {place} {'and' if len(group) == 2 else 'to'} {place + len(group) - 1} not settled",))
        place, shown = place + len(group), shown + len(named)
    if rest:
        rows.append((f"  {_others(rest)}",))
    return rows


def _row(driver: Driver, first: int, last: int) -> tuple[str, ...]:
    place = f"{first}." if first == last else f"{first}-{last}."
    evidence = "not stated" if driver.input.evidence is None else str(driver.input.evidence)
    return (f"  {place:<5}{plain(driver.input.label)}", *_share(driver.total), *_share(driver.first), evidence)


def _share(estimate: Estimate) -> tuple[str, str]:
    texts = rounded(estimate.value, estimate.low, estimate.high, FINEST)
    return texts.value, texts.interval


def _others(rest: list[Driver]) -> str:
    highest = max(driver.total.high for driver in rest)
    count = "1 other input" if len(rest) == 1 else f"{len(rest)} other inputs"
    bound = at_most(highest) if highest > 0 else "0"
    return f"{count}: total {'' if len(rest) == 1 else 'of each '}at most {bound}"
