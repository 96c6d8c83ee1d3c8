"""From declared equations to `Code`."""

from __future__ import annotations

from collections.abc import Callable

from uq.errors import ValueMistake
from uq.model.algebra import write_algebra
from uq.model.code import Code, Equations, Solver
from uq.model.columns import Looped
from uq.model.elementary.definitions import definitions
from uq.model.observe import write_observe, write_outcomes, write_starts
from uq.model.pair import Pair
from uq.model.points import Plan, write_system
from uq.model.rosenbrock import Rosenbrock
from uq.model.rosenbrock5 import ROSENBROCK5
from uq.model.start import write_rates, write_start
from uq.model.step import write_step
from uq.model.stiff import LARGEST_ROOM, Stiff
from uq.model.stiff_step import write_stiff
from uq.model.tableau import PAIRS
from uq.model.tables import write_tables
from uq.model.writer import INTRINSICS

# 100, 300, 1000 states compile in 0.2, 0.6, 5 s (measured on chains with an exponential in each state); beyond this it is no fun any more.
LARGEST = 2000
IN_WORDS = f"{int(LARGEST_ROOM**0.5)} that all depend on all, or as many more as fewer depend on each other"
REMEDY = 'say solver = "auto" or "explicit"'
# Callers align the stack to 16 bytes only: what a step has no register for would lie across two cache lines. Measured with the stack
# aligned: 0 to 6 % less time for 5(4), 0 to 14 % less for 8(5,3) (most with AVX-512, an exponential in each rate or six states).
ATTRIBUTES = ("attributes #0 = { nounwind }", "attributes #1 = { nounwind alignstack=64 }")
WRITERS = (write_system, write_start, write_rates, write_step, write_stiff, write_observe, write_outcomes, write_starts)


def build(equations: Equations, method: str = "explicit54", solver: Solver = "explicit") -> Code:
    """Write a model's code.

    The text holds `@uq_start`, `@uq_rates` (only with breaks), `@uq_step`, `@uq_stiff`, `@uq_observe`, `@uq_outcomes`, `@uq_starts` over
    groups of eight lanes (see `layout`). The same equations give the same text; fixed parameters are numbers in it.
    method: the explicit pair. solver: "explicit" or "stiff" steps only, or "auto", by what every member needs; a model that is too large
    for stiff steps takes explicit ones with "auto". ValueMistake if there is no state, more than LARGEST, no such method, or if the model
    is too large for "stiff".
    """
    pair = next((pair for pair in PAIRS if pair.name == method), None)
    if pair is None:
        raise ValueMistake(f"the method {method!r}", "one of " + ", ".join(pair.name for pair in PAIRS))
    if not equations.states:
        raise ValueMistake("no state", "at least one", "a forecast needs something that changes over time", key="states")
    if len(equations.states) > LARGEST:
        raise ValueMistake(f"{len(equations.states)} states", f"at most {LARGEST}", "larger models are not available yet", key="states")
    stiff = None if solver == "explicit" else Stiff.of(equations, ROSENBROCK5)
    if stiff is None and solver == "stiff":
        raise ValueMistake(
            f"{len(equations.states)} states, as they depend on each other", f"at most {IN_WORDS}", REMEDY, key="plan.solver"
        )
    return write(Plan.of(equations, pair, stiff, only_stiff=solver == "stiff"))


def write(plan: Plan) -> Code:
    """The code of a plan."""
    equations, stiff = plan.equations, plan.stiff
    unneeded = {
        write_system: plan.form is not Looped and stiff is None,
        write_rates: not (equations.forcings or plan.moments.turns),
        write_step: plan.only_stiff,
        write_stiff: stiff is None,
    }
    parts = [part for writer in WRITERS if not unneeded.get(writer, False) for part in _parts(writer, plan)]
    called = {name for _, names in parts for name in names}
    tables, needed = write_tables(equations.tables, called)
    text = "\n".join([*(body for body, _ in parts), *tables, *_declared(called | needed), *ATTRIBUTES, ""])
    methods: list[Pair | Rosenbrock] = [*([] if plan.only_stiff else [plan.pair]), *([stiff.method] if stiff else [])]
    return Code(
        text=text,
        inputs=equations.inputs,
        states=equations.states,
        outcomes=len(equations.outcomes),
        forcings=equations.forcings,
        courses=equations.courses,
        layout=plan.layout,
        method=" ".join(each.name for each in methods),
        solver="explicit" if stiff is None else "stiff" if plan.only_stiff else "auto",
        moments=plan.moments,
        undershoot=max(each.undershoot for each in methods),
    )


def _parts(writer: Callable[[Plan], tuple[str, set[str]]], plan: Plan) -> list[tuple[str, set[str]]]:
    """A function's text with the names that it calls, after those of the functions that belong to it."""
    return [*(write_algebra(plan) if writer is write_stiff else []), writer(plan)]


def _declared(called: set[str]) -> list[str]:
    """Elementary functions and the intrinsics of the model's own code, those once that the elementary functions have declared."""
    elementary = definitions({name.removeprefix("uq_") for name in called if name.startswith("uq_")})
    own = [text for name, text in sorted(INTRINSICS.items()) if f"llvm.{name}.v8f64" in called and text not in elementary]
    return [*own, elementary]
