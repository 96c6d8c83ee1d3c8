"""mod(a, b) = a - b floor(a / b): the phase within a period.

The result has the sign of b (also when it is 0) and lies in [0, b), or in (b, 0] for negative b. It is exact wherever it is representable,
which is always but for an `a` of the other sign with |a| < |b|: there a + b is rounded, and may become b itself. mod(a, 0), mod(inf, b)
and nan give nan; mod(a, inf) is a where a has the same sign or is 0, else b. From |a / b| = 2^53 on the result is nan: the quotient is no
longer a whole number in double, and neighbours of `a` are a period or more apart.
"""

from __future__ import annotations

import math

from uq.model.elementary.body import Value, equal, floor, fma, magnitude, where, with_sign

GREATEST_QUOTIENT = 2.0**53


def mod(a: Value, b: Value) -> Value:
    """a - b floor(a / b)."""
    quotient = a / b
    # The rounded quotient can reach the next whole number from below: then the remainder, still exact in an fma, has the wrong sign.
    left = fma(-floor(quotient), b, a)
    # Where b is inf the product 0 * inf has no meaning; a itself is left.
    left = where(equal(magnitude(b), math.inf) & (magnitude(a) < math.inf), a, left)
    wrong = ((left < 0.0) & (b > 0.0)) | ((left > 0.0) & (b < 0.0))
    left = where(wrong, left + b, left)
    result = where(equal(left, 0.0), with_sign(0.0, b), left)
    return where(magnitude(quotient) < GREATEST_QUOTIENT, result, math.nan)
