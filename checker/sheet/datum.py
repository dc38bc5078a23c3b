"""Where u, h and s are zero: the offset between the originator's values and the model's own.

Equations of state leave the zero of u and s open. Only a datum that the package declares, the one that all
water tables share, or one of a fixed list of named reference states is ever used; nothing is fitted freely.
"""

from __future__ import annotations

from collections.abc import Iterator
from dataclasses import dataclass
from typing import Final

from checker.outcomes import NotEvaluable
from checker.submission import Datum
from checker.substances.interface import PropertyState, Substance
from checker.substances.melting_body import Melting


@dataclass(frozen=True, slots=True)
class Offset:
    """Stated value − program value: ``energy`` for u and h [J/kg], ``entropy`` [J/(kg·K)]; ``name`` for the report."""

    energy: float
    entropy: float
    name: str


@dataclass(frozen=True, slots=True)
class _Reference:
    """A named reference state: where it is, and the h and s it sets there (None: u is set instead of h)."""

    name: str
    known: tuple[tuple[str, float], ...]
    entropy: float
    enthalpy: float | None = None
    internal_energy: float | None = None


CELSIUS_ZERO: Final = 273.15
ATMOSPHERE: Final = 101325.0

REFERENCES: Final[tuple[_Reference, ...]] = (
    _Reference(
        "IIR (h = 200 kJ/kg, s = 1 kJ/(kg·K), saturated liquid at 0 °C)",
        (("temperature", CELSIUS_ZERO), ("quality", 0.0)),
        1000.0,
        enthalpy=200e3,
    ),
    _Reference(
        "ASHRAE (h = 0, s = 0, saturated liquid at −40 °C)",
        (("temperature", 233.15), ("quality", 0.0)),
        0.0,
        enthalpy=0.0,
    ),
    _Reference(
        "normal boiling point (h = 0, s = 0, saturated liquid at 1 atm)",
        (("pressure", ATMOSPHERE), ("quality", 0.0)),
        0.0,
        enthalpy=0.0,
    ),
    _Reference(
        "saturated liquid at 0 °C (h = 0, s = 0)",
        (("temperature", CELSIUS_ZERO), ("quality", 0.0)),
        0.0,
        enthalpy=0.0,
    ),
    _Reference(
        "0 °C and 1 atm (h = 0, s = 0)",
        (("temperature", CELSIUS_ZERO), ("pressure", ATMOSPHERE)),
        0.0,
        enthalpy=0.0,
    ),
    _Reference(
        "25 °C and 1 atm (h = 0, s = 0)",
        (("temperature", 298.15), ("pressure", ATMOSPHERE)),
        0.0,
        enthalpy=0.0,
    ),
    _Reference(
        "0 °C (u = 0, s = 0)",
        (("temperature", CELSIUS_ZERO), ("pressure", ATMOSPHERE)),
        0.0,
        internal_energy=0.0,
    ),
)
"""Reference states in use (IIR, ASHRAE and normal boiling point as named by the equation-of-state literature)."""

OWN: Final = Offset(0.0, 0.0, "the model's own datum")


def declared_offset(substance: Substance | None, datum: Datum | None, shared: bool) -> Offset | None:
    """Return the offset that follows from a declared datum, or from tables that share one (water)."""
    if substance is None:
        return None
    if datum is None:
        return Offset(0.0, 0.0, "u = 0, s = 0, saturated liquid at the triple point") if shared else None
    known = {"temperature": datum.temperature}
    if datum.quality is not None:
        known["quality"] = datum.quality
    elif datum.pressure is not None:
        known["pressure"] = datum.pressure
    try:
        there = substance.state(known)
    except NotEvaluable:
        return None
    names = set(datum.zero)
    energy = there.specific_internal_energy
    if names & {"h", "specific_enthalpy", "enthalpy"} and there.specific_enthalpy is not None:
        energy = there.specific_enthalpy
    return Offset(-energy, -there.specific_entropy, "the declared datum")


def named_offsets(substance: Substance) -> Iterator[Offset]:
    """Yield the offsets of the model's own datum and of the named reference states that the substance has."""
    yield OWN
    if isinstance(substance, Melting):
        melted = substance.state({"melted_fraction": 1.0})
        yield Offset(
            -melted.specific_internal_energy,
            -melted.specific_entropy,
            "all melted, at the melting temperature (u = 0, s = 0)",
        )
    absolute = _absolute_zero_offset(substance)
    if absolute is not None:
        yield absolute
    for reference in REFERENCES:
        try:
            there = substance.state(dict(reference.known))
        except NotEvaluable:
            continue
        offset = _offset_at(reference, there)
        if offset is not None:
            yield offset


def _offset_at(reference: _Reference, there: PropertyState) -> Offset | None:
    if reference.internal_energy is not None:
        energy = reference.internal_energy - there.specific_internal_energy
    elif there.specific_enthalpy is not None and reference.enthalpy is not None:
        energy = reference.enthalpy - there.specific_enthalpy
    else:
        return None
    return Offset(energy, reference.entropy - there.specific_entropy, reference.name)


def _absolute_zero_offset(substance: Substance) -> Offset | None:
    """Return the offset of u = c_v·T (h = c_p·T) for a model with constant specific heat."""
    if substance.model != "constant specific heat":
        return None
    try:
        known = {"temperature": 300.0, **({} if substance.incompressible else {"pressure": 1e5})}
        there = substance.state(known)
        warmer = substance.state({**known, "temperature": 301.0})
    except NotEvaluable:
        return None
    heat = warmer.specific_internal_energy - there.specific_internal_energy
    return Offset(heat * 300.0 - there.specific_internal_energy, 0.0, "0 K (u = c_v·T)")
