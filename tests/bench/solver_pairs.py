"""Which pair is the cheaper one at which accuracy: the measurement behind `uq.model.choose`.

Run from the repository: python -m tests.bench.solver_pairs [members] [repeats]. For every problem and accuracy: how many times as long the
5(4) pair takes as the 8(5,3) pair, with 2 and with 101 output times, and the same at equal error reached (the 90 % quantile over members of
the largest error in units of the scale, over all 101 times).
"""

from __future__ import annotations

import sys
import time
from collections.abc import Callable
from dataclasses import dataclass

import numpy as np

from tests.bench.solver import chain, with_exponentials
from tests.solver_models import compiled, equations, names, predator_prey, predator_prey_inputs, settings
from uq.model.code import Equations
from uq.solve.compile import Compiled
from uq.solve.scales import pilot_scales
from uq.solve.solve import solve

ACCURACIES = tuple(10.0**-k for k in range(3, 13))
METHODS = ("explicit54", "explicit853")
RNG = np.random.default_rng(1)


@dataclass(frozen=True)
class Problem:
    """A model, its inputs, the time it runs."""

    name: str
    equations: Equations
    x: np.ndarray
    stop: float


def spread(middle: list[float], members: int) -> np.ndarray:
    """Inputs 10 % around the middle."""
    return np.array(middle) * RNG.uniform(0.9, 1.1, (members, len(middle)))


def pendulum() -> Equations:
    """A pendulum with some friction."""
    g, friction, angle0, angle, speed = names("g friction angle0 angle speed")
    return equations("g friction angle0", "angle speed", [angle0, 0 * angle0], [speed, -g * angle.sin() - friction * speed])


def epidemic() -> Equations:
    """Susceptible, infected, recovered shares."""
    beta, gamma, i0, s, i, _ = names("beta gamma i0 s i r")
    return equations("beta gamma i0", "s i r", [1 - i0, i0, 0 * i0], [-beta * s * i, beta * s * i - gamma * i, gamma * i])


def heating() -> Equations:
    """A tank that heats itself, with an Arrhenius term."""
    k0, e, ua, temperature, x = names("k0 e ua T x")
    k = k0 * (-e / (0.008314 * temperature)).exp()
    heat = 60 * k * (1 - x) - ua * (temperature - 295)
    return equations("k0 e ua", "T x", [0 * k0 + 310, 0 * k0], [heat, k * (1 - x)])


def swinging() -> Equations:
    """A damped oscillator driven by a sine of time."""
    k, c, x, v, t = names("k c x v time")
    return equations("k c", "x v", [0 * k + 1, 0 * k], [v, -k * x - c * v + (2.5 * t).sin()])


def problems(members: int) -> list[Problem]:
    """All of them."""
    return [
        Problem("predator-prey", predator_prey(), predator_prey_inputs(members), 20.0),
        Problem("predator-prey, exp", with_exponentials(), predator_prey_inputs(members), 20.0),
        Problem("pendulum", pendulum(), spread([9.81, 0.2, 1.5], members), 10.0),
        Problem("epidemic", epidemic(), spread([0.5, 0.2, 1e-3], members), 100.0),
        Problem("heating tank", heating(), spread([6e12, 98.0, 0.002], members), 720.0),
        Problem("driven oscillator", swinging(), spread([4.0, 0.3], members), 20.0),
        Problem("ten tanks", chain(10), spread([1.0, 1.0], members), 10.0),
    ]


def best(work: Callable[[], object], repeats: int) -> float:
    """The shortest of a few times."""
    found = []
    for _ in range(repeats):
        began = time.perf_counter()
        work()
        found.append(time.perf_counter() - began)
    return min(found)


def measured(code: Compiled, problem: Problem, scales: np.ndarray, exact: np.ndarray, repeats: int) -> list[tuple[float, float, float]]:
    """Seconds with 2 and with 101 times, and error, for every accuracy."""
    times = np.linspace(0.0, problem.stop, 101)
    found = []
    for accuracy in ACCURACIES:
        given = settings(len(scales), accuracy, scales=scales)
        few = solve(code, problem.x[: len(exact)], times, 0.0, given)
        error = np.quantile((np.abs(few.values - exact) / scales[:, None]).max(axis=(1, 2)), 0.9)
        seconds = [best(lambda t=t, s=given: solve(code, problem.x, t, 0.0, s), repeats) for t in (times[[0, -1]], times)]
        found.append((seconds[0], seconds[1], float(error)))
    return found


def main() -> None:
    """Print the table."""
    members, repeats = (int(text) for text in (*sys.argv[1:], *("4000", "3")[len(sys.argv) - 1 :]))
    print("54 over 853, at accuracy 1e-3 ... 1e-12")
    for problem in problems(members):
        codes = {method: compiled(problem.equations, method) for method in METHODS}
        times, n = np.linspace(0.0, problem.stop, 101), len(problem.equations.states)
        scales, _ = pilot_scales(codes["explicit54"], problem.x[:256], times, 0.0, settings(n))
        exact = solve(codes["explicit853"], problem.x[:200], times, 0.0, settings(n, 1e-14, scales=scales, max_steps=10**6)).values
        old, new = (np.array(measured(codes[method], problem, scales, exact, repeats)) for method in METHODS)
        print(f"{problem.name}")
        print("   2 times           " + " ".join(f"{r:5.2f}" for r in old[:, 0] / new[:, 0]))
        print("   101 times         " + " ".join(f"{r:5.2f}" for r in old[:, 1] / new[:, 1]))
        print("   error of 853 / 54 " + " ".join(f"{r:5.2f}" for r in new[:, 2] / old[:, 2]))
        for column, what in ((0, "2"), (1, "101")):
            order = np.argsort(new[:, 2])
            same = np.exp(np.interp(np.log(old[:, 2]), np.log(new[order, 2]), np.log(new[order, column])))
            print(f"   equal error, {what:3}  " + " ".join(f"{r:5.2f}" for r in old[:, column] / same))


if __name__ == "__main__":
    main()
