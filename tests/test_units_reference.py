"""Unit checks and conversions with known answers (tests/reference/units.toml): verdicts, the term named, and the numbers."""

from __future__ import annotations

import tomllib
from pathlib import Path
from typing import Any

import pytest

from tests.oracle import evaluate_all
from uq.errors import ExpressionError, ValueMistake
from uq.lang.graph import Graph, Node
from uq.lang.lower import Scope, in_unit, lower
from uq.lang.parser import parse
from uq.units import parse_quantity, parse_unit

REFERENCE = tomllib.loads((Path(__file__).parent / "reference" / "units.toml").read_text(encoding="utf-8"))
CASES = REFERENCE["case"]


class Model:
    """A case lowered: rates and starts in the units of the states, and a condition."""

    def __init__(self, case: dict[str, Any]) -> None:
        self.graph = Graph()
        time = parse_unit(case["time"])
        units = {name: parse_unit(text) for name, text in case["states"].items()}
        self.values: dict[str, float] = {}
        names = {name: (self.graph.name(name), unit) for name, unit in units.items()}
        for name, text in case["quantities"].items():
            quantity = parse_quantity(text)
            assert quantity is not None
            self.values[name], unit = quantity
            names[name] = (self.graph.name(name), unit)
        self.scope = Scope(names, time_unit=time)
        self.starts = {name: self.whole(f"'{text}'", units[name]) for name, text in case.get("start", {}).items()}
        self.rates = {name: self.whole(text, units[name].difference() / time) for name, text in case["rates"].items()}
        self.condition = lower(parse(case["condition"]), self.scope, self.graph).node if "condition" in case else None

    def whole(self, text: str, unit: Any) -> Node:
        tree = parse(text)
        return in_unit(tree, lower(tree, self.scope, self.graph), unit, self.graph).node

    def at(self, time: float, steps: int = 200) -> dict[str, float]:
        """The states at a time, by the classical method of Runge and Kutta of order 4 with equal steps."""
        names, h = list(self.rates), time / steps
        y = [float(evaluate_all(self.graph, (self.starts[name],), {})[0]) for name in names]

        def slope(state: list[float]) -> list[float]:
            found = evaluate_all(self.graph, self.rates.values(), self.values | dict(zip(names, state, strict=True)), digits=20)
            return [float(value) for value in found]

        for _ in range(steps):
            a = slope(y)
            b = slope([x + h / 2 * k for x, k in zip(y, a, strict=True)])
            c = slope([x + h / 2 * k for x, k in zip(y, b, strict=True)])
            d = slope([x + h * k for x, k in zip(y, c, strict=True)])
            y = [x + h / 6 * (p + 2 * q + 2 * r + s) for x, p, q, r, s in zip(y, a, b, c, d, strict=True)]
        return dict(zip(names, y, strict=True))


@pytest.mark.parametrize("case", [case for case in CASES if "refused" in case], ids=lambda case: case["name"])
def test_refused_with_the_term_and_both_units(case: dict[str, Any]) -> None:
    with pytest.raises(ExpressionError) as caught:
        Model(case)
    refused = case["refused"]
    assert f"`{refused['term']}`" in caught.value.found
    found = caught.value.found.split("` in ")[1]
    assert parse_unit(found).same(parse_unit(refused["found"]))
    assert caught.value.expected.startswith(refused["needed"])


@pytest.mark.parametrize("case", [case for case in CASES if "refused" not in case], ids=lambda case: case["name"])
def test_accepted_and_right(case: dict[str, Any]) -> None:
    model = Model(case)
    if "expect" in case:
        expected = case["expect"]
        found = model.at(case["at"])[expected["state"]]
        assert found == pytest.approx(expected["value"], rel=1e-6)
        assert "wrong" not in expected or found != pytest.approx(expected["wrong"], rel=1e-3)


def test_a_threshold_in_another_scale_is_passed_where_it_should_be() -> None:
    case = next(case for case in CASES if case["name"].startswith("threshold in degC"))
    model = Model(case)
    assert model.condition is not None
    assert model.condition.args[1] is model.graph.number(353.15)
    for shift, passed in ((-1e-3, False), (1e-3, True)):
        state = model.at(case["at"] + shift)
        assert evaluate_all(model.graph, (model.condition,), state)[0] is passed


@pytest.mark.parametrize("case", REFERENCE["conversion"], ids=lambda case: case["quantity"])
def test_conversion(case: dict[str, Any]) -> None:
    quantity = parse_quantity(case["quantity"])
    assert quantity is not None
    assert quantity[1].convert(quantity[0], parse_unit(case["unit"])) == pytest.approx(case["value"], rel=1e-12)


def test_what_is_no_unit_and_what_does_not_convert() -> None:
    for case in REFERENCE["unknown"]:
        with pytest.raises(ValueMistake, match=case["named"]):
            parse_unit(case["unit"])
    for case in REFERENCE["mismatch"]:
        quantity = parse_quantity(case["quantity"])
        assert quantity is not None
        with pytest.raises(ValueMistake):
            quantity[1].convert(quantity[0], parse_unit(case["unit"]))
