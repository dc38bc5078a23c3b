"""What is uncertain in a record: inputs that carry ±, inputs taken as rounded, property models, linked records."""

from __future__ import annotations

import math
from collections import defaultdict
from collections.abc import Iterable, Iterator, Mapping
from dataclasses import dataclass, field, replace
from typing import Final

from checker.basis import Basis
from checker.budget import Kind
from checker.sheet.keys import given
from checker.sheet.models import factor_key
from checker.sheet.step import Sheet
from checker.submission import Record, Role, Statement
from checker.substances.interface import Substance

PUBLISHED: Final = 2.0
"""Coverage factor of the published uncertainties of models."""
MODELS: Final = (Kind.DENSITY, Kind.CALORIC)


@dataclass(frozen=True, slots=True)
class Source:
    """One uncertain quantity: what moves together moves by one source.

    Attributes
    ----------
    id : str
        The same for the same quantity, in whatever record.
    name : str
        The pointer of an input, or the bodies that share a model.
    shifts : mapping
        Key of a leaf → how far one standard uncertainty moves it.
    rectangular : bool
        Every value within a half-width is as likely as another; else normal.
    """

    id: str
    kind: Kind
    name: str
    shifts: Mapping[str, float] = field(hash=False)
    rectangular: bool = False
    basis: str = ""

    @property
    def reach(self) -> float:
        """How many standard uncertainties it is moved: to the end of a rectangle, to two of a normal one."""
        return math.sqrt(3.0) if self.rectangular else PUBLISHED


def sources_of(
    record: Record, sheet: Sheet, substances: Mapping[str, Substance], basis: Basis
) -> tuple[Source, ...]:
    """Return the uncertain quantities of a record, in a fixed order."""
    return (*_models(substances), *_inputs(record, sheet, basis))


def _models(substances: Mapping[str, Substance]) -> Iterator[Source]:
    """Yield density and caloric uncertainty of each model: bodies with the same equation err together."""
    alike: dict[tuple[object, ...], list[str]] = defaultdict(list)
    for body, found in substances.items():
        alike[found.name, found.model, found.equation, found.uncertainty].append(body)
    for identity, bodies in alike.items():
        published = substances[bodies[0]].uncertainty
        sizes = ("density_factor", published.density), ("caloric_factor", published.caloric)
        for kind, (factor, size) in zip(MODELS, sizes, strict=True):
            if size > 0.0:
                shifts = {factor_key(body, factor): size / PUBLISHED for body in bodies}
                identifier = "/".join((kind, *(str(part) for part in identity[:3])))
                yield Source(identifier, kind, ", ".join(bodies), shifts, basis=published.source)


def _inputs(record: Record, sheet: Sheet, basis: Basis) -> Iterator[Source]:
    for key, statement in input_statements(record, sheet).items():
        standard = standard_uncertainty(statement, basis)
        if standard > 0.0:
            marked = statement.quantity.plus_minus is not None
            yield Source(
                "/".join(str(part) for part in statement.place),
                Kind.PLUS_MINUS if marked else Kind.ROUNDED,
                statement.pointer,
                {given(key): standard},
                rectangular=not (marked and basis.plus_minus == "standard uncertainty"),
            )


def input_statements(record: Record, sheet: Sheet) -> dict[str, Statement]:
    """Return the inputs that the sheet starts from: each quantity once, by a statement with ± where there is one."""
    found: dict[str, Statement] = {}
    for statement in record.statements:
        if statement.role is Role.INPUT and statement.usable:
            key = sheet.key(statement.pointer)
            known = found.setdefault(key, statement)
            if known.quantity.plus_minus is None and statement.quantity.plus_minus is not None:
                found[key] = statement
    return found


def standard_uncertainty(statement: Statement, basis: Basis) -> float:
    """Return the standard uncertainty of an input by its ±, or by its digits where the basis takes it as rounded."""
    plus_minus = statement.quantity.plus_minus
    if plus_minus is not None:
        return plus_minus if basis.plus_minus == "standard uncertainty" else plus_minus / math.sqrt(3.0)
    return statement.quantity.half_width / math.sqrt(3.0) if basis.input_digits == "rounded" else 0.0


def with_links(
    own: Iterable[Source], linked: Iterable[tuple[Source, Mapping[str, float]]]
) -> tuple[Source, ...]:
    """Return sources with the leaves that they move through linked records.

    Parameters
    ----------
    linked : iterable of (Source, mapping)
        A source of another record, and how far one standard uncertainty of it moves leaves of this one. The same
        equation of state is one source in both.
    """
    found = {source.id: source for source in own}
    for source, shifts in linked:
        if shifts:
            mine = found.get(source.id)
            before = mine.shifts if mine is not None else {}
            found[source.id] = replace(mine or source, shifts={**before, **shifts})
    return tuple(found.values())


def shifted(base: Mapping[str, object], moves: Iterable[tuple[Source, float]]) -> dict[str, float]:
    """Return the leaves under some sources that are off by so many standard uncertainties."""
    found: dict[str, float] = {}
    for source, times in moves:
        for key, size in source.shifts.items():
            start = found.get(key, base.get(key))
            if isinstance(start, float):
                found[key] = start + times * size
    return found
