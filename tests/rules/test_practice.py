"""Practice checks on whole packages: what is asked, what a limit answers, and what must not be accused."""

from __future__ import annotations

from typing import Any

import pytest

from checker import Grade, review
from checker.findings import Finding
from tests.checker.cases import gas_bottle, package

MODELS = ("ideal-gas-too-dense", "constant-specific-heat-over-wide-span", "ideal-gas-condenses")


def vessel(
    substance: str, body: dict[str, str], cold: dict[str, str], hot: dict[str, str], **more: Any
) -> dict[str, Any]:
    """Return a record: a real fluid that goes from cold to hot in a closed vessel."""
    model = more.pop("model", "real fluid")
    return {
        "id": "vessel",
        "bodies": {"fluid": {"substance": substance, "model": model, "inputs": body}},
        "states": {"cold": {"fluid": {"inputs": cold}}, "hot": {"fluid": {"inputs": hot}}},
        "processes": [
            {"id": "warming", "from": "cold", "to": "hot", "path": more.pop("path", "constant volume")}
        ],
        **more,
    }


def limit(name: str, at_most: str, state: str = "hot", claim: str = "met") -> dict[str, str]:
    """Return a limit on a property of the fluid."""
    quantity = f"states/{state}/fluid/{name}"
    return {
        "id": f"highest-{name}",
        "quantity": quantity,
        "at_most": at_most,
        "claim": claim,
        "basis": "plate",
    }


def found(record: dict[str, Any], *rules: str) -> list[Finding]:
    """Return the findings of some rules about a record."""
    return [f for f in review(package(record)).findings if f.rule in rules]


def pipe(**more: Any) -> dict[str, Any]:
    """Return water blocked in between two valves at 5 bar and warmed from 20 °C to 40 °C."""
    cold = {"temperature": "20.0 °C", "pressure": "5.00 bar"}
    return vessel("Water", {"volume": "10.0 L"}, cold, {"temperature": "40.0 °C"}, **more)


def test_a_blocked_in_liquid_is_asked_about_with_its_pressure_rise():
    """Water from 20 °C to 40 °C goes to about 135 bar, some 6.5 bar for every kelvin."""
    (asked,) = found(pipe(), "liquid-full-at-constant-volume")
    assert asked.grade is Grade.QUERY
    assert asked.quantity == "processes/warming"
    assert "is a liquid in a closed volume" in asked.message
    assert "for every kelvin" in asked.message


@pytest.mark.parametrize(("at_most", "exceeded"), [("200 bar", []), ("40 bar", ["limit-exceeded"])])
def test_a_pressure_limit_answers_for_a_blocked_in_liquid(at_most, exceeded):
    """Where a limit holds the pressure, only the rules for limits speak."""
    record = pipe(limits=[limit("pressure", at_most)])
    rules = ("liquid-full-at-constant-volume", "limit-exceeded")
    assert [f.rule for f in found(record, *rules)] == exceeded


def test_a_limit_that_stands_on_another_state_is_held_against_the_warmest():
    """A working pressure stated for the cold state does not hide what the hot one does."""
    record = pipe(limits=[limit("pressure", "40 bar", state="cold")])
    (asked,) = found(record, "liquid-full-at-constant-volume", "limit-exceeded")
    assert asked.rule == "liquid-full-at-constant-volume"
    assert asked.message.endswith("The limit is 40 bar.")
    assert not found(pipe(limits=[limit("pressure", "200 bar", state="cold")]), asked.rule)


def test_a_vessel_that_fills_on_the_way_is_asked_about():
    """R134a at 1.15 kg/L: full from about 37 °C on, far above its vapour pressure at 55 °C."""
    record = vessel(
        "R134a",
        {"volume": "10.00 L", "mass": "11.50 kg"},
        {"temperature": "15.0 °C"},
        {"temperature": "55.0 °C"},
    )
    (asked,) = found(record, "liquid-full-at-constant-volume", "vapour-space-too-small")
    assert asked.rule == "liquid-full-at-constant-volume"
    assert "fills its closed volume from" in asked.message


