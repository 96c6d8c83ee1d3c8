"""Check cases with published or exact answers, and the rules by which an answer is judged."""

from __future__ import annotations

import tomllib
from dataclasses import dataclass
from pathlib import Path
from typing import Any

import numpy as np
from scipy import stats

HERE = Path(__file__).parent
Z = 4.417173413469025
"""Two-sided false-alarm rate of 1e-5 per value under the normal law."""


@dataclass(frozen=True)
class Case:
    """One problem: its source, the study that poses it, and what must come out."""

    name: str
    source: str
    provenance: str
    study: str
    expect: tuple[dict[str, Any], ...]


def load(file: str) -> list[Case]:
    """Every case of one file of this folder."""
    with (HERE / file).open("rb") as handle:
        cases = tomllib.load(handle)["case"]
    return [Case(c["name"], c["source"], c["provenance"], c["study"].lstrip(), tuple(c["expect"])) for c in cases]


def found(result: Any, expected: dict[str, Any]) -> float:
    """The number in `result` that answers `expected`."""
    return READERS[expected["what"]](result, expected)


def at(course: Any, expected: dict[str, Any], **labels: Any) -> float:
    """The value of a course at the expected time."""
    course = course.sel(**labels) if labels else course
    return float(course.sel(time=expected["at"], method="nearest"))


def failed_share(result: Any, expected: dict[str, Any]) -> float:
    """The share of members without a value at the expected time."""
    times = np.asarray(result.failures.failure_time)
    return float(np.mean(times <= expected["at"])) * result.attributes["members_failed"] / result.attributes["members"]


def half_width(result: Any, expected: dict[str, Any]) -> float:
    """Half the width of the band that holds whole curves, at the expected time."""
    low, high = (at(result.bands[expected["of"]].simultaneous.isel(side=side), expected) for side in (0, 1))
    return (high - low) / 2


READERS = {
    "mean": lambda r, e: at(r.bands[e["of"]]["mean"], e),
    "sd": lambda r, e: at(r.bands[e["of"]].sd, e),
    "var": lambda r, e: at(r.bands[e["of"]].sd, e) ** 2,
    "nominal": lambda r, e: at(r.bands[e["of"]].nominal, e),
    "quantile": lambda r, e: at(r.bands[e["of"]].quantiles, e, quantile=e["p"]),
    "quantile_if_high": lambda r, e: at(r.bands[e["of"]].quantiles_if_high, e, quantile=e["p"]),
    "missing_mean": lambda r, e: 0.0 if np.isnan(at(r.bands[e["of"]]["mean"], e)) else 1.0,
    "failed_by": failed_share,
    "simultaneous": half_width,
    "now": lambda r, e: at(r.limits[e["of"]].now, e),
    "ever": lambda r, e: at(r.limits[e["of"]].ever, e),
    "never": lambda r, e: 1.0 - at(r.limits[e["of"]].ever, e),
    "first": lambda r, e: at(r.ranking[e["of"]].first, e, input=e["input"]),
    "total": lambda r, e: at(r.ranking[e["of"]].total, e, input=e["input"]),
    "missing_index": lambda r, e: 0.0 if np.isnan(at(r.ranking[e["of"]].first, e, input=e["input"])) else 1.0,
    "outcome_mean": lambda r, e: float(r.outcomes[e["of"]]["mean"]),
    "outcome_quantile": lambda r, e: float(r.outcomes[e["of"]].quantiles.sel(quantile=e["p"])),
}


def agrees(expected: dict[str, Any], value: float, members: int, accuracy: float) -> bool:
    """Whether `value` passes the rule of `expected`, for a run of `members` members (half as many rows)."""
    truth = expected["value"]
    if "factor" in expected:
        return abs(value - truth) <= expected["factor"] * accuracy * expected["scale"]
    if expected.get("binomial"):
        return bool(stats.binom.ppf(5e-6, members, truth) <= round(value * members) <= stats.binom.isf(5e-6, members, truth))
    index = expected["what"] in ("first", "total")
    if "se1" in expected:
        runs = members // 2 if index else members
        bound = Z * expected["se1"] / np.sqrt(runs) + (1e-3 if index else 0.0) + 1e-9 * max(1.0, abs(truth))
        return abs(value - truth) <= bound + expected.get("tolerance", 0.0) * ("tolerance" in expected)
    return abs(value - truth) <= expected.get("tolerance", 1e-12)
