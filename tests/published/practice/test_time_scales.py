"""Conduction, sound and gases done again, against closed forms and published values.

Sources: first root of ζ·tan ζ = Bi for the plane wall, from tables of transient conduction (from memory); heat that
spreads through an insulated plate under a constant flux, Carslaw and Jaeger, Conduction of Heat in Solids, 1959, 3.8
(from memory); speed of sound of water by the verification table of IAPWS R7-97(2012) (from memory), of gases at 0 °C
by handbooks (from memory); relative pressures of air by Keenan, Chao and Kaye, Gas Tables (from memory); second virial
coefficient of nitrogen by Dymond and others, 2002 (from memory).
"""

from __future__ import annotations

import math
from typing import Any

import pytest

from checker.facts.assumptions import biot_number
from checker.facts.pace import diffusion_time, paces, speed_of_sound, spreading
from checker.facts.redone import redone
from checker.facts.twins import IDEAL, REAL, twin
from checker.substances import make_substance
from tests.checker.cases import case

pytestmark = pytest.mark.published

STEEL = {"thermal_conductivity": "50.0 W/(m·K)", "density": "7800 kg/m³", "characteristic_length": "0.0200 m"}


def plate(duration: str, **inputs: str) -> dict[str, Any]:
    """Return a plate that is heated on one side, declared to have one temperature."""
    constants = {"mass": "10.0 kg", "specific_heat": "0.500 kJ/(kg·K)"}
    return {
        "id": "plate",
        "bodies": {"plate": {"substance": "Plate", "model": "constant specific heat", "inputs": constants}},
        "states": {
            "cold": {"plate": {"inputs": {"temperature": "20.0 °C"}}},
            "hot": {"plate": {"inputs": {"temperature": "80.0 °C"}}},
        },
        "processes": [{"id": "heating", "from": "cold", "to": "hot", "inputs": {"duration": duration}}],
        "assumptions": [{"id": "one", "text": "uniform temperature", "inputs": {**STEEL, **inputs}}],
    }


def test_a_small_biot_number_leaves_five_per_cent_within_the_wall() -> None:
    """Bi = 0.1 has ζ₁ = 0.3111: the surface is then at cos ζ₁ = 0.952 of the excess of the centre."""
    found = biot_number(case(plate("60.0 s", heat_transfer_coefficient="250 W/(m²·K)")), "one")
    assert found == pytest.approx(0.1, rel=1e-9)
    assert 0.3111 * math.tan(0.3111) == pytest.approx(found, rel=1e-3)
    assert math.cos(0.3111) == pytest.approx(0.952, abs=1e-3)


@pytest.mark.parametrize(("seconds", "spread"), [(31.2, 0.4998), (62.4, 0.25), (312.0, 0.05)])
def test_heat_has_spread_once_the_fourier_number_is_one(seconds: float, spread: float) -> None:
    """Under a constant flux surface and core differ by q·L/(2λ), the mean rises by q·t/(ρ·c·L): 1/(2·Fo) of it.

    The remaining transient of the series, −(2/π²)·Σ…, is below 10⁻⁴ of q·L/λ for Fo ≥ 1.
    """
    found = spreading(case(plate(f"{seconds} s")), "one")
    assert found is not None
    assert found.needed == pytest.approx(0.02**2 * 7800.0 * 500.0 / 50.0, rel=1e-9)
    series = sum(
        (-1.0) ** (n + 1) / n**2 * 2.0 / math.pi**2 * math.exp(-((n * math.pi) ** 2) * found.fourier)
        for n in range(1, 30)
    )
    core = -1.0 / 6.0 + series
    surface = 1.0 / 3.0 - sum(
        2.0 / (n * math.pi) ** 2 * math.exp(-((n * math.pi) ** 2) * found.fourier) for n in range(1, 30)
    )
    assert (surface - core) / found.fourier == pytest.approx(spread, abs=1e-3)


def test_the_time_of_a_brick_is_hours_and_that_of_a_copper_foil_is_microseconds() -> None:
    """L²/α by handbook diffusivities: 0.1 m of brick at 5.2e-7 m²/s, 35 µm of copper at 1.17e-4 m²/s, within 3 %."""
    assert diffusion_time(0.1, 0.72, 1650.0, 840.0) == pytest.approx(0.1**2 / 5.2e-7, rel=0.03)
    assert diffusion_time(35e-6, 401.0, 8933.0, 385.0) == pytest.approx((35e-6) ** 2 / 1.17e-4, rel=0.03)


