"""The search of a block: scaled unknowns, trials of them, and the residuals that must vanish."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from typing import Final

from checker.sheet.closing.charts import ENERGY, ENTHALPY, TEMPERATURE, VOLUME, Chart
from checker.sheet.closing.guesses import caloric, guess, half_melted, span, temperatures, warmth
from checker.sheet.closing.newton import Matrix, Settled, settled
from checker.sheet.closing.system import System
from checker.sheet.closing.world import Spot, World
from checker.sheet.roots import VERIFIED, roots_on, system_roots
from checker.substances.interface import PropertyState

LINEAR: Final = {ENERGY: 1e5, ENTHALPY: 1e5}
"""Unknowns that may change their sign, with the size in which they are counted [J/kg]; all others are logarithms."""
SCAN: Final = 64
"""Steps of the scan for the roots of one unknown."""
FACTORS: Final = ((1.0, 1.0), (1.15, 1.0), (0.87, 1.0), (1.0, 3.0), (1.0, 0.33), (1.3, 10.0), (0.75, 0.1))
"""Where a system is started beside the guess: at these factors on temperatures and on volumes and masses."""
UNITS: Final = {TEMPERATURE: "K", VOLUME: "m³/kg", ENERGY: "J/kg", ENTHALPY: "J/kg", "mass": "kg"}


class Search:
    """One solution of a block; lives as long as its step is evaluated.

    Scaled unknowns count from ``centre``: a solution found before, or guesses.
    """

    def __init__(self, system: System, world: World, centre: tuple[float, ...] = ()) -> None:
        self.system, self.world = system, world
        self.models = {
            spot: chart.plan.model.substance([world.value(key) for key in chart.plan.model.parents])
            for spot, chart in system.charts.items()
        }
        self.makers = dict.fromkeys(system.charts, self._made)
        self.centre = centre or tuple(
            guess(u.name, u.spots, u.body, system, world, self.models) for u in system.unknowns
        )

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
        """Yield the guess, then common temperatures of all bodies: u and h tell none where a body boils or melts.

        In the end the temperatures of melting themselves: a body that melts takes or gives heat at no other.
        """
        yield (0.0,) * len(self.centre)
        level = warmth([spot for u in self.system.unknowns for spot in u.spots], self.system, self.world)
        for warm, wide in FACTORS:
            yield tuple(
                self._at_level(index, level * warm) if u.name in (TEMPERATURE, *LINEAR) else math.log(wide)
                for index, u in enumerate(self.system.unknowns)
            )
        for melting, half in half_melted(self.models):
            yield tuple(
                (half.specific_internal_energy - self.centre[index]) / LINEAR[ENERGY]
                if melting in u.spots
                else self._at_level(index, half.temperature)
                for index, u in enumerate(self.system.unknowns)
            )

    def _at_level(self, index: int, temperature: float) -> float:
        """Return a scaled T, u or h at a temperature; the guess where there is no such state."""
        unknown, centre = self.system.unknowns[index], self.centre[index]
        if unknown.name == TEMPERATURE:
            return math.log(temperature / centre)
        if unknown.name not in LINEAR:
            return 0.0
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
        return [x for x in found if self._fits(x)] or found

    def _fits(self, x: tuple[float, ...]) -> bool:
        trial = self.trial(x)
        return all(
            chart.plan.phase is None or trial.state(spot).phase is chart.plan.phase
            for spot, chart in self._whole().items()
        )

    def _whole(self) -> dict[Spot, Chart]:
        """Return the charts all of whose coordinates are sought here; the rest of another comes from a later block."""
        sought = {(spot, u.name) for u in self.system.unknowns for spot in u.spots}
        leaders, charts = self.system.leaders, self.system.charts

        def behind(spot: Spot) -> Iterator[tuple[Spot, str]]:
            for name in charts[spot].free:
                leader = leaders.get(spot) if name == TEMPERATURE else None
                yield from ((spot, name),) if leader is None else behind(leader)

        return {spot: chart for spot, chart in charts.items() if sought.issuperset(behind(spot))}

    def next_to_centre(self, inverse: Matrix) -> Settled | None:
        """Return the root close to the centre, if there is one that is as good as one found from all starts."""
        found = settled(self.residuals, (0.0,) * len(self.centre), inverse)
        return found if found is not None and self._holds(found.root) else None

    def polished(self, root: tuple[float, ...]) -> Settled | None:
        """Return a root to the last digits; None where its surroundings are too rough to go on from it."""
        found = settled(self.residuals, root)
        return found if found is not None and self._holds(found.root) else None

    def _holds(self, x: tuple[float, ...]) -> bool:
        """Say whether a root is verified, within the range of the models, and of the phases among the inputs."""
        if max(map(abs, self.residuals(x))) > VERIFIED:
            return False
        trial = self.trial(x)
        for spot in self._whole():
            low, high = temperatures([self.models[spot]])
            if not low <= trial.state(spot).temperature <= high:
                return False
        return self._fits(x)

    def described(self, x: tuple[float, ...]) -> str:
        """Return a root in words."""
        named = zip(self.system.unknowns, self.values(x), strict=True)
        return ", ".join(f"{unknown.words} = {value:.6g} {UNITS[unknown.name]}" for unknown, value in named)
