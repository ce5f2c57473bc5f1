"""Choosing among liquids: shortlists and their export."""
