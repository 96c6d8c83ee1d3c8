"""Where the workers of a cluster come from: processes that are started here, or a scheduler that is there already."""

from __future__ import annotations

import logging
import os
import signal
import subprocess
import sys
import tempfile
from collections.abc import Iterator
from contextlib import contextmanager, suppress
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any, Protocol

# Numerical libraries read these when they are loaded; a worker has one core.
LIBRARIES = ("OMP", "OPENBLAS", "MKL", "NUMBA", "BLIS")
ONE_THREAD = {f"{library}_NUM_THREADS": "1" for library in LIBRARIES}
# Unless the user says otherwise: freed memory stays with the process as it does in ours (dask has glibc give back every 64 kB, and a fifth
# of a worker's time went into getting its pages anew), and nobody looks 100 times a second at what is being solved, nor 50 times at whether
# anybody is late.
UNHINDERED = {
    "MALLOC_TRIM_THRESHOLD_": str(64 * 2**20),
    "MALLOC_MMAP_THRESHOLD_": str(32 * 2**20),
    "DASK_DISTRIBUTED__WORKER__PROFILE__ENABLED": "False",
    "DASK_DISTRIBUTED__ADMIN__TICK__INTERVAL": "500ms",
}
# The same for the scheduler and the client in this process.
UNWATCHED = {"distributed.worker.profile.enabled": False, "distributed.admin.tick.interval": "500ms"}
# A task may kill this many workers before it comes back to us as one that does.
KILLS = 2
PATIENCE = 60.0
# A page with what the workers do is not offered; what remains of it takes any free port, so that two runs do not meet there.
SCHEDULER: dict[str, Any] = {"allowed_failures": KILLS - 1, "dashboard": False, "dashboard_address": "127.0.0.1:0"}
# Workers that find no scheduler for so long end by themselves.
DEATH_TIMEOUT = 30


class Fleet(Protocol):
    """Where workers come from. words: what it is called; cores: expected of it; patience: seconds without a worker until it is given up."""

    @property
    def words(self) -> str: ...
    @property
    def cores(self) -> int: ...
    @property
    def patience(self) -> float: ...

    def gone(self) -> str:
        """Why no worker can ever come again; "" where one may."""


@dataclass(frozen=True)
class There:
    """A scheduler that is there already; how many workers it has is its own affair."""

    address: str
    cores: int = 1
    patience: float = PATIENCE

    @property
    def words(self) -> str:
        return self.address

    def gone(self) -> str:
        return ""


@dataclass(frozen=True)
class Processes:
    """Worker processes of this machine, which end with us."""

    cores: int
    every: list[subprocess.Popen[bytes]] = field(default_factory=list)
    patience: float = PATIENCE

    @property
    def words(self) -> str:
        return f"local:{self.cores}"

    def gone(self) -> str:
        return "all its processes have ended" if all(each.poll() is not None for each in self.every) else ""


@contextmanager
def processes(count: int) -> Iterator[tuple[str, Processes]]:
    """A scheduler in this process and so many workers of one thread, each in a process of its own; gives the scheduler's address.

    Each is watched by a process that starts it again where it ends. They have a process group of their own, so that Ctrl-C reaches them
    through us only; where we are killed they find no scheduler and end within seconds.
    """
    fleet = Processes(count)
    with quiet(), local_scheduler() as address, tempfile.TemporaryDirectory(prefix="uq-workers-", ignore_cleanup_errors=True) as place:
        try:
            fleet.every.extend(_started(address, Path(place), number) for number in range(count))
            yield address, fleet
        finally:
            for each in fleet.every:
                _ended(each)


@contextmanager
def local_scheduler() -> Iterator[str]:
    """A scheduler in this process that only this machine can reach; gives its address."""
    from distributed import LocalCluster

    cluster = LocalCluster(
        n_workers=0,
        threads_per_worker=1,
        processes=True,
        host="127.0.0.1",
        silence_logs=logging.CRITICAL,
        scheduler_kwargs=SCHEDULER,
    )
    try:
        yield str(cluster.scheduler_address)
    finally:
        cluster.close()


def _started(address: str, place: Path, number: int) -> subprocess.Popen[bytes]:
    options = {
        "--nthreads": "1",
        "--host": "127.0.0.1",
        # Not a page but the few numbers that a worker tells by HTTP all the same, which any interface would have.
        "--dashboard-address": "127.0.0.1:0",
        "--name": f"uq-{number}",
        "--death-timeout": f"{DEATH_TIMEOUT}",
        "--local-directory": str(place),
    }
    command = [sys.executable, "-m", "distributed.cli.dask_worker", address, "--no-dashboard"]
    # The package may have been found in a way that a new process does not know of.
    found = os.pathsep.join(filter(None, (str(Path(__file__).parents[2]), os.environ.get("PYTHONPATH", ""))))
    environment: dict[str, Any] = {**UNHINDERED, **os.environ, **ONE_THREAD, "PYTHONPATH": found}
    with (place / f"{number}.log").open("wb") as log:
        return subprocess.Popen(
            [*command, *(word for pair in options.items() for word in pair)],
            env=environment,
            stdin=subprocess.DEVNULL,
            stdout=log,
            stderr=log,
            start_new_session=True,
        )


def _ended(process: subprocess.Popen[bytes]) -> None:
    """Ends a worker with the process that watches it: there is nothing left in them that anybody wants."""
    if os.name == "nt":
        process.kill()
    else:
        with suppress(ProcessLookupError):
            os.killpg(process.pid, signal.SIGKILL)
    process.wait()


@contextmanager
def quiet() -> Iterator[None]:
    """What the cluster's own logs say of workers that come and go is told by us in our words; nor does it watch itself meanwhile."""
    import dask
    import distributed  # noqa: F401 - it sets the levels of its loggers when it is loaded

    loggers = [logging.getLogger(name) for name in list(logging.root.manager.loggerDict) if f"{name}.".startswith("distributed.")]
    before = [logger.level for logger in loggers]
    for logger in loggers:
        logger.setLevel(logging.CRITICAL)
    try:
        with dask.config.set(UNWATCHED):
            yield
    finally:
        for logger, level in zip(loggers, before, strict=True):
            logger.setLevel(level)
