"""The verification values of the IAPWS industrial formulation 1997 (R7-97(2012))."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

import pytest

from checker.substances import make_substance

pytestmark = pytest.mark.published
WATER = make_substance("water", "real fluid", {}, property_source="industrial")
Meets = Callable[..., bool]
PER_MASS = {
    "specific_enthalpy": 1e3,
    "specific_internal_energy": 1e3,
    "specific_entropy": 1e3,
    "specific_volume": 1.0,
}


def test_regions_1_2_and_5(published: Callable[[str], Any], meets: Meets) -> None:
    """V, h, u and s at the T and p of tables 5, 15 and 42, to every printed digit."""
    compared = 0
    for row in published("iapws-if97")["states"]:
        state = WATER.state(
            {"temperature": float(row["temperature"]), "pressure": 1e6 * float(row["pressure"])}
        )
        for name, factor in PER_MASS.items():
            compared += meets(getattr(state, name) / factor, row[name])
    assert compared == 36


def test_region_3(published: Callable[[str], Any], meets: Meets) -> None:
    """The three states of table 33 by T and p, within the consistency of the backward equation."""
    compared = 0
    table = published("iapws-if97")["dense_states"]
    assert "SR5-05" in table["reason"]
    for row in table["states"]:
        state = WATER.state(
            {"temperature": float(row["temperature"]), "pressure": 1e6 * float(row["pressure"])}
        )
        density = float(row["density"])
        compared += meets(1.0 / (state.specific_volume or 1.0), row["density"], 1e-5 * density)
        compared += meets((state.specific_enthalpy or 0.0) / 1e3, row["specific_enthalpy"], 5e-3)
        compared += meets(state.specific_internal_energy / 1e3, row["specific_internal_energy"], 5e-3)
        compared += meets(state.specific_entropy / 1e3, row["specific_entropy"], 1e-5)
    assert compared == 12


def test_saturation_line(published: Callable[[str], Any], meets: Meets) -> None:
    """Saturation pressures and temperatures of tables 35 and 36."""
    values = published("iapws-if97")
    compared = 0
    for row in values["saturation_pressure"]:
        pressure = WATER.saturation({"temperature": float(row["temperature"])})[0].pressure or 0.0
        compared += meets(pressure / 1e6, row["pressure"])
    for row in values["saturation_temperature"]:
        liquid, _ = WATER.saturation({"pressure": 1e6 * float(row["pressure"])})
        compared += meets(liquid.temperature, row["temperature"])
    assert compared == 6
