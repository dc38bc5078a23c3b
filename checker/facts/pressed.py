"""A liquid of constant volume as a real one: under a constant pressure that keeps it liquid, with its mass kept."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace
from typing import Final

from checker.case import Case
from checker.facts.twins import ATMOSPHERE, REAL, saturation_pressure, twin
from checker.quantity import parse_quantity
from checker.submission import PathSpec, Process, Record, Role, Statement
from checker.term import Level
from checker.vocabulary import term_of

VOLUMES: Final = ("volume", "specific_volume", "density")
ABOVE_BOILING: Final = 1.1
"""Pressure of the real liquid as a multiple of its vapour pressure at the warmest (chosen)."""


def under_pressure(case: Case, record: Record, body: str) -> Record:
    """Return a record in which a body keeps its pressure in every process, and its mass whatever its density.

    Where no pressure is stated it is the atmospheric one, or just above the vapour pressure at the warmest.
    """
    kept = [s for s in record.statements if not _of_volume(s, body)]
    states = [state for state, name in record.body_states if name == body]
    if not any(case.given(f"states/{state}/{body}/pressure") for state in states):
        pressure = _liquid_pressure(case, body, states)
        kept += [_input(f"states/{s}/{body}/pressure", Level.STATE, pressure, "Pa", record) for s in states]
    mass = case.value(f"bodies/{body}/mass")
    if mass is not None and case.given(f"bodies/{body}/mass") is None:
        kept.append(_input(f"bodies/{body}/mass", Level.BODY, mass, "kg", record))
    processes = tuple(_at_constant_pressure(process, body) for process in record.processes)
    return replace(record, statements=tuple(kept), processes=processes)


def _of_volume(s: Statement, body: str) -> bool:
    parts = s.pointer.split("/")
    own = parts[:2] == ["bodies", body] or (parts[0] == "states" and parts[2:3] == [body])
    return s.role is Role.INPUT and own and parts[-1] in VOLUMES


def _liquid_pressure(case: Case, body: str, states: list[str]) -> float:
    real = twin(case.record.bodies[body].substance, REAL)
    temperatures = list(_temperatures(case, body, states))
    vapour = saturation_pressure(real, max(temperatures)) if real is not None and temperatures else None
    return max(ATMOSPHERE, ABOVE_BOILING * (vapour or 0.0))


def _temperatures(case: Case, body: str, states: list[str]) -> Iterator[float]:
    for state in states:
        value = case.value(f"states/{state}/{body}/temperature")
        if value is not None:
            yield value


def _input(pointer: str, level: Level, value: float, unit: str, record: Record) -> Statement:
    term = term_of(level, pointer.rsplit("/", 1)[-1])
    assert term is not None
    quantity = parse_quantity(f"{value:.15g} {unit}", expected=term.dimension, scale=term.scale)
    return Statement(pointer, Role.INPUT, term, quantity, 1, record.place)


def _at_constant_pressure(process: Process, body: str) -> Process:
    kept = tuple(path for path in process.paths.get(body, ()) if path.kind == "adiabatic")
    pressed = PathSpec("constant pressure", process.place)
    return replace(process, paths={**process.paths, body: (*kept, pressed)})
