"""How the polynomial coefficients of uq/model/elementary were made; run it to see them again.

Method: the exchange of Remez (E. Ya. Remez 1934; see N. L. Trefethen, Approximation Theory and Approximation Practice, chapter 10) on a
grid of Chebyshev-spaced points, with a weight, in 60-digit arithmetic. The unknown is the polynomial q of degree n-1 that makes
max |weight(x) * (target(x) - q(x))| least; afterwards each coefficient is rounded to double. Written by us, needs mpmath only.

    python tests/long/fit_elementary.py            # every fit: error reached after rounding, coefficients, lowest power first
    python tests/long/fit_elementary.py exp ln     # some of them
"""

from __future__ import annotations

import sys
from collections.abc import Callable
from dataclasses import dataclass, replace

import mpmath as mp

mp.mp.dps = 60
Number = mp.mpf
GRID = 1500


@dataclass(frozen=True)
class Fit:
    """One polynomial: weight * (target - q) is made small on [low, high], q has `count` coefficients."""

    name: str
    target: Callable[[Number], Number]
    weight: Callable[[Number], Number]
    low: Number
    high: Number
    count: int


def grid(low: Number, high: Number) -> list[Number]:
    """Chebyshev-spaced points, ends nearly included (the ends of a target are often 0/0)."""
    return [(low + high) / 2 - (high - low) / 2 * mp.cos(mp.pi * (k + mp.mpf(1) / 8) / (GRID + mp.mpf(1) / 3)) for k in range(GRID + 1)]


def polynomial(coefficients: list[Number], x: Number) -> Number:
    """Value of the polynomial, lowest power first."""
    total = mp.mpf(0)
    for c in reversed(coefficients):
        total = total * x + c
    return total


def exchange(errors: list[Number], size: int) -> list[int]:
    """Places of `size` alternating extremes of the errors, the largest ones kept."""
    runs: list[int] = []
    for k, e in enumerate(errors):
        if runs and (errors[runs[-1]] > 0) == (e > 0):
            if abs(e) > abs(errors[runs[-1]]):
                runs[-1] = k
        else:
            runs.append(k)
    while len(runs) > size:
        if len(runs) == size + 1:
            runs.pop(0 if abs(errors[runs[0]]) < abs(errors[runs[-1]]) else -1)
        else:
            worst = min(range(len(runs) - 1), key=lambda j: max(abs(errors[runs[j]]), abs(errors[runs[j + 1]])))
            del runs[worst : worst + 2]
    return runs


def solve(fit: Fit) -> tuple[list[float], float, float]:
    """Rounded coefficients, the greatest weighted error before rounding and after it.

    The two lowest coefficients are rounded first, one after the other, and the rest is fitted again to what they leave.
    """
    first, before, _ = solve_at_once(fit)
    lowest = first[0]
    left = replace(fit, target=lambda x: (fit.target(x) - lowest) / x, weight=lambda x: fit.weight(x) * abs(x), count=fit.count - 1)
    second = solve_at_once(left)[0][0]
    rest = replace(left, target=lambda x: (left.target(x) - second) / x, weight=lambda x: left.weight(x) * abs(x), count=left.count - 1)
    coefficients, _, after = solve_at_once(rest)
    return [lowest, second, *coefficients], before, after


def solve_at_once(fit: Fit) -> tuple[list[float], float, float]:
    """Rounded coefficients, the greatest weighted error before rounding and after it."""
    points = grid(fit.low, fit.high)
    target, weight = [fit.target(x) for x in points], [fit.weight(x) for x in points]
    size = fit.count + 1
    places = [round(GRID * j / fit.count) for j in range(size)]
    coefficients: list[Number] = []
    greatest = mp.mpf(0)
    for _ in range(60):
        matrix = mp.matrix(size, size)
        right = mp.matrix(size, 1)
        for row, k in enumerate(places):
            for power in range(fit.count):
                matrix[row, power] = points[k] ** power
            matrix[row, fit.count] = (-1) ** row / weight[k]
            right[row] = target[k]
        solved = mp.lu_solve(matrix, right)
        coefficients = [solved[j] for j in range(fit.count)]
        errors = [w * (t - polynomial(coefficients, x)) for x, t, w in zip(points, target, weight, strict=True)]
        greatest = max(abs(e) for e in errors)
        if greatest < abs(solved[fit.count]) * (1 + mp.mpf("1e-3")):
            break
        places = exchange(errors, size)
    rounded = [float(c) for c in coefficients]
    after = max(abs(w * (t - polynomial([mp.mpf(c) for c in rounded], x))) for x, t, w in zip(points, target, weight, strict=True))
    return rounded, float(greatest), float(after)


