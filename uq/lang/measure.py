"""The units of operators and functions: what they need and what they give.

In: the parts of an expression with their units. Out: the unit of the whole, or an ExpressionError. Must not know: graphs, names.

Nothing is converted: a sum of kJ and J is refused, and so is the factor 1000 that is left of kJ/J where no unit may be.
"""

from __future__ import annotations

from collections.abc import Callable
from fractions import Fraction

from uq.errors import ExpressionError, ValueMistake
from uq.lang.scope import Typed
from uq.lang.tree import Tree
from uq.units import NONE, Unit, parse_unit

_MOST_POWER = 100
_KELVIN = parse_unit("K")
Terms = tuple[tuple[Tree, Typed], ...]


def mistake(part: Tree, found: str, expected: str, remedy: str = "") -> ExpressionError:
    """An ExpressionError that points at a part of an expression."""
    return ExpressionError(part.start, part.stop - part.start, found, expected, remedy)


def require(part: Tree, typed: Typed, unit: Unit, why: str = "") -> None:
    """Refuses a part that is not in the unit needed; `why` goes on after the unit, as in 'kJ, as `heat` has'."""
    if not typed.fits(unit):
        raise mistake(part, f"`{part.text}` {found(typed.unit)}", f"{told(unit)}{why}", _remedy(part, typed.unit, unit))


def told(unit: Unit) -> str:
    """A unit as a sentence names it; the factor is told where there is no dimension that shows it."""
    if unit.is_none:
        return "no unit"
    if not unit.dimension:
        return f"{unit.text} (a factor of {float(unit.factor):.6g})"
    return unit.text


def found(unit: Unit) -> str:
    """'in kJ/min', 'without unit'."""
    return "without unit" if unit.is_none else f"in {told(unit)}"


def _remedy(part: Tree, unit: Unit, needed: Unit) -> str:
    if "scale" in (unit.temperature, needed.temperature) and unit.same_dimension(needed):
        return "use K for both"
    if needed.is_none and not unit.is_none and unit.dimension:
        return f"divide it by a value in {unit.text}, as in / '1 {unit.text}'"
    if part.op == "number" and not needed.is_none:
        return f"write '{part.text.strip('()')} {needed.text}' in quotes"
    if unit.same_dimension(needed):
        return _factor(unit, needed)
    return ""


def _factor(unit: Unit, needed: Unit) -> str:
    """How a value in one unit gets into another, with the rounder of the two numbers."""
    times, per = f"{unit.factor_to(needed):.15g}", f"{needed.factor_to(unit):.15g}"
    if len(times) <= len(per):
        return f"multiply it by '{times} {_bracketed(needed)}/{_bracketed(unit)}'"
    return f"divide it by '{per} {_bracketed(unit)}/{_bracketed(needed)}'"


def _bracketed(unit: Unit) -> str:
    return unit.text if len(unit.parts) <= 1 and not set(unit.text) & set("/* ") else f"({unit.text})"


def _no_scale(part: Tree, typed: Typed) -> None:
    if typed.unit.temperature == "scale":
        remedy = "use K: values in degC or degF can only be compared, subtracted or shifted by a difference"
        raise mistake(part, f"`{part.text}` in {typed.unit.text}", "a temperature in K", remedy)


def _first(part: Tree, unit: Unit) -> Tree:
    """The first term of a sum, which says what the others must be in; of temperatures the whole, as its terms may be differences."""
    while part.op in ("+", "-") and not unit.same_dimension(_KELVIN):
        part = part.args[0]
    return part


def same(part: Tree, terms: Terms) -> Unit:
    """All in the unit of the first that is not a plain 0; gives that unit."""
    leader = next((term for term in terms if not term[1].zero), terms[0])
    for tree, typed in terms:
        if not typed.fits(leader[1].unit):
            require(tree, typed, leader[1].unit, f", as `{_first(leader[0], leader[1].unit).text}` has")
    return leader[1].unit


def compared(part: Tree, terms: Terms) -> Unit:
    """The same unit on both sides; gives none."""
    same(part, terms)
    return NONE


