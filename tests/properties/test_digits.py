"""A result is held to the digits that it is stated with: to no more of them, and to no fewer."""

from __future__ import annotations

import math

from hypothesis import given
from hypothesis import strategies as st

from checker.basis import Basis
from checker.findings import Outcome
from checker.vocabulary import Allowance
from tests.checker.cases import case, compared, gas_bottle

NOTHING_ALLOWED = Basis(allowances=dict.fromkeys(Allowance, 0.0))
"""Without an allowance the digits alone decide."""


def bottle(first: str, last: str, boundary: str) -> dict[str, object]:
    """Return the helium bottle between two temperatures, with heat through a boundary."""
    record = gas_bottle()
    record["states"]["cold"]["gas"]["inputs"]["temperature"] = f"{first} K"
    record["states"]["hot"]["gas"]["inputs"]["temperature"] = f"{last} K"
    record["processes"][0]["heat_transfers"][0]["boundary_temperature"] = f"{boundary} K"
    return record


def exact(first: str, last: str, boundary: str) -> dict[str, float]:
    """Return heat [kJ], entropy change and generation [kJ/K] in closed form."""
    heat = 0.1 * 3.116 * (float(last) - float(first))
    change = 0.1 * 3.116 * math.log(float(last) / float(first))
    return {"heat": heat, "entropy_change": change, "entropy_generation": change - heat / float(boundary)}


def rounded(value: float, digits: int) -> str:
    """Return a number rounded to so many significant digits, zeros at its end included."""
    mantissa, exponent = f"{value:.{digits - 1}e}".split("e")
    return f"{float(f'{mantissa}e{exponent}'):.{max(0, digits - 1 - int(exponent))}f}"


UNITS = {"heat": "kJ", "entropy_change": "kJ/K", "entropy_generation": "kJ/K"}
TEMPERATURES = st.tuples(
    st.integers(2500, 3500).map(lambda t: f"{t / 10:.1f}"),
    st.integers(3600, 6000).map(lambda t: f"{t / 10:.1f}"),
    st.integers(6100, 9000).map(lambda t: f"{t / 10:.1f}"),
)


@given(TEMPERATURES, st.integers(2, 6), st.sampled_from(sorted(UNITS)))
def test_a_right_result_is_not_accused_however_it_is_rounded(
    temperatures: tuple[str, str, str], digits: int, name: str
) -> None:
    """Two digits or six, and with no allowance at all: rounding alone is within its own half-width."""
    record = bottle(*temperatures)
    text = f"{rounded(exact(*temperatures)[name], digits)} {UNITS[name]}"
    record["processes"][0]["results"] = {name: text}  # type: ignore[index]  # plain JSON
    found = compared(case(record, basis=NOTHING_ALLOWED), f"processes/warming/{name}")
    assert found.outcome is Outcome.AGREES


@given(
    TEMPERATURES,
    st.integers(2, 6),
    st.sampled_from(sorted(UNITS)),
    st.floats(1.3, 40.0) | st.floats(-40.0, -1.3),
)
def test_a_result_off_by_more_than_its_digits_is_held_to_them(
    temperatures: tuple[str, str, str], digits: int, name: str, off: float
) -> None:
    """A result off by more than 2/√3 half-widths beside its rounding is wrong, with six digits as with two."""
    value = exact(*temperatures)[name]
    half_width = 0.5 * 10.0 ** (math.floor(math.log10(abs(value))) - digits + 1)
    off_by = (abs(off) + 1.0) * half_width
    wrong = value + math.copysign(off_by, off)
    if wrong <= 0.0 or math.floor(math.log10(wrong)) != math.floor(math.log10(value)):
        wrong = value + off_by * (1.0 if off < 0.0 else -1.0)
    if wrong <= 0.0 or math.floor(math.log10(wrong)) != math.floor(math.log10(value)):
        return  # another power of ten has other half-widths
    record = bottle(*temperatures)
    record["processes"][0]["results"] = {name: f"{rounded(wrong, digits)} {UNITS[name]}"}  # type: ignore[index]  # plain JSON
    found = compared(case(record, basis=NOTHING_ALLOWED), f"processes/warming/{name}")
    assert found.outcome is Outcome.WRONG
