"""Rounds of blocks, with stand-ins for the tallies: which blocks are open, what is merged with what, and how a run is stopped."""

from __future__ import annotations

import itertools
import os
import random
import signal
import sys
import threading
import time
from dataclasses import dataclass, field

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.analysis.kept import Kept
from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import Interrupted, ValueMistake
from uq.running.keeping import Checkpoints, Forgetful, Pace
from uq.running.meter import Count, Meter
from uq.running.observer import Progress, Silent
from uq.running.part import Gathering, Part, joined, together
from uq.running.rounds import Crew, Spread, solve_blocks, still_open
from uq.running.threads import aside, threads
from uq.store.saved import Saved


@dataclass(frozen=True)
class Rows:
    """A stand-in for tallies that remembers its rows, and refuses to hold one twice."""

    rows: frozenset[tuple[int, int]]
    held: dict[str, object] = field(default_factory=lambda: {"values": Kept({})})

    @classmethod
    def of(cls, block: Block) -> Rows:
        return cls(frozenset((block.replicate, row) for row in range(block.first, block.first + block.count)))

    def merge(self, other: Rows) -> Rows:
        assert not self.rows & other.rows
        return Rows(self.rows | other.rows)

    def arrays(self) -> dict[str, np.ndarray]:
        return {"rows": np.array(sorted(self.rows))}


DESIGN = Design(("a",), seed=1, rows=128, replicates=2)
SPAN = (64, 128)
EVERY = {(replicate, row) for replicate in range(2) for row in range(*SPAN)}


def part_of(block: Block) -> Part:
    return Part((block,), Rows.of(block), Count(solves=2 * block.count))  # type: ignore[arg-type]


def crew(threads: int = 2, rows: int = 0, observer: Silent | None = None) -> Crew:
    observer = observer or Silent()
    return Crew(Spread(threads, rows), Meter(256, observer, time.perf_counter), observer)


def held(part: Part) -> frozenset[tuple[int, int]]:
    return part.tallies.rows  # type: ignore[return-value]


@pytest.mark.parametrize(("threads", "rows"), list(itertools.product((1, 2, 4), (1, 2, 8, 64))))
def test_every_row_is_solved_once_by_any_threads_in_any_blocks(threads: int, rows: int) -> None:
    gathering = Gathering()
    tasks = [(name, block) for name in ("", "s") for block in still_open(DESIGN, SPAN, rows, ())]
    solve_blocks(tasks, {"": part_of, "s": part_of}, gathering.add, crew(threads, rows))
    found = gathering.take()
    assert set(found) == {"", "s"}
    assert all(held(part) == EVERY for part in found.values())
    assert found[""].members == 2 * len(EVERY)
    assert found[""].count.solves == 2 * len(EVERY)
    assert gathering.take() == {}


@given(seed=st.integers(0, 10**6), size=st.sampled_from([1, 4, 16, 64]), share=st.floats(0, 1))
def test_what_is_still_open_is_what_is_not_done(seed: int, size: int, share: float) -> None:
    chosen = random.Random(seed)
    done = [block for block in still_open(DESIGN, SPAN, chosen.choice([1, 2, 8, 32]), ()) if chosen.random() < share]
    open_ = list(still_open(DESIGN, SPAN, size, done))
    rows = [(block.replicate, row) for block in (*done, *open_) for row in range(block.first, block.first + block.count)]
    assert len(rows) == len(set(rows))
    assert set(rows) == EVERY
    assert all(block.count <= size for block in open_)


def test_parts_gather_like_with_like() -> None:
    """1000 parts are merged about ten times each, not a thousand."""
    merges: list[int] = []

    class Counted(Rows):
        def merge(self, other: Rows) -> Counted:
            merges.append(len(self.rows) + len(other.rows))
            return Counted(self.rows | other.rows)

    gathering = Gathering()
    for number in range(1000):
        block = Block(number, 0, 1)
        gathering.add("", Part((block,), Counted(Rows.of(block).rows), Count()))  # type: ignore[arg-type]
    assert len(held(gathering.take()[""])) == 1000
    assert sum(merges) < 1000 * 14


