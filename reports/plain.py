"""Text of others made safe to print: what could steer a screen or hide in a line is shown as a mark."""

from __future__ import annotations

import re
from typing import Final

_LINE_BREAKS: Final = re.compile(r"[\t\n\r\x0b\x0c\x85\u2028\u2029]+")
_UNSAFE: Final = re.compile(
    "["
    "\x00-\x1f\x7f-\x9f"  # control characters, the escape of terminal sequences among them
    "\xad\u034f\u061c\u115f\u1160\u17b4\u17b5\u180b-\u180e\u200b-\u200f\u2028-\u202e\u2060-\u206f\u3164\ufeff\uffa0"
    "\ufff9-\ufffb"  # invisible ones, and those that turn the direction of reading
    "\ud800-\udfff"  # halves of characters
    "\U000e0000-\U000e0fff"  # tags and variation selectors
    "]"
)


def mark(character: str) -> str:
    r"""Return the visible mark of a character that cannot be printed, such as ``\u{1B}``."""
    return f"\\u{{{ord(character):X}}}"


def neutral(text: str) -> str:
    """Return text on one line with every control, direction and invisible character as a visible mark."""
    return _UNSAFE.sub(lambda match: mark(match[0]), _LINE_BREAKS.sub(" ", text))


def escaped_in_json(text: str) -> str:
    r"""Return JSON text in which the same characters are written as ``\uXXXX``; its meaning is unchanged."""
    return _UNSAFE.sub(lambda match: _escape(match[0]), text)


def capped(text: str, limit: int) -> str:
    """Return text of at most ``limit`` characters; what was cut shows as an ellipsis."""
    return text if len(text) <= limit else text[: limit - 1].rstrip() + "…"


def _escape(character: str) -> str:
    if character == "\n":  # between the tokens of indented JSON; inside its strings it is escaped already
        return character
    units = character.encode("utf-16-be", "surrogatepass")
    return "".join(f"\\u{units[i]:02x}{units[i + 1]:02x}" for i in range(0, len(units), 2))
