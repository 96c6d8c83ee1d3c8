"""Writes what stiff steps do with the Jacobian, entry by entry: `@uq_linear`, `@uq_factor`, `@uq_lines`.

W = I / (gamma h) - J = L U with the pivots of the diagonal, in an order found beforehand. What its rounding may have done is bounded by
|L| |U| beside |W|, both times the tolerances of the states, row by row (Higham, Accuracy and Stability of Numerical Algorithms, 9.3): where
the first is above GROWTH times the second, solutions are refined (see `refine`).
"""

from __future__ import annotations

from collections.abc import Callable

from uq.model.columns import Memory
from uq.model.layout import Setting, StiffColumn
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, alive, within_segment
from uq.model.sparse import Elimination
from uq.model.stiff import Stiff
from uq.model.writer import ZERO, V, Writer, constant

# Errors of a solution are about this many roundings of its own scale where the growth is at its bound: far below any tolerance.
GROWTH = 1e4
# Where entries of the Jacobian are not finite (a root at 0), they count as 0 and the sizes of their rows as this.
VAST = 1e300
NO_TOLERANCE = 1e100
Place = tuple[int, int]
PRODUCT = "ptr readonly %values, ptr readonly %from, ptr %to"


def stiff_of(plan: Plan) -> Stiff:
    """What stiff steps work with; only asked where there are any."""
    if plan.stiff is None:
        raise TypeError("no stiff steps are planned")
    return plan.stiff


def column(plan: Plan, w: Writer, which: int, pointer: str = L) -> Memory:
    """A column of a stiff step."""
    return Memory(w, pointer, plan.layout.stiff(which))


