"""Solves the problems of `tests.stiff_models` anew by scipy's Radau method with a tight tolerance, and prints both end values.

E5 to 1e13 is rounding as it is written: there the second state is put in as the sum of the last two, which it always is.
Run by hand: python -m tests.long.stiff_references (a minute).
"""

from __future__ import annotations

import numpy as np
from scipy.integrate import solve_ivp

from tests.stiff_models import E5, E5_EARLY, PROBLEMS, Problem


def solved_anew(problem: Problem, accuracy: float = 1e-12) -> np.ndarray:
    """The states at the end. Radau IIA of order 5, with a Jacobian by complex steps, which have no rounding of differences."""
    late = problem is E5

    def rates(t: float, y: np.ndarray) -> np.ndarray:
        found = np.array(problem.rates([y[0], y[2] + y[3], y[2], y[3]] if late else y))  # type: ignore[operator]
        if late:
            found[1] = 0.0 * y[1]
        return found

    def jacobian(t: float, y: np.ndarray) -> np.ndarray:
        return np.column_stack([rates(t, y + 1e-150j * unit).imag * 1e150 for unit in np.eye(problem.states)])

    relative, absolute = (1e-10, 1e-40) if late else (accuracy, accuracy * 1e-3 * np.array(problem.scales))
    found = solve_ivp(rates, (0.0, problem.stop), problem.start, method="Radau", rtol=relative, atol=absolute, jac=jacobian)
    assert found.success, found.message
    end = np.asarray(found.y[:, -1])
    if late:
        end[1] = end[2] + end[3]
    return end


def main() -> None:
    """Print everything."""
    for problem in (*PROBLEMS, E5_EARLY):
        print(problem.name)
        for given, found, scale in zip(problem.end, solved_anew(problem), problem.scales, strict=True):
            apart = abs(given - found)
            print(f"  {given:24.16e} {found:24.16e} apart {apart / max(abs(given), 1e-300):.1e}, of the scale {apart / scale:.1e}")


if __name__ == "__main__":
    main()
