"""How units and quantities are written.

In: text. Out: a unit or a quantity, or a ValueMistake with its remedy. Must not know: expressions.

    unit   = factor { (blank | "*" | "/") factor }          no product behind a "/": "kJ/kg K" is not clear
    factor = "1" | symbol [power] | "(" unit ")" [power]
    power  = ["-"] digits | "**" (["-"] number | "(" ["-"] digits ["/" digits] ")")
"""

from __future__ import annotations

import difflib
import functools
import math
import re
from dataclasses import dataclass
from fractions import Fraction

from uq.errors import ValueMistake
from uq.units.letters import called, plain
from uq.units.rare import rare
from uq.units.table import HINTS, KNOWN, PREFIXES, SCALES, Known
from uq.units.unit import NONE, Temperature, Unit

_MAX_LENGTH = 200
_MAX_DEPTH = 10

_QUANTITY = re.compile(r"\s*([+-]?[0-9]+(?:_[0-9]+)*(?:\.[0-9]+(?:_[0-9]+)*)?(?:[eE][+-]?[0-9]+)?)\s+(\S.*?)\s*", re.DOTALL)
_UNIT_LIKE = re.compile(r"[^\W\d_][\w*/ .^·°%()-]*|[°%℃℉Ω‰].*|1/[\w*/ .^·°%()-]+")
_SYMBOL = re.compile(r"[A-Za-zµμ%_]+(?:[0-9]+[A-Za-z_]+)*")
_OWN = re.compile(r"[A-Za-z]+(?:_[A-Za-z]+)*")
_POWER = re.compile(r"-?[0-9]+|\s*\*\*\s*(?:(-?[0-9]+(?:\.[0-9]+)?)|\(\s*(-?[0-9]+(?:\.[0-9]+)?)\s*(?:/\s*([0-9]+)\s*)?\))")


@functools.cache
def _by_symbol() -> dict[str, Known]:
    return {known.symbol: known for known in KNOWN}


@functools.cache
def _by_word() -> dict[str, Known]:
    return {form: known for known in KNOWN for word in known.words.split() for form in (word, word + "s", word + "es")}


@dataclass(frozen=True)
class Units:
    """Counting units of a study's own: each is a dimension of its own, of factor 1, and has a plural with s or es.

    Raises ValueMistake, with the name as its key, for a name that cannot be one.
    """

    names: tuple[str, ...] = ()

    def __post_init__(self) -> None:
        for name in self.names:
            if not _OWN.fullmatch(name):
                raise ValueMistake(f"the unit `{name}`", "a name of letters, as in person", key=name)
            if name in HINTS or name in SCALES or _standard(name) is not None:
                raise ValueMistake(f"the unit `{name}`, which has a meaning already", "a new name", f"as in {name}_counted", key=name)

    def single(self, name: str) -> str | None:
        """Which unit of one's own a word is, in its singular; None where it is none."""
        return next((own for own in self.names if name in (own, own + "s", own + "es")), None)


NO_OWN = Units()


@functools.lru_cache(maxsize=4096)
def parse_unit(text: str, own: Units = NO_OWN) -> Unit:
    """The unit of a text such as "kJ/kg/K", "kJ kg-1 K-1", "m**3", "m3", "1/min", "degC", "%" or "1" for none.

    `own`: the counting units of the study. Raises ValueMistake with what was found, what was expected and a remedy.
    """
    text = text.strip()
    if text in HINTS:
        raise ValueMistake(f"`{text}`" if text else "nothing", "a unit", HINTS[text])
    if text in SCALES:
        name, offset = SCALES[text]
        step = _single(name, own)
        return Unit(text, ((text, Fraction(1)),), step.dimension, step.factor, "scale", offset)
    if len(text) > _MAX_LENGTH:
        raise ValueMistake(f"a unit of {len(text)} characters", f"at most {_MAX_LENGTH}")
    unit = _Reader(text, own).run()
    temperature: Temperature = "difference" if text in ("delta_degC", "delta_degF") else "none"
    return Unit(text, unit.parts, unit.dimension, unit.factor, temperature, spellings=unit.spellings)


def parse_quantity(text: str, own: Units = NO_OWN) -> tuple[float, Unit] | None:
    """The number and unit of a text such as "75 degC"; None where the text is not a number, a blank and then something like a unit.

    A text of that form whose unit is not known ("75 C") raises ValueMistake: no expression looks like it.
    """
    match = _QUANTITY.fullmatch(text)
    if match is None or match.group(2).split()[0] in ("and", "or", "not"):
        return None
    if match.group(2) != "1" and match.group(2) not in HINTS and not _UNIT_LIKE.fullmatch(match.group(2)):
        return None
    value = float(match.group(1).replace("_", ""))
    if not math.isfinite(value):
        raise ValueMistake(f"`{match.group(1)}`", "a finite number")
    return value, parse_unit(match.group(2), own)


