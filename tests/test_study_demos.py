"""The demo studies say what they mean: their equations against the same written by hand, their answers neither 0 nor 1.

Solved here with SciPy's Dormand-Prince pair (solve_ivp, method RK45), all members as one system, so that nothing of uq's solver takes part.
"""

from __future__ import annotations

from functools import cache
from pathlib import Path
from typing import Any

import numpy as np
import pytest
from scipy.integrate import solve_ivp

import uq
from uq.lang.graph import Node
from uq.model.code import Forcing
from uq.study.read import read_study
from uq.study.study import Study

FOLDER = Path(__file__).parent.parent / "configs"
NAMES = ("hold-tank", "orchard-mites", "crane-sway")
MEMBERS = 96
APPLY: dict[str, Any] = {
    "+": np.add,
    "-": np.subtract,
    "*": np.multiply,
    "/": np.divide,
    "**": np.power,
    "neg": np.negative,
    "<": np.less,
    "<=": np.less_equal,
    ">": np.greater,
    ">=": np.greater_equal,
    "and": np.logical_and,
    "or": np.logical_or,
    "not": np.logical_not,
    "where": np.where,
    "max": np.maximum,
    "min": np.minimum,
    "ln": np.log,
    **{name: getattr(np, name) for name in ("exp", "sqrt", "sin", "cos", "abs")},
}


@cache
def demo(name: str) -> Study:
    return read_study(FOLDER / f"{name}.toml")


def evaluate(study: Study, nodes: tuple[Node, ...], leaves: dict[str, Any]) -> list[Any]:
    """The values of nodes, plainly."""
    values: dict[int, Any] = {}
    for node in study.equations.graph.order(nodes):
        if node.op in ("number", "name"):
            values[node.id] = node.value if node.op == "number" else leaves[str(node.value)]
        else:
            values[node.id] = APPLY[node.op](*(values[arg.id] for arg in node.args))
    return [values[node.id] for node in nodes]


def course(forcing: Forcing, time: float) -> float:
    """The value of a forcing, linear between rows or held from each to the next."""
    if forcing.interpolation == "step":
        return forcing.values[max(int(np.searchsorted(forcing.times, time, side="right")) - 1, 0)]
    return float(np.interp(time, forcing.times, forcing.values))


def leaves_at(study: Study, time: float, x: Any, y: Any) -> dict[str, Any]:
    inputs = dict(zip(study.inputs.names, x.T, strict=True))
    forced = {f.name: course(f, time) for f in study.equations.forcings}
    return {**inputs, **dict(zip(study.equations.states, y, strict=True)), **forced, "time": time}


@cache
def solved(name: str) -> tuple[Any, Any, Any, Any]:
    """Inputs [member, input], observed [observed, time, member], conditions [condition, time, member], calls of the rates."""
    study = demo(name)
    x = study.inputs.values(np.random.default_rng(5).random((MEMBERS, len(study.inputs.names))))
    nothing = np.zeros((len(study.equations.states), MEMBERS))
    start = np.array([np.broadcast_to(v, MEMBERS) for v in evaluate(study, study.equations.starts, leaves_at(study, 0.0, x, nothing))])

    def rates(time: float, y: Any) -> Any:
        leaves = leaves_at(study, time, x, y.reshape(start.shape))
        return np.concatenate([np.broadcast_to(v, MEMBERS) for v in evaluate(study, study.equations.rates, leaves)])

    times = study.times.solved
    found = solve_ivp(rates, (study.time.start, study.time.stop), start.ravel(), t_eval=times, rtol=1e-6, atol=1e-6, max_step=times[1] * 50)
    assert found.success
    courses = found.y.reshape(*start.shape, len(times))

    def along(nodes: tuple[Node, ...]) -> Any:
        rows = [
            [np.broadcast_to(v, MEMBERS) for v in evaluate(study, nodes, leaves_at(study, t, x, courses[:, :, i]))]
            for i, t in enumerate(times)
        ]
        return np.array(rows).transpose(1, 0, 2)

    return x, along(study.equations.observed), along(study.equations.conditions), found.nfev


def ever_by(name: str, limit: int) -> list[float]:
    """The share of members that have passed a limit by each of its times."""
    study = demo(name)
    condition = solved(name)[2][limit]
    return [float(condition[study.times.solved <= by].any(axis=0).mean()) for by in study.limits_asked[limit].by]


