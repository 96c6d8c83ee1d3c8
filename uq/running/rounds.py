"""A round: the blocks that are still to be solved, spread over those who solve, and gathered as they come.

Sums combine along the binary tree over rows, whatever came first, so the result has the same bits for any number of threads, any size of
block and any interruption.
"""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping, Sequence
from concurrent.futures import ThreadPoolExecutor
from dataclasses import dataclass, field
from functools import partial
from typing import Protocol

from uq.analysis.finding import Finding
from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import UseMistake
from uq.running.block import Forecast, part_of
from uq.running.branch import Branch
from uq.running.meter import Meter
from uq.running.observer import Observer
from uq.running.pace import block_rows
from uq.running.part import Part, Parts
from uq.running.pilot import Pilot, piloted
from uq.running.threads import all_cores, threads

Work = Callable[[Block], Part]
Brought = Callable[[str, Part], None]
# A block of a branch, by its name.
Task = tuple[str, Block]


@dataclass(frozen=True)
class Spread:
    """How the work is spread: `threads` (0: all cores) and rows of a block (0: from the measured cost)."""

    threads: int = 0
    rows: int = 0

    def __post_init__(self) -> None:
        if self.threads < 0:
            raise UseMistake(f"{self.threads} threads", "a number of threads, 0 for all cores", key="threads")
        if self.rows < 0 or self.rows & (self.rows - 1):
            raise UseMistake(f"blocks of {self.rows} rows", "a power of two, 0 for a fitting one", key="block_rows")

    @property
    def workers(self) -> int:
        """The number of threads."""
        return self.threads or all_cores()


class Hands(Protocol):
    """Who solves blocks: the threads of this process, or a cluster. The bits of a result do not depend on it."""

    @property
    def words(self) -> str:
        """What they are, for the facts of the run; "" for threads of this process."""

    def cores(self, spread: Spread) -> int:
        """How many solve at a time."""

    def rows(self, forecast: Forecast, rows: int, crew: Crew) -> int:
        """Rows of a block, a power of two, in a round of so many rows of every replicate."""

    def pilot(self, name: str, forecast: Forecast, crew: Crew) -> Pilot:
        """The pilot of a branch, solved. Raises as `solve`."""

    def solve(self, tasks: Sequence[Task], forecasts: Mapping[str, Forecast], brought: Brought, crew: Crew) -> None:
        """Solves blocks of branches by name, tells the meter, and hands each part to `brought`. Raises Interrupted where it is stopped."""


class Here:
    """The threads of this process."""

    words = ""

    def cores(self, spread: Spread) -> int:
        return spread.workers

    def rows(self, forecast: Forecast, rows: int, crew: Crew) -> int:
        return block_rows(forecast.shape, crew.meter.seconds_per_solve, rows, forecast.design.replicates, crew.spread.workers)

    def pilot(self, name: str, forecast: Forecast, crew: Crew) -> Pilot:
        return piloted(forecast, crew.meter, crew.observer)

    def solve(self, tasks: Sequence[Task], forecasts: Mapping[str, Forecast], brought: Brought, crew: Crew) -> None:
        works = {name: partial(part_of, forecast, meter=crew.meter, observer=crew.observer) for name, forecast in forecasts.items()}
        solve_blocks(tasks, works, brought, crew)


@dataclass(frozen=True)
class Crew:
    """Who works: how the work is spread, who adds up, who is told, who solves."""

    spread: Spread
    meter: Meter
    observer: Observer
    hands: Hands = field(default_factory=Here)

    @property
    def cores(self) -> int:
        """How many solve at a time."""
        return self.hands.cores(self.spread)


def still_open(design: Design, span: tuple[int, int], size: int, done: Iterable[Block]) -> Iterator[Block]:
    """The rows of a round that no block has done yet, in aligned blocks of at most `size` rows, by replicate, then by row."""
    first, stop = span
    by_replicate: dict[int, list[Block]] = {}
    for block in done:
        by_replicate.setdefault(block.replicate, []).append(block)
    whole = design.blocks(first, stop, stop - first)
    for block in whole:
        yield from _open(block, size, by_replicate.get(block.replicate, []))


def _open(block: Block, size: int, done: Sequence[Block]) -> Iterator[Block]:
    inside = [each for each in done if each.first < block.first + block.count and block.first < each.first + each.count]
    if any(each.count >= block.count for each in inside):
        return
    if not inside and block.count <= size:
        yield block
        return
    half = block.count // 2
    for start in (block.first, block.first + half):
        yield from _open(Block(block.replicate, start, half), size, inside)


def solve_blocks(tasks: Sequence[Task], works: Mapping[str, Work], brought: Brought, crew: Crew) -> None:
    """Solves blocks of branches by name, spread over threads by dask's scheduler; `brought` gets each part, from the thread that made it.

    Raises Interrupted, with every thread at rest, where the observer's stop flag was set or Ctrl-C pressed.
    """

    def one(name: str, block: Block) -> None:
        try:
            part = works[name](block)
        except Exception as error:
            error.add_note(
                f"in the block of replicate {block.replicate}, rows {block.first} to {block.first + block.count - 1}, of branch {name!r}"
            )
            raise
        brought(name, part)

    with threads(crew.spread.workers, crew.observer) as pool:
        _spread_out([(one, name, block) for name, block in tasks], pool)


def _spread_out(calls: Sequence[tuple[object, ...]], pool: ThreadPoolExecutor) -> None:
    """Makes all calls, each a function followed by its arguments."""
    from dask.threaded import get

    if calls:
        keys = [("block", place) for place in range(len(calls))]
        get(dict(zip(keys, calls, strict=True)), keys, pool=pool)


def answered(branch: Branch, part: Part, crew: Crew) -> tuple[Finding, ...]:
    """The findings of one branch at the end of a round, worked out on all threads. Raises Interrupted as `solve_blocks` does."""
    ask = branch.forecast.ask
    with threads(crew.spread.workers, crew.observer) as pool:
        return part.tallies.findings(ask, branch.pilot.nominal.values[0, : len(ask.watched)], pool.map)


def whole(parts: Parts, names: Iterable[str]) -> bool:
    """Whether there is a part of every branch."""
    return all(name in parts for name in names)
