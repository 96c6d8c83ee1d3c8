"""How precise the headline numbers are, whether that is enough, and how many solves would be.

Headline numbers: probabilities at `by`; quantiles of outcomes, and of watched quantities at the last time; overall indices, indices of
outcomes, and of limits at the last `by`. What else settles, the order of the inputs and which may be dropped, is in `uq.analysis.places`.
"""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from typing import Literal, Protocol

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Floats
from uq.analysis.finding import Finding, Variable

Kind = Literal["quantiles", "probabilities", "indices"]
Flags = NDArray[np.bool_]

# The 5-95 % width of a normal law in standard deviations, for quantities of which these two quantiles are not asked or are equal.
_NORMAL_WIDTH = 3.2897072539
# Something that was the same in each of N independent rows differs in at most 3/N of them at 95 % (the rule of three).
_RULE_OF_THREE = 3.0
# The half-width falls with at least this power of the solves; well-spread points do better, up to the second, which is trusted if measured.
SLOWEST, FASTEST = 0.5, 1.0
_ROUNDS_TO_FIT = 3


class Asked(Protocol):
    """The precision asked for: half-widths, of quantiles as a share of the 5-95 % width; None where it is not asked for."""

    @property
    def quantiles(self) -> float | None: ...
    @property
    def probabilities(self) -> float | None: ...
    @property
    def indices(self) -> float | None: ...


@dataclass(frozen=True, eq=False)
class Headline:
    """Headline numbers of one variable: group and name in the result, dimensions, estimates with their ends, and what kind they are.

    scale: what half-widths are divided by; undefined: where there is no number and more members would not give one (a constant, failures).
    """

    group: str
    name: str
    kind: Kind
    dims: tuple[str, ...]
    value: Floats
    low: Floats
    high: Floats
    scale: Floats
    undefined: Flags
    unit: str
    long_name: str

    @property
    def half_widths(self) -> Floats:
        """Half the width of every interval as it is judged; infinite where there is no number yet."""
        with np.errstate(invalid="ignore", divide="ignore"):
            half = (self.high - self.low) / 2 / self.scale
        return np.where(np.isnan(half), np.inf, half)

    def reached(self, asked: Asked) -> Flags:
        """Where the precision asked is reached; nowhere where there is no number. All true of a kind that is not asked for."""
        wanted = getattr(asked, self.kind)
        return np.ones(self.value.shape, dtype=np.bool_) if wanted is None else np.asarray((self.half_widths <= wanted) & ~self.undefined)


def headline(findings: Iterable[Finding], ask: Ask, members: int) -> tuple[Headline, ...]:
    """The headline numbers in the findings at the end of a round with so many A and B members."""
    found: list[Headline] = []
    for finding in findings:
        room, _, name = finding.group.partition("/")
        if not name or room not in _READERS:
            continue
        found += _READERS[room](finding, ask, members)
    return tuple(found)


def _of_bands(finding: Finding, ask: Ask, members: int) -> list[Headline]:
    return [_quantiles(finding, ask, -1)] if "quantiles" in finding.variables else []


def _of_outcomes(finding: Finding, ask: Ask, members: int) -> list[Headline]:
    return [_quantiles(finding, ask, None)] if "quantiles" in finding.variables else []


def _quantiles(finding: Finding, ask: Ask, time: int | None) -> Headline:
    """Quantiles, at one time where there are several. The scale is their 5-95 % width, or what it is under a normal law."""

    def at(name: str) -> Floats:
        data = finding.variables[name].data
        return np.asarray(data if time is None else data[..., time])

    value, low, high = (at(f"quantiles{end}") for end in ("", "_low", "_high"))
    levels = list(ask.quantiles)
    width = float(value[levels.index(0.95)] - value[levels.index(0.05)]) if {0.05, 0.95} <= set(levels) else np.nan
    if not width > 0:
        width = _NORMAL_WIDTH * float(at("sd")) if "sd" in finding.variables else np.nan
    if not width > 0:
        width = float(value.max() - value.min())
    # All members alike: nothing to be precise about, and nothing that counts as precise.
    constant = (low == high) & (not width > 0)
    undefined = np.isnan(value) | constant
    variable = finding.variables["quantiles"]
    scale = np.full(value.shape, width)
    return Headline(
        finding.group, "quantiles", "quantiles", ("quantile",), value, low, high, scale, undefined, variable.unit, variable.long_name
    )


def _of_limits(finding: Finding, ask: Ask, members: int) -> list[Headline]:
    if "ever_by" not in finding.variables:
        return []
    value, low, high = (np.asarray(finding.variables[f"ever_by{end}"].data) for end in ("", "_low", "_high"))
    one, words = np.ones(value.shape), finding.variables["ever_by"].long_name
    return [Headline(finding.group, "ever_by", "probabilities", ("by",), value, low, high, one, np.isnan(value), "1", words)]