@pytest.mark.parametrize("name", [*NAMES, "cell-module", "bench-clock", "regional-capital"])
def test_everything_that_a_reviewer_asks_for_is_filled_in(name: str) -> None:
    study = demo(name)
    assert study.warnings == ()
    assert study.title
    assert study.about
    assert "invented" in study.caution
    assert all(state.label for state in study.states)
    for item in study.inputs.items:
        assert item.label != item.name, item.name
        assert item.kind, item.name
        assert item.evidence is not None, item.name
    assert all(quantity.label != quantity.name for quantity in (*study.watched, *study.outcome_quantities))
    assert study.limits
    assert study.outcomes
    assert any(item.source for item in study.inputs.items)


@pytest.mark.parametrize("name", NAMES)
def test_the_explicit_solver_copes_and_values_stay_valid(name: str) -> None:
    study = demo(name)
    _, observed, _, calls = solved(name)
    assert np.isfinite(observed).all()
    assert calls < 6 * 5000, "the slowest member asks for a few thousand steps at most"
    assert (observed[: len(study.watched)].std(axis=2)[:, -1] > 0).all()


def test_hold_tank_against_the_same_by_hand() -> None:
    study = demo("hold-tank")
    leaves = {"q": 190.0, "k0": 7e12, "activation": 98.0, "UA_off": 4.0, "T_start": 303.0, "T": 330.0, "x": 0.25, "ambient": 295.0}
    rate_T, rate_x = evaluate(study, study.equations.rates, leaves)
    k = 7e12 * np.exp(-98.0 / (8.314462618e-3 * 330.0))
    assert rate_x == pytest.approx(k * 0.75, rel=1e-13)
    assert rate_T == pytest.approx((4000 * 190 * k * 0.75 - 4 * (330 - 295)) / (4000 * 2.1), rel=1e-13)
    # at most the heat of all that can decompose: the temperature is bounded
    assert solved("hold-tank")[1][0].max() < 310 + 220 / 2.1


def test_hold_tank_answers_are_open() -> None:
    passed = ever_by("hold-tank", 0)
    assert 0.01 < passed[-1] < 0.3
    assert passed[0] <= passed[1] <= passed[2]


def test_orchard_mites_against_the_same_by_hand() -> None:
    study = demo("orchard-mites")
    leaves = {
        "speed": 0.015,
        "capacity": 30.0,
        "appetite": 2.5,
        "half": 3.0,
        "decline": 0.06,
        "warmth": 1.0,
        "pest": 5.0,
        "hunter": 0.4,
        "usual": 18.0,
    }
    leaves["yield"] = 0.12
    pest, hunter = evaluate(study, study.equations.rates, leaves)
    growth, eaten = 0.015 * (18 + 1 - 10), 2.5 * 0.4 * 5 / 8
    assert pest == pytest.approx(growth * 5 * (1 - 5 / 30) - eaten, rel=1e-13)
    assert hunter == pytest.approx(0.12 * eaten - 0.06 * 0.4, rel=1e-13)


def test_orchard_mites_answers_are_open() -> None:
    passed = ever_by("orchard-mites", 0)
    assert 0.02 < passed[0] < 0.3 < passed[2] < 0.7
    assert 0 < ever_by("orchard-mites", 1)[0] < passed[2]


def test_crane_sway_against_the_same_by_hand() -> None:
    study = demo("crane-sway")
    leaves = {"hoist": 12.0, "travel": 3.0, "stopping": 2.0, "load": 2000.0, "area": 6.0, "air": 1.2, "angle": 0.3, "turn": 0.1}
    for time, braking, trolley in ((0.5, 1.5, 2.25), (3.0, 0.0, 0.0)):
        turn, twist = evaluate(study, study.equations.rates, {**leaves, "time": time})
        speed = 12 * 0.1 + trolley * np.cos(0.3)
        drag = 1.2 * 6 / 2 / 2000 * speed * abs(speed) / 12
        assert turn == 0.1
        assert twist == pytest.approx((braking * np.cos(0.3) - 9.80665 * np.sin(0.3)) / 12 - drag, rel=1e-13)


def test_crane_sway_answers_are_open_and_angles_are_large() -> None:
    assert 0.02 < ever_by("crane-sway", 0)[-1] < 0.3
    widest = np.abs(solved("crane-sway")[1][0]).max(axis=0)
    assert np.quantile(widest, 0.9) > 0.25


@pytest.mark.parametrize(("name", "least"), [("hold-tank", 0.1), ("orchard-mites", 0.15), ("crane-sway", 0.2)])
def test_several_inputs_matter(name: str, least: float) -> None:
    """Squared rank correlation with the highest value of the first quantity of a limit: two inputs at least above a tenth of the whole."""
    x, observed, _, _ = solved(name)
    peak = observed[1 if name == "crane-sway" else 0].max(axis=0)
    ranks = [np.argsort(np.argsort(column)) for column in (*x.T, peak)]
    squares = np.corrcoef(ranks)[-1, :-1] ** 2
    assert np.sort(squares)[-2] > least / 2, dict(zip(demo(name).inputs.names, squares.round(2), strict=True))


