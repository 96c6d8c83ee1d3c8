"""Mistakes in distributions: every one is found, with the argument it is about."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.errors import ValueMistake
from uq.inputs.distributions import DISTRIBUTIONS, Data, Discrete, Lognormal, Mistakes, Normal, Truncated, Uniform, cut, read_distribution

WRONG = [
    # key, arguments, and of every mistake: the argument it is about, and a piece of its text
    ("normal", {"mean": 1, "sd": 0}, [("sd", "found 0, expected a number above 0")]),
    ("normal", {"mean": 1, "sd": -0.2}, [("sd", "found -0.2, expected a number above 0")]),
    ("normal", {"mean": True, "sd": "1.2"}, [("mean", "the truth value true"), ("sd", 'the text "1.2", expected a finite number (write')]),
    ("normal", {"mean": math.nan, "sd": math.inf}, [("mean", "found nan"), ("sd", "found inf")]),
    ("normal", {"mean": 10**400, "sd": [1]}, [("mean", "expected a finite number"), ("sd", "found a list")]),
    ("normal", {"mean": 0, "cv": 0.1}, [("mean", "give `sd` instead")]),
    ("normal", {"mean": 1}, [("", "found only `mean`, expected `mean`, `sd`; or `mean`, `cv`; or")]),
    ("normal", {"value": 1, "expanded": 2}, [("", "add `coverage`")]),
    ("normal", {"mean": 1, "sd": 2, "cv": 0.1}, [("", "`mean`, `sd`, `cv` together")]),
    ("normal", {"value": 1, "sd": 2}, [("", "`sd`, `value` together")]),
    ("normal", {"mean": 1, "sdd": 2}, [("sdd", "did you mean `sd`?")]),
    ("normal", {"mean": 1, "zzz": 2}, [("zzz", "unknown key"), ("", "add `sd`; or `cv`")]),
    ("normal", {"mean": 1, "sd": 1.7e308}, [("sd", "leaves every draw finite")]),
    ("normal", {"value": 1, "expanded": 0, "coverage": -2}, [("expanded", "above 0"), ("coverage", "found -2")]),
    ("lognormal", {"median": -1, "gsd": 1}, [("median", "above 0"), ("gsd", "a factor above 1")]),
    ("lognormal", {"median": 1, "gsd": 1e100}, [("gsd", "finite number above 0")]),
    ("lognormal", {"mean": 1, "cv": 1e300}, [("cv", "finite number above 0")]),
    ("lognormal", {"mean": 1, "sd": 1e-300}, [("sd", "finite number above 0")]),
    ("lognormal", {"median": 1, "sd": 1}, [("", "`median`, `sd` together")]),
    ("lognormal", {}, [("", "found no arguments")]),
    ("uniform", {"low": 3, "high": 1}, [("high", "above `low` (3) (low and high may be swapped)")]),
    ("uniform", {"low": 1, "high": 1}, [("high", "above `low` (1)")]),
    ("uniform", {"low": -1.7e308, "high": 1.7e308}, [("high", "a finite distance")]),
    ("triangular", {"low": 1, "mode": 9, "high": 3}, [("mode", "from `low` to `high` (1 to 3)")]),
    ("triangular", {"low": 1, "high": 3}, [("", "add `mode`")]),
    ("pert", {"low": 1, "mode": 0, "high": 3, "weight": 4}, [("weight", "unknown key"), ("mode", "found 0")]),
    ("beta", {"a": 0, "b": -1, "low": 2}, [("a", "found 0"), ("b", "found -1"), ("low", "below `high` (1)")]),
    ("gamma", {"shape": 1, "sd": 1}, [("", "`shape`, `sd` together")]),
    ("gamma", {"shape": 1e300, "scale": 1e300}, [("shape", "finite number")]),
    ("gamma", {"mean": 1e-200, "sd": 1e200}, [("sd", "finite number")]),
    ("data", {"file": 3}, [("", "add `column`"), ("file", "found 3")]),
    ("data", {"file": "a.csv", "column": "  "}, [("column", "the name of a column")]),
    ("data", {"file": "a.csv", "column": "x", "values": [1, 2]}, [("values", "the unknown key `values`")]),
    ("weibull", {}, [("", "found no arguments")]),
    ("weibull", {"shape": 0.001, "scale": -1}, [("scale", "above 0")]),
    ("weibull", {"shape": 0.001, "scale": 1}, [("shape", "from 0.02 to")]),
    ("weibull", {"shape": 0.02, "scale": 1e300}, [("scale", "finite number")]),
    ("loguniform", {"low": 0, "high": 2}, [("low", "above 0")]),
    ("loguniform", {"low": 3, "high": 2}, [("high", "may be swapped")]),
    ("exponential", {"mean": 0}, [("mean", "above 0")]),
    ("exponential", {"mean": 1e308}, [("mean", "finite number")]),
    ("student", {"mean": 1, "scale": 0, "dof": 0}, [("scale", "above 0"), ("dof", "above 0")]),
    ("student", {"mean": 1, "scale": 1, "dof": 0.05}, [("dof", "from 0.1 on")]),
    ("student", {"mean": 1, "scale": 1e200, "dof": 0.1}, [("scale", "finite")]),
    ("arcsine", {"low": 1, "high": 1}, [("high", "above `low` (1)")]),
    ("trapezoid", {"low": 0, "low_shoulder": 3, "high_shoulder": 2, "high": 5}, [("high_shoulder", "from `low_shoulder` to `high`")]),
    ("trapezoid", {"low": 0, "low_shoulder": 6, "high_shoulder": 2, "high": 5}, [("low_shoulder", "from `low` to `high`")]),
    ("percentiles", {"p50": 2}, [("", "found only `p50`, expected two or more")]),
    ("percentiles", {}, [("", "no percentile")]),
    ("percentiles", {"p5": 2, "p50": 1, "p95": 3}, [("p5", "did you mean `p05`?")]),
    ("percentiles", {"p05": 3, "p50": 2, "p95": 4}, [("p50", "above `p05` (3)")]),
    ("percentiles", {"p05": 1, "p95": 4, "low": 2, "high": 3}, [("p05", "above `low` (2)"), ("high", "above `p95` (4)")]),
    ("percentiles", {"p05": 1, "p95": 4, "shape": "lognormall"}, [("shape", 'did you mean "lognormal"?')]),
    ("percentiles", {"p05": 1, "p95": 4, "shape": 3}, [("shape", '"normal" or "lognormal"')]),
    ("percentiles", {"p05": -1, "p95": 4, "shape": "lognormal"}, [("p05", "above 0 for a lognormal (give `low`")]),
    ("percentiles", {"p49": 1e-30, "p50": 4, "shape": "lognormal"}, [("p50", "finite")]),
    ("percentiles", {"p05": "1", "p95": 4}, [("p05", "without quotes")]),
    ("discrete", {"values": [1, 2]}, [("", "add `weights`")]),
    ("discrete", {"values": [1, 2], "weights": [1]}, [("weights", "1 weights for 2 values")]),
    ("discrete", {"values": [1, "x"], "weights": [1, -1]}, [("values", "as number 2"), ("weights", "the weight -1")]),
    ("discrete", {"values": 3, "weights": []}, [("values", "a list of numbers")]),
    ("discrete", {"values": [1, 2], "weights": [1, 0]}, [("values", "one value with a weight above 0")]),
    ("discrete", {"values": [], "weights": []}, [("values", "no value")]),
    ("weibul", {}, [("", "did you mean `weibull`?")]),
    ("normal", 3, [("", "a table of arguments")]),
]  # fmt: skip


@pytest.mark.parametrize(("key", "table", "expected"), WRONG)
def test_every_mistake_is_told_once(key, table, expected):
    distribution, mistakes = read_distribution(key, table)
    assert distribution is None
    assert [m.key for m in mistakes] == [name for name, _ in expected]
    for mistake, (_, text) in zip(mistakes, expected, strict=True):
        assert text in str(mistake)


def test_a_class_refuses_what_the_table_would_be_refused_for():
    with pytest.raises(Mistakes, match=r"mean: found the truth value true.*; sd: found -1"):
        Normal(mean=True, sd=-1)
    with pytest.raises(ValueMistake, match="a number above `low`") as caught:
        Uniform(3, 1)
    assert caught.value.key == "high"
    with pytest.raises(ValueMistake, match="together"):
        Lognormal(median=1, gsd=2, mean=1)


def test_every_key_of_the_format_is_known():
    # The study format, section 5.
    keys = (
        "normal lognormal uniform loguniform triangular pert beta gamma weibull exponential student arcsine trapezoid percentiles discrete"
    )
    assert [kind.key for kind in DISTRIBUTIONS] == [*keys.split(), "data"]


def test_arguments_say_what_they_are():
    for kind in DISTRIBUTIONS:
        assert set(kind.points) | set(kind.differences) | set(kind.multiplying) <= set(kind.known())
        assert not set(kind.points) & set(kind.differences)
        assert kind.usage().startswith("`")


@pytest.mark.parametrize(
    ("values", "text"),
    [([], "no values"), ([1.0], "one value"), ([2.0, 2.0, 2.0], "3 equal values"), ([1.0, math.nan, math.inf], "2 of 3 values not finite")],
)
def test_data_needs_values_that_differ(values, text):
    data, mistakes = read_distribution("data", {"file": "a.csv", "column": "x"})
    assert not mistakes
    with pytest.raises(ValueMistake, match=text) as caught:
        data.with_values(np.array(values))
    assert caught.value.key == "column"


def test_data_with_values_is_ready():
    data, _ = read_distribution("data", {"file": "a.csv", "column": "x"})
    assert isinstance(data, Data)
    assert data.with_values(np.array([2.0, 1.0])).quantile(np.array([0.4])).tolist() == [1.0]


anything = st.one_of(st.floats(), st.integers(), st.booleans(), st.text(max_size=3), st.none(), st.lists(st.integers(), max_size=2))
argument_names = st.sampled_from(sorted({name for kind in DISTRIBUTIONS for form in (*kind.forms, kind.optional) for name in form}))


@given(st.sampled_from([kind.key for kind in DISTRIBUTIONS]), st.dictionaries(argument_names, anything, max_size=4))
def test_any_table_gives_a_distribution_or_mistakes_and_never_fails(key, table):
    distribution, mistakes = read_distribution(key, table)
    assert (distribution is None) == bool(mistakes)
    for mistake in mistakes:
        assert mistake.found
        assert mistake.expected
    if distribution is not None and key != "data":
        assert distribution.words().startswith(key)
        x = distribution.quantile(np.array([2.0**-53, 0.5, 1 - 2.0**-53]))
        assert np.isfinite(x).all()
        assert np.isfinite(distribution.moments()).all() or (key == "student" and distribution.dof <= 2)


CUTS = [
    ("normal", {"mean": 0, "sd": 1}, 3, "found 3, expected two numbers"),
    ("normal", {"mean": 0, "sd": 1}, [1], "a list"),
    ("normal", {"mean": 0, "sd": 1}, [1, "2"], 'the text "2"'),
    ("normal", {"mean": 0, "sd": 1}, [0, math.inf], "where one side is open, write a number beyond every draw"),
    (
        "normal",
        {"mean": 0, "sd": 1},
        [2, 1],
        "[2, 1], expected two numbers, [low, high], the first below the second (the two may be swapped)",
    ),
    ("normal", {"mean": 0, "sd": 1}, [6, 9], "keeps 9.9e-10 of the draws"),
    ("uniform", {"low": 0, "high": 1}, [2, 3], "keeps 0 of the draws"),
    ("discrete", {"values": [1, 2], "weights": [1, 1]}, [1, 1.5], "one value only from 1 to 1.5"),
]


@pytest.mark.parametrize(("key", "table", "truncate", "text"), CUTS)
def test_cuts_that_cannot_be(key, table, truncate, text):
    distribution, (mistake,) = read_distribution(key, table, truncate)
    assert distribution is None
    assert mistake.key == "truncate"
    assert text in str(mistake)


def test_mistakes_in_arguments_and_in_the_cut_are_told_together():
    _, mistakes = read_distribution("normal", {"mean": 0, "sd": -1}, [2, 1])
    assert [mistake.key for mistake in mistakes] == ["sd", "truncate"]
    # Whether a cut keeps anything can only be said of a distribution that stands.
    _, mistakes = read_distribution("normal", {"mean": 0, "sd": -1}, [100, 200])
    assert [mistake.key for mistake in mistakes] == ["sd"]


def test_a_cut_of_data_is_judged_when_the_values_are_there():
    made, mistakes = read_distribution("data", {"file": "a.csv", "column": "x"}, [0, 2])
    assert not mistakes
    assert isinstance(made, Truncated)
    assert made.with_values(np.array([5.0, 1.0, 2.0])).quantile(np.array([0.5, 0.6])).tolist() == [1.0, 2.0]
    with pytest.raises(ValueMistake, match="no value from 0 to 2") as caught:
        made.with_values(np.array([5.0, 6.0]))
    assert caught.value.key == "truncate"


@given(st.floats(-4, 4), st.floats(-4, 4), st.sampled_from([Normal(mean=0, sd=1), Uniform(-2, 2), Discrete([-1, 0, 1], [1, 1, 1])]))
def test_any_cut_gives_draws_inside_or_a_mistake(low, high, distribution):
    made, mistakes = cut(distribution, [low, high])
    assert (made is None) == bool(mistakes)
    if made is not None:
        x = made.quantile(np.array([2.0**-53, 0.5, 1 - 2.0**-53]))
        assert ((low <= x) & (x <= high)).all()
        assert np.isfinite(made.moments()).all()
