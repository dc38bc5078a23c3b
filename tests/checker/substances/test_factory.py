"""The factory: words and constants of a body become a substance."""

from __future__ import annotations

import subprocess
import sys

import pytest

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.constant_heat import ConstantHeatCondensed, ConstantHeatGas
from checker.substances.ideal_gas import IdealGas
from checker.substances.perturbed import PerturbedSubstance
from checker.substances.real_fluid import IndustrialWater, RealFluid

CV = "specific_heat_at_constant_volume"
CP = "specific_heat_at_constant_pressure"


def test_each_model_word_makes_its_model() -> None:
    """Every supported word of the record format makes the class that recomputes it."""
    assert isinstance(make_substance("Nitrogen", "real fluid", {}), RealFluid)
    assert isinstance(make_substance("Nitrogen", "ideal gas", {}), IdealGas)
    assert isinstance(make_substance("X", "constant specific heat", {CV: 718.0, CP: 1005.0}), ConstantHeatGas)
    assert isinstance(
        make_substance("X", "constant specific heat", {"specific_heat": 460.0}), ConstantHeatCondensed
    )
    assert isinstance(
        make_substance("steam", "real fluid", {}, property_source="industrial"), IndustrialWater
    )


@pytest.mark.parametrize(
    ("substance", "model", "constants", "source", "words"),
    [
        ("Unobtainium", "real fluid", {}, "reference", "no fluid named"),
        ("Nitrogin", "ideal gas", {}, "reference", "Nitrogen"),
        ("Water", "perfect", {}, "reference", "no model is called"),
        ("Water", "real fluid", {}, "hearsay", "no property source"),
        ("Nitrogen", "real fluid", {}, "industrial", "one for water"),
        ("X", "constant specific heat", {}, "reference", "needs its specific heat"),
        ("X", "constant specific heat", {CP: 1005.0}, "reference", "needs its specific heat"),
    ],
)
def test_what_is_not_supported_says_why(
    substance: str, model: str, constants: dict[str, float], source: str, words: str
) -> None:
    """A fluid, model or source that cannot be recomputed is refused with a helpful reason."""
    with pytest.raises(NotEvaluable) as refusal:
        make_substance(substance, model, constants, property_source=source)
    assert refusal.value.kind == "not-supported"
    assert words in refusal.value.reason


@pytest.mark.parametrize(
    ("constants", "cv", "gas_constant"),
    [
        ({CV: 718.0, CP: 1005.0}, 718.0, 287.0),
        ({CV: 718.0, "gas_constant": 287.0}, 718.0, 287.0),
        ({CP: 1005.0, "gas_constant": 287.0}, 718.0, 287.0),
        ({CP: 1005.0, CV: 718.0, "gas_constant": 287.05}, 718.0, 287.05),
        ({CV: 743.0, "molar_mass": 0.0280134}, 743.0, 8.314462618 / 0.0280134),
    ],
)
def test_two_of_three_constants_make_a_gas(
    constants: dict[str, float], cv: float, gas_constant: float
) -> None:
    """Any two of cp, cv and R, or one with a molar mass, fix the gas."""
    gas = make_substance("test gas", "constant specific heat", constants)
    assert isinstance(gas, ConstantHeatGas)
    assert gas.heat_capacity == pytest.approx(cv, rel=1e-14)
    assert gas.gas_constant == pytest.approx(gas_constant, rel=1e-14)


def test_a_known_fluid_lends_its_molar_mass() -> None:
    """With cv alone, R of a known fluid comes from its molar mass."""
    gas = make_substance("nitrogen", "constant specific heat", {CV: 743.0})
    assert gas.gas_constant == pytest.approx(296.8, abs=0.05)


def test_contradicting_constants_are_refused() -> None:
    """Constants with cp − cv far from R, or with cp below cv, make no substance."""
    for constants in (
        {CP: 1005.0, CV: 718.0, "gas_constant": 310.0},
        {CP: 700.0, CV: 718.0},
        {CV: -1.0, CP: 5.0},
    ):
        with pytest.raises(NotEvaluable) as refusal:
            make_substance("gas", "constant specific heat", constants)
        assert refusal.value.kind == "no-solution"


def test_a_liquid_and_a_gas_at_once_are_refused() -> None:
    """A specific heat c beside c_v or R leaves open what the substance is."""
    with pytest.raises(NotEvaluable, match="both are stated"):
        make_substance("x", "constant specific heat", {"specific_heat": 460.0, "gas_constant": 287.0})


def test_other_constants_of_a_body_are_not_heard() -> None:
    """Mass, volume and the like among the constants do not matter, whatever their values."""
    constants = {"specific_heat": 460.0, "mass": -3.0, "mass_fraction": 0.0}
    assert isinstance(make_substance("x", "constant specific heat", constants), ConstantHeatCondensed)


def test_cp_with_a_density_is_a_liquid() -> None:
    """A heat capacity at constant pressure beside a density, without anything of a gas, means a liquid."""
    liquid = make_substance("brine", "constant specific heat", {CP: 3500.0, "density": 1100.0})
    assert isinstance(liquid, ConstantHeatCondensed)
    assert liquid.specific_volume == pytest.approx(1.0 / 1100.0)


def test_factors_of_one_return_the_bare_substance() -> None:
    """Without a factor nothing is wrapped; with one it is."""
    bare = make_substance("Nitrogen", "real fluid", {}, density_factor=1.0, caloric_factor=1.0)
    assert isinstance(bare, RealFluid)
    assert isinstance(make_substance("Nitrogen", "real fluid", {}, density_factor=1.001), PerturbedSubstance)


@pytest.mark.parametrize("factor", [0.0, -1.0, float("nan"), float("inf")])
def test_impossible_factors_are_refused(factor: float) -> None:
    """A factor that is not positive and finite makes no substance."""
    with pytest.raises(NotEvaluable):
        make_substance("Nitrogen", "real fluid", {}, density_factor=factor)


def test_names_and_factory_do_not_load_the_property_library() -> None:
    """Looking up names, making substances and asking for the version import neither CoolProp nor scipy nor numpy."""
    program = (
        "import sys\n"
        "from checker.substances import knows_fluid, make_substance, nearest_fluids, property_library_version\n"
        "assert knows_fluid('R-134a') and nearest_fluids('watr')\n"
        "make_substance('steam', 'real fluid', {}); make_substance('air', 'ideal gas', {})\n"
        "make_substance('x', 'constant specific heat', {'specific_heat': 460.0}).state({'temperature': 300.0})\n"
        "make_substance('steam', 'real fluid', {}).uncertainty; property_library_version()\n"
        "loaded = {'CoolProp.CoolProp', 'scipy', 'numpy'} & set(sys.modules)\n"
        "sys.exit(str(loaded) if loaded else 0)\n"
    )
    done = subprocess.run(
        [sys.executable, "-c", program], capture_output=True, text=True, timeout=60, check=False
    )
    assert done.returncode == 0, done.stderr
