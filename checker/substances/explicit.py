"""States of a model that is explicit in temperature and specific volume, from any two independent properties.

At constant volume p, u, h and s rise with T; at constant temperature p falls and s rises with v; at constant
pressure u, h, s and v rise with T; along an isentrope p, u and h rise with T. So each pair has one root at most,
which a bracketed search over T or v finds; where the model refuses a state on the way, its reason is passed on.
"""

from __future__ import annotations

import math
from collections.abc import Callable, Mapping
from typing import ClassVar, Final

from checker.outcomes import NotEvaluable
from checker.substances.interface import Phase, PropertyState, ValidRange
from checker.substances.properties import (
    ENERGY,
    ENTHALPY,
    ENTROPY,
    INDEX,
    PRESSURE,
    TEMPERATURE,
    VOLUME,
    Known,
    checked_value,
    read_known,
)
from checker.substances.search import bracketed_root
from checker.substances.without_phases import WithoutPhases

_GROWTH: Final = 1.6
_FIRST_STEP: Final = 0.05
_STRIDES: Final = 40
_EDGE_STEPS: Final = 40
_REPRODUCED: Final = 1e-7
_WIDEST: Final = (1e-4, 1e9)  # m³/kg
_ROUNDING: Final = 1e-9
Curve = Callable[[float], PropertyState]


class Explicit(WithoutPhases):
    """The states of a model that gives p, u and s from T and v."""

    incompressible: ClassVar[bool] = False
    starts: ClassVar[tuple[float, ...]] = (0.25, 0.5, 0.12, 0.75, 0.04, 0.9, 0.01)
    """Where a search over temperature may start, as shares of the range; the first that the model has is taken."""

    @property
    def name(self) -> str:
        """Name for the report."""
        raise NotImplementedError

    @property
    def gas_constant(self) -> float:
        """Specific gas constant at low density [J/(kg·K)]."""
        raise NotImplementedError

    @property
    def valid_range(self) -> ValidRange:
        """Range of the model."""
        raise NotImplementedError

    def at(self, temperature: float, volume: float) -> PropertyState:
        """Return the state at a temperature [K] and specific volume [m³/kg]. Raises NotEvaluable."""
        raise NotImplementedError

    def state(self, known: Mapping[str, float], phase: Phase | None = None) -> PropertyState:
        """Return the state with these two properties; a stated phase is of no use here.

        Raises
        ------
        NotEvaluable
            The two hardly depend on each other (T with u or h, u with h), include a quality, or belong to no state
            that the model has.
        """
        del phase
        self.refuse_quality(known)
        pair = read_known(known)
        if set(pair.pair) <= {TEMPERATURE, ENERGY, ENTHALPY}:
            raise NotEvaluable(
                f"{pair.pair[0]} and {pair.pair[1]} of {self.name} are hardly independent".replace("_", " "),
                "ill-conditioned",
            )
        found = self._found(pair)
        self._refuse_outside(found)
        return found

    def states(self, known: Mapping[str, float]) -> tuple[PropertyState, ...]:
        """Return the one state with these two properties. Raises NotEvaluable."""
        return (self.state(known),)

    def _found(self, pair: Known) -> PropertyState:
        if TEMPERATURE in pair.pair:
            return self._on_isotherm(pair.first, pair.pair[1], pair.second)
        held = next(name for name in (VOLUME, PRESSURE, ENTROPY) if name in pair.pair)
        value, sought = pair.value(held), pair.other(held)
        return self._over_temperature(lambda t: self._on_isotherm(t, held, value), sought, pair.value(sought))

    def _on_isotherm(self, temperature: float, name: str, value: float) -> PropertyState:
        """Return the state at a temperature with a volume, a pressure or an entropy."""
        self._refuse_temperature(temperature)
        if name == VOLUME:
            return self.at(temperature, value)
        if name == PRESSURE:
            return self._at_pressure(temperature, value)
        guess = math.log(self.gas_constant * temperature / 1e5)
        low, high = (math.log(limit) for limit in _WIDEST)
        start = (guess - low) / (high - low)
        return self._sought(
            lambda x: self.at(temperature, math.exp(x)), (low, high), ENTROPY, value, (start,)
        )

    def _at_pressure(self, temperature: float, pressure: float) -> PropertyState:
        """Return the state at a temperature and pressure; over ln v, along which p falls."""
        low, high = (math.log(limit) for limit in _WIDEST)
        start = (math.log(self.gas_constant * temperature / pressure) - low) / (high - low)
        return self._sought(
            lambda x: self.at(temperature, math.exp(x)), (low, high), PRESSURE, pressure, (start,), falls=True
        )

    def _over_temperature(self, curve: Curve, name: str, value: float) -> PropertyState:
        span = self.valid_range
        low, high = span.temperature_min, span.temperature_max
        return self._sought(curve, (low, high), name, value, self.starts)

    def _sought(
        self,
        curve: Curve,
        span: tuple[float, float],
        name: str,
        value: float,
        starts: tuple[float, ...],
        falls: bool = False,
    ) -> PropertyState:
        """Return the state on a curve where a property that rises (or falls) along it takes a value."""
        index = INDEX[name]
        scale = max(abs(value), self._scale(name))
        search = Search(curve, span)

        def residual(x: float) -> float:
            found = search.state(x)
            if found is None:
                return math.nan
            deviation = (_property(found, index) - value) / scale
            return -deviation if falls else deviation

        root = search.root(residual, starts)
        found = None if root is None else search.state(root)
        if found is not None and root is not None and abs(residual(root)) <= _REPRODUCED:
            return found
        if search.refusal is not None:
            raise search.refusal
        raise NotEvaluable(
            f"no state of {self.name} within the range of its model has this {name.replace('_', ' ')}",
            "outside-range",
        )

    def _scale(self, name: str) -> float:
        """Return the magnitude against which a deviation is judged where the value may be zero by its datum."""
        if name in (ENERGY, ENTHALPY):
            return self.gas_constant * 300.0
        return self.gas_constant if name == ENTROPY else 0.0

    def refuse_volume(self, volume: float) -> None:
        """Raise NotEvaluable (outside-range) for a specific volume [m³/kg] at which nothing can be calculated."""
        if not _WIDEST[0] <= volume <= _WIDEST[1]:
            raise NotEvaluable(
                f"a specific volume of {volume:.6g} m³/kg is outside the range of the model of {self.name}",
                "outside-range",
            )

    def _refuse_temperature(self, temperature: float) -> None:
        checked_value(TEMPERATURE, temperature)
        span = self.valid_range
        low, high = span.temperature_min * (1.0 - _ROUNDING), span.temperature_max * (1.0 + _ROUNDING)
        if not low <= temperature <= high:
            raise NotEvaluable(
                f"{temperature:.6g} K is outside {span.temperature_min:.6g} to {span.temperature_max:.6g} K, where "
                f"the model of {self.name} holds",
                "outside-range",
            )

    def _refuse_outside(self, found: PropertyState) -> None:
        highest = self.valid_range.pressure_max
        if found.pressure is not None and found.pressure > highest * (1.0 + _ROUNDING):
            raise NotEvaluable(
                f"{found.pressure:.6g} Pa is above {highest:.6g} Pa, where the model of {self.name} ends",
                "outside-range",
            )


