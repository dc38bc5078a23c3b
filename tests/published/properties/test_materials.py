"""The handbook table against tables that other packages carry, each with its primary source.

JANAF: NIST-JANAF Thermochemical Tables, 4th ed. (1998), and CRC: CRC Handbook of Chemistry and Physics, both as tabled
by the package ``chemicals``; ISO: ISO 10456:2007 (EN 12524), looked up as the package ``ht`` 1.2 reproduces it; ice by
the package ``iapws``. None of them is used when a package is reviewed.
"""

from __future__ import annotations

import itertools
from functools import cache

import pytest
from chemicals import MW, Hfus, Tm
from chemicals import heat_capacity as tables
from chemicals.iapws import iapws95_properties
from iapws import _Ice

from checker.substances.materials import (
    Material,
    MeltingMaterial,
    all_melting_materials,
    material_of,
    melting_material_of,
)

pytestmark = pytest.mark.published
METALS = {
    "aluminium": "7429-90-5", "beryllium": "7440-41-7", "chromium": "7440-47-3", "copper": "7440-50-8",
    "lead": "7439-92-1", "magnesium": "7439-95-4", "molybdenum": "7439-98-7", "nickel": "7440-02-0",
    "silicon": "7440-21-3", "sodium": "7440-23-5", "tungsten": "7440-33-7", "zinc": "7440-66-6",
}  # fmt: skip
CRC_SOLIDS = {
    "cadmium": "7440-43-9", "gold": "7440-57-5", "iron": "7439-89-6", "silver": "7440-22-4",
    "titanium": "7440-32-6", "zirconium": "7440-67-7", "copper": "7440-50-8", "aluminium": "7429-90-5",
}  # fmt: skip
CRC_LIQUIDS = {
    "mercury": "7439-97-6", "glycerol": "56-81-5", "ethylene glycol": "107-21-1", "propylene glycol": "57-55-6",
}  # fmt: skip
CLASSICAL = {
    "copper": 63.546, "silver": 107.868, "gold": 196.967, "lead": 207.2, "tin": 118.71, "zinc": 65.38,
    "cadmium": 112.414, "tungsten": 183.84, "molybdenum": 95.95,
}  # fmt: skip
ISO = {
    "aluminium alloy": ((2800.0, 880.0),),
    "brass": ((8400.0, 380.0),),
    "bronze": ((8700.0, 380.0),),
    "copper": ((8900.0, 380.0),),
    "lead": ((11300.0, 130.0),),
    "zinc": ((7200.0, 380.0),),
    "cast iron": ((7500.0, 450.0),),
    "steel": ((7800.0, 450.0),),
    "stainless steel": ((7900.0, 460.0),),
    "soda-lime glass": ((2500.0, 750.0),),
    "quartz glass": ((2200.0, 750.0),),
    "reinforced concrete": ((2300.0, 1000.0), (2400.0, 1000.0)),
    "concrete": ((2400.0, 1000.0),),
    "granite": ((2600.0, 1000.0),),
    "basalt": ((2850.0, 1000.0),),
    "marble": ((2800.0, 1000.0),),
    "polycarbonate": ((1200.0, 1200.0),),
    "PTFE": ((2200.0, 1000.0),),
    "PVC": ((1390.0, 900.0),),
    "PMMA": ((1180.0, 1500.0),),
    "polyamide": ((1150.0, 1600.0),),
    "HDPE": ((980.0, 1800.0),),
    "LDPE": ((920.0, 2200.0),),
    "polystyrene": ((1050.0, 1300.0),),
    "polypropylene": ((910.0, 1800.0),),
    "polyoxymethylene": ((1410.0, 1400.0),),
    "epoxy resin": ((1200.0, 1400.0),),
    "polychloroprene": ((1240.0, 2140.0),),
    "hardwood": ((700.0, 1600.0),),
    "softwood": ((500.0, 1600.0),),
}
"""Density and specific heat by ISO 10456:2007, in which both are rounded.

Its value for natural rubber, 1100 J/(kg·K), is left out: calorimetry gives 1.9 kJ/(kg·K) at room temperature (from
memory).
"""


@cache
def molar_mass(cas: str) -> float:
    """Return a molar mass. [g/mol]"""
    return float(MW(cas))


