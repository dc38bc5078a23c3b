"""Bodies: substance, model, constants, datum, composition and table."""

from __future__ import annotations

from collections.abc import Mapping

from checker.package.desk import Desk
from checker.package.parts.body import Body as BodyPart
from checker.package.parts.body import Datum as DatumPart
from checker.package.spot import Spot
from checker.problems import Place
from checker.quantity.types import Quantity
from checker.submission import Body, Datum
from checker.vocabulary import TERMS, Level, canonical

_FRACTION = TERMS[Level.BODY]["mass_fraction"]


def read_body(desk: Desk, name: str, part: BodyPart) -> Body:
    """State the quantities of a body, and return the body."""
    place: Place = ("bodies", name)
    desk.take_both(Spot(Level.BODY, f"bodies/{name}", place), part.inputs, part.results)
    return Body(
        id=name,
        substance=part.substance,
        model=part.model,
        place=(*desk.notebook.root, *place),
        datum=None if part.datum is None else _datum(desk, name, part.datum, (*place, "datum")),
        composition=_composition(desk, name, part.composition, (*place, "composition")),
        composition_basis=part.composition_basis,
        property_source=part.property_source,
        table=tuple(_row(desk, name, n, row, (*place, "table", n)) for n, row in enumerate(part.table)),
    )


def _datum(desk: Desk, name: str, part: DatumPart, place: Place) -> Datum | None:
    """Return the datum, or None where one of its quantities cannot be used."""
    values: dict[str, float] = {}
    stated = {key: getattr(part, key) for key in ("temperature", "pressure", "quality")}
    for key, text in stated.items():
        if text is None:
            continue
        read = desk.read(text, TERMS[Level.STATE][key], (*place, key), f"bodies/{name}/datum/{key}")
        if read is None or not read[1]:
            return None
        values[key] = read[0].value
    return Datum(values["temperature"], values.get("pressure"), values.get("quality"), part.zero_names)


def _composition(
    desk: Desk, name: str, fractions: Mapping[str, object] | None, place: Place
) -> Mapping[str, float] | None:
    """Return the fractions that can be read, or None where no composition is stated."""
    if fractions is None:
        return None
    composition = {}
    for substance, text in fractions.items():
        pointer = f"bodies/{name}/composition/{substance}"
        read = desk.read(text, _FRACTION, (*place, substance), pointer)
        if read is not None and read[1]:
            composition[substance] = read[0].value
    return composition


def _row(
    desk: Desk, name: str, number: int, row: Mapping[str, object], place: Place
) -> Mapping[str, Quantity]:
    """Return one row of a table: name → quantity."""
    quantities = {}
    for written, text in row.items():
        key = canonical(Level.ROW, written)
        term = TERMS[Level.ROW].get(key)
        if term is None:
            spot = Spot(Level.ROW, f"bodies/{name}/table/{number}", place)
            desk.unknown(spot, written, text, (*place, written))
        elif text is not None:
            read = desk.read(text, term, (*place, written), f"bodies/{name}/table/{number}/{key}")
            if read is not None and read[1]:
                quantities[key] = read[0]
    return quantities
