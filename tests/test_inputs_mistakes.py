"""Mistakes in distributions: every one is found, with the argument it is about."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.errors import ValueMistake
from uq.inputs.distributions import DISTRIBUTIONS, NOT_YET, Data, Lognormal, Mistakes, Normal, Uniform, read_distribution

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
    ("weibull", {}, [("", "not available yet")]),
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


@pytest.mark.parametrize("key", NOT_YET)
def test_what_is_not_built_yet_says_so(key):
    _, (mistake,) = read_distribution(key, {"low": 1, "high": 2})
    assert mistake.remedy == "not available yet"


def test_every_key_of_the_format_is_known():
    # study-format.md, section 5
    others = "loguniform weibull exponential student arcsine trapezoid percentiles discrete"
    built = "normal lognormal uniform triangular pert beta gamma data"
    assert [kind.key for kind in DISTRIBUTIONS] == built.split()
    assert list(NOT_YET) == others.split()


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
        x = distribution.quantile(np.array([2.0**-53, 0.5, 1 - 2.0**-53]))
        assert np.isfinite(x).all()
        assert np.isfinite(distribution.moments()).all()
