"""Words and exit codes: what a mistake, an interruption or a defect of ours looks like to the user."""

from __future__ import annotations

import os
import shlex
import sys
import time
import traceback
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path
from typing import TextIO

import typer

from uq.cli.settings import state_folder
from uq.errors import EXIT_DEFECT, EXIT_INTERRUPTED, StorageError, UqError, UseMistake


def out(text: str) -> None:
    """A result, to standard output. Raises StorageError where it cannot be written there, as on a full disk."""
    try:
        _write(sys.stdout, text)
    except BrokenPipeError:
        raise
    except OSError as error:
        # What is still buffered must not fail again when Python ends.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        raise StorageError(f"cannot write to standard output: {error.strerror}") from None


def err(text: str) -> None:
    """A message, to standard error."""
    _write(sys.stderr, text)


def _write(stream: TextIO, text: str) -> None:
    """A text and the end of its line; letters that the stream's encoding does not know become question marks."""
    known = text.encode(stream.encoding or "utf-8", errors="replace").decode(stream.encoding or "utf-8")
    stream.write(known if known.endswith("\n") else known + "\n")
    stream.flush()


def typed() -> str:
    """The command as it was typed, for the history of a result."""
    return shlex.join(["uq", *sys.argv[1:]])


@contextmanager
def telling() -> Iterator[None]:
    """Turns whatever goes wrong inside into words on standard error and the exit code of results-format.md."""
    try:
        yield
    except UqError as mistake:
        err(f"uq: {placed(mistake)}")
        raise typer.Exit(mistake.exit_code) from None
    except KeyboardInterrupt:
        # Where Ctrl-C came while a library was making a class from text, Python has noted to end by the signal, whatever code we end with;
        # it forgets that when it runs a text again.
        exec("")
        err("uq: interrupted; no result was written")
        raise typer.Exit(EXIT_INTERRUPTED) from None
    except BrokenPipeError:
        # Who reads has closed the pipe (`uq show ... | head`); what is still buffered must not fail again when Python ends.
        os.dup2(os.open(os.devnull, os.O_WRONLY), sys.stdout.fileno())
        raise typer.Exit(0) from None
    except typer.Exit:
        raise
    except Exception as defect:  # noqa: BLE001 - this is the one place where a defect of ours is told
        err(_defect(defect))
        raise typer.Exit(EXIT_DEFECT) from None


def placed(mistake: UqError) -> str:
    """A mistake with the argument that it is of, where it says so."""
    key = mistake.key if isinstance(mistake, UseMistake) else ""
    return f"{key}: {mistake}" if key else str(mistake)


def _defect(defect: Exception) -> str:
    """The sentence about a defect of ours; the traceback goes to a log file, or into the sentence where that cannot be written."""
    story = "".join(traceback.format_exception(defect))
    head = f"uq: a defect of ours, please report: {type(defect).__name__}: {defect}"
    try:
        return f"{head}\n    the traceback is in {_log(story)}"
    except OSError:
        return f"{head}\n{story}"


def _log(story: str) -> Path:
    folder = state_folder(os.environ)
    folder.mkdir(parents=True, exist_ok=True)
    path = folder / f"defect-{time.strftime('%Y%m%d-%H%M%S', time.gmtime())}-{os.getpid()}.log"
    path.write_text(f"{' '.join(sys.argv)}\n\n{story}", encoding="utf-8")
    return path
