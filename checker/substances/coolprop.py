"""The property library behind one adapter: the only place that imports CoolProp, and only when a value is asked for.

One library state per fluid and thread, never shared. Every update starts by withdrawing an imposed phase, is read
inside the same ``try``, must be finite, must reproduce its inputs and must lie inside the equation's limits: the
library itself enforces none of that.
"""

from __future__ import annotations

import math
import threading
from dataclasses import dataclass
from typing import Any, Final

from checker.outcomes import NotEvaluable
from checker.substances.limits import Limits
from checker.substances.names import fluid_of
from checker.substances.properties import (
    ENERGY,
    ENTHALPY,
    ENTROPY,
    INDEX,
    PRESSURE,
    QUALITY,
    TEMPERATURE,
    VOLUME,
    Pair,
    Point,
)

HELMHOLTZ: Final = "HEOS"
INDUSTRIAL: Final = "IF97"
LIQUID: Final = "liquid"
GAS: Final = "gas"

LOWEST_PRESSURE: Final = 1e-3
"""[Pa] Below, the library's saturation is noise for some fluids, and nobody signs for less."""
_LIBRARY: Final = "CoolProp"
_REPRODUCED: Final = 1e-6
_VANISHING_DENSITY: Final = 1e-6  # mol/m³: the ideal part is exact, so any small density does
_FAILURES: Final = (ValueError, RuntimeError, IndexError, ArithmeticError, TypeError)
_LINE_OF_FALLING_ICE: Final = (1e6, 1e7)  # Pa


@dataclass(frozen=True, slots=True)
class _Inputs:
    """How a pair is handed over: the library's name of it, whether swapped, which of the two is a volume."""

    constant: str
    swapped: bool = False
    volume: int | None = None


_PAIRS: Final[dict[Pair, _Inputs]] = {
    (TEMPERATURE, PRESSURE): _Inputs("PT_INPUTS", swapped=True),
    (TEMPERATURE, VOLUME): _Inputs("DmassT_INPUTS", swapped=True, volume=1),
    (TEMPERATURE, QUALITY): _Inputs("QT_INPUTS", swapped=True),
    (PRESSURE, VOLUME): _Inputs("DmassP_INPUTS", swapped=True, volume=1),
    (PRESSURE, ENERGY): _Inputs("PUmass_INPUTS"),
    (PRESSURE, ENTHALPY): _Inputs("HmassP_INPUTS", swapped=True),
    (PRESSURE, ENTROPY): _Inputs("PSmass_INPUTS"),
    (PRESSURE, QUALITY): _Inputs("PQ_INPUTS"),
    (VOLUME, ENERGY): _Inputs("DmassUmass_INPUTS", volume=0),
    (VOLUME, ENTHALPY): _Inputs("DmassHmass_INPUTS", volume=0),
    (VOLUME, ENTROPY): _Inputs("DmassSmass_INPUTS", volume=0),
}
_VAPOUR: Final = _PAIRS[(TEMPERATURE, VOLUME)]
TRUSTED: Final = frozenset(_PAIRS)
"""The pairs with one root that the library finds. Not among them: what leaves an imposed phase behind (D,Q), (Q,S),
(H,Q); what may hang (H,S); what takes the wrong root (T,S), (H,T), (T,U)."""


@dataclass(frozen=True, slots=True)
class Constants:
    """Constants of a fluid's equation: R [J/(kg·K)], M [kg/mol], critical (T [K], p [Pa], v [m³/kg])."""

    gas_constant: float
    molar_mass: float
    critical: tuple[float, float, float]
    limits: Limits


def property_library() -> Any:
    """Return the property library itself, for the adapters of mixtures and solutions; loaded on first use."""
    from CoolProp import CoolProp  # costs more than everything else a review does

    return CoolProp


