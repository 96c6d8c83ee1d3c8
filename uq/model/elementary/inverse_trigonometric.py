"""asin, acos, atan and atan2, in radians.

asin x = x + x z q(z), z = x^2, for |x| <= 1/2, and pi/2 - 2 asin(sqrt((1 - |x|)/2)) beyond. A quotient t above tan(pi/8) is reduced by
atan t = pi/4 + atan((t - 1)/(t + 1)), one above tan(3 pi/8) by atan t = pi/2 + atan(-1/t) (NIST DLMF 4.24): one division, whose
remainder is put back. Multiples of pi/4 are added in two parts. Polynomials: tests/long/fit_elementary.py.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

from uq.model.elementary.body import (
    Value,
    at_most,
    bits,
    equal,
    estrin,
    fma,
    from_bits,
    is_negative,
    is_unordered,
    magnitude,
    square_root,
    where,
    with_sign,
)

HALF_PI = float.fromhex("0x1.921fb54442d18p+0")
HALF_PI_REST = float.fromhex("0x1.1a62633145c07p-54")
QUARTER_PI, QUARTER_PI_REST = HALF_PI / 2.0, HALF_PI_REST / 2.0
TAN_EIGHTH = math.sqrt(2.0) - 1.0  # tan(pi/8)
TAN_THREE_EIGHTHS = math.sqrt(2.0) + 1.0  # tan(3 pi/8)
# atan is pi/2 to the last place from here on; keeps inf out of the products.
FLAT = 2.0**60
SIGN = -(2**63)
# asin x = x + x z q(z), z = x^2 <= 1/4, relative error 1e-18.
ASIN = (
    0.16666666666666763,
    0.07499999999970129,
    0.04464285717523588,
    0.03038194267873392,
    0.02237221578184386,
    0.017351598153778597,
    0.013980982202161445,
    0.011397623437948774,
    0.010787301461360008,
    0.0036803938195305395,
    0.02176937130988712,
    -0.02108489207318843,
    0.03268124907661118,
)
# atan t = t + t z q(z), z = t^2, |t| <= tan(pi/8), relative error 1.4e-18.
ATAN = (
    -0.333333333333332,
    0.19999999999953819,
    -0.14285714280220518,
    0.11111110784674075,
    -0.09090897792694622,
    0.07692060832014697,
    -0.06663110955585456,
    0.05847938489067841,
    -0.05039520780271598,
    0.03806990340583731,
    -0.01791290119149885,
)


def from_sine(x: Value) -> tuple[Value, Value, Value]:
    """`far` (|x| > 1/2) and asin of |x|, or of sqrt((1 - |x|)/2) twice over where far, in two parts; nan beyond 1."""
    size = magnitude(x)
    far = size > 0.5
    across = fma(size, -0.5, 0.5)
    z = where(far, across, size * size)
    s = where(far, square_root(across), size)
    rest = s * z * estrin(z, ASIN)
    return far, where(far, s + s, s), where(far, rest + rest, rest)


def asin(x: Value) -> Value:
    """Angle from -pi/2 to pi/2 whose sine is x; nan for |x| > 1."""
    far, angle, rest = from_sine(x)
    high = HALF_PI - angle
    high_rest = ((HALF_PI - high) - angle) + (HALF_PI_REST - rest)
    return with_sign(where(far, high, angle) + where(far, high_rest, rest), x)


def acos(x: Value) -> Value:
    """Angle from 0 to pi whose cosine is x; nan for |x| > 1."""
    far, angle, rest = from_sine(x)
    # pi/2 - angle in the middle, angle on the right, pi - angle on the left; mirrored for x < 0.
    flip = where(far, bits(x), bits(-x)) & SIGN
    angle, rest = from_bits(bits(angle) ^ flip), from_bits(bits(rest) ^ flip)
    quarters = where(far, where(x > 0.0, 0.0, 2.0), 1.0)
    start = quarters * HALF_PI
    high = start + angle
    return high + (((start - high) + angle) + fma(quarters, HALF_PI_REST, rest))


@dataclass(frozen=True)
class Quotient:
    """(above + above_rest) / (below + below_rest), at most tan(pi/8) in size."""

    above: Value
    above_rest: Value
    below: Value
    below_rest: Value


def turned(middle: Value, small: Value, large: Value | float) -> Quotient:
    """small / large, or where `middle` (small - large) / (small + large) with what both sums lost; small >= 0.41 large there."""
    difference, total = small - large, small + large
    return Quotient(
        where(middle, difference, small),
        where(middle, small - (difference + large), 0.0),
        where(middle, total, large),
        where(middle, small - (total - large), 0.0),
    )


def angle_of(quotient: Quotient, quarters: Value, flip: Value) -> Value:
    """quarters * pi/4 + atan(quotient), the arc tangent with its sign flipped by the sign bit of `flip`."""
    inverse = 1.0 / quotient.below
    t = quotient.above * inverse
    left = fma(-t, quotient.below, quotient.above) + fma(-t, quotient.below_rest, quotient.above_rest)
    z = t * t
    rest = fma(t * z, estrin(z, ATAN), left * inverse)
    t, rest = from_bits(bits(t) ^ flip), from_bits(bits(rest) ^ flip)
    start = quarters * QUARTER_PI
    high = start + t
    return high + (((start - high) + t) + fma(quarters, QUARTER_PI_REST, rest))


def atan(x: Value) -> Value:
    """Angle from -pi/2 to pi/2 whose tangent is x."""
    size = at_most(magnitude(x), FLAT)
    steep = size > TAN_THREE_EIGHTHS
    middle = (size > TAN_EIGHTH) & (size <= TAN_THREE_EIGHTHS)
    q = turned(middle, size, 1.0)
    q = Quotient(where(steep, -1.0, q.above), q.above_rest, where(steep, size, q.below), q.below_rest)
    quarters = where(steep, 2.0, where(middle, 1.0, 0.0))
    return with_sign(angle_of(q, quarters, bits(x) & 0), x)


def atan2(y: Value, x: Value) -> Value:
    """Angle from -pi to pi of the point (x, y), with the special values of IEEE 754-2019, section 9.2.1."""
    tall, back = magnitude(y) > magnitude(x), is_negative(x)
    small = where(tall, magnitude(x), magnitude(y))
    large = where(tall, magnitude(y), magnitude(x))
    # Both scaled by one power of two, so that neither sum nor remainder leaves the range; (0, 0) counts as (1, 0), (inf, inf) as (1, 1).
    factor = where(large < 1.0, 2.0**500, where(large > 2.0**500, 2.0**-500, 1.0))
    endless = equal(large, math.inf)
    small = where(endless, where(equal(small, math.inf), 1.0, 0.0), small * factor)
    large = where(endless | equal(large, 0.0), 1.0, large * factor)
    middle = small > large * TAN_EIGHTH
    quarters = where(middle, 1.0, 0.0)
    quarters = where(tall, 2.0 - quarters, quarters)
    quarters = where(back, 4.0 - quarters, quarters)
    angle = angle_of(turned(middle, small, large), quarters, where(tall ^ back, bits(x) | SIGN, bits(x) & 0) & SIGN)
    return where(is_unordered(x, y), math.nan, with_sign(angle, y))
