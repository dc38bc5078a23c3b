"""A body of a record: what it is made of, and by which model."""

from __future__ import annotations

from typing import Annotated

from pydantic import Field, WithJsonSchema

from checker.package.parts.base import Many, Names, OneQuantity, Part, Quantities, Text, Word
from checker.package.words import COMPOSITION_BASES, DATUM_NAMES, PROPERTY_SOURCES
from checker.vocabulary import MODELS, SYNONYMS, Level, canonical

MAX_ROWS = 2000
"""Most rows of a table of properties."""

BodyNames = Annotated[Quantities, Names("BodyQuantities", Level.BODY)]
TableRow = Annotated[Quantities, Names("TableRow", Level.ROW)]
Model = Annotated[str, Word(MODELS, "a model")]
_DATUM_SYMBOLS = tuple(s for s, name in SYNONYMS[Level.STATE].items() if name in DATUM_NAMES)
DatumName = Annotated[str, Word((*DATUM_NAMES, *_DATUM_SYMBOLS), "a property with a zero point")]
Basis = Annotated[str, Word(COMPOSITION_BASES, "a basis of fractions")]
PropertySource = Annotated[str, Word(PROPERTY_SOURCES, "a source of properties")]
Fractions = Annotated[
    dict[str, object],
    WithJsonSchema({"type": "object", "additionalProperties": {"type": ["number", "string"]}}),
]


class Datum(Part):
    """The state in which the originator's specific energies or entropies are zero."""

    temperature: Annotated[object, OneQuantity(Level.STATE, "temperature")] = Field(
        description="Temperature of the datum."
    )
    pressure: Annotated[object, OneQuantity(Level.STATE, "pressure")] = Field(
        None, description="Pressure of the datum; or its quality."
    )
    quality: Annotated[object, OneQuantity(Level.STATE, "quality")] = Field(
        None, description="Quality of the datum; or its pressure."
    )
    zero: Many[DatumName] = Field(min_length=1, description="Which properties are zero there.")

    @property
    def zero_names(self) -> tuple[str, ...]:
        """The properties that are zero at the datum, in whole words."""
        return tuple(canonical(Level.STATE, name) for name in self.zero)


class Body(Part):
    """A body: a fixed mass of one substance."""

    title: Text = Field(default="", description="Free text.")
    substance: Text = Field(
        description="A fluid, a material of the handbook table, or any name with stated constants."
    )
    model: Model = Field(description="How the substance is described.")
    inputs: BodyNames = Field({}, description="What the originator started from, constants included.")
    results: BodyNames = Field({}, description="What the originator claims.")
    datum: Datum | None = Field(None, description="Where u, h and s are zero; needed where they are inputs.")
    composition: Fractions | None = Field(None, description="Fractions of a mixture by substance.")
    composition_basis: Basis = Field("mole", description="What the fractions are fractions of.")
    table: Many[TableRow] = Field(
        (), max_length=MAX_ROWS, description="Rows of properties, for the model `tabulated`."
    )
    property_source: PropertySource = Field(
        "reference",
        description="`industrial` takes water from IAPWS-IF97, `reference` from the reference equation.",
    )
