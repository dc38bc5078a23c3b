"""Facts: what rules need computed about a case beyond its sheet.

Rules compare and never compute. Everything here takes a ``Case`` (or plain numbers), returns numbers and words,
and says None where a fact cannot be known.
"""
