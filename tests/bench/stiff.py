"""Stiff members: speed against scipy's LSODA, the choice against either fixed method, time to compile.

Run from the repository: python -m tests.bench.stiff [members] [repeats]. One core; least processor time of repeats in turn.
"""

from __future__ import annotations

import sys
import time
from collections.abc import Callable

import numpy as np
from scipy.integrate import solve_ivp

from tests.bench.solver import chain
from tests.solver_models import settings
from tests.stiff_models import E5, HIRES, OREGO, ROBERTSON, VAN_DER_POL, Problem
from uq.model.build import build
from uq.model.choose import method_for
from uq.model.code import Solver
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve

SOLVERS: tuple[Solver, ...] = ("auto", "stiff", "explicit")
# A problem that takes more explicit steps is not solved by these.
MOST_STEPS = 3000


def van_der_pol(mu: float) -> Problem:
    """Van der Pol's oscillator over about two swings."""
    rates = lambda y: [y[1], mu * ((1.0 - y[0] * y[0]) * y[1]) - y[0]]  # noqa: E731
    return Problem(f"van der Pol {mu:g}", 2, (2.0, 0.0), max(20.0, 2 * mu), rates, (), (2.0, 1.5 * mu))


def relaxing(fast: float) -> Problem:
    """A pendulum's slow swing that a fast state follows."""
    rates = lambda y: [y[1], -1.0 * y[0], -fast * (y[2] - y[0] * y[0])]  # noqa: E731
    return Problem(f"relaxing {fast:g}", 3, (1.0, 0.0, 0.0), 40.0, rates, (), (1.0, 1.0, 1.0))


def rod(conduction: float) -> Problem:
    """Ten cells of a rod."""

    def rates(y):
        flow = [conduction * ((y[i - 1] if i else y[0]) - 2.0 * y[i] + (y[i + 1] if i < 9 else y[i])) for i in range(10)]
        return [each - 0.1 * y[i] * y[i] + (0.5 if i == 0 else 0.0) for i, each in enumerate(flow)]

    return Problem(f"rod {conduction:g}", 10, (1.0, *[0.2] * 9), 20.0, rates, (), (1.0,) * 10)


PROBLEMS = (
    *(VAN_DER_POL, ROBERTSON, HIRES, OREGO, E5),
    *(van_der_pol(mu) for mu in (1.0, 3.0, 10.0, 30.0, 100.0)),
    *(relaxing(fast) for fast in (3.0, 10.0, 30.0, 100.0, 1000.0)),
    *(rod(conduction) for conduction in (1.0, 5.0, 30.0, 300.0)),
)


def turns(works: list[Callable[[], object]], repeats: int) -> list[float]:
    """Least processor time of repeats of works that take turns."""
    found = [float("inf")] * len(works)
    for _ in range(repeats):
        for k, work in enumerate(works):
            began = time.process_time()
            work()
            found[k] = min(found[k], time.process_time() - began)
    return found


def work_of(problem: Problem, accuracy: float, solver: Solver, members: int) -> Callable[[], object]:
    """Solving of members that differ a little."""
    code = compile_for(build(problem.equations(), method_for(accuracy), solver), Processor.here())
    steps = MOST_STEPS if solver == "explicit" else 100_000
    given = settings(problem.states, accuracy, scales=np.array(problem.scales), max_steps=steps)
    x = problem.row() * (1.0 + 1e-3 * np.linspace(0.0, 1.0, members)[:, None])
    return lambda: solve(code, x, np.array([problem.stop]), 0.0, given)


def choice(members: int, repeats: int) -> None:
    """`auto` beside the better fixed choice."""
    worst = 0.0
    for problem in PROBLEMS:
        ratios = []
        for accuracy in (1e-4, 1e-6, 1e-8):
            works = [work_of(problem, accuracy, solver, members) for solver in SOLVERS]
            failed = bool(np.any(works[2]().status))  # type: ignore[attr-defined]
            auto, *fixed = turns(works[:2] if failed else works, repeats)
            ratios.append(auto / min(fixed))
            print(f"  {problem.name:18} {accuracy:6g}: " + ", ".join(f"{1e6 * each / members:7.2f}" for each in (auto, *fixed)) + " us")
        worst = max(worst, *ratios)
        print(f"  {problem.name:18} auto over the better of both: " + ", ".join(f"{ratio:.2f}" for ratio in ratios))
    print(f"  the largest: {worst:.2f}")


def hires(members: int, repeats: int) -> None:
    """HIRES with 101 output times against LSODA."""
    times, accuracy = np.linspace(0.0, HIRES.stop, 101), 1e-6
    scales = np.array(HIRES.scales)
    x = HIRES.row() * (1.0 + 0.05 * np.random.default_rng(0).random((members, 1)))
    few = x[:20]

    def rates(t: float, y: np.ndarray) -> list[float]:
        return HIRES.rates(y.tolist())  # type: ignore[operator, no-any-return]

    def lsoda() -> None:
        for row in few:
            solve_ivp(rates, (0.0, times[-1]), row, method="LSODA", t_eval=times, rtol=accuracy, atol=accuracy * scales)

    given = settings(8, accuracy, scales=scales)
    codes = {solver: compile_for(build(HIRES.equations(), "explicit54", solver), Processor.here()) for solver in SOLVERS[:2]}
    works = [lambda code=code: solve(code, x, times, 0.0, given) for code in codes.values()]
    *ours, theirs = turns([*works, lsoda], repeats)
    per_member = theirs / len(few) * 1e6
    for name, seconds in zip(codes, ours, strict=True):
        mine = seconds / members * 1e6
        print(f"  HIRES, 101 times, 1e-6, {name}: {mine:.2f} us per member; LSODA {per_member:.0f} us, {per_member / mine:.0f} times")


def compile_times() -> None:
    """From equations to callable code of both methods, for chains of states with an exponential each."""
    for states in (2, 8, 20, 60, 100, 200):
        eq = chain(states)
        began = time.process_time()
        code = build(eq, "explicit54", "auto")
        compile_for(code, Processor.here())
        print(f"  {states:4} states: {time.process_time() - began:.2f} s to callable code, {len(code.text) // 1000} thousand characters")


def main() -> None:
    """Print everything."""
    members, repeats = (int(text) for text in (*sys.argv[1:], *("1024", "15")[len(sys.argv) - 1 :]))
    hires(members, min(repeats, 5))
    compile_times()
    choice(members, repeats)


if __name__ == "__main__":
    main()
