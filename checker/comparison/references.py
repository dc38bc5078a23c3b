"""The reference quantity of a comparison: what an allowance in per cent is a per cent of (design, section 6)."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Final

from checker.basis import Basis
from checker.sheet.keys import plain, term_for
from checker.sheet.step import Sheet, Values
from checker.vocabulary import PER_MASS, Allowance

ENERGY_TERMS: Final = (
    "heat",
    "work",
    "boundary_work",
    "shaft_work",
    "electrical_work",
    "friction_work",
    "internal_energy_change",
    "kinetic_energy_change",
    "potential_energy_change",
)
ENTROPY_TERMS: Final = (
    "entropy_change",
    "entropy_transfer",
    "reservoir_entropy_transfer",
    "entropy_generation",
)
EXERGY_TERMS: Final = ("exergy_change", "exergy_transfer", "exergy_destruction")
ITEM_ENTROPY: Final = ("item_entropy", "reservoir_entropy")
FRACTION_REFERENCE: Final = 0.5
"""A tenth of it, 0.05, is the most that open digits may move a quality or an efficiency (chosen)."""
TEMPERATURE_REFERENCE: Final = 50.0
"""A tenth of it, 5 K, is the most that open digits may move a temperature (design, section 6). [K]"""
ROUNDING: Final = 1e-9
"""A property that changes by less than this part of its value does not change."""
NOTHING: Final = 1e-6
"""Terms of a balance that are less than this part of what the bodies hold are zero but for arithmetic (chosen)."""


SEQUENCES: Final = "sequences"


def _without_noise(terms: dict[str, float], held: float) -> dict[str, float]:
    """Return the largest term of each balance, without those that are zero but for the arithmetic."""
    return {process: size for process, size in terms.items() if size > NOTHING * held}


def _balance_of(key: str) -> str:
    """Return the process or the sequence of a key, such as ``processes/warming``."""
    return "/".join(key.split("/", 2)[:2])


def _largest(terms: dict[str, float], default: float) -> float:
    return max((size for name, size in terms.items() if not name.startswith(SEQUENCES)), default=default)


class References:
    """Reference quantities of one evaluated record."""

    def __init__(self, sheet: Sheet, values: Values, basis: Basis) -> None:
        self._sheet, self._values, self._basis = sheet, values, basis
        self._energies: dict[str, float] = {}
        self._entropies: dict[str, float] = {}
        for key, value in values.items():
            self._collect(key, value)
        energy, entropy = self._held()
        self._energies = _without_noise(self._energies, energy)
        self._entropies = _without_noise(self._entropies, entropy)
        self._largest_energy = _largest(self._energies, energy)
        self._largest_entropy = _largest(self._entropies, entropy)

    def _collect(self, key: str, value: object) -> None:
        parts = key.split("/")
        if parts[0] not in ("processes", SEQUENCES) or len(parts) < 3 or not isinstance(value, float):
            return
        name, balance = parts[-1], _balance_of(key)
        if name in ENERGY_TERMS or name in EXERGY_TERMS or (name == "energy" and len(parts) == 5):
            self._energies[balance] = max(self._energies.get(balance, 0.0), abs(value))
        elif name in ENTROPY_TERMS or name in ITEM_ENTROPY:
            self._entropies[balance] = max(self._entropies.get(balance, 0.0), abs(value))

    def _held(self) -> tuple[float, float]:
        """Return the largest m·p·v [J] and m·p·v/T [J/K] of a state: what a gas holds, whatever the datum."""
        energies, entropies = [0.0], [0.0]
        for key in self._values:
            if not key.startswith("states/") or not key.endswith("/specific_volume"):
                continue
            base, body = key.removesuffix("/specific_volume"), key.split("/")[2]
            names = (key, f"{base}/pressure", f"{base}/temperature", f"bodies/{body}/mass")
            found = [v for name in names if isinstance(v := self._values.get(name), float)]
            if len(found) == len(names) and found[2] > 0.0:
                energies.append(abs(found[0] * found[1] * found[3]))
                entropies.append(energies[-1] / found[2])
        return max(energies), max(entropies)

    def reference(self, key: str, value: float) -> float:
        """Return the reference quantity of a comparison. [unit of the quantity]"""
        key = plain(key)
        term = term_for(key)
        kind = term.allowance if term else Allowance.VALUE
        if kind is Allowance.TEMPERATURE:
            return TEMPERATURE_REFERENCE
        if kind is Allowance.FRACTION:
            return FRACTION_REFERENCE
        if kind is Allowance.PROPERTY_CHANGE:
            return self._property_change(key, value)
        balance = _balance_of(key)
        if kind is Allowance.ENERGY:
            return self._of_balance(self._energies, balance, self._largest_energy, value)
        if kind is Allowance.ENTROPY:
            return self._of_balance(self._entropies, balance, self._largest_entropy, value)
        if key.rsplit("/", 1)[-1] in PER_MASS:
            return self._per_mass(key, value)
        return abs(value)

    def allowance(self, key: str, value: float) -> float:
        """Return the deviation that the basis tolerates. [unit of the quantity]"""
        term = term_for(key)
        kind = term.allowance if term else Allowance.VALUE
        allowed = self._basis.allowances[kind]
        if kind in (Allowance.TEMPERATURE, Allowance.FRACTION):
            return allowed
        return allowed * self.reference(key, value)

    def _of_balance(self, terms: dict[str, float], balance: str, largest: float, value: float) -> float:
        """Return the largest term of a balance; of a sequence's own, and of what it is the sum of."""
        own = terms.get(balance, 0.0)
        if balance.startswith(SEQUENCES):
            own = max(own, largest)
        return own or largest or abs(value)

    def _per_mass(self, key: str, value: float) -> float:
        """Return the balance's reference scaled to the per-mass value."""
        process, name = key.split("/")[1], PER_MASS[key.rsplit("/", 1)[-1]]
        total = self._values.get(self._sheet.key(f"processes/{process}/{name}"))
        if not isinstance(total, float) or total == 0.0:
            return abs(value)
        return self.reference(self._sheet.key(f"processes/{process}/{name}"), total) * abs(value / total)

    def _property_change(self, key: str, value: float) -> float:
        """Return the span of the property over the states of its body."""
        parts = key.split("/")
        if parts[0] != "states" or len(parts) != 4:
            return abs(value)
        own = self._floats(
            k for k in self._values if k.startswith("states/") and k.endswith(f"/{parts[2]}/{parts[3]}")
        )
        span = max(own) - min(own) if len(own) > 1 else 0.0
        return span if span > ROUNDING * abs(value) else abs(value)

    def _floats(self, keys: Iterable[str]) -> list[float]:
        return [value for key in keys if isinstance(value := self._values[key], float)]
