"""Filters against an independent evaluation of the same expression, written as a tree."""

import math
import operator
from dataclasses import dataclass

import pytest
from hypothesis import given
from hypothesis import strategies as st

from stillroom.chem import Shelf
from stillroom.chem.data.errors import BadExpression, UnknownQuantity

OPERATORS = {
    "<": operator.lt, "<=": operator.le, ">": operator.gt, ">=": operator.ge,
    "=": lambda a, b: math.isclose(a, b, rel_tol=1e-6),
    "!=": lambda a, b: not math.isclose(a, b, rel_tol=1e-6),
}  # fmt: skip
# Unit and how a number in it becomes one in the quantity's own unit: SI prefixes and definitions.
UNITS = {
    "dipole": {"": 1.0, "D": 1.0, "debye": 1.0, "mD": 1e-3},
    "density": {"": 1.0, "kg/m^3": 1.0, "g/mL": 1e3, "g/cm**3": 1e3},
    "permittivity": {"": 1.0},
    "polarizability": {"": 1.0, "angstrom**3": 1.0, "nm^3": 1e3},
}


class Node:
    """Text of an expression, its binding strength, and what it means for one liquid."""

    strength = 3

    def text(self) -> str:
        raise NotImplementedError

    def holds(self, liquid) -> bool:
        raise NotImplementedError

    def inside(self, strength: int) -> str:
        return self.text() if self.strength >= strength else f"({self.text()})"


@dataclass
class Compare(Node):
    quantity: str
    sign: str
    number: float
    unit: str
    flipped: bool

    def text(self) -> str:
        number = f"{self.number:g} {self.unit}".strip()
        if self.flipped:
            flip = {"<": ">", "<=": ">=", ">": "<", ">=": "<="}.get(self.sign, self.sign)
            return f"{number} {flip} {self.quantity}"
        return f"{self.quantity} {self.sign} {number}"

    def holds(self, liquid) -> bool:
        value = liquid.values.get(self.quantity)
        wanted = float(f"{self.number:g}") * UNITS[self.quantity][self.unit]
        return value is not None and OPERATORS[self.sign](value.number, wanted)


@dataclass
class Between(Node):
    quantity: str
    low: float
    first: str
    second: str
    high: float

    def text(self) -> str:
        return f"{self.low:g}{self.first}{self.quantity}{self.second}{self.high:g}"

    def holds(self, liquid) -> bool:
        value = liquid.values.get(self.quantity)
        return (
            value is not None
            and OPERATORS[self.first](float(f"{self.low:g}"), value.number)
            and OPERATORS[self.second](value.number, float(f"{self.high:g}"))
        )


@dataclass
class Known(Node):
    quantity: str

    def text(self) -> str:
        return f"known({self.quantity})"

    def holds(self, liquid) -> bool:
        return self.quantity in liquid.values


@dataclass
class Family(Node):
    sign: str
    wanted: str

    def text(self) -> str:
        return f'family {self.sign} "{self.wanted}"'

    def holds(self, liquid) -> bool:
        family = liquid.identity.family
        if self.sign == "~":
            return bool(family) and self.wanted in family
        return bool(family) and (family == self.wanted) == (self.sign == "=")


@dataclass
class Not(Node):
    inner: Node
    strength = 2

    def text(self) -> str:
        return f"not {self.inner.inside(2)}"

    def holds(self, liquid) -> bool:
        return not self.inner.holds(liquid)


@dataclass
class Join(Node):
    word: str
    parts: list[Node]

    @property
    def strength(self) -> int:  # type: ignore[override]
        return 1 if self.word == "and" else 0

    def text(self) -> str:
        return f" {self.word} ".join(part.inside(self.strength) for part in self.parts)

    def holds(self, liquid) -> bool:
        return (all if self.word == "and" else any)(part.holds(liquid) for part in self.parts)


numbers = st.floats(0, 90).map(lambda x: float(f"{x:.3g}")) | st.sampled_from([2.88, 1.855, 20.7])
signs = st.sampled_from(sorted(OPERATORS))
orders = st.sampled_from(["<", "<=", ">", ">="])
quantities = st.sampled_from(sorted(UNITS))
compares = quantities.flatmap(
    lambda q: st.builds(
        Compare, st.just(q), signs, numbers, st.sampled_from(sorted(UNITS[q])), st.booleans()
    )
)
leaves = st.one_of(
    compares,
    st.builds(Between, quantities, numbers, orders, orders, numbers),
    st.builds(Known, quantities),
    st.builds(
        Family, st.sampled_from(["=", "!=", "~"]), st.sampled_from(["ketone", "alcohol", "al", ""])
    ),
)
trees = st.recursive(
    leaves,
    lambda inner: st.one_of(
        st.builds(Not, inner),
        st.builds(Join, st.sampled_from(["and", "or"]), st.lists(inner, min_size=2, max_size=3)),
    ),
    max_leaves=7,
)


