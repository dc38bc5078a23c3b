"""Comparison: references and allowances, how results move, carried values, where deviations start."""
