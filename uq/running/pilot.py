"""The pilot: a few rows of every replicate, solved first, that say how large things are."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, fields, replace

import numpy as np

from uq.analysis.ask import Ask
from uq.analysis.given import pilot_classes
from uq.analysis.pilot import pilot_ask
from uq.design.design import Design
from uq.inputs.inputs import Inputs
from uq.running.block import Arrays, Forecast, counted
from uq.running.meter import Count, Meter
from uq.running.observer import Observer
from uq.running.threads import aside
from uq.solve.batch import Batch
from uq.solve.scales import pilot_scales

PILOT_ROWS = 16


@dataclass(frozen=True, eq=False)
class Found:
    """What the pilot found: the scale of every state, which of them had none of their own, the pilot's members, the nominal member."""

    scales: Arrays
    fell_back: Arrays
    batch: Batch
    nominal: Batch

    def arrays(self) -> dict[str, Arrays]:
        """As named arrays, so that it need not be found again."""
        batches = {f"{name}/{each.name}": getattr(getattr(self, name), each.name) for name in _BATCHES for each in fields(Batch)}
        return {"scales": self.scales, "fell_back": self.fell_back, **batches}

    @classmethod
    def of_arrays(cls, arrays: Mapping[str, Arrays]) -> Found:
        """Back from the arrays."""
        batches = [Batch(**{each.name: arrays[f"{name}/{each.name}"] for each in fields(Batch)}) for name in _BATCHES]
        return cls(arrays["scales"], arrays["fell_back"], *batches)


_BATCHES = ("batch", "nominal")


@dataclass(frozen=True, eq=False)
class Pilot:
    """The forecast with scales, centres and floors filled in, and what the pilot found."""

    forecast: Forecast
    found: Found

    @property
    def fell_back(self) -> tuple[str, ...]:
        """The states without a scale of their own."""
        names = self.forecast.compiled.code.states
        return tuple(name for name, fell in zip(names, self.found.fell_back, strict=True) if fell)

    @property
    def nominal(self) -> Batch:
        """The member with every input at its median, solved."""
        return self.found.nominal


def piloted(forecast: Forecast, meter: Meter, observer: Observer) -> Pilot:
    """Solves the pilot (the first PILOT_ROWS A rows of every replicate) and the nominal member; the meter hears how long a solve takes."""
    found, count = sought(forecast, meter.now, observer)
    # These rows are solved again in their blocks, so they only set the pace.
    meter.pace(count)
    return completed(forecast, found)


def sought(forecast: Forecast, now: Callable[[], float], observer: Observer) -> tuple[Found, Count]:
    """What the pilot finds, and what its members took. now: the clock, in seconds."""
    x = forecast.inputs.values(forecast.design.pilot(PILOT_ROWS))
    times, start, taken = forecast.ask.solved_times, forecast.start, forecast.taken(x)
    scales, names = aside(lambda: pilot_scales(forecast.compiled, taken, times, start, forecast.settings, observer.stop), observer)
    scaled = replace(forecast, settings=replace(forecast.settings, scales=scales))
    begin = now()
    batch = aside(lambda: scaled.solved(x, observer), observer)
    count = counted(batch, 0, now() - begin)
    nominal = aside(lambda: scaled.solved(forecast.inputs.medians()[None, :], observer), observer)
    fell_back = np.isin(np.array(forecast.compiled.code.states), np.array(names, dtype=np.str_))
    return Found(scales, fell_back, batch, nominal), count


def completed(forecast: Forecast, found: Found) -> Pilot:
    """The forecast with what the pilot found."""
    settings = replace(forecast.settings, scales=found.scales)
    ask = told(forecast.ask, found, settings.accuracy, forecast.inputs, forecast.design)
    return Pilot(replace(forecast, settings=settings, ask=ask), found)


def told(ask: Ask, found: Found, accuracy: float, inputs: Inputs, design: Design) -> Ask:
    """The ask with what the pilot found."""
    ask = pilot_ask(ask, found.batch, accuracy)
    return pilot_classes(ask, inputs.values(design.pilot()), design.replicates) if ask.dependent else ask
