"""A number with everything that must travel with it, and columns of such numbers."""

from __future__ import annotations

from dataclasses import dataclass

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.errors import UnitMismatch
from stillroom.chem.data.quantities import QUANTITIES, Quantity

KINDS = ("measured", "derived", "computed", "estimated", "user")
"""Where a number comes from: read off an instrument; worked out from measured numbers by an exact
or accepted relation; from quantum chemistry; from a rule with a known error; given by the user."""

KIND_MARKS = {"measured": "", "derived": "=", "computed": "c", "estimated": "~", "user": "u"}
"""One character after a number that tells its kind without colour."""


class Magnitude(float):
    """A float that remembers its unit; arithmetic gives plain floats."""

    units: str

    def __new__(cls, number: float, units: str = "") -> Magnitude:
        """Make the number `number` in `units` (copying calls it with the number alone)."""
        self = super().__new__(cls, number)
        self.units = units
        return self

    @property
    def magnitude(self) -> float:
        """The number alone."""
        return float(self)


@dataclass(frozen=True, slots=True)
class Value:
    """One value of one quantity of one liquid.

    `number` and `uncertainty` (standard, NaN if unknown) are in `unit`; `temperature` in K, None
    where it has no meaning; `kind` is one of `KINDS`; `source` is a key of the sources table.
    """

    quantity: str
    number: float
    unit: str
    kind: str
    source: str
    uncertainty: float
    temperature: float | None = None
    note: str = ""

    @property
    def definition(self) -> Quantity:
        """The quantity's row in the table of quantities."""
        return QUANTITIES[self.quantity]

    @property
    def si(self) -> float:
        """The number in SI units."""
        return self.definition.to_si(self.number)

    @property
    def si_uncertainty(self) -> float:
        """The standard uncertainty in SI units."""
        return self.uncertainty * self.definition.factor

    def to(self, unit: str) -> Magnitude:
        """Return the number in another unit, such as `"debye"` or `"kelvin"`.

        Raises
        ------
        UnitMismatch
            If the unit is unknown or of another kind.
        """
        from stillroom.chem.data.units import convert, readable

        q = self.definition
        if unit in (q.unit, q.unit_label):
            return Magnitude(self.number, unit)
        if not readable(unit):
            raise UnitMismatch(unit, self.quantity.replace("_", " "), q.unit_label or "a number")
        number = convert(self.number, q.unit or "dimensionless", unit)
        if number is not None:
            return Magnitude(number, unit)
        for other, factor in q.also:
            number = convert(self.si / factor, other, unit)
            if number is not None:
                return Magnitude(number, unit)
        raise UnitMismatch(unit, self.quantity.replace("_", " "), q.unit_label or "a pure number")

    def __str__(self) -> str:
        spread = "" if np.isnan(self.uncertainty) else f" ± {self.uncertainty:.2g}"
        unit = f" {self.definition.unit_label}" if self.definition.unit_label else ""
        return f"{self.number:.{self.definition.decimals}f}{spread}{unit} ({self.kind})"


@dataclass(frozen=True, slots=True)
class Column:
    """The values of one quantity for n liquids, in SI; NaN where missing.

    `si`, `uncertainty`, `temperature` are float arrays of shape (n,); `kind`, `source`, `note` are
    object arrays of str of shape (n,).
    """

    quantity: Quantity
    si: NDArray[np.float64]
    uncertainty: NDArray[np.float64]
    temperature: NDArray[np.float64]
    kind: NDArray[np.object_]
    source: NDArray[np.object_]
    note: NDArray[np.object_]

    @classmethod
    def empty(cls, quantity: Quantity, n: int) -> Column:
        """Return a column of n missing values."""

        def words() -> NDArray[np.object_]:
            return np.full(n, "", dtype=object)

        def missing() -> NDArray[np.float64]:
            return np.full(n, np.nan)

        return cls(quantity, missing(), missing(), missing(), words(), words(), words())

    @classmethod
    def of(cls, value: Value) -> Column:
        """Return a column of one value."""
        column = cls.empty(value.definition, 1)
        column.put(0, value)
        return column

    def put(self, row: int, value: Value) -> None:
        """Store `value` in `row` (only while a table is being built)."""
        self.si[row] = value.si
        self.uncertainty[row] = value.si_uncertainty
        self.temperature[row] = np.nan if value.temperature is None else value.temperature
        self.kind[row], self.source[row], self.note[row] = value.kind, value.source, value.note

    def value(self, row: int) -> Value | None:
        """Return the value in `row`, None if missing."""
        if np.isnan(self.si[row]):
            return None
        q = self.quantity
        temperature = float(self.temperature[row])
        return Value(
            quantity=q.name,
            number=q.from_si(float(self.si[row])),
            unit=q.unit,
            kind=self.kind[row],
            source=self.source[row],
            uncertainty=float(self.uncertainty[row]) / q.factor,
            temperature=None if np.isnan(temperature) else temperature,
            note=self.note[row],
        )

    def take(self, rows: NDArray[np.intp]) -> Column:
        """Return the column restricted to `rows`, in that order."""
        return Column(
            self.quantity,
            self.si[rows],
            self.uncertainty[rows],
            self.temperature[rows],
            self.kind[rows],
            self.source[rows],
            self.note[rows],
        )


Columns = dict[str, Column]
"""Quantity name to column, all of the same length."""
