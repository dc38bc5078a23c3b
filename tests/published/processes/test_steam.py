"""Steam in rigid vessels and under pistons, against two other implementations of the IAPWS formulations.

Sources: the packages ``iapws`` (IAPWS-95 and IAPWS-IF97) and ``chemicals`` (IAPWS-95), which share no code and no
coefficient file with the property library of the alternate calculation. Formulation IAPWS R6-95(2018) and
R7-97(2012). The implementations differ by about 1e-3 J/kg in u and 1e-6 J/(kg·K) in s at equal T and ρ; the
tolerances leave room for ten times that and for the convergence of both sides' searches.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any, Final

import pytest
from chemicals.iapws import iapws95_properties
from iapws import IAPWS95, IAPWS97
from scipy.optimize import brentq

from tests.published.processes.calculation import Calculated, heat, matter, one_change, path, work

pytestmark = pytest.mark.published

MASS: Final = 2.0
ENERGY_TOLERANCE: Final = 0.5  # J, of some 10⁶
ENTROPY_TOLERANCE: Final = 1e-3  # J/K
WATER: Final = matter("Water", "real fluid", mass=MASS)


@dataclass(frozen=True, slots=True)
class Reference:
    """A state of the reference implementation, per unit mass in SI."""

    t: float
    p: float
    v: float
    u: float
    s: float

    @property
    def h(self) -> float:
        """Return the specific enthalpy. [J/kg]"""
        return self.u + self.p * self.v


def steam(**known: float) -> Reference:
    """Return a state by IAPWS-95; known in K, MPa, kg/m³, kJ/kg, kJ/(kg·K) as the package takes them."""
    found = IAPWS95(**known)
    for name, value in known.items():
        assert getattr(found, name) == pytest.approx(value, rel=1e-6), f"the reference missed its own {name}"
    return Reference(found.T, found.P * 1e6, found.v, found.u * 1e3, found.s * 1e3)


def steam_at(pressure: float, name: str, value: float) -> Reference:
    """Return the state at a pressure [MPa] with this h or s [SI], by the lever rule or by a search over T.

    The package's own search from (p, h) and (p, s) does not converge everywhere in the two-phase region.
    """
    liquid, vapour = (steam(P=pressure, x=x) for x in (0.0, 1.0))
    low, high = getattr(liquid, name), getattr(vapour, name)
    if low < value < high:
        return steam(P=pressure, x=(value - low) / (high - low))
    ends = (274.0, liquid.t - 1e-6) if value < low else (vapour.t + 1e-6, 1200.0)
    t = brentq(lambda t: getattr(steam(P=pressure, T=t), name) - value, *ends, xtol=1e-9)
    return steam(P=pressure, T=t)


def assert_changes(found: Calculated, first: Reference, last: Reference, boundary_work: float) -> None:
    """Hold changes, work, heat and the end states against the reference."""
    du, ds = MASS * (last.u - first.u), MASS * (last.s - first.s)
    assert found.process("internal_energy_change") == pytest.approx(du, abs=ENERGY_TOLERANCE)
    assert found.process("entropy_change") == pytest.approx(ds, abs=ENTROPY_TOLERANCE)
    assert found.process("boundary_work") == pytest.approx(boundary_work, abs=ENERGY_TOLERANCE)
    assert found.process("heat") == pytest.approx(du + found.process("work"), abs=ENERGY_TOLERANCE)
    for name, state in (("first", first), ("last", last)):
        assert found.state("temperature", name) == pytest.approx(state.t, abs=1e-4)
        assert found.state("specific_volume", name) == pytest.approx(state.v, rel=2e-6)


def walls(**given: float) -> dict[str, Any]:
    """Return one heat transfer."""
    return {"heat_transfers": [heat(boundary_temperature=800.0, **given)]}


RIGID: Final[list[tuple[dict[str, float], float]]] = [
    ({"T": 453.15, "x": 0.92}, 368.15),
    ({"T": 573.15, "P": 0.2}, 333.15),
    ({"T": 420.0, "x": 0.0025}, 650.0),
    ({"T": 300.0, "P": 8.0}, 340.0),
    ({"T": 700.0, "P": 30.0}, 500.0),
]


@pytest.mark.parametrize(("first", "t2"), RIGID)
def test_a_rigid_vessel_is_heated_or_cooled(first: dict[str, float], t2: float) -> None:
    """At constant volume Q = ΔU, with the last state at the first one's density."""
    start = steam(**first)
    end = steam(T=t2, rho=1.0 / start.v)
    known = {"temperature": start.t, "specific_volume": start.v}
    found = one_change(WATER, known, {"temperature": t2}, path="constant volume", **walls())
    assert_changes(found, start, end, 0.0)


