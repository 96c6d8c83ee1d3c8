"""A queue whose runners are killed again and again, until every job is done: used by the short test and by the long one.

A server process, `python -m tests.queue_kills`, has everything loaded and forks a runner for every line that it reads, so that a runner
lives from its very first moment on and a kill costs no start of Python. The runner ends by SIGKILL at a place of our own choosing (those
of `tests.killed`, and around every transaction and every renaming of the queue), or is killed from outside at any moment.
"""

from __future__ import annotations

import json
import os
import random
import signal
import subprocess
import sys
import time
from collections.abc import Callable, Iterator
from contextlib import contextmanager, suppress
from pathlib import Path
from typing import Any

from tests import killed
from tests.kill_runs import BINNED, KEPT, PRECISE
from tests.killed import Fault, around, cut_off
from uq.errors import EXIT_SERVICE
from uq.queue.database import Database
from uq.queue.intake import Terms, intake_of
from uq.queue.queue import Queue
from uq.store.open import open_result
from uq.study.read import parse_study

# Two rounds each; the last one three or four.
STUDIES = {"kept": KEPT.replace("8192", "4096"), "binned": BINNED.replace("8192", "4096"), "precise": PRECISE}
# Besides those of a run: within a transaction, before and after it holds; before and after progress is taken over.
PLACES = (*killed.PLACES, "begun", "commit", "committed", "rename", "renamed")
# A job may lose more runners than there are kills.
PATIENT = Terms(retries=10_000)
ROOT = Path(__file__).parent.parent


def hooked(fault: Fault) -> None:
    """Hooks our own functions: the package itself has no switch for it."""
    from uq.running.part import Gathering
    from uq.store import whole

    for module in [each for name, each in sys.modules.items() if name.startswith("uq.store")]:
        if getattr(module, "put", None) is whole.put and module is not whole:
            module.put = cut_off(fault, whole.put)  # type: ignore[attr-defined]
    whole.flush = around(fault, "flush", "flushed", whole.flush)
    Path.replace = around(fault, "name", "named", Path.replace)  # type: ignore[method-assign]
    Path.rename = around(fault, "rename", "renamed", Path.rename)  # type: ignore[method-assign]
    Gathering.add = around(fault, "gather", "block", Gathering.add)  # type: ignore[method-assign]
    Database.writing = cut_transactions(fault, Database.writing)  # type: ignore[method-assign]


def cut_transactions(fault: Fault, writing: Callable[..., Any]) -> Callable[..., Any]:
    @contextmanager
    def called(self: Database) -> Iterator[Any]:
        with writing(self) as connection:
            fault("begun")
            yield connection
            fault("commit")
        fault("committed")

    return called


def runner(asked: dict[str, Any]) -> None:
    """One runner, working until nothing is due. ahead: seconds by which its clock is ahead of ours."""
    from uq.queue.bell import Bell
    from uq.queue.runner import Means, Runner
    from uq.running.keeping import Pace

    def clock() -> float:
        return time.time() + asked.get("ahead", 0.0)

    hooked(Fault(asked.get("place", "nowhere"), asked.get("number", 1)))
    with open(asked["log"], "a", encoding="utf-8") as log:

        def tell(text: str) -> None:
            log.write(f"{text}\n")
            log.flush()

        means = Means(cluster=asked.get("cluster"), block_rows=asked.get("rows", 64), pace=Pace(0.0, 0.0))
        Runner(Queue(Path(asked["home"]), clock), f"runner {os.getpid()}", Bell(), tell, means, clock).work(once=True)


def serve() -> None:
    """Forks a runner for every line, JSON of what `runner` is asked, and answers how it ended.

    workers: seconds until one of the processes that the runner has started is killed, and so on; seconds: until it is killed itself.
    """
    import tempfile

    import uq

    with tempfile.TemporaryDirectory() as folder:
        # What a first run loads and compiles is then there in every fork.
        for name, text in STUDIES.items():
            uq.run(parse_study(text, name=name), Path(folder) / name)
    sys.stdout.write("ready\n")
    sys.stdout.flush()
    for line in sys.stdin:
        asked = json.loads(line)
        child = os.fork()
        if child == 0:
            try:
                runner(asked)
            except BaseException as error:  # noqa: BLE001 - the fork must end here, whatever happens
                sys.stderr.write(f"{type(error).__name__}: {error}\n")
                os._exit(getattr(error, "exit_code", 1))
            os._exit(0)
        for seconds in asked.get("workers", ()):
            time.sleep(seconds)
            kill_one_below(child)
        if asked.get("seconds"):
            time.sleep(asked["seconds"])
            os.kill(child, signal.SIGKILL)
        _, status = os.waitpid(child, 0)
        sys.stdout.write(f"{os.waitstatus_to_exitcode(status)}\n")
        sys.stdout.flush()


