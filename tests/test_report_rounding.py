"""Rounding after JCGM 100:2008, 7.2.6: two digits of the half-width, the estimate to the same place, ends outwards."""

from __future__ import annotations

import math
from decimal import Decimal

import pytest
from hypothesis import assume, given
from hypothesis import strategies as st

from uq.report.rounding import Rounded, alone, place_of, power_of, rounded

INF, NAN = math.inf, math.nan


@pytest.mark.parametrize(
    ("value", "low", "high", "expected"),
    [
        # The example of JCGM 100 7.2.6: 10.057 62 ohm with u = 27 mohm is given as 10.058 ohm.
        (10.05762, 10.03062, 10.08462, ("10.058", "10.030", "10.085")),
        (0.0148, 0.0139, 0.0158, ("0.01480", "0.01390", "0.01580")),
        (0.0, -0.001, 0.001, ("0.0000", "-0.0010", "0.0010")),
        (0.0, 0.0, 0.0, ("0", "0", "0")),
        (1e-12, 0.9e-12, 1.1e-12, ("1.00e-12", "0.90e-12", "1.10e-12")),
        # A half-width of 9.96 is 10 to two digits, so its last digit is the unit.
        (100.0, 90.04, 109.96, ("100", "90", "110")),
        (50.0, 50.0 - 9.94, 50.0 + 9.94, ("50.0", "40.0", "60.0")),
        # Equal ends claim no precision: a few digits of the number itself.
        (303.15, 303.15, 303.15, ("303.15", "303.15", "303.15")),
        # Huge offset, small interval: digits beyond those of a double are not invented.
        (1e9 + 0.125, 1e9 + 0.1, 1e9 + 0.15, ("1.000000000125e+9", "1.000000000100e+9", "1.000000000150e+9")),
        (1e12 + 0.5, 1e12 + 0.5 - 1e-4, 1e12 + 0.5 + 1e-4, ("1.0000000000005e+12", "1.0000000000005e+12", "1.0000000000005e+12")),
        (5_999.5, 5_000.0, 7_000.0, ("6000", "5000", "7000")),
        (250000.0, 1.0, 500000.0, ("250000", "0", "500000")),
        (NAN, 1.0, 2.0, ("missing", "1", "2")),
        (NAN, NAN, NAN, ("missing", "", "")),
        (3.0, 1.0, INF, ("3.0", "1.0", "")),
        (3.0, -INF, 4.0, ("3.0", "", "4.0")),
        (INF, 5.0, INF, ("inf", "5", "")),
        (3.25, NAN, NAN, ("3.25", "", "")),
        (-0.0, -0.0, 0.0, ("0", "0", "0")),
        (1e300, 0.0, 2e300, ("1.0e+300", "0", "2.0e+300")),
        (5e-324, 0.0, 1e-323, ("0.49e-323", "0", "0.99e-323")),
        (0.0, -1.7e308, 1.7e308, ("0", "-1.7e+308", "1.7e+308")),
        # Floats that are a hair above their decimal are not pushed to the next digit.
        (0.2, 0.1, 0.1 + 0.2, ("0.20", "0.10", "0.30")),
    ],
)
def test_estimate_and_ends(value: float, low: float, high: float, expected: tuple[str, str, str]) -> None:
    assert rounded(value, low, high) == Rounded(*expected)


NUMBERS = st.floats(-1e12, 1e12)


@given(NUMBERS, st.floats(1e-9, 1e12))
def test_the_rounded_interval_holds_the_interval_and_is_hardly_wider(value: float, half: float) -> None:
    low, high = value - half, value + half
    # Within the 14 digits that are carried.
    assume(high - low > 1e-9 * abs(value))
    texts = rounded(value, low, high)
    slack = Decimal(1e-12 * (abs(value) + half))
    assert Decimal(texts.low) <= Decimal(low) + slack
    assert Decimal(texts.high) >= Decimal(high) - slack
    assert Decimal(texts.high) - Decimal(texts.low) <= Decimal(high - low) * Decimal("1.11") + slack
    assert abs(Decimal(texts.value) - Decimal(value)) <= Decimal(half) * Decimal("0.0501") + slack


@given(NUMBERS, st.floats(1e-9, 1e12))
def test_all_three_end_at_one_place(value: float, half: float) -> None:
    assume(half > 1e-9 * abs(value))
    texts = rounded(value, value - half, value + half)
    mantissas = [text.partition("e")[0] for text in (texts.value, texts.low, texts.high) if text != "0"]
    assert len({len(text.partition(".")[2]) for text in mantissas}) <= 1


def test_the_interval_in_words() -> None:
    assert Rounded("1", "0", "2").interval == "0 to 2"
    assert Rounded("1", "0", "").interval == "at least 0"
    assert Rounded("1", "", "2").interval == "at most 2"
    assert Rounded("1").interval == ""
    assert rounded(1.23456, -INF, INF) == Rounded("1.23", unbounded=True)
    assert rounded(1.23456, -INF, INF).interval == "unbounded"


@pytest.mark.parametrize(
    ("value", "text"),
    [
        (0, "0"),
        (-0.0, "0"),
        (303.15, "303.15"),
        (1 / 3, "0.333333"),
        (1e-12, "1e-12"),
        (8.314462618e-3, "0.00831446"),
        (6e12, "6e+12"),
        (123456789, "1.23457e+8"),
        (999999.7, "1000000"),
        (120, "120"),
        (-2.50, "-2.5"),
        (INF, "inf"),
        (-INF, "-inf"),
        (NAN, "missing"),
    ],
)
def test_a_number_alone(value: float, text: str) -> None:
    assert alone(value) == text


@given(st.floats(allow_nan=False, allow_infinity=False))
def test_a_number_alone_is_right_to_its_digits(value: float) -> None:
    assert float(alone(value)) == pytest.approx(value, rel=6e-6, abs=0)


def test_places_and_powers() -> None:
    assert [place_of(half, 0) for half in (0.027, 9.94, 9.96, 1.0, 0.1)] == [-3, -1, 0, -1, -2]
    assert place_of(0.027, 0, digits=3) == -4
    assert [power_of(value) for value in (0, 1, 9.99, 1e-12, -1000, 5e-324)] == [0, 0, 0, -12, 3, -324]
