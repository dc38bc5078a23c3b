"""A process: from one state to another, with its transfers, its path and its totals."""

from __future__ import annotations

from typing import Annotated, Final

from pydantic import Field, model_validator
from pydantic_core import PydanticCustomError

from checker.package.parts.base import (
    MAX_PARTS,
    Flag,
    Identifier,
    Many,
    Names,
    OneQuantity,
    Part,
    Quantities,
    Text,
    Word,
    stated,
)
from checker.package.parts.path import Path
from checker.package.parts.state import EQUILIBRIUM_MEANING, Equilibrium
from checker.package.words import DIRECTIONS, SYSTEM
from checker.vocabulary import WORK_KINDS, Level

BESIDE_INPUTS: Final = (
    "boundary_temperature",
    "reservoir_temperature",
    "final_boundary_temperature",
    "final_reservoir_temperature",
    "reservoir_heat_capacity",
    "heat_loss_coefficient",
)
"""Inputs of a heat transfer that may stand directly on it, beside ``inputs``."""
ONLY_HEAT: Final = (*BESIDE_INPUTS, "entropy_generation")
"""Names of the level *transfer* that say nothing about work."""

ProcessNames = Annotated[Quantities, Names("ProcessQuantities", Level.PROCESS)]
HeatNames = Annotated[Quantities, Names("HeatTransferQuantities", Level.TRANSFER)]
WorkNames = Annotated[Quantities, Names("WorkTransferQuantities", Level.TRANSFER, without=ONLY_HEAT)]
TotalVolumeNames = Annotated[Quantities, Names("TotalVolumeQuantities", Level.BODY, only=("volume",))]
WorkKind = Annotated[str, Word(WORK_KINDS, "a kind of work")]
Direction = Annotated[str | None, Word(DIRECTIONS, "a direction")]


class HeatTransfer(Part):
    """A heat transfer, positive into the system."""

    id: Identifier = Field(description="Identifier of the transfer.")
    title: Text = Field(default="", description="Free text.")
    body: Text | None = Field(None, description="The body that the heat enters or leaves.")
    from_: Text | None = Field(None, alias="from", description="Heat between bodies: the body it leaves.")
    to: Text | None = Field(None, description="Heat between bodies: the body it enters.")
    boundary_temperature: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[0], (SYSTEM,))] = Field(
        None, description="Temperature where the heat crosses; `system` follows the system."
    )
    reservoir_temperature: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[1])] = Field(
        None, description="Temperature of what the heat comes from or goes to; at the start, if it changes."
    )
    final_boundary_temperature: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[2])] = Field(
        None,
        description="Temperature at the end where the heat crosses, if it moves in proportion to the heat.",
    )
    final_reservoir_temperature: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[3])] = Field(
        None, description="Temperature at the end of a reservoir of finite heat capacity."
    )
    reservoir_heat_capacity: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[4])] = Field(
        None, description="Heat capacity of a finite reservoir."
    )
    heat_loss_coefficient: Annotated[object, OneQuantity(Level.TRANSFER, BESIDE_INPUTS[5])] = Field(
        None, description="Heat flow per kelvin between the body and the reservoir or the surroundings (UA)."
    )
    inputs: HeatNames = Field({}, description="What the originator started from.")
    results: HeatNames = Field({}, description="What the originator claims.")


class WorkTransfer(Part):
    """A work transfer; its sign follows the work convention unless `direction` is given."""

    id: Identifier = Field(description="Identifier of the transfer.")
    title: Text = Field(default="", description="Free text.")
    kind: WorkKind = Field(description="Kind of work.")
    direction: Direction = Field(
        None, description="In or out of the system; then the number is positive, whatever the convention."
    )
    body: Text | None = Field(None, description="The body that the work meets.")
    inputs: WorkNames = Field({}, description="What the originator started from.")
    results: WorkNames = Field({}, description="What the originator claims.")


class Share(Part):
    """One body's share in a process."""

    called = "a body's share in a process"

    inputs: ProcessNames = Field({}, description="What the originator started from.")
    results: ProcessNames = Field({}, description="What the originator claims.")


class TotalVolume(Part):
    """Bodies that share a fixed total volume."""

    bodies: Many[Text] = Field(min_length=2, description="The bodies.")
    inputs: TotalVolumeNames = Field({}, description="The total volume, if it is given.")


class Process(Part):
    """A process of a record."""

    id: Identifier = Field(description="Identifier of the process.")
    title: Text = Field(default="", description="Free text.")
    from_: Text = Field(alias="from", description="The state in which it begins.")
    to: Text = Field(description="The state in which it ends.")
    path: Path | None = Field(
        None, description="The path: a word, a word with parameters, a list, or one for each body."
    )
    heat_transfers: Many[HeatTransfer] | None = Field(
        None,
        max_length=MAX_PARTS,
        description="All heat transfers; [] means none, a missing key means not stated.",
    )
    work_transfers: Many[WorkTransfer] | None = Field(
        None,
        max_length=MAX_PARTS,
        description="All work transfers; [] means none, a missing key means not stated.",
    )
    inputs: ProcessNames = Field({}, description="What the originator started from.")
    results: ProcessNames = Field({}, description="What the originator claims.")
    bodies: dict[Identifier, Share] = Field({}, description="Shares of single bodies.")
    equilibrium: Many[Equilibrium] = Field(
        (), description=f"At the end of the process. {EQUILIBRIUM_MEANING}"
    )
    total_volume: TotalVolume | None = Field(None, description="Bodies in a fixed total volume.")
    insulated: Flag = Field(False, description="No heat crosses the boundary of the whole system.")

    @model_validator(mode="before")
    @classmethod
    def without_nothing(cls, data: object) -> object:
        """Refuse transfers without a value, which could mean none or not stated; leave out other empty keys."""
        for key in ("heat_transfers", "work_transfers"):
            if isinstance(data, dict) and data.get(key, ()) is None:
                advice = "Write [] for none; leave the key out if nothing is stated about it."
                context = {"key": key, "suggestion": advice}
                raise PydanticCustomError("type-wrong", "`{key}` has no value.", context)
        return stated(cls, data)
