"""[index] in a study: the same study written out, bit for bit; rods and an epidemic against the outside; units, edges, changes."""

from __future__ import annotations

import time
from pathlib import Path
from typing import Any

import numpy as np
import pytest
from scipy.integrate import solve_ivp
from scipy.linalg import expm

import uq
from tests.small_studies import mistakes, read
from uq.study.read import parse_study, read_study
from uq.study.study import Study

CELLS = 7
ROD = """
schema = 1
[time]
stop = 3
points = 13
[index]
cell = 7
[states.T]
over = "cell"
start = [{start}]
rate = "D * (T[cell-1] - 2 * T + T[cell+1])"
{edge}
[parameters]
D = {{ uniform = {{ low = 0.3, high = 0.9 }} }}
[plan]
ask = ["bands"]
members = 512
accuracy = 1e-9
"""


def solved(study: Study, folder: Path) -> tuple[Any, np.ndarray[Any, Any], np.ndarray[Any, Any]]:
    """The result, the input D and the courses T [realization, cell, time] of the members shown."""
    result = uq.run(study, folder, threads=1)
    return result, result.members["inputs"]["D"].values, result.members["watched"]["T"].values


@pytest.mark.parametrize("wave", [1, 2, 3])
def test_a_rod_with_insulated_ends_keeps_to_its_cosines(wave: int, tmp_path: Path) -> None:
    shape = np.cos(np.pi * wave * (np.arange(CELLS) + 0.5) / CELLS)
    study = parse_study(ROD.format(start=", ".join(map(repr, shape.tolist())), edge='edge = "mirror"'))
    result, diffusion, courses = solved(study, tmp_path / "out")
    decay = 4 * np.sin(np.pi * wave / (2 * CELLS)) ** 2
    expected = np.exp(-decay * diffusion[:, None, None] * result["time"].values) * shape[:, None]
    assert courses.shape == (200, CELLS, 13)
    assert np.max(np.abs(courses - expected)) < 1e-7


@pytest.mark.parametrize("wave", [1, 3])
def test_a_ring_keeps_to_its_fourier_modes(wave: int, tmp_path: Path) -> None:
    shape = np.cos(2 * np.pi * wave * np.arange(CELLS) / CELLS + 0.3)
    study = parse_study(ROD.format(start=", ".join(map(repr, shape.tolist())), edge='edge = "wrap"'))
    result, diffusion, courses = solved(study, tmp_path / "out")
    decay = 4 * np.sin(np.pi * wave / CELLS) ** 2
    expected = np.exp(-decay * diffusion[:, None, None] * result["time"].values) * shape[:, None]
    assert np.max(np.abs(courses - expected)) < 1e-7


@pytest.mark.parametrize("edge", ["edge = 2.5", 'edge = "wall"', 'edge = "wall + 0 * T[3]"'])
def test_a_rod_between_two_walls_follows_the_matrix_exponential(edge: str, tmp_path: Path) -> None:
    start = np.linspace(0.5, -1.0, CELLS)
    text = ROD.format(start=", ".join(map(repr, start.tolist())), edge=edge) + '[terms]\nwall = "2 + 0.5"\n'
    result, diffusion, courses = solved(parse_study(text), tmp_path / "out")
    laplacian = np.diag(np.full(CELLS, -2.0)) + np.diag(np.ones(CELLS - 1), 1) + np.diag(np.ones(CELLS - 1), -1)
    for member in range(0, 200, 40):
        for place, moment in enumerate(result["time"].values):
            expected = 2.5 + expm(diffusion[member] * moment * laplacian) @ (start - 2.5)
            assert np.max(np.abs(courses[member, :, place] - expected)) < 1e-7


