"""What travels to a worker: plain data, from which the same parts are made as here."""

from __future__ import annotations

import pickle
import time

import numpy as np
import pytest

from tests.kill_runs import BINNED, KEPT
from tests.test_inputs_distributions import CASES
from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import Interrupted
from uq.inputs.inputs import Input, Inputs
from uq.running.block import Forecast, part_of
from uq.running.branch import forecasts_of
from uq.running.keeping import Forgetful
from uq.running.meter import Meter
from uq.running.observer import Silent
from uq.running.parcel import REMEMBERED, Parcel, Plain, Ready, fingerprint, packed, solved_here
from uq.running.resume import branches_of
from uq.running.rounds import Crew, Spread
from uq.running.tasks import Task
from uq.study.read import parse_study

QUIET = Silent()


def forecasts(text: str) -> dict[str, Forecast]:
    crew = Crew(Spread(1), Meter(1, QUIET, time.perf_counter), QUIET)
    branches = branches_of(forecasts_of(parse_study(text, name="killed")), Forgetful(), crew)
    return {branch.name: branch.forecast for branch in branches}


@pytest.mark.parametrize("text", [KEPT, BINNED])
def test_a_part_made_from_a_parcel_has_the_bits_of_one_made_here(text: str) -> None:
    for forecast in forecasts(text).values():
        block = Block(3, 64, 16)
        content = packed(forecast)
        there = solved_here(fingerprint(content), content, Task("", block), np.zeros(1, dtype=np.uint8))
        here = part_of(forecast, block, Meter(1, QUIET, time.perf_counter), QUIET)
        assert there is not None
        assert there.blocks == here.blocks
        # As it arrives.
        told, mine = pickle.loads(pickle.dumps(there)).tallies.arrays(), here.tallies.arrays()
        assert told.keys() == mine.keys()
        for name, array in mine.items():
            np.testing.assert_array_equal(told[name], array, err_msg=name)


def test_a_parcel_holds_the_code_as_text_and_is_the_same_after_use() -> None:
    forecast = forecasts(KEPT)[""]
    content = packed(forecast)
    parcel = pickle.loads(content)
    assert isinstance(parcel, Parcel)
    assert parcel.code == forecast.compiled.code
    assert len(content) < 2 * len(parcel.code.text) + 50_000
    forecast.design.draw(Block(0, 0, 8), forecast.inputs)
    assert fingerprint(packed(forecast)) == fingerprint(content)


@pytest.mark.parametrize("case", CASES, ids=lambda case: type(case).__name__ if not isinstance(case, tuple) else type(case[0]).__name__)
def test_every_distribution_travels_also_after_it_was_used(case: object) -> None:
    distribution = case[0] if isinstance(case, tuple) else case
    inputs = Inputs((Input("a", "a", "1", distribution),))  # type: ignore[arg-type]
    design = Design(("a",), 1, 64)
    before = design.draw(Block(0, 0, 64), inputs)
    import io

    content = io.BytesIO()
    Plain(content, protocol=5).dump(inputs)
    np.testing.assert_array_equal(design.draw(Block(0, 0, 64), pickle.loads(content.getvalue())), before)


def test_a_worker_keeps_a_bounded_number_of_forecasts_ready() -> None:
    content, ready = packed(forecasts(KEPT)[""]), Ready()
    first = ready.forecast("0", content)
    for number in range(REMEMBERED):
        assert ready.forecast("0", content) is first
        ready.forecast(str(number + 1), content)
    for number in range(REMEMBERED):
        ready.forecast(str(number + 1), content)
    assert ready.forecast("0", content) is not first


def test_what_is_taken_away_stops_being_solved() -> None:
    content = packed(forecasts(KEPT)[""])
    with pytest.raises(Interrupted):
        solved_here(fingerprint(content), content, Task("", Block(0, 0, 8)), np.ones(1, dtype=np.uint8))
