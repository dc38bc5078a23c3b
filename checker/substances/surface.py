"""Curves over the surface of equilibrium states along which a missing property is searched for."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from typing import Protocol

from checker.substances.coolprop import Constants
from checker.substances.properties import Known, Point


@dataclass(frozen=True, slots=True)
class Branch:
    """A part of a curve without jumps: parameters to scan, and the state at a parameter.

    ``flat`` says that the property searched for may hardly change along it, so that a root may mean nothing.
    """

    parameters: tuple[float, ...]
    at: Callable[[float], Point]
    flat: bool = False


Curve = tuple[Branch, ...]


class Surface(Protocol):
    """The equilibrium states of a fluid by one formulation."""

    @property
    def name(self) -> str:
        """Name of the fluid for sentences."""

    @property
    def constants(self) -> Constants:
        """Constants and limits."""

    @property
    def reproduces(self) -> float:
        """Relative deviation within which a root must give back the known properties."""

    def direct(self, known: Known) -> Point | None:
        """Return the state if the library can be trusted with the pair (it has one root), else None."""

    def saturated(self, name: str, value: float) -> tuple[Point, Point]:
        """Return saturated liquid and vapour at a temperature or pressure. Raises NotEvaluable."""

    def saturation_pressures(self, temperature: float) -> tuple[float, float] | None:
        """Return the pressures [Pa] of dew and bubble point at a temperature, None where there are none."""

    def isotherm(self, temperature: float) -> Curve:
        """Return the curve of constant temperature [K]."""

    def isobar(self, pressure: float) -> Curve:
        """Return the curve of constant pressure [Pa]."""

    def isochore(self, volume: float) -> Curve:
        """Return the curve of constant specific volume [m³/kg]."""

    def isentrope(self, entropy: float) -> Curve:
        """Return the curve of constant specific entropy [J/(kg·K)]."""

    def isenergetic(self, energy: float) -> Curve:
        """Return the curve of constant specific internal energy [J/kg]."""

    def quality_line(self, quality: float) -> Curve:
        """Return the curve of constant quality."""


def geometric(low: float, high: float, count: int) -> tuple[float, ...]:
    """Return ``count`` numbers in equal ratios, both ends exact."""
    ratio = high / low
    return (low, *(low * ratio ** (step / (count - 1)) for step in range(1, count - 1)), high)


def even(low: float, high: float, count: int) -> tuple[float, ...]:
    """Return ``count`` numbers at equal distances, both ends exact."""
    return (low, *(low + (high - low) * step / (count - 1) for step in range(1, count - 1)), high)


def crowded(far: float, near: float, count: int, power: float = 3.0) -> tuple[float, ...]:
    """Return ``count`` numbers from ``far`` to ``near`` that crowd towards ``near``, both ends exact."""
    steps = range(1, count - 1)
    return (far, *(near + (far - near) * (1.0 - step / (count - 1)) ** power for step in steps), near)


def increasing(values: Iterable[float]) -> tuple[float, ...]:
    """Return the distinct values in increasing order."""
    return tuple(sorted(set(values)))
