"""The last gate before the terminal: no control character leaves a widget."""

from __future__ import annotations


def printable(text: str) -> str:
    r"""Return the text with every unprintable character replaced by a space.

    Texts are cleaned where they enter the program; this holds even when one slips through.
    Escape, NUL, C1 controls, line breaks and direction overrides all count as unprintable.

    Examples
    --------
    >>> printable("a\x1b[31mb\u202ec")
    'a [31mb c'
    """
    if text.isprintable():
        return text
    return "".join(c if c.isprintable() else " " for c in text)
