"""Ranks every pair of a shelf, or one liquid against the rest, by a stated key.

All pairs are evaluated at their own contact distance in blocks of rows, so memory stays bounded;
the best `top` are kept by partition.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np
from numpy.typing import NDArray

from stillroom.chem.data.constants import REFERENCE_TEMPERATURE
from stillroom.chem.data.errors import OutsideRange
from stillroom.chem.data.units import parse_temperature
from stillroom.chem.forces.contact import contact_distance
from stillroom.chem.pairs.terms import Molecule, PairTerms, pair_terms
from stillroom.chem.shelf.shelf import Shelf

if TYPE_CHECKING:
    import pandas as pd

Array = NDArray[np.float64]
Rows = NDArray[np.intp]

_BLOCK = 1 << 18  # pairs evaluated at once: about 30 MB of work arrays


@dataclass(frozen=True, slots=True)
class Key:
    """What to rank by: the column it sorts on, its meaning, and which end comes first."""

    column: str
    meaning: str
    largest_first: bool


KEYS = {
    "total": Key("total_energy_kJ_mol", "total internal energy at contact", False),
    "orientation": Key("orientation_share", "share of orientation in the total", True),
    "induction": Key("induction_share", "share of induction in the total", True),
    "dispersion": Key("dispersion_share", "share of dispersion in the total", True),
    "interchange": Key(
        "interchange_energy_kJ_mol", "unlike energy minus the mean of both like ones", False
    ),
    "coupling": Key("coupling", "dipole coupling x in units of kT", True),
    "leading-error": Key("leading_order_error", "relative error of the leading term", True),
}
"""Keys of `rank_pairs`. With the usual direction the strongest effect comes first: the most
negative energies, the largest shares, couplings and errors."""


@dataclass(frozen=True, slots=True)
class Ranking:
    """Pairs in rank order as columns (float arrays of shape (k,), unit in the name).

    `a` and `b` are rows of the shelf. `considered` pairs were evaluated; `left_out` are the rows
    that lack a dipole moment, polarizability or molar volume at this temperature. `descending`
    tells the direction used; ties are in the order of the shelf's rows.
    """

    key: str
    descending: bool
    temperature: float
    a: Rows
    b: Rows
    columns: dict[str, Array]
    considered: int
    left_out: Rows

    def __len__(self) -> int:
        return int(self.a.size)


class PairEvaluator:
    """Evaluates pairs of rows of a shelf at contact; like-pair totals are worked out once."""

    def __init__(self, shelf: Shelf, model: str = "auto") -> None:
        self.shelf = shelf
        self.model = model
        column = shelf.columns
        self._dipole = column["dipole"].si
        self._alpha = column["polarizability"].si
        self._ionization = column["ionization_energy"].si
        self._electrons = shelf.electrons
        self._volume = column["molar_volume"].si
        every = np.arange(len(shelf))
        self.like_total: Array = self.terms(every, every).total
        """Total internal energy of each liquid with itself at contact, J/mol, NaN if unknown."""

    def terms(self, a: Rows, b: Rows) -> PairTerms:
        """Return all energy terms for rows `a` with rows `b` (shapes broadcast)."""
        distance = contact_distance(self._volume[a], self._volume[b])
        return pair_terms(
            self._molecule(a), self._molecule(b), distance, self.shelf.temperature, self.model
        )

    def columns(self, a: Rows, b: Rows) -> dict[str, Array]:
        """Return the ranking columns of pairs `a`, `b` (float arrays, unit in each name)."""
        t = self.terms(a, b)
        total = t.total
        orientation, induction, dispersion = t.shares
        return {
            "total_energy_kJ_mol": total / 1e3,
            "orientation_energy_kJ_mol": t.orientation / 1e3,
            "induction_energy_kJ_mol": t.induction / 1e3,
            "dispersion_energy_kJ_mol": t.dispersion / 1e3,
            "orientation_share": orientation,
            "induction_share": induction,
            "dispersion_share": dispersion,
            "interchange_energy_kJ_mol": (total - (self.like_total[a] + self.like_total[b]) / 2)
            / 1e3,
            "coupling": t.coupling,
            "leading_order_error": t.leading_order_error,
            "distance_nm": t.distance * 1e9,
        }

    def _molecule(self, rows: Rows) -> Molecule:
        return Molecule(
            self._dipole[rows], self._alpha[rows], self._ionization[rows], self._electrons[rows]
        )


def rank(
    shelf: Shelf,
    by: str = "total",
    *,
    top: int | None = None,
    rows: Rows | None = None,
    partner: int | None = None,
    like: bool | None = None,
    ascending: bool | None = None,
    model: str = "auto",
    progress: Callable[[int, int], bool] | None = None,
) -> Ranking:
    """Rank pairs of liquids of `shelf` at the shelf's temperature, each at contact.

    Parameters
    ----------
    shelf : Shelf
        Where the rows belong.
    by : str
        One of `KEYS`.
    top : int, optional
        Keep the first `top`; all by default.
    rows : int array (n,), optional
        Rows to pair; the whole shelf by default.
    partner : int, optional
        Pair only this row with each of `rows`; by default each unordered pair of `rows` once.
    like : bool, optional
        Whether pairs of a liquid with itself take part; by default they do, except for
        `interchange`, which is zero for them.
    ascending : bool, optional
        Smallest first; by default the key's own direction.
    model : str
        Dispersion model.
    progress : callable, optional
        Called with (pairs done, pairs in all); returning False stops with what is there.

    Raises
    ------
    OutsideRange
        If `by`, `top` or `model` cannot be used.
    """
    if by not in KEYS:
        raise OutsideRange("ranking key", f"'{by}'", "one of " + ", ".join(KEYS))
    if top is not None and top < 1:
        raise OutsideRange("number of pairs to show", str(top), "1 or more")
    key = KEYS[by]
    like = by != "interchange" if like is None else like
    descending = key.largest_first if ascending is None else not ascending
    evaluator = PairEvaluator(shelf, model)
    chosen = np.arange(len(shelf)) if rows is None else np.asarray(rows, dtype=np.intp)
    usable = ~np.isnan(evaluator.like_total)
    left_out = chosen[~usable[chosen]]
    chosen = chosen[usable[chosen]]

    best: tuple[Rows, Rows, Array] = (_no_rows(), _no_rows(), np.empty(0))
    considered = 0
    for a, b, done, total in _blocks(chosen, partner, like, usable):
        values = evaluator.columns(a, b)[key.column]
        known = ~np.isnan(values)  # no model for a pair whose inputs are of different kinds
        a, b, values = a[known], b[known], values[known]
        considered += a.size
        best = _keep(best, (a, b, values), top, descending)
        if progress is not None and not progress(done, total):
            break
    a, b, values = best
    order = np.argsort(-values if descending else values, kind="stable")
    a, b = a[order], b[order]
    return Ranking(
        by, descending, shelf.temperature, a, b, evaluator.columns(a, b), considered, left_out
    )


def rank_pairs(
    shelf: Shelf,
    by: str = "total",
    top: int | None = None,
    temperature: float | str = REFERENCE_TEMPERATURE,
    with_liquid: str | None = None,
    where: str = "",
    *,
    like: bool | None = None,
    ascending: bool | None = None,
    model: str = "auto",
) -> pd.DataFrame:
    """Return the ranked pairs as a DataFrame, best first; see `rank` for the arguments.

    Columns: `a, b, a_id, b_id`, then those of `PairEvaluator.columns`, and `verdict` with all its
    reasons counted. `with_liquid` pairs one liquid with all others; `where`
    filters the liquids. `attrs` carries key, direction, temperature and the liquids left out.
    """
    import pandas as pd

    from stillroom.chem.pairs.verdicts import VerdictBook

    at = shelf.at(parse_temperature(temperature))
    partner = None if with_liquid is None else at.row(with_liquid)
    ranking = rank(
        at, by, top=top, rows=at.where(where), partner=partner, like=like, ascending=ascending,
        model=model,
    )  # fmt: skip
    who = at.identities
    frame = pd.DataFrame(
        {
            "a": [who[r].name for r in ranking.a],
            "b": [who[r].name for r in ranking.b],
            "a_id": [who[r].id for r in ranking.a],
            "b_id": [who[r].id for r in ranking.b],
            **ranking.columns,
            "verdict": VerdictBook(at).verdicts(
                ranking.a, ranking.b, ranking.columns["leading_order_error"]
            ),
        }
    )
    frame.attrs = {
        "by": by,
        "descending": ranking.descending,
        "temperature_K": at.temperature,
        "left_out": [who[r].name for r in ranking.left_out],
    }
    return frame


def _no_rows() -> Rows:
    return np.empty(0, dtype=np.intp)


def _blocks(
    chosen: Rows, partner: int | None, like: bool, usable: NDArray[np.bool_]
) -> Iterator[tuple[Rows, Rows, int, int]]:
    """Yield index blocks (a, b, pairs done after it, pairs in all); each unordered pair once."""
    if partner is not None:
        if usable[partner]:
            others = chosen if like else chosen[chosen != partner]
            yield np.full_like(others, partner), others, others.size, others.size
        return
    n = chosen.size
    total = n * (n + 1) // 2 if like else n * (n - 1) // 2
    step = max(1, _BLOCK // max(n, 1))
    done = 0
    for start in range(0, n, step):
        first = np.arange(start, min(start + step, n))
        wanted = np.arange(n)[None, :] - first[:, None] >= (0 if like else 1)
        i, j = np.nonzero(wanted)
        done += i.size
        yield chosen[first[i]], chosen[j], done, total


def _keep(
    best: tuple[Rows, Rows, Array],
    new: tuple[Rows, Rows, Array],
    top: int | None,
    descending: bool,
) -> tuple[Rows, Rows, Array]:
    """Merge two sets of pairs and keep the first `top`; ties keep the earlier pair."""
    a, b, values = (np.concatenate([x, y]) for x, y in zip(best, new, strict=True))
    if top is None or values.size <= top:
        return a, b, values
    keys = -values if descending else values
    limit = np.partition(keys, top - 1)[top - 1]
    inside, edge = np.flatnonzero(keys < limit), np.flatnonzero(keys == limit)
    kept = np.sort(np.concatenate([inside, edge[: top - inside.size]]))
    return a[kept], b[kept], values[kept]
