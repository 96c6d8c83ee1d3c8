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
from math import factorial
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Floats
from uq.analysis.estimate import Estimate, about, ratio, t_quantile

Units = tuple[tuple[int, ...], ...]


class Walk(Protocol):
    """One way to come from nothing to all units, or an average over several."""

    def adds(self, costs: Floats, variances: Floats) -> Floats:
        """What every unit adds to the cost [.., unit, cell]: costs of the mixed rows [.., set, cell], and the variance [.., cell]."""


@dataclass(frozen=True, eq=False)
class EverySet:
    """All orders at once, where every set of units has its mixed rows: weights of the costs [unit, set]."""

    weights: Floats

    @classmethod
    def of(cls, units: Units, place: dict[tuple[int, ...], int]) -> EverySet:
        """Of |S|! (k - |S| - 1)! / k! what a unit adds to the set S."""
        many = len(units)
        weights = np.zeros((many, len(place)))
        adds = [factorial(size) * factorial(many - size - 1) / factorial(many) for size in range(many)]
        for held in range(1, 2**many - 1):
            inside = [unit for unit in range(many) if held >> unit & 1]
            at = place[inputs_of(units, inside)]
            weights[:, at] = -adds[len(inside)]
            weights[inside, at] = adds[len(inside) - 1]
        return cls(weights)

    def adds(self, costs: Floats, variances: Floats) -> Floats:
        """See `Walk`."""
        many = len(self.weights)
        found = np.repeat(variances[..., None, :] / many, many, axis=-2)
        for at in np.flatnonzero(self.weights.any(axis=0)):
            found += self.weights[:, at, None] * costs[..., at, None, :]
        return found


@dataclass(frozen=True, eq=False)
class Orders:
    """The average over some orders: units [order, place]; sets [order, place - 1]: the mixed rows that redraw the units before a place.

    An order needs no more than its own sets, so that hundreds of units take no more memory than their costs.
    """

    units: NDArray[np.intp]
    sets: NDArray[np.intp]

    @classmethod
    def of(cls, units: Units, place: dict[tuple[int, ...], int], orders: Units) -> Orders:
        """For these orders of units."""
        sets = [[place[inputs_of(units, order[:size])] for size in range(1, len(order))] for order in orders]
        return cls(np.array(orders, dtype=np.intp), np.array(sets, dtype=np.intp).reshape(len(orders), -1))

    def adds(self, costs: Floats, variances: Floats) -> Floats:
        """See `Walk`."""
        many = self.units.shape[1]
        found = np.zeros((*variances.shape[:-1], many, variances.shape[-1]))
        for order, sets in zip(self.units, self.sets, strict=True):
            upto = np.concatenate([costs[..., sets, :], variances[..., None, :]], axis=-2)
            found[..., order[0], :] += upto[..., 0, :]
            found[..., order[1:], :] += upto[..., 1:, :] - upto[..., :-1, :]
        return found / len(self.units)


@dataclass(frozen=True, eq=False)
class Walks:
    """How effects are made of costs: one walk where all sets are there, otherwise one for every independent random order.

    (An order and its reverse are one walk.) picked: sums of the effects of some units each, in place of the effects of all.
    """

    walks: tuple[Walk, ...]
    picked: Units | None = None

    @classmethod
    def of(cls, ask: Ask) -> Walks:
        """For the units and the mixed rows of the ask."""
        units, place = ask.shared_out, {tuple(sorted(each)): at for at, each in enumerate(ask.mixed)}
        if not ask.orders:
            return cls((EverySet.of(units, place),))
        step = 2 if _in_pairs(ask.orders) else 1
        return cls(tuple(Orders.of(units, place, ask.orders[at : at + step]) for at in range(0, len(ask.orders), step)))

    def shared(self, picked: Units) -> Walks:
        """Of sums of effects: each of some units."""
        return Walks(self.walks, picked)

    def effects(self, costs: Floats, variances: Floats, confidence: float) -> Estimate:
        """Shapley effects [unit, cell] from costs [replicate, set, cell] and variances [replicate, cell].

        Interval: from the residuals over replicates, as of every index; where orders are random the error of their average, by Student's t
        over the walks, is added to it in square.
        """
        walks = len(self.walks)
        numerators = self._of(self.walks[0], costs, variances)
        for walk in self.walks[1:]:
            numerators += self._of(walk, costs, variances)
        found = ratio(numerators / walks, variances[:, None], confidence)
        if walks == 1:
            return found
        pooled_costs, pooled = costs.mean(axis=0), variances.mean(axis=0)
        with np.errstate(invalid="ignore", divide="ignore"):
            each = np.stack([self._of(walk, pooled_costs, pooled) for walk in self.walks]) / pooled
            spread = t_quantile(confidence, walks) * each.std(axis=0, ddof=1) / np.sqrt(walks)
        return about(found.value, np.hypot(found.high - found.value, spread))

    def _of(self, walk: Walk, costs: Floats, variances: Floats) -> Floats:
        """What the units, or those picked together, add along a walk."""
        adds = walk.adds(costs, variances)
        if self.picked is None:
            return adds
        return np.stack([adds[..., list(units), :].sum(axis=-2) for units in self.picked], axis=-2)


def _in_pairs(orders: tuple[tuple[int, ...], ...]) -> bool:
    """Whether every other order is the reverse of the one before it."""
    return len(orders) > 1 and len(orders) % 2 == 0 and all(orders[at] == orders[at + 1][::-1] for at in range(0, len(orders), 2))


def inputs_of(units: Units, chosen: list[int] | tuple[int, ...]) -> tuple[int, ...]:
    """The places of the inputs of some units, ascending: how the set of a mixed row is written."""
    return tuple(sorted(place for unit in chosen for place in units[unit]))
