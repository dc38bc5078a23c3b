"""Constant specific heats."""

from __future__ import annotations

import itertools
import math

import pytest

from checker.outcomes import NotEvaluable
from checker.substances.constant_heat import ConstantHeatCondensed, ConstantHeatGas
from checker.substances.interface import PropertyState
from checker.substances.properties import ORDER

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S, X = "specific_internal_energy", "specific_enthalpy", "specific_entropy", "quality"
AIR = ConstantHeatGas("air", 718.0, 287.0)
STEEL = ConstantHeatCondensed("steel", 460.0, 1.0 / 7850.0)


def test_the_gas_follows_its_formulas() -> None:
    """U = cv (T − 273.15 K), h = u + R T, s = cv ln T/T° + R ln v/v°, zero at the datum."""
    zero = AIR.state({T: 273.15, P: 1e5})
    assert (zero.specific_internal_energy, zero.specific_entropy) == (0.0, pytest.approx(0.0, abs=1e-12))
    state = AIR.state({T: 373.15, P: 5e5})
    assert state.specific_volume == pytest.approx(287.0 * 373.15 / 5e5, rel=1e-14)
    assert state.specific_internal_energy == pytest.approx(71800.0, rel=1e-12)
    assert state.specific_enthalpy == pytest.approx(71800.0 + 287.0 * 373.15, rel=1e-12)
    expected = 1005.0 * math.log(373.15 / 273.15) - 287.0 * math.log(5.0)
    assert state.specific_entropy == pytest.approx(expected, rel=1e-12)
    assert state.phase is None


def test_every_independent_pair_of_the_gas_finds_its_state_again() -> None:
    """Twelve of fifteen pairs fix a state; T, u and h depend on each other."""
    state = AIR.state({T: 350.0, P: 3e5})
    found = 0
    for pair in itertools.combinations(ORDER[:-1], 2):
        known = {name: getattr(state, name) for name in pair}
        if set(pair) <= {T, U, H}:
            with pytest.raises(NotEvaluable, match="not independent"):
                AIR.state(known)
            continue
        (again,) = AIR.states(known)
        assert again.temperature == pytest.approx(350.0, rel=1e-12)
        assert again.pressure == pytest.approx(3e5, rel=1e-11)
        found += 1
    assert found == 12


def test_an_isentrope_of_the_gas_is_p_v_to_the_k() -> None:
    """Between two states of one entropy p·v^k is constant, k = cp/cv."""
    one = AIR.state({T: 300.0, P: 1e5})
    two = AIR.state({P: 8e5, S: one.specific_entropy})
    k = AIR.heat_capacity_at_constant_pressure / AIR.heat_capacity
    assert two.temperature == pytest.approx(300.0 * 8.0 ** (1.0 - 1.0 / k), rel=1e-12)
    assert 1e5 * (one.specific_volume or 0.0) ** k == pytest.approx(
        8e5 * (two.specific_volume or 0.0) ** k, rel=1e-11
    )


def test_temperature_alone_fixes_a_solid() -> None:
    """U and s follow from temperature; h only with a pressure and a density."""
    state = STEEL.state({T: 373.15})
    assert state == PropertyState(
        373.15,
        None,
        1.0 / 7850.0,
        pytest.approx(46000.0),
        None,
        pytest.approx(460.0 * math.log(373.15 / 273.15)),
    )
    pressed = STEEL.state({T: 373.15, P: 7.85e6})
    assert pressed.specific_enthalpy == pytest.approx(46000.0 + 1000.0, rel=1e-12)
    assert STEEL.incompressible


@pytest.mark.parametrize("extra", [{}, {P: 2e6}])
def test_every_property_of_a_solid_gives_its_temperature(extra: dict[str, float]) -> None:
    """T, u, s, and h with a pressure, fix the same state; a pressure beside them is kept."""
    state = STEEL.state({T: 500.0, **extra})
    knowns = [{T: 500.0}, {U: state.specific_internal_energy}, {S: state.specific_entropy}]
    if extra:
        knowns.append({H: state.specific_enthalpy or 0.0})
    for known in knowns:
        (again,) = STEEL.states({**known, **extra})
        assert again.temperature == pytest.approx(500.0, rel=1e-13)
        assert again.pressure == extra.get(P)


@pytest.mark.parametrize(
    ("known", "kind"),
    [
        ({T: 300.0, V: 1.0 / 7850.0}, "not-supported"),
        ({V: 1.0 / 7850.0}, "not-supported"),
        ({P: 1e5}, "missing"),
        ({}, "missing"),
        ({T: 300.0, U: 1e4}, "missing"),
        ({H: 1e4}, "missing"),
        ({T: 300.0, X: 0.0}, "not-supported"),
        ({U: -1e9}, "no-solution"),
        ({S: 1e9}, "no-solution"),
        ({T: -5.0}, "no-solution"),
        ({"colour": 1.0}, "missing"),
    ],
)
def test_an_incompressible_model_gives_no_pressure(known: dict[str, float], kind: str) -> None:
    """Volume fixes nothing, and what does not fix a temperature is refused."""
    with pytest.raises(NotEvaluable) as refusal:
        STEEL.state(known)
    assert refusal.value.kind == kind


@pytest.mark.parametrize(
    "known", [{T: 300.0, X: 0.5}, {T: 300.0}, {P: 1e5, S: 1e9}, {V: 1.0, U: -1e9}, {T: 1.0, S: -1e9}]
)
def test_the_gas_refuses_what_it_has_not(known: dict[str, float]) -> None:
    """No quality, no single property, no temperature below zero."""
    with pytest.raises(NotEvaluable):
        AIR.state(known)


def test_neither_has_phases() -> None:
    """No saturation, no range, no critical point; the equations say what they are."""
    for substance in (AIR, STEEL):
        with pytest.raises(NotEvaluable):
            substance.saturation({T: 300.0})
        assert not substance.crosses_saturation(300.0, 1.0, 1e5, 1.0)
        assert substance.critical_point is None
        assert substance.valid_range is None
        assert "constant" in substance.equation
        assert substance.uncertainty.density == 0.0
