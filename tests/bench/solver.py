"""How fast members are solved, as ratios within one run: against scipy's LSODA and against hand-written scalar C with the same pair.

Run from the repository: python -m tests.bench.solver [members] [repeats]. One core; prints the best and the median of the repeats.
"""

from __future__ import annotations

import ctypes
import platform
import shutil
import statistics
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

import llvmlite
import llvmlite.binding as llvm
import numba
import numpy as np
import scipy
from scipy.integrate import solve_ivp

from tests.solver_models import compiled, equations, names, predator_prey, predator_prey_inputs, settings
from uq.model.build import build
from uq.model.code import Equations
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve

HERE = Path(__file__).parent
SCALES = np.array([20.0, 15.0])
ACCURACY = 1e-6
Times = np.ndarray


def with_exponentials() -> Equations:
    """Predator-prey with two exponentials in each rate."""
    a, b, c, d, x0, y0, x, y = names("a b c d x0 y0 x y")
    first = a * x * (-0.01 * x).exp() - b * x * y * (-0.02 * y).exp()
    second = -c * y * (-0.01 * y).exp() + d * x * y * (-0.02 * x).exp()
    return equations("a b c d x0 y0", "x y", [x0, y0], [first, second])


def plain_rates(t: float, s: np.ndarray, p: np.ndarray) -> list[float]:
    """Predator-prey for scipy."""
    x, y = s
    return [p[0] * x - p[1] * x * y, -p[2] * y + p[3] * x * y]


def exponential_rates(t: float, s: np.ndarray, p: np.ndarray) -> list[float]:
    """The variant for scipy."""
    x, y = float(s[0]), float(s[1])
    e = np.exp
    return [p[0] * x * e(-0.01 * x) - p[1] * x * y * e(-0.02 * y), -p[2] * y * e(-0.01 * y) + p[3] * x * y * e(-0.02 * x)]


CASES = (("predator-prey", predator_prey, plain_rates, 0), ("with two exp per rate", with_exponentials, exponential_rates, 1))


def timed(work: Callable[[], object], repeats: int) -> list[float]:
    """Wall times of repeats, in seconds."""
    return turns([work], repeats)[0]


def turns(works: list[Callable[[], object]], repeats: int) -> list[list[float]]:
    """Wall times of repeats of several works that take turns, so that a busy machine is busy for all of them."""
    found: list[list[float]] = [[] for _ in works]
    for _ in range(repeats):
        for work, seconds in zip(works, found, strict=True):
            began = time.perf_counter()
            work()
            seconds.append(time.perf_counter() - began)
    return found


def scalar(variant: int) -> ctypes.CDLL | None:
    """The C program, compiled for this machine; None where there is no gcc."""
    if shutil.which("gcc") is None:
        return None
    library = Path(tempfile.mkdtemp()) / f"scalar{variant}.so"
    order = ["gcc", "-O3", "-march=native", f"-DRATES={variant}", "-shared", "-fPIC", "-o", library, HERE / "solver_scalar.c", "-lm"]
    subprocess.run(list(map(str, order)), check=True)
    return ctypes.CDLL(str(library))


def run_scalar(library: ctypes.CDLL, x: np.ndarray, times: Times, out: np.ndarray) -> int:
    """All members by the C program; returns its attempts."""
    library.solve_all.restype = ctypes.c_long
    tolerances = ACCURACY * SCALES
    where = [ctypes.c_void_p(a.ctypes.data) for a in (x, times, tolerances, out)]
    counts = ctypes.c_long(len(x)), ctypes.c_long(len(times))
    return int(library.solve_all(counts[0], where[0], counts[1], where[1], ctypes.c_double(ACCURACY), where[2], where[3]))


def report(what: str, seconds: list[float], members: int, ours: list[float], our_members: int) -> None:
    """Print microseconds per member, and the ratio to ours, by the best and by the median of the turns."""
    best, middle = min(seconds) / members * 1e6, statistics.median(seconds) / members * 1e6
    ratios = best / (min(ours) / our_members * 1e6), middle / (statistics.median(ours) / our_members * 1e6)
    print(f"  {what:28} {best:9.2f} best {middle:9.2f} median us per member; {ratios[0]:7.2f} and {ratios[1]:7.2f} times uq")


def compare(case: tuple, times: Times, members: int, repeats: int) -> None:
    """One model, one set of output times."""
    name, make, rates, variant = case
    x, given = predator_prey_inputs(members), settings(2, ACCURACY, scales=SCALES)
    code, few = compiled(make()), x[:20]
    print(f"{name}, {len(times)} output times, {members} members")
    batch = solve(code, x, times, 0.0, given)

    def lsoda() -> None:
        for row in few:
            solve_ivp(rates, (0.0, times[-1]), row[4:], method="LSODA", t_eval=times, rtol=ACCURACY, atol=ACCURACY * SCALES, args=(row,))

    works: dict[str, Callable[[], object]] = {"uq": lambda: solve(code, x, times, 0.0, given), "scipy solve_ivp LSODA": lsoda}
    if "+avx2" in Processor.here().features:
        older = compile_for(build(make()), Processor("x86-64-v3", ""))
        works["uq, code for AVX2"] = lambda: solve(older, x, times, 0.0, given)
    library = scalar(variant)
    if library is not None:
        out = np.empty((members, 2, len(times)))
        attempts = run_scalar(library, x, times, out) / float(np.sum(batch.steps + batch.rejections, dtype=np.int64))
        print(f"  attempts of C / attempts of uq {attempts:.3f}; largest difference {abs(out - batch.values).max():.1e}")
        works["scalar C"] = lambda: run_scalar(library, x, times, out)
    seconds = dict(zip(works, turns(list(works.values()), repeats), strict=True))
    for what, found in seconds.items():
        report(what, found, len(few) if "LSODA" in what else members, seconds["uq"], members)


def compile_times() -> None:
    """From equations to callable code, for chains of states with an exponential each."""
    for states in (2, 10, 50, 100):
        eq = chain(states)
        seconds = timed(lambda eq=eq: compile_for(build(eq), Processor.here()), 3)
        print(f"  {states:4} states: {min(seconds):.3f} s to callable code, {len(build(eq).text) // 1000} thousand characters")


def chain(states: int) -> Equations:
    """A chain of tanks with an Arrhenius term in each."""
    leaves = names("k x0 " + " ".join(f"s{i}" for i in range(states)))
    k, x0, x = leaves[0], leaves[1], leaves[2:]
    rates = [k * (x[i - 1] - x[i]) - x[i] * (-1.0 / (1.0 + x[i] * x[i])).exp() if i else -k * x[0] for i in range(states)]
    return equations("k x0", " ".join(f"s{i}" for i in range(states)), [x0] * states, rates)


def main() -> None:
    """Print everything."""
    members, repeats = (int(text) for text in (*sys.argv[1:], *("20000", "7")[len(sys.argv) - 1 :]))
    versions = [f"{module.__name__} {module.__version__}" for module in (np, scipy, numba, llvmlite)]
    print(f"{platform.platform()}; processor {llvm.get_host_cpu_name()}; Python {platform.python_version()}, {', '.join(versions)}")
    for case in CASES:
        for times in (np.linspace(0, 20, 101), np.array([0.0, 20.0])):
            compare(case, times, members, repeats)
    compile_times()


if __name__ == "__main__":
    main()
