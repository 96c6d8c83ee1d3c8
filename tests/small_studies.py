"""Two small studies that tests of the study room add to, and the two ways they are read."""

from __future__ import annotations

from collections.abc import Mapping

import pytest

from uq.errors import StudyError
from uq.study.read import parse_study
from uq.study.study import Study

HEAD = """
schema = 1
[time]
unit = "min"
stop = "1 h"
points = 61
[states.T]
unit = "K"
start = { normal = { mean = "60 degC", sd = "2 degC" } }
rate = "-cooling * (T - room)"
[parameters]
cooling = { unit = "1/min", uniform = { low = 0.01, high = "3 1/h" } }
room = "293.15 K"
"""
PLAIN = """
schema = 1
[time]
stop = 20
every = 6
[states.x]
start = 1
rate = "-a * x"
[parameters]
a = { uniform = { low = 1, high = 2 } }
b = 3
[terms]
twice = "b * x"
"""


def read(more: str = "", text: str = HEAD, files: Mapping[str, bytes] | None = None) -> Study:
    """The study with more behind it."""
    return parse_study(text + more, files=files)


def mistakes(more: str = "", text: str = HEAD, files: Mapping[str, bytes] | None = None) -> list[str]:
    """What is wrong with it, in words."""
    with pytest.raises(StudyError) as caught:
        parse_study(text + more, files=files)
    return [str(mistake) for mistake in caught.value.mistakes]
