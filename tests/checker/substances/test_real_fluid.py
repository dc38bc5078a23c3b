"""Real fluids: phases, saturation, the critical point, several roots."""

from __future__ import annotations

import pickle
import threading
from collections.abc import Iterator

import pytest

from checker.outcomes import NotEvaluable
from checker.substances import Phase, PropertyState, make_substance
from checker.substances.real_fluid import RealFluid, real_fluid

T, P, V = "temperature", "pressure", "specific_volume"
U, H, S, X = "specific_internal_energy", "specific_enthalpy", "specific_entropy", "quality"
WATER = real_fluid("Water")
ATMOSPHERE = 101325.0


def _named(state: PropertyState) -> Iterator[tuple[str, float]]:
    """Yield the names and values of a state."""
    for name in (T, P, V, U, H, S, X):
        value = getattr(state, name)
        if value is not None:
            yield name, value


def refusal_of(fluid: RealFluid, known: dict[str, float], phase: Phase | None = None) -> NotEvaluable:
    """Return the refusal of a state that must be refused."""
    with pytest.raises(NotEvaluable) as caught:
        fluid.state(known, phase)
    return caught.value


@pytest.mark.parametrize(
    ("known", "phase"),
    [
        ({T: 300.0, P: 1e5}, Phase.SUBCOOLED_LIQUID),
        ({T: 300.0, P: 50e6}, Phase.SUBCOOLED_LIQUID),
        ({T: 400.0, P: 1e5}, Phase.SUPERHEATED_VAPOUR),
        ({T: 700.0, P: 1e6}, Phase.SUPERHEATED_VAPOUR),
        ({T: 700.0, P: 50e6}, Phase.SUPERCRITICAL),
        ({T: 400.0, X: 0.0}, Phase.SATURATED_LIQUID),
        ({T: 400.0, X: 1.0}, Phase.SATURATED_VAPOUR),
        ({P: 1e5, X: 0.3}, Phase.WET_VAPOUR),
        ({T: 400.0, V: 0.1}, Phase.WET_VAPOUR),
        ({V: 1.0, U: 2.4e6}, Phase.WET_VAPOUR),
        ({P: 1e5, H: 1e5}, Phase.SUBCOOLED_LIQUID),
        ({P: 1e5, S: 8000.0}, Phase.SUPERHEATED_VAPOUR),
    ],
)
def test_phase_words_of_water(known: dict[str, float], phase: Phase) -> None:
    """Each region of the diagram has its word of the record format."""
    state = WATER.state(known)
    assert state.phase == phase
    assert (state.quality is None) == (phase in (
        Phase.SUBCOOLED_LIQUID, Phase.SUPERHEATED_VAPOUR, Phase.SUPERCRITICAL,
    ))  # fmt: skip


def test_saturated_states_by_their_own_volume_stay_saturated() -> None:
    """What rounding leaves of quality 0 or 1 is still called saturated."""
    liquid, vapour = WATER.saturation({T: 420.0})
    for state, phase in ((liquid, Phase.SATURATED_LIQUID), (vapour, Phase.SATURATED_VAPOUR)):
        again = WATER.state({T: 420.0, V: state.specific_volume or 0.0})
        assert state.phase == phase
        assert again.phase in (phase, Phase.SUBCOOLED_LIQUID, Phase.SUPERHEATED_VAPOUR)
        assert again.specific_internal_energy == pytest.approx(state.specific_internal_energy, rel=1e-9)


def test_temperature_and_pressure_on_the_saturation_line_resolve_nothing() -> None:
    """T with its own saturation pressure is near saturation; a phase word takes the line, wet vapour does not."""
    pressure = WATER.saturation({T: 420.0})[0].pressure or 0.0
    known = {T: 420.0, P: pressure}
    assert refusal_of(WATER, known).kind == "near-saturation"
    assert refusal_of(WATER, known, Phase.WET_VAPOUR).kind == "near-saturation"
    assert WATER.state(known, Phase.SATURATED_LIQUID).quality == 0.0
    assert WATER.state(known, Phase.SATURATED_VAPOUR).quality == 1.0
    assert WATER.state(known, Phase.SUBCOOLED_LIQUID).quality == 0.0
    assert WATER.state(known, Phase.SUPERHEATED_VAPOUR).quality == 1.0


