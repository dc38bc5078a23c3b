"""Spots: where a mapping of quantities stands in a record."""

from __future__ import annotations

from dataclasses import dataclass

from checker.package.layout import belongs
from checker.package.nearest import nearest, perhaps, without_value
from checker.problems import Place
from checker.quantity.types import Quantity
from checker.vocabulary import TERMS, Level


@dataclass(frozen=True, slots=True)
class Spot:
    """Where a mapping of names stands, and how its signs and rates are read.

    Attributes
    ----------
    level : Level
        Level of the vocabulary.
    prefix : str
        Pointer of what the quantities belong to, such as ``states/hot/nitrogen``.
    place : Place
        Place of the part that holds ``inputs`` and ``results``, from the record.
    names : tuple of str or None
        Whole-word names that may stand there; None: all of the level.
    duration : Quantity or None
        What makes a rate a total.
    work : bool
        A work transfer.
    direction : str or None
        Its direction, if stated.
    """

    level: Level
    prefix: str
    place: Place
    names: tuple[str, ...] | None = None
    duration: Quantity | None = None
    work: bool = False
    direction: str | None = None

    @property
    def allowed(self) -> tuple[str, ...]:
        """The whole-word names that may stand there."""
        return tuple(TERMS[self.level]) if self.names is None else self.names

    def meant(self, written: str, value: object) -> str:
        """Return which name was probably meant, or to which part it belongs."""
        elsewhere = belongs(written, but=self.level)
        near = perhaps(nearest(written, self.allowed))
        # A symbol of one letter means something nearly everywhere.
        suggestion = near or elsewhere if len(written) == 1 else elsewhere or near
        if not suggestion and value is None:
            return without_value(written)
        return suggestion or f"Known here: {', '.join(self.allowed) or 'none'}."


@dataclass(frozen=True, slots=True)
class WordStated:
    """A word stated among quantities, such as a phase."""

    text: str
    place: Place
