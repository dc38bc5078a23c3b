"""Real fluids along four paths over a grid of starts, against two property libraries that share no code with ours.

Each fluid starts as wet vapour, compressed liquid, vapour near saturation, supercritical fluid and thin gas, and is
taken along a constant-volume, a constant-pressure, an isothermal and an isentropic path: 20 processes per fluid.
"""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from functools import cache
from typing import Any, Final

import pytest

from tests.published.processes.calculation import heat, matter, one_change
from tests.published.processes.cantera_fluid import CanteraFluid
from tests.published.processes.helmholtz import Helmholtz
from tests.published.processes.reference import Reference, ReferenceFluid

pytestmark = pytest.mark.published


@dataclass(frozen=True, slots=True)
class Start:
    """A first state in reduced form (T/T_c, and p/p_c or quality), and how far the paths lead.

    ``warmer`` is T₂/T₁ of the paths that heat, ``larger`` is v₂/v₁ of the isothermal and ``squeezed`` of the
    isentropic path.
    """

    name: str
    temperature: float
    warmer: float
    larger: float
    squeezed: float
    pressure: float | None = None
    quality: float | None = None


STARTS: Final = (
    Start("wet vapour", 0.75, 1.25, 1.8, 0.7, quality=0.4),
    Start("compressed liquid", 0.8, 1.04, 3.0, 3.0, pressure=2.0),
    Start("vapour", 0.95, 1.2, 2.5, 0.5, pressure=0.2),
    Start("supercritical", 1.1, 1.08, 2.5, 2.5, pressure=3.0),
    Start("thin gas", 0.9, 1.3, 2.5, 0.5, pressure=0.02),
)


@dataclass(frozen=True, slots=True)
class Source:
    """A fluid by our name, its reference, and how far the two may differ.

    ``energy`` is a part of R·T_c, ``entropy`` a part of R; ``latent`` is a part of the change itself, for paths that
    start as wet vapour.
    """

    substance: str
    reference: Callable[[], ReferenceFluid]
    energy: float
    entropy: float
    latent: float


def same_equation(substance: str, reference: Callable[[], ReferenceFluid]) -> Source:
    """Return a source that evaluates the same equation by other code: only convergence differs (measured 1e-7)."""
    return Source(substance, reference, 3e-7, 3e-7, 0.0)


def older_equation(substance: str, name: str) -> Source:
    """Return a source with another equation of state.

    Measured over the whole surface (95 % of the states): u within 1 % of R·T_c and s within 2 % of R of the equations
    used here, u_fg within 2.3 %.
    """
    return Source(substance, lambda: CanteraFluid(name), 0.01, 0.02, 0.023)


SOURCES: Final[dict[str, Source]] = {
    "R134a": same_equation("R134a", lambda: CanteraFluid("Hfc134a")),
    "propane": same_equation("Propane", lambda: Helmholtz("n-Propane")),
    "isobutane": same_equation("Isobutane", lambda: Helmholtz("IsoButane")),
    "argon": same_equation("Argon", lambda: Helmholtz("Argon")),
    "oxygen": same_equation("Oxygen", lambda: Helmholtz("Oxygen")),
    "R32": same_equation("R32", lambda: Helmholtz("R32")),
    "ethylene": same_equation("Ethylene", lambda: Helmholtz("Ethylene")),
    "nitrogen": older_equation("Nitrogen", "Nitrogen"),
    "carbon dioxide": older_equation("Carbon dioxide", "CarbonDioxide"),
    "methane": older_equation("Methane", "Methane"),
    "water": older_equation("Water", "Water"),
}


End = tuple[Reference, dict[str, float], float]
"""Last state, the input that names it, and the boundary work per mass. [J/kg]"""


@cache
def fluid_of(source: str) -> ReferenceFluid:
    """Return the reference of a source, made once."""
    return SOURCES[source].reference()


def first_state(fluid: ReferenceFluid, start: Start) -> tuple[Reference, dict[str, float]]:
    """Return the first state of the reference, and the inputs that describe it."""
    t = start.temperature * fluid.critical_temperature
    if start.quality is not None:
        return fluid.at_quality(t, start.quality), {"temperature": t, "quality": start.quality}
    p = (start.pressure or 0.0) * fluid.critical_pressure
    return fluid.at_pressure(t, p), {"temperature": t, "pressure": p}


