"""The study of a result, from its file alone, and what may be changed in it to go on."""

from __future__ import annotations

from ast import literal_eval
from collections.abc import Mapping
from pathlib import Path
from typing import TYPE_CHECKING, Any

import numpy as np

from uq.errors import StorageError, StudyError, UseMistake, suggest
from uq.study.plan import PRECISION_OF
from uq.study.read import parse_study
from uq.study.study import Study

if TYPE_CHECKING:
    from uq.store.result import Result


def study_of(result: Result) -> Study:
    """The study that a result answers, with the changes that were made to it. Raises StorageError where it cannot be what it was."""
    variables = result.findings["study"].variables
    told = {name: variable.data for name, variable in variables.items()}
    changes = dict(_changed(str(line)) for line in told.get("changes", ()))
    try:
        study = parse_study(str(told["text"]), name=str(result.attributes["study"]), files=_files(told), changes=changes)
    except StudyError as error:
        raise StorageError(f"the study in {result.path} cannot be read by this version of uq: {error}") from error
    if study.fingerprint != result.attributes["study_fingerprint"]:
        raise StorageError(f"{result.path} was made by another version of uq; only the version that made a run can go on with it")
    return study


def _changed(line: str) -> tuple[str, Any]:
    """A change as the file has it: key = value, the value as Python writes it."""
    key, _, value = line.partition(" = ")
    return key, literal_eval(value)


def _files(told: Mapping[str, Any]) -> dict[str, bytes]:
    """The bytes of the files that the study names."""
    if "file" not in told:
        return {}
    content, ends = told["file_bytes"].tobytes(), np.cumsum(told["file_size"])
    return {str(name): content[end - size : end] for name, size, end in zip(told["file"], told["file_size"], ends, strict=True)}


def extended(study: Study, reached: int, members: int | None, precision: Mapping[str, float]) -> Study:
    """The study with more members than it has reached, or with a precision. Raises UseMistake where that is not more, StudyError."""
    if members is None and not precision:
        raise UseMistake("nothing to go on for", "--members or --precision, or both")
    if members is not None and members <= reached:
        raise UseMistake(f"{members} members", f"more than the {reached} that are solved already", key="--members")
    changes: dict[str, object] = {} if members is None else {"plan.members": members}
    more = study.with_changes({**changes, **{f"plan.precision.{kind}": value for kind, value in precision.items()}})
    if more.fingerprint == study.fingerprint:
        raise UseMistake("what the result was made for", "more members, or another precision")
    return more


def precision_asked(text: str) -> dict[str, float]:
    """The precision in a text like probabilities=0.001,indices=0.02; "" asks for none. Raises UseMistake."""
    found: dict[str, float] = {}
    for part in filter(None, (each.strip() for each in text.split(","))):
        kind, _, value = (each.strip() for each in part.partition("="))
        if kind not in PRECISION_OF:
            raise UseMistake(f"`{kind}`", "one of " + ", ".join(PRECISION_OF), suggest(kind, PRECISION_OF), key="--precision")
        try:
            found[kind] = float(value)
        except ValueError:
            raise UseMistake(f"`{part}`", f"{kind}=NUMBER", key="--precision") from None
    return found


def folder_beside(result: Result, study: Study) -> Path:
    """The folder that a fresh run of the study would have, beside that of the result."""
    from uq.store.folder import default_folder

    return result.folder.parent / default_folder(study).name
