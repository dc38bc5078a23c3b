"""Moving boundaries and finite reservoirs, against closed forms.

Source: Q = C·(T₁ − T₂) and S = C·ln(T₁/T₂) of a reservoir of constant heat capacity; most work between two equal
reservoirs at the common temperature √(T₁·T₂).
"""

from __future__ import annotations

import math
from typing import Any, Final

import pytest
from scipy.integrate import quad

from tests.published.processes.calculation import Calculated, calculate, matter, process, quantities, si

pytestmark = pytest.mark.published

C: Final = 5.0e4
LOAD: Final = matter("Load", "constant specific heat", mass=50.0, specific_heat=1000.0)
AMBIENT = 298.15


def heated(
    last: float | None, works: Any = (), claims: Any = (), first: float = 300.0, **transfer: Any
) -> Calculated:
    """Return the load heated from a first temperature through one wall."""
    wall = {"id": "wall", "boundary_temperature": "system", **transfer}
    results = {name: si(1.0, "K" if "temperature" in name else "J/K") for name in claims}
    change = process("first", "last", heat_transfers=[{**wall, "results": results}], work_transfers=[*works])
    change["results"] = {"entropy_generation_with_surroundings": "1.0 J/K"}
    end = {} if last is None else {"temperature": last}
    return calculate(LOAD, {"first": {"temperature": first}, "last": end}, [change])


@pytest.mark.parametrize("end", [310.0, 350.0, 350.0000001, 700.0])
def test_boundary_that_moves_with_the_heat(end: float) -> None:
    """Q·ln(T₂/T₁)/(T₂ − T₁), and by quadrature ∫δQ/T with T linear in the heat."""
    found = heated(340.0, **quantities(boundary_temperature=350.0, final_boundary_temperature=end))
    heat = 50.0 * 1000.0 * 40.0
    moved, _ = quad(lambda q: 1.0 / (350.0 + (end - 350.0) * q / heat), 0.0, heat, epsrel=1e-12)
    assert found.process("entropy_transfer") == pytest.approx(moved, rel=1e-10)


def test_reservoir_cools_while_it_gives_heat() -> None:
    """T₂ = T₁ − Q/C."""
    found = heated(
        330.0, claims=["final_reservoir_temperature"],
        **quantities(reservoir_temperature=380.0, reservoir_heat_capacity=2.0 * C),
    )  # fmt: skip
    end = found.value("processes/change/heat_transfers/wall/final_reservoir_temperature")
    assert end == pytest.approx(380.0 - C * 30.0 / (2.0 * C), rel=1e-12)


def test_heat_capacity_of_a_reservoir_from_its_temperatures() -> None:
    """C = Q/(T₁ − T₂)."""
    found = heated(
        330.0, claims=["reservoir_heat_capacity"],
        **quantities(reservoir_temperature=380.0, final_reservoir_temperature=360.0),
    )  # fmt: skip
    capacity = found.value("processes/change/heat_transfers/wall/reservoir_heat_capacity")
    assert capacity == pytest.approx(C * 30.0 / 20.0, rel=1e-12)


def test_how_hot_a_reservoir_must_have_been() -> None:
    """T₁ = T₂ + Q/C."""
    found = heated(
        330.0, claims=["reservoir_temperature"],
        **quantities(final_reservoir_temperature=350.0, reservoir_heat_capacity=C),
    )  # fmt: skip
    start = found.value("processes/change/heat_transfers/wall/reservoir_temperature")
    assert start == pytest.approx(380.0, rel=1e-12)


def test_heat_of_a_reservoir_finds_the_end_state() -> None:
    """Q = C·(T₁ − T₂) is an input like any: the load ends where the heat takes it."""
    found = heated(
        None,
        **quantities(reservoir_temperature=380.0, final_reservoir_temperature=345.0, reservoir_heat_capacity=C),
    )  # fmt: skip
    assert found.state("temperature") == pytest.approx(335.0, rel=1e-12)


