"""A block of equations as a step: its unknown coordinates and masses are sought until every residual vanishes."""

from __future__ import annotations

import math
from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.closing.charts import ENERGY, ENTHALPY, TEMPERATURE, VOLUME, Chart
from checker.sheet.closing.guesses import caloric, guess, span, warmth
from checker.sheet.closing.world import PROPERTIES, Equation, Spot, World
from checker.sheet.keys import body_key, clue, state_key
from checker.sheet.roots import roots_on, system_roots
from checker.sheet.states import SYMBOLS
from checker.sheet.step import SEARCH_COST, Step, Value
from checker.substances.interface import PropertyState, Substance

LINEAR: Final = {ENERGY: 1e5, ENTHALPY: 1e5}
"""Unknowns that may change their sign, with the size in which they are counted [J/kg]; all others are logarithms."""
SCAN: Final = 64
"""Steps of the scan for the roots of one unknown."""
FACTORS: Final = ((1.0, 1.0), (1.15, 1.0), (0.87, 1.0), (1.0, 3.0), (1.0, 0.33), (1.3, 10.0), (0.75, 0.1))
"""Where a system is started beside the guess: at these factors on temperatures and on volumes and masses."""


@dataclass(frozen=True, slots=True)
class Unknown:
    """A coordinate of one or several states that share it, or the mass of a body (``spots`` empty)."""

    name: str
    spots: tuple[Spot, ...] = ()
    body: str = ""

    @property
    def words(self) -> str:
        """The unknown in words, such as ``T of steel and water in end``."""
        if not self.spots:
            return f"m of {self.body}"
        bodies = " and ".join(body for _, body in self.spots)
        return f"{SYMBOLS[self.name]} of {bodies} in {self.spots[0][0]}"

    @property
    def outputs(self) -> tuple[str, ...]:
        """Keys that finding it yields."""
        if not self.spots:
            return (body_key(self.body, "mass"),)
        return tuple(clue(state_key(*spot, self.name), "closing") for spot in self.spots)


@dataclass(frozen=True, slots=True)
class System:
    """What a block needs: its unknowns, its equations, and the charts and leaders of the states that they touch.

    ``leaders`` maps a state that takes its temperature from another to that other; ``near`` maps a state to a known
    one of the same body to start from. ``held`` has the key of what is known of an unknown state, so that an equation
    that needs no more of it does not wait for the rest.
    """

    unknowns: tuple[Unknown, ...]
    equations: tuple[Equation, ...]
    charts: Mapping[Spot, Chart]
    leaders: Mapping[Spot, Spot]
    near: Mapping[Spot, Spot]
    known: frozenset[str]
    held: Mapping[tuple[Spot, str], str]


def block_step(system: System) -> Step:
    """Return the step that solves a block."""
    parents = tuple(dict.fromkeys(_parents(system)))

    def solve(*values: Value) -> tuple[Value, ...]:
        return _solved(system, World(dict(zip(parents, values, strict=True)), system.held))

    words = "; ".join(unknown.words for unknown in system.unknowns)
    names = dict.fromkeys(f"{equation.formula} ({equation.name})" for equation in system.equations)
    return Step(
        f"Closing for {words}",
        tuple(key for unknown in system.unknowns for key in unknown.outputs),
        parents,
        solve,
        "; ".join(names),
        takes_none=True,
        cost=SEARCH_COST,
    )


def _parents(system: System) -> Iterator[str]:
    tried = set(system.charts)
    sought = {unknown.body for unknown in system.unknowns if not unknown.spots}
    for equation in system.equations:
        yield from equation.parents
        for spot, names in equation.uses.items():
            if spot in tried:
                continue
            if all((spot, name) in system.held for name in names):
                yield from (system.held[spot, name] for name in sorted(names))
            else:
                yield from (state_key(*spot, name) for name in PROPERTIES)
        yield from (body_key(body, "mass") for body in sorted(equation.masses - sought))
    for spot, chart in system.charts.items():
        if chart.fixed is not None:
            yield chart.fixed.key
        yield from chart.plan.model.parents
        if spot in system.near:
            yield from (state_key(*system.near[spot], name) for name in PROPERTIES)


def _solved(system: System, world: World) -> tuple[Value, ...]:
    """Return the outputs of a block. Raises NotEvaluable."""
    models = {
        spot: chart.plan.model.substance([world.value(key) for key in chart.plan.model.parents])
        for spot, chart in system.charts.items()
    }
    search = _Search(system, world, models)
    found = search.roots()
    if len(found) > 1:
        found = search.of_stated_phase(found)
    if not found:
        raise NotEvaluable(f"no {_words(system)} satisfy {_named(system)}")
    if len(found) > 1:
        roots = tuple(search.described(root) for root in found)
        raise NotEvaluable(f"{len(found)} solutions satisfy {_named(system)}", "several-roots", roots)
    values = search.values(found[0])
    return tuple(
        value for unknown, value in zip(system.unknowns, values, strict=True) for _ in unknown.outputs
    )


def _words(system: System) -> str:
    return ", ".join(unknown.words for unknown in system.unknowns)


def _named(system: System) -> str:
    return ", ".join(dict.fromkeys(equation.name for equation in system.equations))


