"""What one run solves side by side: the study itself, and each of its scenarios with the same draws."""

from __future__ import annotations

from dataclasses import dataclass, replace

from uq.analysis.compiled import ready
from uq.design.design import Design
from uq.inputs.inputs import Inputs
from uq.model.build import build
from uq.model.choose import method_for
from uq.running.block import Forecast
from uq.running.observer import Observer
from uq.running.pilot import Pilot
from uq.running.setup import ask_of, design_of, same_places, settings_of
from uq.solve.compile import compile_code
from uq.solve.solve import prepare
from uq.study.study import Study

# The name of the study itself among its branches.
STUDY = ""
FIRST_RUN = "preparing the solver, once on this machine (about three quarters of a minute)"


@dataclass(frozen=True, eq=False)
class Branch:
    """The study itself (its name is empty) or a scenario: what is solved, with what the pilot found."""

    name: str
    pilot: Pilot

    @property
    def forecast(self) -> Forecast:
        """What is solved."""
        return self.pilot.forecast

    def of(self, members: int) -> Branch:
        """The same in a run of so many members, by which it is decided whether their values are kept."""
        if self.forecast.ask.members == members:
            return self
        ask = replace(self.forecast.ask, members=members)
        return replace(self, pilot=replace(self.pilot, forecast=replace(self.forecast, ask=ask)))


def forecast_of(study: Study, design: Design, inputs: Inputs) -> Forecast:
    """What is solved for a study, at the points of a design of these inputs, before the pilot."""
    compiled = compile_code(build(study.equations, method_for(study.plan.accuracy), study.plan.solver))
    return Forecast(compiled, inputs, design, settings_of(study), study.time.start, ask_of(study, design, inputs))


def forecasts_of(study: Study) -> dict[str, Forecast]:
    """The forecast of the study itself, and of every scenario by its name."""
    found = {STUDY: forecast_of(study, design_of(study, study.inputs), study.inputs)}
    for scenario in study.scenarios:
        inputs = same_places(study.inputs, scenario.study.inputs)
        found[scenario.name] = forecast_of(scenario.study, design_of(scenario.study, inputs), inputs)
    return found


def tell_first_run(observer: Observer) -> None:
    """Says so where machine code that does not depend on the study must still be made, which the first solves then wait for."""
    if prepare() or not ready():
        observer.stage(FIRST_RUN)
