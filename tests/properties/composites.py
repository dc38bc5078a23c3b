"""Random, correct composites of several bodies: states made forward, some of them hidden, written as a package.

Everything is made by the routes of ``physics``: first states, a common last temperature (and pressure), and from them
the heat or the electrical work that the balance needs. Then some values are withheld, and the alternate calculation
has to find them again.
"""

from __future__ import annotations

import json
import math
from collections.abc import Mapping
from dataclasses import dataclass, field, replace
from typing import Any, Final

from hypothesis import assume, reject
from hypothesis import strategies as st
from scipy.optimize import brentq

from tests.properties.physics import ConstantHeatGas, IdealGas, Model, RealFluid, Solid, State

COLDEST: Final = 230.0
HOTTEST: Final = 900.0
"""[K] Between these lie the first temperatures that a construction may come out with."""
CONSTANTS: Final = {
    "specific_heat": "J/(kg·K)",
    "specific_heat_at_constant_volume": "J/(kg·K)",
    "gas_constant": "J/(kg·K)",
    "melting_temperature": "K",
    "latent_heat": "J/kg",
    "specific_heat_of_solid": "J/(kg·K)",
    "specific_heat_of_liquid": "J/(kg·K)",
}


@dataclass(frozen=True, slots=True)
class MeltingBody:
    """A body that melts at one temperature; u = s = 0 of the solid there. SI."""

    melting: float
    latent: float
    solid: float
    liquid: float

    def at(self, **known: float) -> State:
        """Return the state at t, or the molten fraction x of it at the melting temperature."""
        t, x = known["t"], known.get("x", 0.0)
        if t < self.melting:
            return State(
                t, None, None, self.solid * (t - self.melting), self.solid * math.log(t / self.melting)
            )
        if t == self.melting:
            return State(t, None, None, x * self.latent, x * self.latent / t)
        above, warmer = self.latent + self.liquid * (t - self.melting), math.log(t / self.melting)
        return State(t, None, None, above, self.latent / self.melting + self.liquid * warmer)


@dataclass(frozen=True, slots=True)
class Kind:
    """What a body is made of: names and constants of the package, and the model behind them."""

    substance: str
    model: str
    physics: Model
    constants: Mapping[str, float] = field(default_factory=dict)

    @property
    def is_fluid(self) -> bool:
        """Say whether it has a pressure and a volume."""
        return not isinstance(self.physics, Solid | MeltingBody)


@dataclass(frozen=True, slots=True)
class Part:
    """One body of a composite: its path (empty: none is stated) and its two states."""

    kind: Kind
    mass: float
    path: str
    first: State
    last: State

    @property
    def gain(self) -> float:
        """Return m·Δu. [J]"""
        return self.mass * (self.last.u - self.first.u)

    @property
    def work(self) -> float:
        """Return the boundary work that its path tells. [J]"""
        if self.path == "constant pressure":
            return self.mass * (self.last.pv - self.first.pv)
        return -self.gain if self.path == "isentropic" else 0.0


