"""JSON Schema of quantities, from the vocabulary: meaning, units and an example for every name."""

from __future__ import annotations

from typing import Any, Final

from checker.package.examples import example_of, units_of
from checker.package.words import PHASE_SYNONYMS, PHASES
from checker.quantity import dimensions as dim
from checker.vocabulary import SYNONYMS, TERMS, Level, Term

SHARED: Final = "x-shared-as"
"""Marks a schema that stands in several places, with the name of its definition."""
UNITS: Final = "x-units"
"""Holds the units of a quantity until its description is final."""


def term_schema(term: Term) -> dict[str, Any]:
    """Return the schema of one quantity: text with a unit, or a plain number where it has none."""
    description = f"{term.meaning[0].upper()}{term.meaning[1:]}."
    if term.text:
        return {"type": "string", "enum": [*PHASES, *PHASE_SYNONYMS], "description": description}
    return {
        "type": ["number", "string"] if term.dimension == dim.NONE else "string",
        "description": description,
        UNITS: units_of(term),
        "examples": [example_of(term)],
    }


def names_schema(level: Level, names: tuple[str, ...], label: str) -> dict[str, Any]:
    """Return the closed schema of an ``inputs`` or ``results`` mapping, symbols included."""
    properties = {name: term_schema(TERMS[level][name]) for name in names}
    for symbol, name in SYNONYMS.get(level, {}).items():
        if name in properties:
            properties[symbol] = {**properties[name], "description": f"Short for {name}."}
    return {SHARED: label, "type": "object", "properties": properties, "additionalProperties": False}


def quantity_schema(level: Level, name: str, words: tuple[str, ...] = ()) -> dict[str, Any]:
    """Return the schema of a field that holds one quantity, or one of a few words in its place."""
    schema = term_schema(TERMS[level][name])
    schema["examples"] = [*schema["examples"], *words]
    return schema
