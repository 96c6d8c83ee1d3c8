"""Memory as the written code wants it: groups of slots of eight doubles, on addresses that are multiples of 64."""

from __future__ import annotations

import ctypes

import numpy as np
from numpy.typing import NDArray

from uq.model.code import Code
from uq.model.layout import LANES, Setting
from uq.solve.batch import Settings

Floats = NDArray[np.float64]
ALIGNMENT = 64
# Steps shorter than this part of the whole time are refused even where the time itself is 0.
SHORTEST_PART = 1e-24
# But never shorter than the smallest number that is not rounded to nothing.
SHORTEST = 2.0**-1022
# Where a rate depends on time by more than forcings and landed moments, no step is longer than this part of the whole time: then what lasts
# a two-hundredth of it cannot lie between two stages unseen.
LONGEST_PART = 1e-2
# A state that is far above its scale and would double within this part of the whole time is running away.
MOMENT_PART = 1e-6


def aligned(slots: int) -> Floats:
    """Zeros [slot, lane] that begin on an aligned address."""
    room = np.zeros(slots * LANES + ALIGNMENT // 8)
    first = (-room.ctypes.data % ALIGNMENT) // 8
    return room[first : first + slots * LANES].reshape(slots, LANES)


def settings_block(code: Code, settings: Settings, length: float, times: int) -> Floats:
    """The settings as slots, followed by the place for scrap; `length`: from start to stop; `times`: number of output times."""
    layout, states = code.layout, code.layout.states
    beyond = code.undershoot * settings.absolute
    given = aligned(layout.setting_slots + 1)
    words = given.view(np.int64)
    words[Setting.stride], words[Setting.truth_stride] = 8 * times, times
    words[Setting.scrap] = words[layout.setting_slots :].ctypes.data
    given[Setting.accuracy] = settings.accuracy
    given[Setting.attempts] = settings.max_steps
    given[Setting.shortest] = max(SHORTEST_PART * length, SHORTEST)
    given[Setting.longest] = LONGEST_PART * length
    given[Setting.ranged] = float(np.any(np.isfinite(settings.lowest) | np.isfinite(settings.highest)))
    given[Setting.moment] = MOMENT_PART * length
    given[layout.first_tolerance : layout.first_tolerance + states] = settings.absolute[:, None]
    given[layout.first_lowest : layout.first_lowest + states] = (settings.lowest - beyond)[:, None]
    given[layout.first_highest : layout.first_highest + states] = (settings.highest + beyond)[:, None]
    weights = _weights(settings.absolute)
    given[layout.first_weight : layout.first_weight + states] = weights[:, None]
    given[layout.first_hint : layout.first_hint + states] = (_signs(states) / weights)[:, None]
    return given


def _weights(absolute: Floats) -> Floats:
    """One over the tolerances; while the pilot looks for scales, states without one are measured like the finest of the others."""
    known = absolute[np.isfinite(absolute)]
    return 1.0 / np.where(np.isfinite(absolute), absolute, known.min(initial=1.0))


def _signs(states: int) -> Floats:
    """Numbers between 1/2 and 3/2 with signs in turn: fractions of multiples of the golden ratio."""
    places = np.arange(states)
    return np.asarray((0.5 + (places + 1) * ((np.sqrt(5.0) - 1.0) / 2.0) % 1.0) * np.where(places % 2, -1.0, 1.0))


def through_table(address: int, columns: Floats, width: int) -> Floats:
    """Send rows through a written function that works on whole tables (`@uq_outcomes`, `@uq_starts`).

    columns [row, given]; returns [row, width]. Rows are padded to a multiple of eight with copies of the last one.
    """
    rows, given = columns.shape
    groups = -(-rows // LANES)
    source, target = aligned(groups * given), aligned(groups * width)
    if given and rows:
        padded = columns[np.minimum(np.arange(groups * LANES), rows - 1)]
        source[:] = padded.reshape(groups, LANES, given).transpose(0, 2, 1).reshape(groups * given, LANES)
    function = ctypes.CFUNCTYPE(None, ctypes.c_void_p, ctypes.c_void_p, ctypes.c_int64)(address)
    function(source.ctypes.data, target.ctypes.data, groups)
    spread = target.reshape(groups, width, LANES).transpose(0, 2, 1).reshape(groups * LANES, width)
    return np.ascontiguousarray(spread[:rows])


def call_group(address: int, group: Floats, settings: Floats) -> int:
    """Call a written function on one lane group; returns its mask of lanes."""
    function = ctypes.CFUNCTYPE(ctypes.c_int64, ctypes.c_void_p, ctypes.c_void_p)(address)
    return int(function(group.ctypes.data, settings.ctypes.data))
