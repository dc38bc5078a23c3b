"""Moist air against psychrometric tables and two formulations that share nothing with ours but steam."""

from __future__ import annotations

import psychrolib
import pytest
from CoolProp.HumidAirProp import HAPropsSI

from checker.substances import PropertyState, make_substance
from checker.substances.moist_air import MoistAir
from checker.substances.moist_content import water_content_at_pressure
from checker.substances.moist_gas import cross_virial
from checker.substances.moist_water import sublimation_pressure

pytestmark = pytest.mark.published

ATMOSPHERE = 101325.0
TABLE = {
    # °C: (W_s, h_s [kJ/kg of dry air], v_s [m³/kg of dry air]); ASHRAE Handbook Fundamentals, thermodynamic
    # properties of moist air at 101.325 kPa (from memory)
    -10.0: (0.0016062, -6.072, 0.7469),
    0.0: (0.0037895, 9.475, 0.7780),
    10.0: (0.007661, 29.352, 0.8116),
    20.0: (0.014758, 57.555, 0.8498),
    25.0: (0.020170, 76.500, 0.8717),
    30.0: (0.027329, 100.006, 0.8962),
    40.0: (0.049141, 166.683, 0.9568),
    50.0: (0.086858, 275.345, 1.0425),
    60.0: (0.15354, 460.863, 1.1747),
}


def saturated(model: str, celsius: float, pressure: float = ATMOSPHERE) -> tuple[float, PropertyState]:
    """Return the water content of saturated moist air, and its state."""
    content = water_content_at_pressure(model, celsius + 273.15, pressure, 1.0)
    air = make_substance("moist air", model, {"water_content": content})
    return content, air.state({"temperature": celsius + 273.15, "pressure": pressure})


@pytest.mark.parametrize("celsius", TABLE)
def test_the_real_model_meets_the_table_of_saturated_moist_air(celsius: float) -> None:
    """W_s within 0.04 % (the table has an older vapour pressure), h within 0.05 kJ/kg, v within 0.06 %."""
    content, state = saturated("real fluid", celsius)
    ratio, enthalpy, volume = TABLE[celsius]
    assert content == pytest.approx(ratio, rel=4e-4)
    assert state.specific_enthalpy * (1.0 + content) / 1e3 == pytest.approx(enthalpy, abs=0.05)
    assert state.specific_volume * (1.0 + content) == pytest.approx(volume, rel=6e-4)


@pytest.mark.parametrize("celsius", TABLE)
def test_the_ideal_model_is_half_a_per_cent_below_the_table(celsius: float) -> None:
    """Without the enhancement factor W_s is 0.1 to 0.5 % low at 1 atm; h follows within 0.8 kJ/kg."""
    content, state = saturated("ideal gas", celsius)
    ratio, enthalpy, volume = TABLE[celsius]
    assert -5e-3 < content / ratio - 1.0 < -1e-3
    assert state.specific_enthalpy * (1.0 + content) / 1e3 == pytest.approx(enthalpy, abs=0.8)
    assert state.specific_volume * (1.0 + content) == pytest.approx(volume, rel=8e-4)


@pytest.mark.parametrize("pressure", [0.7e5, ATMOSPHERE, 5e5, 1e6, 2e6])
@pytest.mark.parametrize("celsius", [-20.0, 5.0, 25.0, 45.0, 65.0])
def test_the_real_model_meets_the_virial_formulation(celsius: float, pressure: float) -> None:
    """RP-1485 as a second library has it: W_s, v within 0.02 %, h within 0.05 kJ/kg, relative humidity within 0.002.

    Our model leaves out the third virial coefficients, about 1.5·c²·C_aaw = 0.1 % of W_s at 2 MPa. Relative humidity is
    a ratio of pressures here and one of mole fractions there.
    """
    kelvin = celsius + 273.15
    content, _ = saturated("real fluid", celsius, pressure)
    other = HAPropsSI("W", "T", kelvin, "P", pressure, "R", 1.0)
    assert content == pytest.approx(other, rel=3e-4 + 1.2e-3 * (pressure / 2e6) ** 2)
    half = 0.5 * other
    air = make_substance("moist air", "real fluid", {"water_content": half})
    state = air.state({"temperature": kelvin, "pressure": pressure})
    volume, enthalpy = (HAPropsSI(name, "T", kelvin, "P", pressure, "W", half) for name in "VH")
    assert state.specific_volume * (1.0 + half) == pytest.approx(volume, rel=2e-4)
    assert state.specific_enthalpy * (1.0 + half) == pytest.approx(enthalpy, abs=50.0)
    humidity = HAPropsSI("R", "T", kelvin, "P", pressure, "W", half)
    assert state.relative_humidity == pytest.approx(humidity, abs=2e-3)