@pytest.mark.parametrize(
    ("substance", "body", "cold", "hot"),
    [
        ("Water", {"volume": "10.0 L"}, {"temperature": "40.0 °C", "pressure": "150 bar"}, "20.0 °C"),
        ("Nitrogen", {"volume": "50.0 L"}, {"temperature": "15.0 °C", "pressure": "200 bar"}, "60.0 °C"),
        ("CarbonDioxide", {"volume": "50.0 L"}, {"temperature": "40.0 °C", "pressure": "150 bar"}, "60.0 °C"),
        ("Water", {"volume": "10.0 L"}, {"temperature": "120.0 °C", "quality": "0.30"}, "150.0 °C"),
        ("Propane", {"volume": "27.0 L", "mass": "11.0 kg"}, {"temperature": "15.0 °C"}, "40.0 °C"),
    ],
    ids=["liquid that cools", "compressed gas", "supercritical", "wet steam", "propane bottle"],
)
def test_what_is_not_blocked_in_is_not_accused(substance, body, cold, hot):
    """A cooling liquid, a gas, and vessels that keep a vapour space raise nothing."""
    record = vessel(substance, body, cold, {"temperature": hot})
    assert not found(record, "liquid-full-at-constant-volume", "vapour-space-too-small")


@pytest.mark.parametrize(("at_most", "count"), [("400 bar", 0), ("50 bar", 1)])
def test_a_model_without_pressure_is_held_against_a_limit(at_most, count):
    """A liquid of constant specific heat leaves its pressure out; that of the real fluid is held against the limit."""
    body = {"mass": "10.00 kg", "specific_heat": "4.18 kJ/(kg·K)", "density": "998 kg/m³"}
    warm = {"temperature": "40.0 °C", "pressure": "3.0 bar"}
    cold = {"temperature": "20.0 °C", "pressure": "3.0 bar"}
    record = vessel("Water", body, cold, warm, model="constant specific heat")
    record["limits"] = [limit("pressure", at_most)]
    assert len(found(record, "liquid-full-at-constant-volume")) == count


def test_a_full_vessel_within_its_pressure_limit_is_not_asked_about():
    """460 kg of propane in 1000 L are full at 44 °C; a limit above the pressure at 50 °C answers for it."""
    body, cold, hot = {"volume": "1000 L", "mass": "460.0 kg"}, "15.0 °C", "40.0 °C"
    record = vessel("Propane", body, {"temperature": cold}, {"temperature": hot})
    record["limits"] = [limit("temperature", "50 °C")]
    assert [f.grade for f in found(record, "vapour-space-too-small")] == [Grade.QUERY]
    record["limits"].append(limit("pressure", "150 bar"))
    assert not found(record, "vapour-space-too-small")


def test_a_small_vapour_space_is_noted():
    """At 98.4 % full in the warmest state the message gives every filling and the temperature of a full vessel."""
    body = {"volume": "1000 L", "mass": "460.0 kg"}
    record = vessel("Propane", body, {"temperature": "15.0 °C"}, {"temperature": "40.0 °C"})
    (noted,) = found(record, "vapour-space-too-small")
    assert noted.grade is Grade.REMARK
    assert "90.6 % of the vessel at 15 °C and 98.4 % at 40 °C" in noted.message


@pytest.mark.parametrize(
    ("path", "cold", "pressure", "end"),
    [
        ("constant volume", "20.0 °C", "1.000 bar", {"temperature": "200.0 °C"}),
        ("constant volume", "20.0 °C", "6.000 bar", {"temperature": "200.0 °C"}),
        ("constant volume", "200.0 °C", "10.00 bar", {"temperature": "20.0 °C"}),
        ("constant pressure", "20.0 °C", "10.00 bar", {"temperature": "200.0 °C"}),
        ("isothermal", "20.0 °C", "1.000 bar", {"pressure": "10.00 bar"}),
        ("isothermal", "20.0 °C", "10.00 bar", {"pressure": "1.000 bar"}),
        ("isothermal", "200.0 °C", "1.000 bar", {"pressure": "10.00 bar"}),
        ("isentropic", "20.0 °C", "1.000 bar", {"pressure": "5.000 bar"}),
        ("isentropic", "200.0 °C", "10.00 bar", {"pressure": "2.000 bar"}),
    ],
)
def test_air_of_ordinary_plant_is_an_ideal_gas(path, cold, pressure, end):
    """Air between 1 bar and 10 bar, 20 °C and 200 °C, is not accused, whatever is claimed of it."""
    inputs = {"temperature": cold, "pressure": pressure}
    record = vessel("Air", {"mass": "1.000 kg"}, inputs, end, model="ideal gas", path=path)
    record["states"]["hot"]["fluid"]["results"] = {"temperature": "1 K", "specific_volume": "1 m³/kg"}
    names = ("heat", "boundary_work", "internal_energy_change")
    record["processes"][0]["results"] = {**dict.fromkeys(names, "1 kJ"), "entropy_change": "1 kJ/K"}
    assert not found(record, *MODELS)


