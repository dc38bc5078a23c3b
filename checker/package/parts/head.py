"""The header of a package, and what its records may override."""

from __future__ import annotations

from typing import Annotated

from pydantic import Field

from checker.package.parts.base import Names, Part, Quantities, Text, Word
from checker.vocabulary import WORK_CONVENTIONS, Level

Surroundings = Annotated[Quantities, Names("Surroundings", Level.SURROUNDINGS)]
WorkConvention = Annotated[str | None, Word(WORK_CONVENTIONS, "a work convention")]


class Conventions(Part):
    """Sign conventions. Heat is always positive into the system."""

    work: WorkConvention = Field(
        default=None,
        description="Whether work is counted positive out of the system or into it. Not stated: a query.",
    )


class Head(Part):
    """Header of the package, printed on the cover of the review as written."""

    called = "the header of a package"

    number: Text = Field(default="", description="Document number of the package.")
    title: Text = Field(default="", description="Title of the package.")
    revision: Text = Field(default="", description="Revision, as written: 01 stays 01.")
    date: Text = Field(default="", description="Date of the revision.")
    project: Text = Field(default="", description="Project or plant.")
    originator: Text = Field(default="", description="Who made the calculation.")
    checker: Text = Field(default="", description="Who is to check it.")
    conventions: Conventions = Field(default=Conventions(), description="Sign conventions of all records.")
    surroundings: Surroundings = Field(
        default={},
        description="Temperature and absolute pressure of the surroundings; a record may override.",
    )
