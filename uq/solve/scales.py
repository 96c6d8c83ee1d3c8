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
# Where the first of them is too far for what has no size yet (fast kinetics over a long time), it looks ahead so little first.
NEARER = (1e-14, 1e-12, 1e-10, 1e-8)
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
        found = _ahead(compiled, x, (start, start + part * (end - start)), settings, sizes, stop)
        if found is None and part == HORIZONS[0]:
            for nearer in (*NEARER, part):
                near = _ahead(compiled, x, (start, start + nearer * (end - start)), settings, sizes, stop)
                sizes = sizes if near is None else near
        sizes = sizes if found is None else found
    for passes in range(MOST_PASSES):
        used = _given(sizes)
        found = _found(compiled, x, times, start, replace(settings, scales=used), stop)
        sizes = sizes if found is None else found
        if passes and not np.any(sizes < FALLS * used):
            break
    unknown = sizes == 0.0
    sizes[unknown] = FALL_BACK
    return sizes, tuple(name for name, fell in zip(compiled.code.states, unknown, strict=True) if fell)


def _ahead(
    compiled: Compiled, x: Floats, span: tuple[float, float], settings: Settings, sizes: Floats, stop: NDArray[np.uint8] | None
) -> Floats | None:
    """Sizes after a pass over a span with the sizes known so far; these where the span is none."""
    start, end = span
    if end == start:
        return sizes
    return _found(compiled, x, np.array([end]), start, replace(settings, scales=_given(sizes)), stop)


def _found(compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, stop: NDArray[np.uint8] | None) -> Floats | None:
    """Sizes after one pass; None where no member got through."""
    batch = advance(compiled, x, times, start, settings, stop)
    good = batch.status == Status.ok
    return _median(batch.largest[good]) if good.any() else None


def _given(sizes: Floats) -> Floats:
    """Scales to solve with: a state without a size follows the others, whose steps are controlled; if none has one, all get 1."""
    return np.where(sizes > 0, sizes, np.inf if np.any(sizes > 0) else FALL_BACK)


def _median(sizes: Floats) -> Floats:
    """Median over the rows of what is finite and not 0; 0 where nothing is."""
    kept = [column[np.isfinite(column) & (column > 0)] for column in sizes.T]
    return np.array([np.median(column) if len(column) else 0.0 for column in kept])
