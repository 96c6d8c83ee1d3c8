"""Sizes, rounds and blocks of a design, and what it refuses."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import ValueMistake


@given(st.integers(1, 10**9), st.integers(0, 30), st.booleans())
def test_members_are_rounded_up_to_a_power_of_two_of_at_least_512(members, inputs, ranked):
    design = Design.for_members([f"x{n}" for n in range(inputs)], 0, members, ranked)
    assert design.members >= max(512, members)
    assert design.members < 2 * max(512, members)
    assert design.members.bit_count() == 1
    assert design.replicates == 16
    assert design.solves == 16 * design.rows * (2 + inputs * ranked)


def test_sizes_of_the_default():
    design = Design.for_members(("a", "b", "c"), 0, 16384, True)
    assert (design.rows, design.members, design.solves, design.parts) == (512, 16384, 16 * 512 * 5, 5)
    assert design.size_of_block(Block(0, 0, 64)) == 320


def test_rounds_double():
    assert Design((), 0, 16).rounds() == ((0, 16),)
    assert Design((), 0, 64).rounds() == ((0, 64),)
    assert Design((), 0, 512).rounds() == ((0, 64), (64, 128), (128, 256), (256, 512))


@given(st.integers(4, 12), st.integers(0, 9))
def test_blocks_cover_every_row_once_in_order(rows_exponent, block_exponent):
    design = Design((), 0, 2**rows_exponent, 3)
    blocks = [block for first, stop in design.rounds() for block in design.blocks(first, stop, 2**block_exponent)]
    for replicate in range(3):
        mine = [block for block in blocks if block.replicate == replicate]
        assert [row for block in mine for row in range(block.first, block.first + block.count)] == list(range(design.rows))
    one_round = design.blocks(0, min(64, design.rows), 8)
    assert list(one_round) == sorted(one_round)
    assert {block.count for block in one_round} == {8}


def test_split_gives_views_of_any_trailing_shape():
    design = Design(("a", "b"), 0, 64)
    block = Block(0, 0, 8)
    y = np.arange(32 * 3 * 2).reshape(32, 3, 2)
    parts = design.split(block, y)
    assert parts.a.shape == parts.b.shape == (8, 3, 2)
    assert parts.mixed.shape == (2, 8, 3, 2)
    assert (parts.mixed[1] == y[24:]).all()
    assert all(part.base is not None and np.shares_memory(part, y) for part in parts)
    flags = design.split(block, np.zeros(32, dtype=bool))
    assert flags.mixed.shape == (2, 8)
    with pytest.raises(ValueError, match="31 results for 32 members"):
        design.split(block, y[:31])


def test_spread_lays_out_what_split_takes_apart():
    design = Design(("a", "b", "c"), 9, 64)
    block = Block(0, 32, 32)
    base = design.base(block)
    assert (design.spread(block, np.exp(base)) == np.exp(design.points(block))).all()


@pytest.mark.parametrize("block", [(0, 0, 3), (0, 4, 8), (0, -8, 8), (0, 0, 0), (-1, 0, 8)])
def test_blocks_are_aligned_powers_of_two(block):
    with pytest.raises(ValueError, match="not an aligned block"):
        Block(*block)


@pytest.mark.parametrize("change", [{"rows": 48}, {"rows": 2**33}, {"replicates": 0}, {"seed": -1}, {"names": ("a", "a")}])
def test_designs_that_cannot_be(change):
    with pytest.raises(ValueError, match=r"no design|one name"):
        Design(**({"names": ("a", "b"), "seed": 0, "rows": 64} | change))


def test_more_inputs_or_members_than_there_are_points_is_the_users_mistake():
    with pytest.raises(ValueMistake, match="10601 uncertain inputs, expected at most 10600"):
        Design(tuple(map(str, range(10601))), 0, 64)
    with pytest.raises(ValueMistake, match="members, expected at most"):
        Design.for_members(("a",), 0, 10**15, True)
