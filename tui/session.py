"""What the workbench is looking at: shelf, temperature, views; in the store at every change."""

from __future__ import annotations

from contextlib import suppress
from dataclasses import asdict, dataclass, field
from typing import Any

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.choosing.shortlist import DEFAULT_NAME, Entry
from stillroom.chem.choosing.store import Store
from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.errors import StillroomError, UnknownShortlist
from stillroom.chem.data.quantities import BY_COLUMN, QUANTITIES
from stillroom.chem.data.units import parse_temperature
from stillroom.chem.pairs.ranking import KEYS
from stillroom.chem.shelf.filters import TEXT_FIELDS
from stillroom.chem.shelf.shelf import Shelf

Rows = NDArray[np.intp]

DEFAULT_COLUMNS = (
    "family",
    "dipole",
    "polarizability",
    "permittivity",
    "boiling_point",
    "solubility_parameter",
    "flash_point",
    "ionization_energy",
    "molar_volume",
    "vaporization_enthalpy",
)
_OPERATORS = ("<", ">", "=", "~", "≤", "≥", "known(")


@dataclass
class ShelfView:
    """How the shelf is shown."""

    filter: str = ""
    sort: str = "name"
    descending: bool = False
    columns: list[str] = field(default_factory=lambda: list(DEFAULT_COLUMNS))
    liquid: str = ""


@dataclass
class PairsView:
    """How the ranked pairs are shown. `scope` is `all`, `filtered` or `with`."""

    scope: str = "filtered"
    partner: str = ""
    key: str = "total"
    ascending: bool | None = None
    names: str = ""


class Session:
    """The state that all screens share."""

    def __init__(self, shelf: Shelf, store: Store) -> None:
        self.shelf = shelf
        self.store = store
        self.view = ShelfView()
        self.pairs = PairsView()
        self.shortlist = DEFAULT_NAME
        self.screen = "shelf"
        self._restore()

    @property
    def temperature(self) -> float:
        """K."""
        return self.shelf.temperature

    def set_temperature(self, text: str) -> None:
        """Move the whole session to another temperature; raises what `parse_temperature` does."""
        self.shelf = self.shelf.at(parse_temperature(text))
        self.save()

    def rows(self, text: str | None = None) -> Rows:
        """Return the shelf rows to show for a filter text, in order.

        A text with a comparison in it is a filter expression, any other is searched for in names,
        CAS numbers, formulas and families.

        Raises
        ------
        StillroomError
            If the expression cannot be read.
        """
        typed = self.view.filter if text is None else text
        wanted = np.zeros(len(self.shelf), dtype=bool)
        wanted[self.matching(typed)] = True
        order = self.shelf.order(self.view.sort, descending=self.view.descending)
        return order[wanted[order]]

    def matching(self, text: str) -> Rows:
        """Return the rows that a filter text selects, the best match of a plain text first."""
        if any(operator in text for operator in _OPERATORS):
            return self.shelf.where(text)
        return self.shelf.matching(text) if text.strip() else np.arange(len(self.shelf))

    def kept_liquids(self) -> frozenset[str]:
        """Return the ids of the liquids on the current shortlist."""
        return frozenset(e.a for e in self.entries() if e.kind == "liquid")

    def keep_liquid(self, liquid: str) -> str:
        """Put a liquid on the current shortlist; return what happened, in words."""
        added = self.store.add(self.shortlist, Entry(liquid))
        return f"{liquid} {'put on' if added else 'is already on'} {self.shortlist}"

    def keep_pair(self, a: str, b: str) -> str:
        """Put a pair on the current shortlist; return what happened, in words."""
        added = self.store.add(self.shortlist, Entry.pair(a, b))
        return f"{a} + {b} {'put on' if added else 'is already on'} {self.shortlist}"

    def entries(self) -> list[Entry]:
        """Return the current shortlist; one that another program deleted is empty."""
        try:
            return self.store.entries(self.shortlist)
        except UnknownShortlist:
            return []

    def use_shortlist(self, name: str) -> None:
        """Switch to a shortlist, made if there is none of this name."""
        self.shortlist = self.store.create(name)
        self.save()

    def save(self) -> None:
        """Write the state to the store."""
        self.store.set_setting(
            "session",
            {
                "temperature_K": self.temperature,
                "view": asdict(self.view),
                "pairs": asdict(self.pairs),
                "shortlist": self.shortlist,
                "screen": self.screen,
            },
        )

    def _restore(self) -> None:
        """Take up the last state as far as it still makes sense."""
        saved = self.store.get_setting("session")
        if not isinstance(saved, dict):
            return
        temperature = saved.get("temperature_K", REFERENCE_TEMPERATURE)
        with suppress(StillroomError, TypeError, ValueError):
            self.shelf = self.shelf.at(float(temperature))
        _fill(self.view, saved.get("view"))
        _fill(self.pairs, saved.get("pairs"))
        self._mend()
        self.shortlist = str(saved.get("shortlist", self.shortlist))
        self.screen = str(saved.get("screen", self.screen))

    def _mend(self) -> None:
        """Replace what an older version saved and this one does not know."""
        known = [
            c for c in self.view.columns if c in QUANTITIES or c in ("family", "formula", "cas")
        ]
        self.view.columns = known or list(DEFAULT_COLUMNS)
        if self.view.sort not in (*TEXT_FIELDS, *QUANTITIES, *BY_COLUMN):
            self.view.sort = "name"
        if self.pairs.key not in KEYS:
            self.pairs.key = "total"
        if self.pairs.scope == "with" and self.pairs.partner not in self.shelf:
            self.pairs.scope = "filtered"
        try:
            self.matching(self.view.filter)
        except StillroomError:
            self.view.filter = ""


def _fill(target: ShelfView | PairsView, saved: Any) -> None:
    """Copy saved fields whose type is still the right one."""
    if not isinstance(saved, dict):
        return
    for name, default in asdict(target).items():
        value = saved.get(name, default)
        if isinstance(value, type(default)) or default is None:
            setattr(target, name, value)
