"""Batches: what they become, and that every mistake in all of them is told at once, where it stands.

After a deliberate change of wording:  python -c "from tests.test_study_batch import rewrite; rewrite()"  and read the difference.
"""

from __future__ import annotations

from pathlib import Path

import pytest

from uq.clock import When, Window
from uq.errors import EXIT_STUDY, StudyError
from uq.study.batch import MOST_STUDIES, is_batch, read_batch
from uq.study.read import read_study

ROOT = Path(__file__).parent.parent
FOLDER = Path(__file__).parent / "broken" / "batches"
BROKEN = sorted(FOLDER.glob("*.toml"))
TANK = ROOT / "configs" / "hold-tank.toml"


def written(folder: Path, text: str) -> Path:
    path = folder / "night.toml"
    path.write_text(f"schema = 1\n{text}", encoding="utf-8")
    return path


def message(path: Path) -> str:
    """What is said of a broken batch, without the folder it lies in."""
    with pytest.raises(StudyError) as caught:
        read_batch(path)
    assert caught.value.exit_code == EXIT_STUDY
    return str(caught.value).replace(f"{path.parent}/", "") + "\n"


def rewrite() -> None:
    """Write what is said now beside every broken batch."""
    for path in BROKEN:
        path.with_suffix(".txt").write_text(message(path), encoding="utf-8")


@pytest.mark.parametrize("path", BROKEN, ids=[path.stem for path in BROKEN])
def test_a_broken_batch_gets_its_message(path: Path) -> None:
    assert message(path) == path.with_suffix(".txt").read_text(encoding="utf-8")


def test_no_message_is_left_over() -> None:
    assert len(BROKEN) >= 13
    assert sorted(FOLDER.glob("*.txt")) == [path.with_suffix(".txt") for path in BROKEN]


def test_a_batch_as_the_format_has_it(tmp_path: Path) -> None:
    (tmp_path / "configs").mkdir()
    (tmp_path / "jobs").mkdir()
    (tmp_path / "configs" / TANK.name).write_bytes(TANK.read_bytes())
    batch = read_batch(
        written(
            tmp_path / "jobs",
            """
            title  = "Nightly site review"
            [window]
            opens = "22:00"
            closes = "06:00"
            timezone = "Europe/Athens"

            [[run]]
            study = "../configs/hold-tank.toml"
            priority = 5
            deadline = "06:00"
            not_before = "22:30"
            retries = 3
            [run.change]
            "parameters.UA_off.triangular.mode" = [3, 4, 6]
            "plan.members" = [262144]
            """,
        )
    )
    assert (batch.name, batch.title, batch.window) == ("night", "Nightly site review", Window("22:00", "06:00", "Europe/Athens"))
    assert [each.changed for each in batch.planned] == [
        {"parameters.UA_off.triangular.mode": mode, "plan.members": 262144} for mode in (3, 4, 6)
    ]
    assert {(each.priority, each.deadline, each.not_before, each.retries) for each in batch.planned} == {
        (5, When("06:00"), When("22:30"), 3)
    }


def test_every_study_of_a_batch_is_the_one_that_its_changes_make(tmp_path: Path) -> None:
    path = written(tmp_path, f'[[run]]\nstudy = "{TANK}"\n[run.change]\n"parameters.UA_off.triangular.mode" = [3, 4]\n"plan.seed" = [1, 2]')
    for each in read_batch(path).planned:
        assert each.study.fingerprint == read_study(TANK, each.changed).fingerprint
        assert each.study.changes == each.changed
        assert each.study.name == "hold-tank"
    assert len({each.study.fingerprint for each in read_batch(path).planned}) == 4


def test_what_is_left_open_is_filled_in(tmp_path: Path) -> None:
    (each,) = (batch := read_batch(written(tmp_path, f'[[run]]\nstudy = "{TANK}"'))).planned
    assert (batch.title, batch.window) == ("night", None)
    assert (each.priority, each.not_before, each.deadline, each.retries, each.changed) == (0, None, None, 3, {})


def test_runs_come_in_their_order_and_the_last_key_changes_first(tmp_path: Path) -> None:
    change = '[run.change]\n"plan.members" = [512, 1024]\n"plan.seed" = [1, 2]'
    text = f'[[run]]\nstudy = "{TANK}"\n{change}\n[[run]]\nstudy = "{TANK}"\npriority = -2'
    planned = read_batch(written(tmp_path, text)).planned
    assert [tuple(each.changed.values()) for each in planned] == [(512, 1), (512, 2), (1024, 1), (1024, 2), ()]
    assert planned[-1].priority == -2


