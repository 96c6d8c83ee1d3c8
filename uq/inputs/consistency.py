"""Whether all that is said about dependence can hold together.

In: the names of the inputs, the entries of `[[dependence]]`. Out: every mistake with the number of its entry; groups that go together.
Must not know: distributions, designs.
"""

from __future__ import annotations

import math
from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from itertools import combinations

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake, suggest
from uq.inputs.arguments import listed
from uq.inputs.dependence import Dependence, Dependences, JointSample, rank_of_normal
from uq.inputs.matrix import triangle

Floats = NDArray[np.float64]

# So many subsets of one size are tried for the smallest that cannot hold together; beyond, one that has no smaller one inside is found.
MOST_SUBSETS = 20_000

Pair = tuple[str, str]


@dataclass(frozen=True)
class Stated:
    """The correlation of the normal scores of a pair, the number given for it, its kind, and the number of its entry."""

    normal: float
    given: float
    kind: str
    entry: int


def check_dependence(names: Sequence[str], dependence: Sequence[Dependences]) -> tuple[tuple[int, ValueMistake], ...]:
    """Every mistake among the entries, with the number of the entry (from 0) that it is about; its `key` is the argument.

    Unknown names, a pair given twice, an input in two blocks, correlations that cannot hold together.
    """
    mistakes = [(entry, mistake) for entry, each in enumerate(dependence) for mistake in _unknown(names, each)]
    mistakes += _twice(dependence)
    mistakes += _two_blocks(dependence)
    if not mistakes:
        pairs = stated_pairs(dependence)
        for together in components(names, pairs):
            mistakes += _inconsistent(together, pairs)
    return tuple(sorted(mistakes, key=lambda each: each[0]))


def stated_pairs(dependence: Sequence[Dependences]) -> dict[Pair, Stated]:
    """Every pair with a correlation, its names in both orders."""
    pairs: dict[Pair, Stated] = {}
    for entry, each in enumerate(dependence):
        if isinstance(each, Dependence):
            for (a, b, given), (_, _, normal) in zip(each.pairs(), each.normal(), strict=True):
                pairs[a, b] = pairs[b, a] = Stated(normal, given, each.kind, entry)
    return pairs


def components(names: Sequence[str], pairs: Iterable[Pair]) -> tuple[tuple[str, ...], ...]:
    """The groups of inputs that correlations of any size (also 0) link, each and all in the order of the inputs."""
    near: dict[str, set[str]] = {}
    for a, b in pairs:
        near.setdefault(a, set()).add(b)
        near.setdefault(b, set()).add(a)
    found: list[tuple[str, ...]] = []
    seen: set[str] = set()
    for name in names:
        if name in near and name not in seen:
            together, waiting = set(), [name]
            while waiting:
                one = waiting.pop()
                if one not in together:
                    together.add(one)
                    waiting += near[one]
            seen |= together
            found.append(tuple(each for each in names if each in together))
    return tuple(found)


def matrix_of(together: Sequence[str], pairs: dict[Pair, Stated]) -> Floats:
    """The correlations of the normal scores of these inputs; a pair without one has 0."""
    matrix = np.eye(len(together))
    for (i, a), (j, b) in combinations(enumerate(together), 2):
        if (a, b) in pairs:
            matrix[i, j] = matrix[j, i] = pairs[a, b].normal
    return matrix


def _unknown(names: Sequence[str], each: Dependences) -> list[ValueMistake]:
    key = "columns" if isinstance(each, JointSample) else "between"
    expected = "the names of uncertain inputs"
    return [ValueMistake(f"`{name}`", expected, suggest(name, names), key) for name in each.between if name not in names]


def _twice(dependence: Sequence[Dependences]) -> list[tuple[int, ValueMistake]]:
    """Pairs that have two correlations."""
    seen: dict[frozenset[str], int] = {}
    found = []
    for entry, each in enumerate(dependence):
        if isinstance(each, Dependence):
            for a, b, _ in each.pairs():
                if frozenset((a, b)) in seen:
                    found.append(
                        (entry, ValueMistake(f"a second correlation between `{a}` and `{b}`", "one for every pair", key="between"))
                    )
                seen.setdefault(frozenset((a, b)), entry)
    return found


