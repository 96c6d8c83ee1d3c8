"""Inputs that go together: what is refused, what is drawn, and what is redrawn given the rest."""

import math
from itertools import combinations

import numpy as np
import pytest
import scipy.stats
from hypothesis import given, settings
from hypothesis import strategies as st

from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import ValueMistake
from uq.inputs.consistency import smallest_inconsistent
from uq.inputs.dependence import Dependence, JointSample, normal_of_rank, rank_of_normal, read_dependence
from uq.inputs.distributions import Data, Discrete, Gamma, Lognormal, Mistakes, Normal, Percentiles, Triangular, Truncated, Uniform
from uq.inputs.inputs import Input, Inputs, Unit
from uq.inputs.matrix import triangle, weights_given
from uq.inputs.ranks import average_ranks, rank_correlation

NAMES = ("a", "b", "c", "d", "e")
SHAPES = (
    Normal(mean=98.0, sd=1.2),
    Lognormal(median=6e12, gsd=1.3),
    Gamma(shape=2.5, scale=3),
    Triangular(2, 4, 9),
    Truncated(Normal(mean=0, sd=1), -1, 3),
)


def inputs_of(*dependence, names=NAMES, shapes=SHAPES):
    return Inputs(tuple(Input(name, name, "1", shape) for name, shape in zip(names, shapes, strict=True)), dependence)


def drawn(inputs, seed=20261201, rows=512):
    """A and B rows of all replicates: 16384 members at 512 rows, the default."""
    design = Design(inputs.names, seed, rows)
    return np.concatenate([inputs.values(design.base(Block(replicate, 0, rows))) for replicate in range(16)])


WRONG = [
    # entry, and of every mistake: its key, and a piece of its text
    ({"between": ["a", "b"], "rank_correlation": 1}, [("rank_correlation", "found 1, expected a number between -1 and 1 (for one that")]),
    ({"between": ["a", "b"], "rank_correlation": -1.5}, [("rank_correlation", "found -1.5")]),
    ({"between": ["a", "b"], "normal_correlation": math.nan}, [("normal_correlation", "found nan")]),
    ({"between": ["a", "b"], "normal_correlation": True}, [("normal_correlation", "the truth value true")]),
    ({"between": ["a", "b"], "normal_correlation": "0.5"}, [("normal_correlation", 'the text "0.5"')]),
    ({"between": ["a", "b"]}, [("", "no correlation")]),
    ({"between": ["a", "b"], "rank_correlation": 0.1, "normal_correlation": 0.1}, [("", "together, expected one of")]),
    ({"between": ["a", "b", "c"], "rank_correlation": 0.3}, [("rank_correlation", "1 number for 3 inputs, expected 3 numbers")]),
    ({"between": ["a", "b", "c"], "rank_correlation": [0.3, 0.1]}, [("rank_correlation", "2 numbers for 3 inputs")]),
    ({"between": ["a", "b", "c"], "rank_correlation": [0.3, 2, 0.1]}, [("rank_correlation", "found 2 as number 2")]),
    ({"between": ["a", "b"], "rank_correlation": [0.3, 0.1]}, [("rank_correlation", "2 numbers for 2 inputs, expected 1 number")]),
    ({"between": ["a"], "rank_correlation": 0.3}, [("between", "a list of two or more different inputs")]),
    ({"between": "ab", "rank_correlation": 0.3}, [("between", 'the text "ab"')]),
    ({"between": ["a", "a"], "rank_correlation": 0.3}, [("between", "`a` twice")]),
    ({"rank_correlation": 0.3}, [("", "no `between`")]),
    ({"between": ["a", "b"], "correlation": 0.3}, [("correlation", "did you mean `rank_correlation`?"), ("", "no correlation")]),
    ({"file": "p.csv"}, [("", "no `columns`")]),
    ({"file": 3, "columns": {"a": "x"}}, [("file", "found 3"), ("columns", "two or more inputs")]),
    ({"file": "p.csv", "columns": {"a": "x", "b": ""}}, [("columns", "for `b`")]),
    ({"file": "p.csv", "columns": {"a": "x", "b": "y"}, "between": ["a", "b"]}, [("", "`file`, `columns`, `between` together")]),
    (7, [("", "a table")]),
]


