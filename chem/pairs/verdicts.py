"""Verdicts for many pairs of a shelf at once, each liquid's own reasons worked out only once."""

from __future__ import annotations

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.reliability import (
    SOUND_BELOW,
    STRAINED_BELOW,
    VERDICTS,
    between,
    level,
    orientation_reasons,
    own_reasons,
    polar,
)
from stillroom.chem.shelf.shelf import Shelf

Rows = NDArray[np.intp]


class VerdictBook:
    """Verdicts of pairs of rows of one shelf; agrees with `judge` pair by pair (tested)."""

    def __init__(self, shelf: Shelf) -> None:
        self._shelf = shelf
        self._liquids: dict[int, Liquid] = {}
        self._levels: dict[int, tuple[int, int, bool]] = {}
        self._between: dict[tuple[object, ...], int] = {}

    def verdicts(self, a: Rows, b: Rows, leading_order_error: NDArray[np.float64]) -> list[str]:
        """Return one verdict for each pair (`a`, `b`, error of shape (k,))."""
        levels = (leading_order_error >= SOUND_BELOW).astype(int)
        levels += leading_order_error >= STRAINED_BELOW
        rows, inverse = np.unique(np.concatenate([a, b]), return_inverse=True)
        known = [self._of(int(row)) for row in rows]
        own = np.array([k[0] for k in known], dtype=int)[inverse].reshape(2, -1)
        orientation = np.array([k[1] for k in known], dtype=int)[inverse].reshape(2, -1)
        is_polar = np.array([k[2] for k in known], dtype=bool)[inverse].reshape(2, -1)
        oriented = np.where(is_polar.all(axis=0), orientation.max(axis=0, initial=0), 0)
        joint = np.array([self._joint(int(i), int(j)) for i, j in zip(a, b, strict=True)], int)
        levels = np.maximum.reduce([levels, own.max(axis=0, initial=0), oriented, joint])
        return [VERDICTS[i] for i in levels]

    def _of(self, row: int) -> tuple[int, int, bool]:
        if row not in self._levels:
            liquid = self._liquid(row)
            self._levels[row] = (
                level(own_reasons(liquid)),
                level(orientation_reasons(liquid)),
                polar(liquid),
            )
        return self._levels[row]

    def _liquid(self, row: int) -> Liquid:
        if row not in self._liquids:
            self._liquids[row] = self._shelf.liquid(row)
        return self._liquids[row]

    def _joint(self, a: int, b: int) -> int:
        """Level of the reasons between two liquids, which depend on a few structure facts only."""
        s, t = (self._shelf.identities[r].structure for r in (a, b))
        key = (s.hbond_donor, s.hbond_acceptor, s.vapour_dimer,
               t.hbond_donor, t.hbond_acceptor, t.vapour_dimer)  # fmt: skip
        if key not in self._between:
            self._between[key] = level(between(self._liquid(a), self._liquid(b)))
        return self._between[key]
