"""The same bits for any blocks and any order; order statistics by bins are those of a sort."""

from __future__ import annotations

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.analysis_models import Model, complete, gaussian, tallied
from uq.analysis.finding import Finding
from uq.analysis.ordered import Ordered
from uq.analysis.pieces import Pieces, reversed_rows, tree_sum
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design

ROWS = 16
FAILING = Model(
    ("p", "q"),
    (0.0, 1.0, 2.0),
    lambda u, times: gaussian(u, times).repeat(2, axis=1) * np.array([1.0, 1e3])[:, None],
    watched=("T", "x"),
    outcomes=lambda u: np.where(u[:, :1] > 0.97, np.nan, np.exp(u[:, :1])),
    outcome_names=("o",),
    threshold=11.0,
    by=(2.0,),
    fails=lambda u: np.where(u[:, 1] > 0.9, 3.0 * u[:, 0], np.inf),
)
SOUND = Model(FAILING.inputs, FAILING.times, FAILING.values, FAILING.watched, None, (), 11.0, (2.0,))


def partition(draw: st.DrawFn, first: int, count: int) -> list[tuple[int, int]]:
    """Aligned power-of-two ranges that make up the rows first .. first + count."""
    if count == 1 or draw(st.booleans()):
        return [(first, count)]
    half = count // 2
    return partition(draw, first, half) + partition(draw, first + half, half)


@st.composite
def partitions(draw: st.DrawFn) -> list[tuple[int, int]]:
    return partition(draw, 0, ROWS)


def same(left: tuple[Finding, ...], right: tuple[Finding, ...]) -> bool:
    assert [finding.group for finding in left] == [finding.group for finding in right]
    for one, other in zip(left, right, strict=True):
        assert one.attributes == other.attributes
        assert one.variables.keys() == other.variables.keys()
        for name, variable in one.variables.items():
            assert variable.data.tobytes() == other.variables[name].data.tobytes(), (one.group, name)
    return True


@pytest.mark.parametrize("model", [SOUND, FAILING], ids=["sound", "failing"])
def test_any_blocks_and_any_order_give_the_same_bits(model: Model) -> None:
    design = Design(model.inputs, 3, ROWS, replicates=4)
    ask = complete(model, design)
    blocks = [Block(replicate, 0, ROWS) for replicate in range(4)]
    whole = tallied(model, design, ask, blocks)
    together = whole[0].merge(whole[1]).merge(whole[2]).merge(whole[3])
    expected, all_sums = together.findings(ask), together.held["watched"].pieces.by_replicate()

    @settings(max_examples=25, deadline=None, derandomize=True)
    @given(st.lists(partitions(), min_size=4, max_size=4), st.randoms(use_true_random=False))
    def check(ranges: list[list[tuple[int, int]]], random: object) -> None:
        parts = [Block(replicate, first, count) for replicate in range(4) for first, count in ranges[replicate]]
        random.shuffle(parts)  # type: ignore[attr-defined]
        heap: list[Tallies] = tallied(model, design, ask, parts)
        while len(heap) > 1:
            left = heap.pop(random.randrange(len(heap)))  # type: ignore[attr-defined]
            right = heap.pop(random.randrange(len(heap)))  # type: ignore[attr-defined]
            heap.append(left.merge(right))
        assert same(heap[0].findings(ask), expected)
        # Findings hide sums of which too many rows are lost.
        sums = heap[0].held["watched"].pieces.by_replicate()
        assert all(np.array_equal(sums[name], all_sums[name]) for name in all_sums)

    check()


def test_rounds_continue_what_was_tallied() -> None:
    design = Design(SOUND.inputs, 3, 128, replicates=4)
    ask = complete(SOUND, design)
    sofar = None
    for first, stop in design.rounds():
        for part in tallied(SOUND, design, ask, design.blocks(first, stop, 32)):
            sofar = part if sofar is None else sofar.merge(part)
    at_once = tallied(SOUND, design, ask, design.blocks(0, 128, 128))
    together = at_once[0].merge(at_once[1]).merge(at_once[2]).merge(at_once[3])
    assert sofar is not None
    assert same(sofar.findings(ask), together.findings(ask))