@pytest.mark.parametrize(("entry", "expected"), WRONG)
def test_every_mistake_in_an_entry_is_told(entry, expected):
    made, mistakes = read_dependence(entry)
    assert made is None
    assert [mistake.key for mistake in mistakes] == [key for key, _ in expected]
    for mistake, (_, text) in zip(mistakes, expected, strict=True):
        assert text in str(mistake)


def test_sound_entries_are_read():
    pair, _ = read_dependence({"between": ["a", "b"], "rank_correlation": 0.6})
    assert pair == Dependence(("a", "b"), 0.6)
    assert pair.normal() == (("a", "b", normal_of_rank(0.6)),)
    three, _ = read_dependence({"between": ["a", "b", "c"], "normal_correlation": [0.3, 0.1, 0.5]})
    assert three.pairs() == (("a", "b", 0.3), ("a", "c", 0.1), ("b", "c", 0.5))
    sample, _ = read_dependence({"file": "p.csv", "columns": {"a": "x", "b": "y"}})
    assert isinstance(sample, JointSample)
    with pytest.raises(Mistakes, match="between -1 and 1"):
        Dependence(("a", "b"), 1.0)


def test_rank_and_normal_correlation_are_converted_both_ways():
    # Pearson 1907; 0.5 of ranks is 2 sin(pi / 12) = (sqrt 6 - sqrt 2) / 2 of normal scores.
    assert normal_of_rank(0.5) == pytest.approx((math.sqrt(6) - math.sqrt(2)) / 2, rel=1e-15)
    for rank in (-0.99, -0.3, 0.0, 0.7):
        assert rank_of_normal(normal_of_rank(rank)) == pytest.approx(rank, abs=1e-15)


SAMPLE = JointSample("p.csv", {"a": "x", "b": "y"}, np.array([[1.0, 2.0], [3.0, 1.0]]))
TOGETHER = [
    # entries, and of every mistake: its entry, its key, and a piece of its text
    ([Dependence(("a", "zz"), 0.3)], [(0, "between", "`zz`, expected the names of uncertain inputs")]),
    ([JointSample("p.csv", {"aa": "x", "b": "y"})], [(0, "columns", "`aa`")]),
    ([Dependence(("a", "b"), 0.3), Dependence(("b", "a"), 0.3)], [(1, "between", "a second correlation between `b` and `a`")]),
    ([Dependence(("a", "b"), 0.3), Dependence(("c", "b", "a"), [0, 0, 0])], [(1, "between", "between `b` and `a`")]),
    ([SAMPLE, Dependence(("a", "c"), 0.3)], [(1, "between", "`a`, also in the joint sample p.csv")]),
    ([Dependence(("a", "c"), 0.3), SAMPLE], [(0, "between", "`a`, also in the joint sample p.csv")]),
    ([SAMPLE, JointSample("q.csv", {"b": "x", "c": "y"})], [(1, "columns", "`b`, also in the joint sample p.csv")]),
]  # fmt: skip


@pytest.mark.parametrize(("entries", "expected"), TOGETHER)
def test_entries_that_contradict_each_other_are_told(entries, expected):
    mistakes = Inputs.check(NAMES, tuple(entries))
    assert [(entry, mistake.key) for entry, mistake in mistakes] == [(entry, key) for entry, key, _ in expected]
    for (_, mistake), (_, _, text) in zip(mistakes, expected, strict=True):
        assert text in str(mistake)
    with pytest.raises(Mistakes):
        inputs_of(*entries)


def test_correlations_that_cannot_hold_together_name_the_pairs_responsible():
    entries = (Dependence(("a", "b"), 0.9), Dependence(("d", "e"), 0.5), Dependence(("b", "c"), 0.9), Dependence(("c", "a"), -0.9))
    ((entry, mistake),) = Inputs.check(NAMES, entries)
    assert (entry, mistake.key) == (3, "rank_correlation")
    assert "`a` and `b` 0.9, `a` and `c` -0.9, `b` and `c` 0.9" in mistake.found
    assert "`d`" not in str(mistake)
    # Sine of Pearson 1907 of 0.9, the two angles added, and back: what is left for the third pair.
    r = normal_of_rank(0.9)
    assert f"may lie from {math.ceil(1000 * rank_of_normal(2 * r * r - 1)) / 1000:g} to" in mistake.remedy


