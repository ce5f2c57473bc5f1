"""The sourced tables that stillroom ships, as plain CSV files."""
