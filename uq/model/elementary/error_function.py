"""erf.

erf x = 1 - exp(-t) with t = x (2/sqrt(pi) + x q(x)), x >= 0. The polynomial is fitted so that the relative error of erf, not of t, is
small, which leaves it little to do where erf is nearly 1. t is held in two doubles and 1 - exp(-t) is formed as for expm1, so that
nothing is lost near 0. Own arrangement; polynomial: tests/long/fit_elementary.py.
"""

from __future__ import annotations

from uq.model.elementary import exponential
from uq.model.elementary.body import Value, at_most, estrin, fma, from_bits, magnitude, with_sign

# erf is 1 in double from here on.
FLAT = 6.0
TWO_OVER_ROOT_PI = float.fromhex("0x1.20dd750429b6dp+0")
TWO_OVER_ROOT_PI_REST = float.fromhex("0x1.1ae3a914fed80p-56")
# -ln(erfc x) = x (2/sqrt(pi) + x q(x)), 0 <= x <= 6, relative error of erf 1.1e-17.
ERF = (
    0.6366197723675815,
    0.1027726033019289,
    -0.019128447008762567,
    -0.00020919464349910082,
    0.0016962059502621445,
    -0.0005901230941710659,
    2.586881217832921e-05,
    6.452051277676686e-05,
    -2.9787494629813776e-05,
    3.515970807501551e-06,
    2.688651049044064e-06,
    -1.5843687442554653e-06,
    2.009027040152002e-07,
    2.3149731032398514e-07,
    -1.9497324121515077e-07,
    9.006847752839343e-08,
    -2.9961153618908894e-08,
    7.672572155620092e-09,
    -1.5411246567768318e-09,
    2.422199857664714e-10,
    -2.927844614542497e-11,
    2.6315194516286485e-12,
    -1.6570107150486546e-13,
    6.5219875250325056e-15,
    -1.2070524902077297e-16,
)


def erf(x: Value) -> Value:
    """The error function."""
    size = at_most(magnitude(x), FLAT)
    product = size * TWO_OVER_ROOT_PI
    tail = size * fma(size, estrin(size, ERF), TWO_OVER_ROOT_PI_REST)
    product_rest = fma(size, TWO_OVER_ROOT_PI, -product) + tail
    t = product + product_rest
    t_rest = (product - t) + product_rest
    reduced = exponential.reduce(-t)
    r, rest = reduced.r, reduced.rest - t_rest
    w = fma(r * r, estrin(r, exponential.EXP), fma(r, rest, rest))
    # 2^n exp(r) - 1 = (2^n - 1) + 2^n r + 2^n w, the first sum with its remainder; n from -56 to 0.
    power = from_bits((reduced.word - 1023) << 52)
    less = power - 1.0
    scaled = power * r
    high = less + scaled
    return with_sign(high + fma(power, w, (less - high) + scaled), x)