def test_a_pair_left_out_counts_as_zero_and_is_named():
    ((entry, mistake),) = Inputs.check(NAMES, (Dependence(("a", "b"), 0.9), Dependence(("b", "c"), 0.9)))
    assert entry == 1
    assert "and 0 between `a` and `c`, for which none is given" in mistake.found
    assert "that of `a` and `c` may lie from 0.6" in mistake.remedy
    low = float(mistake.remedy.split("from ")[1].split(" to")[0])
    for value, sound in ((low, True), (low - 0.002, False)):
        entries = (Dependence(("a", "b"), 0.9), Dependence(("b", "c"), 0.9), Dependence(("a", "c"), value))
        assert (not Inputs.check(NAMES, entries)) == sound


def test_four_that_hold_together_three_by_three_but_not_all():
    matrix = np.full((5, 5), -0.34)
    matrix[4, :] = matrix[:, 4] = 0.01
    np.fill_diagonal(matrix, 1)
    assert smallest_inconsistent(matrix) == (0, 1, 2, 3)


def test_the_smallest_inconsistent_set_among_many_inputs():
    # Too many subsets to try: still a set that holds together as soon as any one is left out.
    matrix = np.eye(300)
    chosen = (17, 101, 102, 250)
    for i, j in combinations(chosen, 2):
        matrix[i, j] = matrix[j, i] = -0.34
    assert smallest_inconsistent(matrix) == chosen


matrices = st.integers(2, 6).flatmap(
    lambda k: st.lists(st.lists(st.floats(-1, 1), min_size=k, max_size=k), min_size=k, max_size=k).map(np.array)
)


@settings(max_examples=60, deadline=None)
@given(matrices, st.data())
def test_triangles_and_conditional_weights_are_those_of_linear_algebra(raw, data):
    covariance = raw @ raw.T + 0.2 * np.eye(len(raw))
    scale = np.sqrt(np.diag(covariance))
    matrix = covariance / np.outer(scale, scale)
    lower = triangle(matrix)
    assert lower @ lower.T == pytest.approx(matrix, abs=1e-14)
    kept = data.draw(st.integers(1, len(matrix) - 1))
    exact = matrix[kept:, :kept] @ np.linalg.inv(matrix[:kept, :kept])
    assert weights_given(lower, kept) == pytest.approx(exact, abs=1e-11)
    rest = lower[kept:, kept:]
    assert rest @ rest.T == pytest.approx(matrix[kept:, kept:] - exact @ matrix[:kept, kept:], abs=1e-11)
    assert triangle(np.array([[1, 1.0], [1.0, 1]])) is None
    assert triangle(np.array([[1, 2.0], [2.0, 1]])) is None


def test_ranks_and_their_correlation_are_those_of_the_reference():
    x = np.random.default_rng(4).integers(0, 12, (200, 3)) + np.array([0.0, 0.5, 0.0])
    assert average_ranks(x[:, 0]).tolist() == scipy.stats.rankdata(x[:, 0]).tolist()
    assert rank_correlation(x) == pytest.approx(scipy.stats.spearmanr(x).statistic, abs=1e-14)
    constant = rank_correlation(np.column_stack([x[:, 0], np.ones(200)]))
    assert math.isnan(constant[0, 1])
    assert constant[1, 1] == 1


@pytest.mark.parametrize("kind", ["rank_correlation", "normal_correlation"])
@pytest.mark.parametrize("asked", [[0.95], [-0.8], [0.6, -0.3, 0.2], [0.3, 0.1, 0.2, 0.2, -0.6, 0.1]])
def test_the_sample_has_the_rank_correlation_asked_for(kind, asked):
    between = NAMES[: {1: 2, 3: 3, 6: 4}[len(asked)]]
    inputs = inputs_of(Dependence(between, **{kind: asked if len(asked) > 1 else asked[0]}))
    achieved = inputs.correlation_achieved(drawn(inputs))
    assert np.abs(achieved - inputs.correlation).max() < 0.02
    given_number = asked[0] if kind == "rank_correlation" else rank_of_normal(asked[0])
    assert inputs.correlation[0, 1] == pytest.approx(given_number, rel=1e-14)
    assert (inputs.correlation[4] == [0, 0, 0, 0, 1]).all()


