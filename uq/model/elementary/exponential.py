"""exp, and the reduction that everything with an exponential shares.

exp(x) = 2^n exp(r) with n the whole number nearest to x / ln 2 and |r| <= ln(2)/2 (W. J. Cody, W. Waite, Software Manual for the
Elementary Functions, 1980, chapter 6). The polynomial comes from tests/long/fit_elementary.py.
"""

from __future__ import annotations

from dataclasses import dataclass

from uq.model.elementary.body import Value, at_least, at_most, bits, estrin, fma, from_bits

LOG2_E = float.fromhex("0x1.71547652b82fep+0")
# ln 2 = LN2 + LN2_REST up to 2^-110. n * LN2 - x is exact in an fma: both are multiples of 2^-54, and the difference is below 1.
LN2 = float.fromhex("0x1.62e42fefa39efp-1")
LN2_REST = float.fromhex("0x1.abc9e3b39803fp-56")
# Adding this rounds to the nearest whole number and leaves it, plus twice the exponent bias, in the lowest bits.
ROUND = 1.5 * 2.0**52 + 2046.0
# Beyond these, exp is 0 and inf in double; the scaling below makes them so without a comparison.
LOWEST, HIGHEST = -746.0, 710.0
# exp(r) = 1 + r + r^2 q(r), |r| <= ln(2)/2, relative error 5e-18.
EXP = (
    0.5000000000000011,
    0.16666666666666463,
    0.04166666666652815,
    0.008333333333464091,
    0.0013888888943515882,
    0.00019841269553046663,
    2.4801493668737747e-05,
    2.755756223036767e-06,
    2.762994597033094e-07,
    2.500304595389141e-08,
)


@dataclass(frozen=True)
class Reduced:
    """x = n ln 2 + r + rest; `word` holds n for `scale`."""

    r: Value
    rest: Value
    n: Value
    word: Value


def reduce(x: Value) -> Reduced:
    """Take the nearest multiple of ln 2 off x, |x| < 2^20."""
    shifted = fma(x, LOG2_E, ROUND)
    n = shifted - ROUND
    high = fma(n, -LN2, x)
    r = fma(n, -LN2_REST, high)
    return Reduced(r, fma(n, -LN2_REST, high - r), n, bits(shifted))


def less_one(reduced: Reduced) -> Value:
    """exp(r + rest) - 1."""
    r = reduced.r
    return r + fma(r * r, estrin(r, EXP), reduced.rest)


def in_two(r: Value, rest: Value) -> tuple[Value, Value]:
    """exp(r + rest) as a sum of two doubles, relative error below 2^-61, for |rest| < 2^-40 (so that its product with r counts)."""
    w = r * r * estrin(r, EXP)
    high = r + 1.0
    return high, ((1.0 - high) + r) + (w + fma(rest, r + w, rest))


def scale(less: Value, word: Value) -> Value:
    """(1 + less) 2^n, rounded once more where the result is denormal.

    2^n is the product of two powers, so that n from -2044 to 2046 needs no special case.
    """
    half = word >> 1
    first, second = from_bits(half << 52), from_bits((word - half) << 52)
    return fma(less, first, first) * second


def exp(x: Value) -> Value:
    """e^x; 0 and inf at the ends, nan at nan."""
    reduced = reduce(at_least(at_most(x, HIGHEST), LOWEST))
    return scale(less_one(reduced), reduced.word)


def scale_two(high: Value, low: Value, word: Value) -> Value:
    """(high + low) 2^n, as `scale`."""
    half = word >> 1
    first, second = from_bits(half << 52), from_bits((word - half) << 52)
    return fma(low, first, high * first) * second
