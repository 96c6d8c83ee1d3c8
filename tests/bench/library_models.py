"""The models on which libraries are compared: the rates are those of uq's own equations, handed to each library in its way."""

from __future__ import annotations

from pathlib import Path

import numpy as np

from tests.bench.library_calls import Model
from tests.solver_models import predator_prey, predator_prey_inputs, settings
from tests.stiff_models import HIRES
from uq.model.build import build
from uq.model.code import Equations
from uq.solve.compile import Processor, compile_for
from uq.solve.scales import pilot_scales
from uq.study.read import read_study


def spread(members: int) -> np.ndarray:
    """HIRES from starts that differ by up to a twentieth."""
    return HIRES.row() * (1.0 + 0.05 * np.random.default_rng(0).random((members, 1)))


def clock() -> Model:
    """The eleven species of configs/bench-clock.toml over its 25 minutes, about ten oscillations; without the state that counts these."""
    study = read_study(Path(__file__).parents[2] / "configs" / "bench-clock.toml")
    whole, species = study.equations, len(study.equations.states) - 1
    states = whole.states[:species]
    seen = tuple(whole.graph.name(name) for name in states)
    kept = Equations(whole.graph, whole.inputs, states, whole.starts[:species], whole.rates[:species], (), seen)
    x = study.inputs.values(np.random.default_rng(0).uniform(0.01, 0.99, (1024, len(whole.inputs))))
    times, given = np.linspace(0.0, study.time.stop, 301), settings(species, 1e-6)
    code = compile_for(build(kept, "explicit54", "auto"), Processor.here())
    scales, _ = pilot_scales(code, x[:64], times, 0.0, given)
    return Model("clock", kept, tuple(scales), times, lambda members: x[:members], (1e-6,), (), True)


MODELS = (
    clock(),
    Model("HIRES", HIRES.equations(), HIRES.scales, np.linspace(0.0, HIRES.stop, 101), spread, (1e-6,), (), True),
    Model("predator-prey", predator_prey(), (20.0, 15.0), np.linspace(0.0, 20.0, 101), predator_prey_inputs, (1e-6,), (1e-4, 1e-8), False),
)