@pytest.mark.parametrize(
    ("value", "values"),
    [
        ("512", [512]),
        ("[512]", [512]),
        ('["2000", 512]', None),
        ("[[0.1, 0.9], [0.5]]", [[0.1, 0.9], [0.5]]),
    ],
)
def test_a_single_value_is_a_list_of_one_and_a_list_of_lists_gives_lists(tmp_path: Path, value: str, values: list[object] | None) -> None:
    key = "plan.quantiles" if value.startswith("[[") else "plan.members"
    path = written(tmp_path, f'[[run]]\nstudy = "{TANK}"\n[run.change]\n"{key}" = {value}')
    if values is None:
        with pytest.raises(StudyError, match=r'night.toml:5:19  run\[0\].change."plan.members"\[0\]: found "2000"'):
            read_batch(path)
    else:
        assert [each.changed[key] for each in read_batch(path).planned] == values


def test_times_may_be_written_as_toml_has_them(tmp_path: Path) -> None:
    text = f'[[run]]\nstudy = "{TANK}"\nnot_before = 2030-01-31T22:30:00\ndeadline = 2030-02-01T06:00:00+02:00\n'
    (each,) = read_batch(written(tmp_path, text)).planned
    assert (each.not_before, each.deadline) == (When("2030-01-31 22:30:00"), When("2030-02-01 06:00:00+02:00"))
    (each,) = read_batch(written(tmp_path, f'[[run]]\nstudy = "{TANK}"\ndeadline = 06:00:00')).planned
    assert each.deadline == When("06:00")


def test_data_files_are_those_beside_the_study_whichever_folder_the_batch_is_in(tmp_path: Path) -> None:
    (each,) = read_batch(written(tmp_path, f'[[run]]\nstudy = "{ROOT}/configs/orchard-mites.toml"')).planned
    assert set(each.study.files) == {"orchard-mites-counts.csv"}


def test_the_mistakes_of_a_study_are_told_once_however_many_runs_name_it(tmp_path: Path) -> None:
    study = Path(__file__).parent / "broken" / "caret_for_power.toml"
    text = f'[[run]]\nstudy = "{study}"\n' * 3 + "[run.change]\n'plan.members' = [512, 1024]"
    with pytest.raises(StudyError) as told:
        read_batch(written(tmp_path, text))
    with pytest.raises(StudyError) as alone:
        read_study(study)
    assert told.value.mistakes == alone.value.mistakes


def test_a_batch_is_told_from_a_study(tmp_path: Path) -> None:
    assert is_batch(written(tmp_path, "[[run]]\nstudy = 3"))
    assert is_batch(written(tmp_path, "[[run]]\nstudy = [not closed"))
    assert is_batch(written(tmp_path, "run = []"))
    assert not is_batch(TANK)
    assert not is_batch(tmp_path / "nowhere.toml")
    (tmp_path / "bytes.toml").write_bytes(b"[[run]]\n\xff")
    assert not is_batch(tmp_path / "bytes.toml")


def test_a_file_that_cannot_be_read_is_told(tmp_path: Path) -> None:
    with pytest.raises(StudyError, match=r"nowhere.toml  batch: found a file that cannot be read \(No such file or directory\)"):
        read_batch(tmp_path / "nowhere.toml")
    (tmp_path / "bytes.toml").write_bytes(b"schema = 1\n# \xff")
    with pytest.raises(StudyError, match=r"bytes.toml:2:3  batch: found the byte 0xff"):
        read_batch(tmp_path / "bytes.toml")


def test_as_many_studies_as_allowed_are_counted_over_all_runs(tmp_path: Path) -> None:
    many = ", ".join(str(number) for number in range(MOST_STUDIES // 2 + 1))
    text = f'[[run]]\nstudy = "{TANK}"\n[run.change]\n"plan.seed" = [{many}]\n' * 2
    with pytest.raises(StudyError, match=f"found {MOST_STUDIES // 2 + 1} combinations, of {MOST_STUDIES + 2} in all; expected at most"):
        read_batch(written(tmp_path, text))
