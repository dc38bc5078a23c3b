"""Bodies that melt: at one temperature and over a span."""

from __future__ import annotations

import math
from dataclasses import replace

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.interface import Phase, PropertyState
from checker.substances.melting_body import Melting

T, P, U, H, S, F = (
    "temperature", "pressure", "specific_internal_energy", "specific_enthalpy", "specific_entropy",
    "melted_fraction",
)  # fmt: skip
MELTS, LATENT, SOLID, LIQUID = 300.0, 200e3, 2000.0, 2500.0
SHARP = Melting("wax", MELTS, 0.0, LATENT, SOLID, LIQUID, 1.0 / 900.0)
SPAN = Melting("wax", MELTS, 8.0, LATENT, SOLID, LIQUID, 1.0 / 900.0)
BODIES = pytest.mark.parametrize("body", [SHARP, SPAN], ids=["sharp", "span"])
CONSTANTS = {
    "melting_temperature": MELTS,
    "latent_heat": LATENT,
    "specific_heat_of_solid": SOLID,
    "specific_heat_of_liquid": LIQUID,
}


def test_energy_and_entropy_from_ice_cold_to_hot() -> None:
    """Heating a solid through melting takes c_s ΔT + L + c_l ΔT, and the entropies of the three steps."""
    cold, hot = (SHARP.state({T: t}) for t in (250.0, 350.0))
    gain = hot.specific_internal_energy - cold.specific_internal_energy
    assert gain == pytest.approx(SOLID * 50.0 + LATENT + LIQUID * 50.0, rel=1e-14)
    expected = SOLID * math.log(300.0 / 250.0) + LATENT / 300.0 + LIQUID * math.log(350.0 / 300.0)
    assert hot.specific_entropy - cold.specific_entropy == pytest.approx(expected, rel=1e-13)
    assert (cold.melted_fraction, hot.melted_fraction) == (0.0, 1.0)
    assert (cold.phase, hot.phase) == (Phase.SOLID, Phase.SUBCOOLED_LIQUID)


def test_the_datum_is_the_solid_at_melting() -> None:
    """Energy and entropy are zero where melting begins."""
    for body in (SHARP, SPAN):
        found = body.state({F: 0.0})
        assert (found.temperature, found.specific_internal_energy, found.specific_entropy) == (
            MELTS,
            0.0,
            0.0,
        )


def test_over_a_span_latent_heat_is_spread_evenly() -> None:
    """Half way through the span half is melted, and u has half of L and the rising part of the sensible heat."""
    half = SPAN.state({T: 304.0})
    assert half.melted_fraction == pytest.approx(0.5)
    assert half.phase is None
    assert half.specific_internal_energy == pytest.approx(
        0.5 * LATENT + 2000.0 * 4.0 + 0.5 * 62.5 * 16.0, rel=1e-13
    )
    end = SPAN.state({F: 1.0})
    assert end.temperature == pytest.approx(308.0)
    assert end.specific_internal_energy == pytest.approx(LATENT + 2250.0 * 8.0, rel=1e-13)


@BODIES
@given(share=st.floats(0.0, 1.0), pressure=st.floats(1e4, 1e7))
def test_every_property_finds_the_state_again(body: Melting, share: float, pressure: float) -> None:
    """From below melting to above it u, s, h with p, and the melted fraction give back the state."""
    energy = -100e3 + share * 500e3
    state = body.state({U: energy, P: pressure})
    assert state.specific_enthalpy == pytest.approx(energy + pressure / 900.0)
    assert state.specific_enthalpy is not None
    for known in ({S: state.specific_entropy, P: pressure}, {H: state.specific_enthalpy, P: pressure}):
        assert_same(body.state(known), state)
    assert state.melted_fraction is not None
    beside = {F: state.melted_fraction, P: pressure}
    assert_same(body.state({**beside, T: state.temperature}), state)
    if 0.0 < state.melted_fraction < 1.0:
        assert_same(body.state(beside), state)


def assert_same(found: PropertyState, state: PropertyState) -> None:
    """Assert that two states are one, to rounding."""
    assert found.temperature == pytest.approx(state.temperature, rel=1e-9)
    for name in (U, S):
        assert getattr(found, name) == pytest.approx(getattr(state, name), rel=1e-7, abs=1e-3)
    assert found.melted_fraction == pytest.approx(state.melted_fraction, abs=1e-7)
    assert found.pressure == state.pressure