def test_cell_module_against_the_same_by_hand() -> None:
    study = demo("cell-module")
    heats = 16.0 + 0.1 * np.arange(12)
    temperatures, left = 320.0 + 15.0 * np.arange(12)[::-1], np.linspace(0.2, 1.0, 12)
    leaves = {"k0": 1.1e9, "gap": 0.13, "loss": 0.032, "ambient": 22.0, "heater": 34.0, "time": 3.0}
    leaves |= {f"{name}[{i}]": float(v[i]) for name, v in (("heat", heats), ("T", temperatures), ("left", left)) for i in range(12)}
    found = np.array(evaluate(study, study.equations.rates, leaves))
    k = 1.1e9 * np.exp(-90e3 / (8.314462618 * temperatures))
    around = np.concatenate([temperatures[:1], temperatures, temperatures[-1:]])
    watts = heats * 1e3 / 60 * k * left + 0.13 * (around[:-2] + around[2:] - 2 * temperatures) - 0.032 * (temperatures - 295.15)
    watts[0] += 34.0
    assert np.allclose(found[:12], watts * 60 / 62, rtol=1e-12)
    assert np.allclose(found[12:], -k * left, rtol=1e-12)


def cells_by_hand(inputs: dict[str, Any], times: Any) -> Any:
    """The temperatures [cell, time] of one member, by SciPy's LSODA in two parts, with the heater and without."""
    start, rates = np.append(np.full(12, inputs["ambient"] + 273.15), np.ones(12)), []
    for watts in (34.0, 0.0):

        def rate(_: float, y: Any, watts: float = watts) -> Any:
            warm, left = y[:12], y[12:]
            k = inputs["k0"] * np.exp(-90e3 / (8.314462618 * warm))
            around = np.concatenate([warm[:1], warm, warm[-1:]])
            flow = inputs["gap"] * (around[:-2] + around[2:] - 2 * warm) - inputs["loss"] * (warm - inputs["ambient"] - 273.15)
            flow[0] += watts
            return np.append((inputs["heat"] * 1e3 * k * left + 60 * flow) / 62, -k * left)

        rates.append(rate)
    first = solve_ivp(rates[0], (0, 12), start, "LSODA", times[times <= 12], rtol=1e-9, atol=1e-9)
    then = solve_ivp(rates[1], (12, 90), first.y[:, -1], "LSODA", times[times > 12], rtol=1e-9, atol=1e-9)
    return np.concatenate([first.y[:12], then.y[:12]], axis=1)


def test_cell_module_is_that_of_another_solver_and_its_answers_are_open(tmp_path: Path) -> None:
    result = uq.run(demo("cell-module").with_changes({"plan.members": 512, "plan.ask": ["bands", "limits"]}), tmp_path / "out", threads=1)
    assert 0.05 < result.limits["spread"].ever_by.values[-1] < 0.5
    assert np.all(np.diff(result.limits["reached"].ever_by.values[:, -1]) <= 0), "the heat falls off along the row"
    shown = result.members["inputs"]
    for member in range(0, 200, 25):
        inputs = {name: shown[name].values[member] for name in shown}
        apart = result.members["watched"]["T"].values[member] - cells_by_hand(inputs, result["time"].values)
        # A front that rises by hundreds of kelvin in seconds turns an error in its moment into one in kelvin.
        assert np.max(np.abs(apart)) < 1
        assert np.sqrt(np.mean(apart**2)) < 0.03


