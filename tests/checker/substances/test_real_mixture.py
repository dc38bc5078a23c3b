"""Real gas mixtures by the multi-fluid model, and what is refused."""

from __future__ import annotations

import itertools

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import Substance, make_substance
from checker.substances.properties import ORDER

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S = "specific_internal_energy", "specific_enthalpy", "specific_entropy"
NATURAL_GAS = (("methane", 0.88), ("ethane", 0.06), ("nitrogen", 0.04), ("CO2", 0.02))
HARDLY = {frozenset(pair) for pair in itertools.combinations((T, U, H), 2)}


def mixture(composition: tuple[tuple[str, float], ...] = NATURAL_GAS):
    """Return a real mixture."""
    return make_substance("natural gas", "real fluid", {}, composition=composition)


@settings(max_examples=25, deadline=None)
@given(temperature=st.floats(250.0, 600.0), pressure=st.floats(1e4, 1.2e7))
def test_every_independent_pair_finds_its_state_again(temperature: float, pressure: float) -> None:
    """Each pair of two independent properties gives the state back."""
    gas = mixture()
    state = gas.state({T: temperature, P: pressure})
    assert state.pressure == pytest.approx(pressure, rel=1e-9)
    for pair in itertools.combinations(ORDER[:-1], 2):
        known = {name: getattr(state, name) for name in pair}
        if frozenset(pair) in HARDLY:
            with pytest.raises(NotEvaluable, match="hardly independent"):
                gas.state(known)
        else:
            found = gas.state(known)
            assert found.temperature == pytest.approx(temperature, rel=1e-8), pair
            assert found.specific_volume == pytest.approx(state.specific_volume, rel=1e-7), pair


@settings(max_examples=25, deadline=None)
@given(temperature=st.floats(260.0, 600.0), pressure=st.floats(1e4, 1.2e7))
def test_energy_entropy_and_pressure_belong_together(temperature: float, pressure: float) -> None:
    """T ds = du at constant volume, and T ds = du + p dv at constant temperature."""
    gas = mixture()
    volume = gas.state({T: temperature, P: pressure}).specific_volume
    low, high = (gas.state({T: temperature + step, V: volume}) for step in (-0.02, 0.02))
    assert high.specific_internal_energy - low.specific_internal_energy == pytest.approx(
        temperature * (high.specific_entropy - low.specific_entropy), rel=1e-5
    )
    dense, thin = (gas.state({T: temperature, V: volume * part}) for part in (1.0 - 1e-4, 1.0 + 1e-4))
    work = 0.5 * (dense.pressure + thin.pressure) * (thin.specific_volume - dense.specific_volume)
    heat = temperature * (thin.specific_entropy - dense.specific_entropy)
    assert thin.specific_internal_energy - dense.specific_internal_energy == pytest.approx(
        heat - work, abs=1e-5 * work
    )


def test_at_low_density_it_is_the_ideal_mixture() -> None:
    """Energy, entropy and volume tend to those of the mixture of ideal gases, on the same datum."""
    ideal = make_substance("natural gas", "ideal gas", {}, composition=NATURAL_GAS)
    known = {T: 320.0, P: 10.0}
    real, limit = mixture().state(known), ideal.state(known)
    assert real.specific_volume == pytest.approx(limit.specific_volume, rel=1e-5)
    assert real.specific_internal_energy == pytest.approx(limit.specific_internal_energy, rel=1e-5)
    assert real.specific_entropy == pytest.approx(limit.specific_entropy, rel=1e-5)


@pytest.mark.parametrize("name", ["methane", "nitrogen", "CO2"])
def test_a_mixture_of_one_component_is_that_component(name: str) -> None:
    """A mixture of one has the properties of the real fluid, on its datum."""
    known = {T: 350.0, P: 5e6}
    one, pure = mixture(((name, 1.0),)).state(known), make_substance(name, "real fluid", {}).state(known)
    for prop in (V, U, H, S):
        assert getattr(one, prop) == pytest.approx(getattr(pure, prop), rel=1e-7)


def test_the_order_of_components_does_not_matter() -> None:
    """A composition written in another order gives the same numbers."""
    known = {T: 300.0, P: 5e6}
    assert len({mixture(order).state(known) for order in itertools.permutations(NATURAL_GAS)}) == 1


@pytest.mark.parametrize(
    ("composition", "words"),
    [
        ((("methane", 0.5), ("R134a", 0.5)), "no published binary parameters for Methane with R134a"),
        ((("air", 0.5), ("CO2", 0.5)), "Air is itself a mixture"),
    ],
)
def test_a_mixture_without_trusted_parameters_is_refused(
    composition: tuple[tuple[str, float], ...], words: str
) -> None:
    """The pair without published parameters is named."""
    with pytest.raises(NotEvaluable, match=words) as refusal:
        mixture(composition)
    assert refusal.value.kind == "not-supported"


def test_a_state_near_the_two_phase_region_is_refused() -> None:
    """Propane and butane at 20 °C and 5 bar may condense, and the reason says so."""
    gas = mixture((("propane", 0.5), ("n-butane", 0.5)))
    assert gas.state({T: 293.15, P: 1.5e5}).specific_volume > 0.0
    with pytest.raises(NotEvaluable, match="two-phase region is near") as refusal:
        gas.state({T: 293.15, P: 5e5})
    assert refusal.value.kind == "outside-range"


def test_beyond_the_range_of_the_mixture_model_it_is_refused() -> None:
    """Neither hotter nor at higher pressure than the mixture model holds."""
    for known in ({T: 900.0, P: 1e6}, {T: 400.0, P: 5e7}):
        with pytest.raises(NotEvaluable) as refusal:
            mixture().state(known)
        assert refusal.value.kind == "outside-range"


def test_the_density_of_a_liquid_is_never_taken_for_gas() -> None:
    """Between gas and liquid, and on the liquid's side, no temperature and volume give a state."""
    gas = mixture((("propane", 0.5), ("n-butane", 0.5)))
    found = [_kind_or_factor(gas, 0.1 * 0.985**step) for step in range(400)]
    factors = [one for one in found if isinstance(one, float)]
    assert all(factor > 0.8 for factor in factors)
    assert found[: len(factors)] == factors
    assert {one for one in found if isinstance(one, str)} == {"outside-range"}
    assert len(found) - len(factors) > 50


def _kind_or_factor(gas: Substance, volume: float) -> str | float:
    """Return Z at 20 °C, or the kind of refusal."""
    try:
        state = gas.state({T: 293.15, V: volume})
    except NotEvaluable as refusal:
        return refusal.kind
    assert state.pressure is not None
    assert gas.gas_constant is not None
    return state.pressure * volume / (gas.gas_constant * 293.15)