@cache
def heats_by(table: str, cas: str) -> tuple[tuple[float, float], ...]:
    """Return the rows (T [K], c_p [J/(kg·K)]) of a JANAF table, ``solid`` or ``liquid``."""
    tables._load_Cp_data()
    temperatures, heats = getattr(tables, f"Cp_dict_JANAF_{table}")[cas]
    per_mass = 1e3 / molar_mass(cas)
    return tuple((float(t), float(c) * per_mass) for t, c in zip(temperatures, heats, strict=True))


def tabled(name: str) -> Material:
    """Return a material that the table must have."""
    found = material_of(name)
    assert found is not None, name
    return found


def melting(name: str) -> MeltingMaterial:
    """Return a material of which the table must have the melting."""
    found = melting_material_of(name)
    assert found is not None, name
    return found


def janaf(cas: str, temperature: float) -> float:
    """Return c_p of a solid by JANAF, on straight lines between its rows. [J/(kg·K)]"""
    (low, first), (high, last) = next(
        (one, two)
        for one, two in itertools.pairwise(heats_by("solid", cas))
        if one[0] <= temperature <= two[0] and one[0] < two[0]
    )
    return first + (temperature - low) / (high - low) * (last - first)


@pytest.mark.parametrize("name", METALS)
def test_metals_at_25_degrees_against_janaf(name: str) -> None:
    """The specific heat of an element is that of JANAF to 1 %, and its spread covers the span of its range."""
    material = tabled(name)
    assert material.specific_heat == pytest.approx(janaf(METALS[name], 298.15), rel=0.01)
    mean = 0.5 * sum(janaf(METALS[name], t) for t in (material.temperature_min, material.temperature_max))
    assert material.specific_heat == pytest.approx(mean, rel=material.heat_spread)


@pytest.mark.parametrize("name", sorted(METALS.keys() - {"sodium"}))
def test_metals_at_their_second_temperature_against_janaf(name: str) -> None:
    """The specific heat at the second temperature is that of JANAF to 1 %."""
    material = tabled(name)
    assert material.second_temperature is not None
    expected = janaf(METALS[name], material.second_temperature)
    assert material.second_heat == pytest.approx(expected, rel=0.01)


@pytest.mark.parametrize("name", CRC_SOLIDS | CRC_LIQUIDS)
def test_elements_and_liquids_against_the_crc_handbook(name: str) -> None:
    """The specific heat at 25 °C is within its spread of that by the standard thermodynamic properties of CRC."""
    tables._load_Cp_data()
    cas, column = (CRC_SOLIDS[name], "Cps") if name in CRC_SOLIDS else (CRC_LIQUIDS[name], "Cpl")
    expected = float(tables.CRC_standard_data.loc[cas, column]) / molar_mass(cas) * 1e3
    material = tabled(name)
    assert material.specific_heat == pytest.approx(expected, rel=material.heat_spread)


@pytest.mark.parametrize("name", CLASSICAL)
def test_heavy_metals_meet_dulong_and_petit(name: str) -> None:
    """Of a metal whose Debye temperature is at or below room temperature the molar heat is 3R within 10 %."""
    molar = tabled(name).specific_heat * CLASSICAL[name] * 1e-3
    assert molar == pytest.approx(3.0 * 8.314462618, rel=0.1)


@pytest.mark.parametrize("name", ISO)
def test_building_and_engineering_materials_against_iso_10456(name: str) -> None:
    """Specific heats and densities are within their spread, and the rounding of ISO, of those by ISO 10456."""
    material = tabled(name)
    for density, heat in ISO[name]:
        assert abs(material.specific_heat - heat) <= material.heat_spread * material.specific_heat + 25.0, (
            heat
        )
        if material.density is not None:
            assert abs(material.density - density) <= (material.density_spread + 0.01) * material.density


def test_steel_at_400_degrees_against_the_fire_code() -> None:
    """EN 1993-1-2:2005, 3.4.1.2: c = 425 + 0.773 θ − 1.69e-3 θ² + 2.22e-6 θ³ between 20 °C and 600 °C."""

    def heat(celsius: float) -> float:
        return 425.0 + 0.773 * celsius - 1.69e-3 * celsius**2 + 2.22e-6 * celsius**3

    steel = tabled("carbon steel")
    assert steel.second_heat == pytest.approx(heat(400.0), rel=0.002)
    mean = sum(heat(20.0 + 10.0 * i) for i in range(11)) / 11.0
    assert steel.specific_heat == pytest.approx(mean, rel=steel.heat_spread)


