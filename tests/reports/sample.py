"""Two whole reviews built by hand, one to revise and one to accept, for the tests of the reports."""

from __future__ import annotations

from dataclasses import replace

from checker.findings import Cause, Finding, Grade, Location, PackageNote, Review, RuleNote, Verdict
from tests.reports.sample_records import (
    BOTTLE,
    CYLINDER,
    DISC,
    HOSTILE,
    QUENCH,
    C,
    P,
    amount,
    corrected_bottle,
)

FILE = "revision-a.yaml"


def place(line: int, column: int, pointer: str) -> Location:
    """Return a location in the sample package."""
    return Location(FILE, line, column, pointer)


FINDINGS = (
    Finding(
        "value-disagrees", "energy", Grade.DISCREPANCY,
        "The stated change of internal energy is 40 % above the recomputed one; all inputs of the step agree.",
        record="bottle", quantity=f"{P}internal_energy_change", role="stated result",
        stated=amount("422 kJ"), recomputed=amount("300.6 kJ"), carried=amount("300.6 kJ"),
        deviation=121.4, half_width=0.5, tolerance=2.1, origin=True,
        spoils=(f"{P}heat_transfers/sunlit-wall/energy", f"{P}entropy_generation"),
        causes=(Cause("cp for cv", 422.1, "cp was used where cv belongs"),),
        formula="ΔU = m·(u₂ − u₁)", suggestion="Use cv, or take u from the property tables, and revise what follows.",
        basis="First law for a closed system at constant volume", location=place(33, 43, "/records/0/processes/0"),
    ),
    Finding(
        "generation-negative", "entropy", Grade.DISCREPANCY,
        "The stated entropy generation is below zero by more than its uncertainty; no process can do that.",
        record="bottle", quantity=f"{P}entropy_generation", role="stated result",
        stated=amount("-0.261 kJ/K"), recomputed=amount("0.0934 kJ/K"), carried=amount("−0.2608 kJ/K"),
        deviation=-0.3544, half_width=0.0005, tolerance=0.0055, origin=False,
        inherits_from=(f"{P}internal_energy_change",), formula="S_gen = ΔS − Σ Q_k/T_b,k",
        basis="Second law; S_gen ≥ 0", location=place(34, 43, "/records/0/processes/0/results"),
    ),
    Finding(
        "value-disagrees", "energy", Grade.DISCREPANCY, "The stated change of internal energy has digits exchanged.",
        record="steam-cylinder", quantity=f"{C}internal_energy_change", role="stated result",
        stated=amount("607 kJ"), recomputed=amount("670.2 kJ"), carried=amount("670.2 kJ"),
        deviation=-63.2, half_width=0.5, tolerance=4.2, origin=True,
        causes=(Cause("digits exchanged", 670.0, "670 was written as 607"),),
        formula="ΔU = m·(u₂ − u₁)", location=place(58, 20, "/records/1/processes/0/results"),
    ),
    Finding(
        "boundary-temperature-not-absolute", "entropy", Grade.DISCREPANCY,
        "The entropy transfer is that of a boundary at 280 K: the Celsius number was used as kelvin.",
        record="steam-cylinder", quantity=f"{C}entropy_transfer", role="stated result",
        stated=amount("2.65 kJ/K"), recomputed=amount("1.343 kJ/K"), carried=amount("1.343 kJ/K"),
        deviation=1.307, half_width=0.005, tolerance=0.014, origin=True, spoils=(f"{C}entropy_generation",),
        causes=(Cause("Celsius for kelvin", 2.6525, "280 °C was used as 280 K"),),
        formula="Σ Q_k/T_b,k", suggestion="Divide by 553.15 K.", location=place(61, 33, "/records/1/processes/0/heat"),
    ),
    Finding(
        "state-undetermined", "exergy", Grade.QUERY,
        "The exergy destroyed cannot be recomputed: the pressure of the surroundings is not stated.",
        record="steam-cylinder", quantity=f"{C}exergy_destruction", role="stated result",
        stated=amount("157 kJ"), origin=None, suggestion="State surroundings: {temperature, pressure}.",
        location=place(63, 24, "/records/1/processes/0/results/exergy_destruction"),
    ),
    Finding(
        "temperature-near-allowance", "state", Grade.REMARK,
        "The stated temperature differs from the recomputed one by less than the allowance.",
        record="brake-disc", quantity="states/hot/disc/temperature", role="stated result",
        stated=amount("310 °C"), recomputed=amount("310.2 °C"), carried=amount("310.2 °C"),
        deviation=-0.2, half_width=0.5, tolerance=0.8, origin=True, location=place(80, 11, "/records/2/states/hot"),
    ),
    Finding(
        "record-unreadable", "form", Grade.QUERY,
        f"This record cannot be understood: the key {HOSTILE} is not one of the names of a record.",
        record="quench-bath", suggestion="Did you mean =processes?", location=place(99, 5, "/records/3"),
    ),
    Finding(
        "work-convention-missing", "sign", Grade.QUERY,
        "The package does not say whether work is positive out of the system or into it; positive out was taken.",
        suggestion="Write conventions: {work: positive out} or {work: positive in}.", location=place(1, 1, "/package"),
    ),
)  # fmt: skip

