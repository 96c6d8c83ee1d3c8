"""How wide the text of a result is laid out."""

from __future__ import annotations

import pytest

from uq.cli.showing import columns


@pytest.mark.parametrize(("terminal", "laid_out"), [("40", 60), ("60", 60), ("84", 84), ("100", 100), ("250", 100)])
def test_as_wide_as_the_terminal_within_what_can_be_read(monkeypatch: pytest.MonkeyPatch, terminal: str, laid_out: int) -> None:
    monkeypatch.setenv("COLUMNS", terminal)
    assert columns() == laid_out


def test_a_pipe_gets_the_full_width(monkeypatch: pytest.MonkeyPatch) -> None:
    monkeypatch.delenv("COLUMNS", raising=False)
    monkeypatch.setattr("sys.__stdout__", None)
    assert columns() == 100
