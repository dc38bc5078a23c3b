"""Several bodies and closed cycles against closed forms and against calculations with other libraries.

Closed forms are derived beside each check from the balances of energy and entropy, for constant specific heats c and
ideal gases with constant c_v and R. Nitrogen and steam are calculated anew with Cantera (NASA Glenn polynomials for the
ideal gas, the Reynolds equation for the real one) and with ``iapws`` (IAPWS-IF97), solved by SciPy here.
"""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from typing import Any

import pytest
from iapws import IAPWS97
from scipy.optimize import brentq

from tests.published.processes.calculation import Calculated, calculated, quantities

pytestmark = pytest.mark.published

CV, R = 720.0, 290.0
K = (CV + R) / CV
EXACT = 1e-7


def solid(mass: float, heat: float) -> dict[str, Any]:
    """Return a body of constant specific heat."""
    inputs = quantities(mass=mass, specific_heat=heat)
    return {"substance": "Block", "model": "constant specific heat", "inputs": inputs}


def gas(mass: float) -> dict[str, Any]:
    """Return an ideal gas with constant specific heats."""
    inputs = quantities(mass=mass, specific_heat_at_constant_volume=CV, gas_constant=R)
    return {"substance": "Purge gas", "model": "constant specific heat", "inputs": inputs}


def meet(
    bodies: Mapping[str, Any],
    first: Mapping[str, Mapping[str, float]],
    last: Mapping[str, Mapping[str, float]] | None = None,
    **members: Any,
) -> Calculated:
    """Return the independent values of one process of several bodies; temperatures at the end are claimed."""
    claim = quantities(temperature=1.0)
    end = {
        name: {"inputs": quantities(**last[name])} if last and name in last else {"results": claim}
        for name in bodies
    }
    process = {
        "id": "change",
        "from": "first",
        "to": "last",
        "work_transfers": [],
        "results": quantities(entropy_change=1.0, internal_energy_change=1.0),
        **members,
    }
    record = {
        "id": "case",
        "bodies": bodies,
        "states": {"first": {name: {"inputs": quantities(**first[name])} for name in bodies}, "last": end},
        "processes": [process],
    }
    return calculated(record)


def at_end(found: Calculated, body: str, name: str) -> float:
    """Return a property of a body at the end. [SI]"""
    return found.value(f"states/last/{body}/{name}")


THERMAL: dict[str, Any] = {"equilibrium": ["temperature"], "insulated": True}
OPEN: dict[str, Any] = {
    "equilibrium": ["temperature", "pressure"],
    "total_volume": {"bodies": ["left", "right"]},
}


def test_mixing_temperature_and_entropy_of_two_bodies():
    """T = ΣC·T/ΣC and ΔS = ΣC·ln(T/T_i)."""
    bodies = {"block": solid(10.0, 500.0), "bath": solid(100.0, 2000.0)}
    found = meet(bodies, {"block": {"temperature": 900.0}, "bath": {"temperature": 300.0}}, **THERMAL)
    end = (5e3 * 900.0 + 2e5 * 300.0) / 2.05e5
    assert at_end(found, "block", "temperature") == pytest.approx(end, rel=EXACT)
    entropy = 5e3 * math.log(end / 900.0) + 2e5 * math.log(end / 300.0)
    assert found.process("entropy_change") == pytest.approx(entropy, rel=EXACT)


def test_quench_with_a_heater_in_the_bath():
    """Electrical work W raises the common temperature by W/ΣC."""
    bodies = {"block": solid(4.0, 900.0), "bath": solid(30.0, 4000.0)}
    heater = [{"id": "heater", "kind": "electrical", "inputs": quantities(energy=-3e5)}]
    found = meet(
        bodies,
        {"block": {"temperature": 650.0}, "bath": {"temperature": 290.0}},
        **{**THERMAL, "work_transfers": heater},
    )
    end = (3600.0 * 650.0 + 1.2e5 * 290.0 + 3e5) / 1.236e5
    assert at_end(found, "bath", "temperature") == pytest.approx(end, rel=EXACT)


