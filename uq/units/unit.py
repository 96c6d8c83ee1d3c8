"""A unit: exact dimension, exact scale, and what a temperature in it is.

In: units. Out: their products, powers, comparisons, conversions and texts. Must not know: how a text is read.
"""

from __future__ import annotations

import functools
from collections.abc import Iterable
from dataclasses import dataclass, replace
from fractions import Fraction
from typing import Literal

from uq.errors import ValueMistake

Powers = tuple[tuple[str, Fraction], ...]
Temperature = Literal["none", "scale", "difference", "unclear"]

_SAME = Fraction(1, 10**12)
_MOST_POWER = 1000
#: a factor stays between 1e-140 and 1e140, so that a ratio of two is a double; an exact fraction may need many digits in spite of that
_MOST_SIZE = 140
_MOST_DIGITS = 3000
_SI = ("kg", "m", "s", "A", "K", "mol", "cd")


@dataclass(frozen=True, slots=True)
class Unit:
    """A unit as the user wrote it, or put together from such.

    `parts`: the symbols that it is written with, and their powers; `dimension`: powers of SI base units; `factor`: its size in them.
    `temperature`: "scale" for degC and degF, whose values are points, with the `offset` of their zero in kelvin; "difference" for
    delta_degC, delta_degF and what lies between two points; "unclear" for a K of which nobody can say (K - K is a temperature less a
    shift, or a difference of two); "none" for all others, also for K, which is then taken as a point where it meets a scale.
    `spellings`: how UDUNITS writes the symbols that it is sure to know.
    """

    text: str
    parts: Powers
    dimension: Powers
    factor: Fraction
    temperature: Temperature = "none"
    offset: Fraction = Fraction(0)
    spellings: tuple[tuple[str, str], ...] = ()

    @property
    def is_none(self) -> bool:
        """Whether it is no unit at all: without dimension and of factor 1 (rad is, % and deg are not)."""
        return not self.dimension and abs(self.factor - 1) <= _SAME

    def __str__(self) -> str:
        return self.text

    def __mul__(self, other: Unit) -> Unit:
        return _product(self, other, 1)

    def __truediv__(self, other: Unit) -> Unit:
        return _product(self, other, -1)

    def __pow__(self, power: Fraction | int) -> Unit:
        power = Fraction(power)
        self._must_multiply()
        size, digits = _extent(self.factor)
        if abs(power) > _MOST_POWER or abs(size * power) > _MOST_SIZE or digits * abs(power) > _MOST_DIGITS:
            raise _too_large()
        factor = self.factor**power.numerator if power.denominator == 1 else Fraction(float(self.factor) ** float(power))
        return _made(_powers(self.parts, power), _powers(self.dimension, power), factor, self.spellings)

    def same_dimension(self, other: Unit) -> bool:
        """Whether a value can be converted into the other unit."""
        return self.dimension == other.dimension

    def same(self, other: Unit) -> bool:
        """Whether a value may be added to one in the other unit as it stands: dimension, factor (to 1e-12) and temperature scale agree."""
        return self is other or (
            self.dimension == other.dimension
            and (self.factor == other.factor or abs(self.factor - other.factor) <= _SAME * other.factor)
            and self.offset == other.offset
            and (self.temperature == "scale") == (other.temperature == "scale")
        )

    def difference(self) -> Unit:
        """The unit of a difference of two values: K for degC, delta_degF for degF, otherwise the unit itself."""
        if self.temperature != "scale":
            return self
        name = "K" if self.factor == 1 else f"delta_{self.text}"
        one = Fraction(1)
        return Unit(name, ((name, one),), self.dimension, self.factor, "difference", spellings=(("K", "K"),))

    def of_kind(self, temperature: Temperature) -> Unit:
        """The same unit (no scale) for values of which more, or less, is known."""
        return replace(self, temperature=temperature)

    def conversion(self, to: Unit) -> tuple[float, float]:
        """Factor and shift, x * factor + shift, that bring a value into the other unit: each the double nearest to the exact fraction.

        The shift is 0 except between temperature scales, or one and K. Raises ValueMistake where dimensions differ.
        """
        if not self.same_dimension(to):
            raise ValueMistake(f"a value in {self.text}", f"one in {to.text}")
        return float(self.factor / to.factor), float((self.offset - to.offset) / to.factor)

    def convert(self, value: float, to: Unit) -> float:
        """The value, taken as the decimal number that it is written as, in another unit of the same dimension, rounded once.

        Offsets of temperature scales are included: 348.15 K is 75 degC.
        """
        if not self.same_dimension(to):
            raise ValueMistake(f"a value in {self.text}", f"one in {to.text}")
        # with K and a scale, and between scales, a value is a point; between two units without scale the offsets are 0
        try:
            return float((Fraction(repr(float(value))) * self.factor + self.offset - to.offset) / to.factor)
        except OverflowError:
            raise ValueMistake(f"{value:g} {self.text}", f"a finite number in {to.text}") from None

    @property
    def udunits(self) -> str:
        """The unit for the attribute `units` of a NetCDF variable, as UDUNITS-2 reads it.

        Where a spelling is not sure to be known there, the base units with a factor are written; powers that are not whole have no UDUNITS
        text, the plain text is given. Counting units of a study are left out: UDUNITS counts without unit.
        """
        if self.temperature == "scale":
            return self.text
        known = dict(self.spellings)
        if all(name in known and power.denominator == 1 for name, power in self.parts):
            return " ".join(_power(known[name], power, "") for name, power in self.parts if known[name]) or "1"
        if any(power.denominator != 1 for _, power in self.dimension):
            return self.text
        size = [] if self.factor == 1 else [repr(float(self.factor)).removesuffix(".0")]
        return " ".join([*size, *(_power(name, power, "") for name, power in self.dimension if name in _SI)]) or "1"

    def _must_multiply(self) -> None:
        if self.temperature == "scale":
            remedy = "use K: only differences, shifts and comparisons work on such a scale"
            raise ValueMistake(f"a temperature in {self.text}", "one in K", remedy)


