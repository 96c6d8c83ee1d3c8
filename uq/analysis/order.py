"""An order only as fine as the intervals allow."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from typing import Protocol, TypeVar


class Interval(Protocol):
    """A number with the ends of its interval; nan where there is none."""

    @property
    def value(self) -> float: ...
    @property
    def low(self) -> float: ...
    @property
    def high(self) -> float: ...


Item = TypeVar("Item")


def ordered(items: Iterable[Item], share: Callable[[Item], Interval]) -> list[list[Item]]:
    """Items by their share, largest first, in groups: between two groups every interval above lies clear of every one below.

    Within a group the order is not settled. Items without a share come last, as a group of their own.
    """
    every = list(items)
    known = sorted((each for each in every if share(each).value == share(each).value), key=lambda each: -share(each).value)
    unknown = [each for each in every if share(each).value != share(each).value]
    groups: list[list[Item]] = []
    for place, item in enumerate(known):
        above, below = [share(each) for each in known[:place]], [share(each) for each in known[place:]]
        if place == 0 or _clear(above, below):
            groups.append([])
        groups[-1].append(item)
    return groups + ([unknown] if unknown else [])


def _clear(above: list[Interval], below: list[Interval]) -> bool:
    """Whether every interval above lies above every interval below; an end that is not known settles nothing."""
    return min(each.low for each in above) > max(each.high for each in below)
