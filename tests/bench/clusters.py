"""What a second worker process brings, and what a cluster costs beside threads: `python -m tests.bench.clusters [MEMBERS]`.

Target: two local processes at least 1.8 times one on a run of 30 s. Predator and prey as in `tests.bench.running`, 2 097 152 members (7.3
million solves for bands, limits, outcomes, ranking; histograms). The solving is timed from the first block that is gathered to the
last, so without the start of the processes (2 to 3 s); the whole run with everything.
"""

from __future__ import annotations

import os
import statistics
import sys
import tempfile
import time
from pathlib import Path

import uq
from tests.bench.running import PREY
from uq.running.observer import Progress, Silent
from uq.store.result import Result
from uq.study.read import parse_study

REPEATS = 3
WAYS = (("one process", "local:1", 1), ("two processes", "local:2", 2), ("one thread", None, 1), ("two threads", None, 2))


class Timed(Silent):
    """When solving began and ended."""

    def __init__(self) -> None:
        super().__init__()
        self.begin = self.end = 0.0

    def stage(self, words: str) -> None:
        if words.startswith("working out"):
            self.end = time.perf_counter()

    def progress(self, progress: Progress) -> None:
        self.begin = self.begin or time.perf_counter()


def ran(members: int, cluster: str | None, cores: int) -> tuple[float, float, Result]:
    """Seconds of solving, seconds of the whole run, the result."""
    study, observer, begin = parse_study(PREY).with_changes({"plan.members": members}), Timed(), time.perf_counter()
    with tempfile.TemporaryDirectory() as folder:
        result = uq.run(study, Path(folder) / "result", threads=cores, cluster=cluster, observer=observer)
    return observer.end - observer.begin, time.perf_counter() - begin, result


def main() -> None:
    members = int(sys.argv[1]) if len(sys.argv) > 1 else 2**21
    found: dict[str, list[tuple[float, float]]] = {name: [] for name, _, _ in WAYS}
    prints = set()
    for _ in range(REPEATS):
        for name, cluster, cores in WAYS:
            solving, whole, result = ran(members, cluster, cores)
            found[name].append((solving, whole))
            prints.add(result.attributes["content_fingerprint"])
            print(f"{name:14} solving {solving:6.1f} s, whole run {whole:6.1f} s", flush=True)
    middle = {name: tuple(statistics.median(column) for column in zip(*times, strict=True)) for name, times in found.items()}
    print(f"{members} members, {os.cpu_count()} cores, load {os.getloadavg()[0]:.1f}, medians of {REPEATS}, {len(prints)} kinds of bits")
    for one, two in (("one process", "two processes"), ("one thread", "two threads"), ("two threads", "two processes")):
        ratios = ", ".join(f"{a / b:.2f}" for a, b in zip(middle[one], middle[two], strict=True))
        print(f"{two} over {one}, solving and whole run: {ratios}")


if __name__ == "__main__":
    main()
