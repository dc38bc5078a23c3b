"""What may be stated of a body in a state, and in a row of a table of its properties."""

from __future__ import annotations

from typing import Final

from checker.quantity import dimensions as dim
from checker.term import Allowance, Term
from checker.vocabulary.common import DENSITY, PRESSURE, TEMPERATURE, VOLUME, heat_capacity

STATE: Final[tuple[Term, ...]] = (
    TEMPERATURE,
    PRESSURE,
    Term("specific_volume", "v", dim.SPECIFIC_VOLUME, "m³/kg", "volume per mass", positive=True),
    DENSITY,
    Term("quality", "x", dim.NONE, "", "mass of vapour per mass of mixture", allowance=Allowance.FRACTION),
    Term("phase", "", dim.NONE, "", "one of the phase words", text=True),
    Term(
        "specific_internal_energy",
        "u",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "internal energy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    Term(
        "specific_enthalpy",
        "h",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "enthalpy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    Term(
        "specific_entropy",
        "s",
        dim.SPECIFIC_ENTROPY,
        "kJ/(kg·K)",
        "entropy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
    ),
    VOLUME,
    Term("internal_energy", "U", dim.ENERGY, "kJ", "internal energy", allowance=Allowance.PROPERTY_CHANGE),
    Term("enthalpy", "H", dim.ENERGY, "kJ", "enthalpy", allowance=Allowance.PROPERTY_CHANGE),
    Term("entropy", "S", dim.ENTROPY, "kJ/K", "entropy", allowance=Allowance.PROPERTY_CHANGE),
    Term(
        "exergy",
        "X",
        dim.ENERGY,
        "kJ",
        "closed-system exergy",
        allowance=Allowance.PROPERTY_CHANGE,
        theme="exergy",
    ),
    Term(
        "specific_exergy",
        "x_e",
        dim.SPECIFIC_ENERGY,
        "kJ/kg",
        "closed-system exergy per mass",
        allowance=Allowance.PROPERTY_CHANGE,
        theme="exergy",
    ),
    Term("velocity", "c", dim.VELOCITY, "m/s", "speed of the body"),
    Term("elevation", "z", dim.LENGTH, "m", "height of the body"),
    Term("relative_humidity", "φ", dim.NONE, "", "relative humidity", allowance=Allowance.FRACTION),
    Term(
        "humidity_ratio",
        "W",
        dim.NONE,
        "",
        "mass of water vapour per mass of dry air",
    ),
    Term(
        "melted_fraction",
        "f_m",
        dim.NONE,
        "",
        "part of the mass that is melted",
        allowance=Allowance.FRACTION,
    ),
)

_TABLED: Final = (
    "temperature",
    "specific_volume",
    "density",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
)
ROW: Final[tuple[Term, ...]] = (
    *(term for term in STATE if term.name in _TABLED),
    heat_capacity("specific_heat", "c", "specific heat capacity of a solid or liquid at this temperature"),
    heat_capacity("specific_heat_at_constant_volume", "c_v", "c_v at this temperature"),
    heat_capacity("specific_heat_at_constant_pressure", "c_p", "c_p at this temperature"),
)
