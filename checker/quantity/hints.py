"""What is wrong with a number that the grammar refuses, and what would be right.

The rows are tried from top to bottom on the whole text; the first that matches speaks. A suggestion keeps the
rest of the text as it was written.
"""

from __future__ import annotations

import re
import unicodedata
from collections.abc import Callable
from decimal import Decimal
from typing import Final, NamedTuple

from checker.quantity.fold import fold_superscripts
from checker.quantity.types import QuantityError

_PLAIN: Final = r"[+\-−]?[0-9]{1,20}(?:\.[0-9]{0,20})?"
_SEPARATORS: Final = " \u2009\u00a0\u202f_'’"
_GROUP_LENGTH: Final = 3
_GROUPS_BY_POINT: Final = re.compile(r"[+\-−]?[0-9]{1,3}(?:\.[0-9]{3})+")
_GROUPS_BY_COMMA: Final = re.compile(r"[+\-−]?[0-9]{1,3}(?:,[0-9]{3})+")


class _Hint(NamedTuple):
    """A row: the texts it speaks for, what it says, and how it makes a suggestion (none where a person decides)."""

    pattern: str
    message: str
    suggest: Callable[[re.Match[str]], str] | None = None


def _decimal_comma(match: re.Match[str]) -> str:
    """Return the number with a decimal point; nothing where 1,000 could be a thousand or one."""
    whole, last, rest = match[1] or "0", match[2], match[3]
    if "." in whole:
        return re.sub("[.]", "", whole) + f".{last}{rest}" if _GROUPS_BY_POINT.fullmatch(whole) else ""
    if "," in whole:
        return re.sub(",", "", whole + last) + rest if _GROUPS_BY_COMMA.fullmatch(f"{whole},{last}") else ""
    if len(last) == _GROUP_LENGTH and whole.lstrip("+-−") != "0":
        return ""
    return f"{whole}.{last}{rest}"


def _midpoint(match: re.Match[str]) -> str:
    """Return a range as its middle and half its width."""
    low, high = (Decimal(match[group].replace("−", "-")) for group in (1, 2))
    middle, half = (low + high) / 2, abs(high - low) / 2
    return f"{middle:f} ± {half:f} {match[3].strip()}".rstrip()


def _last_digits(match: re.Match[str]) -> str:
    """Return 120(2) as 120 ± 2: the bracket counts units of the last digit."""
    place = int(Decimal(match[1].replace("−", "-")).as_tuple().exponent)
    return f"{match[1]} ± {Decimal(match[2]).scaleb(place):f} {match[3].strip()}".rstrip()


def _without_separators(match: re.Match[str]) -> str:
    """Return the digits without what separates their groups."""
    return re.sub(f"[{_SEPARATORS}]", "", match[1]) + match[2]


