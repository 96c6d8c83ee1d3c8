# mypy: disable-error-code="untyped-decorator,no-any-return"
"""The one stepping kernel for all models: eight members side by side, each with its own time, step and status.

In: addresses of a model's compiled functions, slots, tables. Out: filled tables. Must not know: what the functions compute.
This is the only door to numba. Kernel, what it calls and the intrinsics are in this one file, because numba's cache does not see edits
elsewhere: raise the number in `run_members_3` whenever anything here or in the tuples' meaning changes.

A lane that finishes takes the next member from the nursery, a second group of eight lanes in which members are started together; nothing
that a member is made of ever depends on its neighbours.
"""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np
from llvmlite import ir
from numba import njit, types
from numba.extending import intrinsic

from uq.solve.cached import at_hand, kernel

LANES = 8
OK = 0
UNKNOWN = 2


class Calls(NamedTuple):
    """Addresses: of the model's functions, of the two lane groups, the settings, the times, the values and the conditions."""

    start: int
    rates: int
    step: int
    observe: int
    lanes: int
    nursery: int
    settings: int
    times: int
    values: int
    conditions: int


class Slots(NamedTuple):
    """Slot numbers (see `uq.model.layout`), and how many slots move with a member."""

    time: int
    until: int
    due: int
    steps: int
    rejections: int
    alive: int
    segment_from: int
    status: int
    stale: int
    clock: int
    place: int
    truth_place: int
    first_input: int
    first_base: int
    first_largest: int
    moved: int


class Group(NamedTuple):
    """A lane group as slots times lanes, and the same bits as integers."""

    numbers: np.ndarray
    words: np.ndarray


class Tables(NamedTuple):
    """What is given: x [member, input], times [time + 1] (the last is inf), segments (bounds [segment + 1], jumps [segment], coefficients
    of the forcings [segment, slot]), and a flag that stops all."""

    x: np.ndarray
    times: np.ndarray
    bounds: np.ndarray
    jumps: np.ndarray
    coefficients: np.ndarray
    stop: np.ndarray


class Results(NamedTuple):
    """What is filled in, member by member (see `Batch`)."""

    values: np.ndarray
    conditions: np.ndarray
    status: np.ndarray
    end_time: np.ndarray
    steps: np.ndarray
    rejections: np.ndarray
    largest: np.ndarray


class Places(NamedTuple):
    """Per lane: its member and its segment; per place of the nursery: the member that waits there, -1 where there is none."""

    member: np.ndarray
    segment: np.ndarray
    waiting: np.ndarray


class Job(NamedTuple):
    """All of it."""

    calls: Calls
    slots: Slots
    lanes: Group
    nursery: Group
    tables: Tables
    places: Places
    results: Results


@intrinsic
def _write_outputs(typingctx: Any, address: Any, lanes: Any, settings: Any, due: Any, strict: Any) -> Any:
    """Call `@uq_observe` at an address, where every lane is at its output time and its state is known to be valid."""
    signature = types.void(types.int64, types.int64, types.int64, types.int64, types.int64)

    def generate(context: Any, builder: Any, signature: Any, args: Any) -> Any:
        kind = ir.FunctionType(ir.IntType(64), [ir.IntType(64)] * 4)
        builder.call(builder.inttoptr(args[0], kind.as_pointer()), args[1:])
        return context.get_dummy_value()

    return signature, generate


@intrinsic
def _call(typingctx: Any, address: Any, lanes: Any, settings: Any) -> Any:
    """Call the function at an address with two pointers; gives its i64."""
    signature = types.int64(types.int64, types.int64, types.int64)

    def generate(context: Any, builder: Any, signature: Any, args: Any) -> Any:
        kind = ir.FunctionType(ir.IntType(64), [ir.IntType(64), ir.IntType(64)])
        return builder.call(builder.inttoptr(args[0], kind.as_pointer()), [args[1], args[2]])

    return signature, generate


@intrinsic
def _lowest_bit(typingctx: Any, mask: Any) -> Any:
    """Number of the lowest bit that is set."""

    def generate(context: Any, builder: Any, signature: Any, args: Any) -> Any:
        return builder.cttz(args[0], ir.Constant(ir.IntType(1), 1))

    return types.int64(types.int64), generate


@njit(forceinline=True)
def _close(job: Job, group: Group, lane: int, member: int, status: int) -> None:
    """Note how a member ended; it has no values from its next output time on, if it failed also at the very time of failure."""
    slots, results = job.slots, job.results
    time = group.numbers[slots.time, lane]
    output = (group.words[slots.clock, lane] - job.calls.times) // 8
    if status != OK and output > 0 and job.tables.times[output - 1] >= time:
        output -= 1
    results.status[member] = status
    results.end_time[member] = time
    results.steps[member] = int(group.numbers[slots.steps, lane])
    results.rejections[member] = int(group.numbers[slots.rejections, lane])
    for i in range(results.largest.shape[1]):
        results.largest[member, i] = group.numbers[slots.first_largest + i, lane]
    for k in range(results.values.shape[1]):
        results.values[member, k, output:] = np.nan
    for k in range(results.conditions.shape[1]):
        results.conditions[member, k, output:] = UNKNOWN


