"""Which workers of a cluster may solve: they must work with what we do, or results would not have the same bits."""

from __future__ import annotations

import time
from collections.abc import Mapping
from typing import Any

from uq.errors import ClusterError, Interrupted, UseMistake
from uq.running.abroad import Made, asking, unlike
from uq.running.answering import ANSWERED_WITHIN, answered, each_answer
from uq.running.facts import made_with
from uq.running.fleet import Fleet
from uq.running.observer import Observer
from uq.running.threads import HEARD_WITHIN

# Seconds between two looks at who is there.
LOOKED_EVERY = 1.0


class Muster:
    """Asks every worker once what it works with, and knows those that are fit; one that gives no answer gets nothing to solve."""

    def __init__(self, client: Any, fleet: Fleet) -> None:
        self._client, self._fleet = client, fleet
        self.made: Made = made_with()
        self.cores = 0
        self.fit: set[str] = set()
        self.silent: set[str] = set()
        self._strange: dict[str, str] = {}
        self._looked = self._seen = time.monotonic()
        self._began = False

    def wait(self, observer: Observer) -> None:
        """Waits until a worker is there. Raises UseMistake where those that come first are not fit, ClusterError where none comes."""
        self._seen = time.monotonic()
        told = False
        self._look(observer)
        while not self.fit:
            if not told:
                observer.stage(f"waiting for workers of {self._fleet.words}")
                told = True
            if observer.stop[0]:
                raise Interrupted("interrupted; no result was written")
            time.sleep(HEARD_WITHIN)
            self._look(observer)
        self._began = True

    def look(self, observer: Observer) -> None:
        """Looks now and then who is there. Raises ClusterError where nobody is left, or is for too long."""
        if time.monotonic() - self._looked >= LOOKED_EVERY:
            self._look(observer)

    def _look(self, observer: Observer) -> None:
        if self._client.status != "running":
            raise ClusterError("the scheduler of the cluster was lost")
        threads: Mapping[str, int] = self._client.nthreads()
        self.silent &= set(threads)
        # One that hangs is asked again only where there is nobody else.
        known = {*self.fit, *self._strange, *(self.silent if self.fit else ())}
        new = [address for address in threads if address not in known]
        if new:
            self._ask(new, observer)
        self.fit &= set(threads)
        self.cores = sum(threads[address] for address in self.fit)
        self._looked = time.monotonic()
        self._seen = self._looked if self.fit else self._seen
        gone = self._fleet.gone()
        if not self.fit and (gone or self._looked - self._seen > self._fleet.patience):
            waited = gone or f"for {self._fleet.patience:g} s none has been there"
            raise ClusterError(f"no worker of {self._fleet.words} is left that could solve ({waited}{self._told_strange()})")

    def _told_strange(self) -> str:
        told = "".join(f"; refused: {address} with {words}" for address, words in self._strange.items())
        return told + "".join(f"; no answer within {ANSWERED_WITHIN:g} s: {address}" for address in sorted(self.silent))

    def again(self, observer: Observer) -> None:
        """Asks those that are fit once more, where one of them seems to hang. Raises ClusterError where none answers."""
        every, self.fit = sorted(self.fit), set()
        self._ask(every, observer)
        if not self.fit:
            raise ClusterError(f"no worker of {self._fleet.words} answers{self._told_strange()}; end those that hang")

    def _ask(self, addresses: list[str], observer: Observer) -> None:
        found = self._answers(addresses, observer)
        strange = {address: words for address, made in found.items() if (words := unlike(self.made, made))}
        self.fit |= set(found) - set(strange)
        self.silent -= set(found)
        self._strange |= strange
        if not strange:
            return
        every = "; ".join(f"{address} has {words}" for address, words in strange.items())
        if not self._began:
            remedy = "results would not have the same bits; install the same versions, use nodes of one kind, or start uq on such a node"
            raise UseMistake(f"workers with something else: {every}", "workers with the same as this uq", remedy, "cluster")
        observer.stage(f"workers that work with something else are left out: {every}")

    def _answers(self, addresses: list[str], observer: Observer) -> dict[str, Made]:
        """What workers work with; those that have gone meanwhile, or hang, are left out."""
        patience = ANSWERED_WITHIN

        async def every() -> dict[str, Made | None]:
            return await each_answer(self._made_of, addresses, patience)

        # One that hangs is told by itself; twice as long is for a scheduler that does.
        answers = answered(self._client, every, 2 * patience, observer)
        silent = [address for address, made in answers.items() if made is None and address in self._client.nthreads()]
        if silent:
            self.silent |= set(silent)
            observer.stage(f"workers that give no answer within {patience:g} s get nothing to solve: {', '.join(silent)}")
        return {address: made for address, made in answers.items() if made}

    async def _made_of(self, address: str) -> Made:
        """What one worker works with; empty where it has gone."""
        told = await self._client.scheduler.broadcast(msg={"op": "versions"}, workers=[address], on_error="ignore")
        if address not in told:
            return {}
        python = str(told[address]["packages"]["python"])
        # A function cannot be sent to another Python.
        if not python.startswith(f"{self.made['python']}."):
            return {"uq": "?", "python": python}
        answers = await self._client.run(asking(self.made["uq"]), workers=[address], on_error="return")
        return answer if isinstance(answer := answers.get(address), dict) else {}
