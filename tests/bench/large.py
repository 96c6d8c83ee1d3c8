"""Large runs: `python -m tests.bench.large [MEMBERS]` (default 10 000 000).

Targets: ten million solves under 800 MB and, per member, within 1.3 of a run of 20 000 members, statistics included.
"""

from __future__ import annotations

import statistics
import subprocess
import sys
import tempfile
from pathlib import Path

from tests.bench.running import PREY

PROGRAM = """
import resource, sys
import uq
facts = uq.run(uq.read_study(sys.argv[1]), sys.argv[2]).attributes
used = resource.getrusage(resource.RUSAGE_SELF)
print(facts["solves"], used.ru_utime + used.ru_stime, used.ru_maxrss / 1000)
"""
LEAST, SMALL, REPEATS = 512, 20_000, 5


def measured(folder: Path, name: str, members: int) -> tuple[int, float, float]:
    """Solves of a run in a process of its own, seconds of one core that it used, peak of its memory in MB."""
    text = PREY.replace("members = 65536", f"members = {members}").replace("[plan]", '[plan]\nask = ["bands", "limits", "outcomes"]')
    study = folder / f"{name}.toml"
    study.write_text(text, encoding="utf-8")
    command = [sys.executable, "-c", PROGRAM, str(study), str(folder / name)]
    solves, used, peak = subprocess.run(command, capture_output=True, text=True, check=True).stdout.split()
    return int(solves), float(used), float(peak)


def main(members: int) -> None:
    with tempfile.TemporaryDirectory() as place:

        def median(size: int) -> tuple[int, float]:
            runs = [measured(Path(place), f"{size}-{number}", size) for number in range(REPEATS)]
            return runs[0][0], statistics.median(used for _, used, _ in runs)

        # What every run takes, imports and writing, is that of the least one.
        (least, fixed), (few, small) = median(LEAST), median(SMALL)
        solves, used, peak = measured(Path(place), "large", members)
    usual, cost = (small - fixed) / (few - least), (used - fixed) / (solves - least)
    print(f"{solves} solves: {1e6 * cost:.2f} us of one core each, peak {peak:.0f} MB (target 800)")
    print(f"{few} solves: {1e6 * usual:.2f} us; ratio {cost / usual:.2f} (target 1.3)")


if __name__ == "__main__":
    main(int(sys.argv[1]) if len(sys.argv) > 1 else 10_000_000)
