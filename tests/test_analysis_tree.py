"""The same bits for any blocks and any order; compiled loops do what plain ones do."""

from __future__ import annotations

import subprocess
import sys
from pathlib import Path

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.analysis_models import Model, complete, gaussian, tallied
from tests.plain_quantiles import plain_quantiles
from uq.analysis import compiled, counting
from uq.analysis.finding import Finding
from uq.analysis.pieces import Pieces, reversed_rows, tree_sum
from uq.analysis.quantiles import Levels, quantiles, quantiles_of_pieces
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design
from uq.solve.batch import Truth

ROOT = Path(__file__).parent.parent
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


def summed(values: np.ndarray) -> np.ndarray:
    """Rows of the first axis along the tree."""
    while len(values) > 1:
        values = values[0::2] + values[1::2]
    return values[0]


@pytest.mark.parametrize("rows", [1, 2, 8, 64])
@pytest.mark.parametrize("cells", [1, 127, 128, 300])
def test_compiled_sums_are_along_the_tree(rows: int, cells: int) -> None:
    rng = np.random.default_rng(rows * cells)
    a, b, m = rng.normal(size=(3, rows, cells + 2)) * 10.0 ** rng.integers(-8, 8, size=(3, rows, 1))
    centre, lost = rng.normal(size=cells), rng.random((rows, cells)) < 0.2
    for gone in (np.zeros((0, cells), dtype=np.bool_), lost):
        kept = ~gone if len(gone) else np.ones((rows, cells), dtype=np.bool_)
        x, y, d = ((np.where(kept, each, 0.0)) for each in (a[:, :cells] - centre, b[:, :cells] - centre, (m - a)[:, :cells]))
        found = np.empty((5, cells))
        compiled.base_sums_1(a, b, centre, gone, found[0], found[1])
        compiled.mixed_sums_1(a, b, m, centre, gone, found[2], found[3], found[4])
        for each, rows_of in zip(found, (x + y, x * x + y * y, d, d * y, d * d), strict=True):
            assert np.array_equal(each, summed(rows_of))


@pytest.mark.parametrize("rows", [1, 32, 128])
def test_kept_values_and_largest_deviations(rows: int) -> None:
    rng = np.random.default_rng(rows)
    outputs, centre, inverse = rng.normal(size=(rows, 7)), rng.normal(size=6), rng.random(6)
    outputs[0, 1] = np.nan
    outputs[-1, 4] = -np.inf
    values, deviations = np.full((6, 2 * rows), 9.0), np.full((2, 2 * rows), 9.0)
    compiled.keep_1(outputs, rows, centre, inverse, values, deviations)
    assert np.array_equal(values[:, rows:], outputs[:, :6].T, equal_nan=True)
    sizes = np.abs((outputs[:, :6] - centre) * inverse).reshape(rows, 2, 3).max(axis=2).T
    assert np.array_equal(deviations[:, rows:], sizes, equal_nan=True)
    assert (values[:, :rows] == 9.0).all()
    assert (deviations[:, :rows] == 9.0).all()


@settings(max_examples=100, deadline=None, derandomize=True)
@given(st.integers(1, 12), st.integers(1, 5), st.sampled_from((0.1, 0.5)), st.sampled_from((0.0, 0.1, 0.5)), st.integers(0, 2**32))
def test_first_true(times: int, rows: int, often: float, doubt: float, seed: int) -> None:
    rng = np.random.default_rng(seed)
    conditions = rng.choice(3, size=(rows, 2, times), p=[(1 - often) * (1 - doubt), often * (1 - doubt), doubt]).astype(np.uint8)
    judged = np.sort(rng.choice(times, size=rng.integers(1, times + 1), replace=False))
    never = len(judged)
    first, lost = np.empty((2, rows, 2), dtype=np.intp)
    now, unsure = np.ones((2, 2, never), dtype=np.int64)
    compiled.first_true_2(conditions, judged, first, lost, now, unsure)
    chosen = conditions[:, :, judged]
    place, kind = (chosen > 0).argmax(axis=2), np.take_along_axis(chosen, (chosen > 0).argmax(axis=2)[..., None], axis=2)[..., 0]
    assert np.array_equal(first, np.where(kind == Truth.true, place, never))
    assert np.array_equal(lost, np.where(kind == Truth.unknown, place, never))
    assert np.array_equal(now, 1 + (chosen == Truth.true).sum(axis=0))
    assert np.array_equal(unsure, 1 + (chosen == Truth.unknown).sum(axis=0))