def test_one_finding_tells_what_a_dense_gas_costs_the_results():
    """Nitrogen at 200 bar: one finding for the body, with the pressure as a real fluid and as an ideal gas."""
    record = vessel(
        "Nitrogen",
        {"volume": "50.0 L"},
        {"temperature": "15.0 °C", "pressure": "200.0 bar"},
        {"temperature": "60.0 °C"},
        model="ideal gas",
    )
    record["states"]["hot"]["fluid"]["results"] = {"pressure": "231.2 bar"}
    (told,) = found(record, *MODELS)
    assert told.grade is Grade.DISCREPANCY
    assert "pressure of fluid in state hot 244.4 bar instead of 231.2" in told.message.replace(
        "244.39", "244.4"
    )


def test_a_dense_gas_that_moves_no_result_is_not_accused():
    """Of nitrogen at 30 bar only ΔT between two given temperatures is claimed, which no model moves."""
    record = vessel(
        "Nitrogen",
        {"volume": "50.0 L"},
        {"temperature": "15.0 °C", "pressure": "30.00 bar"},
        {"temperature": "60.0 °C"},
        model="ideal gas",
    )
    record["processes"][0]["results"] = {"temperature_change": "45.0 K"}
    assert not found(record, *MODELS)


def wall(**inputs: str) -> dict[str, Any]:
    """Return the helium bottle with a neglected wall."""
    text = {"id": "wall", "text": "wall heat capacity negligible", "inputs": inputs}
    return gas_bottle({"heat": "31.16 kJ"}, assumptions=[text])


def test_a_neglected_wall_is_told_in_the_heat():
    """0.2 kg of steel that follow the helium by 100 K take up 9.2 kJ: 40.36 kJ and not 31.16 kJ are needed."""
    (told,) = found(wall(mass="0.200 kg", specific_heat="0.460 kJ/(kg·K)"), "wall-not-negligible")
    assert "With the wall the heat of warming is 40.36 kJ instead of 31.16 kJ." in told.message


def test_a_neglected_wall_is_told_in_the_end_temperature():
    """31.16 kJ into helium and wall: 100 K · 311.6/(311.6 + 92) = 77.2 K, so 377.2 K and not 400 K."""
    record = wall(mass="0.200 kg", specific_heat="0.460 kJ/(kg·K)")
    record["states"]["hot"]["gas"] = {"inputs": {}, "results": {"temperature": "400.0 K"}}
    record["processes"][0]["heat_transfers"][0]["inputs"] = {"energy": "31.16 kJ"}
    record["processes"][0]["results"] = {}
    (told,) = found(record, "wall-not-negligible")
    assert "temperature of gas in state hot is 377.2" in told.message.replace("377.21", "377.2")


@pytest.mark.parametrize(("pressure", "count"), [("200.0 kPa", 0), ("150.0 kPa", 1)])
def test_a_constant_pressure_outside_is_quasi_static_where_both_ends_have_it(pressure, count):
    """Against 200 kPa from 200 kPa to 200 kPa the piston moves slowly; to an end at 150 kPa it does not."""
    path = {"kind": "against constant external pressure", "external_pressure": "200.0 kPa"}
    body = {"mass": "1.000 kg", "cv": "0.720 kJ/(kg·K)", "gas_constant": "0.290 kJ/(kg·K)"}
    cold, hot = (
        {"temperature": "300.0 K", "pressure": "200.0 kPa"},
        {"temperature": "400.0 K", "pressure": pressure},
    )
    record = vessel("Purge gas", body, cold, hot, model="constant specific heat", path=path)
    record["assumptions"] = [{"id": "a", "text": "quasi-equilibrium"}]
    assert len(found(record, "not-quasi-static")) == count


