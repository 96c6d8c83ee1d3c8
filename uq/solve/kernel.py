# mypy: disable-error-code="untyped-decorator,no-any-return"
"""The one stepping kernel for all models: eight members side by side, each with its own time, step and status.

In: addresses of a model's compiled functions, slots, tables. Out: filled tables. Must not know: what the functions compute.
This is the only door to numba. Kernel, what it calls and the intrinsics are in this one file, because numba's cache does not see edits
elsewhere: raise the number in `run_members_4` whenever anything here or in the tuples' meaning changes.

There are three groups of eight lanes: members take explicit steps in the first, stiff ones in the second, and are started together in the
third, the nursery. A lane that finishes takes the next member. A member whose step says so moves, with its state, to the other group, or
waits until a lane is free there: the stiff group steps only when it is full, or when there is nothing else to do. Nothing that a member is
made of ever depends on its neighbours.
"""

from __future__ import annotations

from typing import Any, NamedTuple

import numpy as np
from llvmlite import ir
from numba import njit, types
from numba.extending import intrinsic

from uq.solve.cached import UNCOUNTED, at_hand, uncounted

LANES = 8
OK = 0
UNKNOWN = 2
EXPLICIT, STIFF, NURSERY = 0, 1, 2
GROUPS = 3
# The stiff group steps before more than LANES wait for it, and while it steps at most these and its own lanes go back.
WAITING = 3 * LANES


class Calls(NamedTuple):
    """Addresses: of the model's functions, of the lane groups, the settings, the times, the values and the conditions; bytes of a group."""

    start: int
    rates: int
    step: int
    stiff: int
    observe: int
    lanes: int
    stride: int
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
    stiff_steps: int
    moved: int


class Lanes(NamedTuple):
    """The lane groups [group, slot, lane], and the same bits as integers."""

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
    stiff_steps: np.ndarray
    switches: np.ndarray
    largest: np.ndarray


class Places(NamedTuple):
    """Per group and lane: its member (in the nursery -1 where none waits) and its segment. Of the members that wait for the explicit and
    for the stiff group: how many there are, their slots [group, place, slot], who they are and their segments [group, place]."""

    member: np.ndarray
    segment: np.ndarray
    parked_count: np.ndarray
    parked: np.ndarray
    parked_member: np.ndarray
    parked_segment: np.ndarray


class Job(NamedTuple):
    """All of it."""

    calls: Calls
    slots: Slots
    lanes: Lanes
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


@njit(forceinline=True, **UNCOUNTED)
def _close(job: Job, group: int, lane: int, member: int, status: int) -> None:
    """Note how a member ended; it has no values from its next output time on, if it failed also at the very time of failure."""
    slots, results, numbers = job.slots, job.results, job.lanes.numbers[group]
    time = numbers[slots.time, lane]
    output = (job.lanes.words[group, slots.clock, lane] - job.calls.times) // 8
    if status != OK and output > 0 and job.tables.times[output - 1] >= time:
        output -= 1
    results.status[member] = status
    results.end_time[member] = time
    results.steps[member] = int(numbers[slots.steps, lane])
    results.rejections[member] = int(numbers[slots.rejections, lane])
    if slots.stiff_steps >= 0:
        results.stiff_steps[member] = int(numbers[slots.stiff_steps, lane])
    for i in range(results.largest.shape[1]):
        results.largest[member, i] = numbers[slots.first_largest + i, lane]
    for k in range(results.values.shape[1]):
        results.values[member, k, output:] = np.nan
    for k in range(results.conditions.shape[1]):
        results.conditions[member, k, output:] = UNKNOWN


@njit(forceinline=True, **UNCOUNTED)
def _load_segment(job: Job, group: int, lane: int, segment: int) -> None:
    """Give a lane the forcings of a segment."""
    slots, tables, numbers = job.slots, job.tables, job.lanes.numbers
    numbers[group, slots.until, lane] = tables.bounds[segment + 1]
    numbers[group, slots.segment_from, lane] = tables.bounds[segment]
    for k in range(tables.coefficients.shape[1]):
        numbers[group, slots.first_base + k, lane] = tables.coefficients[segment, k]