def agrees(values: np.ndarray, levels: Levels, absent: np.ndarray | None = None) -> bool:
    """Compiled quantiles of cells [cell, replicate, value] are those of the definition."""
    found = quantiles(values, levels, absent)
    for cell, of_cell in enumerate(values):
        missing = np.isnan(of_cell).sum(axis=1)
        left_out = np.zeros_like(missing) if absent is None else absent[cell]
        none = np.zeros_like(missing)
        failed = missing - left_out
        assert found.lost[cell].all() == found.lost[cell].any() == failed.any()
        ways = [(found.success, none, missing), (found.if_low, failed, left_out), (found.if_high, none, left_out)]
        for estimate, below, out in ways[: 3 if failed.any() else 1]:
            expected = plain_quantiles(of_cell, levels, below, out)
            if (missing == of_cell.shape[1]).all() and estimate is found.success:
                expected = np.full_like(expected, np.nan)
            for end, each in zip((estimate.value, estimate.low, estimate.high), expected, strict=True):
                assert np.array_equal(end[cell], each, equal_nan=True)
    return True


special = st.sampled_from([0.0, -0.0, 1.0, np.inf, -np.inf, 1e308, -1e308, 5e-324, np.nan])
plain = st.floats(allow_nan=False, width=64)


@settings(max_examples=150, deadline=None, derandomize=True)
@given(st.lists(special | plain, min_size=1, max_size=400), st.sampled_from([1, 2, 16]), st.integers(0, 2**32))
def test_quantiles_are_those_of_a_sort(values: list[float], replicates: int, seed: int) -> None:
    rng = np.random.default_rng(seed)
    data = np.array([rng.permutation(np.repeat(values, replicates)) for _ in range(3)]).reshape(3, replicates, -1)
    absent = (np.isnan(data) & (rng.random(data.shape) < 0.5)).sum(axis=2)
    assert agrees(data, Levels((0.001, 0.05, 0.5, 0.75, 0.999), 0.95), absent)


KINDS = {
    "normal": lambda z: z,
    "lognormal": lambda z: np.exp(8 * z),
    "mirrored": lambda z: -np.exp(8 * z),
    "both ways": lambda z: np.sinh(8 * z),
    "atom": lambda z: np.maximum(z, 0.0),
    "constant": lambda z: np.full(z.shape, 4.0),
    "offset": lambda z: 1e6 + 1e-3 * z,
    "bimodal": lambda z: np.sign(z) + 0.01 * z,
    "outlier": lambda z: np.where(np.arange(z.shape[-1]) == 77, 1e300, z),
    "failed": lambda z: np.where(z > 1.5, np.nan, z),
}


@pytest.mark.parametrize("kind", KINDS)
def test_quantiles_are_those_of_a_sort_of_many(kind: str) -> None:
    values = KINDS[kind](np.random.default_rng(7).normal(size=(2, 16, 2048)))
    assert agrees(values, Levels((0.0001, 0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99), 0.95))


def test_a_piece_is_read_as_it_stands() -> None:
    """Any pieces of the same members give the same, whatever the order of members within a replicate."""
    values = np.random.default_rng(3).normal(size=(4, 4, 64))
    whole = quantiles(values, Levels((0.1, 0.5), 0.95))
    pieces = [np.ascontiguousarray(values[:, r, half]) for r in range(4) for half in (slice(32, 64), slice(0, 32))]
    found = quantiles_of_pieces(pieces, 1, np.zeros((3, 4), dtype=np.int64), Levels((0.1, 0.5), 0.95))
    for name in ("value", "low", "high"):
        assert np.array_equal(getattr(found.success, name), getattr(whole.success, name)[1:])


def use_all_machine_code() -> None:
    """Everything that tallies do, with values kept and counted: every kernel is compiled for one kind of arguments."""
    design = Design(FAILING.inputs, 3, ROWS, replicates=4)
    for keep in (10**9, 1):
        ask = complete(FAILING, design, keep_bytes=keep, members=design.members)
        left, right = tallied(FAILING, design, ask, design.blocks(0, ROWS, ROWS // 2))[:2]
        left.merge(right).findings(ask)
    for kernel in (*compiled.KERNELS, counting.count_2, counting.add_counts_1):
        assert len(kernel.signatures) == 1, f"{kernel} is compiled again for another kind of argument"
    assert compiled.ready()


def test_machine_code_is_at_hand_once_used() -> None:
    # What a process has compiled depends on all that it did before, other tests included: a new one tells.
    program = "from tests.test_analysis_tree import use_all_machine_code; use_all_machine_code()"
    done = subprocess.run([sys.executable, "-c", program], cwd=ROOT, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr
