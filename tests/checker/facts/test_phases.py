"""Phases that cannot be told apart within the allowances."""

from __future__ import annotations

from typing import Any

import pytest

from checker.facts.phases import claims_of, possible_phases
from checker.substances.interface import Phase
from tests.checker.cases import case


def _water(**inputs: str) -> dict[str, Any]:
    return {
        "id": "water",
        "bodies": {"water": {"substance": "Water", "model": "real fluid", "inputs": {"mass": "1 kg"}}},
        "states": {"now": {"water": {"inputs": inputs, "results": {"phase": "wet vapour"}}}},
        "processes": [],
    }


@pytest.mark.parametrize(
    ("inputs", "first", "others"),
    [
        ({"temperature": "180 °C", "pressure": "5.000 bar"}, Phase.SUPERHEATED_VAPOUR, set()),
        (
            {"temperature": "152.0 °C", "pressure": "5.000 bar"},
            Phase.SUPERHEATED_VAPOUR,
            {Phase.SATURATED_VAPOUR},
        ),
        (
            {"temperature": "151.7 °C", "pressure": "5.000 bar"},
            Phase.SUBCOOLED_LIQUID,
            {Phase.SATURATED_LIQUID},
        ),
        ({"temperature": "150 °C", "quality": "0.50"}, Phase.WET_VAPOUR, set()),
        ({"temperature": "150 °C", "quality": "0.998"}, Phase.WET_VAPOUR, {Phase.SATURATED_VAPOUR}),
        ({"temperature": "400 °C", "pressure": "100 bar"}, Phase.SUPERHEATED_VAPOUR, {Phase.SUPERCRITICAL}),
        ({"temperature": "100 °C", "pressure": "300 bar"}, Phase.SUBCOOLED_LIQUID, {Phase.SUPERCRITICAL}),
        ({"temperature": "400 °C", "pressure": "300 bar"}, Phase.SUPERCRITICAL, set()),
    ],
)
def test_a_state_has_its_phase_and_those_it_cannot_be_told_from(
    inputs: dict[str, str], first: Phase, others: set[Phase]
) -> None:
    """0.3 K and 0.005 of quality around the saturation line, and one critical coordinate, leave two words open.

    The saturation temperature of water at 5 bar is 151.83 °C (IAPWS R6-95, from memory).
    """
    found = possible_phases(case(_water(**inputs)), "now", "water")
    assert found is not None
    assert found[0] is first
    assert others <= set(found)
    if not others:
        assert found == (first,)


def test_a_claim_knows_where_it_stands() -> None:
    """A phase among the results is placed there."""
    (claim,) = claims_of(case(_water(temperature="150 °C", quality="0.50")), "now", "water")
    assert claim.phase is Phase.WET_VAPOUR
    assert claim.place[-2:] == ("results", "phase")


@pytest.mark.parametrize(
    ("constants", "allowed", "excluded"),
    [
        (
            {"cv": "0.718 kJ/(kg·K)", "gas_constant": "0.287 kJ/(kg·K)"},
            Phase.SUPERHEATED_VAPOUR,
            Phase.WET_VAPOUR,
        ),
        ({"specific_heat": "4.18 kJ/(kg·K)"}, Phase.SUBCOOLED_LIQUID, Phase.SUPERHEATED_VAPOUR),
        ({"specific_heat": "0.46 kJ/(kg·K)"}, Phase.SOLID, Phase.WET_VAPOUR),
    ],
)
def test_a_model_of_one_phase_stands_for_some_phases_only(
    constants: dict[str, str], allowed: Phase, excluded: Phase
) -> None:
    """A gas is no wet vapour, and a liquid or solid of constant volume is no vapour at all."""
    record = _water(temperature="300 K", pressure="1.000 bar")
    record["bodies"]["water"].update(model="constant specific heat", inputs={"mass": "1 kg", **constants})
    found = possible_phases(case(record), "now", "water")
    assert found is not None
    assert allowed in found
    assert excluded not in found
