"""The size of every state, from a pilot: what the absolute tolerances are measured by."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from uq.model.layout import LANES, Head
from uq.solve.batch import Settings, Status
from uq.solve.compile import Compiled
from uq.solve.memory import Floats, aligned, call_group, settings_block
from uq.solve.solve import evaluate_starts, solve

FALL_BACK = 1.0


def pilot_scales(
    compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, stop: NDArray[np.uint8] | None = None
) -> tuple[Floats, tuple[str, ...]]:
    """The scale of every state: the median over the pilot of its largest size.

    x [pilot, input]; returns scales [state] in state units and the names of the states whose scale was 0, which get 1. `settings.scales` is
    not looked at. The pilot is solved twice: with provisional scales from starts and first rates, then with those of the first time.
    Members that fail do not count, unless all do: then their starts count. Raises Interrupted soon after stop[0] is set.
    """
    starts = evaluate_starts(compiled, x)
    scales = _provisional(starts, first_rates(compiled, x, start, settings), float(times[-1]) - start)
    for _ in range(2):
        batch = solve(compiled, x, times, start, replace(settings, scales=scales), stop)
        good = batch.status == Status.ok
        largest = batch.largest[good] if good.any() else np.abs(starts)
        scales = _median(largest)
        unknown = scales == 0.0
        scales[unknown] = FALL_BACK
    return scales, tuple(name for name, fell in zip(compiled.code.states, unknown, strict=True) if fell)


def first_rates(compiled: Compiled, x: Floats, start: float, settings: Settings) -> Floats:
    """Rates [member, state] at the start, forcings at 0 (they are only a first guess of sizes)."""
    layout = compiled.layout
    group = aligned(layout.slots)
    given = settings_block(layout, replace(settings, scales=np.ones(layout.states)), 1.0, 0)
    rates = np.empty((len(x), layout.states))
    for first in range(0, len(x), LANES):
        rows = x[first : first + LANES]
        group[Head.time], group[Head.until] = start, start + 1.0
        group[layout.first_input : layout.first_input + layout.inputs, : len(rows)] = rows.T
        call_group(compiled.addresses["uq_start"], group, given)
        rates[first : first + LANES] = group[layout.first_rate : layout.first_rate + layout.states, : len(rows)].T
    return rates


def _provisional(starts: Floats, rates: Floats, length: float) -> Floats:
    """Start sizes; where they are 0, how far the first rate would lead; where that is 0 too, infinite: such a state follows the others,
    whose steps are controlled, until its size is known. If no state has a size, all get 1."""
    scales = _median(np.abs(starts))
    led = _median(np.abs(rates)) * length
    scales = np.where(scales > 0, scales, led)
    scales[~(scales > 0)] = np.inf
    return np.full_like(scales, FALL_BACK) if np.all(np.isinf(scales)) else scales


def _median(sizes: Floats) -> Floats:
    """Median over the rows of what is finite; 0 where nothing is."""
    kept = [column[np.isfinite(column)] for column in sizes.T]
    return np.array([np.median(column) if len(column) else 0.0 for column in kept])
