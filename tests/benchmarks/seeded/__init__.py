"""Seeded errors: correct records of known truth, an originator who slips, and the score of the reviews.

    equation, fluids, gases   properties by closed forms, polynomials and published Helmholtz equations of our own
    chain                     the originator's calculation: inputs, steps, claims, and a slip carried through them
    writing, rounding         inputs as decimal text, results as people round them, the package text
    onebody, composites, …    the situations
    slips_of_inputs, …        where each slip of the catalogue can happen
    trial                     one record with its slips, and which digits tell them apart
    judge, score              what the review said against what was done

Nothing here imports a value of the alternate calculation: no ``checker`` but its ``review`` in ``judge``, no CoolProp.
"""
