"""Names: how alike two may be, which one wins, and what is suggested."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf
from stillroom.chem.data.errors import AmbiguousLiquid, UnknownLiquid
from stillroom.chem.liquids.liquid import Identity
from stillroom.chem.shelf.names import NameIndex, fold


@pytest.mark.parametrize(
    ("typed", "name"),
    [
        ("acetone", "acetone"),
        ("ACETONE", "acetone"),
        ("\tace\u200btone", None),  # a zero-width space is cleaned to a space
        ("Dimethyl_Ketone", "acetone"),
        ("n‑hexane", "hexane"),  # non-breaking hyphen, as pasted from a web page
        ("n–hexane", "hexane"),  # en dash
        ("n−hexane", "hexane"),  # minus sign
        ("ｗａｔｅｒ", "water"),  # full width
        ("H₂O", "water"),  # subscript
        ("h2o", "water"),
        ("C₁₀H₁₆", "alpha-pinene"),
        ("α-Pinene", "alpha-pinene"),
        ("7732-18-5", "water"),
        ("7732‐18‐5", "water"),
        ("CC(O)=O", "acetic acid"),
        ("O", "water"),
        ("mystery blend", "Mystery Blend"),
    ],
)
def test_what_is_typed_and_pasted(mini: Shelf, typed: str, name: str | None) -> None:
    found = mini.identities[mini.row(typed)].name
    assert found == (name or "acetone")


def test_a_formula_of_two_liquids_is_not_guessed(mini: Shelf) -> None:
    with pytest.raises(AmbiguousLiquid, match=r"'C3H6O' fits 2 liquids \(acetone, propanal\)"):
        mini.row("C3H6O")
    assert "C3H6O" not in mini
    assert mini.row("C6H14") == mini.row("hexane")


@pytest.mark.parametrize(
    ("typed", "suggestion"),
    [
        ("acetonne", "acetone"),
        ("etanol", "ethanol"),
        ("cloroform", "chloroform"),
        ("watre", "water"),
        ("propanonne", "acetone"),  # a synonym's near miss leads to the liquid's own name
        ("hexan", "hexane"),
    ],
)
def test_near_misses_are_suggested(mini: Shelf, typed: str, suggestion: str) -> None:
    with pytest.raises(UnknownLiquid) as caught:
        mini.row(typed)
    assert caught.value.suggestions[0] == suggestion
    assert f"did you mean {suggestion}" in str(caught.value)


@pytest.mark.parametrize("typed", ["", "   ", "\x00", "qqqqqqqq", "-", "🧪"])
def test_nothing_like_it_is_said_plainly(mini: Shelf, typed: str) -> None:
    with pytest.raises(UnknownLiquid, match="no liquid called") as caught:
        mini.row(typed)
    assert caught.value.suggestions == ()


def test_a_name_wins_over_a_synonym_and_a_synonym_over_a_cas_number() -> None:
    index = NameIndex(
        [
            Identity("a", "first", synonyms=("second", "9-9-9")),
            Identity("b", "second", cas="9-9-9"),
            Identity("c", "third", synonyms=("second",)),
        ]
    )
    assert index.row("second") == 1
    assert index.row("9-9-9") == 0


# Letters and digits of the Latin and Greek alphabets, spaces and hyphens: what names are made of.
letters = st.characters(max_codepoint=0x3FF, categories=["L", "N"]) | st.sampled_from(" -_‐‑–−")


@given(st.text(letters, max_size=30))
def test_folding_again_changes_nothing_and_case_and_hyphens_do_not_count(text: str) -> None:
    once = fold(text)
    assert fold(once) == once
    assert fold(f"-{text} ") == once
    assert fold(text.casefold()) == once


def test_searching_looks_at_every_name(mini: Shelf) -> None:
    def found(text: str) -> list[str]:
        return [mini.identities[r].name for r in mini.matching(text)]

    assert found("ketone") == ["acetone"]
    assert found("67-64") == ["acetone"]
    assert found("C3H6O") == ["acetone", "propanal"]
    assert found("alcohol") == ["ethanol"]
    assert found("hexane") == ["hexane"]
    assert found("ace")[0] == "acetone"  # begins with it, before those that contain it
    assert set(found("")) == {who.name for who in mini.identities}
    assert found("zzz") == []