NONE = Unit("1", (), (), Fraction(1))


# What repeats over an index has the same products in every entry.
@functools.lru_cache(maxsize=4096)
def _product(one: Unit, other: Unit, sign: int) -> Unit:
    """The product of two units, or with the sign -1 their quotient."""
    one._must_multiply()
    other._must_multiply()
    factor = one.factor * other.factor if sign > 0 else one.factor / other.factor
    spellings = tuple(dict((*one.spellings, *other.spellings)).items())
    return _made(_joined(one.parts, other.parts, sign), _sorted(_joined(one.dimension, other.dimension, sign)), factor, spellings)


def _made(parts: Powers, dimension: Powers, factor: Fraction, spellings: tuple[tuple[str, str], ...]) -> Unit:
    size, digits = _extent(factor)
    if abs(size) > _MOST_SIZE or digits > _MOST_DIGITS or any(abs(power) > _MOST_POWER for _, power in dimension):
        raise _too_large()
    used = {name for name, _ in parts}
    return Unit(written(parts), parts, dimension, factor, spellings=tuple((name, text) for name, text in spellings if name in used))


def _extent(factor: Fraction) -> tuple[float, float]:
    """Decimal size and number of digits of a factor, roughly."""
    above, below = factor.numerator.bit_length(), factor.denominator.bit_length()
    return (above - below) * 0.30103, max(above, below) * 0.30103


def _too_large() -> ValueMistake:
    return ValueMistake("a unit with a power or factor beyond all measure", f"powers up to {_MOST_POWER}")


def _joined(one: Powers, other: Powers, sign: int) -> Powers:
    powers = dict(one)
    for name, power in other:
        powers[name] = powers.get(name, Fraction(0)) + sign * power
    return tuple((name, power) for name, power in powers.items() if power)


def _sorted(powers: Powers) -> Powers:
    return tuple(sorted(powers))


def _powers(powers: Powers, power: Fraction) -> Powers:
    return tuple((name, old * power) for name, old in powers) if power else ()


def _power(name: str, power: Fraction, mark: str) -> str:
    if power == 1:
        return name
    return f"{name}{mark}{power}" if power.denominator == 1 else f"{name}**({power})"


def written(parts: Iterable[tuple[str, Fraction]]) -> str:
    """The text of a product of powers, as `parse_unit` reads it: 'kJ m2/kg/K', '1/s', '1'."""
    parts = tuple(parts)
    above = " ".join(_power(name, power, "") for name, power in parts if power > 0)
    below = "".join("/" + _power(name, -power, "") for name, power in parts if power < 0)
    return (above or "1") + below
