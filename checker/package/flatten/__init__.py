"""From the parts of a record to statements by pointer: one module for each kind of part."""