@BODIES
@given(share=st.floats(0.0, 0.999))
def test_energy_and_entropy_rise_together(body: Melting, share: float) -> None:
    """Along small steps du = T ds, through melting as well."""
    energy, step = -100e3 + share * 500e3, 200.0
    first, last = body.state({U: energy}), body.state({U: energy + step})
    assert last.temperature >= first.temperature
    gain = last.specific_entropy - first.specific_entropy
    assert first.temperature * gain <= step * (1.0 + 1e-6) + 1e-7
    assert last.temperature * gain >= step * (1.0 - 1e-6) - 1e-7


def test_temperature_alone_at_melting_tells_nothing() -> None:
    """At the melting temperature solid and liquid differ by the latent heat: near saturation, not a guess."""
    with pytest.raises(NotEvaluable, match="does not tell how much") as refusal:
        SHARP.state({T: MELTS})
    assert refusal.value.kind == "near-saturation"
    assert SPAN.state({T: MELTS}).melted_fraction == 0.0


@pytest.mark.parametrize("offset", [0.0, 0.3])
def test_the_phase_decides_at_melting(offset: float) -> None:
    """Solid or liquid at the melting temperature, which the last digit of a whole degree may miss."""
    solid = SHARP.state({T: MELTS + offset}, Phase.SOLID)
    liquid = SHARP.state({T: MELTS - offset}, Phase.SUBCOOLED_LIQUID)
    assert (solid.specific_internal_energy, liquid.specific_internal_energy) == (0.0, LATENT)
    assert (solid.melted_fraction, liquid.melted_fraction) == (0.0, 1.0)


def test_away_from_melting_the_phase_is_the_temperatures() -> None:
    """A phase that the temperature excludes does not move the state."""
    assert SHARP.state({T: MELTS + 5.0}, Phase.SOLID).phase is Phase.SUBCOOLED_LIQUID
    assert SHARP.state({T: MELTS - 5.0}, Phase.SUBCOOLED_LIQUID).phase is Phase.SOLID


def test_a_melted_fraction_with_a_temperature() -> None:
    """Beside a fraction of 0 or 1 the temperature counts; between them it must be that of melting."""
    assert SHARP.state({T: 280.0, F: 0.0}).specific_internal_energy == pytest.approx(-20.0 * SOLID)
    assert SHARP.state({T: 310.0, F: 1.0}).specific_internal_energy == pytest.approx(LATENT + 10.0 * LIQUID)
    assert SHARP.state({T: MELTS, F: 0.4}).specific_internal_energy == pytest.approx(0.4 * LATENT)
    for wrong in ({T: 280.0, F: 0.4}, {T: 310.0, F: 0.0}, {T: 280.0, F: 1.0}):
        with pytest.raises(NotEvaluable, match="has the melted fraction"):
            SHARP.state(wrong)


@pytest.mark.parametrize(
    "known",
    [
        {},
        {F: 1.2},
        {F: -0.1},
        {F: math.nan},
        {F: 0.5, U: 100e3},
        {U: 1.0, S: 1.0},
        {"specific_volume": 1e-3},
        {"quality": 0.5, T: 300.0},
        {H: 100e3},
        {T: -3.0},
        {S: 1e9},
        {U: -1e9},
        {"colour": 1.0},
    ],
)
@BODIES
def test_what_fixes_no_state_is_refused(body: Melting, known: dict[str, float]) -> None:
    """Nothing, too much, the impossible and the unknown are not evaluable."""
    with pytest.raises(NotEvaluable):
        body.state(known)


def test_enthalpy_needs_a_density() -> None:
    """Without a density there is no enthalpy."""
    bare = replace(SHARP, specific_volume=None)
    assert bare.state({T: 280.0, P: 1e5}).specific_enthalpy is None
    with pytest.raises(NotEvaluable, match="needs a pressure and a density"):
        bare.state({H: 1.0, P: 1e5})


def test_digits_that_reach_the_melting_temperature() -> None:
    """Half a degree reaches a melting temperature 0.4 K away, and a tenth does not; over a span nothing does."""
    assert SHARP.crosses_saturation(MELTS + 0.4, 0.5, 1e5, 1.0)
    assert not SHARP.crosses_saturation(MELTS + 0.4, 0.1, 1e5, 1.0)
    assert not SPAN.crosses_saturation(MELTS, 0.5, 1e5, 1.0)


