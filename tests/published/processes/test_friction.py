"""Friction that stays in the system, against closed forms.

Source: W = ∫p dV + W_fr with W_fr ≤ 0, first and second law for a closed system, worked out here by hand for a gas with
constant c_v and R.
"""

from __future__ import annotations

import math
from typing import Any, Final

import pytest

from tests.published.processes.calculation import Calculated, matter, one_change, path, quantities

pytestmark = pytest.mark.published

CV, R, MASS = 718.0, 287.0, 0.5
GAS: Final = matter(
    "Works gas", "constant specific heat", mass=MASS, specific_heat_at_constant_volume=CV, gas_constant=R
)
FIRST: Final = {"temperature": 400.0, "pressure": 8.0e5}
AMBIENT = 298.15


def rubbing(energy: float | None = 3000.0) -> dict[str, Any]:
    """Return friction of a piston."""
    inputs = {} if energy is None else quantities(energy=energy)
    return {"id": "rings", "kind": "friction", "direction": "in", "inputs": inputs}


def change(last: dict[str, float], *works: dict[str, Any], **members: Any) -> Calculated:
    """Return a process of the gas from 400 K and 8 bar."""
    return one_change(GAS, FIRST, last, work_transfers=[*works], **members)


def test_isothermal_expansion_with_friction() -> None:
    """Less work comes out, less heat goes in, and S_gen = F/T with the wall at the temperature of the gas."""
    wall = {"id": "wall", **quantities(boundary_temperature=400.0)}
    found = change({"pressure": 4.0e5}, rubbing(), path="isothermal", heat_transfers=[wall])
    boundary = MASS * R * 400.0 * math.log(2.0)
    assert found.process("boundary_work") == pytest.approx(boundary, rel=1e-9)
    assert found.process("work") == pytest.approx(boundary - 3000.0, rel=1e-9)
    assert found.process("heat") == pytest.approx(boundary - 3000.0, rel=1e-9)
    assert found.process("entropy_generation") == pytest.approx(3000.0 / 400.0, rel=1e-6)
    assert found.process("exergy_destruction") == pytest.approx(AMBIENT * 7.5, rel=1e-6)


def test_heat_at_the_temperature_of_the_system_leaves_the_entropy_of_friction() -> None:
    """T is constant, so that ∫δQ/T = Q/T although friction works beside it."""
    wall = {"id": "wall", "boundary_temperature": "system"}
    found = change({"pressure": 4.0e5}, rubbing(), path="isothermal", heat_transfers=[wall])
    assert found.process("entropy_generation") == pytest.approx(7.5, rel=1e-6)


def test_isobaric_expansion_with_friction_finds_its_end() -> None:
    """m·c_p·ΔT = Q + F at constant pressure."""
    wall = {"id": "wall", **quantities(boundary_temperature=700.0), "inputs": quantities(energy=5.0e4)}
    found = change({}, rubbing(), path="constant pressure", heat_transfers=[wall])
    assert found.state("temperature") == pytest.approx(400.0 + 53.0e3 / (MASS * (CV + R)), rel=1e-9)


def test_friction_of_an_adiabatic_polytropic_expansion() -> None:
    """Without heat the friction is what polytropic work and ΔU leave: F = W_b + ΔU, and it generates all entropy."""
    found = change(
        {"pressure": 4.0e5}, rubbing(None), path=path("polytropic", exponent=1.3), heat_transfers=[]
    )
    t2 = 400.0 * 0.5 ** (0.3 / 1.3)
    rubbed = MASS * R * (400.0 - t2) / 0.3 + MASS * CV * (t2 - 400.0)
    assert found.process("friction_work") == pytest.approx(-rubbed, rel=1e-9)
    generated = MASS * ((CV + R) * math.log(t2 / 400.0) + R * math.log(2.0))
    assert found.process("entropy_generation") == pytest.approx(generated, rel=1e-8)


def test_friction_in_compression_takes_more_work() -> None:
    """The same friction goes in whichever way the piston moves."""
    wall = {"id": "wall", **quantities(boundary_temperature=400.0)}
    found = change({"pressure": 16.0e5}, rubbing(), path="isothermal", heat_transfers=[wall])
    assert found.process("work") == pytest.approx(-MASS * R * 400.0 * math.log(2.0) - 3000.0, rel=1e-9)
    assert found.process("entropy_generation") == pytest.approx(7.5, rel=1e-6)


def test_brake_drum_takes_up_what_the_shoes_rub() -> None:
    """ΔT = F/C and S_gen = C·ln(T₂/T₁)."""
    drum = matter("Cast iron", "constant specific heat", mass=12.0, specific_heat=500.0)
    shoes = {"id": "shoes", "kind": "friction", "direction": "in", "inputs": quantities(energy=3.6e5)}
    found = one_change(drum, {"temperature": 300.0}, {}, heat_transfers=[], work_transfers=[shoes])
    assert found.state("temperature") == pytest.approx(360.0, rel=1e-12)
    assert found.process("entropy_generation") == pytest.approx(6000.0 * math.log(1.2), rel=1e-10)


def test_free_expansion_then_nothing_to_rub() -> None:
    """A piston that rubs away all its boundary work delivers none, as a free expansion: S_gen = m·R·ln 2."""
    rubbed = MASS * R * 400.0 * math.log(2.0)
    found = change({"pressure": 4.0e5}, rubbing(rubbed), path="isothermal", heat_transfers=[])
    assert found.process("work") == pytest.approx(0.0, abs=1e-6)
    assert found.process("entropy_generation") == pytest.approx(MASS * R * math.log(2.0), rel=1e-9)
