"""The shelf and the values on it: units, quantities, look-up, filters, the user's store."""