def test_the_first_temperature_of_a_block_from_the_bath_that_it_warmed():
    """The bath as calorimeter: T₁ = T + C_bath·(T − T_bath)/C."""
    bodies = {"block": solid(2.0, 450.0), "bath": solid(20.0, 4200.0)}
    claim = {"results": quantities(temperature=1.0)}
    record = {
        "id": "case",
        "bodies": bodies,
        "states": {
            "first": {"block": claim, "bath": {"inputs": quantities(temperature=290.0)}},
            "last": {"block": claim, "bath": {"inputs": quantities(temperature=294.0)}},
        },
        "processes": [
            {"id": "change", "from": "first", "to": "last", "work_transfers": [], **THERMAL},
        ],
    }
    found = calculated(record).value("states/first/block/temperature")
    assert found == pytest.approx(294.0 + 84e3 * 4.0 / 900.0, rel=EXACT)


def test_adiabatic_equalisation_of_two_vessels():
    """T = Σm·T/Σm, p = Σm·R·T/V and ΔS by each parcel's T and v."""
    bodies = {"left": gas(1.0), "right": gas(2.0)}
    first = {
        "left": {"temperature": 300.0, "pressure": 5e5},
        "right": {"temperature": 400.0, "pressure": 1e5},
    }
    found = meet(bodies, first, **OPEN, insulated=True)
    end, volume = 1100.0 / 3.0, R * (300.0 / 5e5 + 2.0 * 400.0 / 1e5)
    assert at_end(found, "left", "temperature") == pytest.approx(end, rel=EXACT)
    assert at_end(found, "right", "pressure") == pytest.approx(3.0 * R * end / volume, rel=EXACT)
    entropy = sum(
        m * (CV * math.log(end / t) + R * math.log(volume / 3.0 * p / (R * t)))
        for m, t, p in ((1.0, 300.0, 5e5), (2.0, 400.0, 1e5))
    )
    assert found.process("entropy_change") == pytest.approx(entropy, rel=EXACT)


def test_isothermal_equalisation_of_two_vessels():
    """At one temperature throughout p = Σp·V/V and ΔS = Σm·R·ln(p_i/p); no heat is needed."""
    first = {
        "left": {"temperature": 300.0, "pressure": 6e5},
        "right": {"temperature": 300.0, "pressure": 1e5},
    }
    bath = [{"id": "bath", **quantities(boundary_temperature=300.0), "results": quantities(energy=1.0)}]
    bodies = {"left": gas(1.0), "right": gas(1.0)}
    found = meet(bodies, first, {"left": {"temperature": 300.0}}, **OPEN, heat_transfers=bath)
    pressure = 2.0 / (1.0 / 6e5 + 1.0 / 1e5)
    assert at_end(found, "right", "pressure") == pytest.approx(pressure, rel=EXACT)
    assert found.process("heat") == pytest.approx(0.0, abs=1e-3)
    entropy = R * (math.log(6e5 / pressure) + math.log(1e5 / pressure))
    assert found.process("entropy_change") == pytest.approx(entropy, rel=EXACT)


def test_heated_gas_behind_a_piston_that_compresses_another_without_heat():
    """One side follows p·v^κ = constant; the heat is the gain of both, c_v·(T_a + T_b − 2·T₁)."""
    volume, pressure = R * 300.0 / 1e5, 2.5e5
    v_pushed = volume * (1e5 / pressure) ** (1.0 / K)
    ends = pressure * v_pushed / R, pressure * (2.0 * volume - v_pushed) / R
    heat = CV * (sum(ends) - 600.0)
    first = {name: {"temperature": 300.0, "pressure": 1e5} for name in ("left", "right")}
    coil = {"id": "coil", "body": "right", **quantities(boundary_temperature=1500.0)}
    found = meet(
        {"left": gas(1.0), "right": gas(1.0)},
        first,
        equilibrium=["pressure"],
        total_volume={"bodies": ["left", "right"]},
        path={"left": "isentropic"},
        heat_transfers=[{**coil, "inputs": quantities(energy=heat)}],
    )
    assert at_end(found, "left", "temperature") == pytest.approx(ends[0], rel=EXACT)
    assert at_end(found, "right", "temperature") == pytest.approx(ends[1], rel=EXACT)
    assert at_end(found, "right", "pressure") == pytest.approx(pressure, rel=EXACT)