@pytest.mark.parametrize(("first", "t2"), RIGID)
def test_the_end_state_of_a_rigid_vessel_follows_from_its_heat(first: dict[str, float], t2: float) -> None:
    """Given the heat alone, the last state is where u₂ = u₁ + Q/m at the same density."""
    start = steam(**first)
    end = steam(T=t2, rho=1.0 / start.v)
    known = {"temperature": start.t, "specific_volume": start.v}
    warmth = MASS * (end.u - start.u)
    found = one_change(WATER, known, {}, path="constant volume", **walls(energy=warmth))
    assert found.state("temperature") == pytest.approx(t2, abs=1e-3)
    assert found.state("pressure") == pytest.approx(end.p, rel=1e-5)


PISTON: Final[list[tuple[dict[str, float], dict[str, float]]]] = [
    ({"T": 313.15, "P": 0.3}, {"T": 473.15}),
    ({"T": 623.15, "P": 1.0}, {"x": 0.3}),
    ({"P": 2.5, "x": 0.1}, {"x": 0.95}),
    ({"T": 640.0, "P": 25.0}, {"T": 680.0}),
]


@pytest.mark.parametrize(("first", "last"), PISTON)
def test_a_weighted_piston_keeps_the_pressure(first: dict[str, float], last: dict[str, float]) -> None:
    """At constant pressure W = p·ΔV and Q = ΔH; the end state also follows from the heat alone."""
    start, end = steam(**first), steam(P=first["P"], **last)
    known = {"pressure": start.p, "specific_volume": start.v}
    target = {"quality": last["x"]} if "x" in last else {"temperature": last["T"]}
    done = MASS * start.p * (end.v - start.v)
    found = one_change(WATER, known, target, path="constant pressure", **walls())
    assert_changes(found, start, end, done)
    assert found.process("heat") == pytest.approx(MASS * (end.h - start.h), abs=ENERGY_TOLERANCE)
    inverse = one_change(WATER, known, {}, path="constant pressure", **walls(energy=MASS * (end.h - start.h)))
    assert_changes(inverse, start, end, done)


@pytest.mark.parametrize(
    ("first", "pressure"),
    [
        ({"T": 723.15, "P": 4.0}, 0.01),
        ({"P": 0.1, "x": 1.0}, 0.6),
        ({"P": 1.5, "x": 0.0}, 0.2),
        ({"T": 300.0, "P": 0.1}, 20.0),
    ],
)
def test_isentropic_expansion_and_compression(first: dict[str, float], pressure: float) -> None:
    """At constant entropy W = −ΔU, into the dome, out of it, from the liquid line, and within the liquid."""
    start = steam(**first)
    end = steam_at(pressure, "s", start.s)
    known = {"pressure": start.p, "specific_volume": start.v}
    found = one_change(WATER, known, {"pressure": pressure * 1e6}, path="isentropic", heat_transfers=[])
    assert_changes(found, start, end, -MASS * (end.u - start.u))
    assert found.process("entropy_generation") == pytest.approx(0.0, abs=ENTROPY_TOLERANCE)


@pytest.mark.parametrize(
    ("temperature", "p1", "p2"), [(423.15, 0.1, 2.0), (600.0, 0.1, 30.0), (700.0, 1.0, 50.0)]
)
def test_isothermal_compression_through_condensation(temperature: float, p1: float, p2: float) -> None:
    """At constant temperature W = T·ΔS − ΔU (the Helmholtz energy), from vapour through the dome to liquid."""
    start, end = steam(T=temperature, P=p1), steam(T=temperature, P=p2)
    done = MASS * (temperature * (end.s - start.s) - (end.u - start.u))
    known = {"temperature": temperature, "pressure": start.p}
    found = one_change(WATER, known, {"pressure": end.p}, path="isothermal", **walls())
    assert_changes(found, start, end, done)


def test_stirred_under_a_piston() -> None:
    """Shaft work into an insulated cylinder raises the enthalpy by as much."""
    start = steam(P=0.5, x=0.2)
    end = steam_at(0.5, "h", start.h + 900.0e3)
    found = one_change(
        WATER,
        {"pressure": start.p, "quality": 0.2},
        {},
        path=["adiabatic", "constant pressure"],
        work_transfers=[work("shaft", -MASS * 900.0e3)],
    )
    assert_changes(found, start, end, MASS * start.p * (end.v - start.v))


