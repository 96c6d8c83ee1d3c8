"""Units outside the table, asked of pint: the only door to it.

In: one symbol or word. Out: its factor and dimension, or None. Must not know: how units are put together.
"""

from __future__ import annotations

import functools
from fractions import Fraction
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    import pint

_BASES = {
    "[mass]": "kg",
    "[length]": "m",
    "[time]": "s",
    "[current]": "A",
    "[temperature]": "K",
    "[substance]": "mol",
    "[luminosity]": "cd",
}

#: what pint knows under a name but is no unit to state a quantity in: constants of nature, levels, points on odd scales
_NO_UNITS = """
pi tansec ln10 wien_x wien_u eulers_number zeta speed_of_light planck_constant elementary_charge avogadro_number
boltzmann_constant standard_gravity conventional_josephson_constant conventional_von_klitzing_constant conventional_water_density
conventional_mercury_density dirac_constant avogadro_constant molar_gas_constant faraday_constant conductance_quantum
magnetic_flux_quantum josephson_constant von_klitzing_constant stefan_boltzmann_constant first_radiation_constant
second_radiation_constant wien_wavelength_displacement_law_constant wien_frequency_displacement_law_constant
newtonian_constant_of_gravitation rydberg_constant electron_g_factor atomic_mass_constant electron_mass proton_mass neutron_mass
lattice_spacing_of_Si K_alpha_Cu_d_220 K_alpha_Mo_d_220 K_alpha_W_d_220 fine_structure_constant vacuum_permeability
vacuum_permittivity impedance_of_free_space coulomb_constant classical_electron_radius thomson_cross_section water_density_4C
water_density_60F mercury_density_0C mercury_density_32F mercury_density_60F degree_Celsius degree_Fahrenheit degree_Reaumur
delta_degree_Reaumur decibel decibelwatt decibelmilliwatt decibelmicrowatt decade octave neper lambda gamma mil
sound_pressure_level
"""
_REFUSED = frozenset(_NO_UNITS.split())


@functools.cache
def _registry() -> pint.UnitRegistry[float]:
    import pint

    return pint.UnitRegistry()


@functools.cache
def rare(name: str) -> tuple[Fraction, tuple[tuple[str, int], ...]] | None:
    """Factor and dimension of a unit that pint knows by just this name.

    Prefixes and plurals count only where they are written out (kilogram, furlongs), short symbols not at all: pint would take `pa` for a
    pico-year, `cfm` for a length and `Nm` for the fineness of a yarn.
    """
    if len(name) < 3:
        return None
    for prefix, unit, suffix in _registry().parse_unit_name(name):
        plain = (not prefix or (len(prefix) > 2 and name.startswith(prefix))) and (not suffix or len(name) > 4)
        if plain and unit not in _REFUSED:
            factor, base = _registry().get_base_units(prefix + unit)
            powers = {_BASES.get(key, key): Fraction(power) for key, power in base.dimensionality.items()}
            if all(power.denominator == 1 for power in powers.values()):
                return Fraction(factor), tuple(sorted((key, int(power)) for key, power in powers.items()))
    return None
