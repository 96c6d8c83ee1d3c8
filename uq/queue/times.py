"""When a job may start, and how long it waits after it stumbled: decided from values, the clock is an argument."""

from __future__ import annotations

from dataclasses import dataclass

from uq.clock import When, Window, zone_of

__all__ = ["Hold", "When", "Window", "back_off", "deadline_of", "due"]

# Seconds: the first wait after an attempt that came to grief; every further one is twice as long, up to the longest.
SHORTEST_WAIT, LONGEST_WAIT = 60.0, 3600.0


@dataclass(frozen=True)
class Hold:
    """A wait that began at a moment and lasts until another."""

    begun: float
    until: float


def back_off(stumbles: int) -> float:
    """Seconds to wait after the n-th attempt in a row that came to grief: 1, 2, 4 ... minutes, at most an hour."""
    return min(SHORTEST_WAIT * 2.0 ** min(max(stumbles - 1, 0), 20), LONGEST_WAIT)


def due(now: float, not_before: float | None, hold: Hold | None, window: Window | None, deadline: float | None = None) -> float:
    """The first moment, from `now` on, at which a job may start; at its deadline it may whatever its window, since it only answers then.

    Where the clock was set back to before a wait had begun, that wait is over: it must not grow by what the clock lost.
    """
    over = hold.until if hold is not None and now >= hold.begun else now
    at = max(now, over, now if not_before is None else not_before)
    at = at if window is None else window.opening(at)
    return at if deadline is None else min(at, max(now, over, deadline))


def deadline_of(deadline: When, now: float, not_before: float | None, window: Window | None) -> float:
    """The moment of a deadline. A time of day is the first such after the job may start: "06:00" is no deadline before it could begin."""
    zone = zone_of(window.timezone if window else "")
    return deadline.after(now if deadline.dated else due(now, not_before, None, window), zone)
