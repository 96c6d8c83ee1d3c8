"""A member that ends every process which solves it: told, and kept as a small study that does the same."""

from __future__ import annotations

from functools import partial
from pathlib import Path

from uq.design.blocks import Block
from uq.errors import FatalMemberError
from uq.running.block import Forecast
from uq.running.branch import STUDY
from uq.running.tasks import Culprit
from uq.store.whole import put
from uq.study.fixed import fixed_study
from uq.study.study import Study

FOLDER = "fatal-member"
FILE = "study.toml"


def blamed(study: Study, folder: Path, culprit: Culprit, forecast: Forecast) -> FatalMemberError:
    """Keeps the member in the run folder and tells where; raises OSError where it cannot be written."""
    block, which = f"{culprit.replicate}/{culprit.row}", "" if culprit.solve is None else f"{culprit.solve}"
    if culprit.row is None:
        words = "The pilot, none of whose members does so alone, ended every process that solved it, so the run cannot come to its end"
        return FatalMemberError(f"{words}. Please report it with the study.", "pilot")
    own = study if culprit.name == STUDY else next(each.study for each in study.scenarios if each.name == culprit.name)
    member, words = Member(culprit, forecast), described(culprit, forecast)
    text = fixed_study(own, member.values, member.tolerances, f"{words}\nended every process that solved it; this study solves it alone.")
    place = folder / FOLDER
    for name, content in {**own.files, FILE: text.encode()}.items():
        put(place / name, partial(_written, content))
    return FatalMemberError(
        f"{words} ended every process that solved it, so the run cannot come to its end. Please report it with {place / FILE}, which "
        "solves this member alone; everything else that was done is kept.",
        block,
        which,
    )


class Member:
    """One member: its inputs by name, and its absolute tolerances by state."""

    def __init__(self, culprit: Culprit, forecast: Forecast) -> None:
        rows = forecast.design.draw(Block(culprit.replicate, culprit.row or 0, 1), forecast.inputs)
        x, names = forecast.taken(rows)[culprit.solve or 0], forecast.compiled.code.inputs
        self.values = dict(zip(names, map(float, x), strict=True))
        states, absolute = forecast.compiled.code.states, forecast.settings.absolute
        self.tolerances = dict(zip(states, map(float, absolute), strict=True))


def described(culprit: Culprit, forecast: Forecast) -> str:
    """Where the member stands in the design."""
    design = forecast.design
    sides = ("A", "B", *(f"A with {name} from B" for name in design.mixed_names))
    solve = "" if culprit.solve is None else f", {sides[culprit.solve]}"
    scenario = f" of the scenario {culprit.name}" if culprit.name != STUDY else ""
    return f"The member in row {culprit.row} of replicate {culprit.replicate}{solve}{scenario}"


def _written(content: bytes, draft: Path) -> None:
    draft.write_bytes(content)
