"""The rulebook as text for the terminal."""

from __future__ import annotations

import difflib
import textwrap
from collections.abc import Sequence

from rules.rule import Rule

WIDTH = 100


def list_rules(rulebook: Sequence[Rule]) -> str:
    """Return every rule with its grade and what it says, by theme."""
    lines: list[str] = []
    for theme in dict.fromkeys(rule.theme for rule in rulebook):
        lines.append(f"{theme}")
        for rule in rulebook:
            if rule.theme == theme:
                lines.append(f"  {rule.name} ({rule.grade})")
                lines.extend(
                    textwrap.wrap(rule.says, WIDTH, initial_indent="      ", subsequent_indent="      ")
                )
        lines.append("")
    return "\n".join(lines)


def explain_rule(rulebook: Sequence[Rule], name: str) -> tuple[str, bool]:
    """Return the whole entry of a rule and True, or the nearest names and False."""
    rule = next((rule for rule in rulebook if rule.name == name), None)
    if rule is None:
        near = difflib.get_close_matches(name, [rule.name for rule in rulebook], n=3)
        hint = f"; nearest: {', '.join(near)}" if near else "; `jouletally rules` lists all"
        return f"jouletally: there is no rule {name!r}{hint}\n", False
    parts = [
        f"{rule.name}",
        f"  theme: {rule.theme}",
        f"  grade: {rule.grade}",
        *_wrapped("says", rule.says),
        *_wrapped("why", rule.rationale),
        *_wrapped("basis", rule.basis),
    ]
    if rule.needs:
        parts.extend(_wrapped("needs", ", ".join(need.replace("_", " ") for need in rule.needs)))
    return "\n".join(parts) + "\n", True


def guide_section(rulebook: Sequence[Rule]) -> str:
    """Return the list of rules of the guide for contributors, in rulebook order, in Markdown."""
    entries = (
        f"### `{rule.name}`\n\n{rule.grade.capitalize()}, {rule.theme}. {rule.says}\n" for rule in rulebook
    )
    return "\n".join(entries)


def _wrapped(label: str, text: str) -> list[str]:
    return textwrap.wrap(text, WIDTH, initial_indent=f"  {label}: ", subsequent_indent="    ")
