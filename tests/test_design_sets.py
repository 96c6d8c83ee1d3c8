"""Which inputs the mixed rows take from B, and that draws are shared whatever the sets and the dependence of others."""

from itertools import pairwise

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from uq.design.blocks import Block
from uq.design.design import Design
from uq.design.sets import MOST_SUBSETS, one_by_one, random_orders, shapley_sets
from uq.errors import ValueMistake
from uq.inputs.dependence import Dependence
from uq.inputs.distributions import Gamma, Lognormal, Normal, Uniform
from uq.inputs.inputs import Input, Inputs

NAMES = ("k0", "activation", "UA_off", "T_start")
SHAPES = (Lognormal(median=2, gsd=1.3), Normal(mean=98, sd=1.2), Gamma(shape=2, scale=3), Uniform(290, 310))


def inputs_of(dependence=(), names=NAMES, shapes=SHAPES):
    return Inputs(tuple(Input(name, name, "1", shape) for name, shape in zip(names, shapes, strict=True)), tuple(dependence))


def test_one_by_one_and_groups():
    assert one_by_one(3) == ((0,), (1,), (2,))
    assert one_by_one(4, [(2, 0), (1,), (0, 2)]) == ((0,), (1,), (2,), (3,), (0, 2))
    design = Design(NAMES, 1, 64, sets=one_by_one(4, [(1, 3)]))
    assert design.mixed_names == (*NAMES, "activation+T_start")
    assert (design.parts, design.solves) == (7, 16 * 64 * 7)


def test_without_sets_all_is_as_before():
    assert Design(NAMES, 1, 64).mixed_sets == ((0,), (1,), (2,), (3,))
    assert Design(NAMES, 1, 64, ranked=False).mixed_sets == ()
    assert Design(NAMES, 1, 64, sets=()).parts == 2
    assert Design.for_members(NAMES, 1, 512, True, ((0, 1),)).mixed_names == ("k0+activation",)


@pytest.mark.parametrize("sets", [((),), ((0, 4),), ((-1,),)])
def test_sets_of_inputs_that_are_not_there(sets):
    with pytest.raises(ValueError, match="not there"):
        Design(NAMES, 1, 64, sets=sets)


def test_all_proper_subsets_of_few_units():
    made = shapley_sets([(0,), (1, 3), (2,)], 0)
    assert made.sets == ((0,), (1, 3), (0, 1, 3), (2,), (0, 2), (1, 2, 3))
    assert made.orders == ()
    assert made.place_of([2, 0]) == 4
    assert [len(shapley_sets([(n,) for n in range(count)], 0).sets) for count in (1, 2, 8, 10)] == [0, 2, 254, 1022]


