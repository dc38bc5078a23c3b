"""Boundary work of real fluids by a second route: ∫p dv taken numerically along the path.

Source: definition of the work of a quasi-static boundary, W = ∫p dV. The alternate calculation uses closed forms
(Helmholtz energy, internal energy, polytropic formula, trapezium); here the pressure is read from the property
library point by point and integrated, through the two-phase region where the path crosses it.
"""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import Any, Final

import pytest
from CoolProp.CoolProp import PropsSI
from scipy.integrate import quad
from scipy.optimize import brentq

from tests.published.processes.calculation import Calculated, heat, matter, one_change, path, si

pytestmark = pytest.mark.published

MASS: Final = 3.0
LIBRARY_NAMES: Final = {"Water": "Water", "Carbon dioxide": "CO2", "R134a": "R134a", "Propane": "n-Propane"}


def integral(pressure: Callable[[float], float], v1: float, v2: float, kinks: Sequence[float] = ()) -> float:
    """Return ∫p dV for 3 kg, with the volumes where the path meets the saturation line as break points."""
    inside = sorted(v for v in kinks if min(v1, v2) < v < max(v1, v2))
    ends = [min(v1, v2), *inside, max(v1, v2)]
    pieces = [quad(pressure, a, b, epsabs=0.0, epsrel=1e-10, limit=400)[0] for a, b in pairwise(ends)]
    return MASS * float(sum(pieces)) * (1.0 if v2 > v1 else -1.0)


def run(
    substance: str, first: dict[str, float], last: dict[str, float | str], kind: Any, **members: Any
) -> Calculated:
    """Return the process of 3 kg of a real fluid."""
    body = matter(substance, "real fluid", mass=MASS)
    members = {"heat_transfers": [heat(boundary_temperature=1500.0)], **members}
    return one_change(body, first, last, path=kind, **members)


ISOTHERMAL: Final = [
    ("Water", 423.15, 1.0e5, 20.0e5),  # superheated vapour to liquid
    ("Water", 640.0, 1.0e6, 40.0e6),  # close below the critical temperature
    ("Carbon dioxide", 295.0, 20.0e5, 120.0e5),
    ("Carbon dioxide", 320.0, 20.0e5, 200.0e5),  # supercritical
    ("R134a", 300.0, 1.0e5, 30.0e5),
    ("Propane", 330.0, 30.0e5, 2.0e5),  # expansion from liquid to vapour
]


@pytest.mark.parametrize(("substance", "t", "p1", "p2"), ISOTHERMAL)
def test_isothermal_work_is_the_integral(substance: str, t: float, p1: float, p2: float) -> None:
    """W by T·ΔS − ΔU equals ∫p dV, through condensation and evaporation."""
    fluid = LIBRARY_NAMES[substance]
    v1, v2 = (1.0 / PropsSI("D", "T", t, "P", p, fluid) for p in (p1, p2))
    kinks = [1.0 / PropsSI("D", "T", t, "Q", q, fluid) for q in (0, 1)] if t < PropsSI("Tcrit", fluid) else []
    expected = integral(lambda v: PropsSI("P", "T", t, "D", 1.0 / v, fluid), v1, v2, kinks)
    found = run(substance, {"temperature": t, "pressure": p1}, {"pressure": p2}, "isothermal")
    assert found.process("boundary_work") == pytest.approx(expected, rel=1e-7)


ISENTROPIC: Final = [
    ("Water", 723.15, 40.0e5, 0.2e5),  # superheated vapour to wet vapour
    ("Water", 500.0, 60.0e5, 2.0e5),  # liquid that flashes
    ("R134a", 360.0, 20.0e5, 1.0e5),
    ("Carbon dioxide", 330.0, 150.0e5, 20.0e5),  # supercritical into the dome
    ("Propane", 290.0, 2.0e5, 15.0e5),  # compression
]


