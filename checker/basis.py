"""The review basis: allowances, coverage and conventions that a review is held against."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass, field
from types import MappingProxyType
from typing import Final

from checker.vocabulary import Allowance

DEFAULT_ALLOWANCES: Final[Mapping[Allowance, float]] = MappingProxyType(
    {
        Allowance.TEMPERATURE: 0.3,  # K
        Allowance.FRACTION: 0.005,  # absolute
        Allowance.PROPERTY_CHANGE: 0.005,  # of the change over the states of the body
        Allowance.ENERGY: 0.005,  # of the largest term of the balance
        Allowance.ENTROPY: 0.005,  # of the largest term of the balance
        Allowance.VALUE: 0.005,  # of the value
    }
)
"""Deviations that a reviewer tolerates (chosen; design, section 6)."""


@dataclass(frozen=True, slots=True)
class Basis:
    """The resolved settings of a review.

    Attributes
    ----------
    allowances : mapping
        Allowance class → tolerated deviation (K for temperatures, absolute for fractions, else relative).
    coverage_factor : float
        k of the expanded uncertainty (GUM, JCGM 100:2008, 6.2).
    input_digits : str
        ``exact`` or ``rounded``: whether the last digit of an input is uncertain by half a unit.
    plus_minus : str
        ``half-width`` or ``standard uncertainty``: what a stated ± means.
    work_convention : str or None
        Used where a package does not state one.
    name : str
        File of the basis, or ``built in``.
    """

    allowances: Mapping[Allowance, float] = field(default_factory=lambda: DEFAULT_ALLOWANCES)
    coverage_factor: float = 2.0
    input_digits: str = "exact"
    plus_minus: str = "half-width"
    work_convention: str | None = None
    name: str = "built in"

    def settings(self) -> tuple[tuple[str, str], ...]:
        """Return every setting with its value as text, for the report."""
        allowed = self.allowances
        return (
            ("review basis", self.name),
            ("allowance, temperature", f"{allowed[Allowance.TEMPERATURE]:g} K"),
            ("allowance, quality and efficiency", f"{allowed[Allowance.FRACTION]:g}"),
            ("allowance, u, h, s", f"{100 * allowed[Allowance.PROPERTY_CHANGE]:g} % of their change"),
            (
                "allowance, energies",
                f"{100 * allowed[Allowance.ENERGY]:g} % of the largest term of the balance",
            ),
            (
                "allowance, entropies",
                f"{100 * allowed[Allowance.ENTROPY]:g} % of the largest term of the balance",
            ),
            ("allowance, other quantities", f"{100 * allowed[Allowance.VALUE]:g} % of the value"),
            ("coverage factor k", f"{self.coverage_factor:g}"),
            ("digits of inputs", self.input_digits),
            ("meaning of ±", self.plus_minus),
            ("work convention where none is stated", self.work_convention or "none: a query"),
        )
