"""Short texts about one liquid and one pair that several screens show."""

from __future__ import annotations

from stillroom.chem.data.errors import MissingValue
from stillroom.chem.liquids.liquid import Liquid
from stillroom.chem.pairs.pair import FORCES, PairInteraction, interact
from stillroom.tui.formatting import VERDICT_MARKS, share
from stillroom.tui.widgets.bars import share_bar


def like_pair(liquid: Liquid) -> PairInteraction | str:
    """Return the liquid with itself at contact, or what is missing for it."""
    try:
        return interact(liquid, liquid, liquid.temperature)
    except MissingValue as problem:
        return str(problem)


def like_summary(liquid: Liquid, width: int) -> list[str]:
    """Return two lines: the shares of the like pair as a bar, and the verdict."""
    pair = like_pair(liquid)
    if isinstance(pair, str):
        return [pair]
    return [shares_line(pair, width, "like pair"), verdict_line(pair)]


def shares_line(pair: PairInteraction, width: int, what: str) -> str:
    """Return the energy and the shares of a pair as words and, in the room left, a bar."""
    parts = "  ".join(f"{f} {share(pair.shares[f])}" for f in FORCES)
    words = f"{what} {float(pair.terms.total) / 1e3:.2f} kJ/mol  {parts}  "
    return words + share_bar([pair.shares[f] for f in FORCES], min(40, width - len(words)))


def verdict_line(pair: PairInteraction) -> str:
    """Return the verdict with the codes of the reasons that lower it."""
    codes = [r.code for r in pair.reasons if r.lowers_to not in (None, "sound")]
    why = f": {', '.join(dict.fromkeys(codes))}" if codes else ""
    return f"rotating average {VERDICT_MARKS[pair.verdict]} {pair.verdict}{why}"
