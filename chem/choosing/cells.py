"""CSV cells that a spreadsheet program takes for text, and back."""

from __future__ import annotations

_RUNS = ("=", "+", "-", "@", "\t", "\r")
"""First characters that make a spreadsheet run a text as a formula (OWASP, CSV injection)."""


def neutral(text: str) -> str:
    """Return a text cell that no spreadsheet runs: a leading apostrophe where one is needed.

    Examples
    --------
    >>> neutral("=1+1"), neutral("'quoted"), neutral("acetone")
    ("'=1+1", "''quoted", 'acetone')
    """
    return f"'{text}" if text.startswith((*_RUNS, "'")) else text


def original(cell: str) -> str:
    """Undo `neutral`.

    Examples
    --------
    >>> original("'=1+1"), original("acetone")
    ('=1+1', 'acetone')
    """
    return cell[1:] if cell.startswith("'") else cell
