"""Threads that end within a second when the user says so."""

from __future__ import annotations

import os
from collections.abc import Callable, Iterator
from concurrent.futures import ThreadPoolExecutor, wait
from contextlib import contextmanager
from typing import TypeVar

from uq.errors import Interrupted
from uq.running.observer import Observer

Result = TypeVar("Result")
HEARD_WITHIN = 0.2


def all_cores() -> int:
    """Cores that this process may use."""
    # Not every system lets a process be bound to cores; there, all of them are ours.
    return len(os.sched_getaffinity(0)) if hasattr(os, "sched_getaffinity") else (os.cpu_count() or 1)


@contextmanager
def threads(count: int, observer: Observer) -> Iterator[ThreadPoolExecutor]:
    """A pool that is at rest when the block ends, however it ends.

    Ctrl-C reaches Python's main thread only, which waits here; the solver hears of it through the observer's stop flag and ends within a
    step. Raises Interrupted then.
    """
    pool = ThreadPoolExecutor(count, thread_name_prefix="uq")
    try:
        yield pool
    except (KeyboardInterrupt, Interrupted):
        observer.stop[0] = 1
        raise Interrupted("interrupted; no result was written") from None
    except SystemExit:  # of somebody else's signal handler: without the flag the pool would never be at rest
        observer.stop[0] = 1
        raise
    finally:
        pool.shutdown(wait=True, cancel_futures=True)


def aside(call: Callable[[], Result], observer: Observer) -> Result:
    """What `call` returns, worked out in a thread of its own so that Ctrl-C is heard meanwhile."""
    with threads(1, observer) as pool:
        future = pool.submit(call)
        # A signal that comes at the very moment at which this thread falls asleep does not wake it; so it never sleeps long.
        while not wait([future], timeout=HEARD_WITHIN).done:
            pass
        return future.result()
