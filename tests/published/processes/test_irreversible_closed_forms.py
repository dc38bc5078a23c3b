"""What is not quasi-static, against closed forms: free expansion, constant external pressure, stirring, braking.

Source of all of them: first and second law for a closed system, worked out here by hand for a gas with constant
c_v and R (and a body with constant c).
"""

from __future__ import annotations

import math
from typing import Any, Final

import pytest

from tests.published.processes.calculation import (
    Calculated,
    calculated,
    heat,
    matter,
    one_change,
    path,
    process,
    quantities,
    work,
)

pytestmark = pytest.mark.published

CV, R, MASS = 718.0, 287.0, 0.8
T1, P1 = 350.0, 6.0e5
V1: Final = R * T1 / P1
GAS: Final = matter(
    "Works gas",
    "constant specific heat",
    mass=MASS,
    specific_heat_at_constant_volume=CV,
    gas_constant=R,
)
FIRST: Final = {"temperature": T1, "pressure": P1}
GRAVITY: Final = 9.80665


def change(last: dict[str, float], **members: Any) -> Calculated:
    """Return a process of the gas from 350 K and 6 bar."""
    return one_change(GAS, FIRST, last, **members)


@pytest.mark.parametrize("ratio", [1.02, 2.0, 9.0])
def test_free_expansion_generates_the_entropy_of_the_volume_ratio(ratio: float) -> None:
    """Into a vacuum an ideal gas keeps its temperature, and S_gen = m·R·ln(V₂/V₁)."""
    found = change({"specific_volume": V1 * ratio}, path="free expansion", heat_transfers=[])
    assert found.state("temperature") == pytest.approx(T1, rel=1e-12)
    assert found.process("work") == 0.0
    assert found.process("entropy_generation") == pytest.approx(MASS * R * math.log(ratio), rel=1e-9)
    assert found.process("exergy_destruction") == pytest.approx(298.15 * MASS * R * math.log(ratio), rel=1e-9)


@pytest.mark.parametrize("external", [1.0e5, 3.0e5, 11.0e5])
def test_adiabatic_change_against_an_outside_pressure_until_it_is_balanced(external: float) -> None:
    """c_v·(T₂ − T₁) = −p_ext·(v₂ − v₁) with p₂ = p_ext gives T₂ = T₁·(c_v + R·p_ext/p₁)/c_p."""
    kinds = ["adiabatic", path("against constant external pressure", external_pressure=external)]
    found = change({"pressure": external}, path=kinds)
    t2 = T1 * (CV + R * external / P1) / (CV + R)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-8)
    assert found.process("work") == pytest.approx(MASS * CV * (T1 - t2), rel=1e-7)
    generated = MASS * ((CV + R) * math.log(t2 / T1) - R * math.log(external / P1))
    assert found.process("entropy_generation") == pytest.approx(generated, rel=1e-6)
    assert generated > 0.0


@pytest.mark.parametrize("ratio", [0.6, 1.5])
def test_change_against_an_outside_pressure_up_to_a_stop(ratio: float) -> None:
    """T₂ = T₁ + (Q/m − p_ext·(v₂ − v₁))/c_v where the volume at the end is given."""
    external, warmth = 2.0e5, -9.0e3
    kind = path("against constant external pressure", external_pressure=external)
    walls = [heat(boundary_temperature=280.0, energy=warmth)]
    found = change({"specific_volume": V1 * ratio}, path=kind, heat_transfers=walls)
    t2 = T1 + (warmth / MASS - external * V1 * (ratio - 1.0)) / CV
    assert found.state("temperature") == pytest.approx(t2, rel=1e-9)
    assert found.process("boundary_work") == pytest.approx(MASS * external * V1 * (ratio - 1.0), rel=1e-9)


@pytest.mark.parametrize(("kind", "capacity"), [("constant volume", CV), ("constant pressure", CV + R)])
def test_adiabatic_stirring_warms_by_its_work(kind: str, capacity: float) -> None:
    """T₂ = T₁ + |W_sh|/(m·c) at constant volume with c_v, at constant pressure with c_p; all of ΔS is generated."""
    found = change({}, path=["adiabatic", kind], heat_transfers=[], work_transfers=[work("shaft", -42.0e3)])
    t2 = T1 + 42.0e3 / (MASS * capacity)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-9)
    assert found.process("entropy_generation") == pytest.approx(MASS * capacity * math.log(t2 / T1), rel=1e-9)


