"""The uncertain inputs of a study: each with its distribution, together a map from the unit cube to numbers for the model."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import cached_property
from typing import NamedTuple

import numpy as np
from numpy.typing import NDArray

from uq.errors import ValueMistake
from uq.inputs.arguments import Mistakes
from uq.inputs.consistency import check_dependence, components, matrix_of, stated_pairs
from uq.inputs.copula import Copula
from uq.inputs.dependence import Dependences, JointSample, rank_of_normal
from uq.inputs.distribution import Distribution
from uq.inputs.joint import JointRows, columns_of
from uq.inputs.ranks import rank_correlation

Floats = NDArray[np.float64]


@dataclass(frozen=True)
class Input:
    """One uncertain input: name, label, unit text of its values and of their differences, distribution, and where it comes from.

    kind: "knowledge" (could be reduced), "variability" (cannot) or "" (not stated). evidence: 0 a guess to 4 measured here repeatedly, None
    where not stated. group: label for a common ranking, or "".
    """

    name: str
    label: str
    unit: str
    distribution: Distribution
    source: str = ""
    kind: str = ""
    evidence: int | None = None
    group: str = ""
    difference_unit: str = ""

    def mean(self) -> float:
        """The expectation, in the input's unit."""
        return self.distribution.moments().mean

    def sd(self) -> float:
        """The standard deviation, in the unit of a difference."""
        return self.distribution.moments().sd


class Unit(NamedTuple):
    """What is kept or redrawn as a whole: one input, or all those of a joint sample; its name and the places of its inputs."""

    name: str
    places: tuple[int, ...]


