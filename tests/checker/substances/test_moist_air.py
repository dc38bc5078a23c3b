"""Moist air with its condensate."""

from __future__ import annotations

import itertools
import math

import pytest
from hypothesis import assume, given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import PropertyState, Substance, make_substance
from checker.substances.moist_air import MoistAir
from checker.substances.moist_content import water_content_at_pressure, water_content_at_volume
from checker.substances.moist_water import saturated
from checker.substances.properties import ORDER

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S = "specific_internal_energy", "specific_enthalpy", "specific_entropy"
MODELS = ("ideal gas", "real fluid")
HARDLY = {frozenset(pair) for pair in itertools.combinations((T, U, H), 2)}
CONTENTS = st.one_of(st.just(0.0), st.floats(1e-4, 0.05), st.floats(0.05, 5.0))


def moist_air(content: float, model: str = "ideal gas") -> Substance:
    """Return moist air of a water content."""
    return make_substance("moist air", model, {"water_content": content})


def evaluable(air: Substance, known: dict[str, float]) -> PropertyState:
    """Return a state, or leave out an example in which frost forms or liquid fills the volume."""
    try:
        return air.state(known)
    except NotEvaluable:
        assume(False)
        raise


@pytest.mark.parametrize("model", MODELS)
@settings(max_examples=40, deadline=None)
@given(content=CONTENTS, temperature=st.floats(275.0, 500.0), volume=st.floats(0.05, 5.0))
def test_every_independent_pair_finds_its_state_again(
    model: str, content: float, temperature: float, volume: float
) -> None:
    """Each pair of two independent properties gives the state back, with condensate and without."""
    air = moist_air(content, model)
    state = evaluable(air, {T: temperature, V: volume})
    for pair in itertools.combinations(ORDER[:-1], 2):
        known = {name: getattr(state, name) for name in pair}
        if frozenset(pair) in HARDLY:
            with pytest.raises(NotEvaluable, match="hardly independent"):
                air.state(known)
        else:
            found = air.state(known)
            assert found.temperature == pytest.approx(temperature, rel=1e-8), pair
            assert found.specific_volume == pytest.approx(volume, rel=1e-6), pair


@pytest.mark.parametrize(("model", "share"), [("ideal gas", 2e-3), ("real fluid", 5e-5)])
@settings(max_examples=40, deadline=None)
@given(content=CONTENTS, temperature=st.floats(280.0, 420.0), volume=st.floats(0.1, 3.0))
def test_energy_and_entropy_belong_together(
    model: str, share: float, content: float, temperature: float, volume: float
) -> None:
    """At constant volume du = T ds, also while water evaporates.

    Dalton's law leaves out that the air presses the liquid, which costs v_f·p_air of the latent heat.
    """
    air = moist_air(content, model)
    low, high = (evaluable(air, {T: temperature + step, V: volume}) for step in (-0.01, 0.01))
    energy = high.specific_internal_energy - low.specific_internal_energy
    entropy = high.specific_entropy - low.specific_entropy
    assert energy == pytest.approx(temperature * entropy, rel=share)


@pytest.mark.parametrize("model", MODELS)
@settings(max_examples=25, deadline=None)
@given(content=st.floats(1e-3, 0.5), temperature=st.floats(280.0, 400.0), volume=st.floats(0.2, 3.0))
def test_at_constant_temperature_heat_is_work_and_energy(
    model: str, content: float, temperature: float, volume: float
) -> None:
    """T ds = du + p dv along an isotherm."""
    air = moist_air(content, model)
    first, last = (evaluable(air, {T: temperature, V: volume * part}) for part in (0.9999, 1.0001))
    work = 0.5 * (first.pressure + last.pressure) * (last.specific_volume - first.specific_volume)
    heat = temperature * (last.specific_entropy - first.specific_entropy)
    energy = last.specific_internal_energy - first.specific_internal_energy
    assert heat == pytest.approx(energy + work, rel=2e-3)


def test_without_water_it_is_dry_air() -> None:
    """With no water, differences of every property are those of air, by either model."""
    for model in MODELS:
        damp, dry = moist_air(0.0, model), make_substance("air", model, {})
        ends = ({T: 290.0, P: 1e5}, {T: 350.0, P: 4e5})
        first, second = ([substance.state(known) for known in ends] for substance in (damp, dry))
        for name in (U, H, S):
            change = getattr(first[1], name) - getattr(first[0], name)
            assert change == pytest.approx(getattr(second[1], name) - getattr(second[0], name), rel=1e-9)
        assert first[1].specific_volume == pytest.approx(second[1].specific_volume, rel=1e-9)
        assert first[0].relative_humidity == first[0].humidity_ratio == 0.0


@pytest.mark.parametrize("model", MODELS)
def test_dry_air_and_liquid_water_are_zero_where_psychrometric_tables_are(model: str) -> None:
    """H = s = 0 for dry air at 0 °C and 1 atm."""
    state = moist_air(0.0, model).state({T: 273.15, P: 101325.0})
    assert state.specific_enthalpy == pytest.approx(0.0, abs=1e-4)
    assert state.specific_entropy == pytest.approx(0.0, abs=1e-6)