@njit(forceinline=True, **UNCOUNTED)
def _seat(job: Job, lane: int, member: int) -> None:
    """Put a member's inputs, its first output time and its places in the tables into a lane of the nursery."""
    slots, tables, values, conditions = job.slots, job.tables, job.results.values, job.results.conditions
    numbers, words = job.lanes.numbers[NURSERY], job.lanes.words[NURSERY]
    numbers[slots.time, lane] = tables.bounds[0]
    numbers[slots.due, lane] = tables.times[0]
    words[slots.clock, lane] = job.calls.times
    words[slots.place, lane] = job.calls.values + 8 * member * values.shape[1] * values.shape[2]
    words[slots.truth_place, lane] = job.calls.conditions + member * conditions.shape[1] * conditions.shape[2]
    for k in range(tables.x.shape[1]):
        numbers[slots.first_input + k, lane] = tables.x[member, k]
    _load_segment(job, NURSERY, lane, 0)


@njit(forceinline=True, **UNCOUNTED)
def _fill_nursery(job: Job, first: int) -> int:
    """Start up to eight members together, those that cannot start are closed; returns how many were taken from the table."""
    calls, tables, waiting = job.calls, job.tables, job.places.member[NURSERY]
    members, nursery = tables.x.shape[0], calls.lanes + NURSERY * calls.stride
    count = min(LANES, members - first)
    for lane in range(LANES):
        _seat(job, lane, min(first + lane, members - 1))
    failed = _call(calls.start, nursery, calls.settings)
    good = ((1 << count) - 1) & ~failed
    if good != 0 and tables.times[0] == tables.bounds[0]:
        _write_outputs(calls.observe, nursery, calls.settings, good, 0)
    for lane in range(LANES):
        waiting[lane] = first + lane if good & (1 << lane) else -1
        if lane < count and (failed & (1 << lane) or tables.bounds[0] == tables.bounds[-1]):
            _close(job, NURSERY, lane, first + lane, int(job.lanes.numbers[NURSERY, job.slots.status, lane]))
            waiting[lane] = -1
    return count


@njit(forceinline=True, **UNCOUNTED)
def _take(job: Job, group: int, lane: int, place: int) -> None:
    """Move a started member from the nursery into a lane."""
    words, places = job.lanes.words, job.places
    for slot in range(job.slots.moved):
        words[group, slot, lane] = words[NURSERY, slot, place]
    places.member[group, lane] = places.member[NURSERY, place]
    places.segment[group, lane] = 0
    places.member[NURSERY, place] = -1


@njit(forceinline=True, **UNCOUNTED)
def _park(job: Job, group: int, lane: int) -> None:
    """Let the member of a lane wait for the other group."""
    words, places, other = job.lanes.words, job.places, STIFF - group
    place, member = places.parked_count[other], places.member[group, lane]
    for slot in range(job.slots.moved):
        places.parked[other, place, slot] = words[group, slot, lane]
    places.parked_member[other, place] = member
    places.parked_segment[other, place] = places.segment[group, lane]
    places.parked_count[other] += 1
    job.results.switches[member] += 1
    job.lanes.numbers[group, job.slots.alive, lane] = 0.0


@njit(forceinline=True, **UNCOUNTED)
def _unpark(job: Job, group: int, free: int) -> int:
    """Give free lanes to members that wait for the group; returns the lanes that are still free."""
    words, places = job.lanes.words, job.places
    while free != 0 and places.parked_count[group] > 0:
        lane = _lowest_bit(free)
        free ^= 1 << lane
        places.parked_count[group] -= 1
        place = places.parked_count[group]
        for slot in range(job.slots.moved):
            words[group, slot, lane] = places.parked[group, place, slot]
        places.member[group, lane] = places.parked_member[group, place]
        places.segment[group, lane] = places.parked_segment[group, place]
    return free


