"""Finds a liquid from what a user typed: id, name, synonym, CAS number, formula or structure."""

from __future__ import annotations

import unicodedata
from collections import defaultdict
from collections.abc import Sequence

from stillroom.chem.data.clean import clean_text
from stillroom.chem.data.errors import AmbiguousLiquid, UnknownLiquid
from stillroom.chem.data.quantities import near
from stillroom.chem.liquids.liquid import Identity

_IGNORED = dict.fromkeys(map(ord, " _-‐‑‒–—−"))  # spaces and every hyphen that gets pasted


def fold(text: str) -> str:
    """Return `text` without the differences that do not tell liquids apart: case, spaces, hyphens.

    Full-width and subscript characters count as plain ones.

    Examples
    --------
    >>> fold("N,N-Dimethyl Formamide") == fold("n,n-dimethylformamide")
    True
    """
    return _plain(text).casefold().translate(_IGNORED)


def _plain(text: str) -> str:
    return text if text.isascii() else unicodedata.normalize("NFKC", text)


class NameIndex:
    """Every name of every liquid, folded, to row numbers."""

    def __init__(self, identities: Sequence[Identity]) -> None:
        self._identities = identities
        self._exact: dict[str, int] = {}
        self._formula: dict[str, list[int]] = defaultdict(list)
        # Ids and names win over synonyms, synonyms over CAS numbers and structures.
        for row, who in enumerate(identities):
            for text in (who.id, who.name):
                self._exact.setdefault(fold(text), row)
        for row, who in enumerate(identities):
            for text in (*who.synonyms, who.cas, who.inchikey):
                if text:
                    self._exact.setdefault(fold(text), row)
            if who.formula:
                self._formula[who.formula.casefold()].append(row)
        self._smiles = {who.smiles: row for row, who in enumerate(identities) if who.smiles}

    def row(self, text: str) -> int:
        """Return the row of the liquid that `text` names.

        Raises
        ------
        UnknownLiquid
            If nothing fits; near names are suggested.
        AmbiguousLiquid
            If a formula fits several liquids.
        """
        typed = clean_text(text, 120)
        found = self._exact.get(fold(typed))
        if found is None:
            found = self._smiles.get(typed)
        if found is not None:
            return found
        rows = self._formula.get(_plain(typed).casefold(), [])
        if len(rows) == 1:
            return rows[0]
        if rows:
            raise AmbiguousLiquid(typed, [self._identities[r].name for r in rows])
        raise UnknownLiquid(typed, self.suggest(typed))

    def suggest(self, text: str) -> list[str]:
        """Return up to three names that look like `text`."""
        suggestions: list[str] = []
        for key in near(fold(text), self._exact, 6):
            name = self._identities[self._exact[key]].name
            if name not in suggestions:
                suggestions.append(name)
        return suggestions[:3]

    def matches(self, text: str) -> list[int]:
        """Return the rows with any name, CAS number, formula or family containing `text`.

        The liquid that `text` names comes first, then those whose name begins with it.
        """
        key = fold(text)
        found = [
            row
            for row, who in enumerate(self._identities)
            if any(
                key in fold(t)
                for t in (who.name, who.id, *who.synonyms, who.cas, who.formula, who.family)
            )
        ]
        exact = self._exact.get(key)
        return sorted(
            found,
            key=lambda row: (row != exact, not fold(self._identities[row].name).startswith(key)),
        )
