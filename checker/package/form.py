"""Fitting a tree to the models: every misfit a problem at its place, and what can be spared is spared."""

from __future__ import annotations

from collections.abc import Callable, Iterable
from dataclasses import dataclass
from typing import Any, Final, TypeVar

from pydantic import ValidationError
from pydantic_core import ErrorDetails

from checker.package.kinds import KINDS
from checker.package.layout import article, belongs, field_of, keys_of, part_class
from checker.package.nearest import nearest, perhaps, shortened, without_value
from checker.package.notebook import MAX_PROBLEMS, Notebook
from checker.package.parts.base import Part
from checker.problems import Place
from checker.vocabulary import TERMS

P = TypeVar("P", bound=Part)

_SHAPES: Final[tuple[tuple[str, str], ...]] = (
    ("string", "one text"),
    ("dict", "a mapping (`key: value`)"),
    ("model", "a mapping (`key: value`)"),
    ("tuple", "a list ([…] or lines that start with -)"),
    ("union_tag", "a word, a mapping or a list"),
)
_ATTEMPTS: Final = 4


@dataclass(frozen=True, slots=True)
class _Misfit:
    """A problem before it is noted; ``spare`` is the part of the tree that can be left out instead."""

    kind: str
    place: Place
    message: str
    suggestion: str
    at_key: bool
    spare: Place | None


def fitted(
    model: type[P], tree: object, notebook: Notebook, sparable: Callable[[Place], Place | None]
) -> P | None:
    """Return the tree as a model, or None where it cannot be understood; note every misfit.

    Parameters
    ----------
    model : type
        The part of the format.
    tree : object
        As ``plain_tree`` gives it. Parts that are spared are taken out of it.
    notebook : Notebook
        Takes the problems; those that are not spared are fatal.
    sparable : callable
        Maps the place of a misfit to the part that can be left out while the rest is still understood, or None.

    """
    for _ in range(_ATTEMPTS):
        try:
            return model.model_validate(tree)
        except ValidationError as error:
            details = _telling(error.errors(include_url=False))
            misfits = [_misfit(model, tree, detail, sparable) for detail in details[:MAX_PROBLEMS]]
        notebook.untold += max(0, len(details) - MAX_PROBLEMS)
        for misfit in misfits:
            notebook.say(misfit.kind, misfit.place, misfit.message, misfit.suggestion, at_key=misfit.at_key,
                         fatal=misfit.spare is None)  # fmt: skip
        if len(details) > MAX_PROBLEMS or any(misfit.spare is None for misfit in misfits):
            notebook.fatal = True
            return None
        for misfit in misfits:
            _leave_out(tree, misfit.spare or ())
    return None


def _telling(details: list[ErrorDetails]) -> list[ErrorDetails]:
    """Return the errors without those that a list is too short only because its items are wrong."""
    parents = {detail["loc"][:depth] for detail in details for depth in range(len(detail["loc"]))}
    return [detail for detail in details if detail["type"] != "too_short" or detail["loc"] not in parents]


def _misfit(
    model: type[Part], tree: object, detail: ErrorDetails, sparable: Callable[[Place], Place | None]
) -> _Misfit:
    """Return the misfit that a validation error stands for."""
    place = _place(tree, detail["loc"])
    kind, context = detail["type"], detail.get("ctx", {})
    if kind == "extra_forbidden":
        return _unknown_key(model, place, sparable, detail["input"] is None)
    if kind == "missing":
        return _missing(model, place, str(detail["loc"][-1]), sparable)
    at_key = "[key]" in detail["loc"][-1:]
    if kind in KINDS:
        # Keys of a state's bodies are checked as extra fields, which the library reports without a mark.
        at_key = at_key or (kind == "identifier-wrong" and detail["input"] in place[-1:])
        place = (*place, context["key"]) if "key" in context else place
        return _Misfit(kind, place, detail["msg"], context.get("suggestion", ""), at_key, sparable(place))
    if kind == "too_short":
        least = context.get("min_length", 1)
        message = f"`{_name(model, place)}` needs at least {least} {'entry' if least == 1 else 'entries'}."
        return _Misfit("part-missing", place, message, "", False, sparable(place))
    if kind == "too_long":
        message = f"`{_name(model, place)}` has more than {context.get('max_length', 0)} entries."
        return _Misfit("type-wrong", place, message, "Make several records of it.", at_key, sparable(place))
    wanted = next((words for start, words in _SHAPES if kind.startswith(start)), "something else")
    message = f"`{_name(model, place)}` should be {wanted}, and is {_shape_of(detail['input'])}."
    advice = without_value(_name(model, place)) if detail["input"] is None else _meaning(model, place)
    return _Misfit("type-wrong", place, message, advice, at_key, sparable(place))


