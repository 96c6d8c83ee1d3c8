"""The commands. Each reads its arguments, makes one call and prints what comes back; what is heavy is imported inside."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer

from uq.cli.say import out, telling

app = typer.Typer(
    name="uq",
    help="Forecasts of uncertain initial value problems. Results go to standard output, messages to standard error.",
    no_args_is_help=True,
    add_completion=True,
    rich_markup_mode=None,
    pretty_exceptions_enable=False,
)

StudyPath = Annotated[Path, typer.Argument(metavar="STUDY", help="The study file (TOML).", show_default=False)]
Json = Annotated[bool, typer.Option("--json", help="Print the machine form (JSON) instead of the text.")]


def main() -> None:
    """What the command `uq` starts."""
    app()


def _version(wanted: bool) -> None:
    if wanted:
        from uq import __version__

        out(f"uq {__version__}")
        raise typer.Exit


@app.callback()
def options(
    version: Annotated[bool, typer.Option("--version", callback=_version, is_eager=True, help="Say the version and stop.")] = False,
) -> None:
    """Forecasts of uncertain initial value problems. Results go to standard output, messages to standard error."""


@app.command()
def run(
    study: StudyPath,
    output: Annotated[
        Path | None,
        typer.Option("-o", "--output", metavar="DIR", help="Folder of the result; default results/NAME-FINGERPRINT.", show_default=False),
    ] = None,
    threads: Annotated[int, typer.Option("--threads", min=0, help="Threads to solve with; 0 takes all cores.")] = 0,
    seed: Annotated[
        int | None, typer.Option("--seed", min=0, help="Run with this seed instead of the study's.", show_default=False)
    ] = None,
    json: Json = False,
) -> None:
    """Run a study and print what it says."""
    with telling():
        from uq.cli.running import run_study

        run_study(study, output, threads, seed, json)


@app.command()
def check(study: StudyPath, json: Json = False) -> None:
    """Check a study without solving anything."""
    with telling():
        from uq.cli.checking import check_study

        check_study(study, json)


@app.command()
def show(
    result: Annotated[Path, typer.Argument(metavar="RESULT", help="A run folder or its result.nc.", show_default=False)],
    json: Json = False,
) -> None:
    """Show a result again."""
    with telling():
        from uq.cli.showing import show_result

        show_result(result, json)