@dataclass(frozen=True)
class Composite:
    """Bodies that meet, and what of them is withheld.

    Attributes
    ----------
    shares : tuple of str
        What the bodies have in common: temperature, pressure; at the end, or at the start (``at_start``).
    partition : bool
        The fluids share a fixed volume; ``volume_given`` says whether its value stands there.
    supply : str
        Where the energy comes from: ``heat``, ``electrical`` or ``none``.
    energy : float
        Heat into the composite, or electrical work into it. [J]
    hidden : str
        ``end``: the last states; ``supply``: the energy; ``first``: the first temperature of body b0.
    by_volume : bool
        The masses of fluids are withheld, and their first volumes given.
    """

    parts: tuple[Part, ...]
    shares: tuple[str, ...]
    supply: str
    energy: float
    hidden: str
    at_start: bool = False
    partition: bool = False
    volume_given: bool = False
    by_volume: bool = False
    splits: int = 1
    order: tuple[int, ...] = ()

    def names(self) -> tuple[str, ...]:
        """Return the bodies' names, in the order of the parts; ``order`` gives them other ones."""
        numbers = self.order or tuple(range(len(self.parts)))
        return tuple(f"b{number}" for number in numbers)

    def named(self) -> dict[str, Part]:
        """Return the parts by their names."""
        return dict(zip(self.names(), self.parts, strict=True))

    @property
    def heat(self) -> float:
        """Return the heat into the composite. [J]"""
        return self.energy if self.supply == "heat" else 0.0

    @property
    def generation(self) -> float:
        """Return the entropy generated in the composite. [J/K]"""
        gained = math.fsum(part.mass * (part.last.s - part.first.s) for part in self.parts)
        return gained - self.heat / self.wall

    @property
    def wall(self) -> float:
        """Return a temperature at which this heat can cross: hotter or colder than every body. [K]"""
        return 2000.0 if self.energy > 0.0 else 100.0

    def record(self) -> dict[str, Any]:
        """Return the composite as a record; what is withheld is claimed."""
        named = self.named()
        process: dict[str, Any] = {
            "id": "meeting",
            "from": "start",
            "to": "end",
            "path": {name: part.path for name, part in named.items() if part.path},
            "work_transfers": self._works(),
            "results": {"entropy_generation": si(self.generation, "J/K")},
        }
        process |= {"heat_transfers": self._heats()} if self.supply == "heat" else {"insulated": True}
        if not self.at_start:
            process["equilibrium"] = list(self.shares)
        if self.partition:
            fluids = [name for name, part in named.items() if part.kind.is_fluid]
            volume = math.fsum(part.mass * (part.first.v or 0.0) for part in self.parts)
            process["total_volume"] = {"bodies": fluids}
            if self.volume_given:
                process["total_volume"]["inputs"] = {"volume": si(volume, "m³")}
        start = {name: self._first(number, part) for number, (name, part) in enumerate(named.items())}
        end = {name: self._last(number, part) for number, (name, part) in enumerate(named.items())}
        if self.at_start:
            start["equilibrium"] = list(self.shares)
        return {
            "id": "composite",
            "bodies": {name: self._body(part) for name, part in named.items()},
            "states": {"start": start, "end": end},
            "processes": [process],
        }

    def package(self) -> bytes:
        """Return the composite as a package."""
        head = {
            "number": "TC-1",
            "revision": "A",
            "conventions": {"work": "positive out"},
            "surroundings": {"temperature": "293.15 K", "pressure": "101300 Pa"},
        }
        return json.dumps({"package": head, "records": [self.record()]}, ensure_ascii=False).encode()

    def _body(self, part: Part) -> dict[str, Any]:
        kind, found = part.kind, dict[str, Any]()
        inputs = {name: si(value, CONSTANTS[name]) for name, value in kind.constants.items()}
        if self.by_volume and kind.is_fluid:
            inputs["volume"] = si(part.mass * (part.first.v or 0.0), "m³")
            found["results"] = {"mass": si(part.mass, "kg")}
        else:
            inputs["mass"] = si(part.mass, "kg")
        return {"substance": kind.substance, "model": kind.model, "inputs": inputs, **found}

    def _first(self, number: int, part: Part) -> dict[str, Any]:
        state, inputs = part.first, dict[str, str]()
        hides = (self.hidden == "first" and number == 0) or self.at_start
        if part.first.x is not None and part.kind.is_fluid:
            inputs["quality"] = si(part.first.x, "")
        elif state.p is not None:
            inputs["pressure"] = si(state.p, "Pa")
        if hides:
            return {"inputs": inputs, "results": {"temperature": si(state.t, "K")}}
        return {"inputs": {"temperature": si(state.t, "K"), **inputs}}

    def _last(self, number: int, part: Part) -> dict[str, Any]:
        known = self.at_start or (self.hidden in ("first", "supply") and number == 0)
        temperature = {"temperature": si(part.last.t, "K")}
        if isinstance(part.kind.physics, MeltingBody) and part.last.t == part.kind.physics.melting:
            molten = {"melted_fraction": si(part.last.x or 0.0, "")}
            return {"inputs": temperature | molten} if known else {"results": temperature | molten}
        if not known:
            return {"results": temperature}
        both = self.partition and part.kind.is_fluid
        return {"inputs": temperature | ({"pressure": si(part.last.p or 0.0, "Pa")} if both else {})}

    def _heats(self) -> list[dict[str, Any]]:
        place = "results" if self.hidden == "supply" else "inputs"
        return [
            {
                "id": f"wall-{number}",
                "boundary_temperature": si(self.wall, "K"),
                "reservoir_temperature": si(self.wall, "K"),
                place: {"energy": si(self.energy / self.splits, "J")},
            }
            for number in range(self.splits)
        ]

    def _works(self) -> list[dict[str, Any]]:
        if self.supply != "electrical":
            return []
        place = "results" if self.hidden == "supply" else "inputs"
        return [{"id": "heater", "kind": "electrical", place: {"energy": si(-self.energy, "J")}}]


