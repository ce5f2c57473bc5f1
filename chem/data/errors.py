"""Every way a request can be wrong, named by what went wrong for the user.

Each error carries its facts as attributes and makes its own one-line sentence; `str(error)` is
what reaches the user. Nothing else in `chem` is raised on bad input.
"""

from __future__ import annotations

from collections.abc import Sequence


class StillroomError(Exception):
    """Base of all errors that come from a user's input, files or machine."""


class UnknownLiquid(StillroomError):
    """No liquid on the shelf answers to a name."""

    def __init__(self, name: str, suggestions: Sequence[str] = ()) -> None:
        self.name = name
        self.suggestions = tuple(suggestions)
        hint = f"; did you mean {' or '.join(self.suggestions)}?" if self.suggestions else ""
        super().__init__(f"no liquid called '{name}' on the shelf{hint}")


class AmbiguousLiquid(StillroomError):
    """A name or formula answers to several liquids."""

    def __init__(self, name: str, candidates: Sequence[str]) -> None:
        self.name = name
        self.candidates = tuple(candidates)
        shown = ", ".join(self.candidates[:6]) + (", ..." if len(self.candidates) > 6 else "")
        super().__init__(f"'{name}' fits {len(self.candidates)} liquids ({shown}); name one")


class UnknownQuantity(StillroomError):
    """No quantity or column has this name."""

    def __init__(self, name: str, suggestions: Sequence[str] = (), where: str = "") -> None:
        self.name = name
        self.suggestions = tuple(suggestions)
        hint = f"; did you mean {' or '.join(self.suggestions)}?" if self.suggestions else ""
        place = f" {where}" if where else ""
        super().__init__(f"unknown quantity '{name}'{place}{hint}")


class UnitMismatch(StillroomError):
    """A value has a unit that its quantity cannot have."""

    def __init__(self, text: str, quantity: str, expected: str) -> None:
        self.text = text
        self.quantity = quantity
        self.expected = expected
        super().__init__(f"'{text}' is not a {quantity}: expected a unit like {expected}")


class BadNumber(StillroomError):
    """A text is not a number with a unit."""

    def __init__(self, text: str, quantity: str, expected: str) -> None:
        self.text = text
        self.quantity = quantity
        self.expected = expected
        super().__init__(f"cannot read '{text}' as a {quantity}: expected {expected}")


class OutsideRange(StillroomError):
    """A number is readable but outside the range in which it means anything."""

    def __init__(self, what: str, value: str, expected: str) -> None:
        self.what = what
        self.value = value
        self.expected = expected
        super().__init__(f"{what} {value} is out of range: expected {expected}")


class MissingValue(StillroomError):
    """A liquid lacks a value that a calculation needs."""

    def __init__(self, liquid: str, quantity: str, consequence: str = "") -> None:
        self.liquid = liquid
        self.quantity = quantity
        tail = f"; {consequence}" if consequence else ""
        super().__init__(f"{liquid} has no {quantity.replace('_', ' ')}{tail}")


class BadExpression(StillroomError):
    """A `--where` expression cannot be read."""

    def __init__(self, expression: str, position: int, expected: str) -> None:
        self.expression = expression
        self.position = position
        self.expected = expected
        super().__init__(
            f"cannot read filter '{expression}' at character {position + 1}: expected {expected}"
        )


class BadFile(StillroomError):
    """A file cannot be read, or a cell in it is wrong; says file, row and column."""

    def __init__(self, path: str, problem: str, row: int | None = None, column: str = "") -> None:
        self.path = path
        self.row = row
        self.column = column
        self.problem = problem
        place = path + (f", row {row}" if row is not None else "")
        place += f", column {column}" if column else ""
        super().__init__(f"{place}: {problem}")


class CannotWrite(StillroomError):
    """A file cannot be written; what was there before is untouched."""

    def __init__(self, path: str, problem: str) -> None:
        self.path = path
        self.problem = problem
        super().__init__(f"cannot write {path}: {problem}")


class StoreDamaged(StillroomError):
    """The store is not a database that this program can read."""

    def __init__(self, path: str, problem: str) -> None:
        self.path = path
        self.problem = problem
        super().__init__(
            f"store {path} is damaged or not a store ({problem}); it was left as it is"
        )


class StoreBusy(StillroomError):
    """Another program holds the store."""

    def __init__(self, path: str) -> None:
        self.path = path
        super().__init__(
            f"store {path} is in use by another program; nothing was changed, try again"
        )


class UnknownShortlist(StillroomError):
    """No shortlist has this name, or the entry is not on it."""

    def __init__(self, name: str, entry: str = "") -> None:
        self.name = name
        self.entry = entry
        text = (
            f"'{entry}' is not on shortlist '{name}'" if entry else f"no shortlist called '{name}'"
        )
        super().__init__(text)
