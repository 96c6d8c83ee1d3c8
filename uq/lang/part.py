"""One part of an expression: what it needs and what node it becomes.

In: a part of a tree, whose arguments are nodes with units already. Out: its node with its unit, or an ExpressionError.
Must not know: models, files.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from typing import NamedTuple

from uq.errors import ExpressionError, ValueMistake, suggest
from uq.lang import measure
from uq.lang.convert import converted
from uq.lang.entries import bare, number_of, placed
from uq.lang.graph import COMPARISONS, Graph, Node
from uq.lang.measure import Ruling, Terms, mistake
from uq.lang.scope import Scope, Typed
from uq.lang.tree import Tree
from uq.lang.words import COURSES, COURSES_LATER, FUNCTION_NAMES, REDUCTIONS
from uq.units import NONE, Unit, parse_unit


class Function(NamedTuple):
    """A function: fewest and most arguments (0: no limit) and the rule for its unit."""

    name: str
    least: int
    most: int
    unit: Callable[[Tree, Terms], Ruling]


FUNCTIONS: tuple[Function, ...] = (
    *(Function(name, 1, 1, measure.bare) for name in ("exp", "ln", "log10")),
    Function("sqrt", 1, 1, measure.rooted),
    *(Function(name, 1, 1, measure.bare) for name in ("sin", "cos", "tan", "asin", "acos", "atan")),
    Function("atan2", 2, 2, measure.ratio),
    *(Function(name, 1, 1, measure.bare) for name in ("sinh", "cosh", "tanh", "erf")),
    Function("abs", 1, 1, measure.kept),
    Function("min", 2, 0, measure.same),
    Function("max", 2, 0, measure.same),
    Function("mod", 2, 2, measure.kept),
    Function("where", 3, 3, measure.same),
)
_FUNCTIONS = {function.name: function for function in FUNCTIONS}

_OPERATORS: dict[str, Callable[[Tree, Terms], Ruling]] = {
    "+": measure.added,
    "-": measure.added,
    "*": measure.multiplied,
    "/": measure.multiplied,
    "**": measure.raised,
    "neg": measure.kept,
    **dict.fromkeys(COMPARISONS, measure.compared),
}
#: operators and functions that only choose or scale a plain 0, so that it stays one
_ZERO_STAYS = ("+", "-", "neg", "abs", "min", "max", "where")


def lower_part(part: Tree, args: tuple[Typed, ...], scope: Scope, graph: Graph) -> Typed:
    """The node of one part, whose arguments have theirs."""
    if part.op == "number":
        return Typed(graph.number(part.value), NONE, zero=part.value == 0.0)
    if part.op == "quantity":
        return _quantity(part, scope, graph)
    if part.op == "name":
        return _name(part, scope, graph)
    if part.op == "entry":
        return placed(part, scope)
    terms = tuple(zip(part.args, args, strict=True))
    op = part.op
    if op == "call" and part.name in scope.tables:
        return _table(part, terms, scope, graph)
    if op == "call":
        op = part.name
        rule = _function(part, scope).unit
    elif op in ("and", "or", "not"):
        for tree, typed in terms:
            require_truth(tree, typed, f"beside `{op}`")
        return Typed(graph.apply(op, *(arg.node for arg in args)), NONE)
    else:
        rule = _OPERATORS[op]
    if op == "where":
        require_truth(*terms[0], "first in where( )")
        terms = terms[1:]
    for tree, typed in terms:
        if op in COMPARISONS:
            require_number(tree, typed, "write a < b and b < c")
        else:
            require_number(tree, typed)
    unit, needs = rule(part, terms)
    nodes = [brought(tree, typed, need, graph) for (tree, typed), need in zip(terms, needs, strict=True)]
    if op == "where":
        nodes.insert(0, args[0].node)
    return Typed(graph.apply(op, *nodes), unit, zero=op in _ZERO_STAYS and all(typed.zero for _, typed in terms))


def brought(part: Tree, typed: Typed, unit: Unit | None, graph: Graph) -> Node:
    """The node of a part in another unit of its dimension; None leaves it as it is."""
    try:
        return typed.node if unit is None else converted(graph, typed, unit)
    except ValueMistake as error:
        raise mistake(part, error.found, error.expected, error.remedy) from None


def require_truth(part: Tree, typed: Typed, where: str = "here") -> None:
    """Refuses a number where a condition is needed."""
    if not typed.truth:
        raise mistake(part, f"the number `{part.text}`", f"a condition {where}", "compare it, as in x > 0")


def require_number(part: Tree, typed: Typed, remedy: str = "write where(condition, 1, 0)") -> None:
    """Refuses a condition where a number is needed."""
    if typed.truth:
        raise mistake(part, f"the condition `{part.text}`", "a number", remedy)


def _quantity(part: Tree, scope: Scope, graph: Graph) -> Typed:
    if scope.unitless:
        raise mistake(part, f"the quantity {part.text}", "a plain number", "this study states no unit anywhere; give all of them, or none")
    try:
        unit = parse_unit(part.name, scope.own)
    except ValueMistake as error:
        raise mistake(part, error.found, error.expected, error.remedy) from None
    return Typed(graph.number(part.value), unit)


def _name(part: Tree, scope: Scope, graph: Graph) -> Typed:
    if part.name == "pi":
        return Typed(graph.number(math.pi), NONE)
    if part.name in scope.names:
        node, unit = scope.names[part.name]
        return Typed(node, unit)
    if part.name in scope.repeated:
        return bare(part, scope.repeated[part.name], scope)
    if part.name in scope.indices:
        return number_of(part, scope, graph)
    if part.name in scope.barred:
        raise mistake(part, f"`{part.name}`", "a name that may stand here", scope.barred[part.name])
    if part.name in scope.tables:
        raise mistake(part, f"the table `{part.name}` without brackets", "a value", f"write {part.name}(x)")
    if part.name in (*FUNCTION_NAMES, *REDUCTIONS, *COURSES, *COURSES_LATER):
        along = ", cell" if part.name == "sum" else ""
        raise mistake(part, f"the function `{part.name}` without brackets", "a value", f"write {part.name}(x{along})")
    remedy = suggest(part.name, (*scope.names, *scope.repeated)) or suggest(part.name, scope.barred)
    if part.name.lower() in ("true", "false", "inf", "nan", "e", "infinity"):
        remedy = remedy or {"true": "write 1 > 0", "false": "write 0 > 1", "e": "write exp(1)"}.get(part.name.lower(), "numbers are finite")
    raise mistake(part, f"the unknown name `{part.name}`", "a name of this study", remedy)


def _table(part: Tree, terms: Terms, scope: Scope, graph: Graph) -> Typed:
    check_count(part, 1, 1)
    ((tree, typed),) = terms
    require_number(tree, typed)
    given = scope.tables[part.name]
    unit, needs = measure.tabled(part, terms, given.argument, given.value)
    return Typed(graph.table(part.name, brought(tree, typed, needs[0], graph)), unit)


def _function(part: Tree, scope: Scope) -> Function:
    if part.name == "sum":
        raise _no_sum(part, scope)
    if part.name in COURSES:
        remedy = "functions of a whole course stand in the `take` of an outcome only"
        raise _head(part, f"`{part.name}( )`", "a function of values at one time", remedy)
    if part.name in COURSES_LATER:
        raise _head(part, f"`{part.name}( )`", "a function that is built", "not available yet")
    function = _FUNCTIONS.get(part.name)
    if function is None:
        if part.name in scope.names or part.name in scope.barred:
            raise _head(part, f"`{part.name}` before a bracket", "a function", f"write {part.name} * ( ) for a product")
        remedy = suggest(part.name, (*FUNCTION_NAMES, *scope.tables)) or "there are " + ", ".join(FUNCTION_NAMES)
        raise _head(part, f"the unknown function `{part.name}`", "a function", remedy)
    check_count(part, function.least, function.most)
    return function


def _no_sum(part: Tree, scope: Scope) -> ExpressionError:
    """What is wrong with a sum that is over no index."""
    known = ", ".join(scope.indices)
    remedy = (
        f"there {'are' if len(scope.indices) > 1 else 'is'} {known}" if known else "this study has no [index]; write a + b for a sum of two"
    )
    if len(part.args) != 2:
        return _head(
            part, f"{len(part.args)} argument{'s' * (len(part.args) != 1)} in sum( )", "2: what is summed, and over which index", remedy
        )
    return mistake(part.args[1], f"`{part.args[1].text}` as what a sum goes over", "an index", remedy)


def check_count(part: Tree, least: int, most: int) -> None:
    """Refuses a call with too few or too many arguments; `most` 0 sets no limit."""
    count = len(part.args)
    if count < least or (most and count > most):
        wanted = f"{least} or more" if most == 0 else str(least) if least == most else f"{least} to {most}"
        raise _head(part, f"{count} argument{'s' * (count != 1)} in {part.name}( )", wanted)


def _head(part: Tree, found: str, expected: str, remedy: str = "") -> ExpressionError:
    """A mistake that points at the name of a call."""
    return ExpressionError(part.start, len(part.name), found, expected, remedy)
