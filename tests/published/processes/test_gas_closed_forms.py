"""A gas with constant specific heats along every path, against closed forms worked out here by hand.

Source of all of them: the first law for a closed system with u = c_v·T and p·v = R·T, integrated along the path;
``k`` is c_p/c_v. Each end state is asked for in every way that determines it, the balance included.
"""

from __future__ import annotations

import math
from typing import Any, Final

import pytest

from tests.published.processes.calculation import Calculated, heat, matter, one_change, path

pytestmark = pytest.mark.published

GASES: Final = {
    "diatomic": (718.0, 287.0),
    "monatomic": (3116.0, 2077.0),
    "polyatomic": (657.0, 189.0),
}
MASS: Final = 2.5
T1, P1 = 320.0, 2.0e5
FIRST: Final = {"temperature": T1, "pressure": P1}


@pytest.fixture(params=GASES, name="gas")
def any_gas(request: pytest.FixtureRequest) -> tuple[float, float]:
    """Return (c_v, R) of a gas. [J/(kg·K)]"""
    return GASES[request.param]


def change(gas: tuple[float, float], last: dict[str, float], kind: Any, **members: Any) -> Calculated:
    """Return a process of 2.5 kg of gas from 320 K and 2 bar."""
    cv, constant = gas
    body = matter(
        "Works gas",
        "constant specific heat",
        mass=MASS,
        specific_heat_at_constant_volume=cv,
        gas_constant=constant,
    )
    return one_change(body, FIRST, last, path=kind, **members)


def open_heat(**given: float) -> list[dict[str, Any]]:
    """Return one heat transfer at a hot wall, its energy an input where given."""
    return [heat(boundary_temperature=900.0, **given)]


@pytest.mark.parametrize("ratio", [0.2, 0.999, 1.7, 12.0])
@pytest.mark.parametrize("by", ["pressure", "specific_volume", "heat", "work"])
def test_isothermal_work_is_the_logarithm_of_the_volume_ratio(
    gas: tuple[float, float], ratio: float, by: str
) -> None:
    """W = Q = m·R·T·ln(V₂/V₁) and ΔS = m·R·ln(V₂/V₁), whatever the end state was given by."""
    _, constant = gas
    v1 = constant * T1 / P1
    work = MASS * constant * T1 * math.log(ratio)
    last = {"pressure": {"pressure": P1 / ratio}, "specific_volume": {"specific_volume": v1 * ratio}}.get(
        by, {}
    )
    members: dict[str, Any] = {
        "heat": {"heat_transfers": open_heat(energy=work)},
        "work": {"heat_transfers": open_heat(), "inputs": {"boundary_work": f"{work!r} J"}},
    }.get(by, {"heat_transfers": open_heat()})
    found = change(gas, last, "isothermal", **members)
    assert found.state("specific_volume") == pytest.approx(v1 * ratio, rel=1e-9)
    assert found.state("temperature") == pytest.approx(T1, rel=1e-12)
    assert found.process("boundary_work") == pytest.approx(work, rel=1e-9)
    assert found.process("heat") == pytest.approx(work, rel=1e-9)
    assert found.process("entropy_change") == pytest.approx(MASS * constant * math.log(ratio), rel=1e-9)
    assert found.process("internal_energy_change") == pytest.approx(0.0, abs=1e-7)


POLYTROPIC: Final = [
    (exponent, by)
    for exponent in (-1.0, 0.0, 0.5, 1.0, 1.25, 1.6, 3.0)
    for by in ("pressure", "specific_volume", "temperature", "heat", "work")
    # What is the same all along the path fixes no end state.
    if (exponent, by) not in {(0.0, "pressure"), (1.0, "temperature")}
]


@pytest.mark.parametrize(("exponent", "by"), POLYTROPIC)
def test_polytropic_end_state_work_heat_and_entropy(
    gas: tuple[float, float], exponent: float, by: str
) -> None:
    """T₂ = T₁·(v₁/v₂)^(n−1); W = m·R·(T₂−T₁)/(1−n), a logarithm for n = 1; Q and ΔS follow."""
    cv, constant = gas
    v1, ratio = constant * T1 / P1, 0.6
    t2, p2 = T1 * ratio ** (1.0 - exponent), P1 * ratio**-exponent
    isothermal = exponent == 1.0
    work = (
        MASS * constant * T1 * math.log(ratio)
        if isothermal
        else MASS * constant * (t2 - T1) / (1.0 - exponent)
    )
    warmth = work + MASS * cv * (t2 - T1)
    last = {
        "pressure": {"pressure": p2},
        "specific_volume": {"specific_volume": v1 * ratio},
        "temperature": {"temperature": t2},
    }.get(by, {})
    members: dict[str, Any] = {"heat_transfers": open_heat()}
    if by == "heat":
        members = {"heat_transfers": open_heat(energy=warmth)}
    if by == "work":
        members["inputs"] = {"boundary_work": f"{work!r} J"}
    found = change(gas, last, path("polytropic", exponent=exponent), **members)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-7)
    assert found.state("pressure") == pytest.approx(p2, rel=1e-7)
    assert found.process("boundary_work") == pytest.approx(work, rel=1e-7)
    assert found.process("heat") == pytest.approx(warmth, rel=1e-6)
    entropy = MASS * (cv * math.log(t2 / T1) + constant * math.log(ratio))
    assert found.process("entropy_change") == pytest.approx(entropy, rel=1e-6)


