"""Reading the quantities of a record: from the text to a statement, or to a problem at its place."""

from __future__ import annotations

from collections.abc import Mapping
from dataclasses import dataclass
from typing import Final

from checker.document.nodes import Scalar
from checker.package.dimensions import as_total, is_rate_of, wrong_unit
from checker.package.examples import example_of
from checker.package.layout import LEVEL_WORDS
from checker.package.nearest import shortened
from checker.package.notebook import Notebook
from checker.package.spot import Spot, WordStated
from checker.problems import Place
from checker.quantity import dimensions as dim
from checker.quantity import parse_quantity
from checker.quantity.types import Quantity, QuantityError
from checker.submission import Role, Statement
from checker.vocabulary import TERMS, Term, canonical

_WORK_ITEM: Final = frozenset({"energy", "mean_power"})
"""Names of a work transfer that follow its direction, or the work convention."""


@dataclass(frozen=True, slots=True)
class Desk:
    """What reading the quantities of one record needs.

    ``atmosphere`` is the absolute pressure of the surroundings [Pa], ``work_sign`` +1 for work positive out.
    """

    notebook: Notebook
    atmosphere: float | None
    work_sign: int

    def take(
        self, spot: Spot, role: Role, mapping: Mapping[str, object], key: Place
    ) -> dict[str, WordStated]:
        """State every quantity of a mapping under ``key``; return the words that stand among them."""
        allowed = spot.allowed
        seen: dict[str, str] = {}
        words: dict[str, WordStated] = {}
        for written, text in mapping.items():
            name, place = canonical(spot.level, written), (*spot.place, *key, written)
            if name not in allowed:
                self.unknown(spot, written, text, place)
            elif name in seen:
                self._repeated(spot, seen[name], written, name, place)
            elif text is None:
                self.blank(written, place, f"{spot.prefix}/{name}")
            else:
                seen[name] = written
                term = TERMS[spot.level][name]
                if term.text and isinstance(text, str):
                    words[name] = WordStated(text, place)
                else:
                    self.state(spot, role, term, text, place)
        return words

    def take_both(self, spot: Spot, inputs: Mapping[str, object], results: Mapping[str, object]) -> None:
        """State the inputs and the results of a part."""
        self.take(spot, Role.INPUT, inputs, ("inputs",))
        self.take(spot, Role.RESULT, results, ("results",))

    def state(self, spot: Spot, role: Role, term: Term, text: object, place: Place) -> None:
        """State one quantity, or note why it cannot be used."""
        pointer = f"{spot.prefix}/{term.name}"
        read = self.read(text, term, place, pointer, spot.duration)
        if read is None:
            return
        quantity, usable = read
        if spot.direction and term.name in _WORK_ITEM and quantity.value < 0.0:
            self.notebook.say(
                "direction-and-sign",
                place,
                f"`{shortened(quantity.text)}` is negative, and the direction `{spot.direction}` is stated as well.",
                "State the direction with a positive number, or the sign without a direction.",
                quantity=pointer,
            )
        sign = self._sign(spot, term)
        whole = (*self.notebook.root, *place)
        self.notebook.statements.append(Statement(pointer, role, term, quantity, sign, whole, usable))

    def read(
        self, text: object, term: Term, place: Place, pointer: str, duration: Quantity | None = None
    ) -> tuple[Quantity, bool] | None:
        """Return a quantity and whether its unit is right; None where the text cannot be read."""
        say = self.notebook.say
        quantity = self._parsed(text, term, place, pointer)
        if quantity is None:
            return None
        if duration is not None and is_rate_of(quantity.dimension, term.dimension):
            quantity = as_total(quantity, duration)
        for note in quantity.notes:
            say("notation-read-as", place, f"{note}.", quantity=pointer)
        wrong = wrong_unit(quantity, term)
        if wrong is not None:
            at = quantity.text.rfind(quantity.unit.text)
            say(wrong.kind, place, wrong.message, wrong.suggestion, quantity=pointer, offset=max(0, at))
        return quantity, wrong is None

    def _parsed(self, text: object, term: Term, place: Place, pointer: str) -> Quantity | None:
        """Return the quantity that a text is, of whatever kind; None where it is none."""
        say = self.notebook.say
        if not isinstance(text, str):
            shape = "a list" if isinstance(text, list | tuple) else "a mapping"
            message = f"`{term.name}` is one text, such as {example_of(term)}, and not {shape}."
            say("type-wrong", place, message, "Write number and unit as one text.", quantity=pointer)
            return None
        expected, scale = term.dimension, term.scale
        try:
            return parse_quantity(text, expected=expected, scale=scale, atmosphere=self.atmosphere)
        except QuantityError as error:
            suggestion = f"Perhaps `{error.suggestion}`?" if error.suggestion else ""
            message = f"`{shortened(text, 40)}`: {error.message}."
            say(error.kind, place, message, suggestion, quantity=pointer, offset=error.offset)
            return None

    def duration(self, *mappings: Mapping[str, object]) -> Quantity | None:
        """Return the duration that the first of some inputs states, where it can be read."""
        text = next((m["duration"] for m in mappings if m.get("duration") is not None), None)
        try:
            quantity = parse_quantity(text, expected=dim.TIME) if isinstance(text, str) else None
        except QuantityError:
            return None
        usable = quantity is not None and quantity.dimension == dim.TIME and quantity.value > 0.0
        return quantity if usable else None

    def _sign(self, spot: Spot, term: Term) -> int:
        """Return −1 where the originator's sign is the opposite of the program's."""
        if spot.work and term.name in _WORK_ITEM:
            return {"in": -1, "out": 1}.get(spot.direction or "", self.work_sign)
        return self.work_sign if term.work_sign else 1

    def blank(self, written: str, place: Place, pointer: str) -> None:
        """Note a key that was left without a value; a null that is written out is left open on purpose."""
        node = self.notebook.document.node((*self.notebook.root, *place))
        if isinstance(node, Scalar) and not node.text:
            self.notebook.say(
                "value-missing",
                place,
                f"`{shortened(written, 40)}` has no value; what stands after # is a comment.",
                "Write the value before the #, or leave the key out.",
                at_key=True,
                quantity=pointer,
            )

    def unknown(self, spot: Spot, written: str, value: object, place: Place) -> None:
        """Note a name that may not stand at a spot."""
        self.notebook.say(
            "name-unknown",
            place,
            f"`{shortened(written, 40)}` is not a quantity that {LEVEL_WORDS[spot.level]} may state here.",
            lambda: spot.meant(written, value),
            at_key=True,
            quantity=f"{spot.prefix}/{shortened(written, 40)}",
        )

    def _repeated(self, spot: Spot, first: str, written: str, name: str, place: Place) -> None:
        """Note a name that stands twice in one mapping, once as its symbol."""
        self.notebook.say(
            "name-repeated",
            place,
            f"`{first}` and `{written}` both state the {name.replace('_', ' ')}; only `{first}` was read.",
            "Keep one of the two.",
            at_key=True,
            quantity=f"{spot.prefix}/{name}",
        )
