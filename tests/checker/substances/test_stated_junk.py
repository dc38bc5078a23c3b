"""Whatever numbers a package states of a body that melts or of a table, the answer is a state or not evaluable."""

from __future__ import annotations

import math

from hypothesis import given
from hypothesis import strategies as st

from checker.outcomes import NotEvaluable
from checker.substances import make_substance
from checker.substances.interface import Phase

NUMBERS = st.one_of(
    st.floats(allow_nan=True, allow_infinity=True),
    st.sampled_from([0.0, -1.0, 1e-300, 5e-324, 1.0, 273.15, 300.0, 1e300, 1.7e308]),
)
CONSTANTS = st.dictionaries(
    st.sampled_from(
        ["melting_temperature", "latent_heat", "specific_heat", "specific_heat_of_solid",
         "specific_heat_of_liquid", "melting_span", "density", "molar_mass", "gas_constant"]
    ),
    NUMBERS,
)  # fmt: skip
KNOWN = st.dictionaries(
    st.sampled_from(
        ["temperature", "pressure", "specific_volume", "specific_internal_energy", "specific_enthalpy",
         "specific_entropy", "quality", "melted_fraction"]
    ),
    NUMBERS,
    max_size=3,
)  # fmt: skip
ROWS = st.lists(
    st.dictionaries(
        st.sampled_from(
            ["temperature", "specific_heat", "specific_internal_energy", "specific_enthalpy", "specific_entropy",
             "density", "specific_heat_at_constant_pressure"]
        ),
        NUMBERS,
        min_size=1,
    ),
    max_size=4,
)  # fmt: skip


def answers(
    model: str,
    substance: str,
    constants: dict[str, float],
    known: dict[str, float],
    rows: list[dict[str, float]],
    phase: Phase | None = None,
) -> bool:
    """Return whether the answer is a state of finite temperature and energy, or a refusal."""
    table = tuple(tuple(row.items()) for row in rows)
    try:
        found = make_substance(substance, model, constants, table=table).state(known, phase)
    except NotEvaluable as outcome:
        return bool(outcome.reason)
    return found.temperature > 0.0 and math.isfinite(found.specific_internal_energy)


@given(CONSTANTS, KNOWN, st.sampled_from(["Water", "wax", "paraffin"]), st.sampled_from([None, *Phase]))
def test_a_body_that_melts(
    constants: dict[str, float], known: dict[str, float], substance: str, phase: Phase | None
) -> None:
    """Nothing else than NotEvaluable is raised, and no state is without a finite energy."""
    assert answers("phase change", substance, constants, known, [], phase)


@given(CONSTANTS, KNOWN, ROWS)
def test_a_table(constants: dict[str, float], known: dict[str, float], rows: list[dict[str, float]]) -> None:
    """Nothing else than NotEvaluable is raised, and no state is without a finite energy."""
    assert answers("tabulated", "alloy", constants, known, rows)


@given(KNOWN, st.lists(NUMBERS.filter(lambda x: x > 0.0), min_size=2, max_size=4, unique=True),
       st.lists(NUMBERS.filter(lambda x: x > 0.0), min_size=4, max_size=4),
       st.sampled_from([{}, {"gas_constant": 287.0}, {"density": 1.0}]),
       st.sampled_from(["specific_heat_at_constant_pressure", "specific_heat", "specific_enthalpy"]))  # fmt: skip
def test_a_table_in_order(
    known: dict[str, float],
    temperatures: list[float],
    values: list[float],
    constants: dict[str, float],
    name: str,
) -> None:
    """Rows in the order of temperature, however far apart, give a state or a reason."""
    rows = [{"temperature": t, name: v} for t, v in zip(sorted(temperatures), sorted(values), strict=False)]
    assert answers("tabulated", "alloy", constants, known, rows)


@given(KNOWN, st.lists(NUMBERS.filter(lambda x: x > 0.0), min_size=4, max_size=4))
def test_a_body_that_melts_with_all_constants(known: dict[str, float], values: list[float]) -> None:
    """Constants of any size give a state or a reason."""
    names = ("melting_temperature", "latent_heat", "specific_heat", "melting_span")
    assert answers("phase change", "wax", dict(zip(names, values, strict=True)), known, [])
    assert answers("phase change", "wax", dict(zip(names[:3], values[:3], strict=True)), known, [])
