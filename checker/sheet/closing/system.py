"""What a block is: its unknown coordinates and masses, its equations, and the states that they touch."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from checker.sheet.closing.charts import Chart
from checker.sheet.closing.world import Equation, Spot
from checker.sheet.keys import body_key, clue, state_key
from checker.sheet.states import SYMBOLS


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
