"""Mixtures against a second library, published check values and closed forms."""

from __future__ import annotations

import cantera
import pytest

from checker.substances import make_substance
from checker.substances.composition import read_composition
from checker.substances.library_mixture import mixture_library

pytestmark = pytest.mark.published

CHECK_GAS = (
    # The composition of the check values of AGA report 8 and GERG-2008 in the reference implementations.
    ("methane", 0.77824),
    ("nitrogen", 0.02),
    ("CO2", 0.06),
    ("ethane", 0.08),
    ("propane", 0.03),
    ("isobutane", 0.0015),
    ("n-butane", 0.003),
    ("isopentane", 0.0005),
    ("n-pentane", 0.00165),
    ("n-hexane", 0.00215),
    ("n-heptane", 0.00088),
    ("n-octane", 0.00024),
    ("n-nonane", 0.00015),
    ("n-decane", 0.00009),
    ("hydrogen", 0.004),
    ("oxygen", 0.005),
    ("carbon monoxide", 0.002),
    ("water", 0.0001),
    ("hydrogen sulfide", 0.0025),
    ("helium", 0.007),
    ("argon", 0.001),
)
GASES = {
    # ISO 12213-2:2006, annex C: compositions of two natural gases
    1: (
        ("methane", 0.965),
        ("nitrogen", 0.003),
        ("CO2", 0.006),
        ("ethane", 0.018),
        ("propane", 0.0045),
        ("isobutane", 0.001),
        ("n-butane", 0.001),
        ("isopentane", 0.0005),
        ("n-pentane", 0.0003),
        ("n-hexane", 0.0007),
    ),
    3: (
        ("methane", 0.859063),
        ("nitrogen", 0.010068),
        ("CO2", 0.014954),
        ("ethane", 0.084919),
        ("propane", 0.023015),
        ("isobutane", 0.003486),
        ("n-butane", 0.003506),
        ("isopentane", 0.000509),
        ("n-pentane", 0.00048),
    ),
}
COMPRESSION_FACTORS = [
    # gas, T [K], p [Pa], Z: ISO 12213-2:2006, table C.1 (from memory)
    (1, 280.0, 6e6, 0.86199),
    (1, 290.0, 6e6, 0.88006),
    (1, 310.0, 6e6, 0.90867),
    (1, 330.0, 6e6, 0.93011),
    (3, 290.0, 6e6, 0.84544),
    (3, 310.0, 6e6, 0.88183),
]
IDEAL = {
    "air": {"N2": ("nitrogen", 0.79), "O2": ("oxygen", 0.21)},
    "flue gas": {
        "N2": ("nitrogen", 0.72),
        "CO2": ("CO2", 0.13),
        "H2O": ("water", 0.11),
        "O2": ("oxygen", 0.04),
    },
    "lean gas": {"CH4": ("methane", 0.5), "CO2": ("CO2", 0.5)},
    "synthesis gas": {"CO": ("carbon monoxide", 0.4), "H2": ("hydrogen", 0.6)},
}


@pytest.mark.parametrize(("gas", "temperature", "pressure", "factor"), COMPRESSION_FACTORS)
def test_natural_gases_have_the_published_compression_factor(
    gas: int, temperature: float, pressure: float, factor: float
) -> None:
    """Z within 0.1 %, which is the uncertainty of both equations."""
    mixture = make_substance("natural gas", "real fluid", {}, composition=GASES[gas])
    state = mixture.state({"temperature": temperature, "pressure": pressure})
    found = pressure * state.specific_volume / (mixture.gas_constant * temperature)
    assert found == pytest.approx(factor, rel=1e-3)


@pytest.mark.parametrize(("density", "share"), [(12798.28626082062, 2e-4), (12807.92403648801, 1.5e-3)])
def test_the_check_gas_of_the_reference_implementations_has_its_pressure(
    density: float, share: float
) -> None:
    """50 MPa at 400 K: the density by GERG-2008 closely, that by AGA 8 DETAIL within its uncertainty (from memory)."""
    library = mixture_library(read_composition(CHECK_GAS, "mole"))
    found = library.gas(400.0, 1.0 / (density * library.molar_mass))
    assert found.pressure == pytest.approx(50e6, rel=share)


def test_the_molar_mass_of_the_check_gas() -> None:
    """20.54333051 g/mol, of the same source (from memory)."""
    assert read_composition(CHECK_GAS, "mole").molar_mass * 1e3 == pytest.approx(20.5433, abs=5e-4)


@pytest.mark.parametrize("name", IDEAL)
@pytest.mark.parametrize("hot", [400.0, 490.0])
def test_ideal_mixtures_meet_a_second_library(name: str, hot: float) -> None:
    """Δu within 0.3 % and Δs within 0.3 % of NASA polynomials from 300 K and 1 bar to 20 bar."""
    parts = IDEAL[name]
    ours = make_substance(name, "ideal gas", {}, composition=tuple(parts.values()))
    theirs = cantera.Solution("gri30.yaml", transport_model=None)
    found, other = [], []
    for temperature, pressure in ((300.0, 1e5), (hot, 20e5)):
        found.append(ours.state({"temperature": temperature, "pressure": pressure}))
        theirs.TPX = temperature, pressure, {key: y for key, (_, y) in parts.items()}
        other.append((theirs.int_energy_mass, theirs.entropy_mass, theirs.volume_mass))
    assert found[1].specific_volume == pytest.approx(other[1][2], rel=5e-5)
    energy = found[1].specific_internal_energy - found[0].specific_internal_energy
    assert energy == pytest.approx(other[1][0] - other[0][0], rel=3e-3)
    entropy = found[1].specific_entropy - found[0].specific_entropy
    assert entropy == pytest.approx(other[1][1] - other[0][1], abs=3e-3 * abs(energy) / 300.0)


def test_air_as_a_mixture_is_air() -> None:
    """Nitrogen, oxygen and argon by the mixture model meet the equation of air: v within 0.2 %, Δu within 0.5 %.

    The published uncertainty of the density is 0.1 % of either equation.
    """
    parts = (("nitrogen", 0.7812), ("oxygen", 0.2096), ("argon", 0.0092))
    mixture = make_substance("air of components", "real fluid", {}, composition=parts)
    air = make_substance("air", "real fluid", {})
    ends = ({"temperature": 300.0, "pressure": 1e6}, {"temperature": 400.0, "pressure": 2e7})
    first, second = ([one.state(known) for known in ends] for one in (mixture, air))
    for mine, reference in zip(first, second, strict=True):
        assert mine.specific_volume == pytest.approx(reference.specific_volume, rel=2e-3)
    changes = [s[1].specific_internal_energy - s[0].specific_internal_energy for s in (first, second)]
    assert changes[0] == pytest.approx(changes[1], rel=5e-3)
