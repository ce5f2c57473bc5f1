"""Shares of a whole as a bar of text that reads without colour."""

from __future__ import annotations

import math
from collections.abc import Sequence

MARKS = "█▒░#=+:~"
"""One character per share, neighbours easy to tell apart."""
NEGATIVE = "-"
UNKNOWN = "?"


def share_cells(shares: Sequence[float], width: int) -> list[int]:
    """Return how many of `width` cells each share gets, by magnitude, adding up exactly.

    Method of the largest remainder: whole cells first, what is left goes to the largest
    remainders, the earlier share first among equals. All zero where there is nothing to divide
    (no share above zero in magnitude, or one that is not a finite number).
    """
    sizes = [abs(s) for s in shares]
    largest = max(sizes, default=0.0)
    if width <= 0 or not largest > 0 or not all(map(math.isfinite, sizes)):
        return [0] * len(sizes)
    # Scaled by the largest first, so that the sum can neither overflow nor vanish.
    scaled = [s / largest for s in sizes]
    total = math.fsum(scaled)
    exact = [s / total * width for s in scaled]
    cells = [int(e) for e in exact]
    by_remainder = sorted(range(len(exact)), key=lambda i: cells[i] - exact[i])
    for i in by_remainder[: width - sum(cells)]:
        cells[i] += 1
    return cells


def share_bar(shares: Sequence[float], width: int, marks: str = MARKS) -> str:
    """Return a bar of exactly `width` characters, one mark per share in the order given.

    A negative share takes cells by its magnitude and is drawn with `-`, so that it cannot be
    taken for a part of the whole. If any share is NaN or infinite the split is not known: a single
    `?` and blanks. If all are zero: blanks.

    Examples
    --------
    >>> share_bar([0.5, 0.2, 0.3], 10)
    '█████▒▒░░░'
    >>> share_bar([0.6, -0.2, 0.2], 10, marks="oid")
    'oooooo--dd'
    >>> share_bar([0.5, float("nan")], 4)
    '?   '
    """
    if len(shares) > len(marks):
        raise ValueError(f"{len(shares)} shares need as many marks, got {len(marks)}")
    if width <= 0:
        return ""
    if not all(map(math.isfinite, shares)):
        return UNKNOWN.ljust(width)
    pieces = zip(shares, marks, share_cells(shares, width), strict=False)
    return "".join((NEGATIVE if s < 0 else m) * n for s, m, n in pieces).ljust(width)
