"""Records of several bodies and several processes with exact closed forms, for ledgers, totals and flows."""

from __future__ import annotations

from copy import deepcopy
from typing import Any

Tree = dict[str, Any]

SOLID = {"model": "constant specific heat", "substance": "Block"}
GAS = {
    "substance": "Test gas",
    "model": "constant specific heat",
    "inputs": {"mass": "1 kg", "cv": "0.720 kJ/(kg·K)", "gas_constant": "0.290 kJ/(kg·K)"},
}


def quench(**more: Any) -> Tree:
    """Return 10 kg of 0.5 kJ/(kg·K) at 400 K in 20 kg of 1 kJ/(kg·K) at 300 K: 320 K in the end, Q = 400 kJ."""
    record = {
        "id": "quench",
        "title": "Block in a bath",
        "bodies": {
            "block": {**SOLID, "inputs": {"mass": "10 kg", "specific_heat": "0.500 kJ/(kg·K)"}},
            "bath": {**SOLID, "inputs": {"mass": "20 kg", "specific_heat": "1.00 kJ/(kg·K)"}},
        },
        "states": {
            "before": {
                "block": {"inputs": {"temperature": "400 K"}},
                "bath": {"inputs": {"temperature": "300 K"}},
            },
            "after": {"block": {}, "bath": {}},
        },
        "processes": [
            {
                "id": "quenching",
                "from": "before",
                "to": "after",
                "insulated": True,
                "equilibrium": ["temperature"],
                "heat_transfers": [
                    {"id": "into-bath", "from": "block", "to": "bath", "results": {"energy": "400 kJ"}}
                ],
                "work_transfers": [],
                "results": {"entropy_generation": "0.175 kJ/K"},
            }
        ],
    }
    record["processes"][0].update(more)  # type: ignore[index]  # the literal has values of several types
    return record


def jacketed() -> Tree:
    """Return block and bath, both from 300 K to 320 K by 500 kJ through a jacket: 100 kJ and 400 kJ."""
    record = deepcopy(quench())
    record["id"] = "jacketed"
    record["states"]["before"]["block"] = {"inputs": {"temperature": "300 K"}}
    process = record["processes"][0]
    del process["insulated"], process["results"]
    process["heat_transfers"] = [
        {"id": "jacket", "boundary_temperature": "350 K", "inputs": {"energy": "500 kJ"}}
    ]
    return record


def joined_vessels() -> Tree:
    """Return two equal parcels of gas, one of 2 bar and one of 1 bar, both of 300 K and 1 kg, joined by a valve."""
    gas = {"substance": "Test gas", "model": "constant specific heat"}
    inputs = {"mass": "1 kg", "cv": "0.720 kJ/(kg·K)", "gas_constant": "0.290 kJ/(kg·K)"}
    return {
        "id": "vessels",
        "title": "Two vessels joined",
        "bodies": {"left": {**gas, "inputs": dict(inputs)}, "right": {**gas, "inputs": dict(inputs)}},
        "states": {
            "before": {
                "left": {"inputs": {"temperature": "300 K", "pressure": "200 kPa"}},
                "right": {"inputs": {"temperature": "400 K", "pressure": "100 kPa"}},
            },
            "after": {"left": {}, "right": {}},
        },
        "processes": [
            {
                "id": "joining",
                "from": "before",
                "to": "after",
                "insulated": True,
                "equilibrium": ["temperature", "pressure"],
                "total_volume": {"bodies": ["left", "right"]},
                "heat_transfers": [],
                "work_transfers": [],
                "results": {"entropy_generation": "0.1 kJ/K"},
            }
        ],
    }


def cycle() -> Tree:
    """Return a cycle of a gas between constant volumes and constant pressures, 100 and 200 kPa; net work 87 kJ."""
    corners = {"a": (300, 100), "b": (600, 200), "c": (1200, 200), "d": (600, 100)}
    legs = (("rise", "a", "b", "volume"), ("out", "b", "c", "pressure"), ("fall", "c", "d", "volume"))
    processes = [
        {
            "id": name,
            "from": first,
            "to": last,
            "path": f"constant {held}",
            "work_transfers": [],
            "heat_transfers": [{"id": f"{name}-heat", "boundary_temperature": bound}],
        }
        for (name, first, last, held), bound in zip(
            (*legs, ("back", "d", "a", "pressure")), ("1500 K", "1500 K", "290 K", "290 K"), strict=True
        )
    ]
    return {
        "id": "cycle",
        "title": "A cycle",
        "bodies": {"gas": deepcopy(GAS)},
        "states": {
            name: {"gas": {"inputs": {"temperature": f"{t} K", "pressure": f"{p} kPa"}}}
            for name, (t, p) in corners.items()
        },
        "processes": processes,
        "results": {"net_work": "87.0 kJ", "thermal_efficiency": "0.1048"},
    }


def stops(heat: str) -> Tree:
    """Return a gas at 300 K and 100 kPa, warmed by a total heat; its piston lifts at 150 kPa, which takes 108 kJ."""
    legs = (("warming", "cold", "lifted", "volume"), ("lifting", "lifted", "hot", "pressure"))
    return {
        "id": "stops",
        "title": "A loaded piston",
        "bodies": {"gas": deepcopy(GAS)},
        "states": {
            "cold": {"gas": {"inputs": {"temperature": "300 K", "pressure": "100 kPa"}}},
            "lifted": {"gas": {}},
            "hot": {"gas": {}},
        },
        "processes": [
            {
                "id": name,
                "from": first,
                "to": last,
                "path": f"constant {held}",
                "work_transfers": [],
                "heat_transfers": [{"id": f"{name}-heat", "boundary_temperature": "900 K"}],
            }
            for name, first, last, held in legs
        ],
        "sequences": [
            {
                "id": "all",
                "processes": ["warming", "lifting"],
                "inputs": {"heat": heat, "lift_pressure": "150 kPa"},
                "results": {"work": "0 kJ"},
            }
        ],
    }
