"""Ideal gases with temperature-dependent heat capacity."""

from __future__ import annotations

import itertools
import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.integrate import quad

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.coolprop import HELMHOLTZ, library_of
from checker.substances.ideal_gas import IdealGas
from checker.substances.names import all_fluids, fluid_of
from checker.substances.properties import ORDER, QUALITY
from checker.substances.real_fluid import real_fluid

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S, X = "specific_internal_energy", "specific_enthalpy", "specific_entropy", "quality"
DEPENDENT = {frozenset(pair) for pair in itertools.combinations((T, U, H), 2)}


@settings(max_examples=80, deadline=None, derandomize=True)
@given(
    name=st.sampled_from(["nitrogen", "air", "CO2", "water", "methane", "argon", "R134a"]),
    share=st.floats(0.0, 1.0),
    decades=st.floats(-2.0, 3.0),
)
def test_every_independent_pair_finds_its_state_again(name: str, share: float, decades: float) -> None:
    """Each pair with two independent properties gives the state back; T, u and h are not independent."""
    gas = IdealGas(fluid_of(name))
    span = gas.valid_range
    temperature = span.temperature_min + share * (span.temperature_max - span.temperature_min)
    state = gas.state({T: temperature, P: 1e5 * 10.0**decades})
    checked = 0
    for pair in itertools.combinations(ORDER[:-1], 2):
        known = {prop: getattr(state, prop) for prop in pair}
        if frozenset(pair) in DEPENDENT:
            with pytest.raises(NotEvaluable) as refusal:
                gas.state(known)
            assert refusal.value.kind == "ill-conditioned"
            assert "not independent" in refusal.value.reason
        else:
            (found,) = gas.states(known)
            assert found.temperature == pytest.approx(temperature, rel=1e-9)
            assert found.specific_volume == pytest.approx(state.specific_volume, rel=1e-8)
        checked += 1
    assert checked == 15


def test_energy_is_the_integral_of_cv_and_entropy_of_cv_over_t() -> None:
    """Δu = ∫cv dT and Δs = ∫cv/T dT at constant volume, with cv from another derivative of the equation."""
    compared = 0
    for fluid in ("Nitrogen", "CarbonDioxide", "Water", "R134a", "Air"):
        gas = IdealGas(fluid_of(fluid))
        library = library_of(HELMHOLTZ, fluid)
        first, last = (gas.state({T: t, V: 1.0}) for t in (300.0, 440.0))
        energy, _ = quad(lambda t, lib=library: lib.ideal_part(t)[2], 300.0, 440.0, epsrel=1e-12)
        entropy, _ = quad(lambda t, lib=library: lib.ideal_part(t)[2] / t, 300.0, 440.0, epsrel=1e-12)
        change = last.specific_internal_energy - first.specific_internal_energy
        assert change == pytest.approx(energy, rel=1e-10)
        assert last.specific_entropy - first.specific_entropy == pytest.approx(entropy, rel=1e-10)
        compared += 1
    assert compared == 5


def test_it_is_the_real_gas_at_low_pressure() -> None:
    """At 1 Pa real and ideal gas are the same, datum included."""
    compared = 0
    for name in ("nitrogen", "air", "carbon dioxide", "R134a", "ammonia"):
        ideal = make_substance(name, "ideal gas", {}).state({T: 350.0, P: 1.0})
        real = real_fluid(name).state({T: 350.0, P: 1.0})
        assert ideal.specific_internal_energy == pytest.approx(real.specific_internal_energy, abs=0.05)
        assert ideal.specific_entropy == pytest.approx(real.specific_entropy, abs=1e-3)
        compared += 1
    assert compared == 5


def test_isothermal_and_isobaric_entropy_have_closed_forms() -> None:
    """Along an isotherm Δs = R ln(v₂/v₁); h − u = p v = R T everywhere."""
    gas = make_substance("nitrogen", "ideal gas", {})
    one, two = gas.state({T: 300.0, V: 0.1}), gas.state({T: 300.0, V: 0.4})
    constant = gas.gas_constant or 0.0
    assert two.specific_entropy - one.specific_entropy == pytest.approx(constant * math.log(4.0), rel=1e-12)
    for state in (one, two):
        product = (state.pressure or 0.0) * (state.specific_volume or 0.0)
        assert product == pytest.approx(constant * 300.0, rel=1e-14)
        assert (state.specific_enthalpy or 0.0) - state.specific_internal_energy == pytest.approx(
            product, rel=1e-9
        )


def test_energy_and_entropy_rise_with_temperature_for_every_fluid() -> None:
    """The inverse needs it: u(T) and s(T) rise over the whole range of all 136 ideal parts."""
    checked = 0
    for fluid in all_fluids():
        gas = IdealGas(fluid)
        span = gas.valid_range
        temperatures = [
            span.temperature_min + share / 20.0 * (span.temperature_max - span.temperature_min)
            for share in range(21)
        ]
        states = [gas.state({T: temperature, V: 1.0}) for temperature in temperatures]
        for low, high in itertools.pairwise(states):
            assert high.specific_internal_energy > low.specific_internal_energy, fluid.name
            assert high.specific_entropy > low.specific_entropy, fluid.name
            checked += 1
    assert checked == 136 * 20


@pytest.mark.parametrize(
    ("known", "kind"),
    [
        ({T: 5000.0, P: 1e5}, "outside-range"),
        ({T: 50.0, P: 1e5}, "outside-range"),
        ({P: 1e5, U: 1e9}, "outside-range"),
        ({V: 1.0, S: -1e9}, "outside-range"),
        ({P: 1e5, V: 1e9}, "outside-range"),
        ({T: 300.0, S: 1e9}, "no-solution"),
        ({T: 300.0, QUALITY: 0.5}, "not-supported"),
        ({T: 300.0}, "missing"),
        ({T: float("nan"), P: 1e5}, "no-solution"),
    ],
)
def test_what_has_no_state_says_so(known: dict[str, float], kind: str) -> None:
    """Outside the range, without phases, and junk are told apart."""
    with pytest.raises(NotEvaluable) as refusal:
        make_substance("nitrogen", "ideal gas", {}).state(known)
    assert refusal.value.kind == kind


def test_it_does_not_condense() -> None:
    """An ideal gas has no saturation; vapour of water is a gas at −10 °C."""
    steam = make_substance("water", "ideal gas", {})
    assert not steam.crosses_saturation(373.15, 1.0, 101325.0, 1000.0)
    with pytest.raises(NotEvaluable):
        steam.saturation({T: 373.15})
    assert steam.state({T: 263.15, P: 200.0}).phase is None
    assert steam.critical_point is not None
    assert steam.critical_point[0] == pytest.approx(647.096)
