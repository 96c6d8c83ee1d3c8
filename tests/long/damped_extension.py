"""Works out the extension of the 8(5,3) pair (`uq.model.tableau`): nothing grows between the ends of a step that is stable.

Weights of all stages that meet the conditions of order 6 have, beside those of the published extension, four numbers free at every place.
Least squares with weights that rise where most is left make |u(theta)| of y' = lambda y small all over the stability region, with the
conditions of order 7 and the size of the weights held down. Run by hand: python -m tests.long.damped_extension (half a minute); it prints
how much grows with the pair as it is and with what was found.
"""

from __future__ import annotations

from dataclasses import replace
from fractions import Fraction

import numpy as np
from scipy.integrate._ivp import dop853_coefficients as published

from tests.test_model_tableau import stability_region, stages_of_a_linear_problem
from uq.model.pair import Pair
from uq.model.tableau import DORMAND_PRINCE_853 as PAIR
from uq.model.trees import Tree, trees

SEVENTH, SIZE, ROUNDS = 1e5, 1e-3, 80


def conditions(least: int, most: int) -> np.ndarray:
    """Elementary weights of all stages [tree, stage] of trees with so many nodes."""
    n = PAIR.all_stages
    a, known = np.zeros((n, n)), dict[Tree, np.ndarray]()
    for k, row in enumerate((*PAIR.a, *PAIR.extra)):
        a[k, : len(row)] = [float(x) for x in row]

    def weights(tree: Tree) -> np.ndarray:
        if tree not in known:
            known[tree] = np.prod([np.ones(n), *(a @ weights(branch) for branch in tree)], axis=0)
        return known[tree]

    return np.array([weights(tree) for nodes in range(least, most + 1) for tree in trees(nodes)])


def shapes(theta: float) -> np.ndarray:
    """What multiplies the four rows of `Pair.d`."""
    rest = 1 - theta
    return np.array([theta**2 * rest**2, theta**3 * rest**2, theta**3 * rest**3, theta**4 * rest**3])


def found() -> np.ndarray:
    """The weights [row, stage], as doubles; printed digits were made from them in higher precision."""
    low = conditions(1, 6)
    free = np.linalg.svd(low / np.linalg.norm(low, axis=1)[:, None])[2][12:]
    old = with_weights(published.D)
    region = np.array([z for z in stability_region(PAIR, 25, 120) if abs(z) > 3.5])
    stages, seventh = np.array([stages_of_a_linear_problem(PAIR, z) for z in region]), conditions(7, 7)
    moved, base, left = [], [], []
    for theta in np.linspace(0.04, 0.98, 24):
        shape, weights = shapes(theta), np.array([float(x) for x in old.extension(Fraction(float(theta)))])
        moved.append(np.einsum("j,mi->mji", shape, region[:, None] * (stages @ free.T)).reshape(len(region), 16))
        base.append(1 + region * (stages @ weights))
        left.append(np.einsum("j,mi->mji", shape, seventh @ free.T).reshape(-1, 16))
    return published.D + smallest(np.concatenate(moved), np.concatenate(base), np.concatenate(left), free).reshape(4, 4) @ free


def smallest(moved: np.ndarray, base: np.ndarray, left: np.ndarray, free: np.ndarray) -> np.ndarray:
    """The coefficients [16] with the smallest greatest |base + moved c|."""
    size, heights, best = np.kron(np.eye(4), free.T), np.ones(len(base)), (np.inf, np.zeros(16))
    for _ in range(ROUNDS):
        rows = [moved.real * heights[:, None], moved.imag * heights[:, None], SEVENTH * left, SIZE * size]
        wanted = [-base.real * heights, -base.imag * heights, np.zeros(len(left)), -SIZE * published.D.ravel()]
        c = np.linalg.lstsq(np.concatenate(rows), np.concatenate(wanted), rcond=None)[0]
        rest = np.abs(moved @ c + base)
        best = min(best, (float(rest.max()), c), key=lambda each: each[0])
        heights = heights * np.sqrt(np.maximum(rest / rest.max(), 1e-3))
        heights /= heights.max()
    return best[1]


def with_weights(d: np.ndarray) -> Pair:
    """The pair with another extension; as doubles it meets no condition to 29 digits, so it claims no more than they have."""
    return replace(PAIR, d=tuple(tuple(Fraction(float(x)) for x in row) for row in d), extension_order=1, digits=12)


def growth(pair: Pair) -> float:
    """The most that is made of a fast component between the ends of a stable step."""
    region = np.array(stability_region(PAIR))
    stages = np.array([stages_of_a_linear_problem(pair, z) for z in region])
    weights = (np.array([float(x) for x in pair.extension(Fraction(k, 40))]) for k in range(41))
    return float(max(np.max(np.abs(1 + region * (stages @ each))) for each in weights))


def main() -> None:
    """Print everything."""
    d = found()
    print(
        f"grows at most: published {growth(with_weights(published.D)):.2f}, in use {growth(PAIR):.3f}, found {growth(with_weights(d)):.3f}"
    )
    print("apart from those in use, of the largest:", np.max(np.abs(d - [[float(x) for x in row] for row in PAIR.d])) / np.max(np.abs(d)))


if __name__ == "__main__":
    main()
