"""Shapley effects of dependent inputs against closed forms, and what is said where there is nothing to share out."""

from __future__ import annotations

import tracemalloc
from dataclasses import replace
from itertools import permutations
from typing import Any

import numpy as np
import pytest

from tests.analysis_models import number
from tests.sensitivity_coverage import CASES, expected, indicator_model, linear_model, product_model, random_orders
from tests.sensitivity_models import Dependent, closed_linear, design_of, every_set, linear
from uq.analysis.ask import InputGroup
from uq.analysis.finding import Finding
from uq.analysis.policy import TOO_MANY_LOST
from uq.analysis.ranking import DEPENDENT, DRAWN_TOGETHER, NOISE, Shares
from uq.analysis.shapley import Walks
from uq.design.sets import shapley_sets

ROWS = 256
# Student's t with 15 degrees of freedom is beyond 2.5 times its 95 % factor once in 14 000 times (two-sided).
WIDER = 2.5


def ends(finding: Finding, name: str) -> tuple[np.ndarray, np.ndarray, np.ndarray]:
    value, low, high = (number(finding, f"{name}{end}") for end in ("", "_low", "_high"))
    return value, low, high


def agrees(finding: Finding, name: str, truth: Any, widest: float = 0.05) -> None:
    value, low, high = ends(finding, name)
    assert (np.abs(value - truth) <= WIDER * (high - low) / 2 + 1e-12).all(), (value, truth, high - low)
    assert (np.abs(value - truth) <= widest).all()


def ranking(model: Dependent, rows: int = ROWS, seed: int = 1, **changes: Any) -> Finding:
    return model.forecast(design_of(model, seed, rows), **changes)["ranking/y0"]


@pytest.mark.parametrize("name", ["two", "three", "four"])
def test_linear_models_of_dependent_normal_inputs(name: str) -> None:
    found = ranking(linear_model(name)[0])
    agrees(found, "shapley_overall", expected(name, "shapley"))
    agrees(found, "shapley", expected(name, "shapley")[:, None])
    # The test's own closed form is that of the published cases.
    case = CASES[name]
    weights = linear_model_weights(name)
    assert closed_linear(weights, np.array(case["covariance"])) == pytest.approx(expected(name, "shapley"), abs=1e-12)


def linear_model_weights(name: str) -> np.ndarray:
    from tests.sensitivity_coverage import WEIGHTS

    return np.array(WEIGHTS[name])


@pytest.mark.parametrize("name", ["two", "three", "four", "product"])
def test_the_cost_of_one_input_is_its_total_index_given_the_others(name: str) -> None:
    # Kucherenko, Tarantola and Annoni 2012: E[Var(y | all others)] over the variance. Not given to users, but Shapley effects rest on it.
    model = product_model()[0] if name == "product" else linear_model(name)[0]
    design = design_of(model, 3, ROWS)
    ask = model.complete(design)
    moments = model.tallied(design, ask, design.blocks(0, ROWS, ROWS)).held["watched"]
    shares = Shares.of(moments, dependent=True)  # type: ignore[arg-type]
    alone = [ask.mixed.index((place,)) for place in range(model.many)]
    found = shares.total[:, alone, 0].mean(axis=0) / shares.variances[:, 0].mean()
    assert found == pytest.approx(expected(name, "total"), abs=0.03)


def test_a_product_of_correlated_pairs() -> None:
    model, truths = product_model()
    agrees(ranking(model), "shapley_overall", truths["ranking/y0", "shapley_overall"])


def test_independent_blocks_that_add_up_share_out_their_own_variance() -> None:
    # y = x1 x2 + 3 x3 + x4 with (x1, x2) correlated by 0.6 and (x3, x4) by -0.5: within a block that does not interact with the other the
    # effects are those of the block by itself. Var(x1 x2) = 1 + 0.36, and x1, x2 are alike.
    covariance = np.array([[1, 0.6, 0, 0], [0.6, 1, 0, 0], [0, 0, 1, -0.5], [0, 0, -0.5, 1]])

    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        return (x[:, 0] * x[:, 1] + 3 * x[:, 2] + x[:, 3])[:, None, None] * np.ones(len(times))

    own = closed_linear(np.array([3.0, 1.0]), covariance[2:, 2:]) * (9 + 1 - 3)
    truth = np.array([0.68, 0.68, *own]) / (1.36 + 7)
    agrees(ranking(Dependent(np.zeros(4), covariance, values)), "shapley_overall", truth)


