"""What to write instead of a character that an expression or a unit does not take.

In: one character. Out: a remedy in words. Must not know: where it stands.
"""

from __future__ import annotations

import unicodedata

#: characters that stand for something which has a plain spelling
_PLAIN = {
    "\N{MINUS SIGN}": "-",
    "\N{EN DASH}": "-",
    "\N{EM DASH}": "-",
    "\N{HYPHEN}": "-",
    "\N{NON-BREAKING HYPHEN}": "-",
    "\N{MULTIPLICATION SIGN}": "*",
    "\N{MIDDLE DOT}": "*",
    "\N{DOT OPERATOR}": "*",
    "\N{ASTERISK OPERATOR}": "*",
    "\N{DIVISION SIGN}": "/",
    "\N{DIVISION SLASH}": "/",
    "\N{FRACTION SLASH}": "/",
    "\N{SUPERSCRIPT ONE}": "**1",
    "\N{SUPERSCRIPT TWO}": "**2",
    "\N{SUPERSCRIPT THREE}": "**3",
    "\N{SUPERSCRIPT MINUS}": "**-",
    "\N{LESS-THAN OR EQUAL TO}": "<=",
    "\N{GREATER-THAN OR EQUAL TO}": ">=",
    "\N{SQUARE ROOT}": "sqrt( )",
    "\N{LEFT SINGLE QUOTATION MARK}": "'",
    "\N{RIGHT SINGLE QUOTATION MARK}": "'",
    "\N{LEFT DOUBLE QUOTATION MARK}": "'",
    "\N{RIGHT DOUBLE QUOTATION MARK}": "'",
    "\N{PRIME}": "'",
    "\N{DEGREE SIGN}": "degC or deg",
    "\N{OHM SIGN}": "ohm",
}
#: letters of other alphabets that look like a plain one, and the one they look like
_LOOK_ALIKE = dict(zip("аеорсухіјѕԁАВЕКМНОРСТХІЈЅΑΒΕΖΗΙΚΜΝΟΡΤΥΧοι", "aeopcyxijsdABEKMHOPCTXIJSABEZHIKMNOPTYXoi", strict=True))


def called(character: str) -> str:
    """A character with its name: '`x` (CYRILLIC SMALL LETTER HA)'; a control character by its number only."""
    name = unicodedata.name(character, "")
    if character.isascii() and character.isprintable():
        return f"`{character}`"
    number = f"U+{ord(character):04X}"
    visible = name and character.isprintable() and not character.isspace()
    return f"`{character}` ({name}, {number})" if visible else f"{name or 'a character'} ({number})"


def plain(character: str) -> str:
    """What to write instead of a character outside plain ASCII."""
    if character in _PLAIN:
        return f"write {_PLAIN[character]}"
    if character in _LOOK_ALIKE:
        return f"it only looks like a plain `{_LOOK_ALIKE[character]}`; type that letter again"
    if character.isspace():
        return "write an ordinary blank"
    name = unicodedata.name(character, "")
    if name.startswith("GREEK ") and " LETTER " in name:
        return f"spell it out, as {name.split(' LETTER ')[1].split()[0].lower()}"
    folded = unicodedata.normalize("NFKC", character)
    if folded != character and folded.isascii() and folded.isprintable():
        return f"write {folded}"
    return "letters are A to Z and a to z"
