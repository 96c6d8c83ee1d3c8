"""What is kept of a run besides its findings: counts, times, versions, settings of the solver."""

from __future__ import annotations

import math
import platform
from collections.abc import Mapping
from dataclasses import dataclass, field
from datetime import datetime
from importlib.metadata import PackageNotFoundError, version

# Everything that touches a number, by distribution name; uq and python come on top.
NUMERIC = ("numpy", "scipy", "numba", "llvmlite")


# What the methods of the solver are called in words.
METHODS = {
    "explicit54": "explicit Runge-Kutta pair 5(4)",
    "explicit853": "explicit Runge-Kutta pair 8(5,3)",
    "rosenbrock5": "Rosenbrock method of order 5",
    "explicit54 rosenbrock5": "explicit Runge-Kutta pair 5(4), Rosenbrock method of order 5 where stiff",
    "explicit853 rosenbrock5": "explicit Runge-Kutta pair 8(5,3), Rosenbrock method of order 5 where stiff",
}


@dataclass(frozen=True)
class Counts:
    """Of a scenario: A and B members and how many of them failed, and the same of all its solves, those for the ranking counted."""

    members: int
    members_failed: int
    solves: int
    solves_failed: int


@dataclass(frozen=True)
class PrecisionReached:
    """Whether the precision asked was reached, or what ended the run before: "members", "solves", "minutes" that it may spend, "deadline".

    solves_needed: all solves after which it is expected, nan where nobody can say; unknown: the variables ("ranking/L total_by") of
    which nothing can be foretold. solves_allowed: those that it may spend, all scenarios counted; None where they are not bounded.
    """

    reached: bool
    stopped: str = ""
    solves_needed: float = math.nan
    unknown: tuple[str, ...] = ()
    solves_allowed: int | None = None


@dataclass(frozen=True)
class RunFacts:
    """The facts of one run.

    seed: of the design, as used. members_asked, members, members_failed: base rows (A and B, all replicates) wanted (with a precision the
    most that may be used, None where that is not said), solved in whole rounds (failed ones counted), failed. solves, solves_failed: the
    same with the mixed rows of the ranking. wall_time in seconds, finished with its time zone. scales: absolute tolerance of a state =
    accuracy x scale, by state; fell_back: the states whose scale was 0.
    seconds_per_solve: of one core, as measured. versions: see `versions`. processor: its features, as text. command: what was called,
    for the history; earlier: the history of the result that was extended. cluster: where it was solved, "" for threads of one process.
    stopped: "deadline" where the run was stopped before it had all its members; "" where it came to its end. scenarios: counts by name of
    scenario; all others here are of the study itself. precision: where one was asked.
    """

    seed: int
    members_asked: int | None
    members: int
    members_failed: int
    solves: int
    solves_failed: int
    replicates: int
    wall_time: float
    finished: datetime
    method: str
    accuracy: float
    threads: int = 1
    seconds_per_solve: float = 0.0
    scales: Mapping[str, float] = field(default_factory=dict)
    fell_back: tuple[str, ...] = ()
    versions: Mapping[str, str] = field(default_factory=dict)
    processor: str = ""
    command: str = ""
    earlier: str = ""
    scenarios: Mapping[str, Counts] = field(default_factory=dict)
    precision: PrecisionReached | None = None
    cluster: str = ""
    stopped: str = ""


def versions(uq_version: str) -> dict[str, str]:
    """Versions of everything that touches numbers, by name; asks the installed packages, imports none of them."""
    found = {"uq": uq_version, "python": platform.python_version()}
    for name in NUMERIC:
        try:
            found[name] = version(name)
        except PackageNotFoundError:
            found[name] = "not installed"
    return found


def method_words(method: str) -> str:
    """The solver's method in words."""
    return METHODS.get(method, method)
