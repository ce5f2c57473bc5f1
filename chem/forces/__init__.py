"""The forces between two molecules as plain functions of arrays in SI units."""
