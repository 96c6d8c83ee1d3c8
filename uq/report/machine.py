"""The machine form of a result: the headline numbers as plain values for JSON."""

from __future__ import annotations

import math
from typing import Any

from uq.report.answers import Driver, Estimate, Headline, InputRow, LimitAnswer, QuantityAnswer, RankingAnswer
from uq.report.headline import headline
from uq.store.result import Result

# The number of this form; names are added under the same number, but never taken away or changed in meaning.
SCHEMA = 1


def result_json(result: Result) -> dict[str, Any]:
    """What `uq show --json` prints; strict JSON, in which a number that is missing, or an end that does not exist, is null.

    schema: number of this form. path: the file. attributes: those of the root of result.nc (title, caution, seed, counts, fingerprints,
    versions, ...). time_unit. limits, bands, outcomes, ranking: by name, as the groups of result.nc, each with the headline numbers of
    results-format: `ever_by` (one entry per `by`), `quantiles` (one entry per level), `first` and `total` (one entry per input). Every
    estimate is {"value", "low", "high"}, with "if_low", "if_high" where members failed. reason: why numbers are missing, else empty.
    inputs: what the study says of each. failures: solves by status. warnings: of the study. scales_fell_back: states without a scale
    from the pilot.
    """
    head = headline(result)
    return {
        "schema": SCHEMA,
        "path": str(result.path),
        "attributes": {name: _number(value) if isinstance(value, float) else value for name, value in head.facts.items()},
        "time_unit": head.time_unit,
        "limits": {answer.name: _limit(answer) for answer in head.limits},
        "bands": {answer.name: _quantity(answer) for answer in head.watched},
        "outcomes": {answer.name: _quantity(answer) for answer in head.outcomes},
        "ranking": {answer.name: _ranking(answer) for answer in head.rankings},
        "inputs": {row.name: _input(row) for row in head.inputs},
        "failures": _failures(head),
        "warnings": list(head.warnings),
        "scales_fell_back": list(head.fell_back),
    }


def _number(value: float) -> float | None:
    return value if math.isfinite(value) else None


def _estimate(estimate: Estimate) -> dict[str, float | None]:
    told = {"value": estimate.value, "low": estimate.low, "high": estimate.high}
    if not math.isnan(estimate.if_low):
        told |= {"if_low": estimate.if_low, "if_high": estimate.if_high}
    return {name: _number(value) for name, value in told.items()}


def _limit(answer: LimitAnswer) -> dict[str, Any]:
    return {
        "label": answer.label,
        "when": answer.when,
        "accept": answer.accept,
        "verdict": answer.verdict or None,
        "ever_by": [{"by": time, **_estimate(estimate)} for time, estimate in answer.by],
        "first_time": _levels(answer.first_time),
        "reason": answer.reason,
    }


def _quantity(answer: QuantityAnswer) -> dict[str, Any]:
    """A watched quantity at its last time, or an outcome."""
    told: dict[str, Any] = {"label": answer.label, "unit": answer.unit}
    if not math.isnan(answer.time):
        told |= {"time": answer.time, "nominal": _number(answer.nominal)}
    else:
        told |= {"missing": _estimate(answer.missing)}
    told |= {"quantiles": _levels(answer.quantiles), "mean": _estimate(answer.mean), "sd": _estimate(answer.sd)}
    return {**told, "reason": answer.reason}


def _levels(pairs: tuple[tuple[float, Estimate], ...]) -> list[dict[str, float | None]]:
    return [{"quantile": level, **_estimate(estimate)} for level, estimate in pairs]


def _ranking(answer: RankingAnswer) -> dict[str, Any]:
    """Shares of variance: overall for a watched quantity, by the last `by` for a limit (then with `time`)."""
    return {
        "label": answer.label,
        "of": answer.of,
        "time": _number(answer.time),
        "first": _shares(answer.drivers, "first"),
        "total": _shares(answer.drivers, "total"),
        "reason": answer.reason,
    }


def _shares(drivers: tuple[Driver, ...], kind: str) -> list[dict[str, Any]]:
    return [{"input": driver.input.name, **_estimate(getattr(driver, kind))} for driver in drivers]


def _input(row: InputRow) -> dict[str, Any]:
    return {
        "label": row.label,
        "unit": row.unit,
        "distribution": row.distribution,
        "source": row.source,
        "kind": row.kind,
        "evidence": row.evidence,
    }


def _failures(head: Headline) -> dict[str, int]:
    return dict(head.failed)
