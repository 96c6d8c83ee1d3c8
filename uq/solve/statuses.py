"""Every status in a sentence with advice."""

from __future__ import annotations

from uq.solve.batch import Status

SENTENCES = (
    (Status.ok, "The member was solved to the last time."),
    (Status.ended_by_event, "An event ended the member, which is complete and keeps its last values."),
    (
        Status.out_of_range,
        "A state left its valid range: check the inputs of these members, or widen `valid` if the model holds beyond it.",
    ),
    (
        Status.not_finite,
        "A start or a rate was not a finite number (a root or logarithm of a negative number, a division by zero), however short the step: "
        "guard the expression, for instance with max(x, 0).",
    ),
    (
        Status.blew_up,
        "A state grew beyond all bounds in finite time: look for a missing limit in the model, or give the state a `valid` range.",
    ),
    (
        Status.too_many_steps,
        "The solver needed more steps than it may take: the accuracy is finer than the model deserves, rates jump at values of "
        "states, or the member is stiff and the study asks for explicit steps.",
    ),
    (Status.too_many_events, "Events followed each other without end: give them a delay, or `once = true`."),
    (
        Status.step_too_small,
        "The steps became too short to go on: a rate jumps or has a pole there; make it smooth, or make the jump a forcing (landed on).",
    ),
    (Status.out_of_time, "The model written in Python did not answer in time."),
)


def describe(status: Status) -> str:
    """What a status means and what to do about it, as a sentence."""
    return dict(SENTENCES)[status]
