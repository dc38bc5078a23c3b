"""What an entry of the vocabulary is: a name with symbol, dimension, sign and default allowance."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

from checker.quantity.dimensions import Dimension
from checker.quantity.types import Scale


class Level(StrEnum):
    """Where in a record a name may stand."""

    BODY = "body"
    STATE = "state"
    ROW = "row"
    PROCESS = "process"
    TRANSFER = "transfer"
    PATH = "path"
    CYCLE = "cycle"
    SEQUENCE = "sequence"
    ASSUMPTION = "assumption"
    SURROUNDINGS = "surroundings"


class Allowance(StrEnum):
    """Which default allowance of the review basis applies (design, section 6)."""

    TEMPERATURE = "temperature"
    FRACTION = "quality and efficiency"
    PROPERTY_CHANGE = "specific energy, enthalpy and entropy"
    ENERGY = "energy"
    ENTROPY = "entropy"
    VALUE = "value"


@dataclass(frozen=True, slots=True)
class Term:
    """A name of the vocabulary.

    Attributes
    ----------
    name, symbol : str
        Whole words, and the symbol printed in formulas.
    dimension : Dimension
        Exponents of length, mass, time, temperature and amount.
    unit : str
        The unit in which the report prints a value for which nobody stated a unit.
    scale : Scale
        How a number with a unit is understood.
    allowance : Allowance
        Which default allowance applies.
    theme : str
        Theme of a finding about it: state, energy, entropy, exergy, path, bookkeeping.
    text : bool
        The value is a word, not a quantity (phase, purpose).
    work_sign : bool
        The work convention of the package applies.
    positive : bool
        Only positive values are meaningful.
    meaning : str
        One line for the schema and the guide.
    """

    name: str
    symbol: str
    dimension: Dimension
    unit: str
    meaning: str
    scale: Scale = Scale.PLAIN
    allowance: Allowance = Allowance.VALUE
    theme: str = "state"
    text: bool = False
    work_sign: bool = False
    positive: bool = False
