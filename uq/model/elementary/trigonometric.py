"""sin, cos and tan for |x| <= 2^30 (more than 10^8 turns); nan beyond, where neighbouring doubles are 10^-7 of a turn or more apart.

x = n pi/2 + r, |r| <= pi/4, r held in two doubles: n times the first part of pi/2 is taken off exactly by an fma, the next two parts with
their rounding errors (W. J. Cody, W. Waite 1980, with an fma in place of short constants). Polynomials: tests/long/fit_elementary.py.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

from uq.model.elementary.body import Value, bits, divided, equal, estrin, fma, from_bits, is_truth, magnitude, where

TWO_OVER_PI = float.fromhex("0x1.45f306dc9c883p-1")
# pi/2 = sum of the three up to 2^-164.
HALF_PI = float.fromhex("0x1.921fb54442d18p+0")
HALF_PI_REST = float.fromhex("0x1.1a62633145c07p-54")
HALF_PI_LAST = float.fromhex("-0x1.f1976b7ed8fbcp-110")
ROUND = 1.5 * 2.0**52
GREATEST = 2.0**30
SIGN = -(2**63)
# sin r = r + r z q(z), z = r^2, |r| <= pi/4, relative error 3.5e-18.
SIN = (
    -0.16666666666666632,
    0.008333333333322486,
    -0.00019841269829853417,
    2.7557313705093406e-06,
    -2.5050759895207168e-08,
    1.589688688150945e-10,
)
# cos r = 1 - z/2 + z^2 q(z), error 1e-19.
COS = (
    0.0416666666666666,
    -0.001388888888887447,
    2.4801587289660054e-05,
    -2.755731439376441e-07,
    2.087572758794162e-09,
    -1.1359801976258014e-11,
)


@dataclass(frozen=True)
class Quarter:
    """x = n pi/2 + r + rest; `word` has n in its lowest bits."""

    r: Value
    rest: Value
    word: Value

    def turned(self) -> Quarter:
        """The same place, counted from a quarter turn earlier."""
        return Quarter(self.r, self.rest, self.word + 1)

    def odd(self) -> Value:
        """Truth of "n is odd"."""
        return is_truth(self.word, 0)

    def sign(self) -> Value:
        """The sign bit set where n is 2 or 3 beyond a multiple of 4."""
        return (self.word << 62) & SIGN


def quarter(x: Value) -> Quarter:
    """Take the nearest multiple of pi/2 off x; nan where |x| > 2^30."""
    x = where(magnitude(x) <= GREATEST, x, math.nan)
    shifted = fma(x, TWO_OVER_PI, ROUND)
    n = shifted - ROUND
    high = fma(n, -HALF_PI, x)
    product = n * HALF_PI_REST
    product_rest = fma(n, HALF_PI_LAST, fma(n, HALF_PI_REST, -product))
    r = high - product
    back = r - high
    lost = (high - (r - back)) - (product + back)
    return Quarter(r, lost - product_rest, bits(shifted))


def sine(q: Quarter) -> tuple[Value, Value]:
    """sin(r + rest) in two parts, the second below 0.2 of the first."""
    z = q.r * q.r
    return q.r, fma(z * q.r, estrin(z, SIN), fma(z * -0.5, q.rest, q.rest))


def cosine(q: Quarter) -> tuple[Value, Value]:
    """cos(r + rest) in two parts: 1 - z/2, and what is left."""
    z = q.r * q.r
    half = z * 0.5
    high = 1.0 - half
    return high, ((1.0 - high) - half) + fma(z * z, estrin(z, COS), -(q.r * q.rest))


def sine_at(q: Quarter) -> Value:
    """sin of the whole angle."""
    s, c = sine(q), cosine(q)
    size = where(q.odd(), c[0] + c[1], s[0] + s[1])
    return from_bits(bits(size) ^ q.sign())


def sin(x: Value) -> Value:
    """Sine of x in radians."""
    return where(equal(x, 0.0), x, sine_at(quarter(x)))


def cos(x: Value) -> Value:
    """Cosine of x in radians."""
    return sine_at(quarter(x).turned())


def tan(x: Value) -> Value:
    """Tangent of x in radians: the quotient of sine and cosine in two parts each."""
    q = quarter(x)
    s, c = sine(q), cosine(q)
    odd = q.odd()
    above, above_rest = (where(odd, c[k], s[k]) for k in (0, 1))
    below, below_rest = (where(odd, s[k], c[k]) for k in (0, 1))
    quotient = divided(above, above_rest, below, below_rest)
    turned = from_bits(bits(quotient) ^ (q.word << 63))
    return where(equal(x, 0.0), x, turned)
