"""Small packages for tests: a record as a mapping, reviewed without files."""

from __future__ import annotations

import json
from typing import Any

from checker.basis import Basis
from checker.case import Case
from checker.comparison.compare import Compared
from checker.document import read_document
from checker.evaluation import make_case
from checker.package import submit

HEAD: dict[str, Any] = {
    "number": "TC-1",
    "title": "Trial",
    "revision": "0",
    "date": "2026-03-14",
    "originator": "Process group",
    "conventions": {"work": "positive out"},
    "surroundings": {"temperature": "20 °C", "pressure": "1.013 bar"},
}


def package(*records: dict[str, Any], **head: Any) -> bytes:
    """Return a package as JSON bytes."""
    return json.dumps({"package": {**HEAD, **head}, "records": list(records)}, ensure_ascii=False).encode()


def cases(*records: dict[str, Any], basis: Basis | None = None, **head: Any) -> dict[str, Case]:
    """Return the cases of records, evaluated in the order given."""
    document = read_document(package(*records, **head), "trial.json")
    submission = submit(document)
    assert not document.problems
    assert not submission.unreadable, submission.problems
    found: dict[str, Case] = {}
    for record in submission.records:
        assert not record.problems, record.problems
        found[record.id] = make_case(submission.head, record, basis or Basis(), found)
    return found


def case(record: dict[str, Any], basis: Basis | None = None, **head: Any) -> Case:
    """Return the case of one record."""
    return cases(record, basis=basis, **head)[record["id"]]


def compared(found: Case, pointer: str) -> Compared:
    """Return the comparison of one stated quantity."""
    return next(c for c in found.compared if c.statement.pointer == pointer)


def gas_bottle(
    results: dict[str, str] | None = None, hot: dict[str, str] | None = None, **more: Any
) -> dict[str, Any]:
    """Return a record: helium with constant specific heats, warmed at constant volume, exact in closed form.

    m = 0.1 kg, c_v = 3.116, R = 2.077 kJ/(kg·K); 300 K and 5 bar to 400 K: ΔU = 31.16 kJ.
    """
    return {
        "id": "bottle",
        "title": "Helium bottle",
        "bodies": {
            "gas": {
                "substance": "Helium",
                "model": "constant specific heat",
                "inputs": {"mass": "0.1000 kg", "cv": "3.116 kJ/(kg·K)", "gas_constant": "2.077 kJ/(kg·K)"},
            }
        },
        "states": {
            "cold": {"gas": {"inputs": {"temperature": "300.0 K", "pressure": "5.000 bar"}}},
            "hot": {"gas": {"inputs": {"temperature": "400.0 K"}, "results": hot or {}}},
        },
        "processes": [
            {
                "id": "warming",
                "from": "cold",
                "to": "hot",
                "path": "constant volume",
                "heat_transfers": [
                    {"id": "wall", "boundary_temperature": "450.0 K", "reservoir_temperature": "450.0 K"}
                ],
                "work_transfers": [],
                "results": results or {},
            }
        ],
        **more,
    }
