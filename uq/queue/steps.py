"""What a runner has decided, told to the queue and to the log."""

from __future__ import annotations

from uq.queue.claims import Claim
from uq.queue.deciding import Finish, GiveBack, LetGo, Pause, Step, Stumble


def carried_out(step: Step, claim: Claim, now: float) -> bool:
    """Whether the queue has taken a step; it does not where the job is another attempt's, or was cancelled meanwhile."""
    match step:
        case Finish(state, reason, note):
            return claim.finish(state, reason, note)
        case GiveBack(why, wait):
            claim.give_back(why, now + wait if wait else None)
        case Pause(reason):
            claim.paused(reason)
        case Stumble(reason):
            claim.stumbled(reason)
        case LetGo():
            pass
    return True


def words_of(step: Step) -> str:
    """A step as it is logged."""
    match step:
        case Finish(state, reason, note):
            return ": ".join(filter(None, (state, reason or note)))
        case GiveBack(why):
            return f"given back: {why}"
        case Pause(reason):
            return f"paused{f': {reason}' if reason else ''}"
        case Stumble(reason):
            return f"did not work: {reason}"
        case LetGo():
            return "cancelled"
