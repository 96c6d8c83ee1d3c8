"""Writes what stiff steps do with the Jacobian of a large model, row by row in loops: the functions of `linear.Written`.

Every row of the factors is held from its first to its last column that can be other than 0 (see `sparse.Envelope`), in the order of the
pivots, lanes side by side. Where rows, columns and values lie stands in constant tables of whole numbers.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence

from uq.model.columns import Memory
from uq.model.layout import StiffColumn
from uq.model.linear import GROWTH, PRODUCT, column, stiff_of
from uq.model.points import LANES_POINTER as L
from uq.model.points import Plan, alive
from uq.model.sparse import Envelope
from uq.model.writer import ONE, ZERO, V, Writer, constant


class Rows:
    """Factors and solutions row by row."""

    def __init__(self, plan: Plan, work: Envelope) -> None:
        self._plan, self._work, self._stiff = plan, work, stiff_of(plan)
        self._size = str(plan.layout.states)

    def tables(self) -> str:
        """The constant tables."""
        work, jacobian = self._work, self._stiff.jacobian
        rank = {pivot: k for k, pivot in enumerate(work.order)}
        base = work.base
        begins = [0] * (jacobian.size + 1)
        for i, _, _ in jacobian.entries:
            begins[i + 1] += 1
        for i in range(jacobian.size):
            begins[i + 1] += begins[i]
        found = {
            "uq_order": work.order,
            "uq_first": work.first,
            "uq_last": work.last,
            "uq_base": base,
            "uq_begin": begins,
            "uq_column": [j for _, j, _ in jacobian.entries],
            "uq_value": jacobian.value_of,
            "uq_place": [base[rank[i]] + rank[j] for i, j, _ in jacobian.entries],
        }
        return "\n".join(_table(name, numbers) for name, numbers in found.items()) + "\n"

    def write_factor(self) -> tuple[str, set[str]]:
        """The text of `@uq_factor` (see `linear.Written.write_factor`)."""
        w = Writer()
        self._fill(w)
        w.span("0", self._size, ZERO, lambda row, carried: self._eliminate(w, row))
        grown = self._growth(w)
        w.plain(f"ret i64 {w.mask(w.both(alive(w), grown))}")
        text = [f"define internal i64 @uq_factor(ptr {L}, {V} %scale) #0 {{", "entry:", *w.lines, "}", ""]
        return "\n".join(text), w.called

    def _fill(self, w: Writer) -> None:
        """W."""
        layout, jacobian = self._plan.layout, self._stiff.jacobian
        factors, values = Memory(w, L, layout.first_factor), Memory(w, L, layout.first_jacobian)
        w.loop(layout.factors, lambda k: factors.put(k, ZERO))
        if jacobian.entries:
            w.loop(len(jacobian.entries), lambda e: factors.put(w.whole("uq_place", e), w.negative(values.get(w.whole("uq_value", e)))))

        def add(row: str) -> None:
            place = w.add(f"add i64 {w.whole('uq_base', row)}, {row}")
            factors.put(place, w.plus(factors.get(place), "%scale"))

        w.loop(layout.states, add)

    def _eliminate(self, w: Writer, row: str) -> str:
        """Take off the pivots before a row, invert its own."""
        factors = Memory(w, L, self._plan.layout.first_factor)
        base = w.whole("uq_base", row)

        def pivot(k: str, carried: str) -> str:
            place, above = w.add(f"add i64 {base}, {k}"), w.whole("uq_base", k)
            factor = w.times(factors.get(place), factors.get(w.add(f"add i64 {above}, {k}")))
            factors.put(place, factor)
            less = w.negative(factor)

            def entry(j: str, inner: str) -> str:
                mine = w.add(f"add i64 {base}, {j}")
                factors.put(mine, w.fma(less, factors.get(w.add(f"add i64 {above}, {j}")), factors.get(mine)))
                return inner

            w.span(w.add(f"add i64 {k}, 1"), w.add(f"add i64 {w.whole('uq_last', k)}, 1"), ZERO, entry)
            return carried

        w.span(w.whole("uq_first", row), row, ZERO, pivot)
        own = w.add(f"add i64 {base}, {row}")
        factors.put(own, w.over(ONE, factors.get(own)))
        return ZERO

    def _growth(self, w: Writer) -> str:
        """The lanes in which |L| |U| is far above |W|, both times the tolerances. |U| times these is left in the column of corrections."""
        plan, factors = self._plan, Memory(w, L, self._plan.layout.first_factor)
        tolerance, size = (column(plan, w, each) for each in (StiffColumn.tolerance, StiffColumn.size))
        upper = column(plan, w, StiffColumn.correction)

        def above(row: str, carried: str) -> str:
            base = w.whole("uq_base", row)
            pivot = w.size(w.over(ONE, factors.get(w.add(f"add i64 {base}, {row}"))))
            own = w.times(pivot, tolerance.get(w.whole("uq_order", row)))
            right = self._sized(w, lambda j: tolerance.get(w.whole("uq_order", j)))
            total = self._row(w, row, (_next(w, row), _next(w, w.whole("uq_last", row))), own, right)
            upper.put(row, total)
            return carried

        w.span("0", self._size, ZERO, above)

        def judge(row: str, worst: str) -> str:
            total = self._row(w, row, (w.whole("uq_first", row), row), upper.get(row), self._sized(w, upper.get))
            state = w.whole("uq_order", row)
            bound = w.times(constant(GROWTH), w.fma("%scale", tolerance.get(state), size.get(state)))
            return w.select(w.compare("ole", total, bound), worst, ONE)

        return w.compare("ogt", w.span("0", self._size, ZERO, judge), ZERO)

    def _sized(self, w: Writer, other: Callable[[str], str]) -> Callable[[str, str, str], str]:
        return lambda entry, j, total: w.fma(w.size(entry), other(j), total)

    def _row(self, w: Writer, row: str, ends: tuple[str, str], start: str, add: Callable[[str, str, str], str]) -> str:
        """Something carried over the entries of a row of the factors between two columns."""
        factors, base = Memory(w, L, self._plan.layout.first_factor), w.whole("uq_base", row)
        return w.span(*ends, start, lambda j, total: add(factors.get(w.add(f"add i64 {base}, {j}")), j, total))

    def write_lines(self) -> tuple[str, set[str]]:
        """The text of `@uq_lines` (see `linear.Written.write_lines`); works in a column in the order of pivots."""
        w, plan = Writer(), self._plan
        given, plus, to = (Memory(w, pointer, 0) for pointer in ("%from", "%plus", "%to"))
        work, factors = column(plan, w, StiffColumn.work), Memory(w, L, plan.layout.first_factor)

        def less(entry: str, j: str, total: str) -> str:
            return w.fma(w.negative(entry), work.get(j), total)

        def forward(row: str, carried: str) -> str:
            state = w.whole("uq_order", row)
            start = w.plus(given.get(state), plus.get(state))
            work.put(row, self._row(w, row, (w.whole("uq_first", row), row), start, less))
            return carried

        def backward(turn: str, carried: str) -> str:
            row = w.add(f"sub i64 {int(self._size) - 1}, {turn}")
            total = self._row(w, row, (_next(w, row), _next(w, w.whole("uq_last", row))), work.get(row), less)
            found = w.times(total, factors.get(w.add(f"add i64 {w.whole('uq_base', row)}, {row}")))
            work.put(row, found)
            to.put(w.whole("uq_order", row), found)
            return carried

        w.span("0", self._size, ZERO, forward)
        w.span("0", self._size, ZERO, backward)
        w.plain("ret void")
        pointers = f"ptr {L}, ptr readonly %from, ptr readonly %plus, ptr %to"
        return "\n".join([f"define internal void @uq_lines({pointers}) #0 {{", "entry:", *w.lines, "}", ""]), w.called

    def write_products(self) -> list[tuple[str, set[str]]]:
        """The texts of `@uq_times_jacobian` and `@uq_row_sizes` (see `linear.Written.write_products`)."""
        return [self._product("uq_times_jacobian", lambda w, value: value), self._product("uq_row_sizes", lambda w, value: w.size(value))]

    def _product(self, name: str, taken: Callable[[Writer, str], str]) -> tuple[str, set[str]]:
        w = Writer()
        values, given, to = (Memory(w, pointer, 0) for pointer in ("%values", "%from", "%to"))

        def entry(e: str, total: str) -> str:
            return w.fma(taken(w, values.get(w.whole("uq_value", e))), given.get(w.whole("uq_column", e)), total)

        def row(i: str, carried: str) -> str:
            to.put(i, w.span(w.whole("uq_begin", i), w.whole("uq_begin", _next(w, i)), ZERO, entry))
            return carried

        w.span("0", self._size, ZERO, row)
        w.plain("ret void")
        return "\n".join([f"define internal void @{name}({PRODUCT}) #0 {{", "entry:", *w.lines, "}", ""]), w.called


def _next(w: Writer, index: str) -> str:
    return w.add(f"add i64 {index}, 1")


def _table(name: str, numbers: Sequence[int]) -> str:
    inside = ", ".join(f"i64 {number}" for number in numbers)
    return f"@{name} = internal constant [{len(numbers)} x i64] [{inside}], align 8"
