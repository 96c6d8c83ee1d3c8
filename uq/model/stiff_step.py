"""Writes `@uq_stiff`: one attempt of a step of the Rosenbrock method in all eight lanes, as `@uq_step` is one of an explicit pair.

Columns lie in memory and each part is a loop over the states; rates, Jacobian, factors and solutions are functions of their own. Rates at
the new states are worked out before the step is accepted, so that a member never stands where it has none, and may go on explicitly.
"""

from __future__ import annotations

from functools import partial

from uq.model.attempt import Attempt
from uq.model.columns import Column, Index, Looped, Memory
from uq.model.layout import Setting, StiffColumn
from uq.model.linear import column, stiff_of
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, finite_part, function
from uq.model.rosenbrock import Row
from uq.model.switch import Return
from uq.model.writer import ONE, ZERO, V, Writer, constant

# The squared error of a step whose equations could not be solved well enough: it is refused, and the next one is a fifth of it.
UNSOLVED = 1e20


def write_stiff(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_stiff` and the functions that it calls."""
    w = Writer()
    step = StiffStep(plan, w)
    w.say("length of the attempt: proposed, stretched or halved towards the end of the segment")
    step.length()
    w.say("Jacobian and factors")
    step.factors()
    w.say("stages")
    step.stages()
    w.say("error in units of the tolerance, squared, averaged over the states")
    step.error()
    w.say("accepted or refused, and the next length")
    step.decide()
    w.say("what the lane is now")
    step.commit()
    w.say("who needs attention")
    step.attention()
    return function(w, "uq_stiff", "#1"), w.called


class StiffStep(Attempt):
    """The parts of the step, in the order in which they are written."""

    def __init__(self, plan: Plan, w: Writer) -> None:
        method = stiff_of(plan).method
        super().__init__(plan, w, Looped(w, plan.layout.states, lambda time, state: []), method.control)
        self.method, self.bad = method, "0"
        self.new = self.column(StiffColumn.new)
        self.rate_new = self.column(StiffColumn.stage_rate)
        self.k = [self.column(StiffColumn.first_stage + i) for i in range(method.stages)]

    def column(self, which: int) -> Memory:
        """A column of the step."""
        return column(self.plan, self.w, which)

    def factors(self) -> None:
        """1 / h, 1 / (gamma h), the Jacobian and the factors of W; the lanes whose solutions must be refined."""
        w = self.w
        self.per_step = w.over(ONE, self.h)
        self.scale = w.times(constant(1.0 / self.method.gamma), self.per_step)
        w.plain(f"call void @uq_linear(ptr {L}, ptr {S}, {V} {self.time})")
        self.grown = w.add(f"call i64 @uq_factor(ptr {L}, {V} {self.scale})")
        self.refining = w.add(f"icmp ne i64 {self.grown}, 0")

    def stages(self) -> None:
        """All stages, the new states, and the rates there."""
        method, coupled, rate = self.method, self.column(StiffColumn.coupled), self.column(StiffColumn.stage_rate)
        drifting = bool(stiff_of(self.plan).jacobian.drift)
        if drifting:
            self.over.each(lambda i: coupled.put(i, self.drift(0, i)))
        first = coupled if drifting else self.column(StiffColumn.zero)
        self.solve(Memory(self.w, L, self.plan.layout.first_rate), first, 0)
        for stage in range(1, method.stages):
            self.over.each(partial(self.prepare, stage, coupled))
            self.over.rates(self.time_at(method.c[stage]), self.new, rate)
            self.solve(rate, coupled, stage)
        last = self.k[-1]
        self.over.each(lambda i: self.new.put(i, self.w.plus(self.new.get(i), last.get(i))))
        self.over.rates(self.time_at(1.0), self.new, rate)

    def drift(self, stage: int, i: Index) -> str:
        """h d_i f_t."""
        return self.w.times(self.w.times(constant(self.method.d[stage]), self.h), self.column(StiffColumn.drift).get(i))

    def prepare(self, stage: int, coupled: Memory, i: Index) -> None:
        """Where the rates of a stage are asked for, and what is added to them."""
        w, method = self.w, self.method
        weights, before = method.a[stage], method.a[stage - 1]
        if weights == (*before, 1.0):
            self.new.put(i, w.plus(self.new.get(i), self.k[stage - 1].get(i)))
        else:
            self.new.put(i, w.plus(self.x.get(i), self.combination(weights, i)))
        total = w.times(self.per_step, self.combination(method.coupling[stage], i))
        if stiff_of(self.plan).jacobian.drift and method.d[stage]:
            total = w.plus(total, self.drift(stage, i))
        coupled.put(i, total)

    def combination(self, weights: Row, i: Index) -> str:
        """Sum of weights times stages of one state."""
        total = self.w.times(constant(weights[0]), self.k[0].get(i))
        for weight, stage in zip(weights[1:], self.k[1:], strict=False):
            total = self.w.fma(constant(weight), stage.get(i), total)
        return total

    def solve(self, rate: Memory, coupled: Memory, stage: int) -> None:
        """k of a stage, refined where the factors have grown."""
        w = self.w
        given = f"ptr {rate.address()}, ptr {coupled.address()}"
        to = self.k[stage].address()
        w.plain(f"call void @uq_lines(ptr {L}, {given}, ptr {to})")
        before = w.block
        w.branch(self.refining, f"refine{stage}", f"stage{stage}")
        bad = w.add(f"call i64 @uq_refine(ptr {L}, {V} {self.scale}, {given}, ptr {to}, i64 {self.grown})")
        w.join(f"stage{stage}")
        found = w.add(f"phi i64 [ 0, %{before} ], [ {bad}, %refine{stage} ]")
        self.bad = w.add(f"or i64 {self.bad}, {found}")

    def error(self) -> None:
        """Mean over the states of (error / (absolute + relative tolerance))^2; not a number if anything new is not finite."""
        w, layout, last = self.w, self.plan.layout, self.k[-1]
        accuracy, absolute = w.load(S, Setting.accuracy), self.over.stored(S, layout.first_tolerance)

        def add(i: Index, total: str) -> str:
            size = w.larger(w.size(self.x.get(i)), w.size(self.new.get(i)))
            ratio = w.over(last.get(i), w.fma(accuracy, size, absolute.get(i)))
            return w.fma(ratio, ratio, total)

        total = self.over.fold(V, ZERO, add)
        poison = finite_part(self.over, w, (self.new, self.rate_new))
        squared = w.fma(total, constant(1.0 / layout.states), poison)
        self.squared = w.select(w.lanes_of(self.bad), constant(UNSOLVED), squared)

    def commit(self) -> None:
        """As of every attempt; stiff steps are counted."""
        super().commit()
        w, slot = self.w, self.plan.layout.stiff_steps
        w.store(L, slot, w.plus(w.load(L, slot), w.select(self.accepted, ONE, ZERO)))

    def wishes(self) -> str | None:
        """The lanes that would rather go on explicitly, shifted to their byte."""
        return Return(self.plan, self.w).write(self.accepted, self.next, self.time_new) if self.plan.switching else None

    def curve(self) -> None:
        """The coefficients of the extension in the form of an explicit pair's (see `uq.model.pair`): x, D, m1, m2 + m3, -m3.

        For th (m2 + th m3) = th ((m2 + m3) - (1 - th) m3).
        """
        w, layout = self.w, self.plan.layout
        parts: list[Column] = [self.over.stored(L, layout.first_curve + part * layout.states) for part in range(layout.curve_parts)]

        def write(i: Index) -> None:
            x = self.x.get(i)
            first, second, third = (self.combination(row, i) for row in self.method.extension)
            values = [x, w.minus(self.new.get(i), x), first, w.plus(second, third), w.negative(third)]
            for part, value in zip(parts, [*values, *[ZERO] * (len(parts) - len(values))], strict=True):
                part.put(i, value)

        self.over.each(write)
