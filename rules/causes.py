"""Which origins belong together, and what caused them: what several rules say of a wrong result."""

from __future__ import annotations

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from functools import lru_cache
from typing import Final

from checker.case import Case
from checker.comparison.compare import Compared
from checker.facts.common import Common, common_parents
from checker.facts.origins import group_of, origins, spoiled_by
from checker.slips import Diagnosis, diagnose

ON_A_DATUM: Final = ("specific_internal_energy", "specific_enthalpy", "specific_entropy")
"""Values that mean nothing to a reader without their datum."""


@dataclass(frozen=True, slots=True)
class Causes:
    """Everything known of the causes of a record's wrong results, by the pointers of its origins.

    Attributes
    ----------
    elsewhere : mapping
        Origin → the earlier one that it is told under.
    """

    firm: Mapping[str, tuple[Compared, ...]]
    diagnoses: Mapping[str, Diagnosis]
    common: Mapping[str, Common]
    elsewhere: Mapping[str, str]

    def of(self, pointer: str) -> Diagnosis:
        """Return what is known of the cause of an origin."""
        return self.diagnoses.get(pointer, Diagnosis())

    def under(self, pointer: str) -> tuple[str, ...]:
        """Return the origins that are told under one."""
        return tuple(other for other, lead in self.elsewhere.items() if lead == pointer)


@lru_cache(maxsize=8)
def causes_of(case: Case) -> Causes:
    """Return the causes of a record's wrong results: slips first, then what one wrong parent explains."""
    firm = {group[0].statement.pointer: tuple(group) for group in _firm(case)}
    diagnoses = diagnose(case)
    elsewhere: dict[str, str] = {}
    for lead, diagnosis in diagnoses.items():
        elsewhere.update(dict.fromkeys(diagnosis.explains, lead))
    left = [group[0] for pointer, group in firm.items() if pointer not in elsewhere]
    common = {found.lead: found for found in common_parents(case, left)}
    for lead, found in common.items():
        for other in found.others:
            elsewhere.update(
                dict.fromkeys((other, *(o for o, own in elsewhere.items() if own == other)), lead)
            )
    return Causes(firm, diagnoses, common, elsewhere)


def _firm(case: Case) -> Iterator[list[Compared]]:
    """Yield for every origin what open digits do not explain of it."""
    for group in origins(case):
        if firm := [c for c in group if not c.explained_by_digits]:
            yield firm


def spoils_of(case: Case, causes: Causes, first: Compared) -> tuple[str, ...]:
    """Return everything that an origin spoiled, with the origins that are told under it and what they spoiled."""
    spoiled = list(spoiled_by(case, group_of(case, first), first))
    for other in causes.under(first.statement.pointer):
        lead = causes.firm[other][0]
        spoiled += (other, *spoiled_by(case, group_of(case, lead), lead))
    return tuple(pointer for pointer in dict.fromkeys(spoiled) if pointer != first.statement.pointer)


def cause_told(case: Case, causes: Causes, pointer: str) -> Iterator[str]:
    """Yield what a message says of the cause."""
    diagnosis = causes.of(pointer)
    if diagnosis.causes and not diagnosis.note:
        yield f"This slip gives the stated digits: {diagnosis.causes[0].statement}."
    elif diagnosis.note:
        yield f"Cause: {diagnosis.note}."
    if (found := causes.common.get(pointer)) is not None:
        yield _common_told(case, found)


def _common_told(case: Case, found: Common) -> str:
    others = "one other result" if len(found.others) == 1 else f"{len(found.others)} other results"
    pointer, start = found.pointer, case.carried.values.get(found.key)
    name = pointer.rsplit("/", 1)[-1].replace("_", " ")
    told = f"One wrong value gives this and {others}: {name} ({pointer})"
    if pointer.rsplit("/", 1)[-1] not in ON_A_DATUM and isinstance(start, float):
        told = f"{told} taken as {case.show(pointer, found.value)} in place of {case.show(pointer, start)}"
    return f"{told}."
