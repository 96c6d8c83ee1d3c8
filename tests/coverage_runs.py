"""How often intervals hold the truth, over many seeds: used by the short test and by the long one.

The model has closed forms: T(t) = t exp(a z0 + b z1) (with z standard normal), judged at times t; x is half nothing, half continuous.
"""

from __future__ import annotations

from collections.abc import Iterable

import numpy as np
from scipy.special import ndtr, ndtri
from scipy.stats import multivariate_normal

from tests.analysis_models import Model, complete, folded, number, tallied
from uq.analysis.finding import Finding
from uq.design.design import Design

A, B = 0.5, 0.3
S2 = A**2 + B**2
TIMES = (1.0, 2.0)
LEVELS = np.array([0.01, 0.05, 0.5, 0.95, 0.99])
RARE = 1e-3


def values(u: np.ndarray, times: np.ndarray) -> np.ndarray:
    z = ndtri(u)
    course = np.exp(A * z[:, :1] + B * z[:, 1:2]) * times
    return np.stack([course, np.maximum(ndtr(np.log(course / times) / np.sqrt(S2)) - 0.5, 0.0)], axis=1)


def threshold(probability: float) -> float:
    """T(1) is above this with that probability."""
    return float(np.exp(-np.sqrt(S2) * ndtri(probability)))


def model(probability: float) -> Model:
    return Model(("p", "q"), TIMES, values, watched=("T", "x"), threshold=threshold(probability), by=(1.0,))


def truths(probability: float) -> dict[tuple[str, str], np.ndarray]:
    """By group and name; lognormal products: variance exp(s2)(exp(s2) - 1), main effect of z0 (exp(a2) - 1)/(exp(s2) - 1)."""
    times = np.array(TIMES)
    quantiles = np.exp(np.sqrt(S2) * ndtri(LEVELS))[:, None] * times
    spread = np.exp(S2) - 1
    first = np.array([np.expm1(A**2), np.expm1(B**2)]) / spread
    total = np.array([np.expm1(A**2) * np.exp(B**2), np.expm1(B**2) * np.exp(A**2)]) / spread
    share = np.array([A**2, B**2]) / S2
    q = ndtri(probability)
    # multivariate_normal is good to 1e-5 here, the intervals are some 1e-2 wide.
    both = np.array([multivariate_normal([0, 0], [[1, each], [each, 1]]).cdf([q, q]) for each in share])
    limit_first = (both - probability**2) / (probability * (1 - probability))
    return {
        ("bands/T", "quantiles"): quantiles,
        ("bands/T", "mean"): np.exp(S2 / 2) * times,
        ("bands/T", "sd"): np.sqrt(np.exp(S2) * spread) * times,
        ("bands/x", "quantiles"): np.maximum(LEVELS - 0.5, 0.0)[:, None].repeat(2, axis=1),
        ("limits/hot", "ever_by"): np.array([probability]),
        ("ranking/T", "first"): first[:, None].repeat(2, axis=1),
        ("ranking/T", "total"): total[:, None].repeat(2, axis=1),
        ("ranking/T", "total_overall"): total,
        ("ranking/hot", "first_by"): limit_first[:, None],
        ("ranking/hot", "total_by"): (1 - limit_first[::-1])[:, None],
    }


def share_in_band(finding: Finding) -> tuple[float, float]:
    """Probability that a whole course keeps to the inner, and to the outer simultaneous band."""
    low, high = (number(finding, f"simultaneous_{end}") for end in ("low", "high"))

    def share(lower: np.ndarray, upper: np.ndarray) -> float:
        # Courses are proportional to time, so the narrowest place decides.
        inner_low, inner_high = (lower / np.array(TIMES)).max(), (upper / np.array(TIMES)).min()
        below = ndtr(np.log(inner_low) / np.sqrt(S2)) if inner_low > 0 else 0.0
        return float(ndtr(np.log(inner_high) / np.sqrt(S2)) - below)

    return share(high[0], low[1]), share(low[0], high[1])


def covered(seeds: Iterable[int], rows: int, probability: float, questions: tuple[str, ...]) -> dict[tuple[str, str], np.ndarray]:
    """Share of seeds whose interval holds the truth, by group and name; nan intervals hold nothing."""
    made, truth = model(probability), truths(probability)
    hits: dict[tuple[str, str], list[np.ndarray]] = {}
    for seed in seeds:
        design = Design(made.inputs, seed, rows, ranked="ranking" in questions)
        ask = complete(made, design, questions=questions, quantiles=tuple(LEVELS))
        found = {finding.group: finding for finding in folded(tallied(made, design, ask, design.blocks(0, rows, rows))).findings(ask)}
        for (group, name), value in truth.items():
            if group in found:
                inside = (number(found[group], f"{name}_low") <= value) & (value <= number(found[group], f"{name}_high"))
                hits.setdefault((group, name), []).append(inside)
        if "bands/T" in found:
            inner, outer = share_in_band(found["bands/T"])
            hits.setdefault(("bands/T", "simultaneous"), []).append(np.array(inner <= 0.98 <= outer))
    return {key: np.mean(each, axis=0) for key, each in hits.items()}
