"""Units of measurement, exact in dimension and scale.

In: the text of a unit or of a quantity.
Out: a `Unit` that can be multiplied, compared, converted and written for a NetCDF file, or a mistake with its remedy.
Must not know: expressions, studies.
"""

from uq.units.notation import Units, parse_quantity, parse_unit
from uq.units.unit import NONE, Unit

__all__ = ["NONE", "Unit", "Units", "parse_quantity", "parse_unit"]
