"""The run folder: what is in it, when it is refused, and that a file with its final name is whole."""

from __future__ import annotations

import os
import subprocess
import sys
import time
from pathlib import Path

import netCDF4
import numpy as np
import pytest

from tests.made_results import made_facts, made_findings, made_result, made_study
from uq.errors import StorageError
from uq.store import folder as folder_module
from uq.store.folder import check_folder, default_folder, write_result
from uq.store.open import open_result


def names(folder: Path) -> set[str]:
    return {str(path.relative_to(folder).as_posix()) for path in folder.rglob("*") if path.is_file()}


def test_the_folder_holds_the_study_as_read_the_files_it_names_and_the_result(tmp_path: Path) -> None:
    study = made_study()
    path = write_result(tmp_path / "results" / "new", study, made_findings(), made_facts())
    assert path == tmp_path / "results" / "new" / "result.nc"
    assert names(path.parent) == {"study.toml", "ambient.csv", "more/measured.csv", "result.nc"}
    assert (path.parent / "study.toml").read_bytes() == study.text.encode()
    assert (path.parent / "more/measured.csv").read_bytes() == b"\x00\xff"


def test_the_default_folder_is_named_after_study_and_fingerprint() -> None:
    assert default_folder(made_study()) == Path("results/hold-tank-7f3a7f")


@pytest.mark.parametrize(
    ("name", "kept"),
    [
        ("../up.csv", "files/up.csv"),
        ("/etc/air.csv", "files/air.csv"),
        ("C:/air.csv", "files/air.csv"),
        ("..\\air.csv", "files/air.csv"),
        ("result.nc", "files/result.nc"),
        ("study.toml", "files/study.toml"),
        ("tallies.nc", "files/tallies.nc"),
        ("progress/a.csv", "files/a.csv"),
        ("./air.csv", "air.csv"),
    ],
)
def test_no_data_file_leaves_the_folder_or_takes_the_place_of_ours(tmp_path: Path, name: str, kept: str) -> None:
    study = made_study(files={name: b"1"})
    path = write_result(tmp_path / "a" / "b", study, made_findings(), made_facts())
    assert names(tmp_path) == {f"a/b/{each}" for each in ("study.toml", "result.nc", kept)}
    assert (path.parent / kept).read_bytes() == b"1"
    assert str(open_result(path).study.file.values[0]) == name


def test_two_files_of_one_name_are_both_kept(tmp_path: Path) -> None:
    write_result(tmp_path, made_study(files={"../air.csv": b"1", "../../air.csv": b"2"}), made_findings(), made_facts())
    assert {path.read_bytes() for path in (tmp_path / "files").iterdir()} == {b"1", b"2"}


def test_a_result_of_the_same_study_is_replaced(tmp_path: Path) -> None:
    first = made_result(tmp_path)
    second = made_result(tmp_path, facts=made_facts(wall_time=7.0), study=made_study(text="# another remark\n"))
    assert (first.attributes["wall_time"], second.attributes["wall_time"]) == (41.23, 7.0)
    assert (tmp_path / "study.toml").read_text() == "# another remark\n"
    assert not [name for name in names(tmp_path) if name.endswith(".part")]


def test_a_result_of_another_study_is_refused_in_a_sentence(tmp_path: Path) -> None:
    made_result(tmp_path)
    before = (tmp_path / "result.nc").read_bytes()
    other = made_study(fingerprint="b" * 64, name="other", text="another")
    with pytest.raises(
        StorageError, match=r"result\.nc holds the result of another study \(hold-tank, 7f3a7f\); choose another folder with -o"
    ):
        write_result(tmp_path, other, made_findings(), made_facts())
    with pytest.raises(StorageError, match="another study"):
        check_folder(tmp_path, other)
    check_folder(tmp_path, made_study())
    assert (tmp_path / "result.nc").read_bytes() == before
    assert (tmp_path / "study.toml").read_bytes() == made_study().text.encode()


def test_a_foreign_result_is_refused(tmp_path: Path) -> None:
    (tmp_path / "result.nc").write_bytes(b"mine")
    with pytest.raises(StorageError, match="cannot be read as a result"):
        check_folder(tmp_path, made_study())
    with netCDF4.Dataset(tmp_path / "result.nc", "w") as file:
        file.setncattr("title", "mine")
    with pytest.raises(StorageError, match="is not a result of uq"):
        check_folder(tmp_path, made_study())


def test_a_study_of_the_user_is_never_overwritten(tmp_path: Path) -> None:
    (tmp_path / "study.toml").write_text("mine")
    with pytest.raises(StorageError, match=r"study\.toml is there already and is another file"):
        write_result(tmp_path, made_study(), made_findings(), made_facts())
    assert names(tmp_path) == {"study.toml"}
    (tmp_path / "study.toml").write_bytes(made_study().text.encode())
    write_result(tmp_path, made_study(), made_findings(), made_facts())


def test_a_file_in_place_of_the_folder_is_refused(tmp_path: Path) -> None:
    (tmp_path / "here").write_text("mine")
    for place in (tmp_path / "here", tmp_path / "here" / "below"):
        with pytest.raises(StorageError):
            write_result(place, made_study(), made_findings(), made_facts())


