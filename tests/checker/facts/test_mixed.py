"""How far mixtures and moist air are from what they are calculated as."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.adequacy import better_heat, gas_check
from tests.checker.cases import case


def record(substance: str, temperature: str, pressure: str, **body: Any) -> dict[str, Any]:
    """Return a record of a gas in one state."""
    return {
        "id": "vessel",
        "title": "Gas in a vessel",
        "bodies": {
            "gas": {"substance": substance, "model": "ideal gas", "inputs": {"volume": "1.000 m³"}, **body}
        },
        "states": {"now": {"gas": {"inputs": {"temperature": temperature, "pressure": pressure}}}},
        "processes": [],
    }


FLUE_GAS = {"nitrogen": "0.72", "CO2": "0.13", "water": "0.11", "oxygen": "0.04"}
NATURAL_GAS = {"methane": "0.90", "ethane": "0.06", "nitrogen": "0.04"}


def test_water_of_flue_gas_condenses_below_its_dew_point() -> None:
    """At 40 °C and 1 bar the vapour's share of the pressure is above saturation; at 60 °C it is not."""
    cold = gas_check(case(record("flue gas", "40.0 °C", "1.000 bar", composition=FLUE_GAS)), "now", "gas")
    warm = gas_check(case(record("flue gas", "60.0 °C", "1.000 bar", composition=FLUE_GAS)), "now", "gas")
    assert cold is not None
    assert (cold.condensed, cold.component) == (True, "Water")
    assert warm is not None
    assert not warm.condensed


def test_a_dense_mixture_has_the_compressibility_factor_of_the_mixture_model() -> None:
    """Natural gas at 15 °C and 100 bar has Z near 0.8, at 1 bar near 1."""
    dense = gas_check(
        case(record("natural gas", "15.0 °C", "100.0 bar", composition=NATURAL_GAS)), "now", "gas"
    )
    thin = gas_check(
        case(record("natural gas", "15.0 °C", "1.000 bar", composition=NATURAL_GAS)), "now", "gas"
    )
    assert dense is not None
    assert dense.factor == pytest.approx(0.8, abs=0.05)
    assert thin is not None
    assert thin.factor == pytest.approx(1.0, abs=0.003)


def test_a_mixture_without_trusted_parameters_has_no_factor() -> None:
    """Nothing is said of its density, and nothing condenses."""
    composition = {"methane": "0.5", "R134a": "0.5"}
    found = gas_check(case(record("odd gas", "60.0 °C", "1.000 bar", composition=composition)), "now", "gas")
    assert found is not None
    assert (found.factor, found.condensed) == (None, False)


def test_moist_air_is_held_against_real_moist_air_of_the_same_water() -> None:
    """Condensate makes no difference to the comparison: only the gas is idealised."""
    wet = {"inputs": {"volume": "1.000 m³", "water_content": "2.00"}}
    found = gas_check(case(record("moist air", "60.0 °C", "5.000 bar", **wet)), "now", "gas")
    assert found is not None
    assert found.factor == pytest.approx(1.0, abs=0.005)


def test_a_composition_beside_constant_heats_tells_what_condenses() -> None:
    """Flue gas of constant specific heat is held against its own components."""
    stated = record("flue gas", "40.0 °C", "1.000 bar", composition=FLUE_GAS)
    stated["bodies"]["gas"] |= {
        "model": "constant specific heat",
        "inputs": {"volume": "1.000 m³", "cv": "0.780 kJ/(kg·K)"},
    }
    found = gas_check(case(stated), "now", "gas")
    assert found is not None
    assert found.component == "Water"


def test_constant_heats_of_a_mixture_are_held_against_those_of_its_components() -> None:
    """The better model is the mixture of ideal gases with c(T)."""
    stated = record("flue gas", "400.0 °C", "1.000 bar", composition=FLUE_GAS)
    stated["bodies"]["gas"] |= {
        "model": "constant specific heat",
        "inputs": {"volume": "1.000 m³", "cv": "0.780 kJ/(kg·K)"},
    }
    better = better_heat(case(stated), "gas")
    assert better is not None
    assert better.model == "ideal gas"