_HINTS: Final[tuple[_Hint, ...]] = (
    _Hint(r".*[\x00-\x1f\x7f-\x9f\u2028\u2029]", "a quantity has no line break or control character"),
    _Hint(r"\s*\Z", "a quantity is a number and a unit"),
    _Hint(r".*[\"“”„]|'", "a quantity has no quotation marks", lambda m: re.sub("[\"'“”„]", "", m.string)),
    _Hint(r"[+\-−]?\s*(?:nan|inf|infinity|∞)\b|[+\-−]?\s*∞", "a value that is not a number is left out"),
    _Hint(
        r"\s*(?:[~≈≃≅<>≤≥≪≫=]+|ca\b\.?|approx\b\.?|about\b|circa\b)\s*(.*)",
        "a quantity is one number: a limit belongs to `limits`, a doubt is written with ±",
        lambda m: m[1],
    ),
    _Hint(
        rf"({_PLAIN})\s*(?:-|–|—|−|\.\.\.?|…|\bto\b)\s*([0-9]{{1,20}}(?:\.[0-9]{{1,20}})?)(?![0-9.])(.*)",
        "a range is no quantity: write the middle and a half-width with ±",
        _midpoint,
    ),
    _Hint(r"\s*[–—‒]\s*([0-9.].*)", "a minus is written - or −, not as a dash", lambda m: "-" + m[1]),
    _Hint(r"([+\-−])\s+([0-9.].*)", "no blank after the sign", lambda m: m[1] + m[2]),
    _Hint(
        r"([+\-−]?[0-9][0-9.,]{0,40})?,([0-9]{1,20})(?![0-9,.])(.*)",
        "the decimal sign is a point, and groups of digits have no comma: 1,000 could be 1000 or 1.000",
        _decimal_comma,
    ),
    _Hint(
        r"([+\-−]?[0-9]{1,3}(?:,[0-9]{3}){1,8}\.[0-9]{0,20})(.*)",
        "groups of digits have no comma",
        lambda m: m[1].replace(",", "") + m[2],
    ),
    _Hint(
        rf"([+\-−]?[0-9]{{1,3}}(?:[{_SEPARATORS}][0-9]{{3}})+(?:\.[0-9]*)?)(?![0-9,.])(.*)",
        "groups of digits are written together, or with a thin or no-break space",
        _without_separators,
    ),
    _Hint(
        rf"[+\-−]?[0-9]+[{_SEPARATORS}][0-9]",
        "digits stand together; a thin or no-break space may separate groups of three",
    ),
    _Hint(
        rf"({_PLAIN})\s?\(([0-9]{{1,8}})\)(.*)",
        "the uncertainty of the last digits is written with ±",
        _last_digits,
    ),
    _Hint(
        r"([+\-−]?)10(?:(?:\^|\*\*)([+\-−]?[0-9]{1,2})|([⁺⁻]?[⁰¹²³⁴-⁹]{1,2}))(?![0-9⁰¹²³⁴-⁹])(.*)",
        "a power of ten is written 1e5 or 1×10^5",
        lambda m: f"{m[1]}1e{m[2] or fold_superscripts(m[3])}{m[4]}",
    ),
    _Hint(r"[+\-−]?[0-9.]{1,40}e[+\-−]?[0-9]{4}", "an exponent has at most three digits"),
    _Hint(
        r"[+\-−]?[0-9.]{1,40}\s*(?:\*\*|[*/+^×·x])\s*[0-9(]",
        "nothing is calculated in a quantity: write the result",
    ),
    _Hint(
        rf"({_PLAIN})\s*\[(?!\s*[-–—]?\s*\])([^\[\]]*)\]\Z",
        "a unit has no square brackets",
        lambda m: f"{m[1]} {m[2].strip()}",
    ),
    _Hint(
        rf"({_PLAIN})\s*(?:[-–—]|\[\s*[-–—]?\s*\])\s*\Z", "a pure number is written without a unit", lambda m: m[1]
    ),
    _Hint(r"[+\-−]?[0-9.]*\s*[½¼¾⅓⅔⅛]", "a fraction is written as a decimal number"),
    _Hint(r"[+\-−]?[0-9]*\.[0-9]*[.]", "a number has one decimal point"),
)  # fmt: skip


def explain(text: str) -> QuantityError | None:
    """Return what is wrong with the number of a quantity text, or None where no row applies."""
    foreign = next((i for i, sign in enumerate(text) if sign > "\x7f" and sign.isdecimal()), None)
    if foreign is not None:
        return QuantityError("quantity-unreadable", "digits are 0 to 9", foreign, "".join(map(_ascii, text)))
    for pattern, message, suggest in _HINTS:
        match = re.compile(pattern, re.IGNORECASE | re.DOTALL).match(text)  # re keeps what it compiled
        if match is not None:
            return QuantityError("quantity-unreadable", message, 0, suggest(match) if suggest else "")
    return None


def _ascii(sign: str) -> str:
    """Return the ASCII digit of a decimal digit of any script, and every other sign as it is."""
    return str(unicodedata.decimal(sign, sign))
