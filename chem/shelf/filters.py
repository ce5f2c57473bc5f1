"""Reads filter expressions such as `dipole > 3 D and not boiling_point > 180 degC`.

    expression = term { "or" term }
    term       = factor { "and" factor }
    factor     = "not" factor | "(" expression ")" | comparison
    comparison = operand operator operand [ operator operand ]     (a < b < c works)
    operand    = quantity | number [unit] | text
    operator   = "<" | "<=" | ">" | ">=" | "=" | "==" | "!=" | "~"

Text columns (`name`, `family`, `formula`, `cas`, `id`, `hazard`) take `=`, `!=` and `~` (contains);
a synonym counts as a name.
A comparison with a missing value is false, whatever the operator; `known(quantity)` asks whether
there is one, of a text column too: no `hazard` means not known here, never safe. The text is
parsed here and never evaluated as Python.
"""

from __future__ import annotations

import re
from collections.abc import Callable, Sequence
from dataclasses import dataclass
from typing import Protocol

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.errors import BadExpression, UnitMismatch
from stillroom.chem.data.quantities import BY_COLUMN, QUANTITIES, Quantity, quantity
from stillroom.chem.data.units import parse_value

Mask = NDArray[np.bool_]
TEXT_FIELDS = ("name", "family", "formula", "cas", "id", "hazard")
MAX_LENGTH = 2000
MAX_DEPTH = 40


class Table(Protocol):
    """What a filter needs of the thing it filters."""

    def numbers(self, name: str) -> NDArray[np.float64]:
        """Return a quantity in SI, shape (n,)."""

    def texts(self, name: str) -> Sequence[Sequence[str]]:
        """Return a text field, n entries, each with all its alternatives (such as synonyms)."""


@dataclass(frozen=True, slots=True)
class _Token:
    kind: str
    text: str
    position: int


_TOKEN = re.compile(
    r"""\s*(?:
      (?P<op><=|>=|==|!=|≤|≥|<|>|=|~)
    | (?P<open>\() | (?P<close>\))
    | (?P<quoted>"[^"]*"|'[^']*')
    | (?P<word>[^\s()<>=!~≤≥"']+)
    )""",
    re.VERBOSE,
)
_NUMBER = re.compile(r"[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?(?P<unit>\D.*)?$")
_SAME = {"==": "=", "≤": "<=", "≥": ">="}
_FLIP = {"<": ">", "<=": ">=", ">": "<", ">=": "<="}
_COMPARE: dict[str, Callable[[NDArray[np.float64], float], Mask]] = {
    "<": lambda a, b: np.asarray(a < b),
    "<=": lambda a, b: np.asarray(a <= b),
    ">": lambda a, b: np.asarray(a > b),
    ">=": lambda a, b: np.asarray(a >= b),
    "=": lambda a, b: np.isclose(a, b, rtol=1e-6, atol=0.0),
    "!=": lambda a, b: ~np.isclose(a, b, rtol=1e-6, atol=0.0) & ~np.isnan(a),
}


def select(expression: str, table: Table) -> Mask:
    """Return which rows of `table` satisfy `expression` (bool array of shape (n,)).

    Raises
    ------
    BadExpression
        If it cannot be read; says where and what was expected.
    UnknownQuantity
        If a name in it is no quantity.
    UnitMismatch, BadNumber
        If a number has the wrong unit.
    """
    return _Parser(expression, table).parse()


