"""Shapley effects: the variance shared out among inputs that may depend on each other, so that the shares add up to one.

A mixed row whose set S is redrawn, given the inputs that it shares with A, has mean((a - m)^2)/2 = E[Var(Y | inputs outside S)] =: c(S),
with c(nothing) = 0 and c(all) = the variance. The effect of an input is what it adds to c, averaged over all orders in which inputs may
come (Owen 2014, doi:10.1137/130936233; with this c: Song, Nelson and Staum 2016, doi:10.1137/15M1048070, theorem 1). It is linear in c, so
that an effect is a ratio of sums over replicates like every index, and the effects add up to one whatever the draws.

Instead of single inputs it may be units of several that are drawn together. Where there are too many units for all sets, the average is
over random orders; an order and its reverse, standing side by side, count as one draw (they make up for each other exactly where at most
two inputs interact: Mitchell et al. 2022, from memory).
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from math import factorial

import numpy as np

from uq.analysis.ask import Ask, Floats
from uq.analysis.estimate import Estimate, about, ratio, t_quantile


@dataclass(frozen=True, eq=False)
class Walks:
    """How effects are made of costs: sets [walk, unit, set] are the weights of the mixed rows, full [walk, unit] those of the variance.

    One walk where all sets are there; otherwise one for every independent random order (or pair of an order and its reverse).
    """

    sets: Floats
    full: Floats

    @classmethod
    def of(cls, ask: Ask) -> Walks:
        """For the units and the mixed rows of the ask."""
        units, place = ask.shared_out, {tuple(sorted(each)): at for at, each in enumerate(ask.mixed)}
        walks = [_walk(units, place, order) for order in ask.orders] if ask.orders else [_all_sets(units, place)]
        sets, full = (np.stack(each) for each in zip(*walks, strict=True))
        if _in_pairs(ask.orders):
            sets, full = ((each[0::2] + each[1::2]) / 2 for each in (sets, full))
        return cls(sets, full)

    def shared(self, picked: tuple[tuple[int, ...], ...]) -> Walks:
        """Of sums of effects: each of some units."""
        sets = np.stack([self.sets[:, list(units)].sum(axis=1) for units in picked], axis=1)
        return Walks(sets, np.stack([self.full[:, list(units)].sum(axis=1) for units in picked], axis=1))

    def effects(self, costs: Floats, variances: Floats, confidence: float) -> Estimate:
        """Shapley effects [unit, cell] from costs [replicate, set, cell] and variances [replicate, cell].

        Interval: from the residuals over replicates, as of every index; where orders are random the error of their average, by Student's t
        over the walks, is added to it in square.
        """
        found = ratio(_weighted(self.sets.mean(axis=0), self.full.mean(axis=0), costs, variances), variances[:, None], confidence)
        walks = len(self.full)
        if walks == 1:
            return found
        pooled_costs, pooled = costs.mean(axis=0)[None], variances.mean(axis=0)[None]
        pairs = zip(self.sets, self.full, strict=True)
        with np.errstate(invalid="ignore", divide="ignore"):
            each = np.concatenate([_weighted(sets, full, pooled_costs, pooled) for sets, full in pairs]) / pooled
            spread = t_quantile(confidence, walks) * each.std(axis=0, ddof=1) / np.sqrt(walks)
        return about(found.value, np.hypot(found.high - found.value, spread))


def _weighted(sets: Floats, full: Floats, costs: Floats, variances: Floats) -> Floats:
    """Weights sets [unit, set], full [unit] times costs [replicate, set, cell] and variances [replicate, cell]: [replicate, unit, cell]."""
    found = full[:, None] * variances[:, None]
    for place in np.flatnonzero(sets.any(axis=0)):
        found += sets[:, place, None] * costs[:, None, place]
    return found


def _all_sets(units: tuple[tuple[int, ...], ...], place: dict[tuple[int, ...], int]) -> tuple[Floats, Floats]:
    """Weights where every set of units has its mixed rows: of |S|! (k - |S| - 1)! / k! what a unit adds to the set S."""
    many = len(units)
    sets, full = np.zeros((many, len(place))), np.full(many, 1 / many)
    adds = [factorial(size) * factorial(many - size - 1) / factorial(many) for size in range(many)]
    for held in range(1, 2**many - 1):
        inside = [unit for unit in range(many) if held >> unit & 1]
        at = place[inputs_of(units, inside)]
        sets[:, at] = -adds[len(inside)]
        sets[inside, at] = adds[len(inside) - 1]
    return sets, full


def _walk(units: tuple[tuple[int, ...], ...], place: dict[tuple[int, ...], int], order: tuple[int, ...]) -> tuple[Floats, Floats]:
    """Weights of one order: what every unit adds to those before it."""
    sets, full = np.zeros((len(units), len(place))), np.zeros(len(units))
    for after, (unit, following) in enumerate(pairwise(order)):
        at = place[inputs_of(units, order[: after + 1])]
        sets[unit, at] += 1.0
        sets[following, at] -= 1.0
    full[order[-1]] = 1.0
    return sets, full


def _in_pairs(orders: tuple[tuple[int, ...], ...]) -> bool:
    """Whether every other order is the reverse of the one before it."""
    return len(orders) > 1 and len(orders) % 2 == 0 and all(orders[at] == orders[at + 1][::-1] for at in range(0, len(orders), 2))


def inputs_of(units: tuple[tuple[int, ...], ...], chosen: list[int] | tuple[int, ...]) -> tuple[int, ...]:
    """The places of the inputs of some units, ascending: how the set of a mixed row is written."""
    return tuple(sorted(place for unit in chosen for place in units[unit]))