def test_correlation_of_lognormals_is_that_of_their_logarithms():
    # 16384 members; normal scores of a scrambled Sobol' sample: the deviation over replicates gives the error, |t| of 15 below 6 (5e-5).
    shapes = (Lognormal(median=1, gsd=2), Lognormal(median=5, gsd=1.1))
    inputs = inputs_of(Dependence(("a", "b"), normal_correlation=0.7), names=("a", "b"), shapes=shapes)
    logs = np.log(drawn(inputs)).reshape(16, -1, 2)
    each = np.array([np.corrcoef(one.T)[0, 1] for one in logs])
    assert abs(each.mean() - 0.7) < 6 * each.std(ddof=1) / 4 + 1e-4


def test_every_margin_stays_as_it_was():
    # Kolmogorov and Smirnov's distance of 16384 members; below 1.95 / sqrt(n) with probability 0.999 for independent ones, and these are
    # more even than that.
    inputs = inputs_of(Dependence(NAMES, rank_correlation=[0.5, 0.4, 0.3, 0.2, -0.2, 0.6, 0.1, 0.1, 0.2, -0.3]))
    x = drawn(inputs)
    for item, column in zip(inputs.items, x.T, strict=True):
        shares = np.array([item.distribution.share_below(float(each)) for each in np.sort(column)[::16]])
        assert np.abs(shares - np.arange(0, len(column), 16) / len(column)).max() < 1.95 / math.sqrt(len(column))
    assert np.isfinite(x).all()


def test_independent_inputs_keep_their_bits_and_so_do_those_that_lead():
    u = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    alone = inputs_of().values(u)
    some = inputs_of(Dependence(("d", "b"), 0.6)).values(u)
    assert (some[:, [0, 1, 2, 4]] == alone[:, [0, 1, 2, 4]]).all()
    assert not (some[:, 3] == alone[:, 3]).any()
    # A correlation of 0 is independence, to the last bit.
    assert (inputs_of(Dependence(("a", "b", "e"), [0, 0, 0])).values(u) == alone).all()
    # An input added behind, dependent as well, changes none before it.
    more = inputs_of(Dependence(("d", "b"), 0.6), Dependence(("e", "d"), -0.5)).values(u)
    assert (more[:, :4] == some[:, :4]).all()
    assert (inputs_of(Dependence(("b", "d"), 0.6)).medians() == inputs_of().medians()).all()


def test_the_order_of_entries_and_names_does_not_matter():
    u = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    one = inputs_of(Dependence(("a", "b", "c"), [0.3, 0.1, 0.5]))
    other = inputs_of(Dependence(("c", "b"), 0.5), Dependence(("b", "a"), 0.3), Dependence(("a", "c"), 0.1))
    assert (one.values(u) == other.values(u)).all()


def test_draws_at_the_outermost_points_are_finite():
    inputs = inputs_of(Dependence(("a", "b", "c", "d"), normal_correlation=[0.9, 0.9, 0.9, 0.9, 0.9, 0.9]))
    ends = np.array([[2.0**-53] * 5, [1 - 2.0**-53] * 5])
    x = inputs.values(ends)
    assert np.isfinite(x).all()
    assert (x[0, :3] < x[1, :3]).all()
    assert np.isfinite(inputs.conditional(ends, ends[::-1], (1, 3))).all()


def test_keeping_all_or_none_gives_the_rows_of_a_or_b_to_the_last_bit():
    inputs = inputs_of(Dependence(("a", "b", "d"), [0.3, 0.1, 0.5]), Dependence(("c", "e"), 0.4))
    base = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    a, b = base[:64], base[64:]
    assert (inputs.conditional(a, b, (0, 1, 2, 3, 4)) == inputs.values(a)).all()
    assert (inputs.conditional(a, b, ()) == inputs.values(b)).all()
    some = inputs.conditional(a, b, (1, 2))
    assert (some[:, [1, 2]] == inputs.values(a)[:, [1, 2]]).all()
    # Independent inputs: A with columns from B.
    free = inputs_of()
    expected = free.values(a)
    expected[:, [0, 3]] = free.values(b)[:, [0, 3]]
    assert (free.conditional(a, b, (1, 2, 4)) == expected).all()


