"""The keys of a study as Markdown tables, made from the declarations themselves."""

from __future__ import annotations

from dataclasses import MISSING, fields
from typing import Any

from uq.inputs.distributions import DISTRIBUTIONS
from uq.study.declarations import Limit, Outcome, Parameter, State, Term
from uq.study.given import ForcingCourse, GivenTable, Measured
from uq.study.plan import AtMost, Plan, Precision, Time
from uq.study.scenarios import ScenarioTable
from uq.study.sheets import Head
from uq.study.uncertain import Uncertain

# In the order of a study; each with the heading of its table.
DECLARATIONS: tuple[tuple[str, type[Any]], ...] = (
    ("At the top", Head),
    ("`[time]`", Time),
    ("`[states.NAME]`", State),
    ("`start = { ... }` of a state", Uncertain),
    ("`[parameters]`", Parameter),
    ("`[terms]`", Term),
    ("`[forcings.NAME]`", ForcingCourse),
    ("`[tables.NAME]`", GivenTable),
    ("`[outcomes.NAME]`", Outcome),
    ("`[limits.NAME]`", Limit),
    ("`[plan]`", Plan),
    ("`[plan.precision]`", Precision),
    ("`[plan.at_most]`", AtMost),
    ("`[scenarios.NAME]`", ScenarioTable),
    ("`[measured.NAME]`", Measured),
)

# Tables that other rooms read, or whose keys are names.
WITHOUT_DECLARATION: tuple[tuple[str, tuple[tuple[str, str, str], ...]], ...] = (
    (
        "`[index]`",
        (("NAME", "number of entries, counted from 0, or a list of their labels; or another index, of which it is a second name", ""),),
    ),
    ("`[units]`", (("NAME", '"new": a counting unit of one\'s own, as in person = "new"', ""),)),
    (
        "`[[dependence]]`",
        (
            ("between", "two or more inputs; the uncertain start of the state x is the input x_start", "or `file`"),
            ("rank_correlation", "rank correlation (Spearman) of the two; of more inputs one for every pair: ab, ac, bc", "one of the two"),
            (
                "normal_correlation",
                "correlation of the normal scores (lognormal: of the logarithms); as above",
                "one of the two",
            ),
            ("file", "a joint sample, whose rows are drawn whole; its inputs state no distribution", "or `between`"),
            ("columns", "{ input = column, ... } of the file, in the units of the inputs", ""),
        ),
    ),
)
_TOP = ("| key | meaning | default |", "| --- | --- | --- |")


def key_table() -> str:
    """All keys that this version reads: a Markdown table for every table of a study, and one of the distributions."""
    parts = [f"{heading}\n\n{_table(declaration)}" for heading, declaration in DECLARATIONS]
    parts += [f"{heading}\n\n{_lines(rows)}" for heading, rows in WITHOUT_DECLARATION]
    return "\n\n".join([*parts, f"Distributions\n\n{_distributions()}"]) + "\n"


def _lines(rows: tuple[tuple[str, str, str], ...]) -> str:
    return "\n".join([*_TOP, *(f"| `{key}` | {meaning} | {default} |" for key, meaning, default in rows)])


def _table(declaration: type[Any]) -> str:
    lines = list(_TOP)
    for item in fields(declaration):
        if "meaning" in item.metadata:
            names = "one distribution" if "keys" in item.metadata else f"`{item.name}`"
            lines.append(f"| {names} | {item.metadata['meaning']} | {_default(item)} |")
    return "\n".join(lines)


def _default(item: Any) -> str:
    if item.metadata["shown"]:
        return str(item.metadata["shown"])
    if item.default is MISSING:
        return "needed"
    return f"{item.default}" if item.default not in ("", None) else ""


def _distributions() -> str:
    lines = ["| key | arguments |", "| --- | --- |"]
    for kind in DISTRIBUTIONS:
        lines.append(f"| `{kind.key}` | {kind.usage()} |")
    return "\n".join([*lines, "", "Each may be cut with `truncate = [lowest, highest]` beside its key."])
