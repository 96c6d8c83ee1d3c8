"""Quantities from light-tailed to strongly skewed with closed forms; how often intervals of means and deviations hold the truth."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from typing import NamedTuple

import numpy as np
from scipy.special import ndtri

from uq.analysis.skewed import mean, standard_deviation
from uq.design.blocks import Block
from uq.design.design import Design

Rule = Callable[[np.ndarray, np.ndarray], np.ndarray]


class Skewed(NamedTuple):
    """A rule for u [member, 3] and normal scores z [member, 3]; its mean and variance; a value near its median."""

    rule: Rule
    mean: float
    variance: float
    near: float = 0.0


def lognormal(rule: Rule, variance: float) -> Skewed:
    """exp of a normal variable with mean 0."""
    return Skewed(rule, float(np.exp(variance / 2)), float(np.expm1(variance) * np.exp(variance)), 1.0)


MODELS = {
    "lognormal 0.58": lognormal(lambda u, z: np.exp(0.5 * z[:, 0] + 0.3 * z[:, 1]), 0.34),
    "lognormal 1": lognormal(lambda u, z: np.exp(z[:, 0]), 1.0),
    "lognormal 1.41": lognormal(lambda u, z: np.exp(z[:, 0] + z[:, 1]), 2.0),
    "lognormal 1.73": lognormal(lambda u, z: np.exp(z.sum(axis=1)), 3.0),
    "lognormal 2": lognormal(lambda u, z: np.exp(2 * z[:, 0]), 4.0),
    "lognormal 3": lognormal(lambda u, z: np.exp(3 * z[:, 0]), 9.0),
    "normal": Skewed(lambda u, z: z.sum(axis=1), 0.0, 3.0),
    "uniform": Skewed(lambda u, z: u[:, 0], 0.5, 1 / 12, 0.5),
    "product": Skewed(lambda u, z: u.prod(axis=1), 1 / 8, 1 / 27 - 1 / 64),
    "exponential": Skewed(lambda u, z: -np.log(u[:, 0]), 1.0, 1.0, 1.0),
    "negative": Skewed(lambda u, z: np.log(u[:, 0]), -1.0, 1.0, -1.0),
    "gamma 3": Skewed(lambda u, z: -np.log(u).sum(axis=1), 3.0, 3.0, 3.0),
    "chi square": Skewed(lambda u, z: z[:, 0] ** 2, 1.0, 2.0),
    # Of the sum of two uniform ones what is above 1: 0 in half of all cases.
    "atom": Skewed(lambda u, z: np.maximum(u[:, 0] + u[:, 1] - 1, 0.0), 1 / 6, 1 / 18),
    "event of a tenth": Skewed(lambda u, z: (u[:, 0] + u[:, 1] > 2 - np.sqrt(0.2)) * 1.0, 0.1, 0.09),
    "two humps": Skewed(lambda u, z: z[:, 0] + 8.0 * (u[:, 1] > 0.7), 2.4, 1 + 64 * 0.21),
    "waves": Skewed(lambda u, z: np.sin(2 * np.pi * u[:, 0]) * np.sin(2 * np.pi * u[:, 1]) + u[:, 2], 0.5, 1 / 4 + 1 / 12),
    "ratio": Skewed(lambda u, z: z[:, 0] / (2 + u[:, 1]), 0.0, 1 / 6),
    "both ways": Skewed(
        lambda u, z: np.exp(0.8 * z[:, 0]) - 2 * np.exp(0.3 * z[:, 1]),
        float(np.exp(0.32) - 2 * np.exp(0.045)),
        float(np.exp(0.64) * np.expm1(0.64) + 4 * np.exp(0.09) * np.expm1(0.09)),
        -1.0,
    ),
    "times": Skewed(lambda u, z: z[:, 0] * z[:, 1], 0.0, 1.0),
    # The third moment is infinite.
    "power law": Skewed(lambda u, z: u[:, 0] ** (-1 / 3), 1.5, 0.75, 1.26),
}


class Held(NamedTuple):
    """Of one model: the share of seeds whose interval of the mean, and of the standard deviation, holds the truth."""

    mean: float
    deviation: float


def held(seeds: Iterable[int], rows: int, names: Iterable[str] = tuple(MODELS)) -> dict[str, Held]:
    """By model, with 16 replicates of so many rows."""
    chosen = {name: MODELS[name] for name in names}
    sums = [_sums(chosen, seed, rows) for seed in seeds]
    first, second = (np.stack([each[power] for each in sums], axis=1) for power in (0, 1))
    near = np.array([model.near for model in chosen.values()])
    truth = np.array([model.mean for model in chosen.values()]), np.sqrt([model.variance for model in chosen.values()])
    counted = np.full((16, 1, 1), 2 * rows)
    found = mean(first, counted, 0.95), standard_deviation(first, second, counted, 0.95)
    inside = [
        ((each.low <= true) & (true <= each.high)).mean(axis=0) for each, true in zip(found, (truth[0] - near, truth[1]), strict=True)
    ]
    return {name: Held(float(inside[0][at]), float(inside[1][at])) for at, name in enumerate(chosen)}


def _sums(models: dict[str, Skewed], seed: int, rows: int) -> tuple[np.ndarray, np.ndarray]:
    """Sums of shifted values and of their squares over the A and B members [replicate, model]."""
    design = Design(("p", "q", "r"), seed, rows, ranked=False)
    u = np.concatenate([design.base(Block(replicate, 0, rows)) for replicate in range(16)])
    z = ndtri(u)
    values = np.stack([model.rule(u, z) - model.near for model in models.values()]).reshape(len(models), 16, -1)
    return values.sum(axis=2).T, (values**2).sum(axis=2).T
