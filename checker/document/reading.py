"""Reading a file into a document: every scalar with its place, every problem with its line and column."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import replace

from checker.document.json_reader import looks_like_json, read_json
from checker.document.nodes import Document, Mapping, Node, Position, Sequence
from checker.document.text import decode, digest_of, unreadable, without_forbidden
from checker.document.tree import GivenUp, TreeBuilder
from checker.document.yaml_reader import read_yaml
from checker.problems import Place, Problem


def read_document(data: bytes, file: str) -> Document:
    """Read a YAML or JSON file; never raise for what it contains.

    Parameters
    ----------
    data : bytes
        The file's content: UTF-8, at most 1 MB.
    file : str
        Its name as the reports print it. A name that ends in ``.yaml``, ``.yml`` or ``.json`` decides the
        format; otherwise a text that starts with a bracket is JSON.

    Returns
    -------
    Document
        ``root`` is a mapping, or None where nothing can be read; then a fatal problem says why.

    """
    file = file.encode(
        "utf-8", "replace"
    ).decode()  # a name that is no text would make the reports unreadable
    digest = digest_of(data)
    text = decode(data)
    if isinstance(text, Problem):
        return Document(file, digest, None, (text,))
    text, characters = without_forbidden(text)
    root, problems = _read(text, file)
    if root is None:
        return Document(file, digest, None, (*characters, *problems))
    return Document(file, digest, root, (*_placed(characters, root), *problems))


def _read(text: str, file: str) -> tuple[Mapping | None, list[Problem]]:
    """Return the tree of a text, and what was wrong with its form."""
    name = file.lower()
    as_json = name.endswith(".json") or (not name.endswith((".yaml", ".yml")) and looks_like_json(text))
    builder = TreeBuilder()
    try:
        broken = (read_json if as_json else read_yaml)(text, builder)
    except GivenUp as given_up:
        broken = unreadable(
            str(given_up), "Compare with the package that `jouletally blank` prints, or divide it."
        )
    if broken is not None:
        return None, [*builder.problems, broken]
    if isinstance(builder.root, Mapping):
        return builder.root, builder.problems
    where = builder.root.position if builder.root is not None else None
    return None, [
        *builder.problems,
        unreadable("The file holds no mapping.", "Write the keys `package` and `records`.", where),
    ]


def _placed(problems: tuple[Problem, ...], root: Mapping) -> Iterator[Problem]:
    """Yield problems that were found in the raw text with the place in the tree that they fall into."""
    if not problems:
        return
    marks = list(_marks(root, ()))
    for problem in problems:
        where = (problem.line or 1, problem.column or 1)
        place: Place = ()
        for position, candidate in marks:
            if (position.line, position.column) > where:
                break
            place = candidate
        yield replace(problem, place=place)


def _marks(node: Node, place: Place) -> Iterator[tuple[Position, Place]]:
    """Yield the position of every key and item with its place, in document order."""
    if isinstance(node, Mapping):
        for entry in node.entries:
            yield entry.key_position, (*place, entry.key)
            yield from _marks(entry.value, (*place, entry.key))
    elif isinstance(node, Sequence):
        for index, item in enumerate(node.items):
            yield item.position, (*place, index)
            yield from _marks(item, (*place, index))
