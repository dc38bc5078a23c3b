"""States of other property libraries, in one shape."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Protocol


@dataclass(frozen=True, slots=True)
class Reference:
    """A state: T [K], p [Pa], v [m³/kg], u [J/kg], s [J/(kg·K)]."""

    t: float
    p: float
    v: float
    u: float
    s: float

    @property
    def h(self) -> float:
        """Return the specific enthalpy. [J/kg]"""
        return self.u + self.p * self.v


class ReferenceFluid(Protocol):
    """What a check over a grid asks of another property library."""

    gas_constant: float
    critical_temperature: float
    critical_pressure: float

    def at_pressure(self, t: float, p: float) -> Reference:
        """Return the state at a temperature and a pressure off the saturation line."""

    def at_quality(self, t: float, x: float) -> Reference:
        """Return the mixture at a temperature with a mass fraction of vapour."""

    def at_volume(self, t: float, v: float) -> Reference:
        """Return the state at a temperature and a specific volume."""

    def at_entropy(self, s: float, v: float) -> Reference:
        """Return the state at a specific entropy and a specific volume."""


def mixed(liquid: Reference, vapour: Reference, x: float) -> Reference:
    """Return the mixture of saturated liquid and vapour by the lever rule."""
    v, u, s = (
        getattr(liquid, name) + x * (getattr(vapour, name) - getattr(liquid, name))
        for name in ("v", "u", "s")
    )
    return Reference(liquid.t, liquid.p, v, u, s)
