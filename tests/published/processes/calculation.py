"""One record through the whole alternate calculation, from its bytes to its independent values.

The checks of this folder write a package, read it as any package is read, and compare what the sheet makes of the
inputs alone. Every quantity that is asked for is also claimed, as 1 in SI: the alternate calculation works out what
is claimed, and a claim that leaked into it would show at once.
"""

from __future__ import annotations

import json
from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from checker.basis import Basis
from checker.case import Case
from checker.document import read_document
from checker.evaluation import make_case
from checker.package import submit

SURROUNDINGS = {"temperature": "298.15 K", "pressure": "100000 Pa"}
NO_WORK: tuple[Mapping[str, Any], ...] = ()


@dataclass(frozen=True, slots=True)
class Calculated:
    """The independent values of a record; a value that does not exist fails the check with its reason."""

    case: Case

    def value(self, pointer: str) -> float:
        """Return the independent value of a quantity. [SI]"""
        found = self.case.value(pointer)
        assert found is not None, f"{pointer}: {self.case.why_not(pointer)}"
        return found

    def state(self, name: str, state: str = "last") -> float:
        """Return a property of the matter in a state. [SI]"""
        return self.value(f"states/{state}/matter/{name}")

    def process(self, name: str, process: str = "change") -> float:
        """Return a total of a process. [SI, heat in, work out]"""
        return self.value(f"processes/{process}/{name}")


def si(value: float, unit: str) -> str:
    """Return a quantity text that carries every digit of a float."""
    return f"{float(value)!r} {unit}".strip()


CLAIMS_OF_A_STATE = (
    "temperature",
    "pressure",
    "specific_volume",
    "specific_internal_energy",
    "specific_entropy",
    "specific_exergy",
)
CLAIMS_OF_A_PROCESS = (
    "heat",
    "work",
    "boundary_work",
    "internal_energy_change",
    "enthalpy_change",
    "kinetic_energy_change",
    "potential_energy_change",
    "energy_change",
    "entropy_change",
    "entropy_transfer",
    "entropy_generation",
    "exergy_change",
    "exergy_transfer",
    "exergy_destruction",
)
CLAIMS_OF_A_CYCLE = ("net_work", "net_heat", "heat_supplied", "heat_rejected", "thermal_efficiency")

UNITS: Mapping[str, str] = {
    "temperature": "K",
    "pressure": "Pa",
    "specific_volume": "m³/kg",
    "volume": "m³",
    "quality": "",
    "specific_entropy": "J/(kg·K)",
    "specific_internal_energy": "J/kg",
    "velocity": "m/s",
    "elevation": "m",
    "boundary_temperature": "K",
    "reservoir_temperature": "K",
    "final_boundary_temperature": "K",
    "final_reservoir_temperature": "K",
    "reservoir_heat_capacity": "J/K",
    "heat_loss_coefficient": "W/K",
    "duration": "s",
    "mean_power": "W",
    "energy": "J",
    "specific_heat": "J/(kg·K)",
    "specific_heat_at_constant_volume": "J/(kg·K)",
    "specific_heat_at_constant_pressure": "J/(kg·K)",
    "gas_constant": "J/(kg·K)",
    "density": "kg/m³",
    "mass": "kg",
    "exponent": "",
    "external_pressure": "Pa",
    "stiffness": "N/m",
    "piston_area": "m²",
    "pressure_at_contact": "Pa",
    "volume_at_contact": "m³",
    "specific_exergy": "J/kg",
    "thermal_efficiency": "",
    "coefficient_of_performance": "",
}


def unit_of(name: str) -> str:
    """Return the SI unit of a quantity; what is not listed is an energy or an entropy."""
    return UNITS.get(name, "J/K" if "entropy" in name else "J")


def quantities(**values: float | str) -> dict[str, str]:
    """Return inputs in SI from plain numbers; words stay as they are."""
    return {
        name: value if isinstance(value, str) else si(value, unit_of(name)) for name, value in values.items()
    }


def matter(substance: str, model: str, **inputs: float) -> dict[str, Any]:
    """Return the one body of a record."""
    return {"substance": substance, "model": model, "inputs": quantities(**inputs)}


def path(kind: str, **parameters: float) -> dict[str, Any]:
    """Return a path with its parameters."""
    return {"kind": kind, **quantities(**parameters)}


def heat(**values: float) -> dict[str, Any]:
    """Return a heat transfer: boundary_temperature, reservoir_temperature, energy (an input where given)."""
    inputs = {name: values.pop(name) for name in ("energy",) if name in values}
    return {"id": "wall", **quantities(**values), "inputs": quantities(**inputs)}


def work(kind: str, energy: float) -> dict[str, Any]:
    """Return a work transfer, positive out of the system."""
    return {"id": "shaft", "kind": kind, "inputs": quantities(energy=energy)}


def process(first: str, last: str, name: str = "change", **members: Any) -> dict[str, Any]:
    """Return a process between two states."""
    return {"id": name, "from": first, "to": last, **members}


def _claiming(part: Mapping[str, Any], names: Sequence[str]) -> dict[str, Any]:
    """Return a part of a record that also claims these quantities, as 1 in SI, where they are not inputs."""
    claims = quantities(**{name: 1.0 for name in names if name not in part.get("inputs", {})})
    return {**part, "results": {**claims, **part.get("results", {})}}


def _process_claiming(part: Mapping[str, Any]) -> dict[str, Any]:
    claiming = _claiming(part, CLAIMS_OF_A_PROCESS)
    items = part.get("heat_transfers")
    if items is not None and len(items) > 1:
        claiming["heat_transfers"] = [_claiming(item, ("energy",)) for item in items]
    return claiming


def calculate(
    body: Mapping[str, Any],
    states: Mapping[str, Mapping[str, float | str]],
    processes: Sequence[Mapping[str, Any]],
    **members: Any,
) -> Calculated:
    """Return the independent values of a record with one body; everything of interest is claimed as 1."""
    known = {name: {"inputs": quantities(**found)} for name, found in states.items()}
    record = {
        "id": "case",
        "bodies": {"matter": body},
        "states": {name: {"matter": _claiming(part, CLAIMS_OF_A_STATE)} for name, part in known.items()},
        "processes": [_process_claiming(part) for part in processes],
        **members,
    }
    if len(processes) > 1:
        useful = ("coefficient_of_performance",) if "purpose" in members else ()
        record = _claiming(record, (*CLAIMS_OF_A_CYCLE, *useful))
    return calculated(record)


def calculated(record: Mapping[str, Any]) -> Calculated:
    """Return the independent values of a record as written in the record format."""
    head = {"conventions": {"work": "positive out"}, "surroundings": SURROUNDINGS}
    data = json.dumps({"package": head, "records": [record]}).encode()
    submission = submit(read_document(data, "case.json"))
    assert not submission.problems, submission.problems
    (found,) = submission.records
    assert not found.problems, found.problems
    return Calculated(make_case(submission.head, found, Basis(), {}))


def one_change(
    body: Mapping[str, Any],
    first: Mapping[str, float | str],
    last: Mapping[str, float | str],
    **members: Any,
) -> Calculated:
    """Return the independent values of one process from a first to a last state; no other work unless given."""
    members = {"work_transfers": [], **members}
    return calculate(body, {"first": first, "last": last}, [process("first", "last", **members)])
