"""Stiff members: speed against scipy's LSODA, the choice against either fixed method, time to compile.

Run from the repository: python -m tests.bench.stiff [members] [repeats]. One core; medians of processor times of repeats in turn.
"""

from __future__ import annotations

import sys
import time
from collections.abc import Callable

import numpy as np
from scipy.integrate import solve_ivp

from tests.bench.held_out import HELD_OUT
from tests.bench.solver import chain
from tests.solver_models import settings
from tests.stiff_models import E5, HIRES, OREGO, ROBERTSON, VAN_DER_POL, Problem
from uq.lang.derivative import derivative
from uq.lang.graph import Graph
from uq.model.build import build
from uq.model.choose import method_for
from uq.model.code import Solver
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve
from uq.study.read import parse_study

HEAD = """
schema = 1
[time]
stop = 10
points = 11
[parameters]
k = { uniform = { low = 1, high = 2 } }
"""
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


def turns(works: list[Callable[[], object]], repeats: int) -> list[list[float]]:
    """Processor times of repeats of works that take turns; each once before it is timed, so that caches hold its own things."""
    found: list[list[float]] = [[] for _ in works]
    for _ in range(repeats):
        for work, seconds in zip(works, found, strict=True):
            work()
            began = time.process_time()
            work()
            seconds.append(time.process_time() - began)
    return found


def work_of(problem: Problem, accuracy: float, solver: Solver, members: int) -> Callable[[], object]:
    """Solving of members that differ a little."""
    code = compile_for(build(problem.equations(), method_for(accuracy), solver), Processor.here())
    steps = MOST_STEPS if solver == "explicit" else 100_000
    given = settings(problem.states, accuracy, scales=np.array(problem.scales), max_steps=steps)
    x = problem.row() * (1.0 + 1e-3 * np.linspace(0.0, 1.0, members)[:, None])
    return lambda: solve(code, x, np.array([problem.stop]), 0.0, given)


def choice(problems: tuple[Problem, ...], members: int, repeats: int) -> None:
    """`auto` beside the better fixed choice: medians of ratios, turn by turn, to the method that is better by its median."""
    found = {}
    for problem in problems:
        for accuracy in (1e-4, 1e-6, 1e-8):
            works = [work_of(problem, accuracy, solver, members) for solver in SOLVERS]
            failed = bool(np.any(works[2]().status))  # type: ignore[attr-defined]
            auto, *fixed = np.array(turns(works[:2] if failed else works, repeats))
            better = min(fixed, key=lambda each: float(np.median(each)))
            ratio = found[f"{problem.name} at {accuracy:g}"] = float(np.median(auto / better))
            middles = ", ".join(f"{1e6 * np.median(each) / members:7.2f}" for each in (auto, *fixed))
            print(f"  {problem.name:18} {accuracy:6g}: {middles} us; auto over the better of both {ratio:.2f}", flush=True)
    over = {what: ratio for what, ratio in found.items() if ratio > 1.1}
    mean = np.exp(np.mean(np.log(list(found.values()))))
    print(f"  {len(found)} cases, geometric mean {mean:.2f}; above 1.10: " + ", ".join(f"{what} {r:.2f}" for what, r in over.items()))


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
    *ours, theirs = np.array(turns([*works, lsoda], repeats)) * 1e6
    for name, seconds in zip(codes, np.array(ours) / members, strict=True):
        ratio, least = np.median(theirs / len(few) / seconds), theirs.min() / len(few) / seconds.min()
        print(f"  HIRES, 101 times, 1e-6, {name}: {np.median(seconds):.2f} us per member; LSODA {np.median(theirs) / len(few):.0f} us")
        print(f"    {ratio:.0f} times by the median of turns, {least:.0f} times by the least times")


def differentiated() -> None:
    """Sixteen terms one within the other."""
    graph = Graph()
    node = graph.name("x")
    for _ in range(16):
        node = graph.apply("*", graph.apply("exp", graph.apply("neg", node)), graph.apply("+", node, graph.apply("sin", node)))
    began = time.process_time()
    slope = derivative(graph, node, "x")
    print(f"  derivative of sixteen nested terms: {1e3 * (time.process_time() - began):.2f} ms, {len(graph.order((slope,)))} nodes")


def text_to_code() -> None:
    """From the text of a study to callable code: kinetics of 20 and of 60 species, 96 cells of a row."""
    for name, text in (("20 species", kinetics(20)), ("60 species", kinetics(60)), ("96 cells of two states", cells(96))):
        began = time.process_time()
        study = parse_study(text)
        read = time.process_time() - began
        compile_for(build(study.equations, "explicit54", "auto"), Processor.here())
        print(f"  {name}: {len(study.states)} declared, text to code {time.process_time() - began:.2f} s, of which reading {read:.2f} s")


def kinetics(species: int) -> str:
    """Every species meets its neighbour, and becomes the one after that."""
    rows = []
    for i in range(species):
        back, far = (i - 1) % species, (i - 2) % species
        rate = f"-k * s{i} * s{(i + 1) % species} - 0.1 * s{i} + k * s{far} * s{back} + 0.1 * s{back}"
        rows.append(f'[states.s{i}]\nstart = {1.0 + 0.01 * i}\nrate = "{rate}"\n')
    return HEAD + "".join(rows)


def cells(number: int) -> str:
    """Cells in a row with a temperature and a charge each, that heat their neighbours."""
    heat = "k * (T[cell-1] + T[cell+1] - 2 * T) + exp(-1 / T) * q"
    return (
        f'{HEAD}[index]\ncell = {number}\n[states.T]\nover = "cell"\nstart = 1\nedge = "mirror"\nrate = "{heat}"\n'
        '[states.q]\nover = "cell"\nstart = 1\nrate = "-exp(-1 / T) * q"\n'
    )


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
    hires(members, repeats)
    differentiated()
    text_to_code()
    compile_times()
    print("problems that the rule of change was tuned on")
    choice(PROBLEMS, members, repeats)
    print("problems that it was not tuned on")
    choice(HELD_OUT, members, repeats)


if __name__ == "__main__":
    main()
