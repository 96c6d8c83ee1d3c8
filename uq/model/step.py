"""Writes `@uq_step`: one attempt of a step of an explicit pair in all eight lanes, its error, the decision, and what the caller must do.

Outputs that are due are written at once. Returns three bytes of lanes: arrived at the end of the segment (lowest), failed, become stiff.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence

from uq.model.attempt import Attempt
from uq.model.columns import Column, Index
from uq.model.layout import Setting
from uq.model.pair import Weights
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, finite_part, function
from uq.model.switch import Suspicion
from uq.model.writer import ZERO, V, Writer, constant


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


class Step(Attempt):
    """The parts of the step, in the order in which they are written."""

    def __init__(self, plan: Plan, w: Writer) -> None:
        super().__init__(plan, w, plan.over(w), plan.pair.control)
        self.k: list[Column] = [self.rate]

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
        self.rate_new = self.k[-1]

    def stage(self, weights: Weights, node: float, place: Column, before: Sequence[Column]) -> Column:
        """The stage after those `before`; its states are left in `place`."""
        layout = self.plan.layout
        self.over.each(lambda i: place.put(i, self.w.fma(self.h, self.combination(weights, i, before), self.x.get(i))))
        return self.over.rates(self.time_at(node), place, self.over.temporary(L, layout.first_spare + len(before) * layout.states))

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

    def wishes(self) -> str | None:
        """The lanes that have become stiff (see `switch`); both last stages are at the end of the step."""
        w, pair = self.w, self.plan.pair
        if not self.plan.switching:
            return None
        suspicion, before = Suspicion(self.plan, w), w.block
        due = suspicion.due(self.accepted, self.count)
        w.branch(w.any(due), "suspect", "judged")
        last = pair.padded(pair.a[-1])
        apart = tuple(b - a for b, a in zip(last, pair.padded(pair.a[-2]), strict=True))
        stretch = self.weighed(lambda i: w.minus(self.k[-1].get(i), self.k[-2].get(i)))
        distance = self.weighed(lambda i: self.combination(apart, i, self.k))
        mask = suspicion.judge(due, stretch, distance, (self.time_new, self.h))
        inside = w.block
        w.join("judged")
        return w.add(f"phi i64 [ 0, %{before} ], [ {mask}, %{inside} ]")

    def weighed(self, value: Callable[[Index], str]) -> str:
        """Sum over the states of (value / absolute tolerance)^2."""
        w, weights = self.w, self.over.stored(S, self.plan.layout.first_weight)

        def add(i: Index, total: str) -> str:
            ratio = w.times(value(i), weights.get(i))
            return w.fma(ratio, ratio, total)

        return self.over.fold(V, ZERO, add)
