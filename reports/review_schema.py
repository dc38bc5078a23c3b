"""The JSON Schema of the JSON report: closed, every field required and described."""

from __future__ import annotations

from collections.abc import Iterable
from typing import Final

from checker.budget import Kind, Method
from checker.findings import Grade, Outcome, Standing, Verdict

Schema = dict[str, object]

DIALECT: Final = "https://json-schema.org/draft/2020-12/schema"


def review_schema() -> Schema:
    """Return the JSON Schema (2020-12) of the JSON report."""
    return {
        "$schema": DIALECT,
        "title": "Review of a calculation package",
        **_object(
            "One package held against an alternate calculation.",
            tool=_words("Component → version of what made the review."),
            package=_package(),
            verdict=_one_of("The outcome for the whole package.", Verdict),
            counts=_object(
                "Number of findings of each grade.",
                **{grade.value: _count(f"Number of findings of grade {grade.value}.") for grade in Grade},
            ),
            records=_list("The records in the order of the package.", _record()),
            findings=_list("All findings, in the order of the review.", _finding()),
            basis=_words("Setting → value of the review basis that was applied."),
            cautions=_list("What a reader must bear in mind.", _text("One caution.")),
        ),
        "$defs": {"amount": _amount(), "budget": _budget()},
    }


def _object(description: str, **properties: Schema) -> Schema:
    return {
        "type": "object",
        "description": description,
        "properties": properties,
        "required": list(properties),
        "additionalProperties": False,
    }


def _list(description: str, items: Schema) -> Schema:
    return {"type": "array", "description": description, "items": items}


def _words(description: str) -> Schema:
    return {"type": "object", "description": description, "additionalProperties": {"type": "string"}}


def _text(description: str, *, null: bool = False) -> Schema:
    return {"type": ["string", "null"] if null else "string", "description": description}


def _number(description: str) -> Schema:
    return {"type": ["number", "null"], "description": description}


def _truth(description: str) -> Schema:
    return {"type": ["boolean", "null"], "description": description}


def _count(description: str, least: int = 0) -> Schema:
    return {"type": "integer", "minimum": least, "description": description}


def _one_of(description: str, words: Iterable[str], *, null: bool = False) -> Schema:
    return {"enum": [str(word) for word in words] + ([None] if null else []), "description": description}


def _amount() -> Schema:
    return _object(
        "A value in a unit.",
        value=_number("The number; null for a word such as a phase."),
        unit=_text("The unit; empty for pure numbers and words."),
        text=_text("As written where it was stated, else as rounded for print."),
    )


def _budget() -> Schema:
    return _object(
        "What a tolerance is made of, in the unit of the stated quantity.",
        allowance=_number("What the reviewer tolerates."),
        share=_number("The allowance is this share of the reference; 0 where the basis gives it as it is."),
        reference=_number("What the allowance is a share of; 0 where there is no share."),
        of=_text("What the reference is."),
        coverage_factor=_number("k of the expanded uncertainty."),
        method=_one_of("How inputs and models were carried to the result.", Method),
        trials={"type": "integer", "description": "Trials of a Monte Carlo propagation; 0 without one."},
        below=_number("Expanded uncertainty towards smaller values."),
        above=_number("Expanded uncertainty towards larger values."),
        terms=_list("Contributions to the uncertainty, expanded.", _budget_term("One contribution.")),
        last_digits=_number("What the last digits of the inputs would move; no part of the tolerance."),
        open_inputs=_list("The inputs whose last digits move most.", _budget_term("One input.")),
    )


def _budget_term(description: str) -> Schema:
    return _object(
        description,
        kind=_one_of("What contributes.", Kind),
        source=_text("Pointer of the input, or names of the bodies that share a model."),
        size=_number("Coverage factor × standard uncertainty; of a last digit, what it moves."),
        basis=_text("Published source of a model's uncertainty."),
    )


def _maybe_amount(description: str) -> Schema:
    return {"description": description, "oneOf": [{"$ref": "#/$defs/amount"}, {"type": "null"}]}


def _package() -> Schema:
    return _object(
        "The package as submitted; what was not stated is empty.",
        file=_text("Name of the file."),
        sha256=_text("SHA-256 of its bytes, hexadecimal."),
        number=_text("Number of the package."),
        title=_text("Title of the package."),
        revision=_text("Revision of the package."),
        date=_text("Date of the package."),
        project=_text("Project or plant."),
        originator=_text("Who made the calculation."),
        checker=_text("Who was to check it."),
        work_convention=_text("Stated sign convention of work."),
    )


