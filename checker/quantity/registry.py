"""The only place that imports pint: exact factors of unit products.

No text of a package gets here. The caller passes names of ``units.txt``, chosen by the allow-list, with small
exponents; pint multiplies their definitions as fractions, and the product is rounded to a float once.
"""

from __future__ import annotations

from collections.abc import Iterable
from fractions import Fraction
from functools import lru_cache
from threading import Lock
from typing import TYPE_CHECKING, Any, Final

from checker.quantity.dimensions import Dimension

if TYPE_CHECKING:
    from pint import UnitRegistry

_DIMENSIONS: Final = ("[length]", "[mass]", "[time]", "[temperature]", "[substance]")
_LOCK: Final = Lock()  # pint fills its caches while it answers


@lru_cache(maxsize=1)
def _registry() -> UnitRegistry[Any]:
    """Build the registry on first use: pint costs a quarter of a second to import."""
    from importlib.resources import files

    from pint import UnitRegistry

    registry: UnitRegistry[Any] = UnitRegistry(None, non_int_type=Fraction)
    definitions = files("checker.quantity").joinpath("units.txt").read_text(encoding="utf-8")
    registry.load_definitions(definitions.splitlines())
    return registry


def si_factor(parts: Iterable[tuple[str, int]]) -> tuple[Fraction, Dimension]:
    """Return what one unit of a product is in SI base units, and its dimension.

    Parameters
    ----------
    parts : iterable of (str, int)
        Names of ``units.txt`` (with its prefixes) and their exponents; a name may occur more than once.

    Raises
    ------
    pint.UndefinedUnitError
        A name is not defined: the allow-list and ``units.txt`` do not agree.
    """
    from pint.util import UnitsContainer

    exponents: dict[str, int] = {}
    for name, exponent in parts:
        exponents[name] = exponents.get(name, 0) + exponent
    container = UnitsContainer({name: power for name, power in exponents.items() if power})
    with _LOCK:
        registry = _registry()
        factor, _ = registry.get_base_units(container)
        powers = registry.get_dimensionality(container)
    length, mass, time, temperature, amount = (int(str(powers.get(key, 0))) for key in _DIMENSIONS)
    return Fraction(str(factor)), (length, mass, time, temperature, amount)
