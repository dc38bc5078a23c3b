"""Mixtures of ideal gases by their stated composition."""

from __future__ import annotations

import itertools
import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.mixtures import IdealMixture
from checker.substances.properties import ORDER

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S = "specific_internal_energy", "specific_enthalpy", "specific_entropy"
FLUE_GAS = (("nitrogen", 0.72), ("CO2", 0.13), ("water", 0.11), ("oxygen", 0.04))
DEPENDENT = {frozenset(pair) for pair in itertools.combinations((T, U, H), 2)}


def mixture(composition: tuple[tuple[str, float], ...], basis: str = "mole"):
    """Return a mixture as an ideal gas."""
    return make_substance("flue gas", "ideal gas", {}, composition=composition, composition_basis=basis)


@settings(max_examples=40, deadline=None)
@given(share=st.floats(0.0, 1.0), decades=st.floats(-2.0, 3.0))
def test_every_independent_pair_finds_its_state_again(share: float, decades: float) -> None:
    """Each pair of two independent properties gives the state back; T, u and h are not independent."""
    gas = mixture(FLUE_GAS)
    span = gas.valid_range
    temperature = span.temperature_min + share * (span.temperature_max - span.temperature_min)
    state = gas.state({T: temperature, P: 1e5 * 10.0**decades})
    for pair in itertools.combinations(ORDER[:-1], 2):
        known = {name: getattr(state, name) for name in pair}
        if frozenset(pair) in DEPENDENT:
            with pytest.raises(NotEvaluable, match="not independent"):
                gas.state(known)
        else:
            found = gas.state(known)
            assert found.temperature == pytest.approx(temperature, rel=1e-9)
            assert found.specific_volume == pytest.approx(state.specific_volume, rel=1e-8)


@pytest.mark.parametrize("name", ["nitrogen", "water", "methane", "air"])
def test_a_mixture_of_one_component_is_that_component(name: str) -> None:
    """Every property of a mixture of one is that of the pure ideal gas, entropy included."""
    known = {T: 350.0, P: 2e5}
    one, pure = mixture(((name, 1.0),)).state(known), make_substance(name, "ideal gas", {}).state(known)
    for prop in (V, U, H, S):
        assert getattr(one, prop) == pytest.approx(getattr(pure, prop), rel=1e-12)


def test_the_order_of_components_does_not_matter() -> None:
    """A composition written in another order gives the same numbers to the last bit."""
    known = {T: 450.0, P: 3e5}
    states = {mixture(order).state(known) for order in itertools.permutations(FLUE_GAS)}
    assert len(states) == 1


def test_two_names_of_one_fluid_are_one_component() -> None:
    """N2 and nitrogen are added up, so that no entropy of mixing arises between them."""
    known = {T: 450.0, P: 3e5}
    split = mixture((("N2", 0.3), ("nitrogen", 0.2), ("oxygen", 0.5))).state(known)
    assert split == mixture((("nitrogen", 0.5), ("oxygen", 0.5))).state(known)


def test_fractions_of_mass_and_of_amount_describe_the_same_mixture() -> None:
    """Mole fractions turned into mass fractions by hand give the same state."""
    weights = {"nitrogen": 28.0134, "oxygen": 31.9988}
    whole = 0.79 * weights["nitrogen"] + 0.21 * weights["oxygen"]
    by_mass = tuple((n, y * weights[n] / whole) for n, y in (("nitrogen", 0.79), ("oxygen", 0.21)))
    known = {T: 300.0, P: 1e5}
    first = mixture((("nitrogen", 0.79), ("oxygen", 0.21))).state(known)
    second = mixture(by_mass, "mass").state(known)
    assert second.specific_volume == pytest.approx(first.specific_volume, rel=1e-6)
    assert second.specific_entropy == pytest.approx(first.specific_entropy, rel=1e-6)


def test_entropy_of_mixing_is_minus_r_sum_of_y_ln_y() -> None:
    """Mixing pure gases at one T and p adds −R Σ y ln y, the closed form of Gibbs."""
    parts = (("nitrogen", 0.5), ("argon", 0.3), ("helium", 0.2))
    known = {T: 300.0, P: 1e5}
    whole = mixture(parts)
    mass = {name: make_substance(name, "ideal gas", {}).molar_mass for name, _ in parts}
    total = math.fsum(y * mass[name] for name, y in parts)
    apart = math.fsum(
        y * mass[name] / total * make_substance(name, "ideal gas", {}).state(known).specific_entropy
        for name, y in parts
    )
    closed = -8.314462618 / total * math.fsum(y * math.log(y) for _, y in parts)
    assert whole.state(known).specific_entropy - apart == pytest.approx(closed, rel=2e-5)


