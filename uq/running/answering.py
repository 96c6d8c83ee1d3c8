"""What is asked of a cluster's scheduler or workers: with a stated patience, and left off at once where the run is stopped."""

from __future__ import annotations

import asyncio
from collections.abc import Awaitable, Callable
from concurrent.futures import wait
from typing import Any, TypeVar

from uq.errors import Interrupted
from uq.running.observer import Observer
from uq.running.threads import HEARD_WITHIN

Answer = TypeVar("Answer")
# Seconds that a worker may take to say what it works with, or to take in a parcel: it may have to load numba first, on a busy machine.
ANSWERED_WITHIN = 60.0
STOPPED = "interrupted; no result was written"


def answered(client: Any, ask: Callable[[], Awaitable[Answer]], within: float, observer: Observer) -> Answer:
    """What `ask` gives, called in the client's own thread, where its methods can be waited for.

    Raises TimeoutError after `within` seconds, Interrupted where the run is stopped meanwhile.
    """

    async def bounded() -> Answer:
        return await asyncio.wait_for(ask(), within)

    future = asyncio.run_coroutine_threadsafe(bounded(), client.loop.asyncio_loop)
    try:
        while not wait([future], timeout=HEARD_WITHIN).done:
            if observer.stop[0]:
                raise Interrupted(STOPPED)
        return future.result()
    finally:
        future.cancel()


async def each_answer(ask: Callable[[str], Awaitable[Answer]], addresses: list[str], within: float) -> dict[str, Answer | None]:
    """What `ask` gives for every address, side by side; None of those that give nothing within so many seconds, or an error."""

    async def one(address: str) -> Answer | None:
        try:
            return await asyncio.wait_for(ask(address), within)
        except (TimeoutError, OSError):
            return None

    return dict(zip(addresses, await asyncio.gather(*map(one, addresses)), strict=True))
