"""Members solved by uq beside general-purpose compiled ODE libraries, at equal error reached, on one core, compilation apart.

Run from the repository, with the optional extra `bench` installed: python -m tests.bench.libraries [members] [repeats] [model ...]. A
library that is not installed is left out. Every method is timed at several tolerances; between these, time at the error of uq is
interpolated in logarithms. Errors: over output times and states the largest |difference| over the state's scale, the median of some
members.
"""

from __future__ import annotations

import os
import platform
import sys
import time
from collections.abc import Callable
from dataclasses import dataclass
from datetime import UTC, datetime
from importlib.metadata import PackageNotFoundError, version
from pathlib import Path

import numpy as np
from scipy.integrate import solve_ivp

from tests.bench.library_calls import LIBRARIES, Model, Unsuited, plain
from tests.bench.library_models import MODELS
from tests.solver_models import settings
from uq.model.build import build
from uq.model.choose import method_for
from uq.solve.compile import Processor, compile_for
from uq.solve.solve import solve

CHECKED = 4
TOLERANCES = (1e-4, 1e-5, 1e-6, 1e-7, 1e-8, 1e-9, 1e-10, 1e-11)
PACKAGES = ("numpy", "scipy", "numba", "llvmlite", "numbalsoda", "CyRK", "casadi", "scikit-sundae", "pydiffsol", "heyoka", "diffrax", "jax")
# No single run of a method takes longer than this; looser tolerances come first.
SECONDS = 6.0


@dataclass(frozen=True)
class Point:
    """A tolerance, the error reached, seconds per member."""

    tolerance: float
    error: float
    seconds: float


def reference(model: Model, x: np.ndarray) -> np.ndarray:
    """Values [member, state, time] of the first members by scipy's implicit Radau (stiff) or DOP853, checked by its LSODA."""
    both, rates = [], plain(model)
    relative = 1e-11 if model.stiff else 3e-13
    for method in ("Radau" if model.stiff else "DOP853", "LSODA"):
        found = []
        for row in x[:CHECKED]:
            span, given = (0.0, float(model.times[-1])), {"rtol": relative, "atol": relative / 3 * np.array(model.scales)}
            run = solve_ivp(rates, span, model.starts(row), method=method, t_eval=model.times, args=(row.tolist(),), **given)
            found.append(run.y)
        both.append(np.array(found))
    apart = np.max(np.abs(both[0] - both[1]) / np.array(model.scales)[:, None])
    print(f"  two references differ by at most {apart:.1e} of the scales")
    return both[0]


def measured(work: Callable[[], np.ndarray], exact: np.ndarray, scales: np.ndarray, repeats: int) -> tuple[float, float]:
    """The error reached and the least processor time."""
    seconds = float("inf")
    values = work()
    for _ in range(repeats):
        began = time.process_time()
        values = work()
        seconds = min(seconds, time.process_time() - began)
        if seconds > SECONDS / repeats:
            break
    errors = np.max(np.abs(values[:CHECKED] - exact) / scales[:, None], axis=(1, 2))
    return float(np.median(errors)), seconds


def curve(make: Callable[[float], Callable[[], np.ndarray]], exact: np.ndarray, model: Model, members: int, repeats: int) -> list[Point]:
    """Work and precision of a method; a tolerance at which it gives up is left out, and it ends where a run takes too long."""
    found = []
    for tolerance in TOLERANCES:
        try:
            error, seconds = measured(make(tolerance), exact, np.array(model.scales), repeats)
        except (RuntimeError, ValueError) as why:
            print(f"    (at {tolerance:g}: {str(why).splitlines()[-1][:100]})")
            continue
        found.append(Point(tolerance, error, seconds / members))
        if seconds > SECONDS:
            break
    return found


def at_error(points: list[Point], error: float) -> float:
    """Seconds per member at an error: interpolated, the nearest point within a factor of two of the ends, else not a number."""
    known = sorted((point for point in points if np.isfinite(point.error) and point.error > 0), key=lambda point: point.error)
    best: list[Point] = []  # from loose to tight only what no other point beats in both
    for point in known:
        while best and best[-1].seconds <= point.seconds and best[-1].error <= point.error:
            break
        else:
            best.append(point)
    if not best or error < best[0].error / 2 or error > 1e3 * best[-1].error:
        return float("nan")
    logs = np.log([[point.error, point.seconds] for point in best])
    return float(np.exp(np.interp(np.log(error), logs[:, 0], logs[:, 1])))


def ours(model: Model, x: np.ndarray) -> Callable[[float], Callable[[], np.ndarray]]:
    """uq at an accuracy."""

    def make(accuracy: float) -> Callable[[], np.ndarray]:
        code = compile_for(build(model.equations, method_for(accuracy), "auto"), Processor.here())
        given = settings(len(model.scales), accuracy, scales=np.array(model.scales))
        return lambda: solve(code, x, model.times, 0.0, given).values

    return make


def compare(model: Model, members: int, repeats: int) -> None:
    """One model: every method at the errors that uq reaches at the accuracies asked for, and at errors asked for."""
    print(f"{model.name}: {members} members, {len(model.times)} output times to {model.times[-1]:g}")
    x = model.inputs(members)
    exact = reference(model, x)
    mine = curve(ours(model, x), exact, model, members, repeats)
    wanted = [*(next(point.error for point in mine if point.tolerance == accuracy) for accuracy in model.accuracies), *model.errors]
    print("    errors " + ", ".join(f"{error:.1e}" for error in wanted))
    base = [at_error(mine, error) for error in wanted]
    print(f"    {'uq':28}" + "".join(f"{1e6 * seconds:10.2f} us" + 8 * " " for seconds in base), flush=True)
    for name, library in LIBRARIES.items():
        few = x[: library.members(members)]
        try:
            points = curve(lambda tolerance, few=few, library=library: library.make(model, few, tolerance), exact, model, len(few), 2)
        except Unsuited:
            continue
        except ImportError as why:
            print(f"    {name:28} left out: {why}")
            continue
        seconds = [at_error(points, error) for error in wanted]
        pairs = zip(seconds, base, strict=True)
        said = (f"{1e6 * each:10.1f} us {each / own:6.1f}x" if np.isfinite(each) else f"{'not reached':>21}" for each, own in pairs)
        print(f"    {name:28}" + "".join(said), flush=True)


def machine() -> str:
    """What is measured on, without any path."""
    lines = Path("/proc/cpuinfo").read_text(encoding="utf-8").splitlines() if Path("/proc/cpuinfo").exists() else []
    kind = next((line.partition(":")[2].strip() for line in lines if line.startswith("model name")), platform.processor())
    said = []
    for name in PACKAGES:
        try:
            said.append(f"{name} {version(name)}")
        except PackageNotFoundError:
            said.append(f"{name} not installed")
    return f"{datetime.now(UTC):%Y-%m-%d}; {kind}, {os.cpu_count()} cores, one used; Python {platform.python_version()}, {', '.join(said)}"


def main() -> None:
    """Print everything."""
    members, repeats = (int(text) for text in (*sys.argv[1:3], *("1024", "5")[len(sys.argv[1:3]) :]))
    if hasattr(os, "sched_setaffinity"):
        os.sched_setaffinity(0, {min(os.sched_getaffinity(0))})  # nobody may use a second core
    print(machine())
    for model in MODELS:
        if model.name in (sys.argv[3:] or [model.name]):
            compare(model, members, repeats)


if __name__ == "__main__":
    main()
