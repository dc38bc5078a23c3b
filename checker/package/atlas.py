"""Every pointer that exists in a record, with the vocabulary's term behind it."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from typing import Any, Final

from checker.package.parts.path import POINT_NAMES
from checker.package.parts.record import Record
from checker.vocabulary import SYNONYMS, TERMS, Level, Term

Branch = Mapping[str, Any]
"""Nested mappings that end in terms."""

_PATH: Final = {name: term for name, term in TERMS[Level.PATH].items() if name not in POINT_NAMES}
_POINT: Final = {name: TERMS[Level.PATH][name] for name in POINT_NAMES}
_SYMBOLS: Final = {symbol: name for names in SYNONYMS.values() for symbol, name in names.items()}


@dataclass(frozen=True, slots=True)
class Found:
    """What a pointer points at: a term, or None for a part that holds quantities; ``pointer`` is canonical."""

    pointer: str
    term: Term | None


@dataclass(frozen=True, slots=True)
class Lost:
    """Where a pointer leaves what exists: the offset of the part, the part, and what exists there."""

    offset: int
    part: str
    known: tuple[str, ...]


def atlas_of(record: Record) -> Branch:
    """Return the atlas of a record."""
    bodies = tuple(record.bodies)
    return {
        "bodies": dict.fromkeys(bodies, TERMS[Level.BODY]),
        # A body that a state does not mention is there all the same, with nothing stated about it.
        "states": {state: dict.fromkeys(bodies, TERMS[Level.STATE]) for state in record.states},
        "processes": {process.id: _of_process(process, bodies) for process in record.processes},
        "sequences": {sequence.id: TERMS[Level.SEQUENCE] for sequence in record.sequences},
        "assumptions": {a.id: TERMS[Level.ASSUMPTION] for a in record.assumptions if a is not None},
        "limits": {limit.id: {} for limit in record.limits if limit is not None},
        "results": TERMS[Level.CYCLE],
        "surroundings": TERMS[Level.SURROUNDINGS],
    }


def _of_process(process: Any, bodies: tuple[str, ...]) -> Branch:
    """Return the branch of one process."""
    path = {**_PATH, "points": _Points()}
    return {
        **TERMS[Level.PROCESS],
        "heat_transfers": {item.id: TERMS[Level.TRANSFER] for item in process.heat_transfers or ()},
        "work_transfers": {item.id: TERMS[Level.TRANSFER] for item in process.work_transfers or ()},
        "path": {**path, **dict.fromkeys(bodies, path)},
        "bodies": {body: {**TERMS[Level.PROCESS], "path": path} for body in bodies},
        "total_volume": {"volume": TERMS[Level.BODY]["volume"]},
    }


class _Points(dict[str, Branch]):
    """The points of a path: any number, counted from 0."""

    def __contains__(self, key: object) -> bool:
        return isinstance(key, str) and key.isascii() and key.isdigit() and len(key) < 4

    def __getitem__(self, key: str) -> Branch:
        return _POINT


def find(atlas: Branch, pointer: str) -> Found | Lost:
    """Return what a pointer points at, or where it goes astray."""
    node: Any = atlas
    offset = 0
    for part in pointer.split("/"):
        if isinstance(node, Term) or part not in node:
            known = () if isinstance(node, Term) else tuple(node)
            return Lost(offset, part, (_SYMBOLS[part],) if _SYMBOLS.get(part) in known else known)
        node = node[part]
        offset += len(part) + 1
    term = node if isinstance(node, Term) else None
    return Found("/".join(_canonical(pointer.split("/"), tuple(atlas["bodies"]))), term)


def _canonical(parts: list[str], bodies: tuple[str, ...]) -> Iterator[str]:
    """Yield a pointer's parts as the review writes them: a path parameter has one pointer, however it is written.

    In a record of one body it belongs to the process, in others to the body's share.
    """
    if parts[0] != "processes" or "path" not in parts[2:]:
        yield from parts
        return
    at = parts.index("path", 2)
    body = parts[at - 1] if at == 4 else None
    rest = parts[at + 1 :]
    if rest and rest[0] in bodies:
        body, rest = rest[0], rest[1:]
    yield from parts[:2]
    if body is not None and len(bodies) > 1:
        yield from ("bodies", body)
    yield from ("path", *rest)