def test_a_stated_phase_decides_close_to_the_line() -> None:
    """100 °C and 1.0 bar, saturated liquid: the saturation line at 100 °C; far from the line the word is not heard."""
    near = {T: 373.15, P: 1.0e5}
    assert WATER.state(near).phase == Phase.SUPERHEATED_VAPOUR
    assert WATER.state(near, Phase.SUPERHEATED_VAPOUR).quality is None
    assert WATER.state(near, Phase.SATURATED_LIQUID).quality == 0.0
    assert WATER.state(near, Phase.SUBCOOLED_LIQUID).quality == 0.0
    assert WATER.state(near, Phase.SATURATED_VAPOUR).quality == 1.0
    assert refusal_of(WATER, near, Phase.WET_VAPOUR).kind == "near-saturation"
    far = {T: 373.15, P: 0.9e5}
    assert WATER.state(far, Phase.SATURATED_LIQUID).phase == Phase.SUPERHEATED_VAPOUR


@pytest.mark.parametrize(
    ("temperature", "half_temperature", "pressure", "half_pressure", "crosses"),
    [
        (373.15, 0.5, 1.0e5, 5e3, True),
        (373.15, 0.005, 1.0e5, 500.0, False),
        (373.15, 0.005, 1.014e5, 50.0, True),
        (373.15, 0.0, 1.01325e5, 0.0, False),
        (393.36, 0.005, 2e5, 500.0, True),
        (423.15, 0.5, 1e5, 5e3, False),
        (646.9, 0.5, 22.0e6, 5e4, True),
        (700.0, 0.5, 22.0e6, 5e4, False),
        (300.0, 0.5, 1e5, 5e3, False),
        (250.0, 0.5, 100.0, 1.0, False),
        (273.15, 0.5, 611.0, 5.0, True),
    ],
)
def test_digits_that_reach_across_the_line_are_seen(
    temperature: float, half_temperature: float, pressure: float, half_pressure: float, crosses: bool
) -> None:
    """The rectangle of T and p with their half digits is crossed by the saturation line or not."""
    assert WATER.crosses_saturation(temperature, half_temperature, pressure, half_pressure) is crosses


def test_the_density_maximum_gives_two_states() -> None:
    """Water of 999.9 kg/m³ at 1 atm is 1.0 °C or 7.1 °C warm; both are listed, in words too."""
    known = {P: ATMOSPHERE, V: 1.0 / 999.9}
    states = WATER.states(known)
    assert [round(state.temperature - 273.15, 1) for state in states] == [1.0, 7.1]
    refusal = refusal_of(WATER, known)
    assert refusal.kind == "several-roots"
    assert len(refusal.roots) == 2
    assert all("subcooled liquid" in root for root in refusal.roots)


def test_heavy_water_has_its_own_density_maximum() -> None:
    """The states on both sides of 11 °C are found for heavy water."""
    heavy = real_fluid("D2O")
    warm = heavy.state({T: 290.0, P: ATMOSPHERE})
    states = heavy.states({P: ATMOSPHERE, V: warm.specific_volume or 0.0})
    assert len(states) == 2
    assert (
        states[0].temperature < 284.4 < 290.0 == pytest.approx(max(s.temperature for s in states), abs=1e-6)
    )


@pytest.mark.parametrize("name", [U, S])
def test_cold_water_on_both_sides_of_an_extremum_and_in_the_dome(name: str) -> None:
    """At 2 °C u and s of water rise and then fall with pressure: two liquids and a trace of vapour have one u or s."""
    known = {T: 275.15, name: dict(_named(WATER.state({T: 275.15, P: 5e6})))[name]}
    states = WATER.states(known)
    assert [state.phase for state in states] == [
        Phase.SUBCOOLED_LIQUID,
        Phase.SUBCOOLED_LIQUID,
        Phase.WET_VAPOUR,
    ]
    assert min(abs((s.pressure or 0.0) - 5e6) for s in states) < 1.0
    assert WATER.state(known, Phase.WET_VAPOUR).quality == pytest.approx(1.5e-5, abs=0.3e-5)
    assert refusal_of(WATER, known, Phase.SUBCOOLED_LIQUID).kind == "several-roots"


def test_saturated_vapour_with_one_enthalpy_is_two_states() -> None:
    """The enthalpy of saturated steam has a maximum (at 235 °C): below it lie two states."""
    states = WATER.states({X: 1.0, H: 2.75e6})
    assert [round(state.temperature) for state in states] == [573, 427]
    only = WATER.state({X: 1.0, H: 2.2e6})
    assert WATER.saturation({T: only.temperature})[1].specific_enthalpy == pytest.approx(2.2e6, rel=1e-9)


