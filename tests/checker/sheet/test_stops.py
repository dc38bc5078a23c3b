"""A body that meets stops: reached, not reached, just reached, whatever says how far it comes; in closed form.

1 kg of a gas with c_v = 0.72 and R = 0.29 kJ/(kg·K) starts at 300 K and 100 kPa, in 0.87 m³.
"""

from __future__ import annotations

import math
from typing import Any

import pytest

from checker.case import Case
from checker.findings import Outcome
from tests.checker.cases import case, compared
from tests.checker.records_of_several import stops

CV, CP, R = 0.72, 1.01, 0.29
LIFTED = 450.0
"""[K] Temperature at which the pressure behind the resting piston is 150 kPa; 108 kJ lead there."""


def sequence(
    paths: tuple[Any, Any], inputs: dict[str, str], last: dict[str, str] | None = None
) -> dict[str, Any]:
    """Return a gas that follows two paths, with the inputs of their sequence and of the last state."""
    record = stops("1 kJ")
    for process, path in zip(record["processes"], paths, strict=True):
        process["path"] = path
    record["sequences"][0]["inputs"] = inputs
    if last:
        record["states"]["hot"]["gas"] = {"inputs": last}
    return record


def lifting(inputs: dict[str, str], last: dict[str, str] | None = None) -> Case:
    """Return a piston on stops that lifts at 150 kPa."""
    paths = ("constant volume", "constant pressure")
    return case(sequence(paths, {"lift_pressure": "150 kPa", **inputs}, last))


def temperatures(found: Case) -> tuple[float | None, ...]:
    """Return the temperatures between and at the end. [K]"""
    return tuple(found.value(f"states/{state}/gas/temperature") for state in ("lifted", "hot"))


def test_a_stop_that_is_not_reached_leaves_the_rest_without_extent():
    """50 kJ warm the gas behind the resting piston, and nothing more happens."""
    end = 300.0 + 50.0 / CV
    found = lifting({"heat": "50 kJ"})
    assert temperatures(found) == pytest.approx((end, end), rel=1e-10)
    assert found.value("states/hot/gas/pressure") == pytest.approx(1e5 * end / 300.0, rel=1e-10)
    assert found.value("processes/lifting/heat") == pytest.approx(0.0, abs=1e-6)


@pytest.mark.parametrize("heat", ["108.000000 kJ", "107.999999999 kJ", "108.000000001 kJ"])
def test_a_stop_that_is_just_reached(heat: str):
    """Where the heat leads to the lift pressure and no further, both sides of the last digit agree."""
    found = lifting({"heat": heat})
    assert temperatures(found) == pytest.approx((LIFTED, LIFTED), rel=1e-10)
    assert found.value("sequences/all/work") == pytest.approx(0.0, abs=1e-3)


def test_beyond_the_stop_the_rest_of_the_heat_lifts():
    """400 kJ: 108 kJ to the lift, 292 kJ at constant pressure, of which R/c_p is work."""
    found = lifting({"heat": "400 kJ"})
    assert temperatures(found) == pytest.approx((LIFTED, LIFTED + 292.0 / CP), rel=1e-10)
    assert found.value("states/hot/gas/pressure") == pytest.approx(150e3, rel=1e-12)
    assert found.value("sequences/all/work") == pytest.approx(292e3 * R / CP, rel=1e-9)


BY_LAST_STATE = [
    ({"temperature": "600 K"}, LIFTED, 600.0),
    ({"temperature": "400 K"}, 400.0, 400.0),
    ({"pressure": "120 kPa"}, 360.0, 360.0),
    ({"volume": "1.2 m³"}, LIFTED, 1.2 * 150.0 / R),
]


@pytest.mark.parametrize(("last", "between", "end"), BY_LAST_STATE, ids=["T", "T-short", "p-short", "V"])
def test_the_last_state_tells_how_far_it_comes(last: dict[str, str], between: float, end: float):
    """A last temperature, pressure or volume decides whether the piston lifts, as a total heat does."""
    assert temperatures(lifting({}, last)) == pytest.approx((between, end), rel=1e-9)


def test_the_total_work_tells_how_far_it_comes():
    """30 kJ at 150 kPa are 0.2 m³."""
    found = lifting({"work": "30 kJ"})
    assert temperatures(found) == pytest.approx((LIFTED, LIFTED + 30.0 / R), rel=1e-9)
    heats = [found.value(f"processes/{name}/heat") or 0.0 for name in ("warming", "lifting")]
    assert sum(heats) == pytest.approx(108e3 + 30e3 * CP / R, rel=1e-9)


@pytest.mark.parametrize(
    ("heat", "between", "end"),
    [(-50.0, 300.0 - 50.0 / CP, 300.0 - 50.0 / CP), (-101.0, 200.0, 200.0), (-137.0, 200.0, 150.0)],
    ids=["floats", "touches", "rests"],
)
def test_cooling_back_onto_the_stops(heat: float, between: float, end: float):
    """The piston sinks at its pressure until 0.58 m³ are left at 200 K; then the pressure falls."""
    paths = ("constant pressure", "constant volume")
    found = case(sequence(paths, {"heat": f"{heat:.3f} kJ", "stop_volume": "0.58 m³"}))
    assert temperatures(found) == pytest.approx((between, end), rel=1e-9)
    assert found.value("states/hot/gas/pressure") == pytest.approx(min(end / 200.0, 1.0) * 1e5, rel=1e-9)


def test_a_polytropic_leg_up_to_a_stop():
    """p·v^1.3 is constant up to the stop at 0.58 m³; then the gas is warmed at rest."""
    paths = ({"kind": "polytropic", "exponent": 1.3}, "constant volume")
    found = case(sequence(paths, {"stop_volume": "0.58 m³"}, {"temperature": "400 K"}))
    assert temperatures(found) == pytest.approx((300.0 * 1.5**0.3, 400.0), rel=1e-9)
    work = R * 300.0 * (1.5**0.3 - 1.0) / -0.3
    assert found.value("processes/warming/boundary_work") == pytest.approx(1e3 * work, rel=1e-9)


def test_a_polytropic_leg_that_ends_before_the_stop():
    """10 kJ of work on the gas compress it along the polytrope, not as far as the stop."""
    paths = ({"kind": "polytropic", "exponent": 1.3}, "constant volume")
    found = case(sequence(paths, {"stop_volume": "0.58 m³", "work": "-10 kJ"}))
    end = 300.0 + 10.0 * 0.3 / R
    assert temperatures(found) == pytest.approx((end, end), rel=1e-9)


def test_a_condition_on_the_other_side_of_the_start_passes_no_stop():
    """Cooling away from the lift pressure leaves the piston at rest."""
    end = 300.0 - 36.0 / CV
    assert temperatures(lifting({"heat": "-36 kJ"})) == pytest.approx((end, end), rel=1e-10)
    assert math.isclose(end, 250.0)


@pytest.mark.parametrize(("stated", "agrees"), [("150.0 kPa", True), ("200.0 kPa", False)])
def test_a_lift_pressure_beside_known_states_is_held_against_them(stated: str, agrees: bool):
    """Warmed at rest to 450 K the gas has 150 kPa: another lift pressure contradicts the state in which it lifts."""
    record = sequence(("constant volume", "constant pressure"), {"lift_pressure": stated})
    record["states"]["lifted"]["gas"] = {"inputs": {"temperature": "450.0 K"}}
    record["states"]["hot"]["gas"] = {"inputs": {"temperature": "600.0 K"}}
    found = compared(case(record), "sequences/all/lift_pressure")
    assert (found.outcome is Outcome.AGREES) is agrees