class _Parser:
    def __init__(self, expression: str, table: Table) -> None:
        self.expression = expression
        self.table = table
        self.depth = 0
        self.tokens = self._tokens()
        self.at = 0

    def _tokens(self) -> list[_Token]:
        text = self.expression
        if len(text) > MAX_LENGTH:
            raise BadExpression(text[:40] + "...", MAX_LENGTH, f"at most {MAX_LENGTH} characters")
        tokens, position = [], 0
        while position < len(text):
            if not text[position:].strip():
                break
            match = _TOKEN.match(text, position)
            if match is None or match.lastgroup is None:
                start = len(text) - len(text[position:].lstrip())
                raise BadExpression(text, start, "a quantity, a number or an operator")
            kind = match.lastgroup
            tokens.append(_Token(kind, match[kind], match.start(kind)))
            position = match.end()
        return tokens

    def parse(self) -> Mask:
        mask = self._either()
        if self.at < len(self.tokens):
            self._fail("'and', 'or' or the end")
        return mask

    def _fail(self, expected: str) -> None:
        token = self._peek()
        raise BadExpression(
            self.expression, token.position if token else len(self.expression), expected
        )

    def _peek(self) -> _Token | None:
        return self.tokens[self.at] if self.at < len(self.tokens) else None

    def _next_is(self, word: str) -> bool:
        token = self._peek()
        if token is not None and token.kind == "word" and token.text.lower() == word:
            self.at += 1
            return True
        return False

    def _either(self) -> Mask:
        mask = self._both()
        while self._next_is("or"):
            mask = mask | self._both()
        return mask

    def _both(self) -> Mask:
        mask = self._factor()
        while self._next_is("and"):
            mask = mask & self._factor()
        return mask

    def _factor(self) -> Mask:
        self.depth += 1
        if self.depth > MAX_DEPTH:
            self._fail(f"at most {MAX_DEPTH} levels of 'not' and parentheses")
        try:
            if self._next_is("not"):
                return ~self._factor()
            token = self._peek()
            if token is not None and token.kind == "open":
                self.at += 1
                mask = self._either()
                self._expect("close", "')'")
                return mask
            if self._next_is("known"):
                return self._known()
            return self._comparison()
        finally:
            self.depth -= 1

    def _expect(self, kind: str, expected: str) -> _Token:
        token = self._peek()
        if token is None or token.kind != kind:
            self._fail(expected)
            raise AssertionError  # _fail always raises
        self.at += 1
        return token

    def _known(self) -> Mask:
        self._expect("open", "'(' after known")
        name = self._expect("word", "a quantity").text
        self._expect("close", "')'")
        if name in TEXT_FIELDS:
            return np.array([any(v) for v in self.table.texts(name)], dtype=bool)
        return ~np.isnan(self.table.numbers(quantity(name).name))

    def _comparison(self) -> Mask:
        first = self._operand()
        operator = self._operator()
        second = self._operand()
        mask = self._compare(first, operator, second)
        token = self._peek()
        if token is not None and token.kind == "op":
            then = self._operator()
            mask = mask & self._compare(second, then, self._operand())
        return mask

    def _operator(self) -> str:
        text = self._expect("op", "a comparison (< <= > >= = != ~)").text
        return _SAME.get(text, text)

    def _operand(self) -> list[_Token]:
        """Collect words up to an operator, a parenthesis or a joining word."""
        words: list[_Token] = []
        while (token := self._peek()) is not None and token.kind in ("word", "quoted"):
            if token.kind == "word" and token.text.lower() in ("and", "or", "not"):
                break
            words.append(token)
            self.at += 1
        if not words:
            self._fail("a quantity, a number or a text")
        return words

    def _compare(self, left: list[_Token], operator: str, right: list[_Token]) -> Mask:
        if self._is_name(left):
            return self._named(left[0], operator, right)
        if self._is_name(right):
            return self._named(right[0], _FLIP.get(operator, operator), left)
        if _NUMBER.match(left[0].text):
            left = right
        return self._named(left[0], operator, right)  # raises UnknownQuantity with suggestions

    @staticmethod
    def _is_name(words: list[_Token]) -> bool:
        word = words[0].text
        return len(words) == 1 and (word in QUANTITIES or word in BY_COLUMN or word in TEXT_FIELDS)

    def _named(self, name: _Token, operator: str, other: list[_Token]) -> Mask:
        if name.text in TEXT_FIELDS:
            return self._text(name.text, operator, other)
        q = quantity(name.text, f"at character {name.position + 1}")
        if operator == "~":
            raise BadExpression(self.expression, other[0].position, "'~' only after a text column")
        if self._is_name(other):
            return self._two_quantities(q, operator, quantity(other[0].text))
        joined = " ".join(t.text for t in other)
        return _COMPARE[operator](self.table.numbers(q.name), parse_value(joined, q))

    def _two_quantities(self, left: Quantity, operator: str, right: Quantity) -> Mask:
        if left.unit != right.unit:
            raise UnitMismatch(right.name, left.name, left.unit_label or "a plain number")
        a, b = self.table.numbers(left.name), self.table.numbers(right.name)
        return _COMPARE[operator](a - b, 0.0)

    def _text(self, name: str, operator: str, other: list[_Token]) -> Mask:
        wanted = " ".join(t.text for t in other).strip("\"'").casefold()
        values = [[t for t in v if t] for v in self.table.texts(name)]  # a blank is a missing value
        if operator == "~":
            return np.array([any(wanted in t.casefold() for t in v) for v in values], dtype=bool)
        if operator not in ("=", "!="):
            raise BadExpression(self.expression, other[0].position, "= != or ~ for a text column")
        same = np.array([any(t.casefold() == wanted for t in v) for v in values], dtype=bool)
        if operator == "=":
            return same
        return np.asarray(~same & np.array([any(v) for v in values], dtype=bool))
