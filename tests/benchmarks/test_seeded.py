"""The generator of seeded errors: its truth holds, its records are accepted, its slips are found."""

from __future__ import annotations

import json

import pytest

from tests.benchmarks.seeded.equation import equation_of
from tests.benchmarks.seeded.fluids import RealFluid
from tests.benchmarks.seeded.gases import IdealPart, PolynomialGas
from tests.benchmarks.seeded.judge import judged
from tests.benchmarks.seeded.trial import correct_trial, slipped_trial, where_kinds_happen

SEED = 1
COUNT = 60


def test_the_equation_of_water_gives_its_printed_check_values():
    """IAPWS R6-95(2018), table 7, at 500 K and 838.025 kg/m³, and table 8, saturation at 450 K."""
    water = equation_of("Water")
    phase = water.phase(500.0, 838.025)
    assert phase.p == pytest.approx(10.0003858e6, rel=1e-8)
    assert phase.s == pytest.approx(2.56690919e3, rel=1e-8)
    liquid, vapour = water.saturation(450.0)
    assert vapour.p == pytest.approx(0.932203564e6, rel=1e-8)
    assert liquid.rho == pytest.approx(890.341250, rel=1e-8)
    assert vapour.s == pytest.approx(6.60921221e3, rel=1e-8)


@pytest.mark.parametrize("name", ["Nitrogen", "CarbonDioxide", "R134a"])
def test_every_pair_leads_back_to_its_state(name: str):
    """A state found from T and p is found again from its other pairs."""
    fluid = RealFluid(name)
    state = fluid.at(t=330.0, p=5e5)
    pairs = ("pv", "uv", "sv", "hp", "ps")
    for pair in pairs:
        again = fluid.at(**{letter: getattr(state, letter) for letter in pair})
        assert again.t == pytest.approx(state.t, rel=1e-9)


@pytest.mark.parametrize("name", ["Nitrogen", "CarbonDioxide", "Methane", "Oxygen"])
def test_polynomial_and_equation_agree_on_the_ideal_gas(name: str):
    """The published polynomials and the equations' ideal parts differ by less than 0.2 % from 300 K to 600 K."""
    one, other = PolynomialGas(name), IdealPart(name)
    assert one.energy(600.0) - one.energy(300.0) == pytest.approx(
        other.energy(600.0) - other.energy(300.0), rel=2e-3
    )


def test_at_least_forty_five_kinds_of_slips_happen():
    """The catalogue of the originator's mistakes is broad."""
    assert len(where_kinds_happen()) >= 45


def test_the_same_seed_makes_the_same_records():
    """Two runs write the same bytes."""
    assert slipped_trial(SEED, 3).package == slipped_trial(SEED, 3).package
    assert slipped_trial(SEED, 3).package != slipped_trial(SEED + 1, 3).package


def test_a_slip_leaves_the_inputs_as_they_were():
    """A slipped package differs from the correct one in results alone."""
    trial = slipped_trial(SEED, 1)
    slipped, plain = json.loads(trial.package), json.loads(trial.plain)
    assert slipped != plain
    assert _without_results(slipped) == _without_results(plain)


def test_correct_records_are_not_accused():
    """No discrepancy on correct records."""
    outcomes = [judged(correct_trial(SEED, number)) for number in range(COUNT)]
    assert [o.trial.name for o in outcomes if o.detected] == []


def test_slips_are_found():
    """Nearly every slip that moves a result by more than the yardstick is a discrepancy."""
    outcomes = [judged(slipped_trial(SEED, number)) for number in range(COUNT)]
    assert sum(o.detected for o in outcomes) >= 0.95 * COUNT
    assert sum(o.origin_hit for o in outcomes) >= 0.8 * COUNT


def _without_results(tree: object) -> object:
    if isinstance(tree, dict):
        return {key: _without_results(value) for key, value in tree.items() if key != "results"}
    if isinstance(tree, list):
        return [_without_results(item) for item in tree]
    return tree
