"""Stated tables and melting bodies against equations and codes that share nothing with them.

Shomate equations: coefficients of the NIST Chemistry WebBook (SRD 69), from memory; JANAF rows as tabled by the package
``chemicals``; nitrogen and carbon dioxide by the NASA polynomials of ``cantera``.
"""

from __future__ import annotations

import math

import cantera
import pytest
from chemicals import heat_capacity as tables

from checker.substances import make_substance
from checker.substances.interface import Substance

pytestmark = pytest.mark.published
T, P, U, S = "temperature", "pressure", "specific_internal_energy", "specific_entropy"
C, CP, CV, H = (
    "specific_heat", "specific_heat_at_constant_pressure", "specific_heat_at_constant_volume", "specific_enthalpy",
)  # fmt: skip
SHOMATE = {
    "copper": (63.546, "7440-50-8", (17.72891, 28.09870, -31.25289, 13.97243, 0.068611)),
    "aluminium": (26.981539, "7429-90-5", (28.08920, -5.414849, 8.560423, 3.427370, -0.277375)),
}
"""Molar mass [g/mol], CAS number, and A to E of c_p = A + B t + C t² + D t³ + E/t², t = T/1000 K [J/(mol·K)]."""
GASES = {"N2": "Nitrogen", "CO2": "CarbonDioxide", "O2": "Oxygen"}


def janaf_body(cas: str, molar_mass: float, top: float) -> Substance:
    """Return a solid by the rows of JANAF between 298.15 K and a temperature."""
    tables._load_Cp_data()
    rows = zip(*tables.Cp_dict_JANAF_solid[cas], strict=True)
    table = tuple(
        ((T, float(t)), (C, float(c) / molar_mass * 1e3)) for t, c in rows if 298.0 < t <= top and t != 300.0
    )
    return make_substance("metal", "tabulated", {}, table=table)


def shomate_energy(coefficients: tuple[float, ...], temperature: float) -> float:
    """Return ∫c_p dT up to a constant. [J/mol]"""
    a, b, c, d, e = coefficients
    t = temperature / 1e3
    return 1e3 * (a * t + b * t**2 / 2 + c * t**3 / 3 + d * t**4 / 4 - e / t)


def shomate_entropy(coefficients: tuple[float, ...], temperature: float) -> float:
    """Return ∫c_p/T dT up to a constant. [J/(mol·K)]"""
    a, b, c, d, e = coefficients
    t = temperature / 1e3
    return a * math.log(t) + b * t + c * t**2 / 2 + d * t**3 / 3 - e / (2 * t**2)


@pytest.mark.parametrize("metal", SHOMATE)
@pytest.mark.parametrize("end", [400.0, 650.0, 900.0])
def test_a_table_of_specific_heats_against_the_shomate_equation(metal: str, end: float) -> None:
    """Energies and entropies from rows of JANAF are those of the Shomate equation to 0.2 %."""
    molar_mass, cas, coefficients = SHOMATE[metal]
    body = janaf_body(cas, molar_mass, 900.0)
    first, last = body.state({T: 298.15}), body.state({T: end})
    energy = shomate_energy(coefficients, end) - shomate_energy(coefficients, 298.15)
    gain = (last.specific_internal_energy - first.specific_internal_energy) * molar_mass / 1e3
    assert gain == pytest.approx(energy, rel=2e-3)
    entropy = shomate_entropy(coefficients, end) - shomate_entropy(coefficients, 298.15)
    rise = (last.specific_entropy - first.specific_entropy) * molar_mass / 1e3
    assert rise == pytest.approx(entropy, rel=2e-3)


@pytest.mark.parametrize("species", GASES)
@pytest.mark.parametrize("column", [CP, CV, U, H])
def test_a_gas_tabled_from_another_code_against_the_gas_itself(species: str, column: str) -> None:
    """Rows each 25 K from NASA polynomials give Δu and Δs of the fluid as an ideal gas to 0.2 %."""
    own = make_substance(GASES[species], "ideal gas", {})
    assert own.gas_constant is not None
    gas = cantera.Solution("gri30.yaml")
    gas_constant = cantera.gas_constant / gas.molecular_weights[gas.species_index(species)]
    rows = []
    for step in range(21):
        gas.TPX = 300.0 + 25.0 * step, 1e5, f"{species}:1"
        values = {CP: gas.cp_mass, CV: gas.cv_mass, U: gas.int_energy_mass, H: gas.enthalpy_mass}
        rows.append(((T, gas.T), (column, values[column])))
    body = make_substance("gas", "tabulated", {"gas_constant": gas_constant}, table=tuple(rows))
    ends = ({T: 310.0, P: 1e5}, {T: 790.0, P: 3e5})
    for name in (U, H, S):
        changes = [getattr(s.state(ends[1]), name) - getattr(s.state(ends[0]), name) for s in (body, own)]
        assert changes[0] == pytest.approx(changes[1], rel=2e-3), name


@pytest.mark.parametrize(
    ("metal", "cas", "molar_mass", "latent", "melts", "end"),
    [
        ("aluminium", "7429-90-5", 26.981539, 10.711e3, 933.45, 1000.0),
        ("copper", "7440-50-8", 63.546, 13.138e3, 1358.0, 1400.0),
        ("lead", "7439-92-1", 207.2, 4.799e3, 600.6, 700.0),
        ("zinc", "7440-66-6", 65.38, 7.322e3, 692.73, 800.0),
        ("magnesium", "7439-95-4", 24.305, 8.477e3, 923.0, 1000.0),
    ],
)
def test_heat_to_melt_a_metal_against_janaf(
    metal: str, cas: str, molar_mass: float, latent: float, melts: float, end: float
) -> None:
    """From 25 °C to the melt the table's constants take the enthalpy that JANAF integrates to, to 3 %.

    Enthalpies of fusion by JANAF, from memory.
    """
    tables._load_Cp_data()
    liquid = next(c for t, c in zip(*tables.Cp_dict_JANAF_liquid[cas], strict=True) if t >= melts)
    solid = janaf_body(cas, molar_mass, melts)
    assert solid.valid_range is not None
    top = min(melts, solid.valid_range.temperature_max)
    expected = (
        solid.state({T: top}).specific_internal_energy - solid.state({T: 298.15}).specific_internal_energy
    )
    expected += (latent + float(liquid) * (end - melts)) / molar_mass * 1e3
    body = make_substance(metal, "phase change", {})
    gain = body.state({T: end}).specific_internal_energy - body.state({T: 298.15}).specific_internal_energy
    assert gain == pytest.approx(expected, rel=0.03)


def test_freezing_in_closed_form() -> None:
    """Water from 20 °C to −15 °C gives off c_l ΔT + L + c_s ΔT, and ΔS = Σ c ln + L/T_m, by hand.

    4.19·20 + 333.6 + 2.1·15 = 448.9 kJ/kg; 4.19 ln(293.15/273.15) + 333.6/273.15 + 2.1 ln(273.15/258.15) = 1.6360.
    """
    body = make_substance("water", "phase change", {
        "melting_temperature": 273.15, "latent_heat": 333.6e3, "specific_heat_of_solid": 2100.0,
        "specific_heat_of_liquid": 4190.0,
    })  # fmt: skip
    warm, cold = body.state({T: 293.15}), body.state({T: 258.15})
    assert warm.specific_internal_energy - cold.specific_internal_energy == pytest.approx(448.9e3, rel=1e-12)
    assert warm.specific_entropy - cold.specific_entropy == pytest.approx(1636.0, abs=0.05)
