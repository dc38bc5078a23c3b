"""Sequences and cycle totals, assumptions, limits and sources."""

from __future__ import annotations

from collections.abc import Callable

from checker.package.assumptions import known_assumption
from checker.package.atlas import Found, Lost
from checker.package.desk import Desk
from checker.package.flatten.references import refer, unique
from checker.package.nearest import nearest, perhaps, shortened
from checker.package.parts.record import Limit as LimitPart
from checker.package.parts.record import Record as RecordPart
from checker.package.spot import Spot
from checker.problems import Place
from checker.quantity.types import Quantity
from checker.submission import Assumption, Limit, Role, SequenceOfProcesses
from checker.vocabulary import Level

Finder = Callable[[str], Found | Lost]
"""Looks a pointer up in the record, or across records."""


def read_sequences(desk: Desk, record: RecordPart) -> tuple[SequenceOfProcesses, ...]:
    """State the quantities of all sequences, and return the sequences."""
    known = [process.id for process in record.processes]
    unique(
        desk.notebook, "sequence", [(s.id, ("sequences", n, "id")) for n, s in enumerate(record.sequences)]
    )
    found = []
    for n, part in enumerate(record.sequences):
        place: Place = ("sequences", n)
        for index, process in enumerate(part.processes):
            refer(desk.notebook, "process", process, known, (*place, "processes", index))
        spot = Spot(Level.SEQUENCE, f"sequences/{part.id}", place, duration=desk.duration(part.inputs))
        desk.take_both(spot, part.inputs, part.results)
        found.append(SequenceOfProcesses(part.id, part.processes, (*desk.notebook.root, *place)))
    return tuple(found)


def read_totals(desk: Desk, record: RecordPart) -> None:
    """State the totals of a cycle."""
    desk.take_both(Spot(Level.CYCLE, "results", ()), record.inputs, record.results)


def read_assumptions(desk: Desk, record: RecordPart) -> tuple[Assumption, ...]:
    """State what the assumptions need, and return the assumptions."""
    parts = [(n, part) for n, part in enumerate(record.assumptions) if part is not None]
    unique(desk.notebook, "assumption", [(part.id, ("assumptions", n, "id")) for n, part in parts])
    found = []
    for n, part in parts:
        place: Place = ("assumptions", n)
        spot = Spot(Level.ASSUMPTION, f"assumptions/{part.id}", place)
        desk.take(spot, Role.INPUT, part.inputs, ("inputs",))
        known = known_assumption(part.text)
        word = None if known is None else known.text
        found.append(Assumption(part.id, part.text, (*desk.notebook.root, *place), word))
    return tuple(found)


def read_limits(desk: Desk, record: RecordPart, find: Finder) -> tuple[Limit, ...]:
    """Return the limits that can be held against a quantity."""
    parts = [(n, part) for n, part in enumerate(record.limits) if part is not None]
    unique(desk.notebook, "limit", [(part.id, ("limits", n, "id")) for n, part in parts])
    limits = (_limit(desk, part, ("limits", n), find) for n, part in parts)
    return tuple(limit for limit in limits if limit is not None)


def _limit(desk: Desk, part: LimitPart, place: Place, find: Finder) -> Limit | None:
    """Return a limit, or None where its quantity does not exist or neither of its values can be read."""
    found = find(part.quantity)
    if isinstance(found, Lost):
        note_lost(desk, part.quantity, found, (*place, "quantity"))
        return None
    if found.term is None or found.term.text:
        message = f"`{shortened(part.quantity)}` is not a quantity that can be held against a limit."
        desk.notebook.say("reference-unknown", (*place, "quantity"), message,
                          "Add the name of the quantity, such as …/pressure.")  # fmt: skip
        return None
    values: dict[str, Quantity] = {}
    stated = {key: getattr(part, key) for key in ("at_most", "at_least")}
    for key, text in stated.items():
        read = None if text is None else desk.read(text, found.term, (*place, key), f"limits/{part.id}/{key}")
        if read is not None and read[1]:
            values[key] = read[0]
    if all(text is None for text in stated.values()):
        message = f"The limit `{part.id}` has neither `at_most` nor `at_least`."
        desk.notebook.say("part-missing", place, message, "State the limit, with its unit.")
    if not values:
        return None
    return Limit(part.id, found.pointer, (*desk.notebook.root, *place), values.get("at_most"),
                 values.get("at_least"), part.claim, part.basis)  # fmt: skip


def read_sources(desk: Desk, record: RecordPart, find: Finder) -> dict[str, str]:
    """Return the sources by pointer; a pointer to nothing is a problem."""
    sources = {}
    for pointer, text in record.sources.items():
        found = find(pointer)
        if isinstance(found, Lost):
            note_lost(desk, pointer, found, ("sources", pointer), at_key=True)
        else:
            sources[found.pointer] = text
    return sources


def note_lost(desk: Desk, pointer: str, lost: Lost, place: Place, at_key: bool = False) -> None:
    """Note a pointer that leads nowhere, at the part where it goes astray."""
    desk.notebook.say(
        "reference-unknown",
        place,
        f"`{shortened(pointer)}` points at nothing: there is no `{shortened(lost.part, 40)}` here.",
        lambda: _instead(lost),
        at_key=at_key,
        offset=lost.offset,
    )


def _instead(lost: Lost) -> str:
    """Return what a pointer could have meant where it goes astray."""
    words = nearest(lost.part, lost.known) or (lost.known if len(lost.known) == 1 else ())
    some = ", ".join(lost.known[:12])
    return perhaps(words) or (f"Known here: {some}." if some else "The pointer ends before this part.")