EPIDEMIC = """
schema = 1
[time]
unit = "day"
stop = 60
points = 25
[units]
person = "new"
[index]
age = ["child", "adult", "old"]
other = "age"
[states.S]
over = "age"
unit = "person"
start = "people - ill"
rate = "-force * S"
[states.I]
over = "age"
unit = "person"
start = "ill"
rate = "force * S - I / duration"
[terms]
force = { over = "age", value = "beta * sum(contact[age, other] * I[other] / people[other], other)" }
ill_at_all = "sum(I, age)"
[parameters]
people = { over = "age", unit = "person", value = [20e3, 50e3, 15e3] }
ill = { over = "age", unit = "person", value = [10, 20, 0] }
contact = { over = ["age", "age"], unit = "1/day", value = [[8, 3, 1], [3, 5, 1.5], [1, 1.5, 2]] }
beta = { unit = "1", over = "age", normal = { mean = 0.03, sd = 0.002 } }
duration = { unit = "day", uniform = { low = 5, high = 8 } }
[limits.full]
when = "ill_at_all > '3000 person'"
[outcomes.ill_at_peak]
over = "age"
take = "highest(I)"
[plan]
watch = ["I", "S"]
ask = ["bands", "limits", "outcomes"]
members = 512
accuracy = 1e-9
"""


def test_an_epidemic_with_a_contact_matrix_is_that_of_another_solver(tmp_path: Path) -> None:
    result = uq.run(parse_study(EPIDEMIC), tmp_path / "out", threads=1)
    people, ill = np.array([20e3, 50e3, 15e3]), np.array([10.0, 20.0, 0.0])
    contact = np.array([[8, 3, 1], [3, 5, 1.5], [1, 1.5, 2]])
    inputs, watched, times = result.members["inputs"], result.members["watched"], result["time"].values
    assert inputs["beta"].dims == ("realization", "age")
    assert watched["I"].dims == ("realization", "age", "time")
    for member in range(0, 200, 25):
        beta, duration = inputs["beta"].values[member], inputs["duration"].values[member]

        def rates(_: float, y: Any, beta: Any = beta, duration: Any = duration) -> Any:
            susceptible, infected = y[:3], y[3:]
            new = beta * (contact @ (infected / people)) * susceptible
            return np.concatenate([-new, new - infected / duration])

        reference = solve_ivp(rates, (0, 60), np.concatenate([people - ill, ill]), "DOP853", times, rtol=1e-11, atol=1e-9)
        for name, rows in (("S", reference.y[:3]), ("I", reference.y[3:])):
            assert np.max(np.abs(watched[name].values[member] - rows)) < 1e-6 * people.max()
        peak = np.max(watched["I"].values[member], axis=1)
        assert np.array_equal(result.members["outcomes"]["ill_at_peak"].values[member], peak)


