"""Bodies by stated tables: liquids and solids, and ideal gases."""

from __future__ import annotations

import itertools
import math

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.interface import PropertyState, Substance

T, P, V, U, H, S = (
    "temperature", "pressure", "specific_volume", "specific_internal_energy", "specific_enthalpy",
    "specific_entropy",
)  # fmt: skip
C, CP, CV, RHO = (
    "specific_heat", "specific_heat_at_constant_pressure", "specific_heat_at_constant_volume", "density",
)  # fmt: skip
Rows = tuple[tuple[tuple[str, float], ...], ...]


def rows(*columns: str, values: list[tuple[float, ...]]) -> Rows:
    """Return rows of a table."""
    return tuple(tuple(zip(columns, row, strict=True)) for row in values)


def body(table: Rows, **constants: float) -> Substance:
    """Return a body by its table."""
    return make_substance("sample", "tabulated", constants, table=table)


HEATS = rows(T, C, values=[(300.0, 400.0), (400.0, 440.0), (600.0, 480.0)])
ENERGIES = rows(T, U, values=[(300.0, 5e3), (400.0, 47e3), (600.0, 139e3)])
GAS_HEATS = [(300.0, 1040.0), (500.0, 1060.0), (1000.0, 1170.0)]
GAS = body(rows(T, CP, values=GAS_HEATS), gas_constant=297.0)
GAS_BY_ENTHALPY = body(
    rows(T, H, values=[(300.0, 311e3), (500.0, 521e3), (1000.0, 1080e3)]), gas_constant=297.0
)
SOLID, SOLID_BY_ENERGY = body(HEATS, density=2700.0), body(ENERGIES, density=2700.0)
SOLIDS = pytest.mark.parametrize("solid", [SOLID, SOLID_BY_ENERGY], ids=["c", "u"])
GASES = pytest.mark.parametrize("gas", [GAS, GAS_BY_ENTHALPY], ids=["cp", "h"])


def test_specific_heats_are_integrated_along_straight_lines() -> None:
    """Energy is Σ mean c · ΔT of the pieces, s in closed form of a line: b ln(T₂/T₁) + a ΔT."""
    end = SOLID.state({T: 600.0})
    assert end.specific_internal_energy == pytest.approx(420.0 * 100.0 + 460.0 * 200.0, rel=1e-14)
    first = (400.0 - 0.4 * 300.0) * math.log(4.0 / 3.0) + 0.4 * 100.0
    second = (440.0 - 0.2 * 400.0) * math.log(1.5) + 0.2 * 200.0
    assert end.specific_entropy == pytest.approx(first + second, rel=1e-13)


def test_energies_are_interpolated_and_entropies_follow() -> None:
    """Between rows of u the specific heat is constant, and s is Σ c ln(T₂/T₁)."""
    assert SOLID_BY_ENERGY.state({T: 350.0}).specific_internal_energy == pytest.approx(26e3)
    expected = 420.0 * math.log(4.0 / 3.0) + 460.0 * math.log(1.5)
    assert SOLID_BY_ENERGY.state({T: 600.0}).specific_entropy == pytest.approx(expected, rel=1e-13)


@SOLIDS
@given(temperature=st.floats(300.0, 600.0), pressure=st.floats(1e4, 1e7))
def test_every_property_of_a_solid_finds_the_state_again(
    solid: Substance, temperature: float, pressure: float
) -> None:
    """T, u, s, and h with p give back the state."""
    state = solid.state({T: temperature, P: pressure})
    for name in (U, S, H):
        assert_same(solid.state({name: getattr(state, name), P: pressure}), state)


def assert_same(found: PropertyState, state: PropertyState) -> None:
    """Assert that two states are one, to rounding."""
    for name in (T, P, V, U, H, S):
        assert getattr(found, name) == pytest.approx(getattr(state, name), rel=1e-8, abs=1e-5), name


@SOLIDS
@given(temperature=st.floats(300.0, 599.9))
def test_a_solid_rises_in_energy_and_entropy(solid: Substance, temperature: float) -> None:
    """Energy rises with T, and du = T ds along a small step."""
    first, last = (solid.state({T: t}) for t in (temperature, temperature + 0.05))
    energy = last.specific_internal_energy - first.specific_internal_energy
    entropy = last.specific_entropy - first.specific_entropy
    assert energy > 0.0
    assert energy == pytest.approx((temperature + 0.025) * entropy, rel=1e-6)