def test_the_two_branches_of_a_small_quality_are_found() -> None:
    """At a quality of 0.02 the volume falls with temperature and rises again towards the critical one: two states."""
    warm = WATER.state({T: 620.0, X: 0.02})
    cool, again = sorted(
        WATER.states({X: 0.02, V: warm.specific_volume or 0.0}), key=lambda state: state.temperature
    )
    assert again.temperature == pytest.approx(620.0, abs=1e-6)
    liquid, vapour = WATER.saturation({T: cool.temperature})
    mixed = 0.98 * (liquid.specific_volume or 0.0) + 0.02 * (vapour.specific_volume or 0.0)
    assert mixed == pytest.approx(warm.specific_volume, rel=1e-9)


def test_temperature_and_energy_have_a_root_on_each_side_of_the_minimum() -> None:
    """At 300 K nitrogen's u falls with pressure and rises again above 0.4 GPa: both pressures are found."""
    nitrogen = real_fluid("nitrogen")
    known = {T: 300.0, U: nitrogen.state({T: 300.0, P: 7e8}).specific_internal_energy}
    pressures = sorted(state.pressure or 0.0 for state in nitrogen.states(known))
    assert pressures == pytest.approx([1.9e8, 7e8], rel=0.1)
    assert pressures[1] == pytest.approx(7e8, rel=1e-8)
    assert refusal_of(nitrogen, known, Phase.SUPERCRITICAL).kind == "several-roots"


def test_a_phase_chooses_between_roots() -> None:
    """T and h of compressed liquid and of wet vapour: the stated phase picks one."""
    state = WATER.state({T: 560.0, P: 120e6})
    known = {T: 560.0, H: state.specific_enthalpy or 0.0}
    assert refusal_of(WATER, known).kind == "several-roots"
    assert WATER.state(known, Phase.SUBCOOLED_LIQUID).pressure == pytest.approx(120e6, rel=1e-8)
    liquid, vapour = (state.specific_enthalpy or 0.0 for state in WATER.saturation({T: 560.0}))
    share = ((state.specific_enthalpy or 0.0) - liquid) / (vapour - liquid)
    assert WATER.state(known, Phase.WET_VAPOUR).quality == pytest.approx(share, rel=1e-8)
    assert refusal_of(WATER, known, Phase.SUPERHEATED_VAPOUR).kind == "several-roots"


def test_a_phase_that_contradicts_the_only_state_does_not_hide_it() -> None:
    """Where one state has the two properties it is returned; comparing the stated phase is not done here."""
    assert WATER.state({V: 1.0, U: 2.4e6}, Phase.SUBCOOLED_LIQUID).phase == Phase.WET_VAPOUR


def test_thin_gas_is_not_fixed_by_temperature_and_energy() -> None:
    """In a nearly ideal gas u says nothing about pressure: ill-conditioned, not some pressure."""
    nitrogen = real_fluid("nitrogen")
    state = nitrogen.state({T: 400.0, P: 100.0})
    for name, value in ((U, state.specific_internal_energy), (H, state.specific_enthalpy)):
        assert refusal_of(nitrogen, {T: 400.0, name: value or 0.0}).kind == "ill-conditioned"


def test_only_the_neighbourhood_of_the_critical_point_is_ill_conditioned() -> None:
    """T and p at the critical point fix no density; 5 K beside it, or with the volume known, they do."""
    assert refusal_of(WATER, {T: 647.2, P: 22.09e6}).kind == "ill-conditioned"
    assert WATER.state({T: 652.0, P: 22.09e6}).phase == Phase.SUPERCRITICAL
    assert WATER.state({T: 647.2, V: 0.0031}).phase == Phase.SUPERCRITICAL
    assert WATER.state({P: 22.09e6, H: 2.1e6}).temperature == pytest.approx(647.2, abs=0.2)


def test_water_at_the_ice_point_is_a_liquid() -> None:
    """0 °C stands in every steam table, though ice melts at 0.0025 °C: it is taken, alone and with every property."""
    state = WATER.state({T: 273.15, P: ATMOSPHERE})
    assert state.phase == Phase.SUBCOOLED_LIQUID
    assert state.specific_internal_energy == pytest.approx(-40.3, abs=0.1)
    for name, value in ((U, state.specific_internal_energy), (S, state.specific_entropy)):
        found = WATER.states({P: ATMOSPHERE, name: value})
        assert [s.temperature for s in found] == pytest.approx([273.15], abs=1e-4)
    assert WATER.state({T: 273.15, X: 0.0}).pressure == pytest.approx(611.2, abs=0.1)
    assert refusal_of(WATER, {T: 273.0, P: ATMOSPHERE}).kind == "outside-range"


def test_compressed_water_below_its_triple_point() -> None:
    """At 255 K and 200 MPa water is liquid, and found again from any two properties."""
    state = WATER.state({T: 255.0, P: 200e6})
    for known in ({T: 255.0, U: state.specific_internal_energy}, {P: 200e6, V: state.specific_volume or 0.0}):
        temperatures = [found.temperature for found in WATER.states(known)]
        assert min(abs(temperature - 255.0) for temperature in temperatures) < 1e-5


