"""Which workers of a cluster may solve: they must work with what we do, or results would not have the same bits."""

from __future__ import annotations

import time
from collections.abc import Iterable, Mapping
from typing import Any

from uq.errors import ClusterError, Interrupted, UseMistake
from uq.running.abroad import Made, asking, unlike
from uq.running.facts import made_with
from uq.running.fleet import Fleet
from uq.running.observer import Observer
from uq.running.threads import HEARD_WITHIN

# Seconds between two looks at who is there.
LOOKED_EVERY = 1.0


class Muster:
    """Asks every worker once what it works with, and knows those that are fit."""

    def __init__(self, client: Any, fleet: Fleet) -> None:
        self._client, self._fleet = client, fleet
        self.made: Made = made_with()
        self.cores = 0
        self.fit: set[str] = set()
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
        new = [address for address in threads if address not in self.fit and address not in self._strange]
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
        return "".join(f"; refused: {address} with {words}" for address, words in self._strange.items())

    def _ask(self, addresses: Iterable[str], observer: Observer) -> None:
        found = self._answers(list(addresses))
        strange = {address: words for address, made in found.items() if (words := unlike(self.made, made))}
        self.fit |= set(found) - set(strange)
        self._strange |= strange
        if not strange:
            return
        every = "; ".join(f"{address} has {words}" for address, words in strange.items())
        if not self._began:
            remedy = "results would not have the same bits; install the same versions, use nodes of one kind, or start uq on such a node"
            raise UseMistake(f"workers with something else: {every}", "workers with the same as this uq", remedy, "cluster")
        observer.stage(f"workers that work with something else are left out: {every}")

    def _answers(self, addresses: list[str]) -> dict[str, Made]:
        """What workers work with; those that have gone meanwhile are left out."""
        told = self._client.get_versions()["workers"]
        python = {address: str(told[address]["packages"]["python"]) for address in addresses if address in told}
        # A function cannot be sent to another Python.
        same = [address for address, version in python.items() if version.startswith(f"{self.made['python']}.")]
        found: dict[str, Made] = {address: {"uq": "?", "python": python[address]} for address in python if address not in same}
        if same:
            answers = self._client.run(asking(self.made["uq"]), workers=same, on_error="return")
            found |= {address: answer for address, answer in answers.items() if isinstance(answer, dict)}
        return found
