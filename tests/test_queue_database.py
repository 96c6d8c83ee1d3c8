"""When the database cannot be used as it should: a sentence, an exit code, and nothing lost."""

from __future__ import annotations

import os
import shutil
import sqlite3
import subprocess
import sys
import tempfile
import time
from collections.abc import Callable, Iterator
from contextlib import contextmanager
from pathlib import Path

import pytest

from tests.queue_models import HOUR, NOON, Clock, claimed, intake, queue_in
from uq.errors import EXIT_STORAGE, StorageError
from uq.queue import database as database_module
from uq.queue.database import STEPS, Database
from uq.queue.queue import DATABASE, Queue
from uq.queue.states import State

ROOT = Path(__file__).parent.parent
CALLS: tuple[Callable[[Queue], object], ...] = (
    lambda queue: queue.submit([intake("new")]),
    lambda queue: queue.cancel(1),
    lambda queue: queue.claim("a"),
    lambda queue: queue.clean(0),
)


def file_of(queue: Queue) -> Path:
    return queue.home / DATABASE


@contextmanager
def locked(queue: Queue) -> Iterator[None]:
    """Another program is writing for as long as this lasts."""
    other = sqlite3.connect(file_of(queue), isolation_level=None)
    other.execute("BEGIN EXCLUSIVE")
    try:
        yield
    finally:
        other.execute("ROLLBACK")
        other.close()


@pytest.mark.parametrize("call", CALLS)
def test_a_database_locked_for_too_long_is_told_and_nothing_is_changed(tmp_path: Path, call: Callable[[Queue], object]) -> None:
    queue = queue_in(tmp_path, patience=0.05)
    queue.submit([intake()])
    before = queue.job(1), queue.history(1)
    with locked(queue):
        assert queue.jobs(), "reading needs no lock"
        with pytest.raises(StorageError, match=r"queue\.sqlite is locked by another program, for longer than 0\.05 s") as told:
            call(queue)
    assert told.value.exit_code == EXIT_STORAGE
    assert (queue.job(1), queue.history(1)) == before
    assert len(queue.jobs()) == 1
    assert [path.name for path in queue.folders.root.iterdir()] == ["1"], "nothing half handed in is left over"
    call(queue)


def test_a_runner_that_could_not_tell_may_tell_again(tmp_path: Path) -> None:
    queue = queue_in(tmp_path, patience=0.05)
    queue.submit([intake()])
    with claimed(queue) as claim:
        with locked(queue):
            for call in (claim.beat, lambda: claim.finish("done"), lambda: claim.stumbled("x")):
                with pytest.raises(StorageError, match="locked"):
                    call()
        assert claim.finish("done")
    assert [each.event for each in queue.history(1)] == ["submit", "claim", "complete"]


