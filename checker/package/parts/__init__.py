"""The record format as models: which part has which fields, and what every field means.

The models hold text as written. What a text says (a quantity, a reference) is decided when the record is
flattened, so that one unreadable quantity does not take down its record.
"""
