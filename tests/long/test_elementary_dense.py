"""The vector functions on millions of arguments, and their coefficients fitted anew.

python -m pytest tests/long/test_elementary_dense.py -n0 -s        # a few minutes; prints the greatest error of each function
"""

from __future__ import annotations

import numpy as np
import pytest

from tests.long.fit_elementary import FITS, Fit, solve
from tests.vector_functions import HAS_LONG, UNITS, Machine, Samples, dense_errors, exact_error
from uq.model.elementary import error_function, exponential, hyperbolic, inverse_trigonometric, logarithm, power, trigonometric

ROUNDS, COUNT = 16, 500_000
COEFFICIENTS = {
    "exp": exponential.EXP,
    "ln": logarithm.LN,
    "ln_extended": power.LN_EXTENDED,
    "sin": trigonometric.SIN,
    "cos": trigonometric.COS,
    "sinh": hyperbolic.SINH,
    "cosh": hyperbolic.COSH,
    "asin": inverse_trigonometric.ASIN,
    "atan": inverse_trigonometric.ATAN,
    "erf": error_function.ERF,
}


@pytest.mark.skipif(not HAS_LONG, reason="no longdouble with a 64-bit mantissa on this machine")
@pytest.mark.parametrize("name", UNITS)
def test_millions_of_arguments(name: str) -> None:
    machine, greatest, where, seen = Machine(), 0.0, (), 0
    for seed in range(1000, 1000 + ROUNDS):
        sample = Samples(seed).of(name, COUNT)
        errors = dense_errors(machine, name, sample)
        worst = int(np.argmax(errors))
        seen += len(errors)
        if errors[worst] > greatest:
            greatest, where = float(errors[worst]), tuple(float(a[worst]) for a in sample)
    exact = exact_error(name, float(machine(name, *(np.array([a]) for a in where))[0]), where)
    print(f"\n{name:6s} {seen:9d} arguments, greatest error {greatest:.3f} units (mpmath there: {exact:.3f}) at {[a.hex() for a in where]}")
    assert greatest <= UNITS[name]
    assert abs(exact - greatest) < 0.02, "longdouble arithmetic is good enough to judge by"


@pytest.mark.parametrize("fit", FITS, ids=lambda fit: fit.name)
def test_coefficients_are_those_of_the_fit(fit: Fit) -> None:
    coefficients, before, after = solve(fit)
    assert tuple(coefficients) == COEFFICIENTS[fit.name]
    assert before <= after < 2.0**-56
