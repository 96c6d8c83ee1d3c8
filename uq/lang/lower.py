"""From tree to graph: names, kinds and units checked in one pass.

In: a tree, a scope, a graph. Out: a node with its unit, or an ExpressionError. Must not know: models, files.
"""

from __future__ import annotations

from uq.lang.graph import Graph
from uq.lang.measure import require
from uq.lang.part import brought, lower_part, require_number, require_truth
from uq.lang.reduce import unrolled
from uq.lang.scope import Scope, TableUnits, Typed
from uq.lang.take import CourseAsked, TakeResult, lower_take
from uq.lang.temperatures import is_temperature
from uq.lang.tree import Tree
from uq.units import Unit

__all__ = ["CourseAsked", "Scope", "TableUnits", "TakeResult", "Typed", "in_unit", "lower", "lower_take", "require_truth"]


def lower(tree: Tree, scope: Scope, graph: Graph) -> Typed:
    """The node of an expression with its unit; raises ExpressionError at the first mistake in the order of evaluation."""
    return unrolled(tree, scope, graph, lambda part, args, within: lower_part(part, args, within, graph))


def in_unit(tree: Tree, typed: Typed, unit: Unit, graph: Graph, what: str = "") -> Typed:
    """A whole expression as a number in the unit needed, converted where it is in another of the same dimension.

    `what` says for what the unit is needed, as in 'for the rate of `T`'. A difference in K stays known as one. Raises ExpressionError.
    """
    require_number(tree, typed)
    require(tree, typed, unit, what and f" {what}")
    kind = typed.unit.temperature
    if is_temperature(unit) and unit.temperature == "none" and kind in ("difference", "unclear"):
        unit = unit.of_kind(kind)
    return Typed(brought(tree, typed, unit, graph), unit, typed.zero)
