"""What a cluster is given: sizes of blocks, how many at a time, and how a block that kills its workers is taken apart."""

from __future__ import annotations

import random

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.design.blocks import Block
from uq.errors import UseMistake
from uq.running.abroad import unlike
from uq.running.named import EXPECTED, named
from uq.running.pace import Shape
from uq.running.parcel import inner_blocks
from uq.running.tasks import (
    IN_FLIGHT,
    RESULT_BYTES,
    TASK_SECONDS,
    Culprit,
    Handout,
    PilotHandout,
    Task,
    blocks_together,
    bundled,
    halves,
    inner_rows,
    task_rows,
    window,
)

PARTS = 5


@given(
    seconds=st.floats(1e-7, 100),
    kept=st.integers(0, 10**6),
    rows=st.sampled_from([1, 64, 4096, 2**20]),
    cores=st.integers(1, 500),
    solves=st.integers(2, 100),
)
def test_a_block_lasts_a_second_at_most_and_sends_back_little(seconds: float, kept: int, rows: int, cores: int, solves: int) -> None:
    size = task_rows(Shape(solves, 100), kept, seconds, rows, 16, cores)
    assert size & (size - 1) == 0
    assert 1 <= size <= rows
    if size > 1:
        assert size * solves * seconds <= TASK_SECONDS
        assert size * kept <= RESULT_BYTES
        assert 16 * rows / size >= cores


def test_members_of_two_microseconds_come_in_blocks_of_many() -> None:
    assert task_rows(Shape(10, 200), 16, 2e-6, 2**20, 16, 2) == 2**15
    assert inner_rows(Shape(10, 200)) == 2**10


def test_a_worker_solves_a_block_in_pieces_that_make_it_whole() -> None:
    assert list(inner_blocks(Block(3, 64, 64), 16)) == [Block(3, first, 16) for first in (64, 80, 96, 112)]
    assert list(inner_blocks(Block(3, 64, 8), 16)) == [Block(3, 64, 8)]


def test_every_core_has_a_block_and_another_but_never_more_than_a_few_hundred_are_out() -> None:
    assert [window(cores) for cores in (0, 1, 2, 50, 1000)] == [2, 2, 4, 100, IN_FLIGHT]
    assert IN_FLIGHT == 200


def test_a_block_comes_apart_by_rows_and_a_row_by_its_members() -> None:
    assert halves(Task("s", Block(1, 4, 4)), PARTS) == (Task("s", Block(1, 4, 2)), Task("s", Block(1, 6, 2)))
    assert halves(Task("", Block(1, 4, 1)), PARTS) == (Task("", Block(1, 4, 1), (0, 2)), Task("", Block(1, 4, 1), (2, 5)))
    assert halves(Task("", Block(1, 4, 1), (2, 5)), PARTS) == (Task("", Block(1, 4, 1), (2, 3)), Task("", Block(1, 4, 1), (3, 5)))
    assert halves(Task("", Block(1, 4, 1), (3, 4)), PARTS) == ()


def test_what_comes_back_goes_out_again_until_all_is_done() -> None:
    tasks = [Task("", Block(0, 8 * number, 8)) for number in range(6)]
    handout = Handout(tasks, {"": PARTS})
    assert handout.due(4) == tasks[:4]
    assert handout.due(4) == []
    handout.done(tasks[1])
    assert handout.due(4) == [tasks[4]]
    for task in (tasks[0], *tasks[2:5]):
        handout.done(task)
    assert handout.left
    assert handout.due(4) == [tasks[5]]
    handout.done(tasks[5])
    assert not handout.left


def searched(seed: int, size: int, deadly: set[tuple[int, int, int]], whole_rows: set[tuple[int, int]]) -> tuple[Handout, list[Task]]:
    """A cluster in words: whatever holds a deadly member (replicate, row, solve) dies, or a deadly row as a whole; whoever is out with it
    may be suspected as well. Returns the handout at its end and the blocks that were solved."""
    chosen = random.Random(seed)
    handout = Handout([Task("", Block(replicate, first, size)) for replicate in range(2) for first in range(0, 32, size)], {"": PARTS})
    out: list[Task] = []
    solved: list[Task] = []
    while handout.left and handout.culprit is None:
        due = handout.due(4)
        assert len(out) + len(due) <= 4
        out += due
        if not out:
            continue
        task = out.pop(chosen.randrange(len(out)))
        rows = [(task.block.replicate, row) for row in range(task.block.first, task.block.first + task.block.count)]
        members = {(*row, solve) for row in rows for solve in range(*(task.solves or (0, PARTS)))}
        if members & deadly or (task.solves is None and set(rows) & whole_rows):
            for shared in [each for each in out if chosen.random() < 0.5]:
                out.remove(shared)
                handout.died(shared)
            handout.died(task)
        else:
            handout.done(task)
            solved += [task] if task.solves is None else []
    return handout, solved


