"""Monotone cubics through points: smooth, and never beyond the values at their ends.

In: points and values. Out: slopes at the points, coefficients between them. Must not know: whether it is a table or a forcing.
"""

from __future__ import annotations

from itertools import pairwise

Cubic = tuple[float, float, float, float]


def slopes(points: tuple[float, ...], values: tuple[float, ...]) -> tuple[float, ...]:
    """Slopes at the points, so that every cubic piece is monotone.

    They lie in the region of Fritsch and Carlson (SIAM J. Numer. Anal. 17, 1980, 238-246): inside, the weighted harmonic mean of the
    neighbouring secants (Fritsch and Butland, SIAM J. Sci. Stat. Comput. 5, 1984, 300-304), 0 where they differ in sign; at the ends the
    three-point slope, cut to keep the shape. (The same choice as that of the usual routines named PCHIP.)
    """
    lengths = [b - a for a, b in pairwise(points)]
    secants = [(b - a) / h for (a, b), h in zip(pairwise(values), lengths, strict=True)]
    if len(secants) == 1:
        return (secants[0], secants[0])
    inner = [_inner(*pair) for pair in zip(pairwise(lengths), pairwise(secants), strict=True)]
    first = _end(lengths[0], lengths[1], secants[0], secants[1])
    return (first, *inner, _end(lengths[-1], lengths[-2], secants[-1], secants[-2]))


def _inner(lengths: tuple[float, float], secants: tuple[float, float]) -> float:
    (before, after), (left, right) = lengths, secants
    if not left * right > 0.0:  # of different signs, or one is 0 (an underflow counts as 0 too)
        return 0.0
    one, two = 2.0 * after + before, after + 2.0 * before
    return (one + two) / (one / left + two / right)


def _end(near: float, far: float, secant: float, next_secant: float) -> float:
    slope = ((2.0 * near + far) * secant - near * next_secant) / (near + far)
    if not slope * secant > 0.0:
        return 0.0
    if secant * next_secant < 0.0 and abs(slope) > 3.0 * abs(secant):
        return 3.0 * secant
    return slope


def cubic(length: float, values: tuple[float, float], ends: tuple[float, float]) -> Cubic:
    """Coefficients c of c0 + c1 d + c2 d^2 + c3 d^3 for d in [0, length], from values and slopes at both ends (Hermite)."""
    secant = (values[1] - values[0]) / length
    excess = (ends[0] + ends[1] - 2.0 * secant) / length
    return values[0], ends[0], (secant - ends[0]) / length - excess, excess / length


def shifted(c: Cubic, d: float) -> Cubic:
    """The same cubic, written around d."""
    value = ((c[3] * d + c[2]) * d + c[1]) * d + c[0]
    slope = (3.0 * c[3] * d + 2.0 * c[2]) * d + c[1]
    return value, slope, 3.0 * c[3] * d + c[2], c[3]
