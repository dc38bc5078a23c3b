"""The adapter around the property library: what it must not let through."""

from __future__ import annotations

import ast
import itertools
import math
import threading
from pathlib import Path

import pytest
from CoolProp import CoolProp

from checker.outcomes import NotEvaluable
from checker.substances.coolprop import GAS, HELMHOLTZ, INDUSTRIAL, LIQUID, TRUSTED, library_of
from checker.substances.properties import (
    ENERGY,
    ENTHALPY,
    ENTROPY,
    INDEX,
    PRESSURE,
    QUALITY,
    TEMPERATURE,
    VOLUME,
)

TP = (TEMPERATURE, PRESSURE)
TV = (TEMPERATURE, VOLUME)
TX = (TEMPERATURE, QUALITY)
ROOT = Path(__file__).parents[3]


def test_the_library_is_imported_in_one_place_and_not_at_import_time() -> None:
    """Only coolprop.py imports CoolProp, and only inside functions."""
    importing = []
    for path in sorted(ROOT.glob("checker/**/*.py")) + sorted(ROOT.glob("rules/**/*.py")):
        tree = ast.parse(path.read_text(encoding="utf-8"))
        for node in ast.walk(tree):
            names = [node.module or ""] if isinstance(node, ast.ImportFrom) else []
            names += [alias.name for alias in node.names] if isinstance(node, ast.Import) else []
            if any(name.split(".")[0] == "CoolProp" for name in names):
                importing.append(path.name)
        top = [name.name for node in tree.body if isinstance(node, ast.Import) for name in node.names]
        assert not any(name.startswith("CoolProp") for name in top)
    assert importing == ["coolprop.py"]


@pytest.mark.parametrize(
    ("backend", "name"),
    [("REFPROP", "Water"), ("HEOS", "REFPROP::Water"), ("BICUBIC&HEOS", "Water"), ("HEOS", "X")],
)
def test_commands_never_reach_the_library(backend: str, name: str) -> None:
    """Backends and names are commands to the library: what is not in our tables is refused before it."""
    with pytest.raises(NotEvaluable) as refusal:
        library_of(backend, name)
    assert refusal.value.kind == "not-supported"


def test_the_dangerous_pairs_are_not_offered() -> None:
    """Pairs that poison a kept state, hang or take the wrong root are not trusted."""
    assert len(TRUSTED) == 11
    for pair in ((VOLUME, QUALITY), (ENTHALPY, QUALITY), (ENTROPY, QUALITY), (ENTHALPY, ENTROPY)):
        assert pair not in TRUSTED
    for name in (ENERGY, ENTHALPY, ENTROPY):
        assert (TEMPERATURE, name) not in TRUSTED


def test_a_failed_update_leaves_nothing_behind() -> None:
    """After a refused state the next one is the same as before, not a leftover."""
    library = library_of(HELMHOLTZ, "Water")
    before = library.point(TP, 300.0, 1e5)
    for pair, first, second in (((PRESSURE, ENTHALPY), 1e5, 1e9), (TP, 300.0, 1e13), (TV, 1e-3, 1e-9)):
        with pytest.raises(NotEvaluable):
            library.point(pair, first, second)
        assert library.point(TP, 300.0, 1e5) == before


def test_the_answer_does_not_depend_on_history() -> None:
    """Saturated, gaseous and imposed-side updates in any order leave every later answer bit-identical."""
    library = library_of(HELMHOLTZ, "R134a")
    calls = [
        (TX, 300.0, 0.5, None),
        (TP, 300.0, 1e5, None),
        (TP, 280.0, 2e6, LIQUID),
        (TP, 320.0, 1e5, GAS),
        ((VOLUME, ENERGY), 0.05, 4e5, None),
        ((PRESSURE, ENTROPY), 5e5, 1750.0, None),
    ]
    expected = {call: library.point(call[0], call[1], call[2], call[3]) for call in calls}
    compared = 0
    for order in itertools.permutations(calls, 3):
        for call in order:
            assert library.point(call[0], call[1], call[2], call[3]) == expected[call]
            compared += 1
    assert compared == 360