@GASES
@given(temperature=st.floats(305.0, 995.0), pressure=st.floats(1e3, 1e7))
def test_every_pair_of_the_gas_finds_its_state_again(
    gas: Substance, temperature: float, pressure: float
) -> None:
    """Twelve of fifteen pairs fix a state; T, u and h depend on each other."""
    state = gas.state({T: temperature, P: pressure})
    for pair in itertools.combinations((T, P, V, U, H, S), 2):
        known = {name: getattr(state, name) for name in pair}
        if set(pair) <= {T, U, H}:
            with pytest.raises(NotEvaluable):
                gas.state(known)
        else:
            assert_same(gas.state(known), state)


@GASES
@given(temperature=st.floats(300.0, 999.0), pressure=st.floats(1e3, 1e7))
def test_the_gas_obeys_its_laws(gas: Substance, temperature: float, pressure: float) -> None:
    """It has p v = R T, h − u = p v, and T ds = du + p dv along a small step."""
    first = gas.state({T: temperature, P: pressure})
    last = gas.state({T: temperature + 0.01, P: pressure * 1.0001})
    assert first.specific_volume == pytest.approx(297.0 * temperature / pressure, rel=1e-12)
    assert first.specific_enthalpy == pytest.approx(first.specific_internal_energy + 297.0 * temperature)
    assert first.pressure is not None
    assert last.pressure is not None
    assert last.specific_volume is not None
    middle = 0.5 * (first.pressure + last.pressure)
    work = middle * (last.specific_volume - first.specific_volume)
    energy = last.specific_internal_energy - first.specific_internal_energy
    entropy = last.specific_entropy - first.specific_entropy
    assert (temperature + 0.005) * entropy == pytest.approx(energy + work, rel=1e-4, abs=1e-4)


def test_rows_of_a_gas_by_c_v_and_by_c_p_are_one() -> None:
    """c_p and c_v that differ by R make the same differences of u and s."""
    by_volume = body(rows(T, CV, values=[(t, cp - 297.0) for t, cp in GAS_HEATS]), gas_constant=297.0)
    ends = [{T: 320.0, P: 1e5}, {T: 940.0, P: 4e5}]
    for name in (U, H, S):
        changes = [
            getattr(gas.state(ends[1]), name) - getattr(gas.state(ends[0]), name) for gas in (GAS, by_volume)
        ]
        assert changes[0] == pytest.approx(changes[1], rel=1e-12)


def test_a_molar_mass_makes_a_gas() -> None:
    """R follows from the molar mass; with a density beside it the body is a liquid or solid."""
    gas = body(rows(T, CP, values=GAS_HEATS), molar_mass=0.028)
    assert gas.gas_constant == pytest.approx(8.314462618 / 0.028)
    assert not gas.incompressible
    assert body(rows(T, CP, values=GAS_HEATS), molar_mass=0.028, density=900.0).incompressible
    assert body(HEATS, molar_mass=0.028).incompressible


def test_stated_entropies_count() -> None:
    """Where the table states s it is taken as it stands, straight in ln T between the rows."""
    entropies = [
        1000.0,
        1000.0 + 420.0 * math.log(4 / 3) + 0.05,
        1000.0 + 420.0 * math.log(4 / 3) + 460.0 * math.log(1.5),
    ]
    table = rows(
        T,
        U,
        S,
        values=[
            (t, u, s)
            for (t, u), s in zip([(300.0, 5e3), (400.0, 47e3), (600.0, 139e3)], entropies, strict=True)
        ],
    )
    solid = body(table)
    for temperature, entropy in zip((300.0, 400.0, 600.0), entropies, strict=True):
        assert solid.state({T: temperature}).specific_entropy == pytest.approx(entropy, rel=1e-14)
        assert solid.state({S: entropy}).temperature == pytest.approx(temperature, rel=1e-12)


def test_stated_entropies_of_a_gas_are_those_at_one_pressure() -> None:
    """s° of the table rises by ∫c_p dT/T, and s of a state at 100 kPa is s° of the table."""
    entropies = [6800.0, 6800.0 + 1050.0 * math.log(5 / 3)]
    table = rows(T, H, S, values=[(300.0, 0.0, entropies[0]), (500.0, 1050.0 * 200.0, entropies[1])])
    gas = body(table, gas_constant=297.0)
    for temperature, entropy in zip((300.0, 500.0), entropies, strict=True):
        assert gas.state({T: temperature, P: 1e5}).specific_entropy == pytest.approx(entropy, rel=1e-12)


