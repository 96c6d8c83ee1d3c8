"""What some solved blocks say together, put together as they come."""

from __future__ import annotations

import threading
from collections.abc import Iterable, Mapping
from dataclasses import astuple, dataclass
from functools import reduce
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask
from uq.analysis.kept import Courses, Kept
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.running.meter import Count
from uq.store.saved import Saved


@dataclass(frozen=True, eq=False)
class Part:
    """Blocks (halves joined), their tallies and what was counted over them.

    Sums combine along the binary tree over rows, so the order of merging does not matter.
    """

    blocks: tuple[Block, ...]
    tallies: Tallies
    count: Count

    @property
    def members(self) -> int:
        """A and B rows."""
        return 2 * sum(block.count for block in self.blocks)

    @property
    def bytes(self) -> int:
        """What it takes to keep the tallies."""
        return sum(array.nbytes for array in self.tallies.arrays().values())

    @property
    def counted(self) -> bool:
        """Whether no values are kept. Histograms are merged at once: those of few members take as much memory as those of many."""
        return not any(isinstance(self.tallies.held.get(name), kind) for name, kind in _KEPT.items())

    def merge(self, other: Part) -> Part:
        """Both together; neither is changed."""
        return Part(joined(self.blocks, other.blocks), self.tallies.merge(other.tallies), self.count + other.count)


def joined(blocks: tuple[Block, ...], more: tuple[Block, ...]) -> tuple[Block, ...]:
    """Both, in order; two halves of one aligned block become that."""
    held = set(blocks)
    for block in more:
        while (other := Block(block.replicate, block.first ^ block.count, block.count)) in held:
            held.remove(other)
            block = Block(block.replicate, min(block.first, other.first), 2 * block.count)
        held.add(block)
    return tuple(sorted(held))


# Tallies that keep values, by their names.
_KEPT = {"courses": Courses, "values": Kept}

# Parts by branch: the study itself is "", a scenario has its name.
Parts = Mapping[str, Part]


def together(parts: Iterable[Parts]) -> dict[str, Part]:
    """Several of them as one."""
    found: dict[str, list[Part]] = {}
    for each in parts:
        for name, part in each.items():
            found.setdefault(name, []).append(part)
    return {name: reduce(Part.merge, every) for name, every in found.items()}


def saved_of(parts: Parts, facts: Mapping[str, Any]) -> Saved:
    """Parts by branch, with some facts, as they are kept."""
    arrays: dict[str, NDArray[Any]] = {}
    for name, part in parts.items():
        arrays[f"{name}/blocks"] = np.array([astuple(block) for block in part.blocks], dtype=np.int64).reshape(-1, 3)
        arrays |= {f"{name}/tallies/{key}": array for key, array in part.tallies.arrays().items()}
    return Saved(arrays, {**facts, "counts": {name: astuple(part.count) for name, part in parts.items()}})


def parts_of(saved: Saved, asks: Mapping[str, Ask]) -> dict[str, Part]:
    """Back from what was kept, of the branches that the asks are of."""
    found = {}
    for name, ask in asks.items():
        count = saved.facts["counts"].get(name)
        if count is None:
            continue
        blocks = tuple(Block(*map(int, row)) for row in saved.arrays[f"{name}/blocks"])
        found[name] = Part(blocks, Tallies.of_arrays(ask, below(saved, f"{name}/tallies/")), Count(*count))
    return found


def fitted(part: Part, ask: Ask) -> Part:
    """The part as this ask wants it: values that were kept are counted into histograms where it does not keep them."""
    held = part.tallies.held
    if ask.keeps or not any(isinstance(held.get(name), kind) for name, kind in _KEPT.items()):
        return part
    return Part(part.blocks, Tallies.of_arrays(ask, part.tallies.arrays()), part.count)


def below(saved: Saved, start: str) -> dict[str, NDArray[Any]]:
    """The arrays whose names begin so, without that beginning."""
    return {key.removeprefix(start): array for key, array in saved.arrays.items() if key.startswith(start)}


class Gathering:
    """Parts as the threads bring them: those of one branch are merged like with like, so that each is merged a few times only."""

    def __init__(self) -> None:
        self._lock = threading.Lock()
        self._held: dict[str, list[Part]] = {}

    def add(self, name: str, part: Part) -> None:
        """One more part of a branch."""
        with self._lock:
            held = self._held.setdefault(name, [])
            while held and (part.counted or held[-1].members <= part.members):
                part = held.pop().merge(part)
            held.append(part)

    def take(self) -> dict[str, Part]:
        """All that was brought since it was last taken, by branch; empty where nothing was."""
        with self._lock:
            held, self._held = self._held, {}
        return {name: reduce(Part.merge, parts) for name, parts in held.items() if parts}
