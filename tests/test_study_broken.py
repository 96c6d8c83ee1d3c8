"""Every broken study in tests/broken gets exactly the message that stands beside it.

After a deliberate change of wording:  python -c "from tests.test_study_broken import rewrite; rewrite()"  and read the difference.
"""

from __future__ import annotations

from pathlib import Path

import pytest

from uq.errors import EXIT_STUDY, StudyError
from uq.study.read import read_study

FOLDER = Path(__file__).parent / "broken"
STUDIES = sorted(FOLDER.glob("*.toml"))


def message(path: Path) -> str:
    """What is said of a broken study, without the folder it lies in."""
    with pytest.raises(StudyError) as caught:
        read_study(path)
    assert caught.value.exit_code == EXIT_STUDY
    return str(caught.value).replace(f"{path.parent}/", "") + "\n"


def rewrite() -> None:
    """Write what is said now beside every broken study."""
    for path in STUDIES:
        path.with_suffix(".txt").write_text(message(path), encoding="utf-8")


@pytest.mark.parametrize("path", STUDIES, ids=[path.stem for path in STUDIES])
def test_a_broken_study_gets_its_message(path: Path) -> None:
    assert message(path) == path.with_suffix(".txt").read_text(encoding="utf-8")


def test_there_are_over_a_hundred_and_no_message_is_left_over() -> None:
    assert len(STUDIES) >= 110
    assert sorted(FOLDER.glob("*.txt")) == [path.with_suffix(".txt") for path in STUDIES]


def test_every_mistake_says_where_what_and_what_else() -> None:
    for path in STUDIES:
        with pytest.raises(StudyError) as caught:
            read_study(path)
        for mistake in caught.value.mistakes:
            assert mistake.file.endswith(path.name)
            assert mistake.key
            assert mistake.found
            assert mistake.expected
            assert mistake.line > 0 or mistake.found.startswith("no "), "only what is not there may have no line"
            assert (mistake.line > 0) == (mistake.column > 0)
