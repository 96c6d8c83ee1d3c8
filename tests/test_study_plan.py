"""What is asked for: a precision, what may be spent on it, what does not matter."""

from __future__ import annotations

import math

import pytest

from tests.small_studies import HEAD, mistakes, read
from uq.study.plan import MEMBERS, MOST_MEMBERS, AtMost, Precision

LIMIT = "[limits.hot]\nwhen = \"T > '325 K'\"\n"


def test_a_precision_may_use_the_members_stated() -> None:
    plan = read("[plan]\nmembers = 4096\n[plan.precision]\nquantiles = 0.02\nindices = 0.05\n").plan
    assert plan.precision == Precision(quantiles=0.02, indices=0.05)
    assert (plan.members, plan.at_most) == (4096, None)


def test_a_precision_may_use_what_is_said_in_at_most() -> None:
    plan = read(LIMIT + "[plan.precision]\nprobabilities = 0.005\n[plan.at_most]\nsolves = 5_000_000\nminutes = 20\n").plan
    assert plan.at_most == AtMost(solves=5_000_000, minutes=20.0)
    assert plan.members == MOST_MEMBERS


def test_both_bounds_together_and_inline() -> None:
    plan = read("[plan]\nmembers = 1024\nprecision = { indices = 0.1 }\nat_most = { minutes = 0.5 }\n").plan
    assert (plan.members, plan.at_most, plan.precision) == (1024, AtMost(minutes=0.5), Precision(indices=0.1))


@pytest.mark.parametrize(
    ("more", "said"),
    [
        ("[plan.precision]\nquantiles = 0.02\n", "a precision without a bound on the work"),
        ("[plan.at_most]\nminutes = 3\n", "[plan.at_most] without a precision"),
        ("[plan]\nmembers = 512\n[plan.precision]\nprobabilities = 0.02\n", "a precision of probabilities that are not asked for"),
        ("[plan]\nmembers = 512\n[plan.precision]\nquantiles = 0\n", "a fraction above 0, at most 1"),
        ("[plan]\nmembers = 512\n[plan.precision]\n", "a precision of nothing"),
        ("[plan]\nmembers = 512\nprecision = 0.01\n", "a table"),
        ("[plan]\nmembers = 0\n", "1 or more"),
    ],
)
def test_precisions_that_cannot_stand(more: str, said: str) -> None:
    (mistake,) = mistakes(more)
    assert said in mistake


def test_a_change_may_ask_for_a_precision() -> None:
    study = read(LIMIT + "[plan]\nmembers = 8192\n").with_changes({"plan.precision.probabilities": 0.001})
    assert study.plan.precision == Precision(probabilities=0.001)
    more = study.with_changes({"plan.at_most.minutes": 3, "plan.members": 65536})
    assert (more.plan.members, more.plan.at_most) == (65536, AtMost(minutes=3.0))
    assert read().plan.members == MEMBERS


def test_what_does_not_matter_in_a_state() -> None:
    second = '[states.y]\nunit = "kg"\nstart = 1\nrate = 0\n'
    assert all(math.isnan(value) for value in read(second).negligible)
    text = HEAD.replace("rate =", 'negligible = "0.5 delta_degF"\nrate =')
    assert read(second, text).negligible[0] == pytest.approx(0.5 / 1.8)
    assert read(second, text).states[0].negligible == pytest.approx(0.5 / 1.8)
    degrees = HEAD.replace("rate =", 'negligible = "1 mK"\nrate =').replace('unit = "K"', 'unit = "degC"')
    assert read(text=degrees).negligible.tolist() == [1e-3]
    assert any("a number above 0" in text for text in mistakes(text=HEAD.replace("rate =", "negligible = 0\nrate =")))
