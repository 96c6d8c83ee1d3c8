"""sinh, cosh and tanh.

|x| = n ln 2 + r as for exp, and with a = 2^(n-1), b = 2^(-n-1): sinh x = (a - b) cosh r + (a + b) sinh r and
cosh x = (a + b) cosh r + (a - b) sinh r. Products are held in two doubles, and at n = 0 sinh is the odd polynomial itself, so nothing
cancels near 0. Own arrangement of the addition theorems (NIST DLMF 4.35.1, 4.35.2); polynomials: tests/long/fit_elementary.py.
"""

from __future__ import annotations

from dataclasses import dataclass

from uq.model.elementary import exponential
from uq.model.elementary.body import Value, at_most, bits, divided, estrin, fma, from_bits, magnitude, with_sign

# Beyond these sinh and cosh are inf, tanh is 1.
HIGHEST, FLAT = 711.0, 22.0
# b is far below the last place of a from here on; the rest of 2^n is multiplied on at the end, so that no power overflows.
LARGEST_N = 64.0
# sinh r = r + r z q(z), z = r^2, |r| <= ln(2)/2, relative error 3e-19.
SINH = (
    0.16666666666666677,
    0.008333333333321386,
    0.00019841269886814643,
    2.755724345528442e-06,
    2.510931861360593e-08,
)
# cosh r = 1 + z/2 + z^2 q(z), error 1e-21.
COSH = (
    0.041666666666666685,
    0.0013888888888873283,
    2.4801587349193223e-05,
    2.755725185017517e-07,
    2.092174999542386e-09,
)


@dataclass(frozen=True)
class Pair:
    """A number in two parts, high + low, the second much smaller."""

    high: Value
    low: Value


def power_of_two(n: Value) -> Value:
    """2^n for whole n from -1022 to 1023."""
    return from_bits(bits(n + (exponential.ROUND - 1023.0)) << 52)


def combined(one: Value, other: Value, r: Value, rest: Value) -> Pair:
    """one + other * r + rest in two doubles, for |one| >= |other r| or one = 0."""
    product = other * r
    high = one + product
    return Pair(high, ((one - high) + product) + (fma(other, r, -product) + rest))


def sine_and_cosine(size: Value) -> tuple[Pair, Pair, Value]:
    """sinh and cosh of size >= 0 in two parts each, without a power of two that comes third."""
    reduced = exponential.reduce(size)
    r, z = reduced.r, reduced.r * reduced.r
    sinh_rest = fma(z * r, estrin(z, SINH), reduced.rest)
    cosh_rest = fma(z * z, estrin(z, COSH), fma(r, reduced.rest, z * 0.5))
    n = at_most(reduced.n, LARGEST_N)
    a, b = power_of_two(n - 1.0), power_of_two(-1.0 - n)
    less, more = a - b, a + b
    # Near n = 27 b is at the last place of a: what a -+ b lost counts, times cosh r ~ 1 and sinh r ~ r.
    less_rest, more_rest = (a - less) - b, (a - more) + b
    sinh_pair = combined(less, more, r, fma(less, cosh_rest, fma(more, sinh_rest, fma(more_rest, r, less_rest))))
    cosh_pair = combined(more, less, r, fma(more, cosh_rest, fma(less, sinh_rest, fma(less_rest, r, more_rest))))
    return sinh_pair, cosh_pair, power_of_two(reduced.n - n)


def sinh(x: Value) -> Value:
    """Hyperbolic sine."""
    pair, _, factor = sine_and_cosine(at_most(magnitude(x), HIGHEST))
    return with_sign((pair.high + pair.low) * factor, x)


def cosh(x: Value) -> Value:
    """Hyperbolic cosine."""
    _, pair, factor = sine_and_cosine(at_most(magnitude(x), HIGHEST))
    return (pair.high + pair.low) * factor


def tanh(x: Value) -> Value:
    """Hyperbolic tangent."""
    s, c, _ = sine_and_cosine(at_most(magnitude(x), FLAT))
    return with_sign(divided(s.high, s.low, c.high, c.low), x)
