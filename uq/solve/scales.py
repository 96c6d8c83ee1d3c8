"""The size of every state, from a pilot: what the absolute tolerances are measured by."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
from numpy.typing import NDArray

from uq.solve.batch import Settings, Status
from uq.solve.compile import Compiled
from uq.solve.memory import Floats
from uq.solve.solve import advance, evaluate_starts

FALL_BACK = 1.0
# The pilot looks ahead a little, then further: a state that starts at nothing has a size before its error could grow unseen.
HORIZONS = (1e-6, 1e-4, 1e-2, 1e-1)
# A scale found to be this much smaller than the one it was solved with may be made of uncontrolled error: it is found again.
FALLS = 0.5
# Such a scale falls by about the accuracy in every pass, at worst from the largest number there is.
MOST_PASSES = 200


def pilot_scales(
    compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, stop: NDArray[np.uint8] | None = None
) -> tuple[Floats, tuple[str, ...]]:
    """The scale of every state: the median over the pilot of its largest size, among the members in which it is not 0.

    x [pilot, input]; returns scales [state] in state units and the names of the states whose scale was 0, which get 1. `settings.scales` is
    not looked at. The pilot is solved over a millionth, a ten-thousandth, ... of the time, then over all of it, each time with the scales
    found before, at least twice and until no scale falls any more: error that was not controlled never becomes a scale.
    Members that fail do not count; where all do, the scales found before they did stand. Raises Interrupted soon after stop[0] is set.
    """
    end = float(times[-1])
    sizes = _median(np.abs(evaluate_starts(compiled, x)))
    for part in HORIZONS:
        ahead = np.array([start + part * (end - start)])
        if ahead[0] > start:
            sizes = _found(compiled, x, ahead, start, replace(settings, scales=_given(sizes)), sizes, stop)
    for passes in range(MOST_PASSES):
        used = _given(sizes)
        sizes = _found(compiled, x, times, start, replace(settings, scales=used), sizes, stop)
        if passes and not np.any(sizes < FALLS * used):
            break
    unknown = sizes == 0.0
    sizes[unknown] = FALL_BACK
    return sizes, tuple(name for name, fell in zip(compiled.code.states, unknown, strict=True) if fell)


def _found(
    compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, before: Floats, stop: NDArray[np.uint8] | None
) -> Floats:
    """Sizes after one pass; `before` where no member got through."""
    batch = advance(compiled, x, times, start, settings, stop)
    good = batch.status == Status.ok
    return _median(batch.largest[good]) if good.any() else before


def _given(sizes: Floats) -> Floats:
    """Scales to solve with: a state without a size follows the others, whose steps are controlled; if none has one, all get 1."""
    return np.where(sizes > 0, sizes, np.inf if np.any(sizes > 0) else FALL_BACK)


def _median(sizes: Floats) -> Floats:
    """Median over the rows of what is finite and not 0; 0 where nothing is."""
    kept = [column[np.isfinite(column) & (column > 0)] for column in sizes.T]
    return np.array([np.median(column) if len(column) else 0.0 for column in kept])
