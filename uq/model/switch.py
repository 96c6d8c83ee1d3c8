"""Writes the choice between explicit and stiff steps, which a member makes by what it alone has met.

An explicit step whose length stability sets and not accuracy has h |lambda| near the end of the stability region, where |lambda| of the
dominant eigenvalue is found from its last two stages, both at the end of the step: |k - k'| / |u - u'| (Hairer, Wanner, Solving ODEs II,
IV.2). After many such steps, not interrupted by others, the member goes on with stiff steps. It comes back where the explicit steps that
stability allows are not much shorter than the stiff ones, as much as these cost more: the spectral radius of J is found by the power
method, one multiplication in every step. Who comes back from stiff steps that cost more than explicit ones of the length before would have
needs longer to become stiff again.
"""

from __future__ import annotations

from uq.model.columns import Index, Memory
from uq.model.layout import Choice, Head, StiffColumn
from uq.model.linear import column, stiff_of
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan
from uq.model.stiff import cost_of
from uq.model.writer import ONE, ZERO, I, V, Writer, constant

# Where the stability region ends on the negative real axis, and h |lambda| from where on a step may be cut short by it (DOPRI5, DOP853).
REGION = {"explicit54": 3.3, "explicit853": 6.1}
SUSPECT = {"explicit54": 2.6, "explicit853": 4.6}
# Without suspicion only every so many steps are looked at.
EVERY = 4.0
# So many suspected steps make a member stiff; more of others than CALM in a row clear it.
NEEDED, CALM = 4.0, 6.0
# A new member is looked at in each of its first so many steps, and counts as suspected so often before: a short run must not spend half of
# itself on this.
WATCHED, FRESH = 16.0, 2.0
# A member whose stiff steps did not pay needs LONGER times as much suspicion the next time.
LONGER = 4.0
# A member stays stiff for SETTLE steps at least, and comes back after BACK in a row that explicit ones could do at PART of the cost.
SETTLE, BACK, PART = 3.0, 3.0, 0.7
# The squared length of a direction from where on it is one: far from what cannot be squared.
SMALLEST = 1e-200
# How much of all states every direction has.
KEPT_IN = 1e-3


def cost_ratio(plan: Plan) -> float:
    """How many explicit steps cost as much as a stiff one, by the operations of both."""
    equations, pair = plan.equations, plan.pair
    combinations = sum(1 for row in (*pair.a, *pair.e) for weight in row if weight)
    explicit = (pair.stages - 1) * cost_of(equations.rates) + (combinations + 45) * len(equations.states)
    return stiff_of(plan).cost(equations) / explicit


def slot(plan: Plan, which: Choice) -> int:
    """Where a number of the choice lies."""
    return plan.layout.first_choice + which


def begin(plan: Plan, w: Writer) -> None:
    """What a member begins with: no suspicion, and a direction."""
    first = {Choice.needed: NEEDED, Choice.suspicion: FRESH, Choice.calm: CALM - WATCHED}
    for which in Choice:
        w.store(L, slot(plan, which), constant(first.get(which, 0.0)))
    hint, direction = Memory(w, S, plan.layout.first_hint), Memory(w, L, plan.layout.first_direction)
    w.loop(plan.layout.states, lambda i: direction.put(i, hint.get(i)))


class Suspicion:
    """The part of an explicit step that finds out whether the member has become stiff."""

    def __init__(self, plan: Plan, w: Writer) -> None:
        self._plan, self._w = plan, w

    def due(self, accepted: str, count: str) -> str:
        """The lanes that look this time."""
        w, far = self._w, constant(1.5 * 2.0**52 * EVERY)
        rounded = w.minus(w.plus(count, far), far)
        suspected = w.compare("ogt", w.load(L, slot(self._plan, Choice.suspicion)), ZERO)
        return w.both(accepted, w.either(w.compare("oeq", rounded, count), suspected))

    def judge(self, due: str, stretch: str, distance: str, now: tuple[str, str]) -> str:
        """Note what the step says, from the sums of squares of k - k' and (u - u') / h; the lanes that become stiff, in their byte.

        now: the time after the step and its length, which are remembered in these.
        """
        w, plan = self._w, self._plan
        limit = SUSPECT[plan.pair.name]
        suspect = w.compare("ogt", stretch, w.times(constant(limit * limit), distance))
        before, calm = (w.load(L, slot(plan, which)) for which in (Choice.suspicion, Choice.calm))
        calm = w.select(suspect, ZERO, w.plus(calm, ONE))
        suspicion = w.select(suspect, w.plus(before, ONE), w.select(w.compare("oge", calm, constant(CALM)), ZERO, before))
        stiff = w.both(due, w.compare("oge", suspicion, w.load(L, slot(plan, Choice.needed))))
        w.set_if(L, slot(plan, Choice.calm), due, w.select(stiff, ZERO, calm))
        w.set_if(L, slot(plan, Choice.suspicion), due, w.select(stiff, ZERO, suspicion))
        for which, value in zip((Choice.stayed, Choice.since, Choice.before), (ZERO, *now), strict=True):
            w.set_if(L, slot(plan, which), stiff, value)
        return w.add(f"shl i64 {w.mask(stiff)}, 16")


