"""What is noted while a record, or the header, is read: its problems and its statements."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, field
from typing import Final

from checker.document.nodes import Document, Node, Scalar, child
from checker.package.nearest import shortened
from checker.problems import Place, Problem
from checker.submission import Statement

MAX_PROBLEMS: Final = 100
"""Problems of one record that are told one by one; the rest is counted."""


@dataclass(slots=True)
class Notebook:
    """Collects problems and statements of one record (or, without one, of the header).

    Attributes
    ----------
    document : Document
        For positions inside values.
    record : str or None
        The identifier of the record.
    root : Place
        Where the record stands; the places handed in are relative to it.
    damaged : frozenset of Place
        Values about which the reading of the file already complained.
    """

    document: Document
    record: str | None
    root: Place
    damaged: frozenset[Place] = frozenset()
    problems: list[Problem] = field(default_factory=list)
    statements: list[Statement] = field(default_factory=list)
    untold: int = 0
    fatal: bool = False

    def say(
        self,
        kind: str,
        place: Place,
        message: str,
        suggestion: str | Callable[[], str] = "",
        *,
        at_key: bool = False,
        quantity: str | None = None,
        fatal: bool = False,
        offset: int = 0,
    ) -> None:
        """Note a problem.

        A suggestion that takes a search may be a function: it is called only for problems that are told.
        ``offset`` counts in the text of the value (or key); quotes before it are added here.
        """
        self.fatal = self.fatal or fatal
        whole = (*self.root, *place)
        if whole in self.damaged and not at_key:
            return
        if len(self.problems) >= MAX_PROBLEMS:
            self.untold += 1
            return
        node = self.document.node(whole)
        text = node.text if isinstance(node, Scalar) else None
        self.problems.append(
            Problem(
                kind,
                whole,
                message,
                at_key,
                record=self.record,
                quantity=quantity or (pointer_of(self.document, whole) or None),
                stated=None if text is None else shortened(text),
                suggestion=suggestion if isinstance(suggestion, str) else suggestion(),
                fatal=fatal,
                offset=self._columns(whole, at_key, offset) if offset else 0,
            )
        )

    def _columns(self, place: Place, at_key: bool, offset: int) -> int:
        """Return an offset in a text as columns of the file; none where the file shows other characters."""
        if at_key:
            entry = self.document.entry(place)
            return offset + (entry is not None and not entry.key_plain)
        node = self.document.node(place)
        if not isinstance(node, Scalar):
            return 0
        return offset + (not node.plain) if node.verbatim else 0

    def closed(self) -> tuple[Problem, ...]:
        """Return the problems, with a last one for those that were only counted."""
        if not self.untold:
            return tuple(self.problems)
        last = Problem(
            "type-wrong",
            self.root,
            f"{self.untold} more problems of form, not listed one by one.",
            record=self.record,
            suggestion="Compare the record with the one that `jouletally blank` prints.",
            fatal=self.fatal,
        )
        return (*self.problems, last)


def pointer_of(document: Document, place: Place) -> str:
    """Return the pointer of a place inside a record: identifiers for indexes, and no inputs or results.

    Outside the records it is the place itself.
    """
    if len(place) < 2 or place[0] != "records":
        return "/".join(str(part) for part in place)
    parts: list[str] = []
    node = document.node(place[:2])
    for depth, part in enumerate(place[2:]):
        parts += _parts_of(node, part, depth)
        node = child(node, part)
    return "/".join(parts)


def _parts_of(node: Node | None, part: str | int, depth: int) -> list[str]:
    """Return what one step adds to a pointer."""
    if isinstance(part, int):
        named = child(child(node, part), "id")
        return [named.text if isinstance(named, Scalar) else str(part)]
    return [] if part == "inputs" or (part == "results" and depth) else [part]