@given(st.integers(11, 60), st.integers(0, 2**70))
@settings(max_examples=25, deadline=None)
def test_random_orders_of_many_units(count, seed):
    made = shapley_sets([(unit,) for unit in range(count)], seed)
    assert made == shapley_sets([(unit,) for unit in range(count)], seed)
    assert len(made.sets) <= max(MOST_SUBSETS, 32 * (count - 1))
    assert len(made.orders) == 2 * max(16, 511 // (count - 1))
    for order, other in zip(made.orders[::2], made.orders[1::2], strict=True):
        assert sorted(order) == list(range(count))
        assert other == order[::-1]
    # Every set along an order is there.
    for order in made.orders[:4]:
        assert all(made.sets[made.place_of(order[first:])] == tuple(sorted(order[first:])) for first in range(1, count))


def test_orders_are_random():
    # Of 46 pairs of orders of 12 units the first half: how often unit 0 stands before unit 1 is binomial, beyond 8 to 38 with probability
    # 1e-5; other seeds give other orders.
    orders = random_orders(12, 5)[::2]
    assert len(orders) == 46
    assert 8 <= sum(order.index(0) < order.index(1) for order in orders) <= 38
    assert orders != random_orders(12, 6)[::2]


def test_so_many_correlated_inputs_that_their_weights_take_too_much_memory_are_refused():
    units = [(unit,) for unit in range(300)]
    with pytest.raises(ValueMistake, match=r"300 inputs of which 300 .*at most 512 MB.*13778 MB.*leave \"ranking\"") as told:
        shapley_sets(units, 0, linked=300)
    assert told.value.key == "ask"
    assert len(shapley_sets(units, 0, linked=5).orders) == 32
    assert len(shapley_sets(units[:100], 0, linked=100).sets) > 3000
    with pytest.raises(ValueMistake):
        shapley_sets(units[:102], 0, linked=102)


def test_mixed_rows_take_their_set_from_b():
    sets = shapley_sets([(0,), (1,), (2,), (3,)], 0).sets
    design = Design(NAMES, 5, 64, sets=sets)
    block = Block(1, 32, 16)
    a, b, mixed = design.split(block, design.points(block))
    assert mixed.shape == (14, 16, 4)
    for taken, rows in zip(sets, mixed, strict=True):
        kept = [place for place in range(4) if place not in taken]
        assert (rows[:, kept] == a[:, kept]).all()
        assert (rows[:, taken] == b[:, taken]).all()


@pytest.mark.parametrize("dependence", [(), (Dependence(("k0", "UA_off"), 0.6),)])
@pytest.mark.parametrize("ranked", [False, True])
def test_draw_is_values_and_conditional_rows(dependence, ranked):
    inputs = inputs_of(dependence)
    design = Design(NAMES, 9, 64, ranked=ranked)
    block = Block(2, 32, 32)
    x, u = design.draw(block, inputs), design.points(block)
    parts, points = design.split(block, x), design.split(block, u)
    assert (parts.a == inputs.values(points.a)).all()
    assert (parts.b == inputs.values(points.b)).all()
    for place, rows in enumerate(parts.mixed):
        kept = tuple(other for other in range(4) if other != place)
        assert (rows == inputs.conditional(points.a, points.b, kept)).all()
    if not dependence:
        assert (x == inputs.values(u)).all()
        assert (x == design.spread(block, inputs.values(design.base(block)))).all()


@settings(max_examples=30, deadline=None)
@given(st.integers(0, 2**70), st.lists(st.integers(0, 6), min_size=1, max_size=5))
def test_any_blocks_give_the_same_bits_with_dependence(seed, cuts):
    inputs = inputs_of([Dependence(("k0", "activation", "T_start"), [0.5, -0.4, 0.2])])
    sets = shapley_sets([unit.places for unit in inputs.units], seed).sets
    design = Design(NAMES, seed, 64, 3, sets=sets)
    whole = design.split(Block(2, 0, 64), design.draw(Block(2, 0, 64), inputs))
    place, first = 0, 0
    while first < 64:
        count = min(1 << cuts[place % len(cuts)], first & -first or 64)
        block = Block(2, first, count)
        parts = design.split(block, design.draw(block, inputs))
        for part, all_rows in zip(parts, whole, strict=True):
            assert (part == all_rows[..., first : first + count, :]).all()
        place, first = place + 1, first + count


correlations = st.floats(-0.9, 0.9)


@settings(max_examples=40, deadline=None)
@given(st.integers(0, 2**40), correlations, st.lists(correlations, min_size=2, max_size=2), st.booleans(), st.integers(0, 2))
def test_studies_share_the_draws_of_inputs_of_equal_name_and_place(seed, shared, others, ranked, extra):
    # Two studies with the first two inputs alike, also in how they depend on each other; the rest, the sets, the rows and the dependence of
    # inputs behind them differ.
    more = tuple(f"more{n}" for n in range(extra))
    one = inputs_of([Dependence(("k0", "activation"), shared)])
    links = [Dependence(("k0", "activation"), shared), Dependence(("UA_off", "renamed"), others[0])]
    two = inputs_of(links, (*NAMES[:3], "renamed", *more), (*SHAPES, *SHAPES[:extra]))
    block = Block(3, 32, 32)
    first = Design(one.names, seed, 64, ranked=ranked)
    second = Design(two.names, seed, 256, 20, sets=shapley_sets([unit.places for unit in two.units], seed).sets)
    a, b, _ = first.split(block, first.draw(block, one))
    other_a, other_b, _ = second.split(block, second.draw(block, two))
    assert (a[:, :2] == other_a[:, :2]).all()
    assert (b[:, :2] == other_b[:, :2]).all()
    # UA_off leads its own correlation there: it keeps the draws that it has alone.
    assert (a[:, 2] == other_a[:, 2]).all()
    assert not (a[:, 3] == other_a[:, 3]).any()


def test_a_linked_input_behind_changes_none_before_it():
    one = inputs_of([Dependence(("k0", "activation"), 0.5)])
    two = inputs_of([Dependence(("k0", "activation", "T_start"), [0.5, 0.3, -0.4])])
    design = Design(NAMES, 4, 64)
    x, y = (design.split(Block(0, 0, 64), design.draw(Block(0, 0, 64), each)) for each in (one, two))
    assert (x.a[:, :3] == y.a[:, :3]).all()
    assert not (x.a[:, 3] == y.a[:, 3]).any()


def test_rows_of_a_block_with_many_sets_are_counted():
    # 254 sets of 8 inputs: a block of 16 rows is 4096 members; blocks are sized by members, so that none explodes.
    names = tuple(f"x{n}" for n in range(8))
    inputs = inputs_of([Dependence(names, [0.3] * 28)], names, [Normal(mean=0, sd=1)] * 8)
    design = Design(names, 0, 64, sets=shapley_sets([unit.places for unit in inputs.units], 0).sets)
    block = Block(0, 0, 16)
    assert design.size_of_block(block) == 4096
    x = design.draw(block, inputs)
    assert x.shape == (4096, 8)
    assert np.isfinite(x).all()
    # Sets that differ by one unit give rows that differ.
    mixed = design.split(block, x).mixed
    assert all(not (one == other).all() for one, other in pairwise(mixed))
