"""Losses by UA·ΔT, heaters and durations, against closed forms and quadratures that share nothing with the sheet.

Source: energy balance of a body at uniform temperature, C·dT/dt = P + UA·(T_out − T), solved here by hand (exponential
approach) or with scipy. Water beside the library: IAPWS-IF97 as coded in the ``iapws`` package.
"""

from __future__ import annotations

import math
from collections.abc import Mapping
from typing import Any, Final

import pytest
from iapws import IAPWS97
from scipy.integrate import quad
from scipy.optimize import brentq

from tests.published.processes.calculation import Calculated, calculate, matter, process, quantities, si

pytestmark = pytest.mark.published

MASS, SPECIFIC, UA = 200.0, 4180.0, 4.5
C: Final = MASS * SPECIFIC
AMBIENT = 298.15
STORE: Final = matter("Store water", "constant specific heat", mass=MASS, specific_heat=SPECIFIC)
HOUR = 3600.0
State = Mapping[str, float | str]


def loss(ua: float = UA, name: str = "shell", **more: float) -> dict[str, Any]:
    """Return a heat transfer through insulation, crossing at the body's own temperature."""
    boundary = {} if "boundary_temperature" in more else {"boundary_temperature": "system"}
    return {"id": name, **boundary, **quantities(heat_loss_coefficient=ua, **more)}


def heater(**inputs: float) -> dict[str, Any]:
    """Return an electrical heater."""
    return {"id": "heater", "kind": "electrical", "direction": "in", "inputs": quantities(**inputs)}


def store(
    first: float | State,
    last: float | State | None,
    *works: dict[str, Any],
    duration: float | None = None,
    heats: tuple[dict[str, Any], ...] = (loss(),),
    body: Mapping[str, Any] = STORE,
    **members: Any,
) -> Calculated:
    """Return a store between two states; the last, or the duration, is sought where it is None."""
    members |= (
        {"inputs": quantities(duration=duration)} if duration else {"results": {"duration": si(1.0, "s")}}
    )
    start = first if isinstance(first, Mapping) else {"temperature": first}
    end = last if isinstance(last, Mapping) else {} if last is None else {"temperature": last}
    change = process("first", "last", heat_transfers=[*heats], work_transfers=[*works], **members)
    return calculate(body, {"first": start, "last": end}, [change])


def approach(first: float, settles: float, t: float, ua: float = UA, capacity: float = C) -> float:
    """Return the temperature of the exponential approach after a time. [K]"""
    return settles + (first - settles) * math.exp(-ua * t / capacity)


def time_between(first: float, last: float, settles: float, ua: float = UA, capacity: float = C) -> float:
    """Return the time of the exponential approach between two temperatures. [s]"""
    return capacity / ua * math.log((first - settles) / (last - settles))


@pytest.mark.parametrize("hours", [0.01, 10.0, 200.0, 5000.0])
def test_a_store_cools_exponentially(hours: float) -> None:
    """T(t) = T₀ + (T₁ − T₀)·exp(−UA·t/C), and what it loses is what it held."""
    found = store(348.15, None, duration=hours * HOUR)
    last = approach(348.15, AMBIENT, hours * HOUR)
    assert found.state("temperature") == pytest.approx(last, rel=1e-12)
    assert found.process("heat") == pytest.approx(C * (last - 348.15), rel=1e-8)


@pytest.mark.parametrize("last", [347.0, 320.0, 298.2])
def test_how_long_a_store_takes_to_cool(last: float) -> None:
    """The time is (C/UA)·ln((T₁ − T₀)/(T₂ − T₀))."""
    assert store(348.15, last).process("duration") == pytest.approx(
        time_between(348.15, last, AMBIENT), rel=1e-9
    )