def test_a_row_depends_on_nothing_but_its_own_points():
    inputs = inputs_of(Dependence(("a", "b", "d", "e"), [0.3, 0.1, 0.5, 0.2, 0.2, 0.1]))
    sets = ((0,), (1, 3), (0, 2, 4), (3,), (1, 3, 4))
    u = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    whole = inputs.mixed(u, inputs.values(u), sets)
    for row in (0, 13, 63):
        two = u[[row, 64 + row]]
        assert (inputs.mixed(two, inputs.values(two), sets)[:, 0] == whole[:, row]).all()
        assert (inputs.mixed(two, inputs.values(two), sets[2:4])[:, 0] == whole[2:4, row]).all()


@pytest.mark.parametrize("kept", [(0,), (1,), (2,), (0, 1), (0, 2), (1, 2)])
def test_what_is_redrawn_has_the_conditional_distribution(kept):
    # Standard normal a, b, c with correlations 0.6, -0.3, 0.4. Redrawn scores z' given the kept ones: (kept, z') has the correlations of
    # (kept, z), and cov(z', z) = cov(E[z | kept]) = R_rk R_kk^-1 R_kr. Means over 16 replicates of 1024 rows; |t| of 15 below 6: 2.4e-5 for
    # each of 54 numbers.
    matrix = np.array([[1, 0.6, -0.3], [0.6, 1, 0.4], [-0.3, 0.4, 1]])
    inputs = inputs_of(
        Dependence(("a", "b", "c"), normal_correlation=[0.6, -0.3, 0.4]), names=("a", "b", "c"), shapes=[Normal(mean=0, sd=1)] * 3
    )
    design = Design(inputs.names, 20261201, 1024)
    within, between = [], []
    for replicate in range(16):
        base = design.base(Block(replicate, 0, 1024))
        old, new = inputs.values(base[:1024]), inputs.conditional(base[:1024], base[1024:], kept)
        within.append(new.T @ new / 1024)
        between.append(new.T @ old / 1024)
    known = matrix[:, kept] @ np.linalg.inv(matrix[np.ix_(kept, kept)]) @ matrix[kept, :]
    for found, exact in ((np.array(within), matrix), (np.array(between), known)):
        error = found.std(axis=0, ddof=1) / 4
        assert (np.abs(found.mean(axis=0) - exact) < 6 * error + 1e-12).all()
        assert error.max() < 0.02


def test_shapley_effects_of_a_linear_model_add_up():
    # Y = a + 2 b + 3 c of normal inputs, var E[Y | X_s] = w' C_.s C_ss^-1 C_s. w (Owen, Prieur 2017, doi:10.1137/16M1097717): each by
    # cov(y_A, y with the rest redrawn) over 16 replicates, |t| of 15 below 6.
    matrix = np.array([[1, 0.6, 0], [0.6, 1, 0.5], [0, 0.5, 1]])
    weights = np.array([1.0, 2.0, 3.0])
    inputs = inputs_of(
        Dependence(("a", "b", "c"), normal_correlation=[0.6, 0, 0.5]), names=("a", "b", "c"), shapes=[Normal(mean=0, sd=1)] * 3
    )
    design = Design(inputs.names, 3, 1024)
    for kept in [each for size in (1, 2) for each in combinations(range(3), size)]:
        exact = weights @ matrix[:, kept] @ np.linalg.inv(matrix[np.ix_(kept, kept)]) @ matrix[kept, :] @ weights
        found = []
        for replicate in range(16):
            base = design.base(Block(replicate, 0, 1024))
            old, new = inputs.values(base[:1024]) @ weights, inputs.conditional(base[:1024], base[1024:], kept) @ weights
            found.append(np.mean(old * new))
        assert abs(np.mean(found) - exact) < 6 * np.std(found, ddof=1) / 4


JOINT = np.array([[5.0, 1.0], [2.0, 7.0], [9.0, 3.0], [2.0, 4.0]])


