"""Documentation is held like code: what README and DEVELOPERS.md say must be so."""

from __future__ import annotations

import ast
import re
import subprocess
import sys
import tomllib
from pathlib import Path

from tests.test_layers import PACKAGE, ROOMS, ROOT

README = (ROOT / "README.md").read_text(encoding="utf-8")
BEGIN, END = "<!-- rooms: begin -->", "<!-- rooms: end -->"


def commands() -> list[str]:
    return [block.strip() for block in re.findall(r"```sh\n(.*?)```", README, flags=re.DOTALL)]


def rooms_table() -> str:
    """The table of rooms, from the docstrings at their doors."""
    lines = ["| room | its law |", "| --- | --- |"]
    for room in ROOMS:
        path = PACKAGE / f"{room}.py"
        door = path if path.exists() else PACKAGE / room / "__init__.py"
        told = " ".join((ast.get_docstring(ast.parse(door.read_text(encoding="utf-8"))) or "").split())
        law = re.search(r"In:.*?Must not know:[^.]*\.", told)
        lines.append(f"| `{room}` | {law.group() if law else ''} |")
    return "\n".join(lines)


def test_ci_calls_readmes_test_command_letter_by_letter() -> None:
    command = next(text for text in commands() if "pytest" in text)
    assert command in (ROOT / ".ci" / "run").read_text(encoding="utf-8").splitlines()


def test_readme_opens_with_the_job_and_two_commands() -> None:
    first, second = commands()[:2]
    assert first.endswith("uq run configs/hold-tank.toml")
    assert "pytest" in second
    assert README.index("```") > README.index("You have a model")


def test_the_map_of_rooms_is_current() -> None:
    text = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
    assert text.partition(BEGIN)[2].partition(END)[0].strip() == rooms_table(), "run `python -m tests.test_docs`"


def test_the_study_of_the_tutorial_runs_as_it_stands(tmp_path: Path) -> None:
    study = next(text for text in re.findall(r"```toml\n(.*?)```", README, flags=re.DOTALL))
    (tmp_path / "fridge.toml").write_text(study, encoding="utf-8")
    done = subprocess.run([sys.executable, "-m", "uq", "run", "fridge.toml"], cwd=tmp_path, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr
    assert "Warmer than 8 degC" in done.stdout
    program = re.findall(r"```python\n(.*?)```", README, flags=re.DOTALL)[0]
    done = subprocess.run([sys.executable, "-c", program], cwd=tmp_path, capture_output=True, text=True, check=False)
    assert done.returncode == 0, done.stderr


def test_every_demo_study_is_named_in_readme() -> None:
    for path in sorted((ROOT / "configs").glob("*.toml")):
        assert f"configs/{path.name}" in README


def test_the_exit_codes_of_readme_are_those_of_the_package() -> None:
    from uq import errors

    codes = {value for name, value in vars(errors).items() if name.startswith("EXIT_")}
    told = README.partition("## Exit codes")[2].partition("##")[0]
    assert {int(code) for code in re.findall(r"(?:^|·)\s*(\d) ", told, flags=re.MULTILINE)} <= codes | {0}


def test_the_version_stands_in_one_place() -> None:
    project = tomllib.loads((ROOT / "pyproject.toml").read_text(encoding="utf-8"))
    assert "version" not in project["project"]
    assert project["tool"]["setuptools"]["dynamic"]["version"] == {"attr": "uq.__version__"}


def write_map() -> None:
    """Writes the map of rooms anew."""
    path = ROOT / "DEVELOPERS.md"
    text = path.read_text(encoding="utf-8")
    head, tail = text.partition(BEGIN)[0], text.partition(END)[2]
    path.write_text(f"{head}{BEGIN}\n{rooms_table()}\n{END}{tail}", encoding="utf-8")


if __name__ == "__main__":
    write_map()


def test_the_tables_of_keys_are_those_of_the_declarations() -> None:
    from uq.study.keys import key_table

    told = README.partition("<!-- keys: begin -->")[2].partition("<!-- keys: end -->")[0]
    assert told.strip() == key_table().strip()
