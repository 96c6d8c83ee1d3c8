"""What a run spends its time on, and what a second core brings: `python -m tests.bench.running`.

Targets: statistics at most half of the solving; two cores at least 1.8 times one. Predator and prey, 0 to 20, 101 output times, 1e-6.
"""

from __future__ import annotations

import statistics
import time
from collections.abc import Callable
from functools import reduce

from uq.analysis.sample import Sample
from uq.analysis.tallies import Tallies
from uq.running.answers import all_findings
from uq.running.branch import Branch, forecasts_of
from uq.running.course import Running, Standing, to_the_end
from uq.running.keeping import Forgetful
from uq.running.observer import Silent
from uq.running.pace import block_rows
from uq.running.resume import gone_on_with
from uq.running.rounds import Crew, Spread
from uq.running.setup import meter_of
from uq.running.start import Start
from uq.study.read import parse_study
from uq.study.study import Study

PREY = """
schema = 1
title = "Predator and prey"
[time]
stop = 20
points = 101
[states.prey]
start = { normal = { mean = 10, sd = 1 } }
rate = "growth * prey - eating * prey * hunters"
[states.hunters]
start = 5
rate = "hunters * (gain * prey - death)"
[parameters]
growth = { normal = { mean = 1.1, sd = 0.05 } }
eating = { normal = { mean = 0.4, sd = 0.02 } }
gain = { normal = { mean = 0.1, sd = 0.005 } }
death = { normal = { mean = 0.4, sd = 0.02 } }
[outcomes.most]
take = "highest(prey)"
[limits.plague]
when = "prey > 20"
by = [10, 20]
[plan]
members = 65536
"""
REPEATS = 3
QUIET = Silent()


def prepared(study: Study, threads: int) -> tuple[Running, Standing]:
    """Everything up to the first block."""
    crew = Crew(Spread(threads), meter_of(study, QUIET, time.perf_counter), QUIET)
    running, standing, _ = gone_on_with(study, forecasts_of(study), crew, Forgetful(), Start())
    return running, standing


def seconds(call: Callable[[], object]) -> float:
    begin = time.perf_counter()
    call()
    return time.perf_counter() - begin


def parts(branch: Branch) -> dict[str, float]:
    """Seconds of one core for every part of a run (of the processor, so that other work on the machine counts less).

    Blocks are as long as those of a run on two threads in its last round.
    """
    forecast, design = branch.forecast, branch.forecast.design
    rows = block_rows(forecast.shape, 2.5e-6, design.rows // 2, design.replicates, 2)
    spent = dict.fromkeys(("points", "solving", "tallies", "merging and findings"), 0.0)
    made: list[Tallies] = []
    for block in design.blocks(0, design.rows, rows):
        begin = time.process_time()
        x = design.draw(block, forecast.inputs)
        placed = time.process_time()
        batch = forecast.solved(x, QUIET)
        solved = time.process_time()
        made.append(Tallies.of(forecast.ask, Sample.of(design, block, x, batch, forecast.ask)))
        spent["points"] += placed - begin
        spent["solving"] += solved - placed
        spent["tallies"] += time.process_time() - solved
    begin = time.process_time()
    whole = reduce(Tallies.merge, made)
    whole.findings(forecast.ask, branch.pilot.nominal.values[0, : len(forecast.ask.watched)])
    spent["merging and findings"] = time.process_time() - begin
    return spent


def run_on(study: Study, threads: int) -> float:
    """Seconds from the first block to the findings."""
    running, standing = prepared(study, threads)
    return seconds(lambda: all_findings(running, to_the_end(running, standing, {})))


ASKED = ('["bands"]', '["bands", "ranking"]', '["bands", "limits", "outcomes"]', '["bands", "limits", "outcomes", "ranking"]')


def main() -> None:
    for ask in ASKED:
        study = parse_study(PREY.replace("[plan]", f"[plan]\nask = {ask}"), name="prey")
        branch = prepared(study, 1)[0].branches[0]
        solves = branch.forecast.design.solves
        rounds = [parts(branch) for _ in range(REPEATS)]
        spent = {name: statistics.median(each[name] for each in rounds) for name in rounds[0]}
        print(f"{ask}: {solves} solves, microseconds of one core per solve")
        for name, taken in spent.items():
            print(f"  {name:22} {1e6 * taken / solves:6.2f}")
        ratios = [(each["tallies"] + each["merging and findings"]) / each["solving"] for each in rounds]
        print(f"  statistics / solving   {statistics.median(ratios):6.2f}  (target 0.5)")
        pairs = [(run_on(study, 1), run_on(study, 2)) for _ in range(REPEATS)]
        print(f"  one thread / two       {statistics.median(one / two for one, two in pairs):6.2f}  (target 1.8)")


if __name__ == "__main__":
    main()
