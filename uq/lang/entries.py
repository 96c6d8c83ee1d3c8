"""Which entry a name stands for where something goes over an index: `C` is this one's, `C[cell-1]` its neighbour, `C[3]` a certain one.

In: a name of a tree, a scope whose indices stand somewhere. Out: the node of that entry with its unit, or an ExpressionError.
Must not know: models, files.
"""

from __future__ import annotations

from uq.errors import ExpressionError, suggest
from uq.lang.graph import Graph
from uq.lang.measure import mistake
from uq.lang.scope import Index, Repeated, Scope, Typed
from uq.lang.tree import Subscript, Tree
from uq.units import NONE


def bare(part: Tree, given: Repeated, scope: Scope) -> Typed:
    """The entry that a name without brackets stands for: that at which its indices stand."""
    named = [index.name for index in given.over]
    if len(set(named)) < len(named):
        first = named[0]
        found = f"`{part.name}` without brackets, which goes over `{first}` twice"
        remedy = f'write {part.name}[{first}, other] with a second name of the index, [index] other = "{first}"'
        raise mistake(part, found, "one entry of it", remedy)
    for index in given.over:
        if index.name not in scope.at:
            raise mistake(part, f"`{part.name}`, which has a value for every `{index.name}`", "one value", _one_of(part, given, index))
    return Typed(given.nodes[_flat(given, tuple(scope.at[name] for name in named))], given.unit)


def _one_of(part: Tree, given: Repeated, index: Index) -> str:
    """How one value is made of many."""
    if len(given.over) > 1:
        return f"write {part.name}[{', '.join(each.labels[0] for each in given.over)}] for one, or sums over both"
    return f'{part.name}[{index.labels[0]}] is one of them, max({part.name}, {index.name}) the highest; or say over = "{index.name}" here'


def placed(part: Tree, scope: Scope) -> Typed:
    """The entry that a name with brackets stands for."""
    given = scope.repeated.get(part.name)
    if given is None:
        raise _not_repeated(part, scope)
    if len(part.at) != len(given.over):
        goes = " and ".join(f"`{index.name}`" for index in given.over)
        raise mistake(part, f"{len(part.at)} in the brackets of `{part.name}`", f"{len(given.over)}: it goes over {goes}")
    if len(part.at) == 2 and part.at[0].name and part.at[0].written() == part.at[1].written():
        name = part.at[0].name
        remedy = f'give the index a second name, [index] other = "{given.over[1].of}", and write {part.name}[{name}, other]'
        raise mistake(part, f"`{part.text}`, always an entry with itself", "two that go their own ways", remedy)
    places = [_place(part, at, index, scope) for at, index in zip(part.at, given.over, strict=True)]
    inside: list[int] = []
    for (place, shifted), at, index in zip(places, part.at, given.over, strict=True):
        if shifted and not 0 <= place < len(index):
            if isinstance(given.edge, Typed):
                return given.edge
            place = _beyond(part, at, place, index, given.edge)
        inside.append(place)
    return Typed(given.nodes[_flat(given, tuple(inside))], given.unit)


def number_of(part: Tree, scope: Scope, graph: Graph) -> Typed:
    """The name of an index as a value: the number of the entry at which it stands."""
    index = scope.indices[part.name]
    if index.name not in scope.at:
        raise mistake(part, f"the index `{index.name}`, which stands at no entry here", "a value", _standing(index))
    if not index.counted:
        raise mistake(part, f"the index `{index.name}`, whose entries have names", "a value", f"they are {index.told}")
    return Typed(graph.number(float(scope.at[index.name])), NONE)


def _place(part: Tree, at: Subscript, index: Index, scope: Scope) -> tuple[int, bool]:
    """The place that one part of the brackets means, and whether it is counted from where an index stands."""
    if at.name in scope.indices:
        other = scope.indices[at.name]
        if other.of != index.of:
            raise _within(at, f"the index `{at.name}`", f"`{index.name}`, over which `{part.name}` goes")
        if at.name not in scope.at:
            raise _within(at, f"the index `{at.name}`, which stands at no entry here", "an entry", _standing(other))
        return scope.at[at.name] + at.shift, True
    expected = f"an entry of `{index.name}` ({index.told}), or the index itself"
    if at.name in index.labels and not index.counted and not at.shift:
        return index.labels.index(at.name), False
    if not at.name and index.counted and at.shift < len(index):
        return at.shift, False
    near = suggest(at.name, (*index.labels, *scope.indices)) if at.name else ""
    raise _within(at, f"`{at.written()}`", expected, near)


def _beyond(part: Tree, at: Subscript, place: int, index: Index, edge: str | Typed | None) -> int:
    """The place that stands for one beyond an end."""
    count = len(index)
    if edge == "wrap":
        return place % count
    if edge == "mirror":
        place %= 2 * count
        return place if place < count else 2 * count - 1 - place
    end = index.labels[0 if place < 0 else -1]
    found = f"`{part.text}` at `{index.name}` {end}, where there is none"
    raise _within(at, found, f"an `edge` of `{part.name}`, which says what stands there", 'edge = "mirror", "wrap" or a value')


def _flat(given: Repeated, places: tuple[int, ...]) -> int:
    flat = 0
    for place, index in zip(places, given.over, strict=True):
        flat = flat * len(index) + place
    return flat


def _not_repeated(part: Tree, scope: Scope) -> ExpressionError:
    if part.name in scope.barred:
        return mistake(part, f"`{part.name}`", "a name that may stand here", scope.barred[part.name])
    if part.name in scope.names:
        return mistake(
            part,
            f"`{part.text}` of a single value",
            "the name alone",
            f"what has entries says over which index it goes: over = {_any(scope)}",
        )
    near = suggest(part.name, scope.repeated)
    return mistake(part, f"`{part.text}`", "the name of what goes over an index in front of [ ]", near)


def _any(scope: Scope) -> str:
    return f'"{next(iter(scope.indices), "cell")}"'


def _standing(index: Index) -> str:
    return f'it stands at one inside sum(x, {index.name}), and where over = "{index.name}" is said'


def _within(at: Subscript, found: str, expected: str, remedy: str = "") -> ExpressionError:
    return ExpressionError(at.start, at.stop - at.start, found, expected, remedy)
