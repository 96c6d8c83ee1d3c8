"""The workers of a batch system: a cluster file, what is submitted for it, and how long its workers may live.

The jobs are made by dask-jobqueue, which is an optional extra: pip install "uq-ivp[batch]".
"""

from __future__ import annotations

import re
import signal
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from pathlib import Path
from typing import Any, ClassVar

from uq.errors import Mistake, StudyError, UseMistake, ValueMistake
from uq.running.fleet import DEATH_TIMEOUT, ONE_THREAD, SCHEDULER, UNHINDERED, quiet
from uq.study import values as read
from uq.study.columns import Files
from uq.study.fields import entry, read_table, refuse
from uq.study.plan import Found
from uq.study.toml import read_toml
from uq.study.values import Frame
from uq.units import parse_unit

SYSTEMS = ("slurm", "pbs")
INSTALL = 'pip install "uq-ivp[batch]"'
# A worker ends by itself so long before its job is ended for it: a block, and what the worker holds, then have somewhere to go.
LEAST_MARGIN = 120.0
MARGIN_SHARE = 0.1
SHORTEST_WALLTIME = 5 * 60.0
_CLOCK = re.compile(r"(?:(\d+)-)?(\d+):([0-5]\d):([0-5]\d)")


def span(value: object, frame: Frame) -> float:
    """A time span in seconds: "2 h", or as batch systems write it, "02:00:00"."""
    match = _CLOCK.fullmatch(value) if isinstance(value, str) else None
    if match:
        days, hours, minutes, seconds = (int(part or 0) for part in match.groups())
        return float(((24 * days + hours) * 60 + minutes) * 60 + seconds)
    if not isinstance(value, str) or frame.quantity_of(value) is None:
        raise ValueMistake(read.show(value), 'a time such as "2 h" or "02:00:00"')
    return read.quantity_in(value, parse_unit("s"), frame)


@dataclass(frozen=True, kw_only=True)
class BatchSystem:
    """A cluster file: the batch system, what one job asks of it, and how many jobs there shall be."""

    system: str = entry("batch system: slurm or pbs", read.choice(SYSTEMS))
    cores: int = entry("cores of a job; each has a worker of its own", read.whole(1))
    memory: int = entry('memory of a job, as "32 GB"', read.size)
    walltime: float = entry('time of a job, as "2 h"', span)
    jobs: int = entry("jobs that shall run; with `jobs_least` the most", read.whole(1), 1)
    jobs_least: int | None = entry(
        "jobs kept however little there is to do; where it is stated their number follows the work",
        read.whole(1),
        None,
        "always `jobs`",
    )
    queue: str = entry("queue or partition", read.text, "", "the system's own")
    account: str = entry("account or project that is charged", read.text, "", "the system's own")
    directives: tuple[str, ...] = entry("more options of the batch system, as they stand in a script", read.listed(read.text, "texts"), ())
    before: tuple[str, ...] = entry("lines of shell that run before the worker, such as module load", read.listed(read.text, "texts"), ())
    python: str = entry("interpreter on the nodes, with this version of uq", read.text, "", "the one that runs here")
    interface: str = entry("network interface between here and the nodes, as ib0", read.text, "", "the system's own")
    scratch: str = entry("folder on the nodes for what a worker writes", read.text, "", "the folder of the job")
    logs: str = entry("folder for the logs of the jobs", read.text, "", "no logs")
    patience: float = entry("how long to wait while no worker is there", span, 86400.0, "1 day")

    later: ClassVar[tuple[str, ...]] = ()

    def __post_init__(self) -> None:
        refuse(self.mistakes())

    def mistakes(self) -> Found:
        """What cannot stand in this file."""
        if self.walltime < SHORTEST_WALLTIME:
            yield ("walltime",), ValueMistake(f"{self.walltime:g} s", f"at least {SHORTEST_WALLTIME:g} s", "workers take a minute to come")
        if self.jobs_least is not None and self.jobs_least > self.jobs:
            yield ("jobs_least",), ValueMistake(f"{self.jobs_least}", f"at most `jobs`, {self.jobs}")
        if self.patience <= 0:
            yield ("patience",), ValueMistake(f"{self.patience:g} s", "a time above 0")

    @property
    def words(self) -> str:
        return f"{self.system}, {self.jobs} jobs of {self.cores} cores"


