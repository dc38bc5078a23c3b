"""One process of one body: its states, its path and the keys of what is known about it."""

from __future__ import annotations

from dataclasses import dataclass

ADIABATIC = ("isentropic", "free expansion", "against constant external pressure", "adiabatic")
GRAVITY = 9.80665


@dataclass(frozen=True)
class Leg:
    """A process ``id`` between two states along a path; ``parameter`` is the key of n or of the outside pressure.

    ``wall`` and ``reservoir`` are keys of temperatures, ``loss`` and ``loss_wall`` of a heat loss that is given,
    ``electrical`` of a heater's energy, ``heat`` of the heat where it is given; ``motion`` says that speeds and
    heights are given. All are keys of inputs, None where there is none.
    """

    id: str
    first: str
    last: str
    path: str
    parameter: str | None = None
    wall: str | None = None
    reservoir: str | None = None
    electrical: str | None = None
    heat: str | None = None
    loss: str | None = None
    loss_wall: str | None = None
    motion: bool = False
    mass: str = "m"
    transfer: str = "wall"
    exergy: bool = True

    def key(self, name: str) -> str:
        """Return the key of a quantity of the process."""
        return f"{self.id}.{name}"
