"""Where deviations start, and what they spoiled."""

from __future__ import annotations

from checker.facts.origins import below_zero, group_of, is_impossible, origins, spoiled_by
from tests.checker.cases import case, compared, gas_bottle

BASE = "processes/warming"


def test_an_origin_has_its_heirs() -> None:
    """A wrong ΔU spoils the heat that was made from it, and nothing else."""
    found = case(
        gas_bottle(
            {"internal_energy_change": "41.16 kJ", "heat": "41.16 kJ", "entropy_change": "0.0896 kJ/K"}
        )
    )
    (group,) = origins(found)
    (first,) = group
    assert first.statement.pointer == f"{BASE}/internal_energy_change"
    assert f"{BASE}/heat" in spoiled_by(found, group, first)
    assert f"{BASE}/entropy_change" not in spoiled_by(found, group, first)


def test_a_state_is_one_origin() -> None:
    """Pressure and volume of one state start together; the group of either is the same."""
    found = case(gas_bottle(hot={"pressure": "8.000 bar", "specific_volume": "2.000 m³/kg"}))
    p, v = (compared(found, f"states/hot/gas/{name}") for name in ("pressure", "specific_volume"))
    assert {c.statement.pointer for g in origins(found) for c in g} <= {
        p.statement.pointer,
        v.statement.pointer,
    }
    first = next(origins(found))[0]
    assert first in group_of(found, first)


def test_what_can_be_negative_is_never_impossible() -> None:
    """A ΔU may have either sign; S_gen may not."""
    found = case(gas_bottle({"internal_energy_change": "-31.16 kJ", "entropy_generation": "-0.5000 kJ/K"}))
    assert not is_impossible(found, compared(found, f"{BASE}/internal_energy_change"))
    assert is_impossible(found, compared(found, f"{BASE}/entropy_generation"))


def test_a_value_within_its_half_width_of_zero_is_not_below_it() -> None:
    """A zero that was rounded from below stays a zero."""
    found = case(gas_bottle({"entropy_generation": "-0.0 kJ/K"}))
    assert list(below_zero(found, f"{BASE}/entropy_generation")) == []
