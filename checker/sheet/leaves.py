"""The leaves of a sheet: inputs in SI, model factors, links to other records."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass

from checker.outcomes import NotEvaluable
from checker.sheet.datum import Offset
from checker.sheet.keys import given
from checker.sheet.links import leaves_of
from checker.sheet.models import BodyModel, factor_key
from checker.sheet.same import SameQuantity
from checker.sheet.step import Link
from checker.submission import Record, Role


@dataclass(frozen=True, slots=True)
class Leaves:
    """Values of the leaves, the keys that are inputs, and why an input could not be used."""

    values: Mapping[str, float]
    given: frozenset[str]
    stated: frozenset[str]
    unusable: Mapping[str, str]
    links: tuple[Link, ...]


def collect(
    record: Record,
    models: Mapping[str, BodyModel],
    offsets: Mapping[str, Offset | None],
    same: SameQuantity,
) -> Leaves:
    """Return the leaves of a record.

    u, h and s among the inputs are moved to the model's own datum by the body's offset; without a datum they
    are not used, and said so.
    """
    values: dict[str, float] = {}
    unusable: dict[str, str] = {}
    stated: set[str] = set()
    for statement in record.statements:
        key = same.key(statement.pointer)
        if not statement.usable:
            unusable[key] = f"{statement.quantity.text} cannot be used for it"
            continue
        if statement.term.positive and statement.quantity.value <= 0.0 and statement.role is Role.INPUT:
            unusable[key] = f"{statement.quantity.text} is not above zero"
            continue
        stated.add(key)
        if statement.role is not Role.INPUT or given(key) in values:
            continue
        try:
            values[given(key)] = statement.value - datum_shift(key, offsets)
        except NotEvaluable as outcome:
            unusable[key] = outcome.reason
    known_inputs = frozenset(key.removeprefix("given/") for key in values)
    for body in models:
        values[factor_key(body, "density_factor")] = 1.0
        values[factor_key(body, "caloric_factor")] = 1.0
    return Leaves(values, known_inputs, frozenset(stated), unusable, tuple(leaves_of(record)))


def datum_shift(key: str, offsets: Mapping[str, Offset | None]) -> float:
    """Return stated − program value of an absolute u, h or s at this key; 0 for anything else.

    Raises NotEvaluable where the body has no datum.
    """
    parts = key.split("/")
    if parts[0] != "states" or len(parts) != 4:
        return 0.0
    name = parts[3]
    if name not in (
        "specific_internal_energy",
        "specific_enthalpy",
        "specific_entropy",
        "internal_energy",
        "enthalpy",
        "entropy",
    ):
        return 0.0
    offset = offsets.get(parts[2])
    if offset is None:
        raise NotEvaluable(f"{name.replace('_', ' ')} is an input without a datum", "missing")
    shift = offset.entropy if name.endswith("entropy") else offset.energy
    if shift and not name.startswith("specific_"):
        raise NotEvaluable(f"{name.replace('_', ' ')} as an input needs the model's own datum", "missing")
    return shift
