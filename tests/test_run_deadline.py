"""A run that is stopped gives the answer of its last completed round where that is wanted, and can go on to its end."""

from __future__ import annotations

from collections.abc import Sequence
from pathlib import Path
from time import perf_counter

import numpy as np
import pytest
import typer

import uq
from tests.kill_runs import KEPT, PRECISE
from tests.test_run_resume import ALWAYS, Stops, fingerprint
from uq.cli.running import finished
from uq.errors import EXIT_PRECISION, Interrupted
from uq.report.summary import summary
from uq.running.keeping import Pace
from uq.running.observer import HeadlineAnswer, Listener, Silent
from uq.running.start import Start
from uq.running.telling import worth
from uq.store.result import Result
from uq.study.read import parse_study

SO_FAR = Start(so_far=lambda: True)
# 64 rows of 16 replicates in blocks of 16 rows, for the study and its scenario: a round of as many blocks.
FIRST_ROUND = 2 * 16 * 4


@pytest.fixture(scope="module")
def stopped(tmp_path_factory: pytest.TempPathFactory) -> Result:
    """In the midst of its second round of three."""
    folder = tmp_path_factory.mktemp("stopped") / "result"
    return uq.run(parse_study(KEPT, name="k"), folder, block_rows=16, observer=Stops(FIRST_ROUND + 20), threads=2, start=SO_FAR)


def test_the_answer_is_that_of_the_completed_rounds(stopped: Result, tmp_path: Path) -> None:
    short = uq.run(parse_study(KEPT.replace("8192", "2048"), name="k"), tmp_path / "short")
    assert (stopped.attributes["members"], stopped.attributes["members_asked"]) == (2048, 8192)
    assert stopped.attributes["stopped"] == "deadline"
    assert "stopped" not in short.attributes
    for name in ("solves", "solves_failed", "members_failed"):
        assert stopped.attributes[name] == short.attributes[name]
    for group in ("bands/x", "limits/low", "outcomes/last", "ranking/low", "differences/slower/limits/low"):
        for name, variable in short.findings[group].variables.items():
            np.testing.assert_array_equal(stopped.findings[group].variables[name].data, variable.data, err_msg=f"{group} {name}")
    assert "The deadline came first: this is the answer of 2048 of 8192 members." in summary(stopped)


def test_the_rest_goes_on_from_there_to_the_bits_of_a_run_that_was_never_stopped(stopped: Result, tmp_path: Path) -> None:
    calm = uq.run(parse_study(KEPT, name="k"), tmp_path / "calm")
    assert (stopped.folder / "progress").is_dir()
    again = Stops(0)
    whole = uq.run(parse_study(KEPT, name="k"), stopped.folder, observer=again)
    assert any("are done already, going on from there" in words for words in again.stages)
    assert again.seen[0].done > 2 * stopped.attributes["solves"]
    assert fingerprint(whole) == fingerprint(calm)
    assert "stopped" not in whole.attributes
    assert {path.name for path in whole.folder.iterdir()} == {"study.toml", "result.nc", "tallies.nc"}


def test_before_a_round_is_complete_there_is_no_answer(tmp_path: Path) -> None:
    with pytest.raises(Interrupted, match="the same command goes on from there"):
        uq.run(parse_study(KEPT, name="k"), tmp_path / "r", block_rows=16, observer=Stops(20), start=SO_FAR)
    assert not (tmp_path / "r" / "result.nc").exists()


def test_rounds_that_an_earlier_attempt_has_done_are_an_answer_as_well(tmp_path: Path) -> None:
    study, folder = parse_study(KEPT, name="k"), tmp_path / "r"
    with pytest.raises(Interrupted):
        uq.run(study, folder, block_rows=16, observer=Stops(FIRST_ROUND + 20), start=Start(pace=ALWAYS))
    observer = Silent()
    observer.stop[0] = 1
    result = uq.run(study, folder, observer=observer, start=SO_FAR)
    assert result.attributes["members"] == 2048


def test_with_a_precision_the_result_says_that_the_deadline_came_first(tmp_path: Path, capsys: pytest.CaptureFixture[str]) -> None:
    study = parse_study(PRECISE, name="k")
    result = uq.run(study, tmp_path / "r", block_rows=16, observer=Stops(FIRST_ROUND + 20), start=SO_FAR)
    said = result.findings["precision"].attributes
    assert (said["reached"], said["stopped"]) == (0, "deadline")
    assert result.attributes["members"] == 2048
    assert "The precision asked was not reached: the deadline came first." in " ".join(summary(result).split())
    with pytest.raises(typer.Exit) as ended:
        finished(result, json=False)
    assert ended.value.exit_code == EXIT_PRECISION
    assert "stopped after 2048 of 16384 members" in capsys.readouterr().err


class Hears(Silent):
    """Remembers what it is told at the ends of rounds."""

    def __init__(self) -> None:
        super().__init__()
        self.rounds: list[tuple[int, Sequence[HeadlineAnswer]]] = []

    def round(self, members: int, answers: Sequence[HeadlineAnswer]) -> None:
        self.rounds.append((members, answers))


def test_who_listens_hears_what_is_settled_so_far(tmp_path: Path) -> None:
    assert not isinstance(Silent(), Listener)
    hears = Hears()
    assert isinstance(hears, Listener)
    result = uq.run(parse_study(PRECISE, name="k"), tmp_path / "r", observer=hears)
    reached = result.findings["precision/limits/low"].variables
    assert [members for members, _ in hears.rounds] == list(reached["members"].data)
    last = {(each.group, each.name, each.place): each for each in hears.rounds[-1][1]}
    answer = last["limits/low", "ever_by", "4"]
    assert (answer.value, answer.low, answer.high) == tuple(reached[f"ever_by{end}"].data[-1, -1] for end in ("", "_low", "_high"))
    assert answer.settled is True
    assert last["outcomes/last", "quantiles", "0.5"].settled is None
    assert last["ranking/low", "total_by", "fall"].kind == "indices"


def test_without_a_precision_telling_takes_a_fiftieth_of_a_run_at_most(tmp_path: Path) -> None:
    hears = Hears()
    uq.run(parse_study(KEPT, name="k"), tmp_path / "r", observer=hears)
    assert hears.rounds == []  # a run of a second or two
    # The same on a clock that runs a thousand times as fast.
    slow = Start(clock=lambda: 1000 * perf_counter(), pace=Pace(1e9, 1e9))
    uq.run(parse_study(KEPT, name="k"), tmp_path / "slow", observer=hears, start=slow, block_rows=64)
    assert hears.rounds[0][0] == 2048
    assert hears.rounds[-1][0] < 8192
    assert {each.settled for each in hears.rounds[0][1]} == {None}
    assert not worth(4.9, 0.0, 0.05)
    assert worth(5.1, 0.0, 0.05)
    assert not worth(100.0, 1.5, 0.5)
