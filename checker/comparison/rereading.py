"""Other ways to carry on from a wrong stated value: its state read anew with it, or the value not carried on.

A person who found one property of a state wrongly looks the others up from it and a second one that is known. A
person who only wrote a value wrongly goes on with the right one. Neither shows in the sheet's own formulas.
"""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from dataclasses import dataclass
from itertools import islice
from typing import Final

from checker.outcomes import NotEvaluable
from checker.sheet.keys import STATE_OUTPUTS, given
from checker.sheet.step import Sheet, Values, reevaluate
from checker.substances.interface import PropertyState, Substance

READ_WITH: Final = ("temperature", "pressure", "specific_volume", "quality")
"""Properties with which another one is looked up."""
MISREAD: Final = (*READ_WITH, "specific_internal_energy", "specific_enthalpy", "specific_entropy")
"""Properties from which, stated wrong, a state is read anew."""
MOST_READ: Final = 24
"""Most states that are read anew in a record (bounded work)."""
MOST_LEFT: Final = 16
"""Most wrong values that are tried as not carried on (bounded work)."""
SHARED: Final = 1e-6
"""Bodies share a property in a state where it differs by less than this part of its value: they are in equilibrium."""


@dataclass(frozen=True, slots=True)
class Variant:
    """Carried values of another reading of one wrong stated value; they speak only for what lies below it.

    Attributes
    ----------
    state : str
        Key below which they speak.
    left : str
        Key of the stated value that is not carried on; empty where it is.
    partners : tuple of str
        Keys of the same property of other bodies, below which they speak as well.
    """

    state: str
    values: Values
    left: str = ""
    partners: tuple[str, ...] = ()

    def speaks(self, above: frozenset[str]) -> bool:
        """Say whether they speak for a key with these ancestors."""
        return self.state in above or not above.isdisjoint(self.partners)


@dataclass(frozen=True, slots=True)
class Stated:
    """What is stated of a record, where the alternate calculation stands beside it, and its carried values."""

    sheet: Sheet
    substances: Mapping[str, Substance]
    independent: Values
    carried: Values
    substitutes: Mapping[str, float]
    widths: Mapping[str, float]

    def wrong(self) -> Iterator[str]:
        """Yield the keys whose stated value is off by more than its last digit."""
        for key, stated in self.substitutes.items():
            value = self.independent.get(key)
            if isinstance(value, float) and abs(stated - value) > 2.0 * self.widths[key]:
                yield key

    def value(self, key: str) -> float | None:
        """Return a value as the originator had it."""
        found = self.substitutes.get(key, self.carried.get(key))
        return found if isinstance(found, float) else None


def left_out(stated: Stated) -> Iterator[Variant]:
    """Yield carried values in which a wrong stated value is not carried on: what it is made from is."""
    for key in islice(stated.wrong(), MOST_LEFT):
        own = stated.carried.get(key)
        if isinstance(own, float) and stated.sheet.users.get(key):
            touched = reevaluate(stated.sheet, stated.carried, {key: own}, stated.substitutes)
            yield Variant(key, touched, left=key)


def read_anew(stated: Stated) -> Iterator[Variant]:
    """Yield carried values in which a state is read anew from its wrong stated property and a second one."""
    yield from islice(_read_anew(stated), MOST_READ)


def _read_anew(stated: Stated) -> Iterator[Variant]:
    for key in stated.wrong():
        parts = key.split("/")
        if (
            parts[0] != "states"
            or len(parts) != len(("states", "S", "BODY", "NAME"))
            or parts[3] not in MISREAD
        ):
            continue
        bodies = _sharing(stated, parts[1], parts[2], parts[3])
        for second in READ_WITH:
            changed: dict[str, float] = {}
            for body in bodies if second != parts[3] else ():
                changed.update(_read(stated, f"states/{parts[1]}/{body}", body, key, second))
            if changed:
                touched = reevaluate(stated.sheet, stated.carried, changed, stated.substitutes)
                partners = tuple(f"states/{parts[1]}/{body}/{parts[3]}" for body in bodies[1:])
                yield Variant(key, {**changed, **touched}, partners=partners)


def _sharing(stated: Stated, state: str, body: str, name: str) -> Sequence[str]:
    """Return the bodies that have a property in common in a state, the one it is stated of first."""
    own = stated.independent.get(f"states/{state}/{body}/{name}")
    if not isinstance(own, float) or name not in ("temperature", "pressure"):
        return (body,)
    others = (
        other
        for other in stated.substances
        if other != body
        and given(f"states/{state}/{other}/{name}") not in stated.sheet.leaves
        and isinstance(found := stated.independent.get(f"states/{state}/{other}/{name}"), float)
        and abs(found - own) <= SHARED * abs(own)
    )
    return (body, *others)


def _read(stated: Stated, base: str, body: str, wrong: str, second: str) -> dict[str, float]:
    """Return the properties of a body's state read from the wrong property and a second one, where not stated."""
    value, name = stated.value(f"{base}/{second}"), wrong.rsplit("/", 1)[-1]
    substance = stated.substances.get(body)
    if value is None or substance is None:
        return {}
    try:
        found = substance.state({name: stated.substitutes[wrong], second: value})
    except (NotEvaluable, ArithmeticError, ValueError):
        return {}
    return {
        key: own
        for output in STATE_OUTPUTS
        if (key := f"{base}/{output}") not in stated.substitutes
        and isinstance(own := _output(found, output), float)
    }


def _output(found: PropertyState, name: str) -> object:
    if name == "density":
        return 1.0 / found.specific_volume if found.specific_volume else None
    return getattr(found, name)
