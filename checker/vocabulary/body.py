"""What may be stated of a body."""

from __future__ import annotations

from dataclasses import replace
from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.types import Scale
from checker.term import Allowance, Term
from checker.vocabulary.common import DENSITY, MASS, TEMPERATURE, VOLUME, heat_capacity

BODY: Final[tuple[Term, ...]] = (
    MASS,
    Term("amount", "n", dim.AMOUNT, "mol", "amount of substance", positive=True),
    VOLUME,
    Term("molar_mass", "M", dim.MOLAR_MASS, "g/mol", "molar mass", positive=True),
    heat_capacity("gas_constant", "R", "specific gas constant"),
    heat_capacity("specific_heat", "c", "specific heat capacity of a solid or liquid"),
    heat_capacity("specific_heat_at_constant_volume", "c_v", "specific heat capacity at constant volume"),
    heat_capacity("specific_heat_at_constant_pressure", "c_p", "specific heat capacity at constant pressure"),
    DENSITY,
    Term("mass_fraction", "w", dim.NONE, "", "mass fraction of the solute", allowance=Allowance.FRACTION),
    replace(TEMPERATURE, name="melting_temperature", symbol="T_m", meaning="melting temperature"),
    Term(
        "melting_span",
        "ΔT_m",
        dim.TEMPERATURE,
        "K",
        "span of temperature over which the body melts; none: it melts at one temperature",
        Scale.TEMPERATURE_DIFFERENCE,
        Allowance.TEMPERATURE,
        positive=True,
    ),
    Term("latent_heat", "L", dim.SPECIFIC_ENERGY, "kJ/kg", "latent heat of melting", positive=True),
    heat_capacity("specific_heat_of_solid", "c_s", "specific heat capacity below the melting temperature"),
    heat_capacity("specific_heat_of_liquid", "c_l", "specific heat capacity above the melting temperature"),
    Term(
        "water_content",
        "w_t",
        dim.NONE,
        "",
        "mass of water in moist air, condensed water included, per mass of dry air",
    ),
    Term(
        "heat_transfer_coefficient",
        "h_c",
        dim.HEAT_TRANSFER_COEFFICIENT,
        "W/(m²·K)",
        "surface heat transfer coefficient",
        positive=True,
    ),
    Term(
        "thermal_conductivity",
        "λ",
        dim.THERMAL_CONDUCTIVITY,
        "W/(m·K)",
        "thermal conductivity",
        positive=True,
    ),
    Term("characteristic_length", "L_c", dim.LENGTH, "m", "volume per surface", positive=True),
)
