"""The words of the language, in the order shown to the user.

In: nothing. Out: names of functions, and what may not be the name of anything else. Must not know: what they do.
"""

from __future__ import annotations

#: functions of values at one time
FUNCTION_NAMES: tuple[str, ...] = (
    *("exp", "ln", "log10", "sqrt", "sin", "cos", "tan", "asin", "acos", "atan", "atan2"),
    *("sinh", "cosh", "tanh", "erf", "abs", "min", "max", "mod", "where"),
)
#: functions of all entries along an index, as in sum(x, cell); those that are functions of one time or a course too are told by the index
REDUCTIONS: tuple[str, ...] = ("sum", "max", "min", "average")
#: functions of a whole course, allowed in `take` only
COURSES: tuple[str, ...] = ("highest", "lowest", "average", "integral", "final", "value_at")
#: and those that are not built yet
COURSES_LATER: tuple[str, ...] = ("time_of_highest", "time_of_lowest", "first_time", "time_while")
#: names that a study may not give to anything of its own
RESERVED: frozenset[str] = frozenset((*FUNCTION_NAMES, *REDUCTIONS, *COURSES, *COURSES_LATER, "log", "time", "pi", "and", "or", "not"))
