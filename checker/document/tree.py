"""Building the document tree from a stream of brackets, keys and scalars, whatever the format.

The builder keeps its own stack, so that hostile nesting costs a counter and not a call; what it refuses
(repeated keys, too deep nesting, aliases) it leaves out of the tree and reports, and it goes on.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import Final

from checker.document.nodes import Entry, Mapping, Node, Position, Scalar, Sequence
from checker.document.text import FORBIDDEN, REPLACEMENT, forbidden
from checker.problems import Place, Problem

MAX_DEPTH: Final = 12
"""Levels of mappings and lists. The record format needs ten: root, records, record, processes, process,
path, body, several paths, points, point."""

MAX_NODES: Final = 100_000
"""Keys and values in one file."""

MAX_PROBLEMS: Final = 500
"""Repeated keys, aliases and the like in one file."""


class GivenUp(Exception):  # noqa: N818 - ends the walk over a hostile file
    """The file has more keys and values, or more faults, than any package. The argument says which."""


@dataclass(slots=True)
class _Frame:
    """A mapping or list that is still open."""

    position: Position
    entries: list[Entry] | None
    items: list[Node] = field(default_factory=list)
    keys: dict[str, Position] = field(default_factory=dict)
    key: str | None = None
    key_position: Position | None = None
    key_plain: bool = True
    drop: bool = False

    @property
    def wants_key(self) -> bool:
        """Whether the next scalar is a key."""
        return self.entries is not None and self.key is None

    @property
    def part(self) -> str | int:
        """The key or index of the value that comes next."""
        return len(self.items) if self.key is None else self.key


class TreeBuilder:
    """Collects what a format's parser reports, in document order, into a tree and problems."""

    def __init__(self) -> None:
        self.root: Node | None = None
        self.problems: list[Problem] = []
        self._stack: list[_Frame] = []
        self._skipped = 0
        self._count = 0

    @property
    def place(self) -> Place:
        """Where the next value will stand; where a key comes next, the mapping itself."""
        return tuple(frame.part for frame in self._stack if not frame.wants_key)

    def begin(self, position: Position, mapping: bool) -> None:
        """Open a mapping or a list."""
        self._counted()
        if self._skipped:
            self._skipped += 1
        elif self._stack and self._stack[-1].wants_key:
            self._report(
                "syntax-broken",
                "A key is one text, not a mapping or a list.",
                position,
                "Quote a text that starts with { or [.",
                lost=True,
            )
            self._skipped = 1
        elif len(self._stack) >= MAX_DEPTH:
            self._report(
                "nesting-too-deep",
                f"More than {MAX_DEPTH} levels of mappings and lists.",
                position,
                "Compare with the record format: `jouletally blank` prints it.",
                lost=True,
            )
            self._skipped = 1
        else:
            self._stack.append(_Frame(position, [] if mapping else None))

    def end(self) -> None:
        """Close the innermost mapping or list."""
        if self._skipped:
            self._skipped -= 1
            if not self._skipped:
                self._deliver(None)
            return
        frame = self._stack.pop()
        if frame.entries is None:
            self._deliver(Sequence(tuple(frame.items), frame.position))
        else:
            self._deliver(Mapping(tuple(frame.entries), frame.position))

    def scalar(self, text: str, position: Position, plain: bool, null: bool, verbatim: bool = True) -> None:
        """Take a key or a value."""
        self._counted()
        if self._skipped:
            return
        if match := FORBIDDEN.search(text):
            # Escapes such as \u202e bring them in behind the check of the raw text.
            self._add(forbidden(match.group(), self.place, position))
            text = FORBIDDEN.sub(REPLACEMENT, text)
        if self._stack and self._stack[-1].wants_key:
            self._key(self._stack[-1], text, position, plain)
        else:
            self._deliver(Scalar(text, position, plain, null, verbatim))

    def refuse(self, message: str, position: Position, suggestion: str, lost: bool) -> None:
        """Report an alias, an anchor or a tag at the next value."""
        if not self._skipped:
            self._report("alias-used", message, position, suggestion, lost)

    def not_a_number(self, text: str, position: Position) -> None:
        """Report a NaN or an infinity where the next value stands."""
        if not self._skipped:
            self._report(
                "syntax-broken",
                f"{text} is no JSON value and no quantity.",
                position,
                "Write a number with its unit, or leave the key out.",
                lost=False,
            )

    def leave_out(self) -> None:
        """Take note of a key or value that was refused."""
        self._counted()
        if not self._skipped:
            self._deliver(None)

    def _counted(self) -> None:
        """Count a key or value; end the walk over a file with too many."""
        self._count += 1
        if self._count > MAX_NODES:
            raise GivenUp(f"The file has more than {MAX_NODES} keys and values.")

    def _key(self, frame: _Frame, text: str, position: Position, plain: bool) -> None:
        """Take a key; what stands under a repeated key or a merge key is left out."""
        frame.key, frame.key_position, frame.key_plain, frame.drop = text, position, plain, False
        if text == "<<" and plain:
            self._report(
                "alias-used",
                "The merge key << copies values from elsewhere.",
                position,
                "Write the values out where they belong.",
                lost=True,
            )
            frame.drop = True
        elif text in frame.keys:
            self._report(
                "key-repeated",
                f"The key `{text[:60]}` is already on line {frame.keys[text].line}; only that one was read.",
                position,
                "Keep one of the two.",
                lost=False,
                at_key=True,
            )
            frame.drop = True

    def _deliver(self, node: Node | None) -> None:
        """Hand a finished value (None: one left out) to what encloses it."""
        if not self._stack:
            self.root = node
            return
        frame = self._stack[-1]
        if frame.entries is None:
            # An item left out keeps its index, so that the places of the others stay true.
            frame.items.append(node or Scalar("", frame.position, null=True))
        elif frame.key is None or frame.key_position is None:
            frame.key, frame.key_position, frame.drop = "", frame.position, True
        else:
            if node is not None and not frame.drop:
                frame.entries.append(Entry(frame.key, frame.key_position, node, frame.key_plain))
                frame.keys[frame.key] = frame.key_position
            frame.key = frame.key_position = None

    def _report(
        self, kind: str, message: str, position: Position, suggestion: str, lost: bool, at_key: bool = False
    ) -> None:
        """Add a problem; ``lost`` says that content is missing from the tree because of it."""
        self._add(
            Problem(
                kind,
                self.place,
                message,
                at_key,
                position.line,
                position.column,
                suggestion=suggestion,
                fatal=lost,
            )
        )

    def _add(self, problem: Problem) -> None:
        """Keep a problem; end the walk over a file with too many."""
        if len(self.problems) >= MAX_PROBLEMS:
            raise GivenUp(f"The file has more than {MAX_PROBLEMS} repeated keys, aliases and the like.")
        self.problems.append(problem)