@pytest.mark.parametrize("name", ["two", "four"])
def test_effects_add_up_to_one(name: str) -> None:
    found = ranking(linear_model(name)[0], rows=16)
    assert number(found, "shapley_overall").sum() == pytest.approx(1.0, abs=1e-12)
    assert number(found, "shapley").sum(axis=0) == pytest.approx(np.ones(2), abs=1e-12)


def test_an_inert_input_has_none_unless_it_goes_with_others() -> None:
    inert = Dependent(np.zeros(3), np.array([[1, 0.5, 0], [0.5, 1, 0], [0, 0, 1.0]]), linear([1.0, 1.0, 0.0]))
    value, low, high = ends(ranking(inert), "shapley_overall")
    assert low[2] <= 0 <= high[2]
    assert abs(value[2]) < 2e-3
    beside = ends(ranking(linear_model("four")[0]), "shapley_overall")
    assert beside[1][1] > 0.05


def test_limits_and_outcomes_are_shared_out_too() -> None:
    model, truths = indicator_model()
    taken = replace(model, take=lambda x: x[:, 0] - x[:, 2])
    found = taken.forecast(design_of(model, 5, ROWS))
    agrees(found["ranking/hot"], "shapley_by", truths["ranking/hot", "shapley_by"])
    agrees(found["ranking/hot"], "first_by", truths["ranking/hot", "first_by"])
    agrees(found["ranking/o"], "shapley", closed_linear(np.array([1.0, 0.0, -1.0]), model.covariance))
    assert found["ranking/o"].variables["shapley"].dims == ("input",)
    assert found["ranking/hot"].variables["shapley"].dims == ("input", "time")


def test_total_order_is_refused_in_words() -> None:
    found = ranking(linear_model("two")[0], rows=16)
    for name in ("total", "total_overall"):
        assert np.isnan(number(found, name)).all()
        assert found.variables[name].attributes["reason"] == DEPENDENT
    assert "reason" not in found.variables["first"].attributes


def test_offset_constant_and_start() -> None:
    covariance = np.array([[1, 0.5], [0.5, 1.0]])

    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        signal = (x[:, :1] + 2 * x[:, 1:]) * times
        return np.stack([1e6 + 1e-1 * signal, 7.0 + 0.0 * signal, signal], axis=1)

    model = Dependent(np.zeros(2), covariance, values)
    truth = closed_linear(np.array([1.0, 2.0]), covariance)
    # A solver accurate to 1e-6 of 1e6 knows nothing of a tenth; one that is says the same as without the offset.
    coarse = model.forecast(design_of(model, 1, 64))
    assert np.isnan(number(coarse["ranking/y0"], "shapley")).all()
    assert coarse["ranking/y0"].variables["shapley"].attributes["reason"] == NOISE
    design = design_of(model, 1, 64)
    ask = replace(model.complete(design), floor=np.full(3, 1e-9))
    found = {each.group: each for each in model.tallied(design, ask, design.blocks(0, 64, 64)).findings(ask)}
    assert number(found["ranking/y0"], "shapley")[:, 1] == pytest.approx(number(found["ranking/y2"], "shapley")[:, 1], abs=1e-7)
    assert number(found["ranking/y0"], "first")[:, 1] == pytest.approx(number(found["ranking/y2"], "first")[:, 1], abs=1e-7)
    agrees(found["ranking/y0"], "shapley_overall", truth)
    for name in ("shapley", "first"):
        assert np.isnan(number(found["ranking/y1"], name)).all()
        assert np.isnan(number(found["ranking/y2"], name)[:, 0]).all()
        assert np.isfinite(number(found["ranking/y2"], name)[:, 1]).all()


def test_lost_rows_leave_no_effects() -> None:
    model, _ = linear_model("two")
    failing = replace(model, fails=lambda x: np.where(x[:, 0] > 2.5, 0.5, np.inf))
    found = ranking(failing, rows=64)
    assert np.isfinite(number(found, "shapley")[:, 0]).all()
    assert np.isnan(number(found, "shapley")[:, 1]).all()
    assert np.isnan(number(found, "first")[:, 1]).all()
    assert found.variables["shapley"].attributes["reason"] == TOO_MANY_LOST


