"""The document tree: every scalar with its text as written, its line and its column."""

from __future__ import annotations

from dataclasses import dataclass

from checker.problems import Place, Problem


@dataclass(frozen=True, slots=True)
class Position:
    """Line and column, both from 1; the column counts code points."""

    line: int
    column: int


@dataclass(frozen=True, slots=True)
class Scalar:
    """A scalar: its text as written (trailing zeros kept). ``plain`` is false for quoted text.

    ``verbatim`` is false where the file shows other characters than the text has, as for escapes and text over
    several lines: then an offset into the text is no column of the file.
    """

    text: str
    position: Position
    plain: bool = True
    null: bool = False
    verbatim: bool = True


@dataclass(frozen=True, slots=True)
class Entry:
    """A key with its value. ``key_plain`` is false for a quoted key."""

    key: str
    key_position: Position
    value: Node
    key_plain: bool = True


@dataclass(frozen=True, slots=True)
class Mapping:
    """A mapping; keys are unique (a repeated key is a problem and its later values are dropped)."""

    entries: tuple[Entry, ...]
    position: Position


@dataclass(frozen=True, slots=True)
class Sequence:
    """A list."""

    items: tuple[Node, ...]
    position: Position


Node = Scalar | Mapping | Sequence


@dataclass(frozen=True, slots=True)
class Document:
    """A file as read: the tree (None where there is none), the problems, and the digest of its bytes."""

    file: str
    sha256: str
    root: Node | None
    problems: tuple[Problem, ...]

    def node(self, place: Place) -> Node | None:
        """Return the node at ``place``, or None."""
        node: Node | None = self.root
        for part in place:
            node = child(node, part)
        return node

    def entry(self, place: Place) -> Entry | None:
        """Return the key at ``place`` with its value, or None."""
        parent = self.node(place[:-1])
        if not isinstance(parent, Mapping) or not place:
            return None
        return next((entry for entry in parent.entries if entry.key == place[-1]), None)

    def position(self, place: Place, at_key: bool = False) -> Position:
        """Return the position of the value (or key) at ``place``; of the nearest parent where missing."""
        node: Node | None = self.root
        found = Position(1, 1) if node is None else node.position
        for depth, part in enumerate(place):
            if isinstance(node, Mapping) and at_key and depth == len(place) - 1:
                return next((e.key_position for e in node.entries if e.key == part), found)
            node = child(node, part)
            if node is None:
                return found
            found = node.position
        return found

    def where(self, problem: Problem) -> Position:
        """Return the line and column of a problem, at the part of the value that is meant."""
        if problem.line is not None and problem.column is not None:
            return Position(problem.line, problem.column)
        start = self.position(problem.place, problem.at_key)
        return Position(start.line, start.column + problem.offset)


def child(node: Node | None, part: str | int) -> Node | None:
    """Return the child of a mapping by key or of a sequence by index, or None."""
    if isinstance(node, Mapping):
        return next((e.value for e in node.entries if e.key == part), None)
    if isinstance(node, Sequence) and isinstance(part, int) and 0 <= part < len(node.items):
        return node.items[part]
    return None


def plain_tree(node: Node | None) -> object:
    """Return the tree as dicts, lists and text; a null is None. Nothing is converted to numbers."""
    if isinstance(node, Mapping):
        return {entry.key: plain_tree(entry.value) for entry in node.entries}
    if isinstance(node, Sequence):
        return [plain_tree(item) for item in node.items]
    if node is None or node.null:
        return None
    return node.text
