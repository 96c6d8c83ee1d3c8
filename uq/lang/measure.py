"""The units of operators and functions: what they need and what they give.

In: the parts of an expression with their units. Out: the unit of the whole and the unit that each argument is brought to, or an
ExpressionError. Must not know: graphs, names.

What has the right dimension is converted, wherever it stands; a wrong dimension is refused. A sum, `min`, `max`, `where` and `mod` have
the unit of their first term that is not a plain 0; a temperature in degC or degF that is shifted stays on its scale.
"""

from __future__ import annotations

from collections.abc import Callable
from fractions import Fraction
from typing import NamedTuple

from uq.errors import ExpressionError, ValueMistake
from uq.lang import temperatures
from uq.lang.scope import Typed
from uq.lang.slips import slip
from uq.lang.tree import Tree
from uq.units import NONE, Unit

_MOST_POWER = 100
Terms = tuple[tuple[Tree, Typed], ...]


class Ruling(NamedTuple):
    """The unit of a whole, and for every argument the unit that it is brought to (None: it stands as it is)."""

    unit: Unit
    needs: tuple[Unit | None, ...]


def mistake(part: Tree, found: str, expected: str, remedy: str = "") -> ExpressionError:
    """An ExpressionError that points at a part of an expression."""
    return ExpressionError(part.start, part.stop - part.start, found, expected, remedy)


def require(part: Tree, typed: Typed, unit: Unit, why: str = "") -> None:
    """Refuses a part that cannot be brought to the unit needed; `why` goes on after the unit, as in 'kJ, as `heat` has'."""
    if typed.zero:
        return
    own = typed.unit
    if not own.same_dimension(unit):
        raise mistake(part, f"`{part.text}` {found(own)}", f"{told(unit)}{why}", _remedy(part, own, unit))
    if temperatures.clash(own, unit):
        words = temperatures.WORDS
        said = f"{words[unit.temperature]} in {unit.text}{why}"
        raise mistake(part, f"`{part.text}` {found(own)}, {words[own.temperature]}", said, temperatures.CLEAR)


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
    """What may mend a wrong dimension."""
    if part.op == "number":
        return f"write '{part.text.strip('()')} {needed.text}' in quotes"
    likely = slip(unit, needed)
    if not needed.dimension:
        plain = f"divide it by a value in {unit.text}, as in / '1 {unit.text}'"
        return f"{likely} or {plain}" if likely and len(unit.dimension) > 1 else plain
    return likely


def _no_scale(part: Tree, typed: Typed) -> None:
    if typed.unit.temperature == "scale":
        remedy = "use K: values in degC or degF can only be compared, subtracted or shifted by a difference"
        raise mistake(part, f"`{part.text}` in {typed.unit.text}", "a temperature in K", remedy)


def _first(part: Tree, unit: Unit) -> Tree:
    """The first term of a sum, which says what the others must be in; of temperatures the whole, as its terms may be differences."""
    while part.op in ("+", "-") and not temperatures.is_temperature(unit):
        part = part.args[0]
    return part


def _brought(terms: Terms, leaders: Terms) -> Ruling:
    """All in the unit of the first leader that is not a plain 0; gives that unit."""
    leader = next((term for term in leaders if not term[1].zero), terms[0])
    unit = leader[1].unit
    for tree, typed in terms:
        require(tree, typed, unit, f", as `{_first(leader[0], unit).text}` has")
    return Ruling(unit, (unit,) * len(terms))


def same(part: Tree, terms: Terms) -> Ruling:
    """All in the unit of the first that is not a plain 0; gives that unit."""
    unit, needs = _brought(terms, terms)
    return Ruling(temperatures.of_choice(unit, {typed.unit.temperature for _, typed in terms if not typed.zero} or {"none"}), needs)


def compared(part: Tree, terms: Terms) -> Ruling:
    """One unit on both sides; gives none. A number is brought to the unit of what varies, so that it costs nothing."""
    leaders = tuple(sorted(terms, key=lambda term: isinstance(term[1].node.value, float)))
    return Ruling(NONE, _brought(terms, leaders).needs)


def ratio(part: Tree, terms: Terms) -> Ruling:
    """Arguments in one unit, whatever it is; gives none."""
    _each(terms)
    return compared(part, terms)


def kept(part: Tree, terms: Terms) -> Ruling:
    """Any one unit, but no point on a temperature scale; gives it back."""
    _each(terms)
    return same(part, terms)


def _each(terms: Terms) -> None:
    for tree, typed in terms:
        _no_scale(tree, typed)


