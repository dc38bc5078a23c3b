"""A state: each body with its properties."""

from __future__ import annotations

from typing import Annotated

from pydantic import ConfigDict, Field, model_validator

from checker.package.parts.base import Identifier, Many, Names, Part, Quantities, Text, Word
from checker.package.words import EQUILIBRIA
from checker.vocabulary import Level

StateNames = Annotated[Quantities, Names("StateQuantities", Level.STATE)]
Equilibrium = Annotated[str, Word(EQUILIBRIA, "a kind of equilibrium")]
EQUILIBRIUM_MEANING = "What is the same in all bodies: [temperature] or [temperature, pressure]."


class BodyState(Part):
    """A body in a state."""

    called = "a body in a state"

    inputs: StateNames = Field({}, description="Properties that the originator started from.")
    results: StateNames = Field({}, description="Properties that the originator claims.")
    same_as: Text | None = Field(
        None, description="The state that this one continues, such as records/other/states/hot/nitrogen."
    )


class State(Part):
    """A state: the bodies in it by identifier, and what they have in common."""

    model_config = ConfigDict(extra="allow")
    __pydantic_extra__: dict[Identifier, BodyState] = Field(init=False)

    equilibrium: Many[Equilibrium] = Field((), description=EQUILIBRIUM_MEANING)

    @model_validator(mode="before")
    @classmethod
    def without_nothing(cls, data: object) -> object:
        """Keep a body about which nothing is stated: it is an end state to be found."""
        if data is None:
            return {}
        if isinstance(data, dict) and data.get("equilibrium", ()) is None:
            return {key: value for key, value in data.items() if key != "equilibrium"}
        return data

    @property
    def bodies(self) -> dict[str, BodyState]:
        """The bodies in this state."""
        return self.__pydantic_extra__