def si(value: float, unit: str) -> str:
    """Return a quantity with every digit of a float."""
    text = f"{float(value)!r}"
    return f"{text if 'e' not in text else f'{float(value):.17e}'} {unit}".strip()


def _rounded(low: float, high: float, digits: int = 6) -> st.SearchStrategy[float]:
    return st.floats(low, high).map(lambda x: float(f"{x:.{digits}g}"))


@st.composite
def solids(draw: st.DrawFn) -> Kind:
    """Draw a body of constant specific heat."""
    heat = draw(_rounded(200.0, 4500.0))
    return Kind("Block", "constant specific heat", Solid(heat), {"specific_heat": heat})


@st.composite
def melting_bodies(draw: st.DrawFn) -> Kind:
    """Draw a body that melts at one temperature."""
    body = MeltingBody(
        draw(_rounded(290.0, 420.0)),
        draw(_rounded(1e4, 3e5)),
        draw(_rounded(500.0, 3000.0)),
        draw(_rounded(500.0, 4000.0)),
    )
    names = ("melting_temperature", "latent_heat", "specific_heat_of_solid", "specific_heat_of_liquid")
    values = (body.melting, body.latent, body.solid, body.liquid)
    return Kind("Wax", "phase change", body, dict(zip(names, values, strict=True)))


@st.composite
def gases(draw: st.DrawFn) -> Kind:
    """Draw a gas: of constant specific heats, ideal, or by its equation of state."""
    word = draw(st.sampled_from(["constant", "ideal", "real"]))
    if word == "constant":
        cv, constant = draw(_rounded(400.0, 3200.0)), draw(_rounded(150.0, 2100.0))
        held = {"specific_heat_at_constant_volume": cv, "gas_constant": constant}
        return Kind("Purge gas", "constant specific heat", ConstantHeatGas(cv, constant), held)
    name = draw(st.sampled_from(["Nitrogen", "Argon", "Oxygen"]))
    if word == "ideal":
        return Kind(name, "ideal gas", IdealGas(name))
    return Kind(name, "real fluid", RealFluid(name))


WATER: Final = Kind("Water", "real fluid", RealFluid("Water"))


@st.composite
def fluid_parts(draw: st.DrawFn, last: float) -> Part:
    """Draw a fluid with its path to a last temperature: gas, liquid water, or wet steam."""
    path = draw(st.sampled_from(["constant volume", "constant pressure"]))
    what = draw(st.sampled_from(["gas", "gas", "liquid", "wet"]))
    mass = draw(_rounded(0.05, 20.0))
    if what == "gas":
        kind, pressure = draw(gases()), draw(_rounded(5e4, 6e6))
        start = kind.physics.at(t=draw(_rounded(250.0, 700.0)), p=pressure)
    elif what == "liquid":
        kind, path, pressure = WATER, "constant pressure", draw(_rounded(2e5, 5e6))
        start = kind.physics.at(t=draw(_rounded(280.0, 370.0)), p=pressure)
        assume(last < RealFluid("Water").saturation_temperature(pressure))
        assume(last > 275.0)
    else:
        kind = WATER
        start = kind.physics.at(t=draw(_rounded(300.0, 450.0)), x=draw(_rounded(0.02, 0.98)))
        boiling = start.t if path == "constant pressure" else None
        assume(boiling is None or abs(boiling - last) > 0.1)
        assume(last > 275.0)
    held = {"v": start.v} if path == "constant volume" else {"p": start.p}
    return Part(kind, mass, path, start, kind.physics.at(t=last, **held))  # type: ignore[arg-type]  # the properties held are not None for a fluid