def _record() -> Schema:
    return _object(
        "The review of one record.",
        id=_text("Identifier of the record."),
        title=_text("Title of the record."),
        readable={"type": "boolean", "description": "False where the record could not be understood."},
        verdict=_one_of("The outcome for this record alone.", Verdict),
        models=_list("Property models of the alternate calculation.", _text("One body with its model.")),
        checked=_list("What was held against the alternate calculation.", _checked()),
        rules_held=_list("Rules that applied and found nothing.", _text("Name of a rule.")),
        not_checked=_list("What was not checked.", _not_checked()),
        assumed=_list("What the review itself assumed.", _text("One assumption.")),
        noted=_list("What else the recomputation found, such as a stop never reached.", _text("One note.")),
        states=_list("The state table, one body in one state each.", _state()),
        ledgers=_list("The balances.", _ledger()),
        totals=_list("What the processes of a cycle or a sequence add up to.", _totals()),
        flows=_list("Flows between several bodies, recomputed.", _flow_diagram()),
        sheet=_list("The alternate calculation, step by step.", _step()),
        corrections=_list("What has to be written in place of every wrong result.", _correction()),
    )


def _correction() -> Schema:
    return _object(
        "One wrong result with the recomputed number, to the originator's own digits.",
        quantity=_text("Pointer of the quantity."),
        stated=_text("The text as stated."),
        corrected=_text("The text to write."),
        because=_list("Pointers of the wrong results that it follows from.", {"type": "string"}),
        location=_location(),
    )


def _checked() -> Schema:
    return _object(
        "One comparison; numbers in the stated unit and sign.",
        quantity=_text("Pointer of the quantity within the record."),
        symbol=_text("Its symbol."),
        role=_text("Role in which it was stated."),
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
        carried=_maybe_amount("From the originator's own stated values."),
        deviation=_number("Stated minus recomputed."),
        tolerance=_number("Allowance plus uncertainty, on the side of the deviation."),
        budget={"description": "Its parts.", "oneOf": [{"$ref": "#/$defs/budget"}, {"type": "null"}]},
        outcome=_one_of("Outcome of the comparison.", Outcome),
        standing=_one_of("Where a deviation comes from.", Standing),
        reason=_text("Why it was not evaluable, or what else is to be said."),
    )


def _not_checked() -> Schema:
    return _object(
        "One thing that was not checked.",
        what=_text("What was not checked."),
        missing=_text("What is missing for it."),
    )


def _state() -> Schema:
    cell = _object(
        "One property.",
        symbol=_text("Symbol of the property."),
        name=_text("Name of the property."),
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
        deviation=_number("Stated minus recomputed, in the stated unit."),
        outcome=_one_of("Outcome of the comparison; null where there was none.", Outcome, null=True),
    )
    return _object(
        "One body in one state.",
        state=_text("Name of the state."),
        body=_text("Name of the body."),
        phase=_text("Recomputed phase, in words."),
        properties=_list("Its properties.", cell),
    )


def _ledger() -> Schema:
    term = _object(
        "One term of the balance.",
        label=_text("What the term is."),
        symbol=_text("Its symbol."),
        side=_text(
            "change, transfer or generation; beside the sums share, a body's part, or internal, between bodies."
        ),
        sign={"type": "integer", "description": "Sign in the sum of its side; 0 beside the sums."},
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
    )
    return _object(
        "A balance of one process: change = transfers + generation.",
        process=_text("Name of the process."),
        kind=_text("energy or entropy."),
        unit=_text("Unit of the residuals."),
        terms=_list("Its terms.", term),
        residual_stated=_number("Change − transfers − generation of the stated terms."),
        residual_recomputed=_number("The same of the recomputed terms."),
        closes_stated=_truth("Whether the stated terms balance; null where one is missing."),
        closes_recomputed=_truth("Whether the recomputed terms balance; null where one is missing."),
    )