def test_constants_make_a_body_that_melts() -> None:
    """The stated constants count, one specific heat may stand for both, a span and a density may be added."""
    body = make_substance("wax", "phase change", CONSTANTS)
    assert body.state({U: 100e3}).melted_fraction == pytest.approx(0.5)
    assert (body.model, body.incompressible, body.uncertainty.caloric) == ("phase change", True, 0.0)
    one = make_substance(
        "wax", "phase change",
        {"melting_temperature": MELTS, "latent_heat": LATENT, "specific_heat": 2200.0, "density": 880.0,
         "melting_span": 4.0},
    )  # fmt: skip
    assert one.state({T: 290.0}).specific_internal_energy == pytest.approx(-22e3)
    assert one.state({T: 302.0}).melted_fraction == pytest.approx(0.5)
    assert one.state({T: 302.0}).specific_volume == pytest.approx(1.0 / 880.0)


def test_the_handbook_table_fills_what_is_not_stated() -> None:
    """Water has its melting data from the table; a stated latent heat counts instead of the table's."""
    table = make_substance("Water", "phase change", {})
    assert table.state({F: 0.5}).temperature == 273.15
    assert table.state({F: 1.0}).specific_internal_energy == pytest.approx(333.43e3)
    assert table.uncertainty.caloric == 0.05
    assert "handbook table" in table.equation
    own = make_substance("ice", "phase change", {"latent_heat": 335e3})
    assert own.state({F: 1.0}).specific_internal_energy == pytest.approx(335e3)
    assert "latent heat" not in own.equation.split("; ")[-1]


def test_all_stated_leaves_the_table_out() -> None:
    """Where all four constants are stated there is neither a range nor an uncertainty of the table."""
    body = make_substance("Water", "phase change", CONSTANTS)
    assert body.valid_range is None
    assert body.uncertainty.caloric == 0.0


@pytest.mark.parametrize(
    ("substance", "constants", "words"),
    [
        ("Wax of no name", {}, "melting temperature, latent heat"),
        ("paraffin wax", {}, "melting temperature"),
        ("wax", {**CONSTANTS, "latent_heat": -1.0}, "latent heat must be positive"),
        ("wax", {**CONSTANTS, "gas_constant": 287.0}, "gas constant: no constant of a body that melts"),
    ],
)
def test_what_is_missing_is_named(substance: str, constants: dict[str, float], words: str) -> None:
    """A body that cannot be made says which constant it lacks, or which does not belong to it."""
    with pytest.raises(NotEvaluable, match=words):
        make_substance(substance, "phase change", constants)


def test_each_constant_of_the_table_moves_by_its_own_uncertainty() -> None:
    """Moved by all of U, the solid moves by 5 %, the latent heat by 0.3 % and the liquid by 1.5 %; a stated one not."""
    bare = make_substance("Water", "phase change", {"specific_heat_of_liquid": 4200.0})
    moved = make_substance("Water", "phase change", {"specific_heat_of_liquid": 4200.0}, caloric_factor=1.05)
    for known, factor in (({T: 263.15}, 1.05), ({F: 1.0}, 1.003)):
        expected = factor * bare.state(known).specific_internal_energy
        assert moved.state(known).specific_internal_energy == pytest.approx(expected)
    rises = [body.state({T: 293.15}).specific_internal_energy - body.state({F: 1.0}).specific_internal_energy
             for body in (bare, moved)]  # fmt: skip
    assert rises[0] == pytest.approx(rises[1])


def test_the_factors_of_uncertainty_pass_through() -> None:
    """With a caloric factor energies and entropies grow by it, and the melted fraction finds the same state."""
    moved = make_substance("wax", "phase change", CONSTANTS, caloric_factor=1.05, density_factor=1.01)
    bare = make_substance("wax", "phase change", CONSTANTS)
    half = moved.state({F: 0.5})
    assert half.specific_internal_energy == pytest.approx(
        1.05 * bare.state({F: 0.5}).specific_internal_energy
    )
    assert moved.state({U: half.specific_internal_energy}).melted_fraction == pytest.approx(0.5)


def test_other_models_do_not_melt() -> None:
    """A melted fraction fixes no state of a real fluid, a gas, or a solid of constant specific heat."""
    others = (
        make_substance("Water", "real fluid", {}),
        make_substance("Nitrogen", "ideal gas", {}),
        make_substance("steel", "constant specific heat", {}),
    )
    for other in others:
        with pytest.raises(NotEvaluable, match="melt"):
            other.state({F: 0.5, T: 300.0})
