"""The Rosenbrock method whose steps are written for stiff members, as a declaration that checks itself.

With W = I / (gamma h) - J, J = df/dy and f_t = df/dt at the start of the step, for i = 1, ..., s

    W k_i = f(t + c_i h, y + sum_j<i a_ij k_j) + sum_j<i (c'_ij / h) k_j + h d_i f_t,   y_new = y + sum_j a_sj k_j + k_s,

where the last stage is the estimate of the error, and a, c', d are the transformed coefficients that spare products with J (Hairer,
Wanner, Solving ODEs II, IV.7). Inside the step, with m_r = sum_i H_ri k_i and 0 <= th <= 1,

    y(th) = (1 - th) y + th (y_new + (1 - th) (m_1 + th (m_2 + th m_3))).
"""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from uq.model.pair import Control
from uq.model.trees import Tree, density, trees

Row = tuple[float, ...]
# Coefficients have 16 digits, the largest is about 150.
DOUBT = 1e-10
PLACES = (1.0, 1 / 3, 0.8)


@dataclass(frozen=True)
class Rosenbrock:
    """A stiffly accurate method with an embedded estimate and an extension; `undershoot` as in `uq.model.pair.Pair`.

    ValueError unless the order conditions hold (Hairer, Wanner II, IV.7, theorem 7.4) that the orders claim: of the method, of what the
    estimate is the difference to, and of the extension, at a few places; and unless every stage is consistent in time.
    """

    name: str
    source: str
    gamma: float
    c: Row
    d: Row
    a: tuple[Row, ...]
    coupling: tuple[Row, ...]
    extension: tuple[Row, ...]
    order: int
    embedded_order: int
    extension_order: int
    control: Control
    undershoot: float

    def __post_init__(self) -> None:
        check = _Check(self)
        s = self.stages
        new = (*self.a[-1], 1.0)
        check.weights("solution", new, 1.0, self.order)
        check.weights("embedded solution", (*self.a[-1], 0.0), 1.0, self.embedded_order)
        for theta in PLACES:
            check.weights("extension", self.inside(theta), theta, self.extension_order)
        for i in range(s):
            if abs(sum(check.alpha[i]) - self.c[i]) > DOUBT or abs(sum(check.gamma[i]) - self.d[i]) > DOUBT:
                raise ValueError(f"{self.name}: stage {i + 1} is not consistent in time")

    @property
    def stages(self) -> int:
        """Number of stages."""
        return len(self.c)

    def inside(self, theta: float) -> Row:
        """The weights of the stages in y(theta) - y."""
        new = (*self.a[-1], 1.0)
        m = [sum(theta**r * row[i] for r, row in enumerate(self.extension)) for i in range(self.stages)]
        return tuple(theta * (b + (1 - theta) * each) for b, each in zip(new, m, strict=True))


class _Check:
    """The method in its original coefficients: Gamma^-1 = I / gamma - c', alpha = a Gamma, b = m Gamma."""

    def __init__(self, method: Rosenbrock) -> None:
        s, inverse_of = method.stages, method.gamma
        self._name = method.name
        gamma: list[list[float]] = []
        for i in range(s):
            unit = [float(i == j) for j in range(s)]
            for j, weight in enumerate(method.coupling[i]):
                unit = [u + weight * g for u, g in zip(unit, gamma[j], strict=True)]
            gamma.append([inverse_of * u for u in unit])
        self.gamma = gamma
        self.alpha = [self._times(row) for row in method.a]
        self._beta = [[x + y for x, y in zip(one, other, strict=True)] for one, other in zip(self.alpha, gamma, strict=True)]

    def _times(self, row: Sequence[float]) -> list[float]:
        columns = zip(*self.gamma[: len(row)], strict=True) if row else ((),) * len(self.gamma)
        return [sum(x * y for x, y in zip(row, column, strict=True)) for column in columns]

    def weights(self, what: str, transformed: Row, theta: float, order: int) -> None:
        """ValueError unless sum b_i phi_i(t) = theta^|t| / gamma(t) for every tree up to the order."""
        b = self._times(transformed)
        for nodes in range(1, order + 1):
            for tree in trees(nodes):
                found = sum(x * y for x, y in zip(b, self._elementary(tree), strict=True))
                if abs(found - theta**nodes / density(tree)) > DOUBT:
                    raise ValueError(f"{self._name}: the {what} misses the order condition of {tree}")

    def _elementary(self, tree: Tree) -> list[float]:
        """Of every stage; a node with one branch sums over alpha + gamma, one with several over alpha."""
        rows = self._beta if len(tree) == 1 else self.alpha
        product = [1.0] * len(rows)
        for branch in tree:
            inner = self._elementary(branch)
            product = [p * sum(x * y for x, y in zip(row, inner, strict=True)) for p, row in zip(product, rows, strict=True)]
        return product
