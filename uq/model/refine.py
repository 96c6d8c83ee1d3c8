"""Writes `@uq_refine`: one step of iterative refinement of a stage, and what is left of it.

With k from L U k = b, the residual r = b - W k and L U e = r, k + e is nearly free of what rounding did to the factors (Higham, Accuracy
and Stability of Numerical Algorithms, chapter 12). What remains is judged in each row by |W| times the tolerances, times the largest |k| in
units of its tolerance: the residual that an error of so many parts of k would leave.
"""

from __future__ import annotations

from uq.model.columns import Index, Memory
from uq.model.layout import StiffColumn
from uq.model.linear import column
from uq.model.points import LANES_POINTER as L
from uq.model.points import Plan
from uq.model.writer import ZERO, V, Writer, constant

# Where more of a residual is left than this part, the step is refused.
LARGEST_RESIDUAL = 1e-10


def write_refine(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_refine`: improves k in the lanes of %grown; returns those of them in which the residual stays too large."""
    w, states = Writer(), plan.layout.states
    k, delta, residual = Memory(w, "%k", 0), column(plan, w, StiffColumn.correction), column(plan, w, StiffColumn.residual)
    tolerance, size, zero = (column(plan, w, each) for each in (StiffColumn.tolerance, StiffColumn.size, StiffColumn.zero))
    grown = w.lanes_of("%grown")
    _residual(plan, w)
    w.plain(f"call void @uq_lines(ptr {L}, ptr {residual.address()}, ptr {zero.address()}, ptr {delta.address()})")

    def improve(i: Index, largest: str) -> str:
        before = k.get(i)
        k.put(i, w.select(grown, w.plus(before, delta.get(i)), before))
        return w.larger(w.over(w.size(k.get(i)), tolerance.get(i)), largest)

    largest = w.times(constant(LARGEST_RESIDUAL), w.loop_carrying(states, V, ZERO, improve))
    _residual(plan, w)

    def judge(i: Index, worst: str) -> str:
        bound = w.times(w.fma("%scale", tolerance.get(i), size.get(i)), largest)
        return w.select(w.compare("ole", w.size(residual.get(i)), bound), worst, constant(1.0))

    bad = w.compare("ogt", w.loop_carrying(states, V, ZERO, judge), ZERO)
    w.plain(f"ret i64 {w.mask(w.both(grown, bad))}")
    head = f"define internal i64 @uq_refine(ptr {L}, {V} %scale, ptr readonly %from, ptr readonly %plus, ptr %k, i64 %grown) #0 {{"
    return "\n".join([head, "entry:", *w.lines, "}", ""]), w.called


def _residual(plan: Plan, w: Writer) -> None:
    """r = from + plus - k / (gamma h) + J k."""
    residual, k = column(plan, w, StiffColumn.residual), Memory(w, "%k", 0)
    given, plus = Memory(w, "%from", 0), Memory(w, "%plus", 0)
    entries = Memory(w, L, plan.layout.first_jacobian).address()
    w.plain(f"call void @uq_times_jacobian(ptr {entries}, ptr %k, ptr {residual.address()})")

    def once(i: Index) -> None:
        without = w.fma(w.negative("%scale"), k.get(i), w.plus(given.get(i), plus.get(i)))
        residual.put(i, w.plus(without, residual.get(i)))

    w.loop(plan.layout.states, once)
