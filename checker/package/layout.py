"""The layout of the format: which model stands at a place, and where a name belongs."""

from __future__ import annotations

import typing
from typing import Final

from pydantic.fields import FieldInfo

from checker.package.parts.base import Part
from checker.package.parts.state import BodyState, State
from checker.problems import Place
from checker.vocabulary import SYNONYMS, TERMS, Level

LEVEL_WORDS: Final[dict[Level, str]] = {
    Level.BODY: "a body",
    Level.STATE: "a body in a state",
    Level.ROW: "a row of a table",
    Level.PROCESS: "a process",
    Level.TRANSFER: "a heat or work transfer",
    Level.PATH: "a path",
    Level.CYCLE: "the totals of a cycle",
    Level.SEQUENCE: "a sequence",
    Level.ASSUMPTION: "an assumption",
    Level.SURROUNDINGS: "the surroundings",
}


def part_class(model: type[Part], place: Place) -> type[Part]:
    """Return the model of the mapping at a place."""
    part, skip = model, False
    for key in place:
        if skip or isinstance(key, int):
            skip = False
            continue
        field = field_of(part, key)
        if field is None:
            part = BodyState if part is State else part
            continue
        inner = _part_in(field.annotation)
        part, skip = inner or part, inner is not None and _is_dict(field.annotation)
    return part


def _part_in(annotation: object) -> type[Part] | None:
    """Return the model inside an annotation such as ``dict[Identifier, Body]``."""
    if isinstance(annotation, type) and issubclass(annotation, Part):
        return annotation
    return next(filter(None, map(_part_in, typing.get_args(annotation))), None)


def _is_dict(annotation: object) -> bool:
    """Whether a field is a mapping by identifier."""
    return typing.get_origin(annotation) is dict


def keys_of(part: type[Part]) -> tuple[str, ...]:
    """Return the keys of a part as they are written."""
    return tuple(field.alias or name for name, field in part.model_fields.items())


def field_of(part: type[Part], key: str) -> FieldInfo | None:
    """Return the field that is written with a key, or None."""
    return next((field for name, field in part.model_fields.items() if key == (field.alias or name)), None)


def article(part: type[Part]) -> str:
    """Return what a part is called, with its article."""
    if part.called:
        return part.called
    words = "".join(f" {c.lower()}" if c.isupper() else c for c in part.__name__).strip()
    return f"{'an' if words[0] in 'aeiou' else 'a'} {words}"


def belongs(name: str, but: Level | None = None) -> str:
    """Return the sentence that tells to which parts a name belongs, or an empty text."""
    levels = [
        words
        for level, words in LEVEL_WORDS.items()
        if level is not but and (name in TERMS[level] or name in SYNONYMS.get(level, {}))
    ]
    return f"`{name}` belongs to {' or '.join(levels)}." if levels else ""
