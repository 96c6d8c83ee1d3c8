"""One block: points, inputs, solutions, tallies. Everything that a thread does without asking anybody."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Floats
from uq.analysis.sample import Sample, failed
from uq.analysis.tallies import Tallies
from uq.design.blocks import Block
from uq.design.design import Design
from uq.inputs.inputs import Inputs
from uq.running.meter import Count, Meter
from uq.running.observer import Observer
from uq.running.pace import Shape
from uq.running.part import Part
from uq.solve.batch import Batch, Settings
from uq.solve.compile import Compiled
from uq.solve.solve import solve

Arrays = NDArray[Any]


@dataclass(frozen=True)
class Forecast:
    """What is solved, how, at which points, and what is asked of it; `start` is the time of the starts.

    The inputs are those of the design; the code may take fewer (a scenario that fixes one), in an order of its own.
    """

    compiled: Compiled
    inputs: Inputs
    design: Design
    settings: Settings
    start: float
    ask: Ask

    @property
    def shape(self) -> Shape:
        """What a row of the design stands for."""
        layout, times = self.compiled.layout, len(self.ask.solved_times)
        return Shape(self.design.parts, layout.observed * times, layout.conditions * times)

    @cached_property
    def _columns(self) -> list[int] | None:
        names, wanted = self.inputs.names, self.compiled.code.inputs
        return None if names == wanted else [names.index(name) for name in wanted]

    def taken(self, x: Floats) -> Floats:
        """Of the inputs x [member, input] those that the code takes."""
        return x if self._columns is None else x[:, self._columns]

    def solved(self, x: Floats, observer: Observer) -> Batch:
        """Members with the inputs x [member, input], solved. Raises Interrupted where the stop flag is set."""
        return solve(self.compiled, self.taken(x), self.ask.solved_times, self.start, self.settings, observer.stop)


def part_of(forecast: Forecast, block: Block, meter: Meter, observer: Observer) -> Part:
    """What one block says; tells the meter. Raises Interrupted where the stop flag is set."""
    begin = meter.now()
    design = forecast.design
    x = design.draw(block, forecast.inputs)
    batch = forecast.solved(x, observer)
    tallies = Tallies.of(forecast.ask, Sample.of(design, block, x, batch, forecast.ask))
    count = counted(batch, 2 * block.count, meter.now() - begin)
    meter.add(count)
    return Part((block,), tallies, count)


def counted(batch: Batch, members: int, seconds: float) -> Count:
    """What a batch adds to the meter; its first `members` solves are A and B rows."""
    lost = failed(batch.status)
    return Count(
        solves=len(lost),
        failed=int(np.count_nonzero(lost)),
        failed_members=int(np.count_nonzero(lost[:members])),
        steps=int(batch.steps.sum(dtype=np.int64)),
        rejections=int(batch.rejections.sum(dtype=np.int64)),
        seconds=seconds,
    )