@pytest.mark.parametrize("model", MODELS)
@settings(max_examples=40, deadline=None)
@given(temperature=st.floats(230.0, 360.0), pressure=st.floats(0.8e5, 8e5), humidity=st.floats(0.0, 1.0))
def test_the_humidity_of_a_state_comes_back(
    model: str, temperature: float, pressure: float, humidity: float
) -> None:
    """The water content from T, p and relative humidity gives that humidity in that state, from T and v likewise."""
    content = water_content_at_pressure(model, temperature, pressure, humidity)
    state = moist_air(content, model).state({T: temperature, P: pressure})
    assert state.relative_humidity == pytest.approx(humidity, rel=1e-9, abs=1e-12)
    assert state.humidity_ratio == pytest.approx(content, rel=1e-9, abs=1e-15)
    again = water_content_at_volume(model, temperature, state.specific_volume, humidity)
    assert again == pytest.approx(content, rel=1e-9, abs=1e-15)


@pytest.mark.parametrize("model", MODELS)
def test_condensate_takes_part_in_mass_volume_and_energy(model: str) -> None:
    """Below the dew point the vapour is saturated, and mass and volume add up with the liquid's."""
    air = moist_air(0.05, model)
    state = air.state({T: 283.15, V: 0.8})
    alone = saturated(283.15)
    assert alone is not None
    assert alone.liquid_volume is not None
    assert state.relative_humidity == 1.0
    assert state.humidity_ratio is not None
    assert 0.0 < state.humidity_ratio < 0.01
    liquid = (0.05 - state.humidity_ratio) / 1.05
    vapour = state.humidity_ratio / 1.05
    room = 0.8 - liquid * alone.liquid_volume
    assert vapour / room * alone.vapour_volume == pytest.approx(1.0, rel=5e-3)


def test_a_vessel_of_water_without_air_but_a_trace_is_wet_steam() -> None:
    """With next to no air it is water at its saturation pressure, of the quality that the volume asks for."""
    state = moist_air(1e6).state({T: 394.15, V: 0.4})
    steam = make_substance("water", "real fluid", {}).state({T: 394.15, V: 0.4})
    assert state.pressure == pytest.approx(steam.pressure, rel=1e-5)
    assert state.humidity_ratio / 1e6 == pytest.approx(steam.quality, rel=1e-4)


@pytest.mark.parametrize(
    ("known", "kind", "words"),
    [
        ({T: 263.15, P: 1e5}, "outside-range", "frost"),
        ({T: 1400.0, P: 1e5}, "outside-range", "holds"),
        ({T: 300.0, P: 2e7}, "outside-range", "ends"),
        ({T: 300.0, "quality": 0.5}, "not-supported", "quality"),
        ({T: 300.0, U: 1e4}, "ill-conditioned", "hardly"),
        ({P: 1e5, S: 1e6}, "outside-range", "no state of moist air"),
        ({V: 0.8, U: 1e9}, "outside-range", "no state of moist air"),
    ],
)
def test_a_state_that_the_model_does_not_have_says_why(
    known: dict[str, float], kind: str, words: str
) -> None:
    """Frost, the ends of the range and pairs that depend on each other are refused by their kind."""
    with pytest.raises(NotEvaluable, match=words) as refusal:
        moist_air(0.01).state(known)
    assert refusal.value.kind == kind


def test_a_vessel_full_of_liquid_is_refused() -> None:
    """Liquid that fills the volume leaves no room for the air."""
    with pytest.raises(NotEvaluable, match="liquid water fills the volume"):
        moist_air(100.0).state({T: 300.0, V: 0.9e-3})


@pytest.mark.parametrize("content", [-0.1, math.nan, math.inf])
def test_a_water_content_that_is_none_is_refused(content: float) -> None:
    """A water content is zero or more, and a number."""
    with pytest.raises(NotEvaluable, match="water content"):
        moist_air(content)


def test_a_missing_water_content_says_what_would_tell_it() -> None:
    """The reason names humidity beside temperature and pressure."""
    with pytest.raises(NotEvaluable, match="relative humidity") as refusal:
        make_substance("humid air", "real fluid", {})
    assert refusal.value.kind == "missing"


@pytest.mark.parametrize("humidity", [-0.1, 1.1, math.nan])
def test_a_relative_humidity_beyond_saturation_is_refused(humidity: float) -> None:
    """Relative humidity lies between 0 and 1."""
    with pytest.raises(NotEvaluable, match="not between 0 and 1"):
        water_content_at_pressure("ideal gas", 300.0, 1e5, humidity)


def test_vapour_that_alone_exceeds_the_pressure_is_refused() -> None:
    """Saturated vapour at 120 °C does not leave room for air at 1 bar."""
    with pytest.raises(NotEvaluable, match="alone exceeds the pressure"):
        water_content_at_pressure("ideal gas", 393.15, 1e5, 1.0)


@pytest.mark.parametrize("model", MODELS)
@settings(max_examples=30, deadline=None)
@given(temperature=st.floats(275.0, 360.0), humidity=st.floats(0.05, 1.0))
def test_a_humidity_tells_the_temperature_again(model: str, temperature: float, humidity: float) -> None:
    """At the pressure or the volume of a state, its relative humidity belongs to its temperature alone."""
    content = water_content_at_pressure(model, temperature, 2e5, humidity)
    air = MoistAir(model, content)
    state = air.state({T: temperature, P: 2e5})
    for name, value in ((P, 2e5), (V, state.specific_volume)):
        found = air.temperature_of_humidity(name, value, humidity)
        assert found == pytest.approx(temperature, abs=1e-5)


@pytest.mark.parametrize("humidity", [0.0, -0.5, 1.5, math.nan])
def test_a_humidity_that_tells_no_temperature_is_refused(humidity: float) -> None:
    """Only what lies above 0 and at most at 1 is reached somewhere."""
    with pytest.raises(NotEvaluable, match="tells no temperature"):
        MoistAir("ideal gas", 0.01).temperature_of_humidity(P, 1e5, humidity)