class Library:
    """One library state of one fluid."""

    def __init__(self, backend: str, name: str) -> None:
        # Names are commands to the library: only what stands in the table of ours gets there.
        fluid = fluid_of(name)
        if backend not in (HELMHOLTZ, INDUSTRIAL):
            raise NotEvaluable(f"no property source is called {backend[:40]!r}", "not-supported")
        CoolProp = property_library()  # noqa: N806 - a module

        self.name = fluid.name
        self._state: Any = CoolProp.AbstractState(backend, fluid.library)
        self._codes: dict[Pair, Any] = {
            pair: getattr(CoolProp, entry.constant) for pair, entry in _PAIRS.items()
        }
        self._phases = {LIQUID: CoolProp.iphase_liquid, GAS: CoolProp.iphase_gas}
        self._melting_keys = (CoolProp.iT, CoolProp.iP)
        self._ideal_inputs = CoolProp.DmolarT_INPUTS
        self._slope_keys = (CoolProp.iP, CoolProp.iDmass, CoolProp.iT)
        # The industrial formulation imposes no phases, and refuses more near saturation once asked to withdraw one.
        self._withdraw_phase = self._state.unspecify_phase if backend == HELMHOLTZ else _nothing
        self.constants = self._constants(backend)
        heat = self.constants.gas_constant
        energy = heat * self.constants.critical[0]
        self._scales = (0.0, 0.0, 0.0, energy, energy, heat, 1.0)

    def _constants(self, backend: str) -> Constants:
        state = self._state
        molar_mass = state.molar_mass()
        critical = (state.T_critical(), state.p_critical(), 1.0 / state.rhomass_critical())
        limits = self._helmholtz_limits() if backend == HELMHOLTZ else _INDUSTRIAL_LIMITS
        return Constants(state.gas_constant() / molar_mass, molar_mass, critical, limits)

    def _helmholtz_limits(self) -> Limits:
        state = self._state
        cold = max(state.Tmin(), state.Ttriple())
        state.update(self._codes[(TEMPERATURE, QUALITY)], 0.0, cold)
        melts = bool(state.has_melting_line())
        curve = self.melting_temperature if melts else None
        ends = [curve(pressure) for pressure in _LINE_OF_FALLING_ICE] if curve else []
        falls = len(ends) == 2 and ends[0] is not None and ends[1] is not None and ends[1] < ends[0]
        ends_at = (state.Tmax(), state.pmax(), state.p(), LOWEST_PRESSURE)
        return Limits(cold, *ends_at, melting=curve, ice_floats=falls)

    def melting_temperature(self, pressure: float) -> float | None:
        """Return the melting temperature [K] at a pressure [Pa], None where the curve does not reach it."""
        try:
            melts = float(self._state.melting_line(*self._melting_keys, pressure))
        except _FAILURES:
            return None
        return melts if math.isfinite(melts) else None

    def point(self, pair: Pair, first: float, second: float, side: str | None = None) -> Point:
        """Return the state of a trusted pair.

        Parameters
        ----------
        pair : tuple of str
            Two property names, one of ``TRUSTED``.
        first, second : float
            Their values. [SI]
        side : str or None
            ``liquid`` or ``gas``: the side of the saturation line, where the caller knows it.

        Raises
        ------
        NotEvaluable
            The library finds no state, or one that does not reproduce the inputs, or one outside the limits.
        """
        entry = _PAIRS[pair]
        point = self._solved(pair, *_as_inputs(entry, first, second), side)
        if point is None or not self._reproduces(point, pair, first, second):
            raise NotEvaluable(
                f"the equation of state of {self.name} gives no state for these two properties"
            )
        self.constants.limits.refuse_outside(point, self.name)
        return point

    def _solved(self, pair: Pair, one: float, two: float, side: str | None) -> Point | None:
        state = self._state
        try:
            self._withdraw_phase()
            if side is not None:
                state.specify_phase(self._phases[side])
            state.update(self._codes[pair], one, two)
            return _as_point(state)
        except _FAILURES:
            return None

    def _reproduces(self, point: Point, pair: Pair, first: float, second: float) -> bool:
        for name, value in zip(pair, (first, second), strict=True):
            index = INDEX[name]
            found = point[index]
            scale = max(abs(value), self._scales[index])
            if found is None or abs(found - value) > _REPRODUCED * scale:
                return False
        return True

    def saturation_pressure(self, temperature: float, quality: float = 0.0) -> float | None:
        """Return the saturation pressure [Pa] at a temperature, None where there is none."""
        try:
            self._withdraw_phase()
            self._state.update(self._codes[(TEMPERATURE, QUALITY)], quality, temperature)
            pressure = float(self._state.p())
        except _FAILURES:
            return None
        return pressure if math.isfinite(pressure) and pressure > 0.0 else None

    def vapour(self, temperature: float, volume: float) -> Point:
        """Return the vapour at a temperature [K] and specific volume [m³/kg], whether it is stable there or not.

        For vapour among other gases, which may be colder than the triple point or a little supersaturated. No limit
        of the equation is held here: the caller knows its own. Raises NotEvaluable where the equation has no value.
        """
        point = self._solved((TEMPERATURE, VOLUME), *_as_inputs(_VAPOUR, temperature, volume), GAS)
        if point is None:
            raise NotEvaluable(
                f"the equation of state of {self.name} gives no vapour at {temperature:.6g} K and "
                f"{volume:.6g} m³/kg"
            )
        return point

    def ideal_part(self, temperature: float) -> tuple[float, float, float]:
        """Return u [J/kg], s [J/(kg·K)] at v = 1 m³/kg and cv [J/(kg·K)] of the ideal gas at a temperature [K].

        From the ideal part of the Helmholtz energy, α⁰(τ, δ): u = R T τ α⁰_τ, s = R (τ α⁰_τ − α⁰),
        cv = −R τ² α⁰_ττ; the datum is that of the fluid. Source: Span, Multiparameter Equations of State,
        Springer 2000, table 3.8 (from memory).
        """
        state, gas_constant = self._state, self.constants.gas_constant
        try:
            state.unspecify_phase()
            state.specify_phase(self._phases[GAS])
            state.update(self._ideal_inputs, _VANISHING_DENSITY, temperature)
            tau, slope = state.tau(), state.dalpha0_dTau()
            energy = gas_constant * temperature * tau * slope
            entropy = gas_constant * (tau * slope - state.alpha0())
            heat = -gas_constant * tau * tau * state.d2alpha0_dTau2()
            volume = 1.0 / (_VANISHING_DENSITY * self.constants.molar_mass)
        except _FAILURES:
            raise NotEvaluable(
                f"the ideal gas part of {self.name} gives no value at {temperature:.6g} K"
            ) from None
        return energy, entropy - gas_constant * math.log(volume), heat


