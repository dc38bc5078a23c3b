"""Several origins that one wrong value above them explains."""

import math

import pytest

from checker import review
from checker.facts.common import common_parents
from checker.facts.origins import origins
from tests.checker.cases import case, gas_bottle, package

ENERGY, ENTROPY = "processes/warming/internal_energy_change", "processes/warming/entropy_change"
RISE = 0.3116 * math.log(4.0 / 3.0)
"""ΔS of the helium bottle. [kJ/K]"""


def bottle(mass: float, entropy: float = 0.0, decimals: int = 5):
    """Return the bottle of 0.1 kg with ΔU and ΔS made with another mass, ΔS off by something more."""
    rise = mass / 0.1 * RISE + entropy
    return gas_bottle(
        {"internal_energy_change": f"{mass * 311.6:.2f} kJ", "entropy_change": f"{rise:.{decimals}f} kJ/K"}
    )


def leads(found):
    """Return the first wrong result of each origin."""
    return [group[0] for group in origins(found)]


@pytest.mark.parametrize("mass", [0.0731, 0.2719, 0.0001731, 83.7])
def test_a_mass_used_wrongly_is_found_from_its_first_result(mass):
    """ΔU and ΔS both follow from the one mass that gives the stated ΔU, however far it lies off."""
    found = case(bottle(mass, decimals=8))
    (common,) = common_parents(found, leads(found))
    assert (common.key, common.lead, common.others) == ("bodies/gas/mass", ENERGY, (ENTROPY,))
    assert common.value == pytest.approx(mass, abs=0.5 * 0.01 / 311.6 * 1.1)


def test_origins_without_a_common_value_stay_apart():
    """A ΔS that is off by itself follows from no value of what it shares with ΔU."""
    found = case(bottle(0.0731, entropy=0.00213))
    assert len(leads(found)) == 2
    assert common_parents(found, leads(found)) == ()


def test_few_digits_are_no_evidence():
    """ΔS stated with one decimal agrees with much: that it follows as well may be chance."""
    found = case(bottle(4.731, decimals=0))
    assert len(leads(found)) == 2
    assert common_parents(found, leads(found)) == ()


def test_one_origin_has_nothing_in_common():
    """There is nothing to compare with."""
    found = case(gas_bottle({"internal_energy_change": "22.78 kJ"}))
    assert common_parents(found, leads(found)) == ()


def test_results_of_one_wrong_value_are_one_finding():
    """The review tells the origin at ΔU, the mass that gives it, and ΔS under it."""
    (finding,) = [f for f in review(package(bottle(0.0731))).findings if f.rule == "value-disagrees"]
    assert finding.quantity == ENERGY
    assert ENTROPY in finding.spoils
    assert "mass (bodies/gas/mass) taken as 0.0731" in finding.message
