"""Monte Carlo where the first order fails, and only there."""

import math

import pytest

from checker.basis import Basis
from checker.budget import Kind, Method
from checker.comparison import montecarlo
from checker.comparison.montecarlo import propagate
from checker.comparison.sources import Source
from checker.facts.balance import generation
from checker.findings import Outcome
from checker.sheet.same import SameQuantity
from checker.sheet.step import Sheet, Step, users_of
from tests.checker.cases import case, compared, gas_bottle

LAST = "states/last/water/"
SGEN = "processes/warming/entropy_generation"


def sheet_of(function, *leaves, cost=1):
    """Return a sheet of one step, y = function(x…)."""
    step = Step("y", ("y",), leaves, lambda *x: (function(*x),), "y", cost=cost)
    return Sheet("r", {}, (step,), {}, SameQuantity(), made_by={"y": step}, users=users_of((step,)))


def source(name, size, rectangular=True):
    """Return a source that moves one leaf of its name."""
    return Source(name, Kind.PLUS_MINUS, name, {name: size}, rectangular)


def vapour(pressure: str, claimed: str, quantity: str = "specific_volume"):
    """Return steam at 120 °C and a pressure with ±, saturated at 198.7 kPa."""
    return {
        "id": "steam",
        "bodies": {"water": {"substance": "Water", "model": "real fluid", "inputs": {"mass": "1.000 kg"}}},
        "states": {
            "last": {
                "water": {
                    "inputs": {"temperature": "120.00 °C", "pressure": pressure},
                    "results": {quantity: claimed},
                }
            }
        },
        "processes": [],
    }


def test_a_linear_result_is_not_drawn():
    """ΔU is linear in T2 whatever its ±."""
    record = gas_bottle({"internal_energy_change": "31.16 kJ"})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = "400.0 ± 30.0 K"
    found = case(record)
    assert compared(found, "processes/warming/internal_energy_change").budget.method is Method.FIRST_ORDER
    assert "processes/warming/internal_energy_change" not in found.moves.intervals


def test_a_record_without_plus_minus_draws_nothing(monkeypatch):
    """Real fluids have uncertain models, which cost one evaluation each and no trial."""
    monkeypatch.setattr("checker.comparison.moves.propagate", None)
    assert case(vapour("150.0 kPa", "1.188 m³/kg")).moves.intervals == {}


def test_near_saturation_the_interval_is_not_the_first_orders():
    """190 ± 15 kPa at 120 °C reaches over saturation at 198.7 kPa, where it is liquid of a thousandth of the volume."""
    c = compared(case(vapour("190.0 ± 15.0 kPa", "0.9353 m³/kg")), LAST + "specific_volume")
    assert c.budget.method is Method.MONTE_CARLO
    assert c.budget.trials >= montecarlo.FEWEST
    # A fifth of the pressures are above saturation, so that the interval reaches down to the liquid.
    assert c.budget.below == pytest.approx(c.independent, rel=0.01)
    assert c.budget.above == pytest.approx(c.independent * (190.0 / 175.7 - 1.0), rel=0.06)
    assert c.outcome is Outcome.AGREES


def test_the_same_record_gives_the_same_interval():
    """Nothing depends on the time, on what was drawn before, or on the order of the inputs."""
    first, second = (case(vapour("190.0 ± 15.0 kPa", "0.935 m³/kg")).moves.intervals for _ in range(2))
    assert first == second != {}


def test_an_interval_may_be_asymmetric_and_each_side_is_held():
    """V = m·R·T/p at 5 ± 2.5 bar reaches to twice its value, and down to two thirds only."""
    outcomes = {}
    for text in ("180.0 L", "70.0 L"):
        record = gas_bottle()
        record["states"]["cold"]["gas"] = {
            "inputs": {"temperature": "300.0 K", "pressure": "5.000 ± 2.500 bar"},
            "results": {"volume": text},
        }
        c = compared(case(record), "states/cold/gas/volume")
        outcomes[text] = c.outcome
        assert c.budget.below == pytest.approx(c.independent * (1.0 - 5.0 / 7.386), rel=0.03)
        assert c.budget.above == pytest.approx(c.independent * (5.0 / 2.614 - 1.0), rel=0.03)
        assert c.tolerance == c.budget.tolerance(c.deviation)
    assert outcomes == {"180.0 L": Outcome.AGREES, "70.0 L": Outcome.WRONG}


def test_trials_without_a_value_settle_nothing():
    """A root that ends at zero: a quarter of the trials have none, more than a 95 % interval leaves out."""
    sheet = sheet_of(math.sqrt, "x")
    found = propagate("r", sheet, {"x": 1.0, "y": 1.0}, [source("x", 2.0 / math.sqrt(3.0))], ["y"], 2.0)["y"]
    assert found.failed == pytest.approx(found.trials / 4, abs=0.02 * found.trials)
    assert not found.settled


def test_what_hangs_on_an_unsettled_uncertainty_is_not_evaluable():
    """Inputs whose ± reaches below absolute zero pressure: only a claim within the allowance is judged."""
    outcomes = []
    for text in ("124.6 L", "150.0 L"):
        record = gas_bottle()
        record["states"]["cold"]["gas"] = {
            "inputs": {"temperature": "300.0 K", "pressure": "5.000 ± 6.000 bar"},
            "results": {"volume": text},
        }
        c = compared(case(record), "states/cold/gas/volume")
        outcomes.append(c.outcome)
        assert c.budget.method is Method.UNSETTLED
    assert outcomes == [Outcome.AGREES, Outcome.NOT_EVALUABLE]


def test_dear_trials_are_not_made():
    """A step that costs more than 400 trials may is not drawn; nothing is unbounded."""
    assert (
        propagate(
            "r", sheet_of(math.exp, "x", cost=300), {"x": 1.0, "y": 1.0}, [source("x", 1.0)], ["y"], 2.0
        )
        == {}
    )


def test_the_trials_are_bounded():
    """No function and no distribution makes more than the most of them."""
    wild = sheet_of(lambda x: math.tan(50.0 * x), "x")
    found = propagate("r", wild, {"x": 1.0, "y": 0.0}, [source("x", 1.0, rectangular=False)], ["y"], 2.0)["y"]
    assert found.trials == montecarlo.MOST


def test_generation_is_judged_on_the_side_of_zero():
    """S_gen = 0.0204 kJ/K of a boundary at 450 ± 140 K: Q/T_b reaches further up than down, so S_gen further down."""
    record = gas_bottle()
    record["processes"][0]["heat_transfers"][0]["boundary_temperature"] = "450.0 ± 140.0 K"
    found = case(record)
    below, above = found.moves.sides(found.key(SGEN))
    assert below > 1.5 * above
    tolerance = generation(found, "warming", "entropy_generation").tolerance
    assert tolerance == pytest.approx(below, rel=1e-3)
    # −31.16 kJ/T_b with the rectangle's ends at 2.3 % and 97.7 %: T_b from 316.4 to 583.6 K.
    assert below == pytest.approx(31160.0 / 316.4 - 31160.0 / 450.0, rel=0.03)
    assert above == pytest.approx(31160.0 / 450.0 - 31160.0 / 583.6, rel=0.03)


def test_coverage_follows_the_basis():
    """With k = 3 a normal distribution leaves out 0.27 %: a wider interval than with k = 2."""
    record = vapour("150.0 ± 40.0 kPa", "1.188 m³/kg")
    two, three = (
        compared(case(record, basis=Basis(coverage_factor=k)), LAST + "specific_volume").budget
        for k in (2.0, 3.0)
    )
    assert two.method is three.method is Method.MONTE_CARLO
    assert three.above > two.above
