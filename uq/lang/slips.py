"""What was probably forgotten where an expression has the wrong dimension.

In: the unit found and the unit needed. Out: a question in words, or nothing. Must not know: expressions.
"""

from __future__ import annotations

import functools
from fractions import Fraction

from uq.units import Unit, parse_unit
from uq.units.unit import Powers

#: quantities that are forgotten, each with a unit of its dimension; the first that fits is told
FORGOTTEN: tuple[tuple[str, str], ...] = (
    ("a time", "s"),
    ("a mass", "kg"),
    ("a length", "m"),
    ("an area", "m2"),
    ("a volume", "m3"),
    ("an amount of substance", "mol"),
    ("a temperature", "K"),
    ("an electric current", "A"),
    ("a velocity", "m/s"),
    ("an acceleration", "m/s2"),
    ("a density", "kg/m3"),
    ("a concentration", "mol/m3"),
    ("a molar mass", "kg/mol"),
    ("a gas constant", "J/mol/K"),
    ("a specific heat", "J/kg/K"),
    ("a heat capacity", "J/K"),
    ("a specific energy", "J/kg"),
    ("a molar energy", "J/mol"),
    ("an energy", "J"),
    ("a power", "W"),
    ("a force", "N"),
    ("a pressure", "Pa"),
    ("a volume flow", "m3/s"),
    ("a mass flow", "kg/s"),
    ("a voltage", "V"),
    ("a resistance", "ohm"),
)


def slip(unit: Unit, needed: Unit) -> str:
    """'is a factor missing, a mass?', 'is it to be divided by a time?', or an empty text."""
    missing = dict(needed.dimension)
    for base, power in unit.dimension:
        missing[base] = missing.get(base, Fraction(0)) - power
    missing = {base: power for base, power in missing.items() if power}
    if word := _word(missing):
        return f"is a factor missing, {word}?"
    if word := _word({base: -power for base, power in missing.items()}):
        return f"is it to be divided by {word}?"
    return ""


def _word(dimension: dict[str, Fraction]) -> str:
    word = _words().get(tuple(sorted(dimension.items())), "")
    counted = [base for base, power in dimension.items() if power == 1 and len(dimension) == 1]
    return word or (f"a number of {counted[0]}" if counted and "[" not in counted[0] and counted[0] != "cd" else "")


@functools.cache
def _words() -> dict[Powers, str]:
    found: dict[Powers, str] = {}
    for word, text in FORGOTTEN:
        found.setdefault(parse_unit(text).dimension, word)
    return found