class _Search:
    """One solution of a block; lives as long as its step is evaluated."""

    def __init__(self, system: System, world: World, models: Mapping[Spot, Substance]) -> None:
        self.system, self.world, self.models = system, world, models
        self.makers = dict.fromkeys(system.charts, self._made)
        self.centre = tuple(guess(u.name, u.spots, u.body, system, world, models) for u in system.unknowns)
        self.sizes: list[float] | None = None

    def values(self, x: Sequence[float]) -> tuple[float, ...]:
        """Return the unknowns in SI from their scaled form."""
        return tuple(
            centre + LINEAR[u.name] * part if u.name in LINEAR else centre * math.exp(part)
            for u, centre, part in zip(self.system.unknowns, self.centre, x, strict=True)
        )

    def trial(self, x: Sequence[float]) -> World:
        """Return the trial of scaled unknowns."""
        coordinates: dict[tuple[Spot, str], float] = {}
        masses: dict[str, float] = {}
        for unknown, value in zip(self.system.unknowns, self.values(x), strict=True):
            if not unknown.spots:
                masses[unknown.body] = value
            coordinates.update(((spot, unknown.name), value) for spot in unknown.spots)
        return self.world.trial(coordinates, masses, self.makers)

    def residuals(self, x: Sequence[float]) -> list[float]:
        """Return the residuals relative to the largest terms of their equations."""
        trial = self.trial(x)
        found = []
        for equation in self.system.equations:
            difference, size = equation.residual(trial)
            found.append(difference / size if size > 0.0 else difference)
        return found

    def roots(self) -> list[tuple[float, ...]]:
        """Return every root found."""
        bounds = [span(u.name, u.spots, c, self.models, self.world, self.system)
                  for u, c in zip(self.system.unknowns, self.centre, strict=True)]  # fmt: skip
        scaled = [self._scaled(i, ends) for i, ends in enumerate(bounds)]
        if len(scaled) == 1:
            low, high = scaled[0]
            grid = sorted(
                {*(low + (high - low) * i / SCAN for i in range(SCAN + 1)), min(max(0.0, low), high)}
            )
            return [(root,) for root in roots_on(lambda x: self.residuals((x,))[0], grid)]
        lower, upper = (tuple(ends[side] for ends in scaled) for side in (0, 1))
        return system_roots(self.residuals, self._starts(), lower, upper)

    def _scaled(self, index: int, ends: tuple[float, float]) -> tuple[float, float]:
        name, centre = self.system.unknowns[index].name, self.centre[index]
        if name in LINEAR:
            return (ends[0] - centre) / LINEAR[name], (ends[1] - centre) / LINEAR[name]
        return math.log(ends[0] / centre), math.log(ends[1] / centre)

    def _starts(self) -> Iterator[tuple[float, ...]]:
        """Yield the guess, then common temperatures of all bodies: u and h tell none where a body boils or melts."""
        yield (0.0,) * len(self.centre)
        level = warmth([spot for u in self.system.unknowns for spot in u.spots], self.system, self.world)
        for warm, wide in FACTORS:
            yield tuple(
                self._at_level(index, level * warm) if u.name in (TEMPERATURE, *LINEAR) else math.log(wide)
                for index, u in enumerate(self.system.unknowns)
            )

    def _at_level(self, index: int, temperature: float) -> float:
        """Return a scaled T, u or h at a temperature; the guess where there is no such state."""
        unknown, centre = self.system.unknowns[index], self.centre[index]
        if unknown.name not in LINEAR:
            return math.log(temperature / centre)
        at = caloric(unknown.name, unknown.spots[0], temperature, self.system, self.world, self.models)
        return 0.0 if at is None else (at - centre) / LINEAR[unknown.name]

    def _made(self, trial: World, spot: Spot) -> PropertyState:
        """Return the state of a chart from its fixed clue and its coordinates."""
        chart, known = self.system.charts[spot], {}
        if chart.fixed is not None:
            known[chart.fixed.name] = trial.value(chart.fixed.key)
        for name in chart.free:
            leader = self.system.leaders.get(spot) if name == TEMPERATURE else None
            known[name] = trial.coordinates[spot, name] if leader is None else trial.state(leader).temperature
        return self.models[spot].state(known, chart.plan.phase)

    def of_stated_phase(self, found: list[tuple[float, ...]]) -> list[tuple[float, ...]]:
        """Return the roots in which every state has the phase among its inputs; all where that leaves none."""

        def fits(x: tuple[float, ...]) -> bool:
            trial = self.trial(x)
            return all(
                chart.plan.phase is None or trial.state(spot).phase is chart.plan.phase
                for spot, chart in self.system.charts.items()
            )

        return [x for x in found if fits(x)] or found

    def described(self, x: tuple[float, ...]) -> str:
        """Return a root in words."""
        named = zip(self.system.unknowns, self.values(x), strict=True)
        return ", ".join(f"{unknown.words} = {value:.6g} {_UNITS[unknown.name]}" for unknown, value in named)


_UNITS: Final = {TEMPERATURE: "K", VOLUME: "m³/kg", ENERGY: "J/kg", ENTHALPY: "J/kg", "mass": "kg"}
