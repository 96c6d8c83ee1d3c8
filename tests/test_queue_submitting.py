"""Handing in: taken in whole or not at all, equal studies are one job, and nothing is lost whoever else hands in at the time."""

from __future__ import annotations

import json
import subprocess
import sys
import threading
from pathlib import Path

import pytest

from tests.queue_models import NOON, claimed, intake, queue_in
from uq.clock import When, Window
from uq.errors import StorageError, UseMistake
from uq.queue import folders as folders_module
from uq.queue.deciding import CUT_SHORT, ENDED
from uq.queue.intake import Terms, intake_of, intakes_of
from uq.queue.job import Submitted
from uq.queue.queue import Queue
from uq.queue.states import State
from uq.study.batch import read_batch
from uq.study.read import read_study

ROOT = Path(__file__).parent.parent


def test_an_equal_study_is_the_same_job_unless_asked_for_again(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    assert queue.submit([intake("a"), intake("b"), intake("a")]) == [Submitted(1, True), Submitted(2, True), Submitted(1, False)]
    assert queue.submit([intake("b")]) == [Submitted(2, False)]
    assert queue.submit([intake("a"), intake("a")], again=True) == [Submitted(3, True), Submitted(4, True)]
    assert len(queue.jobs()) == 4


@pytest.mark.parametrize("state", ["done", "partial"])
def test_a_job_that_has_a_result_is_the_same_job(tmp_path: Path, state: str) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with claimed(queue) as claim:
        claim.finish(state)
    assert queue.submit([intake()]) == [Submitted(1, False)]


def test_a_job_that_failed_or_was_cancelled_does_not_count(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    queue.cancel(1)
    assert queue.submit([intake()]) == [Submitted(2, True)]
    with claimed(queue) as claim:
        claim.finish("failed", "it did not work")
    assert queue.submit([intake()]) == [Submitted(3, True)]


def test_a_study_and_its_files_are_taken_in_and_later_edits_change_nothing(tmp_path: Path) -> None:
    for name in ("orchard-mites.toml", "orchard-mites-counts.csv"):
        (tmp_path / name).write_bytes((ROOT / "configs" / name).read_bytes())
    study = read_study(tmp_path / "orchard-mites.toml", {"plan.members": 512})
    queue = queue_in(tmp_path)
    queue.submit([intake_of(study, NOON)])
    for name in ("orchard-mites.toml", "orchard-mites-counts.csv"):
        (tmp_path / name).write_text("edited")
    with claimed(queue) as claim:
        again = read_study(claim.study, claim.job.changed)
        assert (again.fingerprint, again.name, again.text) == (claim.job.fingerprint, "orchard-mites", study.text)
        assert claim.job.members == 512
    assert again.files["orchard-mites-counts.csv"] == (ROOT / "configs" / "orchard-mites-counts.csv").read_bytes()


def test_a_batch_becomes_one_job_per_combination(tmp_path: Path) -> None:
    (tmp_path / "night.toml").write_text(f"""
        schema = 1
        title = "Night"
        [window]
        opens = "22:00"
        closes = "06:00"
        timezone = "Europe/Athens"
        [[run]]
        study = "{ROOT}/configs/hold-tank.toml"
        priority = 5
        deadline = "06:00"
        not_before = "22:30"
        retries = 1
        [run.change]
        "parameters.UA_off.triangular.mode" = [3, 4]
        "plan.members" = [512, 1024]
    """)
    queue = queue_in(tmp_path)
    queue.submit(intakes_of(read_batch(tmp_path / "night.toml"), NOON))
    jobs = queue.jobs(batch="night")
    assert [tuple(job.changed.values()) for job in jobs] == [(3, 512), (3, 1024), (4, 512), (4, 1024)]
    assert len({job.fingerprint for job in jobs}) == 4
    first = jobs[0]
    assert (first.priority, first.retries, first.batch_title, first.members) == (5, 1, "Night", 512)
    assert first.window == Window("22:00", "06:00", "Europe/Athens")
    # 22:30 and 06:00 of Athens in winter, handed in at 12:00 UTC.
    assert (first.not_before, first.deadline) == (NOON + 8.5 * 3600, NOON + 16 * 3600)
    assert (first.state, first.until) == (State.HELD, first.not_before)


def test_a_job_may_be_of_several_batches_each_with_its_own_changes(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a", batch="x", batch_title="X", changed={"k": 1}), intake("b", batch="x", batch_title="X")])
    queue.submit([intake("a", batch="y", batch_title="Y", changed={"k": 2})])
    assert queue.batches() == {"x": "X", "y": "Y"}
    assert [(job.number, job.batch, job.batch_title, dict(job.changed)) for job in queue.jobs(batch="y")] == [(1, "y", "Y", {"k": 2})]
    assert [job.number for job in queue.jobs(batch="x")] == [1, 2]
    assert [(job.batch, dict(job.changed)) for job in queue.jobs()] == [("x", {"k": 1}), ("x", {})]
    with claimed(queue) as claim:
        assert claim.job.changed == {"k": 1}, "as its study was taken in"


def test_either_all_are_handed_in_or_none(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a")])
    placed = folders_module.Folders.place

    def full_at_the_third(self: folders_module.Folders, taken: Path, number: int) -> None:
        if number == 4:
            raise OSError(28, "No space left on device")
        placed(self, taken, number)

    monkeypatch.setattr(folders_module.Folders, "place", full_at_the_third)
    with pytest.raises(StorageError, match="No space left on device; nothing was handed in"):
        queue.submit([intake(name) for name in "bcd"])
    monkeypatch.undo()
    assert [job.fingerprint for job in queue.jobs()] == ["a"]
    # What was given a number before that is in nobody's way.
    assert queue.submit([intake("e")]) == [Submitted(2, True)]
    assert claimed(queue).study.read_text() == "# a\n"
    assert claimed(queue).study.read_text() == "# e\n"


def test_a_job_that_an_equal_one_was_to_be_may_go_while_it_is_handed_in(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    queue, other = queue_in(tmp_path), queue_in(tmp_path)
    queue.submit([intake("a")])
    begun = queue.database.writing

    def cancelled_first() -> object:
        monkeypatch.undo()
        other.cancel(1)
        return begun()

    monkeypatch.setattr(queue.database, "writing", cancelled_first)
    assert queue.submit([intake("a")]) == [Submitted(2, True)]
    assert claimed(queue).study.read_text() == "# a\n"


def test_equal_files_of_one_submission_are_kept_once(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(name, text="schema = 1\n", files={"data/a.csv": b"a,b\n"}) for name in "abc"])
    places = [queue.folders.study(number, "tank").parent for number in (1, 2, 3)]
    assert {(place / "data" / "a.csv").read_bytes() for place in places} == {b"a,b\n"}
    assert len({(place / "data" / "a.csv").stat().st_ino for place in places}) == 1
    queue.cancel(1)
    queue.clean(0)
    assert (places[1] / "data" / "a.csv").read_bytes() == b"a,b\n"


@pytest.mark.parametrize("name", ["../x.csv", "/etc/x.csv", "a/../../x.csv", ""])
def test_a_file_that_would_leave_its_folder_is_refused(tmp_path: Path, name: str) -> None:
    queue = queue_in(tmp_path)
    with pytest.raises(UseMistake, match="a name within the folder"):
        queue.submit([intake(files={name: b""})])
    with pytest.raises(UseMistake, match="called as the study itself"):
        queue.submit([intake(files={"tank.toml": b"other"})])
    assert queue.jobs() == []


def test_nothing_handed_in_is_nothing(tmp_path: Path) -> None:
    assert queue_in(tmp_path).submit([]) == []


def test_terms_say_when_and_how_a_job_runs(tmp_path: Path) -> None:
    study = read_study(ROOT / "configs" / "crane-sway.toml")
    made = intake_of(study, NOON, Terms(priority=2, retries=0), Window("13:00", "14:00", "UTC"))
    assert (made.priority, made.retries, made.not_before, made.deadline) == (2, 0, None, None)
    assert (made.name, made.title, made.members, made.fingerprint) == (study.name, study.title, study.plan.members, study.fingerprint)


def test_what_is_stated_is_taken_over_by_an_equal_job_that_has_not_ended(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(priority=1, deadline=NOON + 5)])
    assert queue.submit([intake(priority=0, deadline=None)]) == [Submitted(1, False)]
    assert (queue.job(1).priority, queue.job(1).deadline) == (1, NOON + 5)
    night = Window("22:00", "06:00", "UTC")
    stated = frozenset(("priority", "deadline", "not_before", "window", "retries"))
    said = {"priority": 4, "deadline": NOON + 9, "not_before": NOON + 3, "window": night, "retries": 1}
    (found,) = queue.submit([intake(**said, stated=stated)])
    assert (found.new, found.retried, set(found.taken)) == (False, False, set(stated))
    job = queue.job(1)
    assert {name: getattr(job, name) for name in said} == said
    assert queue.submit([intake(**said, stated=stated)]) == [Submitted(1, False)]


def test_a_running_job_hears_of_another_deadline_at_its_next_beat(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(deadline=NOON + 5)])
    with claimed(queue) as claim:
        queue.submit([intake(deadline=NOON + 9, stated=frozenset(("deadline",)))])
        assert claim.deadline == NOON + 5
        claim.beat()
        assert claim.deadline == NOON + 9


@pytest.mark.parametrize(("reason", "again"), [(CUT_SHORT, True), (ENDED["members"].reason, False)])
def test_a_job_that_its_deadline_has_cut_short_goes_on_with_another_deadline(tmp_path: Path, reason: str, again: bool) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake(deadline=NOON - 1)])
    with claimed(queue) as claim:
        claim.finish("partial", reason)
    assert queue.submit([intake(priority=3, stated=frozenset(("priority",)))]) == [Submitted(1, False)]
    (found,) = queue.submit([intake(deadline=NOON + 60, stated=frozenset(("deadline",)))])
    assert (found.job, found.new, found.retried) == (1, False, again)
    assert queue.job(1).state == ("waiting" if again else "partial")
    assert queue.job(1).deadline == (NOON + 60 if again else NOON - 1)


