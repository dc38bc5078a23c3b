"""Random, correct processes of one body: what is given, and what follows from it by the routes of ``physics``."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, replace
from functools import cached_property
from typing import Final

from hypothesis import assume, reject
from hypothesis import strategies as st
from scipy.optimize import brentq

from tests.properties.physics import ConstantHeatGas, IdealGas, Model, RealFluid, Solid, State, work_of

GRAVITY: Final = 9.80665
T0: Final = 293.15
P0: Final = 101300.0
GAS_PATHS: Final = (
    "constant volume",
    "constant pressure",
    "isothermal",
    "isentropic",
    "polytropic",
    "free expansion",
    "against constant external pressure",
)
ENDS: Final[Mapping[str, tuple[str, ...]]] = {
    "constant volume": ("t", "p", "heat"),
    "constant pressure": ("t", "v", "heat"),
    "isothermal": ("v", "p", "heat"),
    "isentropic": ("v", "p"),
    "polytropic": ("v", "p", "heat"),
    "free expansion": ("v",),
    "against constant external pressure": ("p",),
    "": ("t", "heat"),
}
"""What may be given about the last state along each path; ``heat`` leaves it to the balance."""
ADIABATIC: Final = ("isentropic", "free expansion", "against constant external pressure")


@dataclass(frozen=True, slots=True)
class Body:
    """A substance as a package names it, with its constants [SI] and the model behind it."""

    substance: str
    model: str
    constants: Mapping[str, float]
    physics: Model


@dataclass(frozen=True, slots=True)
class Motion:
    """Speed [m/s] and height [m] of a body."""

    velocity: float
    elevation: float

    @property
    def kinetic(self) -> float:
        """Return ½·c². [J/kg]"""
        return 0.5 * self.velocity**2

    @property
    def potential(self) -> float:
        """Return g·z. [J/kg]"""
        return GRAVITY * self.elevation


@dataclass(frozen=True)
class Leg:
    """A process between two states, per unit mass; ``electrical`` is put in, ``wall`` and ``reservoir`` are T [K].

    ``motion`` holds speed and height at both ends where they are stated.
    """

    kind: str
    parameter: float
    first: State
    last: State
    electrical: float = 0.0
    wall: float | None = None
    reservoir: float | None = None
    motion: tuple[Motion, Motion] | None = None

    @cached_property
    def kinetic(self) -> float:
        """Return the change of kinetic energy. [J/kg]"""
        return 0.0 if self.motion is None else self.motion[1].kinetic - self.motion[0].kinetic

    @cached_property
    def potential(self) -> float:
        """Return the change of potential energy. [J/kg]"""
        return 0.0 if self.motion is None else self.motion[1].potential - self.motion[0].potential

    @cached_property
    def boundary_work(self) -> float:
        """Return W_b out of the system. [J/kg]"""
        return work_of(self.kind, self.parameter)(self.first, self.last)

    @cached_property
    def values(self) -> dict[str, float]:
        """Return the totals of the process per mass, by their names in the vocabulary. [SI]"""
        a, b = self.first, self.last
        energy, entropy = b.u - a.u, b.s - a.s
        done = self.boundary_work - self.electrical
        whole = energy + self.kinetic + self.potential
        warmth = 0.0 if self.wall is None else whole + done
        wall, reservoir = self.wall or 1.0, self.reservoir or 1.0
        generated = entropy - warmth / wall
        swept = 0.0 if a.v is None or b.v is None else P0 * (b.v - a.v)
        return {
            "heat": warmth,
            "boundary_work": self.boundary_work,
            "work": done,
            "internal_energy_change": energy,
            "kinetic_energy_change": self.kinetic,
            "potential_energy_change": self.potential,
            "energy_change": whole,
            "entropy_change": entropy,
            "entropy_transfer": warmth / wall,
            "entropy_generation": generated,
            "entropy_generation_with_surroundings": entropy - warmth / reservoir,
            "exergy_change": whole + swept - T0 * entropy,
            "exergy_destruction": T0 * (entropy - warmth / reservoir),
        }


@dataclass(frozen=True, slots=True)
class Change:
    """A correct process of one body, with what is given about it.

    ``first_known`` and ``last_known`` name the inputs of the two states; ``middle`` lies on the path and may part it.
    """

    body: Body
    mass: float
    by_volume: bool
    leg: Leg
    first_known: tuple[str, str]
    last_known: str
    middle: State

    @property
    def parts(self) -> tuple[Leg, Leg]:
        """Return the process in two, each with half of the electrical work; in between the body rests at height 0."""
        ends = self.leg.motion
        half, rest = replace(self.leg, electrical=0.5 * self.leg.electrical), Motion(0.0, 0.0)
        return (
            replace(half, last=self.middle, motion=ends and (ends[0], rest)),
            replace(half, first=self.middle, motion=ends and (rest, ends[1])),
        )


def exact(value: float, digits: int = 5) -> float:
    """Return a value as it can be written with so many significant digits."""
    return float(f"{value:.{digits}g}")


def numbers(low: float, high: float) -> st.SearchStrategy[float]:
    """Return numbers of five digits between two bounds."""
    return st.floats(low, high, allow_nan=False, allow_subnormal=False).map(exact)


def ratios(low: float, near: float, far: float) -> st.SearchStrategy[float]:
    """Return ratios well off 1, on both sides of it."""
    return st.one_of(numbers(low, 1.0 / near), numbers(near, far))


_motions = st.builds(
    Motion,
    st.integers(0, 4000).map(lambda hundredths: hundredths / 100.0),
    st.integers(-2000, 6000).map(lambda hundredths: hundredths / 100.0),
)


@dataclass(frozen=True, slots=True)
class _Region:
    """Where a real fluid starts: reduced temperature, and p/p_c, p/p_sat (of vapour) or quality."""

    temperature: tuple[float, float]
    pressure: tuple[float, float] | None = None
    quality: tuple[float, float] | None = None
    warmer: float = 1.25


_REGIONS: Final = (
    _Region((0.62, 0.85), quality=(0.05, 0.9)),
    _Region((0.62, 0.8), pressure=(1.2, 2.5), warmer=1.06),
    _Region((1.1, 1.3), pressure=(0.05, 0.6)),
    _Region((0.75, 0.9), pressure=(0.005, 0.03)),
)
_FLUIDS: Final = {
    # name in the package: (library name, T_c [K], p_c [Pa], lowest and highest T [K])
    "Water": ("Water", 647.1, 22.06e6, 300.0, 1200.0),
    "R134a": ("R134a", 374.2, 4.06e6, 210.0, 450.0),
    "Propane": ("n-Propane", 369.9, 4.25e6, 200.0, 640.0),
    "Nitrogen": ("Nitrogen", 126.2, 3.40e6, 70.0, 1900.0),
    "Carbon dioxide": ("CO2", 304.1, 7.38e6, 225.0, 1900.0),
}
_IDEAL: Final = {"Nitrogen": "Nitrogen", "Argon": "Argon", "Helium": "Helium"}


@st.composite
def _starts(draw: st.DrawFn) -> tuple[Body, State, tuple[str, str]]:
    """Return a body with its first state and the names of that state's inputs."""
    kind = draw(st.sampled_from(["real fluid", "real fluid", "ideal gas", "gas", "solid"]))
    if kind == "solid":
        heat = draw(numbers(350.0, 4200.0))
        body = Body("Ballast", "constant specific heat", {"specific_heat": heat}, Solid(heat))
        return body, body.physics.at(t=draw(numbers(250.0, 450.0))), ("t", "t")
    if kind == "gas":
        cv, r = draw(numbers(600.0, 3200.0)), draw(numbers(180.0, 2100.0))
        assume(1.05 < 1.0 + r / cv < 1.8)
        constants = {"specific_heat_at_constant_volume": cv, "gas_constant": r}
        return _gas(
            draw, Body("Process gas", "constant specific heat", constants, ConstantHeatGas(cv, r)), 20e5
        )
    if kind == "ideal gas":
        name = draw(st.sampled_from(sorted(_IDEAL)))
        return _gas(draw, Body(name, "ideal gas", {}, IdealGas(_IDEAL[name])), 2e5)
    return _real(draw)


