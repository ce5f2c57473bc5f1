"""Round numbers along an axis."""

from __future__ import annotations

import math
from collections.abc import Sequence
from itertools import pairwise

_STEPS = (1, 2, 5)


def ticks(low: float, high: float, most: int) -> list[float]:
    """Return at most `most` multiples of 1, 2 or 5 times a power of ten within [low, high].

    Examples
    --------
    >>> ticks(0.31, 1.18, 6)
    [0.4, 0.6, 0.8, 1.0]
    """
    if not high > low or most < 1:
        return []
    raw = (high - low) / most
    power = math.floor(math.log10(raw))
    for step in (s * 10.0**p for p in (power, power + 1) for s in _STEPS):
        first, last = math.ceil(low / step - 1e-9), math.floor(high / step + 1e-9)
        if last - first + 1 <= most:
            digits = max(0, 1 - math.floor(math.log10(step)))
            return [round(i * step, digits) + 0.0 for i in range(first, last + 1)]
    return []


def log_ticks(low: float, high: float, most: int) -> list[float]:
    """Return at most `most` round numbers for a logarithmic axis.

    1, 2 and 5 in each decade if there is room, else powers of ten, else only some of these; where
    fewer than two of them fall (less than a factor of about three), evenly spaced ones.
    """
    if not 0 < low < high or most < 1:
        return []
    decades = range(math.floor(math.log10(low)), math.ceil(math.log10(high)) + 1)
    fine, powers = (
        [t for t in marks if low * (1 - 1e-9) <= t <= high * (1 + 1e-9)]
        for marks in (
            [float(f"{m}e{d}") for d in decades for m in _STEPS],
            [float(f"1e{d}") for d in decades],
        )
    )
    if len(fine) < 2:
        return ticks(low, high, most)
    found = fine if len(fine) <= most or len(powers) < 2 else powers
    return found[:: math.ceil(len(found) / most)]


def tick_labels(values: Sequence[float]) -> list[str]:
    """Return the ticks as text, with the fewest digits that still tell them apart.

    Examples
    --------
    >>> tick_labels([0.0, 0.5, 1.0]), tick_labels([1.0, 1000.0, 1e6])
    (['0.0', '0.5', '1.0'], ['1', '1000', '1e+06'])
    """
    sizes = [abs(v) for v in values if v]
    if not sizes:
        return ["0"] * len(values)
    if max(sizes) / min(sizes) > 100:  # a logarithmic axis: each number as short as it can be
        return [f"{v:g}" for v in values]
    gap = min((abs(b - a) for a, b in pairwise(values)), default=min(sizes))
    form = "g" if max(sizes) >= 1e6 or gap < 1e-4 else "f"
    texts: list[str] = []
    for digits in range(18):
        texts = [f"{v:.{digits}{form}}" for v in values]
        if all(abs(float(t) - v) <= gap * 1e-6 for t, v in zip(texts, values, strict=True)):
            break
    return texts
