"""The written text of two small models, reviewed as text.

After a wanted change of the emitter renew the files with `python -m tests.test_model_golden` and read the difference.
"""

from __future__ import annotations

from collections.abc import Callable
from pathlib import Path

import pytest

from tests.solver_models import Ex, Parts, equations, names, predator_prey
from uq.model.build import build
from uq.model.code import Course, Equations, Forcing

FOLDER = Path(__file__).parent / "golden"


def drained_tank() -> Equations:
    """A tank with a given inflow, an outlet, a limit and an outcome."""
    area, outlet, h0, limit, h, flow = names("area outlet h0 limit h flow")
    rate = (flow - outlet * h.max(0).sqrt()) / area
    highest = Ex(h.graph, h.graph.name("course:0"))
    inflow = Forcing("flow", (0.0, 10.0, 20.0), (0.0, 2.0, 0.5))
    parts = Parts([h, flow], [h > limit], [inflow], [Course("highest", 0, 0.0, 20.0)], [highest / limit])
    return equations("area outlet h0 limit", "h", [h0], [rate], parts)


MODELS: tuple[Callable[[], Equations], ...] = (predator_prey, drained_tank)


@pytest.mark.parametrize("model", MODELS)
def test_the_text_is_the_reviewed_one(model: Callable[[], Equations]) -> None:
    assert build(model()).text == (FOLDER / f"{model.__name__}.ll").read_text(encoding="utf-8")


if __name__ == "__main__":
    for each in MODELS:
        (FOLDER / f"{each.__name__}.ll").write_text(build(each()).text, encoding="utf-8")
