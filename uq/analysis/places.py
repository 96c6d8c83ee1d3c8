"""What has a place in a ranking, in which order, and what of it may be dropped.

Values, order of the inputs and dropping settle separately (Sarrazin, Pianosi and Wagener 2016, doi:10.1016/j.envsoft.2016.02.005).
"""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Literal

from uq.analysis.finding import Finding
from uq.analysis.order import ordered
from uq.analysis.precision import Headline

# An input may be dropped where the upper end of its total index (with dependence its Shapley effect) is below this in everything ranked.
NEGLIGIBLE = 0.01


@dataclass(frozen=True)
class Ranked:
    """What has a place in a ranking: an input by itself, or all that is drawn as a whole (`inputs`: their names).

    place: in the dimension `of`: that of the inputs or that of the groups.
    """

    name: str
    inputs: tuple[str, ...]
    of: Literal["input", "group"]
    place: int


def singly(inputs: Sequence[str]) -> tuple[Ranked, ...]:
    """Every input by itself."""
    return tuple(Ranked(name, (name,), "input", place) for place, name in enumerate(inputs))


def ranked_in(finding: Finding, inputs: Sequence[str]) -> tuple[Ranked, ...]:
    """What has a place in a ranking: every input, or in place of those that are drawn together their group."""
    if "drawn_with" not in finding.variables:
        return singly(inputs)
    together = [str(name) for name in finding.variables["drawn_with"].data]
    groups = [str(name) for name in finding.variables["group"].data]
    found: list[Ranked] = []
    for place, (name, group) in enumerate(zip(inputs, together, strict=True)):
        if not group:
            found.append(Ranked(name, (name,), "input", place))
        elif group not in together[:place]:
            members = tuple(each for each, its in zip(inputs, together, strict=True) if its == group)
            found.append(Ranked(group, members, "group", groups.index(group)))
    return tuple(found)


@dataclass(frozen=True)
class Share:
    """The share of an input, or of inputs drawn together, in one ranking."""

    of: str
    value: float
    low: float
    high: float


def shares(headlines: Sequence[Headline], ranked: Sequence[Ranked]) -> dict[str, list[Share]]:
    """By ranking the share of all that is ranked: total index, with dependence Shapley effect; rankings without any are left out."""
    numbers: dict[str, dict[str, Headline]] = {}
    for each in headlines:
        if each.kind == "indices" and each.name.startswith(("total", "shapley")):
            numbers.setdefault(each.group, {})[each.dims[0]] = each
    found: dict[str, list[Share]] = {}
    for ranking, by_dim in numbers.items():
        if any(one.of in by_dim and not by_dim[one.of].undefined[one.place] for one in ranked):
            found[ranking] = [_share(one, by_dim.get(one.of)) for one in ranked]
    return found


def _share(one: Ranked, numbers: Headline | None) -> Share:
    if numbers is None:
        return Share(one.name, math.nan, math.nan, math.nan)
    return Share(one.name, *(float(end[one.place]) for end in (numbers.value, numbers.low, numbers.high)))


def order_of_inputs(headlines: Sequence[Headline], ranked: Sequence[Ranked]) -> Mapping[str, list[list[str]]]:
    """By ranking all that is ranked in an order only as fine as the intervals allow: within a group of names it is not settled."""
    return {
        ranking: [[share.of for share in group] for group in ordered(every, lambda share: share)]
        for ranking, every in shares(headlines, ranked).items()
    }


@dataclass(frozen=True)
class Dropping:
    """What may be dropped (fixed anywhere in its range), what must not be, and of what it is not settled: names of all that is ranked."""

    may: tuple[str, ...]
    must_not: tuple[str, ...]
    open: tuple[str, ...]


def dropping(headlines: Sequence[Headline], ranked: Sequence[Ranked], negligible: float = NEGLIGIBLE) -> Dropping:
    """An input may be dropped where its share is surely below `negligible` in every ranking, must not where it surely is not in one.

    Of inputs that are drawn together this is said of all of them at once.
    """
    rankings = shares(headlines, ranked).values()
    names, may, must_not = [each.name for each in ranked], [], []
    for place, name in enumerate(names):
        every = [ranking[place] for ranking in rankings]
        if any(share.low >= negligible for share in every):
            must_not.append(name)
        elif every and all(share.high < negligible for share in every):
            may.append(name)
    return Dropping(tuple(may), tuple(must_not), tuple(name for name in names if name not in {*may, *must_not}))
