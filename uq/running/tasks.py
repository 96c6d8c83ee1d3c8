"""Which blocks a cluster works on at a time, and how one that kills its workers is taken apart. Pure: nothing is sent from here."""

from __future__ import annotations

from collections import deque
from collections.abc import Iterable
from dataclasses import dataclass, replace

from uq.design.blocks import Block
from uq.running.pace import BLOCK_BYTES, BLOCKS_PER_THREAD, Shape, power_of_two

# To hand out a block takes about 2 ms on a cluster, and what its worker dies of is done again: about a second is right for both.
TASK_SECONDS = 1.0
# What a worker sends back of one block, at most (kept values; histograms hold no more than the values that they count).
RESULT_BYTES = 16 * 2**20
# Blocks at a time: one in work for every core and another so that none waits, but no more than one client can well look after. So what is
# not gathered yet takes at most twice RESULT_BYTES per core, and 3.4 GB on all workers together.
IN_FLIGHT = 200


@dataclass(frozen=True)
class Task:
    """A block of a branch; `solves`: of a single row only these members, for trial: what they say is not used."""

    name: str
    block: Block
    solves: tuple[int, int] | None = None


@dataclass(frozen=True)
class Culprit:
    """A row of a branch whose solving ends its worker; `solve`: which of its members does (0 is A, 1 is B), None where none does alone."""

    name: str
    replicate: int
    row: int
    solve: int | None


def task_rows(shape: Shape, kept: int, seconds_per_solve: float, rows: int, replicates: int, cores: int) -> int:
    """Rows of a block for a cluster, a power of two between 1 and `rows`; kept: bytes of kept values that a row adds to the result.

    The largest that costs at most TASK_SECONDS, sends back at most RESULT_BYTES, and leaves BLOCKS_PER_THREAD blocks for every core.
    """
    by_time = TASK_SECONDS / max(seconds_per_solve * shape.solves, 1e-12)
    by_result = RESULT_BYTES / max(kept, 1)
    by_cores = rows * replicates / (BLOCKS_PER_THREAD * max(cores, 1))
    return power_of_two(min(by_time, by_result, by_cores, rows))


def inner_rows(shape: Shape) -> int:
    """Rows that a worker solves at a time, so that their values stay near its processor; it merges what they say."""
    return power_of_two(BLOCK_BYTES / shape.bytes)


def window(cores: int) -> int:
    """How many blocks may be in flight."""
    return max(min(2 * cores, IN_FLIGHT), 2)


def halves(task: Task, parts: int) -> tuple[Task, ...]:
    """A task taken apart: a block by rows, a single row (of so many members) by its members; nothing where it is one member."""
    block = task.block
    if block.count > 1:
        half = block.count // 2
        return tuple(replace(task, block=Block(block.replicate, first, half)) for first in (block.first, block.first + half))
    first, stop = task.solves or (0, parts)
    if stop - first < 2:
        return ()
    middle = (first + stop) // 2
    return replace(task, solves=(first, middle)), replace(task, solves=(middle, stop))


class Handout:
    """Hands out tasks, so many at a time; one that killed its workers comes back by halves, each of them then alone on the cluster.

    Alone, because whoever shares a worker with a killer is suspected as well: such a task is then solved, and nothing else is lost.
    """

    def __init__(self, tasks: Iterable[Task], parts: dict[str, int]) -> None:
        self._open = deque(tasks)
        self._parts = parts
        # The last one is the next; a culprit lies below the members of its row and comes up where none of them was it alone.
        self._suspects: list[Task | Culprit] = []
        self._out: set[Task] = set()
        self._alone = False
        self.culprit: Culprit | None = None

    @property
    def left(self) -> bool:
        """Whether there is anything to be done or waited for."""
        return bool(self._open or self._suspects or self._out)

    @property
    def searching(self) -> bool:
        """Whether a member that kills is being looked for."""
        return bool(self._suspects) or self._alone

    def due(self, most: int) -> list[Task]:
        """The tasks to be handed out now, where at most so many may be in flight; none once the culprit is found."""
        found: list[Task] = []
        if self.culprit is not None:
            return found
        if self._suspects:
            if not self._out:
                suspect = self._suspects.pop()
                if isinstance(suspect, Culprit):
                    self.culprit = suspect
                else:
                    self._alone = True
                    found = [suspect]
        elif not self._alone:
            found = [self._open.popleft() for _ in range(min(most - len(self._out), len(self._open)))]
        self._out.update(found)
        return found

    def done(self, task: Task) -> None:
        """A task was solved."""
        self._out.remove(task)
        self._alone = self._alone and bool(self._out)

    def died(self, task: Task) -> None:
        """A task has killed its workers, or shared them with the one that did."""
        self._out.remove(task)
        alone, self._alone = self._alone, self._alone and bool(self._out)
        block = task.block
        if block.count == 1 and not alone:
            self._suspects.append(task)
            return
        if block.count == 1 and task.solves is None:
            self._suspects.append(Culprit(task.name, block.replicate, block.first, None))
        apart = halves(task, self._parts[task.name])
        if apart:
            self._suspects += reversed(apart)
        elif task.solves is not None:
            self.culprit = Culprit(task.name, block.replicate, block.first, task.solves[0])
