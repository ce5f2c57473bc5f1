"""Whether the freely rotating average can be trusted for a pair, and the reasons in numbers.

The verdict starts from the actual error of the leading term at the pair's distance, on the
internal energy: `sound` below 5 %, `strained` below 25 %, else `unreliable`. Other reasons can
only lower it. Each reason carries its number and the verdict it lowers to (None: for information).
"""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass

from stillroom.chem.data.constants import DEBYE
from stillroom.chem.forces.contact import elongation
from stillroom.chem.liquids.association import SMALLEST_DIPOLE
from stillroom.chem.liquids.liquid import Liquid

VERDICTS = ("sound", "strained", "unreliable")

SOUND_BELOW = 0.05
STRAINED_BELOW = 0.25

POLAR_ABOVE = SMALLEST_DIPOLE
"""0.3 D: below this net moment a molecule's orientation term is negligible (0.3 D like pairs at
0.5 nm: x = 0.02, energy below 0.001 kJ/mol), so reasons about its orientation do not count."""

CANCELLED_BELOW = 0.5
"""Net moment over the root sum of squares of the group moments: groups placed at random give 1 on
average; at half of it or less they oppose each other and neighbours feel groups, not the net."""

KIRKWOOD_RANGE = (0.6, 1.6)
"""Outside, neighbours order each other: alcohols 2.5 to 3.5 (chains), acids below 0.7 (rings);
liquids without hydrogen bonds mostly 0.7 to 1.3 (J. G. Kirkwood, J. Chem. Phys. 7 (1939) 911)."""

VOLUME_KNOWN_WITHIN = 0.03
"""Relative standard uncertainty of a molar volume: within it, contact is known to 1 %, well inside
the 3 % of the contact rule itself, so an estimate (a density carried to another temperature) does
not lower the verdict."""

ELONGATED_ABOVE = 1.6
"""See `stillroom.chem.forces.contact.elongation`."""


@dataclass(frozen=True, slots=True)
class Reason:
    """One reason: `code`, a sentence, its number, and the verdict it lowers to (or None)."""

    code: str
    text: str
    value: float | None
    lowers_to: str | None = None


def coupling_verdict(leading_order_error: float) -> str:
    """Return the verdict from the leading term's relative error alone.

    Examples
    --------
    >>> [coupling_verdict(e) for e in (0.01, 0.1, 0.5)]
    ['sound', 'strained', 'unreliable']
    """
    if leading_order_error < SOUND_BELOW:
        return "sound"
    return "strained" if leading_order_error < STRAINED_BELOW else "unreliable"


def judge(
    a: Liquid, b: Liquid, coupling: float, leading_order_error: float
) -> tuple[str, tuple[Reason, ...]]:
    """Return verdict and reasons for `a` with `b` at a given coupling.

    Parameters
    ----------
    a, b : Liquid
        Both at the temperature of the question.
    coupling, leading_order_error : float
        x and the relative error of the leading internal energy at the distance of the question.
    """
    first = Reason(
        "coupling",
        f"coupling x = {coupling:.2f}: the leading term overstates orientation by "
        f"{leading_order_error:.1%}",
        leading_order_error,
        coupling_verdict(leading_order_error),
    )
    reasons = [first, *between(a, b)]
    for liquid in _each(a, b):
        reasons += own_reasons(liquid)
    if polar(a) and polar(b):
        for liquid in _each(a, b):
            reasons += orientation_reasons(liquid)
    return VERDICTS[level(reasons)], tuple(reasons)


def level(reasons: Iterable[Reason]) -> int:
    """Return the index in `VERDICTS` of the lowest verdict that any of the reasons asks for."""
    return max((VERDICTS.index(r.lowers_to) for r in reasons if r.lowers_to), default=0)


def polar(liquid: Liquid) -> bool:
    """Return whether the net moment is large enough for orientation to matter."""
    return liquid.dipole is not None and liquid.dipole.si > POLAR_ABOVE


def between(a: Liquid, b: Liquid) -> list[Reason]:
    """Return the reasons that lie in the two liquids together."""
    reasons = list(_hydrogen_bond(a, b))
    if a.identity.structure.vapour_dimer and b.identity.structure.vapour_dimer:
        text = "carboxylic acids pair up by two hydrogen bonds, even in the vapour"
        reasons.append(Reason("vapour-dimer", text, 2.0, "unreliable"))
    return reasons


def own_reasons(liquid: Liquid) -> list[Reason]:
    """Return the reasons that hold for a liquid whatever its partner is."""
    return list(_own_reasons(liquid))