INDEXED = """
schema = 1
[time]
unit = "min"
stop = 20
points = 9
[index]
cell = 3
[states.T]
over = "cell"
unit = "K"
start = { normal = { mean = 300, sd = 3 } }
rate = "(heat + g * (T[cell-1] - T) + g * (T[cell+1] - T)) / cap"
edge = "mirror"
[parameters]
g = { unit = "W/K", uniform = { low = 0.5, high = 2 } }
cap = { over = "cell", unit = "kJ/K", value = [0.1, "120 J/K", 0.2] }
[terms]
heat = { over = "cell", value = "where(cell < 1, '5 W', '1 W') * exp(-(T - mean) / '50 K')" }
mean = "average(T, cell)"
[outcomes.peak]
take = "highest(max(T, cell))"
[outcomes.each]
over = "cell"
take = "highest(T) - final(T)"
[limits.hot]
over = "cell"
when = "T > '303 K'"
by = [10, 20]
[plan]
watch = ["T", "mean"]
members = 512
"""
BY_HAND = """
schema = 1
[time]
unit = "min"
stop = 20
points = 9
[states.T_0]
unit = "K"
start = { normal = { mean = 300, sd = 3 } }
rate = "(heat_0 + g * (T_0 - T_0) + g * (T_1 - T_0)) / cap_0"
[states.T_1]
unit = "K"
start = { normal = { mean = 300, sd = 3 } }
rate = "(heat_1 + g * (T_0 - T_1) + g * (T_2 - T_1)) / cap_1"
[states.T_2]
unit = "K"
start = { normal = { mean = 300, sd = 3 } }
rate = "(heat_2 + g * (T_1 - T_2) + g * (T_2 - T_2)) / cap_2"
[parameters]
g = { unit = "W/K", uniform = { low = 0.5, high = 2 } }
cap_0 = "0.1 kJ/K"
cap_1 = { unit = "kJ/K", value = "120 J/K" }
cap_2 = "0.2 kJ/K"
[terms]
heat_0 = "where(0 < 1, '5 W', '1 W') * exp(-(T_0 - mean) / '50 K')"
heat_1 = "where(1 < 1, '5 W', '1 W') * exp(-(T_1 - mean) / '50 K')"
heat_2 = "where(2 < 1, '5 W', '1 W') * exp(-(T_2 - mean) / '50 K')"
mean = "(T_0 + T_1 + T_2) / 3"
[outcomes.peak]
take = "highest(max(T_0, T_1, T_2))"
[outcomes.each_0]
take = "highest(T_0) - final(T_0)"
[outcomes.each_1]
take = "highest(T_1) - final(T_1)"
[outcomes.each_2]
take = "highest(T_2) - final(T_2)"
[limits.hot_0]
when = "T_0 > '303 K'"
by = [10, 20]
[limits.hot_1]
when = "T_1 > '303 K'"
by = [10, 20]
[limits.hot_2]
when = "T_2 > '303 K'"
by = [10, 20]
[plan]
watch = ["T_0", "T_1", "T_2", "mean"]
members = 512
"""
# The design draws by the names of inputs, so for the same draws both studies must call their uncertain starts alike.
FIXED = (
    ("start = { normal = { mean = 300, sd = 3 } }", 'start = "first"'),
    ("[parameters]", '[parameters]\nfirst = { unit = "K", normal = { mean = 300, sd = 3 } }'),
)


def test_an_indexed_study_has_the_bits_of_the_same_study_written_by_hand(tmp_path: Path) -> None:
    short, long = INDEXED, BY_HAND
    for old, new in FIXED:
        short, long = short.replace(old, new), long.replace(old, new)
    one, other = uq.run(parse_study(short), tmp_path / "a", threads=1), uq.run(parse_study(long), tmp_path / "b", threads=1)
    for place in range(3):
        for room, name in (
            ("bands", "T"),
            ("outcomes", "each"),
            ("limits", "hot"),
            ("ranking", "T"),
            ("ranking", "hot"),
            ("ranking", "each"),
        ):
            whole, single = one[room][name], other[room][f"{name}_{place}"]
            for variable in single:
                values = whole[variable]
                chosen = values.isel(cell=place) if "cell" in values.dims else values
                assert chosen.dims == single[variable].dims
                assert np.array_equal(chosen.values, single[variable].values, equal_nan=chosen.dtype.kind == "f"), (room, name, variable)
    assert np.array_equal(one.bands["mean"].quantiles.values, other.bands["mean"].quantiles.values)
    assert np.array_equal(one.outcomes["peak"].quantiles.values, other.outcomes["peak"].quantiles.values)


def test_entries_of_uncertain_starts_and_parameters_are_inputs_of_their_own() -> None:
    study = parse_study(INDEXED.replace('value = [0.1, "120 J/K", 0.2]', "normal = { mean = 0.1, cv = 0.1 }"))
    assert study.inputs.names == ("g", "cap[0]", "cap[1]", "cap[2]", "T_start[0]", "T_start[1]", "T_start[2]")
    assert [item.label for item in study.inputs.items][-1] == "T, start [2]"
    assert study.equations.states == ("T[0]", "T[1]", "T[2]")
    assert [each.name for each in study.watched] == ["T[0]", "T[1]", "T[2]", "mean"]
    assert [each.name for each in study.limits_asked] == ["hot[0]", "hot[1]", "hot[2]"]
    matrix = parse_study(EPIDEMIC.replace("value = [[8, 3, 1], [3, 5, 1.5], [1, 1.5, 2]]", "uniform = { low = 1, high = 4 }"))
    assert matrix.inputs.names[:2] == ("contact[child,child]", "contact[child,adult]")


