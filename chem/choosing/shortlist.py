"""What is kept on a shortlist: liquids and pairs, by their ids, each with a note."""

from __future__ import annotations

from dataclasses import dataclass

from stillroom.chem.data.errors import AmbiguousLiquid, UnknownLiquid
from stillroom.chem.shelf.shelf import Shelf

DEFAULT_NAME = "shortlist"
"""The list that is there before any is named."""


@dataclass(frozen=True, slots=True)
class Entry:
    """One liquid (`b` empty) or one pair, by liquid ids; a pair's ids are in sorted order."""

    a: str
    b: str = ""
    note: str = ""

    @classmethod
    def pair(cls, a: str, b: str, note: str = "") -> Entry:
        """Return the entry of an unordered pair."""
        first, second = sorted((a, b))
        return cls(first, second, note)

    @property
    def kind(self) -> str:
        """`liquid` or `pair`."""
        return "pair" if self.b else "liquid"

    @property
    def title(self) -> str:
        """What to call it."""
        return f"{self.a} + {self.b}" if self.b else self.a

    @property
    def key(self) -> tuple[str, str]:
        """What makes it the same entry: both ids."""
        return self.a, self.b

    def names(self, shelf: Shelf) -> str:
        """Return what the shelf calls it; ids where it knows no name."""
        gone = self.missing_from(shelf)
        return " + ".join(i if i in gone else shelf[i].name for i in self.key if i)

    def missing_from(self, shelf: Shelf) -> list[str]:
        """Return the ids that are no longer on the shelf."""
        gone = []
        for liquid in filter(None, self.key):
            try:
                shelf.row(liquid)
            except (UnknownLiquid, AmbiguousLiquid):
                gone.append(liquid)
        return gone
