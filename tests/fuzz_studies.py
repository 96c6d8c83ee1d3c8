"""Studies that are nearly right: texts of real ones with a few pieces moved, cut or exchanged, and random expressions in their places."""

from __future__ import annotations

import random as randoms
import re
from pathlib import Path

from uq.errors import StudyError
from uq.study.read import parse_study
from uq.study.study import Study

ROOT = Path(__file__).parent.parent
FILES = {
    "air.csv": b"# invented\nhour,air\n0,10\n0.5,12\n1,11\n",
    "joint.csv": b"k;start\n0.01;330\n0.02;331\n0.03;328\n0.015;329\n",
    "log.csv": b"minute,kelvin\n0,330\n10,326\n30,318\n",
    "odd.csv": b"k;start\n0,01;\n\xff",
    **{path.name: path.read_bytes() for path in (ROOT / "configs").glob("*.csv")},
}
# Everything at once that the format has, on a model that is solved in no time.
RICH = """
schema = 1
title = "A tank that cools"
[units]
batch = "new"
[time]
unit = "min"
stop = "1 h"
points = 13
[states.T]
unit = "K"
start = { source = "Ten readings" }
rate = "-fan(T) * cooling * (T - outside) - soak"
valid = [200, 500]
negligible = "1 mK"
[states.made]
unit = "batch"
start = 0
rate = "pace * where(T > '50 degC', 1, load / '2 kg')"
[parameters]
cooling = { unit = "1/min", group = "losses" }
pace = { unit = "batch/h", percentiles = { p05 = 1, p50 = "0.04 batch/min", p95 = 5, shape = "lognormal" }, group = "losses" }
load = { unit = "kg", normal = { mean = 2, sd = "300 g" }, truncate = [0.5, 4] }
limit = "320 K"
[terms]
soak = { value = "max(T - limit, 0) / '3 h'", unit = "K/h" }
[forcings.outside]
unit = "degC"
file = "air.csv"
time = { column = "hour", unit = "h" }
value = { column = "air", unit = "degC" }
interpolation = "smooth"
outside = "hold"
[tables.fan]
of = { unit = "degC" }
unit = "1"
rows = [[0, 0.5], ["300 K", 1], [90, 1.2]]
interpolation = "linear"
outside = "hold"
[outcomes.warm]
unit = "delta_degF"
take = "highest(T, 5, '40 min') - lowest(soak) * '1 min'"
[outcomes.batches]
take = "final(made)"
[limits.hot]
when = "T > '325 K' and not made > '0.5 batch'"
by = [30, 60]
accept = 0.2
[[dependence]]
between = ["pace", "load"]
rank_correlation = 0.4
[[dependence]]
file = "joint.csv"
columns = { cooling = "k", T_start = "start" }
[scenarios.windy]
label = "Window open"
change = { "parameters.limit" = "310 K", "terms.soak.value" = "max(T - limit, 0) / '2 h'" }
[scenarios.alone]
change = { "dependence" = [], "parameters.cooling.value" = 0.02, "states.T.start" = 330 }
[measured.T]
file = "log.csv"
time = { column = "minute", unit = "min" }
value = { column = "kelvin", unit = "K" }
sd = "0.5 K"
[plan]
members = 512
watch = ["T", "made", "soak"]
[plan.precision]
quantiles = 0.02
probabilities = 0.01
indices = 0.1
[plan.at_most]
solves = 100_000
minutes = 1
"""
SEEDS = [RICH, *(path.read_text(encoding="utf-8") for path in sorted((ROOT / "configs").glob("*.toml")))]
BROKEN = [path.read_text(encoding="utf-8") for path in sorted((ROOT / "tests" / "broken").glob("*.toml"))]
PIECES = (
    *('"', "'", "[", "]", "{", "}", "=", ",", ".", "\n", "#", "(", ")", "-", "**", "^", "\\", "\\u0041", "\0", "\ufeff", "é", "λ", "\r\n"),
    *("1e999", "-0.0", "nan", "inf", "true", "1979-05-27", "0x1F", "9" * 400, "1_000", "''", '"""', "[[events]]\n", "[states.T]\n"),
    *("unit", "T", "x", "start", "rate", "value", "normal", "{ normal = { mean = 1, sd = 1 } }", "[]", "{}", "[[]]", '"1 K"', '"1e308 km"'),
    *("max(", "where(T > 0, 1, 2)", "highest(T)", "time", "pi", "log", "'3 K'", "and", "not ", "<", "==", "C", "degC", "bar(g)", "1/min"),
    *("fan(", "[units]\n", "[[dependence]]\n", "[scenarios.a]\n", "[plan.precision]\n", 'change = { "plan.seed" = 1 }\n', "x_start"),
    *("file", "columns", "between", "rank_correlation", "outside", "percentiles", "truncate", "discrete", "negligible", "batch", "person"),
)
# What a whole value may be exchanged for.
VALUES = (
    *("0", "-1", "1e308", "1e-320", "nan", "inf", "true", "[]", "{}", "[1, 2]", "[[0, 1], [1e9, 2]]", "0.5", "1", "[0.1, 0.9, -0.9]"),
    *('""', '"1"', '"0"', '"T"', '"linear"', '"step"', '"smooth"', '"hold"', '"repeat"', '"refuse"', '"new"', '"lognormal"', '"T_start"'),
    *('"air.csv"', '"joint.csv"', '"log.csv"', '"odd.csv"', '"../air.csv"', '"none.csv"', '"hour"', '"air"', '"k"', '"start"', '"kelvin"'),
    *('"degC"', '"degF"', '"K"', '"kJ/kg/K"', '"m**99"', '"1/m**99"', '"km33"', '"%"', '"rad"', '"batch"', '"batch/h"', '"delta_degC"'),
    *('"1 degC"', '"1e308 yr"', '"-3 s"', '"5 min"', '"2 batch"', '"0.1 degF"', '"1e-300 1/min"'),
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
    *('"fan(T)"', '"fan(fan(T))"', '"fan"', '"{ \\"parameters.limit\\" = 3 }"', '{ "parameters.limit" = 3 }', '{ "dependence" = 1 }'),
)
_VALUE = re.compile(r'"[^"]*"|-?[0-9][0-9.e]*')
_TEXT = re.compile(r'(?m)^((?:rate|take|when|value|start|[a-z]+) *= *(?:\{ value = )?)"[^"\n]*"')
_LEAVES = (
    "0",
    "1",
    "2.5",
    "1e308",
    "1e-300",
    "pi",
    "time",
    "T",
    "x",
    "x_start",
    "k0",
    "limit",
    "'3 K'",
    "'2 degC'",
    "'1 1/min'",
    "'5 kJ'",
    "'2 batch'",
)
_CALLS = (
    "exp",
    "ln",
    "sqrt",
    "sin",
    "abs",
    "tanh",
    "erf",
    "fan",
    "min",
    "max",
    "mod",
    "where",
    "atan2",
    "highest",
    "final",
    "integral",
    "value_at",
)
_OPERATORS = ("+", "-", "*", "/", "**", "<", ">=", "and", "or")


