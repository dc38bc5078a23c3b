"""Links between states: what a linked state takes over, from another record or from a state of its own record."""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.sheet.balances import same_value
from checker.sheet.keys import body_key, state_key
from checker.sheet.melting import FRACTION
from checker.sheet.states import EXTENSIVE, Clue
from checker.sheet.step import Link, Step
from checker.submission import Record, Role

LINKED: Final = ("temperature", "specific_volume")
"""What a linked state takes over; these two fix a state of any model, a body that melts needs its fraction too."""


@dataclass(frozen=True, slots=True)
class Target:
    """The state that a linked one is the same as."""

    record: str
    state: str
    body: str

    def key(self, name: str) -> str:
        """Return the pointer of one of its properties, within its own record."""
        return state_key(self.state, self.body, name)


def target_of(record: Record, state: str, body: str) -> Target | None:
    """Return what a body in a state is linked to, or None."""
    found = record.body_states.get((state, body))
    parts = (found.same_as or "").split("/") if found is not None else []
    if len(parts) != 5 or parts[0] != "records" or parts[2] != "states":
        return None
    return Target(parts[1], parts[3], parts[4])


def leaves_of(record: Record) -> Iterator[Link]:
    """Yield the leaves that come from other records: T, v and the mass of every state linked to one."""
    for state, body in record.body_states:
        target = target_of(record, state, body)
        if target is None or target.record == record.id:
            continue
        for name in _taken_over(record, body):
            yield Link(f"link/{state_key(state, body, name)}", target.record, target.key(name))
        yield Link(f"link/{state_key(state, body, 'mass')}", target.record, body_key(target.body, "mass"))


def _taken_over(record: Record, body: str) -> tuple[str, ...]:
    own = record.bodies.get(body)
    return (*LINKED, FRACTION) if own is not None and own.model == "phase change" else LINKED


def link_clues(record: Record, state: str, body: str) -> Iterator[Clue]:
    """Yield T and v of the linked state as clues: a link replaces inputs, so these two stand before any other."""
    target = target_of(record, state, body)
    if target is not None:
        here = target.record == record.id
        for name in _taken_over(record, body):
            key = target.key(name) if here else f"link/{state_key(state, body, name)}"
            yield Clue(name, key, stated=True, linked=True)


def mass_steps(record: Record, body: str) -> Iterator[Step]:
    """Yield the mass that linked states bring, in the order of the states.

    Another record's state tells of the same matter. A state of another body in the same record tells of the mass
    only where nothing says how much there is of the own body: two vessels may be filled alike and differ in size.
    """
    mass = body_key(body, "mass")
    for state, name in record.body_states:
        target = target_of(record, state, body) if name == body else None
        if target is None:
            continue
        if target.record != record.id:
            key = f"link/{state_key(state, body, 'mass')}"
            yield same_value(mass, key, f"Mass of {body}", "m of the linked record")
        elif target.body != body and not _has_extent(record, body):
            yield same_value(mass, body_key(target.body, "mass"), f"Mass of {body}", "m of the linked state")


def _has_extent(record: Record, body: str) -> bool:
    """Say whether an input of a body, or of one of its states, tells how much of it there is."""
    own = [body_key(body, name) for name in ("mass", "amount", "volume")]
    own += [state_key(s, b, name) for s, b in record.body_states if b == body for name in EXTENSIVE]
    return any(record.stated(pointer, Role.INPUT) for pointer in own)


def rests_on_link(record: Record, state: str, body: str, parents: tuple[str, ...]) -> bool:
    """Say whether a step with these parents takes a state from its link."""
    return any(clue.key in parents for clue in link_clues(record, state, body))


def has_own_inputs(record: Record, state: str, body: str) -> bool:
    """Say whether a body in a state has inputs of its own beside a link."""
    base = state_key(state, body, "")
    return any(s.role is Role.INPUT and s.pointer.startswith(base) for s in record.statements)
