"""The table of states: its shape, and the real queue against a plain model over random histories with a clock set by hand."""

from __future__ import annotations

import tempfile
from collections import Counter
from pathlib import Path
from random import Random

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from tests.queue_models import HOUR, Clock, Model, intake
from uq.clock import Window
from uq.errors import UseMistake
from uq.queue.claims import Claim
from uq.queue.queue import Queue
from uq.queue.states import BEGIN, ENDED, FINISHES, OPEN, OWNED, REQUESTS, TABLE, Event, State, after, requests

WINDOWS = (None, None, Window("22:00", "06:00", "UTC"), Window("11:00", "13:30", "UTC"))
# What ends an attempt.
ENDS = {Event.COMPLETE, Event.CUT_SHORT, Event.FAIL, Event.GIVE_BACK, Event.STOP, Event.STUMBLE, Event.LOSE, Event.GIVE_UP}


def test_every_state_has_its_line_and_every_event_its_place() -> None:
    assert set(TABLE) == set(State)
    assert {event for line in TABLE.values() for event in line} == set(Event) - {Event.SUBMIT}


def test_every_state_can_be_reached_and_every_open_one_can_be_cancelled() -> None:
    reached, found = {BEGIN}, {BEGIN}
    while found:
        found = {to for state in found for to in TABLE[state].values()} - reached
        reached |= found
    assert reached == set(State)
    assert all(after(state, Event.CANCEL) is State.CANCELLED for state in OPEN)


def test_from_every_state_but_done_a_job_can_still_be_done() -> None:
    for start in set(State) - {State.DONE}:
        seen, found = {start}, {start}
        while found:
            found = {to for state in found for to in TABLE[state].values()} - seen
            seen |= found
        assert State.DONE in seen, start


def test_only_a_claim_begins_an_attempt_and_only_of_a_waiting_job() -> None:
    begun = {(state, event) for state, line in TABLE.items() for event, to in line.items() if to in OWNED and state not in OWNED}
    assert begun == {(State.WAITING, Event.CLAIM)}


def test_what_has_ended_goes_on_only_when_somebody_asks_for_it() -> None:
    assert all(set(TABLE[state]) <= {Event.RETRY} for state in ENDED)
    assert {event for state in ENDED for event in requests(state)} == {Event.RETRY}


def test_every_end_of_an_attempt_leads_out_of_a_runners_hands() -> None:
    for state in OWNED:
        assert all(TABLE[state][event] not in OWNED for event in ENDS & set(TABLE[state]))
        assert all(event in TABLE[state] for event in FINISHES.values())
    assert set(REQUESTS) == {event for state in State for event in requests(state)}


