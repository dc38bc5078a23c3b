"""The unit grammar of the record format.

::

    unit   = ["1"] "/" … | term (sign term)*          at most 8 names, brackets at most 2 deep
    term   = name exponent? | "(" unit ")"
    sign   = "/" | "·" | "*" | "." | blank | "-" before a letter
    name   = an entry of the allow-list; exponent = -4..4, written 2, ^2, **2 or ²

What follows a slash without brackets, as in ``kJ/kg·K``, is in doubt: the trade means all of it in the
denominator, a strict reader only the first name. Both exponents are kept, and the caller decides.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import Final

from checker.quantity.allowlist import NAMES, Name
from checker.quantity.fold import SUPERSCRIPTS, fold_superscripts
from checker.quantity.refused import AMBIGUOUS, REFUSED, UNKNOWN
from checker.quantity.suggest import nearest_name
from checker.quantity.types import QuantityError

MAX_FACTORS: Final = 8
MAX_DEPTH: Final = 2
MAX_EXPONENT: Final = 4

_BOUNDARY: Final = r"(?![A-Za-z0-9°])"
_LONGEST_FIRST: Final = sorted((name for name in NAMES if " " in name or "-" in name), key=len, reverse=True)
_SEVERAL_WORDS: Final = re.compile(f"(?:{'|'.join(map(re.escape, _LONGEST_FIRST))}){_BOUNDARY}")
_WORD: Final = re.compile(r"%|‰|Δ?[℃℉]|Δ?°[A-Za-z]*|[Δμ]?[A-Za-z]+ü?(?:_[A-Za-z]+)?")
_BRACKETED: Final = re.compile(r" ?\((?:IT|th|US|UK|imp|EC)\)")
_PRESSURE_SUFFIX: Final = re.compile(r" ?\((g|gauge|a|abs|absolute)\)")
_EXPONENT: Final = re.compile(
    rf"(?:(?:\^|\*\*)([+-]?[0-9]{{1,2}})|(-?[0-9]{{1,2}})|([⁺⁻]?[{SUPERSCRIPTS[:10]}]{{1,2}}))"
    rf"(?![0-9{SUPERSCRIPTS}]|\.[0-9])"
)
_SIGN: Final = re.compile(r" *([/·*.]) *|-(?=[A-Za-zΔ°μ(])| +(?=[A-Za-zΔ°μ%(])")
_RECIPROCAL: Final = re.compile(r"1 *(?=/)")


@dataclass(frozen=True, slots=True)
class Factor:
    """A name with its exponents: all after a slash in the denominator, and by the strict reading."""

    name: Name
    exponent: int
    strict_exponent: int

    @property
    def in_doubt(self) -> bool:
        """Whether the two readings differ."""
        return self.exponent != self.strict_exponent


def read_factors(text: str) -> tuple[Factor, ...]:
    """Return the factors of a folded unit text.

    Raises
    ------
    QuantityError
        ``unit-unknown`` or ``unit-ambiguous``, with the offset of the part meant.
    """
    reader = _Reader(text)
    reader.read_unit(sign=1, strict=1, depth=0)
    if reader.at < len(text):
        raise reader.unexpected()
    return tuple(reader.factors)


class _Reader:
    """One pass over one text, left to right."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.at = 0
        self.factors: list[Factor] = []

    def take(self, pattern: re.Pattern[str]) -> re.Match[str] | None:
        """Return the match at the current place and move behind it, or None."""
        match = pattern.match(self.text, self.at)
        if match is not None:
            self.at = match.end()
        return match

    def unexpected(self) -> QuantityError:
        """Return the error for the character at the current place."""
        if self.at >= len(self.text):
            return QuantityError(UNKNOWN, "the unit ends too early", self.at)
        sign = self.text[self.at]
        shown = "a blank" if sign == " " else sign if sign.isprintable() else f"U+{ord(sign):04X}"
        return QuantityError(UNKNOWN, f"{shown} has no place in a unit here", self.at)

    def read_unit(self, sign: int, strict: int, depth: int) -> None:
        """Read terms and the signs between them, up to the end or a closing bracket."""
        divided = depth == 0 and self.take(_RECIPROCAL) is not None
        if not divided:
            self.read_term(sign, strict, depth, divided)
        while self.at < len(self.text) and self.text[self.at] != ")":
            between = self.take(_SIGN)
            if between is None and not _WORD.match(self.text, self.at):
                raise self.unexpected()
            if between is not None and between[1] == "/":
                divided = True
                self.read_term(-sign, -strict, depth, divided)
            else:
                self.read_term(-sign if divided else sign, strict, depth, divided)

    def read_term(self, sign: int, strict: int, depth: int, divided: bool) -> None:
        """Read a name with its exponent, or a bracket."""
        if self.text.startswith("(", self.at) and depth < MAX_DEPTH:
            self.at += 1
            self.read_unit(sign, strict, depth + 1)
            if not self.text.startswith(")", self.at):
                raise self.unexpected()
            self.at += 1
            return
        start = self.at
        name = self.read_name(split=sign < 0)
        exponent = self.read_exponent()
        if exponent < 0 and divided:
            twice = self.text[start : self.at]
            message = f"/{twice} divides twice: write either the slash or the negative exponent"
            raise QuantityError(AMBIGUOUS, message, start)
        self.factors.append(Factor(name, sign * exponent, strict * exponent))
        if len(self.factors) > MAX_FACTORS:
            raise QuantityError(UNKNOWN, f"a unit has at most {MAX_FACTORS} names", start)

    def read_name(self, split: bool) -> Name:
        """Read a name of the allow-list; ``split`` lets a K follow without a sign, as in kgK."""
        start = self.at
        several = self.take(_SEVERAL_WORDS)
        if several is not None:
            return NAMES[several[0]]
        match = self.take(_WORD)
        if match is None:
            raise self.unexpected()
        word = match[0]
        bracketed = self.take(_BRACKETED)
        if bracketed is not None:
            word += bracketed[0].strip()
        if word in NAMES:
            return self._pressure(NAMES[word])
        if split and word[-1] == "K" and word[:-1] in NAMES:
            self.at -= 1
            return NAMES[word[:-1]]
        raise self._no_name(word, start)

    def _pressure(self, name: Name) -> Name:
        """Return the gauge or absolute form of a name if a suffix in brackets follows."""
        suffix = self.take(_PRESSURE_SUFFIX)
        if suffix is None:
            return name
        form = f"{name.text}({suffix[1][0]})"
        if form not in NAMES:
            raise QuantityError(UNKNOWN, f"{suffix[0].strip()} belongs to a pressure", suffix.start())
        return NAMES[form]

    def _no_name(self, word: str, start: int) -> QuantityError:
        """Return the error for a word that the allow-list does not hold."""
        refusal = REFUSED.get(word)
        if refusal is not None:
            kind, message, instead = refusal.kind, refusal.message, refusal.instead
        else:
            instead = nearest_name(word)
            kind = UNKNOWN
            message = f"{word} is not a known unit" + (f"; did you mean {instead}?" if instead else "")
        suggestion = self.text[:start] + instead + self.text[start + len(word) :] if instead else ""
        return QuantityError(kind, message, start, suggestion)

    def read_exponent(self) -> int:
        """Read an exponent if one follows; 1 where none does."""
        start = self.at
        match = self.take(_EXPONENT)
        if match is None:
            return 1
        exponent = int(fold_superscripts(match[match.lastindex or 0]))
        if exponent == 0 or abs(exponent) > MAX_EXPONENT:
            raise QuantityError(UNKNOWN, f"an exponent is between -{MAX_EXPONENT} and {MAX_EXPONENT}", start)
        return exponent
