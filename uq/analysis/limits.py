"""How likely a limit is passed, by when, and whether the accepted probability is kept."""

from __future__ import annotations

import numpy as np

from uq.analysis.ask import Ask, Counts, Floats, LimitAsked
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Finding, Variable
from uq.analysis.passings import Passings
from uq.analysis.pieces import Array
from uq.analysis.policy import WITHHELD, Counted, Named
from uq.analysis.probabilities import probability_both_ways
from uq.analysis.quantiles import Levels, weighted_quantiles

NEVER = "it came true for no member"


def findings(ask: Ask, passings: Passings) -> tuple[Finding, ...]:
    """One group limits/L for every limit."""
    counts = passings.pieces.by_replicate()
    members = 2 * passings.pieces.rows
    return tuple(_limit(ask, limit, _of_limit(counts, place), members) for place, limit in enumerate(ask.limits))


def _of_limit(counts: dict[str, Array], place: int) -> dict[str, Counts]:
    return {name: counts[name][:, place] for name in ("passed", "unknown", "now", "unsure")}


def _limit(ask: Ask, limit: LimitAsked, counts: dict[str, Counts], members: int) -> Finding:
    label = limit.label or limit.name
    places = np.searchsorted(ask.judged, ask.grid)
    by = np.searchsorted(ask.judged, [ask.place(time) for time in limit.by])
    passed, unknown = counts["passed"].cumsum(axis=1), counts["unknown"].cumsum(axis=1)
    ever = probability_both_ways(passed[:, places], unknown[:, places], members, ask.confidence)
    now = probability_both_ways(counts["now"][:, places], counts["unsure"][:, places], members, ask.confidence)
    ever_by = probability_both_ways(passed[:, by], unknown[:, by], members, ask.confidence)
    variables = Named("ever", ("time",), f"probability that it has been true by then: {label}").counted(ever, ask.failures)
    variables |= Named("now", ("time",), f"probability that it is true then: {label}").counted(now, ask.failures)
    variables |= _first_time(ask, limit, counts)
    variables["by"] = Variable(("by",), np.asarray(limit.by, dtype=np.float64), "time by which", ask.time_unit)
    variables |= Named("ever_by", ("by",), f"probability that it has been true by then: {label}").counted(ever_by, ask.failures)
    # Whoever failed had perhaps passed before; a study that refuses failed members has no verdict on a time at which there are any.
    failed = bool(counts["unsure"][:, : by[-1] + 1].any()) if len(by) else False
    return Finding(f"limits/{limit.name}", variables, {"when": limit.when, **_verdict(ask, limit, variables, failed)})


def _first_time(ask: Ask, limit: LimitAsked, counts: dict[str, Counts]) -> dict[str, Variable]:
    """Quantiles of the first time among the members where it comes true; members not known come in at once, or at the last time.

    A first time is the judged time at which it is seen to be true. It came true somewhere in the step that ends there, so that the lower
    ends reach down to the judged time before.
    """
    levels = Levels(ask.quantiles, ask.confidence)
    times = ask.solved_times[ask.judged]
    came, unknown = counts["passed"][:, :-1], counts["unknown"][:, :-1]
    found = Counted.complete(_one_step_down(weighted_quantiles(came, times, levels), times))
    if unknown.any():
        late = came.copy()
        late[:, -1] += unknown.sum(axis=1)
        early, last = (_one_step_down(weighted_quantiles(each, times, levels), times) for each in (came + unknown, late))
        lost = np.ones(len(levels.shares), dtype=np.bool_)
        if_low = Estimate(*(np.fmin(one, other) for one, other in zip(_ends(early), _ends(found.success), strict=True)))
        if_high = Estimate(*(np.fmax(one, other) for one, other in zip(_ends(last), _ends(found.success), strict=True)))
        found = Counted(found.success, if_low, if_high, lost)
    words = f"first time at which it is true, among members where it comes true: {limit.label or limit.name}"
    reason = NEVER if np.isnan(found.success.value).any() else ""
    return Named("first_time", ("quantile",), words, ask.time_unit).counted(found, ask.failures, reason)


def _one_step_down(estimate: Estimate, times: Floats) -> Estimate:
    """The same with each lower end at the judged time before it, where there is one; nan stays."""
    before = times[np.maximum(np.searchsorted(times, estimate.low) - 1, 0)]
    return Estimate(estimate.value, np.fmin(estimate.low, before) + 0 * estimate.low, estimate.high)


def _ends(estimate: Estimate) -> tuple[Array, Array, Array]:
    return estimate.value, estimate.low, estimate.high


def _verdict(ask: Ask, limit: LimitAsked, variables: dict[str, Variable], failed: bool) -> dict[str, object]:
    """Met where the upper end at the last `by` is at most the accepted probability, not met where the lower end is above it.

    failed: whether any member had failed by then, or was not known to have passed or not; then a policy of refusal gives none.
    """
    if limit.accept is None or not limit.by:
        return {}
    if ask.failures == "refuse" and failed:
        return {"accept": limit.accept, "reason": WITHHELD}
    low, high = (float(variables[name].data[-1]) for name in ("ever_by_low", "ever_by_high"))
    verdict = "met" if high <= limit.accept else "not met" if low > limit.accept else "not settled"
    return {"accept": limit.accept, "verdict": verdict}
