"""What drives the uncertainty: shares of the variance by input and by group, over time and overall, of quantities, outcomes and limits.

Independent inputs: first-order and total Sobol' indices (`uq.analysis.sobol`), of groups as well. Dependent inputs: first order from given
data (`uq.analysis.given`) and Shapley effects (`uq.analysis.shapley`); total order is refused. A share is missing, never 0, where the
variance is within the noise of the solver.
"""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Counts, Floats
from uq.analysis.estimate import Estimate
from uq.analysis.finding import Finding, Variable
from uq.analysis.given import ByClass, Explained
from uq.analysis.moments import Moments
from uq.analysis.passings import Passings
from uq.analysis.pieces import Array
from uq.analysis.policy import LARGEST_LOSS, TOO_MANY_LOST, Named
from uq.analysis.shapley import Walks
from uq.analysis.sobol import first_numerator, index, over_time, total_numerator, variance

FEWEST = 500
NOISE = "the variance is within the noise of the solver"
TOO_FEW = f"ranking a limit needs {FEWEST} members that passed and {FEWEST} that did not"
DEPENDENT = (
    "not given because inputs depend on each other: what one input adds to all others is then no share of the variance; "
    "the Shapley effects share it out"
)
DRAWN_TOGETHER = "its inputs are drawn together; their group has one effect"

Flags = NDArray[np.bool_]


@dataclass(frozen=True, eq=False)
class Shares:
    """Numerators of indices of every mixed row [replicate, set, cell], variances [replicate, cell]; lost: cells with too many rows lost.

    unit [cell]: outputs are in it.

    With dependence there is no first-order numerator; `first` is then of no sets, and `total` is the cost of a set in Shapley effects.
    """

    first: Floats
    total: Floats
    variances: Floats
    lost: Flags
    unit: Floats

    @classmethod
    def of(cls, moments: Moments, dependent: bool) -> Shares:
        """From the sums of outputs; cells are those of the moments."""
        sums = moments.pieces.by_replicate()
        asked = moments.pieces.rows
        rows = asked - sums["lost"]
        with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
            mean = sums["first"].sum(axis=0) / (2 * rows.sum(axis=0))
            total = total_numerator(sums["square"], rows[:, None])
            first = total[:, :0] if dependent else first_numerator(sums["product"], sums["difference"], mean, rows[:, None])
            variances = variance(sums["first"], sums["second"], mean, rows)
        return cls(first, total, variances, _too_many(sums["lost"], asked), moments.unit)

    def cells(self, here: slice | NDArray[np.intp]) -> Shares:
        """Some of the cells."""
        return Shares(self.first[..., here], self.total[..., here], self.variances[..., here], self.lost[here], self.unit[here])

    def overall(self, times: Floats) -> Shares:
        """Integrated over time, one cell; lost where any time is."""
        first, total, variances = (over_time(each, times)[..., None] for each in (self.first, self.total, self.variances))
        return Shares(first, total, variances, np.asarray(self.lost.any(keepdims=True)), self.unit[:1])

    def noise(self, floor: float) -> Flags:
        """Cells whose variance is at or below the square of the floor, or is no number."""
        with np.errstate(over="ignore"):
            return np.asarray(~(self.variances.mean(axis=0) > (floor / self.unit) ** 2))


def _too_many(lost: Counts, rows: int) -> Flags:
    return np.asarray(lost.sum(axis=0) > LARGEST_LOSS * rows * len(lost))


@dataclass(frozen=True, eq=False)
class Ranked:
    """What one thing is ranked by: its shares and, with dependence, what the inputs explain of it."""

    shares: Shares
    explained: Explained | None

    @classmethod
    def of(cls, shares: Shares, by_class: ByClass | None) -> Ranked:
        """All cells; by_class: the sums by class, needed where inputs are dependent."""
        return cls(shares, None if by_class is None else Explained.of(by_class))

    def cells(self, here: slice | NDArray[np.intp]) -> Ranked:
        """Some of the cells."""
        return Ranked(self.shares.cells(here), self.explained and self.explained.cells(here))

    def overall(self, times: Floats) -> Ranked:
        """Integrated over time, one cell."""
        return Ranked(self.shares.overall(times), self.explained and self.explained.overall(times))


