"""What cycles and sequences add up to, and what a stop that is not reached leaves."""

from __future__ import annotations

import pytest

from checker.facts.extent import without_extent
from checker.findings import Totals
from checker.totals import totals
from tests.checker.cases import case
from tests.checker.records_of_several import cycle, quench, stops


def table(record: dict) -> Totals:
    """Return the only table of a record."""
    (found,) = totals(case(record))
    return found


def column(found: Totals, symbol: str) -> list[float]:
    """Return the recomputed numbers of a column, the sum at the end."""
    place = [name for name, _ in found.columns].index(symbol)
    cells = [row.cells[place].recomputed for row in (*found.rows, found.sum)]
    return [cell.value for cell in cells if cell]


def test_a_cycle_sums_to_nothing_but_heat_and_work() -> None:
    """c_v = 0.72, R = 0.29 kJ/(kg·K): Q = 216 + 606 − 432 − 303 kJ; ΔU and ΔS vanish; all net heat is work."""
    found = table(cycle())
    assert (found.kind, [row.label for row in found.rows]) == ("cycle", ["rise", "out", "fall", "back"])
    assert column(found, "Q") == pytest.approx([216, 606, -432, -303, 87], abs=1e-6)
    assert column(found, "W") == pytest.approx([0, 174, 0, -87, 87], abs=1e-6)
    assert column(found, "ΔU") == pytest.approx([216, 432, -432, -216, 0], abs=1e-6)
    assert column(found, "ΔS")[-1] == 0.0
    assert column(found, "S_gen")[-1] > 0.0


def test_the_efficiency_stands_beside_the_carnot_limit() -> None:
    """η = 87/822, and at most 1 − 290/1500 between the boundaries that the record states."""
    efficiency = next(fact for fact in table(cycle()).facts if fact.label == "thermal efficiency")
    assert efficiency.pair.recomputed is not None
    assert efficiency.limit is not None
    assert efficiency.pair.recomputed.value == pytest.approx(87 / 822)
    assert efficiency.limit.value == pytest.approx(1 - 290 / 1500)
    assert efficiency.limit_basis == "reversible between 290 K and 1500 K"


def test_a_cooling_cycle_has_its_coefficient_of_performance_and_its_limit() -> None:
    """The same cycle the other way round takes 735 kJ from the cold for 87 kJ of work: more than is possible."""
    record = cycle()
    record["purpose"] = "cooling"
    record["results"] = {"coefficient_of_performance": "8.45"}
    for process in record["processes"]:
        process["from"], process["to"] = process["to"], process["from"]
    labels = [fact.label for fact in table(record).facts]
    assert "thermal efficiency" not in labels
    performance = next(fact for fact in table(record).facts if fact.label == "coefficient of performance")
    assert performance.limit is not None
    assert performance.limit.value == pytest.approx(290 / (1500 - 290))


def test_a_cycle_is_added_up_as_printed() -> None:
    """Down every column, and across each row Q − W = ΔU."""
    found = table(cycle())
    numbers = [
        [float(c.recomputed.text.replace("−", "-")) for c in row.cells if c.recomputed]
        for row in (*found.rows, found.sum)
    ]
    for place in range(len(found.columns)):
        assert sum(row[place] for row in numbers[:-1]) == pytest.approx(numbers[-1][place], abs=1e-9)
    for heat, work, change, *_ in numbers:
        assert heat - work == pytest.approx(change, abs=1e-9)


def test_the_sums_of_a_sequence_meet_what_was_given() -> None:
    """400 kJ are given; 108 kJ lift the piston, and 292 kJ at constant pressure leave 0.29/1.01 of them as work."""
    found = table(stops("400 kJ"))
    assert (found.name, found.kind) == ("all", "sequence")
    assert column(found, "Q") == pytest.approx([108, 292, 400], abs=1e-6)
    assert column(found, "W")[-1] == pytest.approx(292 * 0.29 / 1.01, rel=1e-6)
    assert found.sum.cells[0].stated is not None
    assert found.sum.cells[0].stated.text == "400 kJ"
    assert [fact.label for fact in found.facts] == ["lift pressure"]


def test_one_process_has_no_table() -> None:
    """There is nothing to add up."""
    assert list(totals(case(quench()))) == []


def test_a_stop_that_is_not_reached_is_said_in_words() -> None:
    """50 kJ do not lift the piston, so that its rise has no extent; 400 kJ do, and nothing is to be said."""
    assert list(without_extent(case(stops("50 kJ")))) == [
        "process lifting of sequence all has no extent: the pressure that lifts the piston (150 kPa) is not reached"
    ]
    assert list(without_extent(case(stops("400 kJ")))) == []


def test_a_stop_that_is_reached_at_the_start_is_said_in_words() -> None:
    """The gas has the lifting pressure from the first, so that it is not warmed at constant volume."""
    record = stops("100 kJ")
    record["states"]["cold"]["gas"]["inputs"]["pressure"] = "150 kPa"
    assert list(without_extent(case(record))) == [
        "process warming of sequence all has no extent: the pressure that lifts the piston (150 kPa) "
        "is reached at its start"
    ]