def test_load_and_reservoir_of_one_size_meet_in_the_middle() -> None:
    """S_gen,tot = C·ln(T_m²/(T₁·T₂)) at the mean temperature T_m."""
    found = heated(
        340.0, **quantities(reservoir_temperature=380.0, reservoir_heat_capacity=C),
    )  # fmt: skip
    generated = found.process("entropy_generation_with_surroundings")
    assert generated == pytest.approx(C * math.log(340.0**2 / (300.0 * 380.0)), rel=1e-9)
    assert found.process("exergy_destruction") == pytest.approx(AMBIENT * generated, rel=1e-9)


def test_most_work_between_two_finite_reservoirs() -> None:
    """An engine between both generates nothing where they meet at √(T₁·T₂), and gives C·(√T₂ − √T₁)²."""
    common = math.sqrt(300.0 * 400.0)
    engine = {"id": "engine", "kind": "shaft", "direction": "out"}
    found = heated(
        common, [engine],
        **quantities(reservoir_temperature=400.0, final_reservoir_temperature=common, reservoir_heat_capacity=C),
    )  # fmt: skip
    assert found.process("work") == pytest.approx(C * (math.sqrt(400.0) - math.sqrt(300.0)) ** 2, rel=1e-9)
    assert found.process("entropy_generation_with_surroundings") == pytest.approx(0.0, abs=1e-9 * C)


def test_cooling_by_a_finite_reservoir() -> None:
    """Heat that leaves warms the reservoir: T₂ = T₁ + |Q|/C, S_gen,tot by both logarithms."""
    found = heated(
        320.0, first=360.0, claims=["final_reservoir_temperature"],
        **quantities(reservoir_temperature=280.0, reservoir_heat_capacity=4.0 * C),
    )  # fmt: skip
    generated = C * math.log(320.0 / 360.0) + 4.0 * C * math.log(290.0 / 280.0)
    assert found.process("entropy_generation_with_surroundings") == pytest.approx(generated, rel=1e-9)


@pytest.mark.parametrize("times", [1e3, 1e6, 1e9])
def test_a_very_large_reservoir_is_one_of_constant_temperature(times: float) -> None:
    """C → ∞: Q/T_lm tends to Q/T_res, by a deviation of Q²/(2·C·T²)."""
    found = heated(330.0, **quantities(reservoir_temperature=380.0, reservoir_heat_capacity=times * C))
    heat = 30.0 * C
    infinite = C * math.log(330.0 / 300.0) - heat / 380.0
    generated = found.process("entropy_generation_with_surroundings")
    assert generated == pytest.approx(infinite, abs=0.51 * heat**2 / (times * C * 380.0**2) * 1.01 + 1e-7)


def test_heat_in_sequence_through_two_boundaries() -> None:
    """Two heaters one after the other: the sum of Q_k/T_b,k, one of them with a moving boundary."""
    walls = [
        {"id": "first", **quantities(boundary_temperature=320.0), "inputs": quantities(energy=5.0e5)},
        {"id": "second", **quantities(boundary_temperature=330.0, final_boundary_temperature=360.0)},
    ]
    change = process("first", "last", heat_transfers=walls, work_transfers=[])
    found = calculate(LOAD, {"first": {"temperature": 300.0}, "last": {"temperature": 330.0}}, [change])
    moved = 5.0e5 / 320.0 + 1.0e6 * math.log(360.0 / 330.0) / 30.0
    assert found.process("entropy_transfer") == pytest.approx(moved, rel=1e-10)


def test_several_heats_at_the_temperature_of_the_system() -> None:
    """Together they carry ΔS, whatever their order."""
    walls = [
        {"id": "first", "boundary_temperature": "system", "inputs": quantities(energy=5.0e5)},
        {"id": "second", "boundary_temperature": "system"},
    ]
    change = process("first", "last", heat_transfers=walls, work_transfers=[])
    found = calculate(LOAD, {"first": {"temperature": 300.0}, "last": {"temperature": 330.0}}, [change])
    assert found.process("entropy_transfer") == pytest.approx(C * math.log(1.1), rel=1e-10)
    assert found.process("entropy_generation") == pytest.approx(0.0, abs=1e-6)
