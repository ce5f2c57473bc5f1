"""Text that comes from files or users, made safe for a terminal."""

from __future__ import annotations

import unicodedata

# Cc: control characters (ESC, NUL, C1); Cf: invisible formatting such as the bidi overrides;
# Cs, Co, Cn: surrogates, private use, unassigned; Zl, Zp: line and paragraph separators.
_UNSAFE = frozenset({"Cc", "Cf", "Cs", "Co", "Cn", "Zl", "Zp"})


def clean_text(text: str, limit: int = 400) -> str:
    r"""Return one printable line: unsafe characters become spaces, runs of space collapse.

    Parameters
    ----------
    text : str
        Any text.
    limit : int
        Longest result, in characters; a longer one ends in an ellipsis.

    Examples
    --------
    >>> clean_text("acetone\x1b[31m\n dry")
    'acetone [31m dry'
    """
    if text.isprintable() and "  " not in text and len(text) <= limit:
        return text.strip()
    safe = "".join(" " if unicodedata.category(c) in _UNSAFE else c for c in text)
    line = " ".join(safe.split())
    return line if len(line) <= limit else line[: limit - 1] + "…"
