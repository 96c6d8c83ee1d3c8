"""`[index]`: what states, parameters, terms and answers repeat over, and how what repeats is written in a study."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from itertools import product
from typing import Any

from uq.errors import ValueMistake, suggest
from uq.lang.scope import Index
from uq.study.locate import Path
from uq.study.names import NAME
from uq.study.notes import KeyMistake
from uq.study.values import Frame, expression, listed, number, quantity, show

MOST_ENTRIES = 10_000
OVER = "the index over which it repeats, or a list of two"
Found = Iterator[tuple[Path, ValueMistake]]
# A value for every entry: a number, rows of numbers for two indices, or one number for all.
Values = float | tuple[Any, ...]


@dataclass(frozen=True)
class Repeat:
    """What repeats: name, label, over which indices, and the names of its entries, the last index running fastest."""

    name: str
    label: str
    over: tuple[Index, ...]

    @property
    def entries(self) -> tuple[str, ...]:
        """The names of its entries, in order."""
        return entries_of(self.name, self.over)

    @property
    def dims(self) -> tuple[str, ...]:
        """The axes that results give it, each with a name of its own: of a matrix over one index, the second is NAME_other."""
        first, *others = (index.name for index in self.over)
        return (first, *(f"{name}_other" if name == first else name for name in others))


def keys_of_entries(over: Sequence[Index]) -> tuple[str, ...]:
    """What stands in brackets for every entry: "3", or "child,adult"; one empty text where nothing repeats."""
    return tuple(",".join(labels) for labels in product(*(index.labels for index in over)))


def entries_of(name: str, over: Sequence[Index]) -> tuple[str, ...]:
    """The names of all entries, "C[0]", "C[1]", ...; the name itself where nothing repeats."""
    return tuple(f"{name}[{key}]" for key in keys_of_entries(over)) if over else (name,)


def places_of(over: Sequence[Index]) -> Iterator[dict[str, int]]:
    """For every entry where its indices stand."""
    for places in product(*(range(len(index)) for index in over)):
        yield dict(zip((index.name for index in over), places, strict=True))


def count_of(over: Sequence[Index]) -> int:
    """How many entries there are."""
    count = 1
    for index in over:
        count *= len(index)
    return count


def read_indices(document: Mapping[str, Any]) -> tuple[dict[str, Index | None], tuple[tuple[Path, ValueMistake], ...]]:
    """All indices by name, None for one that is wrong, and what is wrong."""
    given = document.get("index", {})
    if not isinstance(given, Mapping):
        return {}, ((("index",), ValueMistake(show(given), "a table [index] with cell = 96 and the like")),)
    found: dict[str, Index | None] = {}
    wrong: list[tuple[Path, ValueMistake]] = []
    for name, value in given.items():
        try:
            found[name] = None if isinstance(value, str) else _index(name, value, given)
        except ValueMistake as mistake:
            found[name] = None
            wrong.append((("index", name), mistake))
    for name, value in given.items():
        if isinstance(value, str):
            first = found.get(value)
            if value == name or value not in given or isinstance(given[value], str):
                near = suggest(value, (other for other in given if other != name and not isinstance(given[other], str)))
                expected = "a number of entries, a list of their labels, or the name of another index, whose entries it then has"
                wrong.append((("index", name), ValueMistake(show(value), expected, near)))
            elif first is not None:
                found[name] = Index(name, first.labels, first.counted, first.name)
    return found, tuple(wrong)


def _index(name: str, value: object, given: Mapping[str, Any]) -> Index:
    if isinstance(value, list):
        return Index(name, _labels(value, given), False, name)
    if isinstance(value, bool) or not isinstance(value, int | float) or not 1 <= value <= MOST_ENTRIES or value != int(value):
        raise ValueMistake(show(value), f"a number of entries from 1 to {MOST_ENTRIES}, or a list of their labels")
    return Index(name, tuple(str(place) for place in range(int(value))), True, name)


def _labels(value: list[Any], given: Mapping[str, Any]) -> tuple[str, ...]:
    if not value:
        raise ValueMistake("an empty list", "one label or more")
    for place, label in enumerate(value):
        if not isinstance(label, str) or not NAME.fullmatch(label):
            raise ValueMistake(f"the label {show(label)}", "labels of letters A-Z, a-z, digits and _, with a letter first")
        if label in value[:place]:
            raise ValueMistake(f'the label "{label}" once more', "every label once")
        if label in given:
            raise ValueMistake(f'the label "{label}", which an index has as its name', "a label of its own")
    return tuple(value)


def over(value: object, frame: Frame) -> tuple[Index | None, ...]:
    """One index or two; None for one whose own declaration is wrong."""
    names = value if isinstance(value, list) else [value]
    if not 1 <= len(names) <= 2:
        raise ValueMistake(show(value), "one index or a list of two")
    found = []
    for name in names:
        if not isinstance(name, str):
            raise ValueMistake(show(name), "the name of an index")
        if name not in frame.indices:
            known = ", ".join(frame.indices)
            expected = f"an index of this study: {known}" if known else "an index of this study, as in [index] cell = 96"
            raise ValueMistake(f'"{name}"', expected, suggest(name, frame.indices))
        found.append(frame.indices[name])
    return tuple(found)


def numbers(value: object, frame: Frame) -> Values:
    """A number or a quantity, or lists of them for every entry."""
    if not isinstance(value, list):
        return quantity(value, frame)
    one = numbers if any(isinstance(item, list) for item in value) else quantity
    found: tuple[Any, ...] = listed(one, "numbers")(value, frame)
    return found


def edge(value: object, frame: Frame) -> float | str:
    """What stands beyond the ends: "mirror", "wrap", or a value as a number, a quantity or an expression."""
    if isinstance(value, str):
        text: str = expression(value, frame)
        return text.strip()
    if isinstance(value, list | dict | bool):
        raise ValueMistake(show(value), '"mirror", "wrap" or a value')
    return number(value)


def edge_of_number(value: object, frame: Frame) -> float | str:
    """The same for a parameter, whose value is a number or a quantity."""
    if value in ("mirror", "wrap"):
        return str(value)
    if isinstance(value, str) and frame.quantity_of(value) is None:
        raise ValueMistake(show(value), '"mirror", "wrap", a number or a quantity', suggest(value, ("mirror", "wrap")))
    return quantity(value, frame)


def sound(over: Sequence[Index | None]) -> tuple[Index, ...] | None:
    """The indices where all of them are right, else None."""
    right = tuple(index for index in over if index is not None)
    return right if len(right) == len(over) else None


def flat(values: Values, over: Sequence[Index]) -> tuple[float, ...]:
    """A value for every entry, the last index running fastest."""
    if not isinstance(values, tuple):
        return (values,) * count_of(over)
    return tuple(one for inner in values for one in flat(inner, over[1:]))


def shape_mistakes(key: str, values: object, over: Sequence[Index | None]) -> Found:
    """What is wrong with the number of values in a list."""
    if not isinstance(values, tuple):
        return
    if not over:
        yield (key,), ValueMistake("a list", "one value", 'with over = "...", one for every entry')
        return
    right = sound(over)
    if right is not None:
        yield from _shape((key,), values, right)


def _shape(path: Path, values: Any, over: tuple[Index, ...]) -> Found:
    index, *inner = over
    what = "rows" if inner else "values"
    if not isinstance(values, tuple):
        yield path, ValueMistake(f"{values:g}", f"a list of {len(index)} {what}, one for every `{index.name}`")
    elif len(values) != len(index):
        found = f"{len(values)} {what if len(values) != 1 else what.removesuffix('s')}"
        yield path, ValueMistake(found, f"{len(index)}, one for every `{index.name}` ({index.told})")
    else:
        for place, value in enumerate(values):
            if inner:
                yield from _shape((*path, place), value, tuple(inner))
            elif isinstance(value, tuple):
                yield (*path, place), ValueMistake("a list", "a number")


def edge_mistakes(edge: object, over: Sequence[Index | None]) -> Found:
    """An edge where nothing repeats."""
    if edge is not None and not over:
        yield ("edge",), KeyMistake("`edge` without `over`", "both, or neither", "it says what stands beyond the ends of an index")


def twice_mistakes(over: Sequence[Index | None]) -> Found:
    """One index twice where results have an axis for each."""
    right = sound(over)
    if right is not None and len({index.name for index in right}) < len(right):
        name = right[0].name
        remedy = f'give it a second name, [index] other = "{name}", and write over = ["{name}", "other"]'
        yield ("over",), ValueMistake(f"`{name}` twice", "two names, by which its expression can tell them apart", remedy)