def test_filling_an_empty_vessel_from_a_finite_one_in_parcels():
    """The parcel that stays follows p·v^κ = constant to half the pressure; the other one has the rest of the energy.

    1 kg at 300 K and 10 bar in parcels of 0.6 and 0.4 kg, let into twice its volume: no work leaves, so Σm·T and with
    it p·V stay, and p falls to the half.
    """
    first = {name: {"temperature": 300.0, "pressure": 1e6} for name in ("gone", "stays")}
    found = meet(
        {"gone": gas(0.4), "stays": gas(0.6)},
        first,
        {"stays": {"pressure": 5e5}},
        equilibrium=["pressure"],
        path={"stays": "isentropic"},
        insulated=True,
        inputs=quantities(work=0.0),
    )
    stays = 300.0 * 0.5 ** ((K - 1.0) / K)
    assert at_end(found, "stays", "temperature") == pytest.approx(stays, rel=EXACT)
    assert at_end(found, "gone", "temperature") == pytest.approx((300.0 - 0.6 * stays) / 0.4, rel=EXACT)


def test_most_work_between_two_finite_bodies():
    """A reversible machine between equal bodies leaves both at √(T₁·T₂) and yields C·(T₁ + T₂ − 2·√(T₁·T₂))."""
    end = math.sqrt(600.0 * 300.0)
    found = meet(
        {"hot": solid(10.0, 500.0), "cold": solid(10.0, 500.0)},
        {"hot": {"temperature": 600.0}, "cold": {"temperature": 300.0}},
        {"hot": {"temperature": end}, "cold": {"temperature": end}},
        heat_transfers=[],
        work_transfers=[{"id": "shaft", "kind": "shaft", "results": quantities(energy=1.0)}],
    )
    assert found.process("work") == pytest.approx(5e3 * (900.0 - 2.0 * end), rel=EXACT)
    assert found.process("entropy_change") == pytest.approx(0.0, abs=1e-8)


def test_water_and_steam_mixed_at_one_pressure_by_if97():
    """Water of 20 °C and steam of 300 °C, both at 5 bar: the mixture has the mean enthalpy, by IAPWS-IF97 wet steam.

    Pressure 0.5 MPa; IF97 and the reference equation differ by less than 0.1 % in these enthalpies.
    """
    water, steam = IAPWS97(T=293.15, P=0.5), IAPWS97(T=573.15, P=0.5)
    mean = IAPWS97(P=0.5, h=(3.0 * water.h + 2.0 * steam.h) / 5.0)
    body = {"substance": "Water", "model": "real fluid"}
    bodies = {
        "water": {**body, "inputs": quantities(mass=3.0)},
        "steam": {**body, "inputs": quantities(mass=2.0)},
    }
    first = {
        "water": {"temperature": 293.15, "pressure": 5e5},
        "steam": {"temperature": 573.15, "pressure": 5e5},
    }
    paths = dict.fromkeys(bodies, "constant pressure")
    end = brentq(
        lambda t: 3.0 * (IAPWS97(T=t, P=0.5).h - water.h) - 1e3, 300.0, 420.0
    )  # a heater that gives the water 1 MJ
    heated = meet({"water": bodies["water"], "plate": solid(1.0, 500.0)}, {"water": first["water"], "plate":
        {"temperature": 293.15}}, path={"water": "constant pressure"}, equilibrium=["temperature"],
        heat_transfers=[{"id": "wall", **quantities(boundary_temperature=500.0),
                         "inputs": quantities(energy=1e6 + 500.0 * (end - 293.15))}])  # fmt: skip
    assert at_end(heated, "water", "temperature") == pytest.approx(end, abs=0.02)
    found = meet(bodies, first, {"steam": {"quality": mean.x}}, path=paths, insulated=True)
    assert at_end(found, "steam", "temperature") == pytest.approx(mean.T, abs=0.02)


