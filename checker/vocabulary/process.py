"""What may be stated of a process: its totals, and the same per unit mass."""

from __future__ import annotations

from dataclasses import replace
from typing import Final

from checker.quantity import dimensions as dim
from checker.quantity.types import Scale
from checker.term import Allowance, Term
from checker.vocabulary.common import DURATION, MEAN_POWER, energy, entropy

_PROCESS_ENERGY: Final[tuple[Term, ...]] = (
    energy("heat", "Q", "heat transfer, positive into the system"),
    energy("work", "W", "work transfer, all kinds", work_sign=True),
    energy("boundary_work", "W_b", "work of the moving boundary", work_sign=True),
    energy("shaft_work", "W_sh", "shaft work", work_sign=True),
    energy("electrical_work", "W_el", "electrical work", work_sign=True),
    energy(
        "friction_work",
        "W_fr",
        "work that friction turns into internal energy of the system, at a piston out of its boundary work; "
        "it always goes in",
        work_sign=True,
    ),
    energy("internal_energy_change", "ΔU", "change of internal energy"),
    energy("kinetic_energy_change", "ΔKE", "change of kinetic energy"),
    energy("potential_energy_change", "ΔPE", "change of potential energy"),
    energy("energy_change", "ΔE", "change of total energy"),
    energy("enthalpy_change", "ΔH", "change of enthalpy"),
    energy("exergy_change", "ΔX", "change of closed-system exergy", "exergy"),
    energy(
        "exergy_transfer",
        "X_Q−X_W",
        "exergy transferred by heat and useful work, positive into the system",
        "exergy",
    ),
    energy("exergy_destruction", "X_d", "exergy destroyed", "exergy"),
)
_PROCESS_ENTROPY: Final[tuple[Term, ...]] = (
    entropy("entropy_change", "ΔS", "change of entropy"),
    entropy("entropy_transfer", "ΣQ/T_b", "entropy transferred with heat, positive into the system"),
    entropy("entropy_generation", "S_gen", "entropy generated in the system"),
    entropy("entropy_generation_with_surroundings", "S_gen,tot", "entropy generated, surroundings included"),
)


def _per_mass(term: Term) -> Term:
    """Return the per-mass form of an extensive process term: ``specific_`` before its name."""
    energy = term.dimension == dim.ENERGY
    return replace(
        term,
        name=f"specific_{term.name}",
        symbol=f"{term.symbol}/m",
        dimension=dim.SPECIFIC_ENERGY if energy else dim.SPECIFIC_ENTROPY,
        unit="kJ/kg" if energy else "kJ/(kg·K)",
        meaning=f"{term.meaning}, per unit mass",
    )


PER_MASS: Final[dict[str, str]] = {
    f"specific_{term.name}": term.name for term in _PROCESS_ENERGY + _PROCESS_ENTROPY
}
"""Per-mass name of a process quantity → the extensive name."""

PROCESS: Final[tuple[Term, ...]] = (
    *_PROCESS_ENERGY,
    *_PROCESS_ENTROPY,
    *(_per_mass(term) for term in _PROCESS_ENERGY + _PROCESS_ENTROPY),
    Term(
        "temperature_change",
        "ΔT",
        dim.TEMPERATURE,
        "K",
        "change of temperature",
        Scale.TEMPERATURE_DIFFERENCE,
        Allowance.TEMPERATURE,
    ),
    DURATION,
    MEAN_POWER,
)
