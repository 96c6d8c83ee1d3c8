"""The group /inputs: what is known of every uncertain input, and how they go together."""

from __future__ import annotations

from collections.abc import Iterable, Sequence
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from uq.analysis.finding import Finding, Variable
from uq.inputs.dependence import Dependences, JointSample
from uq.inputs.inputs import Inputs

if TYPE_CHECKING:
    from uq.study.study import Study

EVIDENCE = (
    "a_guess",
    "one_persons_range",
    "handbook_or_a_similar_case",
    "measured_elsewhere_or_once_here",
    "measured_here_repeatedly",
)
NOT_STATED = -1
RANK = "rank correlation (Spearman)"


def texts(dim: str, each: Iterable[str], long_name: str) -> Variable:
    """A variable of texts."""
    return Variable((dim,), np.array(list(each), dtype=np.str_), long_name)


def inputs_group(study: Study) -> tuple[Finding, ...]:
    """One row for every uncertain input; numbers are in the unit of their input."""
    items = study.inputs.items
    if not items:
        return ()
    levels = np.asarray(study.plan.quantiles, dtype=float)
    each = {"comment": "in the unit that `unit` states for this input"}
    evidence = np.array([NOT_STATED if item.evidence is None else item.evidence for item in items], dtype=np.int8)
    flags = {"_FillValue": np.int8(NOT_STATED), "flag_values": np.arange(len(EVIDENCE), dtype=np.int8), "flag_meanings": " ".join(EVIDENCE)}
    at_levels = np.array([item.distribution.quantile(levels) for item in items])
    variables = {
        "label": texts("input", [item.label for item in items], "label"),
        "unit": texts("input", [item.unit for item in items], "unit as written in the study"),
        "distribution": texts("input", [item.distribution.words() for item in items], "distribution in words"),
        "mean": Variable(("input",), np.array([item.mean() for item in items], dtype=float), "mean", "", each),
        "sd": Variable(("input",), np.array([item.sd() for item in items], dtype=float), "standard deviation", "", each),
        "quantiles": Variable(("input", "quantile"), at_levels, "quantiles", "", each),
        "source": texts("input", [item.source for item in items], "source; empty: not stated"),
        "kind": texts("input", [item.kind for item in items], "knowledge (could be reduced) or variability (cannot); empty: not stated"),
        "evidence": Variable(("input",), evidence, "how good the evidence is", attributes=flags),
        "group_of": texts("input", [item.group for item in items], "group; empty: none"),
    }
    return (Finding("inputs", {**variables, **_dependence(study.inputs)}),)


def _dependence(inputs: Inputs) -> dict[str, Variable]:
    """The correlation asked for, and in words what the study says of it."""
    variables = {
        "input_other": texts("input_other", inputs.names, "the other uncertain input"),
        "correlation": Variable(("input", "input_other"), inputs.correlation, f"{RANK} asked for"),
    }
    if inputs.dependence:
        words = [dependence_words(each) for each in inputs.dependence]
        variables["dependence"] = texts("dependence", words, "what the study says of dependence among inputs")
    return variables


def dependence_words(entry: Dependences) -> str:
    """An entry of [[dependence]] in words, by names of inputs."""
    if isinstance(entry, JointSample):
        return f"{', '.join(entry.between)}: drawn together, by rows of {entry.file}"
    kind = "rank correlation" if entry.rank_correlation is not None else "normal correlation"
    given = entry.rank_correlation if entry.rank_correlation is not None else entry.normal_correlation
    numbers = given if isinstance(given, Sequence) else (given,)
    return f"{', '.join(entry.between)}: {kind} {', '.join(f'{number:g}' for number in numbers)}"


def achieved(inputs: Inputs, levels: Sequence[float], x: NDArray[np.float64]) -> Finding:
    """What drawn inputs x [row, input] came to: their rank correlation and their quantiles, beside those asked for in /inputs."""
    if not inputs.items or not len(x):
        return Finding("inputs", {})
    each = {"comment": "in the unit that `unit` states for this input"}
    quantiles = np.quantile(x, np.asarray(levels, dtype=float), axis=0, method="inverted_cdf").T
    many = f"of the {len(x)} draws looked at"
    return Finding(
        "inputs",
        {
            "correlation_achieved": Variable(("input", "input_other"), inputs.correlation_achieved(x), f"{RANK} {many}"),
            "quantiles_achieved": Variable(("input", "quantile"), quantiles, f"quantiles {many}", "", each),
        },
    )
