"""The declaration of the method for stiff members, and the Jacobian that it works with."""

from __future__ import annotations

from dataclasses import replace

import mpmath
import pytest

from tests.oracle import evaluate
from tests.solver_models import Parts, equations, names, number
from uq.errors import ValueMistake
from uq.lang.graph import Graph
from uq.model import stiff
from uq.model.build import build
from uq.model.code import Equations, Forcing
from uq.model.jacobian import SLOPE, Jacobian
from uq.model.rosenbrock import Rosenbrock
from uq.model.rosenbrock5 import ROSENBROCK5


@pytest.mark.parametrize(("field", "place"), [("a", (3, 1)), ("coupling", (7, 6)), ("extension", (1, 2))])
def test_a_wrong_digit_is_found_when_the_method_is_declared(field: str, place: tuple[int, int]) -> None:
    rows = [list(row) for row in getattr(ROSENBROCK5, field)]
    rows[place[0]][place[1]] *= 1 + 1e-8
    with pytest.raises(ValueError, match="rosenbrock5"):
        replace(ROSENBROCK5, **{field: tuple(map(tuple, rows))})


@pytest.mark.parametrize("orders", [{"order": 6}, {"embedded_order": 5}, {"extension_order": 5}])
def test_no_order_is_claimed_that_it_has_not(orders: dict[str, int]) -> None:
    with pytest.raises(ValueError, match="misses the order condition"):
        replace(ROSENBROCK5, **orders)


def test_it_is_stiffly_accurate_and_damps_what_is_infinitely_stiff() -> None:
    method: Rosenbrock = ROSENBROCK5
    # R(z) of x' = z x by its own recursion, for z -> -infinity
    z = mpmath.mpf("-1e12")
    with mpmath.workdps(40):
        w, k = 1 / mpmath.mpf(method.gamma) - z, []
        for a, c in zip(method.a, method.coupling, strict=True):
            state = 1 + sum(x * y for x, y in zip(a, k, strict=False))
            k.append((z * state + sum(x * y for x, y in zip(c, k, strict=False))) / w)
        new = 1 + sum(x * y for x, y in zip((*method.a[-1], 1), k, strict=True))
    assert abs(new) < 1e-9


def model() -> Equations:
    a, x, y, _, time, f = names("a x y z time f")
    rates = [a * x * y + f * f * x, (x * time).sin() - y * f, (a * y).exp() + number(a, 2.0)]
    return equations("a", "x y z", [a, a, a], rates, Parts(forcings=[Forcing("f", (0.0, 1.0), (0.0, 2.0))]))


def test_entries_and_drift_are_those_of_differences() -> None:
    eq = model()
    found = Jacobian.of(eq)
    assert found is not None
    assert [(i, j) for i, j, _ in found.entries] == [(0, 0), (0, 1), (1, 0), (1, 1), (2, 1)]
    assert [i for i, _ in found.drift] == [0, 1]
    at = {"a": 0.3, "x": 1.2, "y": -0.4, "z": 2.0, "time": 0.7, "f": 1.4, SLOPE + "f": 2.0}

    def rate(i: int, **changes: mpmath.mpf) -> mpmath.mpf:
        return evaluate(eq.graph, eq.rates[i], {**{k: mpmath.mpf(v) for k, v in at.items()}, **changes})

    half = mpmath.mpf(2) ** -16
    for i, j, node in found.entries:
        name = eq.states[j]
        slope = (rate(i, **{name: at[name] + half}) - rate(i, **{name: at[name] - half})) / (2 * half)
        assert abs(evaluate(eq.graph, node, at) - slope) < 1e-8
    for i, node in found.drift:
        slope = (rate(i, time=at["time"] + half, f=1.4 + 2 * half) - rate(i, time=at["time"] - half, f=1.4 - 2 * half)) / (2 * half)
        assert abs(evaluate(eq.graph, node, at) - slope) < 1e-8


def all_on_all(states: int, alike: bool) -> Equations:
    """Every state takes part in every rate, in the same way or each in its own."""
    graph = Graph()
    y, (k,) = names(" ".join(f"y{i}" for i in range(states)), graph), names("k", graph)
    rates = []
    for i, own in enumerate(y):
        total = -own
        for j, other in enumerate(y):
            total = total + (k * other if alike else (0.1 + 0.37 * i + j) * (k * other).sin())
        rates.append(total)
    return equations("k", " ".join(f"y{i}" for i in range(states)), [k] * states, rates)


def test_entries_that_are_the_same_are_worked_out_once() -> None:
    found = Jacobian.of(all_on_all(40, alike=True))
    assert found is not None
    assert len(found.entries) == 1600
    assert len(found.values) <= 2


def test_too_large_a_model_is_refused_for_stiff_steps_only(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(stiff, "MOST_VALUES", 400)  # with the real bound this takes a minute and a half
    eq = all_on_all(21, alike=False)  # 441 distinct entries
    with pytest.raises(ValueMistake, match="21 states") as caught:
        build(eq, solver="stiff")
    assert "at most 256" in str(caught.value)
    assert caught.value.key == "plan.solver"
    assert build(eq, solver="auto").solver == "explicit"
