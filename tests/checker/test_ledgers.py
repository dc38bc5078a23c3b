"""Ledgers of processes of one and of several bodies."""

from __future__ import annotations

import math

import pytest

from checker.findings import Ledger
from checker.ledger_unit import decimals_for, written
from checker.ledgers import ledgers
from tests.checker.cases import case, gas_bottle
from tests.checker.records_of_several import joined_vessels, quench

SIDES = ("change", "transfer", "generation")


def by_kind(record: dict) -> dict[str, Ledger]:
    """Return the ledgers of a record of one process by their kind."""
    return {ledger.kind: ledger for ledger in ledgers(case(record))}


def recomputed(ledger: Ledger) -> dict[str, float]:
    """Return the recomputed terms of a ledger by their labels."""
    return {line.label: line.recomputed.value for line in ledger.lines if line.recomputed}


def test_each_body_has_its_line_and_heat_between_bodies_stands_beside_the_sum() -> None:
    """400 kJ leave the block and reach the bath; nothing crosses the boundary; all of it closes."""
    energy = by_kind(quench())["energy"]
    assert recomputed(energy) == pytest.approx(
        {
            "block: change of internal energy": -400.0,
            "bath: change of internal energy": 400.0,
            "heat": 0.0,
            "heat into-bath, from block to bath": 400.0,
        },
        abs=1e-6,
    )
    beside = [line for line in energy.lines if line.side == "internal"]
    assert [line.sign for line in beside] == [0]
    assert energy.closes_recomputed is True


def test_entropy_generated_by_heat_between_bodies_is_part_of_the_generation() -> None:
    """ΔS = 5 ln(320/400) + 20 ln(320/300) kJ/K is generated, all of it with the one heat transfer."""
    entropy = by_kind(quench())["entropy"]
    block, bath = 5 * math.log(320 / 400), 20 * math.log(320 / 300)
    assert recomputed(entropy) == pytest.approx(
        {
            "block: change of entropy": block,
            "bath: change of entropy": bath,
            "entropy with heat, Q/T_b": 0.0,
            "entropy generated": block + bath,
            "part of it with heat into-bath, from block to bath": block + bath,
        },
        abs=1e-6,
    )
    assert entropy.closes_recomputed is True


def test_a_total_that_alone_is_stated_keeps_its_line_and_the_bodies_stand_beside_it() -> None:
    """The stated column then still has the term that the originator wrote."""
    record = quench(results={"internal_energy_change": "0 kJ", "entropy_generation": "0.175 kJ/K"})
    energy = by_kind(record)["energy"]
    sides = {line.label: (line.side, line.sign) for line in energy.lines}
    assert sides["change of internal energy"] == ("change", 1)
    assert sides["block: change of internal energy"] == ("share", 0)
    assert energy.closes_stated is True


def test_a_body_in_motion_has_a_line_for_its_kinetic_energy() -> None:
    """A body at rest has but one line."""
    record = quench()
    record["states"]["before"]["block"]["inputs"]["velocity"] = "20 m/s"
    record["states"]["after"]["block"] = {"inputs": {"velocity": "0 m/s"}}
    labels = [line.label for line in by_kind(record)["energy"].lines if line.side == "change"]
    assert labels == [
        "bath: change of internal energy",
        "block: change of internal energy",
        "block: change of kinetic energy",
    ]


def test_bodies_in_one_volume_close_without_a_transfer() -> None:
    """What one parcel of gas gains the other loses, and noise of the arithmetic is no residual."""
    found = by_kind(joined_vessels())
    assert [found[kind].closes_recomputed for kind in ("energy", "entropy")] == [True, True]
    assert found["energy"].residual_recomputed == pytest.approx(0.0, abs=1e-6)


@pytest.mark.parametrize("record", [quench(), joined_vessels(), gas_bottle({"heat": "31.2 kJ"})])
def test_recomputed_terms_add_up_as_they_are_printed(record: dict) -> None:
    """In every ledger the printed numbers of change less transfers less generation give zero."""
    for ledger in by_kind(record).values():
        total = 0.0
        for line in ledger.lines:
            assert line.recomputed is not None
            printed = float(line.recomputed.text.replace("−", "-"))
            total += printed * line.sign * (1 if line.side == "change" else -1)
        assert total == pytest.approx(0.0, abs=1e-9)


def test_a_ledger_is_written_in_the_unit_of_the_originator() -> None:
    """A stated amount in that unit keeps its digits as written."""
    record = gas_bottle({"internal_energy_change": "31160 J"})
    energy = by_kind(record)["energy"]
    stated = next(line.stated for line in energy.lines if line.stated)
    assert (energy.unit, stated.text, stated.value) == ("J", "31160 J", 31160.0)


@pytest.mark.parametrize(
    ("groups", "decimals"),
    [
        ([[1.23456, -1.23456]], 4),
        ([[0.33335, 0.33335]], 5),  # 0.3333 + 0.3333 is not 0.6667, but 0.33335 + 0.33335 is 0.66670
        ([[52000.0, -0.48266]], 0),
        ([[1 / 3, 1 / 3, 1 / 3]], 6),  # thirds never add up: one more digit
        ([[0.0]], 0),
        ([[2e7, 1.0]], None),
        ([[1e-8, 1e-8]], None),
    ],
)
def test_decimals_are_added_until_terms_add_up(groups: list[list[float]], decimals: int | None) -> None:
    """Five digits of the largest term, a few more where the sum needs them, powers of ten for the rest."""
    assert decimals_for(groups) == decimals


@pytest.mark.parametrize(
    ("number", "decimals", "text"),
    [(0.0, 3, "0"), (-1.25, 1, "−1.2"), (-0.0001, 2, "0.00"), (3e-8, None, "3.0000e−08"), (12.0, 2, "12.00")],
)
def test_numbers_are_written_with_their_decimals(number: float, decimals: int | None, text: str) -> None:
    """Zero is plain, a negative number that rounds to nothing has no sign."""
    assert written(number, decimals) == text
