"""The PDF report: the document that goes with a transmittal. A4, black on white, everything drawn as vectors.

======================  =========================================================================
``fonts``, ``styles``   the embedded typeface; sizes, colours and measures of the page
``text``                the one gate for text: escapes, marks missing glyphs, makes paragraphs
``tables``              ruled tables whose cells are capped, so that every row fits a page
``canvas``, ``frame``   fixed dates; header and footer, page x of y
``cover``, ``summary``  what was reviewed, the verdict, the basis; the table of records
``records``             one record: ``findings``, ``states``, ``ledgers``, diagrams, ``checks``, ``sheet``
``axes``, ``labels``,   p–v and T–s diagrams: scales and ticks, places for labels that do not collide,
``diagrams``            and the drawing
``comments``            the comment sheet, and the grounds of the rules that found something
``document``            puts it together; falls back to plain text rather than to no file
======================  =========================================================================
"""
