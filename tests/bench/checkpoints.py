"""What keeping progress costs: `python -m tests.bench.checkpoints`. Target: under 3 % of a one-minute run.

The same run with progress kept and without, side by side; and of the one that keeps it, the seconds of a processor and of waiting that
threads spent on writing. At its end what the run leaves for `uq extend` is written too, and read back, beside the seconds of the run.
"""

from __future__ import annotations

import tempfile
import time
from pathlib import Path

from tests.bench.running import PREY, QUIET
from uq.running.branch import forecasts_of
from uq.running.course import to_the_end
from uq.running.keeping import Forgetful, Keeper
from uq.running.resume import gone_on_with, standing_saved
from uq.running.rounds import Crew, Spread
from uq.running.setup import meter_of
from uq.running.start import Start
from uq.store.keeper import FolderKeeper
from uq.store.saved import Saved
from uq.store.tallies import read_tallies, write_tallies
from uq.study.read import parse_study
from uq.study.study import Study

# Half a minute to a minute on two cores; the values kept (430 MB, nearly as many as may be) at much and at little work, and too many to be
# kept.
SIZES = {
    "values kept": "members = 262144\naccuracy = 1e-12",
    "values kept, a second of solving": "members = 262144",
    "histograms": "members = 4194304",
}
QUESTIONS = '["bands", "limits", "outcomes", "ranking"]'


class Timed:
    """A keeper that adds up the seconds it takes."""

    def __init__(self, keeper: Keeper) -> None:
        self.keeper, self.seconds, self.used, self.parts, self.bytes = keeper, 0.0, 0.0, 0, 0

    def keep(self, name: str, saved: Saved) -> None:
        begin, used = time.perf_counter(), time.thread_time()
        self.keeper.keep(name, saved)
        self.seconds, self.used = self.seconds + time.perf_counter() - begin, self.used + time.thread_time() - used
        self.parts, self.bytes = self.parts + 1, self.bytes + sum(array.nbytes for array in saved.arrays.values())

    def names(self) -> tuple[str, ...]:
        return self.keeper.names()

    def kept(self, name: str) -> Saved | None:
        return self.keeper.kept(name)


def seconds(study: Study, keeper: Keeper) -> tuple[float, Saved]:
    """Seconds from the first block to the end of the last round, and what the run leaves."""
    crew = Crew(Spread(), meter_of(study, QUIET, time.perf_counter), QUIET)
    running, standing, begun = gone_on_with(study, forecasts_of(study), crew, keeper, Start())
    begin = time.perf_counter()
    standing = to_the_end(running, standing, begun)
    return time.perf_counter() - begin, standing_saved(standing, running.branches)


def main() -> None:
    for name, size in SIZES.items():
        study = parse_study(PREY.replace("[plan]", f"[plan]\nask = {QUESTIONS}").replace("members = 65536", size), name="prey")
        without, _ = seconds(study, Forgetful())
        with tempfile.TemporaryDirectory() as place:
            keeper = Timed(FolderKeeper(Path(place), study.fingerprint))
            kept, saved = seconds(study, keeper)
            print(f"{name}: {without:.1f} s without, {kept:.1f} s with progress kept ({100 * (kept / without - 1):+.1f} %)")
            share = 100 * keeper.used / (kept * Spread().workers)
            print(
                f"  {keeper.parts} parts, {keeper.bytes / 1e6:.0f} MB: {keeper.used:.2f} s of one core, {share:.1f} % (target 3); ", end=""
            )
            print(f"{keeper.seconds:.2f} s until they were on the disk")
            used, begin = time.thread_time(), time.perf_counter()
            file = write_tallies(Path(place), saved, study.fingerprint)
            written, at = time.thread_time() - used, time.perf_counter() - begin
            begin = time.perf_counter()
            read_tallies(Path(place), study.fingerprint)
            back = time.perf_counter() - begin
            print(
                f"  {file.name}, {file.stat().st_size / 1e6:.0f} MB: {written:.2f} s of one core, {at:.2f} s in all; read in {back:.2f} s"
            )


if __name__ == "__main__":
    main()
