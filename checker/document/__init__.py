"""Files as document trees: YAML and JSON read by rules of our own, with the place of every scalar."""

from checker.document.nodes import (
    Document,
    Entry,
    Mapping,
    Node,
    Position,
    Scalar,
    Sequence,
    child,
    plain_tree,
)
from checker.document.reading import read_document
from checker.document.text import content_of

__all__ = [
    "Document",
    "Entry",
    "Mapping",
    "Node",
    "Position",
    "Scalar",
    "Sequence",
    "child",
    "content_of",
    "plain_tree",
    "read_document",
]
