"""What a study that refuses failed members keeps back: everything that covers a time at which members had failed."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import replace
from typing import Any

import numpy as np

from uq.analysis.policy import WITHHELD
from uq.report.answers import Answers, Estimate, Headline, LimitAnswer, RankingAnswer
from uq.report.drawn import Findings, data, room
from uq.store.result import Result


def withheld(result: Result, head: Headline) -> bool:
    """Whether any statement of a result or of its scenarios is kept back: members failed under the policy `refuse`.

    Solves that failed for the ranking alone, or members of which nothing was asked after they failed, withhold nothing.
    """
    if result.attributes["failures"] != "refuse":
        return False
    told = [*(each.reason for each in head.limits), *(each.reason for each in head.rankings)]
    for finding in result.findings.values():
        said = [finding.attributes, *(each.attributes for each in finding.variables.values())]
        told += [str(each.get("reason", "")) for each in said]
    return any(WITHHELD in reason for reason in told)


def refused_from(found: Findings, times: tuple[float, ...], facts: Mapping[str, Any]) -> float:
    """From which time on nothing is said: the first output time at which a member had failed; infinite where all may be said.

    Told by the bands, which have no numbers from then on; where there are none, by the failed members that the file keeps.
    """
    if facts["failures"] != "refuse" or not facts["members_failed"]:
        return math.inf
    failed = data(found.get("failures"), "failure_time")
    first = [float(np.min(failed))] if failed.size else []
    for _, finding in room(found, "bands"):
        quantiles = data(finding, "quantiles")
        if quantiles.ndim == 2 and quantiles.shape[1] == len(times):
            first += [time for time, gone in zip(times, np.isnan(quantiles).any(axis=0), strict=True) if gone][:1]
    return min(first, default=-math.inf)


def kept_back(answers: Answers, since: float) -> Answers:
    """The answers without the probabilities from that time on. Bands and outcomes have none where members failed."""
    return replace(answers, limits=tuple(_limit(each, since) for each in answers.limits)) if since < math.inf else answers


def _limit(answer: LimitAnswer, since: float) -> LimitAnswer:
    if not any(time >= since for time, _ in answer.by):
        return answer
    by = tuple((time, estimate if time < since else Estimate()) for time, estimate in answer.by)
    ever = tuple((time, high if time < since else math.nan) for time, high in answer.ever)
    return replace(answer, by=by, ever=ever, first_time=(), verdict="", reason=WITHHELD)


def ranking_kept_back(answer: RankingAnswer, since: float) -> RankingAnswer:
    """A ranking without its shares where it covers that time; those of outcomes and of whole courses always do."""
    if since == math.inf or answer.time < since:
        return answer
    return replace(answer, drivers=(), groups=(), places=(), reason=WITHHELD)