def test_volumes_of_the_table_are_interpolated() -> None:
    """A volume between the rows is on a straight line, and h = u + p v with it has an inverse."""
    table = rows(T, C, RHO, values=[(300.0, 4180.0, 1000.0), (350.0, 4190.0, 970.0)])
    liquid = body(table)
    state = liquid.state({T: 325.0, P: 5e5})
    assert state.specific_volume == pytest.approx(0.5 * (1.0 / 1000.0 + 1.0 / 970.0), rel=1e-12)
    assert liquid.state({H: state.specific_enthalpy or 0.0, P: 5e5}).temperature == pytest.approx(325.0)
    with pytest.raises(NotEvaluable, match="reaches this enthalpy"):
        liquid.state({H: 1e7, P: 5e5})


@pytest.mark.parametrize("temperature", [299.0, 601.0])
def test_outside_the_rows_nothing_is_known(temperature: float) -> None:
    """A table is not extrapolated."""
    for known in ({T: temperature}, {U: -1e3 if temperature < 300.0 else 1e6}):
        with pytest.raises(NotEvaluable) as refusal:
            SOLID.state(known)
        assert refusal.value.kind == "outside-range"
    with pytest.raises(NotEvaluable, match="is outside"):
        GAS.state({T: 1.7 * temperature if temperature > 300.0 else 290.0, P: 1e5})


WRONG = [
    ((), {}, "there is no row"),
    (rows(T, C, values=[(300.0, 400.0)]), {}, "one row only"),
    (rows(T, C, values=[(400.0, 400.0), (300.0, 410.0)]), {}, "temperature does not rise from row 1 to row 2"),
    (rows(T, C, values=[(300.0, 400.0), (300.0, 410.0)]), {}, "temperature does not rise"),
    (rows(T, U, values=[(300.0, 4e3), (350.0, 6e3), (400.0, 5e3)]), {}, "does not rise from row 2 to row 3"),
    (rows(T, C, values=[(300.0, 400.0), (400.0, -1.0)]), {}, "specific heat in row 2 is not above zero"),
    (rows(T, C, values=[(-3.0, 400.0), (400.0, 410.0)]), {}, "temperature in row 1 is not above zero"),
    (rows(C, values=[(400.0,), (410.0,)]), {}, "no temperature"),
    (rows(T, values=[(300.0,), (400.0,)]), {}, "none of them"),
    (rows(T, C, U, values=[(300.0, 400.0, 0.0), (400.0, 410.0, 1.0)]), {}, "it has specific heat, specific int"),
    ((*rows(T, C, values=[(300.0, 400.0)]), *rows(T, U, values=[(400.0, 1.0)])), {}, "row 2 gives"),
    (rows(T, C, P, values=[(300.0, 400.0, 1.0), (400.0, 410.0, 1.0)]), {}, "pressure has no use"),
    (rows(T, C, V, RHO, values=[(300.0, 4.0, 1.0, 1.0), (400.0, 4.1, 1.0, 1.0)]), {}, "both the specific volume"),
    (rows(T, C, RHO, values=[(300.0, 4.0, 0.0), (400.0, 4.1, 1.0)]), {}, "density in row 1"),
    (rows(T, CP, values=[(300.0, 280.0), (400.0, 290.0)]), {"gas_constant": 287.0}, "not above R"),
    (HEATS, {"gas_constant": 287.0}, "a gas constant makes a gas"),
    (rows(T, CP, values=GAS_HEATS), {"gas_constant": 287.0, "molar_mass": 0.028}, "contradicts the molar mass"),
    (rows(T, C, RHO, values=[(300.0, 4.0, 1.0), (400.0, 4.1, 1.0)]), {"density": 1.0}, "input and in the table"),
    (HEATS, {"specific_heat": 400.0}, "stated beside a table"),
    (HEATS, {"density": -1.0}, "must be positive"),
    (rows(T, U, S, values=[(300.0, 0.0, 0.0), (400.0, 42e3, 200.0)]), {}, "the entropies of the table rise by 200"),
]  # fmt: skip


@pytest.mark.parametrize(("table", "constants", "words"), WRONG)
def test_a_table_that_cannot_be_used_says_why(table: Rows, constants: dict[str, float], words: str) -> None:
    """Every fault of a table is named, with its row."""
    with pytest.raises(NotEvaluable, match=words):
        body(table, **constants)
