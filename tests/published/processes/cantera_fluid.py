"""Pure fluids of the library Cantera: older equations of state with their own data and code.

Source: W. C. Reynolds, Thermodynamic Properties in SI (1979), as implemented there; HFC-134a by R. Tillner-Roth and
H. D. Baehr (1994), the equation that the alternate calculation uses as well.
"""

from __future__ import annotations

import cantera

from tests.published.processes.reference import Reference


class CanteraFluid:
    """A pure fluid; only what its library answers reliably (its oxygen and heptane do not, its hydrogen is para)."""

    def __init__(self, name: str) -> None:
        self._fluid = getattr(cantera, name)()
        self.gas_constant: float = cantera.gas_constant / self._fluid.mean_molecular_weight
        self.critical_temperature: float = self._fluid.critical_temperature
        self.critical_pressure: float = self._fluid.critical_pressure

    def _state(self) -> Reference:
        f = self._fluid
        return Reference(float(f.T), float(f.P), float(f.v), float(f.u), float(f.s))

    def at_pressure(self, t: float, p: float) -> Reference:
        """Return the state at a temperature and a pressure off the saturation line."""
        self._fluid.TP = t, p
        return self._state()

    def at_quality(self, t: float, x: float) -> Reference:
        """Return the mixture at a temperature with a mass fraction of vapour."""
        self._fluid.TQ = t, x
        return self._state()

    def at_volume(self, t: float, v: float) -> Reference:
        """Return the state at a temperature and a specific volume."""
        self._fluid.TD = t, 1.0 / v
        return self._state()

    def at_entropy(self, s: float, v: float) -> Reference:
        """Return the state at a specific entropy and a specific volume."""
        self._fluid.SV = s, v
        return self._state()
