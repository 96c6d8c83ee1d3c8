"""What is precise enough, drawn out of a result: the values, the order of the inputs, and which of them may be dropped."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.places import dropping, order_of_inputs, ranked_in, shares
from uq.analysis.precision import Headline as Numbers
from uq.analysis.precision import headline as numbers_of
from uq.analysis.precision import refused
from uq.report.answers import Driver, Estimate, InputRow, KindReached, PrecisionAnswer, SettledAnswer, Shares
from uq.report.drawn import Axes, Findings, data, placed, room

KINDS = ("probabilities", "quantiles", "indices")


@dataclass(frozen=True)
class Wanted:
    """The precision asked; None where it is not."""

    quantiles: float | None = None
    probabilities: float | None = None
    indices: float | None = None


def precision(found: Findings, inputs: tuple[InputRow, ...], axes: Axes, facts: Mapping[str, Any]) -> PrecisionAnswer | None:
    """What came of the precision asked; None where none was."""
    group = found.get("precision")
    if group is None:
        return None
    said = group.attributes
    wanted = Wanted(**{kind: float(said[kind]) for kind in KINDS if kind in said})
    numbers = _numbers(found, axes, facts)
    rounds = max((len(data(each, "members")) for path, each in found.items() if path.startswith("precision/")), default=0)
    return PrecisionAnswer(
        reached=bool(said.get("reached")),
        stopped=str(said.get("stopped", "")),
        solves_needed=float(said.get("solves_needed", math.nan)),
        unknown=str(said.get("unknown", "")),
        rounds=rounds,
        solves_allowed=int(said["solves_allowed"]) if "solves_allowed" in said else None,
        kinds=tuple(_kind(kind, wanted, numbers, found) for kind in KINDS if getattr(wanted, kind) is not None),
    )


def _kind(kind: str, wanted: Wanted, numbers: Sequence[Numbers], found: Findings) -> KindReached:
    mine = [each for each in numbers if each.kind == kind]
    defined = [np.where(each.undefined, -np.inf, each.half_widths) for each in mine]
    widest = max((float(each.max(initial=-np.inf)) for each in defined), default=-math.inf)
    # Inputs that are drawn together have a share together: nobody misses one of each.
    left_out = sum(int(refused(found[each.group], each.name.partition("_")[0]).sum()) for each in mine if each.dims == ("input",))
    where = next((each.group for each, half in zip(mine, defined, strict=True) if half.max(initial=-np.inf) == widest), "")
    return KindReached(
        kind=kind,
        wanted=float(getattr(wanted, kind)),
        widest=widest if widest > -math.inf else math.nan,
        numbers=sum(each.value.size for each in mine) - left_out,
        precise=sum(int(each.reached(wanted).sum()) for each in mine),
        undefined=sum(int(each.undefined.sum()) for each in mine) - left_out,
        where=str(found[where].attributes.get("label", where)) if where else "",
    )


def settled(found: Findings, inputs: tuple[InputRow, ...], axes: Axes, facts: Mapping[str, Any]) -> SettledAnswer | None:
    """What the shares in all rankings settle; None where there are none, or there is nothing to put in order."""
    numbers, rankings = _numbers(found, axes, facts), [finding for _, finding in room(found, "ranking")]
    ranked = ranked_in(rankings[0], [row.name for row in inputs]) if rankings else ()
    known = {group for group, every in shares(numbers, ranked).items() if any(share.value == share.value for share in every)}
    orders = [order for group, order in order_of_inputs(numbers, ranked).items() if group in known]
    if not orders or len(ranked) < 2:
        return None
    dropped = dropping(numbers, ranked)
    nothing = Shares(Estimate(), Estimate())
    groups = [(str(name), nothing) for name in data(rankings[0], "group")]
    by_name = {driver.input.name: driver for driver in placed(rankings[0], [Driver(row, nothing) for row in inputs], groups)}
    return SettledAnswer(
        rankings=len(orders),
        first=sum(len(order[0]) == 1 for order in orders),
        whole=sum(len(order) == len(ranked) for order in orders),
        may=tuple(by_name[name] for name in dropped.may),
        open=tuple(by_name[name] for name in dropped.open),
    )


def _numbers(found: Findings, axes: Axes, facts: Mapping[str, Any]) -> tuple[Numbers, ...]:
    """The headline numbers as the analysis judges them; of what was asked it looks at the levels alone."""
    nothing = np.zeros(0)
    ask = Ask(
        time_unit=axes.time_unit,
        solved_times=nothing,
        grid=np.zeros(0, dtype=np.intp),
        watched=(),
        outcomes=(),
        limits=(),
        inputs=(),
        questions=(),
        quantiles=axes.levels,
        confidence=float(facts["confidence"]),
        failures="bound",
    )
    return numbers_of(found.values(), ask, int(facts["members"]))
