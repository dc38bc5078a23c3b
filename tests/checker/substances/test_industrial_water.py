"""Water by the industrial formulation."""

from __future__ import annotations

import pytest

from checker.outcomes import NotEvaluable
from checker.substances import Phase, make_substance
from checker.substances.real_fluid import real_fluid

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S, X = "specific_internal_energy", "specific_enthalpy", "specific_entropy", "quality"
WATER = make_substance("water", "real fluid", {}, property_source="industrial")
REFERENCE = real_fluid("water")


def test_energies_are_solved_to_the_last_digit() -> None:
    """T from (h, p) agrees with the T that gave h to 1e-9, where the backward equations would be 1e-4 off."""
    compared = 0
    for temperature, pressure in ((300.0, 3e6), (600.0, 1e5), (700.0, 20e6), (1500.0, 1e6)):
        state = WATER.state({T: temperature, P: pressure})
        for name, value in ((H, state.specific_enthalpy), (S, state.specific_entropy)):
            assert WATER.state({P: pressure, name: value or 0.0}).temperature == pytest.approx(
                temperature, rel=1e-9
            )
            compared += 1
    assert compared == 8


@pytest.mark.parametrize(
    ("known", "phase"),
    [
        ({V: 0.5, U: 2.4e6}, Phase.WET_VAPOUR),
        ({V: 0.1, S: 6000.0}, Phase.WET_VAPOUR),
        ({V: 1.7, U: 2.6e6}, Phase.SUPERHEATED_VAPOUR),
        ({P: 1e5, X: 0.4}, Phase.WET_VAPOUR),
        ({T: 700.0, P: 30e6}, Phase.SUPERCRITICAL),
    ],
)
def test_states_agree_with_the_reference_equation(known: dict[str, float], phase: Phase) -> None:
    """The two formulations differ by less than 0.1 % in p, v, u and s away from the critical point."""
    ours, reference = WATER.state(known), REFERENCE.state(known)
    assert ours.phase == reference.phase == phase
    assert ours.temperature == pytest.approx(reference.temperature, rel=2e-4)
    assert ours.pressure == pytest.approx(reference.pressure or 0.0, rel=1.5e-3)
    assert ours.specific_internal_energy == pytest.approx(reference.specific_internal_energy, rel=1e-3)
    assert ours.specific_entropy == pytest.approx(reference.specific_entropy, rel=1e-3)


def test_the_density_maximum_is_seen_here_too() -> None:
    """Water of 999.9 kg/m³ at 1 bar has two temperatures by this formulation as well."""
    assert len(WATER.states({P: 1e5, V: 1.0 / 999.9})) == 2


def test_the_range_is_that_of_the_formulation() -> None:
    """Above 1073.15 K only up to 50 MPa, nothing above 100 MPa or below 273.15 K."""
    assert WATER.state({T: 1500.0, P: 49e6}).temperature == 1500.0
    for known in ({T: 1500.0, P: 60e6}, {T: 300.0, P: 101e6}, {T: 272.0, P: 1e5}, {T: 2300.0, P: 1e5}):
        with pytest.raises(NotEvaluable) as refusal:
            WATER.state(known)
        assert refusal.value.kind in ("outside-range", "no-solution")


def test_saturation_and_its_neighbourhood() -> None:
    """The saturation pressure at 120.21 °C is 2 bar, and T, p across it are seen."""
    liquid, vapour = WATER.saturation({T: 393.36})
    assert liquid.pressure == vapour.pressure == pytest.approx(2e5, rel=1e-3)
    assert WATER.crosses_saturation(393.36, 0.05, 2e5, 500.0)
    assert not WATER.crosses_saturation(393.36, 0.05, 1.9e5, 500.0)
    with pytest.raises(NotEvaluable) as refusal:
        WATER.state({T: 393.36, P: liquid.pressure or 0.0})
    assert refusal.value.kind == "near-saturation"


def test_it_names_its_release() -> None:
    """The report says which formulation was used, and how uncertain it is."""
    assert "IF97" in WATER.equation
    assert WATER.uncertainty.caloric > 0.0