def lifetime(walltime: float) -> tuple[float, float]:
    """Seconds after which a worker ends by itself, and by how many more or fewer it does: always before the walltime, not all at once."""
    margin = max(LEAST_MARGIN, MARGIN_SHARE * walltime)
    return walltime - margin, margin / 2


def read_batch_system(path: Path) -> BatchSystem:
    """A cluster file, checked in full; raises StudyError with every mistake."""
    try:
        text = path.read_text(encoding="utf-8")
    except (OSError, UnicodeDecodeError) as error:
        words = error.strerror if isinstance(error, OSError) else "it is not UTF-8"
        raise StudyError([Mistake(str(path), 0, 0, "cluster", f"a file that cannot be read ({words})", "a cluster file")]) from None
    document, notes = read_toml(text, str(path))
    if not notes.mistakes:
        sheet = read_table(BatchSystem, document, Frame(None, None, True, Files(None)))
        for place, mistake in sheet.mistakes:
            notes.refused(place, mistake)
        if sheet.whole is not None:
            return sheet.whole
    raise StudyError(notes.in_order())


@dataclass(frozen=True)
class Jobs:
    """The jobs of a batch system as where workers come from."""

    system: BatchSystem

    @property
    def words(self) -> str:
        return self.system.words

    @property
    def cores(self) -> int:
        return self.system.jobs * self.system.cores

    @property
    def patience(self) -> float:
        return self.system.patience

    def gone(self) -> str:
        return ""


@contextmanager
def submitted(system: BatchSystem) -> Iterator[tuple[str, Jobs]]:
    """The scheduler in this process, its workers in jobs, as long as this lasts; gives the scheduler's address. Raises UseMistake."""
    with quiet(), prepared(system) as cluster:
        if system.jobs_least is None:
            cluster.scale(jobs=system.jobs)
        else:
            # As many as there are seconds of work: a block lasts about one, and twice as many as cores are handed out.
            cluster.adapt(minimum_jobs=system.jobs_least, maximum_jobs=system.jobs, target_duration="1s")
        yield str(cluster.scheduler_address), Jobs(system)


def script(system: BatchSystem) -> str:
    """What would be submitted for every job; needs no batch system. Raises UseMistake where the extra is not installed."""
    with quiet(), prepared(system) as cluster:
        return str(cluster.job_script())


@contextmanager
def prepared(system: BatchSystem) -> Iterator[Any]:
    """A cluster of dask-jobqueue without any job yet. Raises UseMistake where that is not installed."""
    # Its import has Ctrl-C end the whole process at once; what is done would not be kept.
    heard = signal.getsignal(signal.SIGINT)
    try:
        import dask_jobqueue
    except ImportError:
        raise UseMistake("a cluster file without dask-jobqueue installed", INSTALL, key="cluster") from None
    finally:
        if heard is not None and signal.getsignal(signal.SIGINT) is not heard:
            signal.signal(signal.SIGINT, heard)
    kinds = {"slurm": dask_jobqueue.SLURMCluster, "pbs": dask_jobqueue.PBSCluster}
    cluster = kinds[system.system](**arguments(system))
    try:
        yield cluster
    finally:
        cluster.close()


def arguments(system: BatchSystem) -> dict[str, Any]:
    """A cluster file in the words of dask-jobqueue. One worker process per core: part of the work is done by Python itself."""
    life, stagger = lifetime(system.walltime)
    given: dict[str, Any] = {
        "cores": system.cores,
        "processes": system.cores,
        "memory": f"{system.memory} B",
        "walltime": clock(system.walltime),
        "job_extra_directives": list(system.directives),
        "job_script_prologue": [*(f"export {name}={value}" for name, value in {**UNHINDERED, **ONE_THREAD}.items()), *system.before],
        "worker_extra_args": ["--lifetime", f"{life:.0f}s", "--lifetime-stagger", f"{stagger:.0f}s", "--no-dashboard"],
        "death_timeout": DEATH_TIMEOUT * 2,
        "scheduler_options": SCHEDULER,
    }
    named = ("queue", "account", "python", "interface")
    given |= {name: value for name in named if (value := getattr(system, name))}
    folders = {"local_directory": system.scratch, "log_directory": system.logs}
    return given | {name: value for name, value in folders.items() if value}


def clock(seconds: float) -> str:
    """A time span as batch systems write it, HH:MM:SS."""
    minutes, rest = divmod(round(seconds), 60)
    return f"{minutes // 60:02}:{minutes % 60:02}:{rest:02}"
