"""How the interaction of a pair runs with distance, and with temperature."""

from __future__ import annotations

from dataclasses import replace

import numpy as np
from numpy.typing import ArrayLike

from stillroom.chem.pairs.pair import PairInteraction, pair_molecules
from stillroom.chem.pairs.terms import PairTerms, pair_terms


def along_distance(pair: PairInteraction, distances: ArrayLike | None = None) -> PairTerms:
    """Return the terms of `pair` at `distances` (m, shape (n,)), temperature unchanged.

    By default 60 distances from 0.95 to 2.0 times the pair's own.
    """
    if distances is None:
        distances = pair.distance * np.linspace(0.95, 2.0, 60)
    a, b = pair_molecules(pair)
    return pair_terms(a, b, distances, pair.temperature, pair.model)


def along_temperature(pair: PairInteraction, temperatures: ArrayLike) -> PairTerms:
    """Return the terms of `pair` at `temperatures` (K, shape (n,)), distance unchanged.

    Only the Boltzmann weight of the orientations changes; use `interact` at each temperature to
    let the contact distance follow the density too.
    """
    a, b = pair_molecules(pair)
    terms = pair_terms(a, b, pair.distance, temperatures, pair.model)
    return replace(terms, distance=np.broadcast_to(terms.distance, terms.coupling.shape))
