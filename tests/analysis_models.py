"""Cheap models with known answers for tests of the analysis room: members are made from formulas instead of being solved."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass, replace
from typing import Any

import numpy as np
from scipy.special import ndtri

from uq.analysis.ask import Ask, LimitAsked, Quantity
from uq.analysis.finding import Finding, Variable
from uq.analysis.pilot import pilot_ask
from uq.analysis.sample import Sample
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design
from uq.solve.batch import Batch, Status, Truth

Values = Callable[[np.ndarray, np.ndarray], np.ndarray]


@dataclass(frozen=True)
class Model:
    """values(u [member, input], times [time]) -> [member, watched, time]; outcomes likewise [member, outcome]; a limit is T > threshold.

    fails(u) [member]: the time of failure, inf where there is none. doubts(u) [member]: the time from which on the limit's condition
    cannot be told, inf where there is none.
    """

    inputs: tuple[str, ...]
    times: tuple[float, ...]
    values: Values
    watched: tuple[str, ...] = ("T",)
    outcomes: Callable[[np.ndarray], np.ndarray] | None = None
    outcome_names: tuple[str, ...] = ()
    threshold: float | None = None
    by: tuple[float, ...] = ()
    accept: float | None = None
    fails: Callable[[np.ndarray], np.ndarray] | None = None
    doubts: Callable[[np.ndarray], np.ndarray] | None = None

    def ask(self, **changes: Any) -> Ask:
        limits = () if self.threshold is None else (LimitAsked("hot", "", f"T > {self.threshold}", self.by, self.accept),)
        plain = Ask(
            time_unit="s",
            solved_times=np.array(self.times),
            grid=np.arange(len(self.times)),
            watched=tuple(Quantity(name, "", "K", "K") for name in self.watched),
            outcomes=tuple(Quantity(name, "", "K", "K") for name in self.outcome_names),
            limits=limits,
            inputs=self.inputs,
            questions=("bands", "limits", "outcomes", "ranking"),
            quantiles=(0.05, 0.25, 0.5, 0.75, 0.95),
            confidence=0.95,
            failures="bound",
        )
        return replace(plain, **changes)

    def solve(self, u: np.ndarray) -> Batch:
        """What the solver would hand over."""
        times = np.array(self.times)
        values = np.ascontiguousarray(self.values(u, times))
        assert values.shape == (len(u), len(self.watched), len(times))
        outcomes = self.outcomes(u) if self.outcomes else np.zeros((len(u), 0))
        end = np.full(len(u), times[-1])
        status = np.zeros(len(u), dtype=np.int8)
        conditions = np.zeros((len(u), 0 if self.threshold is None else 1, len(times)), dtype=np.int8)
        if self.fails is not None:
            when = self.fails(u)
            end = np.where(np.isfinite(when), when, end)
            status[np.isfinite(when)] = Status.blew_up
            values[np.broadcast_to((times >= when[:, None])[:, None], values.shape)] = np.nan
            outcomes = np.where(np.isfinite(when)[:, None], np.nan, outcomes)
        if self.threshold is not None:
            conditions[:, 0] = np.where(np.isnan(values[:, 0]), Truth.unknown, values[:, 0] > self.threshold)
        if self.doubts is not None:
            conditions[:, 0][times >= self.doubts(u)[:, None]] = Truth.unknown
        counts = np.ones(len(u), dtype=np.int32)
        return Batch(values, conditions, outcomes, status, end, 7 * counts, counts, 0 * counts, 0 * counts, np.zeros((len(u), 1)))


def tallied(model: Model, design: Design, ask: Ask, blocks: Iterable[Block]) -> list[Tallies]:
    """The tallies of each block."""
    found = []
    for block in blocks:
        u = design.points(block)
        found.append(Tallies.of(ask, Sample.of(design, block, u, model.solve(u), ask)))
    return found


def complete(model: Model, design: Design, **changes: Any) -> Ask:
    """The model's ask with the pilot's centres."""
    return pilot_ask(model.ask(**changes), model.solve(design.pilot()), 1e-6)


def forecast(model: Model, design: Design, **changes: Any) -> dict[str, Finding]:
    """All findings by group, replicates in blocks of at most 256 rows."""
    ask = complete(model, design, **changes)
    parts = tallied(model, design, ask, design.blocks(0, design.rows, 256))
    return {finding.group: finding for finding in folded(parts).findings(ask, model.solve(np.full((1, len(model.inputs)), 0.5)).values[0])}


def folded(parts: list[Tallies]) -> Tallies:
    """All merged, neighbours first."""
    while len(parts) > 1:
        pairs = [left.merge(right) for left, right in zip(parts[::2], parts[1::2], strict=False)]
        parts = pairs + parts[len(parts) - len(parts) % 2 :]
    return parts[0]


def number(finding: Finding, name: str) -> np.ndarray:
    """The data of one variable."""
    variable: Variable = finding.variables[name]
    return variable.data


def gaussian(u: np.ndarray, times: np.ndarray) -> np.ndarray:
    """T(t) = 10 + z0 + t z1 with standard normal inputs: mean 10, variance 1 + t^2, indices 1/(1+t^2) and t^2/(1+t^2)."""
    z = ndtri(u)
    return (10 + z[:, 0:1] + z[:, 1:2] * times)[:, None]