def bare(part: Tree, terms: Terms) -> Ruling:
    """Arguments without unit: an angle in rad, a share as a number of 1; gives none."""
    for tree, typed in terms:
        _no_scale(tree, typed)
        require(tree, typed, NONE, f" in {part.name}( )")
    return Ruling(NONE, (NONE,) * len(terms))


def added(part: Tree, terms: Terms) -> Ruling:
    """A sum or difference: the unit of the first term, or a point on a temperature scale and a difference."""
    (_, left), (_, right) = terms
    scaled = [typed.unit.temperature == "scale" for _, typed in terms]
    if all(scaled) and part.op == "+":
        raise mistake(part, f"a sum of two temperatures, `{part.text}`", "a temperature and a difference", "use K, or subtract")
    if any(scaled) and not all(scaled):
        if part.op == "+" or scaled[0]:
            return _shifted(part, terms)
        if left.zero or left.unit.temperature != "none":
            found = f"`{part.text}`, a difference minus a temperature in {right.unit.text}"
            raise mistake(part, found, "a temperature first", temperatures.CLEAR)
    unit, needs = _brought(terms, terms)
    if any(scaled):
        return Ruling(unit.difference().of_kind("difference"), needs)
    if left.zero or right.zero:
        return Ruling(unit, needs)
    return Ruling(temperatures.of_sum(unit, part.op, left.unit.temperature, right.unit.temperature), needs)


def _shifted(part: Tree, terms: Terms) -> Ruling:
    """A point on a temperature scale and a difference by which it is shifted; gives the scale.

    Less a K it is in K: that number is right whether the K is a shift or another temperature.
    """
    point = 0 if terms[0][1].unit.temperature == "scale" else 1
    scale, (tree, shift) = terms[point][1].unit, terms[1 - point]
    step = scale.difference()
    require(tree, shift, step, f", the difference by which a temperature in {scale.text} is shifted")
    if part.op == "-" and not shift.zero and shift.unit.temperature != "difference":
        return Ruling(shift.unit.of_kind("unclear"), (shift.unit, shift.unit))
    return Ruling(scale, (scale, step) if point == 0 else (step, scale))


def multiplied(part: Tree, terms: Terms) -> Ruling:
    """A product or quotient: units multiply, or divide; nothing is converted."""
    _each(terms)
    (_, left), (_, right) = terms
    unit = _sized(part, lambda: left.unit * right.unit if part.op == "*" else left.unit / right.unit)
    factors = (left.unit, right.unit) if part.op == "*" else (left.unit,)
    return Ruling(temperatures.of_product(unit, factors), (None, None))


def rooted(part: Tree, terms: Terms) -> Ruling:
    """A square root: half the power."""
    _each(terms)
    return Ruling(_sized(part, lambda: terms[0][1].unit ** Fraction(1, 2)), (None,))


def raised(part: Tree, terms: Terms) -> Ruling:
    """A power: exponent without unit, and a plain number where the base has a dimension."""
    _each(terms)
    (base_tree, base), (tree, exponent) = terms
    if exponent.unit.dimension:
        remedy = _remedy(tree, exponent.unit, NONE)
        raise mistake(tree, f"the exponent `{tree.text}` {found(exponent.unit)}", "an exponent without unit", remedy)
    value = exponent.node.value
    if base.unit.is_none or (not isinstance(value, float) and not base.unit.dimension):
        return Ruling(NONE, (NONE, NONE))
    if not isinstance(value, float):
        wanted = f"a base without unit, or a number as exponent, since `{tree.text}` varies"
        raise mistake(base_tree, f"`{base_tree.text}` {found(base.unit)}", wanted, _remedy(base_tree, base.unit, NONE))
    value = exponent.unit.convert(value, NONE)
    power = Fraction(value).limit_denominator(10_000)
    if abs(value) > _MOST_POWER or abs(float(power) - value) > 1e-12 * abs(value):
        wanted = f"a simple fraction of at most {_MOST_POWER} in size, since the base has a unit"
        raise mistake(tree, f"the exponent `{tree.text}`", wanted, f"divide the base by '1 {base.unit.text}'")
    return Ruling(_sized(part, lambda: base.unit**power), (None, NONE))


def tabled(part: Tree, terms: Terms, argument: Unit, value: Unit) -> Ruling:
    """A table used as a function: its argument in the unit of its points; gives the unit of its values."""
    ((tree, typed),) = terms
    require(tree, typed, argument, f", in which the table `{part.name}` is given")
    return Ruling(value, (argument,))


def _sized(part: Tree, made: Callable[[], Unit]) -> Unit:
    try:
        return made()
    except ValueMistake as error:
        raise mistake(part, error.found, error.expected, error.remedy) from None