def log_tail(z: Number, first: int) -> Number:
    """sum of 2 z^j / (2 j + 2 first + 1) over j >= 0: what is left of 2 atanh(s) = 2 s + 2/3 s^3 + ... with z = s^2."""
    return mp.nsum(lambda j: 2 * z**j / (2 * j + 2 * first + 1), [0, mp.inf]) if z > mp.mpf("1e-30") else mp.mpf(2) / (2 * first + 1)


HALF_LN2 = mp.ln(2) / 2 * mp.mpf("1.0001")
LOG_S = (mp.sqrt(2) - 1) / (mp.sqrt(2) + 1) * mp.mpf("1.0001")
EIGHTH = mp.pi / 4 * mp.mpf("1.0001")


def root(f: Callable[[Number], Number]) -> Callable[[Number], Number]:
    """The function of z = x^2 that f is of x."""
    return lambda z: f(mp.sqrt(z))


def one(_: Number) -> Number:
    return mp.mpf(1)


FITS = (
    # exp(r) = 1 + r + r^2 q(r), relative error
    Fit("exp", lambda r: (mp.exp(r) - 1 - r) / r**2, lambda r: r**2 / mp.exp(r), -HALF_LN2, HALF_LN2, 10),
    # 2 atanh(s) = 2 s + s z q(z), z = s^2, relative error
    Fit("ln", root(lambda s: (mp.log((1 + s) / (1 - s)) - 2 * s) / s**3), lambda z: z / 2, mp.mpf("1e-12"), LOG_S**2, 7),
    # 2 atanh(s) = 2 s (1 + z (1/3 + z q(z))), relative error
    Fit(
        "ln_extended",
        root(lambda s: ((mp.log((1 + s) / (1 - s)) / (2 * s) - 1) / s**2 - mp.mpf(1) / 3) / s**2),
        lambda z: z**2,
        mp.mpf("1e-12"),
        LOG_S**2,
        8,
    ),
    # sin(r) = r + r z q(z), relative error
    Fit("sin", root(lambda r: (mp.sin(r) - r) / r**3), lambda z: z, mp.mpf("1e-12"), EIGHTH**2, 6),
    # cos(r) = 1 - z/2 + z^2 q(z), relative error (within a factor 1.5)
    Fit("cos", root(lambda r: (mp.cos(r) - 1 + r**2 / 2) / r**4), lambda z: z**2, mp.mpf("1e-12"), EIGHTH**2, 6),
    # sinh(r) = r + r z q(z), z = r^2, relative error
    Fit("sinh", root(lambda r: (mp.sinh(r) - r) / r**3), lambda z: z, mp.mpf("1e-12"), HALF_LN2**2, 5),
    # cosh(r) = 1 + z/2 + z^2 q(z), error
    Fit("cosh", root(lambda r: (mp.cosh(r) - 1 - r**2 / 2) / r**4), lambda z: z**2, mp.mpf("1e-12"), HALF_LN2**2, 5),
    # asin(x) = x + x z q(z), z = x^2 <= 1/4, relative error
    Fit("asin", root(lambda x: (mp.asin(x) - x) / x**3), lambda z: z, mp.mpf("1e-12"), mp.mpf(1) / 4, 13),
    # atan(t) = t + t z q(z), z = t^2, |t| <= tan(pi/8), relative error
    Fit("atan", root(lambda t: (mp.atan(t) - t) / t**3), lambda z: z, mp.mpf("1e-12"), (mp.sqrt(2) - 1) ** 2 * mp.mpf("1.0001"), 11),
    # erf(x) = 1 - exp(-x (2/sqrt(pi) + x q(x))), relative error of erf
    Fit(
        "erf",
        lambda x: (-mp.log(mp.erfc(x)) / x - 2 / mp.sqrt(mp.pi)) / x,
        lambda x: x**2 * mp.erfc(x) / mp.erf(x),
        mp.mpf("1e-9"),
        mp.mpf(6),
        25,
    ),
)


def main() -> None:
    for fit in FITS:
        if len(sys.argv) > 1 and fit.name not in sys.argv[1:]:
            continue
        coefficients, before, after = solve(fit)
        print(f"{fit.name}: {fit.count} coefficients, error {before:.2e} = 2^{mp.log(before, 2)}, rounded {after:.2e}".replace("\n", ""))
        for c in coefficients:
            print(f"    {c!r},  # {c.hex()}")


if __name__ == "__main__":
    main()