def test_inputs_drawn_together_have_one_effect_between_them() -> None:
    weights, covariance = np.array([1.0, 2.0, 1.0]), np.array([[1, 0.8, 0.3], [0.8, 1, 0.3], [0.3, 0.3, 1.0]])
    units = ((0, 1), (2,))
    groups = (InputGroup("x1+x2", (0, 1)), InputGroup("odd", (1, 2)), InputGroup("all", (0, 1, 2)))
    model = Dependent(np.zeros(3), covariance, linear(weights), units=units, groups=groups)
    found = ranking(model)
    truth = closed_linear(weights, covariance, units)
    value = number(found, "shapley_overall")
    assert np.isnan(value[:2]).all()
    assert found.variables["shapley_overall"].attributes["reason"] == DRAWN_TOGETHER
    assert value[2] == pytest.approx(truth[1], abs=0.03)
    assert found.variables["group"].data.tolist() == ["x1+x2", "odd", "all"]
    shared = number(found, "shapley_group_overall")
    assert shared[0] == pytest.approx(truth[0], abs=0.03)
    # A group that parts a unit has none; that of everything has all.
    assert np.isnan(shared[1])
    assert shared[2] == pytest.approx(1.0, abs=1e-12)


def test_all_orders_are_all_sets() -> None:
    model = Dependent(np.zeros(4), np.eye(4), linear([1.0] * 4))
    by_sets = Walks.of(model.ask())
    by_orders = Walks.of(replace(model, orders=tuple(permutations(range(4))), sets=every_set(((0,), (1,), (2,), (3,)))).ask())
    rng = np.random.default_rng(5)
    costs, variances = rng.random((16, 14, 3)), 1 + rng.random((16, 3))
    for one, other in ((by_sets, by_orders), (by_sets.shared(((0, 2), (3,))), by_orders.shared(((0, 2), (3,))))):
        assert one.effects(costs, variances, 0.95).value == pytest.approx(other.effects(costs, variances, 0.95).value, abs=1e-14)


def test_hundreds_of_units_take_no_more_memory_than_their_costs() -> None:
    # y is a sum of 300 independent inputs with weights 1, 2, 3 in turn: the cost of a set is the sum of squares in it, and the effect of
    # an input its square over all of them, whatever the orders. Weights for every order, unit and set would take 740 MB.
    many = 300
    made = shapley_sets([(unit,) for unit in range(many)], 3)
    squares = (1.0 + np.arange(many) % 3) ** 2
    ask = replace(Dependent(np.zeros(many), np.eye(many), linear([1.0] * many), sets=made.sets, orders=made.orders).ask(), units=None)
    costs = np.array([squares[list(taken)].sum() for taken in made.sets])
    tracemalloc.start()
    found = Walks.of(ask).effects(np.tile(costs[:, None], (4, 1, 1)), np.full((4, 1), squares.sum()), 0.95)
    peak = tracemalloc.get_traced_memory()[1]
    tracemalloc.stop()
    assert len(made.orders) == 32
    assert found.value[:, 0] == pytest.approx(squares / squares.sum())
    assert peak < 50e6


def test_random_orders_say_how_much_their_choice_matters() -> None:
    many = 11
    covariance = np.full((many, many), 0.4) + 0.6 * np.eye(many)
    weights = np.linspace(1, 2, many)
    model = Dependent(np.zeros(many), covariance, linear(weights))
    truth = closed_linear(weights, covariance)
    widths = []
    for pairs in (16, 64):
        found = ranking(replace(model, orders=random_orders(many, pairs, 11)), rows=16)
        value, low, high = ends(found, "shapley_overall")
        assert value.sum() == pytest.approx(1.0, abs=1e-12)
        assert (np.abs(value - truth) <= WIDER * (high - low) / 2).all()
        widths.append((high - low).mean())
    assert widths[1] < 0.75 * widths[0]


def test_the_same_bits_for_any_blocks() -> None:
    model, _ = product_model()
    design = design_of(model, 4, 32)
    ask = model.complete(design)
    found = []
    for size in (32, 8, 1):
        tallies = model.tallied(design, ask, design.blocks(0, 32, size))
        found.append({each.group: each for each in tallies.findings(ask)}["ranking/y0"])
    for name, variable in found[0].variables.items():
        for other in found[1:]:
            assert variable.data.tobytes() == other.variables[name].data.tobytes(), name