def test_adiabatic_end_state_with_given_work() -> None:
    """T₂ = T₁ − W/(m·c_v) for any adiabatic process; with p₂ the entropy generated follows."""
    delivered, p2 = 55.0e3, 2.0e5
    found = change({"pressure": p2}, path="adiabatic", inputs={"work": f"{delivered!r} J"})
    t2 = T1 - delivered / (MASS * CV)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-9)
    generated = MASS * ((CV + R) * math.log(t2 / T1) - R * math.log(p2 / P1))
    assert found.process("entropy_generation") == pytest.approx(generated, rel=1e-9)


def spring(given_by: str, ratio: float) -> tuple[dict[str, Any], float]:
    """Return a line of 4·10⁵ Pa at v₁ rising with 9·10⁵ Pa per v₁, written in two ways, and p₂."""
    slope, start = 9.0e5 / (MASS * V1), P1
    if given_by == "points":
        ends = [(start, MASS * V1), (start + 9.0e5, 2.0 * MASS * V1)]
        points = [{"pressure": f"{p!r} Pa", "volume": f"{v!r} m³"} for p, v in ends]
        return {"kind": "pressure linear in volume", "points": points}, start + 9.0e5 * (ratio - 1.0)
    area = 0.05
    kind = path("pressure linear in volume", stiffness=slope * area**2, piston_area=area)
    return kind, start + 9.0e5 * (ratio - 1.0)


@pytest.mark.parametrize("given_by", ["points", "stiffness"])
@pytest.mark.parametrize("by", ["specific_volume", "heat", "pressure"])
@pytest.mark.parametrize("ratio", [1.4, 2.6])
def test_spring_loaded_piston(given_by: str, by: str, ratio: float) -> None:
    """W = ½·(p₁ + p₂)·ΔV under a straight line; T₂ = p₂·v₂/R; Q closes the balance, and gives the end state back."""
    kind, p2 = spring(given_by, ratio)
    v2 = V1 * ratio
    t2, done = p2 * v2 / R, MASS * 0.5 * (P1 + p2) * (v2 - V1)
    warmth = done + MASS * CV * (t2 - T1)
    last = {"specific_volume": {"specific_volume": v2}, "pressure": {"pressure": p2}}.get(by, {})
    given = {"energy": warmth} if by == "heat" else {}
    found = change(last, path=kind, heat_transfers=[heat(boundary_temperature=4000.0, **given)])
    assert found.state("pressure") == pytest.approx(p2, rel=1e-7)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-7)
    assert found.process("boundary_work") == pytest.approx(done, rel=1e-7)
    assert found.process("heat") == pytest.approx(warmth, rel=1e-7)


def test_a_braked_body_keeps_its_energy_as_internal_energy() -> None:
    """m·c·ΔT = ½·m·c₁² + m·g·z₁ without heat or work; S_gen = m·c·ln(T₂/T₁)."""
    mass, capacity, speed, height, t1 = 40.0, 460.0, 90.0, 120.0, 290.0
    body = matter("Steel shoe", "constant specific heat", mass=mass, specific_heat=capacity)
    first = {"temperature": t1, "velocity": speed, "elevation": height}
    found = one_change(body, first, {"velocity": 0.0, "elevation": 0.0}, heat_transfers=[])
    t2 = t1 + (0.5 * speed**2 + GRAVITY * height) / capacity
    assert found.state("temperature") == pytest.approx(t2, rel=1e-12)
    assert found.process("kinetic_energy_change") == pytest.approx(-0.5 * mass * speed**2, rel=1e-12)
    assert found.process("potential_energy_change") == pytest.approx(-mass * GRAVITY * height, rel=1e-12)
    assert found.process("energy_change") == pytest.approx(0.0, abs=1e-7)
    assert found.process("entropy_generation") == pytest.approx(
        mass * capacity * math.log(t2 / t1), rel=1e-10
    )


def test_a_falling_body_without_friction_reaches_the_speed_of_its_height() -> None:
    """c₂ = √(2·g·h) where the temperature stays and nothing is transferred (Torricelli), whatever was claimed."""
    drop = process("first", "last", heat_transfers=[], work_transfers=[])
    first = {"inputs": quantities(temperature=300.0, velocity=0.0, elevation=25.0)}
    last = {"inputs": quantities(temperature=300.0, elevation=0.0), "results": {"velocity": "1 m/s"}}
    record = {
        "id": "case",
        "bodies": {"matter": matter("Steel ball", "constant specific heat", mass=3.0, specific_heat=460.0)},
        "states": {"first": {"matter": first}, "last": {"matter": last}},
        "processes": [drop],
    }
    found = calculated(record)
    assert found.state("velocity") == pytest.approx(math.sqrt(2.0 * GRAVITY * 25.0), rel=1e-12)
    assert found.process("kinetic_energy_change") == pytest.approx(3.0 * GRAVITY * 25.0, rel=1e-12)
