"""By how many absolute tolerances states that settle at 0 are found below it: `Pair.undershoot`, `Rosenbrock.undershoot`.

Run from the repository: python -m tests.long.undershoot. Decay alone and along chains of tanks whose rates differ by up to thirty times,
2001 output times, so that the courses between the ends of steps are seen as well; the worst of 400 members each.
"""

from __future__ import annotations

import numpy as np

from tests.solver_models import equations, names, settings
from uq.lang.graph import Graph
from uq.model.build import build
from uq.model.code import Equations, Solver
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve

MEMBERS = 400
TIMES = np.linspace(0.0, 10.0, 2001)


def chain(tanks: int) -> Equations:
    """Tanks that drain one into the next, each with a rate of its own."""
    graph = Graph()
    k, x = (names(" ".join(f"{letter}{i}" for i in range(tanks)), graph) for letter in "kx")
    rates = [(k[i - 1] * x[i - 1] if i else 0.0 * x[0]) - k[i] * x[i] for i in range(tanks)]
    starts = [k[0] * 0.0 + (1.0 if i == 0 else 0.0) for i in range(tanks)]
    return equations(" ".join(f"k{i}" for i in range(tanks)), " ".join(f"x{i}" for i in range(tanks)), starts, rates)


def lowest(tanks: int, method: str, solver: Solver, accuracy: float) -> tuple[float, float]:
    """The median over members and the worst, in absolute tolerances; the scale of every state is its own largest value."""
    code = compile_for(build(chain(tanks), method, solver), Processor.here())
    k = 10.0 ** np.random.default_rng(tanks).uniform(0.0, 1.5, (MEMBERS, tanks))
    first = solve(code, k, TIMES, 0.0, settings(tanks, accuracy))
    scales = np.maximum(np.median(first.largest, axis=0), 1e-300)
    batch = solve(code, k, TIMES, 0.0, settings(tanks, accuracy, scales=scales))
    below = np.nanmax(np.maximum(-batch.values, 0.0) / (accuracy * scales)[:, None], axis=(1, 2))
    return float(np.median(below)), float(np.max(below))


def main() -> None:
    """Print everything."""
    for method, solver in (("explicit54", "stiff"), ("explicit54", "auto"), ("explicit853", "auto")):
        for accuracy in (1e-2, 1e-4, 1e-6, 1e-8, 1e-10):
            found = [lowest(tanks, method, solver, accuracy) for tanks in (1, 2, 4, 8, 20)]
            said = ", ".join(f"{middle:.2g} / {worst:.2g}" for middle, worst in found)
            print(f"  {method} {solver:8} {accuracy:g}: 1, 2, 4, 8, 20 tanks, median / worst: {said}")


if __name__ == "__main__":
    main()