def test_where_writing_fails_the_old_result_stands_and_nothing_is_left_over(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    made_result(tmp_path)
    before = (tmp_path / "result.nc").read_bytes()

    def full(path: Path, groups: object) -> None:
        path.write_bytes(b"half")
        raise RuntimeError("NetCDF: HDF error")

    monkeypatch.setattr(folder_module, "write_groups", full)
    with pytest.raises(StorageError, match=r"cannot write to .*HDF error"):
        write_result(tmp_path, made_study(), made_findings(), made_facts(wall_time=7.0))
    assert (tmp_path / "result.nc").read_bytes() == before
    assert not [name for name in names(tmp_path) if name.endswith(".part")]


def test_what_is_read_back_otherwise_never_gets_its_name(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    def careless(path: Path, groups: tuple[folder_module.StoredGroup, ...]) -> None:
        honest(path, groups)
        with netCDF4.Dataset(path, "a") as file:
            file["bands/T/mean"][3] = np.pi

    honest = folder_module.write_groups
    monkeypatch.setattr(folder_module, "write_groups", careless)
    with pytest.raises(StorageError, match="read back"):
        write_result(tmp_path, made_study(), made_findings(), made_facts())
    assert not (tmp_path / "result.nc").exists()


@pytest.mark.skipif(os.name == "nt" or os.geteuid() == 0, reason="the right to write binds ordinary users only")
def test_a_folder_without_the_right_to_write_is_told(tmp_path: Path) -> None:
    tmp_path.chmod(0o500)
    with pytest.raises(StorageError, match="cannot write"):
        write_result(tmp_path / "new", made_study(), made_findings(), made_facts())


def cut(path: Path) -> None:
    path.write_bytes(path.read_bytes()[:-4000])


def emptied(path: Path) -> None:
    path.write_bytes(b"")


def text(path: Path) -> None:
    path.write_text("not a file of ours")


def incomplete(path: Path) -> None:
    with netCDF4.Dataset(path, "a") as file:
        file.delncattr("complete")


def foreign(path: Path) -> None:
    with netCDF4.Dataset(path, "w") as file:
        file.createDimension("x", 3)


def later(path: Path) -> None:
    with netCDF4.Dataset(path, "a") as file:
        file.setncattr("schema", 99)


def altered(path: Path) -> None:
    with netCDF4.Dataset(path, "a") as file:
        file["bands/T/mean"][0] = 1.0


@pytest.mark.parametrize(
    ("harm", "sentence"),
    [
        (cut, "cannot be read as NetCDF-4"),
        (emptied, "cannot be read as NetCDF-4"),
        (text, "cannot be read as NetCDF-4"),
        (incomplete, "is not whole: its writing was cut off"),
        (foreign, "is a NetCDF file, but not a result of uq"),
        (later, "written by a later version"),
        (altered, "changed or damaged after it was written"),
    ],
)
def test_a_file_that_is_no_whole_result_is_told_in_a_sentence(tmp_path: Path, harm: object, sentence: str) -> None:
    path = made_result(tmp_path).path
    harm(path)  # type: ignore[operator]
    with pytest.raises(StorageError, match=sentence) as told:
        open_result(path)
    assert str(path) in str(told.value)


def test_missing_files_and_folders_are_told(tmp_path: Path) -> None:
    with pytest.raises(StorageError, match="no such file or folder"):
        open_result(tmp_path / "nowhere")
    with pytest.raises(StorageError, match=r"holds no result\.nc"):
        open_result(tmp_path)


def test_attributes_may_be_added_to_a_result(tmp_path: Path) -> None:
    path = made_result(tmp_path).path
    with netCDF4.Dataset(path, "a") as file:
        file.setncattr("archived_as", "report 12")
    assert open_result(path).attributes["archived_as"] == "report 12"


def test_a_folder_that_may_not_be_written_to_is_told_before_anything_is_solved(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(os, "access", lambda path, mode: False)
    with pytest.raises(StorageError, match="may not be written to"):
        check_folder(tmp_path / "new" / "deeper", made_study())


WRITER = """
import sys
from pathlib import Path
from tests.made_results import made_facts, made_findings, made_study
from uq.store.folder import write_result
for count in range(10_000):
    write_result(Path(sys.argv[1]), made_study(), made_findings(), made_facts(wall_time=float(count)))
    print(count, flush=True)
"""


def test_a_writer_that_is_killed_leaves_a_whole_result(tmp_path: Path) -> None:
    """Killed at three places of its loop: what stands under the final name can be opened and is one of those that were written."""
    for delay in (0.0, 0.03, 0.11):
        writer = subprocess.Popen([sys.executable, "-c", WRITER, str(tmp_path)], stdout=subprocess.PIPE, cwd=Path(__file__).parent.parent)
        assert writer.stdout is not None
        told = int(writer.stdout.readline())
        time.sleep(delay)
        writer.kill()
        told = max(told, *(int(line) for line in writer.communicate()[0].split()), 0)
        assert open_result(tmp_path).attributes["wall_time"] in (told, told + 1)
