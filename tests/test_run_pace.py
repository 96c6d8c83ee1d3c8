"""How large a block is: a decision, values in and values out."""

from __future__ import annotations

from hypothesis import given
from hypothesis import strategies as st

from uq.running.pace import BLOCK_BYTES, BLOCK_SECONDS, BLOCKS_PER_THREAD, Shape, block_rows, power_of_two


@given(
    solves=st.integers(2, 1000),
    values=st.integers(0, 100_000),
    seconds=st.floats(0, 10),
    rows=st.sampled_from([2**n for n in range(20)]),
    replicates=st.integers(2, 64),
    threads=st.integers(1, 256),
)
def test_a_block_is_a_power_of_two_within_its_round_and_within_what_it_may_cost(solves, values, seconds, rows, replicates, threads) -> None:  # type: ignore[no-untyped-def]
    shape = Shape(solves, values)
    size = block_rows(shape, seconds, rows, replicates, threads)
    assert 1 <= size <= rows
    assert size & (size - 1) == 0
    if size > 1:
        assert size * solves * seconds <= BLOCK_SECONDS * (1 + 1e-9)
        assert size * shape.bytes <= BLOCK_BYTES
        assert size * BLOCKS_PER_THREAD * threads <= rows * replicates


def test_a_cheap_model_gets_long_blocks_and_a_dear_one_short_ones() -> None:
    assert block_rows(Shape(8, 200), 4e-6, 4096, 16, 2) == 1024
    assert block_rows(Shape(8, 200), 4e-3, 4096, 16, 2) == 4
    assert block_rows(Shape(8, 200), 40.0, 4096, 16, 2) == 1
    assert block_rows(Shape(8, 200), 0.0, 64, 16, 2) == 64


def test_power_of_two_rounds_down() -> None:
    assert [power_of_two(limit) for limit in (0.0, 0.9, 1, 1.99, 2, 3, 4, 1023, 1024)] == [1, 1, 1, 1, 2, 2, 4, 512, 1024]
