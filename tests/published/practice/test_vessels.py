"""Vessels that are, or come to be, full of liquid, against the transport rules and published properties of water.

Sources: ADR, packing instruction P200, table 2: test pressures and filling ratios (from memory); its rule for
low-pressure liquefied gases: 0.95 times the density of the liquid at 50 °C, and not full below 60 °C; its rule for
high-pressure ones: the test pressure is not exceeded at 65 °C (from memory). Expansion and compressibility of water at
1 atm: Kell, J. Chem. Eng. Data 20 (1975) 97 (from memory). IAPWS-95: table 7 of R6-95(2018) (from memory).
"""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.fill import filled, full_at, hottest, liquid_full, pressure_at, vapour_space
from checker.facts.twins import REAL, twin
from checker.facts.unpressed import needed_pressure
from checker.substances.interface import Substance
from tests.checker.cases import case

pytestmark = pytest.mark.published

LOW_PRESSURE = {
    "Propane": 0.43,
    "Butane": 0.52,
    "Isobutane": 0.49,
    "Propylene": 0.43,
    "Ammonia": 0.54,
    "R134a": 1.05,
    "R22": 1.03,
    "R152a": 0.79,
    "Dimethyl ether": 0.59,
    "R32": 0.78,
}
"""Low-pressure liquefied gases: permitted mass per litre of water capacity. [kg/L]"""
HIGH_PRESSURE = [
    ("Carbon dioxide", 0.68, 190.0),
    ("Carbon dioxide", 0.76, 250.0),
    ("Nitrous oxide", 0.68, 180.0),
    ("Nitrous oxide", 0.74, 225.0),
    ("Sulfur hexafluoride", 1.06, 70.0),
    ("Sulfur hexafluoride", 1.34, 140.0),
    ("Ethane", 0.25, 95.0),
    ("Ethane", 0.30, 120.0),
    ("R23", 0.88, 190.0),
]
"""High-pressure liquefied gases: filling ratio [kg/L] and test pressure [bar]."""


def real(name: str) -> Substance:
    """Return the real fluid of a name."""
    found = twin(name, REAL)
    assert found is not None
    return found


def closed(
    substance: str, body: dict[str, str], cold: dict[str, str], hot: str, **more: Any
) -> dict[str, Any]:
    """Return a record: a fluid that warms in a closed vessel."""
    return {
        "id": "vessel",
        "bodies": {"fluid": {"substance": substance, "model": "real fluid", "inputs": body}},
        "states": {
            "cold": {"fluid": {"inputs": cold}},
            "hot": {"fluid": {"inputs": {"temperature": hot}, "results": {"pressure": "1 bar"}}},
        },
        "processes": [{"id": "warming", "from": "cold", "to": "hot", "path": "constant volume"}],
        **more,
    }


@pytest.mark.parametrize(("substance", "ratio"), LOW_PRESSURE.items())
def test_a_permitted_filling_keeps_its_vapour_space(substance: str, ratio: float) -> None:
    """The permitted ratio is 95 % full at 50 °C, or just full at 60 °C where that is less, within 0.0076 kg/L."""
    warm, hot = (filled(real(substance), 273.15 + t, 1e-3 / ratio) for t in (50.0, 60.0))
    assert warm is not None
    assert hot is not None
    permitted = min(0.95 * ratio / warm, ratio / hot)
    assert ratio == pytest.approx(permitted, abs=0.0076)


@pytest.mark.parametrize(("substance", "ratio", "test_pressure"), HIGH_PRESSURE)
def test_a_filled_cylinder_reaches_its_test_pressure_at_65_degrees(
    substance: str, ratio: float, test_pressure: float
) -> None:
    """The pressure of a cylinder filled to the permitted ratio is its test pressure at 65 °C, within 2.5 %."""
    body = {"volume": "10.000 L", "mass": f"{10.0 * ratio:.4f} kg"}
    found = case(closed(substance, body, {"temperature": "-10.0 °C"}, "65.0 °C"))
    pressure = pressure_at(found, "fluid", 338.15, 1e-3 / ratio)
    assert pressure == pytest.approx(test_pressure * 1e5, rel=0.025)
    assert found.value("states/hot/fluid/pressure") == pytest.approx(pressure, rel=1e-6)


