"""Which of several values is preferred, and how uncertain it is.

Order: a value chosen by hand in the curated files; then measured before estimated, tables before
memory; then the one nearest the wanted temperature; among those the first in the order of sources
below. Of three or more densities or viscosities at one temperature the one nearest their median
is preferred instead. Of several flammability limits or autoignition temperatures the most cautious
is preferred: lowest lower limit, highest upper limit, lowest autoignition temperature. They depend
on vessel and criterion, and two of the three tables share origins, so a majority proves nothing.

The standard uncertainty of the preferred value is the source's own, combined in quadrature with
the spread of all accepted values at that temperature: 1.48 times the median distance from the
preferred value, which for two values is 0.74 times their difference and which one blunder among
three cannot spoil.
"""

from __future__ import annotations

from statistics import median

from steps.candidate import Candidate

ORDER = (
    "symmetry",
    "nist-cccbdb-2015",
    "crc-2014-index",
    "iupac-critical-1995-2015",
    "crc-2014-organic",
    "crc-2014-critical",
    "crc-2014-vaporization",
    "crc-2014-permittivity-fit",
    "crc-2014-permittivity",
    "perry-2007-density",
    "vdi-2010-density",
    "crc-2014-inorganic",
    "crc-2014-organic-carried",
    "mcgarry-1983",
    "poling-2001-wagner",
    "poling-2001-antoine",
    "perry-2007-pressure",
    "vdi-2010-pressure",
    "landolt-1999-antoine",
    "mulero-2012",
    "jasper-1972",
    "vdi-2010-tension",
    "perry-2007-viscosity",
    "vdi-2010-viscosity",
    "viswanath-1989",
    "vdi-2010-vaporization",
    "perry-2007-vaporization",
    "gharagheizi-2013",
    "mathews-1972",
    "muller-2012",
    "poling-2001",
    "nist-webbook",
    "open-melting-point-2014",
    "crc-2014-logp",
    "syrres-2006-logp",
    "iec-60079-20-1-2010",
    "nfpa-497-2008",
    "serat-2017",
    "wikidata",
    "lorentz-lorenz",
)


CAUTIOUS = {
    "autoignition_temperature": 1.0,
    "lower_flammability_limit": 1.0,
    "upper_flammability_limit": -1.0,
}
"""Quantities of which the most cautious value is preferred; the sign by which to sort them."""


def choose(candidates: list[Candidate], wanted: float) -> list[Candidate]:
    """Return the candidates in a fixed order with one preferred (none if all are rejected)."""
    accepted = [c for c in candidates if not c.rejected]
    if not accepted:
        return _sorted(candidates, wanted)
    best = min(accepted, key=lambda c: _rank(c, wanted))
    best = _most_cautious(accepted, _median_of_equals(accepted, best), wanted)
    distances = [
        abs(c.value - best.value)
        for c in accepted
        if _same_temperature(c, best) and (c.kind != "estimated" or best.kind == "estimated")
    ]
    spread = 1.4826 * median(distances)
    chosen = best.change(preferred=True, uncertainty=(best.uncertainty**2 + spread**2) ** 0.5)
    return _sorted([chosen if c is best else c for c in candidates], wanted)


def _median_of_equals(accepted: list[Candidate], best: Candidate) -> Candidate:
    """Of three or more tabulated values at the temperature of `best`, the nearest to the median."""
    if best.quantity not in ("density", "viscosity") or best.chosen_by_hand:
        return best
    equals = [
        c for c in accepted if _same_temperature(c, best) and not c.source.startswith("memory-")
    ]
    if len(equals) < 3:
        return best
    middle = median(c.value for c in equals)
    return min(equals, key=lambda c: (abs(c.value - middle), c.source))


def _most_cautious(accepted: list[Candidate], best: Candidate, wanted: float) -> Candidate:
    """Of fire data the most cautious value; other quantities keep `best`."""
    sign = CAUTIOUS.get(best.quantity)
    if sign is None or best.chosen_by_hand:
        return best
    return min(accepted, key=lambda c: (sign * c.value, _rank(c, wanted)))


def _rank(candidate: Candidate, wanted: float) -> tuple[bool, bool, bool, float, int, str]:
    """Sort key: by hand, not estimated, not from memory, near in temperature, order of sources."""
    gap = 0.0 if candidate.temperature is None else abs(candidate.temperature - wanted)
    order = ORDER.index(candidate.source) if candidate.source in ORDER else len(ORDER)
    recalled = candidate.source.startswith("memory-")
    return (
        not candidate.chosen_by_hand,
        candidate.kind == "estimated",
        recalled,
        round(gap, 1),
        order,
        candidate.source,
    )


def _same_temperature(one: Candidate, other: Candidate) -> bool:
    """Whether two values hold for the same temperature."""
    if one.temperature is None or other.temperature is None:
        return True
    return abs(one.temperature - other.temperature) <= 0.5


def _sorted(candidates: list[Candidate], wanted: float) -> list[Candidate]:
    """Preferred first, rejected last, otherwise by the rule."""
    return sorted(candidates, key=lambda c: (not c.preferred, c.rejected, _rank(c, wanted)))