RULES = (
    RuleNote("value-disagrees", "state", Grade.DISCREPANCY, "A stated result is not the recomputed one",
             "A result that cannot be reproduced cannot be relied upon.", "common practice, no source"),
    RuleNote("generation-negative", "entropy", Grade.DISCREPANCY, "The entropy generation is below zero",
             "No process of a closed system destroys entropy.", "second law"),
    RuleNote("boundary-temperature-not-absolute", "entropy", Grade.DISCREPANCY,
             "A boundary temperature was not used on the absolute scale", "Q/T needs kelvin.", "second law"),
    RuleNote("mass-not-conserved", "bookkeeping", Grade.DISCREPANCY, "A closed body changes its mass",
             "The system is closed.", "conservation of mass"),
)  # fmt: skip

PACKAGE = PackageNote(
    file=FILE, sha256="9f2c6b0e" * 8, number="TC-0417", title="Buffer store, hot-day cases", revision="A",
    date="2026-03-14", project="Northmere store", originator="Process group", checker="Utilities group",
    work_convention="",
)  # fmt: skip
TOOL = (
    ("jouletally", "0.1.0"),
    ("CoolProp", "8.0.0 (revision 1b2c3d4)"),
    ("Pint", "0.25.3"),
    ("Python", "3.11.7"),
)
BASIS = (
    ("allowance: temperature", "0.3 K"),
    ("allowance: quality and efficiency", "0.005"),
    ("allowance: specific energy, enthalpy and entropy", "0.5 % of their change"),
    ("allowance: energy and entropy", "0.5 % of the largest term of the balance"),
    ("allowance: others", "0.5 % of the value"),
    ("uncertainty", "expanded, k = 2, added to the allowance"),
    ("input digits", "exact as written"),
    ("surroundings", "25 °C; pressure as stated in each record"),
)
CAUTIONS = (
    "The review holds a calculation against an independent one. It does not judge the choice of cases.",
    "Inputs are taken as stated; data sheets, drawings and measurements behind them were not seen.",
    "What is listed as not checked was not checked by any other means.",
    "The signature stands for the reviewer's own judgement; this document supports it and does not replace it.",
)

REVISE = Review(
    TOOL, PACKAGE, Verdict.REVISE, (BOTTLE, CYLINDER, DISC, QUENCH), FINDINGS, BASIS, CAUTIONS, RULES
)
ACCEPT = Review(
    TOOL,
    replace(
        PACKAGE, file="revision-b.yaml", revision="B", sha256="07d4a1f3" * 8, work_convention="positive out"
    ),
    Verdict.ACCEPT,
    (corrected_bottle(), DISC),
    (),
    BASIS,
    CAUTIONS,
    RULES,
)
EMPTY = Review((), PackageNote("empty.yaml", ""), Verdict.HOLD, (), (), (), ())


def large(copies: int) -> Review:
    """Return a review with the bottle and the cylinder repeated, their findings with them."""
    records, findings = [], []
    for number in range(1, copies + 1):
        for record in (BOTTLE, CYLINDER):
            name = f"{record.id}-{number}"
            records.append(replace(record, id=name))
            findings += [replace(finding, record=name) for finding in FINDINGS if finding.record == record.id]
    return replace(REVISE, records=tuple(records), findings=tuple(findings))
