"""What the command says and the codes it ends with, without running anything long."""

from __future__ import annotations

import contextlib
import signal
from pathlib import Path

import pytest
import typer
from typer.testing import CliRunner

from uq.cli import speeds
from uq.cli.main import app
from uq.cli.progress import stopping, words_of
from uq.cli.say import telling
from uq.cli.settings import animated, state_folder
from uq.errors import EXIT_DEFECT, EXIT_INTERRUPTED, EXIT_STORAGE, EXIT_STUDY, EXIT_USAGE, Interrupted, Mistake, StorageError, StudyError
from uq.running.observer import Progress, Silent

RUNNER = CliRunner()


def ends_with(error: BaseException) -> int:
    with pytest.raises(typer.Exit) as ended, telling():
        raise error
    return ended.value.exit_code


def test_every_kind_of_error_has_its_code() -> None:
    mistake = Mistake("a.toml", 3, 5, "states.T.unit", "`C`", "a unit", "write degC")
    assert ends_with(StudyError([mistake])) == EXIT_STUDY
    assert ends_with(StorageError("no room")) == EXIT_STORAGE
    assert ends_with(Interrupted("interrupted; no result was written")) == EXIT_INTERRUPTED
    assert ends_with(KeyboardInterrupt()) == EXIT_INTERRUPTED
    assert ends_with(ZeroDivisionError()) == EXIT_DEFECT


def test_a_users_mistake_is_told_without_a_traceback(capsys: pytest.CaptureFixture[str]) -> None:
    ends_with(StudyError([Mistake("a.toml", 3, 5, "states.T.unit", "`C`", "a unit", "write degC")]))
    told = capsys.readouterr()
    assert told.out == ""
    assert "a.toml:3:5  states.T.unit: found `C`; expected a unit (write degC)" in told.err
    assert "Traceback" not in told.err


def test_a_defect_of_ours_asks_for_a_report_and_leaves_its_traceback_in_a_file(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    monkeypatch.setenv("XDG_STATE_HOME", str(tmp_path))
    ends_with(RuntimeError("what we did not think of"))
    told = capsys.readouterr().err
    assert "a defect of ours, please report" in told
    (log,) = (tmp_path / "uq").glob("defect-*.log")
    assert str(log) in told
    assert "what we did not think of" in log.read_text()
    assert "Traceback" in log.read_text()


def test_where_no_log_can_be_written_the_traceback_is_shown(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch, capsys: pytest.CaptureFixture[str]
) -> None:
    (tmp_path / "uq").write_text("a file where the folder should be")
    monkeypatch.setenv("XDG_STATE_HOME", str(tmp_path))
    ends_with(RuntimeError("what we did not think of"))
    assert "Traceback" in capsys.readouterr().err


@pytest.mark.parametrize(
    ("arguments", "code"),
    [
        (["--help"], 0),
        (["--version"], 0),
        (["run", "--help"], 0),
        ([], EXIT_USAGE),
        (["forecast"], EXIT_USAGE),
        (["run"], EXIT_USAGE),
        (["run", "a.toml", "--threads", "-1"], EXIT_USAGE),
        (["run", "a.toml", "--threads", "many"], EXIT_USAGE),
        (["check", "no-such-file.toml"], EXIT_STUDY),
        (["run", "no-such-file.toml"], EXIT_STUDY),
        (["show", "no-such-folder"], EXIT_STORAGE),
        (["extend", "no-such-folder", "--members", "1024"], EXIT_STORAGE),
        (["extend", "no-such-folder", "--precision", "width=0.1"], EXIT_USAGE),
        (["extend", "no-such-folder", "--members", "0"], EXIT_USAGE),
        (["compare", "no-such-folder"], EXIT_USAGE),
        (["compare", "no-such-folder", "neither"], EXIT_STORAGE),
    ],
)
def test_use_and_misuse(arguments: list[str], code: int) -> None:
    done = RUNNER.invoke(app, arguments)
    assert done.exit_code == code, done.output


def test_state_stands_where_xdg_says() -> None:
    assert state_folder({"HOME": "/home/ada"}) == Path("/home/ada/.local/state/uq")
    assert state_folder({"HOME": "/home/ada", "XDG_STATE_HOME": "/var/state"}) == Path("/var/state/uq")
    assert state_folder({"HOME": "/home/ada", "XDG_STATE_HOME": "relative"}) == Path("/home/ada/.local/state/uq")


def test_nothing_moves_without_a_terminal() -> None:
    assert animated({"TERM": "xterm"}, terminal=True)
    assert not animated({"TERM": "xterm"}, terminal=False)
    assert not animated({"TERM": "dumb"}, terminal=True)


def test_ctrl_c_sets_the_stop_flag_even_where_the_exception_is_swallowed() -> None:
    observer, before = Silent(), signal.getsignal(signal.SIGINT)
    with stopping(observer):
        with contextlib.suppress(KeyboardInterrupt):
            signal.raise_signal(signal.SIGINT)
        assert observer.stop[0] == 1
    assert signal.getsignal(signal.SIGINT) is before


def test_speeds_are_kept_and_found_again(tmp_path: Path) -> None:
    folder = tmp_path / "uq"
    assert speeds.load(folder) == {}
    assert speeds.expected({}, "a") is None
    kept = speeds.with_measured(speeds.with_measured({}, "a", 2e-6), "b", 4e-6)
    speeds.store(folder, kept)
    found = speeds.load(folder)
    assert speeds.expected(found, "a") == (2e-6, True)
    assert speeds.expected(found, "c") == (4e-6, False)


def test_damaged_or_unwritable_speeds_do_no_harm(tmp_path: Path) -> None:
    (tmp_path / "speeds.json").write_text('{"a": -1, "b": "fast", "c": 1e-6}')
    assert speeds.load(tmp_path) == {"c": 1e-6}
    (tmp_path / "speeds.json").write_text("[")
    assert speeds.load(tmp_path) == {}
    speeds.store(tmp_path / "speeds.json" / "below", {"a": 1.0})


def test_old_speeds_are_let_go() -> None:
    kept: dict[str, float] = {}
    for number in range(2 * speeds.KEPT):
        kept = speeds.with_measured(kept, str(number), 1.0)
    assert len(kept) == speeds.KEPT + 1
    assert "0" not in kept


def test_time_left_in_words() -> None:
    assert words_of(Progress(0, 10, 0, 0.0)) == ""
    assert words_of(Progress(5, 10, 0, 20.0)) == "20 s left"
    assert words_of(Progress(5, 10, 2, 20.0)) == "20 s left, 2 failed"
