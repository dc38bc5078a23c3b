"""How far an idealised model of a body is from the substance that it stands for."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.mixed import condensing_component, ideal_mixture, is_mixed, mixed_compressibility
from checker.facts.twins import (
    CONSTANT,
    IDEAL,
    REAL,
    TABULATED,
    boiling_temperature,
    compressibility,
    is_condensed,
    is_gas,
    twin,
)
from checker.submission import Role
from checker.substances.factory import MOLAR_GAS_CONSTANT
from checker.substances.interface import Substance
from checker.substances.materials import melting_material_of
from checker.vocabulary import Allowance

NEAR_TEMPERATURE: Final = 0.02
NEAR_PRESSURE: Final = 0.10


@dataclass(frozen=True, slots=True)
class GasCheck:
    """A gas held against its real fluid in one state; Z None where the real fluid does not tell.

    ``component`` is what condenses of a mixture. ``halfway`` is Z at half the pressure: where attraction and repulsion
    just balance, Z is 1 and the gas is no ideal one all the same.
    """

    factor: float | None
    condensed: bool
    component: str = ""
    halfway: float | None = None


@dataclass(frozen=True, slots=True)
class Dense:
    """Where the compressibility factor of a body is farthest from 1; ``halfway``: at half the pressure of the state."""

    state: str
    factor: float
    halfway: bool = False


def gas_check(case: Case, state: str, body: str) -> GasCheck | None:
    """Return how real a gas is in a state; None without the state or without an equation of the real fluid."""
    temperature, pressure = (case.value(f"states/{state}/{body}/{n}") for n in ("temperature", "pressure"))
    if temperature is not None and pressure is not None and is_mixed(case, body):
        component = condensing_component(case, body, temperature, pressure)
        if component:
            return GasCheck(None, True, component)
        whole, half = (mixed_compressibility(case, body, temperature, p) for p in (pressure, 0.5 * pressure))
        return GasCheck(whole, False, halfway=half)
    real = twin(case.record.bodies[body].substance, REAL)
    if real is None or temperature is None or pressure is None:
        return None
    if is_condensed(real, temperature, pressure):
        return GasCheck(None, True)
    whole, half = (compressibility(real, temperature, p) for p in (pressure, 0.5 * pressure))
    return GasCheck(whole, False, halfway=half)


def gas_checks(case: Case, body: str) -> dict[str, GasCheck | None]:
    """Return how real a gas is in each of its states."""
    return {state: gas_check(case, state, body) for state in states_of(case, body)}


def densest(checks: Mapping[str, GasCheck | None]) -> Dense | None:
    """Return where Z of a body is farthest from 1; None where no Z is known or the fluid is liquid."""
    found: list[Dense] = []
    for state, check in checks.items():
        if check is not None and check.condensed:
            return None
        if check is not None and check.factor is not None:
            found.append(Dense(state, check.factor))
            found += [] if check.halfway is None else [Dense(state, check.halfway, True)]
    return max(found, key=lambda dense: abs(dense.factor - 1.0), default=None)


def own_compressibility(case: Case, state: str, body: str) -> float | None:
    """Return Z = p·v/(R·T) of a real fluid in a state."""
    names = ("temperature", "pressure", "specific_volume")
    temperature, pressure, volume = (case.value(f"states/{state}/{body}/{name}") for name in names)
    substance = case.plan.substances.get(body)
    if substance is None or substance.gas_constant is None or not temperature or not pressure or not volume:
        return None
    return pressure * volume / (substance.gas_constant * temperature)


def states_of(case: Case, body: str) -> tuple[str, ...]:
    """Return the states that a body has."""
    return tuple(state for state, name in case.record.body_states if name == body)


def better_heat(case: Case, body: str) -> Substance | None:
    """Return the model with which a constant specific heat is compared: ideal gas, or the real liquid."""
    if (mixture := ideal_mixture(case, body)) is not None:
        return mixture
    substance = case.record.bodies[body].substance
    return twin(substance, IDEAL if is_gas(case, body) else REAL)


def has_constant_heat(case: Case, body: str) -> bool:
    """Say whether a body is calculated with a constant specific heat."""
    own = case.plan.substances.get(body)
    return own is not None and own.model == CONSTANT


def has_critical_point(case: Case, body: str) -> bool:
    """Say whether a body is a real fluid whose equation has a critical point."""
    substance = case.plan.substances.get(body)
    return substance is not None and substance.model == REAL and substance.critical_point is not None


def near_critical(case: Case, state: str, body: str) -> bool:
    """Say whether a state of a real fluid is so close to its critical point that properties are uncertain."""
    substance = case.plan.substances.get(body)
    temperature, pressure = (case.value(f"states/{state}/{body}/{n}") for n in ("temperature", "pressure"))
    if substance is None or substance.critical_point is None or substance.model != REAL:
        return False
    if temperature is None or pressure is None:
        return False
    point = substance.critical_point
    close = abs(temperature / point[0] - 1.0) <= NEAR_TEMPERATURE
    return close and abs(pressure / point[1] - 1.0) <= NEAR_PRESSURE


@dataclass(frozen=True, slots=True)
class ConstantCheck:
    """A stated constant of a body beside the value that another source gives. [SI]"""

    pointer: str
    expected: float
    source: str


def constants_of_substance(case: Case, body: str) -> tuple[ConstantCheck, ...]:
    """Return what the named fluid's own constants are, for those among the inputs."""
    known = twin(case.record.bodies[body].substance, IDEAL)
    if known is None or known.molar_mass is None or known.gas_constant is None:
        return ()
    pairs = (("molar_mass", known.molar_mass), ("gas_constant", known.gas_constant))
    return tuple(
        ConstantCheck(f"bodies/{body}/{name}", value, known.name)
        for name, value in pairs
        if case.record.stated(f"bodies/{body}/{name}", Role.INPUT)
    )