def below(parent: int) -> list[int]:
    """All processes that one has started, and those that these have."""
    found, every = [parent], {}
    for place in Path("/proc").iterdir():
        if place.name.isdecimal():
            with suppress(OSError):
                every[int(place.name)] = int((place / "stat").read_text().rpartition(")")[2].split()[1])
    for each in found:
        found += [child for child, its in every.items() if its == each]
    return found[1:]


def kill_one_below(parent: int) -> None:
    """Kills any process that this one has started, a worker where there are any."""
    workers = below(parent)
    if workers:
        with suppress(ProcessLookupError):
            os.kill(random.choice(workers), signal.SIGKILL)


class Server:
    """The server, as seen from a test."""

    def __init__(self) -> None:
        command = [sys.executable, "-m", "tests.queue_kills"]
        self.process = subprocess.Popen(command, cwd=ROOT, stdin=subprocess.PIPE, stdout=subprocess.PIPE, text=True)
        assert self._heard() == "ready"

    def run(self, **asked: Any) -> int:
        """Lets a runner work; the code it ended with, -9 where it was killed."""
        assert self.process.stdin is not None
        self.process.stdin.write(json.dumps(asked) + "\n")
        self.process.stdin.flush()
        return int(self._heard())

    def _heard(self) -> str:
        assert self.process.stdout is not None
        return self.process.stdout.readline().strip()

    def __enter__(self) -> Server:
        return self

    def __exit__(self, *_: object) -> None:
        assert self.process.stdin is not None
        assert self.process.stdout is not None
        self.process.stdin.close()
        self.process.wait()
        self.process.stdout.close()


def handed_in(queue: Queue) -> None:
    """Every study once more."""
    studies = [parse_study(text, name=name) for name, text in STUDIES.items()]
    queue.submit([intake_of(study, time.time(), PATIENT) for study in studies], again=True)


def undisturbed(server: Server, home: Path) -> dict[str, str]:
    """The content fingerprints of the studies where nobody kills."""
    queue = Queue(home)
    handed_in(queue)
    assert server.run(home=str(home), log=str(home / "log.txt")) == 0
    return all_done(queue)


def all_done(queue: Queue) -> dict[str, str]:
    """That every job is done, once; the content fingerprints by study."""
    found: dict[str, set[str]] = {}
    for job in queue.jobs():
        events = [each.event for each in queue.history(job.number)]
        assert (job.state, events.count("complete"), events[-1]) == ("done", 1, "complete"), (job, events)
        assert job.folder is not None
        assert sorted(each.name for each in job.folder.iterdir()) == ["result.nc", "study.toml", "tallies.nc"]
        found.setdefault(job.name, set()).add(open_result(job.folder).attributes["content_fingerprint"])
    queue.close()
    assert all(len(each) == 1 for each in found.values()), found
    return {name: each.pop() for name, each in found.items()}


def survived(server: Server, home: Path, kills: int, seed: int, wanted: dict[str, str]) -> int:
    """Kills runners of one queue so many times, handing the studies in again whenever all are done; how many jobs came to their end."""
    chosen, queue, done = random.Random(seed), Queue(home), 0
    handed_in(queue)
    while done < kills:
        asked: dict[str, Any] = {"home": str(home), "log": str(home / "log.txt")}
        if chosen.random() < 0.6:
            asked |= {"place": chosen.choice(PLACES), "number": chosen.randint(1, 40)}
        else:
            asked["seconds"] = chosen.uniform(0.01, 1.5)
        code = server.run(**asked)
        assert code in (0, -signal.SIGKILL), (home / "log.txt").read_text()
        done += code != 0
        if all(job.state == "done" for job in queue.jobs()):
            handed_in(queue)
    assert server.run(home=str(home), log=str(home / "log.txt")) == 0
    assert all_done(queue) == wanted
    return len(queue.jobs())


def survived_on_processes(server: Server, home: Path, rounds: int, seed: int, wanted: dict[str, str]) -> None:
    """As `survived`, with two worker processes, which are killed as well: two and the runner in every round."""
    chosen, queue = random.Random(seed), Queue(home)
    handed_in(queue)
    asked = {"home": str(home), "log": str(home / "log.txt"), "cluster": "local:2"}
    for _ in range(rounds):
        workers = [chosen.uniform(1.0, 4.0) for _ in range(2)]
        assert server.run(**asked, workers=workers, seconds=chosen.uniform(0.1, 3.0)) in (0, EXIT_SERVICE, -signal.SIGKILL)
    # What may pass is waited for: up to an hour.
    for ahead in range(10):
        assert server.run(**asked, ahead=3600.0 * ahead) in (0, EXIT_SERVICE), (home / "log.txt").read_text()
        if all(job.state == "done" for job in queue.jobs()):
            break
    assert all_done(queue) == wanted


if __name__ == "__main__":
    serve()
