"""Units of another kind: what is said, and rates over a duration."""

from __future__ import annotations

import pytest

from checker.package.dimensions import as_total, is_rate_of, wrong_unit
from checker.quantity import dimensions as dim
from checker.quantity import parse_quantity
from checker.vocabulary import Level, Term, term_of


def term(level: Level, name: str) -> Term:
    """Return a term that exists."""
    found = term_of(level, name)
    assert found is not None
    return found


CASES = [
    # level, name, text, kind, what is said
    (Level.PROCESS, "heat", "5 kJ", None, ""),
    (Level.PROCESS, "heat", "5 kW", "rate-for-total", "or give the `duration`"),
    (Level.PROCESS, "entropy_change", "5 W/K", "rate-for-total", "in J/K, kJ/K"),
    (Level.PROCESS, "specific_work", "5 kJ/kg", None, ""),
    (Level.PROCESS, "specific_work", "5 kW/kg", "rate-for-total", "rate"),
    (Level.STATE, "internal_energy", "5 kJ/kg", "specific-for-total", "Multiply by the mass"),
    (Level.STATE, "internal_energy", "5 kJ/mol", "specific-for-total", "Multiply by the amount"),
    (Level.STATE, "entropy", "5 kJ/(kg·K)", "specific-for-total", "that of the whole body"),
    (Level.STATE, "volume", "5 m³/kg", "specific-for-total", "Multiply by the mass"),
    (Level.STATE, "specific_enthalpy", "5 kJ", "total-for-specific", "Divide by the mass"),
    (Level.STATE, "specific_volume", "5 L", "total-for-specific", "Divide by the mass"),
    (Level.STATE, "specific_entropy", "5 kJ/(kmol·K)", "dimension-wrong", "Divide by the molar mass"),
    (Level.STATE, "specific_volume", "5 kg/m³", "dimension-wrong", "State it as `density`"),
    (Level.STATE, "density", "5 m³/kg", "dimension-wrong", "State it as `specific_volume`"),
    (Level.BODY, "mass", "5 mol", "dimension-wrong", "State it as `amount`"),
    (Level.BODY, "volume", "5 mol", "dimension-wrong", "state it as `amount`"),
    (Level.BODY, "amount", "5 kg", "dimension-wrong", "State it as `mass`"),
    (Level.PROCESS, "mean_power", "5 kJ", "dimension-wrong", "W, kW"),
    (Level.PROCESS, "duration", "5 m", "dimension-wrong", "s, min, h"),
    (Level.CYCLE, "thermal_efficiency", "5 kJ", "dimension-wrong", "a plain number"),
]


@pytest.mark.parametrize(("level", "name", "text", "kind", "says"), CASES)
def test_units_of_another_kind(level: Level, name: str, text: str, kind: str | None, says: str) -> None:
    """Rates, specific values and totals in each other's place are told apart, and what helps is said."""
    wanted = term(level, name)
    wrong = wrong_unit(parse_quantity(text, expected=wanted.dimension), wanted)
    assert (wrong.kind if wrong else None) == kind
    if wrong is not None:
        assert says.lower() in f"{wrong.message} {wrong.suggestion}".lower()
        assert text in wrong.message


def test_only_energies_and_entropies_have_rates() -> None:
    """A mass flow is no rate of a mass that a duration would make right."""
    assert is_rate_of(dim.POWER, dim.ENERGY)
    assert is_rate_of(dim.ENTROPY_RATE, dim.ENTROPY)
    assert not is_rate_of((0, 1, -1, 0, 0), dim.MASS)
    assert not is_rate_of(dim.ENERGY, dim.ENERGY)


def test_a_total_from_a_rate() -> None:
    """Value, digits and ± are those of the product; the text and the unit's name stay."""
    rate = parse_quantity("6.0 ± 0.2 kW", expected=dim.ENERGY)
    total = as_total(rate, parse_quantity("75 min", expected=dim.TIME))
    assert total.text == "6.0 ± 0.2 kW"
    assert total.value == pytest.approx(27e6)  # 6.0 kW × 4500 s
    assert total.half_width == pytest.approx(0.05e3 * 4500)
    assert total.plus_minus == pytest.approx(0.2e3 * 4500)
    assert total.dimension == dim.ENERGY
    assert total.unit.text == "kW"
    assert total.number_of(total.value) == pytest.approx(6.0)
    assert total.notes[-1] == "6.0 ± 0.2 kW read as a total over the duration of 75 min"


def test_the_uncertainty_of_the_duration_counts() -> None:
    """The ± of the duration adds to that of the rate, linearly."""
    rate = parse_quantity("2 ± 0.1 kW", expected=dim.ENERGY)
    total = as_total(rate, parse_quantity("10 ± 1 s", expected=dim.TIME))
    assert total.plus_minus == pytest.approx(0.1e3 * 10 + 2e3 * 1)
    exact = as_total(parse_quantity("2 kW", expected=dim.ENERGY), parse_quantity("10 s", expected=dim.TIME))
    assert exact.plus_minus is None
