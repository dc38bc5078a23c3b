"""Bodies of materials of the handbook table: what is taken from it, where it holds, what it says of others."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.case import Case
from checker.facts.twins import CONSTANT
from checker.sheet.models import CONSTANTS
from checker.submission import Role, Statement
from checker.substances.handbook import HandbookMaterial
from checker.substances.interface import ValidRange
from checker.substances.materials import Material, MeltingMaterial, material_of, melting_material_of
from checker.substances.melting_body import Melting
from checker.substances.names import knows_fluid
from checker.vocabulary import Allowance

MELTING: Final = "phase change"
LEAST_SPREAD: Final = 0.05
"""A stated specific or latent heat this close to the table's is never asked about: a mean over another span, another
grade, a rounded number (chosen)."""
LEAST_DENSITY_SPREAD: Final = 0.02
MELTING_SPREAD: Final = 3.0
"""[K] So much may the melting temperature of one grade differ from that of another (chosen)."""


@dataclass(frozen=True, slots=True)
class Taken:
    """The constants of a body that come from the handbook table, in words, and where they come from."""

    names: tuple[str, ...]
    material: str
    source: str


def taken_from_table(case: Case, body: str) -> Taken | None:
    """Return what a body has from the handbook table; None where all its constants are stated."""
    own = case.plan.substances.get(body)
    if isinstance(own, HandbookMaterial):
        names = ["specific heat"]
        if not own.density_stated and own.specific_volume is not None:
            names.append("density")
        return Taken(tuple(names), own.material.name, own.material.source)
    if isinstance(own, Melting) and own.material is not None:
        names = [name.replace("_", " ") for name in own.own]
        return Taken(tuple(names), own.material.name, own.material.source)
    return None


def outside_table(case: Case, state: str, body: str) -> ValidRange | None:
    """Return the range of the table's constants where a state lies outside it, beyond the allowance; else None."""
    own, temperature = case.plan.substances.get(body), case.value(f"states/{state}/{body}/temperature")
    if own is None or own.valid_range is None or temperature is None or taken_from_table(case, body) is None:
        return None
    slack, span = case.basis.allowances[Allowance.TEMPERATURE], own.valid_range
    inside = span.temperature_min - slack <= temperature <= span.temperature_max + slack
    return None if inside else span


@dataclass(frozen=True, slots=True)
class TableCheck:
    """A stated constant beside the table's: its value there, and the least and greatest that can be meant. [SI]"""

    statement: Statement
    expected: float
    low: float
    high: float
    material: str


def table_checks(case: Case, body: str) -> Iterator[TableCheck]:
    """Yield the stated constants of a body of a material of the table, each with what the table says of it."""
    model = case.record.bodies[body].model
    known = _melting_values(case, body) if model == MELTING else _constant_values(case, body)
    for name, (expected, low, high, material) in known.items():
        for s in case.record.stated(f"bodies/{body}/{name}", Role.INPUT):
            yield TableCheck(s, expected, low, high, material)


def names_material(case: Case, body: str) -> bool:
    """Say whether a body with stated constants has the name of a material of the table."""
    found = case.record.bodies[body]
    own = case.plan.substances.get(body)
    if own is None or not own.incompressible or found.model not in (CONSTANT, MELTING):
        return False
    row = melting_material_of(found.substance) if found.model == MELTING else material_of(found.substance)
    return row is not None and any(
        case.record.stated(f"bodies/{body}/{name}", Role.INPUT) for name in CONSTANTS if name != "molar_mass"
    )


def temperatures_fit(case: Case, body: str) -> bool:
    """Say whether the table tells anything of a body at the temperatures that it has in the record."""
    found = case.record.bodies[body]
    row: Material | MeltingMaterial | None
    row = melting_material_of(found.substance) if found.model == MELTING else material_of(found.substance)
    values = _temperatures(case, body)
    if row is None or not values:
        return False
    slack = case.basis.allowances[Allowance.TEMPERATURE]
    return row.temperature_min - slack <= min(values) and max(values) <= _hottest(row) + slack


def _hottest(row: Material | MeltingMaterial) -> float:
    second = row.second_temperature if isinstance(row, Material) else None
    return max(row.temperature_max, second or 0.0)


def _temperatures(case: Case, body: str) -> list[float]:
    found = (
        case.value(f"states/{state}/{name}/temperature")
        for state, name in case.record.body_states
        if name == body
    )
    return [value for value in found if value is not None]


_Value = tuple[float, float, float, str]


def _constant_values(case: Case, body: str) -> dict[str, _Value]:
    """Return specific heat and density of the table; a known fluid has an equation for its specific heat."""
    substance = case.record.bodies[body].substance
    row = material_of(substance)
    if row is None:
        return {}
    values: dict[str, _Value] = {}
    if not knows_fluid(substance):
        heat = _with_heat(row, max(_temperatures(case, body), default=0.0))
        values["specific_heat"] = values["specific_heat_at_constant_pressure"] = heat
    if row.density is not None:
        spread = max(row.density_spread, LEAST_DENSITY_SPREAD)
        values["density"] = _around(row.density, spread, row.name)
    return values


def _with_heat(row: Material, hottest: float) -> _Value:
    """Return the specific heat of a material, up to what it is at the hottest temperature of the record."""
    spread = max(row.heat_spread, LEAST_SPREAD)
    expected, low, high, name = _around(row.specific_heat, spread, row.name)
    if row.second_temperature is not None and row.second_heat is not None and hottest > row.temperature_max:
        high = max(high, row.second_heat * (1.0 + spread))
    return expected, low, high, name


def _around(value: float, spread: float, name: str) -> _Value:
    return value, value * (1.0 - spread), value * (1.0 + spread), name


def _melting_values(case: Case, body: str) -> dict[str, _Value]:
    row = melting_material_of(case.record.bodies[body].substance)
    if row is None:
        return {}
    values = {
        "latent_heat": _around(row.latent_heat, max(row.latent_spread, LEAST_SPREAD), row.name),
        "specific_heat_of_solid": _around(row.heat_of_solid, max(row.solid_spread, LEAST_SPREAD), row.name),
        "specific_heat_of_liquid": _around(
            row.heat_of_liquid, max(row.liquid_spread, LEAST_SPREAD), row.name
        ),
    }
    melts = row.melting_temperature
    if melts is not None:
        values["melting_temperature"] = (melts, melts - MELTING_SPREAD, melts + MELTING_SPREAD, row.name)
    return values