def test_threads_give_the_same_bits() -> None:
    from concurrent.futures import ThreadPoolExecutor

    design = Design(SOUND.inputs, 3, ROWS, replicates=4)
    ask = complete(SOUND, design)
    first, *rest = tallied(SOUND, design, ask, design.blocks(0, ROWS, ROWS))
    for part in rest:
        first = first.merge(part)
    with ThreadPoolExecutor(3) as pool:
        assert same(first.findings(ask, apply=pool.map), first.findings(ask))


def test_reversed_rows_make_halves_the_tree() -> None:
    values = np.random.default_rng(5).normal(size=(3, 8, 2)) * 10.0 ** np.arange(8)[:, None]
    pairs = values[:, 0::2] + values[:, 1::2]
    fours = pairs[:, 0::2] + pairs[:, 1::2]
    assert np.array_equal(tree_sum(values[:, reversed_rows(8)]), fours[:, 0] + fours[:, 1])


def test_an_incomplete_round_and_a_block_twice_are_our_defects() -> None:
    one = {"n": np.array(1)}
    left, right = Pieces.of(Block(0, 0, 4), one), Pieces.of(Block(0, 8, 4), one)
    with pytest.raises(ValueError, match="before its round is complete"):
        left.merge(right).by_replicate()
    with pytest.raises(ValueError, match="twice"):
        left.merge(left)


special = st.sampled_from([0.0, -0.0, 1.0, np.inf, -np.inf, 1e308, -1e308, 5e-324])
plain = st.floats(allow_nan=False, width=64)


@settings(max_examples=150, deadline=None, derandomize=True)
@given(st.lists(special | plain, min_size=1, max_size=400), st.integers(1, 5), st.integers(0, 2**32))
def test_ordered_is_a_sort(values: list[float], cells: int, seed: int) -> None:
    rng = np.random.default_rng(seed)
    data = np.array([rng.permutation(values) for _ in range(cells)])
    ranks = rng.integers(-1, len(values) + 3, size=(cells, 7))
    expected = np.sort(data, axis=1)
    inside = np.take_along_axis(expected, np.clip(ranks, 1, len(values)) - 1, axis=1)
    wanted = np.where(ranks < 1, -np.inf, np.where(ranks > len(values), np.inf, inside))
    with np.errstate(over="ignore"):
        assert np.array_equal(Ordered(data[:, None]).at(ranks), wanted)


@pytest.mark.parametrize("make", ["normal", "lognormal", "atom", "constant", "offset", "outlier"])
def test_ordered_is_a_sort_of_many(make: str) -> None:
    rng = np.random.default_rng(7)
    data = {
        "normal": rng.normal(size=(3, 20000)),
        "lognormal": np.exp(8 * rng.normal(size=(3, 20000))),
        "atom": np.maximum(rng.normal(size=(3, 20000)), 0.0),
        "constant": np.full((3, 20000), 4.0),
        "offset": 1e6 + 1e-3 * rng.normal(size=(3, 20000)),
        "outlier": np.where(np.arange(20000) == 77, 1e300, rng.normal(size=(3, 20000))),
    }[make]
    ranks = np.tile([1, 2, 1000, 10000, 10001, 19000, 20000], (3, 1))
    values = data.reshape(3, 4, 5000)
    ordered = Ordered(values)
    ordered.look(ranks[:, 2:4] - 30, ranks[:, 2:4] + 30)
    found = ordered.at(ranks)
    assert np.array_equal(found, np.take_along_axis(np.sort(data, axis=1), ranks - 1, axis=1))
    assert np.array_equal(ordered.at_or_below(ranks, found), (values[..., None] <= found[:, None, None]).sum(axis=2))
