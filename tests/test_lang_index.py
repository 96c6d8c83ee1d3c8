"""Entries, neighbours, edges and sums along an index: against the same written out, and every mistake at its place."""

from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.errors import ExpressionError
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, Typed, lower
from uq.lang.parser import parse
from uq.lang.reduce import written_out
from uq.lang.scope import Index, Repeated
from uq.lang.tree import names, parts, same_tree, to_text
from uq.units import NONE, parse_unit

CELL = Index("cell", ("0", "1", "2", "3"), True, "cell")
AGE = Index("age", ("child", "adult", "old"), False, "age")
OTHER = Index("other", AGE.labels, False, "age")
KELVIN = parse_unit("K")


def scope(graph: Graph, edge: str | Typed | None = None, **at: int) -> Scope:
    """C over cell in K, I over age and M over age and age without unit, k a single value."""

    def repeated(name: str, *over: Index) -> Repeated:
        keys = over[0].labels if len(over) == 1 else [f"{a},{b}" for a in over[0].labels for b in over[1].labels]
        return Repeated(over, tuple(graph.name(f"{name}[{key}]") for key in keys), KELVIN if name == "C" else NONE, edge)

    indices = {index.name: index for index in (CELL, AGE, OTHER)}
    entries = {"C": repeated("C", CELL), "I": repeated("I", AGE), "M": repeated("M", AGE, AGE), "P": repeated("P", AGE, OTHER)}
    return Scope({"k": (graph.name("k"), NONE)}, indices=indices, repeated=entries, at=at)


def node(text: str, edge: str | Typed | None = None, **at: int) -> tuple[Graph, Node]:
    graph = Graph()
    return graph, lower(parse(text), scope(graph, edge, **at), graph).node


def same(text: str, written: str, edge: str | None = None, **at: int) -> bool:
    """Whether a text comes to the node of another one, in which entries are plain names such as C0 and Mchild_old."""
    graph, found = node(text, edge, **at)
    plain = {name: (graph.name(name), NONE) for name in ("k",)}
    plain |= {f"C{i}": (graph.name(f"C[{i}]"), KELVIN) for i in range(4)}
    plain |= {f"I{a}": (graph.name(f"I[{a}]"), NONE) for a in AGE.labels}
    plain |= {f"{m}{a}_{b}": (graph.name(f"{m}[{a},{b}]"), NONE) for m in "MP" for a in AGE.labels for b in AGE.labels}
    return found is lower(parse(written), Scope(plain), graph).node


@pytest.mark.parametrize(
    ("text", "written", "at"),
    [
        ("C", "C2", {"cell": 2}),
        ("C[3] - C", "C3 - C0", {"cell": 0}),
        ("C[cell-1] - 2 * C + C[ cell + 1 ]", "C0 - 2 * C1 + C2", {"cell": 1}),
        ("I[adult] + I", "Iadult + Iold", {"age": 2}),
        ("I[age-1] + I[other]", "Ichild + Iold", {"age": 1, "other": 2}),
        ("M[age, other] * P", "Madult_old * Padult_old", {"age": 1, "other": 2}),
        ("M[child, age-1]", "Mchild_adult", {"age": 2}),
        ("sum(C, cell)", "C0 + C1 + C2 + C3", {}),
        ("sum(C, cell) / C", "(C0 + C1 + C2 + C3) / C1", {"cell": 1}),
        ("average(C, cell)", "(C0 + C1 + C2 + C3) / 4", {}),
        ("max(C, cell)", "max(C0, C1, C2, C3)", {}),
        ("min(C[3] - C, cell)", "min(C3 - C0, C3 - C1, C3 - C2, C3 - C3)", {}),
        ("max(C, C[0])", "max(C2, C0)", {"cell": 2}),
        ("sum(M[age, other] * I[other], other)", "Madult_child * Ichild + Madult_adult * Iadult + Madult_old * Iold", {"age": 1}),
        ("sum(P * I[other], other)", "Padult_child * Ichild + Padult_adult * Iadult + Padult_old * Iold", {"age": 1}),
        ("sum(sum(M[age, other], age), other) * I", None, {"age": 0}),
        ("cell + k", "3 + k", {"cell": 3}),
        ("sum(where(cell < 1, C, 0), cell)", "where(0 < 1, C0, 0) + where(1 < 1, C1, 0) + where(2 < 1, C2, 0) + where(3 < 1, C3, 0)", {}),
    ],
)
def test_an_entry_is_what_it_would_be_written_out(text: str, written: str | None, at: dict[str, int]) -> None:
    if written is None:
        sums = (" + ".join(f"M{a}_{b}" for a in AGE.labels) for b in AGE.labels)
        written = f"({' + '.join(f'({each})' for each in sums)}) * Ichild"
    assert same(text, written, **at)


