"""What was submitted, the alternate calculation, the engine and the command.

Data flows one way: file → document with positions → package → sheet → comparisons → findings → review →
reports. Nothing in this list knows what comes after it; only ``engine`` joins them.

    document      file to a tree in which every scalar has its text, line and column
    package       tree to records of known names (form problems are collected, never raised)
    quantity      number and unit text to SI (the only place that uses pint)
    substances    properties of fluids, gases and solids (the only place that uses CoolProp)
    sheet         the alternate calculation: an ordered list of formulas, evaluated in several ways
    comparison    tolerance, stated against independent and carried values, origins
    engine        applies the rulebook and makes the review
    command       the command line

As a library::

    from checker import review

    result = review("package.yaml")
    print(result.verdict, [finding.message for finding in result.findings])
"""

from __future__ import annotations

from checker.api import review
from checker.findings import Finding, Grade, Review, Verdict

__all__ = ["Finding", "Grade", "Review", "Verdict", "review"]
