"""YAML by its events: the text of every scalar as written, and nothing constructed from it."""

from __future__ import annotations

from typing import Final

import yaml

from checker.document.nodes import Position
from checker.document.tree import TreeBuilder
from checker.document.yaml_errors import explain
from checker.problems import Problem

_LOADER: Final = getattr(yaml, "CSafeLoader", yaml.SafeLoader)
_WITH_TAG: Final = (yaml.ScalarEvent, yaml.CollectionStartEvent)
_NULLS: Final = frozenset({"", "~", "null", "Null", "NULL"})
_ALIAS_ADVICE: Final = "Write the value out; quote a text that starts with & * or !."


def read_yaml(text: str, builder: TreeBuilder) -> Problem | None:
    """Feed a YAML text to the builder; return the problem that ended reading, if any.

    Raises GivenUp.
    """
    loader = _LOADER(text)
    try:
        return _walk(loader, builder)
    except yaml.YAMLError as error:
        return explain(error, text)
    finally:
        loader.dispose()


def _walk(loader: yaml.SafeLoader, builder: TreeBuilder) -> Problem | None:
    """Read one document to its end."""
    documents = 0
    while True:
        event = loader.get_event()  # type: ignore[no-untyped-call]  # no types for it
        if isinstance(event, yaml.NodeEvent):
            _node(event, builder)
        elif isinstance(event, yaml.CollectionEndEvent):
            builder.end()
        elif isinstance(event, yaml.DocumentStartEvent):
            documents += 1
            if documents > 1:
                return _second_document(_position(event))
        elif isinstance(event, yaml.StreamEndEvent):
            return None


def _node(event: yaml.NodeEvent, builder: TreeBuilder) -> None:
    """Hand one node event on."""
    position = _position(event)
    if isinstance(event, yaml.AliasEvent):
        builder.refuse(
            f"The alias *{event.anchor} stands for a value elsewhere.", position, _ALIAS_ADVICE, lost=True
        )
        builder.leave_out()
        return
    if event.anchor is not None:
        builder.refuse(
            f"The anchor &{event.anchor} names a value for copying.", position, _ALIAS_ADVICE, lost=False
        )
    if isinstance(event, _WITH_TAG) and event.tag is not None:
        builder.refuse(
            f"The tag {event.tag[:60]} asks for a type; every value is text here.",
            position,
            _ALIAS_ADVICE,
            lost=False,
        )
    if isinstance(event, yaml.ScalarEvent):
        plain = not event.style
        builder.scalar(event.value, position, plain, plain and event.value in _NULLS, _verbatim(event))
    else:
        builder.begin(position, isinstance(event, yaml.MappingStartEvent))


def _verbatim(event: yaml.ScalarEvent) -> bool:
    """Whether the text stands in the file character by character, on one line."""
    start, end = event.start_mark, event.end_mark
    quotes = 2 if event.style else 0
    if start is None or end is None or start.line != end.line:
        return False
    return bool(end.index - start.index == len(event.value) + quotes)


def _position(event: yaml.Event) -> Position:
    """Return where an event starts, from 1."""
    mark = event.start_mark
    return Position(1, 1) if mark is None else Position(mark.line + 1, mark.column + 1)


def _second_document(position: Position) -> Problem:
    """Return the problem of a file that goes on after its document."""
    return Problem(
        "syntax-broken",
        (),
        "A second document starts here; a package is one document.",
        line=position.line,
        column=position.column,
        fatal=True,
        suggestion="Put all records under one key `records`, or write one file per package.",
    )