@pytest.mark.parametrize(
    ("kelvin", "pressure", "sound"),
    [(300.0, 3e6, 1507.73921), (300.0, 80e6, 1634.69054), (500.0, 3e6, 1240.71337)],
)
def test_sound_in_water_is_that_of_the_verification_table(
    kelvin: float, pressure: float, sound: float
) -> None:
    """IAPWS-IF97 region 1, table 5, within 0.1 % (another formulation than the one behind it)."""
    water = twin("Water", REAL)
    assert water is not None
    state = water.state({"temperature": kelvin, "pressure": pressure})
    found = speed_of_sound(water, state.specific_entropy, state.specific_volume or 0.0)
    assert found == pytest.approx(sound, rel=1e-3)


@pytest.mark.parametrize(
    ("gas", "sound"), [("Air", 331.4), ("Helium", 972.9), ("Argon", 307.8), ("Hydrogen", 1261.0)]
)
def test_sound_in_gases_at_the_ice_point_is_that_of_handbooks(gas: str, sound: float) -> None:
    """Air 331.4, helium 972.9, argon 307.8, hydrogen 1261 m/s at 0 °C and 1 atm as ideal gases, within 0.5 %."""
    model = make_substance(gas, IDEAL, {})
    state = model.state({"temperature": 273.15, "pressure": 101325.0})
    found = speed_of_sound(model, state.specific_entropy, state.specific_volume or 0.0)
    assert found == pytest.approx(sound, rel=5e-3)


def test_a_piston_at_a_tenth_of_the_sound_is_crossed_ten_times() -> None:
    """Mean piston speed over speed of sound is the reciprocal of the crossings: 34.7 m/s in air at 300 K."""
    record = plate("10.00 ms")
    record["bodies"]["plate"] = {"substance": "Air", "model": "ideal gas", "inputs": {"mass": "1.000 kg"}}
    record["states"]["cold"]["plate"]["inputs"] = {"temperature": "300.0 K", "pressure": "1.000 bar"}
    record["states"]["hot"]["plate"]["inputs"] = {"pressure": "2.000 bar"}
    record["processes"][0]["path"] = "isothermal"
    record["assumptions"] = [
        {"id": "slow", "text": "quasi-equilibrium", "inputs": {"characteristic_length": "0.3472 m"}}
    ]
    (found,) = paces(case(record), "slow")
    assert found.sound == pytest.approx(347.2, rel=2e-3)
    assert found.crossings == pytest.approx(10.0, rel=2e-3)


def gas(
    substance: str, model: str, first: dict[str, str], last: dict[str, str], path: str, **body: str
) -> Any:
    """Return the case of one kilogram of gas."""
    return case(
        {
            "id": "gas",
            "bodies": {
                "gas": {"substance": substance, "model": model, "inputs": {"mass": "1.000 kg", **body}}
            },
            "states": {"first": {"gas": {"inputs": first}}, "last": {"gas": {"inputs": last}}},
            "processes": [{"id": "change", "from": "first", "to": "last", "path": path}],
        }
    )


@pytest.mark.parametrize(("pressure", "end"), [("1000 kPa", 574.1), ("2000 kPa", 692.8)])
def test_air_compressed_again_with_its_own_heat_ends_where_the_gas_tables_say(
    pressure: str, end: float
) -> None:
    """From 300 K with p_r = 1.386 to p_r = 13.86 and 27.72, where a constant κ of 1.4 would give 579 K and 706 K.

    The tables have p_r = 13.50 at 570 K, 14.38 at 580 K, 27.29 at 690 K and 28.80 at 700 K.
    """
    constants = {"cv": "0.7175 kJ/(kg·K)", "gas_constant": "0.2870 kJ/(kg·K)"}
    first = {"temperature": "300.0 K", "pressure": "100.0 kPa"}
    found = gas("Air", "constant specific heat", first, {"pressure": pressure}, "isentropic", **constants)
    again = redone(found, "gas", IDEAL)
    assert again["states/last/gas/temperature"] == pytest.approx(end, abs=0.8)


def test_nitrogen_expanded_again_gains_what_its_virial_coefficient_says() -> None:
    """ΔU = T·(dB/dT)·p to first order: 300 K · 0.19 cm³/(mol·K) · 10 bar = 57 J/mol = 2.0 kJ/kg, within 5 %."""
    found = gas(
        "Nitrogen",
        "ideal gas",
        {"temperature": "300.0 K", "pressure": "10.01 bar"},
        {"temperature": "300.0 K", "pressure": "0.01 bar"},
        "isothermal",
    )
    assert found.value("processes/change/internal_energy_change") == pytest.approx(0.0, abs=1e-3)
    again = redone(found, "gas", REAL)
    expected = 300.0 * 0.19e-6 * 10e5 / 28.0134e-3
    assert again["processes/change/internal_energy_change"] == pytest.approx(expected, rel=0.05)