@pytest.mark.parametrize("external", [0.05, 0.4, 3.0])
def test_adiabatic_change_against_an_outside_pressure(external: float) -> None:
    """ΔU = −p_ext·ΔV with p₂ = p_ext puts the last state at h₂ = u₁ + p_ext·v₁."""
    start = steam(T=520.0, P=1.0)
    end = steam_at(external, "h", start.u + external * 1e6 * start.v)
    kinds = ["adiabatic", path("against constant external pressure", external_pressure=external * 1e6)]
    found = one_change(
        WATER,
        {"temperature": 520.0, "pressure": 1.0e6},
        {"pressure": external * 1e6},
        path=kinds,
    )
    assert_changes(found, start, end, MASS * external * 1e6 * (end.v - start.v))
    assert found.process("entropy_generation") > 0.0


SINGLE_PHASE: Final = [
    (t1, p1, t2)
    for t1, p1 in ((300.0, 1e5), (300.0, 50e6), (450.0, 2e5), (600.0, 5e6), (700.0, 40e6), (900.0, 1e6))
    for t2 in (650.0, 800.0, 1000.0)
]


@pytest.mark.parametrize(("t1", "p1", "t2"), SINGLE_PHASE)
def test_heating_at_constant_pressure_by_a_third_implementation(t1: float, p1: float, t2: float) -> None:
    """Q = ΔH and ΔS by ``chemicals.iapws`` at the same temperatures and pressure."""
    (rho1, u1, s1, h1), (rho2, u2, s2, h2) = (iapws95_properties(t, p1)[:4] for t in (t1, t2))
    known = {"temperature": t1, "pressure": p1}
    found = one_change(WATER, known, {"temperature": t2}, path="constant pressure", **walls())
    assert found.process("heat") == pytest.approx(MASS * (h2 - h1), abs=ENERGY_TOLERANCE)
    assert found.process("internal_energy_change") == pytest.approx(MASS * (u2 - u1), abs=ENERGY_TOLERANCE)
    assert found.process("entropy_change") == pytest.approx(MASS * (s2 - s1), abs=ENTROPY_TOLERANCE)
    done = MASS * p1 * (1.0 / rho2 - 1.0 / rho1)
    assert found.process("boundary_work") == pytest.approx(done, abs=ENERGY_TOLERANCE)


INDUSTRIAL: Final[list[tuple[str, dict[str, float], dict[str, float]]]] = [
    ("constant pressure", {"T": 313.15, "P": 0.3}, {"T": 473.15, "P": 0.3}),
    ("constant pressure", {"T": 400.0, "P": 10.0}, {"T": 1000.0, "P": 10.0}),
    ("constant pressure", {"T": 900.0, "P": 2.0}, {"T": 1500.0, "P": 2.0}),
    ("constant pressure", {"P": 1.0, "x": 0.1}, {"P": 1.0, "x": 0.8}),
    ("isothermal", {"T": 423.15, "P": 0.1}, {"T": 423.15, "P": 2.0}),
]
_WORK: Final[dict[str, Callable[[Reference, Reference], float]]] = {
    "constant pressure": lambda a, b: MASS * a.p * (b.v - a.v),
    "isothermal": lambda a, b: MASS * (a.t * (b.s - a.s) - (b.u - a.u)),
}
_NAMES: Final = {"T": "temperature", "P": "pressure", "x": "quality"}


@pytest.mark.parametrize(("kind", "first", "last"), INDUSTRIAL)
def test_the_industrial_formulation_when_asked_for(
    kind: str, first: dict[str, float], last: dict[str, float]
) -> None:
    """With ``property_source: industrial`` the changes are those of IAPWS-IF97 (regions 1, 2, 4 and 5)."""
    start, end = (_industrial(**known) for known in (first, last))
    body = {**WATER, "property_source": "industrial"}
    known, target = (
        {_NAMES[name]: value * (1e6 if name == "P" else 1.0) for name, value in ends.items()}
        for ends in (first, last)
    )
    found = one_change(body, known, target, path=kind, **walls())
    assert_changes(found, start, end, _WORK[kind](start, end))


def _industrial(**known: float) -> Reference:
    found = IAPWS97(**known)
    return Reference(found.T, found.P * 1e6, found.v, found.u * 1e3, found.s * 1e3)
