"""The same substance by a better model: what an idealised body is held against."""

from __future__ import annotations

from functools import lru_cache
from typing import Final

from checker.case import Case
from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.interface import PropertyState, Substance
from checker.substances.names import knows_fluid

REAL: Final = "real fluid"
IDEAL: Final = "ideal gas"
CONSTANT: Final = "constant specific heat"
TABULATED: Final = "tabulated"
ATMOSPHERE: Final = 101325.0


@lru_cache(maxsize=64)
def twin(substance: str, model: str) -> Substance | None:
    """Return a substance by another model, or None where the fluid is not known by it."""
    if not knows_fluid(substance):
        return None
    try:
        return make_substance(substance, model, {})
    except NotEvaluable:
        return None


def is_gas(case: Case, body: str) -> bool:
    """Say whether a body is modelled as an ideal gas, with constant specific heats or not."""
    own = case.plan.substances.get(body)
    return own is not None and own.model in (IDEAL, CONSTANT, TABULATED) and not own.incompressible


def is_incompressible(case: Case, body: str) -> bool:
    """Say whether the temperature alone fixes u and s of a body."""
    own = case.plan.substances.get(body)
    return own is not None and own.incompressible


def compressibility(real: Substance, temperature: float, pressure: float) -> float | None:
    """Return Z = p·v/(R·T) of the real fluid; None outside its equation's range and on its saturation line."""
    try:
        found = real.state({"temperature": temperature, "pressure": pressure})
    except NotEvaluable:
        return None
    if found.specific_volume is None or real.gas_constant is None:
        return None
    return pressure * found.specific_volume / (real.gas_constant * temperature)


def saturation_pressure(real: Substance, temperature: float) -> float | None:
    """Return the dew pressure [Pa]; None above the critical temperature and where there is no saturation line."""
    try:
        return real.saturation({"temperature": temperature})[1].pressure
    except NotEvaluable:
        return None


def boiling_temperature(real: Substance, pressure: float | None) -> float | None:
    """Return the bubble temperature [K]; None without a pressure and where there is no saturation line."""
    if pressure is None:
        return None
    try:
        return real.saturation({"pressure": pressure})[0].temperature
    except NotEvaluable:
        return None


def is_condensed(real: Substance, temperature: float, pressure: float) -> bool:
    """Say whether the real fluid is liquid (or solid) where a gas is assumed."""
    vapour = saturation_pressure(real, temperature)
    return vapour is not None and pressure > vapour * (1.0 + 1e-6)


def _liquid_state(real: Substance, temperature: float, pressure: float | None) -> PropertyState | None:
    vapour = saturation_pressure(real, temperature)
    if vapour is None:
        return None
    try:
        pressed = max(ATMOSPHERE if pressure is None else pressure, 1.1 * vapour)
        return real.state({"temperature": temperature, "pressure": pressed})
    except NotEvaluable:
        return None


def blocked_in_pressure(
    real: Substance, first: float, last: float, pressure: float | None = None
) -> tuple[float, float] | None:
    """Return the pressures at both ends of a liquid that is warmed at constant volume. [Pa]

    It starts at the pressure that is known, else at the atmospheric one, and just above its own vapour pressure where
    that is higher; None where it is no liquid then.
    """
    start = _liquid_state(real, first, pressure)
    if start is None or start.specific_volume is None or start.pressure is None:
        return None
    try:
        end = real.state({"temperature": last, "specific_volume": start.specific_volume}).pressure
    except NotEvaluable:
        return None
    return None if end is None else (start.pressure, end)
