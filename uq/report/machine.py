"""The machine form of a result: the headline numbers as plain values for JSON."""

from __future__ import annotations

import math
from collections.abc import Iterable
from typing import Any

from uq.report.answers import (
    Answers,
    Estimate,
    Headline,
    InputRow,
    LimitAnswer,
    MeasuredAnswer,
    QuantityAnswer,
    RankingAnswer,
    ScenarioAnswer,
    Shares,
)
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
    cautions: what is said of a mean or a deviation that rests on few members; left out where nothing is.
    inputs: what the study says of each. failures: solves by status. warnings: of the study. scales_fell_back: states without a scale
    from the pilot.
    dependence: pairs of inputs that go together, rank correlation `asked` and `achieved`. measured: by quantity `share_inside`, the share
    of the observations between the outermost quantiles. scenarios: by name what each changes, its own answers, and `differences` from
    the study. precision: null where none was asked, else what was wanted and reached by kind, and what it would take. settled: in how
    many of the rankings the first place and the whole order are, and which inputs may be dropped; null where nothing is ranked.
    """
    head = headline(result)
    return {
        "schema": SCHEMA,
        "path": str(result.path),
        "attributes": {name: _number(value) if isinstance(value, float) else value for name, value in head.facts.items()},
        "time_unit": head.clock.unit,
        "limits": {answer.name: _limit(answer) for answer in head.limits},
        "bands": {answer.name: _quantity(answer) for answer in head.watched},
        "outcomes": {answer.name: _quantity(answer) for answer in head.outcomes},
        "ranking": {answer.name: _ranking(answer) for answer in head.rankings},
        "inputs": {row.name: _input(row) for row in head.inputs},
        "failures": _failures(head),
        "warnings": list(head.warnings),
        "scales_fell_back": list(head.fell_back),
        "dependence": [
            {"input": pair.one.name, "input_other": pair.other.name, "asked": pair.asked, "achieved": _number(pair.achieved)}
            for pair in head.pairs
        ],
        "measured": {answer.name: _measured(answer) for answer in head.measured},
        "scenarios": {answer.name: _scenario(answer) for answer in head.scenarios},
        "precision": _precision(head),
        "settled": _settled(head),
    }


def answers_json(answers: Answers) -> dict[str, Any]:
    """Limits, bands and outcomes by name, as in `result_json`."""
    return {
        "limits": {answer.name: _limit(answer) for answer in answers.limits},
        "bands": {answer.name: _quantity(answer) for answer in answers.watched},
        "outcomes": {answer.name: _quantity(answer) for answer in answers.outcomes},
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
    return {**told, "reason": answer.reason, **({"cautions": list(answer.cautions)} if answer.cautions else {})}


def _levels(pairs: tuple[tuple[float, Estimate], ...]) -> list[dict[str, float | None]]:
    return [{"quantile": level, **_estimate(estimate)} for level, estimate in pairs]


def _ranking(answer: RankingAnswer) -> dict[str, Any]:
    """Shares of variance: overall for a watched quantity, by the last `by` (`time`) for a limit; of groups where there are any."""
    told: dict[str, Any] = {"label": answer.label, "of": answer.of, "time": _number(answer.time)}
    inputs = [(driver.input.name, driver.shares) for driver in answer.drivers]
    for kind in ("first", "total", *(("shapley",) if answer.shapley else ())):
        told[kind] = _shares("input", inputs, kind)
    if answer.groups:
        for kind in ("shapley",) if answer.shapley else ("first", "total"):
            told[f"{kind}_group"] = _shares("group", answer.groups, kind)
    return {**told, "reason": answer.reason, **({"no_total": answer.no_total} if answer.no_total else {})}


def _shares(of: str, shares: Iterable[tuple[str, Shares]], kind: str) -> list[dict[str, Any]]:
    return [{of: name, **_estimate(getattr(each, kind))} for name, each in shares]


def _measured(answer: MeasuredAnswer) -> dict[str, Any]:
    told = {"label": answer.label, "unit": answer.unit, "observations": answer.observations}
    return {**told, "share_inside": _estimate(answer.share_inside), "expected": _number(answer.expected), "reason": answer.reason}


def _scenario(answer: ScenarioAnswer) -> dict[str, Any]:
    counts = {name: answer.facts.get(name) for name in ("members", "members_failed")}
    told = {"label": answer.label, "change": list(answer.change), **counts, **answers_json(answer.answers)}
    return {**told, "differences": answers_json(answer.differences), "intervals": answer.intervals}


def _precision(head: Headline) -> dict[str, Any] | None:
    answer = head.precision
    if answer is None:
        return None
    kinds = {
        kind.kind: {
            "wanted": kind.wanted,
            "widest": _number(kind.widest),
            "numbers": kind.numbers,
            "precise": kind.precise,
            "undefined": kind.undefined,
        }
        for kind in answer.kinds
    }
    told = {"reached": answer.reached, "stopped": answer.stopped, "solves_needed": _number(answer.solves_needed)}
    return {**told, "rounds": answer.rounds, "kinds": kinds}


def _settled(head: Headline) -> dict[str, Any] | None:
    answer = head.settled
    if answer is None:
        return None
    every = {"may_be_dropped": answer.may, "open": answer.open}
    names = {key: [row.name for driver in drivers for row in driver.rows] for key, drivers in every.items()}
    return {"rankings": answer.rankings, "first": answer.first, "whole": answer.whole, **names}


def _input(row: InputRow) -> dict[str, Any]:
    return {
        "label": row.label,
        "unit": row.unit,
        "distribution": row.distribution,
        "source": row.source,
        "kind": row.kind,
        "evidence": row.evidence,
        "group": row.group,
    }


def _failures(head: Headline) -> dict[str, int]:
    return dict(head.failed)