@pytest.mark.parametrize("power", [0.0, 2500.0])
def test_entropy_with_the_loss_by_quadrature_over_time(power: float) -> None:
    """∫UA·(T₀/T − 1) dt along the exponential approach, integrated over time by another program."""
    settles, span = AMBIENT + power / UA, 30.0 * HOUR
    works = (heater(mean_power=power),) if power else ()
    found = store(330.0, None, *works, duration=span)
    moved, _ = quad(
        lambda t: UA * (AMBIENT / approach(330.0, settles, t) - 1.0), 0.0, span, epsabs=1e-9, epsrel=1e-12
    )
    assert found.process("entropy_transfer") == pytest.approx(moved, rel=1e-9)
    change = C * math.log(approach(330.0, settles, span) / 330.0)
    assert found.process("entropy_generation") == pytest.approx(change - moved, rel=1e-8, abs=1e-6)


def test_a_store_that_only_cools_generates_nothing_within() -> None:
    """Heat that leaves at the body's own temperature carries all its entropy: S_gen = 0."""
    assert store(350.0, None, duration=20.0 * HOUR).process("entropy_generation") == pytest.approx(
        0.0, abs=1e-5
    )


@pytest.mark.parametrize(("power", "last"), [(3000.0, 340.0), (1000.0, 340.0), (200.0, 342.0)])
def test_heater_time_with_losses(power: float, last: float) -> None:
    """The heater drives towards T₀ + P/UA: t = (C/UA)·ln((T_∞ − T₁)/(T_∞ − T₂)), and E = P·t."""
    found = store(288.15, last, heater(mean_power=power))
    duration = time_between(288.15, last, AMBIENT + power / UA)
    assert found.process("duration") == pytest.approx(duration, rel=1e-9)
    assert found.process("work") == pytest.approx(-power * duration, rel=1e-9)
    assert found.process("heat") == pytest.approx(C * (last - 288.15) - power * duration, rel=1e-7)


def test_temperature_after_a_heater_has_worked_for_a_time() -> None:
    """The same exponential, read for the end state."""
    found = store(288.15, None, heater(mean_power=1500.0), duration=6.0 * HOUR)
    assert found.state("temperature") == pytest.approx(
        approach(288.15, AMBIENT + 1500.0 / UA, 6.0 * HOUR), rel=1e-12
    )


@pytest.mark.parametrize("hours", [2.0, 8.0, 100.0])
def test_power_for_a_given_time(hours: float) -> None:
    """T_∞ = (T₂ − T₁·e)/(1 − e) with e = exp(−UA·t/C), and P = UA·(T_∞ − T₀)."""
    found = store(288.15, 338.15, heater(), duration=hours * HOUR)
    fading = math.exp(-UA * hours * HOUR / C)
    power = UA * ((338.15 - 288.15 * fading) / (1.0 - fading) - AMBIENT)
    assert found.process("work") == pytest.approx(-power * hours * HOUR, rel=1e-9)


def test_power_that_makes_a_given_energy() -> None:
    """A heater of 45 MJ: the power for which P·t(P) is that energy, by another root search."""
    energy = 45.0e6
    found = store(288.15, 338.15, heater(energy=energy))

    def spare(power: float) -> float:
        return power * time_between(288.15, 338.15, AMBIENT + power / UA) - energy

    power = brentq(spare, 185.0, 1e5, xtol=1e-10)
    assert found.process("duration") == pytest.approx(energy / power, rel=1e-8)


def test_power_that_holds_a_temperature() -> None:
    """A store that keeps 60 °C for a day needs UA·(T − T₀) all the time."""
    found = store(333.15, 333.15, heater(), duration=24.0 * HOUR)
    assert found.process("work") == pytest.approx(-UA * (333.15 - AMBIENT) * 24.0 * HOUR, rel=1e-12)
    assert found.process("entropy_transfer") == pytest.approx(
        -UA * (1.0 - AMBIENT / 333.15) * 24.0 * HOUR, rel=1e-12
    )


def test_two_losses_to_two_places() -> None:
    """Through shell (to T₀) and base (to the ground) the store drifts to the mean weighted with UA."""
    heats = (loss(), loss(2.0, "base", reservoir_temperature=283.15))
    found = store(340.0, None, duration=50.0 * HOUR, heats=heats)
    both = UA + 2.0
    settles = (UA * AMBIENT + 2.0 * 283.15) / both
    last = approach(340.0, settles, 50.0 * HOUR, both)
    assert found.state("temperature") == pytest.approx(last, rel=1e-12)
    held = settles * 50.0 * HOUR + (340.0 - last) * C / both
    ground = found.value("processes/change/heat_transfers/base/energy")
    assert ground == pytest.approx(2.0 * (283.15 * 50.0 * HOUR - held), rel=1e-8)


