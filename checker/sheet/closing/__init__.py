"""Closing a system of several unknown states: its unknowns, its equations, their structure and their solution.

What no single formula finds is found here: bodies in equilibrium with each other, a shared volume, a balance over
several bodies or several processes. Unknowns and equations are counted first; only what they determine is solved.
"""
