"""Seven thousand studies that are nearly right: each is a clear mistake or a result; no traceback, no hang, under 2 GiB.

    nice python -m pytest tests/long/test_fuzz_studies.py -s -n0

Every study that stands is compiled and solved with its scenarios: 24 members, at the settings that a run would take. A member may fail;
that is a status. UQ_FUZZ_CASES and UQ_FUZZ_FIRST choose how many cases and the first seed; a case is `tests.fuzz_studies.study_text(seed)`.
"""

from __future__ import annotations

import multiprocessing
import os
import resource
import signal
import sys
import time
import traceback
from concurrent.futures import ProcessPoolExecutor
from types import FrameType
from typing import NamedTuple

import numpy as np

from tests.fuzz_studies import judge, study_text
from uq.errors import Interrupted, UqError
from uq.study.study import Study

CASES = int(os.environ.get("UQ_FUZZ_CASES", "7000"))
FIRST = int(os.environ.get("UQ_FUZZ_FIRST", "20261201"))
CHUNK = 100
# A case that takes longer hangs; the solver is told to stop a little before.
SECONDS = 60
LARGEST = 2 * 1024**3
MEMBERS = 24
# More output times than this are read, but not solved here: they ask for memory by themselves.
MOST_TIMES = 20_000


class Told(NamedTuple):
    """What came of the cases of one process."""

    mistakes: int
    studies: int
    failed: int
    refused: int
    slowest: float
    memory: int
    wrong: tuple[str, ...]


def solved(study: Study, stop: np.ndarray) -> int:
    """How many of a few members fail; raises UqError where the model cannot be built."""
    from uq.model.build import build
    from uq.solve.batch import Settings, Status
    from uq.solve.compile import compile_code
    from uq.solve.solve import solve

    if len(study.times.solved) > MOST_TIMES:
        return 0
    u = np.random.default_rng(study.plan.seed).uniform(2.0**-53, 1 - 2.0**-53, size=(MEMBERS, len(study.inputs.items)))
    settings = Settings(study.plan.accuracy, np.ones(len(study.states)), study.lowest, study.highest, negligible=study.negligible)
    batch = solve(compile_code(build(study.equations)), study.inputs.values(u), study.times.solved, study.time.start, settings, stop)
    assert np.all(np.isfinite(batch.values[batch.status == Status.ok]))
    return int(np.count_nonzero(batch.status != Status.ok))


def chunk(first: int) -> Told:
    """One process: a hundred cases."""
    stop = np.zeros(1, dtype=np.uint8)

    def too_long(number: int, frame: FrameType | None) -> None:
        if stop[0]:
            raise TimeoutError
        stop[0] = 1
        signal.alarm(10)

    signal.signal(signal.SIGALRM, too_long)
    counts = {"mistakes": 0, "studies": 0, "failed": 0, "refused": 0}
    slowest, wrong = 0.0, []
    for seed in range(first, first + CHUNK):
        stop[0] = 0
        signal.alarm(SECONDS - 10)
        began = time.perf_counter()
        try:
            study = judge(study_text(seed))
            counts["mistakes" if study is None else "studies"] += 1
            for each in () if study is None else (study, *(scenario.study for scenario in study.scenarios)):
                counts["failed"] += solved(each, stop)
        except Interrupted:
            wrong.append(f"seed {seed}: still solving after {SECONDS - 10} s")
        except UqError as error:
            counts["refused"] += 1
            sys.stderr.write(f"seed {seed}: refused by {type(error).__name__}: {error}\n")
        except BaseException:  # noqa: BLE001 (whatever escapes is what this test looks for)
            wrong.append(f"seed {seed}: {traceback.format_exc(limit=-4)}")
        finally:
            signal.alarm(0)
        slowest = max(slowest, time.perf_counter() - began)
    memory = resource.getrusage(resource.RUSAGE_SELF).ru_maxrss * 1024
    return Told(*counts.values(), slowest, memory, tuple(wrong))


def test_every_case_is_a_mistake_or_a_result() -> None:
    firsts = range(FIRST, FIRST + CASES, CHUNK)
    with ProcessPoolExecutor(2, mp_context=multiprocessing.get_context("spawn"), max_tasks_per_child=1) as pool:
        found = list(pool.map(chunk, firsts))
    wrong = [text for told in found for text in told.wrong]
    studies, mistakes = sum(told.studies for told in found), sum(told.mistakes for told in found)
    print(f"\nseeds {FIRST} to {FIRST + len(found) * CHUNK - 1}: {mistakes} clear mistakes, {studies} studies", end="")
    print(f" ({sum(told.failed for told in found)} members failed, {sum(told.refused for told in found)} refused by a later room)", end="")
    print(f", slowest {max(told.slowest for told in found):.1f} s, largest {max(told.memory for told in found) / 2**20:.0f} MiB")
    assert not wrong, "\n".join(wrong[:20])
    assert max(told.memory for told in found) < LARGEST
    assert studies > 0.05 * CASES