def write_linear(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_linear`: tolerances, Jacobian, drift at the start of a step; sizes of its rows, and J times the direction."""
    w, layout, stiff = Writer(), plan.layout, stiff_of(plan)
    jacobian, states = stiff.jacobian, plan.layout.states
    x, absolute = Memory(w, L, layout.first_state), Memory(w, S, layout.first_tolerance)
    accuracy, tolerance = w.load(S, Setting.accuracy), column(plan, w, StiffColumn.tolerance)

    def tolerate(i: int | str) -> None:
        # while the pilot looks for scales, a state without one has no tolerance: a vast one, so that sums of parts of it stay finite
        tolerance.put(i, w.smaller(w.fma(accuracy, w.size(x.get(i)), absolute.get(i)), constant(NO_TOLERANCE)))

    w.loop(states, tolerate)
    point = within_segment(plan, w, lambda: "%time", lambda i: w.load(L, layout.first_state + i))
    values = point.values(jacobian.nodes)
    for k, value in enumerate(values[: len(jacobian.values)]):
        w.store(L, layout.first_jacobian + k, value)
    drift = column(plan, w, StiffColumn.drift)
    for (i, _), value in zip(jacobian.drift, values[len(jacobian.values) :], strict=True):
        drift.put(i, value)
    pointers = [column(plan, w, each).address() for each in (StiffColumn.tolerance, StiffColumn.size, StiffColumn.turned)]
    direction, entries = Memory(w, L, layout.first_direction).address(), Memory(w, L, layout.first_jacobian).address()
    w.plain(f"call void @uq_row_sizes(ptr {entries}, ptr {pointers[0]}, ptr {pointers[1]})")
    w.plain(f"call void @uq_times_jacobian(ptr {entries}, ptr {direction}, ptr {pointers[2]})")
    size = column(plan, w, StiffColumn.size)
    poison = w.loop_carrying(states, V, ZERO, lambda i, total: w.fma(size.get(i), ZERO, total))
    w.branch(w.any(w.both(alive(w), w.compare("uno", poison, poison))), "cleanse", "done")
    _cleanse(plan, w)
    w.join("done")
    w.plain("ret void")
    text = [f"define internal void @uq_linear(ptr {L}, ptr {S}, {V} %time) #0 {{", "entry:", *w.lines, "}", ""]
    return "\n".join(text), w.called


def _cleanse(plan: Plan, w: Writer) -> None:
    """What is not finite becomes 0, in sizes VAST."""
    layout, states = plan.layout, plan.layout.states
    columns = [(Memory(w, L, layout.first_jacobian), layout.jacobian, ZERO)]
    columns += [(column(plan, w, each), states, ZERO) for each in (StiffColumn.drift, StiffColumn.turned)]
    columns += [(column(plan, w, StiffColumn.size), states, constant(VAST))]
    for each, count, instead in columns:
        if count:
            w.loop(count, _cleansing(w, each, instead))


def _cleansing(w: Writer, values: Memory, instead: str) -> Callable[[str], None]:
    def once(i: str) -> None:
        value = values.get(i)
        values.put(i, w.select(w.compare("olt", w.size(value), constant(float("inf"))), value, instead))

    return once


class Written:
    """Factors and solutions with an instruction for every entry."""

    def __init__(self, plan: Plan, work: Elimination) -> None:
        self._plan, self._work, self._stiff = plan, work, stiff_of(plan)
        self._slots: dict[Place, int] = {}
        for pivot, below, right in self._rounds():
            for place in ((pivot, pivot), *((i, pivot) for i in below), *((pivot, j) for j in right)):
                self._slots[place] = plan.layout.first_factor + len(self._slots)

    def _rounds(self) -> list[tuple[int, tuple[int, ...], tuple[int, ...]]]:
        return list(zip(self._work.order, self._work.lower, self._work.upper, strict=True))

    def write_factor(self) -> tuple[str, set[str]]:
        """The text of `@uq_factor`: L, U over its pivots, their inverses, at %scale = 1 / (gamma h); returns lanes of too much growth."""
        w = Writer()
        held = self._entries(w)
        for pivot, below, right in self._rounds():
            inverse = w.over(constant(1.0), held[pivot, pivot])
            w.store(L, self._slots[pivot, pivot], inverse)
            for i in below:
                factor = held[i, pivot] = w.times(held[i, pivot], inverse)
                w.store(L, self._slots[i, pivot], factor)
                less = w.negative(factor)
                for j in right:
                    held[i, j] = w.fma(less, held[pivot, j], held[i, j]) if (i, j) in held else w.times(less, held[pivot, j])
            for j in right:  # over the pivot, so that solutions need not wait for another product
                w.store(L, self._slots[pivot, j], w.times(held[pivot, j], inverse))
        grown = self._growth(w, held)
        w.plain(f"ret i64 {w.mask(w.both(alive(w), grown))}")
        text = [f"define internal i64 @uq_factor(ptr {L}, {V} %scale) #0 {{", "entry:", *w.lines, "}", ""]
        return "\n".join(text), w.called

    def _entries(self, w: Writer) -> dict[Place, str]:
        """W."""
        jacobian, held = self._stiff.jacobian, dict[Place, str]()
        for (i, j, _), k in zip(jacobian.entries, jacobian.value_of, strict=True):
            value = w.load(L, self._plan.layout.first_jacobian + k)
            held[i, j] = w.minus("%scale", value) if i == j else w.negative(value)
        for i in range(jacobian.size):
            held.setdefault((i, i), "%scale")
        return held

    def _growth(self, w: Writer, held: dict[Place, str]) -> str:
        """The lanes in which |L| |U| is far above |W|."""
        first = {which: self._plan.layout.stiff(which) for which in (StiffColumn.tolerance, StiffColumn.size)}
        total: dict[int, str] = {}
        grown = "zeroinitializer"
        for pivot, below, right in self._rounds():
            tolerance = w.load(L, first[StiffColumn.tolerance] + pivot)
            mine = w.times(w.size(held[pivot, pivot]), tolerance)
            for j in right:
                mine = w.fma(w.size(held[pivot, j]), w.load(L, first[StiffColumn.tolerance] + j), mine)
            all_ = w.plus(total[pivot], mine) if pivot in total else mine
            for i in below:
                size = w.size(held[i, pivot])
                total[i] = w.fma(size, mine, total[i]) if i in total else w.times(size, mine)
            bound = w.times(constant(GROWTH), w.fma("%scale", tolerance, w.load(L, first[StiffColumn.size] + pivot)))
            grown = w.either(grown, w.opposite(w.compare("ole", all_, bound)))
        return grown

    def write_lines(self) -> tuple[str, set[str]]:
        """The text of `@uq_lines`: the solution of L U to = from + plus."""
        w = Writer()
        value = [w.plus(w.load("%from", i), w.load("%plus", i)) for i in range(self._plan.layout.states)]
        for pivot, below, _ in self._rounds():
            for i in below:
                value[i] = w.fma(w.negative(w.load(L, self._slots[i, pivot])), value[pivot], value[i])
        value = [w.times(each, w.load(L, self._slots[i, i])) for i, each in enumerate(value)]
        for pivot, _, right in reversed(self._rounds()):
            for j in reversed(right):  # what was found last comes last
                value[pivot] = w.fma(w.negative(w.load(L, self._slots[pivot, j])), value[j], value[pivot])
        for i, each in enumerate(value):
            w.store("%to", i, each)
        w.plain("ret void")
        pointers = f"ptr readonly {L}, ptr readonly %from, ptr readonly %plus, ptr %to"
        return "\n".join([f"define internal void @uq_lines({pointers}) #0 {{", "entry:", *w.lines, "}", ""]), w.called

    def write_products(self) -> list[tuple[str, set[str]]]:
        """The texts of `@uq_times_jacobian` and `@uq_row_sizes`: to = J from and to = |J| from, J by its values."""
        return [self._product("uq_times_jacobian", lambda w, value: value), self._product("uq_row_sizes", lambda w, value: w.size(value))]

    def _product(self, name: str, taken: Callable[[Writer, str], str]) -> tuple[str, set[str]]:
        w, jacobian = Writer(), self._stiff.jacobian
        total: dict[int, str] = {}
        for (i, j, _), k in zip(jacobian.entries, jacobian.value_of, strict=True):
            value, other = taken(w, w.load("%values", k)), w.load("%from", j)
            total[i] = w.fma(value, other, total[i]) if i in total else w.times(value, other)
        for i in range(jacobian.size):
            w.store("%to", i, total.get(i, ZERO))
        w.plain("ret void")
        return "\n".join([f"define internal void @{name}({PRODUCT}) #0 {{", "entry:", *w.lines, "}", ""]), w.called


__all__ = ["GROWTH", "PRODUCT", "VAST", "Written", "column", "stiff_of", "write_linear"]