@pytest.mark.parametrize(("substance", "t", "p1", "p2"), ISENTROPIC)
def test_isentropic_work_is_the_integral(substance: str, t: float, p1: float, p2: float) -> None:
    """W by −ΔU equals ∫p dV at constant entropy, into the dome and from the liquid."""
    fluid = LIBRARY_NAMES[substance]
    s = PropsSI("S", "T", t, "P", p1, fluid)
    v1, v2 = (1.0 / PropsSI("D", "P", p, "S", s, fluid) for p in (p1, p2))
    expected = integral(
        lambda v: PropsSI("P", "D", 1.0 / v, "S", s, fluid), v1, v2, _dome_at(fluid, s, p1, p2)
    )
    known = {"temperature": t, "pressure": p1}
    found = run(substance, known, {"pressure": p2}, "isentropic", heat_transfers=[])
    assert found.process("boundary_work") == pytest.approx(expected, rel=2e-7)


def _dome_at(fluid: str, s: float, p1: float, p2: float) -> list[float]:
    """Return the specific volumes at which an isentrope meets the saturation line between two pressures."""
    top = 0.9999 * PropsSI("pcrit", fluid)
    low, high = min(p1, p2), min(max(p1, p2), top)
    met = []
    for quality in (0, 1):
        gaps = [PropsSI("S", "P", p, "Q", quality, fluid) - s for p in (low, high)]
        if gaps[0] * gaps[1] < 0.0:
            p = brentq(lambda p, q=quality: PropsSI("S", "P", p, "Q", q, fluid) - s, low, high, rtol=1e-13)
            met.append(1.0 / PropsSI("D", "P", p, "Q", quality, fluid))
    return met


POLYTROPIC: Final[list[tuple[str, dict[str, float], float, float, str]]] = [
    ("R134a", {"temperature": 320.0, "pressure": 8.0e5}, 0.8, 4.0, ""),
    ("R134a", {"temperature": 300.0, "quality": 0.5}, 1.0, 3.0, "wet vapour"),
    ("Water", {"temperature": 450.0, "quality": 0.9}, 1.3, 0.4, ""),
    ("Carbon dioxide", {"temperature": 330.0, "pressure": 100.0e5}, 1.15, 2.5, "wet vapour"),
    ("Propane", {"temperature": 350.0, "pressure": 5.0e5}, -0.5, 1.2, ""),
]
"""Fluid, first state, exponent, v₂/v₁, and the phase of the last state where T or Q have an answer on each side."""
_INPUTS: Final = {"temperature": "T", "pressure": "P", "quality": "Q"}


@dataclass(frozen=True, slots=True)
class Expansion:
    """A polytropic change of 3 kg of a real fluid by direct calls of the library and quadrature."""

    v2: float
    p2: float
    t2: float
    work: float
    heat: float


def polytropic(substance: str, known: dict[str, float], exponent: float, ratio: float) -> Expansion:
    """Return end state, ∫p dV and Q along p·vⁿ = constant."""
    fluid = LIBRARY_NAMES[substance]
    (name, one), (other, two) = ((_INPUTS[name], value) for name, value in known.items())
    p1, rho1, u1 = (PropsSI(sought, name, one, other, two, fluid) for sought in "PDU")
    v1 = 1.0 / rho1
    v2, p2 = v1 * ratio, p1 * ratio**-exponent
    done = integral(lambda v: p1 * (v1 / v) ** exponent, v1, v2)
    t2, u2 = (PropsSI(name, "P", p2, "D", 1.0 / v2, fluid) for name in "TU")
    return Expansion(v2, p2, t2, done, MASS * (u2 - u1) + done)


def assert_is(found: Calculated, expected: Expansion) -> None:
    """Hold end state, work and heat against the reference."""
    assert found.state("specific_volume") == pytest.approx(expected.v2, rel=1e-6)
    assert found.process("boundary_work") == pytest.approx(expected.work, rel=1e-6)
    assert found.process("heat") == pytest.approx(expected.heat, rel=1e-6)


BY: Final = [
    (*case, by)
    for case in POLYTROPIC
    for by in ("specific_volume", "pressure", "temperature")
    # Along the first one T rises towards both sides in one phase: it alone tells no end state.
    if (case, by) != (POLYTROPIC[0], "temperature")
]


@pytest.mark.parametrize(("substance", "known", "exponent", "ratio", "phase", "by"), BY)
def test_polytropic_work_is_the_integral(
    substance: str, known: dict[str, float], exponent: float, ratio: float, phase: str, by: str
) -> None:
    """The closed form along p·vⁿ = constant, the end state on it and Q by the balance, whatever gave the end."""
    expected = polytropic(substance, known, exponent, ratio)
    ends = {"specific_volume": expected.v2, "pressure": expected.p2, "temperature": expected.t2}
    last: dict[str, float | str] = {by: ends[by]}
    if by == "temperature" and phase:
        last["phase"] = phase
    assert_is(run(substance, known, last, path("polytropic", exponent=exponent)), expected)