def _gas(draw: st.DrawFn, body: Body, highest: float) -> tuple[Body, State, tuple[str, str]]:
    known = {"t": draw(numbers(270.0, 450.0)), "p": draw(numbers(0.6e5, highest))}
    return body, body.physics.at(**known), ("t", "p")


def _real(draw: st.DrawFn) -> tuple[Body, State, tuple[str, str]]:
    name = draw(st.sampled_from(sorted(_FLUIDS)))
    library_name, critical, critical_pressure, lowest, _ = _FLUIDS[name]
    region = draw(st.sampled_from(_REGIONS))
    body = Body(name, "real fluid", {}, RealFluid(library_name))
    t = exact(critical * draw(st.floats(*region.temperature)))
    assume(t > lowest)
    if region.quality is not None:
        return body, body.physics.at(t=t, x=draw(numbers(*region.quality))), ("t", "x")
    p = exact(critical_pressure * draw(st.floats(*(region.pressure or (0.0, 0.0)))))
    state = body.physics.at(t=t, p=p)
    assume(is_plain(body, state))
    return body, state, ("t", "p")


def looks_like_kelvin(t: float) -> bool:
    """Say whether a temperature in °C ends in .15, which a reviewer asks about by right."""
    return abs((t - 273.15) % 1.0 - 0.15) < 0.006


