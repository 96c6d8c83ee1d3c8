"""A mutated study is a `Study` or a `StudyError` with places, and never anything else."""

from __future__ import annotations

import random
import re
from pathlib import Path

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from uq.errors import StudyError
from uq.study.read import parse_study
from uq.study.study import Study

ROOT = Path(__file__).parent.parent
SEEDS = [path.read_text(encoding="utf-8") for path in sorted((ROOT / "configs").glob("*.toml"))]
BROKEN = [path.read_text(encoding="utf-8") for path in sorted((ROOT / "tests" / "broken").glob("*.toml"))]
PIECES = (
    *('"', "'", "[", "]", "{", "}", "=", ",", ".", "\n", "#", "(", ")", "-", "**", "^", "\\", "\\u0041", "\0", "\ufeff", "é", "λ", "\r\n"),
    *("1e999", "-0.0", "nan", "inf", "true", "1979-05-27", "0x1F", "9" * 400, "1_000", "''", '"""', "[[events]]\n", "[states.T]\n"),
    *("unit", "T", "x", "start", "rate", "value", "normal", "{ normal = { mean = 1, sd = 1 } }", "[]", "{}", "[[]]", '"1 K"', '"1e308 km"'),
    *("max(", "where(T > 0, 1, 2)", "highest(T)", "time", "pi", "log", "'3 K'", "and", "not ", "<", "==", "C", "degC", "bar(g)", "1/min"),
)
# What a whole value may be exchanged for.
VALUES = (
    *(
        "0",
        "-1",
        "1e308",
        "1e-320",
        "nan",
        "true",
        "[]",
        "{}",
        "[1, 2]",
        "[[0, 1], [1e9, 2]]",
        '""',
        '"1"',
        '"0"',
        '"T"',
        '"linear"',
        '"step"',
    ),
    *(
        '"degC"',
        '"degF"',
        '"K"',
        '"kJ/kg/K"',
        '"m**99"',
        '"1/m**99"',
        '"km33"',
        '"%"',
        '"rad"',
        '"1 degC"',
        '"1e308 yr"',
        '"-3 s"',
        '"5 min"',
    ),
    *(
        '"T > 300"',
        '"T ** 99 / x"',
        '"1 / 0"',
        '"time"',
        '"final(x) + highest(T, 0, 1)"',
        "\"value_at(T, '1e308 yr')\"",
        '"k0 ** x"',
        '"pi"',
    ),
)


def mutate(text: str, random: random.Random) -> str:
    """A text with a few lines moved, doubled or dropped, and a few pieces put in, cut out or exchanged."""
    for _ in range(random.randint(1, 4)):
        lines = text.split("\n")
        place, other = random.randrange(len(lines)), random.randrange(len(lines))
        kind = random.randrange(7)
        if kind == 0:
            del lines[place]
        elif kind == 1:
            lines.insert(other, lines[place])
        elif kind == 2:
            lines[place], lines[other] = lines[other], lines[place]
        elif kind == 3:
            lines[place] = re.sub(
                r'"[^"]*"|-?[0-9][0-9.e]*', lambda m: random.choice(VALUES) if random.random() < 0.5 else m.group(), lines[place]
            )
        else:
            line = lines[place]
            start = random.randint(0, len(line))
            stop = min(len(line), start + random.choice((0, 0, 1, 3, 10)))
            lines[place] = line[:start] + (random.choice(PIECES) if kind < 6 else "") + line[stop:]
        text = "\n".join(lines)
    return text


def attempt(text: str) -> Study | StudyError:
    """What comes of a text."""
    try:
        return parse_study(text)
    except StudyError as error:
        return error


def read(text: str) -> None:
    """Read a text that may be anything; what is said of it must hold together."""
    found = attempt(text)
    if isinstance(found, StudyError):
        assert found.mistakes
        lines = text.removeprefix("\ufeff").replace("\r\n", "\n").split("\n")
        for mistake in found.mistakes:
            assert mistake.found
            assert mistake.expected
            assert 0 <= mistake.line <= len(lines)
            assert mistake.line == 0 or 1 <= mistake.column <= len(lines[mistake.line - 1]) + 1
    else:
        assert found.inputs.items
        assert len(found.equations.rates) == len(found.states) == len(found.equations.starts) > 0
        assert len(found.equations.observed) >= len(found.watched) == len(found.plan.watch)


@given(st.sampled_from(SEEDS + BROKEN), st.randoms(use_true_random=False))
@settings(max_examples=100)
def test_a_mutated_study_is_a_study_or_mistakes_with_places(text: str, random: random.Random) -> None:
    read(mutate(text, random))


@given(st.text(max_size=200))
@settings(max_examples=50)
def test_any_text_is_a_study_or_mistakes_with_places(text: str) -> None:
    read(text)


@pytest.mark.parametrize(
    "text",
    [
        "",
        "\n",
        "a = " + "[" * 20000,
        "a = " + "{ a = " * 5000,
        "schema = 1\n[terms]\nx = '" + "(" * 5000 + "'",
        "schema = 1\n[terms]\n" + "".join(f"a{i} = 'a{i + 1}'\n" for i in range(3000)),
        "schema = " + "9" * 10000,
        "schema = 1\n[time]\nstop = " + "9" * 400,
        "schema = 1\n[time]\nunit = 's'\nstop = '1e300 yr'\npoints = 3",
        "schema = 1\n[time]\nunit = 'yr'\nstart = -1e308\nstop = 1e308\npoints = 3",
        "[a.b]\nx = 1\n[a]\nb = 2\n",
        "states = 3\nparameters = []\nplan = 'no'\ntime = 1\nlimits = true",
        "[states]\nT = 3\n[parameters]\na = { normal = 3 }\n[limits]\nx = []\n[outcomes]\ny = 'highest(T)'",
    ],
)
def test_hostile_texts(text: str) -> None:
    read(text)
