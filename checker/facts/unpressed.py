"""Liquids of constant specific heat above their boiling temperature, of whose pressure nothing is said."""

from __future__ import annotations

from dataclasses import dataclass

from checker.case import Case
from checker.facts.adequacy import has_constant_heat, states_of
from checker.facts.twins import ATMOSPHERE, REAL, saturation_pressure, twin


@dataclass(frozen=True, slots=True)
class Needed:
    """The pressure [Pa] that keeps a body liquid in its warmest state, at its temperature [K]."""

    state: str
    temperature: float
    pressure: float


def needed_pressure(case: Case, body: str) -> Needed | None:
    """Return the pressure that a liquid needs; None where the atmosphere is enough, or a pressure is stated.

    Only what is liquid at its coldest under the atmosphere counts: a solid or a gas has no question of this kind.
    """
    real = twin(case.record.bodies[body].substance, REAL)
    known = [
        (value, state)
        for state in states_of(case, body)
        if (value := case.value(f"states/{state}/{body}/temperature")) is not None
    ]
    stated = any(case.stated(f"states/{state}/{body}/pressure") for state in states_of(case, body))
    if real is None or not known or stated or not has_constant_heat(case, body):
        return None
    outside = case.given("surroundings/pressure") or ATMOSPHERE
    (coldest, _), (warmest, state) = min(known), max(known)
    first, pressure = (saturation_pressure(real, value) for value in (coldest, warmest))
    if first is None or pressure is None or first > outside or pressure <= 1.05 * outside:
        return None
    return Needed(state, warmest, pressure)
