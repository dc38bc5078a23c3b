"""Substances and their models behind one interface.

``make_substance`` turns the words and constants of a body into a ``Substance``; every model answers the same
questions in SI. Names are looked up in a table of ours (``names``), the property library is imported in one place
only (``coolprop``) and only when a value is asked for. Two known properties become states in ``solver``: directly
where the library has one trustworthy root, else by scanning a curve over the surface of equilibrium states
(``surface``, ``helmholtz_surface``, ``industrial_surface``) for every root there is.
"""

from checker.substances.coolprop import property_library_version
from checker.substances.factory import knows_substance, make_substance
from checker.substances.interface import ModelUncertainty, Phase, PropertyState, Substance, ValidRange
from checker.substances.names import knows_fluid, nearest_fluids

__all__ = [
    "ModelUncertainty",
    "Phase",
    "PropertyState",
    "Substance",
    "ValidRange",
    "knows_fluid",
    "knows_substance",
    "make_substance",
    "nearest_fluids",
    "property_library_version",
]
