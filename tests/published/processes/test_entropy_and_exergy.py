"""Entropy and exergy of whole processes, against closed forms worked out here by hand.

Source: second law for a closed system with several boundary temperatures, ΔS = ΣQ_k/T_b,k + S_gen; exergy balance
with T₀ and p₀ of the surroundings (298.15 K, 1 bar), X_d = T₀·S_gen.
"""

from __future__ import annotations

import math
from typing import Any, Final

import pytest
from scipy.integrate import quad

from tests.published.processes.calculation import (
    Calculated,
    calculate,
    heat,
    matter,
    one_change,
    process,
    quantities,
    work,
)

pytestmark = pytest.mark.published

T0, P0 = 298.15, 1.0e5
CV, R = 718.0, 287.0
MASS, CAPACITY = 12.0, 500.0
BLOCK: Final = matter("Steel block", "constant specific heat", mass=MASS, specific_heat=CAPACITY)
GAS: Final = matter(
    "Works gas",
    "constant specific heat",
    mass=1.5,
    specific_heat_at_constant_volume=CV,
    gas_constant=R,
)


def block(t1: float, t2: float, *walls: dict[str, Any], **members: Any) -> Calculated:
    """Return a block taken from one temperature to another."""
    return one_change(BLOCK, {"temperature": t1}, {"temperature": t2}, heat_transfers=list(walls), **members)


@pytest.mark.parametrize(("t1", "t2"), [(700.0, T0), (700.0, 310.0), (250.0, T0), (T0, 250.0)])
def test_a_block_in_its_surroundings(t1: float, t2: float) -> None:
    """ΔS = m·c·ln(T₂/T₁), Q = m·c·ΔT crosses at T₀, and S_gen = ΔS − Q/T₀ for every way towards T₀ and away."""
    found = block(t1, t2, heat(boundary_temperature=T0))
    warmth, change = MASS * CAPACITY * (t2 - t1), MASS * CAPACITY * math.log(t2 / t1)
    assert found.process("heat") == pytest.approx(warmth, rel=1e-12)
    assert found.process("entropy_change") == pytest.approx(change, rel=1e-12)
    assert found.process("entropy_generation") == pytest.approx(change - warmth / T0, rel=1e-10)
    assert found.process("entropy_generation_with_surroundings") == pytest.approx(
        change - warmth / T0, rel=1e-10
    )
    assert found.process("exergy_destruction") == pytest.approx(T0 * change - warmth, rel=1e-10)
    # Cooling by itself below the surroundings is what the second law forbids.
    assert (found.process("entropy_generation") < 0.0) == (t1 == T0)


def test_several_walls_share_the_heat() -> None:
    """S_gen = ΔS − ΣQ_k/T_b,k with one heat transfer left to the balance; with reservoirs, ΔS − ΣQ_k/T_res,k."""
    t1, t2, given = 300.0, 420.0, -50.0e3
    oven = heat(boundary_temperature=500.0, reservoir_temperature=560.0)
    loss = {**heat(boundary_temperature=330.0, energy=given), "id": "loss"}
    found = block(t1, t2, oven, loss)
    rest = MASS * CAPACITY * (t2 - t1) - given
    change = MASS * CAPACITY * math.log(t2 / t1)
    assert found.value("processes/change/heat_transfers/wall/energy") == pytest.approx(rest, rel=1e-12)
    assert found.process("entropy_transfer") == pytest.approx(rest / 500.0 + given / 330.0, rel=1e-12)
    generated = change - rest / 500.0 - given / 330.0
    assert found.process("entropy_generation") == pytest.approx(generated, rel=1e-10)
    total = change - rest / 560.0 - given / T0
    assert found.process("entropy_generation_with_surroundings") == pytest.approx(total, rel=1e-10)


def test_heat_at_the_temperature_of_the_system_is_the_log_mean_integral() -> None:
    """∫δQ/T = Q/T_lm with T_lm = (T₂ − T₁)/ln(T₂/T₁) for a constant specific heat; nothing is generated inside.

    The integral is also taken numerically here.
    """
    t1, t2 = 290.0, 650.0
    wall = {"id": "wall", "boundary_temperature": "system", "inputs": {}}
    found = block(t1, t2, wall)
    log_mean = (t2 - t1) / math.log(t2 / t1)
    assert found.process("entropy_transfer") == pytest.approx(
        MASS * CAPACITY * (t2 - t1) / log_mean, rel=1e-10
    )
    numerical, _ = quad(lambda t: MASS * CAPACITY / t, t1, t2, epsabs=0.0, epsrel=1e-12)
    assert found.process("entropy_transfer") == pytest.approx(numerical, rel=1e-10)
    assert found.process("entropy_generation") == pytest.approx(0.0, abs=1e-9)


def test_heat_through_a_stirred_body_leaves_only_what_the_stirrer_generates() -> None:
    """A body held at one temperature by cooling against a stirrer generates W/T inside and W/T₀ in all."""
    stirred = 80.0e3
    wall = {"id": "wall", "boundary_temperature": "system", "inputs": {}}
    found = block(350.0, 350.0, wall, work_transfers=[work("shaft", -stirred)])
    assert found.process("heat") == pytest.approx(-stirred, rel=1e-12)
    assert found.process("entropy_generation") == pytest.approx(stirred / 350.0, rel=1e-10)
    assert found.process("entropy_generation_with_surroundings") == pytest.approx(stirred / T0, rel=1e-10)