def orientation_reasons(liquid: Liquid) -> list[Reason]:
    """Return the reasons that count only where both partners are polar."""
    return list(_orientation_reasons(liquid))


def _each(a: Liquid, b: Liquid) -> tuple[Liquid, ...]:
    return (a,) if a.same_as(b) else (a, b)


def _hydrogen_bond(a: Liquid, b: Liquid) -> Iterator[Reason]:
    """Donor strength times acceptor strength, the stronger of both directions."""
    strength = {"strong": 1.0, "weak": 0.5, "none": 0.0, None: 0.0}
    best, donor, acceptor = 0.0, a, b
    for giver, taker in ((a, b), (b, a)):
        product = (
            strength[giver.identity.structure.hbond_donor]
            * strength[taker.identity.structure.hbond_acceptor]
        )
        if product > best:
            best, donor, acceptor = product, giver, taker
    if best >= 0.5:
        yield Reason(
            "hydrogen-bond",
            f"hydrogen bond from {donor.name} to {acceptor.name} "
            f"(strength {best:g} of 1): not in orientation, induction or dispersion",
            best,
            "unreliable" if best == 1.0 else "strained",
        )


def _own_reasons(liquid: Liquid) -> Iterator[Reason]:
    cancelled = _cancelled_dipole(liquid)
    if cancelled:
        yield cancelled
    structure, volume = liquid.identity.structure, liquid.molar_volume
    if structure.longest_path_bonds is not None and volume is not None:
        ratio = float(elongation(structure.longest_path_bonds, volume.si))
        if ratio > ELONGATED_ABOVE:
            yield Reason(
                "one-centre",
                f"{liquid.name} is {ratio:.1f} times as long as its contact distance: one centre "
                "is too coarse, and this is not its cohesive energy",
                ratio,
                "strained",
            )
    guessed = [
        value.quantity
        for name in ("dipole", "polarizability", "ionization_energy", "molar_volume")
        if (value := liquid.values.get(name))
        and value.kind in ("estimated", "computed")
        and not (name == "molar_volume" and value.si_uncertainty <= VOLUME_KNOWN_WITHIN * value.si)
    ]
    if guessed:
        yield Reason(
            "estimated-input",
            f"{liquid.name}: {', '.join(g.replace('_', ' ') for g in guessed)} not measured",
            float(len(guessed)),
            "strained",
        )
    if liquid.ionization_energy is None:
        yield Reason(
            "no-ionization-energy",
            f"{liquid.name} has no ionization energy here: dispersion from the model without it",
            None,
        )
    outside = liquid.outside_liquid_range()
    if outside:
        yield Reason(
            "outside-liquid-range",
            f"{liquid.name} at {liquid.temperature - 273.15:.1f} °C is {outside} (1 atm)",
            liquid.temperature - 273.15,
            "strained",
        )


def _orientation_reasons(liquid: Liquid) -> Iterator[Reason]:
    structure, g = liquid.identity.structure, liquid.kirkwood_factor
    if structure.flexible_polar_bonds:
        count = structure.flexible_polar_bonds
        bonds = "1 bond turns" if count == 1 else f"{count} bonds turn"
        yield Reason(
            "conformers",
            f"{liquid.name}: {bonds} its polar groups, so its dipole moment is an average over "
            "shapes",
            float(count),
            "strained",
        )
    if g is not None and not KIRKWOOD_RANGE[0] <= g.number <= KIRKWOOD_RANGE[1]:
        way = "parallel" if g.number > 1 else "against each other"
        yield Reason(
            "kirkwood",
            f"{liquid.name}: Kirkwood factor {g.number:.2f} far from 1, neighbours line up {way}",
            g.number,
            "strained",
        )


def _cancelled_dipole(liquid: Liquid) -> Reason | None:
    """Return the reason for polar groups that sum to nearly nothing, if it holds."""
    structure, dipole = liquid.identity.structure, liquid.dipole
    rss = structure.group_dipole_rss
    if dipole is None or not rss or not structure.polar_groups or structure.polar_groups < 2:
        return None
    ratio = dipole.si / rss
    if ratio >= CANCELLED_BELOW:
        return None
    return Reason(
        "cancelled-dipole",
        f"{liquid.name}: {structure.polar_groups} polar groups of {rss / DEBYE:.1f} D together "
        f"leave {dipole.number:.2f} D; neighbours feel the groups",
        float(ratio),
        "strained",
    )
