"""States and processes by routes of their own: closed forms for simple models, direct calls of the property library.

Everything is per unit mass in SI. Nothing here is shared with the alternate calculation but the library behind the
real fluids; the equations of state themselves are checked under ``tests/published``.
"""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from typing import Any, Final, Protocol

from CoolProp import CoolProp
from scipy.optimize import brentq


@dataclass(frozen=True, slots=True)
class State:
    """T [K], p [Pa], v [m³/kg], u [J/kg], s [J/(kg·K)], x (None in one phase); p and v None for a solid."""

    t: float
    p: float | None
    v: float | None
    u: float
    s: float
    x: float | None = None

    @property
    def pv(self) -> float:
        """Return p·v, zero for a solid. [J/kg]"""
        return 0.0 if self.p is None or self.v is None else self.p * self.v


class Model(Protocol):
    """What the generator asks of a model: a state from two properties."""

    def at(self, **known: float) -> State:
        """Return the state with exactly two of t, p, v, u, s and h (or x with t)."""


@dataclass(frozen=True, slots=True)
class ConstantHeatGas:
    """Ideal gas with constant c_v and R [J/(kg·K)]; u = 0 and s = 0 at 300 K and 1 bar."""

    cv: float
    constant: float

    def at(self, **known: float) -> State:
        """Return the state with two properties, solved by hand for each pair."""
        cv, r = self.cv, self.constant
        t, p, v, s = (known.get(name) for name in ("t", "p", "v", "s"))
        if "u" in known:
            t = 300.0 + known["u"] / cv
        if "h" in known:
            t = (known["h"] + cv * 300.0) / (cv + r)
        if t is None and s is not None and v is not None:
            t = 300.0 * math.exp((s - r * math.log(v / (r * 300.0 / 1e5))) / cv)
        if t is None and s is not None and p is not None:
            t = 300.0 * math.exp((s + r * math.log(p / 1e5)) / (cv + r))
        if t is None and p is not None and v is not None:
            t = p * v / r
        assert t is not None
        volume = v if v is not None else r * t / (p if p is not None else math.nan)
        entropy = cv * math.log(t / 300.0) + r * math.log(volume / (r * 300.0 / 1e5))
        return State(t, r * t / volume, volume, cv * (t - 300.0), entropy)


@dataclass(frozen=True, slots=True)
class Solid:
    """A body of constant c [J/(kg·K)]; u = 0 and s = 0 at 300 K."""

    heat: float

    def at(self, **known: float) -> State:
        """Return the state at t or u."""
        t = known["t"] if "t" in known else 300.0 + known["u"] / self.heat
        return State(t, None, None, self.heat * (t - 300.0), self.heat * math.log(t / 300.0))


@dataclass(frozen=True, slots=True)
class RealFluid:
    """A fluid by direct calls of the property library."""

    library_name: str

    def at(self, **known: float) -> State:
        """Return the state with two properties."""
        fluid = _library(self.library_name)
        fluid.unspecify_phase()
        fluid.update(*_library_inputs(known))
        x = fluid.Q()
        return State(
            fluid.T(),
            fluid.p(),
            1.0 / fluid.rhomass(),
            fluid.umass(),
            fluid.smass(),
            x if 0.0 <= x <= 1.0 else None,
        )

    def saturation_temperature(self, p: float) -> float | None:
        """Return T_sat at a pressure, None above the critical one."""
        fluid = _library(self.library_name)
        if p >= fluid.p_critical():
            return None
        fluid.unspecify_phase()
        fluid.update(CoolProp.PQ_INPUTS, p, 0.0)
        return float(fluid.T())


