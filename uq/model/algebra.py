"""The functions of a stiff step: Jacobian, factors, solutions, refinement; entry by entry, or of large models row by row."""

from __future__ import annotations

from uq.model.linear import Written, stiff_of, write_linear
from uq.model.points import Plan
from uq.model.refine import write_refine
from uq.model.rows import Rows
from uq.model.sparse import Elimination


def write_algebra(plan: Plan) -> list[tuple[str, set[str]]]:
    """The texts of `@uq_linear`, `@uq_factor`, `@uq_lines`, `@uq_refine` and the two products, each with the names that it calls."""
    work = stiff_of(plan).plan
    written = Written(plan, work) if isinstance(work, Elimination) else Rows(plan, work)
    tables = [] if isinstance(written, Written) else [(written.tables(), set[str]())]
    functions = [*written.write_products(), written.write_factor(), written.write_lines()]
    return [*tables, write_linear(plan), *functions, write_refine(plan)]
