"""What users ask of the queue: listing, pausing, resuming, cancelling, trying again, taking away."""

from __future__ import annotations

import json
import subprocess
import sys
from pathlib import Path

import pytest

from tests.queue_models import DAY, HOUR, NOON, Clock, claimed, intake, queue_in
from uq.clock import Window
from uq.errors import EXIT_USAGE, UseMistake
from uq.queue.queue import ASKED, Queue
from uq.queue.states import ENDED, Event, State, requests
from uq.store.hold import hold

ROOT = Path(__file__).parent.parent


def brought_to(queue: Queue, state: State) -> int:
    """The number of a job in this state; what a runner would hold is let go."""
    not_before = queue.clock() + 1000 * HOUR if state is State.HELD else None
    number = queue.submit([intake(state, not_before=not_before)], again=True)[0].job
    if state in (State.PAUSED, State.CANCELLED):
        {State.PAUSED: queue.pause, State.CANCELLED: queue.cancel}[state](number)
    elif state not in (State.WAITING, State.HELD):
        with claimed(queue) as claim:
            assert claim.job.number == number
            if state in ENDED:
                claim.finish(state)
            elif state is State.PAUSING:
                queue.pause(number)
    assert queue.job(number).state is state
    return number


@pytest.mark.parametrize("state", list(State))
def test_a_user_may_ask_for_what_the_table_has_and_is_told_what_is_possible_else(tmp_path: Path, state: State) -> None:
    queue = queue_in(tmp_path)
    possible = [str(event) for event in requests(state)]
    for what in ("pause", "resume", "cancel", "retry"):
        number = brought_to(queue, state)
        if what in possible:
            assert getattr(queue, what)(number).state is not state
            assert queue.history(number)[-1].event == what
        else:
            words = f"possible is: {', '.join(possible)}" if possible else f"it has ended, and `uq show {number}`"
            with pytest.raises(UseMistake, match=f"^job {number} is {state} and cannot be {ASKED[Event(what)]}; {words}") as told:
                getattr(queue, what)(number)
            assert told.value.exit_code == EXIT_USAGE
            assert queue.job(number).state is state
        queue.clean(0)
        queue.submit([intake("drain")])
        for job in queue.jobs():
            if job.state not in ENDED:
                queue.cancel(job.number)


@pytest.mark.parametrize("what", ["job", "history", "pause", "resume", "cancel", "retry"])
def test_a_number_that_no_job_has_is_told(tmp_path: Path, what: str) -> None:
    with pytest.raises(UseMistake, match=r"found job 7, expected the number of a job in the queue"):
        getattr(queue_in(tmp_path), what)(7)


def test_jobs_are_listed_by_number_all_or_by_state(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    assert queue.jobs() == []
    queue.submit([intake("a"), intake("b", priority=5), intake("c", not_before=NOON + 1)])
    queue.cancel(1)
    assert [(job.number, job.state) for job in queue.jobs()] == [(1, "cancelled"), (2, "waiting"), (3, "held")]
    assert [job.number for job in queue.jobs(states=("waiting", "held"))] == [2, 3]
    assert [job.number for job in queue.jobs(states=("done",))] == []
    assert queue.jobs(batch="nowhere") == []


def test_a_job_has_all_that_it_was_handed_in_with(tmp_path: Path) -> None:
    window = Window("22:00", "06:00", "Europe/Athens")
    own = {"name": "hold", "title": "Tank", "members": 4096, "priority": 3, "not_before": NOON + 5, "deadline": NOON + DAY, "retries": 7}
    queue = queue_in(tmp_path)
    queue.submit([intake("f" * 64, batch="night", batch_title="Night", changed={"a.b": [1, "x"]}, window=window, **own)])
    job = queue.job(1)
    assert {key: getattr(job, key) for key in own} == own
    assert (job.fingerprint, job.batch, job.batch_title, job.changed) == ("f" * 64, "night", "Night", {"a.b": [1, "x"]})
    assert (job.window, job.submitted, job.attempt, job.folder, job.progress) == (window, NOON, 0, None, {})


def test_a_paused_job_is_claimed_only_after_it_was_resumed(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    queue.pause(1)
    assert queue.claim("a") is None
    assert queue.next_time() is None
    queue.resume(1)
    assert claimed(queue).job.number == 1


def test_a_resumed_job_does_not_wait_out_what_it_had_to_wait_for_before(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake()])
    with claimed(queue) as claim:
        claim.stumbled("no luck")
    queue.pause(1)
    assert queue.resume(1).state is State.WAITING
    assert queue.job(1).stumbles == 1


def test_a_job_that_is_tried_again_begins_to_count_anew_and_drops_a_deadline_that_is_over(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake("a", retries=0, deadline=NOON + 5), intake("b", retries=0, deadline=NOON + DAY)])
    for _ in range(2):
        with claimed(queue) as claim:
            claim.stumbled("no luck")
    clock.now += 10
    assert [(job.state, job.stumbles) for job in queue.jobs()] == [("failed", 1)] * 2
    assert [queue.retry(number).deadline for number in (1, 2)] == [None, NOON + DAY]
    assert [(job.state, job.stumbles, job.reason, job.ended) for job in queue.jobs()] == [("waiting", 0, "", None)] * 2
    assert claimed(queue).attempt == 2


