"""How the answers of one run differ from those of another: bands, limits and outcomes, each difference with an interval of its own.

Two runs that share draws are compared replicate by replicate, so that the error which both have alike cancels; see `uq.analysis.jackknife`.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Mapping
from dataclasses import dataclass
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.analysis import jackknife
from uq.analysis.ask import Ask, Counts, Floats, LimitAsked, Quantity
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Finding, Variable
from uq.analysis.histograms import Histograms
from uq.analysis.jackknife import Jackknifed, Passed, Way, deviation_of, ratio_of
from uq.analysis.kept import Kept
from uq.analysis.moments import Moments
from uq.analysis.pieces import Array
from uq.analysis.policy import LARGEST_LOSS, TOO_MANY_LOST, WITHHELD, Counted, Named, stacked
from uq.analysis.quantiles import Levels
from uq.analysis.tallies import Tallies
from uq.analysis.without import Cell, Members, binned_cell, kept_cell, same_values
from uq.design.design import Design

Places = NDArray[np.intp]
Apply = Callable[..., Iterable[Any]]


@dataclass(frozen=True, eq=False)
class Run:
    """One of the two: what was asked, and its tallies at the end of a round."""

    ask: Ask
    tallies: Tallies


@dataclass(frozen=True)
class Draws:
    """Whether two runs share draws, said in words; how quantiles, how means and deviations, and how shares are subtracted then."""

    name: str
    words: str
    way: Way
    moments: Way
    shares: Callable[[Passed, Passed, float], Estimate]


SHARED = Draws(
    "paired",
    "intervals from paired replicates: both use the same draws of the inputs they share",
    *(jackknife.paired, jackknife.paired_moments, jackknife.paired_shares),
)
OWN = Draws(
    "unpaired",
    "intervals from unpaired replicates, wider than with the same draws: the inputs do not share draws",
    *(jackknife.unpaired, jackknife.unpaired_moments, jackknife.unpaired_shares),
)


def draws_of(one: Design, other: Design) -> Draws:
    """Shared draws where seed and replicates are equal and every input that both have stands at the same place, and there is one."""
    places = [(one.names.index(name), other.names.index(name)) for name in one.names if name in other.names]
    same = one.seed == other.seed and one.replicates == other.replicates
    return SHARED if same and places and all(here == there for here, there in places) else OWN


def differences(one: Run, other: Run, draws: Draws, apply: Apply = map) -> tuple[Finding, ...]:
    """`other` less `one`: groups bands/W, limits/L and outcomes/O of what both have under one name, with one unit, and asked.

    Bands and limits are at the output times that both have (variable `time`). apply: `map`, or the `map` of a thread pool.
    """
    pair = _Pair(one, other, draws, apply)
    return (*_limits(pair), *_bands(pair), *_outcomes(pair))


@dataclass(frozen=True, eq=False)
class _Pair:
    one: Run
    other: Run
    draws: Draws
    apply: Apply

    @property
    def ask(self) -> Ask:
        return self.one.ask

    def has(self, *names: str) -> bool:
        """Whether both have these tallies."""
        return all(name in run.tallies.held for run in (self.one, self.other) for name in names)

    def held(self, name: str) -> tuple[Any, Any]:
        return self.one.tallies.held[name], self.other.tallies.held[name]

    def times(self) -> tuple[Floats, Places, Places]:
        """The output times that both have, and their places in each."""
        times, here, there = np.intersect1d(self.one.ask.times, self.other.ask.times, assume_unique=True, return_indices=True)
        return times, here, there

    def finding(self, group: str, variables: dict[str, Variable], times: Floats | None = None) -> Finding:
        if times is not None and not np.array_equal(times, self.ask.times):
            variables["time"] = Variable(("time",), times, "time", self.ask.time_unit)
        return Finding(group, variables, {"draws": self.draws.name, "intervals": self.draws.words})

    def difference(self, one: Jackknifed, other: Jackknifed) -> Estimate:
        return self.draws.way(one, other, self.ask.confidence)


def _both(ones: Iterable[Quantity], others: Iterable[Quantity]) -> list[tuple[int, int, Quantity]]:
    """Quantities of one name and unit with their places in both."""
    there = {(each.name, each.unit): at for at, each in enumerate(others)}
    return [(at, there[each.name, each.unit], each) for at, each in enumerate(ones) if (each.name, each.unit) in there]


def _bands(pair: _Pair) -> Iterable[Finding]:
    if not pair.has("courses", "watched"):
        return
    times, *at = pair.times()
    moments = [
        _Moments.of(held, run.ask.centre.reshape(-1)) for held, run in zip(pair.held("watched"), (pair.one, pair.other), strict=True)
    ]
    for here, there, quantity in _both(pair.one.ask.watched, pair.other.ask.watched):
        runs = zip((here, there), at, (pair.one, pair.other), strict=True)
        cells = [place * len(run.ask.grid) + each for place, each, run in runs]
        kept = [_Cells(held.values, chosen) for held, chosen in zip(pair.held("courses"), cells, strict=True)]
        found = _quantiles(pair, kept[0], kept[1])
        words = f"difference of quantiles of {quantity.label or quantity.name}"
        unit = quantity.difference_unit or quantity.unit
        variables = Named("quantiles", ("quantile", "time"), words, unit).counted(found.map(np.transpose), pair.ask.failures)
        variables |= _mean_and_sd(pair, moments, cells, quantity, ("time",))
        yield pair.finding(f"bands/{quantity.name}", variables, times)


def _outcomes(pair: _Pair) -> Iterable[Finding]:
    if not pair.has("values", "outcomes", "absent"):
        return
    moments = [_Moments.of(held, run.ask.outcome_centre) for held, run in zip(pair.held("outcomes"), (pair.one, pair.other), strict=True)]
    absent = [held.pieces.by_replicate()["without"].T for held in pair.held("absent")]
    for here, there, quantity in _both(pair.one.ask.outcomes, pair.other.ask.outcomes):
        cells = [np.array([here], dtype=np.intp), np.array([there], dtype=np.intp)]
        kept = [_Cells(*each) for each in zip(pair.held("values"), cells, absent, strict=True)]
        found = _quantiles(pair, kept[0], kept[1]).at(0)
        words = f"difference of quantiles of {quantity.label or quantity.name}"
        variables = Named("quantiles", ("quantile",), words, quantity.difference_unit or quantity.unit).counted(found, pair.ask.failures)
        variables |= _mean_and_sd(pair, moments, cells, quantity, ())
        yield pair.finding(f"outcomes/{quantity.name}", variables)


@dataclass(frozen=True, eq=False)
class _Moments:
    """Means and deviations of all cells, where any row is lost, and where too many are."""

    mean: Jackknifed
    deviation: Jackknifed
    lost: NDArray[np.bool_]
    too_many: NDArray[np.bool_]

    @classmethod
    def of(cls, moments: Moments, centre: Floats) -> _Moments:
        sums = moments.pieces.by_replicate()
        rows: Counts = moments.pieces.rows - sums["lost"]
        lost = sums["lost"].sum(axis=0)
        mean = ratio_of(sums["first"], 2 * rows).times(moments.unit).plus(centre)
        too_many = np.asarray(lost > LARGEST_LOSS * moments.pieces.rows * len(rows))
        deviation = deviation_of(sums["first"], sums["second"], 2 * rows).times(moments.unit)
        return cls(mean, deviation, np.asarray(lost > 0), too_many)


def _mean_and_sd(pair: _Pair, moments: list[_Moments], cells: list[Places], named: Quantity, dims: tuple[str, ...]) -> dict[str, Variable]:
    """The variables mean and sd: differences of means and of standard deviations."""

    def cut(found: Jackknifed, at: Places) -> Jackknifed:
        return Jackknifed(found.value[at], found.without[:, at])

    both = list(zip(moments, cells, strict=True))
    too_many = np.any([each.too_many[at] for each, at in both], axis=0)
    withheld = np.any([each.lost[at] for each, at in both], axis=0) & (pair.ask.failures == "refuse")
    reason = WITHHELD if withheld.any() else TOO_MANY_LOST if too_many.any() else ""
    label, unit = named.label or named.name, named.difference_unit or named.unit
    means, deviations = [cut(each.mean, at) for each, at in both], [cut(each.deviation, at) for each, at in both]
    variables: dict[str, Variable] = {}
    for name, words, each in (("mean", "means", means), ("sd", "standard deviations", deviations)):
        found = pair.draws.moments(each[0], each[1], pair.ask.confidence).where(~too_many & ~withheld)
        if not dims:
            found = Estimate(found.value[0], found.low[0], found.high[0])
        variables |= Named(name, dims, f"difference of {words} of {label}", unit).variables(found, reason)
    return variables


@dataclass(frozen=True, eq=False)
class _Cells:
    """Some cells of kept or counted values; of the missing ones `absent` [cell, replicate] are of members that did not fail."""

    values: Kept | Histograms
    cells: Places
    absent: Counts | None = None

    def read(self, place: int) -> tuple[Cell, Counts]:
        """One of the cells, and its absent members [replicate]."""
        cell = int(self.cells[place])
        found = kept_cell(self.values, cell) if isinstance(self.values, Kept) else binned_cell(self.values, cell)
        return found, np.zeros_like(found.missing) if self.absent is None else self.absent[cell]


def _quantiles(pair: _Pair, one: _Cells, other: _Cells) -> Counted:
    """Differences of quantiles [cell, level]."""

    def difference(place: int) -> Counted:
        if same_values((one.values, one.cells[place]), (other.values, other.cells[place])):
            return Counted.complete(Estimate(*(np.zeros((1, len(pair.ask.quantiles))) for _ in range(3))))
        return _quantile_difference(pair, one.read(place), other.read(place))

    return stacked(list(pair.apply(difference, range(len(one.cells)))))


def _quantile_difference(pair: _Pair, *parts: tuple[Cell, Counts]) -> Counted:
    """Among members that did not fail; and with the failed of one counted high, of the other low, and the other way round: [1, level]."""
    levels = Levels(pair.ask.quantiles, pair.ask.confidence)
    cells, absent = [cell for cell, _ in parts], [each for _, each in parts]
    failed = [cell.missing - each for cell, each in parts]
    none = np.zeros_like(failed[0]), np.zeros_like(failed[1])
    success = [cell.quantiles(levels, Members(cell.size - cell.missing, below)) for cell, below in zip(cells, none, strict=True)]
    errors = [
        np.zeros(len(levels.shares)) if cell.error is None else cell.error(each.value) for cell, each in zip(cells, success, strict=True)
    ]
    binned = [cell.error is not None for cell in cells]
    lost = np.full((1, len(levels.shares)), bool(failed[0].any() or failed[1].any()))
    ways = [pair.difference(*success)] * 3
    if lost.any():
        low = [cell.quantiles(levels, Members(cell.size - gone, below)) for cell, gone, below in zip(cells, absent, failed, strict=True)]
        high = [cell.quantiles(levels, Members(cell.size - gone, below)) for cell, gone, below in zip(cells, absent, none, strict=True)]
        ways[1:] = pair.difference(high[0], low[1]), pair.difference(low[0], high[1])
    found = [Estimate(way.value[None], way.low[None], way.high[None]) for way in ways]
    if not any(binned):
        return Counted(found[0], found[1], found[2], lost)
    error, width = errors[0] + errors[1], max(float(each.value.max() - each.value.min()) for each in success)
    share = np.where(error > 0, error / width if width > 0 else np.inf, 0.0)
    return Counted(found[0], found[1], found[2], lost, error[None], share[None])


def _limits(pair: _Pair) -> Iterable[Finding]:
    if not (pair.has("passings") and all(run.ask.asks("limits") for run in (pair.one, pair.other))):
        return
    times, here, there = pair.times()
    names = {limit.name: at for at, limit in enumerate(pair.other.ask.limits)}
    counts = [held.pieces.by_replicate() for held in pair.held("passings")]
    members = [2 * held.pieces.rows for held in pair.held("passings")]
    for place, limit in enumerate(pair.one.ask.limits):
        if limit.name not in names:
            continue
        at = (place, names[limit.name])
        twin = pair.other.ask.limits[at[1]]
        by = [time for time in limit.by if time in twin.by]
        runs = (pair.one.ask, pair.other.ask)
        grids = [np.searchsorted(ask.judged, ask.grid[chosen]) for ask, chosen in zip(runs, (here, there), strict=True)]
        bys = [np.searchsorted(ask.judged, np.array([ask.place(time) for time in by], dtype=np.intp)) for ask in runs]
        said = (
            ("ever", "passed", "unknown", grids, "time"),
            ("now", "now", "unsure", grids, "time"),
            ("ever_by", "passed", "unknown", bys, "by"),
        )
        variables: dict[str, Variable] = {}
        for name, hits, unknown, places, dim in said:
            both = [_course(counts[run], (hits, unknown), at[run], places[run]) for run in (0, 1)]
            variables |= _named(limit, name, dim).counted(_share_difference(pair, both, members), pair.ask.failures)
        variables["by"] = Variable(("by",), np.array(by, dtype=np.float64), "time by which", pair.ask.time_unit)
        yield pair.finding(f"limits/{limit.name}", variables, times)


def _named(limit: LimitAsked, name: str, dim: str) -> Named:
    true = "that it is true then" if name == "now" else "that it has been true by then"
    return Named(name, (dim,), f"difference of the probability {true}: {limit.label or limit.name}")


def _course(counts: Mapping[str, Array], names: tuple[str, str], limit: int, places: Places) -> tuple[Counts, Counts]:
    """Passings and unknown members by replicate [replicate, place], from counts of places; those of `now` are no running sums."""
    both = [counts[name][:, limit] for name in names]
    hits, lost = both if names[0] == "now" else [each.cumsum(axis=1) for each in both]
    return hits[:, places], lost[:, places]


def _share_difference(pair: _Pair, both: list[tuple[Counts, Counts]], members: list[int]) -> Counted:
    """Among the known; and with the unknown of one as passed and of the other as not, and the other way round."""
    confidence, shares = pair.ask.confidence, pair.draws.shares
    known = [Passed(hits, members[run] - unknown) for run, (hits, unknown) in enumerate(both)]
    success = shares(known[0], known[1], confidence)
    lost = np.asarray(both[0][1].any(axis=0) | both[1][1].any(axis=0))
    if not lost.any():
        return Counted.complete(success)
    low = [Passed(hits, np.full_like(hits, members[run])) for run, (hits, _) in enumerate(both)]
    high = [Passed(hits + unknown, np.full_like(hits, members[run])) for run, (hits, unknown) in enumerate(both)]
    return Counted(success, shares(high[0], low[1], confidence), shares(low[0], high[1], confidence), lost)