def test_entropy_differs_from_the_virial_formulation_where_that_contradicts_itself() -> None:
    """T ds = dh at constant p holds for ours to 1e-6; the second library's entropy misses its own enthalpy by 1 %.

    So its entropies are compared where they agree with themselves (cool air), and not at 394 K.
    """
    kelvin, pressure, content, step = 394.0, 3e5, 0.69, 0.05
    air = make_substance("moist air", "real fluid", {"water_content": content})
    ours = [air.state({"temperature": kelvin + d, "pressure": pressure}) for d in (-step, step)]
    heat = ours[1].specific_enthalpy - ours[0].specific_enthalpy
    assert kelvin * (ours[1].specific_entropy - ours[0].specific_entropy) == pytest.approx(heat, rel=1e-6)
    theirs = {
        name: HAPropsSI(name, "T", kelvin + step, "P", pressure, "W", content)
        - HAPropsSI(name, "T", kelvin - step, "P", pressure, "W", content)
        for name in "HS"
    }
    assert kelvin * theirs["S"] / theirs["H"] - 1.0 < -0.01
    for celsius in (0.0, 20.0):
        half = 0.5 * water_content_at_pressure("real fluid", celsius + 273.15, ATMOSPHERE, 1.0)
        cool = make_substance("moist air", "real fluid", {"water_content": half})
        state = cool.state({"temperature": celsius + 273.15, "pressure": ATMOSPHERE})
        other = HAPropsSI("S", "T", celsius + 273.15, "P", ATMOSPHERE, "W", half)
        assert state.specific_entropy * (1.0 + half) == pytest.approx(other, abs=0.03)


@pytest.mark.parametrize("humidity", [0.2, 0.5, 0.9])
@pytest.mark.parametrize("celsius", [-15.0, 5.0, 25.0, 45.0])
def test_the_ideal_model_meets_the_perfect_gas_relations(celsius: float, humidity: float) -> None:
    """W within 0.4 % of the perfect-gas relations with Hyland and Wexler's vapour pressure, h within 0.4 kJ/kg."""
    psychrolib.SetUnitSystem(psychrolib.SI)
    content = water_content_at_pressure("ideal gas", celsius + 273.15, ATMOSPHERE, humidity)
    assert content == pytest.approx(psychrolib.GetHumRatioFromRelHum(celsius, humidity, ATMOSPHERE), rel=4e-3)
    air = make_substance("moist air", "ideal gas", {"water_content": content})
    state = air.state({"temperature": celsius + 273.15, "pressure": ATMOSPHERE})
    enthalpy = psychrolib.GetMoistAirEnthalpy(celsius, content)
    assert state.specific_enthalpy * (1.0 + content) == pytest.approx(enthalpy, abs=400.0)
    volume = psychrolib.GetMoistAirVolume(celsius, content, ATMOSPHERE)
    assert state.specific_volume * (1.0 + content) == pytest.approx(volume, rel=1e-3)


def test_vapour_over_ice_has_the_released_pressure() -> None:
    """8.94735 Pa at 230 K: the check value of IAPWS R14-08(2011)."""
    assert sublimation_pressure(230.0) == pytest.approx(8.94735, abs=5e-6)


@pytest.mark.parametrize("kelvin", [260.0, 300.0, 400.0, 500.0])
def test_the_cross_virial_coefficient_is_that_of_a_second_implementation(kelvin: float) -> None:
    """B_aw of Harvey and Huang and its slope, as the second library evaluates them."""
    from CoolProp.HumidAirProp import HAProps_Aux

    ours = cross_virial(kelvin)
    theirs = tuple(HAProps_Aux(name, kelvin, ATMOSPHERE, 0.01)[0] for name in ("Baw", "dBaw"))
    assert ours == pytest.approx(theirs, rel=1e-9)


def test_an_autoclave_with_air_and_steam_has_the_sum_of_their_pressures() -> None:
    """At 121 °C saturated steam has 2.05 bar (steam tables); 1 bar of air at 20 °C adds 1.345 bar by p = m·R·T/V."""
    air = make_substance("moist air", "ideal gas", {"water_content": 5.0})
    cold = air.state({"temperature": 293.15, "pressure": 1e5 + 2339.0})
    hot = air.state({"temperature": 394.15, "specific_volume": cold.specific_volume})
    # 2.05046 bar at 121 °C from memory; the volume of the condensate is below 1 % of the vessel.
    assert hot.pressure == pytest.approx(2.0505e5 + 1e5 * 394.15 / 293.15, rel=1e-3)
    assert hot.relative_humidity == 1.0


@pytest.mark.parametrize(("celsius", "humidity"), [(30.0, 0.45), (20.0, 0.6), (45.0, 0.9), (60.0, 0.2)])
def test_the_dew_point_at_constant_pressure_is_that_of_the_perfect_gas_relations(
    celsius: float, humidity: float
) -> None:
    """Within 0.05 K of Hyland and Wexler's vapour pressure."""
    psychrolib.SetUnitSystem(psychrolib.SI)
    content = water_content_at_pressure("ideal gas", celsius + 273.15, ATMOSPHERE, humidity)
    dew = MoistAir("ideal gas", content).temperature_of_humidity("pressure", ATMOSPHERE, 1.0)
    assert dew - 273.15 == pytest.approx(psychrolib.GetTDewPointFromRelHum(celsius, humidity), abs=0.05)
