"""A run goes on: after an interruption, in a folder that another process has, from a shorter result; and what it says then."""

from __future__ import annotations

import os
import shutil
import subprocess
import sys
import time
from pathlib import Path

import numpy as np
import pytest

import uq
from tests.kill_runs import KEPT, STUDY
from uq.analysis.finding import Finding
from uq.errors import Interrupted, StorageError, StudyError, ValueMistake
from uq.running import answers, resume
from uq.running.again import precision_asked, study_of
from uq.running.keeping import Pace
from uq.running.observer import Progress, Silent
from uq.running.start import Start
from uq.store.lock import owned
from uq.store.result import Result
from uq.study.read import parse_study

ALWAYS = Pace(0.0, 0.0)


class Stops(Silent):
    """Stops the run after so many blocks; remembers what it was told."""

    def __init__(self, after: int) -> None:
        super().__init__()
        self.left, self.stages, self.seen = after, [], []  # type: ignore[var-annotated]

    def stage(self, words: str) -> None:
        self.stages.append(words)

    def progress(self, progress: Progress) -> None:
        self.seen.append(progress)
        self.left -= 1
        if self.left == 0:
            self.stop[0] = 1


def fingerprint(result: Result) -> str:
    return str(result.attributes["content_fingerprint"])


@pytest.fixture(scope="module")
def calm(tmp_path_factory: pytest.TempPathFactory) -> Result:
    return uq.run(parse_study(KEPT, name="killed"), tmp_path_factory.mktemp("calm") / "result", block_rows=16)


@pytest.mark.parametrize("pace", [ALWAYS, Pace()])
def test_an_interrupted_run_goes_on_by_itself_and_ends_with_the_same_bits(tmp_path: Path, calm: Result, pace: Pace) -> None:
    study, folder = parse_study(KEPT, name="killed"), tmp_path / "result"
    for after in (3, 40, 100):
        stops = Stops(after)
        with pytest.raises(Interrupted, match="the same command goes on from there"):
            uq.run(study, folder, block_rows=16, observer=stops, threads=1, start=Start(pace=pace))
        assert not (folder / "result.nc").exists()
        assert (folder / "progress").is_dir()
    last = Stops(0)
    result = uq.run(study, folder, block_rows=32, observer=last, threads=2)
    assert any("are done already, going on from there" in words for words in last.stages)
    assert last.seen[0].done > 100 * 16
    assert fingerprint(result) == fingerprint(calm)
    for name in ("members", "members_failed", "solves", "solves_failed"):
        assert result.attributes[name] == calm.attributes[name]
    assert {path.name for path in folder.iterdir()} == {"study.toml", "result.nc", "tallies.nc"}


def test_before_anything_is_kept_nothing_is_claimed_and_nothing_is_left(tmp_path: Path) -> None:
    observer = Silent()
    observer.stop[0] = 1
    with pytest.raises(Interrupted, match="interrupted; no result was written"):
        uq.run(parse_study(KEPT, name="killed"), tmp_path / "deep" / "result", observer=observer)
    assert not (tmp_path / "deep").exists()


def test_a_run_that_is_stopped_while_it_works_out_its_answers_keeps_all_its_solves(
    tmp_path: Path, calm: Result, monkeypatch: pytest.MonkeyPatch
) -> None:
    study, folder = parse_study(KEPT, name="killed"), tmp_path / "result"

    def pressed(*_: object) -> tuple[Finding, ...]:
        raise KeyboardInterrupt

    with monkeypatch.context() as patched:
        patched.setattr(answers, "answered", pressed)
        with pytest.raises(Interrupted, match="the same command goes on from there"):
            uq.run(study, folder)
    last = Stops(0)
    assert fingerprint(uq.run(study, folder, observer=last)) == fingerprint(calm)
    assert last.seen == []


def test_a_damaged_part_is_done_again(tmp_path: Path, calm: Result) -> None:
    folder = tmp_path / "result"
    with pytest.raises(Interrupted):
        uq.run(parse_study(KEPT, name="killed"), folder, block_rows=16, observer=Stops(60), threads=1, start=Start(pace=ALWAYS))
    parts = sorted((folder / "progress").glob("*-part.nc"))
    assert len(parts) > 10
    parts[4].write_bytes(parts[4].read_bytes()[:-100])
    parts[7].write_bytes(b"")
    assert fingerprint(uq.run(parse_study(KEPT, name="killed"), folder)) == fingerprint(calm)


def test_what_was_done_on_another_processor_is_done_again(tmp_path: Path, calm: Result, monkeypatch: pytest.MonkeyPatch) -> None:
    folder = tmp_path / "result"
    with monkeypatch.context() as patched:
        patched.setattr(resume, "made_with", lambda: {"processor": "another"})
        with pytest.raises(Interrupted):
            uq.run(parse_study(KEPT, name="killed"), folder, block_rows=16, observer=Stops(30), start=Start(pace=ALWAYS))
    observer = Stops(0)
    assert fingerprint(uq.run(parse_study(KEPT, name="killed"), folder, observer=observer)) == fingerprint(calm)
    assert resume.STRANGE in observer.stages
    assert not (folder / "progress").exists()


