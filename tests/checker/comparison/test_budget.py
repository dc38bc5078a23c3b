"""The budget of a comparison: what the allowance is a part of, and what contributes to U."""

import math

import pytest

from checker.basis import Basis
from checker.budget import Budget, BudgetTerm, Kind, Method
from checker.findings import Outcome
from tests.checker.cases import case, compared, gas_bottle

DU = "processes/warming/internal_energy_change"
SGEN = "processes/warming/entropy_generation"
HOT = "states/hot/gas/temperature"


def bottle(hot: str = "400.0 K", stated: str = "31.16 kJ"):
    """Return the helium bottle with its hot temperature as written."""
    record = gas_bottle({"internal_energy_change": stated})
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = hot
    return record


def test_the_allowance_says_of_what_it_is_a_share():
    """ΔU = 31.16 kJ is the largest term of its own balance; a pressure stands for itself, a temperature for nothing."""
    found = case(gas_bottle({"entropy_generation": "0.02040 kJ/K"}, hot={"pressure": "6.667 bar"}))
    budget = compared(found, SGEN).budget
    assert budget.of == "the largest term of its balance"
    assert budget.reference == pytest.approx(100.0 * 3.116 * math.log(4.0 / 3.0), rel=1e-9)
    assert compared(found, "states/hot/gas/pressure").budget.of == "its value"


def test_a_temperature_is_allowed_kelvins():
    """0.3 K is no share of anything."""
    record = gas_bottle({"heat": "31.16 kJ"})
    record["states"]["hot"]["gas"] = {"inputs": {}, "results": {"temperature": "400.0 K"}}
    record["processes"][0]["heat_transfers"][0]["inputs"] = {"energy": "31.16 kJ"}
    budget = compared(case(record), HOT).budget
    assert (budget.allowance, budget.share, budget.of) == (0.3, 0.0, "")


def test_every_contribution_has_its_name_and_its_size():
    """m·c_v·2 K/√3 of the ±, 5 J/√3 of the digits, both with k = 2; U is their root of squares."""
    budget = compared(case(bottle("400.0 ± 2.0 K")), DU).budget
    sizes = {(term.kind, term.source): term.size for term in budget.terms}
    digits, heat = 2.0 * 5.0 / math.sqrt(3.0), 2.0 * 623.2 / math.sqrt(3.0)
    assert sizes == {
        (Kind.DIGITS, ""): pytest.approx(digits),
        (Kind.PLUS_MINUS, HOT): pytest.approx(heat, rel=1e-9),
    }
    assert budget.below == budget.above == pytest.approx(math.hypot(digits, heat), rel=1e-9)
    assert budget.method is Method.FIRST_ORDER


def test_inputs_taken_as_rounded_are_named_so():
    """The basis takes 400.0 K as rounded; its contribution says that it was."""
    budget = compared(case(bottle(), basis=Basis(input_digits="rounded")), DU).budget
    kinds = {term.kind for term in budget.terms}
    assert kinds == {Kind.DIGITS, Kind.ROUNDED}


def test_the_model_names_its_published_source():
    """Nitrogen as a real fluid: the caloric uncertainty of its equation of state moves ΔU by its published share."""
    record = bottle()
    record["bodies"]["gas"] = {
        "substance": "Nitrogen",
        "model": "real fluid",
        "inputs": {"mass": "0.1000 kg"},
    }
    c = compared(case(record), DU)
    term = next(term for term in c.budget.terms if term.kind is Kind.CALORIC)
    assert term.source == "gas"
    assert "Nitrogen" in term.basis or "Span" in term.basis
    assert term.size == pytest.approx(0.008 * c.independent, rel=0.01)


def test_last_digits_stand_apart_with_the_inputs_that_move_most():
    """400 K may mean 399.5 K, which moves ΔU by m·c_v·0.5 K, and adds nothing to U."""
    budget = compared(case(bottle("400 K")), DU).budget
    assert budget.open_inputs[0].source == HOT
    assert budget.open_inputs[0].size == pytest.approx(311.6 * 0.5, rel=1e-6)
    assert budget.above == pytest.approx(2.0 * 5.0 / math.sqrt(3.0))


def test_small_contributions_are_summed():
    """Eight contributions of a rounded record: six by name beside the digits, the others as one."""
    record = gas_bottle({"entropy_generation": "0.02040 kJ/K"})
    budget = compared(case(record, basis=Basis(input_digits="rounded")), SGEN).budget
    assert len(budget.terms) <= 8
    total = math.hypot(*(term.size for term in budget.terms))
    assert budget.above == pytest.approx(total, rel=1e-9)


def test_a_budget_in_the_originators_sign_has_its_sides_exchanged():
    """Work counted positive in: what lay above lies below."""
    term = BudgetTerm(Kind.DIGITS, "", 3.0)
    budget = Budget(10.0, 0.005, 2000.0, "its value", (term,), 1.0, 5.0, 2.0)
    kilo = budget.scaled(1e-3, -1)
    assert (kilo.below, kilo.above) == (5e-3, 1e-3)
    assert kilo.tolerance(+1.0) == pytest.approx(0.011)
    assert kilo.terms[0].size == 3e-3
    assert kilo.uncertainty == 5e-3


def test_a_plus_minus_on_a_surplus_input_widens_its_comparison():
    """A measured third property, 1.300 ± 0.060 m³/kg, agrees with 1.246 m³/kg; without its ± it does not."""
    outcomes = []
    for text in ("1.300 ± 0.060 m³/kg", "1.300 m³/kg"):
        record = gas_bottle()
        record["states"]["cold"]["gas"]["inputs"]["specific_volume"] = text
        outcomes.append(compared(case(record), "states/cold/gas/specific_volume").outcome)
    assert outcomes == [Outcome.AGREES, Outcome.WRONG]
