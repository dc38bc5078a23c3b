"""A real fluid by its published equation: states from pairs of properties, by one-dimensional searches."""

from __future__ import annotations

import math
from collections.abc import Callable
from dataclasses import dataclass
from functools import lru_cache

from tests.benchmarks.seeded.equation import Equation, NoStateError, Phase, equation_of
from tests.benchmarks.seeded.properties import State, solved

PAIRS = ("tp", "tx", "px", "tv", "pv", "uv", "sv", "hp", "ps", "pu")


@dataclass(frozen=True)
class RealFluid:
    """A pure fluid; ``name`` is the one in ``equations.json``.

    ``datum`` is the (T [K], p [Pa]) where u and s are zero; without one the equation's own zeros hold.
    """

    name: str
    datum: tuple[float, float] | None = None

    @property
    def equation(self) -> Equation:
        """Return the equation of state."""
        return equation_of(self.name)

    @property
    def gas_constant(self) -> float:
        """Return the specific gas constant. [J/(kg·K)]"""
        return self.equation.gas_constant

    def at(self, **known: float) -> State:
        """Return the state with a pair of ``PAIRS``."""
        pair = "".join(sorted(known))
        pair = {"pt": "tp", "vu": "uv", "vs": "sv", "vp": "pv"}.get(pair, pair)
        if pair not in PAIRS or not all(math.isfinite(value) for value in known.values()):
            raise NoStateError(f"cannot take {pair}")
        u0, s0 = self.zeros
        shift = {"u": u0, "h": u0, "s": s0}
        found = _found(self.name, pair, *(known[name] + shift.get(name, 0.0) for name in pair))
        return found._replace(u=found.u - u0, s=found.s - s0)

    @property
    def zeros(self) -> tuple[float, float]:
        """Return the equation's own u and s at the datum."""
        if self.datum is None:
            return 0.0, 0.0
        there = _found(self.name, "tp", *self.datum)
        return there.u, there.s

    def saturation_temperature(self, p: float) -> float:
        """Return T at a saturation pressure."""
        return _boiling(self.name, p)


@lru_cache(maxsize=50_000)
def _found(name: str, pair: str, first: float, second: float) -> State:
    state = _FINDERS[pair](name, first, second)
    equation = equation_of(name)
    if not (equation.t_min <= state.t <= equation.t_max and 0.0 < state.p <= equation.p_max):
        raise NoStateError(f"outside the range of the equation of {name}")
    return state


@lru_cache(maxsize=20_000)
def _boiling(name: str, p: float) -> float:
    equation = equation_of(name)
    if not 0.0 < p < equation.p_c:
        raise NoStateError("no saturation at this pressure")

    def gap(t: float) -> float:
        return math.log(equation.saturation(t)[1].p / p)

    low, high = max(equation.t_min, 0.45 * equation.t_c), 0.9999 * equation.t_c
    near = solved(lambda t: math.log(equation.guess("pS", t) / p), low, high)
    return solved(gap, max(low, 0.998 * near), min(high, 1.002 * near))


def _single(phase: Phase) -> State:
    return State(phase.t, phase.p, 1.0 / phase.rho, phase.u, phase.s)


def _wet(name: str, t: float, x: float) -> State:
    if not -1e-9 <= x <= 1.0 + 1e-9:
        raise NoStateError(f"quality {x}")
    liquid, vapour = equation_of(name).saturation(t)
    v = (1.0 - x) / liquid.rho + x / vapour.rho
    return State(t, vapour.p, v, (1 - x) * liquid.u + x * vapour.u, (1 - x) * liquid.s + x * vapour.s, x)


def _tp(name: str, t: float, p: float) -> State:
    equation = equation_of(name)
    if not equation.t_min <= t <= equation.t_max or p <= 0.0:
        raise NoStateError(f"{t} K, {p} Pa")
    ideal = p / (equation.gas_constant * t)
    low, high = 1e-6 * ideal, 4.3 * equation.rho_r
    if t < equation.t_c:
        liquid, vapour = equation.saturation(t)
        low, high = (liquid.rho, high) if p > vapour.p else (low, vapour.rho)
    rho = solved(lambda rho: equation.pressure(t, rho) / p - 1.0, low, high)
    return _single(equation.phase(t, rho))


def _tv(name: str, t: float, v: float) -> State:
    equation = equation_of(name)
    if t < equation.t_c:
        liquid, vapour = equation.saturation(t)
        if 1.0 / liquid.rho < v < 1.0 / vapour.rho:
            return _wet(name, t, (v - 1.0 / liquid.rho) / (1.0 / vapour.rho - 1.0 / liquid.rho))
    return _single(equation.phase(t, 1.0 / v))


def _by_temperature(quantity: str) -> Callable[[str, float, float], State]:
    """Return a finder of T from p, u or s at a volume, all of which rise with T."""

    def find(name: str, first: float, second: float) -> State:
        wanted, v = first, second
        equation = equation_of(name)

        def gap(t: float) -> float:
            return float(getattr(_tv(name, t, v), quantity)) - wanted

        ends = max(equation.t_min, 0.42 * equation.t_c), min(equation.t_max, 4.0 * equation.t_c + 1000.0)
        return _tv(name, solved(gap, *ends), v)

    return find


def _at_pressure(quantity: str) -> Callable[[str, float, float], State]:
    """Return a finder of T from u, h or s at a pressure, all of which rise with T."""

    def find(name: str, wanted: float, p: float) -> State:
        equation = equation_of(name)

        def gap(t: float) -> float:
            return float(getattr(_tp(name, t, p), quantity)) - wanted

        low, high = max(equation.t_min, 0.42 * equation.t_c), equation.t_max
        if equation.saturation(low)[1].p < p < equation.p_c:
            boiling = _boiling(name, p)
            ends = [float(getattr(_wet(name, boiling, x), quantity)) for x in (0.0, 1.0)]
            if ends[0] <= wanted <= ends[1]:
                return _wet(name, boiling, (wanted - ends[0]) / (ends[1] - ends[0]))
            inside, outside = boiling * (1.0 - 1e-9), boiling * (1.0 + 1e-9)
            low, high = (low, inside) if wanted < ends[0] else (outside, high)
        return _tp(name, solved(gap, low, high), p)

    return find


_FINDERS: dict[str, Callable[[str, float, float], State]] = {
    "tp": _tp,
    "tx": _wet,
    "px": lambda name, p, x: _wet(name, _boiling(name, p), x),
    "tv": _tv,
    "pv": _by_temperature("p"),
    "uv": _by_temperature("u"),
    "sv": _by_temperature("s"),
    "hp": _at_pressure("h"),
    "ps": lambda name, p, s: _at_pressure("s")(name, s, p),
    "pu": lambda name, p, u: _at_pressure("u")(name, u, p),
}
