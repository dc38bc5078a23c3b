"""A line of pressure over volume, by points or by a spring, held against both ends."""

from typing import Any

import pytest

from checker import review
from checker.facts.paths import line_pressure
from tests.checker.cases import case, gas_bottle, package

POINTS = [
    {"pressure": "500.0 kPa", "volume": "0.12462 m³"},
    {"pressure": "700.0 kPa", "volume": "0.22462 m³"},
]
SPRING = {"stiffness": "80.00 kN/m", "piston_area": "0.2000 m²"}
"""Slope of both: 2 MPa/m³; the helium of the bottle fills 0.12462 m³ at 300 K and 500 kPa."""
CONTACT = {"pressure_at_contact": "520.0 kPa", "volume_at_contact": "0.13462 m³"}


def on_line(pressure: str, temperature: str, **path: Any) -> dict[str, Any]:
    """Return the bottle's gas on a line, with both properties of its last state given."""
    record = gas_bottle()
    record["processes"][0].update(path={"kind": "pressure linear in volume", **path})
    del record["processes"][0]["work_transfers"]
    record["states"]["hot"]["gas"]["inputs"] = {"pressure": pressure, "temperature": temperature}
    return record


@pytest.mark.parametrize("path", [{"points": POINTS}, SPRING, {**SPRING, **CONTACT}])
@pytest.mark.parametrize(("temperature", "beyond"), [("505.5 K", False), ("525.5 K", True)])
def test_the_last_state_lies_on_the_line_or_beside_it(path, temperature, beyond):
    """600 kPa at 0.17462 m³, that is 504.4 K, is on the line; 525.5 K means 0.1819 m³ and 614 kPa on the line."""
    found = line_pressure(case(on_line("600.0 kPa", temperature, **path)), "warming", "gas")
    assert found is not None
    assert (found.state, found.deviation.beyond) == ("hot", beyond)


def test_a_first_state_beside_the_line_is_seen():
    """The line has 540 kPa at the first volume; the last state lies on it."""
    high = [{**POINTS[0], "pressure": "540.0 kPa"}, {**POINTS[1], "pressure": "740.0 kPa"}]
    found = line_pressure(case(on_line("640.0 kPa", "538.1 K", points=high)), "warming", "gas")
    assert found is not None
    assert (found.state, found.deviation.beyond) == ("cold", True)
    assert found.on_path == pytest.approx(540e3, rel=1e-9)


def test_where_the_line_begins_later_the_way_to_it_is_asked_for():
    """A spring that is met after some way: the first state is not on its line, and the process is to be split."""
    record = on_line("600.0 kPa", "504.4 K", **SPRING, **{**CONTACT, "pressure_at_contact": "530.0 kPa"})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "490.0 K"
    (found,) = [f for f in review(package(record)).findings if f.rule == "line-missed"]
    assert found.quantity == "states/cold/gas/pressure"
    assert "process of its own" in found.suggestion
