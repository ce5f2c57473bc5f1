"""Filter expressions: what they select, and how they complain."""

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf, load_shelf
from stillroom.chem.data.errors import (
    BadExpression,
    StillroomError,
    UnitMismatch,
    UnknownQuantity,
)

SHELF = load_shelf()


@pytest.fixture(scope="module")
def shelf() -> Shelf:
    return SHELF


def names(expression: str) -> set[str]:
    return {SHELF.identities[r].name for r in SHELF.where(expression)}


def test_a_range_with_units_means_what_it_says(shelf: Shelf) -> None:
    rows = shelf.where("3 D < dipole <= 4 D and boiling_point < 450 K")
    dipole, boils = shelf.columns["dipole"], shelf.columns["boiling_point"]
    assert rows.size > 10
    for row in range(len(shelf)):
        d, b = dipole.value(row), boils.value(row)
        inside = d is not None and b is not None and 3 < d.number <= 4 and b.si < 450
        assert (row in rows) == inside


@pytest.mark.parametrize(
    ("one", "other"),
    [
        ("dipole > 3", "dipole > 3 D"),
        ("dipole_D > 3", "3 D < dipole"),
        ("boiling_point < 90.5 degC", "boiling_point < 194.9 degF"),
        ("boiling_point < 100 °C", "boiling_point < 373.15 K"),
        ("family = nitrile", "family == 'nitrile'"),
        ("not dipole > 3", "not (dipole > 3)"),
        ("dipole>3 and(permittivity>20)", "permittivity > 20 and dipole > 3"),
        ("dipole > 3 or dipole > 1 and permittivity > 20",
         "dipole > 3 or (dipole > 1 and permittivity > 20)"),
        ("name = MEK", "name = 2-butanone"),
        ("density >= 1 g/mL", "density ≥ 1000 kg/m^3"),
        ("melting_point < flash_point", "flash_point > melting_point"),
    ],
)  # fmt: skip
def test_two_ways_to_say_the_same(one: str, other: str) -> None:
    assert names(one) == names(other)
    assert names(one)


def test_missing_values_satisfy_no_comparison(shelf: Shelf) -> None:
    missing = np.isnan(shelf.columns["dipole"].si)
    assert missing.any()
    for operator in ("<", "<=", ">", ">=", "=", "!="):
        assert not missing[shelf.where(f"dipole {operator} 2 D")].any()
    assert set(shelf.where("not known(dipole)")) == set(np.flatnonzero(missing))


def test_text_columns(shelf: Shelf) -> None:
    assert names("name = acetone") == names("cas = 67-64-1") == {"acetone"}
    assert "diethyl ether" in names("hazard ~ peroxide")
    assert {shelf[n].identity.family for n in names("family ~ chlor")} == {"chlorinated"}


@pytest.mark.parametrize(
    ("expression", "error", "told"),
    [
        ("dipole > 3 kg", UnitMismatch, "dipole"),
        ("dipol > 3 D", UnknownQuantity, "did you mean dipole"),
        ("dipole", BadExpression, "character 7"),
        ("dipole >", BadExpression, "character 9: expected a quantity, a number"),
        ("(dipole > 3", BadExpression, r"expected '\)'"),
        ("dipole > 3 permittivity > 2", StillroomError, "dipole|cannot read"),
        ("dipole > 3)", BadExpression, "'and', 'or' or the end"),
        ("and dipole > 3", BadExpression, "character 1"),
        ("dipole ~ 3", BadExpression, "text column"),
        ("family > ketone", BadExpression, "= != or ~"),
        ("dipole > permittivity", UnitMismatch, "permittivity"),
        ("known(dipole", BadExpression, r"'\)'"),
        ("()", BadExpression, "character 2"),
        ("not " * 400 + "dipole > 3", BadExpression, "levels"),
        ("(" * 500, BadExpression, "levels"),
        ("x" * 5000, BadExpression, "at most"),
        ("__import__('os').system('true')", StillroomError, "dipole|cannot read"),
    ],
)
def test_complaints_say_where_and_what(expression: str, error: type, told: str) -> None:
    with pytest.raises(error, match=told):
        SHELF.where(expression)


words = st.sampled_from(
    "dipole permittivity family name known ( ) and or not > < >= = != ~ 3 2.5 D degC ketone 'x' \" "
    "\x1b \u202e é ;".split(" ")
)


@given(st.one_of(st.text(max_size=60), st.lists(words, max_size=14).map(" ".join)))
def test_any_text_selects_or_complains(text: str) -> None:
    try:
        rows = SHELF.where(text)
    except StillroomError as problem:
        assert str(problem)
    else:
        assert ((rows >= 0) & (rows < len(SHELF))).all()


comparison = st.builds(
    "{} {} {}".format,
    st.sampled_from(["dipole", "permittivity", "polarizability"]),
    st.sampled_from(["<", ">", "<=", ">="]),
    st.floats(0, 40).map(lambda x: f"{x:.2f}"),
)


@given(comparison, comparison)
def test_boolean_algebra(a: str, b: str) -> None:
    everything = set(range(len(SHELF)))
    first, second = set(SHELF.where(a)), set(SHELF.where(b))
    assert set(SHELF.where(f"{a} and {b}")) == first & second
    assert set(SHELF.where(f"{a} or {b}")) == first | second
    assert set(SHELF.where(f"not {a}")) == everything - first
    assert set(SHELF.where(f"not ({a} or {b})")) == set(SHELF.where(f"not {a} and not {b}"))
