"""What the queue costs: listing 10 000 jobs, handing in, claiming, looking at it when idle: `python -m tests.bench.queue`.

Targets: 10 000 jobs listed in less than 0.3 s, a study of a batch read and handed in within 20 ms.
"""

from __future__ import annotations

import statistics
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable
from pathlib import Path

from uq.clock import Window
from uq.queue.intake import intakes_of
from uq.queue.job import Intake
from uq.queue.queue import Queue
from uq.study.batch import read_batch

ROOT = Path(__file__).parent.parent.parent
MANY, SOME, REPEATS = 10_000, 200, 5
WINDOW = Window("22:00", "06:00", "Europe/Athens")
BATCH = """schema = 1
[[run]]
study = "{study}"
[run.change]
"parameters.UA_off.triangular.mode" = [{values}]
"""


def seconds(call: Callable[[], object]) -> float:
    begin = time.perf_counter()
    call()
    return time.perf_counter() - begin


def intake(number: int) -> Intake:
    """A job as it is in a large queue: with a window, and with what was changed."""
    changed = {"parameters.UA_off.triangular.mode": number}
    own = {"fingerprint": f"{number:064}", "changed": changed, "window": WINDOW if number % 2 else None}
    return Intake(text="schema = 1\n", files={}, name="tank", title="A tank", members=16384, batch="night", **own)  # type: ignore[arg-type]


def handed_in(folder: Path) -> tuple[float, float]:
    """Seconds for each study of a batch: reading it, and handing it in."""
    values = ", ".join(f"{3 + number / SOME}" for number in range(SOME))
    batch = folder / "batch.toml"
    batch.write_text(BATCH.format(study=ROOT / "configs" / "hold-tank.toml", values=values))
    read_batch(batch)  # what is loaded at the first time is start-up
    begin = time.perf_counter()
    intakes = intakes_of(read_batch(batch), time.time())
    between = time.perf_counter()
    Queue(folder / "batch").submit(intakes)
    return (between - begin) / SOME, (time.perf_counter() - between) / SOME


def listed(home: Path) -> float:
    """Seconds from start to end of a process that lists all jobs, less one that only starts."""
    program = f"from pathlib import Path\nfrom uq.queue.queue import Queue\nqueue = Queue(Path({str(home)!r}))\n"

    def median(text: str) -> float:
        return statistics.median(
            seconds(lambda: subprocess.run([sys.executable, "-c", text], cwd=ROOT, check=True)) for _ in range(REPEATS)
        )

    return median(program + "queue.jobs()") - median(program)


def main() -> None:
    with tempfile.TemporaryDirectory() as name:
        folder = Path(name)
        read, handed = handed_in(folder)
        print(f"{1e3 * read:7.1f} ms  reading a study of a batch")
        print(f"{1e3 * handed:7.1f} ms  handing it in, {SOME} at once  (both together: target 20 ms)")
        queue = Queue(folder / "many")
        print(f"{1e3 * seconds(lambda: queue.submit([intake(-1)])):7.1f} ms  handing in one, the first of a queue")
        taken = seconds(lambda: queue.submit([intake(number) for number in range(MANY)])) / MANY
        print(f"{1e3 * taken:7.2f} ms  handing in each of {MANY} small ones at once")
        print(f"{seconds(lambda: queue.submit([intake(number) for number in range(MANY)])):7.2f} s   handing them in again: nothing new")
        print(f"{statistics.median(seconds(queue.jobs) for _ in range(REPEATS)):7.3f} s   listing {MANY} jobs, in a process at work")
        begin = time.process_time()
        queue.jobs()
        print(f"{time.process_time() - begin:7.3f} s   of processor time for that")
        print(f"{listed(queue.home):7.3f} s   listing {MANY} jobs, beyond start-up  (target 0.3 s)")
        print(f"{1e3 * statistics.median(seconds(queue.next_time) for _ in range(REPEATS)):7.1f} ms  when the next comes due")
        claims = [queue.claim("bench") for _ in range(20)]
        taken = statistics.median(seconds(lambda: claims.append(queue.claim("bench"))) for _ in range(20))
        print(f"{1e3 * taken:7.1f} ms  claiming one of {MANY}")
        beat = statistics.median(seconds(lambda: claims[0] and claims[0].beat({"done": 1})) for _ in range(20))
        print(f"{1e3 * beat:7.1f} ms  a heartbeat")


if __name__ == "__main__":
    main()