def test_progress_of_another_study_is_not_gone_on_with(tmp_path: Path) -> None:
    folder = tmp_path / "result"
    with pytest.raises(Interrupted):
        uq.run(parse_study(KEPT, name="killed"), folder, block_rows=16, observer=Stops(5), start=Start(pace=ALWAYS))
    with pytest.raises(StorageError, match="another study"):
        uq.run(parse_study(KEPT.replace("seed = 3", "seed = 4"), name="killed"), folder)


def test_the_second_of_two_processes_is_refused_and_death_gives_the_folder_free(tmp_path: Path) -> None:
    program = f"import sys, time\nfrom pathlib import Path\nfrom uq.store.lock import owned\nwith owned(Path({str(tmp_path / 'r')!r})):\n"
    program += "    print('mine', flush=True)\n    time.sleep(60)\n"
    with subprocess.Popen([sys.executable, "-c", program], stdout=subprocess.PIPE, text=True) as other:
        assert other.stdout is not None
        assert other.stdout.readline() == "mine\n"
        with pytest.raises(StorageError, match="another process is working in"):
            uq.run(parse_study(KEPT, name="killed"), tmp_path / "r")
        other.kill()
        other.wait()
    with owned(tmp_path / "r"):
        pass
    assert not (tmp_path / "r" / "progress").exists()


def test_what_a_killed_process_left_half_written_is_taken_away_and_nothing_else(tmp_path: Path) -> None:
    drafts = [
        tmp_path / "r" / name for name in (".result.nc.0123abcd.part", "files/.a.csv.00000000.part", "progress/.1-part.nc.ffffffff.part")
    ]
    others = [tmp_path / "r" / name for name in (".film.part", "notes.part", ".result.nc.0123abcd.part.txt")]
    for file in (*drafts, *others):
        file.parent.mkdir(parents=True, exist_ok=True)
        file.write_text("")
    with owned(tmp_path / "r"):
        pass
    assert not any(file.exists() for file in drafts)
    assert all(file.exists() for file in others)


@pytest.mark.skipif(os.name == "nt", reason="needs two quick processes")
def test_many_processes_at_once_have_the_folder_one_after_the_other(tmp_path: Path) -> None:
    program = (
        "import os, sys\nfrom pathlib import Path\nfrom uq.store.lock import owned\nfrom uq.errors import StorageError\n"
        "folder, inside = Path(sys.argv[1]), Path(sys.argv[2])\nhad = 0\n"
        "for _ in range(300):\n"
        "    try:\n        with owned(folder):\n"
        "            os.close(os.open(inside, os.O_CREAT | os.O_EXCL))\n            had += 1\n            inside.unlink()\n"
        "    except StorageError:\n        pass\n"
        "print(had)\n"
    )
    arguments = [sys.executable, "-c", program, str(tmp_path / "r"), str(tmp_path / "inside")]
    every = [subprocess.Popen(arguments, stdout=subprocess.PIPE, stderr=subprocess.PIPE, text=True) for _ in range(3)]
    for each in every:
        out, told = each.communicate()
        assert each.returncode == 0, told
        assert int(out) > 0


@pytest.mark.parametrize("keep", ["", 'keep = "100 kB"\n', 'keep = "400 kB"\n'])
def test_an_extended_result_has_the_bits_of_a_fresh_one(tmp_path: Path, keep: str) -> None:
    """Values kept in both, in neither, and in the shorter one only."""
    short = parse_study(STUDY.replace("8192", "2048") + keep, name="killed")
    old = uq.run(short, tmp_path / "old")
    before = {path.name: path.read_bytes() for path in old.folder.iterdir()}
    stops = Stops(0)
    new = uq.extend(old.path, members=8192, observer=stops)
    fresh = uq.run(short.with_changes({"plan.members": 8192}), tmp_path / "fresh")
    assert fingerprint(new) == fingerprint(fresh)
    assert new.attributes["study_fingerprint"] == fresh.attributes["study_fingerprint"]
    assert new.folder == tmp_path / f"killed-{str(fresh.attributes['study_fingerprint'])[:6]}"
    for name in ("members", "members_failed", "solves", "solves_failed", "members_asked"):
        assert new.attributes[name] == fresh.attributes[name]
    # Nothing is solved twice, and the old result stays as it was.
    assert any(f"{2 * old.attributes['solves']} solves are done already" in words for words in stops.stages)
    assert {path.name: path.read_bytes() for path in old.folder.iterdir()} == before
    assert len(str(new.attributes["history"]).splitlines()) == 2
    again = uq.extend(new.folder, members=16384)
    assert again.attributes["members"] == 16384