class Return:
    """The part of a stiff step that finds out whether the member could go on explicitly."""

    def __init__(self, plan: Plan, w: Writer) -> None:
        self._plan, self._w = plan, w

    def write(self, accepted: str, proposed: str, time: str) -> str:
        """Turn the direction, note what the step to a time says; returns the lanes that go back, shifted to their byte."""
        w, plan = self._w, self._plan
        before, after = self._turn()
        # h rho, squared, without a root or a quotient: they would take a tenth of the step
        limit = (REGION[plan.pair.name] * max(1.0, PART * cost_ratio(plan))) ** 2
        easy = w.compare("olt", w.times(w.times(proposed, proposed), after), w.times(constant(limit), before))
        stayed, calm = (w.load(L, slot(plan, which)) for which in (Choice.stayed, Choice.calm))
        stayed = w.plus(stayed, ONE)
        calm = w.select(easy, w.plus(calm, ONE), ZERO)
        enough = w.both(w.compare("oge", calm, constant(BACK)), w.compare("oge", stayed, constant(SETTLE)))
        back = w.both(accepted, enough)
        w.set_if(L, slot(plan, Choice.stayed), accepted, stayed)
        w.set_if(L, slot(plan, Choice.calm), accepted, w.select(back, ZERO, calm))
        w.branch(w.any(back), "back", "stay")
        needed = w.load(L, slot(plan, Choice.needed))
        since, length = (w.load(L, slot(plan, which)) for which in (Choice.since, Choice.before))
        cost = w.times(w.times(stayed, constant(cost_ratio(plan))), length)
        paid = w.compare("ogt", w.minus(time, since), cost)
        w.set_if(L, slot(plan, Choice.needed), back, w.select(paid, constant(NEEDED), w.times(needed, constant(LONGER))))
        allowed = w.times(constant(0.9 * REGION[plan.pair.name]), w.root(w.over(before, after)))
        w.store(L, Head.step, w.select(back, w.smaller(allowed, proposed), proposed))
        w.join("stay")
        return w.add(f"shl i64 {w.mask(back)}, 16")

    def _turn(self) -> tuple[str, str]:
        """The squares of the length of the direction, and of what J made of it, which becomes the next direction if it is one."""
        w, plan = self._w, self._plan
        turned, weight = column(plan, w, StiffColumn.turned), Memory(w, S, plan.layout.first_weight)
        direction = Memory(w, L, plan.layout.first_direction)

        def square(value: str, i: Index, total: str) -> str:
            ratio = w.times(value, weight.get(i))
            return w.fma(ratio, ratio, total)

        before = w.loop_carrying(plan.layout.states, V, ZERO, lambda i, total: square(direction.get(i), i, total))
        after = w.loop_carrying(plan.layout.states, V, ZERO, lambda i, total: square(turned.get(i), i, total))
        known = w.both(w.compare("ogt", after, constant(SMALLEST)), w.compare("olt", after, constant(1.0 / SMALLEST)))
        shrink = half_power(w, after)
        # a little of all states is kept in: else what is not dominant now would fade to nothing, and never be seen to grow
        hint, little = Memory(w, S, plan.layout.first_hint), constant(KEPT_IN)

        def turn(i: Index) -> None:
            next_ = w.fma(turned.get(i), shrink, w.times(little, hint.get(i)))
            direction.put(i, w.select(known, next_, direction.get(i)))

        w.loop(plan.layout.states, turn)
        return before, w.select(known, after, ZERO)


def half_power(w: Writer, x: str) -> str:
    """A power of two that is about x^-1/2, from the exponent of a positive normal number."""
    exponent = w.add(f"lshr {I} {w.add(f'bitcast {V} {x} to {I}')}, splat (i64 52)")
    half = w.add(f"lshr {I} {w.add(f'sub {I} splat (i64 {3 * 1023}), {exponent}')}, splat (i64 1)")
    return w.add(f"bitcast {I} {w.add(f'shl {I} {half}, splat (i64 52)')} to {V}")
