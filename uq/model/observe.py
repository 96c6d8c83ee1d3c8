"""Writes what is seen of a member: `@uq_observe` at an output time, `@uq_outcomes` and `@uq_starts` from whole tables of members."""

from __future__ import annotations

from collections.abc import Callable
from functools import cache

from uq.lang.graph import Node
from uq.model.columns import Index, Memory, Readable, Slots
from uq.model.expressions import Expressions
from uq.model.layout import Head, Setting
from uq.model.points import LANES_POINTER as L
from uq.model.points import SETTINGS_POINTER as S
from uq.model.points import Plan, Point, head, outside_range
from uq.model.writer import ONE, ZERO, I, M, V, Writer

# An observed value takes over thirty instructions to put; beyond this many they go through a loop (1000 of them would compile in 12 s).
MOST_PUT_ONE_BY_ONE = 16


def write_observe(plan: Plan) -> tuple[str, set[str]]:
    """The text of `@uq_observe`: write the outputs of the lanes in %due up to the lane's time; of those in %strict only the ones before it.

    Observed values and conditions are taken from the continuous extension. Where the output time is the lane's own time (the start, a
    break, the end) the state itself is taken, with the forcings of the present segment. Lanes that have less to write write scrap.
    Returns the lanes in which a state is outside of its valid range at an output time: nothing is written of them from there on, and the
    lane's time is that time. (What a state does between two output times within a step is not looked at yet.)
    """
    w = Writer()
    time = head(w, Head.time)
    due, strict = w.lanes_of("%due"), w.lanes_of("%strict")
    first = [head(w, Head.due), *(w.load_words(L, slot) for slot in (Head.clock, Head.place, Head.truth_place))]
    w.plain("br label %next")
    w.plain("next:")
    places = ((I, "clock", first[1]), (I, "place", first[2]), (I, "truth_place", first[3]))
    kinds = ((M, "due", due), (V, "at", first[0]), *places, (M, "strayed", "zeroinitializer"))
    place = len(w.lines)
    stray(plan, w)
    put(plan, w, Point(plan, w, lambda: "%at.now", Interpolated(plan, w, "%at.now", lambda slot: Slots(w, L, slot)).get))
    step = w.select_words("%due.good", "splat (i64 8)", "zeroinitializer")
    w.plain(f"%clock.then = add {I} %clock.now, {step}")
    w.plain(f"%place.then = add {I} %place.now, {step}")
    w.plain(f"%truth_place.then = add {I} %truth_place.now, {w.select_words('%due.good', 'splat (i64 1)', 'zeroinitializer')}")
    w.plain(f"%at.then = select {M} %due.good, {V} {w.gather('%clock.then')}, {V} %at.now")
    reached = w.select_truth(strict, w.compare("olt", "%at.then", time), w.compare("ole", "%at.then", time))
    w.plain(f"%due.then = and {M} %due.good, {reached}")
    w.plain(f"br i1 {w.any('%due.then')}, label %next, label %done")
    phis = [f"  %{name}.now = phi {kind} [ {value}, %entry ], [ %{name}.then, %{w.block} ]" for kind, name, value in kinds]
    w.lines[place:place] = phis
    w.plain("done:")
    w.store(L, Head.due, "%at.then")
    for slot in (Head.clock, Head.place, Head.truth_place):
        w.store_words(L, slot, f"%{slot.name}.then")
    w.store(L, Head.time, w.select("%strayed.then", "%at.then", time))
    w.plain(f"ret i64 {w.mask('%strayed.then')}")
    head_line = "define i64 @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {"
    return "\n".join([head_line, "entry:", *w.lines, "}", ""]), w.called


def stray(plan: Plan, w: Writer) -> None:
    """Leave in %due.good the lanes in %due.now whose states are valid at the output time, in %strayed.then those that are not by now."""
    begin = w.block
    w.branch(w.any(w.compare("ogt", w.load(S, Setting.ranged), ZERO)), "judge", "values")
    over = plan.over(w)
    outside = w.both("%due.now", outside_range(plan, w, Interpolated(plan, w, "%at.now", lambda slot: over.stored(L, slot))))
    good = w.both("%due.now", w.opposite(outside))
    strayed = w.either("%strayed.now", outside)
    judged = w.block
    w.join("values")
    w.plain(f"%due.good = phi {M} [ %due.now, %{begin} ], [ {good}, %{judged} ]")
    w.plain(f"%strayed.then = phi {M} [ %strayed.now, %{begin} ], [ {strayed}, %{judged} ]")


class Interpolated:
    """The states at the times `at` as a column to read (see `Pair`), each written when it is asked for."""

    def __init__(self, plan: Plan, w: Writer, at: str, columns: Callable[[int], Readable]) -> None:
        layout = plan.layout
        self._w = w
        self._parts = [columns(layout.first_curve + part * layout.states) for part in range(layout.curve_parts)]
        self._state = columns(layout.first_state)
        self._theta = w.over(w.minus(at, head(w, Head.step_from)), head(w, Head.step_taken))
        self._rest = w.minus(ONE, self._theta)
        self._here = w.compare("oge", at, head(w, Head.time))

    def get(self, i: Index) -> str:
        """The value of state i."""
        w, parts = self._w, self._parts
        value = parts[-1].get(i)
        for place in range(len(parts) - 2, -1, -1):
            value = w.fma(self._rest if place % 2 else self._theta, value, parts[place].get(i))
        return w.select(self._here, self._state.get(i), value)


def put(plan: Plan, w: Writer, point: Point) -> None:
    """Write observed values and conditions of the lanes that are due into the tables, the rest into scrap."""
    equations, observed = plan.equations, plan.layout.observed
    point.values((*equations.observed, *equations.conditions))  # together, so that what they share is written once
    scrap, truth_stride = w.load_words(S, Setting.scrap), w.load_words(S, Setting.truth_stride)
    address = "%truth_place.now"
    for node in equations.conditions:
        w.scatter_truth(w.select_words("%due.good", address, scrap), *point.truth(node))
        address = w.add_words(address, truth_stride)
    numbers = [point.number(node) for node in equations.observed]
    (put_each if observed <= MOST_PUT_ONE_BY_ONE else put_looped)(plan, w, numbers, scrap)


def put_each(plan: Plan, w: Writer, numbers: list[str], scrap: str) -> None:
    """Write observed values into the table by an instruction each."""
    stride, address = w.load_words(S, Setting.stride), "%place.now"
    for number in numbers:
        w.scatter(w.select_words("%due.good", address, scrap), number)
        address = w.add_words(address, stride)


def put_looped(plan: Plan, w: Writer, numbers: list[str], scrap: str) -> None:
    """Write observed values into the table in a loop."""
    stride, column = w.load_words(S, Setting.stride), Memory(w, L, plan.layout.first_observed)
    for k, number in enumerate(numbers):
        column.put(k, number)

    def move(k: str, address: str) -> str:
        w.scatter(w.select_words("%due.good", address, scrap), column.get(k))
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
    expressions = Expressions(w, lambda leaf: load(place(leaf)), {})
    expressions.values(nodes)
    for k, node in enumerate(nodes):
        w.store("%to", k, expressions.number(node))
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