@pytest.mark.parametrize("temperature", [200.0, T0, 900.0])
@pytest.mark.parametrize("pressure", [0.3e5, P0, 40.0e5])
def test_closed_exergy_of_a_gas(temperature: float, pressure: float) -> None:
    """Exergy is c_v·(T − T₀) + p₀·(v − v₀) − T₀·[c_p·ln(T/T₀) − R·ln(p/p₀)], never below zero, zero at T₀ and p₀."""
    found = one_change(
        GAS,
        {"temperature": temperature, "pressure": pressure},
        {"temperature": T0, "pressure": P0},
        path="end states only",
    )
    v, v0 = R * temperature / pressure, R * T0 / P0
    entropy = (CV + R) * math.log(temperature / T0) - R * math.log(pressure / P0)
    exergy = CV * (temperature - T0) + P0 * (v - v0) - T0 * entropy
    assert found.state("specific_exergy", "first") == pytest.approx(exergy, rel=1e-9, abs=1e-6)
    assert found.process("exergy_change") == pytest.approx(-1.5 * exergy, rel=1e-9, abs=1e-6)
    assert exergy >= -1e-9


def test_exergy_of_heat_less_useful_work_is_changed_or_destroyed() -> None:
    """Heating at constant pressure: X_Q = (1 − T₀/T_b)·Q, useful work W − p₀·ΔV, X_d = T₀·S_gen."""
    t1, t2, p, hot, m = 310.0, 520.0, 3.0e5, 640.0, 1.5
    found = one_change(
        GAS,
        {"temperature": t1, "pressure": p},
        {"temperature": t2},
        path="constant pressure",
        heat_transfers=[heat(boundary_temperature=hot)],
    )
    warmth, done, dv = m * (CV + R) * (t2 - t1), m * R * (t2 - t1), m * R * (t2 - t1) / p
    entropy = m * (CV + R) * math.log(t2 / t1)
    transferred = (1.0 - T0 / hot) * warmth - (done - P0 * dv)
    assert found.process("exergy_transfer") == pytest.approx(transferred, rel=1e-9)
    assert found.process("exergy_destruction") == pytest.approx(T0 * (entropy - warmth / hot), rel=1e-9)
    change = m * CV * (t2 - t1) + P0 * dv - T0 * entropy
    assert found.process("exergy_change") == pytest.approx(change, rel=1e-9)
    assert transferred - T0 * (entropy - warmth / hot) == pytest.approx(change, rel=1e-9)


def test_speed_and_height_are_exergy_as_they_are_energy() -> None:
    """A moving body at T₀ and p₀ has the exergy ½·c² + g·z per mass."""
    found = one_change(
        BLOCK,
        {"temperature": T0, "velocity": 30.0, "elevation": 12.0},
        {"temperature": T0, "velocity": 0.0, "elevation": 0.0},
    )
    assert found.state("specific_exergy", "first") == pytest.approx(450.0 + 9.80665 * 12.0, rel=1e-12)
    assert found.process("exergy_change") == pytest.approx(-MASS * (450.0 + 9.80665 * 12.0), rel=1e-12)


def test_a_process_without_heat_has_no_entropy_transfer() -> None:
    """With no heat transfer listed ΣQ_k/T_b,k is zero, and evaluable."""
    found = one_change(
        BLOCK, {"temperature": 300.0}, {}, heat_transfers=[], work_transfers=[work("electrical", -6.0e3)]
    )
    assert found.state("temperature") == pytest.approx(301.0, rel=1e-12)
    assert found.process("entropy_transfer") == 0.0
    assert found.process("entropy_generation") == pytest.approx(
        MASS * CAPACITY * math.log(301.0 / 300.0), rel=1e-10
    )


def test_the_exergy_destroyed_in_a_sequence_belongs_to_the_generation_that_it_claims() -> None:
    """Where a sequence claims S_gen with surroundings its X_d is T₀ times that, else T₀ times the sum of S_gen."""
    wall = heat(boundary_temperature=500.0, reservoir_temperature=700.0)
    steps = [process("cold", "warm", name="one", heat_transfers=[wall]),
             process("warm", "hot", name="two", heat_transfers=[wall])]  # fmt: skip
    temperatures = {"cold": 300.0, "warm": 360.0, "hot": 450.0}
    states = {name: {"temperature": t} for name, t in temperatures.items()}
    change, warmth = MASS * CAPACITY * math.log(1.5), MASS * CAPACITY * 150.0
    for claims, reservoir in ((["exergy_destruction"], 500.0),
                              (["exergy_destruction", "entropy_generation_with_surroundings"], 700.0)):  # fmt: skip
        sequence = {
            "id": "both",
            "processes": ["one", "two"],
            "results": quantities(**dict.fromkeys(claims, 1.0)),
        }
        found = calculate(BLOCK, states, steps, sequences=[sequence])
        destroyed = found.value("sequences/both/exergy_destruction")
        assert destroyed == pytest.approx(T0 * (change - warmth / reservoir), rel=1e-10)