@pytest.mark.parametrize(("hot", "count"), [("300.0 °C", 1), ("200.0 °C", 0)])
def test_a_metal_that_melts_needs_its_latent_heat(hot, count):
    """Tin melts at 231.9 °C: a constant specific heat from 20 °C to 300 °C leaves 60 kJ/kg out."""
    body = {"mass": "1.000 kg", "specific_heat": "0.240 kJ/(kg·K)"}
    record = vessel(
        "Tin", body, {"temperature": "20.0 °C"}, {"temperature": hot}, model="constant specific heat"
    )
    del record["processes"][0]["path"]
    assert len(found(record, "latent-heat-left-out")) == count


@pytest.mark.parametrize(
    ("claim", "formula"),
    [("119.6 °C", "T₁ + Q/(m·c of the liquid)"), ("99.61 °C", None), ("150.0 °C", None)],
)
def test_an_end_temperature_of_liquid_alone_is_told(claim, formula):
    """416.5 kJ warm 1 kg of water from 20 °C to 119.6 °C if it does not boil; at 1 bar it boils at 99.6 °C."""
    record = vessel(
        "Water",
        {"mass": "1.000 kg"},
        {"temperature": "20.0 °C", "pressure": "1.000 bar"},
        {},
        path="constant pressure",
    )
    record["states"]["hot"]["fluid"]["results"] = {"temperature": claim}
    record["processes"][0]["inputs"] = {"heat": "416.5 kJ"}
    told = found(record, "calculated-as-one-phase")
    assert [formula in f.message for f in told if formula] == ([True] if formula else [])
    assert len(told) == (formula is not None)


def test_a_vapour_pressure_by_the_gas_law_is_told():
    """Steam that condenses in a closed drum follows its saturation line, not p₁·T₂/T₁."""
    cold = {"temperature": "60.0 °C"}
    first = {"temperature": "160.0 °C", "pressure": "5.000 bar"}
    record = vessel("Water", {"volume": "1.000 m³"}, first, cold)
    record["states"]["hot"]["fluid"]["results"] = {"pressure": "3.846 bar"}
    (told,) = found(record, "calculated-as-one-phase")
    assert "p₁·T₂/T₁" in told.message


def test_a_gas_whose_factor_happens_to_be_one_is_still_dense():
    """Nitrogen at 105 bar and 20 °C has Z of about 1 and lets go of 20 kJ/kg of attraction when it expands freely."""
    record = vessel(
        "Nitrogen",
        {"mass": "1.000 kg"},
        {"temperature": "20.0 °C", "pressure": "105.0 bar"},
        {"temperature": "20.0 °C", "pressure": "1.000 bar"},
        model="ideal gas",
        path="end states only",
    )
    record["processes"][0]["results"] = {"internal_energy_change": "0.00 kJ", "entropy_change": "1.381 kJ/K"}
    (told,) = found(record, *MODELS)
    assert "at half the pressure of state cold" in told.message
    assert told.grade is Grade.QUERY


@pytest.mark.parametrize(
    ("temperature", "pressure", "count"),
    [
        ("308.0 K", "80.0 bar", 1),
        ("308.0 K", "82.0 bar", 0),
        ("300.0 K", "68.0 bar", 1),
        ("295.0 K", "61.0 bar", 0),
    ],
)
def test_the_critical_region_ends_at_two_per_cent_and_ten_per_cent(temperature, pressure, count):
    """Carbon dioxide, T_c = 304.13 K and p_c = 73.77 bar: both have to be close."""
    inputs = {"temperature": temperature, "pressure": pressure}
    record = vessel("CarbonDioxide", {"mass": "1.000 kg"}, inputs, {"temperature": "350 K"})
    assert len(found(record, "near-critical")) == count


@pytest.mark.parametrize(("last", "count"), [("-5.0 °C", 1), ("5.0 °C", 0)])
def test_real_water_that_would_freeze_is_asked_about(last, count):
    """At 1 bar water is ice below 0 °C, where the equation of the fluid ends."""
    first = {"temperature": "20.0 °C", "pressure": "1.000 bar"}
    record = vessel("Water", {"mass": "1.000 kg"}, first, {"temperature": last}, path="constant pressure")
    record["processes"][0]["results"] = {"heat": "-100 kJ"}
    assert len(found(record, "outside-range")) == count