def gas_constants(case: Case, body: str) -> tuple[ConstantCheck, ...]:
    """Return what the other stated constants of a gas give for its gas constant: cp − cv and R_u/M."""
    names = (
        "gas_constant",
        "molar_mass",
        "specific_heat_at_constant_pressure",
        "specific_heat_at_constant_volume",
    )
    own, molar, cp, cv = (case.given(f"bodies/{body}/{name}") for name in names)
    expected: list[tuple[float, str]] = []
    if cp is not None and cv is not None:
        expected.append((cp - cv, "c_p − c_v"))
    if molar:
        expected.append((MOLAR_GAS_CONSTANT / molar, "R/M"))
    if own is not None:
        expected.insert(0, (own, "the stated gas constant"))
    return tuple(ConstantCheck(f"bodies/{body}", value, source) for value, source in expected)


def digits_of_constants(case: Case, body: str) -> float:
    """Return how far the last digits of the stated constants move a gas constant. [J/(kg·K)]"""
    moved = 0.0
    for name in ("gas_constant", "specific_heat_at_constant_pressure", "specific_heat_at_constant_volume"):
        moved += sum(s.quantity.half_width for s in case.record.stated(f"bodies/{body}/{name}", Role.INPUT))
    for s in case.record.stated(f"bodies/{body}/molar_mass", Role.INPUT):
        moved += MOLAR_GAS_CONSTANT / s.value**2 * s.quantity.half_width if s.value else 0.0
    return moved


REGIONS: Final = {-2: "solid", -1: "frozen", 0: "liquid", 1: "evaporated"}


@dataclass(frozen=True, slots=True)
class Region:
    """Where the fluid of a condensed body is in a state: below 0 solid, 0 liquid, 1 evaporated; its temperature [K]."""

    state: str
    side: int
    temperature: float


def regions(case: Case, process: str, body: str) -> tuple[Region, Region] | None:
    """Return where the real fluid of a body without phases is at both ends of a process; None where not known.

    It is evaporated above the saturation temperature at its stated pressure, or above the critical temperature. A body
    that melts by its own model is not told frozen from liquid, and a stated table may hold latent heats.
    """
    ctx, real = case.context(process), twin(case.record.bodies[body].substance, REAL)
    own = case.plan.substances.get(body)
    if ctx is None or real is None or real.valid_range is None or own is None or own.model == TABULATED:
        return None
    lowest = -1 if own.model == CONSTANT else 0
    found = [
        Region(state, max(side, lowest), temperature)
        for state in (ctx.process.from_state, ctx.process.to_state)
        if (temperature := case.value(f"states/{state}/{body}/temperature")) is not None
        and (side := _side(case, real, f"states/{state}/{body}", temperature)) is not None
    ]
    return (found[0], found[1]) if len(found) == 2 else None


def _side(case: Case, real: Substance, base: str, temperature: float) -> int | None:
    slack, pressure = case.basis.allowances[Allowance.TEMPERATURE], case.value(f"{base}/pressure")
    if real.valid_range is None or real.critical_point is None:
        return None
    if temperature < real.valid_range.temperature_min - slack:
        return -1
    boiling = boiling_temperature(real, pressure) or real.critical_point[0]
    return int(temperature > boiling + slack)


def without_latent_heat(case: Case, body: str) -> str:
    """Return in words what a body without phases, or without vapour, is calculated with."""
    constant = has_constant_heat(case, body)
    return "with one specific heat and no latent heat" if constant else "without latent heat of evaporation"


def melts(case: Case, process: str, body: str) -> tuple[Region, Region] | None:
    """Return on which side of its melting temperature a body of constant specific heat is at both ends of a process.

    None where the handbook table has no melting temperature of its substance.
    """
    ctx, row = case.context(process), melting_material_of(case.record.bodies[body].substance)
    if ctx is None or row is None or row.melting_temperature is None or not has_constant_heat(case, body):
        return None
    slack = case.basis.allowances[Allowance.TEMPERATURE]
    ends = (ctx.process.from_state, ctx.process.to_state)
    values = [case.value(f"states/{state}/{body}/temperature") for state in ends]
    if (
        values[0] is None
        or values[1] is None
        or min(abs(v - row.melting_temperature) for v in values if v) <= slack
    ):
        return None
    first, last = (
        Region(state, -2 if value < row.melting_temperature else 0, value)
        for state, value in zip(ends, values, strict=True)
        if value is not None
    )
    return first, last
