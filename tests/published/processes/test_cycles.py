"""Cycles of closed processes with an ideal gas, against their published efficiencies.

Source of the closed forms: the air-standard analysis of each cycle (constant specific heats, every process closed
and quasi-static), derived from Q and W of the single processes; ``k`` = c_p/c_v. Each cycle is written with as few
inputs as fix it, so that states come from paths in both directions.
"""

from __future__ import annotations

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from functools import cache
from math import log
from typing import Final

import pytest

from tests.published.processes.calculation import Calculated, calculate, matter, process

pytestmark = pytest.mark.published

CV, R = 718.0, 287.0
CP, K = CV + R, 1.0 + R / CV
T1, P1, V1 = 300.0, 1.0e5, 287.0 * 300.0 / 1.0e5
COLD: Final = {"temperature": T1, "pressure": P1}


@dataclass(frozen=True, slots=True)
class Cycle:
    """A cycle: its states with their inputs, the path from each to the next, and its closed form."""

    name: str
    states: Sequence[Mapping[str, float]]
    paths: Sequence[str]
    efficiency: float
    source: str


def otto(r: float) -> Cycle:
    """Return two isentropic and two constant-volume processes; ``r`` is the compression ratio."""
    states = (COLD, {"specific_volume": V1 / r}, {"temperature": 1500.0}, {"specific_volume": V1})
    paths = ("isentropic", "constant volume", "isentropic", "constant volume")
    return Cycle("Otto", states, paths, 1.0 - r ** (1.0 - K), "η = 1 − r^(1−k)")


def diesel(r: float, cut: float) -> Cycle:
    """Return heating at constant pressure from V₂ to cut·V₂."""
    states = (COLD, {"specific_volume": V1 / r}, {"specific_volume": cut * V1 / r}, {"specific_volume": V1})
    paths = ("isentropic", "constant pressure", "isentropic", "constant volume")
    closed = 1.0 - r ** (1.0 - K) * (cut**K - 1.0) / (K * (cut - 1.0))
    return Cycle("Diesel", states, paths, closed, "η = 1 − r^(1−k)·(ρ^k − 1)/(k·(ρ − 1))")


def dual(r: float, rise: float, cut: float) -> Cycle:
    """Return heating at constant volume, then at constant pressure."""
    p2 = P1 * r**K
    states = (
        COLD,
        {"specific_volume": V1 / r},
        {"pressure": rise * p2},
        {"specific_volume": cut * V1 / r},
        {"specific_volume": V1},
    )
    paths = ("isentropic", "constant volume", "constant pressure", "isentropic", "constant volume")
    part = (rise * cut**K - 1.0) / ((rise - 1.0) + K * rise * (cut - 1.0))
    return Cycle(
        "dual",
        states,
        paths,
        1.0 - r ** (1.0 - K) * part,
        "Diesel and Otto with a pressure ratio α in between",
    )


def carnot(hot: float, ratio: float) -> Cycle:
    """Return two isothermal and two isentropic processes; ``ratio`` is V₃/V₂ of the hot expansion."""
    v2 = V1 * (T1 / hot) ** (1.0 / (K - 1.0))
    states = (COLD, {"temperature": hot}, {"specific_volume": v2 * ratio}, {"temperature": T1})
    paths = ("isentropic", "isothermal", "isentropic", "isothermal")
    return Cycle("Carnot", states, paths, 1.0 - T1 / hot, "η = 1 − T_c/T_h")


def brayton(ratio: float) -> Cycle:
    """Return two isentropic and two constant-pressure processes; ``ratio`` is p₂/p₁."""
    states = (COLD, {"pressure": ratio * P1}, {"temperature": 1200.0}, {"pressure": P1})
    paths = ("isentropic", "constant pressure", "isentropic", "constant pressure")
    return Cycle("Joule–Brayton", states, paths, 1.0 - ratio ** ((1.0 - K) / K), "η = 1 − (p₂/p₁)^((1−k)/k)")


def stirling(hot: float, r: float) -> Cycle:
    """Return two isothermal and two constant-volume processes, without a regenerator."""
    states = (COLD, {"specific_volume": V1 / r}, {"temperature": hot}, {"specific_volume": V1})
    paths = ("isothermal", "constant volume", "isothermal", "constant volume")
    closed = R * (hot - T1) * log(r) / (R * hot * log(r) + CV * (hot - T1))
    return Cycle("Stirling", states, paths, closed, "isothermal work per isothermal and constant-volume heat")


def ericsson(hot: float, ratio: float) -> Cycle:
    """Return two isothermal and two constant-pressure processes, without a regenerator."""
    states = (COLD, {"pressure": ratio * P1}, {"temperature": hot}, {"pressure": P1})
    paths = ("isothermal", "constant pressure", "isothermal", "constant pressure")
    closed = R * (hot - T1) * log(ratio) / (R * hot * log(ratio) + CP * (hot - T1))
    return Cycle(
        "Ericsson", states, paths, closed, "isothermal work per isothermal and constant-pressure heat"
    )


