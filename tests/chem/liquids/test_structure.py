"""Valence electrons from a formula."""

import string

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import load_shelf
from stillroom.chem.liquids.structure import VALENCE_ELECTRONS, valence_electrons


@pytest.mark.parametrize(
    ("formula", "count"),
    [
        # Group number of each element in the periodic table (main groups), added by hand.
        ("H2O", 8), ("D2O", 8), ("CH4", 8), ("C6H6", 30), ("CHCl3", 26), ("C2H6OS", 26),
        ("C4H12Si", 32), ("CS2", 16), ("CHBr3", 26), ("CH3I", 14), ("C3H9O4P", 50),
    ],
)  # fmt: skip
def test_of_common_formulas(formula: str, count: int) -> None:
    assert valence_electrons(formula) == count


@pytest.mark.parametrize("formula", ["", "Xx2", "C-6", "h2o", "C6 H6", "(CH3)2CO", "2H2O", "C６"])
def test_what_is_no_hill_formula_has_none(formula: str) -> None:
    assert np.isnan(valence_electrons(formula))


@given(st.dictionaries(st.sampled_from(sorted(VALENCE_ELECTRONS)), st.integers(1, 60), min_size=1))
def test_they_add_up(atoms: dict[str, int]) -> None:
    formula = "".join(f"{e}{n if n > 1 else ''}" for e, n in atoms.items())
    assert valence_electrons(formula) == sum(VALENCE_ELECTRONS[e] * n for e, n in atoms.items())


@given(st.text(alphabet=string.printable, max_size=12))
def test_any_text_has_a_count_or_none(text: str) -> None:
    assert np.isnan(valence_electrons(text)) or valence_electrons(text) >= 1


def test_every_formula_of_the_shelf_is_counted_and_even() -> None:
    """Stable liquids are closed-shell molecules (common practice)."""
    shelf = load_shelf()
    assert not np.isnan(shelf.electrons).any()
    odd = [who.name for who, n in zip(shelf.identities, shelf.electrons, strict=True) if n % 2]
    assert odd == []