@njit(forceinline=True, **UNCOUNTED)
def _arrive(job: Job, group: int, arrived: int) -> int:
    """Lanes at the end of their segment get the next one, and write what is due there; returns those whose rates failed at the break."""
    calls, slots, numbers, segment = job.calls, job.slots, job.lanes.numbers[group], job.places.segment[group]
    lanes = calls.lanes + group * calls.stride
    here, stale, left = 0, 0, arrived
    while left != 0:
        lane = _lowest_bit(left)
        left ^= 1 << lane
        if numbers[slots.due, lane] == numbers[slots.time, lane]:
            here |= 1 << lane
        if segment[lane] < job.tables.jumps.size - 1:
            segment[lane] += 1
            _load_segment(job, group, lane, segment[lane])
            if job.tables.jumps[segment[lane]]:
                stale |= 1 << lane
                numbers[slots.stale, lane] = 1.0
    failed = _call(calls.rates, lanes, calls.settings) if stale != 0 else 0
    if here & ~failed:
        _write_outputs(calls.observe, lanes, calls.settings, here & ~failed, 0)
    return failed


@njit(forceinline=True, **UNCOUNTED)
def _end(job: Job, group: int, ended: int, failed: int) -> int:
    """Close the members that failed or reached the last time; returns the lanes that are free now."""
    slots, numbers, free = job.slots, job.lanes.numbers[group], 0
    while ended != 0:
        lane = _lowest_bit(ended)
        bit = 1 << lane
        ended ^= bit
        if failed & bit or numbers[slots.time, lane] == job.tables.bounds[-1]:
            status = int(numbers[slots.status, lane]) if failed & bit else OK
            _close(job, group, lane, job.places.member[group, lane], status)
            numbers[slots.alive, lane] = 0.0
            free |= bit
    return free


@njit(forceinline=True, **UNCOUNTED)
def _advance(job: Job, group: int) -> int:
    """Step a group until some lane needs attention, and see to it; returns the lanes that are free now."""
    calls, told = job.calls, 0
    step, lanes = calls.stiff if group == STIFF else calls.step, calls.lanes + group * calls.stride
    while told == 0 and job.tables.stop[0] == 0:
        told = _call(step, lanes, calls.settings)
    arrived, failed, moving = told & 0xFF, (told >> 8) & 0xFF, (told >> 16) & 0xFF
    if arrived & ~failed:
        failed |= _arrive(job, group, arrived & ~failed)
    free = _end(job, group, arrived | failed, failed)
    moving &= ~free
    free |= moving
    while moving != 0:
        lane = _lowest_bit(moving)
        moving ^= 1 << lane
        _park(job, group, lane)
    return free


@uncounted
def run_members_4(job: Job) -> int:
    """Solve all members; returns 0, or 1 if the flag in `stop` was seen."""
    members, waiting, stop = job.tables.x.shape[0], job.places.member[NURSERY], job.tables.stop
    first = EXPLICIT if job.calls.step != 0 else STIFF
    taken, place, free = 0, LANES, 0xFF
    other = 0xFF  # the free lanes of the stiff group, where members begin explicitly
    while True:
        # every free lane gets a member that waits for it, or else the next one that could start
        if job.places.parked_count[STIFF] != 0:
            other = _unpark(job, STIFF, other)
        if job.places.parked_count[EXPLICIT] != 0:
            free = _unpark(job, EXPLICIT, free)
        while free != 0:
            while place < LANES and waiting[place] < 0:
                place += 1
            if place < LANES:
                lane = _lowest_bit(free)
                _take(job, first, lane, place)
                free ^= 1 << lane
            elif taken < members and stop[0] == 0:
                taken += _fill_nursery(job, taken)
                place = 0
            else:
                break
        if (free == 0xFF and other == 0xFF) or stop[0] != 0:
            return int(stop[0] != 0)
        if free == 0xFF or (other == 0 and first == EXPLICIT):
            other |= _advance(job, STIFF)
        else:
            free |= _advance(job, first)


def is_compiled() -> bool:
    """Whether the kernel's machine code is at hand."""
    return at_hand(run_members_4)
