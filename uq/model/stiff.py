"""What stiff steps of a model work with: the method, the Jacobian, the plan of its elimination; and what a step costs."""

from __future__ import annotations

from dataclasses import dataclass

from uq.lang.graph import Node
from uq.model.code import Equations
from uq.model.expressions import needed
from uq.model.jacobian import Jacobian
from uq.model.layout import Choice
from uq.model.rosenbrock import Rosenbrock
from uq.model.rosenbrock5 import ROSENBROCK5
from uq.model.sparse import Elimination, Envelope, elimination, envelope

# Multiplications of an elimination that is written out; beyond, it goes row by row in loops.
LARGEST_WRITTEN_OUT = 3000
# Room for the factors, in entries of 64 bytes: 4 MB for 256 states that all depend on all.
LARGEST_ROOM = 65_536
# Operations of the Jacobian, which are always written out, and its distinct entries: so many compile in about ten seconds. (100 states
# that depend on all others, each in a way of its own, have 40300.)
LARGEST_JACOBIAN, MOST_VALUES = 41_000, 20_000
FEW = 4
# What an operation takes, in additions: throughputs of AVX-512 and AVX2, and the table of elementary functions in DEVELOPERS.md.
COSTS = {"/": 12.0, "sqrt": 16.0, "**": 60.0, "atan2": 40.0, "mod": 30.0, "table": 20.0, "table_slope": 20.0}
PLAIN = frozenset(("+", "-", "*", "neg", "<", "<=", ">", ">=", "and", "or", "not", "where", "abs", "min", "max"))
FUNCTION = 25.0


@dataclass(frozen=True)
class Stiff:
    """The method, the Jacobian, and how I / (gamma h) - J is eliminated."""

    method: Rosenbrock
    jacobian: Jacobian
    plan: Elimination | Envelope

    @classmethod
    def of(cls, equations: Equations, method: Rosenbrock) -> Stiff | None:
        """None where the model is too large for it."""
        jacobian = Jacobian.of(equations, MOST_VALUES)
        if jacobian is None or len(needed(jacobian.nodes, {})) > LARGEST_JACOBIAN:
            return None
        places = jacobian.places
        plan = elimination(jacobian.size, places, LARGEST_WRITTEN_OUT) or envelope(jacobian.size, places)
        return cls(method, jacobian, plan) if plan.entries <= LARGEST_ROOM else None

    @classmethod
    def too_large(cls, equations: Equations) -> bool:
        """Whether a model is too large for stiff steps; only a model that may be is differentiated, which then takes seconds."""
        graph, states = equations.graph, frozenset(equations.states)
        parts = [(len(graph.leaves(rate) & states), len(needed((rate,), {}))) for rate in equations.rates]
        entries = sum(places for places, _ in parts)
        # a derivative takes a few times the operations of what is differentiated
        operations = FEW * sum(places * size for places, size in parts)
        small = entries <= MOST_VALUES and operations <= LARGEST_JACOBIAN and len(states) ** 2 <= LARGEST_ROOM
        return not small and cls.of(equations, ROSENBROCK5) is None

    @property
    def curve_parts(self) -> int:
        """Coefficients of the extension for every state, in the form of an explicit pair's."""
        return 2 + len(self.method.extension)

    @property
    def sizes(self) -> dict[str, int]:
        """What it adds to the slots of a lane group."""
        values = len(self.jacobian.values)
        return {"choice": len(Choice), "jacobian": values, "factors": self.plan.entries, "stages": self.method.stages}

    def cost(self, equations: Equations) -> float:
        """About how many additions a step takes."""
        method, states = self.method, self.jacobian.size
        combinations = sum(map(len, (*method.a, *method.coupling)))
        solving = method.stages * (self.plan.entries + 3 * states)
        factors = self.plan.operations + 3 * self.plan.entries + 16 * states + 4 * len(self.jacobian.entries)
        return method.stages * cost_of(equations.rates) + cost_of(self.jacobian.nodes) + factors + solving + (combinations + 60) * states


def cost_of(roots: tuple[Node, ...]) -> float:
    """About how many additions the values of nodes take."""
    return sum(COSTS.get(node.op, 1.0 if node.op in PLAIN else FUNCTION) for node in needed(roots, {}) if node.args)
