"""The review as SARIF 2.1.0 (OASIS Standard), for code hosts and editors.

A finding is a result of kind ``fail`` with the level of its grade. What was checked and agrees is a result of
kind ``pass``; what could not be checked is one of kind ``open``, so that unchecked never looks checked.
"""

from __future__ import annotations

from collections.abc import Iterator
from typing import BinaryIO, Final
from urllib.parse import quote

from checker.findings import Checked, Finding, Grade, Location, NotChecked, Outcome, Review, RuleNote
from reports.jsontext import finite, write_json_text
from reports.numbers import shown
from reports.order import grouped
from reports.phrases import numbers_not_told
from reports.plain import neutral

Tree = dict[str, object]

SCHEMA: Final = "https://docs.oasis-open.org/sarif/sarif/v2.1.0/errata01/os/schemas/sarif-schema-2.1.0.json"
LEVELS: Final = {Grade.DISCREPANCY: "error", Grade.QUERY: "warning", Grade.REMARK: "note"}
COMPARISON: Final = "value-disagrees"
"""The rule under which comparisons that hold are reported."""
COMPLETENESS: Final = "not-checked"
"""The rule under which it is reported that another one had not what it needs."""

_OWN: Final = {
    COMPARISON: "A stated result held against the alternate calculation.",
    COMPLETENESS: "What was not checked, and what is missing for it.",
}
_TOOL: Final = "jouletally"
_FINGERPRINT: Final = "ruleRecordQuantity/v1"


def write_sarif(review: Review, stream: BinaryIO) -> None:
    """Write the review as SARIF."""
    write_json_text({"$schema": SCHEMA, "version": "2.1.0", "runs": [_Run(review).tree()]}, stream)


class _Run:
    """One run of the tool over one package: knows the indexes of rules and files."""

    def __init__(self, review: Review) -> None:
        self._review = review
        findings = tuple(comment.finding for group in grouped(review) for comment in group.comments)
        self._findings = findings
        notes = {rule.name: rule for rule in review.rules}
        used = dict.fromkeys((*notes, *(f.rule for f in findings), COMPARISON, COMPLETENESS))
        self._rules = {name: (index, notes.get(name)) for index, name in enumerate(used)}
        places = (f.location.file for f in findings if f.location)
        self._files = {file: i for i, file in enumerate(dict.fromkeys((review.package.file, *places)))}

    def tree(self) -> Tree:
        """Return the run object."""
        return {
            "tool": {"driver": self._driver(), "extensions": self._components()},
            "language": "en-GB",
            "columnKind": "unicodeCodePoints",
            "artifacts": [self._artifact(file) for file in self._files],
            "results": [*self._fails(), *self._comparisons(), *self._not_checked()],
            "properties": {"verdict": self._review.verdict.value, "cautions": list(self._review.cautions)},
        }

    def _driver(self) -> Tree:
        version = dict(self._review.tool).get(_TOOL)
        rules = [_rule(name, note) for name, (_, note) in self._rules.items()]
        return {"name": _TOOL, **({"version": version} if version else {}), "rules": rules}

    def _components(self) -> list[Tree]:
        return [{"name": name, "version": version} for name, version in self._review.tool if name != _TOOL]

    def _artifact(self, file: str) -> Tree:
        package = self._review.package
        hashed = file == package.file and package.sha256
        hashes = {"hashes": {"sha-256": package.sha256}} if hashed else {}
        return {"location": {"uri": _uri(file)}, "roles": ["analysisTarget"], **hashes}

    def _fails(self) -> Iterator[Tree]:
        for finding in self._findings:
            yield {
                **self._kind(finding.rule, "fail", LEVELS[finding.grade], _message(finding)),
                "locations": self._locations(finding.location, finding.record, finding.quantity),
                "partialFingerprints": {_FINGERPRINT: finding.fingerprint},
                "properties": _numbers(finding),
            }

    def _comparisons(self) -> Iterator[Tree]:
        kinds = {Outcome.AGREES: "pass", Outcome.NOT_EVALUABLE: "open"}
        for record in self._review.records:
            for item in record.checked:
                if item.outcome in kinds:
                    yield {
                        **self._kind(COMPARISON, kinds[item.outcome], "none", _comparison(item)),
                        "locations": self._locations(item.location, record.id, item.quantity),
                    }

    def _not_checked(self) -> Iterator[Tree]:
        for record in self._review.records:
            for item in record.not_checked:
                rule = item.what if item.what in self._rules else COMPLETENESS
                yield {
                    **self._kind(rule, "open", "none", _unchecked(item)),
                    "locations": self._locations(None, record.id, None),
                }

    def _kind(self, rule: str, kind: str, level: str, message: str) -> Tree:
        index = self._rules[rule][0]
        text = {"text": _without_links(neutral(message)) or rule}
        return {"ruleId": rule, "ruleIndex": index, "kind": kind, "level": level, "message": text}

    def _locations(self, place: Location | None, record: str | None, quantity: str | None) -> list[Tree]:
        location: Tree = {}
        if place and place.file in self._files:
            location["physicalLocation"] = {
                "artifactLocation": {"uri": _uri(place.file), "index": self._files[place.file]},
                "region": {"startLine": max(place.line, 1), "startColumn": max(place.column, 1)},
            }
        if record is not None:
            name = f"records/{record}" + (f"/{quantity}" if quantity else "")
            location["logicalLocations"] = [{"fullyQualifiedName": name}]
        return [location] if location else []