@njit(forceinline=True)
def _load_segment(job: Job, group: Group, lane: int, segment: int) -> None:
    """Give a lane the forcings of a segment."""
    slots, tables = job.slots, job.tables
    group.numbers[slots.until, lane] = tables.bounds[segment + 1]
    group.numbers[slots.segment_from, lane] = tables.bounds[segment]
    for k in range(tables.coefficients.shape[1]):
        group.numbers[slots.first_base + k, lane] = tables.coefficients[segment, k]


@njit(forceinline=True)
def _seat(job: Job, lane: int, member: int) -> None:
    """Put a member's inputs, its first output time and its places in the tables into a lane of the nursery."""
    slots, tables, values, conditions = job.slots, job.tables, job.results.values, job.results.conditions
    numbers, words = job.nursery.numbers, job.nursery.words
    numbers[slots.time, lane] = tables.bounds[0]
    numbers[slots.due, lane] = tables.times[0]
    words[slots.clock, lane] = job.calls.times
    words[slots.place, lane] = job.calls.values + 8 * member * values.shape[1] * values.shape[2]
    words[slots.truth_place, lane] = job.calls.conditions + member * conditions.shape[1] * conditions.shape[2]
    for k in range(tables.x.shape[1]):
        numbers[slots.first_input + k, lane] = tables.x[member, k]
    _load_segment(job, job.nursery, lane, 0)


@njit(forceinline=True)
def _fill_nursery(job: Job, first: int) -> int:
    """Start up to eight members together, those that cannot start are closed; returns how many were taken from the table."""
    calls, tables, waiting = job.calls, job.tables, job.places.waiting
    members = tables.x.shape[0]
    count = min(LANES, members - first)
    for lane in range(LANES):
        _seat(job, lane, min(first + lane, members - 1))
    failed = _call(calls.start, calls.nursery, calls.settings)
    good = ((1 << count) - 1) & ~failed
    if good != 0 and tables.times[0] == tables.bounds[0]:
        _write_outputs(calls.observe, calls.nursery, calls.settings, good, 0)
    for lane in range(LANES):
        waiting[lane] = first + lane if good & (1 << lane) else -1
        if lane < count and (failed & (1 << lane) or tables.bounds[0] == tables.bounds[-1]):
            _close(job, job.nursery, lane, first + lane, int(job.nursery.numbers[job.slots.status, lane]))
            waiting[lane] = -1
    return count


@njit(forceinline=True)
def _take(job: Job, lane: int, place: int) -> None:
    """Move a started member from the nursery into a lane."""
    for slot in range(job.slots.moved):
        job.lanes.words[slot, lane] = job.nursery.words[slot, place]
    job.places.member[lane] = job.places.waiting[place]
    job.places.segment[lane] = 0
    job.places.waiting[place] = -1


@njit(forceinline=True)
def _arrive(job: Job, arrived: int) -> int:
    """Lanes at the end of their segment get the next one, and write what is due there; returns those whose rates failed at the break."""
    calls, slots, numbers, segment = job.calls, job.slots, job.lanes.numbers, job.places.segment
    here, stale, left = 0, 0, arrived
    while left != 0:
        lane = _lowest_bit(left)
        left ^= 1 << lane
        if numbers[slots.due, lane] == numbers[slots.time, lane]:
            here |= 1 << lane
        if segment[lane] < job.tables.jumps.size - 1:
            segment[lane] += 1
            _load_segment(job, job.lanes, lane, segment[lane])
            if job.tables.jumps[segment[lane]]:
                stale |= 1 << lane
                numbers[slots.stale, lane] = 1.0
    failed = _call(calls.rates, calls.lanes, calls.settings) if stale != 0 else 0
    if here & ~failed:
        _write_outputs(calls.observe, calls.lanes, calls.settings, here & ~failed, 0)
    return failed


@njit(forceinline=True)
def _end(job: Job, ended: int, failed: int) -> int:
    """Close the members that failed or reached the last time; returns the lanes that are free now."""
    slots, numbers, free = job.slots, job.lanes.numbers, 0
    while ended != 0:
        lane = _lowest_bit(ended)
        bit = 1 << lane
        ended ^= bit
        if failed & bit or numbers[slots.time, lane] == job.tables.bounds[-1]:
            status = int(numbers[slots.status, lane]) if failed & bit else OK
            _close(job, job.lanes, lane, job.places.member[lane], status)
            numbers[slots.alive, lane] = 0.0
            free |= bit
    return free


@kernel
def run_members_3(job: Job) -> int:
    """Solve all members; returns 0, or 1 if the flag in `stop` was seen."""
    members, waiting, stop = job.tables.x.shape[0], job.places.waiting, job.tables.stop
    taken, place, free = 0, LANES, 0xFF
    while True:
        # every free lane gets the next member that could start
        while free != 0:
            while place < LANES and waiting[place] < 0:
                place += 1
            if place < LANES:
                lane = _lowest_bit(free)
                _take(job, lane, place)
                free ^= 1 << lane
            elif taken < members and stop[0] == 0:
                taken += _fill_nursery(job, taken)
                place = 0
            else:
                break
        if free == 0xFF or stop[0] != 0:
            return int(stop[0] != 0)
        told = 0
        while told == 0 and stop[0] == 0:
            told = _call(job.calls.step, job.calls.lanes, job.calls.settings)
        arrived, failed = told & 0xFF, (told >> 8) & 0xFF
        if arrived & ~failed:
            failed |= _arrive(job, arrived & ~failed)
        free |= _end(job, arrived | failed, failed)


def is_compiled() -> bool:
    """Whether the kernel's machine code is at hand."""
    return at_hand(run_members_3)