@dataclass(frozen=True)
class Inputs:
    """All uncertain inputs in their order (parameters as in the file, then uncertain starts in the order of the states), and how they
    depend on each other: independent but for the entries of `dependence`.

    All correlations together make one Gaussian copula (pairs without one have 0). Inputs of a joint sample are drawn by rows: their own
    distributions are replaced by the sample's columns. Raises `Mistakes` where the entries cannot hold together; `check` tells where.
    """

    items: tuple[Input, ...]
    dependence: tuple[Dependences, ...] = ()

    def __post_init__(self) -> None:
        if mistakes := self.check(self.names, self.dependence):
            raise Mistakes(tuple(mistake for _, mistake in mistakes))
        own = {name: data for sample in self._samples for name, data in columns_of(sample).items()}
        items = tuple(replace(item, distribution=own[item.name]) if item.name in own else item for item in self.items)
        object.__setattr__(self, "items", items)

    @staticmethod
    def check(names: tuple[str, ...], dependence: tuple[Dependences, ...]) -> tuple[tuple[int, ValueMistake], ...]:
        """Every mistake among the entries of `[[dependence]]`: the number of the entry (from 0), and the mistake with its key."""
        return check_dependence(names, dependence)

    @property
    def names(self) -> tuple[str, ...]:
        """The names, in order."""
        return tuple(item.name for item in self.items)

    @property
    def dependent(self) -> bool:
        """Whether any inputs go together."""
        return bool(self.dependence)

    @cached_property
    def units(self) -> tuple[Unit, ...]:
        """What is kept or redrawn as a whole, in the order of the first input of each: the players of Shapley effects."""
        joint = {rows.places[0]: rows.places for rows in self._joint}
        inside = {place for places in joint.values() for place in places}
        names = self.names
        alone = {place: (place,) for place in range(len(names)) if place not in inside}
        return tuple(Unit("+".join(names[each] for each in places), places) for _, places in sorted((joint | alone).items()))

    @property
    def linked(self) -> int:
        """How many inputs hang together by correlations, directly or through others, at most."""
        return max((len(copula.places) for copula in self._copulas), default=0)

    @cached_property
    def groups(self) -> Mapping[str, tuple[int, ...]]:
        """The labels of groups, in the order of their first inputs, each with the places of its inputs."""
        labels = dict.fromkeys(item.group for item in self.items if item.group)
        return {label: tuple(place for place, item in enumerate(self.items) if item.group == label) for label in labels}

    def values(self, u: Floats) -> Floats:
        """The inputs at points u in the open unit cube: u [row, input] to x [row, input], each column in its input's unit.

        Every independent column is x = quantile(u) of its own: an entry of x depends on its u and on nothing else. A column of the copula
        depends on its own u and on those of the copula's inputs before it; a row of a joint sample on the u of its first input.
        """
        x = np.empty(u.shape)
        for place in self._alone:
            x[:, place] = self.items[place].distribution.quantile(np.ascontiguousarray(u[:, place]))
        for block in self._bound:
            block.fill(x, u)
        return x

    def mixed(self, u: Floats, x: Floats, sets: tuple[tuple[int, ...], ...]) -> Floats:
        """The A rows with some inputs redrawn from the B rows: for every set of places the rows [set, row, input].

        u, x = values(u): A rows, then B rows [2 row, input]. Inputs not in the set are as in A. Independent ones in the set are as in B, as
        are joint samples, which are kept or redrawn as a whole: ValueError where a set parts one. Inputs of the copula in the set are drawn
        from their conditional distribution given those of the copula that are kept.
        """
        count = len(u) // 2
        mixed = np.empty((len(sets), count, u.shape[1]))
        mixed[:] = x[:count]
        for taken, rows in zip(sets, mixed, strict=True):
            rows[:, taken] = x[count:, taken]
        for block in self._bound:
            block.fill_mixed(mixed, u, x, sets)
        return mixed

    def conditional(self, u_a: Floats, u_b: Floats, kept: tuple[int, ...]) -> Floats:
        """The inputs `kept` (places) as at the points u_a, all others redrawn from u_b given those: x [row, input]; see `mixed`.

        values(u_a) where all are kept, values(u_b) where none is.
        """
        u = np.concatenate([u_a, u_b])
        taken = tuple(place for place in range(len(self.items)) if place not in kept)
        return np.asarray(self.mixed(u, self.values(u), (taken,))[0])

    def medians(self) -> Floats:
        """The median of every input by itself [input]: where the nominal run stands."""
        half = np.array([0.5])
        return np.array([float(item.distribution.quantile(half)[0]) for item in self.items], dtype=np.float64)

    @cached_property
    def correlation(self) -> Floats:
        """The rank correlation asked for [input, input]: 0 between independent inputs, of a joint sample that of its rows.

        A normal correlation r is told as the rank correlation 6 asin(r / 2) / pi of its copula.
        """
        found = np.eye(len(self.items))
        for copula in self._copulas:
            for i, place in enumerate(copula.places):
                for j, other in enumerate(copula.places):
                    found[place, other] = rank_of_normal(float(copula.matrix[i, j])) if i != j else 1.0
        for rows in self._joint:
            found[np.ix_(rows.places, rows.places)] = rank_correlation(rows.values)
        return found

    def correlation_achieved(self, x: Floats) -> Floats:
        """The rank correlation of drawn inputs x [row, input]: Spearman's, [input, input]."""
        return rank_correlation(x)

    @property
    def _samples(self) -> tuple[JointSample, ...]:
        return tuple(each for each in self.dependence if isinstance(each, JointSample))

    @cached_property
    def _copulas(self) -> tuple[Copula, ...]:
        pairs = stated_pairs(self.dependence)
        place = {name: number for number, name in enumerate(self.names)}
        found = []
        for together in components(self.names, pairs):
            places = tuple(place[name] for name in together)
            found.append(Copula(places, tuple(self.items[each].distribution for each in places), matrix_of(together, pairs)))
        return tuple(found)

    @cached_property
    def _joint(self) -> tuple[JointRows, ...]:
        return tuple(JointRows.of(sample, self.names) for sample in self._samples)

    @property
    def _bound(self) -> tuple[Copula | JointRows, ...]:
        return (*self._copulas, *self._joint)

    @cached_property
    def _alone(self) -> tuple[int, ...]:
        bound = {place for block in self._bound for place in block.places}
        return tuple(place for place in range(len(self.items)) if place not in bound)