def is_plain(body: Body, state: State) -> bool:
    """Say whether a state lies well inside its model's range, off the saturation line and the critical point."""
    if looks_like_kelvin(state.t):
        return False
    if not isinstance(body.physics, RealFluid):
        return 200.0 < state.t < 900.0
    _, critical, critical_pressure, lowest, highest = _FLUIDS[body.substance]
    if not lowest < state.t < highest or state.p is None or state.p > 3.0 * critical_pressure:
        return False
    if abs(state.t / critical - 1.0) < 0.05:
        return False
    if state.x is not None:
        return 0.02 < state.x < 0.98
    saturation = body.physics.saturation_temperature(state.p)
    return saturation is None or abs(state.t - saturation) > 2.0


@st.composite
def changes(draw: st.DrawFn, ends: tuple[str, ...] = ("t", "p", "v", "heat")) -> Change:
    """Return a correct process; ``ends`` restricts what is given about its last state."""
    try:
        return draw(_changes(ends))
    except ValueError:  # the property library has no state there
        reject()


@st.composite
def _changes(draw: st.DrawFn, ends: tuple[str, ...]) -> Change:
    body, first, first_known = draw(_starts())
    kind = "" if isinstance(body.physics, Solid) else draw(st.sampled_from(GAS_PATHS))
    known = draw(st.sampled_from([end for end in ENDS[kind] if end in ends]))
    assume(not (known == "heat" and kind == "polytropic" and isinstance(body.physics, RealFluid)))
    parameter = _parameter(draw, kind, first)
    electrical = draw(numbers(500.0, 5e3)) if kind in ("", "constant volume") and draw(st.booleans()) else 0.0
    motion = (draw(_motions), draw(_motions)) if kind == "" and draw(st.booleans()) else None
    last = _end(draw, body, first, kind, parameter)
    assume(is_plain(body, first) and is_plain(body, last))
    bare = Leg(kind, parameter, first, last, electrical, motion=motion)
    bare = replace(bare, last=_rounded_end(body, bare, known))
    assume(is_plain(body, bare.last))
    leg = _with_wall(draw, bare)
    middle = _along(body, first, leg.last, kind, parameter)
    return Change(
        body,
        draw(st.sampled_from([0.125, 2.5, 40.0])),
        kind != "" and draw(st.booleans()),
        leg,
        first_known,
        known,
        middle,
    )


def _parameter(draw: st.DrawFn, kind: str, first: State) -> float:
    if kind == "polytropic":
        return draw(st.sampled_from([0.5, 1.0, 1.18, 1.55]))
    if kind == "against constant external pressure":
        return exact((first.p or 0.0) * draw(ratios(0.4, 1.25, 2.0)))
    return 0.0


def _end(draw: st.DrawFn, body: Body, a: State, kind: str, parameter: float) -> State:
    """Return a last state well away from the first one."""
    at = body.physics.at
    warmer = a.t * draw(ratios(0.8, 1.06, 1.06 if (a.v or 1.0) < 0.003 else 1.25))
    larger = (a.v or 0.0) * draw(numbers(1.3, 3.0) if kind == "free expansion" else ratios(0.35, 1.25, 3.0))
    if kind == "":
        return at(t=warmer)
    if kind == "constant volume":
        return at(t=warmer, v=a.v or 0.0)
    if kind == "constant pressure":
        return at(t=warmer, p=a.p or 0.0) if a.x is None else at(p=a.p or 0.0, v=larger)
    if kind == "against constant external pressure":
        return at(p=parameter, h=a.u + parameter * (a.v or 0.0))
    if kind == "isothermal":
        return at(t=a.t, v=larger)
    if kind == "isentropic":
        return at(v=larger, s=a.s)
    if kind == "free expansion":
        return at(v=larger, u=a.u)
    return at(p=(a.p or 0.0) * ((a.v or 0.0) / larger) ** parameter, v=larger)


