"""What was submitted, flattened: every quantity by its pointer, with role, sign and place in the document.

This is the only view of a package that the alternate calculation and the rules see.
"""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from enum import StrEnum

from checker.problems import Place, Problem
from checker.quantity.types import Quantity
from checker.vocabulary import Term


class Role(StrEnum):
    """Whether the originator started from a quantity or claims it."""

    INPUT = "input"
    RESULT = "result"


@dataclass(frozen=True, slots=True)
class Statement:
    """One quantity as stated once.

    Attributes
    ----------
    pointer : str
        The quantity, such as ``processes/warming/heat`` (always whole words, never inputs/results).
    role : Role
        Input or result.
    term : Term
        Its entry of the vocabulary.
    quantity : Quantity
        As read, in the originator's sign.
    sign : int
        +1, or −1 where the originator's sign is the opposite of the program's (heat in, work out).
    place : Place
        Where in the document.
    usable : bool
        False where its dimension is not that of the term: it is reported and never calculated with.
    """

    pointer: str
    role: Role
    term: Term
    quantity: Quantity
    sign: int
    place: Place
    usable: bool = True

    @property
    def value(self) -> float:
        """The value in SI in the program's sign."""
        return self.sign * self.quantity.value


@dataclass(frozen=True, slots=True)
class Body:
    """A body: ``constants`` names the stated inputs that define its model."""

    id: str
    substance: str
    model: str
    place: Place
    datum: Datum | None = None
    composition: Mapping[str, float] | None = None
    composition_basis: str = "mole"
    property_source: str = "reference"  # or "industrial": water by IAPWS-IF97
    table: tuple[Mapping[str, Quantity], ...] = ()


@dataclass(frozen=True, slots=True)
class Datum:
    """Where the originator's u, h or s are zero (``zero`` lists the names)."""

    temperature: float
    pressure: float | None
    quality: float | None
    zero: tuple[str, ...]


@dataclass(frozen=True, slots=True)
class BodyState:
    """A body in a state: the phase word if stated (with its role), and a link.

    Where both inputs and results state a phase, ``phase`` is that of the inputs; ``claimed_phase`` is always that
    of the results. ``same_as`` is written out: ``records/R/states/S/B``.
    """

    state: str
    body: str
    place: Place
    phase: str | None = None
    phase_role: Role | None = None
    same_as: str | None = None
    claimed_phase: str | None = None


@dataclass(frozen=True, slots=True)
class PathSpec:
    """One path of one body in one process.

    Its parameters are statements at ``pointer/NAME``, where ``pointer`` is ``processes/P/path`` in a record of one
    body and ``processes/P/bodies/B/path`` in others; those of the i-th of its ``points`` (from 0) are at
    ``pointer/points/i/pressure`` and ``pointer/points/i/volume``.
    """

    kind: str
    place: Place
    pointer: str = ""
    points: int = 0


@dataclass(frozen=True, slots=True)
class HeatTransfer:
    """A heat transfer of a process. ``at_system`` is true for ``boundary_temperature: system``."""

    id: str
    place: Place
    body: str | None = None
    from_body: str | None = None
    to_body: str | None = None
    at_system: bool = False

    @property
    def is_internal(self) -> bool:
        """Say whether the heat passes from one body of the record to another."""
        return self.from_body is not None and self.to_body is not None


@dataclass(frozen=True, slots=True)
class WorkTransfer:
    """A work transfer of a process; ``direction`` overrides the work convention."""

    id: str
    kind: str
    place: Place
    body: str | None = None
    direction: str | None = None


@dataclass(frozen=True, slots=True)
class Process:
    """A process. ``heat_transfers`` is None where the key is missing, empty where ``[]`` was written."""

    id: str
    from_state: str
    to_state: str
    place: Place
    paths: Mapping[str, tuple[PathSpec, ...]]
    heat_transfers: tuple[HeatTransfer, ...] | None
    work_transfers: tuple[WorkTransfer, ...] | None
    equilibrium: tuple[str, ...] = ()
    total_volume: tuple[str, ...] = ()
    insulated: bool = False


@dataclass(frozen=True, slots=True)
class SequenceOfProcesses:
    """A balance over several processes."""

    id: str
    processes: tuple[str, ...]
    place: Place


@dataclass(frozen=True, slots=True)
class Assumption:
    """A declared assumption; ``word`` is its entry of the vocabulary, None where it is not one."""

    id: str
    text: str
    place: Place
    word: str | None = None


@dataclass(frozen=True, slots=True)
class Limit:
    """A limit on a quantity; at_most and at_least are the quantities as read."""

    id: str
    quantity: str
    place: Place
    at_most: Quantity | None = None
    at_least: Quantity | None = None
    claim: str | None = None
    basis: str = ""


@dataclass(frozen=True, slots=True)
class Record:
    """A record as submitted.

    ``work_sign`` is +1 where work is positive out, −1 where positive in; ``work_convention`` is None where it
    was not stated. ``statements`` holds every quantity in document order, duplicates of a pointer included.
    """

    id: str
    title: str
    place: Place
    bodies: Mapping[str, Body]
    states: tuple[str, ...]
    body_states: Mapping[tuple[str, str], BodyState]
    processes: tuple[Process, ...]
    sequences: tuple[SequenceOfProcesses, ...]
    assumptions: tuple[Assumption, ...]
    limits: tuple[Limit, ...]
    sources: Mapping[str, str]
    statements: tuple[Statement, ...]
    problems: tuple[Problem, ...]
    work_convention: str | None
    purpose: str | None = None
    state_equilibrium: Mapping[str, tuple[str, ...]] | None = None
    _usable: Mapping[str, tuple[Statement, ...]] = field(init=False, repr=False, compare=False)

    def __post_init__(self) -> None:
        usable: dict[str, tuple[Statement, ...]] = {}
        for statement in self.statements:
            if statement.usable:
                usable[statement.pointer] = (*usable.get(statement.pointer, ()), statement)
        object.__setattr__(self, "_usable", usable)

    @property
    def work_sign(self) -> int:
        """+1 for work positive out (also where nothing is stated), −1 for positive in."""
        return -1 if self.work_convention == "positive in" else 1

    def stated(self, pointer: str, role: Role | None = None) -> tuple[Statement, ...]:
        """Return the usable statements of a quantity."""
        found = self._usable.get(pointer, ())
        return found if role is None else tuple(s for s in found if s.role is role)


@dataclass(frozen=True, slots=True)
class PackageHead:
    """The header of a package; what is not stated is an empty text."""

    number: str = ""
    title: str = ""
    revision: str = ""
    date: str = ""
    project: str = ""
    originator: str = ""
    checker: str = ""
    work_convention: str | None = None


@dataclass(frozen=True, slots=True)
class Submission:
    """A package as submitted: header, readable records, unreadable ones by identifier, and problems."""

    file: str
    sha256: str
    head: PackageHead
    records: tuple[Record, ...]
    unreadable: tuple[str, ...]
    problems: tuple[Problem, ...]
