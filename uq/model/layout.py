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


class Choice(IntEnum):
    """Slots of models whose members may be solved stiffly; they move with a member."""

    stiff_steps = 0  # accepted steps of the stiff method
    suspicion = 1  # explicit steps that stability seems to have cut short, one after another
    calm = 2  # explicit steps since then that were not; of the stiff method, steps one after another that explicit ones could do as well
    needed = 3  # how much suspicion makes the member stiff
    stayed = 4  # accepted steps since the member became stiff
    since = 5  # when that was
    before = 6  # how long its last explicit step was


class StiffColumn(IntEnum):
    """Columns [state] that a step of the stiff method works in; the stages follow."""

    new = 0  # the states of a stage, in the end the new ones
    stage_rate = 1  # their rates
    coupled = 2  # what earlier stages and time add to them
    drift = 3  # change of the rates with time alone
    tolerance = 4  # of the states at the start of the step
    size = 5  # |J| times the tolerances
    turned = 6  # J times a direction
    residual = 7
    correction = 8
    work = 9
    zero = 10  # nothing is ever put there
    first_stage = 11


class Setting(IntEnum):
    """Slots of the settings, before the blocks absolute tolerance, lowest, highest, weight, hint [state]."""

    accuracy = 0
    attempts = 1  # most steps and rejections of one member
    shortest = 2  # shortest step at time 0
    moment = 3  # a time that is nothing beside the whole
    longest = 4  # longest step of a model whose rates depend on time otherwise than by forcings and moments that are landed on
    ranged = 5  # 1 where any state has a lowest or highest valid value
    # 64-bit integers
    stride = 6  # bytes from one observed value to the next, in the table of values
    truth_stride = 7  # the same in the table of conditions
    scrap = 8  # an address where lanes without an output may write


@dataclass(frozen=True)
class Layout:
    """Slot numbers of one model, from its sizes."""

    inputs: int
    hoisted: int
    states: int
    forcings: int
    observed: int
    conditions: int
    smooth: int = 0  # forcings that are cubics within a segment
    inner: int = 0  # 2 where rates turn at moments of time: first and last time within the segment that they are asked for
    curve_parts: int = 5  # coefficients of the continuous extension for every state
    spare_columns: int = 7  # new states and stages for every state
    choice: int = 0  # len(Choice) where members may be solved stiffly
    jacobian: int = 0  # distinct entries of the Jacobian
    factors: int = 0  # entries of its factors
    stages: int = 0  # of the stiff method

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
    def first_second(self) -> int:
        """Second coefficients of the smooth forcings."""
        return self.first_slope + self.forcings

    @property
    def first_third(self) -> int:
        """Third coefficients of the smooth forcings."""
        return self.first_second + self.smooth

    @property
    def first_inner(self) -> int:
        """The earliest and the latest time within the segment at which rates are asked for."""
        return self.first_third + self.smooth

    @property
    def first_state(self) -> int:
        """States where the lane stands."""
        return self.first_inner + self.inner

    @property
    def first_rate(self) -> int:
        """Their rates there: the first stage of the next step."""
        return self.first_state + self.states

    @property
    def first_largest(self) -> int:
        """Largest size of the states over start and accepted steps."""
        return self.first_rate + self.states

    @property
    def first_choice(self) -> int:
        """What decides between explicit and stiff steps (see `Choice`)."""
        return self.first_largest + self.states

    @property
    def first_direction(self) -> int:
        """The direction of the states that the Jacobian stretches most; the last block that moves with a member."""
        return self.first_choice + self.choice

    @property
    def moved(self) -> int:
        """Number of leading slots that make up a member."""
        return self.first_direction + (self.states if self.choice else 0)

    @property
    def stiff_steps(self) -> int:
        """The slot of the count of stiff steps; -1 where there is none."""
        return self.first_choice + Choice.stiff_steps if self.choice else -1

    @property
    def first_curve(self) -> int:
        """Blocks [state] of the continuous extension of the last accepted step; only valid where an output was due."""
        return self.moved

    @property
    def first_spare(self) -> int:
        """Room for columns [state] within a looped step: the new states, the stages after the first, a place for extra stages."""
        return self.first_curve + self.curve_parts * self.states

    @property
    def first_observed(self) -> int:
        """Observed values at an output time, on their way to the table where there are many of them."""
        return self.first_spare + self.spare_columns * self.states

    @property
    def first_jacobian(self) -> int:
        """Distinct entries of the Jacobian at the start of a stiff step."""
        return self.first_observed + self.observed

    @property
    def first_factor(self) -> int:
        """Entries of the factors of I / (gamma h) - J."""
        return self.first_jacobian + self.jacobian

    @property
    def first_stiff(self) -> int:
        """Columns of a stiff step (see `StiffColumn`)."""
        return self.first_factor + self.factors

    def stiff(self, column: int) -> int:
        """Where such a column begins; the stages are counted from StiffColumn.first_stage on."""
        return self.first_stiff + column * self.states

    @property
    def slots(self) -> int:
        """Number of slots of a lane group."""
        return self.stiff(StiffColumn.first_stage + self.stages) if self.stages else self.first_stiff

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
    def first_weight(self) -> int:
        """Settings: one over the absolute tolerances."""
        return self.first_highest + self.states

    @property
    def first_hint(self) -> int:
        """Settings: a direction of the states in which no part is favoured by any symmetry of a model, about a tolerance in each."""
        return self.first_weight + self.states

    @property
    def setting_slots(self) -> int:
        """Number of slots of the settings."""
        return self.first_hint + self.states
