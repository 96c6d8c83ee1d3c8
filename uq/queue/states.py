"""The states of a job and the events that lead from one to another: all of them, in one table."""

from __future__ import annotations

from collections.abc import Mapping
from enum import StrEnum


class State(StrEnum):
    """Where a job stands."""

    WAITING = "waiting"
    HELD = "held"
    RUNNING = "running"
    PAUSING = "pausing"
    PAUSED = "paused"
    DONE = "done"
    PARTIAL = "partial"
    FAILED = "failed"
    CANCELLED = "cancelled"


class Event(StrEnum):
    """What happens to a job."""

    SUBMIT = "submit"  # it is handed in
    HOLD = "hold"  # its window closes, or it has to wait before it is tried again
    COME_DUE = "come_due"  # the time that it was held for has come
    CLAIM = "claim"  # a runner begins an attempt
    PAUSE = "pause"  # a user wants it to stop for now
    RESUME = "resume"
    CANCEL = "cancel"
    RETRY = "retry"  # a user wants another attempt after its end
    COMPLETE = "complete"  # the result is written
    CUT_SHORT = "cut_short"  # deadline or budget came first: the result of the last completed round is written
    FAIL = "fail"  # there is no result, and another attempt would give none either
    GIVE_BACK = "give_back"  # the runner has to go, through no fault of the job
    STOP = "stop"  # the runner has stopped and kept the progress, for a pause or because something needs a user
    STUMBLE = "stumble"  # an attempt came to grief for a reason that may pass
    LOSE = "lose"  # the runner died: nobody holds the lock
    GIVE_UP = "give_up"  # an attempt stumbled or was lost once more than may be


# Handed in. Whether a job that waits is held is a matter of the clock: HELD is never stored, see `times.due`.
BEGIN = State.WAITING

TABLE: Mapping[State, Mapping[Event, State]] = {
    State.WAITING: {
        Event.HOLD: State.HELD,
        Event.CLAIM: State.RUNNING,
        Event.PAUSE: State.PAUSED,
        Event.CANCEL: State.CANCELLED,
    },
    State.HELD: {
        Event.COME_DUE: State.WAITING,
        Event.PAUSE: State.PAUSED,
        Event.CANCEL: State.CANCELLED,
    },
    State.RUNNING: {
        Event.PAUSE: State.PAUSING,
        Event.CANCEL: State.CANCELLED,
        Event.COMPLETE: State.DONE,
        Event.CUT_SHORT: State.PARTIAL,
        Event.FAIL: State.FAILED,
        Event.GIVE_BACK: State.WAITING,
        Event.STOP: State.PAUSED,
        Event.STUMBLE: State.WAITING,
        Event.LOSE: State.WAITING,
        Event.GIVE_UP: State.FAILED,
    },
    State.PAUSING: {
        Event.CANCEL: State.CANCELLED,
        # It was done before it could be stopped.
        Event.COMPLETE: State.DONE,
        Event.CUT_SHORT: State.PARTIAL,
        Event.FAIL: State.FAILED,
        # However the attempt ends else, what was wanted is a pause.
        Event.GIVE_BACK: State.PAUSED,
        Event.STOP: State.PAUSED,
        Event.STUMBLE: State.PAUSED,
        Event.LOSE: State.PAUSED,
    },
    State.PAUSED: {Event.RESUME: State.WAITING, Event.RETRY: State.WAITING, Event.CANCEL: State.CANCELLED},
    State.PARTIAL: {Event.RETRY: State.WAITING},
    State.FAILED: {Event.RETRY: State.WAITING},
    State.CANCELLED: {Event.RETRY: State.WAITING},
    State.DONE: {},
}

# Some runner has it, unless it died.
OWNED = (State.RUNNING, State.PAUSING)
# Nothing happens any more but on request.
ENDED = (State.DONE, State.PARTIAL, State.FAILED, State.CANCELLED)
OPEN = tuple(state for state in State if state not in ENDED)
# An equal study that is handed in again is this job, unless it stands here.
REPLACED = (State.FAILED, State.CANCELLED)
# What a user may ask for, in the order in which it is offered.
REQUESTS = (Event.PAUSE, Event.RESUME, Event.CANCEL, Event.RETRY)
# The events with which an attempt comes to a result, or to none for good.
FINISHES: Mapping[State, Event] = {State.DONE: Event.COMPLETE, State.PARTIAL: Event.CUT_SHORT, State.FAILED: Event.FAIL}


def after(state: State, event: Event) -> State | None:
    """Where an event leads; None where it cannot happen."""
    return TABLE[state].get(event)


def requests(state: State) -> tuple[Event, ...]:
    """What a user may ask for in a state."""
    return tuple(event for event in REQUESTS if event in TABLE[state])
