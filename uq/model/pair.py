"""An explicit Runge-Kutta pair as a declaration that checks itself.

A pair holds its coefficients and proves, when it is built, that they meet the order conditions which it claims: exactly where they are
fractions, to the digits that were printed where they are decimals.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from decimal import Decimal, localcontext
from fractions import Fraction as F
from math import prod
from typing import TypeVar

from uq.model.trees import Tree, density, trees

Weights = tuple[F, ...]
N = TypeVar("N", F, Decimal)
# Where within the step the continuous extension is checked: an order condition of order q is a polynomial in theta of degree q at most, but
# a wrong coefficient does not hide from three places that are no symmetric ones.
PLACES = (F(1), F(1, 3), F(4, 5))


@dataclass(frozen=True)
class Control:
    """Step size control (see `uq.model.control`): h_new = h * 0.9 * err^-alpha * err_old^beta within [least, most] * h."""

    alpha: float
    beta: float
    least: float
    most: float


@dataclass(frozen=True)
class Pair:
    """An explicit pair whose last stage is the first of the next step, with a continuous extension.

    `a` row by row (the last row is the solution's weights), `c` nodes; `e` weights of one or two error estimates (solution minus embedded
    solution, of the orders `embedded_orders`). With two, err = |err0|^2 / sqrt(|err0|^2 + 0.01 |err1|^2) as in DOP853. `extra` rows and
    `extra_c` nodes of stages that only the extension needs. `d` weights of the corrections of the extension, in the form of Hairer's
    CONTD5 and CONTD8, with th in [0, 1], D = y1 - y0, P = h k1 - D, Q = D - h k_last - P, R_i = h d_i k:
    u = y0 + th (D + (1-th) (P + th (Q + (1-th) (R1 + th (R2 + ...))))).
    `digits`: decimals to which the coefficients are printed; 0 where they are exact. `undershoot`: by how many absolute tolerances a state
    that settles at a bound may be beyond it, at the ends of steps or between them, because of the pair's own error (measured).
    """

    name: str
    source: str
    a: tuple[Weights, ...]
    c: Weights
    e: tuple[Weights, ...]
    d: tuple[Weights, ...]
    order: int
    embedded_orders: tuple[int, ...]
    extension_order: int
    control: Control
    undershoot: float
    extra: tuple[Weights, ...] = ()
    extra_c: Weights = ()
    digits: int = 0

    def __post_init__(self) -> None:
        for row, node in zip((*self.a, *self.extra), (*self.c, *self.extra_c), strict=True):
            if abs(sum(row) - node) > self.doubt:
                raise ValueError(f"{self.name}: a row of a does not add up to its node {node}")
        check = _Check(self)
        solution = self.padded((*self.a[-1], F(0)))
        check.weights("solution", solution, F(1), self.order)
        for e, order in zip(self.e, self.embedded_orders, strict=True):
            embedded = tuple(b - w for b, w in zip(solution, self.padded(e), strict=True))
            check.weights("embedded solution", embedded, F(1), order)
        for theta in PLACES:
            check.weights("continuous extension", self.extension(theta), theta, self.extension_order)

    @property
    def stages(self) -> int:
        """Number of stages of a step, the one shared with the next step included, those of the extension alone not."""
        return len(self.c)

    @property
    def all_stages(self) -> int:
        """Number of stages with those of the extension alone."""
        return len(self.c) + len(self.extra)

    @property
    def doubt(self) -> F:
        """How far a sum of printed coefficients may be off; 0 where they are exact."""
        return F(1000, 10**self.digits) if self.digits else F(0)

    def padded(self, weights: Weights) -> Weights:
        """Weights of all stages, 0 for those that are not named."""
        return (*weights, *[F(0)] * (self.all_stages - len(weights)))

    def extension(self, theta: F) -> Weights:
        """The weights of k1, k2, ... in (u(theta) - y0) / h."""
        b = self.padded((*self.a[-1], F(0)))
        first, last = self.padded((F(1),)), self.padded((*[F(0)] * (self.stages - 1), F(1)))
        third = tuple(f - w for f, w in zip(first, b, strict=True))
        fourth = tuple(w - k - t for w, k, t in zip(b, last, third, strict=True))
        parts = (b, third, fourth, *map(self.padded, self.d))
        total: Weights = self.padded(())
        for place in range(len(parts) - 1, -1, -1):
            factor = 1 - theta if place % 2 else theta
            total = tuple(factor * (w + t) for w, t in zip(parts[place], total, strict=True))
        return total


class _Check:
    """Order conditions of one pair: exact fractions, or decimals of twice the printed digits (fractions would take a third of a second)."""

    def __init__(self, pair: Pair) -> None:
        self._pair = pair
        self._elementary: dict[Tree, tuple[F, ...] | tuple[Decimal, ...]] = {}

    def weights(self, what: str, weights: Weights, theta: F, order: int) -> None:
        """ValueError unless sum b_i phi_i(t) = theta^|t| / gamma(t) for every tree up to the order."""
        with localcontext() as context:
            context.prec = max(2 * self._pair.digits, 10)
            if self._pair.digits:
                self._judge(what, _decimals(weights), _decimals((theta,))[0], order, _decimals)
            else:
                self._judge(what, weights, theta, order, tuple)

    def _judge(self, what: str, weights: tuple[N, ...], theta: N, order: int, convert: Callable[[Iterable[F]], tuple[N, ...]]) -> None:
        rows = tuple(convert(row) for row in (*self._pair.a, *self._pair.extra))
        one, doubt = convert((F(1), self._pair.doubt))
        memory: dict[Tree, tuple[N, ...]] = self._elementary  # type: ignore[assignment]

        def elementary(tree: Tree) -> tuple[N, ...]:
            """Product over the branches of sum_j a_ij phi_j(branch), for every stage i."""
            if tree not in memory:
                inner = [elementary(branch) for branch in tree]
                memory[tree] = tuple(prod((sum_of(row, branch) for branch in inner), start=one) for row in rows)
            return memory[tree]

        for nodes in range(1, order + 1):
            for tree in trees(nodes):
                if abs(sum_of(weights, elementary(tree)) - theta**nodes / density(tree)) > doubt:
                    raise ValueError(f"{self._pair.name}: the {what} misses the order condition of {tree}")


def sum_of(row: tuple[N, ...], values: tuple[N, ...]) -> N:
    """Sum of products of a row with as many leading values."""
    return sum((x * y for x, y in zip(row, values, strict=False) if x), start=row[0] * 0 if row else values[0] * 0)


def _decimals(values: Iterable[F]) -> tuple[Decimal, ...]:
    return tuple(Decimal(value.numerator) / Decimal(value.denominator) for value in values)