def watched_findings(ask: Ask, moments: Moments, by_class: ByClass | None = None) -> tuple[Finding, ...]:
    """One group ranking/W for every watched quantity: over time, and overall. by_class: with dependence."""
    ranked = Ranked.of(Shares.of(moments, ask.dependent), by_class)
    times = len(ask.grid)
    groups = []
    for place, quantity in enumerate(ask.watched):
        here = ranked.cells(slice(place * times, (place + 1) * times))
        label = quantity.label or quantity.name
        variables = _variables(ask, here, here.shares.noise(ask.floor[place]), _Words(label, "", ("time",)))
        overall = here.overall(ask.times)
        length = ask.times[-1] - ask.times[0] if len(ask.times) > 1 else 1.0
        quiet = overall.shares.noise(ask.floor[place] * float(np.sqrt(length)))
        variables |= _variables(ask, overall, quiet, _Words(f"{label}, variance-weighted over time", "_overall", ()))
        groups.append(_finding(ask, quantity.name, variables))
    return tuple(groups)


def outcome_findings(ask: Ask, moments: Moments, by_class: ByClass | None = None) -> tuple[Finding, ...]:
    """One group ranking/O for every outcome. by_class: with dependence."""
    ranked = Ranked.of(Shares.of(moments, ask.dependent), by_class)
    groups = []
    for place, quantity in enumerate(ask.outcomes):
        here = ranked.cells(slice(place, place + 1))
        quiet = here.shares.noise(ask.outcome_floor[place])
        groups.append(_finding(ask, quantity.name, _variables(ask, here, quiet, _Words(quantity.label or quantity.name, "", ()))))
    return tuple(groups)


def limit_findings(ask: Ask, passings: Passings, by_class: ByClass | None = None) -> tuple[Finding, ...]:
    """One group ranking/L for every limit: of the indicator 'true by then', at the output times and at its `by` times."""
    counts = passings.pieces.by_replicate()
    explained = None if by_class is None else Explained.of(by_class)
    grid, judged = np.searchsorted(ask.judged, ask.grid), len(ask.judged)
    needed = _COUNTS[ask.dependent]
    groups = []
    for place, limit in enumerate(ask.limits):
        shares, few = _of_limit({name: counts[name][:, place] for name in needed}, passings.pieces.rows)
        ranked = Ranked(shares, explained and explained.cells(slice(place * judged, (place + 1) * judged)))
        by = np.searchsorted(ask.judged, np.array([ask.place(time) for time in limit.by], dtype=np.intp))
        label = f"having been true by then: {limit.label or limit.name}"
        variables = _variables(ask, ranked.cells(grid), few[grid], _Words(label, "", ("time",), TOO_FEW))
        variables["by"] = Variable(("by",), np.asarray(limit.by, dtype=np.float64), "time by which", ask.time_unit)
        variables |= _variables(ask, ranked.cells(by), few[by], _Words(label, "_by", ("by",), TOO_FEW))
        variables["few_by"] = Variable(
            ("by",), (few & ~shares.lost)[by].astype(np.int8), "whether shares by then want more members", attributes=_FLAGS
        )
        groups.append(_finding(ask, limit.name, variables))
    return tuple(groups)


_WITH_B = ("both", "b_and_m")
_FLAGS = {"flag_values": np.array([0, 1], dtype=np.int8), "flag_meanings": "enough_or_not_to_be_had too_few"}
_COUNTS = {True: ("lost", "a", "b", "m", "a_and_m"), False: ("lost", "a", "b", "m", "a_and_m", *_WITH_B)}


def _of_limit(counts: dict[str, Array], asked: int) -> tuple[Shares, Flags]:
    """Shares of the indicator, and where too few members passed or did not, from counts of places [replicate, (set), place]."""
    by_then = {name: array.cumsum(axis=-1)[..., :-1] for name, array in counts.items()}
    lost, a, b = (by_then[name] for name in ("lost", "a", "b"))
    rows = asked - lost
    with np.errstate(invalid="ignore", divide="ignore"):
        mean = (a + b).sum(axis=0) / (2 * rows.sum(axis=0))
        # (a - m)^2 is 1 where exactly one of them passed.
        total = total_numerator(a[:, None] + by_then["m"] - 2 * by_then["a_and_m"], rows[:, None])
        first = total[:, :0]
        if "both" in by_then:
            product, difference = by_then["b_and_m"] - by_then["both"][:, None], by_then["m"] - a[:, None]
            first = first_numerator(product, difference, mean, rows[:, None])
        variances = variance(a + b, a + b, mean, rows)
    passed, members = (a + b).sum(axis=0), 2 * rows.sum(axis=0)
    few = np.minimum(passed, members - passed) < FEWEST
    return Shares(first, total, variances, _too_many(lost, asked), np.ones(few.shape)), np.asarray(few)


@dataclass(frozen=True)
class _Words:
    """Of what, the ending of the names, the dimension after the input's if any, and the reason why quiet cells are missing."""

    label: str
    ending: str
    dims: tuple[str, ...]
    reason: str = NOISE


