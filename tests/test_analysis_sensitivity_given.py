"""First-order indices from given data against published values, and the sums that they are made of."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
import pytest
from scipy.special import ndtr, ndtri

from tests.analysis_models import number
from tests.sensitivity_coverage import expected, linear_model, product_model
from tests.sensitivity_models import Dependent, design_of, linear
from uq.analysis.ask import Measured
from uq.analysis.given import FEWEST_CLASSES, MOST_CLASSES, pilot_classes, sum_by_class
from uq.analysis.tallies import Tallies

RNG = np.random.default_rng(20261201)


@pytest.mark.parametrize("name", ["two", "three", "four", "product"])
def test_published_first_order_indices_of_dependent_inputs(name: str) -> None:
    model = product_model()[0] if name == "product" else linear_model(name)[0]
    found = model.forecast(design_of(model, 1, 256))["ranking/y0"]
    value, low, high = (number(found, f"first_overall{end}") for end in ("", "_low", "_high"))
    # 2.5 times the half-width: once in 14 000 times by chance.
    assert (np.abs(value - expected(name, "first")) <= 2.5 * (high - low) / 2).all()
    assert (np.abs(value - expected(name, "first")) <= 0.02).all()


def test_independent_inputs_have_their_sobol_indices() -> None:
    # Ishigami and Homma 1990 (a = 7, b = 0.1): first-order indices 0.3139, 0.4424, 0 (Saltelli et al. 2008, from memory).
    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        a = np.pi * (2 * ndtr(x) - 1)
        return (np.sin(a[:, 0]) + 7 * np.sin(a[:, 1]) ** 2 + 0.1 * a[:, 2] ** 4 * np.sin(a[:, 0]))[:, None, None] * np.ones(len(times))

    model = Dependent(np.zeros(3), np.eye(3), values)
    found = model.forecast(design_of(model, 2, 256))["ranking/y0"]
    assert number(found, "first_overall") == pytest.approx([0.3139, 0.4424, 0.0], abs=0.01)


def test_a_jump_is_seen_as_far_as_the_classes_are_fine() -> None:
    # 1 where x1 > c, which falls somewhere into a class: at most half a class is missed, and the upper end says so.
    for threshold in ndtri([0.3, 0.41, 0.55]):
        model = Dependent(np.zeros(2), np.array([[1, 0.6], [0.6, 1.0]]), _above(float(threshold)))
        found = model.forecast(design_of(model, 3, 128))["ranking/y0"]
        value, high = number(found, "first_overall")[0], number(found, "first_overall_high")[0]
        assert 0.97 <= value <= 1.0 + 1e-3
        assert high >= value


def _above(threshold: float):  # type: ignore[no-untyped-def]
    return lambda x, times: np.where(x[:, 0] > threshold, 1.0, 0.0)[:, None, None] * np.ones(len(times))


def test_discrete_inputs_have_as_many_classes_as_values() -> None:
    # x1 rounded to -1, 0, 1: the class edges coincide and most classes are empty.
    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        return (x[:, 0] ** 2 + 0.5 * x[:, 1])[:, None, None] * np.ones(len(times))

    class Rounded(Dependent):
        def drawn(self, base: np.ndarray) -> np.ndarray:
            x = super().drawn(base)
            x[:, 0] = np.clip(np.round(x[:, 0]), -1, 1)
            return x

    model = Rounded(np.zeros(2), np.eye(2), values)
    found = model.forecast(design_of(model, 3, 128))["ranking/y0"]
    p = 2 * ndtr(-0.5)
    first = p * (1 - p) / (p * (1 - p) + 0.25)
    assert number(found, "first_overall") == pytest.approx([first, 1 - first], abs=0.01)


def test_sums_by_class_are_the_plain_sums() -> None:
    values, classes = RNG.normal(size=(64, 5)), RNG.integers(0, 6, 64)
    found = sum_by_class(values, classes, 8)
    plain = np.array([values[classes == each].sum(axis=0) for each in range(8)])
    assert found == pytest.approx(plain, abs=1e-12)
    assert (found[6:] == 0).all()


def test_sums_by_class_are_along_the_tree() -> None:
    values, classes = RNG.normal(size=(64, 3)) * 10.0 ** RNG.integers(-8, 8, (64, 1)), RNG.integers(0, 5, 64)
    whole = sum_by_class(values, classes, 5)
    quarters = [sum_by_class(values[at : at + 16], classes[at : at + 16], 5) for at in range(0, 64, 16)]
    assert ((quarters[0] + quarters[1]) + (quarters[2] + quarters[3])).tobytes() == whole.tobytes()
    assert sum_by_class(values[:1], classes[:1], 5)[classes[0]].tolist() == values[0].tolist()


def test_fewer_classes_where_the_sums_would_be_large() -> None:
    model = Dependent(np.zeros(2), np.array([[1, 0.5], [0.5, 1.0]]), linear([1.0, 1.0]))
    x = model.drawn(design_of(model, 1, 64).pilot())
    ask = model.ask()
    assert pilot_classes(ask, x, 16).classes.many == MOST_CLASSES  # type: ignore[union-attr]
    wide = replace(ask, grid=np.zeros(200_000, dtype=np.intp))
    assert pilot_classes(wide, x, 16).classes.many == FEWEST_CLASSES  # type: ignore[union-attr]
    assert pilot_classes(replace(ask, dependent=False), x, 16).classes is None


def test_a_few_lost_members_move_little() -> None:
    model = linear_model("two")[0]
    design = design_of(model, 1, 64)
    whole = model.forecast(design)["ranking/y0"]
    failing = replace(model, fails=lambda x: np.where(x[:, 0] > 3.9, 0.5, np.inf))
    found = failing.forecast(design)["ranking/y0"]
    assert number(found, "first")[:, 1] == pytest.approx(number(whole, "first")[:, 1], abs=0.01)


def test_indicators_count_from_the_passing_on() -> None:
    # y = x1 + t: true by then for ever; first order of the indicator in x1 is 1 but for the class that holds the jump.
    def values(x: np.ndarray, times: np.ndarray) -> np.ndarray:
        return (x[:, :1] + np.array([0.0, 2.0, 1.0]))[:, None]

    model = Dependent(np.zeros(2), np.array([[1, 0.3], [0.3, 1.0]]), values, times=(0.0, 1.0, 2.0), threshold=1.0, by=(2.0,))
    found = model.forecast(design_of(model, 1, 128))["ranking/hot"]
    first = number(found, "first")[0]
    assert first[2] == pytest.approx(first[1], abs=1e-12)
    assert (first > 0.95).all()
    assert number(found, "first_by")[0, 0] == first[2]


def test_what_is_written_down_answers_the_same() -> None:
    model = replace(product_model()[0], measured=(Measured(0, (1.0,), (0.0,), (1.0,)),), take=lambda x: x[:, 0], threshold=100.0, by=(1.0,))
    design = design_of(model, 1, 16)
    ask = model.complete(design)
    tallies = model.tallied(design, ask, design.blocks(0, 16, 8))
    again = Tallies.of_arrays(ask, {name: array.copy() for name, array in tallies.arrays().items()})
    for one, other in zip(tallies.findings(ask), again.findings(ask), strict=True):
        assert one.group == other.group
        for name, variable in one.variables.items():
            assert variable.data.tobytes() == other.variables[name].data.tobytes(), (one.group, name)