def test_mixtures_taken_as_one_substance_have_no_two_phase_states() -> None:
    """Air inside its dome is refused by every pair; bubble and dew point and single phases are answered."""
    air = real_fluid("air")
    liquid, vapour = air.saturation({T: 100.0})
    assert liquid.phase == Phase.SATURATED_LIQUID
    assert vapour.phase == Phase.SATURATED_VAPOUR
    assert (liquid.pressure or 0.0) > 1.1 * (vapour.pressure or 0.0)
    volume = 0.5 * ((liquid.specific_volume or 0.0) + (vapour.specific_volume or 0.0))
    energy = 0.5 * (liquid.specific_internal_energy + vapour.specific_internal_energy)
    for known in (
        {T: 100.0, V: volume},
        {T: 100.0, X: 0.5},
        {P: 6e5, X: 0.5},
        {V: volume, U: energy},
        {X: 0.5, V: volume},
    ):
        refusal = refusal_of(air, known)
        assert refusal.kind in ("not-supported", "no-solution")
        assert X not in known or P in known or V in known or "taken as one substance" in refusal.reason
    assert refusal_of(air, {T: 100.0, P: 6.2e5}).kind == "near-saturation"
    assert air.state({T: 300.0, P: 1e5}).phase == Phase.SUPERHEATED_VAPOUR
    assert air.state({T: 100.0, P: 20e6}).phase == Phase.SUBCOOLED_LIQUID


def test_saturation_is_asked_for_at_one_property() -> None:
    """At a temperature or a pressure both saturated states are given; else the question is refused."""
    liquid, vapour = WATER.saturation({P: 1e5})
    assert liquid.temperature == pytest.approx(vapour.temperature)
    for known in ({}, {T: 300.0, P: 1e5}, {V: 1.0}, {T: 700.0}, {P: 30e6}, {T: 200.0}, {P: float("nan")}):
        with pytest.raises(NotEvaluable):
            WATER.saturation(known)


@pytest.mark.parametrize(
    ("known", "kind"),
    [
        ({T: 3000.0, P: 1e5}, "outside-range"),
        ({T: 3000.0, U: 1e6}, "outside-range"),
        ({T: 200.0, S: 1.0}, "outside-range"),
        ({P: 2e9, H: 1e6}, "outside-range"),
        ({P: 2e9, V: 1e-3}, "outside-range"),
        ({T: 500.0, U: 1e9}, "no-solution"),
        ({P: 1e5, H: 1e9}, "no-solution"),
        ({V: 1e-3, U: 1e9}, "no-solution"),
        ({H: 1e9, S: 1.0}, "no-solution"),
        ({U: 1e5, H: -1e9}, "no-solution"),
        ({X: 1.0, V: 1e9}, "no-solution"),
        ({T: 700.0, X: 0.5}, "no-solution"),
    ],
)
def test_what_has_no_state_says_so(known: dict[str, float], kind: str) -> None:
    """Outside the range of the equation and no solution stay apart."""
    refusal = refusal_of(WATER, known)
    assert refusal.kind == kind
    assert refusal.reason


def test_a_fluid_crosses_threads_and_processes() -> None:
    """A substance can be pickled and used by another thread: library states stay with the thread that asks."""
    fluid = pickle.loads(pickle.dumps(real_fluid("nitrogen")))
    results: list[float] = []
    thread = threading.Thread(target=lambda: results.append(fluid.state({T: 300.0, P: 1e5}).specific_entropy))
    thread.start()
    thread.join()
    assert results == [real_fluid("N2").state({T: 300.0, P: 1e5}).specific_entropy]


def test_the_description_of_a_fluid() -> None:
    """Name, equation, constants and range come with the substance."""
    fluid = make_substance("steam", "real fluid", {})
    assert (fluid.name, fluid.model, fluid.incompressible) == ("Water", "real fluid", False)
    assert "IAPWS-95" in fluid.equation
    assert fluid.gas_constant == pytest.approx(461.51805, rel=1e-8)
    assert fluid.molar_mass == pytest.approx(0.018015268, rel=1e-12)
    assert fluid.critical_point == pytest.approx((647.096, 22.064e6, 1.0 / 322.0), rel=1e-8)
    span = fluid.valid_range
    assert span is not None
    assert (span.temperature_min, span.temperature_max, span.pressure_max) == (273.16, 2000.0, 1e9)
    assert fluid.uncertainty.density > 0.0
