"""The rows of a stated table of properties, read and checked."""

from __future__ import annotations

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from itertools import pairwise
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.properties import ENERGY, ENTHALPY, ENTROPY, TEMPERATURE, VOLUME

HEAT: Final = "specific_heat"
HEAT_AT_PRESSURE: Final = "specific_heat_at_constant_pressure"
HEAT_AT_VOLUME: Final = "specific_heat_at_constant_volume"
HEATS: Final = (HEAT, HEAT_AT_PRESSURE, HEAT_AT_VOLUME)
DENSITY: Final = "density"
_CALORIC: Final = (*HEATS, ENERGY, ENTHALPY)
_COLUMNS: Final = {TEMPERATURE, *_CALORIC, ENTROPY, VOLUME, DENSITY}
Row = Sequence[tuple[str, float]]


@dataclass(frozen=True, slots=True)
class Columns:
    """A table by columns, in SI, temperatures rising.

    ``caloric`` is the column of the name ``kind``: a specific heat, u or h; entropies and volumes where stated.
    """

    temperatures: tuple[float, ...]
    kind: str
    caloric: tuple[float, ...]
    entropies: tuple[float, ...] | None = None
    volumes: tuple[float, ...] | None = None


def read_columns(substance: str, table: Sequence[Row]) -> Columns:
    """Return the columns of a table.

    Raises
    ------
    NotEvaluable
        Fewer than two rows; a row without temperature or with other columns than the first; not exactly one
        of specific heat, u and h; temperatures, energies or entropies that do not rise; specific heats, volumes or
        temperatures that are not positive.
    """
    try:
        return _columns([dict(row) for row in table])
    except NotEvaluable as outcome:
        raise NotEvaluable(f"the table of {substance[:40]}: {outcome.reason}", outcome.kind) from outcome


def _columns(rows: list[dict[str, float]]) -> Columns:
    if len(rows) < 2:
        count = "no row" if not rows else "one row only"
        raise NotEvaluable(f"there is {count}, and between two a property is interpolated", "missing")
    names = _names(rows)
    kind = next(name for name in _CALORIC if name in names)
    columns = {name: tuple(row[name] for row in rows) for name in names}
    if DENSITY in columns:
        _refuse_unless_positive(columns, (DENSITY,))
        columns[VOLUME] = tuple(1.0 / density for density in columns[DENSITY])
    _refuse_unless_positive(columns, (TEMPERATURE, VOLUME, *HEATS))
    _refuse_unless_rising(columns, (TEMPERATURE, ENERGY, ENTHALPY, ENTROPY))
    return Columns(columns[TEMPERATURE], kind, columns[kind], columns.get(ENTROPY), columns.get(VOLUME))


def _names(rows: list[dict[str, float]]) -> frozenset[str]:
    """Return the names of the columns, the same in every row. Raises NotEvaluable."""
    names = frozenset(rows[0])
    for number, row in enumerate(rows, start=1):
        if frozenset(row) != names:
            raise NotEvaluable(
                f"row {number} gives {_words(row)}, row 1 {_words(rows[0])}; every row needs the same columns",
                "missing",
            )
    if TEMPERATURE not in names:
        raise NotEvaluable("its rows give no temperature", "missing")
    if strange := names - _COLUMNS:
        raise NotEvaluable(f"{_words(strange)} has no use in a table over temperature", "not-supported")
    stated = [name for name in _CALORIC if name in names]
    if len(stated) != 1:
        have = _words(stated) if stated else "none of them"
        raise NotEvaluable(f"it needs one of specific heat, u and h in every row; it has {have}", "missing")
    if {VOLUME, DENSITY} <= names:
        raise NotEvaluable("it gives both the specific volume and the density", "no-solution")
    return names


def _words(names: Sequence[str] | Mapping[str, float] | frozenset[str]) -> str:
    return ", ".join(name.replace("_", " ") for name in sorted(names)) or "nothing"


def _refuse_unless_positive(columns: Mapping[str, Sequence[float]], names: Sequence[str]) -> None:
    for name in names:
        for number, value in enumerate(columns.get(name, ()), start=1):
            if not (math.isfinite(value) and value > 0.0):
                words = name.replace("_", " ")
                raise NotEvaluable(f"the {words} in row {number} is not above zero", "no-solution")


def _refuse_unless_rising(columns: Mapping[str, Sequence[float]], names: Sequence[str]) -> None:
    for name in names:
        for number, (value, following) in enumerate(pairwise(columns.get(name, ())), start=1):
            if not value < following:
                words = name.replace("_", " ")
                raise NotEvaluable(
                    f"the {words} does not rise from row {number} to row {number + 1}", "no-solution"
                )