def _totals() -> Schema:
    column = _object(
        "One column of the table.",
        symbol=_text("Symbol of what is summed: Q is heat in, W is work out."),
        unit=_text("Unit of the column."),
    )
    fact = _object(
        "One result of all processes together.",
        label=_text("What it is."),
        symbol=_text("Its symbol."),
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
        limit=_maybe_amount("What the second law allows at most."),
        limit_basis=_text("What the limit rests on."),
    )
    return _object(
        "Several processes and their sums.",
        name=_text("Identifier of the sequence, or cycle."),
        kind=_text("cycle or sequence."),
        columns=_list("What is summed.", column),
        rows=_list("The processes in their order.", _totals_row("One process.")),
        sum=_totals_row("All processes together."),
        facts=_list("Results that are no sums, such as an efficiency.", fact),
    )


def _totals_row(description: str) -> Schema:
    pair = _object(
        "One number.",
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
    )
    return _object(
        description, label=_text("Name of the process, or Sum."), values=_list("One for each column.", pair)
    )


def _flow_diagram() -> Schema:
    box = _object(
        "A body, or what is around it.",
        name=_text("Name in this diagram."),
        label=_text("Name for a reader."),
        kind=_text("body, outside, meeting or generation."),
        change=_number("Change of the body; null for other boxes."),
    )
    flow = _object(
        "What passes from one box to another.",
        source=_text("Name of the box that it leaves."),
        target=_text("Name of the box that it reaches."),
        label=_text("Name of the transfer, else its kind."),
        kind=_text("heat, work, energy (both together) or entropy."),
        leaves=_number("How much leaves the source."),
        arrives=_number("How much reaches the target: more, where entropy is generated on the way."),
    )
    return _object(
        "One process of several bodies.",
        process=_text("Name of the process."),
        kind=_text("energy or entropy."),
        unit=_text("Unit of all numbers of the diagram."),
        boxes=_list("What is joined.", box),
        flows=_list("What passes.", flow),
    )


def _step() -> Schema:
    output = _object(
        "One output of the step.",
        quantity=_text("Pointer of the quantity."),
        symbol=_text("Its symbol."),
        independent=_maybe_amount("From the inputs alone."),
        carried=_maybe_amount("From the originator's own stated values."),
        stated=_maybe_amount("What the originator stated."),
    )
    return _object(
        "One step of the alternate calculation.",
        title=_text("What the step computes."),
        formula=_text("The formula."),
        substituted=_text("The formula with numbers."),
        outputs=_list("What the step gives.", output),
        note=_text("What else is to be said."),
    )


def _finding() -> Schema:
    return _object(
        "One finding; all numbers in the stated unit and the originator's sign.",
        rule=_text("Name of the rule."),
        theme=_text("Theme of the rule."),
        grade=_one_of("How it must be treated.", Grade),
        record=_text("Identifier of the record; null for the package itself.", null=True),
        quantity=_text("Pointer of the quantity within the record.", null=True),
        role=_text("Role in which it was stated.", null=True),
        stated=_maybe_amount("What the originator stated."),
        recomputed=_maybe_amount("From the inputs alone."),
        carried=_maybe_amount("From the originator's own stated values."),
        deviation=_number("Stated minus recomputed."),
        half_width=_number("Half a unit of the last stated digit."),
        tolerance=_number("Allowance plus uncertainty, on the side of the deviation."),
        budget={"description": "Its parts.", "oneOf": [{"$ref": "#/$defs/budget"}, {"type": "null"}]},
        origin=_truth("Whether the deviation starts here; null where unknown or not applicable."),
        inherits_from=_list("Where it was inherited from.", _text("Pointer of a quantity.")),
        spoils=_list("What it spoiled.", _text("Pointer of a quantity.")),
        causes=_list("Slips that reproduce the stated digits.", _cause()),
        message=_text("What is wrong."),
        suggestion=_text("What the originator can do."),
        basis=_text("Published basis of the rule."),
        formula=_text("The formula of the step."),
        fingerprint=_text("Identity of the finding from one revision to the next."),
        location={"description": "Where in the file.", "oneOf": [_location(), {"type": "null"}]},
    )


def _cause() -> Schema:
    return _object(
        "A known slip.",
        slip=_text("Name of the slip."),
        value=_number("What the slip gives, in the stated unit."),
        statement=_text("The slip in a sentence."),
        likely={"type": "boolean", "description": "False where chance may give the stated digits as well."},
    )


def _location() -> Schema:
    return _object(
        "A place in a file.",
        file=_text("Name of the file."),
        line=_count("Line, from 1.", 1),
        column=_count("Column in code points, from 1.", 1),
        pointer=_text("JSON Pointer (RFC 6901)."),
    )
