"""Where along a branch a property takes a value."""

from __future__ import annotations

import math
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import Constants
from checker.substances.properties import ENERGY, ENTHALPY, ENTROPY, INDEX, Point
from checker.substances.search import Function, roots
from checker.substances.surface import Branch

_HIT: Final = 2e-9
"""Residual at which the end of a branch, or an extremum, counts as a root: the noise of the library."""


def scale_of(constants: Constants, name: str) -> float:
    """Return the magnitude against which a deviation of a property is judged; 0 where its own value is right.

    Energies and entropies may be zero by their datum, so R·T_c and R stand beside their value.
    """
    if name == ENTROPY:
        return constants.gas_constant
    return constants.gas_constant * constants.critical[0] if name in (ENERGY, ENTHALPY) else 0.0


def residual_along(branch: Branch, name: str, target: float, constants: Constants) -> Function:
    """Return the scaled deviation of a property along a branch; NaN where the branch has no state."""
    index = INDEX[name]
    scale = max(abs(target), scale_of(constants, name)) or 1.0

    def residual(parameter: float) -> float:
        try:
            found = branch.at(parameter)[index]
        except NotEvaluable:
            return math.nan
        return math.nan if found is None else (found - target) / scale

    return residual


def matches(branch: Branch, residual: Function, reproduces: float) -> list[tuple[float, Point]]:
    """Return the parameters and states at the roots of a residual that really reproduce the value."""
    found = []
    for parameter in roots(residual, branch.parameters, _HIT):
        if abs(residual(parameter)) <= reproduces:
            found.append((parameter, branch.at(parameter)))
    return found
