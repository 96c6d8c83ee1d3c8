"""Results made by hand for the tests of the store and of the report: every number in them is invented."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import replace
from datetime import UTC, datetime
from pathlib import Path
from types import SimpleNamespace
from typing import Any, cast

import numpy as np

from uq.analysis.ask import LimitAsked, Quantity
from uq.analysis.finding import Finding, Variable
from uq.inputs.distributions import Lognormal, Normal, Triangular
from uq.inputs.inputs import Input, Inputs
from uq.solve.batch import Status
from uq.store.described import within
from uq.store.facts import RunFacts
from uq.store.folder import write_result
from uq.store.open import open_result
from uq.store.result import Result
from uq.study.study import Scenario, Study
from uq.units import Units

TIMES = np.linspace(0.0, 720.0, 13)
BY = np.array([120.0, 360.0, 720.0])
LEVELS = (0.05, 0.25, 0.5, 0.75, 0.95)
INPUTS = Inputs(
    (
        Input(
            "activation", "Activation energy", "kJ/mol", Normal(mean=98.0, sd=1.2), "Three runs, lab book 12", "knowledge", 3, "kinetics"
        ),
        Input("k0", "Frequency factor", "1/min", Lognormal(median=6.0e12, gsd=1.3), "", "knowledge", 1, "kinetics"),
        Input("UA_off", "Heat loss, cooling off", "kJ/min/K", Triangular(low=2, mode=4, high=9), "", "variability"),
        Input("T_start", "Tank temperature at the start", "K", Normal(mean=303.0, sd=1.5), "Logged, last winter", "", 4),
    )
)


def made_study(**changes: Any) -> Study:
    """A study as the store sees it."""
    told: dict[str, Any] = {
        "name": "hold-tank",
        "text": 'schema = 1\r\ntitle = "Cooling outage at a hold tank"  # °C\n',
        "files": {"ambient.csv": b"hour;air\n0;291\n", "more/measured.csv": b"\x00\xff"},
        "changes": {"plan.seed": 11},
        "fingerprint": "7f3a" * 16,
        "title": "Cooling outage at a hold tank",
        "about": "How likely is the alarm temperature passed within twelve hours?",
        "caution": "Screening estimate with invented data. Relief sizing follows the code in force and a licensed engineer.",
        "time": SimpleNamespace(unit="min"),
        "times": SimpleNamespace(solved=TIMES, grid=np.arange(len(TIMES))),
        "plan": SimpleNamespace(
            ask=("bands", "limits", "outcomes", "ranking"),
            failures="bound",
            confidence=0.95,
            quantiles=LEVELS,
            members=16384,
            accuracy=1e-6,
            precision=None,
        ),
        "scenarios": (),
        "repeats": (),
        "own_units": Units(),
        "warnings": ("the parameter `spare` is used by nothing",),
        "remarks": (),
        "states": (SimpleNamespace(name="T", unit="K", over=()), SimpleNamespace(name="x", unit="1", over=())),
        "inputs": INPUTS,
        "watched": (Quantity("T", "Tank temperature", "K", "K"), Quantity("x", "Fraction decomposed", "1", "1")),
        "outcome_quantities": (Quantity("peak_T", "Highest temperature", "K", "K"),),
        "limits_asked": (LimitAsked("alarm_passed", "Alarm temperature passed", "T > alarm", (120.0, 360.0, 720.0), 0.01),),
    }
    return cast(Study, SimpleNamespace(**{**told, **changes}))


def made_facts(**changes: Any) -> RunFacts:
    """The facts of a run that went well."""
    facts = RunFacts(
        seed=11,
        members_asked=16384,
        members=16384,
        members_failed=0,
        solves=49152,
        solves_failed=0,
        replicates=16,
        wall_time=41.23,
        finished=datetime(2026, 12, 1, 22, 41, 3, tzinfo=UTC),
        method="explicit54",
        accuracy=1e-6,
        threads=2,
        scales={"T": 349.0, "x": 0.7},
        versions={"uq": "0.1.0", "numpy": "2.4.0", "python": "3.11.9"},
        processor="avx2 fma",
        command="uq run hold-tank.toml",
    )
    return replace(facts, **changes)


def estimate(name: str, dims: tuple[str, ...], value: Any, half: Any, unit: str = "1") -> dict[str, Variable]:
    """An estimate with its interval."""
    value = np.asarray(value, dtype=float)
    ends = {name: value, f"{name}_low": value - half, f"{name}_high": value + half}
    return {each: Variable(dims, data, each.replace("_", " "), unit) for each, data in ends.items()}


def band(name: str, unit: str, level: float, width: float) -> Finding:
    """A band that widens with time."""
    growth = np.linspace(0.1, 1.0, len(TIMES))
    scores = np.array([-1.645, -0.674, 0.0, 0.674, 1.645])
    quantiles = level + np.multiply.outer(scores, width * growth)
    variables = {
        **estimate("quantiles", ("quantile", "time"), quantiles, 0.02 * width, unit),
        **estimate("mean", ("time",), level + 0.0 * growth, 0.01 * width, unit),
        **estimate("sd", ("time",), width * growth, 0.01 * width, unit),
        "nominal": Variable(("time",), level + 0.05 * width * growth, "all inputs at their median", unit),
        "simultaneous": Variable(
            ("side", "time"), np.stack([level - 3 * width * growth, level + 3 * width * growth]), "whole curves", unit
        ),
    }
    return Finding(f"bands/{name}", variables)


def limit(ever_by: Sequence[float], half: Sequence[float], verdict: str = "not met") -> Finding:
    """A limit with probabilities at 120, 360 and 720 min."""
    ever = np.interp(TIMES, [0, 120, 360, 720], [0, *ever_by])
    variables = {
        "by": Variable(("by",), BY, "time by which", "min"),
        **estimate("ever_by", ("by",), ever_by, np.array(half)),
        **estimate("ever", ("time",), ever, 0.001),
        **estimate("now", ("time",), 0.5 * ever, 0.001),
        **estimate("first_time", ("quantile",), [61.0, 204.0, 333.0, 480.0, 680.0], 11.0, "min"),
    }
    return Finding("limits/alarm_passed", variables, {"verdict": verdict})


def ranking(name: str, totals: Sequence[float], half: float = 0.03, along: str = "") -> Finding:
    """A ranking of the four inputs: of an outcome, along "time" of a course with its overall shares, along "by" of a limit."""
    total = np.array(totals)
    kinds = (("first", 0.8 * total), ("total", total))
    variables: dict[str, Variable] = {}
    for kind, share in kinds:
        if not along:
            variables |= estimate(kind, ("input",), share, half)
            continue
        course = np.repeat(share[:, None], len(TIMES), axis=1)
        course[:, 0] = np.nan
        variables |= estimate(kind, ("input", "time"), course, half)
        if along == "time":
            variables |= estimate(f"{kind}_overall", ("input",), share, half)
        else:
            variables["by"] = Variable(("by",), BY, "time by which", "min")
            variables |= estimate(f"{kind}_by", ("input", "by"), np.multiply.outer(share, [0.7, 0.9, 1.0]), half)
    return Finding(f"ranking/{name}", variables)


def members(count: int = 6) -> tuple[Finding, ...]:
    """A sample of members."""
    status = np.zeros(count, dtype=np.int8)
    status[-1] = Status.blew_up
    here = ("realization",)
    watched = np.outer(np.arange(1.0, count + 1), TIMES)
    watched[-1, 5:] = np.nan
    return (
        Finding(
            "members",
            {"realization": Variable(here, np.arange(count), "member"), "status": Variable(here, status, "how the member ended")},
        ),
        Finding("members/watched", {"T": Variable((*here, "time"), watched, "Tank temperature", "K")}),
        Finding("members/inputs", {"k0": Variable(here, np.linspace(5e12, 7e12, count), "Frequency factor", "1/min")}),
        Finding("members/outcomes", {"peak_T": Variable(here, watched.max(axis=1), "Highest temperature", "K")}),
    )


def failures(counts: dict[Status, int]) -> Finding:
    """How many solves ended in which way."""
    status = np.array([each.value for each in Status], dtype=np.int8)
    count = np.array([counts.get(each, 0) for each in Status])
    variables = {
        "status": Variable(("status",), status, "how members ended"),
        "count": Variable(("status",), count, "solves that ended so"),
    }
    return Finding("failures", variables)


def made_findings() -> tuple[Finding, ...]:
    """The answers to everything that the study asks."""
    peak = Finding(
        "outcomes/peak_T",
        {
            **estimate("quantiles", ("quantile",), [304.1, 310.2, 318.0, 330.4, 349.8], [0.05, 0.08, 0.12, 0.3, 1.1], "K"),
            **estimate("mean", (), 320.3, 0.2, "K"),
            **estimate("sd", (), 14.2, 0.3, "K"),
            **estimate("missing", (), 0.0, 0.0),
        },
    )
    return (
        band("T", "K", 320.0, 8.0),
        band("x", "1", 0.3, 0.05),
        limit((0.0031, 0.0082, 0.0148), (0.0005, 0.0008, 0.0010)),
        peak,
        ranking("T", (0.52, 0.17, 0.15, 0.05), along="time"),
        ranking("x", (0.40, 0.38, 0.15, 0.005), along="time"),
        ranking("peak_T", (0.52, 0.17, 0.15, 0.05)),
        ranking("alarm_passed", (0.62, 0.30, 0.28, 0.15), half=0.05, along="by"),
        *members(),
        failures({Status.ok: 49152}),
        Finding(
            "solver", {"steps": Variable((), np.array(2_000_000), "accepted steps"), "rejections": Variable((), np.array(7), "rejected")}
        ),
    )


def made_result(
    folder: Path, study: Study | None = None, findings: Sequence[Finding] | None = None, facts: RunFacts | None = None
) -> Result:
    """Written and read again."""
    write_result(folder, study or made_study(), made_findings() if findings is None else findings, facts or made_facts())
    return open_result(folder)


def scenario_study(**changes: Any) -> Study:
    """A study with one scenario."""
    early = made_study(changes={"plan.seed": 11, "parameters.UA_off": 5.5})
    return made_study(scenarios=(Scenario("early", "Operator in 4 min", early),), **changes)


def scenario_findings(difference: float = -0.0020, half: float = 0.0005) -> tuple[Finding, ...]:
    """What the scenario came to, and how far that is from the study."""
    said = {"draws": "paired", "intervals": "intervals from paired replicates"}
    by = {"by": Variable(("by",), BY, "time by which", "min")}
    ever = estimate("ever_by", ("by",), [difference / 4, difference / 2, difference], half)
    quantiles = estimate("quantiles", ("quantile",), [-1.1, -1.3, -1.6, -2.0, -3.1], 0.2, "K")
    peak = next(each for each in made_findings() if each.group == "outcomes/peak_T")
    passed = limit((0.0027, 0.0071, 0.0128), (0.0005, 0.0008, 0.0010))
    return (
        *within(
            "scenarios/early",
            (passed, peak, ranking("T", (0.5, 0.2, 0.1, 0.0), along="time")),
        ),
        *within("scenarios/early", members()),
        *within("differences/early", (Finding("limits/alarm_passed", {**by, **ever}, said), Finding("outcomes/peak_T", quantiles, said))),
    )


def measured(inside: float = 1.0, low: float = 2 / 3, high: float = 1.0) -> Finding:
    """Three observations of a temperature."""
    shown = ("observation",)
    share = {"share_inside": inside, "share_inside_low": low, "share_inside_high": high}
    return Finding(
        "measured/T",
        {
            "value": Variable(shown, np.array([312.0, 320.0, 331.0]), "measured: Tank temperature", "K"),
            "time_measured": Variable(shown, np.array([60.0, 120.0, 120.0]), "when it was measured", "min"),
            "sd": Variable(shown, np.full(3, 0.5), "standard deviation of the measurement", "K"),
            **{name: Variable((), np.array(value), "share", "1", {"share": 0.9}) for name, value in share.items()},
        },
    )


def shapley(name: str, effects: Sequence[float], half: float = 0.03) -> Finding:
    """A ranking of an outcome with dependent inputs."""
    effect = np.array(effects)
    reason = {"reason": "not given because inputs depend on each other"}
    missing = {each: Variable(("input",), np.full(len(effect), np.nan), each, "1", reason) for each in ("total", "total_low", "total_high")}
    groups = {"group": Variable(("group",), np.array(["kinetics"]), "inputs ranked together")}
    return Finding(
        f"ranking/{name}",
        {
            **estimate("first", ("input",), 0.9 * effect, half),
            **missing,
            **estimate("shapley", ("input",), effect, half),
            **groups,
            **estimate("shapley_group", ("group",), [effect[:2].sum()], half),
        },
    )


def precision_rounds() -> Finding:
    """Two rounds of one number."""
    rounds = {
        "members": Variable(("round",), np.array([8192, 16384]), "members so far"),
        "by": Variable(("by",), BY, "time by which", "min"),
    }
    return Finding("precision/limits/alarm_passed", {**rounds, **estimate("ever_by", ("round", "by"), np.full((2, 3), 0.01), 0.001)})
