"""The verification values of the IAPWS formulation 1995 (R6-95(2018), tables 7 and 8)."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from checker.substances.interface import PropertyState
from checker.substances.real_fluid import real_fluid

pytestmark = pytest.mark.published
WATER = real_fluid("water")
Meets = Callable[..., bool]


def test_single_phase_states(published: Callable[[str], Any], meets: Meets) -> None:
    """Pressure and entropy at the eleven T and density of table 7, to every printed digit."""
    compared = 0
    for row in published("iapws-95")["single_phase"]:
        known = {"temperature": float(row["temperature"]), "specific_volume": 1.0 / float(row["density"])}
        state = WATER.state(known)
        compared += meets((state.pressure or 0.0) / 1e6, row["pressure"])
        compared += meets(state.specific_entropy / 1e3, row["specific_entropy"])
    assert compared == 22


def test_two_phase_states(published: Callable[[str], Any], meets: Meets) -> None:
    """Pressure, densities, enthalpies and entropies at the three temperatures of table 8."""
    compared = 0
    for row in published("iapws-95")["two_phase"]:
        liquid, vapour = WATER.saturation({"temperature": float(row["temperature"])})
        compared += meets((liquid.pressure or 0.0) / 1e6, row["pressure"])
        for state, printed in ((liquid, row["liquid"]), (vapour, row["vapour"])):
            compared += compare_side(state, printed, meets)
    assert compared == 21


def compare_side(state: PropertyState, printed: dict[str, str], meets: Meets) -> int:
    """Compare one saturated state; return how many values were compared."""
    values = {
        "density": 1.0 / (state.specific_volume or 1.0),
        "specific_enthalpy": (state.specific_enthalpy or 0.0) / 1e3,
        "specific_entropy": state.specific_entropy / 1e3,
    }
    return sum(meets(values[name], text) for name, text in printed.items())
