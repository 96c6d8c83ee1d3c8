"""A mutated study is a `Study` or a `StudyError` with places, and never anything else.

Seven thousand of these, solved where they are studies: tests/long/test_fuzz_studies.py.
"""

from __future__ import annotations

import random as randoms

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.fuzz_studies import BROKEN, RICH, SEEDS, expression, judge, mutate, study_text, with_expressions


def test_the_seeds_are_studies() -> None:
    assert all(judge(text) is not None for text in SEEDS)


@given(st.sampled_from(SEEDS + BROKEN), st.randoms(use_true_random=False))
@settings(max_examples=150)
def test_a_mutated_study_is_a_study_or_mistakes_with_places(text: str, random: randoms.Random) -> None:
    judge(mutate(text, random))


@given(st.randoms(use_true_random=False))
@settings(max_examples=100)
def test_random_expressions_in_a_study_are_a_study_or_mistakes(random: randoms.Random) -> None:
    judge(with_expressions(RICH, random))


def test_a_case_is_the_same_for_the_same_seed() -> None:
    assert study_text(7) == study_text(7) != study_text(8)
    assert len({expression(randoms.Random(seed)) for seed in range(100)}) > 50


@given(st.text(max_size=200))
@settings(max_examples=50)
def test_any_text_is_a_study_or_mistakes_with_places(text: str) -> None:
    judge(text)


@pytest.mark.parametrize(
    "text",
    [
        "",
        "\n",
        "a = " + "[" * 20000,
        "a = " + "{ a = " * 5000,
        "schema = 1\n[terms]\nx = '" + "(" * 5000 + "'",
        "schema = 1\n[terms]\n" + "".join(f"a{i} = 'a{i + 1}'\n" for i in range(3000)),
        "schema = " + "9" * 10000,
        "schema = 1\n[time]\nstop = " + "9" * 400,
        "schema = 1\n[time]\nunit = 's'\nstop = '1e300 yr'\npoints = 3",
        "schema = 1\n[time]\nunit = 'yr'\nstart = -1e308\nstop = 1e308\npoints = 3",
        "[a.b]\nx = 1\n[a]\nb = 2\n",
        "states = 3\nparameters = []\nplan = 'no'\ntime = 1\nlimits = true",
        "[states]\nT = 3\n[parameters]\na = { normal = 3 }\n[limits]\nx = []\n[outcomes]\ny = 'highest(T)'",
    ],
)
def test_hostile_texts(text: str) -> None:
    judge(text)
