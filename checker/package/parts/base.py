"""What all parts of the format have in common: strict, closed, immutable, and text everywhere."""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Annotated, Any, ClassVar, Final, TypeVar

from pydantic import (
    AfterValidator,
    BaseModel,
    BeforeValidator,
    ConfigDict,
    GetCoreSchemaHandler,
    GetJsonSchemaHandler,
    Strict,
    WithJsonSchema,
    model_validator,
)
from pydantic_core import CoreSchema, PydanticCustomError, core_schema

from checker.package.nearest import nearest, perhaps, shortened
from checker.package.words import TRUTHS
from checker.vocabulary import TERMS, Level

MAX_IDENTIFIER: Final = 60
IDENTIFIER_PATTERN: Final = "^[a-z0-9-]+$"
_IDENTIFIER: Final = re.compile(r"[a-z0-9-]{1,60}")

MAX_PARTS: Final = 200
"""Most bodies, states, processes, transfers, limits and so on of one record; what needs more is several records."""

T = TypeVar("T")


class Part(BaseModel):
    """A mapping of the format. A known key without a value counts as not written.

    ``called`` is what messages call it, with its article.
    """

    called: ClassVar[str] = ""

    model_config = ConfigDict(strict=True, extra="forbid", frozen=True, allow_inf_nan=False, defer_build=True)

    @model_validator(mode="before")
    @classmethod
    def without_nothing(cls, data: object) -> object:
        """Leave out known keys that have no value; nothing at all is a mapping without keys."""
        return stated(cls, data)


def stated(model: type[Part], data: object) -> object:
    """Return a mapping without its known keys that have no value.

    An unknown key stays, to be reported: it is what a comma inside { } makes of the rest of a text.
    """
    if data is None:
        return {}
    if isinstance(data, dict) and None in data.values():
        known = {field.alias or name for name, field in model.model_fields.items()}
        return {key: value for key, value in data.items() if value is not None or key not in known}
    return data


def is_identifier(text: str) -> bool:
    """Whether a text may identify a part of a record."""
    return _IDENTIFIER.fullmatch(text) is not None


def proposed_identifier(text: str) -> str:
    """Return the identifier nearest to a text, or an empty text."""
    return re.sub(r"[^a-z0-9]+", "-", text.casefold()).strip("-")[:MAX_IDENTIFIER].strip("-")


def _identifier(text: str) -> str:
    """Refuse a text that is no identifier."""
    if is_identifier(text):
        return text
    raise PydanticCustomError(
        "identifier-wrong",
        "`{text}` is no identifier: 1 to 60 of the letters a to z, digits and hyphens.",
        {"text": shortened(text, 40), "suggestion": perhaps(filter(None, [proposed_identifier(text)]))},
    )


def _truth(value: object) -> object:
    """Return the truth value that a text writes out."""
    if isinstance(value, str) and value in TRUTHS:
        return TRUTHS[value]
    raise PydanticCustomError(
        "type-wrong", "This is neither true nor false.", {"suggestion": "Write true or false."}
    )


def _mapping(value: object) -> object:
    """Take a key without a value as a mapping without entries."""
    return {} if value is None else value


@dataclass(frozen=True, slots=True)
class Word:
    """Marks a text that is one of a closed list; ``what`` names the list in messages."""

    words: tuple[str, ...]
    what: str

    def check(self, text: Any) -> Any:
        """Refuse a text that is not in the list."""
        if text is None or text in self.words:
            return text
        listed = ", ".join(self.words)
        raise PydanticCustomError(
            "word-unknown",
            "`{text}` is not {what}: {listed}.",
            {
                "text": shortened(text, 40),
                "what": self.what,
                "listed": listed,
                "suggestion": perhaps(nearest(text, self.words)),
            },
        )

    def __get_pydantic_core_schema__(self, source: Any, handler: GetCoreSchemaHandler) -> CoreSchema:
        """Check after the type of the text."""
        return core_schema.no_info_after_validator_function(self.check, handler(source))

    def __get_pydantic_json_schema__(self, _: CoreSchema, __: GetJsonSchemaHandler) -> dict[str, Any]:
        """Return the schema: one of the words."""
        return {"type": "string", "enum": [*self.words]}


@dataclass(frozen=True, slots=True)
class Names:
    """Marks a mapping from names of the vocabulary to quantities: all of a level, some, or all but some.

    ``label`` is the name of its definition in the schema.
    """

    label: str
    level: Level
    only: tuple[str, ...] = ()
    without: tuple[str, ...] = ()

    @property
    def names(self) -> tuple[str, ...]:
        """The whole-word names that may stand there."""
        return self.only or tuple(name for name in TERMS[self.level] if name not in self.without)

    def __get_pydantic_json_schema__(self, _: CoreSchema, __: GetJsonSchemaHandler) -> dict[str, Any]:
        """Return the schema of the mapping, from the vocabulary."""
        from checker.package.quantity_schema import names_schema

        return names_schema(self.level, self.names, self.label)


@dataclass(frozen=True, slots=True)
class OneQuantity:
    """Marks a field that holds one quantity of the vocabulary; ``words`` may stand in its place."""

    level: Level
    name: str
    words: tuple[str, ...] = ()

    def __get_pydantic_json_schema__(self, _: CoreSchema, __: GetJsonSchemaHandler) -> dict[str, Any]:
        """Return the schema of the quantity, from the vocabulary."""
        from checker.package.quantity_schema import quantity_schema

        return quantity_schema(self.level, self.name, self.words)


Identifier = Annotated[
    str,
    AfterValidator(_identifier),
    WithJsonSchema({"type": "string", "pattern": IDENTIFIER_PATTERN, "maxLength": MAX_IDENTIFIER}),
]
Text = Annotated[str, WithJsonSchema({"type": ["string", "number"]})]
Flag = Annotated[
    bool, BeforeValidator(_truth), WithJsonSchema({"enum": [True, False, "true", "false", "yes", "no"]})
]
Quantities = Annotated[dict[str, object], BeforeValidator(_mapping)]
"""Names with the texts of quantities; which names, and what the texts say, is decided in flattening."""
Many = Annotated[tuple[T, ...], Strict(False)]
"""A list of the document; kept as a tuple."""
