"""One trial of a closing: the states and masses tried, beside everything that is known."""

from __future__ import annotations

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import body_key, state_key
from checker.sheet.step import Value
from checker.substances.interface import PropertyState

Spot = tuple[str, str]
"""A body in a state: (state, body)."""

PROPERTIES: Final = (
    "temperature",
    "pressure",
    "specific_volume",
    "specific_internal_energy",
    "specific_enthalpy",
    "specific_entropy",
)
"""What equations may use of a state, in the order of PropertyState."""

StateOf = Callable[["World", Spot], PropertyState]


@dataclass(slots=True)
class World:
    """The values of a step's parents by key, with the coordinates and masses of one trial laid over them.

    ``tried`` makes the states that are sought from their coordinates; a state is made once in a trial. ``held`` has
    the key of a property that is known of a state which is not.
    """

    values: Mapping[str, Value]
    held: Mapping[tuple[Spot, str], str] = field(default_factory=dict)
    tried: Mapping[Spot, StateOf] = field(default_factory=dict)
    coordinates: Mapping[tuple[Spot, str], float] = field(default_factory=dict)
    masses: Mapping[str, float] = field(default_factory=dict)
    known: dict[Spot, PropertyState] = field(default_factory=dict)
    _made: dict[Spot, PropertyState] = field(default_factory=dict)

    def trial(
        self,
        coordinates: Mapping[tuple[Spot, str], float],
        masses: Mapping[str, float],
        tried: Mapping[Spot, StateOf],
    ) -> World:
        """Return a new trial on the same known values."""
        return World(self.values, self.held, tried, coordinates, masses, self.known)

    def state(self, spot: Spot) -> PropertyState:
        """Return a body's state: the one tried, or the known one. Raises NotEvaluable."""
        maker = self.tried.get(spot)
        if maker is None:
            return self._known_state(spot)
        if spot not in self._made:
            self._made[spot] = maker(self, spot)
        return self._made[spot]

    def _known_state(self, spot: Spot) -> PropertyState:
        if spot not in self.known:
            t, p, v, u, h, s = (_number(self.values.get(state_key(*spot, name))) for name in PROPERTIES)
            if t is None or u is None or s is None:
                raise NotEvaluable(f"{spot[1]} in state {spot[0]} is not known", "missing")
            self.known[spot] = PropertyState(t, p, v, u, h, s)
        return self.known[spot]

    def property(self, spot: Spot, name: str) -> float:
        """Return one property of a body's state. Raises NotEvaluable where the model has none."""
        if (spot, name) in self.coordinates:
            return self.coordinates[spot, name]
        if (spot, name) in self.held:
            return self.value(self.held[spot, name])
        value: float | None = getattr(self.state(spot), name)
        if value is None:
            raise NotEvaluable(
                f"the model of {spot[1]} states no {name.replace('_', ' ')} in state {spot[0]}", "missing"
            )
        return value

    def mass(self, body: str) -> float:
        """Return a body's mass, tried or known. [kg]"""
        tried = self.masses.get(body)
        return self.value(body_key(body, "mass")) if tried is None else tried

    def value(self, key: str) -> float:
        """Return a known value. Raises NotEvaluable where the model has none."""
        found = _number(self.values.get(key))
        if found is None:
            raise NotEvaluable(f"{key.rsplit('/', 1)[-1].replace('_', ' ')} does not exist here", "missing")
        return found


def _number(value: Value) -> float | None:
    return value if isinstance(value, float) else None


Residual = Callable[[World], tuple[float, float]]
"""What must vanish, and the size of its largest term."""


@dataclass(frozen=True, slots=True, eq=False)
class Equation:
    """One equation of a closing.

    Attributes
    ----------
    name : str
        For messages and the sheet, such as ``energy balance of quench``.
    formula : str
        As an engineer writes it.
    uses : mapping
        State → the properties that it takes from it.
    masses : frozenset of str
        Bodies whose mass it takes.
    parents : tuple of str
        Other keys that must be known.
    residual : callable
        Returns the difference that must vanish and the size of its terms; may raise NotEvaluable.
    equal : frozenset of two states, optional
        Set where the equation only says that two states share a property, that of ``uses``.
    """

    name: str
    formula: str
    uses: Mapping[Spot, frozenset[str]]
    masses: frozenset[str]
    parents: tuple[str, ...]
    residual: Residual
    equal: frozenset[Spot] = frozenset()
