"""The written text of small models, reviewed as text.

After a wanted change of the emitter renew the files with `python -m tests.test_model_golden` and read the difference.
"""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

import pytest

from tests.solver_models import Ex, Parts, equations, names, predator_prey, table
from uq.model.build import build
from uq.model.code import Course, Equations, Forcing, Solver, Table

FOLDER = Path(__file__).parent / "golden"


def drained_tank() -> Equations:
    """A tank with a given inflow, an outlet, a limit and an outcome."""
    area, outlet, h0, limit, h, flow = names("area outlet h0 limit h flow")
    rate = (flow - outlet * h.max(0).sqrt()) / area
    highest = Ex(h.graph, h.graph.name("course:0"))
    inflow = Forcing("flow", (0.0, 10.0, 20.0), (0.0, 2.0, 0.5))
    parts = Parts([h, flow], [h > limit], [inflow], [Course("highest", 0, 0.0, 20.0)], [highest / limit])
    return equations("area outlet h0 limit", "h", [h0], [rate], parts)


def heated_rod() -> Equations:
    """A temperature between a smooth given one and a loss by a table."""
    k, start, temperature, outside = names("k start temperature outside")
    loss = table("loss", temperature)
    course = Forcing("outside", (0.0, 6.0, 12.0), (280.0, 290.0, 281.0), "smooth", "repeat")
    given = Table("loss", (250.0, 300.0, 400.0), (0.0, 1.0, 5.0), "smooth", "hold")
    parts = Parts(forcings=[course], tables=[given])
    return equations("k start", "temperature", [start], [k * (outside - temperature) - loss], parts)


def fast_valve() -> Equations:
    """A level that a fast valve holds near a given course: stiff, with change by time alone."""
    gain, level, opening, wanted = names("gain level opening wanted")
    course = Forcing("wanted", (0.0, 5.0, 10.0), (1.0, 2.0, 1.5))
    rates = [opening - level * level, gain * (wanted - level - opening)]
    return equations("gain", "level opening", [gain * 0, gain * 0], rates, Parts(forcings=[course]))


MODELS: tuple[tuple[str, Callable[[], Equations], str, Solver], ...] = (
    ("predator_prey", predator_prey, "explicit54", "explicit"),
    ("drained_tank", drained_tank, "explicit54", "explicit"),
    ("heated_rod", heated_rod, "explicit853", "explicit"),
    ("fast_valve", fast_valve, "explicit54", "auto"),
)


@pytest.mark.parametrize(("name", "model", "method", "solver"), MODELS)
def test_the_text_is_the_reviewed_one(name: str, model: Callable[[], Equations], method: str, solver: Solver) -> None:
    assert build(model(), method, solver).text == (FOLDER / f"{name}.ll").read_text(encoding="utf-8")


if __name__ == "__main__":
    for file, each, how, who in MODELS:
        (FOLDER / f"{file}.ll").write_text(build(each(), how, who).text, encoding="utf-8")