@given(st.integers(-30, 30), st.integers(0, 3), st.sampled_from(["mirror", "wrap"]))
def test_edges_mirror_the_end_itself_and_wrap_around(shift: int, place: int, edge: str) -> None:
    row = [0, 1, 2, 3]
    far = [row, row[::-1]] if edge == "mirror" else [row, row]
    unrolled = (far[0] + far[1]) * 10
    expected = unrolled[40 + place + shift]
    assert same(f"C[cell{shift:+d}]" if shift else "C[cell]", f"C{expected}", edge, cell=place)


def test_an_edge_of_a_value_stands_beyond_both_ends_only() -> None:
    graph = Graph()
    edge = Typed(graph.number(293.0), KELVIN)
    found = [lower(parse("C[cell-1]"), scope(graph, edge, cell=place), graph).node for place in range(4)]
    assert found == [graph.number(293.0), graph.name("C[0]"), graph.name("C[1]"), graph.name("C[2]")]
    assert lower(parse("C[cell+2]"), scope(graph, edge, cell=2), graph).node is graph.number(293.0)


def test_units_go_with_entries_and_sums() -> None:
    graph = Graph()
    within = scope(graph, cell=1)
    assert lower(parse("sum(C * C, cell)"), within, graph).unit.same(parse_unit("K2"))
    assert lower(parse("average(C, cell)"), within, graph).unit.same(KELVIN)
    with pytest.raises(ExpressionError, match="expected K, as `max\\(C, cell\\)` has"):
        lower(parse("max(C, cell) > '3 m'"), within, graph)


def test_names_leave_out_what_stands_in_brackets_and_text_comes_back() -> None:
    tree = parse("C[cell-1] + sum(M[age, other] * I[other], other) - k")
    assert [name for name, _ in names(tree)] == ["C", "M", "I", "other", "k"]
    assert to_text(tree) == "C[cell-1] + sum(M[age, other] * I[other], other) - k"
    assert same_tree(parse(to_text(tree)), tree)
    assert not same_tree(parse("C[cell-1]"), parse("C[cell+1]"))
    assert [part.text for part in parts(tree) if part.op == "entry"] == ["C[cell-1]", "M[age, other]", "I[other]"]


def test_what_a_sum_costs_is_known_before_it_is_written_out() -> None:
    graph = Graph()
    assert written_out(parse("C[0] + k"), scope(graph)) == 3
    assert written_out(parse("sum(C * k, cell)"), scope(graph)) == 1 + 4 * 3
    assert written_out(parse("sum(sum(M[age, other], age), other)"), scope(graph)) == 1 + 3 * (1 + 3 * 1)


@pytest.mark.parametrize(
    ("text", "offset", "length", "found", "at"),
    [
        ("k + C[4]", 6, 1, "`4`", {}),
        ("C[cell-1]", 2, 6, "`C[cell-1]` at `cell` 0", {"cell": 0}),
        ("C[cell+1]", 2, 6, "`C[cell+1]` at `cell` 3", {"cell": 3}),
        ("C[age]", 2, 3, "the index `age`", {"age": 0}),
        ("I[adlt]", 2, 4, "`adlt`", {}),
        ("2 * C", 4, 1, "`C`, which has a value for every `cell`", {}),
        ("k[0]", 0, 4, "`k[0]` of a single value", {}),
        ("M[age]", 0, 6, "1 in the brackets of `M`", {"age": 0}),
        ("M[age, age]", 0, 11, "always an entry with itself", {"age": 0}),
        ("1 + M", 4, 1, "goes over `age` twice", {"age": 0}),
        ("sum(k, cell)", 4, 1, "`k`, in which nothing goes over `cell`", {}),
        ("sum(sum(C, cell), cell)", 4, 12, "in which nothing goes over `cell`", {}),
        ("sum(I, other)", 4, 1, "in which nothing goes over `other`", {"age": 0}),
        ("1 + sum(k, k)", 11, 1, "`k` as what a sum goes over", {}),
        ("sum(k)", 0, 3, "1 argument in sum( )", {}),
        ("age * 2", 0, 3, "whose entries have names", {"age": 1}),
        ("cell * 2", 0, 4, "stands at no entry here", {}),
    ],
)
def test_mistakes_point_at_the_part_that_is_wrong(text: str, offset: int, length: int, found: str, at: dict[str, int]) -> None:
    graph = Graph()
    with pytest.raises(ExpressionError) as caught:
        lower(parse(text), scope(graph, **at), graph)
    assert (caught.value.offset, caught.value.length) == (offset, length)
    assert found in caught.value.found
