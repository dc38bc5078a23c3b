"""Every pair of properties gives back the state that it was taken from, over the whole range and inside the dome."""

from __future__ import annotations

import itertools
import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances.interface import PropertyState
from checker.substances.names import all_fluids, fluid_of
from checker.substances.properties import ORDER
from checker.substances.real_fluid import IndustrialWater, RealFluid, real_fluid

FLUIDS = ("water", "nitrogen", "carbon dioxide", "R134a", "propane")
PAIRS = list(itertools.combinations(ORDER, 2))
T, P, V, X = "temperature", "pressure", "specific_volume", "quality"
Fluid = RealFluid | IndustrialWater
ROUND_TRIP = settings(max_examples=16, deadline=None, derandomize=True)
FEWER = settings(max_examples=12, deadline=None, derandomize=True)
SHARES = st.floats(0.001, 0.98)  # at the very corners of the range a curve is a single point


def some_state(fluid: Fluid, region: str, one: float, two: float) -> PropertyState | None:
    """Return a state in a region by two shares between 0 and 1, None where there is none."""
    span = fluid.valid_range
    critical, pressure_c, _ = fluid.critical_point
    top = span.temperature_max
    known = {
        "dome": {T: span.temperature_min + one * (critical - span.temperature_min), X: two**2},
        "edge": {T: span.temperature_min + one * (critical - span.temperature_min), X: float(two > 0.5)},
        "gas": {T: critical + one * (top - critical), P: 1e4 * (span.pressure_max / 1e4) ** two},
        "cold": {T: span.temperature_min + one * (critical - span.temperature_min),
                 P: 1e4 * (span.pressure_max / 1e4) ** two},
        "critical": {T: critical * (0.95 + 0.1 * one), P: pressure_c * (0.7 + 0.8 * two)},
    }[region]  # fmt: skip
    try:
        state = fluid.state(known)
    except NotEvaluable:
        return None
    return state if (state.pressure or 0.0) > 1.0 else None  # below, the library has not the digits


def value_of(state: PropertyState, name: str) -> float | None:
    """Return a property of a state by its name."""
    value: float | None = getattr(state, name)
    return value


def pairs_of(state: PropertyState) -> list[dict[str, float]]:
    """Return every two properties that fix a state."""
    found = []
    for names in PAIRS:
        values = {name: value_of(state, name) for name in names}
        if None in values.values() or (names == (T, P) and state.quality is not None):
            continue
        found.append({name: value for name, value in values.items() if value is not None})
    return found


def same(found: PropertyState, state: PropertyState, known: dict[str, float], tolerance: float) -> bool:
    """Return whether two states are the same within a relative tolerance of T, and a wider one of v.

    h − u = p v hardly moves with density in a gas: the noise of the library's ten digits shows much earlier there.
    """
    if set(known) == {"specific_internal_energy", "specific_enthalpy"}:
        tolerance *= 100.0
    volume = state.specific_volume or 0.0
    close = math.isclose(found.temperature, state.temperature, rel_tol=tolerance)
    return close and math.isclose(found.specific_volume or 0.0, volume, rel_tol=100.0 * tolerance)


def hardly_fixed(fluid: Fluid, state: PropertyState, known: dict[str, float]) -> bool:
    """Return whether the pair really says next to nothing about density: judged by states close by."""
    volume = state.specific_volume or 0.0
    held = next(name for name in (T, "specific_entropy", "specific_internal_energy", X) if name in known)
    (sought,) = set(known) - {held}
    scale = (fluid.gas_constant or 0.0) * (1.0 if "entropy" in sought else fluid.critical_point[0])
    moved = []
    for factor in (0.99, 1.01):
        try:
            beside = fluid.state({V: volume * factor, held: value_of(state, held) or 0.0})
        except NotEvaluable:
            continue
        moved.append(abs((value_of(beside, sought) or 0.0) - known[sought]) / max(abs(known[sought]), scale))
    return not moved or min(moved) < 3e-7


def states_or_refusal(fluid: Fluid, known: dict[str, float]) -> tuple[PropertyState, ...] | NotEvaluable:
    """Return the states of a pair, or why there are none."""
    try:
        return fluid.states(known)
    except NotEvaluable as refusal:
        return refusal