def ratio(part: Tree, terms: Terms) -> Unit:
    """Arguments in one unit, whatever it is; gives none."""
    _each(terms)
    return compared(part, terms)


def kept(part: Tree, terms: Terms) -> Unit:
    """Any one unit, but no point on a temperature scale; gives it back."""
    _each(terms)
    return same(part, terms)


def _each(terms: Terms) -> None:
    for tree, typed in terms:
        _no_scale(tree, typed)


def bare(part: Tree, terms: Terms) -> Unit:
    """Arguments without unit; gives none."""
    for tree, typed in terms:
        _no_scale(tree, typed)
        if not typed.fits(NONE):
            unit = typed.unit
            remedy = _remedy(tree, unit, NONE)
            if unit.text == "deg":
                remedy = f"angles are in rad: write {tree.text if not tree.args else f'({tree.text})'} * '{float(unit.factor)!r} rad/deg'"
            raise mistake(tree, f"`{tree.text}` {found(unit)}", f"no unit in {part.name}( )" if part.name else "no unit", remedy)
    return NONE


def added(part: Tree, terms: Terms) -> Unit:
    """A sum or difference: one unit, or a point on a temperature scale and a difference."""
    (left_tree, left), (right_tree, right) = terms
    scaled = [typed.unit.temperature == "scale" for _, typed in terms]
    if not any(scaled):
        return same(part, terms)
    if all(scaled):
        if part.op == "+":
            raise mistake(part, f"a sum of two temperatures, `{part.text}`", "a temperature and a difference", "use K, or subtract")
        require(right_tree, right, left.unit, f", as `{left_tree.text}` has")
        return left.unit.difference()
    if scaled[1] and part.op == "-":
        raise mistake(part, f"`{part.text}`, a difference minus a temperature in {right.unit.text}", "a temperature first", "use K")
    scale, (tree, shift) = (left.unit, (right_tree, right)) if scaled[0] else (right.unit, (left_tree, left))
    require(tree, shift, scale.difference(), f", the difference by which a temperature in {scale.text} is shifted")
    return scale


def multiplied(part: Tree, terms: Terms) -> Unit:
    """A product or quotient: units multiply, or divide."""
    _each(terms)
    (_, left), (_, right) = terms
    return _sized(part, lambda: left.unit * right.unit if part.op == "*" else left.unit / right.unit)


def rooted(part: Tree, terms: Terms) -> Unit:
    """A square root: half the power."""
    _each(terms)
    return _sized(part, lambda: terms[0][1].unit ** Fraction(1, 2))


def raised(part: Tree, terms: Terms) -> Unit:
    """A power: exponent without unit, and a plain number where the base has one."""
    _each(terms)
    (base_tree, base), (tree, exponent) = terms
    if not exponent.fits(NONE):
        remedy = _remedy(tree, exponent.unit, NONE)
        raise mistake(tree, f"the exponent `{tree.text}` {found(exponent.unit)}", "an exponent without unit", remedy)
    if base.unit.is_none:
        return NONE
    value = exponent.node.value
    if not isinstance(value, float):
        wanted = f"a base without unit, or a number as exponent, since `{tree.text}` varies"
        raise mistake(base_tree, f"`{base_tree.text}` {found(base.unit)}", wanted, _remedy(base_tree, base.unit, NONE))
    power = Fraction(value).limit_denominator(10_000)
    if abs(value) > _MOST_POWER or abs(float(power) - value) > 1e-12 * abs(value):
        wanted = f"a simple fraction of at most {_MOST_POWER} in size, since the base has a unit"
        raise mistake(tree, f"the exponent `{tree.text}`", wanted, f"divide the base by '1 {base.unit.text}'")
    return _sized(part, lambda: base.unit**power)


def _sized(part: Tree, made: Callable[[], Unit]) -> Unit:
    try:
        return made()
    except ValueMistake as error:
        raise mistake(part, error.found, error.expected, error.remedy) from None
