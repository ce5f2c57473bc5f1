"""The shelf: all liquids of the table at one temperature, as columns and as liquids."""

from __future__ import annotations

from collections.abc import Iterator, Mapping, Sequence
from functools import cached_property
from importlib.resources.abc import Traversable

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.quantities import BY_COLUMN, QUANTITIES, quantity
from stillroom.chem.data.units import parse_temperature
from stillroom.chem.data.values import Column, Columns
from stillroom.chem.liquids.derived import state
from stillroom.chem.liquids.liquid import Identity, Liquid
from stillroom.chem.shelf import filters
from stillroom.chem.shelf.names import NameIndex
from stillroom.chem.shelf.tables import (
    Hazard,
    Record,
    Source,
    fingerprint,
    preferred_columns,
    read_hazards,
    read_identities,
    read_records,
    read_sources,
    shipped,
)


class Shelf:
    """The table of liquids at one temperature.

    `shelf["acetone"]` finds a liquid by id, name, synonym, CAS number, structure or unique
    formula; `shelf.columns["dipole"].si` is a whole column in SI. Rows keep their number at every
    temperature, so a row number stays good in `shelf.at(...)`.
    """

    def __init__(
        self,
        identities: Sequence[Identity],
        stored: Columns,
        temperature: float = REFERENCE_TEMPERATURE,
        *,
        records: Mapping[str, Sequence[Record]] | None = None,
        folder: Traversable | None = None,
        index: NameIndex | None = None,
    ) -> None:
        self.identities = tuple(identities)
        self.stored = stored
        self.temperature = temperature
        self._records = records or {}
        self._folder = folder
        self._index = index or NameIndex(self.identities)
        self.columns = state(stored, self.electrons, temperature)

    @cached_property
    def electrons(self) -> NDArray[np.float64]:
        """Valence electrons, shape (n,), NaN where unknown."""
        return np.array([who.electrons for who in self.identities], dtype=np.float64)

    @cached_property
    def sources(self) -> Mapping[str, Source]:
        """Citations by key."""
        return read_sources(self._folder) if self._folder else {}

    @cached_property
    def hazards(self) -> Mapping[str, Sequence[Hazard]]:
        """Known dangers by liquid id; an absent liquid means not known here."""
        return read_hazards(self._folder) if self._folder else {}

    @cached_property
    def data_version(self) -> str:
        """A short fingerprint of the tables, the same as long as no number or name changes."""
        return fingerprint(self._folder) if self._folder else "none"

    def __len__(self) -> int:
        return len(self.identities)

    def __iter__(self) -> Iterator[Liquid]:
        return (self.liquid(row) for row in range(len(self)))

    def __getitem__(self, name: str) -> Liquid:
        return self.liquid(self.row(name))

    def __contains__(self, name: str) -> bool:
        from stillroom.chem.data.errors import AmbiguousLiquid, UnknownLiquid

        try:
            self.row(name)
        except (UnknownLiquid, AmbiguousLiquid):
            return False
        return True

    def row(self, name: str) -> int:
        """Return the row of the liquid called `name`.

        Raises
        ------
        UnknownLiquid, AmbiguousLiquid
            If no liquid, or more than one, answers to it.
        """
        return self._index.row(name)

    def liquid(self, row: int) -> Liquid:
        """Return the liquid in `row` at the shelf's temperature."""
        rows = np.array([row])
        stored = {name: column.take(rows) for name, column in self.stored.items()}
        return Liquid.from_columns(self.identities[row], stored, self.temperature)

    def at(self, temperature: float | str) -> Shelf:
        """Return the same shelf at another temperature (K or a text with a unit)."""
        kelvin = parse_temperature(temperature)
        if kelvin == self.temperature:
            return self
        return Shelf(
            self.identities,
            self.stored,
            kelvin,
            records=self._records,
            folder=self._folder,
            index=self._index,
        )

    def where(self, expression: str) -> NDArray[np.intp]:
        """Return the rows that satisfy a filter expression (see `stillroom.chem.shelf.filters`)."""
        if not expression.strip():
            return np.arange(len(self))
        return np.flatnonzero(filters.select(expression, self))

    def matching(self, text: str) -> NDArray[np.intp]:
        """Return the rows with any name, CAS number, formula or family containing `text`.

        The liquid that `text` names comes first, then those whose name begins with it.
        """
        return np.array(self._index.matches(text), dtype=np.intp)

    def take(self, rows: NDArray[np.intp]) -> Shelf:
        """Return a smaller shelf of these rows, in this order."""
        return Shelf(
            [self.identities[r] for r in rows],
            {name: column.take(rows) for name, column in self.stored.items()},
            self.temperature,
            records=self._records,
            folder=self._folder,
        )

    def records(self, liquid_id: str) -> Sequence[Record]:
        """Return every tabulated value of a liquid, preferred or not."""
        return self._records.get(liquid_id, ())

    def column(self, name: str) -> Column:
        """Return a column by quantity or unit-bearing name; raises `UnknownQuantity`."""
        return self.columns[quantity(name).name]

    def order(self, name: str, *, descending: bool = False) -> NDArray[np.intp]:
        """Return rows sorted by a quantity or a text field; missing values last, ties by name."""
        names = np.array([who.name.casefold() for who in self.identities])
        by_name = np.argsort(names, kind="stable")
        if name in filters.TEXT_FIELDS:
            texts = np.array([" ".join(t[:1]).casefold() for t in self.texts(name)])
            places = np.unique(texts, return_inverse=True)[1].astype(float)
            numbers = np.where(texts == "", np.nan, places)[by_name]
        else:
            numbers = self.column(name).si[by_name]
        order = np.argsort(-numbers if descending else numbers, kind="stable")
        return by_name[order]  # NumPy sorts NaN last in both directions

    # The two methods below make the shelf a `filters.Table`.

    def numbers(self, name: str) -> NDArray[np.float64]:
        """Return a quantity in SI, shape (n,)."""
        return self.columns[name].si

    def texts(self, name: str) -> Sequence[Sequence[str]]:
        """Return a text field (one of `filters.TEXT_FIELDS`) for every liquid."""
        if name == "name":
            return [(who.name, *who.synonyms) for who in self.identities]
        if name == "hazard":
            return [
                tuple(
                    text
                    for h in self.hazards.get(who.id, ())
                    for text in (h.hazard, f"{h.hazard} {h.detail}")
                )
                for who in self.identities
            ]
        return [(getattr(who, name),) for who in self.identities]


def load_shelf(folder: Traversable | None = None, temperature: float | str = 298.15) -> Shelf:
    """Return the shelf that the program ships, or one read from another folder of tables.

    Raises
    ------
    BadFile
        If a table is missing or a cell in it is wrong; says file, row and column.

    Examples
    --------
    >>> shelf = load_shelf()
    >>> shelf["67-64-1"].name
    'acetone'
    """
    folder = folder or shipped()
    identities = read_identities(folder)
    records = read_records(folder)
    columns = preferred_columns([who.id for who in identities], records)
    return Shelf(
        identities, columns, parse_temperature(temperature), records=records, folder=folder
    )


def all_columns() -> list[str]:
    """Return every unit-bearing column name the shelf can show, identity columns first."""
    return ["name", "cas", "smiles", "formula", "family", *BY_COLUMN]


def known_quantities() -> list[str]:
    """Return the plain names of all quantities."""
    return list(QUANTITIES)
