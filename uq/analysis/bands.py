"""What to expect of every watched quantity over time: quantiles, mean, deviation, and a band for whole courses."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Counts, Floats, Quantity
from uq.analysis.estimate import Estimate
from uq.analysis.few import Looked, told
from uq.analysis.finding import Finding, Variable
from uq.analysis.histograms import BinnedCourses, Histograms
from uq.analysis.kept import Courses, Kept
from uq.analysis.moments import Moments
from uq.analysis.policy import LARGEST_LOSS, TOO_MANY_LOST, WITHHELD, Counted, Named, stacked
from uq.analysis.quantiles import Levels, outermost
from uq.analysis.skewed import mean as mean_of
from uq.analysis.skewed import standard_deviation

# `map`, or something like it that uses several threads.
Apply = Callable[[Callable[[int], Counted], Iterable[int]], Iterable[Counted]]
# Runs of cells that may be worked on at once; each has memory for the values of one cell.
_RUNS = 16


@dataclass(frozen=True, eq=False)
class MeanAndDeviation:
    """Mean and standard deviation of every cell, nan where too many rows are lost; `lost`: where any row is lost."""

    mean: Estimate
    deviation: Estimate
    lost: NDArray[np.bool_]
    too_many: NDArray[np.bool_]


@dataclass(frozen=True)
class Moment:
    """Whose mean and deviation, along which dimensions."""

    quantity: Quantity
    dims: tuple[str, ...]


def mean_and_deviation(moments: Moments, centre: Floats, confidence: float) -> MeanAndDeviation:
    """From the sums of shifted values; intervals as in `uq.analysis.skewed`."""
    sums = moments.pieces.by_replicate()
    rows: Counts = moments.pieces.rows - sums["lost"]
    counted = 2 * rows
    mean = mean_of(sums["first"], counted, confidence).times(moments.unit)
    deviation = standard_deviation(sums["first"], sums["second"], counted, confidence).times(moments.unit)
    lost = sums["lost"].sum(axis=0)
    too_many = lost > LARGEST_LOSS * moments.pieces.rows * len(rows)
    shifted = Estimate(*(end + centre for end in (mean.value, mean.low, mean.high)))
    return MeanAndDeviation(shifted.where(~too_many), deviation.where(~too_many), lost > 0, too_many)


def all_quantiles(kept: Kept | Histograms, cells: int, levels: Levels, apply: Apply) -> Counted:
    """Quantiles of the first `cells` cells of kept values [cell, level]; `apply` gets some runs of cells."""
    run = -(-cells // _RUNS)
    return stacked(list(apply(lambda first: kept.quantiles(first, min(first + run, cells), levels), range(0, cells, run))))


@dataclass(frozen=True, eq=False)
class Watched:
    """The tallies that bands are made of."""

    courses: Courses | BinnedCourses
    moments: Moments


def findings(ask: Ask, tallies: Watched, nominal: Floats | None, apply: Apply) -> tuple[Finding, ...]:
    """One group bands/W for every watched quantity. nominal [watched, solved]: the run with all inputs at their median."""
    many, times = len(ask.watched), len(ask.grid)
    levels = Levels(ask.quantiles, ask.confidence)
    found = all_quantiles(tallies.courses.values, many * times, levels, apply)
    moment = mean_and_deviation(tallies.moments, ask.centre.reshape(-1), ask.confidence)
    shares = Looked(tallies.courses.values, tallies.moments, ask.centre.reshape(-1)).largest_shares(moment.deviation)
    size = simultaneous_size(ask, tallies.courses.deviations)
    groups = []
    for place, quantity in enumerate(ask.watched):
        here = slice(place * times, (place + 1) * times)
        variables = _quantiles(quantity, ask, found.map(lambda array, here=here: array[here].T))  # type: ignore[misc]
        withheld = np.asarray(found.lost[here].any(axis=1) & (ask.failures == "refuse"))
        variables |= told(moment_variables(Moment(quantity, ("time",)), moment, here, withheld), shares[here])
        if nominal is not None:
            course = np.asarray(nominal[place], dtype=np.float64)[ask.grid]
            variables["nominal"] = Variable(("time",), course, "the run with all inputs at their median", quantity.unit)
        variables |= _simultaneous(quantity, ask, place, size)
        groups.append(Finding(f"bands/{quantity.name}", variables))
    return tuple(groups)


def _quantiles(quantity: Quantity, ask: Ask, found: Counted) -> dict[str, Variable]:
    named = Named("quantiles", ("quantile", "time"), f"quantiles of {quantity.label or quantity.name}", quantity.unit)
    return named.counted(found, ask.failures)


def moment_variables(named: Moment, found: MeanAndDeviation, here: slice | int, withheld: NDArray[np.bool_]) -> dict[str, Variable]:
    """The variables mean and sd of one quantity, from its cells `here`; nan where `withheld`."""
    too_many, lost = np.asarray(found.too_many[here]), np.asarray(found.lost[here])
    reason = WITHHELD if withheld.any() else TOO_MANY_LOST if too_many.any() else ""
    given = {"given": "success"} if lost.any() and not withheld.any() else {}

    def part(estimate: Estimate) -> Estimate:
        return Estimate(estimate.value[here], estimate.low[here], estimate.high[here]).where(~withheld)

    label, unit = named.quantity.label or named.quantity.name, named.quantity.unit
    mean = Named("mean", named.dims, f"mean of {label}", unit, given)
    deviation = Named("sd", named.dims, f"standard deviation of {label}", named.quantity.difference_unit or unit, given)
    return mean.variables(part(found.mean), reason) | deviation.variables(part(found.deviation), reason)


def simultaneous_size(ask: Ask, deviations: Kept | Histograms) -> Counted:
    """The quantile over members, at the share between the outermost quantiles, of the largest deviation in half-widths: [watched, 1]."""
    return deviations.quantiles(0, len(ask.watched), Levels((outermost(ask.quantiles),), ask.confidence))


def _simultaneous(quantity: Quantity, ask: Ask, place: int, size: Counted) -> dict[str, Variable]:
    """Centre plus and minus the size times the half-widths; low and high ends of each edge by those of the size."""
    share = outermost(ask.quantiles)
    centre, half_width = ask.centre[place], ask.half_width[place]

    def edges(estimate: Estimate) -> Estimate:
        widths = half_width if share > 0 else np.full_like(half_width, np.nan)
        value, low, high = (end[place, 0] * widths for end in (estimate.value, estimate.low, estimate.high))
        upper = Estimate(centre + value, centre + low, centre + high)
        lower = Estimate(centre - value, centre - high, centre - low)
        return Estimate(*(np.stack([getattr(edge, name) for edge in (lower, upper)]) for name in ("value", "low", "high")))

    outward, inward = edges(size.if_high), edges(size.if_low)
    if_low = _sides(outward, inward)
    if_high = _sides(inward, outward)
    lost = np.full((2, len(ask.grid)), bool(size.lost[place, 0]))
    # In half-widths of the pilot.
    error = None if size.error is None else np.broadcast_to(size.error[place, 0] * half_width, lost.shape)
    part = None if size.error is None else np.broadcast_to(size.error[place, 0] / 2, lost.shape)
    words = f"range that whole courses of {quantity.label or quantity.name} keep to with probability {share:g}"
    named = Named("simultaneous", ("side", "time"), words, quantity.unit, {"share": float(f"{share:.9g}")})
    reason = "" if share > 0 else "needs two quantile levels"
    return named.counted(Counted(edges(size.success), if_low, if_high, lost, error, part), ask.failures, reason)


def _sides(lower: Estimate, upper: Estimate) -> Estimate:
    """The lower edge of one and the upper edge of the other."""
    ends = ((getattr(lower, name)[0], getattr(upper, name)[1]) for name in ("value", "low", "high"))
    return Estimate(*(np.stack(end) for end in ends))