class _Reader:
    """Reads one text from left to right."""

    def __init__(self, text: str, own: Units) -> None:
        self.text, self.own = text, own
        self.place = 0

    def run(self) -> Unit:
        unit = self.product(0)
        if self.place < len(self.text):
            raise self.mistake("`)` without its partner", "an end")
        return unit

    def product(self, depth: int) -> Unit:
        unit, divided = self.factor(depth), False
        while True:
            start = self.place
            self.blanks()
            sign = self.text[self.place : self.place + 1]
            if sign in ("", ")"):
                return unit
            if sign in "*/":
                self.place += 1
                self.blanks()
            elif start == self.place:
                raise self.strange()
            if sign == "/":
                unit, divided = unit / self.factor(depth), True
            elif divided:
                remedy = "use one more / or brackets, as in kJ/kg/K or kJ/(kg K)"
                raise self.mistake("a product behind a `/`", "a unit that reads in one way only", remedy)
            else:
                unit = unit * self.factor(depth)

    def factor(self, depth: int) -> Unit:
        if self.text.startswith("(", self.place):
            if depth == _MAX_DEPTH:
                raise self.mistake("brackets within brackets", f"at most {_MAX_DEPTH} deep")
            self.place += 1
            self.blanks()
            unit = self.product(depth + 1)
            if not self.text.startswith(")", self.place):
                raise self.mistake("`(` without its partner", "a closing `)`")
            self.place += 1
            return unit ** self.power()
        if match := _SYMBOL.match(self.text, self.place):
            name = match.group()
            self.place = match.end()
            return _single(name, self.own) ** self.power()
        if re.match(r"1(?![0-9.])", self.text[self.place :]):
            self.place += 1
            return NONE
        raise self.strange()

    def power(self) -> Fraction:
        match = _POWER.match(self.text, self.place)
        if match is None:
            return Fraction(1)
        self.place = match.end()
        numerator = match.group(1) or match.group(2) or match.group()
        power = Fraction(numerator) / Fraction(match.group(3) or 1) if match.group(3) != "0" else Fraction(0)
        if power == 0 or abs(power) > 99:
            raise self.mistake(f"the power {match.group().strip(' *')}", "a power other than 0, at most 99 in size")
        return power

    def blanks(self) -> None:
        while self.text.startswith(" ", self.place):
            self.place += 1

    def strange(self) -> ValueMistake:
        character = self.text[self.place : self.place + 1]
        if not character:
            return self.mistake("the end", "a unit behind the operator")
        found = called(character)
        if character == "^":
            remedy = "write m3 or m**3 for a power"
        elif character in "0123456789.":
            found, remedy = "a number", "write it with the value"
        else:
            remedy = "" if character.isascii() else HINTS.get(self.text[self.place :], plain(character))
        return self.mistake(found, "a unit's symbol", remedy)

    def mistake(self, found: str, expected: str, remedy: str = "") -> ValueMistake:
        return ValueMistake(f"{found} in the unit `{self.text}`", expected, remedy)


def _single(name: str, own: Units) -> Unit:
    """The unit of one symbol or word; inside a product degC and degF are differences."""
    if name in SCALES:
        return _single("K" if name == "degC" else SCALES[name][0], own)
    if name in HINTS:
        raise ValueMistake(f"`{name}`", "a unit", HINTS[name])
    counted = own.single(name)
    if counted is not None:
        return Unit(counted, ((counted, Fraction(1)),), ((counted, Fraction(1)),), Fraction(1), spellings=((counted, ""),))
    known = _standard(name)
    if known is not None:
        return known
    found = rare(name)
    if found is None:
        raise ValueMistake(f"the unknown unit `{name}`", "a unit", _remedy(name, own))
    factor, dimension = found
    return Unit(name, ((name, Fraction(1)),), tuple((base, Fraction(power)) for base, power in dimension), factor)


@functools.cache
def _standard(name: str) -> Unit | None:
    """The unit of a symbol or word of the table, with its prefix; None where it is none."""
    known = _by_symbol().get(name) or _by_word().get(name)
    if known:
        return _unit(name, known, Fraction(1), known.udunits)
    # both signs for micro (U+00B5 and U+03BC) are written u in a file
    plain_name = "u" + name[1:] if name[0] in "\u00b5\u03bc" else name
    for prefix, size in PREFIXES.items():
        known = _by_symbol().get(plain_name[len(prefix) :]) if plain_name.startswith(prefix) else None
        if known and (known.prefixes == "all" or prefix in known.prefixes.split()):
            return _unit(name, known, size, known.udunits and prefix + known.udunits)
    return None


def _unit(name: str, known: Known, size: Fraction, udunits: str) -> Unit:
    factor = functools.reduce(lambda left, right: left / right, map(Fraction, known.factor.split("/")))
    dimension = []
    for part in known.dimension.split():
        base = part.rstrip("-0123456789")
        dimension.append((base, Fraction(part[len(base) :] or 1)))
    return Unit(name, ((name, Fraction(1)),), tuple(sorted(dimension)), factor * size, spellings=((name, udunits),) if udunits else ())


def _remedy(name: str, own: Units) -> str:
    """What an unknown unit may have been meant as."""
    known = [
        *own.names,
        *_by_symbol(),
        *_by_word(),
        *SCALES,
        *(f"{p}{k.symbol}" for k in KNOWN for p in ("k", "M", "m", "u", "c") if k.prefixes),
    ]
    alike = [other for other in known if other.lower() == name.lower()]
    if alike:
        return "did you mean " + " or ".join(f"`{other}`" for other in dict.fromkeys(alike)) + "?"
    for cut in range(len(name) - 1, 0, -1):
        if name[:cut] in known and name[cut:] in known:
            return f"did you mean `{name[:cut]} {name[cut:]}`?"
    words = [word for word in (*known, *HINTS) if len(word) > 2]
    near = difflib.get_close_matches(name, words, n=1, cutoff=0.8) if len(name) > 2 else []
    meant = f"did you mean `{near[0]}`? " if near else ""
    example = name if _OWN.fullmatch(name) else "person"
    return f'{meant}a count has the unit 1, or one of its own: [units] {example} = "new"'