def test_an_extension_may_ask_for_a_precision(tmp_path: Path) -> None:
    old = uq.run(parse_study(STUDY.replace("8192", "2048"), name="killed"), tmp_path / "old")
    new = uq.extend(old.folder, members=65536, precision={"probabilities": 0.006})
    assert old.attributes["members"] < new.attributes["members"] < 65536
    assert new.findings["precision"].attributes["reached"] == 1
    reached = new.findings["precision/limits/low"].variables
    assert reached["members"].data[0] == old.attributes["members"]
    half = (reached["ever_by_high"].data - reached["ever_by_low"].data) / 2
    assert half[-1].max() <= 0.006 < half[0].max()


def test_what_cannot_be_extended_is_told(tmp_path: Path) -> None:
    old = uq.run(parse_study(STUDY.replace("8192", "1024"), name="killed"), tmp_path / "old")
    with pytest.raises(ValueMistake, match="more than the 1024 that are solved already"):
        uq.extend(old.folder, members=1024)
    with pytest.raises(ValueMistake, match="--members or --precision"):
        uq.extend(old.folder)
    with pytest.raises(StudyError, match="found 7"):
        uq.extend(old.folder, precision={"indices": 7.0})
    (old.folder / "tallies.nc").unlink()
    with pytest.raises(StorageError, match="tallies"):
        uq.extend(old.folder, members=2048)


def test_a_precision_as_it_is_typed() -> None:
    assert precision_asked("probabilities=0.001, indices = 0.02") == {"probabilities": 0.001, "indices": 0.02}
    assert precision_asked("") == {}
    with pytest.raises(ValueMistake, match="did you mean `indices`"):
        precision_asked("indexes=0.02")
    with pytest.raises(ValueMistake, match="indices=NUMBER"):
        precision_asked("indices=narrow")


def test_a_result_holds_the_whole_study_that_it_answers(tmp_path: Path) -> None:
    (tmp_path / "data.csv").write_text("k\n0.4\n0.5\n0.6\n", encoding="utf-8")
    text = STUDY.replace("normal = { mean = 0.5, sd = 0.05 }", 'data = { file = "data.csv", column = "k" }').replace("8192", "512")
    (tmp_path / "s.toml").write_text(text, encoding="utf-8")
    study = uq.read_study(tmp_path / "s.toml").with_changes({"plan.seed": 9, "plan.quantiles": [0.1, 0.5], "parameters.escape": 0.1})
    result = uq.run(study, tmp_path / "result")
    shutil.rmtree(tmp_path / "result")
    (tmp_path / "data.csv").unlink()
    again = study_of(result)
    assert again.fingerprint == study.fingerprint
    assert again.changes == study.changes
    assert again.files == study.files


def test_minutes_end_a_run_at_the_end_of_a_round(tmp_path: Path) -> None:
    """A clock that goes on by a second whenever it is looked at: the run ends where another round would take longer than it may."""
    now = [0.0]

    def clock() -> float:
        now[0] += 1.0
        return now[0]

    text = STUDY + "[plan.precision]\nquantiles = 0.0001\n[plan.at_most]\nminutes = 2\n"
    result = uq.run(
        parse_study(text.replace("members = 8192\n", ""), name="killed"), tmp_path / "r", start=Start(clock=clock), block_rows=64
    )
    facts = result.findings["precision"].attributes
    assert (facts["reached"], facts["stopped"]) == (0, "minutes")
    members = int(result.attributes["members"])
    assert members >= 2048
    assert members & (members - 1) == 0
    fixed = uq.run(parse_study(STUDY.replace("8192", str(members)), name="killed"), tmp_path / "fixed")
    for group in ("bands/x", "limits/low", "outcomes/last", "ranking/x"):
        for name, variable in fixed.findings[group].variables.items():
            np.testing.assert_array_equal(variable.data, result.findings[group].variables[name].data, err_msg=f"{group}/{name}")


def test_solves_bound_a_run_with_those_of_ranking_and_scenarios(tmp_path: Path) -> None:
    text = STUDY + "[plan.precision]\nquantiles = 0.0001\n[plan.at_most]\nsolves = 40000\n"
    result = uq.run(parse_study(text, name="killed"), tmp_path / "r")
    assert result.findings["precision"].attributes["stopped"] == "solves"
    # 16 replicates of A, B and three mixed rows, twice: 160 solves a row; 128 rows fit, 256 do not.
    assert 2 * int(result.attributes["solves"]) == 128 * 160


def test_progress_costs_little(tmp_path: Path) -> None:
    """Not a measurement (tests.bench.running is): a run of a second writes progress down a few times at most."""
    written: list[str] = []
    from uq.store.keeper import FolderKeeper

    keep = FolderKeeper.keep
    try:
        FolderKeeper.keep = lambda self, name, saved: (written.append(name), keep(self, name, saved))[1]  # type: ignore[method-assign]
        begin = time.perf_counter()
        uq.run(parse_study(KEPT, name="killed"), tmp_path / "r")
        taken = time.perf_counter() - begin
    finally:
        FolderKeeper.keep = keep  # type: ignore[method-assign]
    assert len(written) <= 2 + taken