def _property(state: PropertyState, index: int) -> float:
    values = (
        state.temperature,
        state.pressure,
        state.specific_volume,
        state.specific_internal_energy,
        state.specific_enthalpy,
        state.specific_entropy,
    )
    found = values[index]
    return math.nan if found is None else found


class Search:
    """One search for the root of a rising function; it remembers why the model refused a state on the way."""

    def __init__(self, curve: Curve, span: tuple[float, float]) -> None:
        self._curve, self._span = curve, span
        self.refusal: NotEvaluable | None = None

    def state(self, x: float) -> PropertyState | None:
        """Return the state at a parameter, None where the model refuses it."""
        try:
            return self._curve(x)
        except NotEvaluable as outcome:
            self.refusal = outcome
            return None

    def root(self, residual: Callable[[float], float], starts: tuple[float, ...]) -> float | None:
        """Return the root, None where there is none between states that the model has."""
        low, high = self._span
        for share in starts:
            x = low + min(1.0, max(0.0, share)) * (high - low)
            value = residual(x)
            if not math.isnan(value):
                return self._from(residual, x, value)
        return None

    def _from(self, residual: Callable[[float], float], x: float, value: float) -> float | None:
        """Walk from a state that the model has towards the root, until it is bracketed."""
        self.refusal = None
        end = self._span[0] if value > 0.0 else self._span[1]
        step = math.copysign(_FIRST_STEP * (self._span[1] - self._span[0]), end - x)
        for _ in range(_STRIDES):
            if value == 0.0:
                return x
            if x == end:
                return None
            further = end if abs(end - x) <= abs(step) else x + step
            found = residual(further)
            if math.isnan(found):
                return self._at_edge(residual, (x, value), further)
            if (found > 0.0) != (value > 0.0):
                self.refusal = None
                root = bracketed_root(residual, *sorted(((x, value), (further, found))))
                return None if math.isnan(root) else root
            x, value, step = further, found, step * _GROWTH
        return None

    def _at_edge(
        self, residual: Callable[[float], float], inside: tuple[float, float], outside: float
    ) -> float | None:
        """Return the root between a state that the model has and one that it refuses, if there is one."""
        refusal = self.refusal
        for _ in range(_EDGE_STEPS):
            middle = 0.5 * (inside[0] + outside)
            value = residual(middle)
            if math.isnan(value):
                outside, refusal = middle, self.refusal
            elif (value > 0.0) != (inside[1] > 0.0):
                root = bracketed_root(residual, *sorted(((middle, value), inside)))
                return None if math.isnan(root) else root
            else:
                inside = (middle, value)
        self.refusal = refusal
        return None
