"""Where every value of a lane group lies: the agreement between the written code and whoever calls it.

A group is one array of slots; a slot is eight doubles, one per lane. `Head` slots come first, then blocks whose sizes depend on the model.
Settings are slots too, every lane holding the same number.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import IntEnum

LANES = 8
# The numbers of out_of_range, not_finite, blew_up, too_many_steps, step_too_small that written code leaves in the status slot.
FAILURES = (2, 3, 4, 5, 7)


class Head(IntEnum):
    """Slots that every model has."""

    time = 0  # where the lane stands
    step = 1  # length that the controller proposes
    until = 2  # end of the present segment: next break, or the last time
    due = 3  # next output time, inf where there is none
    step_from = 4  # start of the last accepted step
    step_taken = 5  # its length
    log_error = 6  # log2 of its squared error, for the controller
    rejected = 7  # 1 where the last attempt was refused
    steps = 8
    rejections = 9
    alive = 10  # 1 where the lane has a member
    segment_from = 11  # start of the present segment
    status = 12  # a Status number once the lane has failed
    stale = 13  # 1 where the rates changed at a break and k1 must be worked out anew
    spoiled = 14  # 1 after an attempt with a rate that is not finite, halved by every accepted step
    # addresses, as 64-bit integers in the place of doubles
    clock = 15  # of the next output time, in a table of times that ends with inf
    place = 16  # where the first observed value at that time goes
    truth_place = 17  # where the first condition at that time goes, a byte


class Setting(IntEnum):
    """Slots of the settings, before the three blocks absolute tolerance, lowest, highest [state]."""

    accuracy = 0
    attempts = 1  # most steps and rejections of one member
    shortest = 2  # shortest step at time 0
    moment = 3  # a time that is nothing beside the whole
    # 64-bit integers
    stride = 4  # bytes from one observed value to the next, in the table of values
    truth_stride = 5  # the same in the table of conditions
    scrap = 6  # an address where lanes without an output may write


@dataclass(frozen=True)
class Layout:
    """Slot numbers of one model, from its sizes."""

    inputs: int
    hoisted: int
    states: int
    forcings: int
    observed: int
    conditions: int

    @property
    def first_input(self) -> int:
        """Inputs of the member."""
        return len(Head)

    @property
    def first_hoisted(self) -> int:
        """Values that depend on inputs alone."""
        return self.first_input + self.inputs

    @property
    def first_base(self) -> int:
        """Values of the forcings at the start of the segment."""
        return self.first_hoisted + self.hoisted

    @property
    def first_slope(self) -> int:
        """Slopes of the forcings within the segment."""
        return self.first_base + self.forcings

    @property
    def first_state(self) -> int:
        """States where the lane stands."""
        return self.first_slope + self.forcings

    @property
    def first_rate(self) -> int:
        """Their rates there: the first stage of the next step."""
        return self.first_state + self.states

    @property
    def first_largest(self) -> int:
        """Largest size of the states over start and accepted steps; the last block that moves with a member."""
        return self.first_rate + self.states

    @property
    def moved(self) -> int:
        """Number of leading slots that make up a member at its start."""
        return self.first_largest + self.states

    @property
    def first_curve(self) -> int:
        """Five blocks [state] of the continuous extension of the last accepted step; only valid where an output was due."""
        return self.moved

    @property
    def first_spare(self) -> int:
        """Room for seven columns [state] within a looped step: the new states and the stages after the first."""
        return self.first_curve + 5 * self.states

    @property
    def first_observed(self) -> int:
        """Observed values at an output time, on their way to the table where there are many of them."""
        return self.first_spare + 7 * self.states

    @property
    def slots(self) -> int:
        """Number of slots of a lane group."""
        return self.first_observed + self.observed

    @property
    def first_tolerance(self) -> int:
        """Settings: absolute tolerances."""
        return len(Setting)

    @property
    def first_lowest(self) -> int:
        """Settings: lowest valid values."""
        return self.first_tolerance + self.states

    @property
    def first_highest(self) -> int:
        """Settings: highest valid values."""
        return self.first_lowest + self.states

    @property
    def setting_slots(self) -> int:
        """Number of slots of the settings."""
        return self.first_highest + self.states
