"""The handbook table of engineering materials: names, constants with their uncertainty, and what melts.

The values stand in ``materials.txt`` and ``melting.txt``, where they come from in ``sources.txt``. A package that
states constants of its own is calculated with those; the table then only tells whether they can be of this material.
"""

from __future__ import annotations

from functools import lru_cache
from typing import Final, NamedTuple

from checker.substances.names import fold, table_rows

_CELSIUS_ZERO: Final = 273.15
_OPEN: Final = "-"
_LONGEST_NAME: Final = 64


class Material(NamedTuple):
    """A solid or liquid of the table. SI; ``spread`` are expanded relative uncertainties (k = 2).

    Attributes
    ----------
    name, kind : str
        Generic name, and ``solid`` or ``liquid``.
    density : float or None
        [kg/m³]; None where products of this name differ too much.
    specific_heat : float
        [J/(kg·K)], for temperatures from ``temperature_min`` to ``temperature_max`` [K].
    second_temperature, second_heat : float or None
        Another temperature [K] with the specific heat [J/(kg·K)] there, or the mean up to it where so published.
    conductivity : float
        [W/(m·K)], rounded.
    source : str
        In words.
    """

    name: str
    kind: str
    density: float | None
    density_spread: float
    specific_heat: float
    heat_spread: float
    conductivity: float
    second_temperature: float | None
    second_heat: float | None
    temperature_min: float
    temperature_max: float
    source: str


class MeltingMaterial(NamedTuple):
    """A material of the table that melts. SI; ``spread`` are expanded relative uncertainties (k = 2).

    Attributes
    ----------
    melting_temperature : float or None
        [K]; None where it differs with the grade.
    latent_heat : float
        [J/kg]
    heat_of_solid, heat_of_liquid : float
        Mean specific heats below and above [J/(kg·K)], between ``temperature_min`` and ``temperature_max`` [K].
    """

    name: str
    melting_temperature: float | None
    latent_heat: float
    latent_spread: float
    heat_of_solid: float
    solid_spread: float
    heat_of_liquid: float
    liquid_spread: float
    temperature_min: float
    temperature_max: float
    source: str


def _number(cell: str, scale: float = 1.0, offset: float = 0.0) -> float | None:
    return None if cell == _OPEN else float(cell) * scale + offset


def _kelvin(cell: str) -> float | None:
    return _number(cell, 1.0, _CELSIUS_ZERO)


def _tabled(cell: str, scale: float = 1.0, offset: float = 0.0) -> float:
    """Return a number that every row must have."""
    return float(cell) * scale + offset


def _material(cells: list[str], sources: dict[str, str]) -> Material:
    name, kind, density, density_off, heat, heat_off, conductivity, second, there, low, high, source = cells
    return Material(
        name,
        kind,
        _number(density),
        _number(density_off, 0.01) or 0.0,
        _tabled(heat),
        _tabled(heat_off, 0.01),
        _tabled(conductivity),
        _kelvin(second),
        _number(there),
        _tabled(low, 1.0, _CELSIUS_ZERO),
        _tabled(high, 1.0, _CELSIUS_ZERO),
        sources[source],
    )


def _melting(cells: list[str], sources: dict[str, str]) -> MeltingMaterial:
    name, melts, latent, latent_off, solid, solid_off, liquid, liquid_off, low, high, source = cells
    return MeltingMaterial(
        name,
        _kelvin(melts),
        _tabled(latent, 1e3),
        _tabled(latent_off, 0.01),
        _tabled(solid),
        _tabled(solid_off, 0.01),
        _tabled(liquid),
        _tabled(liquid_off, 0.01),
        _tabled(low, 1.0, _CELSIUS_ZERO),
        _tabled(high, 1.0, _CELSIUS_ZERO),
        sources[source],
    )


def _names(name: str, synonyms: str) -> list[str]:
    return [fold(word) for word in (name, *synonyms.split(";")) if word.strip()]


@lru_cache(maxsize=1)
def _sources() -> dict[str, str]:
    return dict(table_rows("sources.txt"))


@lru_cache(maxsize=1)
def _materials() -> dict[str, Material]:
    table: dict[str, Material] = {}
    for *cells, synonyms in table_rows("materials.txt"):
        material = _material(cells, _sources())
        table.update((word, material) for word in _names(material.name, synonyms))
    return table


@lru_cache(maxsize=1)
def _melting_materials() -> dict[str, MeltingMaterial]:
    table: dict[str, MeltingMaterial] = {}
    for *cells, synonyms in table_rows("melting.txt"):
        material = _melting(cells, _sources())
        table.update((word, material) for word in _names(material.name, synonyms))
    return table


def all_materials() -> tuple[Material, ...]:
    """Return every material of the handbook table, in its order."""
    return tuple(dict.fromkeys(_materials().values()))


def all_melting_materials() -> tuple[MeltingMaterial, ...]:
    """Return every material that the table knows to melt, in its order."""
    return tuple(dict.fromkeys(_melting_materials().values()))


def material_of(name: str) -> Material | None:
    """Return the material of a name, or None where the table has none of this name."""
    return _materials().get(fold(name)) if len(name) <= _LONGEST_NAME else None


def melting_material_of(name: str) -> MeltingMaterial | None:
    """Return the melting data of a name, or None where the table has none of this name."""
    return _melting_materials().get(fold(name)) if len(name) <= _LONGEST_NAME else None