@pytest.mark.parametrize("model", ["ideal gas", "real fluid"])
def test_nitrogen_vessels_equalised_by_another_library(model: str):
    """Nitrogen at 300 K, 20 bar and 450 K, 2 bar in one insulated volume, by Cantera and SciPy.

    The reference is the coarser side: the Shomate polynomial of the NIST WebBook (coefficients from memory) gives
    337.648 K for the ideal gas, as the alternate calculation does; the NASA Glenn one gives 337.672 K, the older one of
    seven coefficients 337.752 K. A part in a thousand of the heat capacity is 0.04 K here.
    """
    import cantera

    if model == "ideal gas":
        glenn = cantera.Species.list_from_file("nasa_gas.yaml")
        fluid: Any = cantera.Solution(thermo="ideal-gas", species=[s for s in glenn if s.name == "N2"])
    else:
        fluid = cantera.Nitrogen()

    def state(t: float, p: float) -> tuple[float, float, float]:
        if model == "ideal gas":
            fluid.TPX = t, p, "N2:1"
        else:
            fluid.TP = t, p
        return fluid.int_energy_mass, 1.0 / fluid.density_mass, fluid.entropy_mass

    (u1, v1, s1), (u2, v2, s2) = state(300.0, 2e6), state(450.0, 2e5)
    energy, volume = (1.5 * u1 + 0.5 * u2) / 2.0, (1.5 * v1 + 0.5 * v2) / 2.0

    def pressure(t: float) -> float:
        return float(brentq(lambda p: state(t, p)[1] - volume, 1e5, 4e6, xtol=1e-6))

    end = float(brentq(lambda t: state(t, pressure(t))[0] - energy, 290.0, 460.0, xtol=1e-9))
    body = {"substance": "Nitrogen", "model": model}
    found = meet(
        {
            "left": {**body, "inputs": quantities(mass=1.5)},
            "right": {**body, "inputs": quantities(mass=0.5)},
        },
        {
            "left": {"temperature": 300.0, "pressure": 2e6},
            "right": {"temperature": 450.0, "pressure": 2e5},
        },
        **OPEN,
        insulated=True,
    )
    assert at_end(found, "left", "temperature") == pytest.approx(
        end, abs=0.04 if model == "ideal gas" else 0.1
    )
    assert at_end(found, "right", "pressure") == pytest.approx(pressure(end), rel=1e-3)
    entropy = 2.0 * state(end, pressure(end))[2] - 1.5 * s1 - 0.5 * s2
    assert found.process("entropy_change") == pytest.approx(entropy, rel=2e-3)


@pytest.mark.parametrize(("heat", "lifts"), [(100e3, False), (300e3, True)])
def test_piston_on_stops(heat: float, lifts: bool):
    """Up to m·c_v·(T_l − T₁) at constant volume, the rest by m·c_p at the lifting pressure; or not so far."""
    rise = CV * (300.0 * 2.0 - 300.0)
    end = 600.0 + (heat - rise) / (CV + R) if lifts else 300.0 + heat / CV
    claim = {"results": quantities(temperature=1.0)}
    record = {
        "id": "case",
        "bodies": {"air": gas(1.0)},
        "states": {
            "first": {"air": {"inputs": quantities(temperature=300.0, pressure=1e5)}},
            "lifting": {"air": claim},
            "last": {"air": claim},
        },
        "processes": [
            {"id": "rise", "from": "first", "to": "lifting", "path": "constant volume", "work_transfers": []},
            {
                "id": "lift",
                "from": "lifting",
                "to": "last",
                "path": "constant pressure",
                "work_transfers": [],
            },
        ],
        "sequences": [
            {
                "id": "all",
                "processes": ["rise", "lift"],
                "inputs": {"heat": f"{heat!r} J", "lift_pressure": "2e5 Pa"},
                "results": quantities(work=1.0),
            }
        ],
    }
    found = calculated(record)
    assert found.value("states/last/air/temperature") == pytest.approx(end, rel=EXACT)
    work = R * (end - 600.0) if lifts else 0.0
    assert found.value("sequences/all/work") == pytest.approx(work, rel=EXACT, abs=1e-3)


