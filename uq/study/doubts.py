"""What is no mistake but should be looked at: the warnings of a study."""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from uq.inputs.inputs import Input, Inputs
from uq.lang.tree import parts
from uq.model.code import Equations
from uq.model.moments import not_landed_on
from uq.model.stiff import Stiff
from uq.study.locate import Path
from uq.study.names import differing_in_case
from uq.study.plan import Plan
from uq.study.quantities import over_of
from uq.study.work import Work
from uq.units import Units, parse_unit

# A quantity counts as positive where most draws are: with a quarter or more below zero, values of both signs are meant. Below
# one in a million nothing is said: no ordinary run meets such a draw.
_FEWEST_BELOW = 1e-6
_MOST_BELOW = 0.25


def warnings(work: Work, inputs: Inputs, watch: Iterable[str]) -> tuple[str, ...]:
    """All warnings, in words."""
    found = ["no unit is stated anywhere: the study is taken as dimensionless"] if work.sheets.unitless else []
    found += [f"nothing uses {place} `{name}`" for place, name in _unused(work, watch)]
    found += differing_in_case([*work.low.declared, *work.sheets.outcomes, *work.sheets.limits])
    # Entries of what repeats share their distribution: it is looked at once, under the name of the whole.
    once = {item.name.partition("[")[0]: item for item in reversed(inputs.items)}
    items = [item for item in inputs.items if once[item.name.partition("[")[0]] is item]
    found += [text for item in items for text in _below_zero(item, work.sheets.own)]
    found += [f"`{item.name.partition('[')[0]}`: {text}" for item in items if (text := item.distribution.misfit())]
    found += _moments(work, inputs)
    return tuple(found)


def _moments(work: Work, inputs: Inputs) -> Iterator[str]:
    """Rates that compare the time with inputs: moments that the solver cannot land on."""
    states, names, told = tuple(work.state_names), [item.name for item in inputs.items], set[str]()
    for entry, rate in zip(states, work.rates, strict=True):
        state = entry.partition("[")[0]
        if state in told:
            continue
        asked = () if rate is None else not_landed_on(work.low.graph, rate, states, names)
        if asked:
            told.add(state)
            said = ", ".join(f"`{name}`" for name in asked)
            yield (
                f"the rate of `{state}` changes at times that depend on {said}: the solver does not stop there, and what lasts less than "
                "a two-hundredth of the whole time may be missed; where the times are known, make it a forcing"
            )


def too_large_for_stiff(equations: Equations, plan: Plan) -> tuple[str, ...]:
    """That members of a large model take explicit steps only, where each should take what it needs."""
    if plan.solver != "auto" or not Stiff.too_large(equations):
        return ()
    return (
        f"{len(equations.states)} states with all their derivatives are too large a model for stiff steps: all members take explicit ones, "
        "so that a stiff one takes long or ends with the status `too_many_steps`",
    )


def remarks(inputs: Inputs, plan: Plan) -> tuple[str, ...]:
    """What follows from a study and may surprise."""
    if not inputs.dependent or "ranking" not in plan.ask:
        return ()
    return (
        "inputs depend on each other: the ranking gives Shapley effects, which share out what inputs have in common, "
        "and first-order indices; total-order indices would count it more than once or not at all",
    )


def _unused(work: Work, watch: Iterable[str]) -> Iterator[tuple[str, str]]:
    """Parameters, terms and forcings that no rate, start, limit, outcome or watched quantity depends on."""
    sheets, low = work.sheets, work.low
    roots: list[Path] = [("states", name, key) for name in sheets.states for key in ("rate", "start")]
    roots += [("limits", name, "when") for name in sheets.limits]
    roots += [("outcomes", name, "take") for name in sheets.outcomes]
    waiting = [*watch, *(name for root in roots for name in low.used(root))]
    seen: set[str] = set()
    while waiting:
        name = waiting.pop()
        if name not in seen:
            seen.add(name)
            if name in sheets.terms:
                waiting += low.used(sheets.text_path("terms", name, work.document))
    seen.update(_indices_used(work))
    for what, names in (
        ("the parameter", sheets.parameters),
        ("the term", sheets.terms),
        ("the forcing", sheets.forcings),
        ("the table", sheets.tables),
        ("the index", sheets.indices),
    ):
        yield from ((what, name) for name in names if name not in seen)


def _indices_used(work: Work) -> Iterator[str]:
    """Indices over which anything goes, and those that stand in brackets."""
    sheets = work.sheets
    for sheet in (
        each for table in (sheets.states, sheets.parameters, sheets.terms, sheets.outcomes, sheets.limits) for each in table.values()
    ):
        yield from (index.name for index in over_of(sheet) or ())
    for tree in work.low.trees.values():
        yield from (at.name for part in (parts(tree) if tree else ()) for at in part.at)


def _below_zero(item: Input, own: Units) -> Iterator[str]:
    """The share of draws below zero of a quantity whose other values are positive."""
    if parse_unit(item.unit, own).temperature == "scale":
        return
    share = item.distribution.share_below(0.0)
    if _FEWEST_BELOW <= share < _MOST_BELOW:
        yield f"`{item.name.partition('[')[0]}` is positive but for {_percent(share)} of its draws, which are below zero"


def _percent(share: float) -> str:
    return f"{100 * share:.2g} %"