@pytest.mark.parametrize(
    ("cold", "hot", "expansion", "compressibility"),
    [
        ("19.5 °C", "20.5 °C", 206.8e-6, 4.589e-10),
        ("39.5 °C", "40.5 °C", 385.4e-6, 4.424e-10),
        ("59.5 °C", "60.5 °C", 523.1e-6, 4.450e-10),
    ],
)
def test_blocked_in_water_builds_up_its_thermal_pressure_coefficient(
    cold: str, hot: str, expansion: float, compressibility: float
) -> None:
    """(∂p/∂T)ᵥ = α/κ_T: 4.5 bar/K at 20 °C, 8.7 bar/K at 40 °C, 11.8 bar/K at 60 °C, within 1 %."""
    record = closed("Water", {"volume": "1.000 L"}, {"temperature": cold, "pressure": "1.01325 bar"}, hot)
    found = case(record)
    warming = hottest(found, "fluid")
    assert warming is not None
    full = liquid_full(found, warming)
    assert full is not None
    assert full.per_kelvin == pytest.approx(expansion / compressibility, rel=0.01)


def test_water_at_a_given_density_has_the_pressure_of_the_release() -> None:
    """IAPWS-95 at 300 K: 20.0022515 MPa at 1005.308 kg/m³, 700.004704 MPa at 1188.202 kg/m³."""
    found = case(
        closed("Water", {"volume": "1.000 L"}, {"temperature": "290 K", "pressure": "1 bar"}, "300 K")
    )
    assert pressure_at(found, "fluid", 300.0, 1.0 / 1005.308) == pytest.approx(20.0022515e6, rel=1e-6)
    assert pressure_at(found, "fluid", 300.0, 1.0 / 1188.202) == pytest.approx(700.004704e6, rel=1e-6)


@pytest.mark.parametrize(("density", "celsius"), [(958.35, 100.0), (887.00, 180.0), (712.14, 300.0)])
def test_a_boiler_is_full_where_the_steam_table_says(density: float, celsius: float) -> None:
    """ρ'(100 °C) = 958.35, ρ'(180 °C) = 887.00, ρ'(300 °C) = 712.14 kg/m³ (steam tables, from memory), within 0.1 K."""
    assert full_at(real("Water"), 1.0 / density) == pytest.approx(celsius + 273.15, abs=0.1)


def test_a_propane_vessel_at_its_permitted_filling_is_not_full_at_60_degrees() -> None:
    """0.42 kg/L of propane: 95 % full between 50 °C and 55 °C, and full above 60 °C, as the rule demands."""
    record = closed(
        "Propane", {"volume": "100.0 L", "mass": "42.0 kg"}, {"temperature": "15.0 °C"}, "50.0 °C"
    )
    found = vapour_space(case(record), "fluid")
    assert found is not None
    assert found.hot == pytest.approx(0.42 / 0.449, rel=5e-3)
    assert found.full_at > 333.15


def test_hot_water_needs_its_vapour_pressure() -> None:
    """p_sat(130 °C) = 2.7028 bar and p_sat(150 °C) = 4.7616 bar (IAPWS steam tables, from memory)."""
    for temperature, pressure in (("130.0 °C", 2.7028e5), ("150.0 °C", 4.7616e5)):
        record = closed(
            "Water", {"mass": "1 kg", "specific_heat": "4.2 kJ/(kg·K)"}, {"temperature": "60 °C"}, temperature
        )
        record["bodies"]["fluid"]["model"] = "constant specific heat"
        record["states"]["hot"]["fluid"]["results"] = {}
        found = needed_pressure(case(record), "fluid")
        assert found is not None
        assert found.pressure == pytest.approx(pressure, rel=1e-4)
