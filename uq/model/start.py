"""Writes what happens before and between the steps: `@uq_start` and `@uq_rates`.

`@uq_start` works out starts, hoisted values, first rates and the first step of eight new members; it returns the lanes that cannot start.
`@uq_rates` works the first stage out anew in the lanes whose forcings jumped; it returns the lanes where it is not finite.
"""

from __future__ import annotations

from collections.abc import Callable
from math import log2

from uq.model import control
from uq.model.columns import Column, Index
from uq.model.expressions import Expressions
from uq.model.layout import FAILURES, Head, Setting
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, finite_part, function, head, outside_range, shortest_step
from uq.model.switch import begin
from uq.model.writer import ONE, ZERO, V, Writer, constant

# Where sizes are too small to say anything, the first step is this part of the first segment. (The published algorithm says 1e-6 in the
# units at hand; a part of the segment does not depend on the unit of time.)
SMALLEST_PART = 1e-6


def write_start(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_start` and the functions that it calls."""
    w = Writer()
    layout, equations, over = plan.layout, plan.equations, plan.over(w)
    w.say("what depends on the inputs alone, once per member")
    places = {name: layout.first_input + k for k, name in enumerate(equations.inputs)}
    bare = Expressions(w, lambda name: w.load(L, places[name]), {})
    values = bare.values((*equations.starts, *plan.hoisted[: plan.plain_hoisted]))
    values += bare.values(plan.hoisted[plan.plain_hoisted :])  # after the others, whose bits they must not change
    for k, value in enumerate(values[layout.states :]):
        w.store(L, layout.first_hoisted + k, value)
        w.remember(L, layout.first_hoisted + k, value)
    for i, value in enumerate(values[: layout.states]):
        w.store(L, layout.first_state + i, value)
        w.remember(L, layout.first_state + i, value)
        w.store(L, layout.first_largest + i, w.size(value))
    w.say("first rates and first step")
    x, first = over.stored(L, layout.first_state), over.stored(L, layout.first_rate)
    time = head(w, Head.time)
    rates = over.rates(lambda: time, x, over.temporary(L, layout.first_rate))
    over.each(lambda i: first.put(i, rates.get(i)))
    w.store(L, Head.step, first_step(plan, w, x, rates))
    w.store(L, Head.log_error, constant(control.START_LOG_ERROR))
    finish_start(plan, w, x, rates)
    return function(w, "uq_start"), w.called


def first_step(plan: Plan, w: Writer, x: Column, rates: Column) -> str:
    """The first step length (Hairer, Norsett, Wanner, Solving ODEs I, 2nd ed., II.4, p. 169), at most the first segment, never 0.

    The published formula holds for a time counted in units in which the problem moves; here it is counted in the problem's own, so that
    the steps are the same in seconds and in years: in d0 / d1, the time in which the states move by their size, at most the segment.
    """
    layout, over = plan.layout, plan.over(w)
    time, until = head(w, Head.time), head(w, Head.until)
    left = w.minus(until, time)
    most_of_it = w.smaller(left, w.load(S, Setting.longest)) if plan.bounded else left
    d0, d1 = norm(plan, w, x.get, x), norm(plan, w, rates.get, x)
    little = w.either(w.compare("olt", d0, constant(1e-5)), w.compare("olt", w.times(d1, left), constant(1e-5)))
    h0 = w.select(little, w.times(left, constant(SMALLEST_PART)), w.over(w.times(constant(0.01), d0), d1))
    h0 = w.smaller(w.larger(h0, shortest_step(w, time)), most_of_it)
    own = w.select(little, left, w.smaller(w.over(d0, d1), left))
    euler = over.temporary(L, layout.first_spare)
    over.each(lambda i: euler.put(i, w.fma(h0, rates.get(i), x.get(i))))
    later = over.rates(lambda: w.plus(time, h0), euler, over.temporary(L, layout.first_spare + layout.states))
    d2 = w.over(norm(plan, w, lambda i: w.minus(later.get(i), rates.get(i)), x), h0)
    most = w.larger(w.times(d1, own), w.times(w.times(d2, own), own))
    # (0.01 / most)^(1/5) in logarithms; the exponent is one over the order of the pair
    power = w.times(control.write_log2(w, control.within(w, most, 1e-250, 1e250)), constant(-1.0 / plan.pair.order))
    h1 = w.times(own, control.write_exp2(w, w.plus(power, constant(log2(0.01) / plan.pair.order))))
    still = w.larger(w.times(left, constant(SMALLEST_PART)), w.times(h0, constant(1e-3)))
    h1 = w.select(w.compare("ole", most, constant(1e-15)), still, h1)
    step = w.smaller(w.larger(w.smaller(w.times(constant(100.0), h0), h1), shortest_step(w, time)), most_of_it)
    known = w.compare("ord", d2, d2)  # not a number: the trial step left the region where the rates are defined
    return w.select(known, step, h0)


def norm(plan: Plan, w: Writer, value: Callable[[Index], str], x: Column) -> str:
    """Root of the mean over the states of (value / tolerance at x)^2."""
    over = plan.over(w)
    accuracy = w.load(S, Setting.accuracy)
    absolute = over.stored(S, plan.layout.first_tolerance)

    def add(i: Index, total: str) -> str:
        ratio = w.over(value(i), w.fma(accuracy, w.size(x.get(i)), absolute.get(i)))
        return w.fma(ratio, ratio, total)

    return w.root(w.times(over.fold(V, ZERO, add), constant(1.0 / plan.layout.states)))


def finish_start(plan: Plan, w: Writer, x: Column, rates: Column) -> None:
    """Clear the counters and return the lanes that cannot start, with their status."""
    for slot in (Head.rejected, Head.steps, Head.rejections, Head.stale, Head.spoiled):
        w.store(L, slot, ZERO)
    if plan.stiff is not None:
        begin(plan, w)
    w.store(L, Head.alive, ONE)
    w.store(L, Head.step_from, head(w, Head.time))
    w.store(L, Head.step_taken, ONE)
    outside = outside_range(plan, w, x)
    poison = finite_part(plan.over(w), w, (x, rates))
    infinite = w.compare("uno", poison, poison)
    status = w.select(infinite, constant(float(FAILURES[1])), w.select(outside, constant(float(FAILURES[0])), ZERO))
    w.store(L, Head.status, status)
    w.plain(f"ret i64 {w.mask(w.either(outside, infinite))}")


def write_rates(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_rates` and the functions that it calls."""
    w = Writer()
    layout, over = plan.layout, plan.over(w)
    first = over.stored(L, layout.first_rate)
    time = head(w, Head.time)
    rates = over.rates(lambda: time, over.stored(L, layout.first_state), over.temporary(L, layout.first_spare))
    stale = w.compare("ogt", head(w, Head.stale), ZERO)
    over.each(lambda i: first.put(i, w.select(stale, rates.get(i), first.get(i))))
    w.store(L, Head.stale, ZERO)
    poison = finite_part(over, w, (rates,))
    infinite = w.both(stale, w.compare("uno", poison, poison))
    w.set_if(L, Head.status, infinite, constant(float(FAILURES[1])))
    w.plain(f"ret i64 {w.mask(infinite)}")
    return function(w, "uq_rates"), w.called
