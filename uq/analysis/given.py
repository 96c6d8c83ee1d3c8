"""First-order indices from the A and B rows alone, which hold whether or not inputs depend on each other.

The share of the variance that the expectation given one input explains (correlation ratio, Pearson 1905; as an estimator from given data:
Plischke, Borgonovo and Smith 2013, doi:10.1016/j.ejor.2012.11.047). Every input is cut into classes at quantiles of the pilot; within a
class the output is fitted by a straight line in the input. Noise of the fit adds to what it seems to explain: the delete-one-replicate
jackknife takes that off, whatever the points, and gives the interval.

Measured with 16 replicates of 16, 64 and 512 rows on seven models (linear, products, exponentials, of correlated normals): means of 16
classes are 0.005 to 0.09 too low, of 32 classes 0.003 to 0.05, where the interval is 0.001 to 0.02; lines in 16 classes at most 0.003, in
32 at most 0.0003. So 32 classes with lines. Where the output jumps with the input some is still missed: the upper end is widened by
what halving the number of classes costs, as far as that is more than noise.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace

import numpy as np
from numpy.typing import NDArray

from uq.analysis.ask import Ask, Classes, Floats
from uq.analysis.estimate import Estimate, about, t_quantile
from uq.analysis.moments import InUnits, outcome_units, watched_units
from uq.analysis.pieces import Array, Pieces, reversed_rows, tree_sum
from uq.analysis.sample import Sample
from uq.analysis.sobol import over_time
from uq.solve.batch import Truth

MOST_CLASSES = 32
FEWEST_CLASSES = 8
# Bytes of all sums by class together; beyond it there are fewer classes.
_MOST_BYTES = 256e6
# A class whose input varies less than this (as a share of its mean square) has no slope.
_FLAT = 1e-12


def pilot_classes(ask: Ask, x: Floats, replicates: int) -> Ask:
    """The ask with the classes of every input, from the inputs x [member, input] of the pilot; unchanged where inputs are independent."""
    if not ask.dependent:
        return ask
    cells = max(1, len(ask.watched) * len(ask.grid) + len(ask.outcomes) + len(ask.limits) * len(ask.judged))
    many = MOST_CLASSES
    while many > FEWEST_CLASSES and 16.0 * replicates * len(ask.inputs) * cells * many > _MOST_BYTES:
        many //= 2
    ordered = np.sort(x, axis=0)
    edges = ordered[(np.arange(1, many) * len(x)) // many].T.copy()
    spread = ordered[(3 * len(x)) // 4] - ordered[len(x) // 4]
    return replace(ask, classes=Classes(edges, ordered[len(x) // 2], np.where(spread > 0, spread, 1.0)))


@dataclass(frozen=True, eq=False)
class ByClass:
    """Sums by replicate over A and B members of one kind of output, shifted by its centre and divided by its
    unit (`moments.InUnits`), 0 where it has no value.

    count, x, xx [input, class]: members, their inputs (shifted and divided by scale) and squares; y, xy [input, class, cell]: outputs and
    products; square [cell]: squares of outputs.
    """

    pieces: Pieces

    @classmethod
    def of(cls, ask: Ask, sample: Sample, outputs: tuple[Floats, Floats], scale: InUnits) -> ByClass:
        """The sums of one block from the outputs of its A and of its B members, [row, cell] each."""
        classes = ask.classes
        if classes is None:
            raise ValueError("the inputs are not cut into classes: `given.pilot_classes` comes first")
        # A and B members of a row are neighbours, so that rows are leaves of the tree as everywhere.
        y = (_interleaved(*outputs) - scale.centre) / scale.unit
        y[~np.isfinite(y)] = 0.0
        x = (_interleaved(sample.x.a, sample.x.b) - classes.centre) / classes.scale
        edges = (classes.edges - classes.centre[:, None]) / classes.scale[:, None]
        sums = np.empty((x.shape[1], classes.many, 3 + 2 * y.shape[1]))
        both = np.ones((len(y), sums.shape[2]))
        for place, column in enumerate(x.T[..., None]):
            of = np.searchsorted(edges[place], column[:, 0], side="right")
            both[:, 1:2], both[:, 2:3] = column, column**2
            both[:, 3 : 3 + y.shape[1]] = y
            np.multiply(y, column, out=both[:, 3 + y.shape[1] :])
            sums[place] = sum_by_class(both, of, classes.many)
        with np.errstate(over="ignore"):
            square = tree_sum((y**2)[reversed_rows(len(y))])
        parts = np.split(sums[..., 3:], 2, axis=2)
        powers = {name: sums[..., at].copy() for at, name in enumerate(("count", "x", "xx"))}
        return cls(Pieces.of(sample.block, {**powers, "y": parts[0].copy(), "xy": parts[1].copy(), "square": square}))

    def merge(self, other: ByClass) -> ByClass:
        """Both together."""
        return ByClass(self.pieces.merge(other.pieces))


def watched_by_class(ask: Ask, sample: Sample) -> ByClass:
    """Of the watched quantities at the output times."""
    values = sample.values
    chosen = tuple((part if ask.grid_is_all else part[..., ask.grid]).reshape(len(part), -1) for part in (values.a, values.b))
    return ByClass.of(ask, sample, (chosen[0], chosen[1]), watched_units(ask))


def outcomes_by_class(ask: Ask, sample: Sample) -> ByClass:
    """Of the outcomes."""
    return ByClass.of(ask, sample, (sample.outcomes.a, sample.outcomes.b), outcome_units(ask))


def limits_by_class(ask: Ask, sample: Sample) -> ByClass:
    """Of the indicators 'true by then' of the limits at the judged times."""

    def indicators(conditions: NDArray[np.int8]) -> Floats:
        judged = conditions if len(ask.judged) == len(ask.solved_times) else conditions[..., ask.judged]
        gone = np.logical_or.accumulate(judged == Truth.unknown, axis=-1)
        came = np.logical_or.accumulate((judged == Truth.true) & ~gone, axis=-1)
        return np.where(gone & ~came, np.nan, came).reshape(len(came), -1)

    a, b = indicators(sample.conditions.a), indicators(sample.conditions.b)
    return ByClass.of(ask, sample, (a, b), InUnits(np.zeros(a.shape[1]), np.ones(a.shape[1])))


def _interleaved(a: Array, b: Array) -> Array:
    both = np.empty((2 * len(a), *a.shape[1:]))
    both[0::2], both[1::2] = a, b
    return both


def sum_by_class(values: Floats, classes: NDArray[np.intp], many: int) -> Floats:
    """Sums of values [row, cell] by the class of the row [class, cell], each along the binary tree over the rows (a power of two of them).

    Rows of other classes would add zero, so a node of the tree whose halves do not both hold the class is left out.
    """
    order = np.argsort(classes, kind="stable")
    held, left_in, node = values[order], np.arange(len(order)), order
    of = classes[order]
    while len(node) > 1 and node.max() > 0:
        node = node >> 1
        right = np.flatnonzero((of[1:] == of[:-1]) & (node[1:] == node[:-1])) + 1
        held[left_in[right - 1]] += held[left_in[right]]
        stays = np.ones(len(node), dtype=np.bool_)
        stays[right] = False
        left_in, node, of = left_in[stays], node[stays], of[stays]
    found = np.zeros((many, values.shape[1]))
    found[of] = held[left_in]
    return found


@dataclass(frozen=True, eq=False)
class Explained:
    """What the lines explain of the sum of squares, of all replicates and without each.

    between, coarse [1 + replicate, input, cell]: explained by the classes, and by half as many; total [1 + replicate, cell]: the sums of
    squares themselves. Place 0 is of all replicates.
    """

    between: Floats
    coarse: Floats
    total: Floats

    @classmethod
    def of(cls, by_class: ByClass) -> Explained:
        """From the sums by class."""
        sums = by_class.pieces.by_replicate()
        whole = {name: each.sum(axis=0) for name, each in sums.items()}
        without = ({name: whole[name] - sums[name][place] for name in sums} for place in range(len(sums["square"])))
        found = [(*_explained(each), _explained(_halved(each))[0]) for each in (whole, *without)]
        between, total, coarse = (np.stack([each[at] for each in found]) for at in range(3))
        return cls(between, coarse, total)

    def cells(self, here: slice | NDArray[np.intp]) -> Explained:
        """Some of the cells."""
        return self._changed(lambda array: np.asarray(array[..., here]))

    def overall(self, times: Floats) -> Explained:
        """Integrated over time, one cell."""
        return self._changed(lambda array: over_time(array, times)[..., None])

    def _changed(self, change: Callable[[Floats], Floats]) -> Explained:
        return Explained(change(self.between), change(self.coarse), change(self.total))

    def first(self, confidence: float) -> Estimate:
        """First-order indices [input, cell]; jackknife for bias and interval (Efron and Stein 1981, doi:10.1214/aos/1176345462)."""
        with np.errstate(invalid="ignore", divide="ignore"):
            found = _jackknifed(self.between / self.total[:, None], confidence)
            # What halving the classes costs, as far as it is no noise.
            cost = _jackknifed((self.between - self.coarse) / self.total[:, None], confidence)
        return Estimate(found.value, found.low, found.high + np.maximum(cost.low, 0.0))


def _jackknifed(values: Floats, confidence: float) -> Estimate:
    """Of an estimate from all replicates and without each [1 + replicate, ..]: its bias taken off, and its interval."""
    replicates = len(values) - 1
    middle = values[1:].mean(axis=0)
    spread = np.sqrt((replicates - 1) / replicates * ((values[1:] - middle) ** 2).sum(axis=0))
    return about(replicates * values[0] - (replicates - 1) * middle, t_quantile(confidence, replicates) * spread)


def _halved(sums: dict[str, Array]) -> dict[str, Array]:
    """The same with every two neighbouring classes as one."""
    return {name: each if name == "square" else each[:, 0::2] + each[:, 1::2] for name, each in sums.items()}


def _explained(sums: dict[str, Array]) -> tuple[Floats, Floats]:
    """Sum of squares about the mean that lines within classes explain [input, cell], and the whole of it [cell]."""
    count, x, xx = (sums[name][..., None] for name in ("count", "x", "xx"))
    y, xy = sums["y"], sums["xy"]
    with np.errstate(invalid="ignore", divide="ignore", over="ignore"):
        means = np.where(count > 0, y**2 / count, 0.0).sum(axis=1)
        wide = xx - x**2 / count
        slopes = np.where(wide > _FLAT * xx, (xy - x * y / count) ** 2 / wide, 0.0).sum(axis=1)
        # Every input's classes hold all members; those of the first tell the sum over all.
        about = y[0].sum(axis=0) ** 2 / count[0].sum()
        return np.asarray(means + slopes - about), np.asarray(sums["square"] - about)