def test_heat_beside_the_loss() -> None:
    """A coil of constant power is a heat transfer and warms like a heater."""
    coil = {"id": "coil", "boundary_temperature": "360.0 K", "inputs": quantities(mean_power=2000.0)}
    found = store(300.0, 330.0, heats=(loss(), coil))
    assert found.process("duration") == pytest.approx(
        time_between(300.0, 330.0, AMBIENT + 2000.0 / UA), rel=1e-9
    )


@pytest.mark.parametrize(("kind", "specific"), [("constant volume", 718.0), ("constant pressure", 1005.0)])
def test_gas_cools_with_the_specific_heat_of_its_path(kind: str, specific: float) -> None:
    """At constant volume c_v stores the heat, at constant pressure c_p; W_b = m·R·ΔT there."""
    gas = matter("Works gas", "constant specific heat", mass=3.0, specific_heat_at_constant_volume=718.0,
                 gas_constant=287.0)  # fmt: skip
    first = {"temperature": 420.0, "pressure": 4.0e5}
    found = store(first, None, duration=600.0, body=gas, path=kind)
    last = approach(420.0, AMBIENT, 600.0, UA, 3.0 * specific)
    assert found.state("temperature") == pytest.approx(last, rel=1e-10)
    work = 0.0 if kind == "constant volume" else 3.0 * 287.0 * (last - 420.0)
    assert found.process("boundary_work") == pytest.approx(work, rel=1e-8)
    assert found.process("heat") == pytest.approx(3.0 * specific * (last - 420.0), rel=1e-8)


def heat_capacity(temperature: float) -> float:
    """Return cp of water at 3 bar by IAPWS-IF97. [J/(kg·K)]"""
    found: float = IAPWS97(T=temperature, P=0.3).cp
    return 1e3 * found


def test_water_with_its_own_specific_heat() -> None:
    """The time is m·∫c_p dT/(P + UA·(T₀ − T)) with c_p by IAPWS-IF97, to 0.05 %."""
    water = matter("Water", "real fluid", mass=MASS)
    found = store({"temperature": 280.0, "pressure": 3.0e5}, {"temperature": 370.0}, heater(mean_power=1200.0),
                  body=water, path="constant pressure")  # fmt: skip
    duration, _ = quad(lambda t: MASS * heat_capacity(t) / (1200.0 + UA * (AMBIENT - t)), 280.0, 370.0)
    assert found.process("duration") == pytest.approx(duration, rel=5e-4)


def test_water_followed_over_a_time() -> None:
    """The end state after the time that IAPWS-IF97 needs to 370 K is 370 K, to 0.05 K."""
    water = matter("Water", "real fluid", mass=MASS)
    duration, _ = quad(lambda t: MASS * heat_capacity(t) / (1200.0 + UA * (AMBIENT - t)), 280.0, 370.0)
    found = store({"temperature": 280.0, "pressure": 3.0e5}, None, heater(mean_power=1200.0), duration=duration,
                  body=water, path="constant pressure")  # fmt: skip
    assert found.state("temperature") == pytest.approx(370.0, abs=0.05)


def test_boiling_takes_time_at_one_temperature() -> None:
    """Along the two-phase part T stays: t = m·Δh/(P − UA·(T_s − T₀)), latent heat by IAPWS-IF97 to 0.1 %."""
    steam = matter("Water", "real fluid", mass=2.0)
    first, last = {"pressure": 2.0e5, "quality": 0.0}, {"quality": 0.5}
    found = store(first, last, heater(mean_power=5000.0), body=steam, path="constant pressure")
    liquid, vapour = IAPWS97(P=0.2, x=0.0), IAPWS97(P=0.2, x=1.0)
    net = 5000.0 - UA * (liquid.T - AMBIENT)
    assert found.process("duration") == pytest.approx(2.0 * 0.5e3 * (vapour.h - liquid.h) / net, rel=1e-3)
