"""Stated composition of a mixture: fractions by substance, checked and brought to fractions of amount and mass."""

from __future__ import annotations

import math
from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.names import Fluid, fluid_of

SUM_TOLERANCE: Final = 0.002
"""By how much fractions may miss 1: what three digits of each leave (chosen). They are scaled to 1."""
MOST_COMPONENTS: Final = 40
_BASES: Final = ("mole", "mass")


@dataclass(frozen=True, slots=True)
class Component:
    """A fluid of the table with its fractions of the amount and of the mass of a mixture. [1]"""

    fluid: Fluid
    mole_fraction: float
    mass_fraction: float


@dataclass(frozen=True, slots=True)
class Composition:
    """Components in the order of their library names, so that the order in which they are stated does not matter."""

    components: tuple[Component, ...]

    @property
    def molar_mass(self) -> float:
        """M = Σ y·M of the components. [kg/mol]"""
        return math.fsum(one.mole_fraction * one.fluid.molar_mass for one in self.components)

    def __str__(self) -> str:
        return ", ".join(f"{one.fluid.name} {one.mole_fraction:.4g}" for one in self.components)


def read_composition(fractions: tuple[tuple[str, float], ...], basis: str) -> Composition:
    """Return a composition from stated fractions.

    Parameters
    ----------
    fractions : tuple of (str, float)
        Substances with their fractions. [1]
    basis : str
        ``mole`` or ``mass``: what they are fractions of.

    Raises
    ------
    NotEvaluable
        A component is not known, a fraction is negative, or the fractions do not sum to 1 within 0.002.
    """
    if basis not in _BASES:
        raise NotEvaluable(f"no basis of fractions is called {basis[:40]!r}", "not-supported")
    if len(fractions) > MOST_COMPONENTS:
        raise NotEvaluable(f"a mixture of more than {MOST_COMPONENTS} components", "not-supported")
    shares: dict[Fluid, float] = {}
    for name, fraction in fractions:
        if not (math.isfinite(fraction) and fraction >= 0.0):
            raise NotEvaluable(f"the fraction of {name[:40]} is {fraction:.6g}, not between 0 and 1")
        fluid = _component(name)
        shares[fluid] = shares.get(fluid, 0.0) + fraction
    total = math.fsum(shares.values())
    if abs(total - 1.0) > SUM_TOLERANCE:
        raise NotEvaluable(f"the fractions of the composition sum to {total:.6g}, not to 1")
    return _ordered({fluid: share for fluid, share in shares.items() if share > 0.0}, basis)


def _component(name: str) -> Fluid:
    try:
        return fluid_of(name)
    except NotEvaluable as outcome:
        raise NotEvaluable(f"component of the mixture: {outcome.reason}", outcome.kind) from None


def _ordered(shares: Mapping[Fluid, float], basis: str) -> Composition:
    amounts = {f: share if basis == "mole" else share / f.molar_mass for f, share in shares.items()}
    total = math.fsum(amounts.values())
    mass = math.fsum(amount * fluid.molar_mass for fluid, amount in amounts.items())
    return Composition(
        tuple(
            Component(fluid, amounts[fluid] / total, amounts[fluid] * fluid.molar_mass / mass)
            for fluid in sorted(amounts, key=lambda fluid: fluid.library)
        )
    )


def with_molar_mass(
    constants: Mapping[str, float], composition: Composition, universal: float, tolerance: float
) -> dict[str, float]:
    """Return stated constants of a gas with the molar mass of its composition, where none is stated.

    Raises
    ------
    NotEvaluable
        A stated gas constant or molar mass contradicts the composition by more than the relative tolerance.
    """
    expected = {"molar_mass": composition.molar_mass, "gas_constant": universal / composition.molar_mass}
    for name, value in expected.items():
        stated = constants.get(name, value)
        if abs(stated - value) > tolerance * value:
            raise NotEvaluable(
                f"the stated {name.replace('_', ' ')} {stated:.6g} contradicts the composition, which gives {value:.6g}"
            )
    liquid = {"density", "specific_volume"} & set(constants)
    return dict(constants) if liquid else {"molar_mass": composition.molar_mass, **constants}