@pytest.fixture(scope="module")
def liquids(mini: Shelf) -> list:
    return list(mini)


@given(tree=trees)
def test_an_expression_means_what_its_tree_means(mini: Shelf, liquids: list, tree: Node) -> None:
    """Precedence: `not` before `and` before `or`; parentheses only where the tree needs them."""
    expected = [row for row, liquid in enumerate(liquids) if tree.holds(liquid)]
    assert mini.where(tree.text()).tolist() == expected


@given(one=trees, two=trees)
def test_de_morgan(mini: Shelf, one: Node, two: Node) -> None:
    a, b = f"({one.text()})", f"({two.text()})"
    assert mini.where(f"not ({a} and {b})").tolist() == mini.where(f"not {a} or not {b}").tolist()
    assert mini.where(f"not ({a} or {b})").tolist() == mini.where(f"not {a} and not {b}").tolist()
    assert mini.where(f"not not {a}").tolist() == mini.where(a).tolist()


@given(compare=compares)
def test_opposite_comparisons_share_out_the_known_values(mini: Shelf, compare: Compare) -> None:
    opposite = {"<": ">=", ">=": "<", ">": "<=", "<=": ">", "=": "!=", "!=": "="}[compare.sign]
    against = Compare(compare.quantity, opposite, compare.number, compare.unit, compare.flipped)
    one, two = set(mini.where(compare.text())), set(mini.where(against.text()))
    assert not one & two
    assert one | two == set(mini.where(f"known({compare.quantity})"))


def names(mini: Shelf, expression: str) -> list[str]:
    return [mini.identities[r].name for r in mini.where(expression)]


class TestHazards:
    """A blank hazard means not known here, never safe."""

    def test_equal_means_the_hazard_and_contains_looks_at_its_detail_too(self, mini) -> None:
        assert names(mini, "hazard = toxic") == ["chloroform"]
        assert names(mini, "hazard = 'highly flammable'") == ["acetone"]
        assert names(mini, "hazard ~ 'group 2B'") == ["chloroform"]

    def test_a_liquid_without_a_record_is_not_found_by_asking_for_others(self, mini) -> None:
        assert names(mini, "hazard != toxic") == ["acetone"]
        assert names(mini, "known(hazard)") == ["acetone", "chloroform"]
        assert names(mini, "known(hazard) and not hazard ~ toxic") == ["acetone"]


class TestTexts:
    """Words, quotes and alternatives."""

    def test_a_synonym_counts_as_a_name(self, mini) -> None:
        assert names(mini, "name = propanone") == ["acetone"]
        assert names(mini, "name = PROPANONE or name = 'Dimethyl Ketone'") == ["acetone"]
        assert names(mini, "name ~ acet and known(dipole)") == ["acetone", "acetic acid"]

    def test_words_need_no_quotes_until_a_joining_word(self, mini) -> None:
        assert names(mini, "family = carboxylic acid and dipole < 2 D") == ["acetic acid"]
        assert names(mini, "cas = 7732-18-5 or formula = c2h6o") == ["water", "ethanol"]

    def test_a_quoted_joining_word_is_text(self, mini) -> None:
        assert names(mini, "family = 'and' or family = \"not\"") == []

    def test_a_blank_text_equals_nothing_and_differs_from_nothing(self, mini) -> None:
        everything = {who.name for who in mini.identities}
        assert everything - set(names(mini, "family != ketone")) == {"acetone", "Mystery Blend"}
        assert names(mini, "not known(family)") == ["Mystery Blend"]


@pytest.mark.parametrize(
    ("expression", "position"),
    [
        ("dipole", 7),
        ("0 < dipole < 3 < 4", 16),
        ("dipole > 3 or", 14),
        ("dipole > 3 and (permittivity > 2", 33),
        ("dipole > 3) or x", 11),
        ("   ;; ", None),
        ("dipole 'x", 8),
        ("known dipole", 7),
        ("known(dipole > 3", 14),
        ("< 3", 1),
        ("dipole < > 3", 10),
    ],
)
def test_the_place_of_the_fault_is_told(mini: Shelf, expression: str, position: int | None) -> None:
    with pytest.raises((BadExpression, UnknownQuantity)) as caught:
        mini.where(expression)
    if position is not None:
        assert f"at character {position}:" in str(caught.value)


def test_an_empty_expression_selects_everything(mini: Shelf) -> None:
    assert mini.where("").tolist() == mini.where("  \t").tolist() == list(range(len(mini)))
