"""Which blocks a cluster works on at a time, and how one that kills its workers is taken apart. Pure: nothing is sent from here."""

from __future__ import annotations

from collections import deque
from collections.abc import Iterable, Iterator, Mapping, Sequence
from dataclasses import dataclass, replace
from itertools import groupby

from uq.design.blocks import Block
from uq.running.pace import BLOCK_BYTES, BLOCKS_PER_THREAD, Shape, power_of_two

# To hand out a task takes about 10 ms of this process, and what its worker dies of is done again: about a second is right for both.
TASK_SECONDS = 1.0
# Blocks of a short round go together, so that a task lasts at least so long where every core has one.
SHORTEST_SECONDS = 0.1
# What a worker sends back of one block, at most (kept values; histograms hold no more than the values that they count).
RESULT_BYTES = 16 * 2**20
# Blocks at a time: one in work for every core and another so that none waits, but no more than one client can well look after. So what is
# not gathered yet takes at most twice RESULT_BYTES per core, and 3.4 GB on all workers together.
IN_FLIGHT = 200


@dataclass(frozen=True)
class Task:
    """A block of a branch, with `more` blocks of it; or the pilot of the branch, and the block says nothing.

    solves: of every row only these members, for trial: what they say is not used.
    """

    name: str
    block: Block
    solves: tuple[int, int] | None = None
    more: tuple[Block, ...] = ()
    pilot: bool = False

    @property
    def blocks(self) -> tuple[Block, ...]:
        """All its blocks."""
        return (self.block, *self.more)

    @property
    def single(self) -> bool:
        """Whether it is one row."""
        return self.block.count == 1 and not self.more

    @property
    def words(self) -> str:
        """Its blocks as they are logged, replicate and rows: "3/64-127"; those of a scenario with its name."""
        told = ", ".join(f"{each.replicate}/{each.first}-{each.first + each.count - 1}" for each in self.blocks)
        told = "pilot" if self.pilot else told
        return f"{told} of {self.name}" if self.name else told


@dataclass(frozen=True)
class Culprit:
    """A row of a branch whose solving ends its worker; `solve`: which of its members does (0 is A, 1 is B), None where none does alone.

    Without a row it is the pilot as a whole, none of whose members does alone.
    """

    name: str
    replicate: int
    row: int | None
    solve: int | None


def task_rows(shape: Shape, kept: int, seconds_per_solve: float, rows: int, replicates: int, cores: int) -> int:
    """Rows of a block for a cluster, a power of two between 1 and `rows`; kept: bytes of kept values that a row adds to the result.

    The largest that costs at most TASK_SECONDS, sends back at most RESULT_BYTES, and leaves BLOCKS_PER_THREAD blocks for every core.
    """
    by_time = TASK_SECONDS / max(seconds_per_solve * shape.solves, 1e-12)
    by_result = RESULT_BYTES / max(kept, 1)
    by_cores = rows * replicates / (BLOCKS_PER_THREAD * max(cores, 1))
    return power_of_two(min(by_time, by_result, by_cores, rows))


def bundled(tasks: Sequence[tuple[str, Block]], most: Mapping[str, int]) -> Iterator[Task]:
    """Blocks of branches as tasks, at most so many blocks of a branch in one, in order."""
    for name, group in groupby(tasks, key=lambda task: task[0]):
        blocks = [block for _, block in group]
        for first in range(0, len(blocks), most[name]):
            block, *more = blocks[first : first + most[name]]
            yield Task(name, block, None, tuple(more))


def blocks_together(seconds: float, size: int, blocks: int, cores: int) -> int:
    """How many of so many blocks, each of so many seconds and bytes of a result, go together in a task.

    As many as leave BLOCKS_PER_THREAD tasks for every core, or one where those would be shorter than SHORTEST_SECONDS; in none is more than
    TASK_SECONDS of work or RESULT_BYTES of result.
    """
    wanted = max(min(BLOCKS_PER_THREAD * cores, blocks * seconds / SHORTEST_SECONDS), cores, 1)
    return max(1, int(min(blocks / wanted, TASK_SECONDS / max(seconds, 1e-12), RESULT_BYTES / max(size, 1))))


def inner_rows(shape: Shape) -> int:
    """Rows that a worker solves at a time, so that their values stay near its processor; it merges what they say."""
    return power_of_two(BLOCK_BYTES / shape.bytes)


def window(cores: int) -> int:
    """How many blocks may be in flight."""
    return max(min(2 * cores, IN_FLIGHT), 2)


def halves(task: Task, parts: int) -> tuple[Task, ...]:
    """A task taken apart: by blocks, a block by rows, a single row (of so many members) by its members; nothing where it is one member."""
    block = task.block
    if task.more:
        middle = len(task.blocks) // 2
        return tuple(Task(task.name, each[0], task.solves, each[1:]) for each in (task.blocks[:middle], task.blocks[middle:]))
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
        if task.single and not alone:
            self._suspects.append(task)
            return
        if task.single and task.solves is None:
            self._suspects.append(Culprit(task.name, block.replicate, block.first, None))
        apart = halves(task, self._parts[task.name])
        if apart:
            self._suspects += reversed(apart)
        elif task.solves is not None:
            self.culprit = Culprit(task.name, block.replicate, block.first, task.solves[0])


class PilotHandout(Handout):
    """Hands out the pilot of a branch as a whole; where that kills its workers, its rows for trial, until the member is found."""

    def __init__(self, name: str, replicates: int, rows: int) -> None:
        super().__init__([Task(name, Block(0, 0, 1), pilot=True)], {name: 1})
        # One by one: to take blocks of them apart would cost as many members and more workers.
        self._rows = [Task(name, Block(replicate, row, 1), (0, 1)) for replicate in range(replicates) for row in range(rows)]

    def died(self, task: Task) -> None:
        if not task.pilot:
            super().died(task)
            return
        self._out.remove(task)
        self._suspects += [Culprit(task.name, 0, None, None), *reversed(self._rows)]
