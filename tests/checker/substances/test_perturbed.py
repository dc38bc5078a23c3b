"""A substance whose properties are off by a factor."""

from __future__ import annotations

import itertools

import pytest

from checker.outcomes import NotEvaluable
from checker.substances import Phase, make_substance
from checker.substances.interface import PropertyState, Substance
from checker.substances.properties import ORDER

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S, X = "specific_internal_energy", "specific_enthalpy", "specific_entropy", "quality"


def moved(name: str, model: str = "real fluid", density: float = 1.01, caloric: float = 0.97) -> Substance:
    """Return a substance with both factors."""
    return make_substance(name, model, {}, density_factor=density, caloric_factor=caloric)


def test_the_factors_act_as_defined() -> None:
    """V = v₀/d, u = c·u₀, s = c·s₀, h = u + p v; T, p, quality and phase are not moved."""
    base = make_substance("water", "real fluid", {})
    known = {T: 450.0, X: 0.3}
    one, two = base.state(known), moved("water").state(known)
    assert two.specific_volume == pytest.approx((one.specific_volume or 0.0) / 1.01, rel=1e-14)
    assert two.specific_internal_energy == pytest.approx(0.97 * one.specific_internal_energy, rel=1e-14)
    assert two.specific_entropy == pytest.approx(0.97 * one.specific_entropy, rel=1e-14)
    product = (two.pressure or 0.0) * (two.specific_volume or 0.0)
    assert two.specific_enthalpy == pytest.approx(two.specific_internal_energy + product, rel=1e-14)
    assert (two.temperature, two.pressure, two.quality, two.phase) == (
        450.0,
        one.pressure,
        0.3,
        Phase.WET_VAPOUR,
    )


def pairs_of(state: PropertyState) -> list[dict[str, float]]:
    """Return the pairs of a state that fix it."""
    values = {name: getattr(state, name) for name in ORDER if getattr(state, name) is not None}
    dependent = [{T, P}] if state.quality is not None else []
    return [
        {one: values[one], two: values[two]}
        for one, two in itertools.combinations(values, 2)
        if {one, two} not in dependent
    ]


@pytest.mark.parametrize(
    ("name", "known"),
    [
        ("water", {T: 300.0, P: 1e6}),
        ("water", {T: 450.0, X: 0.3}),
        ("water", {T: 700.0, P: 5e6}),
        ("R134a", {T: 330.0, P: 8e5}),
        ("nitrogen", {T: 300.0, P: 15e6}),
    ],
)
def test_moved_properties_find_their_state_again(name: str, known: dict[str, float]) -> None:
    """Every pair of moved properties, enthalpy included, gives the moved state back."""
    fluid = moved(name)
    state = fluid.state(known)
    found = 0
    for pair in pairs_of(state):
        if set(pair) == {U, H}:
            continue  # h − u = p v alone cannot carry a factor back through two roots
        states = fluid.states(pair)
        near = min(
            states, key=lambda s: abs((s.specific_volume or 0.0) / (state.specific_volume or 1.0) - 1.0)
        )
        assert near.temperature == pytest.approx(state.temperature, rel=1e-7), pair
        assert near.specific_volume == pytest.approx(state.specific_volume, rel=1e-5), pair
        found += 1
    assert found >= 14


def test_an_ideal_gas_can_be_moved_too() -> None:
    """The factors work on every model, with enthalpy known as well."""
    gas = moved("air", "ideal gas")
    state = gas.state({T: 400.0, P: 1e5})
    assert gas.state({P: 1e5, H: state.specific_enthalpy or 0.0}).temperature == pytest.approx(
        400.0, rel=1e-10
    )
    assert gas.state({P: 1e5, S: state.specific_entropy}).temperature == pytest.approx(400.0, rel=1e-10)


def test_a_solid_can_be_moved_too() -> None:
    """A model without pressure keeps its gaps."""
    steel = make_substance(
        "steel", "constant specific heat", {"specific_heat": 460.0}, density_factor=1.001, caloric_factor=1.02
    )
    state = steel.state({T: 373.15})
    assert state.specific_internal_energy == pytest.approx(46920.0)
    assert (state.specific_volume, state.specific_enthalpy) == (None, None)
    assert steel.incompressible


def test_saturation_is_moved_in_properties_not_in_pressure() -> None:
    """Saturated states keep T and p and move v, u and s; several roots and refusals pass through."""
    fluid = moved("water")
    base = make_substance("water", "real fluid", {})
    liquid, vapour = fluid.saturation({P: 1e5})
    assert liquid.temperature == base.saturation({P: 1e5})[0].temperature
    assert vapour.specific_internal_energy == pytest.approx(
        0.97 * base.saturation({P: 1e5})[1].specific_internal_energy
    )
    assert fluid.crosses_saturation(373.15, 0.5, 1e5, 5e3)
    for known in ({T: 3000.0, P: 1e5}, {P: 1e5, H: 1e9}, {P: 1e5, V: 1.01 / 999.9 / 1.01 / 1.01}):
        with pytest.raises(NotEvaluable):
            fluid.state(known)


def test_the_description_tells_the_factors() -> None:
    """Name and model are the base's; the equation names the factors."""
    fluid = moved("water")
    assert (fluid.name, fluid.model) == ("Water", "real fluid")
    assert "× 1.01" in fluid.equation
    assert "× 0.97" in fluid.equation
    assert fluid.critical_point is not None
    assert fluid.critical_point[2] == pytest.approx(1.0 / 322.0 / 1.01, rel=1e-6)
    assert fluid.valid_range is not None
    assert fluid.molar_mass == pytest.approx(0.018015268)
    assert fluid.gas_constant == pytest.approx(461.518, rel=1e-5)