@pytest.mark.parametrize(
    ("fluid", "pair", "first", "second"),
    [
        ("Water", TP, 6000.0, 1e5),
        ("Water", TV, 20000.0, 1.0),
        ("Water", TP, 300.0, 1.6e9),
        ("Water", TX, 250.0, 0.0),
        ("Water", TP, 260.0, 1e5),
        ("Water", TP, 255.0, 50e6),
        ("Nitrogen", TV, 66.0, 1.0 / 950.0),
        ("R134a", TP, 150.0, 1e5),
        ("R134a", TP, 456.0, 1e5),
        ("Ammonia", TX, 190.0, 1.0),
    ],
)
def test_what_the_library_answers_outside_the_range_is_refused(
    fluid: str, pair: tuple[str, str], first: float, second: float
) -> None:
    """Too hot, too cold, too much pressure and below the melting line are outside-range, whatever the library says."""
    with pytest.raises(NotEvaluable) as refusal:
        library_of(HELMHOLTZ, fluid).point(pair, first, second)
    assert refusal.value.kind in ("outside-range", "no-solution")


def test_the_range_is_checked_by_us_where_the_library_answers() -> None:
    """Liquid nitrogen at 66 K and 79 MPa is answered by the library as liquid; it is solid."""
    state = CoolProp.AbstractState("HEOS", "Nitrogen")
    state.update(CoolProp.DmassT_INPUTS, 950.0, 66.0)
    assert state.p() > 5e7
    with pytest.raises(NotEvaluable) as refusal:
        library_of(HELMHOLTZ, "Nitrogen").point(TV, 66.0, 1.0 / 950.0)
    assert refusal.value.kind == "outside-range"
    assert "melting line" in refusal.value.reason


def test_water_under_pressure_stays_liquid_below_its_triple_point() -> None:
    """At 200 MPa the melting line of water, not its triple point, decides."""
    point = library_of(HELMHOLTZ, "Water").point(TP, 255.0, 200e6)
    assert point.quality is None
    assert point.specific_volume < 1e-3


@pytest.mark.parametrize("pair", sorted(TRUSTED))
@pytest.mark.parametrize("backend", [HELMHOLTZ, INDUSTRIAL])
def test_junk_is_refused_and_never_crashes(backend: str, pair: tuple[str, str]) -> None:
    """NaN, infinities, zeros and absurd values give NotEvaluable or a checked state for every trusted pair."""
    library = library_of(backend, "Water")
    junk = (math.nan, math.inf, -math.inf, -1e300, -1.0, -0.0, 1e-300, 1e-12, 0.5, 1e3, 1e12, 1e300)
    tried = 0
    for first, second in itertools.product(junk, junk):
        if 0.0 in (first, second) and VOLUME in pair:
            continue
        if QUALITY in pair and not math.isfinite(second):
            continue  # refused one level up: the library would crash
        try:
            point = library.point(pair, first, second)
        except NotEvaluable:
            pass
        else:
            assert all(math.isfinite(value) for value in point if value is not None)
            assert point[INDEX[pair[0]]] == pytest.approx(first, rel=1e-5, abs=1.0)
        tried += 1
    assert tried > 90


def test_each_thread_has_its_own_library_state() -> None:
    """A state shared by threads would return another thread's temperature."""
    library_of(HELMHOLTZ, "Nitrogen")
    wrong: list[float] = []
    owners: set[int] = set()

    def work(temperature: float) -> None:
        library = library_of(HELMHOLTZ, "Nitrogen")
        owners.add(id(library))
        for _ in range(300):
            point = library.point(TP, temperature, 1e5)
            if point.temperature != temperature:
                wrong.append(temperature)

    threads = [threading.Thread(target=work, args=(300.0 + 10.0 * number,)) for number in range(4)]
    for thread in threads:
        thread.start()
    for thread in threads:
        thread.join()
    assert wrong == []
    assert len(owners | {id(library_of(HELMHOLTZ, "Nitrogen"))}) == 5


def test_the_ideal_part_is_the_real_fluid_at_vanishing_density() -> None:
    """Energy and entropy of the ideal part are those of the real fluid where it is very thin, on the same datum."""
    compared = 0
    for fluid in ("Nitrogen", "CarbonDioxide", "R134a", "Air", "Methane"):
        library = library_of(HELMHOLTZ, fluid)
        for temperature in (300.0, 400.0):
            energy, entropy, _ = library.ideal_part(temperature)
            thin = library.point(TV, temperature, 1e5)
            gas_constant = library.constants.gas_constant
            assert energy == pytest.approx(thin.specific_internal_energy, abs=3e-4 * gas_constant)
            expected = thin.specific_entropy - gas_constant * math.log(1e5)
            assert entropy == pytest.approx(expected, abs=2e-5 * gas_constant)
            compared += 1
    assert compared == 10
