"""Check values of equations of state, handbook saturation tables and ideal-gas tables for other fluids."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from checker.substances import make_substance
from checker.substances.real_fluid import real_fluid

pytestmark = pytest.mark.published
Meets = Callable[..., bool]
ATMOSPHERE = 101325.0


def test_check_values_of_the_short_equations(published: Callable[[str], Any], meets: Meets) -> None:
    """Pressure, enthalpy and entropy of ten fluids close to their critical points, to every printed digit."""
    table = published("equations-of-state")["short_equations"]
    assert table["source"]
    compared = 0
    for row in table["states"]:
        fluid = real_fluid(row["fluid"])
        volume = 1.0 / (1e3 * float(row["density"]) * fluid.molar_mass)
        state = fluid.state({"temperature": float(row["temperature"]), "specific_volume": volume})
        values = {
            "pressure": (state.pressure or 0.0) / 1e3,
            "enthalpy": (state.specific_enthalpy or 0.0) * fluid.molar_mass,
            "entropy": state.specific_entropy * fluid.molar_mass,
        }
        compared += sum(meets(values[name], row[name]) for name in values if name in row)
    assert compared == 27


def test_check_values_of_propane(published: Callable[[str], Any], meets: Meets) -> None:
    """The five pressures that the authors of the propane equation printed."""
    compared = 0
    for row in published("equations-of-state")["propane"]["states"]:
        fluid = real_fluid(row["fluid"])
        volume = 1.0 / (1e3 * float(row["density"]) * fluid.molar_mass)
        state = fluid.state({"temperature": float(row["temperature"]), "specific_volume": volume})
        compared += meets((state.pressure or 0.0) / 1e6, row["pressure"])
    assert compared == 5


def test_normal_boiling_points(published: Callable[[str], Any], meets: Meets) -> None:
    """Boiling temperature, densities and latent heat of eleven fluids at 1 atm."""
    compared = 0
    for row in published("saturation")["normal_boiling_points"]["states"]:
        liquid, vapour = real_fluid(row["fluid"]).saturation({"pressure": ATMOSPHERE})
        latent = (vapour.specific_enthalpy or 0.0) - (liquid.specific_enthalpy or 0.0)
        compared += meets(liquid.temperature, row["temperature"])
        compared += meets(1.0 / (liquid.specific_volume or 1.0), row["liquid_density"])
        compared += meets(1.0 / (vapour.specific_volume or 1.0), row["vapour_density"])
        compared += meets(latent / 1e3, row["latent_heat"])
    assert compared == 44


def test_refrigerant_134a_as_in_the_handbook(published: Callable[[str], Any], meets: Meets) -> None:
    """Saturated R134a at −20, 0 and 40 °C on the handbook's own datum, which is that of the library."""
    compared = 0
    for row in published("saturation")["refrigerants"]["states"]:
        liquid, vapour = real_fluid(row["fluid"]).saturation({"temperature": 273.15 + float(row["celsius"])})
        compared += meets((liquid.pressure or 0.0) / 1e6, row["pressure"])
        compared += meets(1.0 / (liquid.specific_volume or 1.0), row["liquid_density"])
        compared += meets(vapour.specific_volume, row["vapour_volume"])
        for state, word in ((liquid, "liquid"), (vapour, "vapour")):
            compared += meets((state.specific_enthalpy or 0.0) / 1e3, row[f"{word}_enthalpy"])
            compared += meets(state.specific_entropy / 1e3, row[f"{word}_entropy"])
    assert compared == 21


def test_saturated_carbon_dioxide(published: Callable[[str], Any], meets: Meets) -> None:
    """Vapour pressure and densities of CO2 as its authors tabulated them."""
    compared = 0
    for row in published("saturation")["carbon_dioxide"]["states"]:
        liquid, vapour = real_fluid(row["fluid"]).saturation({"temperature": float(row["temperature"])})
        compared += meets((liquid.pressure or 0.0) / 1e6, row["pressure"])
        compared += meets(1.0 / (liquid.specific_volume or 1.0), row["liquid_density"])
        compared += meets(1.0 / (vapour.specific_volume or 1.0), row["vapour_density"])
    assert compared == 6


def test_ideal_gas_enthalpies_of_the_janaf_tables(published: Callable[[str], Any], meets: Meets) -> None:
    """H(T) − H(298.15 K) of the ideal gases against the JANAF tables, which share no data with the equations."""
    table = published("ideal-gases")
    assert table["reason"]
    compared = 0
    for row in table["enthalpies"]:
        gas = make_substance(row["fluid"], "ideal gas", {})
        cold, hot = (
            gas.state({"temperature": temperature, "pressure": 1e5}).specific_enthalpy or 0.0
            for temperature in (298.15, float(row["temperature"]))
        )
        change = (hot - cold) * (gas.molar_mass or 0.0) / 1e3
        compared += meets(change, row["enthalpy"], 5e-4 * float(row["enthalpy"]))
    assert compared == 14
