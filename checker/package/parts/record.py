"""A record: one closed system with its states, processes, assumptions and limits."""

from __future__ import annotations

from typing import Annotated

from pydantic import Field, WithJsonSchema

from checker.package.parts.base import MAX_PARTS, Identifier, Many, Names, Part, Quantities, Text, Word
from checker.package.parts.body import Body
from checker.package.parts.head import Conventions, Head, Surroundings
from checker.package.parts.process import Process
from checker.package.parts.state import State
from checker.package.words import CLAIMS, PURPOSES
from checker.vocabulary import Level

Totals = Annotated[Quantities, Names("CycleQuantities", Level.CYCLE)]
SequenceNames = Annotated[Quantities, Names("SequenceQuantities", Level.SEQUENCE)]
AssumptionNames = Annotated[Quantities, Names("AssumptionQuantities", Level.ASSUMPTION)]
LimitValue = Annotated[object, WithJsonSchema({"type": ["string", "number"], "examples": ["200 bar"]})]
Claim = Annotated[str | None, Word(CLAIMS, "a claim")]
Purpose = Annotated[str | None, Word(PURPOSES, "a purpose")]


class ProcessSequence(Part):
    """A balance over several processes."""

    called = "a sequence"

    id: Identifier = Field(description="Identifier of the sequence.")
    title: Text = Field(default="", description="Free text.")
    processes: Many[Text] = Field(min_length=1, description="Its processes, in order.")
    inputs: SequenceNames = Field({}, description="What the originator started from.")
    results: SequenceNames = Field({}, description="What the originator claims.")


class Assumption(Part):
    """A declared assumption."""

    id: Identifier = Field(description="Identifier of the assumption.")
    text: Text = Field(description="One of the known assumptions; other text is listed as not checked.")
    inputs: AssumptionNames = Field({}, description="What its check needs.")


class Limit(Part):
    """A limit on a quantity of the record."""

    id: Identifier = Field(description="Identifier of the limit.")
    quantity: Text = Field(description="The quantity, such as states/hot/nitrogen/pressure.")
    at_most: LimitValue = Field(None, description="Largest permitted value, with its unit.")
    at_least: LimitValue = Field(None, description="Smallest permitted value, with its unit.")
    claim: Claim = Field(None, description="What the originator concludes.")
    basis: Text = Field(default="", description="Where the limit comes from.")


class Record(Part):
    """A calculation record: a closed system taken from a first state to a last one."""

    id: Identifier = Field(description="Identifier of the record.")
    title: Text = Field(default="", description="Title of the record.")
    purpose: Purpose = Field(None, description="What a cycle with a coefficient of performance is for.")
    conventions: Conventions = Field(
        default=Conventions(), description="Sign conventions, where they differ."
    )
    surroundings: Surroundings = Field({}, description="Surroundings, where they differ.")
    bodies: dict[Identifier, Body] = Field(
        min_length=1, max_length=MAX_PARTS, description="The bodies by identifier."
    )
    states: dict[Identifier, State] = Field(
        min_length=1, max_length=MAX_PARTS, description="The states by identifier."
    )
    processes: Many[Process] = Field(max_length=MAX_PARTS, description="The processes.")
    sequences: Many[ProcessSequence] = Field(
        (), max_length=MAX_PARTS, description="Balances over several processes."
    )
    inputs: Totals = Field({}, description="Totals of the cycle that were given.")
    results: Totals = Field({}, description="Totals of the cycle that are claimed.")
    assumptions: Many[Assumption | None] = Field(
        (), max_length=MAX_PARTS, description="Declared assumptions."
    )
    limits: Many[Limit | None] = Field(
        (), max_length=MAX_PARTS, description="Limits, and whether they are met."
    )
    sources: dict[str, Text] = Field({}, description="Where an input comes from: pointer to text.")


class Package(Part):
    """A calculation package for review: a header and records of closed systems."""

    package: Head = Field(description="Header of the package.")
    records: Many[Record] = Field(min_length=1, description="The records.")
