"""Inputs that are not needed: what is said where their digits, or those of the others, leave it open."""

import pytest

from checker import Grade, review
from tests.checker.cases import gas_bottle, package


@pytest.mark.parametrize(
    ("mass", "text", "grade"),
    [
        ("0.1000 kg", "31.16 kJ", None),
        ("0.1000 kg", "31 kJ", Grade.QUERY),
        ("0.1000 kg", "40 kJ", Grade.DISCREPANCY),
        ("0.1 kg", "40 kJ", Grade.QUERY),
    ],
)
def test_a_surplus_input_is_never_passed_over(mass, text, grade):
    """Right: no finding. Open digits of it or of the inputs: a query. Wrong for certain: a discrepancy."""
    record = gas_bottle()
    record["processes"][0]["inputs"] = {"internal_energy_change": text}
    record["bodies"]["gas"]["inputs"]["mass"] = mass
    found = [f for f in review(package(record)).findings if f.rule == "surplus-input-disagrees"]
    assert [f.grade for f in found] == ([] if grade is None else [grade])


def test_work_of_a_free_expansion_is_reported_once():
    """The rule for free expansions says it in its own words; no surplus input beside it."""
    record = gas_bottle()
    record["processes"][0].update(
        path="free expansion", inputs={"boundary_work": "10.00 kJ"}, heat_transfers=[]
    )
    record["states"]["hot"]["gas"]["inputs"] = {"temperature": "300.0 K", "pressure": "2.500 bar"}
    rules = {f.rule for f in review(package(record)).findings}
    assert "free-expansion-with-work" in rules
    assert "surplus-input-disagrees" not in rules