def _without_links(message: str) -> str:
    """Return a message in which no text of others is a link: viewers make one of ``[text](target)``."""
    return message.replace("](", "] (")


def _uri(file: str) -> str:
    """Return a file name as a relative URI reference; an absolute path as a file URI."""
    path = file.replace("\\", "/")
    quoted = quote(path, errors="replace")
    return f"file://{quoted}" if path.startswith("/") else quoted


def _rule(name: str, note: RuleNote | None) -> Tree:
    if note is None:
        return {"id": name, **({"shortDescription": {"text": _OWN[name]}} if name in _OWN else {})}
    return {
        "id": name,
        "shortDescription": {"text": note.says or name},
        "fullDescription": {"text": note.rationale or note.says or name},
        "help": {"text": f"{note.rationale} Basis: {note.basis}."},
        "defaultConfiguration": {"level": LEVELS[note.grade]},
        "properties": {"tags": [note.theme]},
    }


def _message(finding: Finding) -> str:
    """Return the message with its numbers, since a reader of results may see nothing else."""
    causes = (f"Likely cause: {cause.statement}." for cause in finding.causes if cause.likely)
    sentences = (finding.message, numbers_not_told(finding), *causes, finding.suggestion)
    return " ".join(sentence for sentence in sentences if sentence)


def _comparison(item: Checked) -> str:
    if item.outcome is Outcome.AGREES:
        return (
            f"{item.quantity}: stated {shown(item.stated)} agrees with recomputed {shown(item.recomputed)}."
        )
    return f"{item.quantity}: stated {shown(item.stated)} could not be recomputed. {item.reason}".rstrip()


def _unchecked(item: NotChecked) -> str:
    return f"Not checked: {item.what}. Missing: {item.missing}."


def _numbers(finding: Finding) -> Tree:
    """Return the numbers that are there, in the stated unit."""
    amounts = {"stated": finding.stated, "recomputed": finding.recomputed, "carried": finding.carried}
    plain = {"deviation": finding.deviation, "tolerance": finding.tolerance}
    unit = finding.stated.unit if finding.stated else ""
    numbers: Tree = {name: finite(amount.value) for name, amount in amounts.items() if amount}
    numbers |= {name: finite(value) for name, value in plain.items() if value is not None}
    return {"theme": finding.theme, **numbers, **({"unit": unit} if unit else {})}