def test_entries_can_depend_on_each_other_and_parameters_change_as_a_whole() -> None:
    more = '[[dependence]]\nbetween = ["T_start[0]", "T_start[1]"]\nrank_correlation = 0.5\n'
    study = parse_study(INDEXED + more)
    assert study.inputs.correlation[1, 2] == pytest.approx(0.5)
    numbers = [str(node.value) for node in study.with_changes({"parameters.cap": 0.7}).equations.graph.nodes]
    assert "0.7" in numbers
    longer = study.with_changes(
        {"index.cell": 5, "parameters.cap": [0.1, 0.1, 0.1, 0.2, 0.2], "states.T.start": "300 K"} | {"dependence": []}
    )
    assert longer.equations.states[-1] == "T[4]"
    assert longer.fingerprint != study.fingerprint


def test_valid_values_and_tolerances_hold_for_every_entry() -> None:
    study = parse_study(INDEXED.replace('edge = "mirror"', 'edge = "mirror"\nvalid = [250, 400]\nnegligible = "1 mK"'))
    assert study.lowest.tolist() == [250.0] * 3
    assert study.highest.tolist() == [400.0] * 3
    assert study.negligible.tolist() == [1e-3] * 3


def test_what_nothing_uses_is_told_once_and_indices_too() -> None:
    study = parse_study(
        INDEXED.replace("cell = 3", 'cell = 3\nspare = 4\nagain = "cell"') + '[parameters.idle]\nover = "cell"\nunit = "1"\nvalue = 2\n'
    )
    assert study.warnings == ("nothing uses the parameter `idle`", "nothing uses the index `spare`", "nothing uses the index `again`")
    below = parse_study(INDEXED.replace('value = [0.1, "120 J/K", 0.2]', "normal = { mean = 0.1, cv = 0.5 }"))
    assert [text for text in below.warnings if "below zero" in text] == [
        "`cap` is positive but for 2.3 % of its draws, which are below zero"
    ]


def test_a_name_of_a_scenario_may_change_what_repeats() -> None:
    study = parse_study(INDEXED + '[scenarios.light]\nchange = { "parameters.cap" = [0.05, 0.05, 0.05] }\n')
    assert study.scenarios[0].study.repeats == study.repeats
    wrong = mistakes('[scenarios.light]\nchange = { "parameters.cap" = [0.05, 0.05] }\n', INDEXED)
    assert wrong == ['study.toml:34:31  scenarios.light.change."parameters.cap": found 2 values; expected 3, one for every `cell` (0 to 2)']


def test_a_study_without_an_index_knows_nothing_of_it() -> None:
    study = read()
    assert study.repeats == ()
    assert study.indices == {}


def test_ninety_six_coupled_cells_are_read_in_a_second_or_two() -> None:
    text = INDEXED.replace("cell = 3", "cell = 96").replace('value = [0.1, "120 J/K", 0.2]', "normal = { mean = 0.1, cv = 0.1 }")
    parse_study(INDEXED)
    begun = time.perf_counter()
    study = parse_study(text)
    assert time.perf_counter() - begun < 5
    assert len(study.equations.states) == 96
    # Every entry has a handful of nodes of its own: sums that all share are worked out once.
    assert len(study.equations.graph.order(study.equations.rates)) < 96 * 20


def test_the_demo_is_read_as_it_stands() -> None:
    study = read_study(Path(__file__).parent.parent / "configs" / "cell-module.toml")
    assert study.warnings == ()
    assert len(study.equations.states) == 24
