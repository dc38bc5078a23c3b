"""How far an ideal model is from the real fluid."""

from __future__ import annotations

import pytest

from checker.outcomes import NotEvaluable
from checker.substances.adequacy import compressibility, compressibility_of, real_fluid_of
from checker.substances.constant_heat import ConstantHeatCondensed


def test_the_real_fluid_behind_a_name() -> None:
    """A known name has a real fluid, an invented one has none."""
    fluid = real_fluid_of("dry air")
    assert fluid is not None
    assert fluid.name == "Air"
    assert real_fluid_of("quench oil 7") is None


def test_compressibility_of_nitrogen() -> None:
    """Z is 1 in a thin gas and well above 1 at 50 MPa; by volume it is the same as by pressure."""
    assert compressibility("N2", 300.0, pressure=1e3) == pytest.approx(1.0, abs=1e-5)
    dense = compressibility("N2", 300.0, pressure=50e6)
    assert dense == pytest.approx(1.365, abs=0.01)
    fluid = real_fluid_of("N2")
    assert fluid is not None
    volume = fluid.state({"temperature": 300.0, "pressure": 50e6}).specific_volume
    assert compressibility("N2", 300.0, volume=volume) == pytest.approx(dense, rel=1e-8)


@pytest.mark.parametrize(
    "arguments", [{}, {"pressure": 1e5, "volume": 1.0}, {"pressure": -1.0}, {"pressure": 1e15}]
)
def test_z_needs_one_state(arguments: dict[str, float]) -> None:
    """Neither, both, or an impossible second property is not evaluable."""
    with pytest.raises(NotEvaluable):
        compressibility("N2", 300.0, **arguments)


def test_z_of_an_unknown_fluid_or_of_a_solid_is_not_evaluable() -> None:
    """A name without a fluid and a state without a pressure have no Z."""
    with pytest.raises(NotEvaluable):
        compressibility("quench oil 7", 300.0, pressure=1e5)
    with pytest.raises(NotEvaluable):
        compressibility_of(ConstantHeatCondensed("steel", 460.0).state({"temperature": 300.0}), 287.0)
