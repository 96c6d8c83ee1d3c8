"""x ** y in general, with the special values of IEEE 754-2019, section 9.2.1.

x^y = exp(y ln x) with ln x held in two doubles to about 2^-64 relative, so that the error stays below one unit in the last place even where
y ln x is near 700. Whole and half exponents known when the code is written are better written as products and square roots.
"""

from __future__ import annotations

import math

from uq.model.elementary import exponential, logarithm
from uq.model.elementary.body import Value, at_least, at_most, equal, estrin, floor, fma, is_nan, magnitude, where, with_sign

THIRD = float.fromhex("0x1.5555555555555p-2")
THIRD_REST = float.fromhex("0x1.5555555555555p-56")
# 2 atanh(s) = 2 s (1 + z (1/3 + z q(z))), z = s^2, relative error 8e-23.
LN_EXTENDED = (
    0.1999999999999999,
    0.14285714285721923,
    0.11111111108893788,
    0.09090909422161826,
    0.07692279201420797,
    0.06668132788490583,
    0.058378787137461204,
    0.0599097833765413,
)
# An exponent beyond this gives 0, 1 or inf whatever the base, and keeps all products finite.
GREATEST_EXPONENT = 2.0**66


def logarithm_in_two(x: Value) -> tuple[Value, Value]:
    """ln x as a sum of two doubles, x positive and finite."""
    split = logarithm.parts(x)
    f, below = split.m - 1.0, split.m + 1.0
    below_rest = (1.0 - below) + split.m
    inverse = 1.0 / below
    s = f * inverse
    s_rest = fma(-s, below_rest, fma(-s, below, f)) * inverse
    z = s * s
    z_rest = fma(s + s, s_rest, fma(s, s, -z))
    tail = z * estrin(z, LN_EXTENDED)
    a = tail + THIRD
    a_rest = ((THIRD - a) + tail) + THIRD_REST
    p = z * a
    p_rest = fma(z, a_rest, fma(z_rest, a, fma(z, a, -p)))
    twice, twice_rest = s + s, s_rest + s_rest
    w = twice * p
    w_rest = fma(twice_rest, p, fma(twice, p_rest, fma(twice, p, -w)))
    high = twice + w
    low = ((twice - high) + w) + (twice_rest + w_rest)
    whole = split.k * logarithm.LN2_SHORT
    total = whole + high
    return total, ((whole - total) + high) + fma(split.k, logarithm.LN2_LONG_REST, low)


def power_of_magnitude(x: Value, y: Value) -> Value:
    """x^y for positive finite x and any y but nan."""
    high, low = logarithm_in_two(x)
    y = at_least(at_most(y, GREATEST_EXPONENT), -GREATEST_EXPONENT)
    product = y * high
    rest = fma(y, low, fma(y, high, -product))
    bounded = at_least(at_most(product, exponential.HIGHEST), exponential.LOWEST)
    reduced = exponential.reduce(bounded)
    rest = reduced.rest + where(equal(bounded, product), rest, 0.0)
    return exponential.scale_two(*exponential.in_two(reduced.r, rest), reduced.word)


def power(x: Value, y: Value) -> Value:
    """x ** y; nan for a negative finite x with an exponent that is not whole."""
    size = magnitude(x)
    extreme = equal(size, 0.0) | equal(size, math.inf)
    plain = power_of_magnitude(where(extreme, 1.0, size), y)
    grows = (size > 1.0) ^ (y < 0.0)
    result = where(extreme, where(grows, math.inf, 0.0), plain)
    whole = equal(floor(y), y)
    half = y * 0.5
    odd = whole & ~equal(floor(half), half)
    result = where(odd, with_sign(result, x), result)
    refused = (x < 0.0) & (x > -math.inf) & ~whole
    result = where(refused | is_nan(x) | is_nan(y), math.nan, result)
    return where(equal(y, 0.0) | equal(x, 1.0), 1.0, result)
