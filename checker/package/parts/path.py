"""The path of a process: a word, a word with parameters, several of them, or one for each body."""

from __future__ import annotations

from typing import Annotated, Final

from pydantic import Discriminator, Field, Tag

from checker.package.parts.base import MAX_PARTS, Identifier, Many, Names, OneQuantity, Part, Quantities, Word
from checker.vocabulary import PATH_KINDS, Level

PathKind = Annotated[str, Word(PATH_KINDS, "a path")]
POINT_NAMES: Final = ("pressure", "volume")


class PathPoint(Part):
    """A point of a line in the p–V diagram."""

    called = "a point of a path"

    pressure: Annotated[object, OneQuantity(Level.PATH, "pressure")] = Field(
        description="Pressure at this point."
    )
    volume: Annotated[object, OneQuantity(Level.PATH, "volume")] = Field(
        description="Volume of the body at this point."
    )


class PathSpec(Part):
    """A path with its parameters."""

    called = "a path with parameters"

    kind: PathKind = Field(description="Which path.")
    exponent: Annotated[object, OneQuantity(Level.PATH, "exponent")] = Field(
        None, description="Exponent of a polytropic path."
    )
    external_pressure: Annotated[object, OneQuantity(Level.PATH, "external_pressure")] = Field(
        None, description="Pressure against which the body works."
    )
    stiffness: Annotated[object, OneQuantity(Level.PATH, "stiffness")] = Field(
        None, description="Stiffness of the spring on the piston."
    )
    piston_area: Annotated[object, OneQuantity(Level.PATH, "piston_area")] = Field(
        None, description="Area of the piston that the spring holds."
    )
    pressure_at_contact: Annotated[object, OneQuantity(Level.PATH, "pressure_at_contact")] = Field(
        None, description="Pressure when the spring is reached."
    )
    volume_at_contact: Annotated[object, OneQuantity(Level.PATH, "volume_at_contact")] = Field(
        None, description="Volume when the spring is reached."
    )
    points: Many[PathPoint] = Field(
        (), max_length=MAX_PARTS, description="Points of the line in the p–V diagram."
    )
    results: Annotated[Quantities, Names("PathResults", Level.PATH, without=POINT_NAMES)] = Field(
        {}, description="Parameters that are claimed, such as the exponent."
    )


PARAMETERS: Final[dict[str, tuple[str, ...]]] = {
    "polytropic": ("exponent",),
    "against constant external pressure": ("external_pressure",),
    "pressure linear in volume": (
        "stiffness",
        "piston_area",
        "pressure_at_contact",
        "volume_at_contact",
        "points",
    ),
}
"""Path kind → its parameters; the other kinds have none."""


def _form(value: object) -> str | None:
    """Return which way of writing a path this is."""
    if isinstance(value, str):
        return "<word>"
    if isinstance(value, list | tuple):
        return "<several>"
    if isinstance(value, dict):
        return (
            "<one>" if "kind" in value or not value.keys().isdisjoint(PathSpec.model_fields) else "<by body>"
        )
    return None


_Word = Annotated[PathKind, Tag("<word>")]
_One = Annotated[PathSpec, Tag("<one>")]
OnePath = Annotated[_Word | _One, Discriminator(_form)]
_Several = Annotated[Many[OnePath], Tag("<several>")]
BodyPath = Annotated[_Word | _One | _Several, Discriminator(_form)]
_ByBody = Annotated[dict[Identifier, BodyPath], Tag("<by body>")]
Path = Annotated[_Word | _One | _Several | _ByBody, Discriminator(_form)]
