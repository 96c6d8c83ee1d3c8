"""The commands. Each reads its arguments, makes one call and prints what comes back; what is heavy is imported inside."""

from __future__ import annotations

from pathlib import Path
from typing import Annotated

import typer

from uq.cli.queue_commands import COMMANDS
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
ResultPath = Annotated[
    Path, typer.Argument(metavar="RESULT", help="A run folder, its result.nc, or the number of a job.", show_default=False)
]
Output = Annotated[
    Path | None,
    typer.Option("-o", "--output", metavar="DIR", help="Folder of the result; default results/NAME-FINGERPRINT.", show_default=False),
]
Threads = Annotated[int, typer.Option("--threads", min=0, help="Threads to solve with; 0 takes all cores.")]
Clusters = Annotated[
    str | None,
    typer.Option(
        "--cluster",
        metavar="WHERE",
        help="Solve on local[:N] processes, a dask scheduler (tcp://host:8786), or the batch system of a cluster file (FILE.toml).",
        show_default=False,
    ),
]
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
    output: Output = None,
    threads: Threads = 0,
    seed: Annotated[
        int | None, typer.Option("--seed", min=0, help="Run with this seed instead of the study's.", show_default=False)
    ] = None,
    again: Annotated[bool, typer.Option("--again", help="Solve it again where its result is there already.")] = False,
    cluster: Clusters = None,
    script: Annotated[bool, typer.Option("--show-script", help="Print what --cluster FILE.toml would submit, and stop.")] = False,
    json: Json = False,
) -> None:
    """Run a study and print what it says; goes on where an earlier run of it was stopped, shows the result where it is done."""
    with telling():
        from uq.cli.running import Asked, run_study, show_script

        if script:
            show_script(cluster)
        else:
            run_study(study, output, Asked(threads, seed, again, json, cluster))


@app.command()
def extend(
    result: ResultPath,
    members: Annotated[
        int | None, typer.Option("--members", min=1, metavar="N", help="Go on until there are N members.", show_default=False)
    ] = None,
    precision: Annotated[
        str,
        typer.Option(
            "--precision", metavar="KIND=WIDTH,...", help="Go on until intervals are so narrow: probabilities=0.001,indices=0.02."
        ),
    ] = "",
    output: Output = None,
    threads: Threads = 0,
    json: Json = False,
) -> None:
    """Go on with a finished run, using every solve again; the result goes to another folder.

    With --members its arrays are those of a fresh run with so many members. With --precision it is at least as precise as asked, and may
    rest on more members than a fresh run would have needed: what is solved already is not taken apart again.
    """
    with telling():
        from uq.cli.going_on import extend_result

        extend_result(result, members, precision, output, threads, json)


@app.command()
def compare(
    results: Annotated[
        list[Path], typer.Argument(metavar="RESULT RESULT...", help="Run folders, their result.nc, or numbers of jobs.", show_default=False)
    ],
    threads: Threads = 0,
    json: Json = False,
) -> None:
    """Show how results differ from the first of them, with intervals."""
    with telling():
        from uq.cli.comparing import compare_results

        compare_results(results, threads, json)


@app.command()
def check(
    study: StudyPath,
    pilot: Annotated[bool, typer.Option("--pilot", help="Solve a few members and say how many the precision will take.")] = False,
    threads: Threads = 0,
    json: Json = False,
) -> None:
    """Check a study; without --pilot nothing is solved."""
    with telling():
        from uq.cli.checking import check_study

        check_study(study, pilot, threads, json)


@app.command()
def show(
    result: ResultPath,
    json: Json = False,
) -> None:
    """Show a result again."""
    with telling():
        from uq.cli.showing import show_result

        show_result(result, json)


for command in COMMANDS:
    app.command()(command)
