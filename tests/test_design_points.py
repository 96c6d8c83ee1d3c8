"""Points of the design: the same bits however they are asked for, and the structure of scrambled Sobol' points."""

import subprocess
import sys
import warnings

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.stats import qmc

from uq.design import sobol
from uq.design.blocks import Block
from uq.design.design import Design
from uq.design.sobol import DIGITS, Columns, coordinates, direction_numbers, scrambled
from uq.seeds import random_words

NAMES = ("k0", "activation", "UA_off", "T_start")


def test_direction_numbers_give_the_public_points_of_scipy():
    # scipy lists rows in the order of the Gray code: its row r is our row r ^ (r >> 1).
    columns, digits = 600, 8
    plain = Columns(np.zeros(columns, dtype=np.uint64), direction_numbers(columns, digits))
    gray = np.arange(2**digits) ^ (np.arange(2**digits) >> 1)
    ours = coordinates(plain, 0, 2**digits).T[gray]
    public = qmc.Sobol(columns, scramble=False).random_base2(digits)
    assert (ours - 2.0**-53 == public).all()


def test_the_table_gives_the_numbers_of_the_public_points(monkeypatch):
    # scipy walks to a row one by one: many columns of the first rows, and few columns far out.
    cases = ((0, 3), (1, 1), (2, 7), (31, 16), (600, 16))
    ours = [direction_numbers(columns, digits) for columns, digits in cases]
    monkeypatch.setattr(sobol, "_table", lambda: None)
    theirs = direction_numbers(600, 16)
    for (columns, digits), found in zip(cases, ours, strict=True):
        assert (found == theirs[:columns, :digits]).all()


def test_few_inputs_need_no_scipy_stats():
    program = """
import sys
from uq.design.blocks import Block
from uq.design.design import Design
Design(tuple(f"input_{place}" for place in range(256)), 1, 64).points(Block(0, 0, 2))
print(any(name.startswith("scipy.stats") for name in sys.modules))
"""
    assert subprocess.run([sys.executable, "-c", program], capture_output=True, text=True, check=True).stdout == "False\n"


def test_rows_beyond_ten_million_are_those_of_scipy():
    first, count = 10_000_000, 128
    plain = Columns(np.zeros(8, dtype=np.uint64), direction_numbers(8, 24))
    ours = coordinates(plain, first, count)
    for row in (first, first + 77):
        gray = row
        for shift in (1, 2, 4, 8, 16):
            gray ^= gray >> shift
        with warnings.catch_warnings():
            warnings.simplefilter("ignore")
            public = qmc.Sobol(8, scramble=False).fast_forward(gray).random(1)[0]
        assert (ours[:, row - first] - 2.0**-53 == public).all()


def test_points_never_change():
    # Own values, noted down when the rule was fixed: a changed rule changes every result of every study.
    u = Design(("k0", "T_start"), 20261201, 64).points(Block(3, 32, 2))
    assert [[x.hex() for x in row] for row in u[[0, 3, 4]].tolist()] == [
        ["0x1.cee5ce8a8314bp-1", "0x1.bfada6847e17bp-1"],
        ["0x1.36548f1b44459p-1", "0x1.c7385e453e945p-1"],
        ["0x1.f621a076aacc6p-2", "0x1.bfada6847e17bp-1"],
    ]


@settings(max_examples=40, deadline=None)
@given(st.integers(0, 2**70), st.integers(0, 5), st.booleans(), st.lists(st.integers(0, 7), min_size=1, max_size=6))
def test_any_blocks_give_the_same_bits(seed, replicate, ranked, cuts):
    design = Design(NAMES, seed, 128, 6, ranked)
    whole = design.split(Block(replicate, 0, 128), design.points(Block(replicate, 0, 128)))
    place, first = 0, 0
    while first < 128:
        # The largest aligned block from here on that is not longer than the next wish.
        count = min(1 << cuts[place % len(cuts)], first & -first or 128)
        block = Block(replicate, first, count)
        parts = Design(NAMES, seed, 128, 6, ranked).split(block, design.points(block))
        assert (parts.a == whole.a[first : first + count]).all()
        assert (parts.b == whole.b[first : first + count]).all()
        assert (parts.mixed == whole.mixed[:, first : first + count]).all()
        place, first = place + 1, first + count


@settings(max_examples=30, deadline=None)
@given(st.integers(0, 2**40), st.integers(0, 15), st.integers(0, 3), st.integers(0, 3))
def test_a_coordinate_depends_on_its_name_place_side_row_and_replicate_only(seed, replicate, doublings, extra):
    block = Block(replicate, 0, 64)
    small = Design(NAMES, seed, 64)
    large = Design((*NAMES, *(f"more{n}" for n in range(extra))), seed, 64 << doublings, 16 + extra, ranked=False)
    assert (large.base(block)[:, : len(NAMES)] == small.base(block)).all()
    renamed = Design(("k0", "other", "UA_off", "T_start"), seed, 64).base(block)
    shared = renamed == small.base(block)
    assert shared[:, [0, 2, 3]].all()
    assert not shared[:, 1].any()


