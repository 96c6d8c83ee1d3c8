"""Writes `@uq_step`: one attempt of a step in all eight lanes, its error, the decision, and what the caller must attend to.

Outputs that are due are written at once. Returns two bytes of lanes: arrived at the end of the segment (lowest), failed.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from math import log2

from uq.model import control
from uq.model.columns import Column, Index
from uq.model.layout import FAILURES, Head, Setting
from uq.model.pair import Weights
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, alive, finite_part, function, head, outside_range, shortest_step
from uq.model.writer import ONE, ZERO, M, V, Writer, constant

# The last step may be this much longer than proposed, so that no tiny one is left (DOPRI5 does the same).
STRETCH = 1.01
# A state runs away if it would double within this many shortest steps: at an accuracy of 1e-14 a step is 1/600 of the distance to a pole.
RUNAWAY_STEPS = 1e4
HUGE = 1e150
FAR = 1e6  # times its scale
# An attempt that was not finite is remembered over this many halvings, one for every accepted step.
SPOILED = 2.0**-10
OUT_OF_RANGE, NOT_FINITE, BLEW_UP, TOO_MANY_STEPS, STEP_TOO_SMALL = (constant(float(code)) for code in FAILURES)


def write_step(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_step` and the functions that it calls."""
    w = Writer()
    step = Step(plan, w)
    w.say("length of the attempt: proposed, stretched or halved towards the end of the segment")
    step.length()
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
    return function(w, "uq_step", "#1"), w.called


class Step:
    """The parts of the step, in the order in which they are written."""

    def __init__(self, plan: Plan, w: Writer) -> None:
        self.plan, self.w, self.over = plan, w, plan.over(w)
        layout = plan.layout
        self.x = self.over.stored(L, layout.first_state)
        self.k: list[Column] = [self.over.stored(L, layout.first_rate)]
        self.new = self.over.temporary(L, layout.first_spare)

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

    def combination(self, weights: Weights, i: Index, stages: Sequence[Column]) -> str:
        """Sum of weights times stages of one state, in the order of the stages."""
        terms = [(float(b), stages[j].get(i)) for j, b in enumerate(weights) if b]
        total = self.w.times(constant(terms[0][0]), terms[0][1])
        for factor, stage in terms[1:]:
            total = self.w.fma(constant(factor), stage, total)
        return total

    def stages(self) -> None:
        """All stages after the first; the last one is the new state's rate."""
        pair = self.plan.pair
        for weights, node in zip(pair.a[1:], pair.c[1:], strict=True):
            self.k.append(self.stage(weights, float(node), self.new, self.k))

    def stage(self, weights: Weights, node: float, place: Column, before: Sequence[Column]) -> Column:
        """The stage after those `before`; its states are left in `place`."""
        layout = self.plan.layout
        self.over.each(lambda i: place.put(i, self.w.fma(self.h, self.combination(weights, i, before), self.x.get(i))))
        return self.over.rates(self.time_at(node), place, self.over.temporary(L, layout.first_spare + len(before) * layout.states))

    def time_at(self, node: float) -> Callable[[], str]:
        """The time of a stage, written when it is asked for."""
        return lambda: self.time_new if node == 1.0 else self.w.fma(constant(node), self.h, self.time)

    def error(self) -> None:
        """Mean over the states of (error / (absolute + relative tolerance))^2; not a number if anything new is not finite.

        Of two estimates s0, s1 (sums over n states) the squared error is s0^2 / (s0 + 0.01 s1) / n (Hairer, Norsett, Wanner I, II.10).
        """
        w = self.w
        first, *others = [self.sum_of_squares(e) for e in self.plan.pair.e]
        for second in others:
            both = w.fma(constant(0.01), second, first)
            ratio = w.select(w.compare("oeq", both, ZERO), ZERO, w.over(first, both))
            first = w.times(first, ratio)
        # an infinite state has an infinite tolerance: the error alone would not show it
        poison = finite_part(self.over, w, (self.new, self.k[-1]))
        self.squared = w.fma(first, constant(1.0 / self.plan.layout.states), poison)

    def sum_of_squares(self, weights: Weights) -> str:
        """Sum over the states of (error / tolerance)^2 for one estimate."""
        w, layout = self.w, self.plan.layout
        accuracy = w.load(S, Setting.accuracy)
        absolute = self.over.stored(S, layout.first_tolerance)

        def add(i: Index, total: str) -> str:
            size = w.larger(w.size(self.x.get(i)), w.size(self.new.get(i)))
            tolerance = w.fma(accuracy, size, absolute.get(i))
            ratio = w.over(w.times(self.h, self.combination(weights, i, self.k)), tolerance)
            return w.fma(ratio, ratio, total)

        return self.over.fold(V, ZERO, add)

    def decide(self) -> None:
        """Acceptance and the next proposal (see `control`)."""
        w, given = self.w, self.plan.pair.control
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
            now, rate_now = (w.select(self.accepted, a.get(i), b.get(i)) for a, b in ((self.new, self.x), (self.k[-1], self.k[0])))
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
        w.plain(f"ret i64 {w.add(f'or i64 {late}, {shifted}')}")

    def observe(self, any_due: str, due: str, strict: str) -> str:
        """Write the outputs that are due; the lanes in which a state was outside of its valid range at one of them."""
        w, before = self.w, self.w.block
        w.branch(any_due, "observe", "judge")
        strayed = w.add(f"call i64 @uq_observe(ptr {L}, ptr {S}, i64 {w.mask(due)}, i64 {strict})")
        inside = w.block
        w.join("judge")
        return w.lanes_of(w.add(f"phi i64 [ 0, %{before} ], [ {strayed}, %{inside} ]"))

    def curve(self) -> None:
        """The coefficients of the continuous extension of this step (see `Pair`)."""
        w, layout, pair = self.w, self.plan.layout, self.plan.pair
        place = self.over.temporary(L, layout.first_spare + pair.all_stages * layout.states)
        k = list(self.k)
        for weights, node in zip(pair.extra, pair.extra_c, strict=True):
            k.append(self.stage(weights, float(node), place, k))
        parts = [self.over.stored(L, layout.first_curve + part * layout.states) for part in range(layout.curve_parts)]

        def write(i: Index) -> None:
            x = self.x.get(i)
            difference = w.minus(self.new.get(i), x)
            third = w.fma(self.h, self.k[0].get(i), w.negative(difference))
            fourth = w.minus(w.fma(w.negative(self.h), self.k[-1].get(i), difference), third)
            rest = [w.times(self.h, self.combination(d, i, k)) for d in pair.d]
            for part, value in zip(parts, (x, difference, third, fourth, *rest), strict=True):
                part.put(i, value)

        self.over.each(write)

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