_INDUSTRIAL_LIMITS: Final = Limits(
    273.15,
    1073.15,
    100e6,
    611.657,
    pressure_min=611.213,
    ice_floats=True,
    hot=(2273.15, 50e6),
    cold_tolerance=0.0,
)


def _nothing() -> None:
    pass


def _as_inputs(entry: _Inputs, first: float, second: float) -> tuple[float, float]:
    if entry.volume == 0:
        first = 1.0 / first
    elif entry.volume == 1:
        second = 1.0 / second
    return (second, first) if entry.swapped else (first, second)


def _as_point(state: Any) -> Point | None:
    """Return the results, or None where one of them is not physical."""
    density, quality = state.rhomass(), state.Q()
    values = (state.T(), state.p(), density, state.umass(), state.hmass(), state.smass())
    if not all(map(math.isfinite, values)) or values[1] <= 0.0 or density <= 0.0:
        return None
    return Point(
        values[0],
        values[1],
        1.0 / density,
        *values[3:],
        quality if 0.0 <= quality <= 1.0 else None,
    )


class _PerThread(threading.local):
    def __init__(self) -> None:
        self.libraries: dict[tuple[str, str], Library] = {}


_OWN: Final = _PerThread()


def library_of(backend: str, fluid: str) -> Library:
    """Return this thread's library state of a fluid of the table."""
    libraries = _OWN.libraries
    found = libraries.get((backend, fluid))
    if found is None:
        found = libraries[(backend, fluid)] = Library(backend, fluid)
    return found


def property_library_version() -> str:
    """Return name and version of the property library, without loading it."""
    from importlib import metadata  # costs more than everything else here, and only reports ask

    try:
        return f"{_LIBRARY} {metadata.version(_LIBRARY)}"
    except metadata.PackageNotFoundError:
        return f"{_LIBRARY} (version unknown)"