@st.composite
def solid_parts(draw: st.DrawFn, last: float, melts: bool = True) -> Part:
    """Draw a solid, or a body that melts, with its first temperature."""
    kind = draw(melting_bodies() if melts and draw(st.integers(0, 3)) == 0 else solids())
    first = kind.physics.at(t=draw(_rounded(250.0, 700.0)))
    return Part(kind, draw(_rounded(0.1, 50.0)), "", first, kind.physics.at(t=last))


def needed(parts: tuple[Part, ...], partition: bool) -> float:
    """Return the energy that a composite takes up: heat, or electrical work put in. [J]"""
    works = math.fsum(part.work for part in parts if not (partition and part.kind.is_fluid))
    return math.fsum(part.gain for part in parts) + works


def supplied(
    draw: st.DrawFn, parts: tuple[Part, ...], shares: tuple[str, ...], partition: bool = False
) -> Composite:
    """Return a composite whose balance closes: by heat, by a heater, or by the first temperature of its solid."""
    supply = draw(st.sampled_from(["heat", "electrical", "none"]))
    hidden = draw(st.sampled_from(["end", "end", "supply", "first"]))
    lead = parts[0]
    if supply == "none":
        assume(isinstance(lead.kind.physics, Solid) and hidden != "supply")
        assert isinstance(lead.kind.physics, Solid)
        rest = needed(parts[1:], partition)
        first = lead.last.t + rest / (lead.mass * lead.kind.physics.heat)
        assume(COLDEST < first < HOTTEST)
        parts = (replace(lead, first=lead.kind.physics.at(t=first)), *parts[1:])
    found = Composite(parts, shares, supply, needed(parts, partition), hidden, partition=partition)
    return replace(found, by_volume=draw(st.booleans()), volume_given=draw(st.booleans()))


@st.composite
def meetings(draw: st.DrawFn) -> Composite:
    """Draw one to four bodies that come to one temperature."""
    last = draw(_rounded(285.0, 600.0))
    parts = [draw(solid_parts(last, melts=False))] if draw(st.booleans()) else []
    some = st.one_of(fluid_parts(last), solid_parts(last))
    parts += draw(st.lists(some, min_size=2 - len(parts), max_size=4 - len(parts)))
    return supplied(draw, tuple(parts), ("temperature",))


@st.composite
def meltings(draw: st.DrawFn) -> Composite:
    """Draw bodies that come to the temperature at which one of them melts in part."""
    kind = draw(melting_bodies())
    assert isinstance(kind.physics, MeltingBody)
    last = kind.physics.melting
    fraction = draw(_rounded(0.05, 0.95))
    molten = replace(kind.physics.at(t=last, x=fraction), x=fraction)
    first = kind.physics.at(t=draw(_rounded(250.0, last - 1.0)))
    wax = Part(kind, draw(_rounded(0.1, 10.0)), "", first, molten)
    others = draw(
        st.lists(st.one_of(solid_parts(last, melts=False), fluid_parts(last)), min_size=1, max_size=2)
    )
    found = supplied(draw, (draw(solid_parts(last, melts=False)), wax, *others), ("temperature",))
    return replace(found, hidden="end")


