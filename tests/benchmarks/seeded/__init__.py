"""Seeded errors: correct records of known truth, an originator who slips, and the score of the reviews.

    equation, fluids, gases      properties by published Helmholtz equations, closed forms and polynomials of our own
    units, chain                 decimal text; the originator's calculation, and slips carried through it
    draft, states, leg, process, second_law    the steps that situations are made of, with what goes wrong in each
    onebody, steam, condensed, composites, cycles, situations    the situations
    wrong_inputs, wrong_results  inputs used wrongly, results written wrongly
    originator, trial            what is written and how it is rounded; one record with its slips and its truth
    judge, score, show           what the review said against what was done

The truth takes nothing from the alternate calculation: ``checker`` is imported in ``judge`` alone, CoolProp nowhere.
The coefficients in ``equations.json`` are those of the papers it names, as the property library's data hold them.
"""