def test_a_short_lock_is_waited_for(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    program = (
        "import sqlite3, sys, time\nother = sqlite3.connect(sys.argv[1], isolation_level=None)\nother.execute('BEGIN EXCLUSIVE')\n"
        "print('locked', flush=True)\ntime.sleep(0.3)\nother.execute('ROLLBACK')\n"
    )
    with subprocess.Popen([sys.executable, "-c", program, str(file_of(queue))], stdout=subprocess.PIPE) as other:
        assert other.stdout is not None
        other.stdout.readline()
        assert queue.cancel(1).state is State.CANCELLED


def test_a_database_of_a_later_version_is_left_alone(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    queue.close()
    with sqlite3.connect(file_of(queue)) as other:
        other.execute("INSERT INTO steps VALUES (?)", (len(STEPS) + 1,))
    before = file_of(queue).read_bytes()
    with pytest.raises(StorageError, match=r"was made by a later version of uq .* use that version") as told:
        queue.jobs()
    assert told.value.exit_code == EXIT_STORAGE
    assert file_of(queue).read_bytes() == before


def test_a_step_that_is_new_is_done_once_and_loses_nothing(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    queue.close()
    monkeypatch.setattr(database_module, "STEPS", (*STEPS, ("ALTER TABLE jobs ADD COLUMN colour TEXT NOT NULL DEFAULT 'grey'",)))
    for _ in range(2):
        with Queue(queue.home).database.reading() as connection:
            assert connection.execute("SELECT number, colour FROM jobs").fetchall() == [{"number": 1, "colour": "grey"}]


def test_a_step_that_fails_leaves_the_database_as_it_was(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    queue.close()
    steps = (*STEPS, ("ALTER TABLE jobs ADD COLUMN colour TEXT", "SELECT no_such_thing"))
    with monkeypatch.context() as patch:
        patch.setattr(database_module, "STEPS", steps)
        with pytest.raises(sqlite3.OperationalError, match="no_such_thing"):
            queue.jobs()
    assert queue.job(1).state is State.WAITING
    with queue.database.reading() as connection:
        assert "colour" not in connection.execute("SELECT * FROM jobs").fetchone()


def test_a_clock_set_back_an_hour_loses_nothing_and_holds_nothing_longer(tmp_path: Path) -> None:
    clock = Clock()
    queue = queue_in(tmp_path, clock)
    queue.submit([intake("a"), intake("b", not_before=NOON + 10)])
    with claimed(queue) as claim:
        claim.beat({"done": 1})
        clock.now -= HOUR
        claim.beat({"done": 2})
        assert queue.claim("b") is None, "who owns a job does not follow from a clock"
        assert claim.stumbled("no luck") is State.HELD
        assert queue.job(1).until == clock.now + 60
    clock.now += 60
    with claimed(queue) as claim:
        assert claim.stumbled("no luck") is State.HELD
    clock.now -= HOUR
    assert queue.job(1).state is State.WAITING
    with claimed(queue) as claim:
        assert claim.finish("done")
    assert queue.job(2).until == NOON + 10
    clock.now = NOON + 10
    assert claimed(queue).job.number == 2


def test_a_file_in_place_of_the_home_is_told(tmp_path: Path) -> None:
    (tmp_path / "home").write_text("mine")
    with pytest.raises(StorageError, match=r"home cannot be made: .*; set UQ_HOME"):
        queue_in(tmp_path).submit([intake()])
    with pytest.raises(StorageError, match="home cannot be made"):
        queue_in(tmp_path).jobs()
    assert (tmp_path / "home").read_text() == "mine"


def test_a_folder_in_place_of_the_database_is_told(tmp_path: Path) -> None:
    (tmp_path / "home" / DATABASE).mkdir(parents=True)
    with pytest.raises(StorageError, match="cannot be opened or made; set UQ_HOME"):
        queue_in(tmp_path).jobs()


@pytest.mark.parametrize("content", [b"this is no database, and was never meant to be one\n" * 20])
def test_a_file_that_is_no_database_is_told(tmp_path: Path, content: bytes) -> None:
    queue = queue_in(tmp_path)
    queue.home.mkdir()
    file_of(queue).write_bytes(content)
    with pytest.raises(StorageError, match="is not a database of uq"):
        queue.jobs()
    assert file_of(queue).read_bytes() == content


@pytest.mark.skipif(not sys.platform.startswith("linux"), reason="needs a folder that even root cannot write to")
def test_a_home_on_a_disk_that_cannot_be_written_to_is_told() -> None:
    """Below /proc not even root can make anything."""
    queue = Queue(Path("/proc/uq"))
    for call in (queue.jobs, lambda: queue.submit([intake()])):
        with pytest.raises(StorageError, match=r"/proc/uq cannot be made: .*; set UQ_HOME"):
            call()


ORDINARY = """
import os, sys
from pathlib import Path
from tests.queue_models import intake
from uq.errors import StorageError
from uq.queue.queue import Queue
if os.geteuid() == 0:
    os.setuid(65534)  # the right to write binds ordinary users only
for call in (lambda queue: queue.submit([intake("b")]), lambda queue: queue.cancel(1), lambda queue: queue.claim("a")):
    try:
        call(Queue(Path(sys.argv[1])))
    except StorageError as error:
        print(error.exit_code, error)
"""


@pytest.mark.skipif(os.name == "nt", reason="needs rights as Unix has them")
def test_a_home_without_the_right_to_write_is_told() -> None:
    with tempfile.TemporaryDirectory() as folder:  # pytest's own folder is closed to other users
        Path(folder).chmod(0o755)
        queue = queue_in(Path(folder))
        queue.submit([intake()])
        queue.close()
        for path in (file_of(queue), queue.home):
            path.chmod(path.stat().st_mode & 0o555)
        done = subprocess.run([sys.executable, "-c", ORDINARY, str(queue.home)], cwd=ROOT, capture_output=True, text=True, check=True)
        queue.home.chmod(0o755)
        file_of(queue).chmod(0o644)
        lines = done.stdout.splitlines()
        assert len(lines) == 3
        assert all(line.startswith(f"{EXIT_STORAGE} {queue.home}") and "set UQ_HOME to a folder that may" in line for line in lines), lines
        assert [(job.number, job.state) for job in queue.jobs()] == [(1, State.WAITING)]


@pytest.mark.parametrize("call", CALLS)
def test_a_database_that_may_be_read_only_is_told_and_nothing_is_changed(tmp_path: Path, call: Callable[[Queue], object]) -> None:
    """What the file system says no to for an ordinary user, SQLite says no to here: `query_only` holds for root as well."""
    queue = queue_in(tmp_path)
    queue.submit([intake()])
    with queue.database.reading() as connection:
        connection.execute("PRAGMA query_only = ON")
    with pytest.raises(StorageError, match=r"may not be written to; set UQ_HOME to a folder that may .*; nothing was changed") as told:
        call(queue)
    assert told.value.exit_code == EXIT_STORAGE
    with queue.database.reading() as connection:
        connection.execute("PRAGMA query_only = OFF")
    assert [(job.number, job.state) for job in queue.jobs()] == [(1, State.WAITING)]
    assert [path.name for path in queue.folders.root.iterdir()] == ["1"]


def full(queue: Queue) -> None:
    """Lets the database grow no further."""
    with queue.database.reading() as connection:
        pages = connection.execute("PRAGMA page_count").fetchone()["page_count"]
        connection.execute(f"PRAGMA max_page_count = {pages}")


def test_a_full_disk_is_told_and_nothing_is_handed_in(tmp_path: Path) -> None:
    queue = queue_in(tmp_path)
    queue.submit([intake("a")])
    full(queue)
    many = [intake(f"{number:0500}") for number in range(200)]
    with pytest.raises(StorageError, match="the disk is full; free some room") as told:
        queue.submit(many)
    assert told.value.exit_code == EXIT_STORAGE
    assert [job.fingerprint for job in queue.jobs()] == ["a"]
    assert [path.name for path in queue.folders.root.iterdir()] == ["1"], "it takes no room of the disk that is full"
    queue.close()  # with another connection there is room again
    assert len(queue.submit(many)) == 200
    assert sorted(int(path.name) for path in queue.folders.root.iterdir()) == list(range(1, 202))
    assert queue.folders.study(201, "tank").read_text().startswith("# 000")


LIMITED = """
import resource, sys
from pathlib import Path
from tests.queue_models import intake
from uq.errors import StorageError
from uq.queue.queue import Queue
queue = Queue(Path(sys.argv[1]))
resource.setrlimit(resource.RLIMIT_FSIZE, (int(sys.argv[2]), int(sys.argv[2])))
number = 0
try:
    while True:
        queue.submit([intake(f"{number:0400}", files={"a.csv": b"1" * int(sys.argv[3])})])
        number += 1
except StorageError as error:
    print(number, error)
"""


@pytest.mark.skipif(os.name == "nt", reason="needs a limit on the size of files")
@pytest.mark.parametrize(
    ("limit", "size", "words"), [(300_000, 10, "nothing was changed"), (2_000_000, 2_000_001, "cannot take in a study")]
)
def test_a_file_that_may_grow_no_further_is_told_and_all_before_is_whole(tmp_path: Path, limit: int, size: int, words: str) -> None:
    command = [sys.executable, "-c", LIMITED, str(tmp_path), str(limit), str(size)]
    done = subprocess.run(command, cwd=ROOT, capture_output=True, text=True, check=True)
    number, said = done.stdout.split(" ", 1)
    assert words in said
    jobs = Queue(tmp_path).jobs()
    assert [job.fingerprint for job in jobs] == [f"{each:0400}" for each in range(int(number))]
    folders = Queue(tmp_path).folders
    assert all((folders.study(job.number, "tank").parent / "a.csv").read_bytes() == b"1" * size for job in jobs)


def test_a_process_that_is_killed_while_it_writes_leaves_all_that_it_was_told(tmp_path: Path) -> None:
    program = (
        "import sys\nfrom pathlib import Path\nfrom tests.queue_models import intake\nfrom uq.queue.queue import Queue\n"
        "queue = Queue(Path(sys.argv[1]))\n"
        "for number in range(10_000):\n    queue.submit([intake(f'{sys.argv[2]} {number}')])\n    print(number, flush=True)\n"
    )
    for delay in (0.0, 0.02, 0.07):
        writer = subprocess.Popen([sys.executable, "-c", program, str(tmp_path), str(delay)], stdout=subprocess.PIPE, cwd=ROOT)
        assert writer.stdout is not None
        told = int(writer.stdout.readline())
        time.sleep(delay)
        writer.kill()
        told = max(told, *(int(line) for line in writer.communicate()[0].split()), 0)
        queue = Queue(tmp_path)
        mine = [job for job in queue.jobs() if job.fingerprint.startswith(f"{delay} ")]
        assert len(mine) in (told + 1, told + 2)
        assert all(queue.folders.study(job.number, "tank").is_file() for job in mine)
    queue.clean(0)
    assert sorted(path.name for path in queue.folders.root.iterdir()) == sorted(str(job.number) for job in queue.jobs())


def test_a_copied_database_can_be_opened(tmp_path: Path) -> None:
    """What is told as handed in is in the files: no state is kept elsewhere."""
    queue = queue_in(tmp_path)
    queue.submit([intake("a"), intake("b")])
    shutil.copytree(queue.home, tmp_path / "copy")
    assert [job.fingerprint for job in Queue(tmp_path / "copy").jobs()] == ["a", "b"]


def test_a_transaction_is_synchronised_and_logged_ahead(tmp_path: Path) -> None:
    database = Database(tmp_path / DATABASE)
    with database.reading() as connection:
        assert connection.execute("PRAGMA synchronous").fetchone()["synchronous"] == 2
        assert connection.execute("PRAGMA journal_mode").fetchone()["journal_mode"] == "wal"
