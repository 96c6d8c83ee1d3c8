"""The pilot: a few rows of every replicate, solved first, that say how large things are."""

from __future__ import annotations

from dataclasses import dataclass, replace

from uq.analysis.pilot import pilot_ask
from uq.running.block import Forecast, counted
from uq.running.meter import Meter
from uq.running.observer import Observer
from uq.running.threads import aside
from uq.solve.batch import Batch
from uq.solve.scales import pilot_scales


@dataclass(frozen=True)
class Pilot:
    """The forecast with scales, centres and floors filled in, the states without a scale of their own, and the nominal member, solved."""

    forecast: Forecast
    fell_back: tuple[str, ...]
    nominal: Batch


def piloted(forecast: Forecast, meter: Meter, observer: Observer) -> Pilot:
    """What the pilot says (the first 16 A rows of every replicate), and the member with every input at its median."""
    x = forecast.inputs.values(forecast.design.pilot())
    times, start = forecast.ask.solved_times, forecast.start
    scales, fell_back = aside(lambda: pilot_scales(forecast.compiled, x, times, start, forecast.settings, observer.stop), observer)
    scaled = replace(forecast, settings=replace(forecast.settings, scales=scales))
    begin = meter.now()
    batch = aside(lambda: scaled.solved(x, observer), observer)
    # These rows are solved again in their blocks, so they only set the pace.
    meter.pace(counted(batch, 0, meter.now() - begin))
    ready = replace(scaled, ask=pilot_ask(forecast.ask, batch, forecast.settings.accuracy))
    nominal = aside(lambda: ready.solved(forecast.inputs.medians()[None, :], observer), observer)
    return Pilot(ready, fell_back, nominal)
