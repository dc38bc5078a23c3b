"""The budget of a tolerance in words: what is allowed, of what, and what contributes to the uncertainty."""

from __future__ import annotations

from typing import Final

from checker.budget import Budget, BudgetTerm, Kind, Method
from checker.findings import Amount
from reports import numbers
from reports.numbers import difference_unit, rounded

MODELS: Final = (Kind.DENSITY, Kind.CALORIC)
INPUTS: Final = (Kind.PLUS_MINUS, Kind.ROUNDED)
NAMES: Final = {
    Kind.DIGITS: "digits",
    Kind.PLUS_MINUS: "± of {}",
    Kind.ROUNDED: "rounding of {}",
    Kind.DENSITY: "density, model of {}",
    Kind.CALORIC: "u and s, model of {}",
    Kind.LAST_DIGIT: "{}",
    Kind.OTHERS: "{}",
}
"""How each contribution is named, with its source."""


def budget_line(budget: Budget | None, deviation: float | None, of: Amount | None) -> str:
    """Return a tolerance as the sum of its parts, on the side of the deviation; empty where there is none.

    Such as ``2.1 kJ = allowance 1.5 (0.5 % of 301 kJ) + U 0.6 (digits 0.29, ± of states/hot/gas/temperature 0.5)``.
    """
    if budget is None or deviation is None:
        return ""
    whole = numbers.tolerance(budget.tolerance(deviation), of)
    return f"{whole} = allowance {rounded(budget.allowance, 2)}{_share(budget, of)} + {_uncertainty(budget, deviation)}"


def open_line(budget: Budget | None, of: Amount | None) -> str:
    """Return what the last digits of the inputs would move, with those that move most; empty where nothing does."""
    if budget is None or not budget.open_inputs:
        return ""
    return f"{numbers.tolerance(budget.last_digits, of)} ({_listed(budget.open_inputs)}); no part of the tolerance"


def allowed(budget: Budget, of: Amount | None) -> str:
    """Return what the allowance is, such as ``0.5 % of 301 kJ, the largest term of its balance``."""
    share = _share(budget, of).strip(" ()")
    return f"{share}, {budget.of}" if share else numbers.tolerance(budget.allowance, of)


def sources(budget: Budget) -> tuple[str, ...]:
    """Return the published sources of the models' uncertainties, each once."""
    return tuple(dict.fromkeys(term.basis for term in budget.terms if term.basis))


def _share(budget: Budget, of: Amount | None) -> str:
    if not budget.share:
        return ""
    unit = f" {difference_unit(of.unit)}" if of and of.unit else ""
    return f" ({100.0 * budget.share:.3g} % of {rounded(budget.reference, 3)}{unit})"


def _uncertainty(budget: Budget, deviation: float) -> str:
    side = budget.above if deviation > 0.0 else budget.below
    method = f"{_method(budget)}; " if budget.method is not Method.FIRST_ORDER else ""
    parts = f" ({method}{_listed(budget.terms)})" if budget.terms else ""
    return f"U {rounded(side, 2)}{parts}"


def _method(budget: Budget) -> str:
    return f"{budget.method.value}, {budget.trials} trials" if budget.trials else budget.method.value


def _listed(terms: tuple[BudgetTerm, ...]) -> str:
    return ", ".join(f"{NAMES[term.kind].format(term.source)} {rounded(term.size, 2)}" for term in terms)
