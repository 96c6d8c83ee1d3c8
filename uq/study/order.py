"""In which order terms can be worked out, and which of them go round in a circle."""

from __future__ import annotations

from collections.abc import Iterable, Mapping


def order(uses: Mapping[str, Iterable[str]]) -> tuple[tuple[str, ...], tuple[tuple[str, ...], ...]]:
    """Names in an order in which each comes after those it uses, and the cycles: each starts with its first name in the order of `uses`.

    Names outside of `uses` count as known. A name in a cycle is not in the order; one that only uses such a name is.
    """
    waiting = {name: {other for other in others if other in uses} for name, others in uses.items()}
    users: dict[str, list[str]] = {name: [] for name in uses}
    for name, others in waiting.items():
        for other in others:
            users[other].append(name)
    done: list[str] = []
    cycles: list[tuple[str, ...]] = []
    ready = [name for name in waiting if not waiting[name]]
    while waiting:
        while ready:
            name = ready.pop(0)
            if waiting.pop(name, None) is None:
                continue
            done.append(name)
            ready += _freed(name, users, waiting)
        if waiting:
            cycle = _cycle(waiting)
            cycles.append(cycle)
            for name in cycle:
                del waiting[name]
            for name in cycle:
                ready += _freed(name, users, waiting)
    return tuple(done), tuple(cycles)


def _freed(name: str, users: Mapping[str, list[str]], waiting: dict[str, set[str]]) -> list[str]:
    """The names that waited for `name` alone."""
    freed = []
    for user in users[name]:
        if user in waiting:
            waiting[user].discard(name)
            if not waiting[user]:
                freed.append(user)
    return freed


def _cycle(waiting: Mapping[str, set[str]]) -> tuple[str, ...]:
    """One cycle among names that all wait for another of them."""
    places = {name: place for place, name in enumerate(waiting)}
    path: list[str] = []
    name = next(iter(waiting))
    while name not in path:
        path.append(name)
        name = min(waiting[name], key=places.__getitem__)
    cycle = path[path.index(name) :]
    first = min(range(len(cycle)), key=lambda i: places[cycle[i]])
    return (*cycle[first:], *cycle[:first])