@pytest.mark.parametrize(("substance", "known", "exponent", "ratio", "phase"), POLYTROPIC)
def test_the_end_of_a_polytropic_path_follows_from_the_heat(
    substance: str, known: dict[str, float], exponent: float, ratio: float, phase: str
) -> None:
    """Q alone leads to the same end state; where it could also be reached the other way, the phase tells."""
    expected = polytropic(substance, known, exponent, ratio)
    last: dict[str, float | str] = {"phase": phase} if phase else {}
    wall = heat(boundary_temperature=1500.0, energy=expected.heat)
    found = run(substance, known, last, path("polytropic", exponent=exponent), heat_transfers=[wall])
    assert_is(found, expected)


def test_an_end_on_each_side_is_not_decided_by_chance() -> None:
    """Without the phase, R134a at T₂ may have expanded or been compressed: both ends are listed, none is chosen."""
    substance, known, exponent, ratio, _ = POLYTROPIC[1]
    expected = polytropic(substance, known, exponent, ratio)
    found = run(substance, known, {"temperature": expected.t2}, path("polytropic", exponent=exponent))
    outcome = found.case.failure("states/last/matter/pressure")
    assert outcome is not None
    assert outcome.kind == "several-roots"
    assert any(f"v = {expected.v2:.6g}" in root for root in outcome.roots)


@pytest.mark.parametrize(("rise", "ratio"), [(4.0e5, 1.6), (-1.5e5, 1.4), (3.0e5, 2.6)])
def test_work_along_a_straight_line_is_its_integral(rise: float, ratio: float) -> None:
    """R134a evaporating along a line p(V): the trapezium is ∫p dV, and the end state lies on line and surface."""
    t1, x1 = 280.0, 0.3
    p1, v1, u1 = (PropsSI(name, "T", t1, "Q", x1, "R134a") for name in "PDU")
    v1 = 1.0 / v1
    v2, p2 = v1 * ratio, p1 + rise
    expected = integral(lambda v: p1 + rise * (v - v1) / (v2 - v1), v1, v2)
    points = [{"pressure": si(p, "Pa"), "volume": si(MASS * v, "m³")} for p, v in ((p1, v1), (p2, v2))]
    kind = {"kind": "pressure linear in volume", "points": points}
    u2 = PropsSI("U", "P", p2, "D", 1.0 / v2, "R134a")
    found = run("R134a", {"temperature": t1, "quality": x1}, {"specific_volume": v2}, kind)
    assert found.process("boundary_work") == pytest.approx(expected, rel=1e-9)
    assert found.process("heat") == pytest.approx(MASS * (u2 - u1) + expected, rel=1e-7)


@pytest.mark.parametrize(
    ("substance", "library_name", "first", "external"),
    [
        # Ends close to the melting line, where the coldest states at the outside pressure lie.
        ("Carbon dioxide", "CO2", ("T", 228.08, "Q", 0.13615), 1576200.0),
        ("Nitrogen", "Nitrogen", ("T", 78.941, "P", 4720100.0), 2461000.0),
    ],
)
def test_an_end_close_to_the_melting_line_is_not_missed(
    substance: str, library_name: str, first: tuple[str, float, str, float], external: float
) -> None:
    """The balance against an outside pressure puts h₂ = u₁ + p_ext·v₁ (direct library calls), however cold."""
    v1, u1 = 1.0 / PropsSI("D", *first, library_name), PropsSI("U", *first, library_name)
    h2 = u1 + external * v1
    expected = PropsSI("T", "H", h2, "P", external, library_name)
    kinds = ["adiabatic", path("against constant external pressure", external_pressure=external)]
    names = {"T": "temperature", "P": "pressure", "Q": "quality"}
    known = {names[first[0]]: first[1], names[first[2]]: first[3]}
    body = matter(substance, "real fluid", mass=MASS)
    found = one_change(body, known, {"pressure": external}, path=kinds)
    assert found.state("temperature") == pytest.approx(expected, abs=1e-5)
