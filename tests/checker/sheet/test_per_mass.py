"""Records in which everything is per unit mass."""

import pytest

from checker.findings import Outcome
from tests.checker.cases import case, gas_bottle


def per_mass() -> dict:
    """Return the helium bottle without a mass; Δu = 311.6 kJ/kg."""
    record = gas_bottle({"specific_internal_energy_change": "311.6 kJ/kg", "specific_heat": "311.6 kJ/kg"})
    del record["bodies"]["gas"]["inputs"]["mass"]
    return record


def test_a_record_without_mass_is_recomputed_per_kilogram_and_says_so():
    """Nothing extensive is stated, so 1 kg is assumed and listed."""
    found = case(per_mass())
    assert {c.outcome for c in found.compared} == {Outcome.AGREES}
    assert found.value("bodies/gas/mass") == 1.0
    assert any("1 kg" in step.assumes for step in found.plan.sheet.steps)


@pytest.mark.parametrize("extra", [{"heat": "31.16 kJ"}, {"entropy_change": "0.0896 kJ/K"}])
def test_where_something_extensive_is_claimed_the_mass_is_missed(extra):
    """A total cannot be checked without a mass; 1 kg is not invented for it."""
    record = per_mass()
    record["processes"][0]["results"] = extra
    (c,) = case(record).compared
    assert c.outcome is Outcome.NOT_EVALUABLE
    assert "mass" in c.reason