@given(
    seed=st.integers(0, 10**6), size=st.sampled_from([1, 4, 16]), place=st.tuples(st.integers(0, 1), st.integers(0, 31), st.integers(0, 4))
)
def test_the_one_member_that_kills_is_found_whoever_is_suspected_with_it(seed: int, size: int, place: tuple[int, int, int]) -> None:
    handout, solved = searched(seed, size, {place}, set())
    assert handout.due(4) == []
    assert handout.culprit == Culprit("", *place)
    rows = [(task.block.replicate, row) for task in solved for row in range(task.block.first, task.block.first + task.block.count)]
    assert len(rows) == len(set(rows))
    assert place[:2] not in rows


@given(seed=st.integers(0, 10**6), size=st.sampled_from([1, 8]), place=st.tuples(st.integers(0, 1), st.integers(0, 31)))
def test_a_row_none_of_whose_members_kills_alone_is_named_as_a_row(seed: int, size: int, place: tuple[int, int]) -> None:
    assert searched(seed, size, set(), {place})[0].culprit == Culprit("", *place, None)


@given(seed=st.integers(0, 10**6), dead=st.integers(0, 3))
def test_a_machine_that_dies_with_innocent_blocks_loses_nothing(seed: int, dead: int) -> None:
    tasks = [Task("", Block(0, 4 * number, 4)) for number in range(8)]
    handout, chosen = Handout(tasks, {"": PARTS}), random.Random(seed)
    out: list[Task] = []
    rows: list[int] = []
    while handout.left:
        out += handout.due(4)
        task = out.pop(chosen.randrange(len(out)))
        if dead > 0 and not handout.searching:
            dead -= 1
            handout.died(task)
        else:
            handout.done(task)
            rows += range(task.block.first, task.block.first + task.block.count)
    assert handout.culprit is None
    assert sorted(rows) == list(range(32))


def test_short_blocks_go_together_and_long_ones_alone() -> None:
    # 16 blocks of a millisecond on two cores: a task for each core. Of 0.05 s each: eight tasks of 0.1 s. Of half a second: eight tasks,
    # four for each core; of a second, or with large results, one block in each.
    assert [blocks_together(seconds, 0, 16, 2) for seconds in (0.001, 0.05, 0.5, 1.0)] == [8, 2, 2, 1]
    assert blocks_together(0.001, RESULT_BYTES, 16, 2) == 1
    assert blocks_together(0.001, 0, 16, 50) == 1
    blocks = [("", Block(number, 0, 64)) for number in range(5)] + [("s", Block(0, 0, 64))]
    tasks = list(bundled(blocks, {"": 2, "s": 3}))
    assert [task.blocks for task in tasks] == [tuple(block for _, block in blocks[at : at + 2]) for at in (0, 2)] + [
        (blocks[4][1],),
        (blocks[5][1],),
    ]
    assert [task.words for task in tasks[1:]] == ["2/0-63, 3/0-63", "4/0-63", "0/0-63 of s"]


def test_a_task_of_several_blocks_comes_apart_by_these_first() -> None:
    one, two, three = (Block(number, 0, 2) for number in range(3))
    assert halves(Task("", one, None, (two, three)), PARTS) == (Task("", one), Task("", two, None, (three,)))
    handout = Handout([Task("", one, None, (two,))], {"": PARTS})
    handout.died(*handout.due(1))
    assert handout.due(4) == [Task("", one)]


@pytest.mark.parametrize("deadly", [(0, 0), (2, 5), None])
def test_a_member_of_the_pilot_that_kills_is_found_row_by_row(deadly: tuple[int, int] | None) -> None:
    handout, deaths = PilotHandout("", 3, 8), 0
    while handout.left and handout.culprit is None:
        for task in handout.due(4):
            if task.pilot or (task.block.replicate, task.block.first) == deadly:
                handout.died(task)
                deaths += 1
            else:
                assert (task.block.count, task.solves) == (1, (0, 1))
                handout.done(task)
    assert handout.culprit == (Culprit("", *deadly, 0) if deadly else Culprit("", 0, None, None))
    assert deaths == (2 if deadly else 1)


def test_in_what_a_worker_differs_is_told() -> None:
    made = {"uq": "0.1.0", "numpy": "2.4.6", "processor": "x86_64, znver4, avx512"}
    assert unlike(made, dict(made)) == ""
    assert unlike(made, {"uq": "0.0.9"}) == "uq 0.0.9 (here 0.1.0)"
    assert unlike(made, {"uq": "not installed"}) == "uq not installed (here 0.1.0)"
    assert unlike(made, {**made, "numpy": "2.3.0"}) == "numpy 2.3.0 (here 2.4.6)"


def test_where_to_solve_is_read_from_a_text() -> None:
    assert named(None).kind == "here"
    assert (named("local:3").kind, named("local:3").count) == ("local", 3)
    assert named("local").count >= 1
    assert named("tcp://host:8786").kind == "address"
    assert named("site/slurm.toml").kind == "file"
    for text in ("", "lokal", "local:0", "local:x", "tcp://host", "http://host:80", "slurm"):
        with pytest.raises(UseMistake) as caught:
            named(text)
        assert caught.value.found == f'"{text}"'
        assert caught.value.expected == EXPECTED
