"""The fold: rounds of blocks on dask's threaded scheduler, merged along the binary tree over rows into one set of tallies per replicate.

The tree depends on the rows alone, so the result has the same bits for any number of threads and any size of block.
"""

from __future__ import annotations

from collections.abc import Callable, Hashable, Iterable
from concurrent.futures import ThreadPoolExecutor
from dataclasses import dataclass
from functools import reduce
from typing import Any

from uq.analysis.ask import Ask
from uq.analysis.finding import Finding
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import ValueMistake
from uq.running.meter import Meter
from uq.running.observer import Observer
from uq.running.pace import Shape, block_rows
from uq.running.threads import all_cores, threads
from uq.solve.batch import Batch

Work = Callable[[Block], Tallies]
Graph = dict[Hashable, tuple[Any, ...]]


@dataclass(frozen=True)
class Spread:
    """How the work is spread: `threads` (0: all cores) and rows of a block (0: from the measured cost)."""

    threads: int = 0
    rows: int = 0

    def __post_init__(self) -> None:
        if self.threads < 0:
            raise ValueMistake(f"{self.threads} threads", "a number of threads, 0 for all cores", key="threads")
        if self.rows < 0 or self.rows & (self.rows - 1):
            raise ValueMistake(f"blocks of {self.rows} rows", "a power of two, 0 for a fitting one", key="block_rows")

    @property
    def workers(self) -> int:
        """The number of threads."""
        return self.threads or all_cores()


def fold(design: Design, work: Work, shape: Shape, meter: Meter, spread: Spread, observer: Observer) -> Tallies:
    """The tallies of all replicates over all rounds; `work` makes those of one block.

    Raises Interrupted, with every thread at rest, where the observer's stop flag was set or Ctrl-C pressed.
    """
    sofar: dict[int, Tallies] = {}
    with threads(spread.workers, observer) as pool:
        for first, stop in design.rounds():
            size = spread.rows or block_rows(shape, meter.seconds_per_solve, stop - first, design.replicates, spread.workers)
            graph, ends = tree(design.blocks(first, stop, size), work)
            for replicate, tallies in zip(ends, worked_out(graph, list(ends.values()), pool), strict=True):
                sofar[replicate] = sofar[replicate].merge(tallies) if replicate in sofar else tallies
    return reduce(merged, (sofar[replicate] for replicate in sorted(sofar)))


def answered(tallies: Tallies, ask: Ask, nominal: Batch, spread: Spread, observer: Observer) -> tuple[Finding, ...]:
    """The findings, worked out on all threads. Raises Interrupted as `fold` does."""
    with threads(spread.workers, observer) as pool:
        return tallies.findings(ask, nominal.values[0, : len(ask.watched)], pool.map)


def tree(blocks: Iterable[Block], work: Work) -> tuple[Graph, dict[int, Hashable]]:
    """The graph of one round, and the key of every replicate's tallies in it: neighbours are merged, then neighbours of those, ...

    The blocks of a replicate are equally long, in order, and a power of two in number.
    """
    graph: Graph = {}
    ends: dict[int, list[Hashable]] = {}
    for block in blocks:
        key = ("block", block.replicate, block.first)
        graph[key] = (work, block)
        ends.setdefault(block.replicate, []).append(key)
    for replicate, keys in ends.items():
        level = 0
        while len(keys) > 1:
            level += 1
            pairs = list(zip(keys[::2], keys[1::2], strict=True))
            parents: list[Hashable] = [("merged", replicate, level, place) for place in range(len(pairs))]
            graph.update({key: (merged, left, right) for key, (left, right) in zip(parents, pairs, strict=True)})
            keys = parents
        ends[replicate] = keys
    return graph, {replicate: keys[0] for replicate, keys in ends.items()}


def merged(left: Tallies, right: Tallies) -> Tallies:
    """The tallies of two neighbours as one."""
    return left.merge(right)


def worked_out(graph: Graph, keys: list[Hashable], pool: ThreadPoolExecutor) -> list[Tallies]:
    """The tallies behind the keys, in their order."""
    from dask.threaded import get

    return list(get(graph, keys, pool=pool))