def _of_ranking(finding: Finding, ask: Ask, members: int) -> list[Headline]:
    """Overall indices, those of an outcome, those of a limit at its last time; ends that coincide are opened by the rule of three.

    Where inputs depend on each other there are no total indices: nothing is asked of them.
    """
    ending = next((each for each in ("_overall", "_by") if f"first{each}" in finding.variables), "")
    dependent = f"shapley{ending}" in finding.variables
    # A limit that too few members passed may be ranked when there are more; nothing else that is missing.
    flags = finding.variables.get("few_by") if ending == "_by" else None
    few = flags is not None and flags.data.size > 0 and bool(flags.data[-1])
    found = []
    for kind in ("first", "total", "shapley", "first_group", "total_group", "shapley_group"):
        variable = None if dependent and kind.startswith("total") else finding.variables.get(kind + ending)
        if variable is None or (ending == "_by" and variable.data.shape[-1] == 0):
            continue
        ends = (np.asarray(finding.variables[f"{kind}{ending}{end}"].data) for end in ("", "_low", "_high"))
        value, low, high = (each[..., -1] if ending == "_by" else each for each in ends)
        least = np.where(high > low, 0.0, _RULE_OF_THREE / max(members // 2, 1))
        undefined = np.isnan(value) & ((not few) | refused(finding, kind))
        found.append(
            Headline(
                finding.group, kind + ending, "indices", variable.dims[:1], value, low - least, high + least, np.ones(value.shape),
                undefined, "1", variable.long_name,
            )
        )  # fmt: skip
    return found


def refused(finding: Finding, kind: str) -> Flags:
    """Of one kind of share, where an input has none because it is drawn with others, which have one together [input]."""
    together = finding.variables.get("drawn_with")
    return np.asarray(together.data != "") if kind == "shapley" and together is not None else np.zeros(1, dtype=np.bool_)


_READERS = {"bands": _of_bands, "outcomes": _of_outcomes, "limits": _of_limits, "ranking": _of_ranking}


def settled(headlines: Sequence[Headline], asked: Asked) -> bool:
    """Whether every number of the kinds asked for is as precise as asked; never where there is no such number."""
    wanted = [each for each in headlines if getattr(asked, each.kind) is not None]
    defined = sum(int((~each.undefined).sum()) for each in wanted)
    return defined > 0 and all(bool((each.reached(asked) | each.undefined).all()) for each in wanted)


@dataclass(frozen=True, eq=False)
class Round:
    """What a completed round had to say: its A and B members, all its solves, the headline numbers."""

    members: int
    solves: int
    headlines: tuple[Headline, ...]


@dataclass(frozen=True)
class Needed:
    """Solves after which the precision asked is expected, and the variables ("ranking/L total_by") of which nothing can be foretold yet."""

    solves: float
    unknown: tuple[str, ...]


def needed(rounds: Sequence[Round], asked: Asked) -> Needed:
    """The solves that a precision will take, from the half-widths of the rounds so far.

    The last half-width falls like solves^-1/2, or faster where at least three rounds of the same number show it, at most like solves^-1.
    """
    last, unknown, most = rounds[-1], [], float(rounds[-1].solves)
    for place, each in enumerate(last.headlines):
        wanted = getattr(asked, each.kind)
        if wanted is None:
            continue
        half = np.where(each.undefined, 0.0, each.half_widths)
        if np.isinf(half).any():
            unknown.append(f"{each.group} {each.name}")
        half = np.where(np.isinf(half), 0.0, half)
        with np.errstate(over="ignore"):
            solves = last.solves * (half / wanted) ** (1 / _powers(rounds, place))
        most = max(most, float(np.where(half > wanted, solves, 0.0).max(initial=0.0)))
    return Needed(most, tuple(unknown))


def _powers(rounds: Sequence[Round], place: int) -> Floats | float:
    """How fast the half-widths of one headline fell, as powers of the solves."""
    same = [each for each in rounds if len(each.headlines) > place and each.headlines[place].name == rounds[-1].headlines[place].name]
    if len(same) < _ROUNDS_TO_FIT:
        return SLOWEST
    with np.errstate(divide="ignore", invalid="ignore"):
        fall = np.log([each.headlines[place].half_widths for each in same])
    solves = np.log([each.solves for each in same])
    away = solves - solves.mean()
    with np.errstate(invalid="ignore"):
        slopes = -sum(step * each for step, each in zip(away, fall, strict=True)) / (away**2).sum()
    return np.clip(np.where(np.isfinite(slopes), slopes, SLOWEST), SLOWEST, FASTEST)


def precision_findings(rounds: Sequence[Round]) -> tuple[Finding, ...]:
    """Groups precision/bands/W, precision/limits/L, ...: the headline numbers of every round, with `members(round)`."""
    groups: dict[str, dict[str, Variable]] = {}
    members = Variable(
        ("round",), np.array([each.members for each in rounds], dtype=np.int64), "members so far, those of the ranking not counted"
    )
    for place, each in enumerate(rounds[-1].headlines):
        variables = groups.setdefault(f"precision/{each.group}", {"members": members})
        every = [one.headlines[place] for one in rounds]
        for ending, words in (("", ""), ("_low", "lower end of the interval: "), ("_high", "upper end of the interval: ")):
            data = np.stack([getattr(one, ending[1:] or "value") for one in every])
            variables[each.name + ending] = Variable(("round", *each.dims), data, words + each.long_name, each.unit)
    return tuple(Finding(group, variables) for group, variables in groups.items())
