"""From declared equations to `Code`."""

from __future__ import annotations

from uq.errors import ValueMistake
from uq.model.code import Code, Equations
from uq.model.columns import Looped
from uq.model.elementary.definitions import definitions
from uq.model.observe import write_observe, write_outcomes, write_starts
from uq.model.points import Plan, write_system
from uq.model.start import write_rates, write_start
from uq.model.step import write_step
from uq.model.tableau import PAIRS
from uq.model.tables import write_tables
from uq.model.writer import INTRINSICS

# 100, 300, 1000 states compile in 0.2, 0.6, 5 s (measured on chains with an exponential in each state); beyond this it is no fun any more.
LARGEST = 2000
# Callers align the stack to 16 bytes only: what a step has no register for would lie across two cache lines. Measured with the stack
# aligned: 0 to 6 % less time for 5(4), 0 to 14 % less for 8(5,3) (most with AVX-512, an exponential in each rate or six states).
ATTRIBUTES = ("attributes #0 = { nounwind }", "attributes #1 = { nounwind alignstack=64 }")
WRITERS = (write_system, write_start, write_rates, write_step, write_observe, write_outcomes, write_starts)


def build(equations: Equations, method: str = "explicit54") -> Code:
    """Write a model's code.

    The text holds `@uq_start`, `@uq_rates` (only with breaks), `@uq_step`, `@uq_observe`, `@uq_outcomes`, `@uq_starts` over groups of
    eight lanes (see `layout`). The same equations give the same text; fixed parameters are numbers in it. ValueMistake if there is no
    state, more than LARGEST, or no such method.
    """
    pair = next((pair for pair in PAIRS if pair.name == method), None)
    if pair is None:
        raise ValueMistake(f"the method {method!r}", "one of " + ", ".join(pair.name for pair in PAIRS))
    if not equations.states:
        raise ValueMistake("no state", "at least one", "a forecast needs something that changes over time", key="states")
    if len(equations.states) > LARGEST:
        raise ValueMistake(f"{len(equations.states)} states", f"at most {LARGEST}", "larger models are not available yet", key="states")
    return write(Plan.of(equations, pair))


def write(plan: Plan) -> Code:
    """The code of a plan."""
    equations = plan.equations
    unneeded = {write_system: plan.form is not Looped, write_rates: not (equations.forcings or plan.moments.turns)}
    functions = [writer(plan) for writer in WRITERS if not unneeded.get(writer, False)]
    called = {name for _, names in functions for name in names}
    tables, needed = write_tables(equations.tables, called)
    text = "\n".join([*(body for body, _ in functions), *tables, *_declared(called | needed), *ATTRIBUTES, ""])
    return Code(
        text=text,
        inputs=equations.inputs,
        states=equations.states,
        outcomes=len(equations.outcomes),
        forcings=equations.forcings,
        courses=equations.courses,
        layout=plan.layout,
        method=plan.pair.name,
        moments=plan.moments,
        undershoot=plan.pair.undershoot,
    )


def _declared(called: set[str]) -> list[str]:
    """Elementary functions and the intrinsics of the model's own code, those once that the elementary functions have declared."""
    elementary = definitions({name.removeprefix("uq_") for name in called if name.startswith("uq_")})
    own = [text for name, text in sorted(INTRINSICS.items()) if f"llvm.{name}.v8f64" in called and text not in elementary]
    return [*own, elementary]
