"""The alternate calculation sheet: steps, how they are planned from a record, how they are evaluated."""
