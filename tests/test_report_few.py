"""What the summary says of means and deviations that rest on few members."""

from __future__ import annotations

from dataclasses import replace
from pathlib import Path

import pytest

from tests.made_results import made_findings, made_result
from uq.analysis.finding import Finding
from uq.report.headline import headline
from uq.report.machine import result_json
from uq.report.trust import trust_section

TEXT = "rests on few members: one member alone makes up to 34 % of the variance"


def cautioned(finding: Finding, *names: str) -> Finding:
    """The finding with the caution at some of its variables."""
    said = {name: replace(finding.variables[name], attributes={**finding.variables[name].attributes, "caution": TEXT}) for name in names}
    return replace(finding, variables={**finding.variables, **said})


@pytest.mark.parametrize(
    ("names", "others"), [(("sd",), "all shares of its variance"), (("mean", "sd"), "its mean and all shares of its variance")]
)
def test_it_is_said_once_for_each_quantity(tmp_path: Path, names: tuple[str, ...], others: str) -> None:
    findings = made_findings()
    at = next(at for at, each in enumerate(findings) if each.group.startswith("bands/") and {"mean", "sd"} <= each.variables.keys())
    changed = cautioned(findings[at], *names)
    result = made_result(tmp_path, findings=(*findings[:at], changed, *findings[at + 1 :]))
    head = headline(result)
    said = [str(getattr(part, "text", part)) for part in trust_section(head)]
    told = [text for text in said if text.startswith("Few members")]
    assert len(told) == 1
    assert told[0].endswith(f", its standard deviation, like {others}, {TEXT}.")
    name = changed.group.removeprefix("bands/")
    assert result_json(result)["bands"][name]["cautions"] == [f"its standard deviation, like {others}, {TEXT}"]


def test_nothing_is_said_where_there_is_no_caution(tmp_path: Path) -> None:
    result = made_result(tmp_path)
    assert not any("Few members" in str(part) for part in trust_section(headline(result)))
    assert all("cautions" not in each for each in result_json(result)["bands"].values())
