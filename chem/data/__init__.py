"""Units, quantities, values with provenance, errors: what everything else is written in."""