def constant_volume(fluid: ReferenceFluid, first: Reference, start: Start) -> End:
    """Return the last state, its input and the boundary work per mass."""
    t2 = first.t * start.warmer
    return fluid.at_volume(t2, first.v), {"temperature": t2}, 0.0


def constant_pressure(fluid: ReferenceFluid, first: Reference, start: Start) -> End:
    """Return the last state, its input and W = p·Δv."""
    t2 = first.t * start.warmer
    last = fluid.at_pressure(t2, first.p)
    return last, {"temperature": t2}, first.p * (last.v - first.v)


def isothermal(fluid: ReferenceFluid, first: Reference, start: Start) -> End:
    """Return the last state, its input and W = T·Δs − Δu."""
    v2 = first.v * start.larger
    last = fluid.at_volume(first.t, v2)
    return last, {"specific_volume": v2}, first.t * (last.s - first.s) - (last.u - first.u)


def isentropic(fluid: ReferenceFluid, first: Reference, start: Start) -> End:
    """Return the last state, its input and W = −Δu."""
    v2 = first.v * start.squeezed
    last = fluid.at_entropy(first.s, v2)
    return last, {"specific_volume": v2}, first.u - last.u


PATHS: Final[dict[str, Callable[[ReferenceFluid, Reference, Start], End]]] = {
    "constant volume": constant_volume,
    "constant pressure": constant_pressure,
    "isothermal": isothermal,
    "isentropic": isentropic,
}


@pytest.mark.parametrize("start", STARTS, ids=lambda start: start.name)
@pytest.mark.parametrize("kind", PATHS)
@pytest.mark.parametrize("source", SOURCES)
def test_a_process_is_that_of_the_other_library(source: str, kind: str, start: Start) -> None:
    """ΔU, W, Q and ΔS per mass agree within the difference of the two equations of state."""
    fluid = fluid_of(source)
    first, known = first_state(fluid, start)
    last, target, done = PATHS[kind](fluid, first, start)
    adiabatic = kind == "isentropic"
    transfers: list[dict[str, Any]] = [] if adiabatic else [heat(boundary_temperature=2000.0)]
    body = matter(SOURCES[source].substance, "real fluid", mass=1.0)
    found = one_change(body, known, target, path=kind, heat_transfers=transfers)
    own = SOURCES[source]
    change = last.u - first.u
    scale = fluid.gas_constant * fluid.critical_temperature
    latent = own.latent if start.quality is not None else 0.0
    tolerance = own.energy * scale + latent * abs(change)
    assert found.process("internal_energy_change") == pytest.approx(change, rel=0.0, abs=tolerance)
    assert found.process("boundary_work") == pytest.approx(done, rel=0.0, abs=tolerance)
    warmth = 0.0 if adiabatic else change + done
    assert found.process("heat") == pytest.approx(warmth, rel=0.0, abs=2.0 * tolerance)
    entropy = own.entropy * fluid.gas_constant + latent * abs(last.s - first.s)
    assert found.process("entropy_change") == pytest.approx(last.s - first.s, rel=0.0, abs=entropy)


@pytest.mark.parametrize("start", STARTS, ids=lambda start: start.name)
@pytest.mark.parametrize("kind", ["constant volume", "constant pressure", "isothermal"])
@pytest.mark.parametrize("source", ["R134a", "propane", "oxygen"])
def test_the_end_state_follows_from_the_heat(source: str, kind: str, start: Start) -> None:
    """Given the reference's Q alone, the balance along the path leads back to the reference's end state."""
    fluid = fluid_of(source)
    first, known = first_state(fluid, start)
    last, _, done = PATHS[kind](fluid, first, start)
    body = matter(SOURCES[source].substance, "real fluid", mass=1.0)
    wall = heat(boundary_temperature=2000.0, energy=last.u - first.u + done)
    found = one_change(body, known, {}, path=kind, heat_transfers=[wall])
    assert found.state("temperature") == pytest.approx(last.t, rel=1e-6)
    assert found.state("specific_volume") == pytest.approx(last.v, rel=1e-5)
    assert found.process("boundary_work") == pytest.approx(done, rel=1e-5, abs=1.0)


def test_the_grid_covers_five_fluids_of_another_equation_and_code() -> None:
    """Four fluids by another equation, R134a by other code and data: twenty processes each, none left out."""
    other_data = [name for name, own in SOURCES.items() if isinstance(own.reference(), CanteraFluid)]
    assert len(other_data) == 5
    assert len(STARTS) * len(PATHS) == 20