@dataclass(frozen=True, slots=True)
class IdealGas:
    """An ideal gas with the fluid's own c_p(T), taken from the real fluid at vanishing density."""

    library_name: str

    def at(self, **known: float) -> State:
        """Return the state with two properties."""
        t = known["t"] if "t" in known else self._temperature(known)
        r = self.constant
        v = known["v"] if "v" in known else r * t / known.get("p", math.nan)
        if math.isnan(v):
            reference = self._entropy(t)
            v = math.exp((known["s"] - reference) / r)
        return State(t, r * t / v, v, self._energy(t), self._entropy(t) + r * math.log(v))

    @property
    def constant(self) -> float:
        """Return the specific gas constant. [J/(kg·K)]"""
        fluid = _library(self.library_name)
        return float(fluid.gas_constant() / fluid.molar_mass())

    def _temperature(self, known: dict[str, float]) -> float:
        if "p" in known and "v" in known:
            return known["p"] * known["v"] / self.constant
        name = next(name for name in ("u", "h", "s") if name in known)
        other = {key: value for key, value in known.items() if key != name}

        def gap(t: float) -> float:
            state = self.at(t=t, **(other or {"v": 1.0}))
            return {"u": state.u, "h": state.u + state.pv, "s": state.s}[name] - known[name]

        return float(brentq(gap, 120.0, 1500.0, xtol=1e-12, rtol=1e-14))

    def _thin(self, t: float) -> Any:
        fluid = _library(self.library_name)
        fluid.unspecify_phase()
        fluid.update(CoolProp.DmolarT_INPUTS, 1e-6, t)
        return fluid

    def _energy(self, t: float) -> float:
        return float(self._thin(t).umass())

    def _entropy(self, t: float) -> float:
        """Return s at 1 m³/kg."""
        fluid = self._thin(t)
        return float(fluid.smass()) + self.constant * math.log(fluid.rhomass())


def _library(name: str) -> Any:
    return CoolProp.AbstractState("HEOS", name)


_PAIRS: Final[dict[tuple[str, str], tuple[str, Callable[[float, float], tuple[float, float]]]]] = {
    ("t", "p"): ("PT_INPUTS", lambda t, p: (p, t)),
    ("t", "v"): ("DmassT_INPUTS", lambda t, v: (1.0 / v, t)),
    ("t", "x"): ("QT_INPUTS", lambda t, x: (x, t)),
    ("p", "v"): ("DmassP_INPUTS", lambda p, v: (1.0 / v, p)),
    ("p", "x"): ("PQ_INPUTS", lambda p, x: (p, x)),
    ("v", "u"): ("DmassUmass_INPUTS", lambda v, u: (1.0 / v, u)),
    ("v", "s"): ("DmassSmass_INPUTS", lambda v, s: (1.0 / v, s)),
    ("p", "h"): ("HmassP_INPUTS", lambda p, h: (h, p)),
    ("p", "s"): ("PSmass_INPUTS", lambda p, s: (p, s)),
}


def _library_inputs(known: dict[str, float]) -> tuple[Any, float, float]:
    pair = next(pair for pair in _PAIRS if set(pair) == known.keys())
    name, arrange = _PAIRS[pair]
    first, second = arrange(*(known[key] for key in pair))
    return getattr(CoolProp, name), first, second


Work = Callable[[State, State], float]


def work_of(kind: str, parameter: float) -> Work:
    """Return the boundary work per mass of a path between two states; ``parameter`` is n or the outside pressure."""

    def polytropic(a: State, b: State) -> float:
        if parameter == 1.0:
            return a.pv * math.log((b.v or 1.0) / (a.v or 1.0))
        return (b.pv - a.pv) / (1.0 - parameter)

    formulas: dict[str, Work] = {
        "constant volume": lambda a, b: 0.0,
        "constant pressure": lambda a, b: b.pv - a.pv,
        "isothermal": lambda a, b: a.t * (b.s - a.s) - (b.u - a.u),
        "isentropic": lambda a, b: a.u - b.u,
        "polytropic": polytropic,
        "free expansion": lambda a, b: 0.0,
        "against constant external pressure": lambda a, b: parameter * ((b.v or 0.0) - (a.v or 0.0)),
        "": lambda a, b: 0.0,
    }
    return formulas[kind]
