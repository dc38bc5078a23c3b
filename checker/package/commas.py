"""Texts of `sources` that a comma inside { } has cut in two: they are put together again, and it is noted."""

from __future__ import annotations

from checker.package.notebook import Notebook


def rejoined(tree: object, notebook: Notebook) -> object:
    """Return the tree of a record with the texts of its sources whole.

    In YAML's short form ``{bodies/gas/volume: data sheet, rev. 2}`` the comma starts a key without a value. A key
    that is no pointer and has no value can only be the rest of the text before it.
    """
    sources = tree.get("sources") if isinstance(tree, dict) else None
    if not isinstance(tree, dict) or not isinstance(sources, dict) or None not in sources.values():
        return tree
    whole: dict[str, object] = {}
    last = ""
    for key, value in sources.items():
        before = whole.get(last)
        if value is None and "/" not in key and isinstance(before, str):
            whole[last] = f"{before}, {key}"
            notebook.say(
                "notation-read-as",
                ("sources", last),
                f"`{before}, {key}` is read as one text.",
                "Quote a text with a comma inside { }.",
            )
        else:
            whole[key] = value
            last = key
    return {**tree, "sources": whole}
