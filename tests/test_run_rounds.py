"""The fold over blocks, with stand-ins for the tallies: what is merged with what, and how a run is stopped."""

from __future__ import annotations

import itertools
import os
import signal
import threading
import time
from dataclasses import dataclass

import numpy as np
import pytest

from uq.design.blocks import Block
from uq.errors import Interrupted, ValueMistake
from uq.running.meter import Count, Meter
from uq.running.observer import Progress, Silent
from uq.running.pace import Shape
from uq.running.rounds import Spread, fold
from uq.running.threads import aside


@dataclass(frozen=True)
class Brackets:
    """A stand-in that remembers how it was merged, by replicate: (first, stop, tree). Leaves are single rows, whatever the block."""

    held: dict[int, tuple[int, int, object]]

    @classmethod
    def of(cls, block: Block) -> Brackets:
        rows = [cls({block.replicate: (n, n + 1, n)}) for n in range(block.first, block.first + block.count)]
        while len(rows) > 1:
            rows = [left.merge(right) for left, right in zip(rows[::2], rows[1::2], strict=True)]
        return rows[0]

    def merge(self, other: Brackets) -> Brackets:
        held = dict(self.held)
        for replicate, (first, stop, tree) in other.held.items():
            if replicate in held:
                before, middle, left = held[replicate]
                assert middle == first
                assert middle - before == stop - first
                held[replicate] = (before, stop, (left, tree))
            else:
                held[replicate] = (first, stop, tree)
        return Brackets(held)


class StandInDesign:
    """Two replicates of 32 rows in rounds of 8, 8 and 16."""

    replicates = 2

    def rounds(self):  # type: ignore[no-untyped-def]
        return ((0, 8), (8, 16), (16, 32))

    def blocks(self, first, stop, rows):  # type: ignore[no-untyped-def]
        return [Block(r, n, min(rows, stop - first)) for r in range(2) for n in range(first, stop, min(rows, stop - first))]


def meter(observer: Silent | None = None, total: int = 64) -> Meter:
    return Meter(total, observer or Silent(), time.perf_counter)


def folded(threads: int, rows: int) -> Brackets:
    return fold(StandInDesign(), Brackets.of, Shape(2, 1), meter(), Spread(threads, rows), Silent())  # type: ignore[arg-type, return-value]


def test_the_tree_over_rows_is_the_same_for_any_threads_and_blocks() -> None:
    told = [folded(threads, rows) for threads, rows in itertools.product((1, 2, 4), (0, 1, 2, 4, 8, 64))]
    assert all(brackets == told[0] for brackets in told)
    assert {replicate: (first, stop) for replicate, (first, stop, _) in told[0].held.items()} == {0: (0, 32), 1: (0, 32)}


def test_no_threads_below_none_and_no_crooked_blocks() -> None:
    with pytest.raises(ValueMistake, match="all cores"):
        Spread(threads=-1)
    with pytest.raises(ValueMistake, match="power of two"):
        Spread(rows=12)
    assert Spread().workers >= 1


def test_a_defect_in_a_block_is_told_as_it_is() -> None:
    def work(block: Block) -> Brackets:
        if block.replicate:
            raise ZeroDivisionError("in a block")
        return Brackets.of(block)

    with pytest.raises(ZeroDivisionError, match="in a block"):
        fold(StandInDesign(), work, Shape(2, 1), meter(), Spread(2, 4), Silent())  # type: ignore[arg-type]


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


def test_before_anything_is_done_no_time_left_is_claimed() -> None:
    assert Progress(0, 10, 0, 0.0).seconds_left is None
    assert Progress(0, 0, 0, 0.0).share == 1.0
    assert np.all(Silent().stop == 0)