def _rounded_end(body: Body, leg: Leg, known: str) -> State:
    """Return the last state that the five digits of what is given about it lead to."""
    at, a, b, kind, parameter = body.physics.at, leg.first, leg.last, leg.kind, leg.parameter
    if known == "heat":
        others = leg.electrical - leg.kinetic - leg.potential
        given = exact(b.u - a.u + leg.boundary_work - others)
        return heated(body, a, kind, parameter, given + others, b)
    if kind == "against constant external pressure":
        return b  # the outside pressure, which it ends at, is already one of five digits
    value = exact(getattr(b, known))
    if kind == "":
        return at(t=value)
    if kind == "polytropic":
        p1, v1 = a.p or 0.0, a.v or 0.0
        volume = value if known == "v" else v1 * (p1 / value) ** (1.0 / parameter)
        return at(p=p1 * (v1 / volume) ** parameter, v=volume)
    held: tuple[str, float | None] = {
        "constant volume": ("v", a.v),
        "constant pressure": ("p", a.p),
        "isothermal": ("t", a.t),
        "isentropic": ("s", a.s),
        "free expansion": ("u", a.u),
    }[kind]
    return at(**{held[0]: held[1] or 0.0, known: value})


def heated(body: Body, a: State, kind: str, parameter: float, energy: float, near: State) -> State:
    """Return the state to which ΔU + W_b per mass leads along a path; ``near`` is close to it."""
    at = body.physics.at
    if kind in ("", "constant volume"):
        return at(u=a.u + energy) if kind == "" else at(v=a.v or 0.0, u=a.u + energy)
    if kind == "constant pressure":
        return at(p=a.p or 0.0, h=a.u + a.pv + energy)

    def on_path(v: float) -> State:
        return (
            at(t=a.t, v=v)
            if kind == "isothermal"
            else at(p=(a.p or 0.0) * ((a.v or 0.0) / v) ** parameter, v=v)
        )

    def gap(v: float) -> float:
        b = on_path(v)
        return b.u - a.u + work_of(kind, parameter)(a, b) - energy

    v = near.v or 0.0
    return on_path(brentq(gap, 0.97 * v, 1.03 * v, xtol=1e-300, rtol=1e-14))


def _with_wall(draw: st.DrawFn, bare: Leg) -> Leg:
    """Return the process with a wall hot or cold enough for its heat, and a reservoir beyond the wall."""
    if bare.kind in ADIABATIC:
        assume(bare.values["entropy_change"] > -1e-6)
        return bare
    own = bare.last.u - bare.first.u
    warmth = own + bare.kinetic + bare.potential + bare.boundary_work - bare.electrical
    assume(abs(warmth) > 0.02 * max(abs(own), abs(bare.boundary_work)))
    beyond, further = draw(numbers(3.0, 60.0)), draw(numbers(1.0, 20.0))
    ends = (bare.first.t, bare.last.t)
    wall = exact(max(ends) + beyond if warmth > 0.0 else min(ends) - beyond)
    reservoir = exact(wall + further if warmth > 0.0 else wall - further)
    assume(reservoir > 40.0 and not any(looks_like_kelvin(t) for t in (wall, reservoir)))
    leg = replace(bare, wall=wall, reservoir=reservoir)
    assume(leg.values["entropy_generation"] > 0.0)
    return leg


def _along(body: Body, a: State, b: State, kind: str, parameter: float) -> State:
    """Return a state on the path between both ends (the first one where the path has no states between)."""
    at = body.physics.at
    if kind in ("free expansion", "against constant external pressure"):
        return a
    if kind == "":
        return at(t=exact(0.5 * (a.t + b.t)))
    if kind == "constant volume":
        return at(t=exact(0.5 * (a.t + b.t)), v=a.v or 0.0)
    volume = exact(0.5 * ((a.v or 0.0) + (b.v or 0.0)))
    held = {
        "constant pressure": ("p", a.p or 0.0),
        "isothermal": ("t", a.t),
        "isentropic": ("s", a.s),
        "polytropic": ("p", (a.p or 0.0) * ((a.v or 0.0) / volume) ** parameter),
    }[kind]
    return at(**{"v": volume, held[0]: held[1]})
