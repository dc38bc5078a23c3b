"""Where the unknowns of a closing are sought: a first guess for each, and the span in which it can lie."""

from __future__ import annotations

import statistics
from collections.abc import Iterable, Iterator, Mapping, Sequence
from typing import TYPE_CHECKING, Final

from checker.outcomes import NotEvaluable
from checker.sheet.closing.charts import ENERGY, ENTHALPY, PRESSURE, TEMPERATURE, VOLUME, melts
from checker.sheet.closing.world import Spot, World
from checker.sheet.endstates import enthalpy_range
from checker.substances.interface import PropertyState, Substance

if TYPE_CHECKING:
    from checker.sheet.closing.system import System

MELTED: Final = "melted_fraction"
ROOM: Final = 300.0
"""[K], where nothing at all is known."""
DECADES: Final = 1e4
"""How far volumes and masses are sought to both sides of the guess, as a factor."""


def guess(
    name: str,
    spots: Sequence[Spot],
    body: str,
    system: System,
    world: World,
    models: Mapping[Spot, Substance],
) -> float:
    """Return a first value of an unknown, from known states of the same bodies where there are any. [SI]"""
    if not spots:
        return _mass(body, system, world)
    near = [state for spot in spots if (state := _near(spot, system, world)) is not None]
    if name == TEMPERATURE:
        low, high = temperatures(models[spot] for spot in spots)
        return min(max(_warmth(near, world), low), high)
    if name == VOLUME:
        return _volume(spots[0], near, world, models)
    own: float | None = getattr(near[0], name) if near else None
    if own is None:
        own = caloric(name, spots[0], _warmth((), world), system, world, models)
    return 0.0 if own is None else own


def warmth(spots: Sequence[Spot], system: System, world: World) -> float:
    """Return the mean temperature of what is known of some bodies. [K]"""
    return _warmth([state for spot in spots if (state := _near(spot, system, world)) is not None], world)


def _near(spot: Spot, system: System, world: World) -> PropertyState | None:
    if spot not in system.near:
        return None
    try:
        return world.state(system.near[spot])
    except NotEvaluable:
        return None


def _warmth(near: Sequence[PropertyState], world: World) -> float:
    known = [state.temperature for state in near] or [state.temperature for state in world.known.values()]
    return statistics.fmean(known) if known else ROOM


def _volume(
    spot: Spot, near: Sequence[PropertyState], world: World, models: Mapping[Spot, Substance]
) -> float:
    if near and near[0].specific_volume is not None:
        return near[0].specific_volume
    model = models[spot]
    try:
        known = {TEMPERATURE: _warmth(near, world), PRESSURE: 1e5}
        return model.state(known).specific_volume or 1.0
    except NotEvaluable:
        return model.critical_point[2] if model.critical_point else 1.0


def caloric(
    name: str, spot: Spot, temperature: float, system: System, world: World, models: Mapping[Spot, Substance]
) -> float | None:
    """Return u or h of an unknown state at a temperature, or None where the model has no such state. [J/kg]"""
    known = {TEMPERATURE: temperature}
    fixed = system.charts[spot].fixed
    if fixed is not None:
        known[fixed.name] = world.value(fixed.key)
    try:
        value: float | None = getattr(models[spot].state(known), name)
    except NotEvaluable:
        return None
    return value


def half_melted(models: Mapping[Spot, Substance]) -> Iterator[tuple[Spot, PropertyState]]:
    """Yield the unknown states of bodies that melt, each with itself half melted."""
    for spot, model in models.items():
        if melts(model):
            yield spot, model.state({MELTED: 0.5})


def _mass(body: str, system: System, world: World) -> float:
    """Return a mass of the size of the volumes that the equations hold, or one kilogram."""
    for equation in system.equations:
        volumes = [key for key in equation.parents if key.endswith("/volume")]
        spot = next((s for s in equation.uses if s[1] == body), None)
        if not volumes or spot is None:
            continue
        try:
            near = world.state(system.near.get(spot, spot))
            return world.value(volumes[0]) / (near.specific_volume or 1.0)
        except (NotEvaluable, KeyError):
            continue
    return 1.0


def temperatures(models: Iterable[Substance]) -> tuple[float, float]:
    """Return the temperatures in which all of several models hold. [K]"""
    low, high = 1.0, 2e4
    for model in models:
        if model.valid_range is not None:
            low = max(low, model.valid_range.temperature_min)
            high = min(high, model.valid_range.temperature_max)
    if low >= high:
        raise NotEvaluable("the models of the bodies hold at no common temperature", "outside-range")
    return low, high


def span(
    name: str,
    spots: Sequence[Spot],
    centre: float,
    models: Mapping[Spot, Substance],
    world: World,
    system: System,
) -> tuple[float, float]:
    """Return the span in which an unknown is sought. [SI]"""
    if name == TEMPERATURE:
        return temperatures(models[spot] for spot in spots)
    if name not in (ENERGY, ENTHALPY):
        return centre / DECADES, centre * DECADES
    model, fixed = models[spots[0]], system.charts[spots[0]].fixed
    if name == ENTHALPY and fixed is not None:
        low, high = enthalpy_range(model, world.value(fixed.key))
        return min(low, high), max(low, high)
    coldest, hottest = temperatures((model,))
    pressure = {} if fixed is None else {fixed.name: world.value(fixed.key)}
    ends = [
        model.state({TEMPERATURE: t, **pressure}).specific_internal_energy
        for t in (max(coldest, 20.0), min(hottest, 5e3))
    ]
    return min(ends), max(ends)
