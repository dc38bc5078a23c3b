"""What a body stores along a path that its energy alone describes: u at constant volume, h at constant pressure."""

from __future__ import annotations

from collections.abc import Callable, Sequence
from dataclasses import dataclass

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, state_key
from checker.sheet.models import BodyModel
from checker.sheet.step import SEARCH_COST


@dataclass(frozen=True, slots=True)
class Stored:
    """A body in one state of its path.

    Attributes
    ----------
    mass, temperature, energy : float
        [kg], [K], and per mass [J/kg].
    heat_capacity : callable
        Returns the heat capacity of a body for which it is constant. [J/K]
    temperature_of, energy_at : callable
        Temperature [K] at an energy per mass [J/kg], and the reverse.
    """

    mass: float
    temperature: float
    energy: float
    heat_capacity: Callable[[], float]
    temperature_of: Callable[[float], float]
    energy_at: Callable[[float], float]


@dataclass(frozen=True, slots=True)
class Storage:
    """How a body stores energy: ``energy`` names its energy per mass, ``held`` the property that stays, if any does."""

    model: BodyModel
    energy: str
    held: str = ""

    @property
    def is_constant(self) -> bool:
        """Whether the heat capacity is constant."""
        substance = self.model.at_nominal()
        return substance is not None and substance.model == "constant specific heat"

    @property
    def cost(self) -> int:
        """What following the body along its path costs, about, in property states."""
        return 1 if self.is_constant else SEARCH_COST

    def energy_in(self, state: str) -> str:
        """Return the key of the energy per mass in a state."""
        return state_key(state, self.model.body.id, self.energy)

    def temperature_in(self, state: str) -> str:
        """Return the key of the temperature in a state."""
        return state_key(state, self.model.body.id, "temperature")

    def parents(self, state: str) -> tuple[str, ...]:
        """Return the keys from which ``read`` takes the body in a state."""
        body = self.model.body.id
        held = (state_key(state, body, self.held),) if self.held else ()
        return (
            body_key(body, "mass"),
            self.temperature_in(state),
            self.energy_in(state),
            *held,
            *self.model.parents,
        )

    def read(self, values: Sequence[float]) -> Stored:
        """Return the body from the values of its parents. Raises NotEvaluable."""
        mass, temperature, energy, *rest = values
        if mass <= 0.0:
            raise NotEvaluable("the mass must be positive")
        fixed = {self.held: rest.pop(0)} if self.held else {}
        substance = self.model.substance(rest)

        def energy_at(wanted: float) -> float:
            found: float | None = getattr(substance.state({**fixed, "temperature": wanted}), self.energy)
            if found is None:
                raise NotEvaluable("the model states no density", "missing")
            return found

        return Stored(
            mass,
            temperature,
            energy,
            lambda: mass * (energy_at(temperature + 1.0) - energy_at(temperature)),
            lambda wanted: substance.state({**fixed, self.energy: wanted}).temperature,
            energy_at,
        )
