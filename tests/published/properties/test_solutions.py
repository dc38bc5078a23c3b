"""Brines, glycols and heat transfer liquids against published density, specific heat and freezing point."""

from __future__ import annotations

import pytest

from checker.substances import Substance, make_substance

pytestmark = pytest.mark.published

DENSITIES = [
    # substance, mass fraction, °C, kg/m³, relative tolerance: that of the model
    # Handbook of Chemistry and Physics, concentrative properties of aqueous solutions, 20 °C (from memory)
    ("sodium chloride solution", 0.20, 20.0, 1147.8),
    ("calcium chloride solution", 0.20, 20.0, 1177.5),
    ("calcium chloride solution", 0.30, 20.0, 1281.6),
    ("ethanol solution", 0.20, 20.0, 968.6),
    ("methanol solution", 0.30, 20.0, 951.5),
    ("glycerol solution", 0.50, 20.0, 1126.3),
    ("ethylene glycol solution", 0.50, 20.0, 1065.0),
    ("propylene glycol solution", 0.30, 20.0, 1024.0),
    # UNESCO equation of state of sea water, S = 35, 20 °C, 1 atm (from memory)
    ("seawater", 0.035, 20.0, 1024.8),
]
FREEZING = [
    # substance, mass fraction, °C: the same handbook (from memory)
    ("sodium chloride solution", 0.20, -16.5),
    ("calcium chloride solution", 0.20, -18.3),
    ("ethanol solution", 0.20, -10.9),
    ("methanol solution", 0.30, -25.9),
    ("glycerol solution", 0.50, -23.0),
]
HEATS = [
    # substance, mass fraction, °C, J/(kg·K), relative tolerance
    ("seawater", 0.035, 20.0, 3993.0, 0.005),  # Millero et al. 1973 (from memory)
    ("sodium chloride solution", 0.20, 20.0, 3410.0, 0.01),  # International Critical Tables (from memory)
    ("ethylene glycol solution", 0.50, 20.0, 3300.0, 0.02),  # ASHRAE Handbook Fundamentals (from memory)
    ("propylene glycol solution", 0.50, 20.0, 3560.0, 0.02),  # ASHRAE Handbook Fundamentals (from memory)
]


def solution(name: str, fraction: float) -> Substance:
    """Return a solution."""
    return make_substance(name, "real fluid", {"mass_fraction": fraction})


@pytest.mark.parametrize(("name", "fraction", "celsius", "density"), DENSITIES)
def test_density_is_the_published_one(name: str, fraction: float, celsius: float, density: float) -> None:
    """Within 0.5 %, the uncertainty that the model states."""
    substance = solution(name, fraction)
    state = substance.state({"temperature": celsius + 273.15})
    assert 1.0 / state.specific_volume == pytest.approx(density, rel=substance.uncertainty.density)


@pytest.mark.parametrize(("name", "fraction", "celsius"), FREEZING)
def test_the_range_begins_at_the_published_freezing_point(name: str, fraction: float, celsius: float) -> None:
    """Within 0.4 K."""
    span = solution(name, fraction).valid_range
    assert span.temperature_min - 273.15 == pytest.approx(celsius, abs=0.4)


@pytest.mark.parametrize(("name", "fraction", "celsius", "heat", "share"), HEATS)
def test_specific_heat_is_the_published_one(
    name: str, fraction: float, celsius: float, heat: float, share: float
) -> None:
    """Δu over one kelvin within the tolerance of the source."""
    substance = solution(name, fraction)
    low, high = (substance.state({"temperature": celsius + 273.15 + d}) for d in (-0.5, 0.5))
    found = high.specific_internal_energy - low.specific_internal_energy
    assert found == pytest.approx(heat, rel=share)


def test_without_solute_it_is_water() -> None:
    """Glycol of no fraction has the density and energy of liquid water within the model's uncertainty."""
    blank, water = solution("ethylene glycol solution", 0.0), make_substance("water", "real fluid", {})
    ends = [{"temperature": t, "pressure": 2e5} for t in (283.15, 353.15)]
    ours, reference = ([one.state(known) for known in ends] for one in (blank, water))
    assert ours[0].specific_volume == pytest.approx(reference[0].specific_volume, rel=5e-3)
    changes = [s[1].specific_internal_energy - s[0].specific_internal_energy for s in (ours, reference)]
    assert changes[0] == pytest.approx(changes[1], rel=5e-3)