def mutate(text: str, random: randoms.Random) -> str:
    """A text with a few lines moved, doubled or dropped, and a few pieces put in, cut out or exchanged."""
    for _ in range(random.randint(1, 4)):
        lines = text.split("\n")
        place, other = random.randrange(len(lines)), random.randrange(len(lines))
        kind = random.randrange(8)
        if kind == 0:
            del lines[place]
        elif kind == 1:
            lines.insert(other, lines[place])
        elif kind == 2:
            lines[place], lines[other] = lines[other], lines[place]
        elif kind <= 4:
            lines[place] = _VALUE.sub(lambda m: random.choice(VALUES) if random.random() < 0.5 else m.group(), lines[place])
        else:
            line = lines[place]
            start = random.randint(0, len(line))
            stop = min(len(line), start + random.choice((0, 0, 1, 3, 10)))
            lines[place] = line[:start] + (random.choice(PIECES) if kind < 7 else "") + line[stop:]
        text = "\n".join(lines)
    return text


def expression(random: randoms.Random, depth: int = 0) -> str:
    """A random expression, more often than not without sense."""
    if depth > 5 or random.random() < 0.3:
        return random.choice(_LEAVES)
    kind = random.randrange(5)
    if kind == 0:
        count = random.choice((1, 1, 2, 3))
        return f"{random.choice(_CALLS)}({', '.join(expression(random, depth + 1) for _ in range(count))})"
    if kind == 1:
        return random.choice(("-", "not ", "(", "((")) + expression(random, depth + 1) + random.choice(("", "", ")", "))"))
    return f"({expression(random, depth + 1)} {random.choice(_OPERATORS)} {expression(random, depth + 1)})"


def with_expressions(text: str, random: randoms.Random) -> str:
    """A study in which one or two expressions are exchanged for others: their own, changed a little, or random ones."""
    places = list(_TEXT.finditer(text))
    for match in sorted(random.sample(places, min(len(places), random.randint(1, 2))), key=lambda found: -found.start()):
        own = match.group()[len(match.group(1)) + 1 : -1]
        new = random.choice(
            (expression(random), f"({own}) * {random.choice(('2', '0', '1e300', '(1 / 3)'))}", f"{own} + ({expression(random)}) * 0")
        )
        text = text[: match.start()] + f'{match.group(1)}"{new}"' + text[match.end() :]
    return text


def study_text(seed: int) -> str:
    """The text of one case; the same for the same seed."""
    random = randoms.Random(seed)
    text = random.choice(SEEDS) if random.random() < 0.8 else random.choice(BROKEN)
    return with_expressions(text, random) if random.random() < 0.4 else mutate(text, random)


def attempt(text: str) -> Study | StudyError:
    """What comes of a text."""
    try:
        return parse_study(text, files=FILES)
    except StudyError as error:
        return error


def judge(text: str) -> Study | None:
    """Read a text that may be anything; what is said of it must hold together. Gives the study where it is one."""
    found = attempt(text)
    if isinstance(found, StudyError):
        assert found.mistakes
        lines = text.removeprefix("\ufeff").replace("\r\n", "\n").split("\n")
        for mistake in found.mistakes:
            assert mistake.found
            assert mistake.expected
            assert 0 <= mistake.line <= len(lines)
            assert mistake.line == 0 or 1 <= mistake.column <= len(lines[mistake.line - 1]) + 1
        return None
    assert found.inputs.items
    equations = found.equations
    assert len(equations.rates) == len(equations.states) == len(equations.starts) == len(found.lowest) >= len(found.states) > 0
    assert len(equations.observed) >= len(found.watched)
    assert list(dict.fromkeys(each.name.partition("[")[0] for each in found.watched)) == list(found.plan.watch)
    assert all(len(scenario.study.watched) == len(found.watched) for scenario in found.scenarios)
    return found
