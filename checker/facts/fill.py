"""How full a closed vessel is: what of it the liquid fills, when it is full, and what pressure it then builds up."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass

from checker.case import Case
from checker.facts.paths import followers
from checker.facts.twins import REAL, blocked_in_pressure, is_incompressible, twin
from checker.outcomes import NotEvaluable
from checker.quantity.types import Quantity
from checker.substances.interface import Substance
from checker.vocabulary import Allowance

PATH = "constant volume"


@dataclass(frozen=True, slots=True)
class Warming:
    """A fluid that warms in a closed volume.

    Attributes
    ----------
    process, body, first, last : str
        Where; ``last`` is the warmer end.
    cold, hot : float
        Temperatures of both ends. [K]
    volume : float or None
        Specific volume, None where the model states none. [m³/kg]
    pressure : float or None
        That of the first state, None where none is known. [Pa]
    """

    process: str
    body: str
    first: str
    last: str
    cold: float
    hot: float
    volume: float | None
    pressure: float | None


@dataclass(frozen=True, slots=True)
class LiquidFull:
    """A vessel that its liquid fills: from which temperature [K], and the pressure at the warm end [Pa]."""

    warming: Warming
    full_at: float
    pressure: float
    start: float

    @property
    def per_kelvin(self) -> float:
        """Pressure rise while the vessel is full. [Pa/K]"""
        return (self.pressure - self.start) / (self.warming.hot - self.full_at)


def hottest(case: Case, body: str) -> Warming | None:
    """Return the process at constant volume that warms a body most highly, None where none does."""
    return max(_warmings(case, body), key=lambda found: found.hot, default=None)


def _warmings(case: Case, body: str) -> Iterator[Warming]:
    for process in case.record.processes:
        if body not in followers(case, process.id, PATH):
            continue
        first, last = (f"states/{s}/{body}" for s in (process.from_state, process.to_state))
        cold, hot = case.value(f"{first}/temperature"), case.value(f"{last}/temperature")
        if cold is None or hot is None or hot - cold <= case.basis.allowances[Allowance.TEMPERATURE]:
            continue
        volume, pressure = case.value(f"{first}/specific_volume"), case.value(f"{first}/pressure")
        yield Warming(process.id, body, process.from_state, process.to_state, cold, hot, volume, pressure)


def liquid_full(case: Case, warming: Warming) -> LiquidFull | None:
    """Return how a warming fills its vessel with liquid; None where vapour is left, or nothing is known.

    A body of constant volume is held against its real fluid, from the stated pressure or from the atmospheric one.
    """
    real = fluid_of(case, warming.body)
    if real is None:
        return None
    if is_incompressible(case, warming.body):
        return _of_model_without_pressure(real, warming)
    if warming.volume is None or real.critical_point is None or warming.cold >= real.critical_point[0]:
        return None
    full = full_at(real, warming.volume)
    pressure = case.value(f"states/{warming.last}/{warming.body}/pressure")
    if full is None or pressure is None or warming.hot <= full:
        return None
    if warming.cold >= full:
        return (
            None
            if warming.pressure is None
            else LiquidFull(warming, warming.cold, pressure, warming.pressure)
        )
    start = real.saturation({"temperature": full})[0].pressure
    return None if start is None else LiquidFull(warming, full, pressure, start)


def _of_model_without_pressure(real: Substance, warming: Warming) -> LiquidFull | None:
    found = blocked_in_pressure(real, warming.cold, warming.hot, warming.pressure)
    return None if found is None else LiquidFull(warming, warming.cold, found[1], found[0])


def fluid_of(case: Case, body: str) -> Substance | None:
    """Return the real fluid that a body is or stands for; None for gases and other models."""
    own = case.plan.substances.get(body)
    if own is not None and own.model == REAL and own.critical_point is not None:
        return own
    return twin(case.record.bodies[body].substance, REAL) if is_incompressible(case, body) else None


def full_at(real: Substance, volume: float) -> float | None:
    """Return the temperature at which a saturated liquid has a specific volume [m³/kg], the highest of several. [K]"""
    if real.critical_point is None or volume >= real.critical_point[2]:
        return None
    try:
        found = real.states({"specific_volume": volume, "quality": 0.0})
    except NotEvaluable:
        return None
    return max((state.temperature for state in found), default=None)


def filled(real: Substance, temperature: float, volume: float) -> float | None:
    """Return which part of a volume [m³/kg] the saturated liquid would fill: m/V to ρ'(T); None above T_c. [1]"""
    try:
        liquid = real.saturation({"temperature": temperature})[0].specific_volume
    except NotEvaluable:
        return None
    return None if liquid is None else liquid / volume


def highest_limit(case: Case, body: str, name: str) -> tuple[str, Quantity] | None:
    """Return the state and the highest upper limit of a property of a body in any state, None without one."""
    return max(_limits(case, body, name), key=lambda found: found[1].value, default=None)


def has_limit(case: Case, state: str, body: str, name: str) -> bool:
    """Say whether a property of a body has an upper limit in a state."""
    return any(found == state for found, _ in _limits(case, body, name))


def _limits(case: Case, body: str, name: str) -> Iterator[tuple[str, Quantity]]:
    for limit in case.record.limits:
        parts = limit.quantity.removeprefix(f"records/{case.record.id}/").split("/")
        if limit.at_most is not None and parts[0] == "states" and parts[2:] == [body, name]:
            yield parts[1], limit.at_most


@dataclass(frozen=True, slots=True)
class VapourSpace:
    """How far a vessel with vapour above its liquid is filled.

    Attributes
    ----------
    cold, hot, limit : float or None
        Part filled with liquid at the cold and the hot end, and at the highest temperature that a limit allows; None
        where there is no such limit, or the fluid is no liquid there.
    allowed : float or None
        That temperature. [K]
    full_at : float
        Temperature at which the vessel is full. [K]
    """

    warming: Warming
    cold: float
    hot: float
    allowed: float | None
    limit: float | None
    full_at: float

    @property
    def full_within_limit(self) -> bool:
        """Whether the vessel is full before the temperature reaches its limit."""
        return self.allowed is not None and self.allowed >= self.full_at


def vapour_space(case: Case, body: str) -> VapourSpace | None:
    """Return how full a vessel with a vapour space is; None where there is none at first, or none at last."""
    warming, real = hottest(case, body), fluid_of(case, body)
    if warming is None or real is None or warming.volume is None or is_incompressible(case, body):
        return None
    full = full_at(real, warming.volume)
    cold, hot = (filled(real, t, warming.volume) for t in (warming.cold, warming.hot))
    if full is None or cold is None or hot is None or max(cold, hot) >= 1.0:
        return None
    bound = highest_limit(case, body, "temperature")
    allowed = None if bound is None or bound[1].value <= warming.hot else bound[1].value
    limit = None if allowed is None else filled(real, allowed, warming.volume)
    return VapourSpace(warming, cold, hot, allowed, limit, full)


def pressure_at(case: Case, body: str, temperature: float, volume: float) -> float | None:
    """Return the pressure of a body's fluid at a temperature [K] and a specific volume [m³/kg]. [Pa]"""
    real = fluid_of(case, body)
    if real is None:
        return None
    try:
        return real.state({"temperature": temperature, "specific_volume": volume}).pressure
    except NotEvaluable:
        return None
