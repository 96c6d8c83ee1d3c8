"""Probabilities in words: never a bare 0 or 1, never on the unsafe side."""

from __future__ import annotations

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from uq.report.answers import Estimate
from uq.report.chances import chance, down, two_digits, up


@pytest.mark.parametrize(
    ("estimate", "value", "interval"),
    [
        (Estimate(0.0148, 0.0138, 0.0158), "0.0148", "0.0138 to 0.0158"),
        (Estimate(0.0, 0.0, 0.0001125), "0 of 32768 members", "at most 0.00012, 1 in 8800"),
        (Estimate(0.0, 0.0, 0.3), "0 of 32768 members", "at most 0.30"),
        (Estimate(0.0, 0.0, 1.0), "0 of 32768 members", ""),
        (Estimate(1.0, 0.9998875, 1.0), "all 32768 members", "at least 0.99988"),
        (Estimate(1.0, 0.7, 1.0), "all 32768 members", "at least 0.70"),
        (Estimate(3e-5, 6.3e-6, 8.9e-5), "3.0e-5", "0.6e-5 to 8.9e-5"),
        (Estimate(0.9999, 0.9997, 0.99999), "0.99990", "0.99970 to 0.99999"),
        (Estimate(0.5, -0.1, 1.2), "0.50", "0.00 to 1.00"),
        (Estimate(0.5), "0.5", ""),
        (Estimate(), "missing", ""),
    ],
)
def test_probabilities(estimate: Estimate, value: str, interval: str) -> None:
    said = chance(estimate, 32768)
    assert (said.value, said.interval) == (value, interval)


@given(st.floats(1e-9, 0.0999))
def test_a_bound_above_is_never_below_the_end(high: float) -> None:
    share, _, count = chance(Estimate(0.0, 0.0, high), 1000).interval.removeprefix("at most ").partition(", 1 in ")
    assert high * (1 - 1e-12) <= float(share) <= 1.12 * high
    assert 1 / int(count) >= high * (1 - 1e-12)


@given(st.floats(1e-9, 1.0))
def test_a_bound_below_is_never_above_the_end(gap: float) -> None:
    said = chance(Estimate(1.0, 1 - gap, 1.0), 1000).interval.removeprefix("at least ")
    if said:
        assert float(said) <= 1 - gap + 1e-15
        assert 1 - float(said) <= 1.12 * gap + 1e-12


@given(st.floats(1.0, 1e12))
def test_counts_to_two_digits(number: float) -> None:
    assert int(down(number)) <= number <= int(up(number))
    assert int(up(number)) - int(down(number)) <= 0.1 * number + 1
    assert math.isclose(int(two_digits(number)), number, rel_tol=0.05, abs_tol=0.5)
