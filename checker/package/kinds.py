"""Every kind of problem that reading a package can find: the one list behind the rules of form."""

from __future__ import annotations

from typing import Final

KINDS: Final[dict[str, str]] = {
    # The file
    "file-unreadable": "the file is empty, too large, not UTF-8, or no mapping",
    "syntax-broken": "the file is not YAML or not JSON at this place",
    "key-repeated": "a key stands twice in one mapping, so that one of its values would be lost",
    "alias-used": "an alias, anchor, merge key or tag stands where a value should be written out",
    "nesting-too-deep": "mappings and lists are nested deeper than the record format",
    "character-forbidden": "a control or direction character makes the text other than it looks",
    # The package and its records
    "part-missing": "something that a record cannot do without is not there",
    "type-wrong": "a text, a list or a mapping stands where another of them belongs",
    "name-unknown": "a key is not one that may stand at this place",
    "name-repeated": "one quantity is given by its name and by its symbol in the same mapping",
    "value-missing": "a quantity is named, and no value is written beside it",
    "word-unknown": "a word is not one of the closed list that belongs here",
    "identifier-wrong": "an identifier has other characters than a to z, 0 to 9 and hyphens",
    "identifier-repeated": "an identifier stands for two things",
    "reference-unknown": "a state, body, process, record or quantity is named that does not exist",
    "link-circular": "states are declared the same as each other in a circle",
    # The quantities
    "quantity-unreadable": "a text is not a number with a unit",
    "unit-unknown": "a unit is not one that is understood",
    "unit-ambiguous": "a unit has several meanings in the trade",
    "gauge-without-atmosphere": "a gauge pressure is given, and no atmospheric pressure to add to it",
    "reference-conditions-missing": "a gas volume is given without its reference conditions",
    "temperature-kind-wrong": "a temperature stands for a difference of temperatures, or the reverse",
    "below-absolute-zero": "a temperature is lower than there is",
    "dimension-wrong": "a quantity has the unit of another kind of quantity",
    "rate-for-total": "a rate stands where a total belongs, and no duration makes it one",
    "specific-for-total": "a value per mass or per amount stands where a total belongs",
    "total-for-specific": "a total stands where a value per mass belongs",
    "direction-and-sign": "a work transfer has both a direction and a negative number",
    "notation-read-as": "a notation with more than one reading was read in the one that fits",
}
"""Kind → what it means. A problem of a kind is fatal where content is lost by it."""
