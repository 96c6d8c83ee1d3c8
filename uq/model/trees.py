"""Rooted trees: what the order conditions of Runge-Kutta methods are counted by (Butcher; Hairer, Norsett, Wanner I, II.2)."""

from __future__ import annotations

from itertools import combinations_with_replacement
from math import prod

Tree = tuple["Tree", ...]


def trees(order: int) -> tuple[Tree, ...]:
    """All rooted trees with `order` nodes; a tree is the tuple of its branches."""
    return tuple(sorted(tuple(sorted(forest)) for forest in _forests(order - 1, order - 1)))


def _forests(nodes: int, largest: int) -> list[tuple[Tree, ...]]:
    if nodes == 0:
        return [()]
    found: list[tuple[Tree, ...]] = []
    for size in range(min(nodes, largest), 0, -1):
        for many in range(1, nodes // size + 1):
            for same in combinations_with_replacement(trees(size), many):
                found += [same + rest for rest in _forests(nodes - size * many, size - 1)]
    return found


def size(tree: Tree) -> int:
    """Number of nodes of a rooted tree."""
    return 1 + sum(size(branch) for branch in tree)


def density(tree: Tree) -> int:
    """gamma(t): the order of the tree times the densities of its branches."""
    return size(tree) * prod(density(branch) for branch in tree)
