"""tallies.nc and progress/: exact arrays, one study, one version, and nothing half written."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path
from typing import Any

import netCDF4
import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from hypothesis.extra.numpy import array_shapes, arrays

from uq.errors import StorageError
from uq.store import packed
from uq.store import saved as saved_module
from uq.store.netcdf import read_attributes
from uq.store.progress import check_progress, clear_progress, part_names, read_part, remove_part, write_part
from uq.store.saved import Saved, read_saved, write_saved
from uq.store.tallies import TALLIES, read_tallies, write_tallies

MINE, OTHER = "7f3a" * 16, "b2c1" * 16
FACTS = {"rows": 64, "rounds": [[64, 0.25], [128, None]], "fell_back": ["x"], "text": "Grad \u00b0 \u2400"}


def made() -> Saved:
    return Saved(
        {
            "scenarios/early/watched/first": np.linspace(0, 1, 24).reshape(2, 3, 4),
            "scenarios/early/watched": np.array([np.nan, -0.0, np.inf, 5e-324]),
            "counts": np.arange(6, dtype=np.int64).reshape(3, 2) - 3,
            "flags": np.array([[True, False]]),
            "none": np.zeros((16, 0, 3), dtype=np.float32),
            "one": np.array(7, dtype=np.uint64),
            "small": np.array([255, 0], dtype=np.uint8),
            "": np.asfortranarray(np.arange(6.0).reshape(2, 3)),
        },
        FACTS,
    )


def same(one: Saved, other: Saved) -> None:
    assert one.facts == other.facts
    assert list(one.arrays) == list(other.arrays)
    for name, array in one.arrays.items():
        back = other.arrays[name]
        assert (back.dtype, back.shape) == (array.dtype, array.shape), name
        assert back.tobytes() == array.tobytes(), name


def test_tallies_come_back_exactly(tmp_path: Path) -> None:
    file = write_tallies(tmp_path, made(), MINE)
    assert file == tmp_path / TALLIES
    for path in (tmp_path, file, tmp_path / "result.nc"):
        same(read_tallies(path, MINE), made())
    same(read_tallies(file, ""), made())
    assert [each.name for each in tmp_path.iterdir()] == [TALLIES]


NUMBERS = st.sampled_from([np.dtype(kind) for kind in ("f8", "f4", "i8", "i4", "i1", "u8", "u1", "?")])


@settings(max_examples=30, deadline=None)
@given(array=NUMBERS.flatmap(lambda kind: arrays(kind, array_shapes(min_dims=0, max_dims=3, min_side=0, max_side=4))), name=st.text())
def test_any_array_by_any_name(tmp_path_factory: pytest.TempPathFactory, array: Any, name: str) -> None:
    name = name.encode(errors="replace").decode().replace("\0", "")
    file = tmp_path_factory.mktemp("any") / "part.nc"
    write_saved(file, Saved({name: array}), MINE)
    same(read_saved(file, MINE), Saved({name: array}))


def test_long_arrays_are_checked_in_slabs(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(packed, "SLAB", 1000)
    long = Saved({"long": np.random.default_rng(5).normal(size=(16, 501))})
    write_tallies(tmp_path, long, MINE)
    same(read_tallies(tmp_path, MINE), long)


def test_what_is_no_number_is_a_defect(tmp_path: Path) -> None:
    for array in (np.array(["text"]), np.array([1j]), np.array([None])):
        with pytest.raises(TypeError):
            write_tallies(tmp_path, Saved({"x": array}), MINE)
    assert not list(tmp_path.iterdir())


def test_refusals_are_sentences(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    with pytest.raises(StorageError, match=r"holds no tallies\.nc, without which a run cannot be gone on with; run the study again"):
        read_tallies(tmp_path, MINE)
    write_tallies(tmp_path, made(), MINE)
    with pytest.raises(StorageError, match="does not belong to the result beside it; put back that of its run, or run the study again"):
        read_tallies(tmp_path, OTHER)
    monkeypatch.setattr(saved_module, "READ", (3, 4))
    with pytest.raises(
        StorageError, match="has format 2, and this uq reads formats 3 and 4: only the version that made a run can go on with it"
    ):
        read_tallies(tmp_path, MINE)
    monkeypatch.setattr(saved_module, "__version__", "9.9")
    with pytest.raises(StorageError, match=r"was written by uq .*, and this is uq 9\.9"):
        read_tallies(tmp_path, MINE)


@pytest.mark.parametrize("damage", ["cut", "bit", "other", "attribute"])
def test_damage_is_found(tmp_path: Path, damage: str) -> None:
    file = write_tallies(tmp_path, made(), MINE)
    if damage == "attribute":
        with netCDF4.Dataset(file, "a") as data:
            data.variables["index"][...] = str(data.variables["index"][...]).replace("[3, 2]", "[2, 3]")
    else:
        content = bytearray(file.read_bytes())
        place = bytes(content).index(np.array([np.nan, -0.0, np.inf, 5e-324]).tobytes())
        content[place] ^= 1
        file.write_bytes({"cut": bytes(content[: len(content) // 2]), "bit": bytes(content), "other": b"no NetCDF at all"}[damage])
    with pytest.raises(StorageError, match=r"tallies\.nc (cannot be read|was changed or damaged).*; run the study again"):
        read_tallies(tmp_path, MINE)


def test_parts_of_a_run_in_progress(tmp_path: Path) -> None:
    assert part_names(tmp_path) == ()
    check_progress(tmp_path, MINE)
    clear_progress(tmp_path)
    write_part(tmp_path, "round-0128", Saved({"x": np.arange(3.0)}), MINE)
    write_part(tmp_path, "round-0064", made(), MINE)
    write_part(tmp_path, "round-0128", Saved({"x": np.arange(4.0)}, {"again": True}), MINE)
    assert part_names(tmp_path) == ("round-0064", "round-0128")
    back = read_part(tmp_path, "round-0128", MINE)
    assert back is not None
    same(back, Saved({"x": np.arange(4.0)}, {"again": True}))
    assert read_part(tmp_path, "round-0256", MINE) is None
    remove_part(tmp_path, "round-0064")
    remove_part(tmp_path, "round-0064")
    assert part_names(tmp_path) == ("round-0128",)
    clear_progress(tmp_path)
    assert not list(tmp_path.iterdir())


def test_a_damaged_part_is_done_again_and_a_draft_is_no_part(tmp_path: Path) -> None:
    write_part(tmp_path, "a", made(), MINE)
    write_part(tmp_path, "b", made(), MINE)
    (tmp_path / "progress" / "a.nc").write_bytes(b"half a file")
    (tmp_path / "progress" / ".c.nc.1234.part").write_bytes(b"left by a killed process")
    assert part_names(tmp_path) == ("a", "b")
    check_progress(tmp_path, MINE)
    assert read_part(tmp_path, "a", MINE) is None
    assert read_part(tmp_path, "b", MINE) is not None
    clear_progress(tmp_path)
    assert not list(tmp_path.iterdir())


def test_progress_of_another_study_is_refused(tmp_path: Path) -> None:
    write_part(tmp_path, "a", made(), OTHER)
    with pytest.raises(StorageError, match="belongs to another study"):
        check_progress(tmp_path, MINE)
    with pytest.raises(StorageError, match="belongs to another study"):
        read_part(tmp_path, "a", MINE)


def test_what_is_not_ours_stays(tmp_path: Path) -> None:
    write_part(tmp_path, "a", made(), MINE)
    (tmp_path / "progress" / "notes.txt").write_text("mine")
    clear_progress(tmp_path)
    assert (tmp_path / "progress" / "notes.txt").read_text() == "mine"


def test_names_of_parts_stay_in_their_folder(tmp_path: Path) -> None:
    for name in ("../a", "", ".a", "a/b"):
        with pytest.raises(ValueError, match="cannot be the name of a part"):
            write_part(tmp_path, name, made(), MINE)


def test_a_file_that_cannot_be_written_leaves_what_was_there(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    write_tallies(tmp_path, made(), MINE)

    def full(*_: Any) -> None:
        raise OSError(28, "No space left on device")

    monkeypatch.setattr(saved_module, "write_packed", full)
    with pytest.raises(StorageError, match=r"cannot write .*tallies\.nc: .*No space left"):
        write_tallies(tmp_path, Saved({}), MINE)
    same(read_tallies(tmp_path, MINE), made())
    assert [each.name for each in tmp_path.iterdir()] == [TALLIES]


def test_what_is_read_back_is_what_was_meant(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.setattr(
        saved_module, "read_packed", lambda path, slab: replace(packed.read_packed(path, slab), texts={"index": "[]", "facts": "{}"})
    )
    with pytest.raises(StorageError, match="what was read back is not what was written"):
        write_tallies(tmp_path, made(), MINE)
    assert not list(tmp_path.iterdir())


def test_files_of_the_format_before_are_read(tmp_path: Path, monkeypatch: pytest.MonkeyPatch) -> None:
    with monkeypatch.context() as patch:
        patch.setattr(saved_module, "FORMAT", 1)
        file = write_tallies(tmp_path, made(), MINE)
    assert len(str(read_attributes(file)["checksum"])) == 64
    same(read_tallies(tmp_path, MINE), made())
    content = bytearray(file.read_bytes())
    place = content.index(np.ascontiguousarray(next(iter(made().arrays.values()))).tobytes())
    content[place] ^= 1
    file.write_bytes(content)
    with pytest.raises(StorageError, match="was changed or damaged"):
        read_tallies(tmp_path, MINE)


def test_the_head_says_whose_it_is(tmp_path: Path) -> None:
    head = read_attributes(write_tallies(tmp_path, made(), MINE))
    assert (head["format"], head["study_fingerprint"]) == (2, MINE)
    assert set(head) == {"format", "version_uq", "study_fingerprint", "checksum"}
