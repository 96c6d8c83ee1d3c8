"""The loop of rounds: what is there already, another round, whether that is enough."""

from __future__ import annotations

from collections.abc import Callable, Iterable, Iterator, Mapping
from contextlib import contextmanager
from dataclasses import dataclass, field, replace

from uq.analysis.finding import Finding
from uq.analysis.precision import Round, headline
from uq.design.blocks import Block
from uq.design.design import Design
from uq.errors import ClusterError, FatalMemberError, Interrupted
from uq.running.aims import Aims, Ending, Spent, ending, last_ending
from uq.running.branch import STUDY, Branch
from uq.running.keeping import Checkpoints
from uq.running.part import Parts, fitted, together
from uq.running.rounds import Crew, answered, still_open
from uq.running.telling import Telling

Span = tuple[int, int]


@dataclass(frozen=True, eq=False)
class Running:
    """What is run: branches with equal rows and replicates (the study itself first), what is wanted, who works, where progress goes, who is
    told what is settled so far, and whether a run that was stopped shall give the answer of its last completed round."""

    branches: tuple[Branch, ...]
    aims: Aims
    crew: Crew
    checkpoints: Checkpoints
    telling: Telling
    so_far: Callable[[], bool]

    @property
    def design(self) -> Design:
        """The design of the study itself; those of scenarios have the same rounds."""
        return self.branches[0].forecast.design

    def of(self, rows: int) -> Running:
        """The same as it is in a round that ends with so many rows.

        With a precision nobody knows how many members the run will have: then the values are kept as long as those so far can be.
        """
        if self.aims.precision is None:
            return self
        members = 2 * self.design.replicates * rows
        return replace(self, branches=tuple(branch.of(members) for branch in self.branches))

    def solves(self, rows: int) -> int:
        """All solves of so many rows of every replicate, of all branches together."""
        return sum(branch.forecast.design.parts for branch in self.branches) * self.design.replicates * rows


@dataclass(frozen=True, eq=False)
class Standing:
    """Where a run stands: rows of each replicate in completed rounds, their parts by branch; with a precision, what every round had to say
    and the findings of the last one; why it ended."""

    rows: int = 0
    parts: Parts = field(default_factory=dict)
    rounds: tuple[Round, ...] = ()
    findings: tuple[Finding, ...] | None = None
    ended: Ending = ""

    @property
    def early(self) -> bool:
        """Whether the run was stopped before its end, so that another may go on with it."""
        return self.ended == "deadline"


@contextmanager
def stopping_keeps(run: Running) -> Iterator[None]:
    """What is done is kept where the run is stopped meanwhile, or its cluster is lost; raises what says so."""
    try:
        yield
    except (KeyboardInterrupt, Interrupted):
        raise Interrupted(_left(run)) from None
    except ClusterError as lost:
        raise ClusterError(f"{lost}: {_left(run)}") from lost
    except FatalMemberError:
        run.checkpoints.flush()
        raise


def to_the_end(run: Running, standing: Standing, begun: Mapping[int, Parts]) -> Standing:
    """Round after round, from where a run stands; `begun`: by number, the parts of rounds that an earlier attempt has begun.

    Where the run was stopped and the answer so far is wanted, that of the last completed round is given, and what was done of the next one
    is kept. Raises Interrupted where it is not wanted or there is none; what was done is then kept as well.
    """
    with stopping_keeps(run):
        standing = _looked_at(run.of(standing.rows), standing)
        for number, span in enumerate(run.design.rounds()):
            if span[1] <= standing.rows:
                continue
            if standing.rows and number not in begun and (why := _ending(run, standing, span)):
                return replace(standing, ended=why)
            now = run.of(span[1])
            try:
                standing = _looked_at(now, _another(now, _fitted(now, standing), number, begun.get(number, {})))
            except (KeyboardInterrupt, Interrupted):
                if not (standing.rows and run.so_far()):
                    raise
                run.checkpoints.flush()
                return replace(standing, ended="deadline")
            _tell(now, standing)
    return replace(standing, ended=last_ending(standing.rounds, run.aims))


def _left(run: Running) -> str:
    """What is left of a run that was stopped, in words."""
    if not run.checkpoints.flush():
        return "interrupted; no result was written"
    done, total = run.crew.meter.sofar.solves, run.crew.meter.total
    return f"interrupted after {done} of {total} solves; no result was written, but the same command goes on from there"


def _ending(run: Running, standing: Standing, span: Span) -> Ending:
    solves = run.solves(standing.rows)
    return ending(standing.rounds, run.aims, Spent(solves, run.crew.meter.elapsed, run.solves(span[1]) - solves))


def _another(run: Running, standing: Standing, number: int, found: Parts) -> Standing:
    """One more round, of which an earlier attempt has done `found`."""
    span = run.design.rounds()[number]
    if run.aims.precision is not None:
        run.crew.meter.expect(run.solves(span[1]))
        run.crew.observer.stage(f"round {number + 1}: {2 * run.design.replicates * span[1]} members")
    # A run that is extended may have ended within what is the first round of the longer one.
    there = [Block(replicate, 0, standing.rows) for replicate in range(run.design.replicates) if standing.rows > span[0]]
    tasks = [(branch.name, block) for branch in run.branches for block in _open(run, branch, span, [*there, *_blocks(found, branch)])]
    run.checkpoints.begin(number, found)
    run.crew.hands.solve(tasks, {branch.name: branch.forecast for branch in run.branches}, run.checkpoints.brought, run.crew)
    return Standing(span[1], together((standing.parts, run.checkpoints.end())), standing.rounds)


def _fitted(run: Running, standing: Standing) -> Standing:
    """Kept values are counted into histograms from the round on in which they are too many."""
    asks = {branch.name: branch.forecast.ask for branch in run.branches}
    parts = {name: fitted(part, asks[name]) for name, part in standing.parts.items()}
    return replace(standing, parts=parts)


def _blocks(found: Parts, branch: Branch) -> Iterable[Block]:
    return found[branch.name].blocks if branch.name in found else ()


def _open(run: Running, branch: Branch, span: Span, done: Iterable[Block]) -> Iterator[Block]:
    forecast, crew = branch.forecast, run.crew
    size = crew.spread.rows or crew.hands.rows(forecast, span[1] - span[0], crew)
    return still_open(forecast.design, span, size, done)


def _looked_at(run: Running, standing: Standing) -> Standing:
    """With a precision: what the round that has just ended has to say, if that is not known yet."""
    members = 2 * run.design.replicates * standing.rows
    if run.aims.precision is None or not standing.rows or (standing.rounds and standing.rounds[-1].members == members):
        return standing
    base = run.branches[0]
    findings = answered(base, standing.parts[STUDY], run.crew)
    said = Round(members, run.solves(standing.rows), headline(findings, base.forecast.ask, members))
    return replace(standing, rounds=(*standing.rounds, said), findings=findings)


def _tell(run: Running, standing: Standing) -> None:
    """What is settled so far goes to whoever listens; without a precision it has to be worked out, which is done where it costs little."""
    members, base = 2 * run.design.replicates * standing.rows, run.branches[0]
    if standing.rounds:
        run.telling.tell(members, standing.rounds[-1].headlines, base.forecast.ask, run.aims.precision)
    elif standing.rows < run.design.rows and run.telling.worth_it():
        with run.telling.measured():
            said = headline(answered(base, standing.parts[STUDY], run.crew), base.forecast.ask, members)
            run.telling.tell(members, said, base.forecast.ask, None)
