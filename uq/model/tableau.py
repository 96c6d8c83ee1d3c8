"""The Runge-Kutta pair whose step is written out for every model, as exact numbers that check themselves.

A table holds its coefficients and proves, when it is built, that they meet the order conditions which it claims.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from fractions import Fraction as F
from itertools import combinations_with_replacement
from math import prod

Tree = tuple["Tree", ...]
Weights = tuple[F, ...]


def trees(order: int) -> tuple[Tree, ...]:
    """All rooted trees with `order` nodes; a tree is the tuple of its branches (Butcher; Hairer, Norsett, Wanner I, II.2)."""
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
    """gamma(t): the order of the tree times the densities of its branches (Hairer, Norsett, Wanner I, II.2)."""
    return size(tree) * prod(density(branch) for branch in tree)


@dataclass(frozen=True)
class Pair:
    """An explicit pair whose last stage is the first of the next step, with a continuous extension.

    `a` row by row (the last row is the solution's weights), `c` nodes, `e` weights of the error estimate (solution minus embedded
    solution), `d` weights of the extension's correction, in the form of Hairer's CONTD5:
    u = y0 + th*(D + (1-th)*(h*k1 - D + th*(D - h*k7 - (h*k1 - D) + (1-th)*h*sum d_i*k_i))), D = y1 - y0, th in [0, 1].
    """

    name: str
    source: str
    a: tuple[Weights, ...]
    c: Weights
    e: Weights
    d: Weights
    order: int
    embedded_order: int
    extension_order: int

    def __post_init__(self) -> None:
        for row, node in zip(self.a, self.c, strict=True):
            if sum(row) != node:
                raise ValueError(f"{self.name}: a row of a does not add up to its node {node}")
        solution = (*self.a[-1], F(0))
        embedded = tuple(b - e for b, e in zip(solution, self.e, strict=True))
        self._check(lambda _: solution, self.order, "solution")
        self._check(lambda _: embedded, self.embedded_order, "embedded solution")
        self._check(self.extension, self.extension_order, "continuous extension")

    @property
    def stages(self) -> int:
        """Number of stages, the one shared with the next step included."""
        return len(self.c)

    def extension(self, theta: F) -> Weights:
        """The weights of k1, k2, ... in (u(theta) - y0) / h."""
        b = (*self.a[-1], F(0))
        first = (F(1), *[F(0)] * (self.stages - 1))
        last = (*[F(0)] * (self.stages - 1), F(1))
        rest = 1 - theta
        third = [f - w for f, w in zip(first, b, strict=True)]
        fourth = [w - k - t for w, k, t in zip(b, last, third, strict=True)]
        return tuple(theta * (w + rest * (t + theta * (q + rest * z))) for w, t, q, z in zip(b, third, fourth, self.d, strict=True))

    def _check(self, weights: Callable[[F], Weights], order: int, what: str) -> None:
        for theta in (F(1), F(1, 3), F(4, 5)) if what == "continuous extension" else (F(1),):
            w = weights(theta)
            for nodes in range(1, order + 1):
                for tree in trees(nodes):
                    phi = self._elementary(tree)
                    if sum(x * y for x, y in zip(w, phi, strict=True)) != theta**nodes / density(tree):
                        raise ValueError(f"{self.name}: the {what} misses the order condition of {tree}")

    def _elementary(self, tree: Tree) -> Weights:
        """Product over the branches of sum_j a_ij phi_j(branch), for every stage i."""
        inner = [self._elementary(branch) for branch in tree]
        rows = [sum_of(row, branch) for branch in inner for row in self.a]
        columns = [rows[k : k + self.stages] for k in range(0, len(rows), self.stages)]
        return tuple(prod((column[i] for column in columns), start=F(1)) for i in range(self.stages))


def sum_of(row: Weights, values: Weights) -> F:
    """Sum of products of a row with as many leading values."""
    return sum((x * y for x, y in zip(row, values, strict=False)), F(0))


# Dormand and Prince, A family of embedded Runge-Kutta formulae, J. Comp. Appl. Math. 6 (1980) 19-26, table 2, RK5(4)7M; the extension (d)
# is that of DOPRI5 in Hairer, Norsett, Wanner, Solving ODEs I, 2nd ed., II.6. Both written from memory; the order conditions prove them.
DORMAND_PRINCE_54 = Pair(
    name="explicit54",
    source="Dormand, Prince 1980; Hairer, Norsett, Wanner I, II.6",
    a=(
        (),
        (F(1, 5),),
        (F(3, 40), F(9, 40)),
        (F(44, 45), F(-56, 15), F(32, 9)),
        (F(19372, 6561), F(-25360, 2187), F(64448, 6561), F(-212, 729)),
        (F(9017, 3168), F(-355, 33), F(46732, 5247), F(49, 176), F(-5103, 18656)),
        (F(35, 384), F(0), F(500, 1113), F(125, 192), F(-2187, 6784), F(11, 84)),
    ),
    c=(F(0), F(1, 5), F(3, 10), F(4, 5), F(8, 9), F(1), F(1)),
    e=(F(71, 57600), F(0), F(-71, 16695), F(71, 1920), F(-17253, 339200), F(22, 525), F(-1, 40)),
    d=(
        F(-12715105075, 11282082432),
        F(0),
        F(87487479700, 32700410799),
        F(-10690763975, 1880347072),
        F(701980252875, 199316789632),
        F(-1453857185, 822651844),
        F(69997945, 29380423),
    ),
    order=5,
    embedded_order=4,
    extension_order=4,
)

PAIRS = (DORMAND_PRINCE_54,)