def clock_by_hand(inputs: dict[str, Any], y: Any) -> Any:
    """The rates of the eleven species, reaction by reaction: the products less the reactants."""
    bromate, bromide, hbro2, hobr, br2, bro2, ce3, ce4, ma, brma, radical = y
    change = dict.fromkeys(("bromate", "bromide", "hbro2", "hobr", "br2", "bro2", "ce3", "ce4", "ma", "brma", "radical"), 0.0)
    for rate, text in (
        (inputs["k1"] * bromate * bromide - 3.2 * hbro2 * hobr, "bromate bromide > hbro2 hobr"),
        (inputs["k2"] * hbro2 * bromide, "hbro2 bromide > hobr hobr"),
        (8e9 * hobr * bromide - 110 * br2, "hobr bromide > br2"),
        (3e3 * hbro2 * hbro2, "hbro2 hbro2 > bromate hobr"),
        (inputs["k5"] * bromate * hbro2 - 4.2e7 * bro2 * bro2, "bromate hbro2 > bro2 bro2"),
        (8e4 * bro2 * ce3 - 8.9e3 * hbro2 * ce4, "bro2 ce3 > hbro2 ce4"),
        (29 * ma * br2, "ma br2 > brma bromide"),
        (inputs["k8"] * ma * ce4, "ma ce4 > radical ce3"),
        (inputs["k9"] * brma * ce4, "brma ce4 > bromide ce3"),
        (3.2e9 * radical * radical, "radical radical > ma"),
        (inputs["k11"] * radical * brma, "radical brma > ma bromide"),
    ):
        before, after = text.split(" > ")
        for name in before.split():
            change[name] -= rate
        for name in after.split():
            change[name] += rate
    return np.array(list(change.values()))


def test_bench_clock_against_the_same_by_hand() -> None:
    study = demo("bench-clock")
    inputs = {"k1": 2.1, "k2": 2.9e6, "k5": 41.0, "k8": 0.24, "k9": 0.1, "k11": 2e4, "cerium": 1e-3}
    y = np.array([0.1, 3e-6, 2e-7, 1e-8, 1e-6, 3e-8, 8e-4, 2e-4, 0.09, 0.03, 1e-9])
    leaves = {**inputs, **dict(zip(study.equations.states, [*y, 3.0], strict=True))}
    found = np.array(evaluate(study, study.equations.rates, leaves))
    expected = clock_by_hand(inputs, y)
    assert found[:11] == pytest.approx(expected, rel=1e-12)
    east, north = np.log(y[1] / 5e-7), np.log(y[7] / 1.5e-4)
    turn = (north * expected[1] / y[1] - east * expected[7] / y[7]) / (east**2 + north**2) / (2 * np.pi)
    assert found[11] == pytest.approx(turn, rel=1e-12)


def test_bench_clock_is_that_of_another_solver_and_counts_what_can_be_counted(tmp_path: Path) -> None:
    changes = {"plan.members": 512, "plan.ask": ["bands", "limits", "outcomes"], "plan.accuracy": 1e-6}
    result = uq.run(demo("bench-clock").with_changes(changes), tmp_path / "out", threads=1)
    assert 0.2 < result.limits["fast"].ever_by.values[-1] < 0.8
    assert 110 < result.outcomes["period"].quantiles.sel(quantile=0.5) < 170
    yellow, turns = (result.members["watched"][name].values for name in ("yellow", "turns"))
    seen = ((yellow[:, 1:] > 0.2) & (yellow[:, :-1] <= 0.2)).sum(axis=1)
    assert np.all(np.abs(seen - turns[:, -1]) < 1)
    inputs = {name: result.members["inputs"][name].values[3] for name in result.members["inputs"]}
    start = [inputs["bromate"], 1e-5, 0, 0, 0, 0, inputs["cerium"] - 1e-8, 1e-8, inputs["malonic"], inputs["brominated"], 0]
    times = result["time"].values[:61]  # 300 s: two oscillations
    found = solve_ivp(lambda _, y: clock_by_hand(inputs, y), (0, times[-1]), start, "LSODA", times, rtol=1e-8, atol=1e-14)
    assert np.max(np.abs(found.y[7] / inputs["cerium"] - yellow[3, :61])) < 1e-3


def test_regional_capital_is_its_closed_form_and_its_answers_are_open(tmp_path: Path) -> None:
    # k^(1 - share) is linear with an exponential inhomogeneity: Solow (1956); Bernoulli's equation
    result = uq.run(
        demo("regional-capital").with_changes({"plan.members": 512, "plan.ask": ["bands", "limits"]}), tmp_path / "out", threads=1
    )
    assert 0.2 < result.limits["level_with"].ever_by.values[1] < 0.8
    assert 0.02 < result.limits["too_much"].ever_by.values[-1] < 0.2
    x = {name: result.members["inputs"][name].values[:, None] for name in result.members["inputs"]}
    time, rest = result["time"].values, 1 - x["share"]
    thinning, built = rest * (x["people"] + x["wear"]), x["saving"] * 24000 * 60000 ** -x["share"]
    grown = rest * built * (np.exp(x["progress"] * time) - np.exp(-thinning * time)) / (x["progress"] + thinning)
    exact = (x["capital_start"] ** rest * np.exp(-thinning * time) + grown) ** (1 / rest)
    assert np.max(np.abs(result.members["watched"]["capital"].values / exact - 1)) < 3e-5
