"""Boundary work of the declared paths against closed forms and quadrature."""

import math

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.integrate import quad

from checker.sheet.paths import PATHS, isothermal_work, linear_curve, polytropic_curve, polytropic_work
from checker.substances.interface import PropertyState
from checker.vocabulary import PATH_KINDS

R = 287.0
POSITIVE = st.floats(0.1, 10.0)


def state(pressure: float, volume: float) -> PropertyState:
    """Return a state of which only p and v matter here."""
    return PropertyState(300.0, pressure, volume, 0.0, pressure * volume, 0.0)


def test_every_path_word_of_the_format_has_a_meaning():
    """The table of paths and the vocabulary list the same kinds, in the same order."""
    assert tuple(PATHS) == PATH_KINDS


@given(POSITIVE, POSITIVE, POSITIVE, st.floats(-3.0, 3.0))
def test_polytropic_work_is_the_integral_of_p_dv(p1, v1, ratio, exponent):
    """W = ∫ p₁ (v₁/v)ⁿ dv, by quadrature that shares no code with the closed form."""
    v2 = v1 * ratio
    curve = polytropic_curve(state(p1, v1), {"exponent": exponent})
    expected, _ = quad(curve, v1, v2)
    found = polytropic_work(1.0, p1, v1, curve(v2), v2, exponent)
    assert found == pytest.approx(expected, rel=1e-6, abs=1e-9)


def test_polytropic_work_with_exponent_one_is_logarithmic():
    """N = 1: W = p₁v₁ ln(v₂/v₁)."""
    assert polytropic_work(2.0, 3e5, 0.1, 1.5e5, 0.2, 1.0) == pytest.approx(2 * 3e4 * math.log(2))


def test_polytropic_work_is_continuous_at_exponent_one():
    """Just beside n = 1 the closed form meets the logarithm."""
    beside = polytropic_work(1.0, 1e5, 1.0, 1e5 * 0.5 ** (1 + 1e-6), 2.0, 1 + 1e-6)
    assert beside == pytest.approx(polytropic_work(1.0, 1e5, 1.0, 5e4, 2.0, 1.0), rel=1e-6)


def test_isothermal_work_of_an_ideal_gas_is_mrt_ln_v_ratio():
    """With Δu = 0 and Δs = R ln(v₂/v₁) the Helmholtz form is m R T ln(v₂/v₁)."""
    found = isothermal_work(1.5, 320.0, 0.0, R * math.log(3.0), 0.0, 0.0)
    assert found == pytest.approx(1.5 * R * 320.0 * math.log(3.0))


def test_the_line_may_start_from_its_own_point():
    """A line given by itself does not pass through the state that only touches the spring later."""
    curve = linear_curve(state(1e5, 1.0), {"slope": 2e5, "line_pressure": 3e5, "line_volume": 2.0})
    assert curve(2.5) == pytest.approx(4e5)


@given(POSITIVE, POSITIVE, POSITIVE, POSITIVE)
def test_work_of_every_path_scales_with_mass(p1, v1, p2, v2):
    """Twice the mass does twice the work along the same states."""
    values = {"p1": p1, "v1": v1, "p2": p2, "v2": v2, "t1": 300.0, "s1": 1.0, "s2": 2.0, "u1": 3.0, "u2": 4.0,
              "exponent": 1.3, "external_pressure": 2.0}  # fmt: skip
    counted = 0
    for path in PATHS.values():
        if path.work is None:
            continue
        one, two = (
            path.work.function(*[mass if need == "mass" else values[need] for need in path.work.needs])
            for mass in (1.0, 2.0)
        )
        assert two == pytest.approx(2.0 * one)
        counted += 1
    assert counted == 8


def test_paths_that_hold_a_property_name_a_state_property():
    """``holds`` is always one of the properties by which a state can be found."""
    from checker.sheet.states import SYMBOLS

    assert {path.holds for path in PATHS.values() if path.holds} <= set(SYMBOLS)