def test_the_history_of_a_job_is_kept_with_times_and_reasons(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake()])
    clock.now += 60
    with claimed(queue) as claim:
        clock.now += 60
        claim.finish("failed", "k: found -1")
    told = [(each.at - NOON, each.event, str(each.state), each.attempt, each.reason) for each in queue.history(1)]
    assert told == [(0, "submit", "waiting", 0, ""), (60, "claim", "running", 1, ""), (120, "fail", "failed", 1, "k: found -1")]
    job = queue.job(1)
    assert (job.submitted - NOON, job.started, job.ended) == (0, NOON + 60, NOON + 120)


def test_cleaning_takes_away_what_ended_long_ago_and_nothing_else(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake(name, batch="x") for name in "abcd"])
    for state in ("done", "failed"):
        with claimed(queue) as claim:
            claim.finish(state)
    clock.now += DAY
    queue.cancel(3)
    assert queue.clean(DAY, states=("done",)) == [1]
    assert queue.clean(DAY) == [2]
    assert queue.clean(DAY) == []
    assert [job.number for job in queue.jobs()] == [3, 4]
    assert [job.number for job in queue.jobs(batch="x")] == [3, 4]
    assert sorted(path.name for path in queue.folders.root.iterdir()) == ["3", "4"]
    assert queue.clean(0) == [3]
    assert [found.job for found in queue.submit([intake("a")])] == [5], "a number is given once"


def test_cleaning_of_jobs_that_have_not_ended_is_refused(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    with pytest.raises(UseMistake, match='"running", expected one of done, partial, failed, cancelled'):
        queue.clean(0, states=("done", "running"))


def test_a_job_that_a_runner_still_holds_stays(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue):
        queue.cancel(1)
        assert queue.clean(0) == []
        assert queue.folders.study(1, "tank").exists()
    assert queue.clean(0) == [1]


def test_cleaning_takes_away_what_killed_processes_left_but_not_what_is_being_handed_in(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    root = queue.folders.root
    for name in ("9", ".incoming-left", ".gone-4-left", ".incoming-busy", "notes"):
        (root / name).mkdir()
        (root / name / "some").write_text("")
    handle = hold(root / ".incoming-busy" / "lock")
    assert handle is not None
    queue.clean(0)
    assert sorted(path.name for path in root.iterdir()) == [".incoming-busy", "1", "notes"]


def test_looking_at_the_queue_loads_nothing_heavy(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    program = (
        "import sys\nfrom pathlib import Path\nfrom uq.queue.queue import Queue\n"
        "queue = Queue(Path(sys.argv[1]))\nqueue.jobs(), queue.pause(1), queue.resume(1), queue.next_time()\n"
        "import json\nprint(json.dumps(sorted({name.split('.')[0] for name in sys.modules})))\n"
    )
    done = subprocess.run([sys.executable, "-c", program, str(queue.home)], cwd=ROOT, capture_output=True, check=True)
    assert not set(json.loads(done.stdout)) & {"numpy", "numba", "scipy", "dask", "distributed", "xarray", "netCDF4", "pandas", "llvmlite"}
