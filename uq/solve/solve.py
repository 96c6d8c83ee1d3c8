"""Solves members: the call of the kernel, and what is worked out from its tables."""

from __future__ import annotations

from typing import Any

import numpy as np
from numpy.typing import NDArray

from uq.errors import Interrupted
from uq.model.layout import Head
from uq.solve.batch import Batch, Settings, Status
from uq.solve.breaks import Segments, segments
from uq.solve.compile import Compiled
from uq.solve.courses import take
from uq.solve.memory import Floats, aligned, settings_block, through_table


def solve(compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, stop: NDArray[np.uint8] | None = None) -> Batch:
    """Solve every member from `start` to the last of `times`.

    x [member, input] in the inputs' units; times [solved] rising, none before start (it may be the first), in the time unit. A member's
    bits depend on the code, times, start, settings and its row of x, on nothing else. Releases the GIL.
    Raises Interrupted soon after another thread sets stop[0]; ValueMistake if a forcing does not cover the time.
    Numerical failures are statuses in the Batch. Method: that of the code, an explicit pair of Dormand and Prince (`uq.model.tableau`),
    a Rosenbrock method for stiff members (`uq.model.rosenbrock5`), or both by what a member needs (`uq.model.switch`), each with its
    continuous extension. Rows of forcings and times that rates are compared with are landed on. What else happens between two
    stages is not seen: a shallow pole of a rate in time, such as |t - 1|^-0.5, may be stepped over at a loose accuracy without a failure;
    so may a pulse in time of another form, or at a time that depends on inputs, if it lasts less than about a two-hundredth of the whole
    time (such models take no step longer than LONGEST_PART of it): make it a forcing, or ask for more accuracy.
    Valid ranges are judged at the start, at the ends of steps and at `times`; what a state does between them is not looked at yet. A
    state is outside where it is so by more than the pair's own error (6 absolute tolerances; 200 of 8(5,3), which is for small ones).
    """
    batch = advance(compiled, x, times, start, settings, stop)
    _fill_outcomes(compiled, np.atleast_2d(np.asarray(x, dtype=np.float64)), np.asarray(times, dtype=np.float64), batch)
    return batch


def advance(compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings, stop: NDArray[np.uint8] | None = None) -> Batch:
    """As `solve`, but without outcomes (they stay unset), so that `times` need not hold the times which courses name."""
    x, times = np.array(x, dtype=np.float64, order="C", ndmin=2), np.append(np.asarray(times, dtype=np.float64), np.inf)
    _check(compiled, x, times[:-1], start, settings)
    flag = np.zeros(1, dtype=np.uint8) if stop is None else stop
    batch = _empty_batch(compiled, len(x), len(times) - 1)
    if len(x):
        end = float(times[-2])
        given = settings_block(compiled.code, settings, end - start, len(times) - 1)
        pieces = segments(compiled.code.forcings, float(start), end, compiled.code.moments, times[:-1].tobytes())
        if _run(compiled, x, times, given, pieces, flag, batch):
            raise Interrupted("solving was stopped")
    return batch


def prepare() -> bool:
    """Whether the kernel must still be compiled on this machine, which the first `solve` then does."""
    from uq.solve.kernel import is_compiled

    return not is_compiled()


def evaluate_starts(compiled: Compiled, x: Floats) -> Floats:
    """Start states [member, state] of members x [member, input]."""
    x = np.asarray(x, dtype=np.float64)
    return through_table(compiled.addresses["uq_starts"], x, compiled.layout.states)


def _check(compiled: Compiled, x: Floats, times: Floats, start: float, settings: Settings) -> None:
    """Callers' defects, told early: memory is not looked after once the kernel runs."""
    states = compiled.layout.states
    if x.ndim != 2 or x.shape[1] != compiled.layout.inputs:
        raise ValueError(f"x has shape {x.shape}, expected (members, {compiled.layout.inputs})")
    if times.ndim != 1 or not len(times) or np.any(np.diff(times) <= 0) or not np.all(np.isfinite(times)) or times[0] < start:
        raise ValueError("times must be finite, rising and not before the start")
    given = {name: getattr(settings, name) for name in ("scales", "lowest", "highest", "negligible")}
    for name, values in given.items():
        if values is not None and np.shape(values) != (states,):
            raise ValueError(f"{name} has shape {np.shape(values)}, expected ({states},)")
    if not settings.accuracy > 0 or not np.all(settings.scales > 0) or not np.all(settings.absolute > 0):
        raise ValueError("accuracy, scales and negligible must be above 0")


def _empty_batch(compiled: Compiled, members: int, times: int) -> Batch:
    layout = compiled.layout
    return Batch(
        values=np.empty((members, layout.observed, times)),
        conditions=np.zeros((members, layout.conditions, times), dtype=np.int8),
        outcomes=np.empty((members, compiled.code.outcomes)),
        status=np.zeros(members, dtype=np.int8),
        end_time=np.empty(members),
        steps=np.zeros(members, dtype=np.int32),
        rejections=np.zeros(members, dtype=np.int32),
        stiff_steps=np.zeros(members, dtype=np.int32),
        switches=np.zeros(members, dtype=np.int32),
        largest=np.empty((members, layout.states)),
    )


def _run(compiled: Compiled, x: Floats, times: Floats, given: Floats, pieces: Segments, flag: NDArray[np.uint8], batch: Batch) -> bool:
    """Let the kernel fill the batch; returns whether it was stopped. `times` ends with inf."""
    from uq.solve import kernel

    layout, address = compiled.layout, compiled.addresses
    lanes = aligned(kernel.GROUPS * layout.slots).reshape(kernel.GROUPS, layout.slots, kernel.LANES)
    functions = [address[name] for name in ("uq_start", "uq_rates", "uq_step", "uq_stiff", "uq_observe")]
    tables = [array.ctypes.data for array in (given, times, batch.values, batch.conditions)]
    calls = kernel.Calls._make((*functions, lanes.ctypes.data, lanes[0].nbytes, *tables))
    lanes.view(np.int64)[:, Head.clock] = calls.times  # lanes without a member look there too
    job = kernel.Job(
        calls,
        kernel.Slots(*(int(getattr(Head, name, getattr(layout, name, -1))) for name in kernel.Slots._fields)),
        kernel.Lanes(lanes, lanes.view(np.int64)),
        kernel.Tables(x, times, pieces.bounds, pieces.jumps, pieces.coefficients, flag),
        _places(layout.moved),
        kernel.Results(*(getattr(batch, name) for name in kernel.Results._fields)),
    )
    with np.errstate(all="ignore"):
        return bool(kernel.run_members_4(job))


def _places(moved: int) -> Any:
    """Nobody is anywhere yet."""
    from uq.solve.kernel import GROUPS, LANES, WAITING, Places

    member, segment = (np.full((GROUPS, LANES), -1, dtype=np.int64) for _ in range(2))
    parked = [np.zeros((2, WAITING, *size), dtype=np.int64) for size in ((moved,), (), ())]
    return Places(member, segment, np.zeros(2, dtype=np.int64), *parked)


def _fill_outcomes(compiled: Compiled, x: Floats, times: Floats, batch: Batch) -> None:
    code = compiled.code
    if not code.outcomes or not len(batch.status):
        return
    courses = [take(course, batch.values, times) for course in code.courses]
    columns = np.column_stack([x, *courses])
    batch.outcomes[:] = through_table(compiled.addresses["uq_outcomes"], columns, code.outcomes)
    batch.outcomes[batch.status != Status.ok] = np.nan
