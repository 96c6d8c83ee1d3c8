"""Values brought into another unit, inside the graph.

In: a graph, a node with its unit, a unit of the same dimension. Out: the node of the same quantity in that unit.
Must not know: texts, names, whether the conversion makes sense.
"""

from __future__ import annotations

from uq.lang.graph import Graph, Node
from uq.lang.scope import Typed
from uq.units import Unit


def converted(graph: Graph, typed: Typed, unit: Unit) -> Node:
    """The node of a quantity in `unit`: x * factor, and between temperature scales x * factor + shift.

    Factor and shift are the doubles nearest to the exact fractions, so a product is rounded once more and a shift twice. A number is taken
    as the decimal number that it is written as and converted exactly, then rounded once. Equal factors (to 1e-12) need no node at all, so
    a study in one system of units has the graph that it would have without units. Raises ValueMistake where a number becomes too large.
    """
    node = typed.node
    if typed.zero or typed.unit.same(unit):
        return node
    if isinstance(node.value, float):
        return graph.number(typed.unit.convert(node.value, unit))
    factor, shift = typed.unit.conversion(unit)
    scaled = graph.apply("*", node, graph.number(factor))
    return graph.apply("+", scaled, graph.number(shift)) if shift else scaled
