"""Sums, largest, smallest and average over all entries along an index: written out, one entry after another.

In: a tree, a scope, and how one part is lowered. Out: what the whole comes to, or an ExpressionError. Must not know: models, files.
"""

from __future__ import annotations

from collections.abc import Callable
from functools import reduce

from uq.lang.graph import Graph
from uq.lang.measure import mistake
from uq.lang.part import lower_part
from uq.lang.scope import Index, Scope, Typed
from uq.lang.tree import Tree, fold, parts
from uq.lang.words import REDUCTIONS
from uq.units import NONE

Step = Callable[[Tree, tuple[Typed, ...], Scope], Typed]


def reduced_over(part: Tree, scope: Scope) -> Index | None:
    """The index over which a call reduces what it is given: max(T, cell); None where it is no such call, as in max(a, b)."""
    if part.op == "call" and part.name in REDUCTIONS and len(part.args) == 2 and part.args[1].op == "name":
        return scope.indices.get(part.args[1].name)
    return None


def unrolled(tree: Tree, scope: Scope, graph: Graph, step: Step) -> Typed:
    """The value of a tree; sums and the like are added up from the first entry to the last."""

    def each(part: Tree, args: tuple[Typed, ...]) -> Typed:
        index = reduced_over(part, scope)
        return step(part, args, scope) if index is None else _reduced(part, index, scope, graph, step)

    return fold(tree, each, lambda part: reduced_over(part, scope) is not None)


def written_out(tree: Tree, scope: Scope) -> int:
    """How many parts a tree has once every sum is written out."""
    count, waiting = 0, [(tree, 1)]
    while waiting:
        part, times = waiting.pop()
        count += times
        index = reduced_over(part, scope)
        waiting.extend((arg, times) for arg in part.args if index is None)
        if index is not None:
            waiting.append((part.args[0], times * len(index)))
    return count


def _reduced(part: Tree, index: Index, scope: Scope, graph: Graph, step: Step) -> Typed:
    inner = part.args[0]
    if not _goes_over(inner, index, scope):
        found = f"`{inner.text}`, in which nothing goes over `{index.name}`"
        remedy = f"[{index.name}] behind a name says which entry" if _near(inner, index, scope) else ""
        raise mistake(inner, found, f"what {part.name}( ) goes through by `{index.name}`", remedy)
    every = [unrolled(inner, scope.standing({index.name: place}), graph, step) for place in range(len(index))]
    operator = ("call", part.name) if part.name in ("min", "max") else ("+", "")
    both = Tree(operator[0], part.source, inner.start, inner.stop, (inner, inner), name=operator[1])
    whole = reduce(lambda left, right: lower_part(both, (left, right), scope, graph), every)
    if part.name != "average":
        return whole
    count = Typed(graph.number(float(len(index))), NONE)
    return lower_part(Tree("/", part.source, inner.start, inner.stop, (inner, inner)), (whole, count), scope, graph)


def _goes_over(tree: Tree, index: Index, scope: Scope) -> bool:
    """Whether what a tree comes to depends on where the index stands; a sum over the index itself does not."""

    def own(part: Tree) -> bool:
        inner = reduced_over(part, scope)
        return inner is not None and inner.name == index.name

    for part in parts(tree, own):
        if own(part):
            continue
        if part.op == "name":
            given = scope.repeated.get(part.name)
            if part.name == index.name or (given is not None and index.name in [each.name for each in given.over]):
                return True
        if part.op == "entry" and index.name in [each.name for each in part.at]:
            return True
    return False


def _near(tree: Tree, index: Index, scope: Scope) -> bool:
    """Whether anything in a tree has the entries of the index, under another of its names."""
    repeated = (scope.repeated[part.name] for part in parts(tree) if part.op == "name" and part.name in scope.repeated)
    return any(index.of == each.of for given in repeated for each in given.over)
