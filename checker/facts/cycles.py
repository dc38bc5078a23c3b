"""Cycles: whether the processes close, and what the second law allows of their efficiency."""

from __future__ import annotations

from typing import Final

from checker.case import Case
from checker.facts.balance import energy_allowance
from checker.facts.spans import crossings, temperatures
from checker.sheet.cycles import is_cycle

RATIOS: Final = ("thermal_efficiency", "coefficient_of_performance")


def closes(case: Case) -> bool:
    """Say whether the processes lead back to where they began, by the names of their states."""
    return is_cycle(case.record)


def extreme_temperatures(case: Case) -> tuple[float, float] | None:
    """Return the coldest and the hottest place that heat goes to or comes from. [K]

    A reservoir where stated, else the boundary, else the body itself, whose temperatures bound the efficiency of any
    cycle that it runs through.
    """
    supplied: list[float] = []
    rejected: list[float] = []
    for process in case.record.processes:
        for crossing in crossings(case, process):
            place = crossing.reservoir or crossing.boundary
            own = temperatures(case, process.id)
            if crossing.heat > 0.0 and (place or own):
                supplied.append(place or max(own))
            elif crossing.heat < 0.0 and (place or own):
                rejected.append(place or min(own))
    return (min(rejected), max(supplied)) if supplied and rejected else None


def work_without_rejection(case: Case) -> float | None:
    """Return the net work of a closed cycle of which no process gives off heat [J]; None where one does, or is open."""
    if not closes(case):
        return None
    total = 0.0
    for process in case.record.processes:
        heat, work = (case.value(f"processes/{process.id}/{name}") for name in ("heat", "work"))
        if heat is None or work is None:
            return None
        least = min([heat, *(crossing.heat for crossing in crossings(case, process))])
        if least < -energy_allowance(case, process.id):
            return None
        total += work
    return total


def highest_efficiency(case: Case) -> float | None:
    """Return 1 − T_cold/T_hot. [1]"""
    found = extreme_temperatures(case)
    return None if found is None else 1.0 - found[0] / found[1]


def highest_performance(case: Case) -> float | None:
    """Return the coefficient of performance of the reversible cycle between the two temperatures. [1]

    T_hot/(T_hot − T_cold) for heating and T_cold/(T_hot − T_cold) for cooling, where the hot place takes the heat.
    """
    places = [
        (crossing.heat, crossing.reservoir or crossing.boundary)
        for process in case.record.processes
        for crossing in crossings(case, process)
    ]
    hot = [place for heat, place in places if heat < 0.0 and place]
    cold = [place for heat, place in places if heat > 0.0 and place]
    if not hot or not cold or max(cold) >= min(hot):
        return None
    useful = {"heating": min(hot), "cooling": max(cold)}.get(case.record.purpose or "")
    return None if useful is None else useful / (min(hot) - max(cold))