def check_round_trip(fluid: Fluid, state: PropertyState, tolerance: float) -> int:
    """Assert that every pair finds the state again; return how many pairs did."""
    checked = 0
    for known in pairs_of(state):
        found = states_or_refusal(fluid, known)
        if isinstance(found, NotEvaluable):
            assert found.kind == "ill-conditioned", (found.reason, known, state)
            assert set(known) == {T, P} or hardly_fixed(fluid, state, known), (found.reason, known, state)
            continue
        assert any(same(one, state, known, tolerance) for one in found), (known, state, found)
        volumes = [one.specific_volume or 0.0 for one in found]
        assert all(second >= first * (1.0 - 1e-7) for first, second in itertools.pairwise(volumes))
        checked += 1
    return checked


@pytest.mark.parametrize("region", ["dome", "edge", "gas", "cold", "critical"])
@pytest.mark.parametrize("name", FLUIDS)
def test_every_pair_finds_its_state_again(name: str, region: str) -> None:
    """For five fluids over the whole range, states() of any two properties contains the state they came from."""
    fluid = real_fluid(name)
    checked = 0

    @ROUND_TRIP
    @given(SHARES, SHARES)
    def run(one: float, two: float) -> None:
        nonlocal checked
        state = some_state(fluid, region, one, two)
        if state is not None:
            checked += check_round_trip(fluid, state, 1e-7)

    run()
    assert checked > 150


@pytest.mark.parametrize("region", ["dome", "edge", "gas", "cold"])
def test_every_pair_finds_its_state_again_by_the_industrial_formulation(region: str) -> None:
    """The industrial formulation does the same within the jumps between its regions."""
    fluid = IndustrialWater(fluid_of("water"))
    checked = 0

    @FEWER
    @given(SHARES, SHARES)
    def run(one: float, two: float) -> None:
        nonlocal checked
        state = some_state(fluid, region, one, two)
        if state is not None:
            for known in pairs_of(state):
                found = states_or_refusal(fluid, known)
                if isinstance(found, NotEvaluable):
                    assert found.kind == "ill-conditioned", (found.reason, known, state)
                    continue
                assert any(same(other, state, known, 1e-4) for other in found), (known, state, found)
                checked += 1

    run()
    assert checked > 100


@pytest.mark.slow
def test_every_fluid_of_the_table_finds_its_states_again() -> None:
    """A few states of each of the 136 fluids come back from every pair that fixes them."""
    checked = 0
    for fluid in map(RealFluid, all_fluids()):
        for region, one, two in (
            ("dome", 0.5, 0.6),
            ("edge", 0.4, 0.0),
            ("edge", 0.6, 1.0),
            ("cold", 0.5, 0.6),
            ("gas", 0.3, 0.5),
        ):
            state = some_state(fluid, region, one, two)
            if state is not None and (state.pressure or 0.0) > 100.0:
                checked += check_round_trip(fluid, state, 1e-6)
    assert checked > 8000


@pytest.mark.parametrize("name", FLUIDS)
def test_exact_identities_hold(name: str) -> None:
    """At every state h − u = p v, and inside the dome one quality follows from v, u, h and s alike."""
    fluid = real_fluid(name)
    checked = 0

    @ROUND_TRIP
    @given(st.sampled_from(["dome", "gas", "cold"]), SHARES, SHARES)
    def run(region: str, one: float, two: float) -> None:
        nonlocal checked
        state = some_state(fluid, region, one, two)
        if state is None:
            return
        product = (state.pressure or 0.0) * (state.specific_volume or 0.0)
        difference = (state.specific_enthalpy or 0.0) - state.specific_internal_energy
        # the library's own pressure after T, p is off by some 1e-9, and h − u cancels most digits of a liquid
        noise = 3e-9 * max(abs(state.specific_internal_energy), fluid.gas_constant * fluid.critical_point[0])
        assert difference == pytest.approx(product, rel=1e-8, abs=noise)
        checked += 1
        if state.quality is not None and state.temperature < 0.999 * fluid.critical_point[0]:
            liquid, vapour = fluid.saturation({T: state.temperature})
            for prop in (V, "specific_internal_energy", "specific_enthalpy", "specific_entropy"):
                low, high, value = (value_of(s, prop) or 0.0 for s in (liquid, vapour, state))
                assert (value - low) / (high - low) == pytest.approx(state.quality, abs=1e-8)
                checked += 1

    run()
    assert checked > 20
