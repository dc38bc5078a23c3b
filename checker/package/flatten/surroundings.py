"""Surroundings: stated for the package, overridden by a record."""

from __future__ import annotations

from collections.abc import Mapping

from checker.package.desk import Desk
from checker.package.notebook import Notebook
from checker.package.spot import Spot
from checker.problems import Place
from checker.submission import Role, Statement
from checker.vocabulary import Level, canonical

PRESSURE = "surroundings/pressure"


def read_surroundings(
    notebook: Notebook, stated: Mapping[str, object], place: Place
) -> dict[str, Statement | None]:
    """Return temperature and pressure of the surroundings by pointer; None where stated and unreadable."""
    # An atmospheric pressure cannot itself be counted from the atmosphere.
    desk = Desk(notebook, atmosphere=None, work_sign=1)
    desk.take(Spot(Level.SURROUNDINGS, "surroundings", place), Role.INPUT, stated, ())
    read = {s.pointer: s for s in notebook.statements if s.pointer.startswith("surroundings/")}
    notebook.statements.clear()
    names = (f"surroundings/{canonical(Level.SURROUNDINGS, name)}" for name, text in stated.items() if text)
    return {name: read.get(name) for name in names}


def atmosphere_of(surroundings: Mapping[str, Statement | None]) -> float | None:
    """Return the absolute atmospheric pressure [Pa], where it is known."""
    pressure = surroundings.get(PRESSURE)
    return pressure.value if pressure is not None and pressure.usable else None