def test_only_what_is_said_is_stated(tmp_path: Path) -> None:
    study = read_study(ROOT / "configs" / "crane-sway.toml")
    assert intake_of(study, NOON).stated == frozenset()
    assert intake_of(study, NOON, Terms(priority=0)).stated == {"priority"}
    terms = Terms(deadline=When("06:00"), not_before=When("04:00"), retries=1)
    assert intake_of(study, NOON, terms, Window("13:00", "14:00", "UTC")).stated == {"deadline", "not_before", "retries", "window"}


SUBMITTER = """
import json, sys, threading
from pathlib import Path
from tests.queue_models import intake
from uq.queue.queue import Queue
home, first = Path(sys.argv[1]), int(sys.argv[2])
found = []
def submit(number):
    queue = Queue(home)  # with a connection of its own
    found.append(queue.submit([intake("same"), intake(f"own {number}", files={"a.csv": str(number).encode()})]))
    queue.close()
threads = [threading.Thread(target=submit, args=(first + n,)) for n in range(10)]
for each in threads: each.start()
for each in threads: each.join()
print(json.dumps([[[one.job, one.new] for one in each] for each in found]))
"""


def test_fifty_at_once_lose_nothing_and_equal_ones_are_one_job(tmp_path: Path) -> None:
    """Five processes with ten threads each, on a home that is not there yet."""
    command = [sys.executable, "-c", SUBMITTER, str(tmp_path / "home")]
    every = [subprocess.Popen([*command, str(10 * n)], stdout=subprocess.PIPE, cwd=ROOT) for n in range(5)]
    told = [one for each in every for one in json.loads(each.communicate()[0])]
    assert [each.returncode for each in every] == [0] * 5
    assert len(told) == 50
    same, own = [each[0] for each in told], [each[1] for each in told]
    assert len({job for job, _ in same}) == 1
    assert sum(new for _, new in same) == 1
    assert len({job for job, _ in own}) == 50
    jobs = Queue(tmp_path / "home").jobs()
    assert {job.fingerprint for job in jobs} == {"same", *(f"own {n}" for n in range(50))}
    folders = Queue(tmp_path / "home").folders
    for job in jobs:
        file = folders.study(job.number, job.name).parent / "a.csv"
        assert job.fingerprint in ("same", f"own {file.read_text() if file.exists() else ''}")
    assert sorted(path.name for path in folders.root.iterdir()) == sorted(str(job.number) for job in jobs)


def test_threads_may_share_a_queue(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    threads = [threading.Thread(target=queue.submit, args=([intake(str(number))],)) for number in range(12)]
    for each in threads:
        each.start()
    for each in threads:
        each.join()
    assert {job.fingerprint for job in queue.jobs()} == {str(number) for number in range(12)}