class History:
    """The real queue and the model, to which the same happens."""

    def __init__(self, folder: Path) -> None:
        self.clock = Clock()
        self.queue = Queue(folder, self.clock)
        self.model = Model()
        self.held: list[Claim] = []
        # Of runners that are gone; what they say none the less comes too late.
        self.gone: list[Claim] = []

    def close(self) -> None:
        for claim in self.held:
            claim.close()
        self.queue.close()

    def submit(self, draw: Random) -> None:
        """One of three studies, the same or again, at three priorities, with few retries, at once or held."""
        fingerprint, again, window = draw.choice("abc"), draw.random() < 0.5, draw.choice(WINDOWS)
        priority, retries, start = draw.randrange(-1, 2), draw.choice((0, 1, 2, 3)), self.clock.now + HOUR * (draw.random() < 0.1)
        made = intake(fingerprint, priority=priority, retries=retries, not_before=start, window=window)
        ever = self.model.ever
        found = self.queue.submit([made], again)[0]
        assert found.job == self.model.submit(fingerprint, again, priority, retries, start, window)
        assert found.new == (self.model.ever > ever)

    def time_passes(self, draw: Random) -> None:
        self.clock.now += draw.choice((1.0, 61.0, 61.0, 130.0, HOUR, 7 * HOUR, -HOUR))

    def claim(self, draw: Random) -> None:
        claim = self.queue.claim(draw.choice("ab"))
        number = self.model.claim(self.clock.now)
        assert (claim.job.number if claim else None) == number
        if claim:
            self.held.append(claim)
            assert claim.attempt == self.model.jobs[claim.job.number].attempt

    def beat(self, draw: Random) -> None:
        claim, done = draw.choice(self.held + self.gone), draw.randrange(5)
        wanted = claim.beat({"done": done, "total": 4})
        job = self.model.jobs[claim.job.number]
        mine = job.attempt == claim.attempt and job.state in OWNED
        assert wanted == (job.state if mine else "cancelled")
        if mine:
            job.done = done

    def tell(self, draw: Random) -> None:
        """A runner says how its attempt ended, and lets go of the lock then or later."""
        claim, what = draw.choice(self.held + self.gone[-2:]), draw.choice(TOLD)
        counts = self.model.tell(claim.job.number, claim.attempt, what, self.clock.now)
        if what in FINISHES:
            assert claim.finish(what) == counts
        else:
            getattr(claim, what)("said so")
        if claim in self.held and draw.random() < 0.7:
            self.goes(claim)

    def die(self, draw: Random) -> None:
        """A runner is gone, whatever it has said or not."""
        self.goes(draw.choice(self.held))

    def goes(self, claim: Claim) -> None:
        self.held.remove(claim)
        self.gone.append(claim)
        claim.close()  # what the kernel does for a process that is killed
        self.model.jobs[claim.job.number].locked = False

    def ask(self, draw: Random) -> None:
        number, what = draw.randint(1, self.model.ever), str(draw.choice(REQUESTS))
        if self.model.ask(number, what, self.clock.now):
            getattr(self.queue, what)(number)
        else:
            with pytest.raises(UseMistake, match="cannot be"):
                getattr(self.queue, what)(number)

    def happens(self, what: str, draw: Random) -> None:
        if (what in ("beat", "tell", "die") and not self.held) or (what == "ask" and not self.model.ever):
            return
        getattr(self, what)(draw)

    def nothing_is_lost_and_all_stand_where_they_should(self) -> None:
        jobs = self.queue.jobs()
        assert [job.number for job in jobs] == list(self.model.jobs)
        for job, model in zip(jobs, self.model.jobs.values(), strict=True):
            told = (str(job.state), job.attempt, job.stumbles)
            assert told == (self.model.shown(model, self.clock.now), model.attempt, model.stumbles)
            assert (job.ended is not None) == (model.state in ENDED)

    def every_history_follows_the_table_and_ends_every_attempt_at_most_once(self) -> None:
        for number, model in self.model.jobs.items():
            state, ends = State(BEGIN), Counter[int]()
            for happening in self.queue.history(number)[1:]:
                event = Event(happening.event)
                assert TABLE[state][event] == happening.state
                state = happening.state
                ends[happening.attempt] += event in ENDS
            assert max(ends.values(), default=0) <= 1
            assert set(ends) <= set(range(model.attempt + 1))
            assert state == model.state


# As often as they stand here, so that jobs get far and meet trouble on the way.
EVENTS = ("submit", *["time_passes"] * 2, *["claim"] * 5, *["beat"] * 2, *["tell"] * 3, "die", *["ask"] * 2)
TOLD = (*("done", "partial", "failed", "give_back", "paused"), *["stumbled"] * 5)


@settings(max_examples=12, derandomize=True, deadline=None)
@given(st.integers(0, 2**32))
def test_whatever_happens_the_queue_stands_where_the_model_does(seed: int) -> None:
    """Histories of 300 events each; with the seed that is told, one happens again."""
    draw = Random(seed)
    with tempfile.TemporaryDirectory() as folder:
        history = History(Path(folder))
        try:
            for _ in range(300):
                history.happens(draw.choice(EVENTS), draw)
                history.nothing_is_lost_and_all_stand_where_they_should()
            history.every_history_follows_the_table_and_ends_every_attempt_at_most_once()
        finally:
            history.close()
