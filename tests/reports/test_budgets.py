"""The budget of a tolerance in words and as a table."""

import io
from dataclasses import replace

from checker.budget import Budget, BudgetTerm, Kind, Method
from reports.budgets import allowed, budget_line, open_line, sources
from reports.pdf.budgets import budget_table
from reports.terminal import write_text
from tests.reports.sample import FINDINGS, REVISE
from tests.reports.sample_records import BOTTLE, amount

KJ = amount("301 kJ")
BUDGET = Budget(
    allowance=1.505,
    share=0.005,
    reference=301.0,
    of="the largest term of its balance",
    terms=(
        BudgetTerm(Kind.DIGITS, "", 0.29),
        BudgetTerm(Kind.CALORIC, "nitrogen", 0.5, "equation of state (2000)"),
        BudgetTerm(Kind.PLUS_MINUS, "states/hot/nitrogen/temperature", 0.2),
    ),
    below=0.6,
    above=0.6,
    coverage=2.0,
    last_digits=0.31,
    open_inputs=(BudgetTerm(Kind.LAST_DIGIT, "bodies/nitrogen/volume", 0.3),),
)
DRAWN = replace(BUDGET, method=Method.MONTE_CARLO, trials=800, below=0.9)


def test_a_tolerance_is_told_as_a_sum():
    """Allowance with what it is a share of, then U with its parts."""
    assert budget_line(BUDGET, 121.0, KJ) == (
        "2.1 kJ = allowance 1.5 (0.5 % of 301 kJ) + U 0.60 (digits 0.29, u and s, model of nitrogen 0.50, "
        "± of states/hot/nitrogen/temperature 0.20)"
    )


def test_an_absolute_allowance_is_a_share_of_nothing():
    """0.3 K is 0.3 K."""
    kelvin = replace(BUDGET, allowance=0.3, share=0.0, reference=0.0, of="", terms=(), below=0.0, above=0.0)
    assert budget_line(kelvin, 1.0, amount("60 °C")) == "0.30 K = allowance 0.30 + U 0"
    assert allowed(kelvin, amount("60 °C")) == "0.30 K"


def test_the_side_of_the_deviation_is_told():
    """A Monte Carlo interval may reach further down than up, and how it was made is said."""
    assert "U 0.90 (Monte Carlo, 800 trials; digits" in budget_line(DRAWN, -121.0, KJ)
    assert "U 0.60 (Monte Carlo, 800 trials; digits" in budget_line(DRAWN, 121.0, KJ)


def test_without_a_deviation_there_is_no_budget():
    """What was not compared has no tolerance."""
    assert budget_line(BUDGET, None, KJ) == budget_line(None, 1.0, KJ) == open_line(None, KJ) == ""


def test_last_digits_stand_apart():
    """What the inputs' last digits move is told with the input that moves most."""
    assert open_line(BUDGET, KJ) == "0.31 kJ (bodies/nitrogen/volume 0.30); no part of the tolerance"


def test_what_is_allowed_and_published_is_named():
    """The table says of what the allowance is a share, a finding where the model's uncertainty is published."""
    assert allowed(BUDGET, KJ) == "0.5 % of 301 kJ, the largest term of its balance"
    assert sources(BUDGET) == ("equation of state (2000)",)


def test_the_terminal_tells_the_budget_of_a_finding():
    """One line stands below the deviation."""
    stream = io.BytesIO()
    write_text(replace(REVISE, findings=(replace(FINDINGS[0], budget=BUDGET),)), stream)
    assert "tolerance     2.1 kJ = allowance 1.5 (0.5 % of 301 kJ)" in stream.getvalue().decode()


def test_the_table_holds_what_was_compared():
    """Nothing without a budget, a row for each comparison with one."""
    assert budget_table(BOTTLE) is None
    held = replace(BOTTLE, checked=tuple(replace(item, budget=DRAWN) for item in BOTTLE.checked))
    compared = [item for item in held.checked if item.deviation is not None]
    assert len(budget_table(held)._cellvalues) == 1 + len(compared) > 1
