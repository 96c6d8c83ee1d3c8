"""The runner: takes the next job, runs it, tells the queue how far it is, and hears when it shall stop."""

from __future__ import annotations

import threading
import time
import traceback
from collections.abc import Callable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass
from pathlib import Path

from uq.errors import FatalMemberError, Interrupted, NoClusterError, StorageError, UqError, UseMistake
from uq.queue.attempt import answered, finished_before, holds_no_more, study_of
from uq.queue.bell import Bell
from uq.queue.claims import Claim
from uq.queue.deciding import GiveBack, Step, after_stop, after_trouble, trouble_of
from uq.queue.heart import Heart
from uq.queue.logs import LOG, Log, Tell
from uq.queue.queue import Queue
from uq.queue.reserve import Reserve
from uq.queue.steps import carried_out, words_of
from uq.queue.watch import Watch
from uq.running.keeping import USUAL, Pace

# Seconds between two looks of an idle runner at the queue.
POLL = 2.0
# Seconds to wait where the queue cannot be asked, or told what has become of a job; how often the latter is tried.
AGAIN, TRIES = 5.0, 12


@dataclass(frozen=True)
class Means:
    """What jobs are run with: threads (0: all cores), the cluster, rows of a block (0: fitting), how often progress is kept."""

    threads: int = 0
    cluster: str | Path | None = None
    block_rows: int = 0
    pace: Pace = USUAL


@dataclass(frozen=True)
class Runner:
    """One runner; there may be as many on one queue as one likes. name: what the queue calls it; tell: where its log goes besides the
    files of the jobs; clock: epoch seconds."""

    queue: Queue
    name: str
    bell: Bell
    tell: Tell
    means: Means = Means()
    clock: Callable[[], float] = time.time

    def work(self, once: bool = False) -> bool:
        """Works until the bell rings; with `once` until nothing is due. Whether the last job was given back unfinished.

        Raises StorageError where the queue cannot be asked; without `once` it says so and tries again. UseMistake where the means are
        wrong, such as a cluster whose workers do not fit. NoClusterError, with `once`, where jobs still wait since the cluster was away.
        """
        unfinished, said = False, ""
        waiting: dict[int, str] = {}
        while not self.bell.rung:
            try:
                claim = self.queue.claim(self.name)
                nap = self._nap() if claim is None else 0.0
                said = ""
            except StorageError as error:
                if once:
                    raise
                if str(error) != said:
                    self.tell(f"uq: {error}; trying again")
                said = str(error)
                self.bell.sleep(AGAIN)
                continue
            if claim is not None:
                with claim:
                    step = self._job(claim)
                unfinished = isinstance(step, GiveBack) and self.bell.rung
                waiting.pop(claim.job.number, None)
                if isinstance(step, GiveBack) and step.away:
                    waiting[claim.job.number] = step.why
            elif once:
                break
            else:
                self.bell.sleep(nap)
        if once and waiting and not self.bell.rung:
            raise NoClusterError(left_waiting(waiting))
        return unfinished

    def _nap(self) -> float:
        """How long an idle runner may sleep: until the next job is due, or until it has to see whether one was handed in."""
        due = self.queue.next_time()
        return POLL if due is None else min(max(due - self.clock(), 0.05), POLL)

    def _job(self, claim: Claim) -> Step:
        """One attempt at a job, from its beginning to its end; what has become of it."""
        log = Log(claim.folder.parent / LOG, claim.job.number, claim.attempt, self.tell, self.clock)
        watch = Watch(log, self.clock, claim.job.progress.get("settled", ()))
        log(f"{claim.job.name}, {claim.job.members} members, on {self.name}")
        with Reserve(claim.folder.parent) as reserve:
            with self._heart(claim, watch, log) as heart:
                step = self._run(claim, watch, heart, log)
            log(words_of(step))
            self._carry_out(step, claim, log, reserve)
        if heart.misuse is not None:
            # Started wrongly, this runner would bring every job to grief.
            raise heart.misuse
        return step

    @contextmanager
    def _heart(self, claim: Claim, watch: Watch, log: Log) -> Iterator[Heart]:
        heart = Heart(claim, watch, self.bell, log, self.clock)
        self.bell.over(watch)
        # What the queue wants may have changed since the claim, and a deadline may be over.
        heart.beat()
        thread = threading.Thread(target=heart.go_on, name="uq heartbeat", daemon=True)
        thread.start()
        try:
            yield heart
        finally:
            self.bell.over(None)
            heart.over.set()
            thread.join()
            heart.beat()

    def _run(self, claim: Claim, watch: Watch, heart: Heart, log: Log) -> Step:
        """Runs the study of a claim; every way in which that can end becomes what is to be done with the job."""
        from uq.pipeline import run
        from uq.running.start import Start

        means = self.means
        command = f"uq work (job {claim.job.number}, attempt {claim.attempt})"
        start = Start(command=command, pace=means.pace, so_far=heart.so_far)
        try:
            study = watch.study = study_of(claim)
            # What is done already gives the answer at a deadline: nobody has to be called for that.
            cluster = None if heart.order() == "deadline" else means.cluster
            result = finished_before(claim) or run(
                study, claim.folder, threads=means.threads, observer=watch, block_rows=means.block_rows, start=start, cluster=cluster
            )
            return answered(result, watch, log)
        except (Interrupted, KeyboardInterrupt) as stopped:
            log(str(stopped) or "interrupted")
            heart.exit_code = Interrupted.exit_code
            return after_stop(heart.order())
        except Exception as error:  # noqa: BLE001 - whatever goes wrong with one job must not end the runner
            trouble = trouble_of(error, isinstance(error, UqError) and holds_no_more(claim.folder))
            if trouble.kind == "defect":
                log("".join(traceback.format_exception(error)))
            if isinstance(error, FatalMemberError):
                log("ended every process that solved it", error.block, error.member)
            if isinstance(error, UseMistake):
                heart.misuse = error
            heart.exit_code = error.exit_code if isinstance(error, UqError) else UqError.exit_code
            # What goes wrong while a run is being stopped is no trouble of the job.
            asked = heart.order()
            return after_stop(asked) if asked and trouble.kind in ("cluster", "worker") else after_trouble(trouble)

    def _carry_out(self, step: Step, claim: Claim, log: Log, reserve: Reserve) -> None:
        """Tells the queue what has become of a job. Where that is not possible the job is claimed again, as after the death of a runner."""
        for left in reversed(range(TRIES)):
            try:
                if not carried_out(step, claim, self.clock()):
                    log(f"the job is not this attempt's any more; what it has done is in {claim.folder}")
                return
            except StorageError as error:
                log(f"{error}; {'trying again' if left else 'given up'}")
                reserve.free()
                if left:
                    time.sleep(AGAIN / TRIES)


def left_waiting(jobs: Mapping[int, str]) -> str:
    """What is said of jobs that wait for a cluster, by number with the reason."""
    numbers, (*_, why) = ", ".join(map(str, jobs)), jobs.values()
    told = f"job {numbers} waits" if len(jobs) == 1 else f"jobs {numbers} wait"
    return f"{told} for the cluster, with what is done ({why}); the next runner that finds it goes on"
