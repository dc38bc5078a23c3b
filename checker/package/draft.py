"""Drafts of records: named, fitted to the format, and not yet read."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass, replace

from checker.document.nodes import Document
from checker.package.commas import rejoined
from checker.package.form import fitted
from checker.package.notebook import Notebook, pointer_of
from checker.package.parts.base import is_identifier
from checker.package.parts.record import Record as RecordPart
from checker.problems import Place, Problem

_SPARABLE = frozenset({"title", "basis", "claim", "purpose"})
"""Keys without which the rest of a record says the same."""


@dataclass(frozen=True, slots=True)
class Draft:
    """A record on its way: its name, its notebook, and its parts where the form could be understood."""

    name: str
    notebook: Notebook
    part: RecordPart | None


def record_names(records: Iterable[object]) -> list[str]:
    """Return a name for every record: its identifier, or its number where it has none of its own."""
    names: list[str] = []
    for number, record in enumerate(records, start=1):
        given = record.get("id") if isinstance(record, dict) else None
        usable = isinstance(given, str) and is_identifier(given) and given not in names
        names.append(str(given) if usable else f"record {number}")
    return names


def sparable(place: Place) -> Place | None:
    """Return what of a record can be left out because of a misfit; None where the record is lost."""
    if place and place[-1] in _SPARABLE:
        return place
    if place and place[0] in ("sources", "limits", "assumptions"):
        return place[:2]
    return None


def draft(document: Document, index: int, name: str, tree: object, problems: tuple[Problem, ...]) -> Draft:
    """Return the draft of one record.

    ``problems`` are those of the file's form inside it; where one of them lost content, the parts are not looked
    at, since what is missing is not the originator's omission.
    """
    root: Place = ("records", index)
    notebook = Notebook(document, name, root, frozenset(p.place for p in problems if not p.at_key))
    notebook.problems.extend(
        replace(p, record=name, quantity=p.quantity or pointer_of(document, p.place) or None)
        for p in problems
    )
    if any(problem.fatal for problem in problems):
        notebook.fatal = True
        return Draft(name, notebook, None)
    part = fitted(RecordPart, rejoined(tree, notebook), notebook, sparable)
    if part is not None and part.id != name:
        notebook.say(
            "identifier-repeated",
            ("id",),
            f"A record before this one is `{part.id}` as well.",
            "Give each record its own identifier.",
            fatal=True,
        )
    return Draft(name, notebook, part)