def test_pilot_is_the_first_a_rows_whatever_the_rows():
    design = Design(NAMES, 5, 256)
    pilot = design.pilot()
    assert pilot.shape == (256, 4)
    for replicate in range(16):
        assert (pilot[16 * replicate : 16 * replicate + 16] == design.base(Block(replicate, 0, 16))[:16]).all()
    assert (Design(NAMES, 5, 4).pilot() == pilot).all()
    assert (Design(NAMES, 5, 2048, ranked=False).pilot(8)[:8] == pilot[:8]).all()


def test_mixed_rows_are_a_with_one_column_from_b():
    design = Design(NAMES, 5, 64)
    block = Block(1, 32, 16)
    u = design.points(block)
    a, b, mixed = design.split(block, u)
    assert u.shape == (6 * 16, 4)
    assert mixed.shape == (4, 16, 4)
    assert (design.base(block) == np.concatenate([a, b])).all()
    for place in range(4):
        kept = [other for other in range(4) if other != place]
        assert (mixed[place][:, kept] == a[:, kept]).all()
        assert (mixed[place][:, place] == b[:, place]).all()


@pytest.mark.parametrize("first", [0, 192])
def test_every_column_fills_every_dyadic_interval_once(first):
    # Each aligned range of 2^m rows has one point in each of the 2^m intervals of length 2^-m.
    u = Design(tuple(f"x{n}" for n in range(40)), 11, 256).base(Block(2, first, 64))
    for column in (*u[:64].T, *u[64:].T):
        assert sorted(np.floor(column * 64).astype(int)) == list(range(64))


def test_pairs_of_first_columns_fill_squares():
    # The first two columns are a (0, 2)-sequence: 2^m rows fill each of the 2^m rectangles 2^-p by 2^(p-m) once, scrambled or not.
    u = Design(("one", "two"), 3, 64).base(Block(0, 0, 64))
    a, b = u[:64, 0], u[64:, 0]
    for p in range(7):
        cells = np.floor(a * 2**p).astype(int) * 2 ** (6 - p) + np.floor(b * 2 ** (6 - p)).astype(int)
        assert sorted(cells) == list(range(64))


def test_coordinates_are_middles_of_cells_and_never_0_or_1():
    lowest = Columns(np.zeros(1, dtype=np.uint64), np.zeros((1, 6), dtype=np.uint64))
    highest = Columns(np.full(1, 2**DIGITS - 1, dtype=np.uint64), np.zeros((1, 6), dtype=np.uint64))
    assert coordinates(lowest, 0, 1)[0, 0] == 2.0**-53
    assert coordinates(highest, 0, 1)[0, 0] == 1 - 2.0**-53
    u = Design(NAMES, 1, 1024).base(Block(0, 0, 1024))
    in_cells = u * 2.0**53
    assert (in_cells == np.floor(in_cells)).all()
    assert (in_cells % 2 == 1).all()


def test_all_digits_are_scrambled():
    # Rows below 2^9 have 9 digits before scrambling. After it each of the 43 further digits of a column is a random sum of those: the same
    # in all rows with probability 2^-9, else 1 in exactly half of them. Of 5504 such digits 10.75 are expected to be the same (Poisson:
    # none 2e-5, 30 or more 1e-6).
    same = 0
    for replicate in range(16):
        u = Design(NAMES, 1, 512).base(Block(replicate, 0, 512))
        cells = ((u * 2.0**53).astype(np.int64) - 1) >> 1
        for side in (cells[:512], cells[512:]):
            ones = np.array([(side >> digit & 1).sum(axis=0) for digit in range(43)])
            assert np.isin(ones, [0, 256, 512]).all()
            same += np.count_nonzero(ones != 256)
    assert 0 < same < 30


def test_scrambling_matrices_are_triangular_with_ones_on_the_diagonal():
    one_digit_each = (np.uint64(1) << np.arange(DIGITS - 1, -1, -1, dtype=np.uint64))[np.newaxis]
    images = scrambled(one_digit_each, random_words(1 + DIGITS, 1, "x")[np.newaxis]).directions[0]
    assert [int(image).bit_length() for image in images] == list(range(DIGITS, 0, -1))


def test_rows_beyond_the_design_are_refused():
    with pytest.raises(ValueError, match="beyond"):
        Design(NAMES, 1, 128).points(Block(0, 128, 128))


def test_design_without_inputs_has_rows_without_columns():
    design = Design((), 1, 64)
    assert design.points(Block(0, 0, 64)).shape == (128, 0)
    assert design.split(Block(0, 0, 64), np.zeros((128, 3))).mixed.shape == (0, 64, 3)
    assert design.pilot().shape == (256, 0)


def test_a_thousand_inputs():
    design = Design(tuple(f"x{n}" for n in range(1000)), 1, 16)
    u = design.base(Block(15, 0, 16))
    assert u.shape == (32, 1000)
    assert all(sorted(np.floor(column * 16).astype(int)) == list(range(16)) for column in u[:16].T)