@dataclass(frozen=True)
class _Said:
    """One kind of share: its name and words, of what (input or group), the estimates [of, cell], why they are missing as a whole."""

    name: str
    called: str
    of: str
    found: Estimate
    reason: str = ""


def _finding(ask: Ask, name: str, variables: dict[str, Variable]) -> Finding:
    if ask.groups:
        names = np.array([group.name for group in ask.groups], dtype=str)
        variables["group"] = Variable(("group",), names, "inputs ranked together, or drawn together")
    if any(together := _drawn_together(ask)):
        variables["drawn_with"] = Variable(("input",), np.array(together, dtype=str), "group that an input is drawn in, if any")
    return Finding(f"ranking/{name}", variables)


def _drawn_together(ask: Ask) -> list[str]:
    """By input the name of the group that stands for all that is drawn with it; "" where it is drawn by itself."""
    names = {group.places: group.name for group in ask.groups}
    found = [""] * len(ask.inputs)
    for unit in ask.shared_out:
        for place in unit if len(unit) > 1 else ():
            found[place] = names.get(tuple(sorted(unit)), "")
    return found


def _variables(ask: Ask, ranked: Ranked, quiet: Flags, words: _Words) -> dict[str, Variable]:
    """All kinds of share, nan where quiet or lost, with the reason."""
    shares = ranked.shares
    known = ~quiet & ~shares.lost
    reasons = [text for text, flags in ((TOO_MANY_LOST, shares.lost), (words.reason, quiet & ~shares.lost)) if flags.any()]
    said = _independent(ask, shares) if ranked.explained is None else _dependent(ask, shares, ranked.explained)
    variables: dict[str, Variable] = {}
    for each in said:
        found = each.found.where(known)
        if not words.dims:
            found = Estimate(found.value[:, 0], found.low[:, 0], found.high[:, 0])
        named = Named(each.name.replace("*", words.ending), (each.of, *words.dims), f"{each.called} of {words.label}")
        variables |= named.variables(found, "; ".join(dict.fromkeys([*reasons, each.reason] if each.reason else reasons)))
    return variables


def _independent(ask: Ask, shares: Shares) -> Iterable[_Said]:
    """Sobol' indices of inputs and of groups: each has a mixed row of its own."""
    place = {frozenset(each): at for at, each in enumerate(ask.mixed)}
    inputs = [place[frozenset((each,))] for each in range(len(ask.inputs))]
    groups = [place[frozenset(group.places)] for group in ask.groups]
    for rows, of, ending, whose in ((inputs, "input", "*", ""), (groups, "group", "_group*", " (of the group)")):
        if rows:
            first, total = (index(each[:, rows], shares.variances, ask.confidence) for each in (shares.first, shares.total))
            yield _Said(f"first{ending}", f"first-order index{whose}", of, first)
            yield _Said(f"total{ending}", f"total index{whose}", of, total)


def _dependent(ask: Ask, shares: Shares, explained: Explained) -> Iterable[_Said]:
    """First order from given data, no total order, and Shapley effects, of groups their sums over what they hold."""
    first = explained.first(ask.confidence)
    yield _Said("first*", "first-order index", "input", first)
    yield _Said("total*", "total index", "input", _none(first.value), DEPENDENT)
    walks, units = Walks.of(ask), ask.shared_out
    effects = walks.effects(shares.total, shares.variances, ask.confidence)
    alone = {unit[0]: at for at, unit in enumerate(units) if len(unit) == 1}
    yield _Said(
        "shapley*", "Shapley effect", "input", _picked(effects, [alone.get(each, -1) for each in range(len(ask.inputs))]), _joint(ask)
    )
    if ask.groups:
        held = tuple(tuple(at for at, unit in enumerate(units) if set(unit) <= set(group.places)) for group in ask.groups)
        whole = [sum(len(units[at]) for at in each) == len(group.places) for each, group in zip(held, ask.groups, strict=True)]
        shared = walks.shared(held).effects(shares.total, shares.variances, ask.confidence)
        yield _Said("shapley_group*", "Shapley effect (sum over the group)", "group", shared.where(np.array(whole)[:, None]))


def _joint(ask: Ask) -> str:
    return DRAWN_TOGETHER if any(len(unit) > 1 for unit in ask.shared_out) else ""


def _picked(found: Estimate, rows: list[int]) -> Estimate:
    """Some rows of an estimate; nan for -1."""
    there = np.array(rows) >= 0
    return Estimate(*(end[rows] for end in (found.value, found.low, found.high))).where(there[:, None])


def _none(like: Floats) -> Estimate:
    return Estimate(*(np.full(like.shape, np.nan) for _ in range(3)))
