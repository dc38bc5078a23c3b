"""Going along a path: to a volume, to a pressure, until a property or a total is reached; against closed forms."""

from __future__ import annotations

import math

import pytest

from checker.outcomes import NotEvaluable
from checker.sheet.along import Along
from checker.sheet.paths import PATHS
from checker.substances.interface import PropertyState, Substance
from tests.checker.cases import case, gas_bottle

CV, R = 3116.0, 2077.0
MASS = 0.1


@pytest.fixture(scope="module")
def helium() -> Substance:
    """Return helium of constant specific heats."""
    (own,) = case(gas_bottle()).plan.substances.values()
    return own


@pytest.fixture(scope="module")
def start(helium: Substance) -> PropertyState:
    """Return it at 300 K and 500 kPa."""
    return helium.state({"temperature": 300.0, "pressure": 5e5})


def along(helium: Substance, kind: str, **parameters: float) -> Along:
    """Return a path of helium."""
    return Along(helium, PATHS[kind], parameters)


def test_to_a_volume(helium: Substance, start: PropertyState):
    """Twice the volume is twice the temperature at one pressure, half the pressure at one temperature."""
    volume = 2.0 * (start.specific_volume or 0.0)
    assert along(helium, "constant pressure").at_volume(start, volume).temperature == pytest.approx(600.0)
    assert along(helium, "isothermal").at_volume(start, volume).pressure == pytest.approx(2.5e5)
    cooled = along(helium, "polytropic", exponent=1.2).at_volume(start, volume)
    assert cooled.temperature == pytest.approx(300.0 * 2.0**-0.2)


def test_to_a_pressure(helium: Substance, start: PropertyState):
    """In a rigid vessel temperature and pressure rise alike."""
    found = along(helium, "constant volume").at_pressure(start, 8e5)
    assert found.temperature == pytest.approx(480.0)
    assert found.specific_volume == start.specific_volume


@pytest.mark.parametrize(
    ("kind", "heat", "end"),
    [
        ("constant volume", 31.16e3, 400.0),
        ("constant volume", -15.58e3, 250.0),
        ("constant pressure", 51.93e3, 400.0),
        ("constant pressure", -51.93e3, 200.0),
    ],
)
def test_until_a_heat(helium: Substance, start: PropertyState, kind: str, heat: float, end: float):
    """m·c·ΔT is the heat, c_v in a rigid vessel and c_p at one pressure."""
    found = along(helium, kind).until(start, "heat", heat, MASS)
    assert found.temperature == pytest.approx(end, rel=1e-10)


def test_until_a_heat_or_a_work_at_one_temperature(helium: Substance, start: PropertyState):
    """Heat and work are both m·R·T·ln(v₂/v₁)."""
    way, total = along(helium, "isothermal"), MASS * R * 300.0 * math.log(1.5)
    for target in ("heat", "work"):
        found = way.until(start, target, total, MASS)
        assert (found.specific_volume or 0.0) / (start.specific_volume or 1.0) == pytest.approx(1.5, rel=1e-8)


def test_until_a_property(helium: Substance, start: PropertyState):
    """A last temperature lies where the curve has it."""
    way = along(helium, "polytropic", exponent=1.2)
    found = way.until(start, "temperature", 270.0, MASS)
    assert (found.pressure or 0.0) == pytest.approx(5e5 * 0.9**6.0, rel=1e-8)
    assert along(helium, "isentropic").until(start, "pressure", 2.5e5, MASS).temperature == pytest.approx(
        300.0 * 0.5 ** (R / (CV + R)), rel=1e-8
    )


def test_the_work_between_two_states(helium: Substance, start: PropertyState):
    """p·Δv at one pressure."""
    way = along(helium, "constant pressure")
    last = way.at_volume(start, 2.0 * (start.specific_volume or 0.0))
    assert way.work(start, last) == pytest.approx(R * 300.0)


def test_what_a_path_does_not_tell_is_said(helium: Substance, start: PropertyState):
    """A property that stands still, a volume in a rigid vessel, and a path without a work are not evaluable."""
    rigid = along(helium, "constant volume")
    with pytest.raises(NotEvaluable, match="specific volume does not change"):
        rigid.until(start, "specific_volume", 1.0, MASS)
    with pytest.raises(NotEvaluable, match="volume does not change"):
        rigid.at_volume(start, 1.0)
    with pytest.raises(NotEvaluable, match="does not tell its work"):
        along(helium, "end states only").work(start, start)