@settings(max_examples=40, deadline=None)
@given(temperature=st.floats(280.0, 1200.0), pressure=st.floats(1e3, 1e7))
def test_energy_and_entropy_belong_together(temperature: float, pressure: float) -> None:
    """At constant volume du = T ds."""
    gas = mixture(FLUE_GAS)
    volume = gas.state({T: temperature, P: pressure}).specific_volume
    low, high = (gas.state({T: temperature + step, V: volume}) for step in (-0.02, 0.02))
    energy = high.specific_internal_energy - low.specific_internal_energy
    entropy = high.specific_entropy - low.specific_entropy
    assert energy == pytest.approx(temperature * entropy, rel=1e-6)


@pytest.mark.parametrize(
    ("composition", "words"),
    [
        ((("nitrogen", 0.79), ("oxygen", 0.20)), "sum to 0.99"),
        ((("nitrogen", -0.5), ("oxygen", 1.5)), "fraction of nitrogen"),
        ((("nitrogn", 0.5), ("oxygen", 0.5)), "'nitrogn'.*nearest known: Nitrogen"),
        ((("nitrogen", math.nan), ("oxygen", 0.5)), "fraction of nitrogen"),
    ],
)
@pytest.mark.parametrize("model", ["ideal gas", "real fluid"])
def test_a_composition_that_cannot_be_used_says_why(
    composition: tuple[tuple[str, float], ...], words: str, model: str
) -> None:
    """The sum, the fraction or the component at fault stands in the reason."""
    with pytest.raises(NotEvaluable, match=words):
        make_substance("gas", model, {}, composition=composition)


def test_fractions_may_miss_one_by_their_last_digits() -> None:
    """Three digits of each fraction are enough; the fractions are scaled to 1."""
    known = {T: 300.0, P: 1e5}
    rounded = mixture((("nitrogen", 0.781), ("oxygen", 0.210), ("argon", 0.009), ("CO2", 0.001))).state(known)
    scaled = mixture(
        tuple(
            (n, y / 1.001)
            for n, y in (("nitrogen", 0.781), ("oxygen", 0.21), ("argon", 0.009), ("CO2", 0.001))
        )
    )
    assert rounded.specific_volume == pytest.approx(scaled.state(known).specific_volume, rel=1e-12)


def test_vapour_above_its_saturation_pressure_is_told() -> None:
    """Water in flue gas condenses below its dew point; nothing does above it."""
    gas = mixture(FLUE_GAS)
    assert isinstance(gas, IdealMixture)
    wet = gas.condensing(310.0, 1e5)
    assert wet is not None
    assert wet.fluid.name == "Water"
    assert gas.condensing(330.0, 1e5) is None


class TestConstantSpecificHeat:
    """A composition beside a constant specific heat tells the molar mass, and nothing else."""

    COMPOSITION = (("nitrogen", 0.8), ("CO2", 0.2))

    def make(self, constants: dict[str, float]):
        """Return the gas with stated constants."""
        return make_substance("flue gas", "constant specific heat", constants, composition=self.COMPOSITION)

    def test_the_composition_gives_the_gas_constant(self) -> None:
        """R = R_u/M of the composition, so one specific heat is enough."""
        gas = self.make({"specific_heat_at_constant_volume": 750.0})
        assert gas.gas_constant == pytest.approx(8.314462618 / 0.031212, rel=1e-4)

    def test_without_a_specific_heat_it_is_refused(self) -> None:
        """The composition does not tell a constant specific heat."""
        with pytest.raises(NotEvaluable, match="needs its specific heat"):
            self.make({})

    def test_a_gas_constant_of_another_gas_is_refused(self) -> None:
        """R of air contradicts the composition."""
        with pytest.raises(NotEvaluable, match="contradicts the composition"):
            self.make({"specific_heat_at_constant_volume": 718.0, "gas_constant": 287.0})