def test_ice_against_iapws() -> None:
    """Density and specific heat of ice are within their spread over the range (IAPWS R10-06(2009))."""
    ice = tabled("ice")
    for temperature in (ice.temperature_min, 260.0, 268.0, 273.15):
        state = _Ice(temperature, 0.101325)
        assert ice.density == pytest.approx(state["rho"], rel=ice.density_spread)
        # at the ends the constant misses c by more than it misses any difference of energy
        assert ice.specific_heat == pytest.approx(1e3 * state["cp"], rel=ice.heat_spread + 0.01)
    low, high = (_Ice(t, 0.101325)["h"] for t in (ice.temperature_min, 273.15))
    mean = 1e3 * (high - low) / (273.15 - ice.temperature_min)
    assert ice.specific_heat == pytest.approx(mean, rel=0.01)


def test_water_against_iapws() -> None:
    """Density and specific heat of water are within their spread from 2 °C to 95 °C (IAPWS R6-95(2018))."""
    water = tabled("water")
    for temperature in (water.temperature_min, 298.15, 320.0, 345.0, water.temperature_max):
        density, _, _, _, _, heat, *_ = iapws95_properties(temperature, 101325.0)
        assert density == pytest.approx(water.density, rel=water.density_spread)
        assert heat == pytest.approx(water.specific_heat, rel=water.heat_spread)


def test_the_latent_heat_of_ice_against_iapws() -> None:
    """IAPWS-95 less ice Ih at 0.0025 °C and 1 atm is 333.43 kJ/kg; 333.55 (from memory) is within the spread."""
    liquid = iapws95_properties(273.1525, 101325.0)[3]
    solid = 1e3 * _Ice(273.1525, 0.101325)["h"]
    water = melting("water")
    assert water.latent_heat == pytest.approx(liquid - solid, rel=1e-4)
    assert water.latent_heat == pytest.approx(333.55e3, rel=water.latent_spread)


MELTING = {
    "aluminium": "7429-90-5", "copper": "7440-50-8", "lead": "7439-92-1", "magnesium": "7439-95-4",
    "silver": "7440-22-4", "sodium": "7440-23-5", "tin": "7440-31-5", "zinc": "7440-66-6", "mercury": "7439-97-6",
    "naphthalene": "91-20-3", "glycerol": "56-81-5", "n-octadecane": "593-45-3",
}  # fmt: skip


@pytest.mark.parametrize("name", MELTING)
def test_melting_against_the_crc_handbook(name: str) -> None:
    """Melting temperature and latent heat are those of CRC (enthalpy of fusion), within 0.5 K and the spread."""
    row, cas = melting(name), MELTING[name]
    assert row.melting_temperature == pytest.approx(Tm(cas), abs=0.5)
    assert row.latent_heat == pytest.approx(Hfus(cas) / molar_mass(cas) * 1e3, rel=row.latent_spread)


@pytest.mark.parametrize("name", ["aluminium", "copper", "lead", "magnesium", "sodium", "zinc"])
def test_mean_heats_of_solid_metals_up_to_melting_against_janaf(name: str) -> None:
    """The mean specific heat between 25 °C and the melting temperature is that of JANAF to 1 %."""
    row = melting(name)
    assert row.melting_temperature is not None
    count = 400
    step = (row.melting_temperature - 298.15) / count
    mean = sum(janaf(METALS[name], 298.15 + (i + 0.5) * step) for i in range(count)) / count
    assert row.heat_of_solid == pytest.approx(mean, rel=0.01)


@pytest.mark.parametrize("name", ["aluminium", "copper", "lead", "magnesium", "sodium", "zinc"])
def test_liquid_metals_against_janaf(name: str) -> None:
    """The specific heat of the melt is that of JANAF above its melting temperature, within the spread."""
    row, cas = melting(name), METALS[name]
    assert row.melting_temperature is not None
    span = (row.melting_temperature, row.temperature_max)
    melt = [c for t, c in heats_by("liquid", cas) if span[0] < t <= span[1]]
    assert melt
    for heat in melt:
        assert row.heat_of_liquid == pytest.approx(heat, rel=row.liquid_spread)


@pytest.mark.parametrize(
    "row", [r for r in all_melting_materials() if r.name in MELTING][:9], ids=lambda r: r.name
)
def test_metals_melt_with_the_entropy_of_richards(row: MeltingMaterial) -> None:
    """Metals melt with about R per mole (Richards' rule: 7 to 14.5 J/(mol·K), tin the highest)."""
    assert row.melting_temperature is not None
    assert 7.0 <= row.latent_heat / row.melting_temperature * molar_mass(MELTING[row.name]) * 1e-3 <= 14.5