@st.composite
def partitions(draw: st.DrawFn) -> Composite:
    """Draw gases that share a fixed volume and come to one temperature and one pressure, beside a solid or not."""
    last = draw(_rounded(285.0, 600.0))
    kinds = draw(st.lists(gases(), min_size=2, max_size=3))
    masses = [draw(_rounded(0.1, 5.0)) for _ in kinds]
    firsts = [k.physics.at(t=draw(_rounded(260.0, 600.0)), p=draw(_rounded(5e4, 5e6))) for k in kinds]
    volume = math.fsum(m * (s.v or 0.0) for m, s in zip(masses, firsts, strict=True))

    def gap(logarithm: float) -> float:
        p = math.exp(logarithm)
        held = (m * (k.physics.at(t=last, p=p).v or 0.0) for m, k in zip(masses, kinds, strict=True))
        return math.log(math.fsum(held) / volume)

    assume(gap(math.log(2e4)) > 0.0 > gap(math.log(2e7)))
    p = math.exp(brentq(gap, math.log(2e4), math.log(2e7), xtol=1e-15, rtol=1e-14))
    lasts = [k.physics.at(t=last, p=p) for k in kinds]
    fluids = [Part(*one) for one in zip(kinds, masses, [""] * len(kinds), firsts, lasts, strict=True)]
    beside = [draw(solid_parts(last, melts=False))] if draw(st.booleans()) else []
    return supplied(draw, (*beside, *fluids), ("temperature", "pressure"), partition=True)


@st.composite
def pistons(draw: st.DrawFn) -> Composite:
    """Draw a heated gas that compresses another one without heat, both in a fixed volume, to one pressure."""
    pushed, heated = draw(gases()), draw(gases())
    masses = draw(_rounded(0.1, 5.0)), draw(_rounded(0.1, 5.0))
    start = draw(_rounded(1e5, 2e6))
    a, b = (k.physics.at(t=draw(_rounded(280.0, 500.0)), p=start) for k in (pushed, heated))
    assert a.v is not None
    assert b.v is not None
    smaller = a.v * draw(_rounded(0.5, 0.97))
    larger = b.v + masses[0] * (a.v - smaller) / masses[1]
    try:
        last_a = pushed.physics.at(v=smaller, s=a.s)
        last_b = heated.physics.at(p=last_a.p or 0.0, v=larger)
    except ValueError:
        reject()  # the property library finds no such state
    assume(last_b.t < HOTTEST)
    parts = (Part(pushed, masses[0], "isentropic", a, last_a), Part(heated, masses[1], "", b, last_b))
    energy = math.fsum(part.gain for part in parts)
    hidden = "end"
    found = Composite(parts, ("pressure",), "heat", energy, hidden, partition=True)
    return replace(found, volume_given=draw(st.booleans()))


@st.composite
def partings(draw: st.DrawFn) -> Composite:
    """Draw bodies that start at one temperature, not known, and end at temperatures of their own."""
    first = draw(_rounded(285.0, 600.0))
    kinds = draw(st.lists(st.one_of(solids(), gases()), min_size=2, max_size=4))
    parts = []
    for kind in kinds:
        mass, last = draw(_rounded(0.1, 20.0)), draw(_rounded(285.0, 600.0))
        if not kind.is_fluid:
            parts.append(Part(kind, mass, "", kind.physics.at(t=first), kind.physics.at(t=last)))
            continue
        path = draw(st.sampled_from(["constant volume", "constant pressure"]))
        start = kind.physics.at(t=first, p=draw(_rounded(5e4, 5e6)))
        held = {"v": start.v} if path == "constant volume" else {"p": start.p}
        end = kind.physics.at(t=last, **held)  # type: ignore[arg-type]  # the properties held are not None for a fluid
        parts.append(Part(kind, mass, path, start, end))
    found = Composite(tuple(parts), ("temperature",), "heat", needed(tuple(parts), False), "", at_start=True)
    return replace(found, by_volume=draw(st.booleans()))


_DRAWN: Final[Mapping[str, st.SearchStrategy[Composite]]] = {
    "meeting": meetings(),
    "partition": partitions(),
    "piston": pistons(),
    "parting": partings(),
    "melting": meltings(),
}


def tells_its_states(composite: Composite) -> bool:
    """Say whether no body starts just at its melting temperature, which does not tell how much of it is melted."""
    return all(
        not isinstance(part.kind.physics, MeltingBody) or part.first.t != part.kind.physics.melting
        for part in composite.parts
    )


KINDS: Final = {name: drawn.filter(tells_its_states) for name, drawn in _DRAWN.items()}
"""Composites by what their bodies have in common."""
