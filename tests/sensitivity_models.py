"""Dependent normal inputs with formulas instead of solved models: mixed rows are drawn here, from conditional normal distributions."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass, field, replace
from itertools import combinations
from math import factorial
from typing import Any

import numpy as np
from scipy.special import ndtri

from tests.analysis_models import folded
from uq.analysis.ask import Ask, InputGroup, LimitAsked, Measured, Quantity
from uq.analysis.finding import Finding
from uq.analysis.given import pilot_classes
from uq.analysis.pilot import pilot_ask
from uq.analysis.sample import Sample
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block, take_apart
from uq.design.design import Design
from uq.solve.batch import Batch, Status, Truth

Sets = tuple[tuple[int, ...], ...]


def every_set(units: Sets) -> Sets:
    """Every set of units but none and all, as places of inputs."""
    many = range(1, len(units))
    return tuple(tuple(sorted(p for u in chosen for p in units[u])) for size in many for chosen in combinations(range(len(units)), size))


def prefixes(units: Sets, orders: Sets) -> Sets:
    """The sets that the orders run through, once each."""
    sets = (tuple(sorted(p for u in order[:size] for p in units[u])) for order in orders for size in range(1, len(units)))
    return tuple(dict.fromkeys(sets))


@dataclass(frozen=True, eq=False)
class Dependent:
    """y(x [member, input], times) [member, watched, time] of normal inputs; sets: the mixed rows; the limit is y > threshold."""

    mean: np.ndarray
    covariance: np.ndarray
    values: Callable[[np.ndarray, np.ndarray], np.ndarray]
    times: tuple[float, ...] = (0.0, 1.0)
    sets: Sets | None = None
    groups: tuple[InputGroup, ...] = ()
    units: Sets | None = None
    orders: Sets = ()
    dependent: bool = True
    threshold: float | None = None
    by: tuple[float, ...] = ()
    take: Callable[[np.ndarray], np.ndarray] | None = None
    fails: Callable[[np.ndarray], np.ndarray] | None = None
    measured: tuple[Measured, ...] = ()
    _known: dict[tuple[int, ...], tuple[np.ndarray, np.ndarray]] = field(default_factory=dict, init=False)

    @property
    def many(self) -> int:
        return len(self.mean)

    @property
    def mixed(self) -> Sets:
        units = self.units or tuple((place,) for place in range(self.many))
        if self.sets is not None:
            return self.sets
        return prefixes(units, self.orders) if self.orders else every_set(units)

    def ask(self, **changes: Any) -> Ask:
        watched = self.values(self.mean[None], np.array(self.times)).shape[1]
        plain = Ask(
            time_unit="s",
            solved_times=np.array(self.times),
            grid=np.arange(len(self.times)),
            watched=tuple(Quantity(f"y{place}", "", "K", "K") for place in range(watched)),
            outcomes=(Quantity("o", "", "K", "K"),) if self.take else (),
            limits=() if self.threshold is None else (LimitAsked("hot", "", f"y0 > {self.threshold}", self.by),),
            inputs=tuple(f"x{place + 1}" for place in range(self.many)),
            questions=("bands", "limits", "outcomes", "ranking"),
            quantiles=(0.05, 0.5, 0.95),
            confidence=0.95,
            failures="bound",
            sets=self.mixed,
            groups=self.groups,
            dependent=self.dependent,
            units=self.units,
            orders=self.orders,
            measured=self.measured,
        )
        return replace(plain, **changes)

    def drawn(self, base: np.ndarray) -> np.ndarray:
        """Inputs of A and B rows from points u [row, input]."""
        return self.mean + through(ndtri(base), np.linalg.cholesky(self.covariance).T)

    def members(self, base: np.ndarray) -> np.ndarray:
        """All members of a block: A rows, B rows, and for every set A with the inputs of the set drawn anew given the others."""
        rows = len(base) // 2
        x, z = self.drawn(base), ndtri(base[rows:])
        parts = [x]
        for redrawn in self.mixed:
            new, old = list(redrawn), [place for place in range(self.many) if place not in redrawn]
            slope, root = self._given(redrawn)
            mixed = x[:rows].copy()
            given = through(x[:rows, old] - self.mean[old], slope)
            mixed[:, new] = self.mean[new] + given + through(z[:, new], root)
            parts.append(mixed)
        return np.concatenate(parts)

    def _given(self, redrawn: tuple[int, ...]) -> tuple[np.ndarray, np.ndarray]:
        """How the redrawn inputs hang on the others, and the transposed root of what remains of their covariance; worked out once."""
        if redrawn not in self._known:
            new, old = list(redrawn), [place for place in range(self.many) if place not in redrawn]
            slope = np.linalg.solve(self.covariance[np.ix_(old, old)], self.covariance[np.ix_(old, new)])
            within = self.covariance[np.ix_(new, new)] - self.covariance[np.ix_(new, old)] @ slope
            self._known[redrawn] = slope, np.linalg.cholesky(within).T
        return self._known[redrawn]

    def solve(self, x: np.ndarray) -> Batch:
        """What the solver would hand over."""
        times = np.array(self.times)
        values = np.ascontiguousarray(self.values(x, times))
        outcomes = np.ascontiguousarray(self.take(x)[:, None]) if self.take else np.zeros((len(x), 0))
        status, end = np.zeros(len(x), dtype=np.int8), np.full(len(x), times[-1])
        conditions = np.zeros((len(x), 0 if self.threshold is None else 1, len(times)), dtype=np.int8)
        if self.fails is not None:
            when = self.fails(x)
            gone = np.isfinite(when)
            end, status[gone] = np.where(gone, when, end), Status.blew_up
            values[np.broadcast_to((times >= when[:, None])[:, None], values.shape)] = np.nan
        if self.threshold is not None:
            conditions[:, 0] = np.where(np.isnan(values[:, 0]), Truth.unknown, values[:, 0] > self.threshold)
        counts = np.ones(len(x), dtype=np.int32)
        return Batch(values, conditions, outcomes, status, end, 7 * counts, counts, 0 * counts, 0 * counts, np.zeros((len(x), 1)))

    def complete(self, design: Design, **changes: Any) -> Ask:
        """The ask with what the pilot tells."""
        x = self.drawn(design.pilot())
        return pilot_classes(pilot_ask(self.ask(**changes), self.solve(x), 1e-6), x, design.replicates)

    def tallied(self, design: Design, ask: Ask, blocks: Iterable[Block]) -> Tallies:
        """The tallies of these blocks."""
        found = []
        for block in blocks:
            x = self.members(design.base(block))
            found.append(Tallies.of(ask, _sample(design, block, x, self.solve(x), ask)))
        return folded(found)

    def forecast(self, design: Design, **changes: Any) -> dict[str, Finding]:
        """All findings by group."""
        ask = self.complete(design, **changes)
        tallies = self.tallied(design, ask, design.blocks(0, design.rows, min(design.rows, 128)))
        return {finding.group: finding for finding in tallies.findings(ask)}


def through(rows: np.ndarray, matrix: np.ndarray) -> np.ndarray:
    """The matrix product, each row by itself: the same bits for any number of rows."""
    found = np.zeros((len(rows), matrix.shape[1]))
    for column, along in zip(rows.T, matrix, strict=True):
        found += column[:, None] * along
    return found


class _Apart:
    """A design that takes blocks apart whatever mixed rows they have."""

    def __init__(self, design: Design) -> None:
        self.replicates = design.replicates

    def split(self, block: Block, y: np.ndarray) -> Any:
        return take_apart(y, block.count)


def _sample(design: Design, block: Block, x: np.ndarray, batch: Batch, ask: Ask) -> Sample:
    return Sample.of(_Apart(design), block, x, batch, ask)  # type: ignore[arg-type]


def design_of(model: Dependent, seed: int, rows: int) -> Design:
    """A rows and B rows only; the model makes the mixed ones."""
    return Design(tuple(f"x{place + 1}" for place in range(model.many)), seed, rows, ranked=False)


def linear(weights: Iterable[float]) -> Callable[[np.ndarray, np.ndarray], np.ndarray]:
    """y = weights . x, at all times."""

    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        return (x * np.array(list(weights))).sum(axis=1)[:, None, None] * np.ones(len(times))

    return values


def closed_linear(weights: np.ndarray, covariance: np.ndarray, units: Sets | None = None) -> np.ndarray:
    """Shapley effects of weights . x: of Var(E[y | x_u]) by definition, with the conditional variance of the normal law.

    Owen and Prieur 2017, doi:10.1137/16M1097717, section 4.
    """
    units = units or tuple((place,) for place in range(len(weights)))
    many, total = len(units), weights @ covariance @ weights

    def left(outside: frozenset[int]) -> float:
        """E[Var(y | inputs outside the set)]."""
        new = sorted(p for u in outside for p in units[u])
        old = [p for p in range(len(weights)) if p not in new]
        within = covariance[np.ix_(new, new)]
        if old:
            across = covariance[np.ix_(new, old)]
            within = within - across @ np.linalg.solve(covariance[np.ix_(old, old)], across.T)
        return float(weights[new] @ within @ weights[new]) if new else 0.0

    found = np.zeros(many)
    for unit in range(many):
        others = [u for u in range(many) if u != unit]
        for size in range(many):
            weight = factorial(size) * factorial(many - size - 1) / factorial(many)
            for chosen in combinations(others, size):
                found[unit] += weight * (left(frozenset((*chosen, unit))) - left(frozenset(chosen)))
    return found / total
