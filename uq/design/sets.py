"""Which inputs the mixed rows take from B: one by one, by groups, by all subsets, along random orders.

In: how many inputs, groups or units of them. Out: sets of places. Must not know: what the inputs are.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass

import numpy as np

from uq.errors import ValueMistake
from uq.seeds import generator, seed_of

Places = tuple[int, ...]
Sets = tuple[Places, ...]

# Up to so many units all their subsets are solved: 1022 for 10.
MOST_UNITS = 10
# Beyond, random orders, so many that they have about as many subsets, but at least 16 pairs of them: with 8 the interval, by Student's t
# over the pairs, covers about 90 %.
MOST_SUBSETS: int = 2**MOST_UNITS - 2
LEAST_PAIRS = 16
# Weights by which correlated inputs are redrawn given the others, of all sets together, in bytes: a weight for each of them and each score.
MOST_WEIGHTS = 512 * 10**6


def one_by_one(inputs: int, groups: Iterable[Places] = ()) -> Sets:
    """Every input by itself, then every group; a group of one input, and one that is there already, is not repeated."""
    return tuple(dict.fromkeys([*((place,) for place in range(inputs)), *(tuple(sorted(group)) for group in groups)]))


@dataclass(frozen=True)
class ShapleySets:
    """What Shapley effects need: sets of places, each the union of the units redrawn.

    units: the places of every unit. orders [order][unit]: the random orders where there are too many subsets, each followed by its reverse
    (antithetic: Mitchell, Cooper, Frank, Holmes 2022, "Sampling permutations for Shapley value estimation"); empty where `sets` holds all
    subsets. Along an order the units that stand from a place on are redrawn, those before it kept.
    """

    units: Sets
    sets: Sets
    orders: tuple[Places, ...] = ()

    def place_of(self, redrawn: Iterable[int]) -> int:
        """The number of the set in which just these units are redrawn; ValueError where it is not among the sets."""
        return self.sets.index(_union(self.units, redrawn))


def shapley_sets(units: Sequence[Places], seed: int, linked: int = 0) -> ShapleySets:
    """All proper subsets of up to 10 units (2^k - 2), in the order of their bits; for more, those along seeded random orders.

    (Song, Nelson, Staum 2016, doi:10.1137/15M1048070: exact and random permutation methods.) For k > 10 units there are
    2 max(16, floor(511 / (k - 1))) orders, with k - 1 sets each: about 1000 sets up to 32 units, 32 (k - 1) beyond.

    linked: how many inputs are correlated with each other, directly or through others. Every set needs 2 linked^2 weights to redraw its own
    among them: `ValueMistake` where all of them would take more than 512 MB, which is from about 100 correlated inputs on.
    """
    known = tuple(tuple(unit) for unit in units)
    count = len(known)
    many = 2**count - 2 if count <= MOST_UNITS else 2 * _pairs(count) * (count - 1)
    if 16 * many * linked**2 > MOST_WEIGHTS:
        raise ValueMistake(
            f"a ranking of {count} inputs of which {linked} are correlated with each other",
            f"so few that their redrawing takes at most {MOST_WEIGHTS // 10**6} MB (this takes {16 * many * linked**2 / 1e6:.0f} MB)",
            'leave "ranking" out of `ask`, or state fewer correlations, so that fewer inputs hang together',
            key="ask",
        )
    if count <= MOST_UNITS:
        chosen = [[unit for unit in range(count) if bits >> unit & 1] for bits in range(1, 2**count - 1)]
        return ShapleySets(known, tuple(_union(known, each) for each in chosen))
    orders = random_orders(count, seed)
    along = (_union(known, order[first:]) for order in orders for first in range(1, count))
    return ShapleySets(known, tuple(dict.fromkeys(along)), orders)


def random_orders(count: int, seed: int) -> tuple[Places, ...]:
    """Seeded random orders of `count` units, each followed by its reverse."""
    draws = generator(seed_of(seed, "orders", count))
    orders: list[Places] = []
    for _ in range(_pairs(count)):
        order = tuple(int(unit) for unit in np.argsort(draws.random(count), kind="stable"))
        orders += [order, order[::-1]]
    return tuple(orders)


def _pairs(count: int) -> int:
    """Of how many random orders, each with its reverse."""
    return max(LEAST_PAIRS, MOST_SUBSETS // 2 // (count - 1))


def _union(units: Sets, chosen: Iterable[int]) -> Places:
    return tuple(sorted(place for unit in chosen for place in units[unit]))
