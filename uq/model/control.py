"""Step size control as vector instructions: powers of the error by own means, so that no library function is called.

The controller is the proportional-integral one of DOPRI5 and DOP853 (Hairer, Norsett, Wanner, Solving ODEs I, 2nd ed., II.4 and its
appendix): h_new = h * 0.9 * err^-alpha * err_old^beta within [least, most] * h, err_old at least 1e-4; after a refusal
h * 0.9 * err^-alpha, and no growth in the next accepted step. The four numbers belong to the pair. It is worked out in logarithms of the
squared error, which spares roots and powers.
"""

from __future__ import annotations

from math import log2

from uq.model.writer import I, V, Writer, constant

SAFETY = 0.9
LEAST_OLD_ERROR = 1e-4
START_LOG_ERROR = 2 * log2(LEAST_OLD_ERROR)
LOG_SAFETY = log2(SAFETY)
# Chebyshev interpolants on [1, 2] and [-1/2, 1/2], worked out with numpy and rounded to seven digits: errors below 2e-5 and 3e-6. More is
# not needed: a step factor is no part of the solution, it must only be the same on every processor.
LOG2 = (-2.7879262, 5.0478554, -3.4898786, 1.5894743, -0.4025134, 0.043005)
EXP2 = (1.0, 0.693121, 0.2402235, 0.055922, 0.0096664)
TWO_52 = 4503599627370496.0


def polynomial(w: Writer, x: str, coefficients: tuple[float, ...]) -> str:
    """Horner's scheme; coefficients from the constant one up."""
    value = constant(coefficients[-1])
    for c in reversed(coefficients[:-1]):
        value = w.fma(value, x, constant(c))
    return value


def write_log2(w: Writer, x: str) -> str:
    """log2 of a positive normal number to about 2e-5: exponent from the bits, a polynomial for the rest."""
    bits = w.add(f"bitcast {V} {x} to {I}")
    raised = w.add(f"lshr {I} {bits}, splat (i64 52)")
    magic = w.add(f"or {I} {raised}, splat (i64 {0x4330000000000000})")  # 2^52 + the biased exponent, as a double's bits
    exponent = w.minus(w.add(f"bitcast {I} {magic} to {V}"), constant(TWO_52 + 1023))
    rest = w.add(f"and {I} {bits}, splat (i64 {0x000FFFFFFFFFFFFF})")
    one = w.add(f"or {I} {rest}, splat (i64 {0x3FF0000000000000})")
    return w.plus(exponent, polynomial(w, w.add(f"bitcast {I} {one} to {V}"), LOG2))


def write_exp2(w: Writer, x: str) -> str:
    """2^x to about 3e-6 for |x| < 1000: whole part into the exponent bits, a polynomial for the rest."""
    magic = w.plus(x, constant(1.5 * TWO_52))
    whole = w.minus(magic, constant(1.5 * TWO_52))
    value = polynomial(w, w.minus(x, whole), EXP2)
    shift = w.add(f"shl {I} {w.add(f'bitcast {V} {magic} to {I}')}, splat (i64 52)")
    total = w.add(f"add {I} {w.add(f'bitcast {V} {value} to {I}')}, {shift}")
    return w.add(f"bitcast {I} {total} to {V}")


def within(w: Writer, x: str, low: float, high: float) -> str:
    """x within [low, high]; `high` where it is not a number."""
    return w.larger(w.smaller(x, constant(high)), constant(low))
