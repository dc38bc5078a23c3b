"""How full a closed vessel is, and what its limits say."""

from __future__ import annotations

from typing import Any

import pytest

from checker.case import Case
from checker.facts.fill import (
    filled,
    fluid_of,
    full_at,
    has_limit,
    highest_limit,
    hottest,
    liquid_full,
    pressure_at,
    vapour_space,
)
from checker.facts.twins import REAL, twin
from tests.checker.cases import case


def _vessel(mass: str, hot: str = "40.0 °C", **more: Any) -> Case:
    """Return the case of propane that warms from 15 °C in a closed vessel of 1 m³."""
    record: dict[str, Any] = {
        "id": "vessel",
        "bodies": {
            "propane": {
                "substance": "Propane",
                "model": "real fluid",
                "inputs": {"volume": "1.000 m³", "mass": mass},
            }
        },
        "states": {
            "cold": {"propane": {"inputs": {"temperature": "15.0 °C"}}},
            "hot": {
                "propane": {"inputs": {"temperature": hot}, "results": {"pressure": "1 bar"}},
            },
        },
        "processes": [{"id": "warming", "from": "cold", "to": "hot", "path": "constant volume"}],
        **more,
    }
    return case(record)


def _limits(*bounds: tuple[str, str, str]) -> list[dict[str, str]]:
    return [
        {"id": f"limit-{i}", "quantity": quantity, word: bound, "claim": "met"}
        for i, (quantity, word, bound) in enumerate(bounds)
    ]


def test_half_a_vessel_of_liquid_is_filled_by_half() -> None:
    """The share is v'/v: a volume twice that of the liquid is half full, and nothing is known above T_c."""
    propane = twin("Propane", REAL)
    assert propane is not None
    liquid = propane.saturation({"temperature": 300.0})[0].specific_volume or 0.0
    assert filled(propane, 300.0, 2.0 * liquid) == pytest.approx(0.5, rel=1e-9)
    assert filled(propane, 400.0, liquid) is None


def test_a_vessel_is_full_where_its_liquid_has_its_volume() -> None:
    """Going there and back gives the temperature again; a volume beyond the critical one is never full."""
    propane = twin("Propane", REAL)
    assert propane is not None
    liquid = propane.saturation({"temperature": 320.0})[0].specific_volume or 0.0
    assert full_at(propane, liquid) == pytest.approx(320.0, abs=1e-4)
    assert full_at(propane, 0.01) is None


def test_of_two_temperatures_of_one_density_the_warmer_counts() -> None:
    """Water of 999.9 kg/m³ is a liquid near 1.5 °C and near 6.6 °C: a vessel that warms is full at the latter."""
    water = twin("Water", REAL)
    assert water is not None
    assert 278.0 < (full_at(water, 1.0 / 999.9) or 0.0) < 281.0


def test_a_vessel_that_is_filled_on_the_way_starts_at_its_vapour_pressure() -> None:
    """The rise per kelvin counts from the temperature of the full vessel."""
    found = _vessel("460.0 kg", "60.0 °C")
    warming = hottest(found, "propane")
    assert warming is not None
    full = liquid_full(found, warming)
    propane = fluid_of(found, "propane")
    assert full is not None
    assert propane is not None
    assert full.start == pytest.approx(propane.saturation({"temperature": full.full_at})[0].pressure)
    rise = full.pressure - full.start
    assert full.per_kelvin == pytest.approx(rise / (333.15 - full.full_at), rel=1e-9)
    assert vapour_space(found, "propane") is None


@pytest.mark.parametrize(("mass", "hot"), [("460.0 kg", "40.0 °C"), ("15.00 kg", "60.0 °C")])
def test_a_vessel_with_vapour_is_not_full(mass: str, hot: str) -> None:
    """Below the temperature of the full vessel, and where the liquid evaporates, nothing is built up."""
    found = _vessel(mass, hot)
    warming = hottest(found, "propane")
    assert warming is not None
    assert liquid_full(found, warming) is None


def test_cooling_fills_nothing() -> None:
    """Only a process that warms its body by more than the allowance counts."""
    assert hottest(_vessel("400.0 kg", "0.0 °C"), "propane") is None
    assert hottest(_vessel("400.0 kg", "15.2 °C"), "propane") is None


def test_the_highest_upper_limit_of_a_property_counts() -> None:
    """Lower limits, other properties and other records are left out; this record may be named."""
    pressure = "states/hot/propane/pressure"
    found = _vessel(
        "400.0 kg",
        limits=_limits(
            (pressure, "at_most", "20.0 bar"),
            ("records/vessel/states/cold/propane/pressure", "at_most", "25.0 bar"),
            ("states/hot/propane/temperature", "at_most", "65.0 °C"),
            (pressure, "at_least", "90.0 bar"),
        ),
    )
    bound = highest_limit(found, "propane", "pressure")
    assert bound is not None
    assert (bound[0], bound[1].text) == ("cold", "25.0 bar")
    assert has_limit(found, "hot", "propane", "pressure")
    assert not has_limit(found, "hot", "propane", "quality")


def test_a_limit_below_the_warmest_case_is_no_further_case() -> None:
    """The filling at a limit is asked for only where the limit lies above what the record reaches."""
    temperature = "states/hot/propane/temperature"
    low = vapour_space(_vessel("400.0 kg", limits=_limits((temperature, "at_most", "30 °C"))), "propane")
    high = vapour_space(_vessel("400.0 kg", limits=_limits((temperature, "at_most", "65 °C"))), "propane")
    assert low is not None
    assert high is not None
    assert (low.allowed, low.full_within_limit) == (None, False)
    assert high.allowed == pytest.approx(338.15)
    assert high.full_within_limit == (high.full_at <= 338.15)


def test_no_pressure_is_told_outside_the_range_of_the_equation() -> None:
    """A density that the equation does not reach gives no pressure, and no error."""
    assert pressure_at(_vessel("400.0 kg"), "propane", 300.0, 1e-6) is None
