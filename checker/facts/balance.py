"""Residuals of the balances of a process, and the sizes that they are held against."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.facts.deviation import NOISE, Deviation
from checker.facts.spans import temperatures

KINDS: Final = ("boundary_work", "shaft_work", "electrical_work", "friction_work")


def energy_scale(case: Case, process: str) -> float:
    """Return the largest term of the energy balance (of the record, where all of them vanish). [J]"""
    return case.references.reference(f"processes/{process}/energy_change", 0.0)


def energy_allowance(case: Case, process: str) -> float:
    """Return what the reviewer tolerates in the energy balance. [J]"""
    return case.references.allowance(f"processes/{process}/energy_change", 0.0)


def entropy_allowance(case: Case, process: str) -> float:
    """Return what the reviewer tolerates in the entropy balance. [J/K]"""
    return case.references.allowance(f"processes/{process}/entropy_change", 0.0)


def entropy_noise(case: Case, process: str) -> float:
    """Return the entropy below which arithmetic cannot tell a sign. [J/K]

    A part in a million of the largest entropy term, or of the largest energy per temperature where the entropy
    terms cancel (an isentropic stroke).
    """
    largest = case.references.reference(f"processes/{process}/entropy_change", 0.0)
    warmth = temperatures(case, process)
    return NOISE * max(largest, energy_scale(case, process) / min(warmth) if warmth else 0.0)


def generation(case: Case, process: str, name: str) -> Deviation | None:
    """Return an entropy generation with its own uncertainty alone: the second law knows no allowance.

    The uncertainty is that of the generation, in which what two of its terms share moves both, on the side on which
    zero lies. None where there is no value, or none that its uncertainty lets judge.
    """
    pointer = f"processes/{process}/{name}"
    value = case.value(pointer)
    if value is None or case.is_unsettled(pointer):
        return None
    floor = entropy_noise(case, process)
    return Deviation(value, case.uncertainty_towards_zero(pointer) + floor, case.digit_move(pointer))


def energy_residual(case: Case, process: str) -> Deviation | None:
    """Return ΔE − Q + W of a process whose inputs give all three; None where the balance closed an unknown."""
    return _residual(case, process, f"processes/{process}/energy_residual")


def unlisted_work(case: Case, process: str) -> Deviation | None:
    """Return the work that the balance needs and no item accounts for; None where nothing is left over.

    Where shaft and electrical work are not known, what the total leaves beside the boundary work is theirs.
    """
    found = _residual(case, process, f"processes/{process}/work_residual")
    if found is not None:
        return found
    base = f"processes/{process}"
    total, known = case.value(f"{base}/work"), [case.value(f"{base}/{kind}") for kind in KINDS]
    if total is None or known[0] is None:
        return None
    left = total - sum(value for value in known if value is not None)
    digits = case.digit_move(f"{base}/work") + case.digit_move(f"{base}/boundary_work")
    uncertainty = case.uncertainty(f"{base}/work") + case.uncertainty(f"{base}/boundary_work")
    return Deviation(left, energy_allowance(case, process) + uncertainty, digits)


def _residual(case: Case, process: str, pointer: str) -> Deviation | None:
    value = case.value(pointer)
    if value is None:
        return None
    floor = NOISE * energy_scale(case, process)
    tolerance = energy_allowance(case, process) + case.uncertainty(pointer) + floor
    return Deviation(value, tolerance, case.digit_move(pointer))