@given(order=st.permutations(range(16)))
def test_halves_of_blocks_are_joined_in_any_order(order: list[int]) -> None:
    found: tuple[Block, ...] = ()
    for number in order:
        found = joined(found, (Block(number % 2, 32 + 4 * (number // 2), 4),))
    assert found == (Block(0, 32, 32), Block(1, 32, 32))


def test_no_threads_below_none_and_no_crooked_blocks() -> None:
    with pytest.raises(ValueMistake, match="all cores"):
        Spread(threads=-1)
    with pytest.raises(ValueMistake, match="power of two"):
        Spread(rows=12)
    assert Spread().workers >= 1


def test_a_defect_in_a_block_is_told_as_it_is() -> None:
    def work(block: Block) -> Part:
        if block.replicate:
            raise ZeroDivisionError("in a block")
        return part_of(block)

    tasks = [("", block) for block in still_open(DESIGN, SPAN, 4, ())]
    with pytest.raises(ZeroDivisionError, match="in a block"):
        solve_blocks(tasks, {"": work}, lambda name, part: None, crew(2, 4))


@dataclass
class Memory(Forgetful):
    """A keeper in memory."""

    parts: dict[str, Saved] = field(default_factory=dict)

    def keep(self, name: str, saved: Saved) -> None:
        assert name not in self.parts
        self.parts[name] = saved

    def names(self) -> tuple[str, ...]:
        return tuple(sorted(self.parts))

    def kept(self, name: str) -> Saved | None:
        return self.parts[name]


def rows_in(memory: Memory) -> list[tuple[int, int]]:
    return [tuple(row) for name in memory.names() for row in memory.parts[name].arrays["/tallies/rows"].tolist()]


def test_progress_is_kept_when_it_is_due_and_nothing_is_kept_twice() -> None:
    now, memory = [0.0], Memory()
    checkpoints = Checkpoints(memory, lambda: now[0], Pace(at_end=1.0, within=20.0))
    checkpoints.begin(3, {})
    blocks = list(still_open(DESIGN, SPAN, 16, ()))
    for number, block in enumerate(blocks):
        now[0] = 9.0 * number
        checkpoints.brought("", part_of(block))
    # 8 blocks of 9 seconds: after 27 and 54 seconds.
    assert len(memory.parts) == 2
    assert {saved.facts["round"] for saved in memory.parts.values()} == {3}
    assert held(checkpoints.end()[""]) == EVERY
    assert len(memory.parts) == 3
    rows = rows_in(memory)
    assert len(rows) == len(set(rows)) == len(EVERY)


def test_short_rounds_are_kept_together_and_a_stop_keeps_all() -> None:
    memory = Memory()
    checkpoints = Checkpoints(memory, lambda: 0.0, Pace())
    for number, replicate in ((0, 0), (1, 1)):
        checkpoints.begin(number, {})
        checkpoints.brought("", part_of(Block(replicate, 64, 64)))
        checkpoints.end()
    assert memory.parts == {}
    assert not Checkpoints(Memory(), lambda: 0.0).flush()
    checkpoints.begin(2, {})
    checkpoints.brought("", part_of(Block(2, 64, 2)))
    assert checkpoints.flush()
    assert [memory.parts[name].facts["round"] for name in memory.names()] == [0, 1, 2]
    # The next attempt does not write over them.
    again = Checkpoints(memory, lambda: 100.0, Pace(0.0, 0.0))
    again.begin(2, {"": part_of(Block(2, 64, 2))})
    again.brought("", part_of(Block(2, 66, 2)))
    assert len(memory.parts) == 4
    assert len(held(again.end()[""])) == 4


def test_the_end_of_a_round_waits_where_much_is_to_be_written() -> None:
    pace = Pace(at_end=1.0, within=20.0, share=0.03, rate=200e6)
    assert not pace.due(0.9, 0, ended=True)
    assert pace.due(1.1, 0, ended=True)
    assert not pace.due(10.0, 100_000_000, ended=True)
    assert pace.due(18.0, 100_000_000, ended=True)
    assert pace.due(20.0, 10**9, ended=True)
    assert not pace.due(19.0)
    assert pace.due(20.0)


def test_parts_of_branches_stay_apart() -> None:
    one, other = part_of(Block(0, 64, 64)), part_of(Block(1, 64, 64))
    assert together([]) == {}
    found = together([{"": one}, {"s": one}, {"": other}])
    assert held(found[""]) == EVERY
    assert held(found["s"]) == held(one)


def test_ctrl_c_sets_the_stop_flag_and_waits_for_the_threads() -> None:
    observer = Silent()
    begun = threading.Event()

    def kernel() -> str:
        begun.set()
        while not observer.stop[0]:
            time.sleep(0.001)
        raise Interrupted("seen by the kernel")

    def press() -> None:
        begun.wait(5)
        time.sleep(0.05)  # not while the pool starts its thread
        os.kill(os.getpid(), signal.SIGINT)

    presser = threading.Thread(target=press)
    presser.start()
    with pytest.raises(Interrupted, match="no result was written"):
        aside(kernel, observer)
    presser.join()
    assert observer.stop[0] == 1
    assert not [t for t in threading.enumerate() if t.name.startswith("uq")]


def test_a_pool_comes_to_rest_when_the_process_is_told_to_exit() -> None:
    observer = Silent()

    def kernel() -> None:
        for _ in range(30_000):  # half a minute at the most, should nobody stop it
            if observer.stop[0]:
                return
            time.sleep(0.001)

    def exits() -> None:
        with threads(1, observer) as pool:
            pool.submit(kernel)
            sys.exit()

    begin = time.monotonic()
    with pytest.raises(SystemExit):
        exits()
    assert time.monotonic() - begin < 15


def test_the_meter_adds_up_and_tells() -> None:
    told: list[Progress] = []

    class Watcher(Silent):
        def progress(self, progress: Progress) -> None:
            told.append(progress)

    clock = iter([10.0, 12.0, 14.0])
    counts = Meter(100, Watcher(), lambda: next(clock))
    counts.add(Count(solves=20, failed=1, steps=100, rejections=5, seconds=1.0))
    counts.add(Count(solves=20, seconds=3.0))
    assert [(p.done, p.total, p.failed, p.seconds) for p in told] == [(20, 100, 1, 2.0), (40, 100, 1, 4.0)]
    assert told[0].seconds_left == 8.0
    assert counts.seconds_per_solve == 0.1
    assert counts.sofar == Count(solves=40, failed=1, steps=100, rejections=5, seconds=4.0)


def test_what_an_earlier_attempt_did_is_done_but_says_nothing_of_the_speed() -> None:
    told: list[Progress] = []

    class Watcher(Silent):
        def progress(self, progress: Progress) -> None:
            told.append(progress)

    now = [0.0]
    counts = Meter(100, Watcher(), lambda: now[0])
    counts.resume(Count(solves=60, seconds=6.0), 30.0)
    now[0] = 2.0
    counts.add(Count(solves=20, seconds=2.0))
    assert (told[0].done, told[0].seconds_left) == (80, 2.0)
    assert counts.elapsed == 32.0
    assert counts.all_in(2) == 2.0 * 2 / 20


def test_before_anything_is_done_no_time_left_is_claimed() -> None:
    assert Progress(0, 10, 0, 0.0).seconds_left is None
    assert Progress(0, 0, 0, 0.0).share == 1.0
    assert np.all(Silent().stop == 0)
