"""Writes what every attempt of a step has, whatever the method: its length, the decision, and what the caller must attend to."""

from __future__ import annotations

from collections.abc import Callable
from math import log2

from uq.model import control
from uq.model.columns import Column, Index, Looped, WrittenOut
from uq.model.layout import FAILURES, Head, Setting
from uq.model.pair import Control
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, alive, head, outside_range, shortest_step
from uq.model.writer import ONE, ZERO, M, Writer, constant

# The last step may be this much longer than proposed, so that no tiny one is left (DOPRI5 does the same).
STRETCH = 1.01
# A state runs away if it would double within this many shortest steps: at an accuracy of 1e-14 a step is 1/600 of the distance to a pole.
RUNAWAY_STEPS = 1e4
HUGE = 1e150
FAR = 1e6  # times its scale
# An attempt that was not finite is remembered over this many halvings, one for every accepted step.
SPOILED = 2.0**-10
OUT_OF_RANGE, NOT_FINITE, BLEW_UP, TOO_MANY_STEPS, STEP_TOO_SMALL = (constant(float(code)) for code in FAILURES)


class Attempt:
    """The parts that do not depend on the method, in the order in which they are written.

    A method adds the new states (`new`), the first and the last rates (`rate`, `rate_new`), the squared error (`squared`) and the curve.
    """

    def __init__(self, plan: Plan, w: Writer, over: WrittenOut | Looped, given: Control) -> None:
        self.plan, self.w, self.over, self.control = plan, w, over, given
        layout = plan.layout
        self.x = self.over.stored(L, layout.first_state)
        self.rate: Column = self.over.stored(L, layout.first_rate)
        self.rate_new = self.rate
        self.new = self.over.temporary(L, layout.first_spare)
        self.squared = ZERO

    def wishes(self) -> str | None:
        """The lanes that would rather go on by the other method, shifted to the third byte; None where there is no other."""
        return None

    def curve(self) -> None:
        """The coefficients of the continuous extension of this step."""
        raise NotImplementedError

    def length(self) -> None:
        """h, whether it reaches the end of the segment, and the time after it; h is the difference of both times, as they are rounded."""
        w = self.w
        self.time, self.proposed, until = head(w, Head.time), head(w, Head.step), head(w, Head.until)
        left = w.minus(until, self.time)
        self.last = w.compare("oge", w.times(self.proposed, constant(STRETCH)), left)
        close = w.compare("oge", w.plus(self.proposed, self.proposed), left)
        wanted = w.select(close, w.times(left, constant(0.5)), self.proposed)
        self.time_new = w.select(self.last, until, w.plus(self.time, wanted))
        self.h = w.minus(self.time_new, self.time)

    def time_at(self, node: float) -> Callable[[], str]:
        """The time of a stage, written when it is asked for."""
        return lambda: self.time_new if node == 1.0 else self.w.fma(constant(node), self.h, self.time)

    def decide(self) -> None:
        """Acceptance and the next proposal (see `control`)."""
        w, given = self.w, self.control
        self.accepted = w.both(alive(w), w.compare("ole", self.squared, ONE))
        log_error = control.write_log2(w, control.within(w, self.squared, 1e-30, 1e30))
        old = w.fma(head(w, Head.log_error), constant(given.beta / 2), constant(control.LOG_SAFETY))
        rest = w.select(self.accepted, old, constant(control.LOG_SAFETY))
        wanted = w.fma(log_error, constant(-given.alpha / 2), rest)
        was_rejected = w.compare("ogt", head(w, Head.rejected), ZERO)
        most = w.select(w.either(was_rejected, w.opposite(self.accepted)), ZERO, constant(log2(given.most)))
        factor = control.write_exp2(w, w.larger(w.smaller(wanted, most), constant(log2(given.least))))
        next_step = w.times(self.h, factor)
        # a step cut short by the end of the segment says nothing against the length proposed before
        longer = w.both(self.accepted, w.both(w.compare("oge", factor, ONE), w.compare("ogt", self.proposed, next_step)))
        self.next = w.select(longer, self.proposed, next_step)
        if self.plan.bounded:
            self.next = w.smaller(self.next, w.load(S, Setting.longest))
        self.log_error = w.larger(log_error, constant(control.START_LOG_ERROR))

    def commit(self) -> None:
        """Accepted lanes move on; all count. The curve of the step must be written first: it needs the old state and rate."""
        w, yes = self.w, self.accepted
        self.refused = w.both(alive(w), w.opposite(yes))
        w.set_if(L, Head.time, yes, self.time_new)
        w.set_if(L, Head.step_from, yes, self.time)
        w.set_if(L, Head.step_taken, yes, self.h)
        w.set_if(L, Head.log_error, yes, self.log_error)
        w.store(L, Head.step, self.next)
        w.store(L, Head.rejected, w.select(self.refused, ONE, ZERO))
        spoiled = head(w, Head.spoiled)
        kept = w.select(yes, w.times(spoiled, constant(0.5)), spoiled)
        self.spoiled = w.select(w.compare("olt", self.squared, constant(float("inf"))), kept, ONE)
        w.store(L, Head.spoiled, self.spoiled)
        self.count = w.plus(head(w, Head.steps), w.select(yes, ONE, ZERO))
        self.refusals = w.plus(head(w, Head.rejections), w.select(self.refused, ONE, ZERO))
        w.store(L, Head.steps, self.count)
        w.store(L, Head.rejections, self.refusals)

    def commit_states(self) -> None:
        """The states, rates and largest sizes of accepted lanes."""
        w, layout = self.w, self.plan.layout
        state, rate = self.over.stored(L, layout.first_state), self.over.stored(L, layout.first_rate)
        largest = self.over.stored(L, layout.first_largest)
        self.now, self.rate_now = self.over.temporary(L, layout.first_state), self.over.temporary(L, layout.first_rate)

        def move(i: Index) -> None:
            now, rate_now = (w.select(self.accepted, a.get(i), b.get(i)) for a, b in ((self.new, self.x), (self.rate_new, self.rate)))
            state.put(i, now)
            rate.put(i, rate_now)
            self.now.put(i, now)
            self.rate_now.put(i, rate_now)
            largest.put(i, w.larger(largest.get(i), w.size(now)))

        self.over.each(move)

    def attention(self) -> None:
        """Outputs due, lanes arrived, lanes failed; the curve and the status are only written where some lane needs them."""
        w = self.w
        arrived = w.both(self.accepted, self.last)
        shortest = shortest_step(w, self.time)
        tiny = w.compare("olt", self.next, shortest)
        many = w.compare("oge", w.plus(self.count, self.refusals), w.load(S, Setting.attempts))
        stuck = w.both(w.both(alive(w), w.opposite(arrived)), w.either(tiny, many))
        outside = w.both(self.accepted, outside_range(self.plan, w, self.new))
        failed = w.either(stuck, outside)
        at = head(w, Head.due)
        before, reached = w.compare("olt", at, self.time_new), w.compare("ole", at, self.time_new)
        due = w.both(self.accepted, w.select_truth(w.either(arrived, failed), before, reached))
        late, judged = w.mask(arrived), w.mask(failed)
        wishes = self.wishes()
        any_due = w.any(due)
        w.branch(any_due, "curve", "move")
        self.curve()
        w.join("move")
        self.commit_states()
        outside = w.either(outside, self.observe(any_due, due, w.add(f"or i64 {late}, {judged}")))
        failed = w.either(stuck, outside)
        ended = w.mask(failed)
        w.branch(w.any(failed), "failure", "done")
        self.failure(outside, tiny, shortest)
        w.join("done")
        shifted = w.add(f"shl i64 {ended}, 8")
        told = w.add(f"or i64 {late}, {shifted}")
        w.plain(f"ret i64 {told if wishes is None else w.add(f'or i64 {told}, {wishes}')}")

    def observe(self, any_due: str, due: str, strict: str) -> str:
        """Write the outputs that are due; the lanes in which a state was outside of its valid range at one of them."""
        w, before = self.w, self.w.block
        w.branch(any_due, "observe", "judge")
        strayed = w.add(f"call i64 @uq_observe(ptr {L}, ptr {S}, i64 {w.mask(due)}, i64 {strict})")
        inside = w.block
        w.join("judge")
        return w.lanes_of(w.add(f"phi i64 [ 0, %{before} ], [ {strayed}, %{inside} ]"))

    def failure(self, outside: str, tiny: str, shortest: str) -> None:
        """Why a lane failed."""
        w = self.w
        spoiled = w.compare("ogt", self.spoiled, constant(SPOILED))
        stuck = w.select(spoiled, NOT_FINITE, STEP_TOO_SMALL)
        stuck = w.select(self.runs_away(shortest), BLEW_UP, stuck)
        w.store(L, Head.status, w.select(outside, OUT_OF_RANGE, w.select(tiny, stuck, TOO_MANY_STEPS)))

    def runs_away(self, shortest: str) -> str:
        """Whether a state grows in size and would at this rate double within a few shortest steps, or is near the largest number.

        Near a pole at T a state like (T - t)^-p has |x| / |x'| = (T - t) / p, and the step is a fixed part of T - t. Where a rate stops
        being a number on the way (the sine of something vast), a state far above its scale that would double in a moment counts as well.
        """
        w = self.w
        soon = w.times(shortest, constant(RUNAWAY_STEPS))
        moment, accuracy = w.load(S, Setting.moment), w.load(S, Setting.accuracy)
        absolute = self.over.stored(S, self.plan.layout.first_tolerance)

        def check(i: Index, found: str) -> str:
            x, rate = self.now.get(i), self.rate_now.get(i)
            growing = w.compare("ogt", w.times(x, rate), ZERO)
            quick = w.compare("ole", w.size(x), w.times(soon, w.size(rate)))
            huge = w.compare("ogt", w.size(x), constant(HUGE))
            far = w.compare("ogt", w.times(accuracy, w.size(x)), w.times(absolute.get(i), constant(FAR)))
            sudden = w.both(far, w.compare("ole", w.size(x), w.times(moment, w.size(rate))))
            return w.either(found, w.both(growing, w.either(w.either(quick, huge), sudden)))

        return self.over.fold(M, "zeroinitializer", check)