def cycle(
    legs: Sequence[tuple[str, dict[str, float]]], first: dict[str, float], body: Any = None
) -> Calculated:
    """Return a cycle of one body: each leg is a path and what is given of the state in which it ends."""
    names = [f"s{number}" for number in range(len(legs))]
    states = {names[0]: {"air": {"inputs": quantities(**first)}}}
    for name, (_, known) in zip(names[1:], legs[:-1], strict=True):
        states[name] = {"air": {"inputs": quantities(**known)}}
    processes = [
        {
            "id": f"p{number}",
            "from": names[number],
            "to": names[(number + 1) % len(names)],
            "path": path,
            "work_transfers": [],
            "results": quantities(heat=1.0, work=1.0),
        }
        for number, (path, _) in enumerate(legs)
    ]
    claims = quantities(net_work=1.0, heat_supplied=1.0, thermal_efficiency=1.0)
    bodies = {"air": body or gas(1.0)}
    return calculated(
        {"id": "case", "bodies": bodies, "states": states, "processes": processes, "results": claims}
    )


@pytest.mark.parametrize("body", [None, "Nitrogen", "Water"])
def test_carnot_cycle(body: str | None):
    """Two isothermal and two isentropic processes convert 1 − T_c/T_h of the heat, whatever the fluid."""
    fluid = body and {"substance": body, "model": "real fluid", "inputs": quantities(mass=1.0)}
    hot, cold = (480.0, 400.0) if body == "Water" else (600.0, 400.0)
    first = {"temperature": hot, "quality": 0.2} if body == "Water" else {"temperature": hot, "pressure": 2e6}
    second = {"quality": 0.7} if body == "Water" else {"pressure": 1e6}
    probe = cycle([("isothermal", second), ("isentropic", {"temperature": cold}),
                   ("isothermal", {"temperature": cold}), ("isentropic", {})], first, fluid)  # fmt: skip
    assert probe.value("results/thermal_efficiency") == pytest.approx(1.0 - cold / hot, rel=1e-6)


def test_otto_cycle():
    """η = 1 − r^(1−κ) of the compression ratio."""
    first = {"temperature": 300.0, "pressure": 1e5}
    v = R * 300.0 / 1e5
    legs: list[tuple[str, dict[str, float]]] = [
        ("isentropic", {"specific_volume": v / 8.0}),
        ("constant volume", {"temperature": 1800.0}),
        ("isentropic", {"specific_volume": v}),
        ("constant volume", {}),
    ]
    found = cycle(legs, first)
    assert found.value("results/thermal_efficiency") == pytest.approx(1.0 - 8.0 ** (1.0 - K), rel=EXACT)


def test_cycle_of_two_constant_pressures_and_two_isentropes():
    """η = 1 − r_p^((1−κ)/κ) of the pressure ratio."""
    legs: list[tuple[str, dict[str, float]]] = [
        ("isentropic", {"pressure": 6e5}),
        ("constant pressure", {"temperature": 1200.0}),
        ("isentropic", {"pressure": 1e5}),
        ("constant pressure", {}),
    ]
    found = cycle(legs, {"temperature": 300.0, "pressure": 1e5})
    assert found.value("results/thermal_efficiency") == pytest.approx(1.0 - 6.0 ** ((1.0 - K) / K), rel=EXACT)


def test_cycle_of_two_isotherms_and_two_constant_volumes_without_regenerator():
    """W = R·(T_h − T_c)·ln r and Q_in = R·T_h·ln r + c_v·(T_h − T_c)."""
    v = R * 300.0 / 1e5
    legs: list[tuple[str, dict[str, float]]] = [
        ("isothermal", {"specific_volume": v / 4.0}),
        ("constant volume", {"temperature": 800.0}),
        ("isothermal", {"specific_volume": v}),
        ("constant volume", {}),
    ]
    found = cycle(legs, {"temperature": 300.0, "pressure": 1e5})
    work, supplied = R * 500.0 * math.log(4.0), R * 800.0 * math.log(4.0) + CV * 500.0
    assert found.value("results/net_work") == pytest.approx(work, rel=EXACT)
    assert found.value("results/heat_supplied") == pytest.approx(supplied, rel=EXACT)