def _two_blocks(dependence: Sequence[Dependences]) -> list[tuple[int, ValueMistake]]:
    """Inputs of a joint sample that are in another one, or have a correlation as well."""
    found = []
    samples = [(entry, each) for entry, each in enumerate(dependence) if isinstance(each, JointSample)]
    for entry, each in enumerate(dependence):
        for other, sample in samples:
            if other == entry or (isinstance(each, JointSample) and other > entry):
                continue
            shared = [name for name in each.between if name in sample.between]
            if shared:
                key = "columns" if isinstance(each, JointSample) else "between"
                expected = "every input in one block: a joint sample says all about its inputs"
                found.append((entry, ValueMistake(f"{listed(shared)}, also in the joint sample {sample.file}", expected, key=key)))
    return found


def _inconsistent(together: tuple[str, ...], pairs: dict[Pair, Stated]) -> list[tuple[int, ValueMistake]]:
    """The mistake of correlations that no random numbers have, told by the smallest set of inputs that shows it."""
    matrix = matrix_of(together, pairs)
    if triangle(matrix) is not None:
        return []
    culprits = smallest_inconsistent(matrix)
    names = [together[place] for place in culprits]
    told, unsaid = [], []
    for a, b in combinations(names, 2):
        if (a, b) in pairs:
            told.append((a, b, pairs[a, b]))
        else:
            unsaid.append(f"`{a}` and `{b}`")
    last = max(reversed(told), key=lambda each: each[2].entry)
    found = "correlations that cannot hold together: " + ", ".join(f"`{a}` and `{b}` {stated.given:g}" for a, b, stated in told)
    if unsaid:
        found += f", and 0 between {', '.join(unsaid)}, for which none is given"
    key = last[2].kind
    return [(last[2].entry, ValueMistake(found, "a positive definite correlation matrix", _remedy(names, pairs, last[:2]), key))]


def smallest_inconsistent(matrix: Floats) -> tuple[int, ...]:
    """The smallest set of rows and columns that is not positive definite by itself (the first of its size).

    Where there are too many to try all, one that becomes consistent when any one of its rows is left out.
    """
    size = len(matrix)
    for count in range(2, size):
        if math.comb(size, count) > MOST_SUBSETS:
            break
        for chosen in combinations(range(size), count):
            if triangle(matrix[np.ix_(chosen, chosen)]) is None:
                return chosen
    kept = list(range(size))
    for place in range(size):
        fewer = [each for each in kept if each != place]
        if triangle(matrix[np.ix_(fewer, fewer)]) is None:
            kept = fewer
    return tuple(kept)


def _remedy(names: list[str], pairs: dict[Pair, Stated], last: Pair) -> str:
    """For three inputs: what the third pair may have, given the other two; otherwise a plain advice."""
    if len(names) != 3:
        return "bring these nearer to 0, or state those not given"
    unsaid = [pair for pair in combinations(names, 2) if pair not in pairs]
    a, b = unsaid[0] if unsaid else last
    c = next(name for name in names if name not in (a, b))
    with_a, with_b = (pairs[c, each].normal if (c, each) in pairs else 0.0 for each in (a, b))
    room = math.sqrt((1 - with_a**2) * (1 - with_b**2))
    low, high = (with_a * with_b + sign * room for sign in (-1, 1))
    kind = pairs[last].kind
    if kind == "rank_correlation":
        low, high = rank_of_normal(max(low, -1.0)), rank_of_normal(min(high, 1.0))
    inner_low, inner_high = math.ceil(low * 1000 + 1e-6) / 1000, math.floor(high * 1000 - 1e-6) / 1000
    return f"with the others as they are, that of `{a}` and `{b}` may lie from {inner_low:g} to {inner_high:g}"