def test_a_joint_sample_is_drawn_by_whole_rows():
    sample = JointSample("p.csv", {"d": "y", "b": "x"}, JOINT[:, ::-1])
    inputs = inputs_of(sample)
    u = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    x = inputs.values(u)
    rows = {tuple(row) for row in JOINT.tolist()}
    assert {tuple(row) for row in x[:, [1, 3]].tolist()} == rows
    # Each of the four rows as often as the others: Sobol' points fill every quarter.
    assert all(((x[:64, [1, 3]] == row).all(axis=1)).sum() == 16 for row in JOINT)
    # The first input has the draws of its column as `data`; the others stay as they were.
    assert (x[:, 1] == Data("p.csv", "x", JOINT[:, 0]).quantile(u[:, 1])).all()
    assert (x[:, [0, 2, 4]] == inputs_of().values(u)[:, [0, 2, 4]]).all()
    assert isinstance(inputs.items[3].distribution, Data)
    assert inputs.items[3].mean() == JOINT[:, 1].mean()
    assert inputs.correlation[1, 3] == pytest.approx(scipy.stats.spearmanr(JOINT).statistic, abs=1e-15)
    assert inputs.units == (Unit("a", (0,)), Unit("b+d", (1, 3)), Unit("c", (2,)), Unit("e", (4,)))


def test_the_order_of_rows_in_the_file_does_not_matter():
    u = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    one, other = (inputs_of(JointSample("p.csv", {"b": "x", "d": "y"}, JOINT[order])).values(u) for order in ([0, 1, 2, 3], [3, 2, 0, 1]))
    assert (one == other).all()


def test_a_joint_sample_is_kept_or_redrawn_as_a_whole():
    inputs = inputs_of(JointSample("p.csv", {"b": "x", "d": "y"}, JOINT), Dependence(("a", "c"), 0.5))
    base = Design(NAMES, 5, 64).base(Block(1, 0, 64))
    a, b = base[:64], base[64:]
    kept = inputs.conditional(a, b, (1, 3))
    assert (kept[:, [1, 3]] == inputs.values(a)[:, [1, 3]]).all()
    assert (kept[:, [0, 2, 4]] == inputs.values(b)[:, [0, 2, 4]]).all()
    assert (inputs.conditional(a, b, (0, 2, 4))[:, [1, 3]] == inputs.values(b)[:, [1, 3]]).all()
    with pytest.raises(ValueError, match="as a whole"):
        inputs.conditional(a, b, (1,))


def test_joint_samples_that_cannot_be_drawn_from():
    sample, _ = read_dependence({"file": "p.csv", "columns": {"a": "x", "b": "y"}})
    for values, text in (
        (np.empty((0, 2)), "no rows"),
        (np.array([[1, math.nan], [2, 3], [math.inf, 1]]), "2 of 3 rows with a value that is not finite"),
        (np.array([[1.0, 2.0], [3.0, 2.0]]), "one value only for `b`, 2"),
    ):
        with pytest.raises(ValueMistake, match=text):
            sample.with_values(values)


def test_values_with_probabilities_of_their_own_may_be_correlated():
    # Ties shorten the rank correlation; the larger values of one still go with the larger ones of the other.
    shapes = (Discrete([1, 2, 3], [1, 1, 1]), Percentiles(p05=1, p50=2, p95=5), Uniform(0, 1), Uniform(0, 1), Uniform(0, 1))
    inputs = inputs_of(Dependence(("a", "b"), 0.8), shapes=shapes)
    x = drawn(inputs)
    assert set(x[:, 0]) == {1.0, 2.0, 3.0}
    assert np.abs(np.bincount(x[:, 0].astype(int))[1:] - len(x) / 3).max() < 10
    assert 0.6 < inputs.correlation_achieved(x)[0, 1] < 0.8


def test_groups_are_told_in_their_order():
    items = [Input(name, name, "1", Uniform(0, 1), group=group) for name, group in zip("abcd", ("", "heat", "flow", "heat"), strict=True)]
    assert Inputs(tuple(items)).groups == {"heat": (1, 3), "flow": (2,)}
    assert not Inputs(tuple(items)).dependent
