"""What the originator states, summed: terms of a balance that must agree among themselves."""

from __future__ import annotations

from collections.abc import Iterable
from dataclasses import dataclass

from checker.case import Case
from checker.findings import Outcome
from checker.submission import Statement


@dataclass(frozen=True, slots=True)
class Stated:
    """A stated amount or a sum of stated amounts; SI, program's sign. ``parts`` is empty for a plain nothing."""

    value: float
    half_width: float
    parts: tuple[Statement, ...] = ()

    @property
    def open_half_width(self) -> float:
        """The half-width where zeros that end an integer are not significant. [SI]"""
        return sum(max(part.quantity.half_width, part.quantity.open_half_width) for part in self.parts)


NOTHING = Stated(0.0, 0.0)


def one(case: Case, pointer: str) -> Stated | None:
    """Return what is stated for a quantity (the first statement), or None."""
    found = next(iter(case.stated(pointer)), None)
    return None if found is None else Stated(found.value, found.quantity.half_width, (found,))


def one_or_nothing(case: Case, pointer: str) -> Stated | None:
    """Return what is stated, or nothing where path or model leave no room for it; else None."""
    found = one(case, pointer)
    return NOTHING if found is None and case.value(pointer) == 0.0 else found


def total(terms: Iterable[Stated | None]) -> Stated | None:
    """Return the sum of stated terms; None where one is missing."""
    values: list[Stated] = []
    for term in terms:
        if term is None:
            return None
        values.append(term)
    return Stated(
        sum(term.value for term in values),
        sum(term.half_width for term in values),
        tuple(part for term in values for part in term.parts),
    )


def heat(case: Case, process: str) -> Stated | None:
    """Return the stated heat of a process: its total, else the sum of its items, else a known nothing."""
    return (
        one(case, f"processes/{process}/heat") or items(case, process, "heat") or _none(case, process, "heat")
    )


def work(case: Case, process: str) -> Stated | None:
    """Return the stated work of a process: its total, else the sum of its kinds, each stated or none."""
    ctx = case.context(process)
    others = ("shaft_work", "electrical_work") if ctx is None else ctx.other_work_kinds
    kinds = ("boundary_work", *others)
    summed = total(_kind(case, process, kind) for kind in kinds)
    return one(case, f"processes/{process}/work") or summed


def _kind(case: Case, process: str, kind: str) -> Stated | None:
    found = one(case, f"processes/{process}/{kind}") or items(case, process, "work", kind.split("_")[0])
    return found or _none(case, process, kind)


def _none(case: Case, process: str, name: str) -> Stated | None:
    return NOTHING if case.value(f"processes/{process}/{name}") == 0.0 else None


def items(case: Case, process: str, what: str, kind: str = "") -> Stated | None:
    """Return the sum of the items of a process, all of them stated; None where one is not, or there is none.

    Heat between bodies does not cross the boundary and is no part of the sum.
    """
    ctx = case.context(process)
    if ctx is None:
        return None
    if what == "heat":
        names = [item.id for item in ctx.external_heats or ()]
    else:
        names = [item.id for item in ctx.process.work_transfers or () if kind in ("", item.kind)]
    base = f"processes/{process}/{what}_transfers"
    return total(one(case, f"{base}/{name}/energy") for name in names) if names else None


def energy_change(case: Case, process: str) -> Stated | None:
    """Return the stated ΔE, else the sum of ΔU, ΔKE and ΔPE, the last two stated or none."""
    base = f"processes/{process}"
    summed = total(
        (
            one(case, f"{base}/internal_energy_change"),
            _motion(case, f"{base}/kinetic_energy_change", "velocity"),
            _motion(case, f"{base}/potential_energy_change", "elevation"),
        )
    )
    return one(case, f"{base}/energy_change") or summed


def _motion(case: Case, pointer: str, cause: str) -> Stated | None:
    """Return the stated kinetic or potential energy; nothing where no speed or height is stated anywhere."""
    moves = any(s.pointer.startswith("states/") and s.term.name == cause for s in case.record.statements)
    return one(case, pointer) or (None if moves else NOTHING)


def is_wrong(case: Case, pointer: str) -> bool:
    """Say whether a statement of this quantity deviates from the alternate calculation."""
    key = case.key(pointer)
    return any(c.key == key and c.outcome is Outcome.WRONG for c in case.compared)


def any_wrong(case: Case, *terms: Stated) -> bool:
    """Say whether a statement behind these terms deviates from the alternate calculation."""
    return any(is_wrong(case, part.pointer) for term in terms for part in term.parts)


def largest(*terms: Stated) -> float:
    """Return the largest of some terms, as a magnitude."""
    return max((abs(term.value) for term in terms), default=0.0)