def _place(tree: object, location: Iterable[int | str]) -> Place:
    """Return the parts of an error's location that exist in the tree."""
    node: Any = tree
    place: list[str | int] = []
    for part in location:
        in_list = isinstance(node, list) and isinstance(part, int) and part < len(node)
        if in_list or (isinstance(node, dict) and part in node):
            node = node[part]
            place.append(part)
    return tuple(place)


def _unknown_key(
    model: type[Part], place: Place, sparable: Callable[[Place], Place | None], no_value: bool
) -> _Misfit:
    """Return the misfit of a key that may not stand where it does.

    Where it was probably meant to be read (a near word, or a name from elsewhere), content is lost; any other
    extra key is reported and left out.
    """
    key = str(place[-1])
    part = part_class(model, place[:-1])
    known = keys_of(part)
    suggestion = perhaps(nearest(key, known)) or _elsewhere(key, part)
    advice = without_value(key) if no_value else suggestion
    message = f"`{shortened(key, 40)}` is not a key of {article(part)}. Its keys are: {', '.join(known)}."
    return _Misfit("name-unknown", place, message, advice, True, sparable(place) if suggestion else place)


def _elsewhere(key: str, part: type[Part]) -> str:
    """Return where a key that is a name of the vocabulary belongs, or an empty text."""
    if "inputs" in part.model_fields and any(key in terms for terms in TERMS.values()):
        return f"Quantities stand under `inputs` or `results`: inputs: {{{key}: …}}."
    return belongs(key)


def _missing(model: type[Part], place: Place, key: str, sparable: Callable[[Place], Place | None]) -> _Misfit:
    """Return the misfit of a required key that is not there."""
    part = part_class(model, place)
    field = field_of(part, key)
    described = (field.description or "") if field else ""
    message = f"`{key}` is missing in {article(part)}."
    return _Misfit("part-missing", place, message, described, False, sparable(place))


def _meaning(model: type[Part], place: Place) -> str:
    """Return the description of the field at a place, or an empty text."""
    if not place or not isinstance(place[-1], str):
        return ""
    field = field_of(part_class(model, place[:-1]), place[-1])
    return (field.description or "") if field else ""


def _name(model: type[Part], place: Place) -> str:
    """Return the nearest key above a place, or what the model is called."""
    return str(next((part for part in reversed(place) if isinstance(part, str)), model.__name__.lower()))


def _shape_of(value: object) -> str:
    """Return in words what stands where something else belongs."""
    if isinstance(value, dict):
        return "a mapping"
    if isinstance(value, list | tuple):
        return "a list"
    return "nothing" if value is None else f"the text `{shortened(value, 40)}`"


def _leave_out(tree: Any, place: Place) -> None:
    """Take a part out of the tree; the other items of a list keep their index."""
    for part in place[:-1]:
        try:
            tree = tree[part]
        except (KeyError, IndexError, TypeError):
            return
    if isinstance(tree, dict):
        tree.pop(place[-1], None)
    elif isinstance(tree, list) and isinstance(place[-1], int):
        tree[place[-1]] = None
