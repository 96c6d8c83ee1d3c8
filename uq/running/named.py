"""The text after --cluster: what may be named there, and who solves then."""

from __future__ import annotations

from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass
from os import PathLike, fspath
from pathlib import Path
from typing import Literal

from uq.errors import UseMistake
from uq.running.cluster import Blame, Cluster, connected
from uq.running.fleet import There, processes, quiet
from uq.running.observer import Observer
from uq.running.rounds import Hands, Here
from uq.running.threads import all_cores

EXPECTED = "local, local:N, the address of a scheduler such as tcp://host:8786, or a cluster file such as slurm.toml"
SCHEMES = ("tcp", "tls", "ws", "wss")


@dataclass(frozen=True)
class Named:
    """What was named: nothing, processes of this machine, a scheduler, a file for a batch system; `text`: the address or path."""

    kind: Literal["here", "local", "address", "file"]
    text: str = ""
    count: int = 0


def named(cluster: str | PathLike[str] | None) -> Named:
    """What a text names. Raises UseMistake."""
    if cluster is None:
        return Named("here")
    text = fspath(cluster)
    kind, _, rest = text.partition(":")
    if kind == "local" and (not rest or (rest.isascii() and rest.isdecimal() and 0 < int(rest) <= 10_000)):
        return Named("local", count=int(rest) if rest else all_cores())
    if kind in SCHEMES and rest.startswith("//") and rest[2:].rpartition(":")[2].isdecimal():
        return Named("address", text)
    if text.endswith(".toml"):
        return Named("file", text)
    raise UseMistake(f'"{text}"', EXPECTED, key="cluster")


@contextmanager
def gathered(cluster: str | PathLike[str] | None, observer: Observer, blame: Blame) -> Iterator[Hands]:
    """Those who solve, as long as this lasts. Raises UseMistake, StudyError of a cluster file, ClusterError where nobody answers."""
    what = named(cluster)
    if what.kind == "here":
        yield Here()
        return
    if what.kind == "local":
        observer.stage(f"starting {what.count} worker processes")
        with processes(what.count) as (address, fleet), connected(address, ours=True) as client:
            yield Cluster(client, fleet, blame)
    elif what.kind == "address":
        with quiet(), connected(what.text) as client:
            yield Cluster(client, There(what.text), blame)
    else:
        from uq.running.batch import read_batch_system, submitted

        with submitted(read_batch_system(Path(what.text))) as (address, jobs), connected(address, ours=True) as client:
            yield Cluster(client, jobs, blame)
