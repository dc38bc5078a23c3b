"""Records with one wrong result, by the closed forms of a gas of constant specific heats, for the slips' tests.

m = 0.1 kg, c_v = 3.116, R = 2.077, c_p = 5.193 kJ/(kg·K); 300 K and 5 bar to 400 K.
"""

from __future__ import annotations

import copy
from typing import Any

M, CV, R, CP = 0.1, 3116.0, 2077.0, 5193.0
T1, T2, P1 = 300.0, 400.0, 5e5
P0, T0 = 1.013e5, 293.15
DU, WORK, DH = M * CV * (T2 - T1), M * R * (T2 - T1), M * CP * (T2 - T1)

Record = dict[str, Any]


def gas(
    path: Any = "constant volume",
    results: dict[str, str] | None = None,
    cold: dict[str, str] | None = None,
    hot: dict[str, str] | None = None,
    cold_results: dict[str, str] | None = None,
    hot_results: dict[str, str] | None = None,
    body: dict[str, str] | None = None,
    wall: dict[str, Any] | None = None,
    **process: Any,
) -> Record:
    """Return a record of the gas along a path; each argument replaces or adds what it names."""
    inputs = {
        "mass": "0.1000 kg",
        "cv": "3.116 kJ/(kg·K)",
        "gas_constant": "2.077 kJ/(kg·K)",
        **(body or {}),
    }
    if "volume" in inputs:
        del inputs["mass"]
    wall = {
        "id": "wall",
        "boundary_temperature": "450.0 K",
        "reservoir_temperature": "500.0 K",
        **(wall or {}),
    }
    return {
        "id": "bottle",
        "title": "Gas",
        "bodies": {"gas": {"substance": "Helium", "model": "constant specific heat", "inputs": inputs}},
        "states": {
            "cold": {
                "gas": {
                    "inputs": {"temperature": "300.0 K", "pressure": "5.000 bar", **(cold or {})},
                    "results": cold_results or {},
                }
            },
            "hot": {
                "gas": {
                    "inputs": {"temperature": "400.0 K"} if hot is None else hot,
                    "results": hot_results or {},
                }
            },
        },
        "processes": [
            {
                "id": "change",
                "from": "cold",
                "to": "hot",
                "path": path,
                "heat_transfers": [wall],
                "work_transfers": [],
                "results": results or {},
                **process,
            }
        ],
    }


def fluid(substance: str, inputs: dict[str, str], results: dict[str, str]) -> Record:
    """Return a record with one state of a real fluid to look at, and an end far from it."""
    body: Record = {"substance": substance, "model": "real fluid", "inputs": {"mass": "1.000 kg"}}
    return {
        "id": "vessel",
        "title": "State",
        "bodies": {"fluid": body},
        "states": {
            "only": {"fluid": {"inputs": inputs, "results": results}},
            "last": {"fluid": {"inputs": {"temperature": "350.0 °C", "pressure": "1.500 bar"}}},
        },
        "processes": [
            {
                "id": "change",
                "from": "only",
                "to": "last",
                "path": "end states only",
                "heat_transfers": [{"id": "wall", "boundary_temperature": "400.0 °C"}],
                "work_transfers": [],
            }
        ],
    }


def cycle(results: dict[str, str], reverse: bool = False, **more: Any) -> Record:
    """Return a cycle of two constant volumes and two constant pressures: 300, 600, 1200, 600 K at 5 and 10 bar."""
    corners = [
        ("300.0 K", "5.000 bar"),
        ("600.0 K", "10.00 bar"),
        ("1200 K", "10.00 bar"),
        ("600.0 K", "5.000 bar"),
    ]
    order = [0, 3, 2, 1] if reverse else [0, 1, 2, 3]
    paths = ["constant pressure", "constant volume"] if reverse else ["constant volume", "constant pressure"]
    record = copy.deepcopy(gas())
    record["states"] = {
        f"s{i}": {"gas": {"inputs": {"temperature": corners[i][0], "pressure": corners[i][1]}}}
        for i in range(4)
    }
    record["processes"] = [
        {
            "id": f"leg-{place}",
            "from": f"s{start}",
            "to": f"s{order[(place + 1) % 4]}",
            "path": paths[place % 2],
            "heat_transfers": [{"id": "wall", "boundary_temperature": "1300 K" if place < 2 else "280.0 K"}],
            "work_transfers": [],
        }
        for place, start in enumerate(order)
    ]
    record["results"] = results
    record.update(more)
    return record


def store(results: dict[str, str], last: str = "80.00 °C") -> Record:
    """Return a melting store: 10 kg, 50 °C, 200 kJ/kg, 2 and 2.2 kJ/(kg·K), from 20 °C."""
    return {
        "id": "store",
        "title": "Store",
        "bodies": {
            "wax": {
                "substance": "wax",
                "model": "phase change",
                "inputs": {
                    "mass": "10.00 kg",
                    "melting_temperature": "50.00 °C",
                    "latent_heat": "200.0 kJ/kg",
                    "specific_heat_of_solid": "2.000 kJ/(kg·K)",
                    "specific_heat_of_liquid": "2.000 kJ/(kg·K)",
                },
            }
        },
        "states": {
            "cold": {"wax": {"inputs": {"temperature": "20.00 °C"}}},
            "hot": {"wax": {"inputs": {"temperature": last}}},
        },
        "processes": [
            {
                "id": "change",
                "from": "cold",
                "to": "hot",
                "heat_transfers": [{"id": "wall", "boundary_temperature": "90.00 °C"}],
                "work_transfers": [],
                "results": results,
            }
        ],
    }


def quench(results: dict[str, str]) -> Record:
    """Return two solids between given states: 2 kg·0.5 kJ/(kg·K) and 4 kg·1 kJ/(kg·K), both from 300 K to 350 K."""
    solids = {"part": ("2.000 kg", "0.5000 kJ/(kg·K)"), "bath": ("4.000 kg", "1.000 kJ/(kg·K)")}
    ends = {"cold": "300.0 K", "hot": "350.0 K"}
    return {
        "id": "bath",
        "title": "Bath",
        "bodies": {
            name: {
                "substance": f"{name} stuff",
                "model": "constant specific heat",
                "inputs": {"mass": mass, "specific_heat": heat},
            }
            for name, (mass, heat) in solids.items()
        },
        "states": {
            state: {name: {"inputs": {"temperature": text}} for name in solids}
            for state, text in ends.items()
        },
        "processes": [
            {
                "id": "change",
                "from": "cold",
                "to": "hot",
                "heat_transfers": [{"id": "wall", "boundary_temperature": "400.0 K"}],
                "work_transfers": [],
                "results": results,
            }
        ],
    }
