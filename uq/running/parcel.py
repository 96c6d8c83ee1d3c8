"""What a cluster is told of a forecast: its code as text and all that goes with it, sent once to every worker and made ready there.

In: a `Forecast`. Out: bytes with a fingerprint; on the worker, parts of its blocks. Must not know: clusters, addresses.
"""

from __future__ import annotations

import copyreg
import hashlib
import io
import pickle
import threading
from collections import OrderedDict
from collections.abc import Iterator
from dataclasses import dataclass, is_dataclass, replace
from functools import cached_property
from time import perf_counter
from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask
from uq.design.blocks import Block
from uq.design.design import Design
from uq.inputs.inputs import Inputs
from uq.model.code import Code
from uq.running.block import Forecast, part_of
from uq.running.meter import Count, Meter
from uq.running.observer import Silent
from uq.running.part import Gathering, Part
from uq.running.pilot import Found, sought
from uq.running.tasks import Task, inner_rows
from uq.solve.batch import Settings
from uq.solve.compile import compile_code

# Forecasts that a worker keeps ready, those used last; what is forgotten is made ready again from its bytes.
REMEMBERED = 16


@dataclass(frozen=True, eq=False)
class Parcel:
    """A forecast as plain data: the model as text, never as machine code."""

    code: Code
    inputs: Inputs
    design: Design
    settings: Settings
    start: float
    ask: Ask

    def opened(self) -> Forecast:
        """The forecast, with the code compiled for the processor at hand."""
        return Forecast(compile_code(self.code), self.inputs, self.design, self.settings, self.start, self.ask)


def packed(forecast: Forecast) -> bytes:
    """The bytes of a forecast, without anything that was worked out from it and can be again."""
    code, design = forecast.compiled.code, replace(forecast.design)
    content = io.BytesIO()
    Plain(content, protocol=5).dump(Parcel(code, forecast.inputs, design, forecast.settings, forecast.start, forecast.ask))
    return content.getvalue()


class Plain(pickle.Pickler):
    """Leaves out what our classes have worked out and can again (`cached_property`): it may be large, or no data at all."""

    def reducer_override(self, obj: Any) -> Any:
        kind = type(obj)
        if not kind.__module__.startswith("uq.") or not is_dataclass(obj) or isinstance(obj, type):
            return NotImplemented
        worked_out = {name for each in kind.__mro__ for name, value in vars(each).items() if isinstance(value, cached_property)}
        return copyreg.__newobj__, (kind,), {name: value for name, value in vars(obj).items() if name not in worked_out}  # type: ignore[attr-defined]


def fingerprint(content: bytes) -> str:
    """What a parcel is known by."""
    return hashlib.sha256(content).hexdigest()


class Ready:
    """Forecasts made ready on a worker, by the fingerprints of their parcels; a bounded number of them."""

    def __init__(self) -> None:
        self._lock = threading.Lock()
        self._held: OrderedDict[str, Forecast] = OrderedDict()

    def forecast(self, key: str, content: bytes) -> Forecast:
        """The forecast of a parcel."""
        with self._lock:  # so that threads that ask together do not make ready the same
            if key not in self._held:
                parcel: Parcel = pickle.loads(content)
                self._held[key] = parcel.opened()
            self._held.move_to_end(key)
            while len(self._held) > REMEMBERED:
                self._held.popitem(last=False)
            return self._held[key]


READY = Ready()


def solved_here(key: str, content: bytes, task: Task, stop: NDArray[np.uint8]) -> Part | None:
    """A task worked on where this is called; None of members that are solved for trial. Raises Interrupted where `stop` is set."""
    forecast, observer = READY.forecast(key, content), Silent(stop)
    if task.solves is not None:
        x, (first, last) = forecast.design.draw(task.block, forecast.inputs), task.solves
        # All rows of A, then all of B, and so on.
        forecast.solved(x[first * task.block.count : last * task.block.count], observer)
        return None
    meter, gathering = Meter(0, observer, perf_counter), Gathering()
    for each in task.blocks:
        for block in inner_blocks(each, inner_rows(forecast.shape)):
            gathering.add("", part_of(forecast, block, meter, observer))
    return gathering.take()[""]


def piloted_here(key: str, content: bytes, stop: NDArray[np.uint8]) -> tuple[Found, Count]:
    """The pilot of a forecast, solved where this is called. Raises Interrupted where `stop` is set."""
    return sought(READY.forecast(key, content), perf_counter, Silent(stop))


def inner_blocks(block: Block, rows: int) -> Iterator[Block]:
    """A block in blocks of at most so many rows, in order."""
    count = min(rows, block.count)
    return (Block(block.replicate, first, count) for first in range(block.first, block.first + block.count, count))