@pytest.mark.parametrize("exponent", [0.4, 1.0, 1.31])
def test_the_exponent_follows_from_the_end_states(gas: tuple[float, float], exponent: float) -> None:
    """Without an input n = ln(p₂/p₁)/ln(v₁/v₂) follows from the ends."""
    v1 = gas[1] * T1 / P1
    last = {"pressure": P1 * 3.0**exponent, "specific_volume": v1 / 3.0}
    found = change(
        gas, last, {"kind": "polytropic", "results": {"exponent": "1"}}, heat_transfers=open_heat()
    )
    assert found.value("processes/change/path/exponent") == pytest.approx(exponent, rel=1e-9)


@pytest.mark.parametrize("ratio", [0.1, 0.7, 4.0])
@pytest.mark.parametrize("by", ["pressure", "specific_volume", "temperature", "work"])
def test_isentropic_end_state_and_work(gas: tuple[float, float], ratio: float, by: str) -> None:
    """T₂ = T₁·(v₁/v₂)^(k−1), p₂ = p₁·(v₁/v₂)^k, W = m·c_v·(T₁ − T₂), nothing transferred as heat or generated."""
    cv, constant = gas
    k, v1 = 1.0 + constant / cv, constant * T1 / P1
    t2, p2 = T1 * ratio ** (1.0 - k), P1 * ratio**-k
    work = MASS * cv * (T1 - t2)
    last = {
        "pressure": {"pressure": p2},
        "specific_volume": {"specific_volume": v1 * ratio},
        "temperature": {"temperature": t2},
    }.get(by, {})
    given = {"inputs": {"boundary_work": f"{work!r} J"}} if by == "work" else {}
    found = change(gas, last, "isentropic", heat_transfers=[], **given)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-7)
    assert found.state("pressure") == pytest.approx(p2, rel=1e-6)
    assert found.process("work") == pytest.approx(work, rel=1e-7)
    assert found.process("heat") == 0.0
    assert found.process("entropy_generation") == pytest.approx(0.0, abs=1e-6 * MASS * cv)


@pytest.mark.parametrize("by", ["temperature", "specific_volume", "heat", "work"])
@pytest.mark.parametrize("ratio", [0.5, 2.2])
def test_heating_at_constant_pressure(gas: tuple[float, float], ratio: float, by: str) -> None:
    """Q = m·c_p·ΔT, W = m·R·ΔT, ΔS = m·c_p·ln(T₂/T₁)."""
    cv, constant = gas
    t2, v1 = T1 * ratio, constant * T1 / P1
    warmth, work = MASS * (cv + constant) * (t2 - T1), MASS * constant * (t2 - T1)
    last = {"temperature": {"temperature": t2}, "specific_volume": {"specific_volume": v1 * ratio}}.get(
        by, {}
    )
    members: dict[str, Any] = {"heat_transfers": open_heat()}
    if by == "heat":
        members = {"heat_transfers": open_heat(energy=warmth)}
    if by == "work":
        members["inputs"] = {"boundary_work": f"{work!r} J"}
    found = change(gas, last, "constant pressure", **members)
    assert found.state("temperature") == pytest.approx(t2, rel=1e-9)
    assert found.process("heat") == pytest.approx(warmth, rel=1e-9)
    assert found.process("boundary_work") == pytest.approx(work, rel=1e-9)
    assert found.process("enthalpy_change") == pytest.approx(warmth, rel=1e-9)
    assert found.process("entropy_change") == pytest.approx(
        MASS * (cv + constant) * math.log(ratio), rel=1e-9
    )
    assert found.process("entropy_transfer") == pytest.approx(warmth / 900.0, rel=1e-9)


@pytest.mark.parametrize("by", ["temperature", "pressure", "heat"])
@pytest.mark.parametrize("ratio", [0.5, 2.2])
def test_heating_at_constant_volume(gas: tuple[float, float], ratio: float, by: str) -> None:
    """Q = m·c_v·ΔT, p₂ = p₁·T₂/T₁, ΔS = m·c_v·ln(T₂/T₁), no work."""
    cv, _ = gas
    t2 = T1 * ratio
    warmth = MASS * cv * (t2 - T1)
    last = {"temperature": {"temperature": t2}, "pressure": {"pressure": P1 * ratio}}.get(by, {})
    given = {"energy": warmth} if by == "heat" else {}
    found = change(gas, last, "constant volume", heat_transfers=open_heat(**given))
    assert found.state("temperature") == pytest.approx(t2, rel=1e-9)
    assert found.state("pressure") == pytest.approx(P1 * ratio, rel=1e-9)
    assert found.process("heat") == pytest.approx(warmth, rel=1e-9)
    assert found.process("work") == 0.0
    assert found.process("entropy_change") == pytest.approx(MASS * cv * math.log(ratio), rel=1e-9)


@pytest.mark.parametrize(("kind", "ratio"), [("constant volume", 0.4), ("constant pressure", 0.4)])
def test_the_first_state_is_found_from_the_last(gas: tuple[float, float], kind: str, ratio: float) -> None:
    """A path serves both its ends: the state before a given heat transfer is T₂ − Q/(m·c)."""
    cv, constant = gas
    capacity = MASS * (cv + (constant if kind == "constant pressure" else 0.0))
    warmth = capacity * T1 * (1.0 - ratio)
    body = matter(
        "Works gas",
        "constant specific heat",
        mass=MASS,
        specific_heat_at_constant_volume=cv,
        gas_constant=constant,
    )
    found = one_change(body, {}, FIRST, path=kind, heat_transfers=open_heat(energy=warmth))
    assert found.state("temperature", "first") == pytest.approx(T1 * ratio, rel=1e-9)
