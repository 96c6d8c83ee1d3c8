"""Writes what is seen of a member: `@uq_observe` at an output time, `@uq_outcomes` and `@uq_starts` from whole tables of members."""

from __future__ import annotations

from collections.abc import Callable
from functools import cache

from uq.lang.graph import Node
from uq.model.columns import Memory
from uq.model.expressions import Expressions, as_number, is_truth
from uq.model.layout import Head, Setting
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, Point, head
from uq.model.writer import ONE, ZERO, I, M, V, Writer

# An observed value takes over thirty instructions to put; beyond this many they go through a loop (1000 of them would compile in 12 s).
MOST_PUT_ONE_BY_ONE = 16


def write_observe(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_observe`: write the outputs of the lanes in %due up to the lane's time; of those in %strict only the ones before it.

    Observed values and conditions are taken from the continuous extension. Where the output time is the lane's own time (the start, a
    break, the end) the state itself is taken, with the forcings of the present segment. Lanes that have less to write write scrap.
    """
    w = Writer()
    time = head(w, Head.time)
    due, strict = w.lanes_of("%due"), w.lanes_of("%strict")
    first = [head(w, Head.due), *(w.load_words(L, slot) for slot in (Head.clock, Head.place, Head.truth_place))]
    w.plain("br label %next")
    w.plain("next:")
    kinds = ((M, "due", due), (V, "at", first[0]), (I, "clock", first[1]), (I, "place", first[2]), (I, "truth_place", first[3]))
    place = len(w.lines)
    point = Point(plan, w, lambda: "%at.now", interpolated(plan, w, "%at.now"))
    put(plan, w, point.values((*plan.equations.observed, *plan.equations.conditions)))
    step = w.select_words("%due.now", "splat (i64 8)", "zeroinitializer")
    w.plain(f"%clock.then = add {I} %clock.now, {step}")
    w.plain(f"%place.then = add {I} %place.now, {step}")
    w.plain(f"%truth_place.then = add {I} %truth_place.now, {w.select_words('%due.now', 'splat (i64 1)', 'zeroinitializer')}")
    w.plain(f"%at.then = select {M} %due.now, {V} {w.gather('%clock.then')}, {V} %at.now")
    reached = w.select_truth(strict, w.compare("olt", "%at.then", time), w.compare("ole", "%at.then", time))
    w.plain(f"%due.then = and {M} %due.now, {reached}")
    w.plain(f"br i1 {w.any('%due.then')}, label %next, label %done")
    phis = [f"  %{name}.now = phi {kind} [ {value}, %entry ], [ %{name}.then, %{w.block} ]" for kind, name, value in kinds]
    w.lines[place:place] = phis
    w.plain("done:")
    w.store(L, Head.due, "%at.then")
    for slot in (Head.clock, Head.place, Head.truth_place):
        w.store_words(L, slot, f"%{slot.name}.then")
    w.plain("ret void")
    head_line = "define void @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {"
    return "\n".join([head_line, "entry:", *w.lines, "}", ""]), w.called


def interpolated(plan: Plan, w: Writer, at: str) -> Callable[[int], str]:
    """The states at the times `at` (see `Pair`), each written when it is asked for."""
    layout = plan.layout
    theta = w.over(w.minus(at, head(w, Head.step_from)), head(w, Head.step_taken))
    rest = w.minus(ONE, theta)
    here = w.compare("oge", at, head(w, Head.time))

    def state(i: int) -> str:
        y, difference, third, fourth, fifth = (w.load(L, layout.first_curve + part * layout.states + i) for part in range(5))
        inner = w.fma(theta, w.fma(rest, fifth, fourth), third)
        return w.select(here, w.load(L, layout.first_state + i), w.fma(theta, w.fma(rest, inner, difference), y))

    return state


def put(plan: Plan, w: Writer, values: list[str]) -> None:
    """Write observed values and conditions of the lanes that are due into the tables, the rest into scrap."""
    equations, observed = plan.equations, plan.layout.observed
    scrap, truth_stride = w.load_words(S, Setting.scrap), w.load_words(S, Setting.truth_stride)
    numbers = [as_number(w, v) if is_truth(node) else v for node, v in zip(equations.observed, values[:observed], strict=True)]
    address = "%truth_place.now"
    for node, value in zip(equations.conditions, values[observed:], strict=True):
        truth = value if is_truth(node) else w.compare("une", value, ZERO)
        w.scatter_truth(w.select_words("%due.now", address, scrap), truth)
        address = w.add_words(address, truth_stride)
    (put_each if observed <= MOST_PUT_ONE_BY_ONE else put_looped)(plan, w, numbers, scrap)


def put_each(plan: Plan, w: Writer, numbers: list[str], scrap: str) -> None:
    """Write observed values into the table by an instruction each."""
    stride, address = w.load_words(S, Setting.stride), "%place.now"
    for number in numbers:
        w.scatter(w.select_words("%due.now", address, scrap), number)
        address = w.add_words(address, stride)


def put_looped(plan: Plan, w: Writer, numbers: list[str], scrap: str) -> None:
    """Write observed values into the table in a loop."""
    stride, column = w.load_words(S, Setting.stride), Memory(w, L, plan.layout.first_observed)
    for k, number in enumerate(numbers):
        column.put(k, number)

    def move(k: str, address: str) -> str:
        w.scatter(w.select_words("%due.now", address, scrap), column.get(k))
        return w.add_words(address, stride)

    w.loop_carrying(len(numbers), I, "%place.now", move)


def write_outcomes(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_outcomes`: outcomes from the inputs and then the courses of members, eight at a time."""
    equations = plan.equations
    width = len(equations.inputs) + len(equations.courses)

    def place(name: str) -> int:
        kind, _, number = name.partition(":")
        return len(equations.inputs) + int(number) if kind == "course" and number else equations.inputs.index(name)

    return write_table("uq_outcomes", equations.outcomes, width, place)


def write_starts(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_starts`: start states from the inputs of members, eight at a time."""
    equations = plan.equations
    return write_table("uq_starts", equations.starts, len(equations.inputs), equations.inputs.index)


def write_table(name: str, nodes: tuple[Node, ...], width: int, place: Callable[[str], int]) -> tuple[str, set[str]]:
    """A function that goes through %groups groups of `width` slots at %given and leaves the values of `nodes` in groups at %taken."""
    w = Writer()
    load = cache(lambda slot: w.load("%from", slot))
    values = Expressions(w, lambda leaf: load(place(leaf)), {}).values(nodes)
    for k, (node, value) in enumerate(zip(nodes, values, strict=True)):
        w.store("%to", k, as_number(w, value) if is_truth(node) else value)
    text = f"""define void @{name}(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {{
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, {width}
  %out = mul i64 %g, {len(nodes)}
  %from = getelementptr inbounds {V}, ptr %given, i64 %in
  %to = getelementptr inbounds {V}, ptr %taken, i64 %out
"""
    tail = """  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}
"""
    return text + "\n".join(w.lines) + "\n" + tail, w.called
