"""Going along a quasi-static path from a known state: to a volume, to a pressure, or until a total is reached."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass

from checker.outcomes import NotEvaluable
from checker.sheet.on_path import positive_pressure, state_on
from checker.sheet.paths import Parameters, Path
from checker.sheet.search import around, find_state
from checker.substances.interface import PropertyState, Substance


@dataclass(frozen=True, slots=True)
class Along:
    """A path of a substance with its parameters."""

    substance: Substance
    path: Path
    parameters: Parameters

    def work(self, first: PropertyState, last: PropertyState) -> float:
        """Return the specific boundary work between two states on the path. [J/kg]"""
        if self.path.between is None:
            raise NotEvaluable(f"the {self.path.kind} path does not tell its work", "missing")
        return self.path.between(first, last, self.parameters)

    def at_volume(self, here: PropertyState, volume: float) -> PropertyState:
        """Return the state on the path at a specific volume [m³/kg]. Raises NotEvaluable."""
        return self._state(here)(volume)

    def at_pressure(self, here: PropertyState, pressure: float) -> PropertyState:
        """Return the state on a constant-volume path at a pressure [Pa]. Raises NotEvaluable."""
        if here.specific_volume is None:
            raise NotEvaluable("the model states no density", "missing")
        return self.substance.state({"pressure": pressure, "specific_volume": here.specific_volume})

    def until(self, here: PropertyState, target: str, wanted: float, mass: float) -> PropertyState:
        """Return the state on the path where a property has a value, or the heat or work from here is reached.

        Parameters
        ----------
        target : str
            ``heat``, ``work`` or the name of a property.
        wanted : float
            Its value: J for heat and work of the whole mass.
        """
        if target not in ("heat", "work"):
            return self._where(here, target, wanted)
        specific = wanted / mass
        if target == "heat" and self.path.holds == "specific_volume":
            return self.substance.state(
                {
                    "specific_volume": here.specific_volume or 0.0,
                    "specific_internal_energy": here.specific_internal_energy + specific,
                }
            )
        if target == "heat" and self.path.holds == "pressure":
            enthalpy = (here.specific_enthalpy or 0.0) + specific
            return self.substance.state({"pressure": here.pressure or 0.0, "specific_enthalpy": enthalpy})

        def residual(state: PropertyState) -> float:
            gain = state.specific_internal_energy - here.specific_internal_energy if target == "heat" else 0.0
            return gain + self.work(here, state) - specific

        scale = max(abs(specific), abs((here.pressure or 0.0) * (here.specific_volume or 0.0)))
        grid = around(here.specific_volume or 1.0)
        return find_state(self._state(here), residual, grid, scale, f"the total {target}", outward=True)

    def _where(self, here: PropertyState, name: str, value: float) -> PropertyState:
        holds = self.path.holds
        if holds == name:
            raise NotEvaluable(f"{name.replace('_', ' ')} does not change along the path", "missing")
        if holds is not None:
            return self.substance.state({holds: getattr(here, holds), name: value})
        assert self.path.curve is not None
        return state_on(self.substance, self.path.curve(here, self.parameters), here, name, value, None)

    def _state(self, here: PropertyState) -> Callable[[float], PropertyState]:
        """Return the states on the path by specific volume."""
        holds = self.path.holds
        if holds == "specific_volume":
            raise NotEvaluable("the volume does not change along the path", "missing")
        if holds is not None:
            held = getattr(here, holds)
            return lambda v: self.substance.state({holds: held, "specific_volume": v})
        assert self.path.curve is not None
        pressure = self.path.curve(here, self.parameters)
        return lambda v: self.substance.state(
            {"pressure": positive_pressure(pressure(v)), "specific_volume": v}
        )
