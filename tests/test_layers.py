"""The laws of the house, held by reading the source: direction of the flow, one door per heavy library, small rooms, laws at the door."""

from __future__ import annotations

import ast
import subprocess
import sys
from collections.abc import Iterator
from pathlib import Path

import pytest

ROOT = Path(__file__).parent.parent
PACKAGE = ROOT / "uq"

# From first to last; a room imports only from rooms before it.
ROOMS = (
    "errors",
    "units",
    "seeds",
    "clock",
    "lang",
    "model",
    "inputs",
    "design",
    "solve",
    "analysis",
    "study",
    "store",
    "running",
    "report",
    "pipeline",
    "queue",
    "cli",
)
# Each heavy library has one door (scipy.stats two: distributions, and the direction numbers of Sobol' sequences; numba two, because its
# cache wants what is compiled together in one file: the stepping kernel, and the inner loops of the statistics, which without them cost as
# much as the solving; so llvmlite two, for one instruction there that numba has no word for).
DOORS = {
    "pint": {"units"},
    "numba": {"solve", "analysis"},
    "llvmlite": {"solve", "analysis"},
    "scipy.stats": {"inputs", "design"},
    "xarray": {"store"},
    "netCDF4": {"store"},
    "dask": {"running"},
    "distributed": {"running"},
    "tomllib": {"study"},
    "sqlite3": {"queue"},
    "typer": {"cli"},
    "rich": {"cli"},
}
# What a light command must not load.
HEAVY = ("numba", "llvmlite", "scipy.stats", "dask", "distributed", "xarray", "netCDF4", "pandas")
# These packages are the whole and its front door, not rooms.
OUTSIDE = {"__init__", "__main__"}

LONG_FILES: dict[str, str] = {
    "uq/solve/kernel.py": "numba's cache does not see edits of other files: the stepping kernel and all it calls stand in one",
    "uq/analysis/selection.py": "numba's cache does not see edits of other files: a kernel and all it calls stand in one",
}
LONG_FUNCTIONS: dict[str, str] = {}


def sources() -> list[Path]:
    return sorted(PACKAGE.rglob("*.py"))


def room_of(path: Path) -> str:
    return path.relative_to(PACKAGE).parts[0].removesuffix(".py")


def imported(path: Path) -> Iterator[str]:
    """Every module that a file imports, at the top or inside a function."""
    for node in ast.walk(ast.parse(path.read_text(encoding="utf-8"))):
        if isinstance(node, ast.Import):
            yield from (alias.name for alias in node.names)
        elif isinstance(node, ast.ImportFrom):
            assert node.level == 0, f"{path}: relative import"
            yield node.module or ""
            yield from (f"{node.module}.{alias.name}" for alias in node.names)


def below(name: str, module: str) -> bool:
    return name == module or name.startswith(module + ".")


def test_every_file_is_in_a_known_room() -> None:
    assert {room_of(path) for path in sources()} - OUTSIDE - set(ROOMS) == set()


def test_a_room_imports_only_from_rooms_before_it() -> None:
    wrong = []
    for path in sources():
        room = room_of(path)
        if room in OUTSIDE:
            continue
        for name in imported(path):
            parts = name.split(".")
            if parts[0] != "uq" or len(parts) == 1 or parts[1] == "__version__":
                continue
            if parts[1] not in ROOMS or ROOMS.index(parts[1]) > ROOMS.index(room):
                wrong.append(f"{path.relative_to(ROOT)} imports {name}")
    assert not wrong


def test_a_heavy_library_has_one_door() -> None:
    wrong = [
        f"{path.relative_to(ROOT)} imports {name}, whose door is {sorted(rooms)}"
        for path in sources()
        for name in imported(path)
        for library, rooms in DOORS.items()
        if below(name, library) and room_of(path) not in rooms
    ]
    assert not wrong


def test_no_import_cycle_between_files() -> None:
    files = {str(path.relative_to(ROOT).with_suffix("")).replace("/", ".").removesuffix(".__init__"): path for path in sources()}
    edges = {module: {name for name in imported(path) if name in files and name != module} for module, path in files.items()}
    edges.pop("uq")  # its doors are opened when they are used
    settled: set[str] = {"uq"}
    while ready := {module for module, wanted in edges.items() if module not in settled and wanted <= settled}:
        settled |= ready
    assert set(files) - settled == set()


@pytest.mark.parametrize(
    "program",
    [
        "import uq; uq.__version__",
        "from uq.cli.main import app; app(['--help'], standalone_mode=False)",
        "from uq.cli.main import app; app(['check', 'configs/hold-tank.toml'], standalone_mode=False)",
        "import uq; uq.read_study('configs/hold-tank.toml')",
    ],
)
def test_light_commands_load_nothing_heavy(program: str) -> None:
    told = f"{program}\nimport sys\nloaded = [name for name in {HEAVY!r} if name in sys.modules]\nassert not loaded, loaded"
    done = subprocess.run([sys.executable, "-c", told], cwd=ROOT, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr


def functions(path: Path) -> Iterator[tuple[str, int]]:
    """Every function of a file with its length in lines, docstring and blank lines left out."""
    text = path.read_text(encoding="utf-8")
    lines = text.splitlines()
    for node in ast.walk(ast.parse(text)):
        if isinstance(node, (ast.FunctionDef, ast.AsyncFunctionDef)):
            first = node.body[0]
            docstring = isinstance(first, ast.Expr) and isinstance(first.value, ast.Constant) and isinstance(first.value.value, str)
            told = set(range(first.lineno, (first.end_lineno or 0) + 1)) if docstring else set()
            span = [n for n in range(node.lineno, (node.end_lineno or 0) + 1) if n not in told and lines[n - 1].strip()]
            yield f"{path.relative_to(ROOT)}:{node.name}", len(span)


def test_long_files_and_functions_have_a_written_reason() -> None:
    files = {str(path.relative_to(ROOT)) for path in sources() if len(path.read_text(encoding="utf-8").splitlines()) > 300}
    assert files == set(LONG_FILES), "files over 300 lines and their list of reasons"
    long = {name for path in sources() for name, length in functions(path) if length > 40}
    assert long == set(LONG_FUNCTIONS), "functions over 40 lines and their list of reasons"


def test_every_room_states_its_law_at_the_door() -> None:
    for path in sources():
        if path.name == "__init__.py" or (path.parent == PACKAGE and path.stem in ROOMS):
            docstring = ast.get_docstring(ast.parse(path.read_text(encoding="utf-8"))) or ""
            for word in ("In:", "Out:", "Must not know:"):
                assert word in docstring, f"{path.relative_to(ROOT)}: no `{word}` at the door"


def test_nothing_is_printed_below_the_command() -> None:
    for path in sources():
        if room_of(path) != "cli":
            names = {
                node.func.id
                for node in ast.walk(ast.parse(path.read_text()))
                if isinstance(node, ast.Call) and isinstance(node.func, ast.Name)
            }
            assert not names & {"print", "input"}, path
