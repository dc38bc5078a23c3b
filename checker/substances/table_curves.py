"""From the columns of a table to u(T) and s(T): linear between the rows, integrated in closed form."""

from __future__ import annotations

import math
from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import lru_cache
from itertools import pairwise
from typing import Final

from checker.outcomes import NotEvaluable
from checker.substances.heat_curve import HeatCurve, Piece
from checker.substances.properties import ENTHALPY
from checker.substances.table_columns import HEAT_AT_PRESSURE, HEATS, Columns

CONTRADICTION: Final = 0.01
"""Part of ΔS by which the stated entropies of a table may differ from ∫du/T over all of it: what rounding and straight
lines between the rows leave (chosen)."""


@dataclass(frozen=True)
class Curves:
    """u(T) and s(T), of a gas at constant volume; two curves, since stated entropies count where there are any."""

    energy: HeatCurve
    entropy: HeatCurve


@lru_cache(maxsize=64)
def curves_of(columns: Columns, gas_constant: float | None) -> Curves:
    """Return the curves of a table.

    Parameters
    ----------
    columns : Columns
        The table. Rows of c integrate to u and s exactly; rows of u or h make the specific heat constant between
        them, so that s = Σ c ln(T₂/T₁). u (of c_p: h) and s are 0 in the first row where the table does not state
        them. Stated entropies are taken as they stand, s linear in ln T between them; they are those of a gas at
        one pressure.
    gas_constant : float or None
        R [J/(kg·K)] of an ideal gas; None for a liquid or solid, where c_p, c_v and c are one, and du = dh at the
        pressure of the table.

    Raises
    ------
    NotEvaluable
        c_p is not above R, or the stated entropies contradict the energies.
    """
    pieces = tuple(_of_heats(columns) if columns.kind in HEATS else _of_energies(columns))
    datum = columns.temperatures[0]
    entropies = tuple(_of_entropies(columns)) if columns.entropies is not None else None
    at_pressure = gas_constant is not None and columns.kind in (HEAT_AT_PRESSURE, ENTHALPY)
    if at_pressure and gas_constant is not None:
        pieces = tuple(_less(piece, gas_constant, datum) for piece in pieces)
    if entropies is not None and gas_constant is not None:
        entropies = tuple(piece.with_heat_added(-gas_constant, datum) for piece in entropies)
    energy = HeatCurve(pieces)
    if entropies is None:
        return Curves(energy, energy)
    entropy = HeatCurve(entropies)
    _refuse_contradiction(energy, entropy)
    return Curves(energy, entropy)


def _less(piece: Piece, gas_constant: float, datum: float) -> Piece:
    """Return the piece of u = h − R·T and of s at constant volume. Raises NotEvaluable where c_p is not above R."""
    reduced = piece.with_heat_added(-gas_constant, datum)
    if min(reduced.heat_at(reduced.low), reduced.heat_at(reduced.high)) <= 0.0:
        raise NotEvaluable(
            f"c_p of the table is not above R = {gas_constant:.6g} J/(kg·K) at {piece.low:.5g} K and up",
            "no-solution",
        )
    return reduced


def _of_heats(columns: Columns) -> Iterator[Piece]:
    energy = entropy = 0.0
    rows = zip(columns.temperatures, columns.caloric, strict=True)
    for (low, heat), (high, following) in pairwise(rows):
        piece = Piece(low, high, low, energy, entropy, heat, (following - heat) / (high - low))
        yield piece
        energy, entropy = piece.energy_at(high), piece.entropy_at(high)


def _of_energies(columns: Columns) -> Iterator[Piece]:
    entropy = 0.0
    rows = zip(columns.temperatures, columns.caloric, strict=True)
    for (low, energy), (high, following) in pairwise(rows):
        piece = Piece(low, high, low, energy, entropy, (following - energy) / (high - low))
        yield piece
        entropy = piece.entropy_at(high)


def _of_entropies(columns: Columns) -> Iterator[Piece]:
    """Yield pieces of which only the entropy counts: it passes through the stated ones."""
    stated: Sequence[float] = columns.entropies or ()
    rows = zip(columns.temperatures, stated, strict=True)
    for (low, entropy), (high, following) in pairwise(rows):
        yield Piece(low, high, low, 0.0, entropy, (following - entropy) / math.log(high / low))


def _refuse_contradiction(energy: HeatCurve, entropy: HeatCurve) -> None:
    """Refuse entropies that are not ∫du/T, over the whole table, or that fall at constant volume."""
    changes = [curve.entropy(curve.high) - curve.entropy(curve.low) for curve in (energy, entropy)]
    if abs(changes[1] - changes[0]) > CONTRADICTION * changes[0]:
        raise NotEvaluable(
            f"the entropies of the table rise by {changes[1]:.6g} J/(kg·K) at constant volume; its energies give "
            f"{changes[0]:.6g} J/(kg·K)",
            "no-solution",
        )
    if any(piece.heat <= 0.0 for piece in entropy.pieces):
        raise NotEvaluable("the entropies of the table fall at constant volume", "no-solution")
