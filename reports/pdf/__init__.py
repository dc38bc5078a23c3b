"""The PDF report: the document that goes with a transmittal. A4, black on white, everything drawn as vectors.

=========================  ========================================================================
``fonts``, ``styles``      the embedded typeface; sizes, greys and measures of the page
``text``                   the one gate for text: escapes, marks missing glyphs, makes paragraphs
``tables``                 ruled tables whose cells are cut, so that every row fits a page
``canvas``, ``frame``      fixed dates; header and footer, page x of y
``keys``                   names of bookmarks
``cover``, ``summary``     what was reviewed, verdict, signatures, basis; the table of records
``records``                one record, from its parts
``findings``, ``states``,  the parts: findings as blocks, state table, balances that close or do not,
``ledgers``, ``checks``,   comparisons and what was not checked, the calculation sheet
``sheet``
``axes``, ``clipping``,    p–v and T–s diagrams: scales and ticks, curves cut to the frame, free places
``labels``, ``plot``,      for labels, all in points of the page, strokes, and the drawing
``picture``, ``diagrams``
``comments``               the comment sheet, and the grounds of the rules that found something
``document``               puts it together; falls back to plain text rather than to no file
=========================  ========================================================================

Nothing here decides anything about the calculation, and only ``text`` lets text of others in.
"""
