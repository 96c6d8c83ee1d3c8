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
from uq.design.blocks import Block
from uq.model.build import build
from uq.running.block import Forecast, tallies_of
from uq.running.meter import Meter
from uq.running.observer import Silent
from uq.running.pilot import Pilot, piloted
from uq.running.rounds import Spread, answered, fold
from uq.running.setup import ask_of, design_of, settings_of
from uq.solve.compile import compile_code
from uq.study.read import parse_study
from uq.study.study import Study

STUDY = """
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


def prepared(study: Study) -> Pilot:
    """Everything up to the first block."""
    ask, settings, design = ask_of(study), settings_of(study), design_of(study)
    forecast = Forecast(compile_code(build(study.equations)), study.inputs, design, settings, study.time.start, ask)
    return piloted(forecast, meter(pilot_solves=0), QUIET)


def meter(pilot_solves: int) -> Meter:
    return Meter(pilot_solves, QUIET, time.perf_counter)


def seconds(call: Callable[[], object]) -> float:
    begin = time.perf_counter()
    call()
    return time.perf_counter() - begin


def parts(pilot: Pilot) -> dict[str, float]:
    """Seconds of one core for every part of a run (of the processor, so that other work on the machine counts less)."""
    forecast, design = pilot.forecast, pilot.forecast.design
    spent = dict.fromkeys(("points", "solving", "tallies", "merging and findings"), 0.0)
    made: list[Tallies] = []
    for block in design.blocks(0, design.rows, 256):
        begin = time.process_time()
        x = design.spread(block, forecast.inputs.values(design.base(block)))
        placed = time.process_time()
        batch = forecast.solved(x, QUIET)
        solved = time.process_time()
        made.append(Tallies.of(forecast.ask, Sample.of(design, block, x, batch, forecast.ask)))
        spent["points"] += placed - begin
        spent["solving"] += solved - placed
        spent["tallies"] += time.process_time() - solved
    begin = time.process_time()
    whole = reduce(Tallies.merge, made)
    answered(whole, forecast.ask, pilot.nominal, Spread(1), QUIET)
    spent["merging and findings"] = time.process_time() - begin
    return spent


def run_on(pilot: Pilot, threads: int) -> float:
    """Seconds from the first block to the findings."""
    spread = Spread(threads)
    count = meter(pilot.forecast.design.solves)

    def work(block: Block) -> Tallies:
        return tallies_of(pilot.forecast, block, count, QUIET)

    def whole() -> None:
        tallies = fold(pilot.forecast.design, work, pilot.forecast.shape, count, spread, QUIET)
        answered(tallies, pilot.forecast.ask, pilot.nominal, spread, QUIET)

    return seconds(whole)


def main() -> None:
    for ask in ('["bands", "limits", "outcomes"]', '["bands", "limits", "outcomes", "ranking"]'):
        pilot = prepared(parse_study(STUDY.replace("[plan]", f"[plan]\nask = {ask}"), name="prey"))
        solves = pilot.forecast.design.solves
        rounds = [parts(pilot) for _ in range(REPEATS)]
        spent = {name: statistics.median(each[name] for each in rounds) for name in rounds[0]}
        print(f"{ask}: {solves} solves, microseconds of one core per solve")
        for name, taken in spent.items():
            print(f"  {name:22} {1e6 * taken / solves:6.2f}")
        ratios = [(each["tallies"] + each["merging and findings"]) / each["solving"] for each in rounds]
        print(f"  statistics / solving   {statistics.median(ratios):6.2f}  (target 0.5)")
        pairs = [(run_on(pilot, 1), run_on(pilot, 2)) for _ in range(REPEATS)]
        print(f"  one thread / two       {statistics.median(one / two for one, two in pairs):6.2f}  (target 1.8)")


if __name__ == "__main__":
    main()
