"""ln and log10.

x = 2^k m with m in [sqrt(1/2), sqrt(2)), f = m - 1, s = f / (2 + f). Then ln m = 2 atanh(s) = f - (f^2/2 - s (f^2/2 + z q(z))), z = s^2:
this form keeps the error of the division out of the leading term (K. C. Ng, FreeBSD's mathematical library, e_log.c, 1993; cited from
memory). Polynomial: tests/long/fit_elementary.py.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

from uq.model.elementary.body import Value, bits, equal, estrin, fma, from_bits, where

SMALLEST_NORMAL = 2.0**-1022
ONE_WORD = 0x3FF0000000000000
ROOT_HALF_WORD = 0x3FE6A09E667F3BCD
FRACTION = 0x000FFFFFFFFFFFFF
WHOLE_WORD = 0x4330000000000000  # 2^52: or-ed to a small whole number it makes a double of it
# ln 2 and log10 2 in two parts; the first has 42 bits, so that its product with k is exact.
LN2_SHORT = float.fromhex("0x1.62e42fefa3800p-1")
LN2_LONG_REST = float.fromhex("0x1.ef35793c76730p-45")
LOG10_2_SHORT = float.fromhex("0x1.34413509f7800p-2")
LOG10_2_LONG_REST = float.fromhex("0x1.fef311f12b358p-46")
LOG10_E = float.fromhex("0x1.bcb7b1526e50ep-2")
LOG10_E_REST = float.fromhex("0x1.95355baaafad3p-57")
# 2 atanh(s) = 2 s + s z q(z), z = s^2, relative error 1.3e-18.
LN = (
    0.6666666666666734,
    0.39999999999416413,
    0.28571428742113203,
    0.22222198593570702,
    0.18183563568044742,
    0.15314063831475835,
    0.14795867492217452,
)


@dataclass(frozen=True)
class Parts:
    """x = 2^k m, with k as a double."""

    k: Value
    m: Value


def parts(x: Value) -> Parts:
    """Exponent and fraction of a positive finite number, denormal numbers too."""
    small = x < SMALLEST_NORMAL
    normal = where(small, x * 2.0**54, x)
    bias = where(small, 2.0**52 + 1023.0 + 54.0, 2.0**52 + 1023.0)
    word = bits(normal) + (ONE_WORD - ROOT_HALF_WORD)
    k = from_bits((word >> 52) | WHOLE_WORD) - bias
    return Parts(k, from_bits((word & FRACTION) + ROOT_HALF_WORD))


def fraction_logarithm(m: Value) -> tuple[Value, Value, Value]:
    """f, f^2/2 and the rest t of ln m = f - (f^2/2 - t)."""
    f = m - 1.0
    s = f / (f + 2.0)
    z = s * s
    half_square = f * f * 0.5
    return f, half_square, s * fma(z, estrin(z, LN), half_square)


def at_the_ends(x: Value, result: Value) -> Value:
    """A logarithm with its special values: -inf at 0, inf at inf, nan below 0 and at nan."""
    inside = where(equal(x, math.inf), x, result)
    return where(x > 0.0, inside, where(equal(x, 0.0), -math.inf, math.nan))


def ln(x: Value) -> Value:
    """Natural logarithm."""
    split = parts(x)
    f, half_square, t = fraction_logarithm(split.m)
    rest = fma(split.k, LN2_LONG_REST, t)
    return at_the_ends(x, fma(split.k, LN2_SHORT, f - (half_square - rest)))


def log10(x: Value) -> Value:
    """Logarithm to base 10; ln m is held in two doubles, so that whole powers of ten give whole numbers."""
    split = parts(x)
    f, half_square, t = fraction_logarithm(split.m)
    high = f - half_square
    low = ((f - high) - half_square) + t
    product = high * LOG10_E
    product_rest = fma(high, LOG10_E, -product) + fma(low, LOG10_E, high * LOG10_E_REST)
    whole = split.k * LOG10_2_SHORT
    total = whole + product
    total_rest = (whole - total) + product
    return at_the_ends(x, total + (total_rest + fma(split.k, LOG10_2_LONG_REST, product_rest)))
