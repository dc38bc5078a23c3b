"""What fixes a state of a body that melts: temperature alone does not, where it melts at one temperature."""

from __future__ import annotations

from dataclasses import dataclass
from typing import Final

from checker.sheet.keys import state_key
from checker.submission import Record, Role, Statement
from checker.substances.interface import Phase, Substance
from checker.substances.melting_body import Melting

FRACTION: Final = "melted_fraction"
UNTOLD: Final = "does not tell how much is melted"
"""Words of the reason why a state at the melting temperature is not determined."""


@dataclass(frozen=True, slots=True)
class MeltingState:
    """How a body that melts can be found in a state.

    ``stated_tells``: a temperature among the inputs fixes the state; not where its digits reach the one melting
    temperature and no phase is stated, nor beside a melted fraction between 0 and 1, which fixes it by itself.
    ``found_tells``: so does a temperature that a path or another body gives; not where the body may be melting.
    """

    stated_tells: bool
    found_tells: bool


def melting_state(
    record: Record, state: str, body: str, substance: Substance | None, phase: Phase | None
) -> MeltingState | None:
    """Return how a body that melts can be found in a state, or None for a body of another model."""
    if not isinstance(substance, Melting):
        return None
    fraction, temperature = (_input(record, state, body, name) for name in (FRACTION, "temperature"))
    partly = fraction is not None and 0.0 < fraction.value < 1.0
    at_melting = (
        phase is None
        and temperature is not None
        and substance.crosses_saturation(temperature.value, temperature.quantity.half_width, 0.0, 0.0)
    )
    return MeltingState(not (partly or at_melting), phase is not None or not substance.sharp)


def _input(record: Record, state: str, body: str, name: str) -> Statement | None:
    return next(iter(record.stated(state_key(state, body, name), Role.INPUT)), None)
