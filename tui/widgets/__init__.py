"""Widgets shared by the screens."""