def lenoir(rise: float) -> Cycle:
    """Return heating at constant volume, isentropic expansion to p₁, cooling at constant pressure."""
    states = (COLD, {"pressure": rise * P1}, {"pressure": P1})
    paths = ("constant volume", "isentropic", "constant pressure")
    closed = 1.0 - K * (rise ** (1.0 / K) - 1.0) / (rise - 1.0)
    return Cycle("Lenoir", states, paths, closed, "η = 1 − k·(α^(1/k) − 1)/(α − 1)")


CYCLES: Final = (
    *(otto(r) for r in (2.0, 9.5, 14.0)),
    *(diesel(r, cut) for r in (12.0, 20.0) for cut in (1.5, 3.0)),
    dual(14.0, 1.6, 1.3),
    *(carnot(hot, 2.5) for hot in (350.0, 900.0)),
    *(brayton(ratio) for ratio in (3.0, 12.0)),
    stirling(900.0, 4.0),
    ericsson(900.0, 4.0),
    lenoir(3.0),
)


def name_of(cycle: Cycle) -> str:
    """Return a short name for a test's identifier."""
    return f"{cycle.name} {100 * cycle.efficiency:.1f} %"


@cache
def forwards(number: int) -> Calculated:
    """Return a cycle of the list, calculated once."""
    return run(CYCLES[number])


def run(cycle: Cycle, backwards: bool = False, **members: str) -> Calculated:
    """Return a cycle of 3 g of gas, driven forwards or backwards."""
    names = [f"s{i}" for i in range(len(cycle.states))]
    ends = list(zip(names, [*names[1:], names[0]], cycle.paths, strict=True))
    processes = [
        process(*((last, first) if backwards else (first, last)), name=f"p{i}", path=kind)
        for i, (first, last, kind) in enumerate(ends)
    ]
    body = matter(
        "Works gas",
        "constant specific heat",
        mass=0.003,
        specific_heat_at_constant_volume=CV,
        gas_constant=R,
    )
    ordered = processes[::-1] if backwards else processes
    return calculate(body, dict(zip(names, cycle.states, strict=True)), ordered, **members)


@pytest.mark.parametrize("number", range(len(CYCLES)), ids=[name_of(cycle) for cycle in CYCLES])
def test_thermal_efficiency_is_the_closed_form(number: int) -> None:
    """Net work per heat supplied equals the closed form, and net work equals net heat."""
    cycle, found = CYCLES[number], forwards(number)
    assert found.value("results/thermal_efficiency") == pytest.approx(cycle.efficiency, rel=1e-8)
    supplied = found.value("results/heat_supplied")
    assert found.value("results/net_work") == pytest.approx(cycle.efficiency * supplied, rel=1e-8)
    assert found.value("results/net_heat") == pytest.approx(found.value("results/net_work"), rel=1e-8)
    assert found.value("results/heat_rejected") == pytest.approx(
        (1.0 - cycle.efficiency) * supplied, rel=1e-8
    )


@pytest.mark.parametrize("number", range(len(CYCLES)), ids=[name_of(cycle) for cycle in CYCLES])
@pytest.mark.parametrize("property_", ["internal_energy_change", "enthalpy_change", "entropy_change"])
def test_nothing_of_a_state_remains_after_a_cycle(number: int, property_: str) -> None:
    """ΔU, ΔH and ΔS of the processes sum to zero around every cycle."""
    found = forwards(number)
    changes = [found.process(property_, f"p{i}") for i in range(len(CYCLES[number].paths))]
    assert sum(changes) == pytest.approx(0.0, abs=1e-8 * max(map(abs, changes)))


@pytest.mark.parametrize(("purpose", "useful"), [("cooling", T1), ("heating", 350.0)])
def test_a_reversed_carnot_cycle_has_the_carnot_coefficient(purpose: str, useful: float) -> None:
    """COP = T_c/(T_h − T_c) for cooling, T_h/(T_h − T_c) for heating."""
    found = run(carnot(350.0, 2.5), backwards=True, purpose=purpose)
    expected = useful / (350.0 - T1)
    assert found.value("results/coefficient_of_performance") == pytest.approx(expected, rel=1e-8)
    assert found.value("results/net_work") < 0.0


def test_a_cycle_without_heat_supplies_and_rejects_none() -> None:
    """Compression and expansion along one adiabat supply and reject nothing: zero, which is a value to compare."""
    states = {"s0": COLD, "s1": {"specific_volume": V1 / 5.0}}
    back_and_forth = [
        process("s0", "s1", name="in", path="isentropic", heat_transfers=[]),
        process("s1", "s0", name="out", path="isentropic", heat_transfers=[]),
    ]
    body = matter(
        "Works gas",
        "constant specific heat",
        mass=0.003,
        specific_heat_at_constant_volume=CV,
        gas_constant=R,
    )
    found = calculate(body, states, back_and_forth)
    assert found.value("results/heat_supplied") == 0.0
    assert found.value("results/heat_rejected") == 0.0
    assert found.value("results/net_work") == pytest.approx(0.0, abs=1e-9)
