"""The keys of a study as Markdown tables, made from the declarations themselves."""

from __future__ import annotations

from dataclasses import MISSING, fields
from typing import Any

from uq.inputs.distributions import DISTRIBUTIONS
from uq.study.declarations import ForcingCourse, Limit, Outcome, Parameter, State, Term
from uq.study.plan import Plan, Time
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
    ("`[outcomes.NAME]`", Outcome),
    ("`[limits.NAME]`", Limit),
    ("`[plan]`", Plan),
)


def key_table() -> str:
    """All keys that this version reads: a Markdown table for every table of a study, and one of the distributions."""
    parts = [f"{heading}\n\n{_table(declaration)}" for heading, declaration in DECLARATIONS]
    return "\n\n".join([*parts, f"Distributions\n\n{_distributions()}"]) + "\n"


def _table(declaration: type[Any]) -> str:
    lines = ["| key | meaning | default |", "| --- | --- | --- |"]
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
        forms = "; or ".join(", ".join(f"`{name}`" for name in form) for form in kind.forms)
        extra = f"; optionally {', '.join(f'`{name}`' for name in kind.optional)}" if kind.optional else ""
        lines.append(f"| `{kind.key}` | {forms}{extra} |")
    return "\n".join(lines)
