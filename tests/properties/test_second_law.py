"""The second law on random records: heat between bodies, and reversible cycles between two reservoirs."""

from __future__ import annotations

import math
import random
from typing import Any

import pytest
from hypothesis import given
from hypothesis import strategies as st

from checker.case import Case
from tests.checker.cases import case
from tests.properties.composites import Kind, gases, si
from tests.properties.trial import steady

Pair = tuple[tuple[float, float, float], tuple[float, float, float]]
"""Mass, specific heat and first temperature of two bodies."""


def _rounded(low: float, high: float) -> st.SearchStrategy[float]:
    return st.floats(low, high).map(lambda x: float(f"{x:.6g}"))


BODY = st.tuples(_rounded(0.1, 50.0), _rounded(200.0, 4500.0), _rounded(250.0, 900.0))


def meeting(pair: Pair) -> dict[str, Any]:
    """Return two bodies that come to one temperature by the heat between them."""
    return {
        "id": "meeting",
        "bodies": {
            name: {
                "substance": "Block",
                "model": "constant specific heat",
                "inputs": {"mass": si(mass, "kg"), "specific_heat": si(heat, "J/(kg·K)")},
            }
            for name, (mass, heat, _) in zip("ab", pair, strict=True)
        },
        "states": {
            "first": {
                n: {"inputs": {"temperature": si(t, "K")}} for n, (*_, t) in zip("ab", pair, strict=True)
            },
            "last": {"a": {}, "b": {}},
        },
        "processes": [
            {
                "id": "p",
                "from": "first",
                "to": "last",
                "insulated": True,
                "equilibrium": ["temperature"],
                "heat_transfers": [{"id": "q", "from": "a", "to": "b", "results": {"energy": "1 J"}}],
                "work_transfers": [],
                "results": {"entropy_generation": "1 J/K"},
            }
        ],
    }


@steady(25)
@given(st.tuples(BODY, BODY))
def test_heat_between_bodies_generates_the_sum_of_their_entropy_changes(pair: Pair) -> None:
    """What passes between two bodies of their own temperatures generates ΣΔS, whichever is the hotter one."""
    found = case(meeting(pair))
    capacities = [mass * heat for mass, heat, _ in pair]
    end = math.fsum(c * t for c, (*_, t) in zip(capacities, pair, strict=True)) / sum(capacities)
    expected = math.fsum(c * math.log(end / t) for c, (*_, t) in zip(capacities, pair, strict=True))
    passed = capacities[0] * (pair[0][2] - end)
    base = "processes/p/heat_transfers/q"
    near = 1e-9 * max(capacities)
    assert found.value(f"{base}/energy") == pytest.approx(passed, rel=1e-9, abs=near * 300.0)
    assert found.value(f"{base}/entropy_generation") == pytest.approx(expected, rel=1e-8, abs=near)
    assert found.value("processes/p/entropy_generation") == pytest.approx(expected, rel=1e-8, abs=near)


def carnot(
    kind: Kind, hot: float, cold: float, pressure: float, ratio: float, order: list[int]
) -> dict[str, Any]:
    """Return a cycle of two isotherms and two isentropes; its cold corners are known by temperature alone."""
    state = kind.physics.at(t=hot, p=pressure)
    wide = kind.physics.at(t=hot, v=(state.v or 0.0) * ratio)
    legs = [
        ("heating", "a", "b", "isothermal", hot),
        ("expansion", "b", "c", "isentropic", None),
        ("cooling", "c", "d", "isothermal", cold),
        ("compression", "d", "a", "isentropic", None),
    ]
    processes = [
        {
            "id": name,
            "from": first,
            "to": last,
            "path": path,
            "work_transfers": [],
            "heat_transfers": []
            if wall is None
            else [
                {
                    "id": f"{name}-heat",
                    "boundary_temperature": si(wall, "K"),
                    "reservoir_temperature": si(wall, "K"),
                }
            ],
            "results": {"entropy_generation": "0 J/K"},
        }
        for name, first, last, path, wall in legs
    ]
    units = {"specific_heat_at_constant_volume": "J/(kg·K)", "gas_constant": "J/(kg·K)"}
    inputs = {name: si(value, units[name]) for name, value in kind.constants.items()}
    return {
        "id": "carnot",
        "bodies": {
            "gas": {"substance": kind.substance, "model": kind.model, "inputs": {"mass": "1 kg", **inputs}}
        },
        "states": {
            "a": {"gas": {"inputs": {"temperature": si(hot, "K"), "pressure": si(state.p or 0.0, "Pa")}}},
            "b": {"gas": {"inputs": {"temperature": si(hot, "K"), "pressure": si(wide.p or 0.0, "Pa")}}},
            "c": {"gas": {"inputs": {"temperature": si(cold, "K")}}},
            "d": {"gas": {"inputs": {"temperature": si(cold, "K")}}},
        },
        "processes": [processes[i] for i in order],
        "results": {"net_work": "1 kJ", "thermal_efficiency": "0.5"},
    }


def efficiency(found: Case) -> float:
    """Return the thermal efficiency of a cycle."""
    value = found.value("results/thermal_efficiency")
    assert value is not None, found.why_not("results/thermal_efficiency")
    return value


@steady(25)
@given(
    gases(),
    _rounded(450.0, 800.0),
    _rounded(0.55, 0.9),
    _rounded(5e5, 3e6),
    _rounded(1.2, 4.0),
    st.integers(),
)
def test_a_reversible_cycle_between_two_reservoirs_meets_carnot(
    kind: Kind, hot: float, part: float, pressure: float, ratio: float, seed: int
) -> None:
    """η = 1 − T_c/T_h of any gas, ideal or by its equation of state, in whatever order the processes stand."""
    cold = float(f"{hot * part:.6g}")
    order = list(range(4))
    plain = case(carnot(kind, hot, cold, pressure, ratio, order))
    assert efficiency(plain) == pytest.approx(1.0 - cold / hot, rel=1e-8)
    random.Random(seed).shuffle(order)
    mixed = case(carnot(kind, hot, cold, pressure, ratio, order))
    assert efficiency(mixed) == pytest.approx(efficiency(plain), rel=1e-12)
    scale = abs(plain.value("processes/heating/heat") or 0.0) / hot
    for name in ("heating", "expansion", "cooling", "compression"):
        pointer = f"processes/{name}/entropy_generation"
        assert plain.value(pointer) == pytest.approx(0.0, abs=1e-8 * scale), name
        assert mixed.value(pointer) == pytest.approx(plain.value(pointer), abs=1e-9 * scale), name
