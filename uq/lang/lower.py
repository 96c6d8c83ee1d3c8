"""From tree to graph: names, kinds and units checked in one pass.

In: a tree, a scope, a graph. Out: a node with its unit, or an ExpressionError. Must not know: models, files.
"""

from __future__ import annotations

from uq.lang.graph import Graph
from uq.lang.measure import require
from uq.lang.part import lower_part, require_number, require_truth
from uq.lang.scope import Scope, Typed
from uq.lang.take import CourseAsked, TakeResult, lower_take
from uq.lang.tree import Tree, fold
from uq.units import Unit

__all__ = ["CourseAsked", "Scope", "TakeResult", "Typed", "lower", "lower_take", "require_truth", "require_unit"]


def lower(tree: Tree, scope: Scope, graph: Graph) -> Typed:
    """The node of an expression with its unit; raises ExpressionError at the first mistake in the order of evaluation."""
    return fold(tree, lambda part, args: lower_part(part, args, scope, graph))


def require_unit(tree: Tree, typed: Typed, unit: Unit, what: str = "") -> None:
    """Refuses an expression that is not a number in the unit needed; `what` says for what, as in 'for the rate of `T`'."""
    require_number(tree, typed)
    require(tree, typed, unit, what and f" {what}")
