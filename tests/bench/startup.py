"""How long the commands take from their start to their end, median of several: `python -m tests.bench.startup`.

Targets: `uq --help` under 0.3 s, `uq check` under 1.5 s, `uq run configs/orchard-mites.toml` under 4 s once the kernel is cached.
"""

from __future__ import annotations

import statistics
import subprocess
import sys
import tempfile
import time
from pathlib import Path

ROOT = Path(__file__).parent.parent.parent
REPEATS = 7


def median(arguments: list[str]) -> float:
    """Seconds of wall time; the first start, which fills the caches of the disk and of the kernel, is left out."""
    taken = []
    for _ in range(REPEATS + 1):
        begin = time.perf_counter()
        subprocess.run([sys.executable, "-m", "uq", *arguments], cwd=ROOT, check=True, capture_output=True)
        taken.append(time.perf_counter() - begin)
    return statistics.median(taken[1:])


def main() -> None:
    with tempfile.TemporaryDirectory() as folder:
        for arguments, target in (
            (["--help"], 0.3),
            (["check", "configs/hold-tank.toml"], 1.5),
            (["run", "configs/orchard-mites.toml", "-o", folder], 4.0),
        ):
            print(f"{median(arguments):6.2f} s  (target {target} s)  uq {' '.join(arguments[:2])}")


if __name__ == "__main__":
    main()
