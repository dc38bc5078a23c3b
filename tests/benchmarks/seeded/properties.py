"""What a situation asks of a model: a state from two properties."""

from __future__ import annotations

from collections.abc import Callable
from typing import NamedTuple, Protocol

from scipy.optimize import brentq

from tests.benchmarks.seeded.equation import NoStateError


class State(NamedTuple):
    """T [K], p [Pa], v [m³/kg], u [J/kg], s [J/(kg·K)], x (nan in one phase)."""

    t: float
    p: float
    v: float
    u: float
    s: float
    x: float = float("nan")

    @property
    def h(self) -> float:
        """Return the specific enthalpy. [J/kg]"""
        return self.u + self.p * self.v


class Model(Protocol):
    """A substance."""

    @property
    def gas_constant(self) -> float:
        """Specific gas constant [J/(kg·K)]; nan without one."""

    def at(self, **known: float) -> State:
        """Return the state with two of t, p, v, u, h, s and x; NoStateError if there is none."""


def solved(function: Callable[[float], float], low: float, high: float) -> float:
    """Return the root between two ends; NoStateError where the ends do not bracket one."""
    try:
        at_low, at_high = function(low), function(high)
        if not at_low * at_high <= 0.0:
            raise NoStateError("no root between the ends")
        return float(brentq(function, low, high, xtol=1e-11, rtol=1e-13, maxiter=200))
    except (ArithmeticError, RuntimeError) as error:
        raise NoStateError(str(error)) from error
