"""What is asked of a cluster that is slow, or does not answer: stated patience, and nothing that keeps us busy."""

from __future__ import annotations

import asyncio
import threading
import time
from collections.abc import Callable, Iterator
from types import SimpleNamespace
from typing import Any

import pytest

from uq.design.blocks import Block
from uq.errors import ClusterError, Interrupted
from uq.running import flight as flight_module
from uq.running import muster as muster_module
from uq.running.abroad import REFUSED
from uq.running.answering import answered, each_answer
from uq.running.flight import FETCHED_WITHIN, Flight
from uq.running.muster import Muster
from uq.running.observer import Silent
from uq.running.tasks import Handout, Task

TASK = Task("", Block(0, 0, 4))


class Future:
    """A task as a cluster's client has it."""

    def __init__(self, answer: Callable[[], Any]) -> None:
        self._answer = answer

    def add_done_callback(self, call: Callable[[Any], None]) -> None:
        call(self)

    def cancelled(self) -> bool:
        return False

    def done(self) -> bool:
        return True

    async def result(self) -> Any:
        return self._answer()


class Client:
    """A client in words: remembers what was sent, to whom; its tasks answer what it is told."""

    status = "running"

    def __init__(self, loop: asyncio.AbstractEventLoop) -> None:
        self.loop = SimpleNamespace(asyncio_loop=loop)
        self.sent: list[list[str] | None] = []
        self.answers: list[Any] = []

    def submit(self, work: Any, *arguments: Any, workers: list[str] | None, **named: Any) -> Future:
        self.sent.append(workers)
        return Future(lambda: self.answers.pop(0))

    def cancel(self, futures: list[Future], force: bool) -> None:
        return


@pytest.fixture
def client() -> Iterator[Client]:
    loop = asyncio.new_event_loop()
    thread = threading.Thread(target=loop.run_forever)
    thread.start()
    yield Client(loop)
    loop.call_soon_threadsafe(loop.stop)
    thread.join()
    loop.close()


def flown(client: Client, fit: set[str], silent: set[str]) -> tuple[Flight, Handout, Any]:
    muster: Any = SimpleNamespace(fit=fit, silent=silent)
    handout = Handout([TASK], {"": 3})
    flight = Flight(client, "uq-test", {"": "key"}, muster, Silent())
    flight.hand_out(handout.due(1))
    return flight, handout, muster


def test_a_refused_task_waits_for_a_fit_worker_and_is_not_sent_again_and_again(client: Client) -> None:
    flight, handout, muster = flown(client, set(), set())
    client.answers = [REFUSED, "part"]
    assert list(flight.landed(handout)) == []
    ends = time.monotonic() + 2 * flight_module.REFUSED_FOR
    while time.monotonic() < ends:
        flight.move(handout)
        time.sleep(0.01)
    assert client.sent == [None]
    muster.fit.add("a")
    flight.move(handout)
    assert client.sent == [None, ["a"]]
    assert list(flight.landed(handout)) == [(TASK, "part")]
    assert not handout.left


def test_where_a_worker_hangs_tasks_go_to_those_that_answer(client: Client) -> None:
    flown(client, {"b", "a"}, {"c"})
    assert client.sent == [["a", "b"]]


def test_a_result_has_longer_every_time_it_does_not_come(client: Client, monkeypatch: pytest.MonkeyPatch) -> None:
    patience: list[float] = []

    def slow(client: Any, ask: Any, within: float, observer: Any) -> Any:
        patience.append(within)
        if len(patience) < 4:
            raise TimeoutError
        return "part"

    monkeypatch.setattr(flight_module, "answered", slow)
    flight, handout, _ = flown(client, {"a"}, set())
    landed: list[Any] = []
    while not landed:
        landed = list(flight.landed(handout))
    assert landed == [(TASK, "part")]
    assert patience == [FETCHED_WITHIN * factor for factor in (1, 2, 4, 8)]


def test_what_is_asked_is_waited_for_so_long_and_left_off_when_the_run_is_stopped(client: Client) -> None:
    async def never() -> None:
        await asyncio.sleep(600)

    begin, observer = time.monotonic(), Silent()
    with pytest.raises(TimeoutError):
        answered(client, never, 0.3, observer)
    threading.Timer(0.3, lambda: observer.stop.__setitem__(0, 1)).start()
    with pytest.raises(Interrupted):
        answered(client, never, 600, observer)
    assert time.monotonic() - begin < 60


def test_those_that_answer_are_not_kept_by_one_that_does_not(client: Client) -> None:
    async def ask(address: str) -> str:
        await asyncio.sleep(600 if address == "hangs" else 0)
        if address == "gone":
            raise OSError("closed")
        return address

    async def every() -> dict[str, str | None]:
        return await each_answer(ask, ["a", "hangs", "gone"], 0.3)

    assert answered(client, every, 60, Silent()) == {"a": "a", "hangs": None, "gone": None}


def test_workers_none_of_which_answers_are_told_in_a_sentence(client: Client, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(muster_module, "ANSWERED_WITHIN", 0.2)

    class Hanging(Client):
        def nthreads(self) -> dict[str, int]:
            return {"tcp://one:1": 1}

    hanging: Any = Hanging(client.loop.asyncio_loop)

    async def broadcast(**_: Any) -> None:
        await asyncio.sleep(600)

    hanging.scheduler = SimpleNamespace(broadcast=broadcast)
    fleet: Any = SimpleNamespace(words="there", patience=0.3, gone=lambda: "")
    muster = Muster(hanging, fleet)
    with pytest.raises(ClusterError, match=r"no worker of there is left that could solve.*no answer within 0.2 s: tcp://one:1"):
        muster.wait(Silent())
    muster.fit = {"tcp://one:1"}
    with pytest.raises(ClusterError, match=r"no worker of there answers; no answer within 0.2 s: tcp://one:1; end those that hang"):
        muster.again(Silent())
